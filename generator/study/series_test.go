package study

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// joined has parts to put in series.
func joined(block string) *library.Library {
	head := "name: X\nsource: s\nbasis: resistance\n"
	at20 := head + "reference_temperature: 20 °C\n"
	return library.FromFiles(map[string][]byte{
		"materials/sources.yaml":  []byte("s: {kind: standard, title: T, number: N, checked: original}\n"),
		"materials/copper.yaml":   []byte(at20 + "resistivity: 1.7241 µΩ·cm\nalpha: 3.93e-3 /K\nvalid_range: 0 °C to 100 °C\n"),
		"materials/zero.yaml":     []byte(head + "reference_temperature: 0 °C\nalpha: 0.0042643923240938165 /K\nvalid_range: 0 °C to 100 °C\n"),
		"materials/book.yaml":     []byte(at20 + "alpha: 0.004 /K\nvalid_range: 0 °C to 100 °C\n"),
		"materials/eureka.yaml":   []byte(at20 + "alpha: 0.00001 /K\nvalid_range: 0 °C to 100 °C\n"),
		"materials/flat.yaml":     []byte(at20 + "resistivity: 43 µΩ·cm ± 5 %\nalpha: 0 /K\nvalid_range: -50 °C to 150 °C\n"),
		"materials/check.yaml":    []byte(at20 + "resistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nbeta: -0.5 ppm/K²\nvalid_range: -50 °C to 150 °C\n"),
		"materials/factors.yaml":  []byte(at20 + "table: {temperature: °C, resistance_ratio: 1, interpolate: linear, rows: [[20, 1], [50, 1.01], [100, 1.015]]}\nvalid_range: 20 °C to 100 °C\n"),
		"materials/cu-band.yaml":  []byte(at20 + "resistivity: 1.75 µΩ·cm ± 2 %\nalpha: 3.9e-3 /K ± 2 %\nvalid_range: 0 °C to 100 °C\n"),
		"materials/low-band.yaml": []byte(at20 + "resistivity: 43 µΩ·cm ± 5 %\nalpha: -10 to 30 ppm/K\nbeta: -0.5 ppm/K² ± 0.1 ppm/K²\nvalid_range: 0 °C to 100 °C\n"),
		"materials/mid-band.yaml": []byte(at20 + "resistivity: 43 µΩ·cm ± 5 %\nalpha: 10 ppm/K ± 20 ppm/K\nbeta: -0.5 ppm/K² ± 0.1 ppm/K²\nvalid_range: 0 °C to 100 °C\n"),
		"materials/point.yaml":    []byte(at20 + "resistivity: 1.8 µΩ·cm\n"),
		"content/reports/r.md":    []byte("# R\n\n```study: series\n" + block + "\n```\n"),
	})
}

func added(t *testing.T, block string) (*Outcome, []place.Finding) {
	t.Helper()
	lib := joined(block)
	if place.Count(lib.Findings, place.Error) > 0 {
		t.Fatal(lib.Findings)
	}
	return Run(lib, lib.Documents[0].Page.Studies[0])
}

func chain(t *testing.T, block string) MaterialOutcome {
	t.Helper()
	o, findings := added(t, block)
	if o == nil {
		t.Fatalf("%s: %v", block, findings)
	}
	return o.Materials[0]
}

// TestSeriesExamples: worked_examples.csv (WE) and job.md D6.
func TestSeriesExamples(t *testing.T) {
	for _, c := range []struct {
		what, block string
		tolerance   float64
		want        map[string]float64
	}{
		{"WE11 (RAJPUT): 400 Ω copper, 2600 Ω eureka", "parts: [{material: book, resistance: 400 Ω}, {material: eureka, resistance: 2600 Ω}]\nwindow: 20 °C to 40 °C", 1e-3,
			map[string]float64{"alpha_effective": 542, "resistance": 3e6}},
		{"WE05 (SCILAB_1370): 1.5 Ω copper correct at 15 °C, at 25 °C", "parts: [{material: zero, resistance: 1.5 Ω}, {material: flat, resistance: 3.5 Ω}]\nreference_temperature: 15 °C\nwindow: 15 °C to 25 °C", 1e-4,
			map[string]float64{"greatest_change": (5.06012/5 - 1) * 1e6, "alpha_effective": 0.3 * 4008.02}},
		{"D6: 2 % copper", "parts: [{material: copper, resistance: 2 µΩ}, {material: flat, resistance: 98 µΩ}]\nwindow: 20 °C to 40 °C", 6e-3, map[string]float64{"alpha_effective": 79}},
		{"D6: 10 % copper", "parts: [{material: copper, resistance: 5 µΩ, count: 2}, {material: flat, resistance: 90 µΩ}]\nwindow: 20 °C to 40 °C", 1e-9, map[string]float64{"alpha_effective": 393}},
		{"D6: 24 % copper", "parts: [{material: copper, resistance: 24 µΩ}, {material: flat, resistance: 76 µΩ}]\nwindow: 20 °C to 40 °C", 1e-3, map[string]float64{"alpha_effective": 943}},
		{"copper's α at 0 °C (job.md part 4)", "parts: [{material: copper, resistance: 1 Ω}]\nreference_temperature: 0 °C\nwindow: 0 °C to 40 °C", 1.2e-5, map[string]float64{"alpha_effective": 4265.2}},
		// (10 + 39.3·…): share 1 %: α = 0.99·10 + 39.3, β = 0.99·(−0.5); turns at 20 − α/2β
		{"check alloy with 1 % copper", "parts: [{material: check, resistance: 99 µΩ}, {material: copper, resistance: 1 µΩ}]\nwindow: 0 °C to 100 °C", 1e-9,
			map[string]float64{"alpha_effective": 49.2, "beta_effective": -0.495, "turning_point": 20 + 49.2/0.99, "greatest_change": 49.2 * 49.2 / 0.99 / 2}},
		{"from dimensions", "parts: [{material: copper, length: 1 m, thickness: 5 mm, width: 40 mm}, {material: copper, length: 2 m, diameter: 2 mm}, {material: copper, length: 1 m, area: 10 mm²}]\nwindow: 0 °C to 100 °C", 1e-9,
			map[string]float64{"resistance": 17.241e-6 * (1.0/200 + 2/math.Pi + 0.1) * 1e6}},
	} {
		near(t, c.what, chain(t, c.block), c.tolerance, c.want)
	}
}

// TestSeriesOfTables: the sum of a table and a straight line is the sum at
// every temperature; β of a table is not told.
func TestSeriesOfTables(t *testing.T) {
	block := "parts: [{material: factors, resistance: 3 Ω}, {material: copper, resistance: 1 Ω}]\nwindow: 20 °C to %g °C"
	for _, c := range []float64{35, 50, 51, 80, 100} {
		at := 1 + (c-20)/30*0.01
		if c > 50 {
			at = 1.01 + (c-50)/50*0.005
		}
		m := chain(t, fmt.Sprintf(block, c))
		near(t, fmt.Sprint(c), m, 1e-9, map[string]float64{"change_hot": ((3*at+1+0.00393*(c-20))/4 - 1) * 1e6})
		if _, ok := m.Numbers["beta_effective"]; ok || !strings.Contains(strings.Join(m.Reasons, ";"), "no effective β") {
			t.Errorf("β of a table: %v", m.Reasons)
		}
	}
}

// TestSeriesBand: no combination within the limits goes beyond the band, and
// one reaches it.
func TestSeriesBand(t *testing.T) {
	m := chain(t, "parts: [{material: mid-band, resistance: 95 µΩ ± 5 %}, {material: cu-band, resistance: 5 µΩ ± 10 %}]\nwindow: 0 °C to 100 °C")
	hot, alpha := m.Numbers["change_hot"], m.Numbers["alpha_effective"]
	random := rand.New(rand.NewPCG(1, 2))
	most, steepest := 0.0, 0.0
	for range 20000 {
		within := func(v, d float64) float64 { // the ends are tried often
			return v + d*min(1, max(-1, 3*random.Float64()-1.5))
		}
		r, c := 95*within(1, .05), 5*within(1, .1)
		a, b, k := within(10, 20), within(-.5, .1), within(3900, 78)
		most = max(most, (r*(a*80+b*6400)+c*k*80)/(r+c))
		steepest = max(steepest, (r*a+c*k)/(r+c))
	}
	if most > *hot.Upper*(1+1e-12) || most < *hot.Upper*0.999 || hot.Kind != "limits" {
		t.Errorf("change %g, band to %g", most, *hot.Upper)
	}
	if steepest > *alpha.Upper*(1+1e-12) || steepest < *alpha.Upper*0.999 {
		t.Errorf("α %g, band to %g", steepest, *alpha.Upper)
	}
	if r := m.Numbers["resistance"]; math.Abs(*r.Upper-0.10525) > 1e-12 {
		t.Errorf("R to %v", *r.Upper)
	}
}

// TestSeriesVerdicts at both sides of every threshold.
func TestSeriesVerdicts(t *testing.T) {
	for _, c := range []struct {
		parts, require string
		want           Verdict
	}{
		{"{material: check, resistance: 99 µΩ}, {material: copper, resistance: 1 µΩ}", "alpha_effective: 49.3 ppm/K", HoldsNominally},
		{"{material: check, resistance: 99 µΩ}, {material: copper, resistance: 1 µΩ}", "alpha_effective: 49.1 ppm/K", Fails},
		{"{material: check, resistance: 99 µΩ}, {material: copper, resistance: 1 µΩ}", "resistance: 100 µΩ", Holds},
		{"{material: check, resistance: 99 µΩ}, {material: copper, resistance: 1 µΩ}", "resistance: 99 µΩ", Fails},
		{"{material: flat, length: 1 m, area: 1 mm²}", "resistance: 0.4515 Ω", Holds}, // 0.43 Ω + 5 %
		{"{material: flat, length: 1 m, area: 1 mm²}", "resistance: 0.4514 Ω", CannotBeTold},
		{"{material: cu-band, resistance: 1 Ω}", "alpha_effective: 3978 ppm/K", Holds},
		{"{material: cu-band, resistance: 1 Ω}", "alpha_effective: 3977 ppm/K", CannotBeTold},
		{"{material: cu-band, resistance: 1 Ω}", "alpha_effective: 3821 ppm/K", Fails},
		{"{material: point, length: 1 m, area: 1 mm²}", "alpha_effective: 3821 ppm/K", CannotBeTold},
	} {
		m := chain(t, "parts: ["+c.parts+"]\nwindow: 0 °C to 100 °C\nrequire: {"+c.require+"}")
		if m.Verdict != c.want {
			t.Errorf("%s, %s: %q, want %q; %+v %v", c.parts, c.require, m.Verdict, c.want, m.Requirements, m.Reasons)
		}
	}
}

func TestSeriesMissing(t *testing.T) {
	for block, want := range map[string]string{
		"parts: [{material: point, length: 1 m, area: 1 mm²}]\nwindow: 0 °C to 100 °C":                                                          "no nominal coefficient",
		"parts: [{material: low-band, length: 1 m, area: 1 mm²}]\nwindow: 0 °C to 100 °C":                                                       "no nominal coefficient",
		"parts: [{material: book, length: 1 m, area: 1 mm²}]\nwindow: 0 °C to 100 °C":                                                           "no resistivity at 20 °C",
		"parts: [{material: copper, resistance: 1 Ω}, {material: flat, resistance: 1 Ω}]\nwindow: -20 °C to 60 °C":                              "data cover only 0 °C to 60 °C",
		"parts: [{material: factors, resistance: 1 Ω}, {material: flat, resistance: 1 Ω}]\nwindow: 0 °C to 60 °C\nreference_temperature: 10 °C": "10 °C lies outside",
	} {
		if reasons := strings.ReplaceAll(strings.Join(chain(t, block).Reasons, "; "), quantity.NarrowSpace, " "); !strings.Contains(reasons, want) {
			t.Errorf("%s: %q, want %q", block, reasons, want)
		}
	}
	m := chain(t, "parts: [{material: copper, resistance: 1 Ω}, {material: flat, resistance: 1 Ω}, {material: copper, resistance: 1 Ω}]\nwindow: 0 °C to 60 °C")
	if len(m.Evidence) != 2 || m.Material != "" || m.Name != "Parts in series" {
		t.Errorf("%s rests on %v", m.Name, m.Evidence)
	}
}

func TestBadSeries(t *testing.T) {
	for block, code := range map[string]string{
		"parts: []\nwindow: 0 °C to 60 °C":                                                                 "parameter-missing",
		"parts: [{material: coper, resistance: 1 Ω}]\nwindow: 0 °C to 60 °C":                               "study-material-unknown",
		"parts: [{material: copper}]\nwindow: 0 °C to 60 °C":                                               "parameter-missing",
		"parts: [{material: copper, length: 1 m}]\nwindow: 0 °C to 60 °C":                                  "parameter-missing",
		"parts: [{material: copper, length: 1 m, width: 1 mm}]\nwindow: 0 °C to 60 °C":                     "parameter-missing",
		"parts: [{material: copper, length: 1 m, resistance: 1 Ω}]\nwindow: 0 °C to 60 °C":                 "parameters-contradict",
		"parts: [{material: copper, length: 1 m, area: 1 mm², diameter: 1 mm}]\nwindow: 0 °C to 60 °C":     "parameters-contradict",
		"parts: [{material: copper, length: 1 m, thickness: 1 mm, diameter: 1 mm}]\nwindow: 0 °C to 60 °C": "parameters-contradict",
		"parts: [{material: copper, resistance: 0 Ω}]\nwindow: 0 °C to 60 °C":                              "value-not-positive",
		"parts: [{material: copper, resistance: 1 Ω, count: 0}]\nwindow: 0 °C to 60 °C":                    "parameter-out-of-bounds",
		"parts: [{material: copper, resistance: 1 V}]\nwindow: 0 °C to 60 °C":                              "unit-of-another-kind",
		"parts: [{material: copper, resistance: 1 Ω}]\nwindow: 60 °C to 0 °C":                              "window-inverted",
		"parts: [{material: copper, resistance: 1 Ω}]":                                                     "key-missing",
	} {
		o, findings := added(t, block)
		if o != nil || len(findings) == 0 || findings[0].Code != code || findings[0].Position.File != "content/reports/r.md" || findings[0].Position.Line < 3 {
			t.Errorf("%q: want %s, found %+v", block, code, findings)
		}
	}
}
