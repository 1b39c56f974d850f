package curve

import (
	"fmt"
	"math"
)

// Measures are the temperature coefficients of a fixed body over a window,
// counted from a reference temperature. Temperatures are kelvin, coefficients
// K⁻¹, changes relative (1). The measures differ from one another and are never mixed.
type Measures struct {
	Reference, Lo, Hi float64

	// Slope is (1/R(T))·dR/dT.
	SlopeAtReference     float64
	SlopeMin, SlopeMinAt float64
	SlopeMax, SlopeMaxAt float64
	// A chord is (R_T − R_ref)/(R_ref·(T − T_ref)): cold to the lower edge of the
	// window, hot to the upper; nil when that edge is not on its side.
	ChordCold, ChordHot *float64
	// Box is (R_max − R_min)/(R_ref·(Hi − Lo)).
	Box    float64
	Change Change
	// TurningPoints are all that the curve has, inside the window or not.
	TurningPoints []Turn
	FromTable     bool // slopes, turning points and extremes are limited by the spacing of the table
}

// A Change is (R_T − R_ref)/R_ref over a window. Greatest is the signed one of
// largest magnitude; of two equal ones, the maximum.
type Change struct {
	Min, MinAt, Max, MaxAt, Greatest, GreatestAt float64
}

// A Turn is a turning point with its change counted from the reference.
type Turn struct {
	T       float64
	Maximum bool
	Change  float64
	Inside  bool // the window
}

// Measure gives every measure of the curve c of a fixed body. Reference and
// both edges must lie inside the curve's range (OutsideRange otherwise), the
// window must have a width, and the resistance must be positive at the
// reference and over the window, or a relative slope has no meaning (NotPositive).
func Measure(c Curve, reference, lo, hi float64) (Measures, error) {
	reference, err := c.inside("reference temperature", reference)
	if err != nil {
		return Measures{}, err
	}
	if lo, hi, err = c.window(lo, hi); err != nil {
		return Measures{}, err
	}
	if hi-lo <= slack {
		return Measures{}, fmt.Errorf("the window at %s has no width", celsius(lo))
	}
	s, _ := c.owner(reference)
	at := s.value(reference)
	e, _ := c.Extremes(lo, hi)
	if err := positive(at, reference, e); err != nil {
		return Measures{}, err
	}
	m := Measures{
		Reference: reference, Lo: lo, Hi: hi,
		SlopeAtReference: s.slope(reference) / at,
		ChordCold:        c.chord(reference, lo, lo < reference-slack),
		ChordHot:         c.chord(reference, hi, hi > reference+slack),
		Box:              (e.Max - e.Min) / float64(at*(hi-lo)),
		Change:           changeOf(e, at),
		FromTable:        c.FromTable,
	}
	m.slopes(c)
	m.turns(c, at)
	return m, nil
}

// NotPositive is the error of a resistance that is zero or negative.
type NotPositive struct{ T, Value float64 }

func (e NotPositive) Error() string {
	return fmt.Sprintf("the resistance is not positive at %s: it is %.6g there", celsius(e.T), e.Value)
}

func positive(at, reference float64, e Extremes) error {
	if !(at > 0) {
		return NotPositive{reference, at}
	}
	if !(e.Min > 0) {
		return NotPositive{e.MinAt, e.Min}
	}
	return nil
}

// chord gives the mean coefficient from the reference to an edge, nil when the
// edge does not lie on its side.
func (c Curve) chord(reference, edge float64, onSide bool) *float64 {
	if !onSide {
		return nil
	}
	at, _ := c.At(reference)
	there, _ := c.At(edge)
	k := (there - at) / float64(at*(edge-reference))
	return &k
}

func changeOf(e Extremes, at float64) Change {
	c := Change{Min: (e.Min - at) / at, MinAt: e.MinAt, Max: (e.Max - at) / at, MaxAt: e.MaxAt}
	c.Greatest, c.GreatestAt = c.Max, c.MaxAt
	if math.Abs(c.Min) > math.Abs(c.Max) {
		c.Greatest, c.GreatestAt = c.Min, c.MinAt
	}
	return c
}

// slopes finds the extremes of (1/R)·dR/dT over the window, segment by segment.
// At a kink on the lower edge only the segment inside the window counts.
func (m *Measures) slopes(c Curve) {
	e := Extremes{Min: math.Inf(1), Max: math.Inf(-1)}
	for i := c.index(m.Lo); i < len(c.Segments); i++ {
		s := &c.Segments[i]
		lo, hi := max(s.From, m.Lo), min(s.To, m.Hi)
		if lo < hi {
			e.takeRelativeSlope(s, lo, hi)
		}
		if s.To >= m.Hi {
			break
		}
	}
	m.SlopeMin, m.SlopeMinAt, m.SlopeMax, m.SlopeMaxAt = e.Min, e.MinAt, e.Max, e.MaxAt
}

// takeRelativeSlope widens e by P′/P of the segment between lo and hi. It is
// extreme at an end or where P″P − P′² is zero, with u = T − Centre
//
//	(2c₀c₂ − c₁²) + (6c₀c₃ − 2c₁c₂)·u − 2c₂²·u² − 4c₂c₃·u³ − 3c₃²·u⁴ = 0
//
// which is closed for a parabola; for a cubic every root is isolated between
// the roots of the derivatives, so none is missed.
func (e *Extremes) takeRelativeSlope(s *Segment, lo, hi float64) {
	relative := func(t float64) float64 { return s.slope(t) / s.value(t) }
	c := &s.C
	p := [5]float64{
		float64(2*c[0]*c[2]) - float64(c[1]*c[1]),
		float64(6*c[0]*c[3]) - float64(2*c[1]*c[2]),
		-float64(2 * c[2] * c[2]),
		-float64(4 * c[2] * c[3]),
		-float64(3 * c[3] * c[3]),
	}
	e.widen(lo, relative(lo))
	var store [8]float64
	for _, u := range crossings(p[:], lo-s.Centre, hi-s.Centre, store[:0]) {
		t := min(max(s.Centre+u, lo), hi)
		e.widen(t, relative(t))
	}
	e.widen(hi, relative(hi))
}

func (m *Measures) turns(c Curve, at float64) {
	for _, p := range c.TurningPoints() {
		v, _ := c.At(p.T)
		m.TurningPoints = append(m.TurningPoints, Turn{
			T: p.T, Maximum: p.Maximum, Change: (v - at) / at,
			Inside: p.T >= m.Lo-slack && p.T <= m.Hi+slack,
		})
	}
}
