package changes

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"math"
	"sort"
	"strings"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/export"
	"ohmfolio/generator/form"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
	"ohmfolio/generator/statement"
	"ohmfolio/generator/study"
)

// Freeze states everything that a reference says now. Outcomes are the judged
// studies of each document, by its room and stem: "reports/x". Each material
// is stated when it is asked for, so that the whole is never held in memory.
func Freeze(lib *library.Library, outcomes map[string][]*study.Outcome, edition string) *Statement {
	s := &Statement{Format: Format, Edition: edition, Title: lib.Settings.Title, Organisation: lib.Settings.Organisation,
		lib: lib, live: append([]*material.Record{}, lib.Materials...), Studies: []Study{}, Documents: []Document{}, Sources: []Source{}}
	sort.Slice(s.live, func(i, j int) bool { return s.live[i].ID < s.live[j].ID }) // not as their files: "-" comes before "."
	for _, id := range lib.SourceIDs {
		src := lib.Source(id)
		s.Sources = append(s.Sources, Source{id, statement.SourceText(src), string(src.Checked), src.SupersededBy, src.Note})
	}
	for _, d := range lib.Documents {
		judged := outcomes[strings.TrimPrefix(d.Room+"/"+d.Stem, "/")]
		path := documentPath(d)
		for _, o := range judged {
			s.Studies = append(s.Studies, freezeStudy(o, path))
		}
		if on := restsOn(lib, d, judged); len(on) > 0 {
			s.Documents = append(s.Documents, Document{path, d.Page.Title, on})
		}
	}
	return s
}

func documentPath(d *library.Document) string {
	switch d.Room {
	case "guides":
		return "guide/" + d.Stem + ".html"
	case "reports":
		return "report/" + d.Stem + ".html"
	}
	return "index.html"
}

func restsOn(lib *library.Library, d *library.Document, judged []*study.Outcome) []string {
	seen := map[string]bool{}
	var list []string
	add := func(id string) {
		if r := lib.Material(id); r != nil && !seen[r.ID] {
			seen[r.ID] = true
			list = append(list, r.ID)
		}
	}
	for _, o := range judged {
		for _, m := range o.Materials {
			add(m.Material)
		}
	}
	for _, n := range d.Page.Numbers {
		add(statement.TargetID(n.Target))
	}
	sort.Strings(list)
	return list
}

func freezeStudy(o *study.Outcome, path string) Study {
	s := Study{Study: o.Study, Title: o.Title, Document: path, Binding: o.Binding, NotHeld: len(o.Broken()), Parameters: append([]study.Parameter{}, o.Parameters...), Materials: []Verdict{}}
	for _, m := range o.Materials {
		s.Materials = append(s.Materials, Verdict{Material: m.Material, Size: m.Size, Verdict: string(m.Verdict),
			Requirements: append([]study.Requirement{}, m.Requirements...), Evidence: append([]study.Evidence{}, m.Evidence...)})
	}
	return s
}

func freezeMaterial(lib *library.Library, r *material.Record) *Material {
	m := &Material{MaterialJSON: export.Material(lib, r), Formerly: append([]string{}, r.Formerly...), ReplacedBy: r.ReplacedBy, WithdrawnReason: r.WithdrawnReason}
	if s := r.SignOff; s != nil {
		m.SignOff = &SignOff{s.Author, s.Reviewer, s.Date, s.Reason, s.Due}
	}
	if r.Adopted != nil {
		m.Adopted, m.Corners = r.Adopted.Name, corners(r.Adopted)
	}
	m.Stated = statedOf(r)
	return m
}

// corners are those of ρ where it has limits, otherwise those of R/R_ref,
// each over its own value at the reference temperature.
func corners(set *material.DataSet) *Corners {
	if set.Rho != nil && set.Rho.Limits != nil {
		c := &Corners{Quantity: statement.AskResistivity}
		for _, k := range set.Rho.Limits.Corners {
			c.Curves = append(c.Curves, export.Segments(k))
		}
		return c
	}
	if set.Ratio == nil || set.Ratio.Limits == nil {
		return nil
	}
	c := &Corners{Quantity: statement.AskResistanceRatio}
	for _, k := range set.Ratio.Limits.Corners {
		if at, ok := k.At(set.RatioReference); ok && at != 0 {
			c.Curves = append(c.Curves, export.Segments(k.Scale(1/at)))
		}
	}
	return c
}

// curveOf turns segments of a file into a curve again.
func curveOf(list []export.SegmentJSON) curve.Curve {
	c := curve.Curve{Segments: make([]curve.Segment, len(list))}
	for i, s := range list {
		c.Segments[i] = curve.Segment{From: s.FromK, To: s.ToK, Centre: s.CentreK, C: s.C}
	}
	return c
}

// aside are the keys told elsewhere in the statement, or not stated as facts.
var aside = map[string]bool{"status": true, "revision": true, "sign_off": true, "formerly": true, "replaced_by": true, "withdrawn_reason": true, "lots": true, "adopt": true}

// statedOf lists every stated value of a record. The one data set of a record
// without data_sets goes by its name, as if it stood there.
func statedOf(r *material.Record) []Stated {
	list := []Stated{}
	sole := r.Node.Get("data_sets") == nil
	top := map[string]bool{}
	if sole {
		for _, k := range material.DataSetKeys() {
			top[k] = true
		}
	}
	r.Node.Leaves("", func(path string) bool { return aside[path] }, func(l form.Leaf) {
		if first, _, _ := strings.Cut(strings.ReplaceAll(l.Path, "[", "."), "."); top[first] {
			l.Path = "data_sets." + r.Adopted.Name + "." + l.Path
		}
		list = append(list, statedLeaf(l))
	})
	for _, set := range r.Sets {
		if set.Fitted != nil {
			list = append(list, fitted(set)...)
		}
	}
	sort.SliceStable(list, func(i, j int) bool { return list[i].Path < list[j].Path })
	return list
}

// fitted are the numbers that measured points gave, and a sum over the points
// themselves: they stand in another file.
func fitted(set *material.DataSet) []Stated {
	base := "data_sets." + set.Name + "."
	h := sha256.New()
	for _, p := range set.Fitted.Points {
		fmt.Fprintf(h, "%.12g %.12g %.12g %.12g;", p.T, p.Y, p.U, p.UT)
	}
	list := []Stated{{Path: base + "points.content", Text: fmt.Sprintf("%d points, sum %s", len(set.Fitted.Points), hex.EncodeToString(h.Sum(nil)[:4]))}}
	for _, c := range []struct {
		key string
		q   *quantity.Quantity
	}{{"resistivity", set.Resistivity}, {"alpha", set.Alpha}, {"beta", set.Beta}, {"gamma", set.Gamma}} {
		if c.q != nil && !set.Node.Has(c.key) {
			list = append(list, statedLeaf(form.Leaf{Path: base + c.key, Text: c.q.Text, Quantity: c.q}))
		}
	}
	return list
}

func statedLeaf(l form.Leaf) Stated {
	s := Stated{Path: l.Path, Text: l.Text}
	if l.Number != nil {
		s.Number = finite(*l.Number)
	}
	q := l.Quantity
	if q == nil {
		return s
	}
	s.Kind, s.Unit, s.Digits = string(q.Kind), q.Unit.Symbol, q.Digits
	s.SI = finite(q.Value)
	if q.Limits != nil {
		s.Lower, s.Upper = finite(q.Limits.Lower), finite(q.Limits.Upper)
	}
	if q.Uncertainty != nil {
		s.Minus, s.Plus, s.K = finite(q.Uncertainty.Minus), finite(q.Uncertainty.Plus), finite(q.Uncertainty.K)
	}
	return s
}

// finite is x to 12 digits, nil when it is infinite or no number.
func finite(x float64) *float64 {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	x = quantity.Round12(x)
	return &x
}
