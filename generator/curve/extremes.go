package curve

import "math"

// Extremes are the smallest and the greatest value over a window and the
// temperatures, in kelvin, at which they stand: the lowest such temperature
// when there are several.
type Extremes struct{ Min, MinAt, Max, MaxAt float64 }

// Extremes gives the extremes between lo and hi. They are exact: they stand at
// an edge of the window, at an edge of a segment, or where a segment's slope, a
// parabola in T, is zero. Where two pieces join with a step both values count.
// It is false when the window is inverted or reaches outside the range.
func (c Curve) Extremes(lo, hi float64) (Extremes, bool) {
	lo, hi, err := c.window(lo, hi)
	if err != nil {
		return Extremes{math.NaN(), math.NaN(), math.NaN(), math.NaN()}, false
	}
	e := Extremes{Min: math.Inf(1), Max: math.Inf(-1)}
	for i := c.index(lo); i < len(c.Segments); i++ {
		s := &c.Segments[i]
		e.take(s, max(s.From, lo), min(s.To, hi))
		if s.To >= hi {
			break
		}
	}
	return e, true
}

// take widens e by the values of s between lo and hi.
func (e *Extremes) take(s *Segment, lo, hi float64) {
	e.widen(lo, s.value(lo))
	t, n := s.stationary()
	for _, x := range t[:n] {
		if x > lo && x < hi {
			e.widen(x, s.value(x))
		}
	}
	e.widen(hi, s.value(hi))
}

func (e *Extremes) widen(t, v float64) {
	if v < e.Min {
		e.Min, e.MinAt = v, t
	}
	if v > e.Max {
		e.Max, e.MaxAt = v, t
	}
}

// A TurningPoint is a temperature, in kelvin, at which a curve stops rising and
// begins to fall (Maximum) or the other way round.
type TurningPoint struct {
	T       float64
	Maximum bool
}

// narrow is the width, in kelvin, below which a stretch has no direction of its
// own. Two segments that meet at a peak may each see the peak on the other's
// side of the knot, by rounding; without this one peak would be three.
const narrow = 1e-7

// level is the change over a whole segment, relative to the value, below which
// a slope counts as zero: a constant that was divided and multiplied again.
const level = 1e-13

// TurningPoints gives all turning points of the curve, ascending, kinks between
// segments included. A flat stretch between rise and fall turns at its middle.
// A zero of the slope exactly at an end of the range counts, except in a table,
// where the method itself sets end slopes to zero.
func (c Curve) TurningPoints() []TurningPoint {
	var found []TurningPoint
	var last stretch // the last stretch that rose or fell
	for i := range c.Segments {
		s := &c.Segments[i]
		edges, n := s.stretches()
		for k := 1; k < n; k++ {
			now := stretch{edges[k-1], edges[k], s.direction(edges[k-1], edges[k])}
			if now.direction == 0 {
				continue
			}
			if last.direction == -now.direction {
				found = append(found, TurningPoint{0.5 * (last.to + now.from), last.direction > 0})
			}
			last = now
		}
	}
	if c.FromTable || len(c.Segments) == 0 {
		return found
	}
	return c.turningEnds(found)
}

// A stretch is an interval in which the curve only rises (+1), only falls (−1)
// or stays level (0).
type stretch struct {
	from, to  float64
	direction int
}

// stretches gives the edges of the intervals in which s does not turn.
func (s *Segment) stretches() (edges [4]float64, n int) {
	edges[0], n = s.From, 1
	t, roots := s.stationary()
	for _, x := range t[:roots] {
		if x > s.From && x < s.To {
			edges[n] = x
			n++
		}
	}
	edges[n] = s.To
	return edges, n + 1
}

// direction gives the sign of the slope between a and b, where it does not change.
func (s *Segment) direction(a, b float64) int {
	if b-a < narrow {
		return 0
	}
	d := s.slope(0.5 * (a + b))
	switch {
	case s.isLevel(d):
		return 0
	case d > 0:
		return 1
	}
	return -1
}

// isLevel tells whether the slope d would, over the whole segment, change the
// value by no more than rounding does.
func (s *Segment) isLevel(d float64) bool {
	return math.Abs(d)*(s.To-s.From) <= level*s.magnitude()
}

// turningEnds adds the turning points that stand at the very ends of the range,
// where the stretch beside them is too narrow to have been seen.
func (c Curve) turningEnds(found []TurningPoint) []TurningPoint {
	first, last := &c.Segments[0], &c.Segments[len(c.Segments)-1]
	// At absolute zero every resistivity is level, and there is no other side.
	if p, ok := first.turnsAt(first.From); ok && p.T > 0 && (len(found) == 0 || found[0].T > p.T+narrow) {
		found = append([]TurningPoint{p}, found...)
	}
	if first.From == last.To {
		return found
	}
	if p, ok := last.turnsAt(last.To); ok && (len(found) == 0 || found[len(found)-1].T < p.T-narrow) {
		found = append(found, p)
	}
	return found
}

// turnsAt tells whether the slope of s changes sign at t, within narrow.
func (s *Segment) turnsAt(t float64) (TurningPoint, bool) {
	if s.isLevel(s.slope(s.From)) && s.isLevel(s.slope(0.5*(s.From+s.To))) && s.isLevel(s.slope(s.To)) {
		return TurningPoint{}, false // a slope, a parabola, small at three points is small everywhere
	}
	roots, n := s.stationary()
	for _, x := range roots[:n] {
		if math.Abs(x-t) <= narrow {
			return TurningPoint{t, s.bend(x) < 0}, true
		}
	}
	return TurningPoint{}, false
}
