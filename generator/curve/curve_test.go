package curve

import (
	"errors"
	"math"
	"testing"
)

func TestRangeIsClosedWithSlack(t *testing.T) {
	curve := worked.Curve(c(-40), c(125))
	lo, hi := curve.Range()
	edge := at(t, curve, hi)
	for _, inside := range []float64{lo, hi, lo - 0.9e-9, hi + 0.9e-9, (212-32)/1.8 + 273.15} {
		if _, ok := curve.At(inside); !ok {
			t.Errorf("%.12g K must lie inside", inside)
		}
	}
	if v := at(t, curve, hi+0.9e-9); v != edge {
		t.Errorf("within the slack the edge answers: got %v, want %v", v, edge)
	}
	for _, outside := range []float64{lo - 2e-9, hi + 2e-9, math.NaN(), math.Inf(1), math.Inf(-1), 0} {
		v, ok := curve.At(outside)
		if ok || !math.IsNaN(v) {
			t.Errorf("%g K: got %v, %v outside the range", outside, v, ok)
		}
		if _, ok := curve.Slope(outside); ok {
			t.Errorf("%g K: a slope outside the range", outside)
		}
	}
}

// 212 °F lies in "to 100 °C" after any order of conversion.
func TestFahrenheitEdge(t *testing.T) {
	curve := worked.Curve(c(0), c(100))
	for _, edge := range []float64{(212-32)*5.0/9 + 273.15, (212 + 459.67) / 1.8, (212 + 459.67) * 5 / 9} {
		if _, ok := curve.At(edge); !ok {
			t.Errorf("212 °F as %.17g K lies outside", edge)
		}
	}
}

func TestLowerPieceOwnsTheSharedEdge(t *testing.T) {
	curve := Curve{Segments: []Segment{
		{From: 100, To: 200, Centre: 100, C: [4]float64{1, 0.01}},
		{From: 200, To: 300, Centre: 200, C: [4]float64{2.001, 0.02}},
	}}
	if v := at(t, curve, 200); v != 2 {
		t.Errorf("value at the edge: got %v, want 2 of the lower piece", v)
	}
	if d, _ := curve.Slope(200); d != 0.01 {
		t.Errorf("slope at the edge: got %v, want 0.01 of the lower piece", d)
	}
	if v := at(t, curve, math.Nextafter(200, 300)); !(v >= 2.001) {
		t.Errorf("just above the edge: got %v, want the upper piece", v)
	}
}

func TestEmptyCurveTellsNothing(t *testing.T) {
	var none Curve
	if lo, hi := none.Range(); !math.IsNaN(lo) || !math.IsNaN(hi) {
		t.Error("a range without segments")
	}
	if _, ok := none.At(300); ok {
		t.Error("a value without segments")
	}
	if _, ok := none.Beyond(300); ok {
		t.Error("an extrapolation without segments")
	}
	if _, ok := none.Extremes(1, 2); ok {
		t.Error("extremes without segments")
	}
	if _, err := none.Clip(1, 2); err == nil {
		t.Error("a part without segments")
	}
	if none.TurningPoints() != nil {
		t.Error("turning points without segments")
	}
	if _, ok := Ratio(none, 300); ok {
		t.Error("a ratio without segments")
	}
	if _, err := Measure(none, 293, 280, 300); err == nil {
		t.Error("measures without segments")
	}
	if _, err := Resistance(none, 1e-5, 293); err == nil {
		t.Error("a resistance without segments")
	}
}

// Common practice: tungsten, α = 0.0044 /K: 2.0 Ω at 20 °C is about 28 Ω at
// 3000 °C by the straight line. It is told only to those who ask for it.
func TestBeyondIsTheStraightLine(t *testing.T) {
	lamp := Polynomial{Y0: 2, Alpha: 0.0044, Reference: c(20)}.Curve(c(0), c(100))
	if _, ok := lamp.At(c(3000)); ok {
		t.Fatal("a value outside the range without asking")
	}
	v, ok := lamp.Beyond(c(3000))
	if !ok {
		t.Fatal("nothing for one who asked")
	}
	near(t, "2.0 Ω of tungsten at 3000 °C", v, 28, 0.5)
	v, _ = lamp.Beyond(c(-50))
	near(t, "below the range", v, 2*(1-0.0044*70), 1e-12)
	v, _ = lamp.Beyond(c(50))
	near(t, "inside the range", v, at(t, lamp, c(50)), 0)
}

// Common practice: copper, α = 0.0039 /K: 0.42 Ω at 20 °C is 0.55 Ω at 100 °C.
func TestCopperWinding(t *testing.T) {
	winding := Polynomial{Y0: 0.42, Alpha: 0.0039, Reference: c(20)}.Curve(c(0), c(150))
	near(t, "0.42 Ω of copper at 100 °C", at(t, winding, c(100)), 0.55, 0.005)
}

func TestClip(t *testing.T) {
	table, err := Table([]float64{100, 200, 300, 400}, []float64{1, 2, 4, 5}, false)
	if err != nil {
		t.Fatal(err)
	}
	part := must(t)(table.Clip(200, 350))
	if lo, hi := part.Range(); lo != 200 || hi != 350 || len(part.Segments) != 2 || !part.FromTable {
		t.Errorf("got %d segments from %v to %v", len(part.Segments), lo, hi)
	}
	for _, k := range []float64{200, 250, 300, 350} {
		near(t, "clipped", at(t, part, k), at(t, table, k), 0)
	}
	if lo, _ := table.Range(); lo != 100 || table.Segments[2].To != 400 {
		t.Error("clipping changed the whole")
	}
	var outside OutsideRange
	if _, err := table.Clip(50, 200); !errors.As(err, &outside) || outside.T != 50 {
		t.Errorf("outside: got %v", err)
	}
	if _, err := table.Clip(300, 200); err == nil {
		t.Error("an inverted part")
	}
	point := must(t)(table.Clip(250, 250))
	near(t, "a part of one temperature", at(t, point, 250), at(t, table, 250), 0)
}

func TestScale(t *testing.T) {
	curve := worked.Curve(c(-40), c(125))
	twice := curve.Scale(2)
	near(t, "twice", at(t, twice, c(85)), 2*at(t, curve, c(85)), 0)
	near(t, "the first stays", at(t, curve, c(20)), 1, 0)
}

func TestOutsideRangeNamesWhatAndWhere(t *testing.T) {
	_, err := Measure(worked.Curve(c(0), c(80)), c(20), c(-40), c(60))
	want := "lower edge of the window -40 °C lies outside the valid range 0 °C to 80 °C"
	if err == nil || err.Error() != want {
		t.Errorf("got %v\nwant %s", err, want)
	}
}
