package quantity

import (
	"math"
	"strings"
	"testing"
	"unicode/utf8"
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
		{Resistivity, "1.7241 \u03bc\u2126.cm", 1.7241e-8, 5, math.NaN(), 0, 0, 0}, // the other code points of µ and Ω
		{Resistivity, "1.7241\u202f\u00b5\u03a9\u00b7cm", 1.7241e-8, 5, math.NaN(), 0, 0, 0},
		{Resistivity, "1.7241×10⁻⁸ Ω·m", 1.7241e-8, 5, math.NaN(), 0, 0, 0},
		{Resistivity, "1.7241 x 10^-8 ohm m", 1.7241e-8, 5, math.NaN(), 0, 0, 0},
		{Resistivity, "1.7241 1e-8 ohm m", 1.7241e-8, 5, math.NaN(), 0, 0, 0},
		{Resistivity, "17.241 ohm*m2/m", 17.241, 5, math.NaN(), 0, 0, 0},
		{Resistivity, "1.7241 µΩ·cm +1 %/-2 %", 1.7241e-8, 5, 1.7241e-8 * 0.98, 1.7241e-8 * 1.01, 0, 0},
		{Resistivity, "43 µΩ·cm ± 5 % ± 0.4 % (k=2)", 43e-8, 2, 40.85e-8, 45.15e-8, 43e-8 * 0.004, 2},
		{Resistivity, "43 µΩ·cm ± 0.4 % (k=2) ± 5 %", 43e-8, 2, 40.85e-8, 45.15e-8, 43e-8 * 0.004, 2},
		{Resistivity, "43 µΩ·cm, 41 to 45 µΩ·cm", 43e-8, 2, 41e-8, 45e-8, 0, 0},
		{Resistivity, "(43.1 ± 0.2) µΩ·cm (k=2)", 43.1e-8, 3, math.NaN(), 0, 0.2e-8, 2},
		{Coefficient1, "+4/-8 ppm/K", math.NaN(), 1, -8e-6, 4e-6, 0, 0},
		{Coefficient1, "± 20 ppm/K", math.NaN(), 2, -20e-6, 20e-6, 0, 0},
		{Coefficient1, "+/- 20 ppm/degC", math.NaN(), 2, -20e-6, 20e-6, 0, 0},
		{Coefficient1, "18 µm/(m·K)", 18e-6, 2, math.NaN(), 0, 0, 0},
		{Coefficient1, "0.0039 K^-1", 0.0039, 2, math.NaN(), 0, 0, 0},
		{Coefficient2, "-0.5 ppm/K²", -0.5e-6, 1, math.NaN(), 0, 0, 0},
		{EMF, "at most 1 µV/K", math.NaN(), 1, -inf, 1e-6, 0, 0},
		{Temperature, "20 ± 2 °C", 293.15, 2, 291.15, 295.15, 0, 0},
		{Temperature, "68 °F ± 3.6 Δ°F", 293.15, 2, 291.15, 295.15, 0, 0},
		{Temperature, "20 degC +/- 2 degC", 293.15, 2, 291.15, 295.15, 0, 0},
		{Temperature, "960 °C to 1020 °C", math.NaN(), 4, 1233.15, 1293.15, 0, 0},
		{TemperatureDifference, "18 delta degF", 10, 2, math.NaN(), 0, 0, 0},
		{TemperatureDifference, "10 K", 10, 2, math.NaN(), 0, 0, 0},
		{MassResistivity, "0.15328 ohm g/m2", 0.15328e-3, 5, math.NaN(), 0, 0, 0},
		{ResistancePerLength, "9.989 ohm/1000 ft", 9.989e-3 / 0.3048, 4, math.NaN(), 0, 0, 0},
		{Price, "12.50 EUR/kg", 12.5, 4, math.NaN(), 0, 0, 0},
		{Price, "3 GBP/piece", 3, 1, math.NaN(), 0, 0, 0},
		{Resistivity, "0.43 ohm*mm2/m", 0.43e-6, 2, math.NaN(), 0, 0, 0},
		{Resistivity, "43 µΩ·cm ± 5 %", 43e-8, 2, 40.85e-8, 45.15e-8, 0, 0},
		{Resistivity, "43 µΩ·cm +/- 5 %", 43e-8, 2, 40.85e-8, 45.15e-8, 0, 0},
		{Resistivity, "43.10 µΩ·cm ± 0.4 % (k=2)", 43.1e-8, 4, math.NaN(), 0, 43.1e-8 * 0.004, 2},
		{Resistivity, "(43 ± 2) µΩ·cm", 43e-8, 2, 41e-8, 45e-8, 0, 0},
		{Resistivity, "43 ± 2 µΩ·cm", 43e-8, 2, 41e-8, 45e-8, 0, 0},
		{Resistivity, "1.7241 µΩ·cm +1/−2 %", 1.7241e-8, 5, 1.7241e-8 * 0.98, 1.7241e-8 * 1.01, 0, 0},
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
		{Coefficient1, "8 to -4 ppm/K", codeInverted, 0},
		{Coefficient1, "-4 to 8,5 ppm/K", codeComma, 6},
		{Price, "12,50 EUR/kg", codeComma, 0},
		{Resistivity, "43 µΩ·cm ± 0,4 %", codeComma, 11},
		{Resistivity, "0.86 Ω per square", codeOtherKind, 5},
		{Resistivity, "58 MS/m", codeOtherKind, 3},
		{SheetResistance, "0.86 Ω", codeOtherKind, 5},
		{Coefficient2, "0.5 ppm/K", codeOtherKind, 4},
		{TemperatureDifference, "10 °C", codeDifference, 3},
		{TemperatureDifference, "18 °F", codeDifference, 3},
		{Temperature, "18 Δ°F", codeOtherKind, 3},
		{Temperature, "20 °C ± 5 %", codeDifference, 6},
		{Temperature, "4 K ± 10 K", codeBelowZero, 0},
		{Length, "± 1 mm", codeNotNumber, 0},
		{Length, "1 mm ± 2 % ± 3 %", codeTolerance, 11},
		{Length, "1 mm, 2 mm", codeTolerance, 6},
		{Length, "1 mm ± 2 kg", codeOtherKind, 9},
		{Resistivity, "1e308 Ω·m ± 500 %", codeNotFinite, 0},
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
			continue
		}
		if p.Mend == "" || p.Offset+p.Length > max(1, utf8.RuneCountInString(c.text)) {
			t.Errorf("%q: no mend, or a caret outside: %+v", c.text, p)
		}
	}
}

// TestRoundTrip: every unit's print, with and without each kind of ±, is read
// back as the same value and band.
func TestRoundTrip(t *testing.T) {
	for _, k := range Kinds() {
		for _, u := range Units(k) {
			for _, spelled := range []string{u.Symbol, u.ASCII} {
				for _, form := range []string{"412.25 %s", "412.25 ± 0.50 %s", "412.25 ± 0.25 %s (k=2)", "412.25 %s +0.50/-0.25 %s", "411 to 413 %s", "<= 413 %s", ">= 411 %s"} {
					if k == Ratio && spelled == "1" {
						spelled = ""
					}
					roundTrip(t, k, strings.ReplaceAll(form, "%s", strings.Replace(spelled, "delta", "Δ", 1)))
				}
			}
		}
	}
}

func roundTrip(t *testing.T, k Kind, text string) {
	t.Helper()
	q, p := Parse(k, text)
	if p != nil {
		t.Errorf("%s: %q: %v", k, text, p)
		return
	}
	again, p := Parse(k, q.In(q.Unit))
	if p != nil {
		t.Errorf("%s: %q is printed as %q: %v", k, text, q.In(q.Unit), p)
		return
	}
	if !(math.IsNaN(q.Value) && math.IsNaN(again.Value)) && !near(again.Value, q.Value) {
		t.Errorf("%s: %q is read as %v, want %v", k, q.In(q.Unit), again.Value, q.Value)
	}
	if (q.Limits == nil) != (again.Limits == nil) || (q.Uncertainty == nil) != (again.Uncertainty == nil) {
		t.Errorf("%s: %q loses its ± as %q", k, text, q.In(q.Unit))
		return
	}
	if q.Limits != nil && (!near(q.Limits.Lower, again.Limits.Lower) || !near(q.Limits.Upper, again.Limits.Upper)) {
		t.Errorf("%s: %q: limits %v are read as %v", k, q.In(q.Unit), *q.Limits, *again.Limits)
	}
	if q.Uncertainty != nil && (!near(q.Uncertainty.Plus, again.Uncertainty.Plus) || q.Uncertainty.K != again.Uncertainty.K) {
		t.Errorf("%s: %q: uncertainty %v is read as %v", k, q.In(q.Unit), *q.Uncertainty, *again.Uncertainty)
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

// FuzzParse: nothing panics, a problem says something and points inside the
// text, and what is read is printed so that it is read again.
func FuzzParse(f *testing.F) {
	for _, s := range []string{"1.7241 µΩ·cm ± 5 %", "+4/-8 ppm/K", "-4 to 8 ppm/K", "<= 1 µV/K", "(5 ± 0.2) µΩ·cm", "43 µΩ·cm ± 0.4 % (k=2)", "1,5 mm",
		"3.9×10⁻³ /K", "3.9 x 10^-3 /K", "AWG 24", "4/0 AWG", "12.50 EUR/kg", "-40 to 85 °C", "0 °C to 100 °C", "20 °C ± 2 K", "20 ± 2 °C", "18 Δ°F", "1.7241 µΩ·cm +1 %/-2 %",
		"1.7241 1e-8 ohm m", "675 Ω·cmil/ft", "57.4 MS/m ± 0.5 % (k=2)", "43 µΩ·cm ± 5 % ± 0.4 % (k=2)", "43 µΩ·cm, 41 to 45 µΩ·cm", ">= 99.99 %", "410 J/(kg·K) ± 10 J/(kg·K)", "− 5", "1e999 K", "at least 780 MPa"} {
		f.Add(s)
	}
	kinds := Kinds()
	f.Fuzz(func(t *testing.T, text string) {
		for _, k := range kinds {
			q, p := Parse(k, text)
			if p != nil {
				if p.Message == "" || p.Code == "" || p.Length < 1 || p.Offset+p.Length > max(1, utf8.RuneCountInString(text)+1) {
					t.Fatalf("%q as %s: a problem that says nothing or points outside: %+v", text, k, p)
				}
				continue
			}
			if (!q.HasValue() && q.Limits == nil) || math.IsInf(q.Value, 0) {
				t.Fatalf("%q as %s: neither value nor limits: %v", text, k, q.Value)
			}
			printed := q.In(q.Unit)
			if again, p := Parse(k, printed); p != nil || again.HasValue() != q.HasValue() {
				t.Fatalf("%q as %s is printed as %q, which is not read: %v", text, k, printed, p)
			}
		}
		ParseRange(Temperature, text)
		ParseAWG(text)
		ParseOneOf(text, Resistivity, Temperature)
	})
}

// BenchmarkParse measures a value with a ±, and a plain one.
func BenchmarkParse(b *testing.B) {
	for _, text := range []string{"1.7241 µΩ·cm", "1.7241 uohm cm", "1.7241 µΩ·cm ± 5 %", "43.62 µΩ·cm ± 0.45 % (k=2)"} {
		b.Run(text, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Parse(Resistivity, text)
			}
		})
	}
}
