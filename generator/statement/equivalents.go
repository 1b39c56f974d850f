package statement

import (
	"ohmfolio/generator/curve"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// EquivalentRow is what another designation is worth as a replacement.
type EquivalentRow struct {
	Designation, System, Verdict, Use, Reason string
	RecordID, RecordName                      string // "" when no record here describes it
	Date, By                                  string
	Differences                               []string // computed where a record describes it
	SourceID                                  string
}

// DeclarationRow is one statement on a restricted substance.
type DeclarationRow struct {
	Substance, Limit, Greatest, Basis, Exemption, Expires, Document, Date, Note string
	Above                                                                       bool // the greatest content lies above the limit
}

// Text is the row as one sentence.
func (e EquivalentRow) Text() string {
	text := e.Designation
	if e.System != "" {
		text += " (" + e.System + ")"
	}
	text += ": " + e.Verdict + " for " + e.Use + ". "
	if e.Date != "" {
		text += e.Date + ", "
	}
	return text + e.By
}

// Text is the row as one sentence.
func (d DeclarationRow) Text() string {
	text := d.Substance + ": " + d.Greatest + ", limit " + d.Limit
	if d.Above {
		text += ", above the limit"
	}
	text += ", " + d.Basis
	if d.Exemption != "" {
		text += ", exemption " + d.Exemption
	}
	if d.Expires != "" {
		text += ", until " + d.Expires
	}
	return text + ". " + d.Document + ", " + d.Date
}

func (b *builder) equivalents() {
	for _, e := range b.r.Equivalents {
		row := EquivalentRow{Designation: e.Designation, System: e.System, Verdict: string(e.Verdict), Use: e.Use, Reason: e.Reason,
			Date: e.Date, By: "not signed off"}
		if s := e.SignOff; s != nil {
			row.By = joined(filled(s.Author, s.Reviewer), row.By)
			if row.Date == "" {
				row.Date = s.Date
			}
		}
		if e.Source != nil {
			row.SourceID = e.Source.ID
		}
		if other := b.lib.Material(e.Record); e.Record != "" && other != nil {
			row.RecordID, row.RecordName, row.Differences = other.ID, other.ShortName(), differences(b.r, other, b.s.Units)
		}
		b.s.Equivalents = append(b.s.Equivalents, row)
	}
}

func filled(list ...string) []string {
	var out []string
	for _, s := range list {
		if s != "" {
			out = append(out, s)
		}
	}
	return out
}

// differences tells in effect how another record differs from r: value and
// slope at r's reference temperature, the curve over the common range, the
// properties that both state.
func differences(r, other *material.Record, units Units) []string {
	a, o := r.Adopted, other.Adopted
	if a == nil || o == nil {
		return []string{"cannot be told: a record without data"}
	}
	var list []string
	t := a.RatioReference
	if x, y, ok := both(a.Rho, o.Rho, t); ok && x != 0 {
		list = append(list, "resistivity at "+quantity.CelsiusText(t)+": "+units.Resistivity.Format(x, a.Digits())+" here, "+units.Resistivity.Format(y, o.Digits())+" there, "+relativeText(y/x-1))
	}
	if x, y, ok := slopes(a.Ratio, o.Ratio, t); ok {
		list = append(list, "slope at "+quantity.CelsiusText(t)+": "+quantity.PPMText(x)+" here, "+quantity.PPMText(y)+" there, in ppm/K")
	}
	list = append(list, curveDifference(a, o, t))
	return append(list, propertyDifferences(r, other)...)
}

func both(a, b *material.Told, t float64) (x, y float64, ok bool) {
	x, okX := material.Reading{Told: a}.At(t)
	y, okY := material.Reading{Told: b}.At(t)
	return x, y, okX && okY
}

func slopes(a, b *material.Told, t float64) (x, y float64, ok bool) {
	if !a.HasNominal() || !b.HasNominal() {
		return 0, 0, false
	}
	v, ok1 := a.Nominal.At(t)
	w, ok2 := b.Nominal.At(t)
	p, ok3 := a.Nominal.Slope(t)
	q, ok4 := b.Nominal.Slope(t)
	return p / v, q / w, ok1 && ok2 && ok3 && ok4 && v != 0 && w != 0
}

// curveDifference compares R over its value at one temperature that both tell.
func curveDifference(a, o *material.DataSet, t float64) string {
	const what = "R over its value at "
	if !a.Ratio.HasNominal() || !o.Ratio.HasNominal() {
		return "curve: cannot be told, one of the two has no coefficient"
	}
	x, y, ok := both(a.Ratio, o.Ratio, t)
	if !ok || x == 0 || y == 0 {
		return "curve: cannot be told, the other record does not cover " + quantity.CelsiusText(t)
	}
	d, ok := curve.Deviate(a.Ratio.Nominal.Scale(1/x), o.Ratio.Nominal.Scale(1/y))
	if !ok {
		return "curve: cannot be told, the valid ranges do not overlap"
	}
	return what + quantity.CelsiusText(t) + ": up to " + quantity.ChangeText(d.Greatest) + " apart, at " + quantity.CelsiusText(d.At) + ", over " +
		quantity.CelsiusText(d.Lo) + " to " + quantity.CelsiusText(d.Hi)
}

func propertyDifferences(r, other *material.Record) []string {
	var list []string
	for i := range r.Properties {
		p, o := &r.Properties[i], other.Property(r.Properties[i].Name)
		if o == nil || !p.Value.HasValue() || !o.Value.HasValue() || p.Value.Value == o.Value.Value || p.Value.Value == 0 {
			continue
		}
		list = append(list, propertyNames[p.Name]+": "+pretty(p.Value)+" here, "+pretty(o.Value)+" there, "+relativeText(o.Value.Value/p.Value.Value-1))
	}
	return list
}

func relativeText(x float64) string {
	text := quantity.ChangeText(x)
	if x > 0 {
		return "+" + text
	}
	return text
}

func (b *builder) declarations() {
	text := func(q *quantity.Quantity) string {
		if q == nil {
			return "not stated"
		}
		return pretty(*q)
	}
	for _, d := range b.r.Declarations {
		name := d.Substance
		if d.Number != "" {
			name += " (" + d.Number + ")"
		}
		b.s.Declarations = append(b.s.Declarations, DeclarationRow{Substance: name, Limit: text(d.Limit), Greatest: text(d.Greatest), Basis: d.Basis,
			Exemption: d.Exemption, Expires: d.Expires, Document: d.Document, Date: d.Date, Note: d.Note, Above: d.AboveLimit()})
	}
}
