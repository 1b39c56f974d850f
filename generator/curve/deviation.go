package curve

import "math"

// A Deviation is how far one curve lies from another: the greatest relative
// difference new/old − 1, with its sign, and the temperature where it stands.
type Deviation struct {
	Greatest, At float64 // 1, K
	Lo, Hi       float64 // K, the range that both tell
}

// Deviate gives the greatest relative difference of two curves over the range
// that both tell. It is exact: on each stretch without an edge of either, the
// quotient of two cubics is extreme at an end, or where
//
//	N′·O − N·O′ = 0
//
// whose fifth power cancels; every root of the quartic is isolated. It is
// false without a common range, and where the old curve is zero.
func Deviate(old, now Curve) (Deviation, bool) {
	return DeviateEdge([]Curve{old}, []Curve{now}, false)
}

// DeviateEdge is Deviate for one edge of two bands, given by their corners:
// the pointwise greatest of the corners for upper, the smallest otherwise. An
// edge is extreme where two of its own corners cross, too.
func DeviateEdge(old, now []Curve, upper bool) (Deviation, bool) {
	d, ok := commonRange(append(append([]Curve{}, old...), now...))
	if !ok || len(old) == 0 || len(now) == 0 {
		return Deviation{}, false
	}
	d.At = d.Lo
	for _, t := range candidates(old, now, d.Lo, d.Hi) {
		o, n := edgeAt(old, t, upper), edgeAt(now, t, upper)
		if o == 0 || math.IsNaN(n/o) {
			return Deviation{}, false
		}
		if x := n/o - 1; math.Abs(x) > math.Abs(d.Greatest) {
			d.Greatest, d.At = x, t
		}
	}
	return d, true
}

func commonRange(list []Curve) (Deviation, bool) {
	d := Deviation{Lo: math.Inf(-1), Hi: math.Inf(1)}
	for _, c := range list {
		lo, hi := c.Range()
		if math.IsNaN(lo) {
			return d, false
		}
		d.Lo, d.Hi = math.Max(d.Lo, lo), math.Min(d.Hi, hi)
	}
	return d, len(list) > 0 && d.Lo <= d.Hi
}

func edgeAt(list []Curve, t float64, upper bool) float64 {
	v := math.NaN()
	for _, c := range list {
		x, ok := c.At(t)
		switch {
		case !ok:
			return math.NaN()
		case math.IsNaN(v), upper && x > v, !upper && x < v:
			v = x
		}
	}
	return v
}

// candidates are all temperatures between lo and hi at which an edge's
// quotient can be extreme.
func candidates(old, now []Curve, lo, hi float64) []float64 {
	found := []float64{lo, hi}
	for _, list := range [][]Curve{old, now} {
		for i := range list {
			for _, s := range list[i].Segments {
				if s.To > lo && s.To < hi {
					found = append(found, s.To, math.Nextafter(s.To, math.Inf(1))) // both sides of a step
				}
			}
			for j := range i {
				found = meetings(list[i], list[j], lo, hi, crossing, found)
			}
		}
	}
	for _, o := range old {
		for _, n := range now {
			found = meetings(o, n, lo, hi, stationaryQuotient, found)
		}
	}
	return found
}

// meetings appends the roots of a polynomial made of the segments of a and b,
// stretch by stretch.
func meetings(a, b Curve, lo, hi float64, polynomial func(a, b *[4]float64) [5]float64, found []float64) []float64 {
	for i, j := 0, 0; i < len(a.Segments) && j < len(b.Segments); {
		s, r := &a.Segments[i], &b.Segments[j]
		from, to := max(s.From, r.From, lo), min(s.To, r.To, hi)
		if from < to {
			x, y := about(s, from), about(r, from)
			p := polynomial(&x, &y)
			for _, u := range crossings(p[:], 0, to-from, nil) {
				found = append(found, min(from+u, to))
			}
		}
		if s.To <= r.To {
			i++
		} else {
			j++
		}
	}
	return found
}

func crossing(a, b *[4]float64) [5]float64 {
	return [5]float64{a[0] - b[0], a[1] - b[1], a[2] - b[2], a[3] - b[3]}
}

// stationaryQuotient is N′O − NO′ with O = a, N = b.
func stationaryQuotient(a, b *[4]float64) [5]float64 {
	var p [5]float64
	for i := 1; i <= 3; i++ { // power i of one, differentiated, times power j of the other
		for j := 0; j <= 3; j++ {
			if i+j-1 < len(p) {
				p[i+j-1] += float64(float64(i)*b[i]*a[j]) - float64(float64(i)*a[i]*b[j])
			}
		}
	}
	return p
}

// about gives the coefficients of s in powers of (T − t).
func about(s *Segment, t float64) [4]float64 {
	return [4]float64{s.value(t), s.slope(t), s.bend(t) / 2, s.C[3]}
}
