package quantity

import (
	"math"
	"testing"
)

func near(a, b float64) bool {
	return a == b || math.Abs(a-b) <= 1e-12*math.Max(math.Abs(a), math.Abs(b))
}

func TestParseForms(t *testing.T) {
	inf := math.Inf(1)
	for _, c := range []struct {
		kind    Kind
		text    string
		value   float64
		digits  int
		lo, hi  float64 // limits; NaN for none
		plus, k float64 // uncertainty; 0 for none
	}{
		{Resistivity, "1.7241 µΩ·cm", 1.7241e-8, 5, math.NaN(), 0, 0, 0},
		{Resistivity, "1.7241 uohm cm", 1.7241e-8, 5, math.NaN(), 0, 0, 0},
		{Resistivity, "1.7241 μΩ.cm", 1.7241e-8, 5, math.NaN(), 0, 0, 0}, // the other code points of µ and Ω
		{Resistivity, "0.43 ohm*mm2/m", 0.43e-6, 2, math.NaN(), 0, 0, 0},
		{Resistivity, "43 µΩ·cm ± 5 %", 43e-8, 2, 40.85e-8, 45.15e-8, 0, 0},
		{Resistivity, "43 µΩ·cm +/- 5 %", 43e-8, 2, 40.85e-8, 45.15e-8, 0, 0},
		{Resistivity, "43.10 µΩ·cm ± 0.4 % (k=2)", 43.1e-8, 4, math.NaN(), 0, 43.1e-8 * 0.004, 2},
		{Resistivity, "(43 ± 2) µΩ·cm", 43e-8, 2, 41e-8, 45e-8, 0, 0},
		{Resistivity, "43 ± 2 µΩ·cm", 43e-8, 2, 41e-8, 45e-8, 0, 0},
		{Resistivity, "1.7241 µΩ·cm +1/-2 %", 1.7241e-8, 5, 1.7241e-8 * 0.98, 1.7241e-8 * 1.01, 0, 0},
		{Coefficient1, "5 ppm/K +4/-8 ppm/K", 5e-6, 1, -3e-6, 9e-6, 0, 0},
		{Coefficient1, "-4 to 8 ppm/K", math.NaN(), 1, -4e-6, 8e-6, 0, 0},
		{Coefficient1, "3.93e-3 /K", 3.93e-3, 3, math.NaN(), 0, 0, 0},
		{Coefficient1, "3.93×10⁻³ 1/°C", 3.93e-3, 3, math.NaN(), 0, 0, 0},
		{Coefficient1, "0.67e-3 /°F", 1.206e-3, 2, math.NaN(), 0, 0, 0},
		{Coefficient1, "0.393 %/K", 3.93e-3, 3, math.NaN(), 0, 0, 0},
		{Coefficient2, "-5.775e-7 /°C²", -5.775e-7, 4, math.NaN(), 0, 0, 0},
		{Coefficient2, "-0.7 to 0 ppm/K^2", math.NaN(), 1, -0.7e-6, 0, 0, 0},
		{Coefficient4, "-4.183e-12 /°C⁴", -4.183e-12, 4, math.NaN(), 0, 0, 0},
		{EMF, "<= 1 µV/K", math.NaN(), 1, -inf, 1e-6, 0, 0},
		{Stress, ">= 780 MPa", math.NaN(), 3, 780e6, inf, 0, 0},
		{Temperature, "-40 °C", 233.15, 2, math.NaN(), 0, 0, 0},
		{Temperature, "212 °F", 373.15, 3, math.NaN(), 0, 0, 0},
		{Temperature, "20 °C ± 2 K", 293.15, 2, 291.15, 295.15, 0, 0},
		{TemperatureDifference, "18 Δ°F", 10, 2, math.NaN(), 0, 0, 0},
		{Conductivity, "61 %IACS", 0.61 * 58e6, 2, math.NaN(), 0, 0, 0},
		{Ratio, "0.3 %", 0.003, 1, math.NaN(), 0, 0, 0},
		{ThermalConductivity, "22 W/(m·K)", 22, 2, math.NaN(), 0, 0, 0},
		{SpecificHeat, "0.41 J/(g*K)", 410, 2, math.NaN(), 0, 0, 0},
		{Length, "0.40 mm ± 0.008 mm", 0.4e-3, 2, 0.392e-3, 0.408e-3, 0, 0},
		{Length, "200.00 mm ± 0.05 mm (k=2)", 0.2, 5, math.NaN(), 0, 0.05e-3, 2},
	} {
		q, p := Parse(c.kind, c.text)
		if p != nil {
			t.Errorf("%q: %v", c.text, p)
			continue
		}
		if math.IsNaN(c.value) != math.IsNaN(q.Value) || (!math.IsNaN(c.value) && !near(q.Value, c.value)) || q.Digits != c.digits {
			t.Errorf("%q: value %v (%d digits), want %v (%d)", c.text, q.Value, q.Digits, c.value, c.digits)
		}
		switch {
		case math.IsNaN(c.lo) != (q.Limits == nil):
			t.Errorf("%q: limits %v", c.text, q.Limits)
		case q.Limits != nil && (!near(q.Limits.Lower, c.lo) || !near(q.Limits.Upper, c.hi)):
			t.Errorf("%q: limits %v, want %v to %v", c.text, *q.Limits, c.lo, c.hi)
		}
		if (c.k > 0) != (q.Uncertainty != nil) || (c.k > 0 && (!near(q.Uncertainty.Plus, c.plus) || q.Uncertainty.K != c.k)) {
			t.Errorf("%q: uncertainty %v", c.text, q.Uncertainty)
		}
	}
}

func TestParseRefuses(t *testing.T) {
	for _, c := range []struct {
		kind Kind
		text string
		code string
		at   int
	}{
		{Density, "8,4 g/cm³", codeComma, 0},
		{Resistivity, "1.7241", codeNoUnit, 0},
		{Resistivity, "3.42 Ω/m", codeOtherKind, 5},
		{Resistivity, "1.7241 µΩ·cn", codeUnit, 7},
		{Resistivity, "20 °C", codeOtherKind, 3},
		{Temperature, "-300 °C", codeBelowZero, 0},
		{Temperature, "10 ppm/K", codeOtherKind, 3},
		{Coefficient1, "0 ppm/K ± 5 %", codeOnZero, 8},
		{Resistivity, "1e999 µΩ·cm", codeNotFinite, 0},
		{Resistivity, "forty µΩ·cm", codeNotNumber, 0},
		{Resistivity, "", codeNotNumber, 0},
		{Resistivity, "43 µΩ·cm ± ", codeTolerance, 9},
		{Resistivity, "43 µΩ·cm ± -5 %", codeTolerance, 9},
		{Resistivity, "43 µΩ·cm ± 5 % (k=0)", codeTolerance, 15},
	} {
		_, p := Parse(c.kind, c.text)
		if p == nil || p.Code != c.code || p.Offset != c.at {
			t.Errorf("%q: %+v, want %s at %d", c.text, p, c.code, c.at)
		}
	}
}

// TestRoundTrip: every unit's print is read back as the same number.
func TestRoundTrip(t *testing.T) {
	for _, k := range Kinds() {
		for _, u := range Units(k) {
			for _, spelled := range []string{u.Symbol, u.ASCII} {
				q, p := Parse(k, "12.25 "+spelled)
				if p != nil {
					t.Errorf("%s: 12.25 %s: %v", k, spelled, p)
					continue
				}
				again, p := Parse(k, q.In(u))
				if p != nil || !near(again.Value, q.Value) {
					t.Errorf("%s: %q is read as %v (%v), want %v", k, q.In(u), again.Value, p, q.Value)
				}
			}
		}
	}
}

func TestRange(t *testing.T) {
	for text, want := range map[string][2]float64{
		"0 °C to 100 °C": {273.15, 373.15}, "-40 to 85 °C": {233.15, 358.15}, "4 K to 100 K": {4, 100},
		"-40 °C to 185 °F": {233.15, 358.15}, "−55 °C to 125 °C": {218.15, 398.15},
	} {
		lo, hi, p := ParseRange(Temperature, text)
		if p != nil || !near(lo.Value, want[0]) || !near(hi.Value, want[1]) {
			t.Errorf("%q: %v to %v (%v)", text, lo.Value, hi.Value, p)
		}
	}
	if _, _, p := ParseRange(Temperature, "20 °C"); p == nil || p.Code != codeRange {
		t.Errorf("a single value passed as a range: %v", p)
	}
}

func TestNumber(t *testing.T) {
	for _, c := range []struct {
		x      float64
		digits int
		want   string
	}{
		{1.7241, 5, "1.7241"}, {-40, 2, "−40"}, {5e-7, 2, "5.0×10⁻⁷"}, {258.66, 5, "258.66"}, {0.00393, 3, "0.00393"},
		{123456, 2, "120000"}, {9.999, 3, "10.0"}, {0, 3, "0"}, {1.5e8, 2, "1.5×10⁸"},
	} {
		if got := Number(c.x, c.digits); got != c.want {
			t.Errorf("Number(%v, %d) = %q, want %q", c.x, c.digits, got, c.want)
		}
	}
}

func FuzzParse(f *testing.F) {
	for _, s := range []string{"1.7241 µΩ·cm ± 5 %", "+4/-8 ppm/K", "-4 to 8 ppm/K", "<= 1 µV/K", "(5 ± 0.2) µΩ·cm", "43 µΩ·cm ± 0.4 % (k=2)", "1,5 mm", "3.9×10⁻³ /K", "AWG 24", "12.50 EUR/kg"} {
		f.Add(s)
	}
	kinds := Kinds()
	f.Fuzz(func(t *testing.T, text string) {
		for _, k := range kinds {
			q, p := Parse(k, text)
			if p == nil && !q.HasValue() && q.Limits == nil {
				t.Fatalf("%q as %s: neither value nor limits", text, k)
			}
			if p == nil && math.IsInf(q.Value, 0) {
				t.Fatalf("%q as %s is infinite", text, k)
			}
			if p != nil && (p.Message == "" || p.Code == "" || p.Length < 1) {
				t.Fatalf("%q as %s: a problem that says nothing: %+v", text, k, p)
			}
		}
		ParseRange(Temperature, text)
		ParseAWG(text)
	})
}

func BenchmarkParse(b *testing.B) {
	for b.Loop() {
		Parse(Resistivity, "1.7241 µΩ·cm ± 5 %")
	}
}
