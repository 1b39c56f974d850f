package statement

import (
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

func (b *builder) dataSets() {
	for _, set := range b.r.Sets {
		b.s.Sets = append(b.s.Sets, b.setRow(set))
		if set != b.set && b.set != nil {
			b.s.Deviations = append(b.s.Deviations, b.deviation(set))
		}
	}
}

func (b *builder) setRow(set *material.DataSet) SetRow {
	row := SetRow{Name: set.Name, Model: string(set.Model), Basis: basisText(set.Basis), Class: orNotStated(string(set.Class)),
		Condition: orNotStated(set.Condition), Range: rangeText(set.Valid), Scale: orNotStated(set.Scale),
		SourceID: set.Source.ID, SourceWhere: set.Source.Where, Checked: orNotStated(string(b.lib.CheckedOf(set.Source))),
		Adopted: set == b.set, Caveats: set.Caveats, Reference: "none of its own"}
	if !math.IsNaN(set.Reference) {
		row.Reference = quantity.CelsiusText(set.Reference)
	}
	row.Resistivity, row.Alpha = optional(set.Resistivity), optional(set.Alpha)
	row.Beta, row.Gamma = optional(set.Beta), optional(set.Gamma)
	return row
}

func optional(q *quantity.Quantity) string {
	if q == nil {
		return ""
	}
	return pretty(*q)
}

// deviation compares another data set with the adopted one over the range
// they share, in ρ where both tell it, otherwise in R/R_ref.
func (b *builder) deviation(set *material.DataSet) Deviation {
	d := Deviation{Set: set.Name}
	common := material.Window{Lo: math.Max(set.Valid.Lo, b.set.Valid.Lo), Hi: math.Min(set.Valid.Hi, b.set.Valid.Hi)}
	if common.Lo > common.Hi {
		d.Cannot = "the valid ranges do not overlap"
		return d
	}
	d.Range = rangeText(common)
	difference, name, why := Difference(b.set, set, common)
	if difference == nil {
		d.Cannot = why
		return d
	}
	d.Quantity = name
	d.Grid = Grid{Caption: "Deviation of " + set.Name + " from " + b.set.Name + ", " + name, Heads: []string{"T in °C", "deviation"}}
	for _, t := range roundSteps(common, b.reference(), false, 8) {
		d.Grid.Rows = append(d.Grid.Rows, []string{quantity.DegreesText(t), quantity.ChangeText(difference(t))})
	}
	at, greatest := Greatest(difference, common.Lo, common.Hi)
	d.Greatest, d.At = quantity.ChangeText(greatest), quantity.CelsiusText(at)
	return d
}

// Difference gives the relative deviation of set from the adopted one as a
// function of temperature, and the quantity it is told in; nil with the
// reason when it cannot be told.
func Difference(adopted, set *material.DataSet, common material.Window) (f func(t float64) float64, name, why string) {
	if adopted.Rho.HasNominal() && set.Rho.HasNominal() {
		return relative(adopted.Rho.Nominal.At, set.Rho.Nominal.At), "ρ", ""
	}
	if !adopted.Ratio.HasNominal() || !set.Ratio.HasNominal() {
		return nil, "", "one of the two has no nominal curve"
	}
	ref := adopted.RatioReference
	if ref < common.Lo || ref > common.Hi {
		ref = common.Lo
	}
	a, okA := curve.Ratio(adopted.Ratio.Nominal, ref)
	s, okS := curve.Ratio(set.Ratio.Nominal, ref)
	if !okA || !okS {
		return nil, "", "the reference temperature lies outside a range"
	}
	return relative(a.At, s.At), "R/R at " + quantity.CelsiusText(ref), ""
}

func relative(a, s func(float64) (float64, bool)) func(float64) float64 {
	return func(t float64) float64 {
		x, _ := a(t)
		y, _ := s(t)
		if x == 0 {
			return 0
		}
		return y/x - 1
	}
}

// Greatest finds the largest magnitude of f over [lo, hi] on 200 steps,
// refined by golden-section search about the best one. The deviation of two
// different models has no closed form; the steps are far below the bends that
// recorded curves have.
func Greatest(f func(float64) float64, lo, hi float64) (at, value float64) {
	const n = 200
	step := (hi - lo) / n
	at, value = lo, f(lo)
	for i := 1; i <= n; i++ {
		t := lo + float64(step*float64(i))
		if v := f(math.Min(t, hi)); math.Abs(v) > math.Abs(value)+1e-12 {
			at, value = math.Min(t, hi), v
		}
	}
	a, c := math.Max(lo, at-step), math.Min(hi, at+step)
	for i := 0; i < 40 && c-a > 1e-9; i++ {
		p, q := c-float64(0.6180339887498949*(c-a)), a+float64(0.6180339887498949*(c-a))
		if math.Abs(f(p)) > math.Abs(f(q)) {
			c = q
		} else {
			a = p
		}
	}
	if v := f((a + c) / 2); math.Abs(v) > math.Abs(value)+1e-12 {
		return (a + c) / 2, v
	}
	return at, value
}

// SourcesOf lists the sources that a record cites, in order of first use.
func SourcesOf(lib *library.Library, r *material.Record) []SourceRow {
	var rows []SourceRow
	seen := map[string]bool{}
	add := func(c material.Citation) {
		if c.ID == "" || seen[c.ID] {
			return
		}
		seen[c.ID] = true
		row := SourceRow{Number: len(rows) + 1, ID: c.ID, Text: "not in sources.yaml", Checked: orNotStated(string(lib.CheckedOf(c)))}
		if src := lib.Source(c.ID); src != nil {
			row.Text = SourceText(src)
		}
		rows = append(rows, row)
	}
	if r.Adopted != nil {
		add(r.Adopted.Source)
	}
	for _, set := range r.Sets {
		add(set.Source)
	}
	for _, p := range r.Properties {
		add(p.Source)
	}
	for _, l := range r.TCRLimits {
		add(l.Source)
	}
	for _, s := range r.Stock {
		if s.Source != nil {
			add(*s.Source)
		}
	}
	return rows
}

// SourceText is one line: author, title, number, publisher, edition, year.
func SourceText(s *library.Source) string {
	text := ""
	for _, part := range []string{s.Author, s.Title, s.Number, s.Publisher, s.Edition, s.Year, s.Where} {
		if part == "" {
			continue
		}
		if text != "" {
			text += ", "
		}
		text += part
	}
	return text
}
