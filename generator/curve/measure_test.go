package curve

import (
	"errors"
	"math"
	"testing"
)

func measure(t *testing.T, curve Curve, reference, lo, hi float64) Measures {
	t.Helper()
	m, err := Measure(curve, reference, lo, hi)
	if err != nil {
		t.Fatal(err)
	}
	return m
}

// Check numbers computed by hand: α +10 ppm/K, β −0.5 ppm/K² about 20 °C.
func TestWorkedMeasures(t *testing.T) {
	curve := worked.Curve(c(-55), c(150))
	m := measure(t, curve, c(20), c(-55), c(125))
	near(t, "chord cold", *m.ChordCold*1e6, 47.5, 1e-9)
	near(t, "chord hot", *m.ChordHot*1e6, -42.5, 1e-9)
	near(t, "box −55…125 °C", m.Box*1e6, 25.1, 0.05)
	near(t, "slope at the reference temperature", m.SlopeAtReference*1e6, 10, 1e-9)
	near(t, "greatest change", m.Change.Greatest*1e6, -4462.5, 1e-8)
	near(t, "greatest change at", m.Change.GreatestAt, c(125), 0)
	near(t, "smallest change", m.Change.Min*1e6, -4462.5, 1e-8)
	near(t, "highest change", m.Change.Max*1e6, 50, 1e-8)
	if len(m.TurningPoints) != 1 || !m.TurningPoints[0].Maximum || !m.TurningPoints[0].Inside {
		t.Fatalf("turning points: got %v", m.TurningPoints)
	}
	near(t, "peak at", m.TurningPoints[0].T, c(30), 1e-9)
	near(t, "peak", m.TurningPoints[0].Change*1e6, 50, 1e-8)
	// (1/R)·dR/dT of the parabola: dR/dT = 10 − τ ppm/K.
	near(t, "steepest rise", m.SlopeMax, (10e-6+75e-6)/(1-3562.5e-6), 1e-15)
	near(t, "steepest rise at", m.SlopeMaxAt, c(-55), 0)
	near(t, "steepest fall", m.SlopeMin, (10e-6-105e-6)/(1-4462.5e-6), 1e-15)

	near(t, "box 20…60 °C", measure(t, curve, c(20), c(20), c(60)).Box*1e6, 11.25, 1e-9)
	m = measure(t, curve, c(20), c(40), c(60))
	if m.TurningPoints[0].Inside {
		t.Error("the peak at 30 °C is outside 40 °C to 60 °C")
	}
}

func TestChordsOnTheirSide(t *testing.T) {
	curve := worked.Curve(c(-55), c(125))
	for _, k := range []struct {
		lo, hi    float64
		cold, hot bool
	}{
		{-40, 85, true, true}, {20, 85, false, true}, {-40, 20, true, false},
		{40, 85, false, true}, {-40, 0, true, false}, {20 + 1e-10, 85, false, true}, {20 - 1e-10, 85, false, true},
	} {
		m := measure(t, curve, c(20), c(k.lo), c(k.hi))
		if (m.ChordCold != nil) != k.cold || (m.ChordHot != nil) != k.hot {
			t.Errorf("%v: cold %v, hot %v", k, m.ChordCold, m.ChordHot)
		}
	}
}

// The relative slope of a cubic may be extreme inside a segment. Held against
// the closed form of x + x³: the derivative of (1+3x²)/(x+x³) is zero where
// 3x⁴ + 1 = 0 nowhere; shifted by a constant it is found by a fine scan.
func TestRelativeSlopeInsideACubic(t *testing.T) {
	for name, p := range map[string]Polynomial{
		"steep cubic":   {Y0: 1, Alpha: 0.004, Beta: -2e-5, Gamma: 4e-8, Reference: 300},
		"nickel-like":   {Y0: 1, Alpha: 0.005, Beta: 6e-6, Gamma: 0, Reference: 300},
		"wave":          {Y0: 1, Alpha: -1e-3, Beta: 0, Gamma: 1e-7, Reference: 300},
		"nearly linear": {Y0: 1, Alpha: 4e-3, Beta: 1e-16, Gamma: 1e-20, Reference: 300},
	} {
		curve := p.Curve(220, 420)
		m := measure(t, curve, 300, 220, 420)
		lowest, highest := math.Inf(1), math.Inf(-1)
		for i := range 200_001 {
			k := math.Min(220+200*float64(i)/200_000, 420)
			d, _ := curve.Slope(k)
			lowest, highest = math.Min(lowest, d/at(t, curve, k)), math.Max(highest, d/at(t, curve, k))
		}
		near(t, name+" smallest slope", m.SlopeMin, lowest, 1e-11)
		near(t, name+" greatest slope", m.SlopeMax, highest, 1e-11)
		if m.SlopeMin > lowest+1e-17 || m.SlopeMax < highest-1e-17 {
			t.Errorf("%s: a scan found %v to %v beyond %v to %v", name, lowest, highest, m.SlopeMin, m.SlopeMax)
		}
	}
}

// A window that begins on a kink of a linear table has the slope above it.
func TestSlopeOfAWindowAtAKink(t *testing.T) {
	table := must(t)(Table([]float64{100, 200, 300}, []float64{1, 2, 2}, true))
	m := measure(t, table, 200, 200, 300)
	if m.SlopeMin != 0 || m.SlopeMax != 0 {
		t.Errorf("got %v to %v, want level", m.SlopeMin, m.SlopeMax)
	}
	if !m.FromTable {
		t.Error("measures from a table must say so")
	}
	if m.SlopeAtReference != 0.005 {
		t.Errorf("slope at the edge: got %v, want 0.01/2 of the lower piece", m.SlopeAtReference)
	}
}

func TestLevelCurveHasNoCoefficient(t *testing.T) {
	m := measure(t, Polynomial{Y0: 1, Reference: c(20)}.Curve(c(-40), c(85)), c(20), c(-40), c(85))
	for name, v := range map[string]float64{"box": m.Box, "slope": m.SlopeAtReference, "least": m.SlopeMin, "most": m.SlopeMax,
		"cold": *m.ChordCold, "hot": *m.ChordHot, "change": m.Change.Greatest} {
		if v != 0 {
			t.Errorf("%s: got %v, want 0", name, v)
		}
	}
	if len(m.TurningPoints) != 0 {
		t.Errorf("turning points: got %v", m.TurningPoints)
	}
}

func TestMeasureRefuses(t *testing.T) {
	curve := worked.Curve(c(-40), c(85))
	for _, k := range []struct {
		what              string
		reference, lo, hi float64
	}{
		{"reference temperature", 125, -40, 85},
		{"lower edge of the window", 20, -55, 85},
		{"upper edge of the window", 20, -40, 125},
		{"reference temperature", math.NaN(), -40, 85},
	} {
		var outside OutsideRange
		if _, err := Measure(curve, c(k.reference), c(k.lo), c(k.hi)); !errors.As(err, &outside) || outside.What != k.what {
			t.Errorf("%v: got %v", k, err)
		}
	}
	for _, window := range [][2]float64{{20, 20}, {60, 20}, {20, 20 + 1e-10}} {
		if _, err := Measure(curve, c(20), c(window[0]), c(window[1])); err == nil {
			t.Errorf("window %v: no error", window)
		}
	}
	var negative NotPositive
	falling := Polynomial{Y0: 1, Alpha: -0.01, Reference: c(20)}.Curve(c(0), c(200))
	if _, err := Measure(falling, c(20), c(0), c(150)); !errors.As(err, &negative) || negative.T != c(150) {
		t.Errorf("a negative resistance: got %v", err)
	}
	if _, err := Measure(falling, c(150), c(0), c(50)); !errors.As(err, &negative) {
		t.Errorf("a negative reference: got %v", err)
	}
	if _, err := Measure(falling, c(20), c(0), c(100)); err != nil {
		t.Errorf("positive over the window: got %v", err)
	}
}
