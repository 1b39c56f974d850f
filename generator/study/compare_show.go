package study

import (
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// column is one column of a table.
type column struct{ name, head string }

// compareColumns of the table of every measure: number's name and head.
var compareColumns = []column{
	{rankRho, "ρ"}, {"slope", "slope, ppm/K"}, {"chord_cold", "chord cold, ppm/K"}, {"chord_hot", "chord hot, ppm/K"},
	{rankBox, "box, ppm/K"}, {"change_least", "least change"}, {"change_most", "greatest rise"}, {rankChange, "greatest change"},
	{"greatest_at", "at, °C"},
}

// tables makes one table for the whole window and one for the parts.
func (c *comparison) tables() {
	whole := Table{Caption: "Every measure over " + windowText(c.lo, c.hi) + ", counted from " + quantity.CelsiusText(c.reference), Heads: c.heads(false)}
	part := Table{Caption: "Told over part of the window only", Heads: c.heads(true)}
	for _, m := range c.out.Materials {
		row := c.row(m)
		if m.Partly == "" {
			whole.Rows, whole.Links = append(whole.Rows, row), append(whole.Links, m.Material)
		} else {
			part.Rows, part.Links = append(part.Rows, append(row, m.Partly)), append(part.Links, m.Material)
		}
	}
	c.out.Tables = append(c.out.Tables, whole)
	if len(part.Rows) > 0 {
		c.out.Tables = append(c.out.Tables, part)
	}
}

// columns leaves out a chord that no material has, because the reference
// temperature stands at that edge of the window.
func (c *comparison) columns() []column {
	var list []column
	for _, col := range compareColumns {
		there := col.name != "chord_cold" && col.name != "chord_hot"
		for _, m := range c.out.Materials {
			_, has := m.Numbers[col.name]
			there = there || has
		}
		if there {
			list = append(list, col)
		}
	}
	return list
}

func (c *comparison) heads(part bool) []string {
	heads := []string{"Material"}
	for _, col := range c.columns() {
		if col.name == rankRho {
			heads = append(heads, "ρ, "+c.houseUnit().Symbol)
			continue
		}
		heads = append(heads, col.head)
	}
	if len(c.bounds()) > 0 {
		heads = append(heads, "verdict")
	}
	if part {
		heads = append(heads, "judged over")
	}
	return heads
}

func (c *comparison) row(m MaterialOutcome) []string {
	row := []string{m.Record.Name}
	for _, col := range c.columns() {
		row = append(row, c.cell(m, col.name))
	}
	if len(c.bounds()) > 0 {
		row = append(row, m.Verdict.Shown())
	}
	return row
}

func (c *comparison) cell(m MaterialOutcome, name string) string {
	if n, ok := m.Numbers[name]; ok {
		return n.Text
	}
	switch {
	case name == rankRho:
		return "no resistivity"
	case m.Record.Adopted == nil || m.Record.Adopted.Ratio == nil:
		return "no coefficient"
	case !m.Record.Adopted.Ratio.HasNominal():
		return "no nominal"
	case name == "chord_cold" || name == "chord_hot":
		return "none on this side"
	}
	return "cannot be told"
}

// chart draws what the block asked to see, each curve over what its data
// cover of the window.
func (c *comparison) chart() {
	chart := Chart{Title: c.out.Title, XTitle: "temperature in °C",
		Description: "Curves of the materials over " + windowText(c.lo, c.hi) + "; the table holds the same numbers."}
	switch c.show {
	case showRho:
		chart.YTitle = "ρ in " + c.houseUnit().Symbol
	case showRatio:
		chart.YTitle = "R/R at " + quantity.CelsiusText(c.reference)
	default:
		chart.YTitle = "change of R from " + quantity.CelsiusText(c.reference) + " in " + c.changeUnit()
	}
	for _, m := range c.out.Materials {
		if s, ok := c.series(m); ok {
			chart.Series = append(chart.Series, s)
		}
	}
	if len(chart.Series) > 0 {
		c.out.Charts = append(c.out.Charts, chart)
	}
}

// changeUnit is one unit for the whole axis: per cent once any change
// reaches one per cent.
func (c *comparison) changeUnit() string {
	for _, m := range c.out.Materials {
		if n, ok := m.Numbers[rankChange]; ok && n.Value != nil && (*n.Value >= 10000 || *n.Value <= -10000) {
			return "%"
		}
	}
	return "ppm"
}

// seriesPoints a curve: enough for a smooth line at print size.
const seriesPoints = 160

func (c *comparison) series(m MaterialOutcome) (Series, bool) {
	set := m.Record.Adopted
	if set == nil {
		return Series{}, false
	}
	read := material.Reading{Told: set.Ratio, Ratio: true, Reference: c.reference}
	if c.show == showRho {
		read = material.Reading{Told: set.Rho}
	}
	convert := c.conversion()
	s := Series{Label: m.Record.ShortName()}
	lo, hi := max(c.lo, set.Valid.Lo), min(c.hi, set.Valid.Hi)
	for i := 0; i < seriesPoints; i++ {
		t := lo + float64((hi-lo)*float64(i)/(seriesPoints-1))
		v, ok := read.At(min(t, hi))
		l, limited := read.Limits(min(t, hi))
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

func (c *comparison) conversion() func(float64) float64 {
	switch {
	case c.show == showRho:
		return c.houseUnit().FromSI
	case c.show == showRatio:
		return func(x float64) float64 { return x }
	case c.changeUnit() == "%":
		return func(x float64) float64 { return float64((x - 1) * 100) }
	}
	return func(x float64) float64 { return float64((x - 1) * 1e6) }
}
