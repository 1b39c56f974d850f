package statement

import (
	"ohmfolio/generator/curve"
	"ohmfolio/generator/figure"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// curvePoints is how many points a printed curve has: at 480 px a step is
// under four pixels, below what an eye sees of a smooth curve.
const curvePoints = 121

// Two figures stand beside each other on a page and on a sheet.
const figureWidth, figureHeight = 480, 300

func (b *builder) figures() {
	if b.set == nil || b.set.Valid.Hi <= b.set.Valid.Lo {
		return
	}
	b.s.RhoFigure = b.rhoFigure()
	b.s.RatioFigure = b.ratioFigure()
}

func (b *builder) rhoFigure() *figure.Figure {
	if b.set.Rho == nil {
		return nil
	}
	u := b.s.Units.Resistivity
	f := &figure.Figure{ID: "rho", Width: figureWidth, Height: figureHeight, Title: b.r.Name + ": resistivity against temperature",
		Description: "Volume resistivity of " + b.r.Name + " over its valid range, " + rangeText(b.set.Valid) + ". The table of values below holds the same numbers.",
		XTitle:      "temperature in °C", YTitle: "ρ in " + u.Symbol}
	b.plot(f, func(set *material.DataSet) (*material.Told, func(float64) float64, bool) {
		return set.Rho, u.FromSI, set.Rho != nil
	}, AskResistivity)
	return nonEmpty(f)
}

func (b *builder) ratioFigure() *figure.Figure {
	if b.set.Ratio == nil {
		return nil
	}
	same := func(x float64) float64 { return x }
	f := &figure.Figure{ID: "ratio", Width: figureWidth, Height: figureHeight, Title: b.r.Name + ": resistance ratio against temperature",
		Description: "Resistance of a fixed body of " + b.r.Name + " over its value at " + quantity.CelsiusText(b.reference()) + ".",
		XTitle:      "temperature in °C", YTitle: "R/R at " + quantity.CelsiusText(b.reference())}
	b.plot(f, func(set *material.DataSet) (*material.Told, func(float64) float64, bool) {
		return set.Ratio, same, set.Ratio != nil && set.Valid.Contains(b.reference())
	}, AskResistanceRatio)
	return nonEmpty(f)
}

func nonEmpty(f *figure.Figure) *figure.Figure {
	if len(f.Lines) == 0 && len(f.Areas) == 0 {
		return nil
	}
	return f
}

// pick chooses a data set's told quantity and its conversion for printing.
type pick func(set *material.DataSet) (told *material.Told, convert func(float64) float64, ok bool)

// plot draws the adopted set with its band, and the others thinner.
func (b *builder) plot(f *figure.Figure, choose pick, asked string) {
	ink := 1
	for _, set := range append([]*material.DataSet{b.set}, b.others()...) {
		told, convert, ok := choose(set)
		if !ok || set.Valid.Hi <= set.Valid.Lo {
			continue
		}
		e := material.Reading{Told: told, Ratio: asked == AskResistanceRatio, Reference: b.reference()}
		b.plotSet(f, set, e, convert, ink)
		ink++
	}
}

func (b *builder) plotSet(f *figure.Figure, set *material.DataSet, e material.Reading, convert func(float64) float64, ink int) {
	adopted := set == b.set
	line := figure.Line{Label: set.Name, Ink: inkOf(ink), Dash: inkOf(ink), Thin: !adopted}
	if adopted && len(b.r.Sets) == 1 {
		line.Label = ""
	}
	area := figure.Area{Ink: inkOf(ink)}
	band := bandOf(e, set)
	for i := 0; i < curvePoints; i++ {
		t := set.Valid.Lo + float64((set.Valid.Hi-set.Valid.Lo)*float64(i)/(curvePoints-1))
		if i == curvePoints-1 {
			t = set.Valid.Hi
		}
		if v, ok := e.At(t); ok {
			line.X, line.Y = append(line.X, t-quantity.ZeroCelsius), append(line.Y, convert(v))
		}
		if l, ok := band(t); ok {
			area.X, area.Lower, area.Upper = append(area.X, t-quantity.ZeroCelsius), append(area.Lower, convert(l.Lower)), append(area.Upper, convert(l.Upper))
		}
	}
	if len(line.X) > 1 {
		f.Lines = append(f.Lines, line)
	}
	if points, ok := measuredPoints(set, e, convert, inkOf(ink)); ok {
		f.Points = append(f.Points, points)
	}
	if len(area.X) > 1 && (adopted || len(line.X) == 0) {
		if len(line.X) == 0 {
			area.Label = set.Name
		}
		f.Areas = append(f.Areas, area)
	}
}

// bandOf is the band that a figure shows: the stated limits, otherwise the
// expanded uncertainty about the set's own reference temperature.
func bandOf(e material.Reading, set *material.DataSet) func(t float64) (curve.Bounds, bool) {
	u := e.Told.Uncertainty
	if e.Told.Limits != nil || u == nil || (e.Ratio && e.Reference != set.RatioReference) {
		return e.Limits
	}
	return func(t float64) (curve.Bounds, bool) {
		v, ok := e.At(t)
		half := float64(e.Told.K * u(t))
		return curve.Bounds{Lower: v - half, Upper: v + half}, ok
	}
}

// others are the data sets that are not adopted, three at the most: a figure
// with more curves tells nothing.
func (b *builder) others() []*material.DataSet {
	var list []*material.DataSet
	for _, set := range b.r.Sets {
		if set != b.set && len(list) < 3 {
			list = append(list, set)
		}
	}
	return list
}

func inkOf(n int) int { return (n-1)%4 + 1 }

// Series samples a told quantity at n even steps over [lo, hi] for a figure:
// temperatures in °C, values as convert gives them.
func Series(c curve.Curve, lo, hi float64, n int, convert func(float64) float64) (x, y []float64) {
	for i := 0; i < n; i++ {
		t := lo + float64((hi-lo)*float64(i)/float64(n-1))
		if v, ok := c.At(t); ok {
			x, y = append(x, t-quantity.ZeroCelsius), append(y, convert(v))
		}
	}
	return x, y
}
