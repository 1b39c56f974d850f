package statement

import (
	"errors"
	"math"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/published"
	"ohmfolio/generator/quantity"
)

func demo(t testing.TB) *library.Library {
	t.Helper()
	lib, err := library.Load("../..", library.Options{})
	if err != nil {
		t.Fatal(err)
	}
	return lib
}

// small is a reference of one record.
func small(t *testing.T, record string) (*library.Library, *material.Record) {
	t.Helper()
	lib := library.FromFiles(map[string][]byte{
		"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: N, checked: original}\n"),
		"materials/x.yaml":       []byte(record),
	})
	if place.Count(lib.Findings, place.Error) > 0 {
		t.Fatal(lib.Findings)
	}
	return lib, lib.Material("x")
}

const kelvin = quantity.ZeroCelsius

// shuntAlloy has α = +10 ppm/K and β = −0.5 ppm/K² about 20 °C, whose check
// numbers follow from the definitions by hand.
const shuntAlloy = "name: X\nsource: s\nbasis: resistance\nresistivity: 43 µΩ·cm ± 5 %\nalpha: 10 ppm/K\nbeta: -0.5 ppm/K²\nreference_temperature: 20 °C\nvalid_range: -55 °C to 125 °C\n"

func TestTCRCheckNumbers(t *testing.T) {
	lib, r := small(t, shuntAlloy)
	a, err := TCR(lib, r, "", kelvin-55, kelvin+125, nil)
	if err != nil {
		t.Fatal(err)
	}
	near := func(what string, got, want, tolerance float64) {
		if math.Abs(got-want) > tolerance {
			t.Errorf("%s: %g, want %g", what, got, want)
		}
	}
	near("slope", a.Slope.AtReference, 10, 1e-9)
	near("hot chord", *a.Chord.Hot, -42.5, 1e-9)
	near("cold chord", *a.Chord.Cold, 47.5, 1e-9)
	near("box", a.Box, 25.1, 0.05)
	near("greatest", a.Change.GreatestPPM, -4462.5, 1e-6)
	near("greatest at", a.Change.GreatestAtC, 125, 1e-9)
	near("most", a.Change.MaxPPM, 50, 1e-9)
	near("turn", a.TurningPoints[0].C, 30, 1e-9)
	b, _ := TCR(lib, r, "", kelvin+20, kelvin+60, nil)
	near("box 20 to 60 °C", b.Box, 11.25, 1e-9)
	if b.Chord.Cold != nil {
		t.Error("a cold chord although the reference is the lower edge")
	}
	if a.Limits != nil {
		t.Error("limits of a ratio from the resistivity alone")
	}
}

func TestAskBands(t *testing.T) {
	lib, r := small(t, shuntAlloy)
	a, err := Ask(lib, r, Question{Quantity: AskResistivity, At: kelvin + 105})
	if err != nil {
		t.Fatal(err)
	}
	want := 43 * (1 - 2762.5e-6)
	if math.Abs(*a.Value-want) > 1e-9 || math.Abs(a.Limits.Lower-0.95*want) > 1e-9 || math.Abs(a.Limits.Upper-1.05*want) > 1e-9 {
		t.Errorf("%v, limits %+v", *a.Value, a.Limits)
	}
	if strings.Join(a.Limits.Covers, ",") != "resistivity" || len(a.Limits.NotCovered) != 2 {
		t.Errorf("covers %v, not %v", a.Limits.Covers, a.Limits.NotCovered)
	}
	ratio, err := Ask(lib, r, Question{Quantity: AskResistanceRatio, At: kelvin + 105})
	if err != nil || ratio.Limits != nil || math.Abs(*ratio.Value-(1-2762.5e-6)) > 1e-12 {
		t.Errorf("ratio %+v %v", ratio, err)
	}
}

// TestUncertainty: first order, JCGM 100, 5.1.2, by hand: at 75 °C with
// u(α) = 1 ppm/K over 50 K and u(ρ)/ρ = 0.2 %.
func TestUncertainty(t *testing.T) {
	lib, r := small(t, "name: X\nsource: s\nclass: measured\nbasis: resistance\nresistivity: 50 µΩ·cm ± 0.4 % (k=2)\nalpha: 100 ppm/K ± 2 ppm/K (k=2)\nreference_temperature: 25 °C\nvalid_range: 0 °C to 100 °C\n")
	a, err := Ask(lib, r, Question{Quantity: AskResistivity, At: kelvin + 75})
	if err != nil {
		t.Fatal(err)
	}
	y := 1 + 100e-6*50
	u := 2 * 50 * math.Hypot(0.002*y, 1e-6*50)
	if a.Uncertainty == nil || math.Abs(a.Uncertainty.Upper-*a.Value-u) > 1e-9 || a.Uncertainty.K != 2 {
		t.Errorf("%+v, want ±%g", a.Uncertainty, u)
	}
	if a.Limits != nil {
		t.Error("an uncertainty became limits")
	}
}

func TestConductivity(t *testing.T) {
	lib, r := small(t, "name: X\nsource: s\nbasis: resistance\nconductivity: 58 MS/m\nalpha: 3.93e-3 /K\nreference_temperature: 20 °C\nvalid_range: 0 °C to 100 °C\n")
	for unit, want := range map[string]float64{"%IACS": 100, "MS/m": 58} {
		a, err := Ask(lib, r, Question{Quantity: AskConductivity, At: kelvin + 20, Unit: unit})
		if err != nil || math.Abs(*a.Value-want) > 1e-9 {
			t.Errorf("%s: %+v %v", unit, a.Value, err)
		}
	}
	if _, err := Ask(lib, r, Question{Quantity: AskConductivity, At: kelvin + 25, Unit: "%IACS"}); err == nil {
		t.Error("%IACS at 25 °C")
	}
}

func TestOutside(t *testing.T) {
	lib, r := small(t, shuntAlloy)
	var out OutsideError
	if _, err := Ask(lib, r, Question{Quantity: AskResistivity, At: kelvin + 126}); !errors.As(err, &out) {
		t.Errorf("error %v", err)
	}
	if a, err := Ask(lib, r, Question{Quantity: AskResistivity, At: kelvin + 126, Extrapolate: true}); err != nil || !a.Extrapolated || a.Limits != nil {
		t.Errorf("%+v %v", a, err)
	}
	// 257 °F is 125 °C: the range is closed after conversion
	q, _ := quantity.Parse(quantity.Temperature, "257 °F")
	if _, err := Ask(lib, r, Question{Quantity: AskResistivity, At: q.Value}); err != nil {
		t.Error(err)
	}
	reference := kelvin + 130
	if _, err := Ask(lib, r, Question{Quantity: AskResistanceRatio, At: kelvin + 20, Reference: &reference}); err == nil {
		t.Error("a reference temperature outside the range")
	}
}

func TestAskInWords(t *testing.T) {
	lib, r := small(t, shuntAlloy)
	for _, c := range []struct {
		question, written, text string
		matches                 bool
	}{
		{"resistivity at 20 °C", "43 µΩ·cm", "43 µΩ·cm", true},
		{"resistivity at 20 °C", "0.43 µΩ·m", "0.43 µΩ·m", true},
		{"resistivity at 20 °C", "44 µΩ·cm", "43 µΩ·cm", false},
		{"resistivity at 20 °C", "…", "43.0 µΩ·cm", true},
		{"resistance-ratio at 105 °C from 20 °C", "0.99724", "0.99724", true},
		{"greatest change from -40 °C to 105 °C", "−0.28 %", "−0.28 %", true},
		{"greatest change from -40 °C to 105 °C", "−2763 ppm", "−2763 ppm", true},
	} {
		a, err := AskInWords(lib, r, c.question, c.written)
		if err != nil || strings.ReplaceAll(a.Text, quantity.NarrowSpace, " ") != c.text || a.Matches != c.matches {
			t.Errorf("%s, written %q: %q %v %v", c.question, c.written, a.Text, a.Matches, err)
		}
	}
	for _, q := range []string{"price at 20 °C", "resistivity at noon", "resistivity at 200 °C", ""} {
		if _, err := AskInWords(lib, r, q, "…"); err == nil {
			t.Errorf("%q has an answer", q)
		}
	}
}

// TestWireTables: Ω per length of copper and of a shunt alloy by gauge,
// through the demo records; printed with two to four digits.
func TestWireTables(t *testing.T) {
	lib := demo(t)
	rho := func(id string) float64 {
		v, ok := material.Reading{Told: lib.Material(id).Adopted.Rho}.At(lib.Material(id).Adopted.Reference)
		if !ok {
			t.Fatal(id)
		}
		return v
	}
	compared := 0
	for _, row := range published.Rows(t, "awg_solid_copper.csv") {
		n, ok := quantity.ParseAWG("AWG " + row["AWG"])
		calc, okCalc := published.Optional(row["ohm_per_1000ft_20C_calc_IACS"])
		if !ok || !okCalc {
			continue
		}
		d := quantity.AWG(n)
		if got := rho("copper-annealed") / (math.Pi / 4 * d * d) * 304.8; math.Abs(got/calc-1) > 6e-4 {
			t.Errorf("copper AWG %s: %g Ω/1000 ft, published %g", row["AWG"], got, calc)
		}
		compared++
	}
	for _, row := range published.Rows(t, "cumn12ni_wire_awg.csv") {
		n, _ := quantity.ParseAWG("AWG " + row["AWG"])
		want, _ := published.Optional(row["ohm_per_ft"])
		d := quantity.AWG(n)
		if got := rho("cumn12ni") / (math.Pi / 4 * d * d) * 0.3048; math.Abs(got/want-1) > 0.006 {
			t.Errorf("CuMn12Ni AWG %s: %g Ω/ft, published %g", row["AWG"], got, want)
		}
		compared++
	}
	if compared < 25 {
		t.Errorf("only %d sizes were compared", compared)
	}
}

// TestCableTables: IEC 60228. The area of solid standard copper with the
// printed resistance, and the factor that brings a reading to 20 °C: the copper
// formula 254.5/(234.5 + t) within what rounding 234.45 to 234.5 does, the
// printed common factor of the table within half a per cent.
func TestCableTables(t *testing.T) {
	lib := demo(t)
	copper := lib.Material("copper-annealed").Adopted
	rho, _ := material.Reading{Told: copper.Rho}.At(kelvin + 20)
	compared := 0
	for _, row := range published.Rows(t, "iec60228_max_resistance_20C.csv") {
		r, okR := published.Optional(row["class2_Cu_plain_ohm_per_km"])
		want, okA := published.Optional(row["solid_IACS_area_that_would_give_class2_R_mm2"])
		if okR && okA {
			if got := rho / (r * 1e-3) * 1e6; math.Abs(got/want-1) > 3e-4 {
				t.Errorf("%s mm²: area %g mm², published %g", row["nominal_area_mm2"], got, want)
			}
			compared++
		}
	}
	for _, row := range published.Rows(t, "iec60228_temperature_correction.csv") {
		c, _ := published.Optional(row["t_C"])
		formula, _ := published.Optional(row["kt_Cu_calc_254.5/(234.5+t)"])
		printed, _ := published.Optional(row["kt_printed_S15"])
		ratio, ok := material.Reading{Told: copper.Ratio}.At(kelvin + c)
		if !ok {
			continue
		}
		if math.Abs(1/ratio-formula) > 2e-4 || math.Abs(1/ratio-printed) > 5e-3 {
			t.Errorf("kt at %g °C: %g, formula %g, printed %g", c, 1/ratio, formula, printed)
		}
		compared++
	}
	if compared < 15 {
		t.Errorf("only %d values were compared", compared)
	}
}

func TestRoundSteps(t *testing.T) {
	w := material.Window{Lo: kelvin - 40, Hi: kelvin + 85}
	steps := roundSteps(w, kelvin+25, false, 18)
	if steps[0] != w.Lo || steps[len(steps)-1] != w.Hi || len(steps) > 20 {
		t.Errorf("%v", steps)
	}
	for i := 1; i < len(steps); i++ {
		if steps[i] <= steps[i-1] {
			t.Errorf("not rising at %d: %v", i, steps)
		}
	}
}

// TestEveryStatement: no text of any statement of the demo holds a number
// that is none.
func TestEveryStatement(t *testing.T) {
	lib := demo(t)
	for _, r := range lib.Materials {
		s := Of(lib, r)
		var all []string
		for _, g := range []Grid{s.Constants, s.Values, s.Windows, s.PerMetre} {
			for _, row := range g.Rows {
				all = append(all, row...)
				if len(row) != len(g.Heads) {
					t.Errorf("%s, %s: %d cells under %d heads: %v", r.ID, g.Caption, len(row), len(g.Heads), row)
				}
			}
		}
		for _, f := range s.Headline {
			all = append(all, f.Value, f.Band)
		}
		for _, p := range s.Properties {
			all = append(all, p.Value, p.PlusMinus)
		}
		for _, text := range all {
			if strings.Contains(text, "NaN") || strings.Contains(text, "Inf") || strings.Contains(text, "not a number") {
				t.Errorf("%s prints %q", r.ID, text)
			}
		}
	}
}
