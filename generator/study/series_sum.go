package study

import (
	"math"
	"sort"
	"strings"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// mostCorners bounds how many combinations of limits are added up.
const mostCorners = 1024

// sum is the series as one data set: R(T) in Ω over the range that all parts
// share, with the corners of all limits where every part has limits.
func (s *series) sum() *material.DataSet {
	set := &material.DataSet{Name: "sum", Valid: material.Window{Lo: math.Inf(-1), Hi: math.Inf(1)}, Reference: s.reference, RatioReference: s.reference}
	var curves []curve.Curve
	var weights []float64
	for _, p := range s.parts {
		set.Valid.Lo = math.Max(set.Valid.Lo, p.record.Adopted.Valid.Lo)
		set.Valid.Hi = math.Min(set.Valid.Hi, p.record.Adopted.Valid.Hi)
		curves = append(curves, p.record.Adopted.Ratio.Nominal)
		weights = append(weights, p.r.v)
	}
	set.Ratio = &material.Told{Nominal: s.added(curves, weights, set.Valid)}
	if corners, ok := s.corners(set.Valid); ok {
		set.Ratio.Limits = &curve.Band{Corners: corners}
	}
	return set
}

// corners are the sums over all combinations of limits of the resistances and
// of the coefficients. The change is monotone in each resistance, since it is
// the quotient of two functions linear in it.
func (s *series) corners(valid material.Window) ([]curve.Curve, bool) {
	combinations := 1
	for _, p := range s.parts {
		limits := p.record.Adopted.Ratio.Limits
		if limits == nil || !p.r.banded {
			return nil, false
		}
		combinations *= len(limits.Corners)
		if p.r.wide() {
			combinations *= 2
		}
		if combinations > mostCorners {
			s.note("The limits of so many parts have more combinations than are added up: the change is told on nominal values.")
			return nil, false
		}
	}
	var list []curve.Curve
	curves, weights := make([]curve.Curve, len(s.parts)), make([]float64, len(s.parts))
	var choose func(i int)
	choose = func(i int) {
		if i == len(s.parts) {
			list = append(list, s.added(curves, weights, valid))
			return
		}
		p := s.parts[i]
		for _, c := range p.record.Adopted.Ratio.Limits.Corners {
			curves[i], weights[i] = c, p.r.lo
			choose(i + 1)
			if p.r.wide() {
				weights[i] = p.r.hi
				choose(i + 1)
			}
		}
	}
	choose(0)
	return list, true
}

// added is Σ weight·c(T)/c(reference) over a range, as segments about the
// reference temperature.
func (s *series) added(curves []curve.Curve, weights []float64, valid material.Window) curve.Curve {
	var out curve.Curve
	edges := edgesOf(curves, valid)
	for i := 1; i < len(edges); i++ {
		out.Segments = append(out.Segments, curve.Segment{From: edges[i-1], To: edges[i], Centre: s.reference})
	}
	for i, c := range curves {
		at, _ := c.At(s.reference)
		w := weights[i] / at
		out.FromTable = out.FromTable || c.FromTable
		k := 0
		for j := range out.Segments {
			g := &out.Segments[j]
			for k+1 < len(c.Segments) && c.Segments[k].To < g.To-material.Slack {
				k++
			}
			for n, x := range moved(c.Segments[k], s.reference) {
				g.C[n] += float64(w * x)
			}
		}
	}
	return out
}

// moved gives the coefficients of a segment about another centre.
func moved(g curve.Segment, centre float64) [4]float64 {
	d := centre - g.Centre
	c := g.C
	return [4]float64{
		c[0] + float64(d*(c[1]+float64(d*(c[2]+float64(d*c[3]))))),
		c[1] + float64(d*(2*c[2]+float64(3*d*c[3]))),
		c[2] + float64(3*d*c[3]),
		c[3],
	}
}

// edgesOf are the edges of all segments inside a range, ascending, each once.
func edgesOf(curves []curve.Curve, valid material.Window) []float64 {
	list := []float64{valid.Lo, valid.Hi}
	for _, c := range curves {
		for _, g := range c.Segments {
			if g.To > valid.Lo && g.To < valid.Hi {
				list = append(list, g.To)
			}
		}
	}
	sort.Float64s(list)
	kept := list[:1]
	for _, t := range list[1:] {
		if t-kept[len(kept)-1] > material.Slack {
			kept = append(kept, t)
		}
	}
	return kept
}

// show makes the tables and the figure.
func (s *series) show(a *answer, sum *material.DataSet) {
	t := s.numbersTable("The series", []*answer{a}, "resistance", "alpha_effective", "beta_effective", "change_cold", "change_hot", "greatest_change", "greatest_at", "turning_point")
	t.Heads[0], t.Links = "series", nil
	s.out.Tables = append(s.out.Tables, t)
	if t, asked := s.requirementsTable([]*answer{a}); asked {
		t.Heads[0], t.Links = "series", nil
		s.out.Tables = append(s.out.Tables, t)
	}
	s.out.Tables = append(s.out.Tables, s.given())
	if sum == nil {
		return
	}
	lo, hi := math.Max(s.lo, sum.Valid.Lo), math.Min(s.hi, sum.Valid.Hi)
	if lo >= hi {
		return
	}
	s.out.Tables = append(s.out.Tables, s.shares(sum, lo, hi))
	s.chart(sum, lo, hi)
}

// given tells what the parts are, as they were written, and their resistance.
func (s *series) given() Table {
	t := Table{Caption: "The parts at " + quantity.CelsiusText(s.reference), Heads: []string{"part", "material", "as given", "R, mΩ", "α, ppm/K"}}
	for _, p := range s.parts {
		var text []string
		for i, key := range p.node.Keys() {
			if key != "name" && key != "material" {
				text = append(text, inWords(key)+" "+p.node.List()[i].Text())
			}
		}
		row := []string{p.name, p.record.ShortName(), strings.Join(text, ", "), string(CannotBeTold), string(CannotBeTold)}
		if p.r.known() {
			row[3] = quantity.Number(p.r.v*1e3, 4)
		}
		if set := p.record.Adopted; set != nil && set.Ratio.HasNominal() {
			if alpha, _ := constants(set.Ratio.Nominal, s.reference); !math.IsNaN(alpha) {
				row[4] = quantity.PPMText(alpha)
			}
		}
		t.Rows, t.Links = append(t.Rows, row), append(t.Links, p.record.ID)
	}
	return t
}

// shares tells what each part contributes at the edges and at the reference.
func (s *series) shares(sum *material.DataSet, lo, hi float64) Table {
	t := Table{Caption: "Share of each part", Heads: []string{"part", "share of R at " + quantity.CelsiusText(lo), "at " + quantity.CelsiusText(s.reference), "at " + quantity.CelsiusText(hi),
		"its part of effective α, ppm/K", "its part of the change at " + quantity.CelsiusText(lo), "at " + quantity.CelsiusText(hi)}}
	total, _ := sum.Ratio.Nominal.At(s.reference)
	percent := func(x float64) string { return quantity.Fixed(100*x, 2) + quantity.NarrowSpace + "%" }
	for _, p := range s.parts {
		alpha, _ := constants(p.record.Adopted.Ratio.Nominal, s.reference)
		row := []string{p.name}
		for _, at := range []float64{lo, s.reference, hi} {
			all, _ := sum.Ratio.Nominal.At(at)
			row = append(row, percent(p.r.v*ratioAt(p.record.Adopted, at, s.reference).v/all))
		}
		share := p.r.v / total
		row = append(row, quantity.PPMText(share*alpha))
		for _, at := range []float64{lo, hi} {
			row = append(row, quantity.ChangeText(share*(ratioAt(p.record.Adopted, at, s.reference).v-1)))
		}
		t.Rows, t.Links = append(t.Rows, row), append(t.Links, p.record.ID)
	}
	return t
}

// chart draws the change of the whole, and what each part adds to it.
func (s *series) chart(sum *material.DataSet, lo, hi float64) {
	total, _ := sum.Ratio.Nominal.At(s.reference)
	whole := material.DataSet{Valid: sum.Valid, Ratio: sum.Ratio}
	change := func(x float64) float64 { return float64((x - 1) * 1e6) }
	chart := Chart{Title: s.out.Title, XTitle: "temperature in °C", YTitle: "change of the total R from " + quantity.CelsiusText(s.reference) + " in ppm",
		Description: "Change of the total resistance, and what each part adds to it; the table holds the same numbers."}
	add := func(label string, set *material.DataSet, convert func(float64) float64) {
		read := material.Reading{Told: set.Ratio, Ratio: true, Reference: s.reference}
		if line, ok := seriesOf(label, set, read, lo, hi, convert); ok {
			chart.Series = append(chart.Series, line)
		}
	}
	add("the whole", &whole, change)
	for i, p := range s.parts {
		if share := p.r.v / total; i < widest {
			add(p.name, p.record.Adopted, func(x float64) float64 { return float64(share * change(x)) })
		}
	}
	if len(chart.Series) > 0 {
		s.out.Charts = append(s.out.Charts, chart)
	}
}
