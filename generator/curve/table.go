package curve

import (
	"errors"
	"fmt"
	"math"
)

// Table lowers a printed table to segments that pass through every row: the
// temperatures t, in kelvin and ascending, and the values y. With linear they
// are straight lines; otherwise the monotone cubic of Fritsch and Butland, the
// one that scipy calls PchipInterpolator and gonum FritschButland. Two rows make
// a straight line either way. A table needs two rows of finite numbers.
//
// Source: F. N. Fritsch, J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300.
func Table(t, y []float64, linear bool) (Curve, error) {
	if err := checkTable(t, y); err != nil {
		return Curve{}, err
	}
	segments := make([]Segment, len(t)-1)
	slopes := butlandSlopes(t, y)
	for i := range segments {
		if linear || len(t) == 2 {
			chord := (y[i+1] - y[i]) / (t[i+1] - t[i])
			segments[i] = Segment{From: t[i], To: t[i+1], Centre: t[i+1], C: [4]float64{y[i+1], chord}}
			continue
		}
		segments[i] = hermite(t[i], t[i+1], y[i], y[i+1], slopes[i], slopes[i+1])
	}
	return Curve{Segments: segments, FromTable: true}, nil
}

func checkTable(t, y []float64) error {
	if len(t) != len(y) {
		return fmt.Errorf("the table has %d temperatures and %d values", len(t), len(y))
	}
	if len(t) < 2 {
		return errors.New("a table needs at least two rows")
	}
	for i := range t {
		if finite(t[i]) == 0 || finite(y[i]) == 0 {
			return fmt.Errorf("row %d of the table is not finite", i+1)
		}
		if i > 0 && t[i] <= t[i-1] {
			return fmt.Errorf("row %d of the table, %s, does not lie above row %d, %s", i+1, celsius(t[i]), i, celsius(t[i-1]))
		}
	}
	return nil
}

// butlandSlopes gives the slope at every knot: inside, the weighted harmonic
// mean of the two secants, zero where they differ in sign; at the ends, the
// slope of the parabola through three knots, kept to the shape of the table.
func butlandSlopes(t, y []float64) []float64 {
	n := len(t)
	h, secant := make([]float64, n-1), make([]float64, n-1)
	for i := range h {
		h[i] = t[i+1] - t[i]
		secant[i] = (y[i+1] - y[i]) / h[i]
	}
	d := make([]float64, n)
	if n == 2 {
		d[0], d[1] = secant[0], secant[0]
		return d
	}
	for i := 1; i < n-1; i++ {
		d[i] = harmonicSlope(h[i-1], h[i], secant[i-1], secant[i])
	}
	d[0] = endSlope(h[0], h[1], secant[0], secant[1])
	d[n-1] = endSlope(h[n-2], h[n-3], secant[n-2], secant[n-3])
	return d
}

// harmonicSlope is (w₁+w₂)/(w₁/Δ₁ + w₂/Δ₂), w₁ = 2h₂ + h₁, w₂ = h₂ + 2h₁.
func harmonicSlope(h1, h2, secant1, secant2 float64) float64 {
	if !sameSign(secant1, secant2) {
		return 0
	}
	w1, w2 := 2*h2+h1, h2+2*h1
	return (w1 + w2) / (w1/secant1 + w2/secant2)
}

// endSlope takes the steps and secants counted from the end inwards.
func endSlope(h1, h2, secant1, secant2 float64) float64 {
	d := (float64((2*h1+h2)*secant1) - float64(h1*secant2)) / (h1 + h2)
	switch {
	case !sameSign(d, secant1):
		return 0
	case !sameSign(secant1, secant2) && math.Abs(d) > 3*math.Abs(secant1):
		return 3 * secant1
	}
	return d
}

func sameSign(a, b float64) bool { return a > 0 && b > 0 || a < 0 && b < 0 }
