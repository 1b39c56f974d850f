package study

import (
	"math"

	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// tables makes one table for the whole window and one for the parts.
func (c *comparison) tables(answers []*answer) {
	names := []string{"resistivity", "slope", "chord_cold", "chord_hot", "box", "change_least", "change_most", "change_cold", "change_hot", "greatest_change", "at_temperature", "deviation"}
	c.out.Tables = append(c.out.Tables, wholeAndParts(c.work, "Every measure over "+windowText(c.lo, c.hi)+", counted from "+quantity.CelsiusText(c.reference), answers, names...)...)
}

// wholeAndParts makes a table of the answers over the whole window, and one of
// those over a part of it, with the part judged.
func wholeAndParts(w *work, caption string, answers []*answer, names ...string) []Table {
	var whole, parts []*answer
	for _, a := range answers {
		if a.Partly == "" {
			whole = append(whole, a)
		} else {
			parts = append(parts, a)
		}
	}
	list := w.numbersTables(caption, whole, names...)
	if len(parts) == 0 {
		return list
	}
	t := w.numbersTable("Told over part of the window only", parts, partNames(names)...)
	t.Heads = append(t.Heads, "judged over")
	for i, a := range parts {
		t.Rows[i] = append(t.Rows[i], a.Partly)
	}
	return append(list, t)
}

// partNames are the numbers told of a part of the window: fewer, since they
// must not be compared with those of the whole.
func partNames(names []string) []string {
	var list []string
	for _, n := range names {
		switch n {
		case "resistivity", "greatest_change", "at_temperature", "change_cold", "change_hot", "box", "emf_to_copper":
			list = append(list, n)
		}
	}
	return list
}

// chart draws what the block asked to see, each curve over what its data
// cover of the window.
func (c *comparison) chart(answers []*answer) {
	chart := Chart{Title: c.out.Title, XTitle: "temperature in °C",
		Description: "Curves of the materials over " + windowText(c.lo, c.hi) + "; the table holds the same numbers."}
	unit := changeUnit(answers)
	switch c.show {
	case showRho:
		chart.YTitle = "ρ in " + c.houseResistivity().Symbol
	case showRatio:
		chart.YTitle = "R/R at " + quantity.CelsiusText(c.reference)
	case showDeviation:
		chart.YTitle = "R/R from that of " + c.baseline.ShortName() + " in " + unit
	default:
		chart.YTitle = "change of R from " + quantity.CelsiusText(c.reference) + " in " + unit
	}
	for _, a := range answers {
		if s, ok := c.series(a.Record, unit); ok {
			chart.Series = append(chart.Series, s)
		}
	}
	if len(chart.Series) > 0 {
		c.out.Charts = append(c.out.Charts, chart)
	}
}

// changeUnit is one unit for the whole axis: per cent once any change
// reaches one per cent.
func changeUnit(answers []*answer) string {
	for _, a := range answers {
		if n, ok := a.spans["greatest_change"]; ok && math.Abs(n.v) >= 0.01 {
			return "%"
		}
	}
	return "ppm"
}

// seriesPoints a curve: enough for a smooth line at print size.
const seriesPoints = 160

func (c *comparison) series(r *material.Record, unit string) (Series, bool) {
	set := r.Adopted
	if set == nil {
		return Series{}, false
	}
	read := material.Reading{Told: set.Ratio, Ratio: true, Reference: c.reference}
	var convert func(float64) float64
	switch c.show {
	case showRho:
		read, convert = material.Reading{Told: set.Rho}, c.houseResistivity().FromSI
	case showRatio:
		convert = func(x float64) float64 { return x }
	case showDeviation:
		return c.deviationSeries(r, perUnit(unit))
	default:
		convert = perUnit(unit)
	}
	return seriesOf(r.ShortName(), set, read, c.lo, c.hi, convert)
}

// perUnit turns a ratio into a change in % or ppm.
func perUnit(unit string) func(float64) float64 {
	if unit == "%" {
		return func(x float64) float64 { return float64((x - 1) * 100) }
	}
	return func(x float64) float64 { return float64((x - 1) * 1e6) }
}

// seriesOf reads a curve with its band over what the data cover of [lo, hi].
func seriesOf(label string, set *material.DataSet, read material.Reading, lo, hi float64, convert func(float64) float64) (Series, bool) {
	s := Series{Label: label}
	lo, hi = max(lo, set.Valid.Lo), min(hi, set.Valid.Hi)
	for i := range seriesPoints {
		t := min(lo+float64((hi-lo)*float64(i)/(seriesPoints-1)), hi)
		v, ok := read.At(t)
		l, limited := read.Limits(t)
		if !ok && !limited {
			continue
		}
		s.X = append(s.X, t-quantity.ZeroCelsius)
		if ok {
			s.Y = append(s.Y, convert(v))
		}
		if limited {
			s.Lower, s.Upper = append(s.Lower, convert(l.Lower)), append(s.Upper, convert(l.Upper))
		}
	}
	if len(s.Lower) != len(s.X) {
		s.Lower, s.Upper = nil, nil
	}
	return s, len(s.X) > 1 && (len(s.Y) == len(s.X) || s.Lower != nil)
}

func (c *comparison) deviationSeries(r *material.Record, convert func(float64) float64) (Series, bool) {
	s := Series{Label: r.ShortName()}
	for i := range seriesPoints {
		t := c.lo + float64((c.hi-c.lo)*float64(i)/(seriesPoints-1))
		if d, ok := c.deviationAt(r.Adopted, t); ok {
			s.X, s.Y = append(s.X, t-quantity.ZeroCelsius), append(s.Y, convert(1+d))
		}
	}
	return s, len(s.X) > 1
}
