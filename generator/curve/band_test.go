package curve

import (
	"math"
	"testing"
)

func curvesOf(corners []Polynomial, lo, hi float64) []Curve {
	var out []Curve
	for _, p := range corners {
		out = append(out, p.Curve(lo, hi))
	}
	return out
}

func TestCorners(t *testing.T) {
	limits := func(lower, upper float64) *Bounds { return &Bounds{lower, upper} }
	if n := len(worked.Corners(nil, nil, nil, nil)); n != 1 {
		t.Errorf("without limits the nominal alone: got %d", n)
	}
	if n := len(worked.Corners(limits(0.9, 1.1), limits(5e-6, 15e-6), limits(-0.6e-6, -0.4e-6), nil)); n != 8 {
		t.Errorf("three limits have eight corners: got %d", n)
	}
	if n := len(worked.Corners(nil, limits(5e-6, 5e-6), nil, nil)); n != 1 {
		t.Errorf("limits of no width are one corner: got %d", n)
	}
	bare := worked
	bare.Alpha = math.NaN()
	if got := bare.Corners(nil, nil, nil, nil); got != nil {
		t.Errorf("a coefficient without value and limits: got %v", got)
	}
	corners := bare.Corners(nil, limits(-4e-6, 8e-6), nil, nil)
	if len(corners) != 2 || corners[0].Alpha != -4e-6 || corners[1].Alpha != 8e-6 || corners[0].Beta != worked.Beta {
		t.Errorf("limits without a nominal value: got %v", corners)
	}
}

func TestBandAt(t *testing.T) {
	corners := worked.Corners(&Bounds{0.95, 1.05}, nil, nil, nil)
	band := Band{Corners: curvesOf(corners, c(-40), c(125)), Covers: []string{"resistivity"}}
	b, ok := band.At(c(20))
	if !ok || b != (Bounds{0.95, 1.05}) {
		t.Errorf("at the reference temperature: got %v", b)
	}
	r, ok := band.RatioAt(c(105), c(20))
	if !ok {
		t.Fatal("no ratio")
	}
	near(t, "limits on the value alone make no band of the ratio", r.Upper-r.Lower, 0, 1e-15)
	near(t, "the ratio", r.Lower, 1-2762.5e-6, 1e-14)
	if _, ok := band.At(c(200)); ok {
		t.Error("a band outside the range")
	}
	if _, ok := band.RatioAt(c(20), c(200)); ok {
		t.Error("a ratio to outside the range")
	}
	if _, ok := (Band{}).At(c(20)); ok {
		t.Error("a band without corners")
	}
}

// By hand: α = −4 to +8 ppm/K, β = −0.5 ppm/K² about 20 °C, at 85 °C (τ = 65 K):
// −4·65 − 0.5·4225 = −2372.5 and 8·65 − 2112.5 = −1592.5 ppm.
func TestMeasureBand(t *testing.T) {
	p := Polynomial{Y0: 1, Alpha: math.NaN(), Beta: -0.5e-6, Reference: c(20)}
	curves := curvesOf(p.Corners(nil, &Bounds{-4e-6, 8e-6}, nil, nil), c(-40), c(125))
	m, err := MeasureBand(curves, c(20), c(20), c(85))
	if err != nil {
		t.Fatal(err)
	}
	near(t, "smallest change", m.Change.Lower*1e6, -2372.5, 1e-8)
	near(t, "greatest change: peak of the upper corner, 8 K above", m.Change.Upper*1e6, 8*8-0.5*64, 1e-8)
	near(t, "chord hot, lower", m.ChordHot.Lower*1e6, -2372.5/65, 1e-8)
	near(t, "chord hot, upper", m.ChordHot.Upper*1e6, -1592.5/65, 1e-8)
	near(t, "slope at the reference temperature", m.SlopeAtReference.Lower*1e6, -4, 1e-9)
	near(t, "slope at the reference temperature", m.SlopeAtReference.Upper*1e6, 8, 1e-9)
	near(t, "box, upper", m.Box.Upper*1e6, 2372.5/65, 1e-8)
	if m.ChordCold != nil {
		t.Error("the window has no cold side")
	}
	if _, err := MeasureBand(nil, c(20), c(20), c(85)); err == nil {
		t.Error("measures without limits")
	}
	if _, err := MeasureBand(curves, c(20), c(20), c(200)); err == nil {
		t.Error("measures outside the range")
	}
}
