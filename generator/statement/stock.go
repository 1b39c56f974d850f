package statement

import (
	"math"

	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// A section is a cross-section with its limits in m².
type section struct {
	name         string
	area, lo, hi float64
	limited      bool
}

// perMetre fills the table of resistance per metre of the stock sizes, or of
// a short list of common sizes when the record has no stock.
func (b *builder) perMetre() {
	if !b.set.Rho.HasNominal() {
		return
	}
	t := b.reference()
	sections := stockSections(b.r.Stock)
	b.s.PerMetreOf = "stock sizes"
	if len(sections) == 0 {
		sections = commonSections()
		b.s.PerMetreOf = "common sizes; no stock is recorded"
	}
	scale := b.lengthScale(sections, t)
	g := Grid{Caption: "Resistance per length at " + quantity.CelsiusText(t),
		Heads: []string{"Size", "section in mm²", scale.unit, scale.unit + ", limits", "Ω/1000 ft"}}
	for _, s := range sections {
		g.Rows = append(g.Rows, b.sectionRow(s, t, scale))
	}
	g.Notes = []string{"R/L = ρ/A. Limits: worst case of the stated limits of ρ and of the size; a size without limits counts as exact."}
	b.s.PerMetre = g
}

// lengthScale is one unit for the whole column.
type lengthScale struct {
	unit   string
	factor float64 // from Ω/m
}

// lengthScale chooses Ω/km, as the trade does for conductors, once every size
// has less than 0.1 Ω/m.
func (b *builder) lengthScale(sections []section, t float64) lengthScale {
	rho, _ := b.set.Rho.Nominal.At(t)
	for _, s := range sections {
		if rho/s.area >= 0.1 {
			return lengthScale{"Ω/m", 1}
		}
	}
	return lengthScale{"Ω/km", 1000}
}

func (b *builder) sectionRow(s section, t float64, scale lengthScale) []string {
	rho, ok := b.set.Rho.Nominal.At(t)
	if !ok {
		return []string{s.name, quantity.Number(s.area*1e6, 4), outside, outside, outside}
	}
	n := max(3, b.set.Digits())
	r := rho / s.area
	return []string{s.name, quantity.Number(s.area*1e6, 4), quantity.Number(r*scale.factor, n), b.sectionLimits(s, t, n, scale.factor), quantity.Number(r*304.8, n)}
}

func (b *builder) sectionLimits(s section, t float64, n int, factor float64) string {
	rho, _ := b.set.Rho.Nominal.At(t)
	lo, hi, told := rho, rho, s.limited
	if b.set.Rho.Limits != nil {
		if l, ok := b.set.Rho.Limits.At(t); ok {
			lo, hi, told = l.Lower, l.Upper, true
		}
	}
	if !told {
		return "not stated"
	}
	return quantity.Number(lo/s.hi*factor, n) + " to " + quantity.Number(hi/s.lo*factor, n)
}

func stockSections(stock []material.Stock) []section {
	var list []section
	for _, s := range stock {
		switch {
		case s.Diameter != nil && s.Diameter.HasValue():
			lo, hi := bounds(*s.Diameter)
			list = append(list, round(s.Form+" "+s.Diameter.Text, s.Diameter.Value, lo, hi))
		case s.Thickness != nil && s.Width != nil && s.Thickness.HasValue() && s.Width.HasValue():
			list = append(list, flat(s))
		}
	}
	return list
}

func flat(s material.Stock) section {
	tl, th := bounds(*s.Thickness)
	wl, wh := bounds(*s.Width)
	return section{name: s.Form + " " + s.Thickness.Text + " × " + s.Width.Text,
		area: float64(s.Thickness.Value * s.Width.Value), lo: float64(tl * wl), hi: float64(th * wh),
		limited: s.Thickness.Limits != nil || s.Width.Limits != nil}
}

func round(name string, d, lo, hi float64) section {
	area := func(x float64) float64 { return float64(math.Pi/4*x) * x }
	return section{name: name, area: area(d), lo: area(lo), hi: area(hi), limited: lo != hi}
}

func bounds(q quantity.Quantity) (lo, hi float64) {
	if q.Limits == nil || math.IsInf(q.Limits.Lower, 0) || math.IsInf(q.Limits.Upper, 0) {
		return q.Value, q.Value
	}
	return q.Limits.Lower, q.Limits.Upper
}

// commonSections are a few metric wires, AWG sizes (exact by their
// definition) and a strip, for records without stock.
func commonSections() []section {
	var list []section
	for _, mm := range []float64{0.1, 0.2, 0.5, 1, 2} {
		d := float64(mm * 1e-3)
		list = append(list, round("wire "+quantity.Number(mm, 1)+"\u202fmm", d, d, d))
	}
	for _, n := range []int{12, 18, 24, 30} {
		d := quantity.AWG(n)
		list = append(list, round("wire AWG\u202f"+quantity.Number(float64(n), 2), d, d, d))
	}
	return append(list, section{name: "strip 1\u202fmm × 10\u202fmm", area: 1e-5, lo: 1e-5, hi: 1e-5})
}
