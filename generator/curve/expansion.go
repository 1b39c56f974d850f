package curve

import (
	"errors"
	"math"
)

// expansionTolerance is how well a quotient by the expansion is lowered.
const expansionTolerance = 1e-9

// Resistance turns volume resistivity into the resistance of a fixed body, up
// to the body's shape at the temperature `at`:
//
//	R(T) ∝ ρ(T)/(1 + ε(T)),  ε(T) = gamma·(T − at)
//
// A body that grows by ε in every direction gains 1+ε in length and (1+ε)² in
// section. At `at` nothing changes. gamma is the linear expansion in K⁻¹, `at`
// kelvin and not necessarily inside the range. Lowered within 1e-9.
func Resistance(rho Curve, gamma, at float64) (Curve, error) {
	if gamma == 0 {
		return rho, nil
	}
	if err := checkExpansion(rho, gamma, at); err != nil {
		return Curve{}, err
	}
	length := func(t float64) float64 { return 1 + float64(gamma*(t-at)) }
	return rho.knotted(at).approximateEach(
		func(s *Segment, t float64) float64 { return s.value(t) / length(t) },
		func(s *Segment, t float64) float64 {
			l := length(t)
			return (s.slope(t) - float64(gamma*s.value(t))/l) / l
		}, expansionTolerance)
}

// Resistivity is the way back: ρ(T) ∝ R(T)·(1 + ε(T)). A segment without a third
// power stays exact; one with it is lowered within 1e-9.
func Resistivity(r Curve, gamma, at float64) (Curve, error) {
	if gamma == 0 {
		return r, nil
	}
	if err := checkExpansion(r, gamma, at); err != nil {
		return Curve{}, err
	}
	length := func(t float64) float64 { return 1 + float64(gamma*(t-at)) }
	return r.knotted(at).approximateEach(
		func(s *Segment, t float64) float64 { return float64(s.value(t) * length(t)) },
		func(s *Segment, t float64) float64 {
			return float64(s.slope(t)*length(t)) + float64(gamma*s.value(t))
		}, expansionTolerance)
}

// knotted gives the same curve with a knot at t, if t lies inside it: what is
// lowered from there is exact at t.
func (c Curve) knotted(t float64) Curve {
	s, t := c.owner(t)
	if s == nil || t <= s.From || t >= s.To {
		return c
	}
	i := c.index(t)
	segments := append(make([]Segment, 0, len(c.Segments)+1), c.Segments[:i+1]...)
	segments = append(segments, c.Segments[i:]...)
	segments[i].To, segments[i+1].From = t, t
	return Curve{Segments: segments, FromTable: c.FromTable}
}

// checkExpansion refuses an expansion that would shrink the body to nothing.
func checkExpansion(c Curve, gamma, at float64) error {
	lo, hi := c.Range()
	if len(c.Segments) == 0 {
		return errors.New("there is no curve")
	}
	least := math.Min(1+float64(gamma*(lo-at)), 1+float64(gamma*(hi-at)))
	if !(least > 0) || finite(gamma) == 0 || finite(at) == 0 {
		return errors.New("the expansion does not leave a length above zero over the range")
	}
	return nil
}

// Ratio gives the curve divided by its value at the reference temperature. It
// is false when that lies outside the range or the value there is zero.
func Ratio(c Curve, reference float64) (Curve, bool) {
	at, ok := c.At(reference)
	if !ok || at == 0 || finite(at) == 0 {
		return Curve{}, false
	}
	return c.mapped(func(x float64) float64 { return x / at }), true
}
