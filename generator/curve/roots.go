package curve

import "math"

// quadraticRoots gives the real roots, ascending, of a + b·x + c·x² at which
// the sign changes. A double root, told from two by the rounding of the
// discriminant, is none. The larger root comes first by the form that does not
// cancel, the other from the product of the roots.
func quadraticRoots(a, b, c float64) (x [2]float64, n int) {
	if c == 0 {
		if b == 0 {
			return x, 0
		}
		x[0] = -a / b
		return x, finite(x[0])
	}
	discriminant := float64(b*b) - float64(4*a*c)
	rounding := 8 * epsilon * math.Max(float64(b*b), math.Abs(float64(4*a*c)))
	if !(discriminant > rounding) {
		return x, 0
	}
	q := -0.5 * (b + math.Copysign(math.Sqrt(discriminant), b))
	x[0], x[1] = q/c, a/q // q is not zero: the discriminant is positive
	switch {
	case finite(x[0]) == 0: // c is all but zero: a straight line's one root
		x[0] = x[1]
		return x, finite(x[0])
	case x[0] > x[1]:
		x[0], x[1] = x[1], x[0]
	}
	return x, 2
}

const epsilon = 0x1p-52 // spacing of float64 at 1

func finite(x float64) int {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return 0
	}
	return 1
}

// crossings appends the roots of Σ p[i]·xⁱ in the closed interval lo to hi.
// Between two roots of the derivative a polynomial is monotone, so each such
// stretch holds at most one root and a change of sign proves it: no root with a
// change of sign is missed. A root that only touches is found when the values
// happen to be exactly zero there.
func crossings(p []float64, lo, hi float64, found []float64) []float64 {
	for len(p) > 1 && p[len(p)-1] == 0 {
		p = p[:len(p)-1]
	}
	if len(p) < 2 {
		return found
	}
	if len(p) <= 3 {
		return lowCrossings(p, lo, hi, found)
	}
	var slopes [4]float64
	for i := 1; i < len(p); i++ {
		slopes[i-1] = float64(i) * p[i]
	}
	var store [6]float64
	edges := crossings(slopes[:len(p)-1], lo, hi, append(store[:0], lo))
	edges = append(edges, hi)
	for i := 1; i < len(edges); i++ {
		if x, ok := bracketed(p, edges[i-1], edges[i]); ok {
			found = append(found, x)
		}
	}
	return found
}

// lowCrossings is crossings for a straight line or a parabola.
func lowCrossings(p []float64, lo, hi float64, found []float64) []float64 {
	c := 0.0
	if len(p) == 3 {
		c = p[2]
	}
	x, n := quadraticRoots(p[0], p[1], c)
	for _, r := range x[:n] {
		if r >= lo && r <= hi {
			found = append(found, r)
		}
	}
	return found
}

// bracketed finds the root of Σ p[i]·xⁱ between a and b, where the polynomial
// is monotone, by Newton's steps kept inside a shrinking bracket. ok is false
// when the signs at a and b are equal.
func bracketed(p []float64, a, b float64) (x float64, ok bool) {
	fa, _ := horner(p, a)
	fb, _ := horner(p, b)
	switch {
	case fa == 0:
		return a, true
	case fb == 0:
		return b, true
	case (fa > 0) == (fb > 0):
		return 0, false
	}
	x = 0.5 * (a + b)
	for range 200 {
		f, df := horner(p, x)
		if f == 0 {
			return x, true
		}
		if (f > 0) == (fa > 0) {
			a = x
		} else {
			b = x
		}
		next := x - f/df
		if !(next > math.Min(a, b) && next < math.Max(a, b)) {
			next = 0.5 * (a + b)
		}
		if math.Abs(next-x) <= 2*epsilon*math.Abs(x) {
			return next, true
		}
		x = next
	}
	return x, true
}

// horner gives Σ p[i]·xⁱ and its derivative.
func horner(p []float64, x float64) (f, df float64) {
	for i := len(p) - 1; i >= 0; i-- {
		df = float64(df*x) + f
		f = float64(f*x) + p[i]
	}
	return f, df
}
