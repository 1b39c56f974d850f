package curve

import (
	"math"
	"math/rand"
	"testing"
)

// TestDeviateByHand: 1 + 0.00393·80 against 1 + 0.00403·80 at 100 °C:
// 0.008/1.3144 = 6086.4 ppm, by hand.
func TestDeviateByHand(t *testing.T) {
	old := Polynomial{Y0: 1, Alpha: 3.93e-3, Reference: 293.15}.Curve(273.15, 373.15)
	now := Polynomial{Y0: 1, Alpha: 4.03e-3, Reference: 293.15}.Curve(253.15, 393.15)
	d, ok := Deviate(old, now)
	if !ok || math.Abs(d.Greatest-0.008/1.3144) > 1e-12 || math.Abs(d.At-373.15) > 1e-9 || d.Lo != 273.15 || d.Hi != 373.15 {
		t.Errorf("%+v %v", d, ok)
	}
	if _, ok := Deviate(old, Polynomial{Y0: 1, Alpha: 1e-3, Reference: 500}.Curve(400, 600)); ok {
		t.Error("no common range, and a deviation all the same")
	}
	if _, ok := Deviate(Curve{}, now); ok {
		t.Error("a curve without segments deviates")
	}
	if d, ok := Deviate(old, old); !ok || d.Greatest != 0 {
		t.Errorf("a curve deviates from itself: %+v", d)
	}
}

// TestDeviateIsNotExceeded holds the exact answer against dense samples: no
// sample may lie beyond it, and the best sample must come close. A peak between
// two samples, 7 mK apart, is missed by 1e-4 at most: these curves rise by no
// more than 0.03 per kelvin.
func TestDeviateIsNotExceeded(t *testing.T) {
	random := rand.New(rand.NewSource(7))
	pick := func(scale float64) float64 { return (2*random.Float64() - 1) * scale }
	for range 200 {
		var old, now []Curve
		for range 1 + random.Intn(3) {
			old = append(old, tabled(t, random), Polynomial{Y0: 1 + pick(0.3), Alpha: pick(2e-3), Beta: pick(1e-5), Gamma: pick(3e-8), Reference: 300}.Curve(250, 400))
			now = append(now, Polynomial{Y0: 1 + pick(0.3), Alpha: pick(2e-3), Beta: pick(1e-5), Gamma: pick(3e-8), Reference: 310}.Curve(240, 390))
		}
		for _, upper := range []bool{false, true} {
			d, ok := DeviateEdge(old, now, upper)
			if !ok {
				t.Fatal("no deviation")
			}
			best := 0.0
			for i := range 20001 {
				at := d.Lo + (d.Hi-d.Lo)*float64(i)/20000
				best = math.Max(best, math.Abs(edgeAt(now, at, upper)/edgeAt(old, at, upper)-1))
			}
			if exact := math.Abs(d.Greatest); best > exact*(1+1e-9) || best < exact-1e-4 {
				t.Errorf("exact %g, best of the samples %g", exact, best)
			}
		}
	}
}

func tabled(t *testing.T, random *rand.Rand) Curve {
	t.Helper()
	var at, y []float64
	for i := range 8 {
		at, y = append(at, 245+float64(i)*25), append(y, 0.8+0.5*random.Float64())
	}
	c, err := Table(at, y, false)
	if err != nil {
		t.Fatal(err)
	}
	return c
}
