package material

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"ohmfolio/generator/place"
)

// stripCSV are points made from α = 3.1 ppm/K, β = −0.46 ppm/K² about 25 °C and
// R(25 °C) = 868.9 µΩ, with a scatter of 2 ppm.
func stripCSV() string {
	var b strings.Builder
	b.WriteString("temperature / °C,resistance / µΩ,uncertainty_T / K\n")
	for i := range 15 {
		c := -40 + 10*float64(i)
		d := c - 25
		fmt.Fprintf(&b, "%g,%.6f,0.02\n", c, 868.9*(1+3.1e-6*d-0.46e-6*d*d+2e-6*float64(i%3-1)))
	}
	return b.String()
}

const stripRecord = `name: Strip
source: s
class: measured
condition: annealed
basis: resistance
points: strip.csv
fit: {reference_temperature: 25 °C, degree: 2}
`

const stripSpecimen = "specimen: {between_taps: 200.00 mm ± 0.05 mm (k=2), width: 10.02 mm ± 0.02 mm (k=2), thickness: 1.004 mm ± 0.004 mm (k=2), bridge: 0 % ± 0.01 % (k=2), at: 23 °C}\n"

func readStrip(t *testing.T, more string) *Record {
	t.Helper()
	r, findings := Read("strip", place.NewSource("materials/strip.yaml", []byte(stripRecord+more)), func(name string) *place.Source {
		return place.NewSource("materials/"+name, []byte(stripCSV()))
	})
	if place.Count(findings, place.Error) > 0 {
		t.Fatal(findings)
	}
	return r
}

// TestPoints: the numbers that the points were made from come back within
// their stated uncertainty; without a specimen only ratios are told.
func TestPoints(t *testing.T) {
	r := readStrip(t, "")
	s := r.Adopted
	if s.Rho != nil || s.Ratio == nil || s.Resistivity != nil {
		t.Error("ρ is told without a specimen")
	}
	for want, q := range map[float64]float64{3.1e-6: s.Alpha.Value, -0.46e-6: s.Beta.Value} {
		if math.Abs(q-want) > 0.05e-6 {
			t.Errorf("%g, made from %g", q, want)
		}
	}
	if u := s.Alpha.Uncertainty; u == nil || u.Plus < math.Abs(s.Alpha.Value-3.1e-6) || u.K < 2 || u.K > 2.4 {
		t.Errorf("α %+v", s.Alpha)
	}
	v, _ := Reading{Told: s.Ratio, Ratio: true, Reference: 298.15}.At(273.15 + 85)
	if want := 1 + 3.1e-6*60 - 0.46e-6*3600; math.Abs(v-want) > 3e-6 {
		t.Errorf("R/R at 85 °C: %.7f, made from %.7f", v, want)
	}
	if u := s.Ratio.Uncertainty(298.15); u != 0 {
		t.Errorf("the ratio at its own reference temperature is uncertain by %g", u)
	}
}

// TestSpecimen: ρ = R·w·t/L by hand, and its uncertainty as the root of the sum
// of squares of the parts (k = 1): 0.0125 %, 0.0998 %, 0.1992 %, 0.005 %.
func TestSpecimen(t *testing.T) {
	s := readStrip(t, stripSpecimen).Adopted
	want := 868.9e-6 * 10.02e-3 * 1.004e-3 / 0.2
	if math.Abs(s.Resistivity.Value/want-1) > 3e-6 {
		t.Errorf("ρ %g, by hand %g", s.Resistivity.Value, want)
	}
	rel := math.Sqrt(0.000125*0.000125 + math.Pow(0.01/10.02, 2) + math.Pow(0.002/1.004, 2) + 0.00005*0.00005)
	if got := s.Rho.Uncertainty(298.15) / s.Resistivity.Value; math.Abs(got/rel-1) > 1e-3 {
		t.Errorf("u(ρ)/ρ = %g, by hand %g", got, rel)
	}
	if len(s.Fitted.Budget) != 5 { // thermometer, bridge, width, thickness, length
		t.Errorf("budget %+v", s.Fitted.Budget)
	}
	round := readStrip(t, "specimen: {between_taps: 200 mm, diameter: 3 mm ± 0.006 mm (k=2)}\n").Adopted
	if b := round.Fitted.Budget; b[len(b)-1].From != "diameter" || math.Abs(b[len(b)-1].Value-0.002) > 1e-12 {
		t.Errorf("a diameter counts twice: %+v", b)
	}
}

// TestPointsFingerprint: a changed reading alters the fingerprint.
func TestPointsFingerprint(t *testing.T) {
	read := func(csv string) string {
		r, _ := Read("strip", place.NewSource("materials/strip.yaml", []byte(stripRecord)), func(name string) *place.Source {
			return place.NewSource(name, []byte(csv))
		})
		return r.Fingerprint
	}
	was := read(stripCSV())
	if was != read(strings.ReplaceAll(stripCSV(), "\n", "\r\n")) {
		t.Error("line ends alter it")
	}
	if was == read(strings.Replace(stripCSV(), "868.", "867.", 1)) {
		t.Error("a changed reading leaves it")
	}
}

func TestPointsRange(t *testing.T) {
	_, findings := Read("strip", place.NewSource("materials/strip.yaml", []byte(stripRecord+"valid_range: -40 °C to 150 °C\n")), func(name string) *place.Source {
		return place.NewSource("materials/"+name, []byte(stripCSV()))
	})
	found := false
	for _, f := range findings {
		found = found || f.Code == "range-beyond-points"
	}
	if !found {
		t.Errorf("%v", findings)
	}
}
