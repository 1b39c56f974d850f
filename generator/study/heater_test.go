package study

import (
	"encoding/csv"
	"fmt"
	"math"
	"os"
	"strconv"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
)

// workshop has the alloys of the worked examples: a textbook wire of constant
// resistivity at several values, NiCr8020 with the factors of GB/T 1234, wire
// in stock.
func workshop(fence, block string) *library.Library {
	head := "name: X\nsource: s\nbasis: resistance\nreference_temperature: 20 °C\n"
	constant := func(rho string) []byte {
		return []byte(head + "resistivity: " + rho + "\nalpha: 0 ppm/K\nvalid_range: 0 °C to 1300 °C\nproperties: {density: {value: 8.4 g/cm³, source: s}, service_temperature: {continuous: 1200 °C, source: s}}\n")
	}
	stocked := head + "resistivity: 1.08 ± 0.05 Ω·mm²/m\ntable: {temperature: °C, resistance_ratio: 1, interpolate: linear, rows: [[20, 1], [500, 1.026], [1100, 1.021], [1200, 1.025]]}\nvalid_range: 20 °C to 1200 °C\n"
	return library.FromFiles(map[string][]byte{
		"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: N, checked: original}\n"),
		"materials/nicr109.yaml": constant("109e-8 Ω·m"),
		"materials/nicr102.yaml": constant("1.016e-6 Ω·m"),
		"materials/low.yaml":     constant("0.424 µΩ·m"),
		"materials/bar.yaml":     []byte(head + "resistivity: 1.0803 Ω·mm²/m\ntable: {temperature: °C, resistance_ratio: 1, interpolate: linear, rows: [[20, 1], [1100, 1.071]]}\nvalid_range: 20 °C to 1100 °C\nstock: [{form: wire, diameter: 0.417 mm, resistance: 7.91 Ω/m}]\n"),
		"materials/stocked.yaml": []byte(stocked + "stock: [{form: wire, diameter: 0.40 mm ± 0.008 mm}, {form: wire, diameter: 0.50 mm ± 0.010 mm}, {form: wire, diameter: 0.80 mm ± 0.015 mm}]\n"),
		"materials/limited.yaml": []byte(head + "resistivity: 1.1 µΩ·m ± 4 %\nalpha: 100 ppm/K ± 10 ppm/K\nvalid_range: 20 °C to 220 °C\nproperties: {density: {value: 8 g/cm³ ± 1 %, source: s}}\n"),
		"materials/point.yaml":   []byte(head + "resistivity: 1.1 µΩ·m\n"),
		"content/reports/r.md":   []byte("# R\n\n```study: " + fence + "\n" + block + "\n```\n"),
	})
}

func studied(t *testing.T, fence, block string) (*Outcome, []place.Finding) {
	t.Helper()
	lib := workshop(fence, block)
	if place.Count(lib.Findings, place.Error) > 0 {
		t.Fatal(lib.Findings)
	}
	return Run(lib, lib.Documents[0].Page.Studies[0])
}

// told runs a study that must work and gives its first answer.
func told(t *testing.T, fence, block string) MaterialOutcome {
	t.Helper()
	o, findings := studied(t, fence, block)
	if o == nil {
		t.Fatalf("%s: %v", block, findings)
	}
	return o.Materials[0]
}

// near holds numbers against expectations within a relative tolerance.
func near(t *testing.T, what string, m MaterialOutcome, tolerance float64, want map[string]float64) {
	t.Helper()
	for name, x := range want {
		n, ok := m.Numbers[name]
		if !ok || n.Value == nil || math.Abs(*n.Value-x) > tolerance*math.Abs(x) {
			t.Errorf("%s: %s is %v, want %g within %g; %v", what, name, show(n.Value), x, tolerance, m.Reasons)
		}
	}
}

func show(x *float64) string {
	if x == nil {
		return "not told"
	}
	return fmt.Sprint(*x)
}

// TestHeaterExamples holds the study against the published examples WE12,
// WE20, WE21, WE23, WE24 and WE27 (worked_examples.csv, each with its source
// there) and job.md part 4. The books take σ = 5.72e-8 and 0 °C = 273 K where
// the study takes CODATA and 273.15 K, which moves l by +0.6 % and d by 0.3 %.
func TestHeaterExamples(t *testing.T) {
	const printed = 0.005
	for _, c := range []struct {
		what, block string
		tolerance   float64
		want        map[string]float64
	}{
		{"WE12, 40 Ω of 0.4 mm (KAPOOR)", "materials: [nicr109]\nvoltage: 40 V\npower: 40 W\nelement_temperature: 20 °C\ndiameter: 0.4 mm", printed,
			map[string]float64{"resistance_hot": 40, "length": 5.027 / 1.09}}, // the book has ρ = 100e-8
		{"WE20 (THAREJA)", "materials: [nicr109]\nvoltage: 220 V\npower: 16 kW\nelement_temperature: 1170 °C\nradiation: {efficiency: 0.57, emissivity: 0.9, charge: 500 °C}\nstock: no", 0.01,
			map[string]float64{"length": 16.07, "diameter": 2.72, "surface_load": 11.675, "element_temperature": 1170}},
		{"WE21 (THAREJA), edges ignored", "materials: [nicr102]\nvoltage: 400 V\npower: 30 kW\nconnection: star\nelement_temperature: 1100 °C\nradiation: {efficiency: 0.5, emissivity: 0.9, charge: 700 °C}\nshape: strip\nthickness: 0.254 mm\nedges: no\nstock: no", 0.01,
			map[string]float64{"width": 7.4, "length": 9.87, "resistance_hot": 5.3333}},
		{"WE21, second part: the charge is cold", "materials: [nicr102]\nvoltage: 400 V\npower: 30 kW\nconnection: star\nradiation: {efficiency: 0.5, emissivity: 0.9, charge: 20 °C}\nshape: strip\nthickness: 0.254 mm\nwidth: 7.404 mm\nlength: 9.87 m\nedges: no", 0.005,
			map[string]float64{"element_temperature": 1005}},
		{"WE23 (CHAKRABARTI), edges ignored", "materials: [nicr102]\nvoltage: 220 V\npower: 15 kW\nelement_temperature: 1000 °C\nradiation: {efficiency: 0.6, emissivity: 0.9, charge: 600 °C}\nshape: strip\nthickness: 0.25 mm\nedges: no\nstock: no", 0.01,
			map[string]float64{"width": 12.23, "length": 9.7}},
		{"WE24 (SCRIBD_HEAT), slip of 1.9 % in the page", "materials: [low]\nvoltage: 250 V\npower: 1 kW\nelement_temperature: 1000 °C\nradiation: {efficiency: 1, emissivity: 0.9, charge: 20 °C}\nstock: no", 0.02,
			map[string]float64{"diameter": 0.272, "surface_load": 13.5}},
		{"WE24, recomputed", "materials: [low]\nvoltage: 250 V\npower: 1 kW\nelement_temperature: 1000 °C\nradiation: {efficiency: 1, emissivity: 0.9, charge: 20 °C}\nstock: no", 0.005,
			map[string]float64{"diameter": 0.2735, "length": 8.662}},
		{"WE27 and job.md part 4 (PAGE_BAR): 9 m asked, 0.417 mm taken", "materials: [bar]\nvoltage: 240 V\npower: 750 W\nelement_temperature: 1100 °C\nlength: 9 m", 0.001,
			map[string]float64{"resistance_hot": 76.8, "resistance_cold": 71.709, "temperature_factor": 1.071, "length": 9.066, "surface_load": 6.32, "diameter": 0.417, "resistance_per_length": 7.91}},
		{"WE27: 7.968 Ω/m for 9 m", "materials: [bar]\nvoltage: 240 V\npower: 750 W\nelement_temperature: 1100 °C\nlength: 9 m\nstock: no", 0.001,
			map[string]float64{"resistance_per_length": 7.968, "length": 9}},
	} {
		near(t, c.what, told(t, "heater", c.block), c.tolerance, c.want)
	}
}

// TestHeaterTextbookConstants takes out the books' σ and 273 K: flux scales
// with σ, d with q^(−1/3), l with q^(−2/3). What is left must agree with the
// recomputed column of WE20 (2.715 mm, 16.067 m) within its digits.
func TestHeaterTextbookConstants(t *testing.T) {
	m := told(t, "heater", "materials: [nicr109]\nvoltage: 220 V\npower: 16 kW\nsurface_load: 11.675 W/cm²\nelement_temperature: 1170 °C\nstock: no")
	near(t, "WE20 by its own load", m, 2e-4, map[string]float64{"diameter": 2.715, "length": 16.067})
	m = told(t, "heater", "materials: [low]\nvoltage: 250 V\npower: 1 kW\nsurface_load: 134342 W/m²\nelement_temperature: 1000 °C\nstock: no")
	near(t, "WE24 by its own load, recomputed", m, 2e-4, map[string]float64{"diameter": 0.2735, "length": 8.662})
	near(t, "WE24 by its own load, as printed", m, 0.02, map[string]float64{"diameter": 0.272, "length": 8.5})
}

// TestStripFactor: t = K_t·X with the published K_t of WE26 (PAGE_STRIP), edges counted.
func TestStripFactor(t *testing.T) {
	x := math.Cbrt(10e3 * 10e3 * 1.09 / (1.05 * 220 * 220)) // mm, with ω in W/cm² and ρ in Ω·mm²/m
	for n, kt := range map[int]float64{5: 0.119, 8: 0.0886, 10: 0.0769, 12: 0.0684, 15: 0.0593} {
		m := told(t, "heater", "materials: [nicr109]\nvoltage: 220 V\npower: 10 kW\nelement_temperature: 1100 °C\nsurface_load: 1.05 W/cm²\nshape: strip\nwidth_to_thickness: "+strconv.Itoa(n)+"\nstock: no")
		near(t, fmt.Sprint("WE26 n = ", n), m, 0.006, map[string]float64{"thickness": kt * x, "width": float64(n) * kt * x})
	}
}

// TestHeaterFactors: the factor that the study takes is that of the published
// C_t table (ct_factors.csv, GB/T 1234), for every grade and temperature.
func TestHeaterFactors(t *testing.T) {
	file, err := os.Open("testdata/ct_factors.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer file.Close()
	rows, err := csv.NewReader(file).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	checked := 0
	for _, row := range rows[1:] {
		var pairs []string
		last := ""
		for i, head := range rows[0] {
			if c, ok := strings.CutPrefix(head, "Ct_"); ok && row[i] != "" {
				pairs, last = append(pairs, "["+c+", "+row[i]+"]"), c
			}
		}
		for i, head := range rows[0] {
			c, ok := strings.CutPrefix(head, "Ct_")
			if !ok || row[i] == "" || c == "20" {
				continue
			}
			want, _ := strconv.ParseFloat(row[i], 64)
			lib := library.FromFiles(map[string][]byte{
				"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: N}\n"),
				"materials/x.yaml":       []byte("name: X\nsource: s\nbasis: resistance\nreference_temperature: 20 °C\nresistivity: 1.1 µΩ·m\ntable: {temperature: °C, resistance_ratio: 1, interpolate: linear, rows: [" + strings.Join(pairs, ", ") + "]}\nvalid_range: 20 °C to " + last + " °C\n"),
				"content/reports/r.md":   []byte("# R\n\n```study: heater\nmaterials: [x]\nvoltage: 240 V\npower: 750 W\nelement_temperature: " + c + " °C\ndiameter: 0.4 mm\n```\n"),
			})
			o, findings := Run(lib, lib.Documents[0].Page.Studies[0])
			if o == nil {
				t.Fatal(findings)
			}
			near(t, row[1]+" at "+c, o.Materials[0], 1e-9, map[string]float64{"temperature_factor": want, "resistance_hot": 76.8, "resistance_cold": 76.8 / want})
			checked++
		}
	}
	if checked < 80 {
		t.Errorf("only %d factors", checked)
	}
}

// TestHeaterStockAndBands: 230 V ± 10 % on a wire of ± 5 %. Supply ± 10 % alone
// is +21/−19 % of power (job.md, heater).
func TestHeaterStockAndBands(t *testing.T) {
	m := told(t, "heater", "materials: [limited]\nvoltage: 230 V ± 10 %\npower: 1 kW\nelement_temperature: 220 °C\ndiameter: 0.5 mm\nresistance_tolerance: ± 5 %")
	// R(220 °C)/R20 = 1.02 ± 0.002, R per metre ± 5 %
	near(t, "bands", m, 1e-9, map[string]float64{
		"power_max": 1000 * 1.21 / (0.95 * 1.018 / 1.02), "power_min": 1000 * 0.81 / (1.05 * 1.022 / 1.02), "power": 1000,
		"inrush_current": 253 / (52.9 / 1.02 * 0.95)})
	only := told(t, "heater", "materials: [nicr109]\nvoltage: 230 V ± 10 %\npower: 1 kW\nelement_temperature: 900 °C\ndiameter: 0.5 mm")
	near(t, "supply alone", only, 1e-9, map[string]float64{"power_max": 1210, "power_min": 810})
	if only.Numbers["power_max"].Kind != "nominal" {
		t.Errorf("a resistivity without limits makes no band: %s", only.Numbers["power_max"].Kind)
	}
	for _, c := range []struct {
		load string
		want float64
	}{{"5 W/cm²", 0.5}, {"2 W/cm²", 0.8}, {"0.1 W/cm²", 0.8}, {"100 W/cm²", 0.4}} {
		m := told(t, "heater", "materials: [stocked]\nvoltage: 240 V\npower: 750 W\nelement_temperature: 900 °C\nsurface_load: "+c.load)
		near(t, c.load, m, 1e-9, map[string]float64{"diameter": c.want})
		above := strings.Contains(strings.Join(m.Warnings, "; "), "is above the")
		if above != (c.load == "0.1 W/cm²") {
			t.Errorf("%s: %v", c.load, m.Warnings)
		}
	}
}

// TestHeaterStockTooLarge at both sides of half the load asked.
func TestHeaterStockTooLarge(t *testing.T) {
	base := "materials: [stocked]\nvoltage: 240 V\npower: 750 W\nelement_temperature: 900 °C\nsurface_load: "
	q := *told(t, "heater", base+"2 W/cm²").Numbers["surface_load"].Value
	for factor, warned := range map[float64]bool{1.99: false, 2.01: true} {
		m := told(t, "heater", base+fmt.Sprintf("%.9f W/cm²", factor*q))
		near(t, "still 0.8 mm", m, 1e-9, map[string]float64{"diameter": 0.8})
		if got := strings.Contains(strings.Join(m.Warnings, "; "), "would do"); got != warned {
			t.Errorf("%g: %v", factor, m.Warnings)
		}
	}
}

// TestHeaterConnections: the same power; what one element and one line get.
func TestHeaterConnections(t *testing.T) {
	for connection, want := range map[string][2]float64{ // R of one element, line current cold
		"connection: single":              {160000. / 12000, 30},
		"connection: star":                {160000. / 12000, 12000 / 400 / math.Sqrt(3)},
		"connection: delta":               {3 * 160000. / 12000, 12000 / 400 / math.Sqrt(3)},
		"connection: series\nelements: 4": {160000. / 12000 / 4, 30},
	} {
		m := told(t, "heater", "materials: [nicr109]\nvoltage: 400 V\npower: 12 kW\nelement_temperature: 900 °C\ndiameter: 2 mm\n"+connection)
		near(t, connection, m, 1e-9, map[string]float64{"resistance_hot": want[0], "inrush_current": want[1], "power": 12000})
	}
}

// TestHeaterLeads: 100 mm at each end, doubled: 100 mm of resistance, 400 mm of wire.
func TestHeaterLeads(t *testing.T) {
	m := told(t, "heater", "materials: [nicr109]\nvoltage: 240 V\npower: 750 W\nelement_temperature: 900 °C\ndiameter: 0.5 mm\nlead_ins: {length: 100 mm, strands: 2}")
	perMetre := 1.09e-6 / (math.Pi / 4 * 0.25e-6)
	near(t, "leads", m, 1e-9, map[string]float64{"resistance_hot": 76.8, "length": 76.8/perMetre - 0.1, "wire_length": 76.8/perMetre + 0.3,
		"mass": 8400e3 * math.Pi / 4 * 0.25e-6 * (76.8/perMetre + 0.3)})
}

func TestHeaterConvection(t *testing.T) {
	m := told(t, "heater", "materials: [limited]\nvoltage: 48 V\npower: 100 W\nsurface_load: 0.6 W/cm²\nconvection: {coefficient: 60 W/(m²·K), ambient: 20 °C}\nstock: no")
	near(t, "q/h above ambient", m, 1e-6, map[string]float64{"element_temperature": 120, "surface_load": 0.6, "temperature_factor": 1.01})
}

// TestHeaterHotterThanAsked: at h = 60 W/(m²·K) and ambient 20 °C a load of
// 0.6 W/cm² makes 120 °C.
func TestHeaterHotterThanAsked(t *testing.T) {
	for asked, warned := range map[string]bool{"119 °C": true, "119.6 °C": false, "130 °C": false} {
		m := told(t, "heater", "materials: [nicr109]\nvoltage: 48 V\npower: 100 W\nelement_temperature: "+asked+"\nconvection: {coefficient: 60 W/(m²·K), ambient: 20 °C}\ndiameter: 0.683677 mm\nstock: no")
		if got := *m.Numbers["element_temperature"].Value; math.Abs(got-120) > 0.05 {
			t.Errorf("the element has %g °C", got)
		}
		if got := strings.Contains(strings.Join(m.Warnings, "; "), " asked"); got != warned {
			t.Errorf("%s: %v", asked, m.Warnings)
		}
	}
}

// TestHeaterVerdicts at both sides of every threshold.
func TestHeaterVerdicts(t *testing.T) {
	for _, c := range []struct {
		id, require string
		want        Verdict
	}{
		{"limited", "power_max: <= 1277 W", Holds}, // 1276.2 W, as computed above
		{"limited", "power_max: <= 1276 W", Fails}, // the greatest power is its own worst case
		{"limited", "power_min: '>= 769 W'", Holds},
		{"limited", "power_min: '>= 770 W'", Fails},
		{"limited", "power: 900 W to 1100 W", CannotBeTold},
		{"limited", "service_margin: '>= 0 K'", CannotBeTold}, // none recorded
		{"nicr109", "service_margin: '>= 980 K'", Holds},
		{"nicr109", "service_margin: '>= 981 K'", Fails},
		{"nicr109", "power_max: <= 1211 W", HoldsNominally}, // R(T)/R has no limits
		{"stocked", "power_max: <= 1300 W", HoldsNominally},
		{"point", "power_max: <= 1300 W", CannotBeTold},
	} {
		block := "materials: [" + c.id + "]\nvoltage: 230 V ± 10 %\npower: 1 kW\nelement_temperature: 220 °C\ndiameter: 0.5 mm\nresistance_tolerance: ± 5 %\nrequire: {" + c.require + "}"
		if c.id == "nicr109" {
			block = strings.Replace(block, "± 5 %\nrequire", "0 %\nrequire", 1)
		}
		if m := told(t, "heater", block); m.Verdict != c.want {
			t.Errorf("%s, %s: %q, want %q; %+v %v", c.id, c.require, m.Verdict, c.want, m.Requirements, m.Reasons)
		}
	}
}

// TestHeaterMissing: what is not known is said.
func TestHeaterMissing(t *testing.T) {
	base := "\nvoltage: 230 V\npower: 1 kW\n"
	for block, want := range map[string]string{
		"materials: [limited]" + base + "element_temperature: 221 °C\ndiameter: 0.5 mm":                                         "221 °C lies outside the valid range 20 °C to 220 °C",
		"materials: [point]" + base + "element_temperature: 200 °C\ndiameter: 0.5 mm":                                           "no coefficient",
		"materials: [stocked]" + base + "element_temperature: 200 °C\ndiameter: 0.5 mm":                                         "no density",
		"materials: [limited]" + base + "element_temperature: 200 °C\ndiameter: 0.5 mm":                                         "no service temperature",
		"materials: [limited]" + base + "element_temperature: 200 °C\ndiameter: 0.5 mm\nstart: 0 °C":                            "0 °C lies outside",
		"materials: [limited]" + base + "diameter: 0.1 mm\nconvection: {coefficient: 60 W/(m²·K), ambient: 20 °C}":              "hotter than 220 °C",
		"materials: [nicr109]" + base + "element_temperature: 900 °C\ndiameter: 0.1 mm\nlead_ins: {length: 10 m}":               "the lead-ins alone",
		"materials: [nicr109]" + base + "element_temperature: 1301 °C\nradiation: {efficiency: 1, emissivity: 1, charge: 0 °C}": "1301 °C lies outside",
		"materials: [limited]" + base + "surface_load: 500 W/cm²\nradiation: {efficiency: 1, emissivity: 1, charge: 20 °C}":     "outside the valid range",
	} {
		o, findings := studied(t, "heater", block)
		if o == nil {
			t.Errorf("%s: %v", block, findings)
			continue
		}
		if reasons := strings.ReplaceAll(strings.Join(o.Materials[0].Reasons, "; "), "\u202f", " "); !strings.Contains(reasons, want) {
			t.Errorf("%s: %q, want %q", block, reasons, want)
		}
	}
}

func TestBadHeaters(t *testing.T) {
	base := "materials: [nicr109]\nvoltage: 230 V\npower: 1 kW\nelement_temperature: 900 °C\n"
	refused(t, "heater", map[string]string{
		"materials: [nicr109]\nvoltage: -230 V\npower: 1 kW\nelement_temperature: 900 °C\ndiameter: 1 mm": "value-not-positive",
		"materials: [nicr109]\nvoltage: 230 W\npower: 1 kW\nelement_temperature: 900 °C\ndiameter: 1 mm":  "unit-of-another-kind",
		"materials: [nicr109]\nvoltage: 230 V\npower: 1 kW\ndiameter: 1 mm":                               "parameter-missing",
		base: "parameter-missing",
		base + "shape: strip\nsurface_load: 1 W/cm²":                                         "parameter-missing",
		base + "shape: strip\nwidth: 1 mm\nsurface_load: 1 W/cm²":                            "parameter-missing",
		base + "thickness: 1 mm\nsurface_load: 1 W/cm²":                                      "parameters-contradict",
		base + "shape: strip\ndiameter: 1 mm":                                                "parameters-contradict",
		base + "shape: strip\nthickness: 1 mm\nwidth: 2 mm\nwidth_to_thickness: 2":           "parameters-contradict",
		base + "diameter: 1 mm\nelements: 3":                                                 "parameters-contradict",
		base + "diameter: 1 mm\nconnection: series":                                          "parameter-missing",
		base + "diameter: 1 mm\nconnection: series\nelements: 1":                             "parameter-out-of-bounds",
		base + "diameter: 1 mm\nradiation: {efficiency: 0, emissivity: 0.9, charge: 20 °C}":  "parameter-out-of-bounds",
		base + "diameter: 1 mm\nradiation: {efficiency: 1, emissivity: 0.9, charge: 950 °C}": "parameter-out-of-bounds",
		base + "diameter: 1 mm\nconvection: {coefficient: 0 W/(m²·K), ambient: 20 °C}":       "value-not-positive",
		base + "diameter: 1 mm\nlead_ins: {length: 1 m, strands: 0}":                         "parameter-out-of-bounds",
		base + "diameter: 0 mm":                                                              "value-not-positive",
		base + "diameter: 1 mm\nbuild: toaster":                                              "word-unknown",
		base + "diameter: 1 mm\nrequire: {power_most: 1 W}":                                  "key-unknown",
	})
}

// refused wants a first finding of each code, with its place in the file.
func refused(t *testing.T, fence string, blocks map[string]string) {
	t.Helper()
	for block, code := range blocks {
		o, findings := studied(t, fence, block)
		if o != nil || len(findings) == 0 || findings[0].Code != code || findings[0].Position.File != "content/reports/r.md" || findings[0].Position.Line < 3 {
			t.Errorf("%q: want %s, found %+v", block, code, findings)
		}
	}
}

// TestBuilds holds the ranges of surface load against surface_load_guidance.csv
// (PAGE_BAR, maker guidance: common practice).
func TestBuilds(t *testing.T) {
	text, err := os.ReadFile("testdata/surface_load_guidance.csv")
	if err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(strings.NewReader(string(text))).ReadAll()
	if err != nil || len(rows)-1 != len(buildList) {
		t.Fatalf("%v, %d rows, %d builds", err, len(rows)-1, len(buildList))
	}
	names := map[string]string{"SL01": "spiral in free air", "SL02": "pencil bar", "SL04": "toaster, on mica", "SL05": "convector spiral",
		"SL07": "fan heater spiral", "SL08": "oven, sheathed", "SL10": "hotplate, sheathed", "SL11": "water, sheathed"}
	for _, row := range rows[1:] {
		low, _ := strconv.ParseFloat(row[3], 64)
		high, _ := strconv.ParseFloat(row[4], 64)
		b, ok := findBuild(names[row[0]])
		if !ok || b.low != low*1e4 || b.high != high*1e4 {
			t.Errorf("%v against %+v", row, b)
		}
	}
	for load, outside := range map[string]bool{"3.49 W/cm²": true, "3.51 W/cm²": false, "4.49 W/cm²": false, "4.51 W/cm²": true} {
		m := told(t, "heater", "materials: [nicr109]\nvoltage: 230 V\npower: 1 kW\nelement_temperature: 600 °C\nbuild: convector spiral\nstock: no\nsurface_load: "+load)
		if got := strings.Contains(strings.Join(m.Warnings, "; "), "common practice"); got != outside {
			t.Errorf("%s: %v", load, m.Warnings)
		}
	}
}
