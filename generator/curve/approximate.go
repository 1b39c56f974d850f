package curve

import (
	"errors"
	"fmt"
	"math"
)

// Approximate lowers a smooth function to cubic segments: value and slope agree
// at every knot, and between knots the curve stays within relative times the
// magnitude of f. f is the function, df its derivative, both of kelvin; lo < hi.
// Where f is so flat that the cubic would turn though f does not, slopes give
// way to shape: a dip within the tolerance would still be a turning point.
// An interval is halved until cubic and function agree at seven points inside
// it, with a factor of two in hand. It fails when f or df is not finite, or when
// halving does not help: f then has a step or a kink inside, or is zero there.
func Approximate(f, df func(float64) float64, lo, hi, relative float64) (Curve, error) {
	if !(lo < hi) || finite(lo) == 0 || finite(hi) == 0 {
		return Curve{}, fmt.Errorf("cannot lower a function from %s to %s", celsius(lo), celsius(hi))
	}
	l := lowering{f: f, df: df, relative: 0.5 * relative}
	if err := l.halve(knot{lo, f(lo), df(lo)}, knot{hi, f(hi), df(hi)}, 0); err != nil {
		return Curve{}, err
	}
	return Curve{Segments: l.segments}, nil
}

// lowering is one run of Approximate.
type lowering struct {
	f, df    func(float64) float64
	relative float64
	segments []Segment
}

type knot struct{ t, y, slope float64 }

// deepest is the number of halvings after which Approximate gives up: a
// thousandth of a kelvin out of a thousand.
const deepest = 20

var errNotSmooth = errors.New("the function is not smooth enough to be lowered to cubics")

// halve appends the segments from a to b.
func (l *lowering) halve(a, b knot, depth int) error {
	for _, k := range []knot{a, b} {
		if finite(k.y) == 0 || finite(k.slope) == 0 {
			return fmt.Errorf("the function is not finite at %s", celsius(k.t))
		}
	}
	s := hermite(a.t, b.t, a.y, b.y, a.slope, b.slope)
	if monotone, ok := unturned(a, b); ok {
		s = monotone
	}
	if l.fits(&s) {
		l.segments = append(l.segments, s)
		return nil
	}
	if depth == deepest {
		return fmt.Errorf("near %s: %w", celsius(a.t), errNotSmooth)
	}
	t := 0.5 * (a.t + b.t)
	mid := knot{t, l.f(t), l.df(t)}
	if err := l.halve(a, mid, depth+1); err != nil {
		return err
	}
	return l.halve(mid, b, depth+1)
}

// unturned gives the cubic from a to b with slopes of at most three times the
// secant, which is enough to keep it from turning. ok is false when no slope
// exceeds that, or when a slope's sign shows that the function itself turns.
//
// Source: F. N. Fritsch, R. E. Carlson, SIAM J. Numer. Anal. 17 (1980) 238.
func unturned(a, b knot) (s Segment, ok bool) {
	most := 3 * (b.y - a.y) / (b.t - a.t)
	turns := a.slope*most < 0 || b.slope*most < 0 || a.slope*b.slope < 0
	if turns || math.Abs(a.slope) <= math.Abs(most) && math.Abs(b.slope) <= math.Abs(most) {
		return s, false
	}
	limit := func(slope float64) float64 {
		return math.Copysign(math.Min(math.Abs(slope), math.Abs(most)), most)
	}
	return hermite(a.t, b.t, a.y, b.y, limit(a.slope), limit(b.slope)), true
}

// fits compares segment and function at the eighths of the interval. Rounding
// of the function itself is no reason to halve.
func (l *lowering) fits(s *Segment) bool {
	for i := 1; i < 8; i++ {
		t := s.From + float64(float64(i)/8*(s.To-s.From))
		y := l.f(t)
		rounding := 16 * epsilon * s.magnitude()
		if !(math.Abs(s.value(t)-y) <= float64(l.relative*math.Abs(y))+rounding) {
			return false
		}
	}
	return true
}

// approximateEach lowers f segment by segment of c, so that a kink of c between
// two segments stays a knot. f and df receive the segment and the temperature.
func (c Curve) approximateEach(f, df func(*Segment, float64) float64, relative float64) (Curve, error) {
	out := Curve{FromTable: c.FromTable}
	for i := range c.Segments {
		s := &c.Segments[i]
		if s.From == s.To { // a curve of one temperature
			point := Segment{From: s.From, To: s.To, Centre: s.To, C: [4]float64{f(s, s.To), df(s, s.To)}}
			out.Segments = append(out.Segments, point)
			continue
		}
		part, err := Approximate(
			func(t float64) float64 { return f(s, t) },
			func(t float64) float64 { return df(s, t) }, s.From, s.To, relative)
		if err != nil {
			return Curve{}, err
		}
		out.Segments = append(out.Segments, part.Segments...)
	}
	return out, nil
}
