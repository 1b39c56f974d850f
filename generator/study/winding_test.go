package study

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
	"ohmfolio/generator/published"
)

// coils has copper after the IACS, copper with the α₀ of the textbooks, and
// others that a winding cannot be judged on.
func coils(block string) *library.Library {
	head := "name: X\nsource: s\nbasis: resistance\n"
	at20 := head + "reference_temperature: 20 °C\n"
	return library.FromFiles(map[string][]byte{
		"materials/sources.yaml":   []byte("s: {kind: standard, title: T, number: N, checked: original}\n"),
		"materials/copper.yaml":    []byte(at20 + "resistivity: 1.7241 µΩ·cm\nalpha: 3.93e-3 /K\nvalid_range: 0 °C to 100 °C\nproperties: {density: {value: 8.89 g/cm³, source: s}}\n"),
		"materials/zero.yaml":      []byte(head + "reference_temperature: 0 °C\nresistivity: 1.6 µΩ·cm\nalpha: 0.00426 /K\nvalid_range: -50 °C to 200 °C\n"),
		"materials/start.yaml":     []byte(head + "reference_temperature: 24.5 °C\nalpha: 0.004041 /K\nvalid_range: 0 °C to 200 °C\n"),
		"materials/limited.yaml":   []byte(at20 + "resistivity: 1.7241 µΩ·cm ± 2 %\nalpha: 3.93e-3 /K ± 1 %\nvalid_range: 0 °C to 200 °C\nproperties: {density: {value: 8.89 g/cm³ ± 1 %, source: s}}\n"),
		"materials/aluminium.yaml": []byte(at20 + "resistivity: 2.8264 µΩ·cm\nalpha: 4.03e-3 /K\nvalid_range: 0 °C to 100 °C\n"),
		"materials/manganin.yaml":  []byte(at20 + "resistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nbeta: -0.5 ppm/K²\nvalid_range: 0 °C to 100 °C\n"),
		"materials/point.yaml":     []byte(at20 + "resistivity: 1.8 µΩ·cm\n"),
		"content/reports/r.md":     []byte("# R\n\n```study: winding\n" + block + "\n```\n"),
	})
}

func wound1(t *testing.T, block string) (*Outcome, []place.Finding) {
	t.Helper()
	lib := coils(block)
	if place.Count(lib.Findings, place.Error) > 0 {
		t.Fatal(lib.Findings)
	}
	return Run(lib, lib.Documents[0].Page.Studies[0])
}

func coil(t *testing.T, block string) MaterialOutcome {
	t.Helper()
	o, findings := wound1(t, block)
	if o == nil {
		t.Fatalf("%s: %v", block, findings)
	}
	return o.Materials[0]
}

// TestWindingExamples: worked_examples.csv of alloys (WE) and of metals, each
// with its source there, and job.md K8.
func TestWindingExamples(t *testing.T) {
	for _, c := range []struct {
		what, block string
		tolerance   float64
		want        map[string]float64
	}{
		{"WE36 (KULSHR)", "materials: [zero]\ncold_resistance: 3.42 Ω\ncold_temperature: 20 °C\nhot_resistance: 4.22 Ω\ncoolant: 20 °C", 1e-4,
			map[string]float64{"rise": 59.59, "temperature": 79.59}},
		{"WE38 (KULSHR)", "materials: [zero]\ncold_resistance: 126 Ω\ncold_temperature: 20 °C\nclass_temperature: -35 °C", 5e-5,
			map[string]float64{"resistance_hot": 98.80}},
		{"winding temperature, k = 234.5 (S25c)", "materials: [copper]\ncold_resistance: 80 Ω\ncold_temperature: 20 °C\nhot_resistance: 100 Ω\ncoolant: 20 °C\nconstant: 234.5", 1e-9,
			map[string]float64{"temperature": 83.625, "rise": 63.625, "zero_resistance_temperature": -234.5}},
		{"same, k = 235", "materials: [copper]\ncold_resistance: 80 Ω\ncold_temperature: 20 °C\nhot_resistance: 100 Ω\nconstant: 235", 1e-9,
			map[string]float64{"temperature": 83.75}},
		{"α at the starting temperature (S25f)", "materials: [start]\ncold_resistance: 28.2 Ω\ncold_temperature: 24.5 °C\nclass_temperature: 68.8 °C", 1e-6,
			map[string]float64{"resistance_hot": 33.24826}},
		{"25 °C reference, ratio form", "materials: [copper]\ncold_resistance: 1.5 Ω\ncold_temperature: 25 °C\nclass_temperature: 85 °C\nconstant: 234.5", 1e-8,
			map[string]float64{"resistance_hot": 1.8468208}},
		{"12 AWG (S26c), 1 km", "materials: [copper]\nlength: 1 km\ngauge: AWG 12", 2e-3, map[string]float64{"resistance_20": 5.21}},
		{"K8: aluminium, 1.30 from 20 °C, 225", "materials: [aluminium]\ncold_resistance: 1 Ω\ncold_temperature: 20 °C\nhot_resistance: 1.3 Ω\ncoolant: 20 °C\nconstant: 225", 1e-9, map[string]float64{"rise": 73.5}},
		{"K8: the same, 228", "materials: [aluminium]\ncold_resistance: 1 Ω\ncold_temperature: 20 °C\nhot_resistance: 1.3 Ω\ncoolant: 20 °C\nconstant: 228", 1e-9, map[string]float64{"rise": 74.4}},
		{"the coolant warmed by 3 K", "materials: [copper]\ncold_resistance: 80 Ω\ncold_temperature: 20 °C\nhot_resistance: 100 Ω\ncoolant: 23 °C\nconstant: 234.5", 1e-9, map[string]float64{"rise": 60.625}},
	} {
		near(t, c.what, coil(t, c.block), c.tolerance, c.want)
	}
}

// TestWireTable: every gauge of awg_solid_copper.csv, as printed (S12, S7) and computed.
func TestWireTable(t *testing.T) {
	rows := published.Rows(t, "awg_solid_copper.csv")
	if len(rows) < 25 {
		t.Fatalf("only %d gauges", len(rows))
	}
	for _, row := range rows {
		m := coil(t, "materials: [copper]\nlength: 1000 ft\ngauge: AWG "+row["AWG"])
		near(t, "AWG "+row["AWG"]+" computed", m, 6e-5, map[string]float64{
			"resistance_20": published.Number(t, row["ohm_per_1000ft_20C_calc_IACS"])})
		near(t, "AWG "+row["AWG"]+" as printed", m, 1.1e-3, map[string]float64{
			"resistance_20": published.Number(t, row["ohm_per_1000ft_20C_printed_S12"])})
		near(t, "AWG "+row["AWG"]+" mass", m, 1e-2, map[string]float64{
			"mass": published.Number(t, row["lb_per_1000ft_printed_S7"]) * 453.59237})
	}
}

// TestTemperatureCorrection: 1/k_t of IEC 60228's formula for copper, 254.5/(234.5 + t).
func TestTemperatureCorrection(t *testing.T) {
	for _, row := range published.Rows(t, "iec60228_temperature_correction.csv") {
		m := coil(t, "materials: [copper]\ncold_resistance: 1 Ω\ncold_temperature: "+row["t_C"]+" °C\nconstant: 234.5")
		near(t, row["t_C"], m, 1e-5, map[string]float64{"resistance_20": published.Number(t, row["kt_Cu_calc_254.5/(234.5+t)"])})
		own := coil(t, "materials: [copper]\ncold_resistance: 1 Ω\ncold_temperature: "+row["t_C"]+" °C")
		near(t, row["t_C"]+" own", own, 1e-4, map[string]float64{"resistance_20": published.Number(t, row["kt_Cu_calc_254.5/(234.5+t)"])})
	}
}

// TestConductivity: α falls with the conductivity; the zero-resistance
// temperatures of nbs_copper_alpha_vs_conductivity.csv (computed column; the
// printed one is from memory).
func TestConductivity(t *testing.T) {
	for _, row := range published.Rows(t, "nbs_copper_alpha_vs_conductivity.csv") {
		m := coil(t, "materials: [copper]\nlength: 1 m\ndiameter: 1 mm\nconductivity: "+row["percent_IACS"]+" %IACS\nclass_temperature: 50 °C")
		r := 1 / (published.Number(t, row["percent_IACS"]) * 0.58e6) / (math.Pi / 4 * 1e-6)
		near(t, row["percent_IACS"]+" %IACS", m, 5e-5, map[string]float64{
			"zero_resistance_temperature": -published.Number(t, row["T_calc"]),
			"resistance_20":               r,
			"resistance_hot":              r * (1 + 30*published.Number(t, row["alpha_20C_calc"]))})
	}
}

func TestEnamel(t *testing.T) {
	over := coil(t, "materials: [copper]\nturns: 500\nmean_turn: 0.2 m\ndiameter_over_enamel: 0.56 mm\nenamel: 0.03 mm\nwinding_area: 2 cm²")
	near(t, "fill", over, 1e-9, map[string]float64{"fill": 500 * math.Pi / 4 * 0.25 / 200 * 100})
	bare := coil(t, "materials: [copper]\nlength: 100 m\ndiameter: 0.50 mm")
	near(t, "over enamel", over, 1e-12, map[string]float64{"resistance_20": *bare.Numbers["resistance_20"].Value, "mass": *bare.Numbers["mass"].Value})
	twice := coil(t, "materials: [copper]\nlength: 100 m\ndiameter: 0.50 mm\nstrands: 2")
	near(t, "two strands", twice, 1e-11, map[string]float64{"resistance_20": *bare.Numbers["resistance_20"].Value / 2, "mass": *bare.Numbers["mass"].Value * 2})
}

// TestWindingBands: 1 µm on 0.1 mm is 2 % (job.md K7); ρ ± 2 % besides.
func TestWindingBands(t *testing.T) {
	m := coil(t, "materials: [limited]\nlength: 100 m\ndiameter: 0.1 mm ± 0.001 mm")
	r := m.Numbers["resistance_20"]
	if math.Abs(*r.Lower / *r.Value - 0.98/1.01/1.01) > 1e-9 || math.Abs(*r.Upper / *r.Value - 1.02/0.99/0.99) > 1e-9 || r.Kind != "limits" {
		t.Errorf("%v %v %v %s", *r.Lower, *r.Value, *r.Upper, r.Kind)
	}
	// own α ± 1 %: from R2/R1 = 1.25 at 20 °C, Δ = 0.25/α
	m = coil(t, "materials: [limited]\ncold_resistance: 80 Ω\ncold_temperature: 20 °C\nhot_resistance: 100 Ω\ncoolant: 20 °C")
	rise := m.Numbers["rise"]
	if math.Abs(*rise.Lower-0.25/0.0039693) > 1e-6 || math.Abs(*rise.Upper-0.25/0.0038907) > 1e-6 {
		t.Errorf("%+v %v %v", rise, *rise.Lower, *rise.Upper)
	}
	// resistances with limits, a constant: corners
	m = coil(t, "materials: [copper]\ncold_resistance: 80 Ω ± 0.1 %\ncold_temperature: 20 °C ± 0.5 K\nhot_resistance: 100 Ω ± 0.1 %\ncoolant: 20 °C ± 1 K\nconstant: 235")
	rise = m.Numbers["rise"]
	lower, upper := 99.9/80.08*254.5-235-21, 100.1/79.92*255.5-235-19
	if math.Abs(*rise.Lower-lower) > 1e-6 || math.Abs(*rise.Upper-upper) > 1e-6 || rise.Kind != "limits" {
		t.Errorf("%v %v, want %g %g", *rise.Lower, *rise.Upper, lower, upper)
	}
}

// readingsOf a winding that cools exactly as 3 Ω + 1 Ω·exp(−t/200 s), plus scatter.
func readingsOf(scatter float64) string {
	var list []string
	for i, t := range []float64{20, 40, 60, 90, 120, 180, 240, 300} {
		r := 3 + math.Exp(-t/200) + scatter*float64(i%3-1)
		list = append(list, fmt.Sprintf("{time: %g s, resistance: %.9f Ω}", t, r))
	}
	return "readings: [" + strings.Join(list, ", ") + "]"
}

// TestCoolingCurve: an exact exponential is found again by both ways; with
// scatter the fit is that of scipy's curve_fit.
func TestCoolingCurve(t *testing.T) {
	m := coil(t, "materials: [copper]\ncold_resistance: 3 Ω\ncold_temperature: 20 °C\ncoolant: 20 °C\n"+readingsOf(0)+"\nconstant: 235")
	near(t, "exponential", m, 1e-7, map[string]float64{"resistance_hot": 4, "rise": 255. / 3})
	m = coil(t, "materials: [copper]\ncold_resistance: 3 Ω\ncold_temperature: 20 °C\ncoolant: 20 °C\nextrapolation: straight line on log\n"+readingsOf(0)+"\nconstant: 235")
	near(t, "on log", m, 1e-7, map[string]float64{"resistance_hot": 4})

	lines := published.Scipy(t, `import scipy.optimize
t = np.array([20., 40, 60, 90, 120, 180, 240, 300])
r = 3 + np.exp(-t/200) + 0.002*np.array([i%3-1 for i in range(8)])
p, _ = scipy.optimize.curve_fit(lambda t, e, a, tau: e + a*np.exp(-t/tau), t, r, p0=[3, 1, 150], xtol=1e-14, ftol=1e-14)
s, c = np.polyfit(t, np.log(r - 3), 1)
tell([p[0] + p[1], p[2], 3 + np.exp(c)])
`)
	m = coil(t, "materials: [copper]\ncold_resistance: 3 Ω\ncold_temperature: 20 °C\n"+readingsOf(0.002))
	near(t, "scipy", m, 1e-6, map[string]float64{"resistance_hot": lines[0][0]})
	m = coil(t, "materials: [copper]\ncold_resistance: 3 Ω\ncold_temperature: 20 °C\ncoolant: 20 °C\nextrapolation: straight line on log\n"+readingsOf(0.002))
	near(t, "numpy on log", m, 1e-8, map[string]float64{"resistance_hot": lines[0][2]})
}

// TestWindingVerdicts at both sides of every threshold.
func TestWindingVerdicts(t *testing.T) {
	base := "\ncold_resistance: 80 Ω\ncold_temperature: 20 °C\nhot_resistance: 100 Ω\ncoolant: 20 °C\n"
	for _, c := range []struct {
		block string
		want  Verdict
	}{
		{"materials: [copper]" + base + "constant: 235\nrequire: {rise: 63.75 K}", Holds},
		{"materials: [copper]" + base + "constant: 235\nrequire: {rise: 63.74 K}", Fails},
		{"materials: [copper]" + base + "require: {rise: 64 K}", HoldsNominally},
		{"materials: [limited]" + base + "require: {rise: 64.26 K}", Holds},
		{"materials: [limited]" + base + "require: {rise: 64.25 K}", CannotBeTold},
		{"materials: [limited]" + base + "require: {rise: 62.98 K}", Fails},
		{"materials: [limited]" + base + "require: {mass: 1 kg}", CannotBeTold},
		{"materials: [point]" + base + "require: {rise: 64 K}", CannotBeTold},
		{"materials: [limited]\nlength: 100 m\ndiameter: 0.5 mm\nrequire: {resistance_20: 8.60 Ω to 8.96 Ω}", Holds}, // 8.7808 ± 2 %
		{"materials: [limited]\nlength: 100 m\ndiameter: 0.5 mm\nrequire: {resistance_20: 8.61 Ω to 8.96 Ω}", CannotBeTold},
		{"materials: [limited]\nlength: 100 m\ndiameter: 0.5 mm\nrequire: {resistance_20: 9 Ω to 9.5 Ω}", Fails},
	} {
		if m := coil(t, c.block); m.Verdict != c.want {
			t.Errorf("%s: %q, want %q; %+v %v", c.block, m.Verdict, c.want, m.Requirements, m.Reasons)
		}
	}
}

func TestWindingMissing(t *testing.T) {
	base := "\ncold_resistance: 80 Ω\ncold_temperature: 20 °C\n"
	for block, want := range map[string]string{
		"materials: [copper]" + base + "hot_resistance: 110 Ω":      "lies outside the valid range 0 °C to 100 °C; a constant",
		"materials: [copper]" + base + "class_temperature: 130 °C":  "130 °C lies outside the valid range",
		"materials: [manganin]" + base + "hot_resistance: 80.001 Ω": "R does not rise",
		"materials: [point]" + base + "hot_resistance: 100 Ω":       "no coefficient",
		"materials: [point]\nlength: 1 m\ndiameter: 1 mm":           "no density",
		"materials: [start]\nlength: 1 m\ndiameter: 1 mm":           "no resistivity at 20 °C",
		"materials: [copper]" + base + "hot_resistance: 100 Ω":      "no rise without the temperature of the coolant",
		"materials: [copper]" + base + "readings: [{time: 1 s, resistance: 90 Ω}, {time: 2 s, resistance: 89 Ω}, {time: 3 s, resistance: 88 Ω}, {time: 4 s, resistance: 87 Ω}]": "do not bend like an exponential",
	} {
		if reasons := strings.ReplaceAll(strings.Join(coil(t, block).Reasons, "; "), "\u202f", " "); !strings.Contains(reasons, want) {
			t.Errorf("%s: %q, want %q", block, reasons, want)
		}
	}
	m := coil(t, "materials: [copper]"+base+"hot_resistance: 100 Ω\nconstant: 228")
	if !strings.Contains(strings.Join(m.Warnings, "; "), "another metal") {
		t.Errorf("228 for copper: %v", m.Warnings)
	}
	for _, constant := range []string{"234.5", "235"} {
		if m := coil(t, "materials: [copper]"+base+"hot_resistance: 100 Ω\nconstant: "+constant); strings.Contains(strings.Join(m.Warnings, "; "), "another metal") {
			t.Errorf("%s for copper: %v", constant, m.Warnings)
		}
	}
}

func TestBadWindings(t *testing.T) {
	base := "materials: [copper]\ncold_resistance: 3 Ω\ncold_temperature: 20 °C\n"
	falling := "[{time: 10 s, resistance: 4 Ω}, {time: 20 s, resistance: 3.9 Ω}, {time: 30 s, resistance: 3.85 Ω}]"
	for block, code := range map[string]string{
		"materials: [copper]":                                                                                   "parameter-missing",
		"materials: [copper]\nlength: 1 m":                                                                      "parameter-missing",
		"materials: [copper]\ndiameter: 1 mm":                                                                   "parameter-missing",
		"materials: [copper]\nlength: 1 m\ndiameter: 1 mm\nwinding_area: 1 cm²":                                 "parameters-contradict",
		"materials: [copper]\nturns: 20\ndiameter: 1 mm":                                                        "parameter-missing",
		"materials: [copper]\nturns: 0\nmean_turn: 1 m\ndiameter: 1 mm":                                         "parameter-out-of-bounds",
		"materials: [copper]\nlength: 1 m\nturns: 3\ndiameter: 1 mm":                                            "parameters-contradict",
		"materials: [copper]\nlength: 1 m\ndiameter: 1 mm\ngauge: AWG 20":                                       "parameters-contradict",
		"materials: [copper]\nlength: 1 m\ngauge: AWG 70":                                                       "parameter-out-of-bounds",
		"materials: [copper]\nlength: 1 m\ndiameter_over_enamel: 1 mm":                                          "parameter-missing",
		"materials: [copper]\nlength: 1 m\ndiameter: 1 mm\nenamel: 0.1 mm":                                      "parameters-contradict",
		"materials: [copper]\nlength: 1 m\ndiameter_over_enamel: 1 mm\nenamel: 0.5 mm":                          "parameter-out-of-bounds",
		"materials: [copper]\nlength: -1 m\ndiameter: 1 mm":                                                     "value-not-positive",
		"materials: [copper]\ncold_resistance: 3 Ω":                                                             "parameter-missing",
		"materials: [copper]\nhot_resistance: 3 Ω\nlength: 1 m\ndiameter: 1 mm":                                 "parameter-missing",
		base + "coolant: 20 °C":                                                                                 "parameters-contradict",
		base + "extrapolation: exponential":                                                                     "parameters-contradict",
		base + "hot_resistance: 4 Ω\nconstant: 236":                                                             "word-unknown",
		base + "hot_resistance: 4 Ω\nstrands: 0":                                                                "parameter-out-of-bounds",
		base + "readings: " + falling:                                                                           "readings-unusable",
		base + "extrapolation: straight line on log\nreadings: " + falling:                                      "parameter-missing",
		base + "hot_resistance: 4 Ω\nextrapolation: straight line on log\ncoolant: 20 °C\nreadings: " + falling: "parameters-contradict",
		base + "readings: [{time: 0 s, resistance: 4 Ω}]":                                                       "readings-unusable",
		base + "readings: [{time: 10 s, resistance: 4 Ω}, {time: 9 s, resistance: 3 Ω}]":                        "readings-unusable",
		base + "readings: [{time: 10 s, resistance: -4 Ω}]":                                                     "value-not-positive",
		base + "readings: [{time: 10 s}]":                                                                       "key-missing",
	} {
		o, findings := wound1(t, block)
		if o != nil || len(findings) == 0 || findings[0].Code != code || findings[0].Position.File != "content/reports/r.md" || findings[0].Position.Line < 3 {
			t.Errorf("%q: want %s, found %+v", block, code, findings)
		}
	}
}
