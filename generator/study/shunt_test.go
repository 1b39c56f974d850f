package study

import (
	"math"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
)

// bench has the alloys of the check numbers: copper-manganese-nickel of
// 43 µΩ·cm with the parabola of +10 ppm/K and −0.5 ppm/K², and copper-nickel
// of −40 µV/K. Typical textbook values; not a reference.
func bench(t testing.TB, name, block string) (*Outcome, []place.Finding) {
	t.Helper()
	lib := library.FromFiles(map[string][]byte{
		"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: N, checked: original}\n"),
		"materials/cumnni.yaml": []byte("name: CuMnNi\nsource: s\nbasis: resistance\nresistivity: 43 µΩ·cm ± 10 %\nreference_temperature: 20 °C\nalpha: 10 ppm/K\nbeta: -0.5 ppm/K²\nvalid_range: -55 °C to 125 °C\nstatus: released\n" +
			"properties: {thermal_conductivity: {value: 22 W/(m·K), source: s}, emf_to_copper: {value: -1 µV/K, source: s}, density: {value: 8.4 g/cm³, source: s}, specific_heat: {value: 410 J/(kg·K), source: s}, service_temperature: {accuracy: 80 °C, source: s}}\n" +
			"declarations: [{substance: lead, limit: 0.1 %, greatest: <= 0.005 %, basis: per homogeneous material, document: works declaration, date: 2026-01-01}]\n" +
			"stock:\n  - {form: strip, thickness: 1 mm, width: 200 mm}\n"),
		"materials/cuni.yaml": []byte("name: CuNi\nsource: s\nbasis: resistance\nresistivity: 49 µΩ·cm\nreference_temperature: 20 °C\nalpha: 5 ppm/K\nvalid_range: -55 °C to 125 °C\n" +
			"properties: {emf_to_copper: {value: -40 µV/K, source: s}}\n"),
		"materials/early.yaml": []byte("name: Early\nsource: s\nbasis: resistance\nresistivity: 49 µΩ·cm\nreference_temperature: 20 °C\nalpha: 1 ppm/K\nvalid_range: 0 °C to 60 °C\nstatus: released\n"),
		"content/reports/r.md": []byte("# R\n\n```study: " + name + "\n" + block + "\n```\n"),
	})
	if place.Count(lib.Findings, place.Error) > 0 {
		t.Fatal(lib.Findings)
	}
	return Run(lib, lib.Documents[0].Page.Studies[0])
}

func benched(t testing.TB, name, block string) *Outcome {
	t.Helper()
	o, findings := bench(t, name, block)
	if o == nil {
		t.Fatal(findings)
	}
	return o
}

func has(t *testing.T, m MaterialOutcome, name string, want, relative float64) {
	t.Helper()
	n, ok := m.Numbers[name]
	if !ok || n.Value == nil || math.Abs(*n.Value-want) > relative*math.Abs(want) {
		t.Errorf("%s of %s: %+v, want %v; reasons %v", name, m.Material, n, want, m.Reasons)
	}
}

const shunt200 = "materials: [cumnni]\ncurrent: 200 A\ndrop: 50 mV\nthickness: 1 mm\nlength: 20 mm\nambient: -40 °C to 60 °C\ncalibrated_at: 20 °C\n"

// TestShuntOfTheCheckNumbers: 200 A, 50 mV, 0.43 µΩ·m, 1.0 mm, 20 mm (job,
// check numbers): 250 µΩ, 34.4 mm, 10 W, 5.81 A/mm², 0.706 W/cm² with the edges;
// 33 K at 50 mV above the ends, their mean two thirds of it.
func TestShuntOfTheCheckNumbers(t *testing.T) {
	m := benched(t, "shunt", shunt200+"ends: 60 °C\n").Materials[0]
	has(t, m, "resistance", 250, 1e-9)
	has(t, m, "width", 34.4, 1e-9)
	has(t, m, "squares", 20/34.4, 1e-9)
	has(t, m, "power", 10, 1e-9)
	has(t, m, "current_density", 5.81, 1e-3)
	has(t, m, "surface_load", 0.706, 1e-3)
	// The drop at the hot element is smaller by 336 ppm and more, ρ too.
	has(t, m, "rise_end_cooled_max", 33.03, 2e-3)
	has(t, m, "element_temperature", 60+2.0/3*33.03, 1e-3)
	has(t, m, "terminal_temperature", 60, 1e-9)
	w := m.Numbers["width"]
	if math.Abs(*w.Lower-34.4*0.9) > 1e-6 || math.Abs(*w.Upper-34.4*1.1) > 1e-6 || w.Kind != "limits" {
		t.Errorf("width over ρ ± 10 %%: %+v", w)
	}
	if !strings.Contains(strings.Join(m.Warnings, ";"), "39.3\u202fppm/K") {
		t.Errorf("nothing is said of copper between the taps: %v", m.Warnings)
	}
}

// TestShuntChange: the parabola from 20 °C at −40, 105 °C (job: −2400 and
// −2762.5 ppm), without own heat because no cooling is given.
func TestShuntChange(t *testing.T) {
	m := benched(t, "shunt", strings.Replace(shunt200, "60 °C", "105 °C", 1)).Materials[0]
	has(t, m, "greatest_change", -2762.5, 1e-9)
	has(t, m, "change_cold", -2400, 1e-9)
	has(t, m, "change_hot", -2762.5, 1e-9)
	if _, ok := m.Numbers["element_temperature"]; ok || !strings.Contains(strings.Join(m.Reasons, ";"), "no cooling") {
		t.Errorf("an element temperature without cooling: %v", m.Reasons)
	}
}

// TestCopperShare: 2 % copper adds 79 ppm/K, 10 % adds 393 (job D6; 0.00393 at
// 20 °C); copper allowed for a budget e over ΔT is e/(α ΔT).
func TestCopperShare(t *testing.T) {
	for share, add := range map[string]float64{"2 %": 78.6 - 0.02*10, "10 %": 393 - 0.1*10} {
		m := benched(t, "shunt", shunt200+"copper_share: "+share+"\n").Materials[0]
		has(t, m, "alpha_effective", 10+add, 1e-9)
	}
	m := benched(t, "shunt", strings.Replace(shunt200, "[cumnni]", "[cuni]", 1)+"copper_share: 1 %\nrequire: {greatest_change: 0.5 %}\n").Materials[0]
	// α 5 ppm/K alone: over 60 K below the calibration 0.5 % is 83.33 ppm/K: f = 78.33/3925
	has(t, m, "copper_share_max", 100*(83.3333333-5)/(3930-5), 1e-6)
}

// TestThermalEMF: −40 µV/K and 5 K are 200 µV: 0.4 % of 50 mV and 4 % at a tenth
// of the current; 1 µV/K is 5 µV, 0.01 % (job D7).
func TestThermalEMF(t *testing.T) {
	o := benched(t, "shunt", strings.Replace(shunt200, "[cumnni]", "[cumnni, cuni]", 1)+"terminal_difference: 5 K\nsmallest_current: 20 A\n")
	has(t, of(o, "cuni"), "emf_error_full", -4000, 1e-9)
	has(t, of(o, "cuni"), "emf_error_small", -40000, 1e-9)
	has(t, of(o, "cumnni"), "emf_error_full", -100, 1e-9)
	if !strings.Contains(strings.Join(of(o, "cuni").Warnings, ";"), "above 5") || strings.Contains(strings.Join(of(o, "cumnni").Warnings, ";"), "above 5") {
		t.Error("the warning of 5 µV/K is not where it belongs")
	}
}

// TestTrimAim: ± 10 % ρ, ± 3 % thickness, ± 0.5 % width: corners 0.869 and
// 1.140, so aim at 0.877 of the target (job D9).
func TestTrimAim(t *testing.T) {
	m := benched(t, "shunt", strings.Replace(shunt200, "1 mm", "1 mm ± 3 %", 1)+"width_tolerance: 0.5 %\n").Materials[0]
	r := m.Numbers["resistance"]
	if math.Abs(*r.Lower/250-0.869) > 6e-4 || math.Abs(*r.Upper/250-1.140) > 6e-4 {
		t.Errorf("corners %v and %v", *r.Lower/250, *r.Upper/250)
	}
	has(t, m, "trim_aim", 0.877*250, 1e-3)
}

// TestFault: ΔT = J²ρτ/(δc), recomputed by hand.
func TestFault(t *testing.T) {
	m := benched(t, "shunt", shunt200+"peak_current: 2 kA\npeak_time: 100 ms\n").Materials[0]
	j := 2000 / (34.4e-3 * 1e-3)
	has(t, m, "rise_adiabatic", j*j*0.43e-6*0.1/(8400*410), 1e-9)
}

// TestHeatBalance: T = ambient + I²R(T)θ; a metal of large α runs away where
// I²R₀αθ ≥ 1.
func TestHeatBalance(t *testing.T) {
	m := benched(t, "shunt", shunt200+"thermal_resistance: 2 K/W\n").Materials[0]
	at := *m.Numbers["element_temperature"].Value
	tau := at - 20
	if balance := 60 + 10*(1+10e-6*tau-0.5e-6*tau*tau)*2; math.Abs(at-balance) > 1e-9 {
		t.Errorf("element at %v, the balance gives %v", at, balance)
	}
	m = benched(t, "shunt", shunt200+"thermal_resistance: 9 K/W\n").Materials[0]
	if _, ok := m.Numbers["element_temperature"]; ok || !strings.Contains(strings.Join(m.Reasons, ";"), "no balance") {
		t.Errorf("no balance is not told: %v", m.Reasons)
	}
	// Two thirds of the current that heats by ΔT heats by 0.444 of it (job).
	m = benched(t, "shunt", shunt200+"thermal_resistance: 2 K/W\n").Materials[0]
	derated := *m.Numbers["derated_current"].Value
	if r := 250e-6 * (1 + 10e-6*60 - 0.5e-6*3600); math.Abs(derated-math.Sqrt(20/(2*r))) > 1e-6 {
		t.Errorf("derated to %v", derated)
	}
}

// TestBudget by hand: tolerance 0.02 %, drift 0.05 %, EMF 1 µV/K × 2 K over
// 50 mV, offset 5 µV, change −2400 … +50 ppm from 20 °C.
func TestBudget(t *testing.T) {
	m := benched(t, "shunt", shunt200+"tolerance: 0.02 %\ndrift: 0.05 %\nterminal_difference: 2 K\noffset: 5 µV\nsmallest_current: 2 A\n").Materials[0]
	has(t, m, "budget_worst", 200+500+40+100+2400, 1e-9)
	has(t, m, "budget_rss", 2400+math.Sqrt(200*200+500*500+40*40+100*100), 1e-9)
	if len(m.Tables) != 1 {
		t.Fatal("no table of terms")
	}
	text := ""
	for _, row := range m.Tables[0].Rows {
		text += strings.Join(row, "|") + "\n"
	}
	if !strings.Contains(text, "temperature, with own heat, drift, calibration") || !strings.Contains(text, "±4000") {
		t.Errorf("terms:\n%s", text)
	}
}

func TestShuntVerdicts(t *testing.T) {
	for require, want := range map[string]Verdict{
		"{greatest_change: 2400 ppm}":             HoldsNominally,
		"{greatest_change: 2399.9 ppm}":           Fails,
		"{width: 37.84 mm}":                       Holds,
		"{width: 37.83 mm}":                       CannotBeTold,
		"{width: 30.9 mm}":                        Fails,
		"{width: \">= 30.96 mm\"}":                Holds,
		"{width: \">= 37.85 mm\"}":                Fails,
		"{element_temperature: 80 °C}":            CannotBeTold,
		"{width: 10 mm, surface_load: 0.1 W/cm²}": Fails,
		"{power: 10 W, squares: 1}":               Holds,
		"{rise_adiabatic: 100 K}":                 CannotBeTold,
		"{resistance: 220 µΩ to 280 µΩ}":          Holds,
		"{current_density: 5 A/mm²}":              Fails,
	} {
		m := benched(t, "shunt", shunt200+"require: "+require+"\n").Materials[0]
		if m.Verdict != want {
			t.Errorf("%s: %q, want %q (%+v)", require, m.Verdict, want, m.Requirements)
		}
		if strings.Contains(require, "0.1 W/cm²") && !strings.Contains(strings.Join(m.Reasons, ";"), "contradict") {
			t.Errorf("the pair that contradicts is not named: %v", m.Reasons)
		}
	}
	o := benched(t, "shunt", shunt200+"require: {surface_load: 0.5 W/cm²}\n")
	if text := strings.Join(o.Notes, " "); !strings.Contains(text, "No material") || !strings.Contains(text, "length near") {
		t.Errorf("no solution is not said: %s", text)
	}
}

func TestBadShunts(t *testing.T) {
	for change, code := range map[[2]string]string{
		{"200 A", "-200 A"}:                            "value-not-positive",
		{"drop: 50 mV", "resistance: 50 mV"}:           "unit-of-another-kind",
		{"drop: 50 mV\n", ""}:                          "shunt-geometry",
		{"length: 20 mm\n", ""}:                        "shunt-geometry",
		{"-40 °C to 60 °C", "60 °C to -40 °C"}:         "window-inverted",
		{"thickness: 1 mm", "thickness: [1 mm, 0 mm]"}: "value-not-positive",
		{"cumnni", "cumni"}:                            "study-material-unknown",
	} {
		o, findings := bench(t, "shunt", strings.Replace(shunt200, change[0], change[1], 1))
		if o != nil || len(findings) == 0 || findings[0].Code != code || findings[0].Position.Line < 3 {
			t.Errorf("%v: %v", change, findings)
		}
	}
}

func TestChoose(t *testing.T) {
	o := benched(t, "choose", "window: -40 °C to 85 °C\ncalibrated_at: 20 °C\nrequire: {greatest_change: 0.3 %, emf_to_copper: 5 µV/K}\nstatus: any\n")
	if v := of(o, "cumnni").Verdict; v != HoldsNominally {
		t.Errorf("cumnni %q", v)
	}
	if m := of(o, "cuni"); m.Verdict != Fails || !strings.Contains(strings.Join(m.Reasons, ";"), "emf to copper fails") {
		t.Errorf("cuni %q %v", m.Verdict, m.Reasons)
	}
	if m := of(o, "early"); m.Partly == "" || m.Verdict != CannotBeTold {
		t.Errorf("early %+v", m)
	}
	has(t, of(o, "cumnni"), "margin", 20, 1e-6) // −2400 ppm of 3000 ppm
	if strings.Join(o.Ranking, ",") != "cumnni" || len(o.Tables) != 3 {
		t.Errorf("ranking %v, %d tables", o.Ranking, len(o.Tables))
	}
	o = benched(t, "choose", "window: 0 °C to 60 °C\nform: strip\nthickness: 0.5 mm to 1 mm\nrequire: {greatest_change: 0.3 %}\n")
	if m := of(o, "cuni"); m.Verdict != Fails || !strings.Contains(strings.Join(m.Reasons, ";"), "not released") {
		t.Errorf("a draft is chosen: %q %v", m.Verdict, m.Reasons)
	}
	if m := of(o, "early"); m.Verdict != CannotBeTold {
		t.Errorf("no stock is recorded, and the verdict is %q", m.Verdict)
	}
	o = benched(t, "choose", "window: -40 °C to 85 °C\nrequire: {greatest_change: 1 ppm}\n")
	if !strings.Contains(strings.Join(o.Notes, " "), "No record holds") {
		t.Errorf("notes %v", o.Notes)
	}
	o = benched(t, "choose", "window: -40 °C to 85 °C\nstatus: any\nrequire: {greatest_change: 0.3 %, resistivity: \">= 45 µΩ·cm\"}\n")
	if text := strings.Join(o.Notes, " "); strings.Contains(text, "contradict") {
		t.Errorf("CuNi meets both, and the notes say %s", text)
	}
	o = benched(t, "choose", "window: -40 °C to 85 °C\nstatus: any\nrequire: {emf_to_copper: 5 µV/K, resistivity: \">= 45 µΩ·cm\"}\n")
	if text := strings.Join(o.Notes, " "); !strings.Contains(text, "“emf to copper” and “resistivity” contradict") {
		t.Errorf("the pair is not named: %s", text)
	}
	o = benched(t, "choose", "window: 0 °C to 60 °C\ndeclared: [Lead, cadmium]\n")
	if m := of(o, "cumnni"); m.Verdict != CannotBeTold || !strings.Contains(strings.Join(m.Reasons, ";"), "no declaration of cadmium") || strings.Contains(strings.Join(m.Reasons, ";"), "no declaration of Lead") {
		t.Errorf("declared: %q %v", m.Verdict, m.Reasons)
	}
	_, findings := bench(t, "choose", "families: [resistance aloys]\nwindow: 0 °C to 60 °C\n")
	if len(findings) != 1 || findings[0].Code != "family-unknown" {
		t.Errorf("%v", findings)
	}
}
