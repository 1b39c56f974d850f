package site

import (
	"bytes"
	"encoding/json"
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
	"ohmfolio/generator/quantity"
	"ohmfolio/generator/statement"
)

// segment is [from, to, centre, c0, c1, c2, c3] in kelvin and SI: the form
// that themes/evaluate.js knows.
type segment [7]float64

// listed is one material in the data script of the lists and of side by side.
type listed struct {
	ID          string    `json:"id"`
	Name        string    `json:"name"`
	Short       string    `json:"short"`
	Family      string    `json:"family"`
	Status      string    `json:"status"`
	Invented    bool      `json:"invented,omitempty"`
	Revision    int       `json:"revision"`
	Fingerprint string    `json:"fingerprint"`
	Formerly    []string  `json:"formerly,omitempty"`
	ReplacedBy  string    `json:"replaced_by,omitempty"`
	Withdrawn   string    `json:"withdrawn_reason,omitempty"`
	Words       string    `json:"words"`
	Lo          *float64  `json:"lo"` // K, closed range of the adopted set
	Hi          *float64  `json:"hi"`
	Reference   *float64  `json:"ref"`      // K, that the ratio is told about
	Digits      int       `json:"digits"`   // of ρ
	Decimals    int       `json:"decimals"` // of R/R_ref
	FromTable   bool      `json:"table,omitempty"`
	Rho         []segment `json:"rho"`                  // Ω·m, null when it cannot be told
	Ratio       []segment `json:"ratio"`                // R/R_ref of a fixed body
	RhoLimits   interval  `json:"rho_limits,omitempty"` // lower and upper of ρ at ref, over all corners
	EMF         interval  `json:"emf,omitempty"`
	Density     interval  `json:"density,omitempty"`
	Conducts    interval  `json:"conducts,omitempty"` // thermal conductivity, W/(m·K)
	Service     *float64  `json:"service,omitempty"`  // K
	Caveats     []string  `json:"caveats,omitempty"`
}

// interval is nominal, lower and upper in SI; null is not stated.
type interval []*float64

func (s *site) listedOf(r *material.Record) listed {
	l := listed{ID: r.ID, Name: r.Name, Short: r.ShortName(), Family: string(r.Family), Status: or(string(r.Status), string(material.Draft)), Invented: r.Invented,
		Revision: r.Revision, Fingerprint: r.Fingerprint, Formerly: r.Formerly, ReplacedBy: r.ReplacedBy, Withdrawn: r.WithdrawnReason, Words: findWords(r),
		EMF: intervalOf(r, "emf_to_copper"), Density: intervalOf(r, "density"), Conducts: intervalOf(r, "thermal_conductivity"), Service: serviceOf(r)}
	set := r.Adopted
	if set == nil {
		return l
	}
	l.Lo, l.Hi, l.Caveats = number(set.Valid.Lo), number(set.Valid.Hi), set.Caveats
	l.Digits, l.Decimals = set.Digits(), set.RatioDecimals()
	if set.Rho.HasNominal() {
		l.Rho, l.FromTable = segments(set.Rho.Nominal), set.Rho.Nominal.FromTable
	}
	if set.Rho != nil && set.Rho.Limits != nil {
		if b, ok := set.Rho.Limits.At(set.RatioReference); ok {
			l.RhoLimits = interval{number(b.Lower), number(b.Upper)}
		}
	}
	if set.Ratio.HasNominal() && set.Valid.Hi > set.Valid.Lo {
		l.Ratio, l.Reference = segments(set.Ratio.Nominal), number(set.RatioReference)
	}
	return l
}

func segments(c curve.Curve) []segment {
	list := make([]segment, len(c.Segments))
	for i, g := range c.Segments {
		for k, x := range []float64{g.From, g.To, g.Centre, g.C[0], g.C[1], g.C[2], g.C[3]} {
			list[i][k] = quantity.Round12(x)
		}
	}
	return list
}

func intervalOf(r *material.Record, name string) interval {
	p := r.Property(name)
	if p == nil {
		return nil
	}
	i := interval{nil, nil, nil}
	if p.Value.HasValue() {
		i[0] = number(p.Value.Value)
	}
	if p.Value.Limits != nil {
		i[1], i[2] = number(p.Value.Limits.Lower), number(p.Value.Limits.Upper)
	}
	return i
}

// serviceOf is the highest temperature that the material may have, K.
func serviceOf(r *material.Record) *float64 {
	p := r.Property("service_temperature")
	switch {
	case p == nil:
		return nil
	case p.Continuous != nil:
		return highest(*p.Continuous)
	case p.Accuracy != nil:
		return highest(*p.Accuracy)
	}
	return nil
}

func highest(q quantity.Quantity) *float64 {
	if !q.HasValue() && q.Limits != nil {
		return number(q.Limits.Upper)
	}
	return number(q.Value)
}

// number is x to 12 digits, nil when it is not finite.
func number(x float64) *float64 {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	x = quantity.Round12(x)
	return &x
}

// script writes a value as a script that assigns it. Pages opened as files may
// not fetch their neighbours; they may load scripts. Marshal escapes <, > and
// &, so no text can end a script element.
func script(assign string, v any) []byte {
	text, err := json.Marshal(v)
	if err != nil {
		panic(err) // numbers are finite and texts are texts
	}
	var b bytes.Buffer
	b.WriteString("\"use strict\";\n" + assign + " = ")
	b.Write(text)
	b.WriteString(";\n")
	return b.Bytes()
}

func (s *site) listScript() []byte {
	list := []listed{}
	for _, r := range s.in.Library.Materials {
		list = append(list, s.listedOf(r))
	}
	return script("var listed", list)
}

// held is what a material's own page asks of it, beyond what the list has:
// bands, stock, and who says so.
type held struct {
	listed
	Source      string      `json:"source"`
	Checked     string      `json:"checked"`
	Basis       string      `json:"basis"`
	Condition   string      `json:"condition"`
	RhoBand     bandOf      `json:"rho_band"`
	RatioBand   bandOf      `json:"ratio_band"`
	Stock       []heldStock `json:"stock"`
	Resistivity string      `json:"resistivity_unit"`
	Contact     string      `json:"contact"`
}

// bandOf is a band of one quantity: the corners of its limits, or its expanded
// uncertainty as segments, and in words what it covers or why there is none.
type bandOf struct {
	Corners    [][]segment `json:"corners,omitempty"`
	Expanded   []segment   `json:"expanded,omitempty"`
	K          float64     `json:"k,omitempty"`
	Covers     []string    `json:"covers"`
	NotCovered []string    `json:"not_covered"`
}

// heldStock is one stock size, lengths as [nominal, lower, upper] in m.
type heldStock struct {
	Form      string   `json:"form"`
	Text      string   `json:"text"`
	Thickness interval `json:"thickness,omitempty"`
	Width     interval `json:"width,omitempty"`
	Diameter  interval `json:"diameter,omitempty"`
}

// heldScript is data/ID.js.
func (s *site) heldScript(r *material.Record) output.Output {
	return output.Output{Path: "data/" + r.ID + ".js", Write: func(w *bytes.Buffer) error {
		id, err := json.Marshal(r.ID)
		if err != nil {
			return err
		}
		w.Write(script("(window.held = window.held || {})["+string(id)+"]", s.heldOf(r)))
		return nil
	}}
}

func (s *site) heldOf(r *material.Record) held {
	h := held{listed: s.listedOf(r), Resistivity: s.unit(), Contact: s.in.Library.Settings.Contact, Stock: []heldStock{}}
	h.Words = ""
	for _, k := range r.Stock {
		h.Stock = append(h.Stock, stockOf(k))
	}
	set := r.Adopted
	if set == nil {
		return h
	}
	h.Source, h.Checked = set.Source.ID, or(string(s.in.Library.CheckedOf(set.Source)), "not stated")
	if src := s.in.Library.Source(set.Source.ID); src != nil {
		h.Source = sourceText(src)
	}
	h.Basis, h.Condition = or(string(set.Basis), "not stated"), or(set.Condition, "not stated")
	h.RhoBand, h.RatioBand = heldBand(set, set.Rho), heldBand(set, set.Ratio)
	return h
}

func sourceText(src *library.Source) string { return statement.SourceText(src) }

func heldBand(set *material.DataSet, t *material.Told) bandOf {
	b := bandOf{Covers: []string{}, NotCovered: []string{}}
	switch {
	case t == nil:
	case t.Limits != nil:
		for _, c := range t.Limits.Corners {
			b.Corners = append(b.Corners, segments(c))
		}
		b.Covers, b.NotCovered = append(b.Covers, t.Limits.Covers...), append(b.NotCovered, t.Limits.NotCovered...)
	case t.Uncertainty != nil && set.Valid.Hi > set.Valid.Lo:
		b.K = or0(t.K, 2)
		b.Expanded = chords(set.Valid, func(x float64) float64 { return float64(b.K * t.Uncertainty(x)) })
		b.Covers, b.NotCovered = append(b.Covers, t.Covers...), append(b.NotCovered, t.NotCovered...)
	default:
		b.NotCovered = append(b.NotCovered, t.NoLimits...)
	}
	return b
}

func or0(x, other float64) float64 {
	if x == 0 {
		return other
	}
	return x
}

// chordCount is how many straight pieces an uncertainty is lowered to: it is
// printed with two digits, and no uncertainty of ours bends faster.
const chordCount = 24

func chords(w material.Window, f func(float64) float64) []segment {
	var list []segment
	step := (w.Hi - w.Lo) / chordCount
	for i := range chordCount {
		a, b := w.Lo+float64(step*float64(i)), w.Lo+float64(step*float64(i+1))
		ya, yb := quantity.Round12(f(a)), quantity.Round12(f(b)) // the slope between rounded ends has the same bytes everywhere
		if math.IsNaN(ya) || math.IsNaN(yb) {
			return nil
		}
		list = append(list, segment{quantity.Round12(a), quantity.Round12(b), quantity.Round12(a), quantity.Round12(ya), quantity.Round12((yb - ya) / (b - a))})
	}
	return list
}

func stockOf(k material.Stock) heldStock {
	side := func(q *quantity.Quantity) interval {
		if q == nil || !q.HasValue() {
			return nil
		}
		i := interval{number(q.Value), nil, nil}
		if q.Limits != nil {
			i[1], i[2] = number(q.Limits.Lower), number(q.Limits.Upper)
		}
		return i
	}
	h := heldStock{Form: k.Form, Thickness: side(k.Thickness), Width: side(k.Width), Diameter: side(k.Diameter)}
	h.Text = k.Form
	for i, q := range []*quantity.Quantity{k.Thickness, k.Width, k.Diameter} {
		if q != nil {
			h.Text += map[bool]string{true: " × ", false: " "}[i == 1 && k.Thickness != nil] + q.Text
		}
	}
	return h
}
