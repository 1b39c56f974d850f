package statement

import (
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/figure"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// deviation compares another data set with the adopted one over the range
// they share, in ρ where both tell it, otherwise in R/R_ref: a table, a curve
// in the figure of deviations, and a judgement at every step.
func (b *builder) deviation(set *material.DataSet) {
	d := Deviation{Set: set.Name}
	common := material.Window{Lo: math.Max(set.Valid.Lo, b.set.Valid.Lo), Hi: math.Min(set.Valid.Hi, b.set.Valid.Hi)}
	c, why := comparable(b.set, set, common)
	if c == nil {
		d.Cannot = why
		b.s.Deviations = append(b.s.Deviations, d)
		return
	}
	d.Range, d.Quantity = rangeText(common), c.name
	d.Grid = Grid{Caption: "Deviation of " + set.Name + " from " + b.set.Name + ", " + c.name, Heads: []string{"T in °C", "%", "ppm", "judged"}}
	for _, t := range roundSteps(common, b.reference(), false, 8) {
		v := c.at(t)
		d.Grid.Rows = append(d.Grid.Rows, []string{quantity.DegreesText(t), quantity.Fixed(float64(v*100), 3), quantity.Fixed(float64(v*1e6), 0), c.judge(t)})
	}
	d.Grid.Notes = []string{"Judged by combined limits where both state them, by E_n = |difference|/√(U₁² + U₂²) where both state uncertainties; at most 1 agrees."}
	at, greatest := Greatest(c.at, common.Lo, common.Hi)
	d.Greatest, d.At = quantity.ChangeText(greatest), quantity.CelsiusText(at)
	b.s.Deviations = append(b.s.Deviations, d)
	b.plotDeviation(set, c, common)
}

// comparison is two readings of one quantity.
type comparison struct {
	name           string
	adopted, other material.Reading
}

// comparable pairs the quantities that two sets share; nil with the reason
// when there is none. Both are told in the same basis: ρ, or R of a fixed body.
func comparable(adopted, set *material.DataSet, common material.Window) (*comparison, string) {
	if common.Lo > common.Hi {
		return nil, "the valid ranges do not overlap"
	}
	if adopted.Rho.HasNominal() && set.Rho.HasNominal() {
		return &comparison{"ρ", material.Reading{Told: adopted.Rho}, material.Reading{Told: set.Rho}}, ""
	}
	if !adopted.Ratio.HasNominal() || !set.Ratio.HasNominal() {
		return nil, "one of the two has no nominal curve"
	}
	ref := adopted.RatioReference
	if !common.Contains(ref) {
		ref = common.Lo
	}
	return &comparison{"R/R at " + quantity.CelsiusText(ref), material.Reading{Told: adopted.Ratio, Ratio: true, Reference: ref},
		material.Reading{Told: set.Ratio, Ratio: true, Reference: ref}}, ""
}

// at is the relative deviation at t.
func (c *comparison) at(t float64) float64 {
	x, okX := c.adopted.At(t)
	y, okY := c.other.At(t)
	if !okX || !okY || x == 0 {
		return 0
	}
	return y/x - 1
}

// judge says whether the two agree at t within what they state.
func (c *comparison) judge(t float64) string {
	a, okA := c.adopted.Limits(t)
	o, okO := c.other.Limits(t)
	if okA && okO {
		if a.Upper < o.Lower || o.Upper < a.Lower {
			return "limits do not meet"
		}
		return "limits meet"
	}
	if en, ok := c.normalised(t); ok {
		if en > 1 {
			return "E_n " + quantity.Fixed(en, 2) + ", disagree"
		}
		return "E_n " + quantity.Fixed(en, 2) + ", agree"
	}
	if okA {
		return within(c.other, a, t, "the adopted limits")
	}
	if okO {
		return within(c.adopted, o, t, "its limits")
	}
	return "cannot be told: no ±"
}

// within judges a value without a ± by the limits of the other.
func within(r material.Reading, l curve.Bounds, t float64, whose string) string {
	v, ok := r.At(t)
	switch {
	case !ok:
		return "cannot be told"
	case v < l.Lower || v > l.Upper:
		return "outside " + whose
	}
	return "within " + whose
}

// normalised is E_n of ISO/IEC 17043 with expanded uncertainties at k = 2.
func (c *comparison) normalised(t float64) (float64, bool) {
	if c.adopted.Told.Uncertainty == nil || c.other.Told.Uncertainty == nil {
		return 0, false
	}
	x, _ := c.adopted.At(t)
	y, _ := c.other.At(t)
	u1, u2 := 2*c.adopted.Told.Uncertainty(t), 2*c.other.Told.Uncertainty(t)
	u := math.Sqrt(float64(u1*u1) + float64(u2*u2))
	if !(u > 0) {
		return 0, false
	}
	return math.Abs(y-x) / u, true
}

// plotDeviation adds a curve to the figure of deviations, which holds four at
// the most.
func (b *builder) plotDeviation(set *material.DataSet, c *comparison, common material.Window) {
	if common.Hi <= common.Lo {
		return
	}
	if b.s.DeviationFigure == nil {
		b.s.DeviationFigure = &figure.Figure{ID: "deviation", Title: b.r.Name + ": deviation of other data sets", Width: figureWidth, Height: figureHeight,
			Description: "Deviation of the other data sets from the adopted one, " + b.set.Name + ". The tables below hold the same numbers.",
			XTitle:      "temperature in °C", YTitle: "deviation in %"}
	}
	f := b.s.DeviationFigure
	if len(f.Lines) == 4 {
		return
	}
	line := figure.Line{Label: set.Name, Ink: inkOf(len(f.Lines) + 1), Dash: inkOf(len(f.Lines) + 1)}
	for i := range curvePoints {
		t := common.Lo + float64((common.Hi-common.Lo)*float64(i)/(curvePoints-1))
		line.X, line.Y = append(line.X, t-quantity.ZeroCelsius), append(line.Y, float64(c.at(math.Min(t, common.Hi))*100))
	}
	f.Lines = append(f.Lines, line)
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
