package study

import (
	"math"
	"testing"
)

// TestRoot: roots that arithmetic tells, a steep and a flat function, a step,
// and both ends.
func TestRoot(t *testing.T) {
	for _, c := range []struct {
		what   string
		lo, hi float64
		f      func(float64) float64
		want   float64
		most   int // evaluations
	}{
		{"cube", 1e-7, 1, func(x float64) float64 { return x*x*x - 1e-9 }, 1e-3, 60},
		{"fourth power", 273, 4000, func(x float64) float64 { return x*x*x*x - 1e12 }, 1000, 16},
		{"straight", -3, 5, func(x float64) float64 { return x - 2 }, 2, 8},
		{"step", 0, 1, func(x float64) float64 { return math.Copysign(1, x-0.3) }, 0.3, 70},
		{"flat", -1, 3, func(x float64) float64 { return x * x * x }, 0, 200},
		{"above everywhere", 1, 2, func(x float64) float64 { return x }, 1, 2},
		{"below everywhere", 1, 2, func(x float64) float64 { return -1 / x }, 2, 2},
	} {
		n := 0
		got := root(c.lo, c.hi, func(x float64) float64 { n++; return c.f(x) })
		if math.Abs(got-c.want) > 1e-14*math.Abs(c.want)+1e-15 && c.what != "flat" || math.Abs(got-c.want) > 1e-5 || n > c.most {
			t.Errorf("%s: %.17g after %d, want %g", c.what, got, n, c.want)
		}
	}
}
