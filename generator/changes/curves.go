package changes

import (
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/export"
	"ohmfolio/generator/quantity"
	"ohmfolio/generator/statement"
)

// agree is the relative difference below which two curves are the same:
// coefficients in files have 12 significant digits.
const agree = 1e-11

// curves compares what both statements tell: the resistivity, and the
// resistance of a fixed body over its value at one temperature.
func (c *Change) curves() {
	basis := c.basis()
	add := func(name string, old, now curve.Curve, reference *float64) {
		d, ok := curve.Deviate(old, now)
		if !ok {
			return
		}
		if math.Abs(d.Greatest) < agree {
			d.Greatest = 0
		}
		c.Curves = append(c.Curves, CurveDifference{Quantity: name, Basis: basis, PPM: quantity.Round12(d.Greatest * 1e6), AtC: degrees(d.At),
			CommonRangeC: [2]float64{degrees(d.Lo), degrees(d.Hi)}, ReferenceC: reference})
	}
	add(statement.AskResistivity, curveOf(c.old.Segments.Resistivity), curveOf(c.new.Segments.Resistivity), nil)
	if old, now, reference, ok := ratios(c.old.Segments.Ratio, c.new.Segments.Ratio); ok {
		add(statement.AskResistanceRatio, old, now, finite(degrees(reference)))
	}
	for i := range c.Curves {
		if c.Greatest == nil || math.Abs(c.Curves[i].PPM) > math.Abs(c.Greatest.PPM) {
			c.Greatest = &c.Curves[i]
		}
	}
}

func (c *Change) basis() string {
	o, n := c.old.set(), c.new.set()
	switch {
	case o == nil || n == nil:
		return "not stated"
	case o.Basis != n.Basis:
		return o.Basis + " → " + n.Basis
	}
	return n.Basis
}

// ratios tells both ratios about one temperature: that of the new statement,
// or the lower end of the common range when the old one does not tell it.
func ratios(old, now *export.RatioJSON) (a, b curve.Curve, reference float64, ok bool) {
	if old == nil || now == nil || len(old.Pieces) == 0 || len(now.Pieces) == 0 {
		return a, b, 0, false
	}
	a, b, reference = curveOf(old.Pieces), curveOf(now.Pieces), now.ReferenceK
	if _, told := a.At(reference); !told {
		lo, _ := a.Range()
		reference = math.Max(lo, b.Segments[0].From)
	}
	x, okX := a.At(reference)
	y, okY := b.At(reference)
	if !okX || !okY || x == 0 || y == 0 {
		return a, b, 0, false
	}
	return a.Scale(1 / x), b.Scale(1 / y), reference, true
}

func degrees(kelvin float64) float64 { return quantity.Round12(kelvin - quantity.ZeroCelsius) }

// band compares the edges of the bands that the stated limits leave open.
func (c *Change) band() {
	o, n := c.old.Corners, c.new.Corners
	switch {
	case o == nil && n == nil:
		return
	case o == nil:
		c.Band = &BandDifference{Quantity: n.Quantity, Words: "no band before"}
		return
	case n == nil:
		c.Band = &BandDifference{Quantity: o.Quantity, Words: "no band any more"}
		return
	case o.Quantity != n.Quantity:
		c.Band = &BandDifference{Quantity: n.Quantity, Words: "the band was one of the " + o.Quantity}
		return
	}
	lower, ok := curve.DeviateEdge(curvesOf(o.Curves), curvesOf(n.Curves), false)
	upper, ok2 := curve.DeviateEdge(curvesOf(o.Curves), curvesOf(n.Curves), true)
	switch {
	case !ok || !ok2:
		c.Band = &BandDifference{Quantity: n.Quantity, Words: "the bands have no range in common"}
	case math.Abs(lower.Greatest) >= agree || math.Abs(upper.Greatest) >= agree:
		c.Band = &BandDifference{Quantity: n.Quantity, LowerPPM: quantity.Round12(lower.Greatest * 1e6), LowerAtC: degrees(lower.At),
			UpperPPM: quantity.Round12(upper.Greatest * 1e6), UpperAtC: degrees(upper.At)}
	}
}

func curvesOf(list [][]export.SegmentJSON) []curve.Curve {
	out := make([]curve.Curve, len(list))
	for i := range list {
		out[i] = curveOf(list[i])
	}
	return out
}
