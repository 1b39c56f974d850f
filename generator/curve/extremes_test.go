package curve

import (
	"math"
	"testing"
)

func TestExtremesOfAParabola(t *testing.T) {
	curve := worked.Curve(c(-55), c(125))
	e, ok := curve.Extremes(c(-55), c(125))
	if !ok {
		t.Fatal("no extremes")
	}
	// Peak at 20 − 10/(2·(−0.5)) = 30 °C with +50 ppm; the far edge is 125 °C.
	near(t, "peak", e.Max-1, 50e-6, 1e-15)
	near(t, "peak at", e.MaxAt, c(30), 1e-9)
	near(t, "lowest", e.Min-1, -4462.5e-6, 1e-15)
	near(t, "lowest at", e.MinAt, c(125), 0)
	e, _ = curve.Extremes(c(60), c(85))
	near(t, "without the peak, greatest at", e.MaxAt, c(60), 0)
	e, _ = curve.Extremes(c(60), c(60))
	if e.Min != e.Max {
		t.Error("a window of one temperature has one value")
	}
}

func TestExtremesOfACubic(t *testing.T) {
	// u³ − 3u turns at ±1 with ∓2.
	cubic := Curve{Segments: []Segment{{From: 297, To: 303, Centre: 300, C: [4]float64{0, -3, 0, 1}}}}
	e, _ := cubic.Extremes(298.5, 301.5)
	near(t, "maximum", e.Max, 2, 1e-12)
	near(t, "maximum at", e.MaxAt, 299, 1e-12)
	near(t, "minimum", e.Min, -2, 1e-12)
	near(t, "minimum at", e.MinAt, 301, 1e-12)
	points := cubic.TurningPoints()
	if len(points) != 2 || !points[0].Maximum || points[1].Maximum {
		t.Fatalf("turning points: got %v", points)
	}
	for _, saddle := range []Segment{
		{From: 297, To: 303, Centre: 300, C: [4]float64{1, 0, 0, 1}},         // u³ at its own centre
		{From: 297, To: 303, Centre: 299, C: [4]float64{1, 3, -3, 1}},        // (u−1)³ written out
		{From: 290, To: 310, Centre: 0, C: [4]float64{-27e6, 27e4, -900, 1}}, // far from its centre
	} {
		if p := (Curve{Segments: []Segment{saddle}}).TurningPoints(); len(p) != 0 {
			t.Errorf("a point of inflection turns nothing: got %v", p)
		}
	}
}

func TestTurningPointAtAnEdge(t *testing.T) {
	// The peak of the worked parabola is at 30 °C.
	for _, window := range [][2]float64{{30, 85}, {-40, 30}} {
		points := worked.Curve(c(window[0]), c(window[1])).TurningPoints()
		if len(points) != 1 || !points[0].Maximum {
			t.Fatalf("%v: got %v, want one maximum", window, points)
		}
		near(t, "at", points[0].T, c(30), 1e-9)
	}
	for _, window := range [][2]float64{{30.001, 85}, {-40, 29.999}} {
		if p := worked.Curve(c(window[0]), c(window[1])).TurningPoints(); len(p) != 0 {
			t.Errorf("%v: got %v beside the peak", window, p)
		}
	}
	// Just inside, the peak is found once, however narrow the stretch beside it.
	for _, beside := range []float64{1e-10, 1e-8, 9e-8, 1.1e-7, 1e-6, 1e-3} {
		points := worked.Curve(c(30)-beside, c(85)).TurningPoints()
		if len(points) != 1 {
			t.Errorf("%g K inside: got %v", beside, points)
		}
	}
}

func TestStraightAndLevelDoNotTurn(t *testing.T) {
	for name, p := range map[string]Polynomial{
		"level":    {Y0: 1.7e-8, Reference: c(20)},
		"straight": {Y0: 1.7e-8, Alpha: 0.00393, Reference: c(20)},
		"zero":     {Reference: c(20)},
	} {
		curve := p.Curve(c(-40), c(125))
		if points := curve.TurningPoints(); len(points) != 0 {
			t.Errorf("%s: got %v", name, points)
		}
		if e, ok := curve.Extremes(c(-40), c(125)); !ok || math.IsInf(e.Min, 0) || math.IsInf(e.Max, 0) {
			t.Errorf("%s: extremes %v", name, e)
		}
	}
}

// The resistance of a body whose resistivity grows as its length is level but
// for rounding, and rounding turns nothing.
func TestRoundingDoesNotTurn(t *testing.T) {
	for i := range 200 {
		gamma := 1e-6 + 1.7e-7*float64(i)
		straight := Polynomial{Y0: 1e-7 + 3e-9*float64(i), Alpha: gamma, Reference: c(20)}.Curve(c(-200), c(800))
		level := must(t)(Resistance(straight, gamma, c(20)))
		again := must(t)(Resistivity(must(t)(Resistance(level, 1e-5, c(20))), 1e-5, c(20)))
		for _, curve := range []Curve{level, again} {
			if p := curve.TurningPoints(); len(p) != 0 {
				t.Fatalf("γ %g: got %v", gamma, p)
			}
		}
	}
}

func TestKinksTurn(t *testing.T) {
	for name, c := range map[string]struct {
		y    []float64
		want []TurningPoint
	}{
		"roof":             {[]float64{1, 2, 1.5, 1}, []TurningPoint{{200, true}}},
		"valley":           {[]float64{3, 2, 1, 4}, []TurningPoint{{300, false}}},
		"both":             {[]float64{1, 2, 1, 2}, []TurningPoint{{200, true}, {300, false}}},
		"flat top":         {[]float64{1, 2, 2, 1}, []TurningPoint{{250, true}}},
		"step on the way":  {[]float64{1, 2, 2, 3}, nil},
		"level at the end": {[]float64{1, 2, 2, 2}, nil},
	} {
		for _, linear := range []bool{true, false} {
			table, err := Table([]float64{100, 200, 300, 400}, c.y, linear)
			if err != nil {
				t.Fatal(err)
			}
			got := table.TurningPoints()
			if len(got) != len(c.want) {
				t.Errorf("%s, linear %v: got %v, want %v", name, linear, got, c.want)
				continue
			}
			for i := range got {
				if got[i].Maximum != c.want[i].Maximum || math.Abs(got[i].T-c.want[i].T) > 1e-9 {
					t.Errorf("%s, linear %v: got %v, want %v", name, linear, got, c.want)
				}
			}
		}
	}
}
