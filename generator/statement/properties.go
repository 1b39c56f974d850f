package statement

import (
	"strings"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// propertyNames are the names a reader sees, by key.
var propertyNames = map[string]string{
	"density": "density", "expansion": "linear expansion", "emf_to_copper": "thermal EMF to copper (alloy minus copper)",
	"thermal_conductivity": "thermal conductivity", "specific_heat": "specific heat",
	"service_temperature": "service temperature", "melting_temperature": "melting temperature",
	"tensile_strength": "tensile strength", "elongation": "elongation",
}

func (b *builder) properties() {
	for _, p := range b.r.Properties {
		if p.Accuracy != nil {
			b.propertyRow(p, "service temperature where accuracy counts", *p.Accuracy)
		}
		if p.Continuous != nil {
			b.propertyRow(p, "service temperature, continuous", *p.Continuous)
		}
		if p.Accuracy == nil && p.Continuous == nil {
			b.propertyRow(p, propertyNames[p.Name], p.Value)
		}
	}
	b.classFigures()
}

func (b *builder) propertyRow(p material.Property, name string, q quantity.Quantity) {
	q.Unit = printUnit(q)
	row := PropertyRow{Name: name, Unit: q.Unit.Symbol, At: propertyAt(p), PlusMinus: "not stated",
		Condition: orNotStated(p.Condition), Class: orNotStated(string(p.Class)), Written: q.Text, Note: p.Note,
		SourceID: p.Source.ID, SourceWhere: p.Source.Where, Checked: orNotStated(string(b.lib.CheckedOf(p.Source)))}
	row.Value, row.PlusMinus = valueAndBand(q)
	b.s.Properties = append(b.s.Properties, row)
}

func propertyAt(p material.Property) string {
	switch {
	case p.At != nil:
		return pretty(*p.At)
	case p.Window != nil:
		return rangeText(*p.Window)
	}
	return "not stated"
}

// valueAndBand splits a quantity into its value and its ±, both in the unit
// the author wrote and without it.
func valueAndBand(q quantity.Quantity) (value, band string) {
	band = "not stated"
	if q.HasValue() {
		value = quantity.Number(q.Unit.FromSI(q.Value), q.Digits)
	}
	if q.Uncertainty != nil || q.Limits != nil {
		band = q.Band(q.Unit)
	}
	if value == "" {
		value, band = strings.TrimSuffix(band, quantity.NarrowSpace+q.Unit.Symbol), "limits"
	}
	return value, band
}

// printUnit is the unit as written, but ppm/K for a small coefficient written
// in 1/K: 18 ppm/K reads better than 1.8×10⁻⁵ /K.
func printUnit(q quantity.Quantity) quantity.Unit {
	if q.Kind == quantity.Coefficient1 && q.Unit.Symbol == "/K" {
		u, _ := quantity.FindUnit(quantity.Coefficient1, "ppm/K")
		return u
	}
	return q.Unit
}

// classFigures holds every TCR limit against the curve by the same measure.
func (b *builder) classFigures() {
	for _, l := range b.r.TCRLimits {
		row := LimitRow{Measure: l.Measure, Window: rangeText(l.Window), Limit: limitRange(l), SourceID: l.Source.ID,
			Checked: orNotStated(string(b.lib.CheckedOf(l.Source)))}
		if l.ClassName != "" {
			row.Measure += ", class " + l.ClassName
		}
		row.Curve, row.Verdict = b.classVerdict(l)
		b.s.Limits = append(b.s.Limits, row)
	}
}

func limitRange(l material.TCRLimit) string {
	return quantity.PPMText(l.From.Value) + " to " + quantity.PPMText(l.To.Value) + "\u202fppm/K"
}

// classVerdict compares the curve's own measure with the limit.
func (b *builder) classVerdict(l material.TCRLimit) (measured, verdict string) {
	if b.set == nil || !b.set.Ratio.HasNominal() {
		return "no curve", "cannot be told: no coefficient"
	}
	values, err := ClassMeasure(b.set, l)
	if err != nil {
		return "—", "cannot be told: " + err.Error()
	}
	verdict = "holds on nominal values"
	for _, v := range values {
		if v < l.From.Value-1e-12 || v > l.To.Value+1e-12 {
			verdict = "fails"
		}
	}
	measured = quantity.PPMText(values[0])
	if len(values) > 1 {
		measured += " to " + quantity.PPMText(values[len(values)-1])
	}
	return measured + "\u202fppm/K", verdict
}

// ClassMeasure computes, for one data set, the measure that a class figure
// limits: one value for a box, one or two for chords (cold, hot), least and
// greatest for the slope; all in 1/K.
func ClassMeasure(set *material.DataSet, l material.TCRLimit) ([]float64, error) {
	ref := l.Reference
	if ref != ref { // not stated
		ref = set.RatioReference
	}
	for _, t := range []float64{ref, l.Window.Lo, l.Window.Hi} {
		if !set.Valid.Contains(t) {
			return nil, OutsideError{At: t, Valid: set.Valid}
		}
	}
	m, err := curve.Measure(set.Ratio.Nominal, ref, l.Window.Lo, l.Window.Hi)
	if err != nil {
		return nil, err
	}
	switch l.Measure {
	case "box":
		return []float64{m.Box}, nil
	case "chord":
		var list []float64
		for _, c := range []*float64{m.ChordCold, m.ChordHot} {
			if c != nil {
				list = append(list, *c)
			}
		}
		return list, nil
	}
	return []float64{m.SlopeMin, m.SlopeMax}, nil
}
