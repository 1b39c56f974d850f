package curve

import (
	"math"
	"testing"

	"ohmfolio/generator/published"
)

// Source: J₅ by 64-point Gauss–Legendre panels, independently of this program (derived).
func TestBlochGruneisenFunction(t *testing.T) {
	for _, row := range published.Rows(t, "bloch_gruneisen_n5_function.csv") {
		x := published.Number(t, row["T_over_Theta"])
		m := BlochGruneisen{Theta: 300, Amplitude: 1, Exponent: 5}
		want := published.Number(t, row["J5_of_Theta_over_T"])
		near(t, row["T_over_Theta"]+" J5", debyeIntegral(5, 1/x)/want, 1, 1e-9)
		want = published.Number(t, row["(T/Theta)^5*J5"])
		near(t, row["T_over_Theta"]+" function", m.At(300*x)/want, 1, 1e-9)
		printed := row["rho_i(T)/rho_i(Theta)"]
		near(t, row["T_over_Theta"]+" reduced", m.At(300*x)/m.At(300)/published.Number(t, printed), 1, 1e-6)
	}
}

// Closed forms: J₅(∞) = 5!·ζ(5), J₃(∞) = 3!·ζ(3), J₂(∞) = 2!·ζ(2) = π²/3,
// J₄(∞) = 4!·ζ(4) = 4π⁴/15.
func TestBlochGruneisenLimits(t *testing.T) {
	for n, want := range map[int]float64{
		2: math.Pi * math.Pi / 3, 3: 6 * 1.2020569031595942, 4: 4 * math.Pow(math.Pi, 4) / 15, 5: 120 * 1.0369277551433699,
	} {
		near(t, "J at infinity", debyeIntegral(n, math.Inf(1))/want, 1, 1e-13)
		// For small u the integrand is xⁿ⁻²(1 − x²/12 + …).
		small := 1e-4
		near(t, "J near zero", debyeIntegral(n, small)/(math.Pow(small, float64(n-1))/float64(n-1)), 1, 1e-9)
	}
}

func TestBlochGruneisenIsLoweredWithin1e7(t *testing.T) {
	for _, m := range []BlochGruneisen{
		{Residual: 2e-11, Theta: 333, Amplitude: 8e-8, Exponent: 5},
		{Residual: 0, Theta: 240, Amplitude: 3e-7, Exponent: 3},
		{Residual: 1e-9, Theta: 400, Amplitude: 1e-7, Exponent: 2},
	} {
		lo := 0.0
		if m.Residual == 0 {
			lo = 5
		}
		curve := must(t)(m.Curve(lo, 900))
		for i := range 3001 {
			k := math.Min(lo+(900-lo)*float64(i)/3000, 900)
			near(t, "value", at(t, curve, k)/m.At(k), 1, 1e-7)
		}
		if points := curve.TurningPoints(); len(points) != 0 {
			t.Errorf("a metal that turns: %v", points)
		}
	}
}

func TestWrongBlochGruneisen(t *testing.T) {
	good := BlochGruneisen{Residual: 1e-11, Theta: 333, Amplitude: 8e-8, Exponent: 5}
	for name, change := range map[string]func(*BlochGruneisen){
		"exponent":     func(m *BlochGruneisen) { m.Exponent = 1 },
		"high":         func(m *BlochGruneisen) { m.Exponent = 6 },
		"theta":        func(m *BlochGruneisen) { m.Theta = 0 },
		"amplitude":    func(m *BlochGruneisen) { m.Amplitude = math.NaN() },
		"residual":     func(m *BlochGruneisen) { m.Residual = -1e-12 },
		"not a number": func(m *BlochGruneisen) { m.Theta = math.Inf(1) },
	} {
		m := good
		change(&m)
		if _, err := m.Curve(4, 300); err == nil {
			t.Errorf("%s: no error", name)
		}
	}
	if _, err := good.Curve(-1, 300); err == nil {
		t.Error("below absolute zero: no error")
	}
	if _, err := (BlochGruneisen{Theta: 333, Amplitude: 8e-8, Exponent: 5}).Curve(0, 300); err == nil {
		t.Error("nothing to be relative to at absolute zero: no error")
	}
}
