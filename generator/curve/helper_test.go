package curve

import (
	"math"
	"testing"
)

// c puts degrees Celsius into kelvin.
func c(t float64) float64 { return t + zeroCelsius }

// near fails unless got is within tolerance of want.
func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance) {
		t.Errorf("%s: got %.12g, want %.12g ± %.3g", what, got, want, tolerance)
	}
}

// at gives the value of a curve that must tell it.
func at(t *testing.T, curve Curve, kelvin float64) float64 {
	t.Helper()
	v, ok := curve.At(kelvin)
	if !ok {
		t.Fatalf("no value at %s", celsius(kelvin))
	}
	return v
}

// must gives the curve of a lowering that may not fail.
func must(t *testing.T) func(Curve, error) Curve {
	return func(curve Curve, err error) Curve {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return curve
	}
}

// halfUnit is half a unit of the last digit printed in text.
func halfUnit(text string) float64 {
	for i := range text {
		if text[i] == '.' {
			return 0.5 * math.Pow(10, -float64(len(text)-i-1))
		}
	}
	return 0.5
}

// worked is the parabola of the worked check numbers: α +10 ppm/K, β −0.5 ppm/K²
// about 20 °C, computed by hand from the formula.
var worked = Polynomial{Y0: 1, Alpha: 10e-6, Beta: -0.5e-6, Reference: c(20)}
