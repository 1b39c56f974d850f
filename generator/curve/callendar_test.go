package curve

import (
	"math"
	"testing"

	"ohmfolio/generator/published"
)

// platinum has the coefficients of IEC 60751:2008 for industrial platinum
// thermometers (transcription; the standard's table is reproduced by them).
var platinum = CallendarVanDusen{A: 3.9083e-3, B: -5.775e-7, C: -4.183e-12}

// Source: IEC 60751, table of Pt100, on ITS-90; two decimals printed in every
// row and three in some (transcriptions), four calculated.
func TestPlatinumTableBothWays(t *testing.T) {
	curve := must(t)(platinum.Curve(c(-200), c(850)))
	table := published.Rows(t, "iec60751_pt100.csv")
	for _, row := range table {
		kelvin := c(published.Number(t, row["t_C"]))
		ohm := 100 * at(t, curve, kelvin)
		for _, column := range []string{"R_ohm_calc_4_decimals", "R_ohm_printed_2_decimals_S18", "R_ohm_printed_3_decimals_S19"} {
			if printed := row[column]; printed != "" {
				near(t, row["t_C"]+" °C "+column, ohm, published.Number(t, printed), halfUnit(printed)*1.001)
			}
		}
		slope, _ := curve.Slope(kelvin)
		near(t, row["t_C"]+" °C slope", 100*slope, published.Number(t, row["dR_dt_ohm_per_C_calc"]), 5.1e-6)

		calculated := published.Number(t, row["R_ohm_calc_4_decimals"]) // 0.05 mΩ is 0.17 mK at 850 °C, 0.12 mK at −200 °C
		back, ok := platinum.Temperature(calculated / 100)
		if !ok {
			t.Fatalf("%s: no temperature", row["t_C"])
		}
		near(t, row["t_C"]+" °C back from the table", back, kelvin, 0.5e-4/published.Number(t, row["dR_dt_ohm_per_C_calc"])*1.01)
	}
	if len(table) < 70 {
		t.Errorf("only %d rows were compared", len(table))
	}
}

func TestPlatinumInverse(t *testing.T) {
	curve := must(t)(platinum.Curve(c(-200), c(850)))
	for i := range 10_501 {
		kelvin := c(-200 + 0.1*float64(i))
		kelvin = min(kelvin, c(850))
		back, ok := platinum.Temperature(at(t, curve, kelvin))
		if !ok || math.Abs(back-kelvin) > 1e-4 {
			t.Fatalf("%s came back as %s, %v", celsius(kelvin), celsius(back), ok)
		}
		if exact, _ := platinum.Temperature(platinum.Ratio(kelvin)); math.Abs(exact-kelvin) > 1e-9 {
			t.Fatalf("%s by the equation came back as %s", celsius(kelvin), celsius(exact))
		}
	}
	for _, never := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), -0.5, 8} { // the parabola peaks at 7.61
		if k, ok := platinum.Temperature(never); ok {
			t.Errorf("ratio %v gave %s", never, celsius(k))
		}
	}
	if _, ok := (CallendarVanDusen{}).Temperature(1.1); ok {
		t.Error("an equation of zeros gave a temperature")
	}
	straight := CallendarVanDusen{A: 0.00427}
	k, ok := straight.Temperature(1.427)
	near(t, "a straight line", k, c(100), 1e-9)
	if !ok {
		t.Error("a straight line has an inverse")
	}
}

func TestPlatinumIsLoweredWithin1e9(t *testing.T) {
	for _, span := range [][2]float64{{-200, 850}, {-200, -100}, {-50, 50}, {-1e-6, 1e-6}, {0, 850}, {10, 20}, {-80, 0}} {
		lo, hi := c(span[0]), c(span[1])
		curve := must(t)(platinum.Curve(lo, hi))
		if from, to := curve.Range(); from != lo || to != hi {
			t.Fatalf("%v: the curve runs from %v to %v", span, from, to)
		}
		for i := range 20_001 {
			kelvin := math.Min(lo+(hi-lo)*float64(i)/20_000, hi)
			got, want := at(t, curve, kelvin), platinum.Ratio(kelvin)
			if math.Abs(got/want-1) > 1e-9 {
				t.Fatalf("%v: at %s %v, want %v", span, celsius(kelvin), got, want)
			}
		}
	}
	if v := at(t, must(t)(platinum.Curve(c(-200), c(850))), c(0)); v != 1 {
		t.Errorf("the ratio at 0 °C is %v", v)
	}
}

func TestWrongCallendar(t *testing.T) {
	for name, k := range map[string]struct {
		m      CallendarVanDusen
		lo, hi float64
	}{
		"inverted":     {platinum, 300, 200},
		"no width":     {platinum, 300, 300},
		"not a number": {platinum, math.NaN(), 300},
		"below zero":   {platinum, c(-260), c(0)}, // the equation is negative below about −242 °C
		"NaN in A":     {CallendarVanDusen{A: math.NaN(), B: 1e-7, C: 1e-12}, 250, 300},
	} {
		if _, err := k.m.Curve(k.lo, k.hi); err == nil {
			t.Errorf("%s: no error", name)
		}
	}
}
