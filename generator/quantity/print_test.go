package quantity

import (
	"math"
	"testing"
)

func TestNumber(t *testing.T) {
	for _, c := range []struct {
		x      float64
		digits int
		want   string
	}{
		{1.7241, 5, "1.7241"}, {-40, 2, "−40"}, {5e-7, 2, "5.0×10⁻⁷"}, {258.66, 5, "258.66"}, {0.00393, 3, "0.00393"},
		{123456, 2, "120000"}, {9.999, 3, "10.0"}, {0, 3, "0"}, {1.5e8, 2, "1.5×10⁸"}, {-5e-12, 1, "−5×10⁻¹²"}, {3.93, 0, "4"},
	} {
		if got := Number(c.x, c.digits); got != c.want {
			t.Errorf("Number(%v, %d) = %q, want %q", c.x, c.digits, got, c.want)
		}
	}
}

// TestRoundUncertainty: the examples of JCGM 100:2008, 7.2.6 and 7.2.4. Its
// 10.47 mΩ, rounded up to 11 mΩ there, is a permission that is not used.
func TestRoundUncertainty(t *testing.T) {
	for _, c := range []struct {
		value, uncertainty float64
		v, u               string
	}{
		{10.05762, 0.027, "10.058", "0.027"},
		{0, 28.05, "0", "28"},
		{100.02147, 0.00079, "100.02147", "0.00079"},
		{43.6234, 0.1963, "43.62", "0.20"},
		{43.6234, 0.0996, "43.62", "0.10"},
		{1234567, 12345, "1235000", "12000"},
	} {
		if v, u, _ := RoundUncertainty(c.value, c.uncertainty); v != c.v || u != c.u {
			t.Errorf("%v ± %v is %s ± %s, want %s ± %s", c.value, c.uncertainty, v, u, c.v, c.u)
		}
	}
}

// TestRoundLimits: acceptance limits inward, bands outward, and neither moves
// an edge that stands on the grid but for rounding error.
func TestRoundLimits(t *testing.T) {
	for _, c := range []struct {
		lo, hi           float64
		decimals         int
		in, out          [2]float64
		inside, enclosed bool
	}{
		{lo: 40.85, hi: 45.15, decimals: 1, in: [2]float64{40.9, 45.1}, out: [2]float64{40.8, 45.2}},
		{lo: 0.1 + 0.2, hi: 0.7 + 0.1, decimals: 1, in: [2]float64{0.3, 0.8}, out: [2]float64{0.3, 0.8}},
		{lo: -8.04, hi: -4.04, decimals: 1, in: [2]float64{-8.0, -4.1}, out: [2]float64{-8.1, -4.0}},
		{lo: 411, hi: 549, decimals: -1, in: [2]float64{420, 540}, out: [2]float64{410, 550}},
	} {
		if lo, hi := RoundInward(c.lo, c.hi, c.decimals); lo != c.in[0] || hi != c.in[1] {
			t.Errorf("%v to %v inward: %v to %v, want %v", c.lo, c.hi, lo, hi, c.in)
		}
		if lo, hi := RoundOutward(c.lo, c.hi, c.decimals); lo != c.out[0] || hi != c.out[1] {
			t.Errorf("%v to %v outward: %v to %v, want %v", c.lo, c.hi, lo, hi, c.out)
		}
	}
}

// TestIn: no more digits than the source justifies. 36 ft are 11.0 m is the
// example of NIST SP 811, B.7 (from memory); the others are worked by hand.
func TestIn(t *testing.T) {
	for _, c := range []struct {
		kind             Kind
		text, unit, want string
	}{
		{Length, "36 ft", "m", "11.0 m"},
		{Length, "9 mil", "mm", "0.23 mm"},
		{Length, "1.0 in", "mm", "25 mm"},
		{Resistivity, "1.7241 µΩ·cm", "Ω·mm²/m", "0.017241 Ω·mm²/m"},
		{Resistivity, "1.7241 µΩ·cm", "Ω·cmil/ft", "10.371 Ω·cmil/ft"},
		{Resistivity, "0.43 µΩ·m", "Ω·cmil/ft", "260 Ω·cmil/ft"},
		{Resistivity, "0.43 µΩ·m", "Ω·m", "4.3×10⁻⁷ Ω·m"},
		{Temperature, "20 °C", "K", "293 K"},
		{Temperature, "0 °C", "K", "273 K"},
		{Temperature, "0.0 °C", "K", "273.2 K"},
		{Temperature, "−40 °C", "°F", "−40 °F"},
		{Temperature, "212 °F", "°C", "100 °C"},
		{Temperature, "20 °C ± 2 K", "°C", "20 °C, 18 to 22 °C"},
		{Temperature, "20 °C ± 0.02 K (k=2)", "°C", "20 °C ± 0.020 K (k=2)"},
		{Temperature, "20 °C ± 0.02 K (k=2)", "°F", "68.00 °F ± 0.036 Δ°F (k=2)"},
		{Resistivity, "43 µΩ·cm ± 5 %", "µΩ·cm", "43 µΩ·cm, 40.9 to 45.1 µΩ·cm"},
		{Resistivity, "43.10 µΩ·cm ± 0.4 % (k=2)", "µΩ·cm", "43.10 µΩ·cm ± 0.17 µΩ·cm (k=2)"},
		{Length, "1 mm ± 0.02 mm", "mm", "1 mm, 0.98 to 1.02 mm"},
		{Length, "10 mm ± 1 µm", "mm", "10 mm, 9.999 to 10.001 mm"},
		{Length, "<= 3 mil", "mm", "at most 0.076 mm"},
		{Stress, ">= 780 MPa", "GPa", "at least 0.78 GPa"},
		{Stress, "410 MPa to 540 MPa", "MPa", "410 to 540 MPa"},
		{Coefficient1, "-4 to 8 ppm/K", "ppm/K", "−4 to 8 ppm/K"},
		{Coefficient1, "0.67e-3 /°F", "/K", "0.00121 /K"},
		{Ratio, "0.30", "%", "30 %"},
	} {
		q, p := Parse(c.kind, c.text)
		if p != nil {
			t.Errorf("%q: %v", c.text, p)
			continue
		}
		if got, want := q.In(mustFind(t, c.kind, c.unit)), narrow(c.want); got != want {
			t.Errorf("%q in %s is %q, want %q", c.text, c.unit, got, want)
		}
	}
}

// narrow puts the narrow space between the last digit and a unit.
func narrow(s string) string {
	out := []rune(s)
	for i := 1; i+1 < len(out); i++ {
		digit := out[i-1] >= '0' && out[i-1] <= '9' || out[i-1] == '⁷'
		if out[i] == ' ' && digit && out[i+1] != 't' && out[i+1] != '±' {
			out[i] = '\u202f'
		}
	}
	return string(out)
}

// TestConductivityBecomesAsymmetric: 58 MS/m ± 10 % by hand: 1/63.8, 1/52.2.
func TestConductivityBecomesAsymmetric(t *testing.T) {
	for _, text := range []string{"58 MS/m ± 10 %", "58 MS/m ± 10 % (k=2)"} {
		q, p := Parse(Conductivity, text)
		if p != nil {
			t.Fatal(p)
		}
		r := ResistivityFromConductivity(q)
		lo, hi := 0.0, 0.0
		if r.Limits != nil {
			lo, hi = r.Limits.Lower, r.Limits.Upper
		} else {
			lo, hi = r.Value-r.Uncertainty.Minus, r.Value+r.Uncertainty.Plus
		}
		if !near(r.Value, 1/58e6) || !near(lo, 1/63.8e6) || !near(hi, 1/52.2e6) || r.Kind != Resistivity || r.Text != text {
			t.Errorf("%s: %v, %v to %v", text, r.Value, lo, hi)
		}
	}
	q, _ := Parse(Conductivity, "58 MS/m ± 10 %")
	r := ResistivityFromConductivity(q)
	if got, want := r.In(r.Unit), narrow("1.72 µΩ·cm, 1.57 to 1.91 µΩ·cm"); got != want {
		t.Errorf("printed as %q, want %q", got, want)
	}
	q, _ = Parse(Conductivity, ">= 58 MS/m")
	if r = ResistivityFromConductivity(q); r.HasValue() || !math.IsInf(r.Limits.Lower, -1) || !near(r.Limits.Upper, 1/58e6) {
		t.Errorf("one-sided: %v", r.Limits)
	}
	if m := ResistivityFromMass(Quantity{Text: "0.15328 Ω·g/m²", Value: 0.15328e-3}, 8890); !near(m.Value, 0.15328e-3/8890) {
		t.Errorf("mass: %v", m.Value)
	}
}
