package study

import (
	"math"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
)

// market has the metals of the check numbers (densities kg/m³ and ρ in µΩ·m:
// CuMn12Ni2 8400 and 0.43; CuNi44 8900, 0.49; NiCr80/20 8300, 1.09; FeCrAl 7100,
// 1.45; Cu 8890, 0.017241; aluminium of 61 %IACS, 2703), with offers.
func market(t testing.TB, name, block string) (*Outcome, []place.Finding) {
	t.Helper()
	record := func(name, rho, density, more string) []byte {
		return []byte("name: " + name + "\nsource: s\nbasis: resistance\nresistivity: " + rho + "\nreference_temperature: 20 °C\nalpha: 10 ppm/K\nvalid_range: -40 °C to 120 °C\nclass: specified\nstatus: released\n" + more +
			"properties: {density: {value: " + density + ", source: s}, emf_to_copper: {value: -1 µV/K, source: s}, service_temperature: {continuous: 140 °C, source: s}}\n")
	}
	lib := library.FromFiles(map[string][]byte{
		"content/reference.yaml": []byte("title: T\nexchange_rates: [{from: USD, to: EUR, rate: 0.9, date: 2026-10-01, source: invented}]\n"),
		"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: \"ISO 1\", edition: \"2020\", checked: original}\n"),
		"materials/cumn.yaml": record("CuMn12Ni2", "0.43 µΩ·m ± 5 %", "8400 kg/m³", "condition: annealed\nstock:\n  - {form: strip, thickness: 1 mm ± 3 %, width: 10 mm ± 0.5 %}\n  - {form: wire, diameter: 0.40 mm ± 2 %}\n"+
			"tcr_limits: [{measure: box, window: 20 °C to 60 °C, from: -10 ppm/K, to: 10 ppm/K, source: s}]\n"),
		"materials/cuni.yaml":   record("CuNi44", "0.49 µΩ·m", "8900 kg/m³", ""),
		"materials/nicr.yaml":   record("NiCr80/20", "1.09 µΩ·m", "8300 kg/m³", ""),
		"materials/fecral.yaml": record("FeCrAl", "1.45 µΩ·m", "7100 kg/m³", ""),
		"materials/cu.yaml":     record("Cu", "0.017241 µΩ·m", "8890 kg/m³", ""),
		"materials/al.yaml":     []byte("name: Al\nsource: s\nbasis: resistance\nconductivity: \"61 %IACS\"\nreference_temperature: 20 °C\nproperties: {density: {value: 2703 kg/m³, source: s}}\n"),
		"materials/bare.yaml":   []byte("name: Bare\nsource: s\nbasis: resistance\nresistivity: 0.4 µΩ·m\nreference_temperature: 20 °C\n"),
		"materials/offers.csv": []byte("material,supplier,form,size,price,currency,per,quantity,date,valid_until,metal_base,certificate,resistivity_tolerance,note\n" +
			"cumn,A,strip,1 mm x 10 mm,60,EUR,kg,10 kg,2026-10-01,2026-12-31,,,,\ncumn,B,strip,1 mm x 10 mm,50,USD,kg,10 kg,2026-10-01,2026-12-31,,,,\ncumn,C,strip,1 mm x 10 mm,1,EUR,kg,10 kg,,,,,,\n" +
			"cuni,A,wire,1 mm,0.30,EUR,m,10 kg,2026-10-01,2026-12-31,,,,\nnicr,A,wire,1 mm,20,EUR,kg,10 kg,2026-09-01,2026-10-10,,,,\nfecral,A,wire,1 mm,5,EUR,piece,10 kg,2026-10-01,,,,,\nfecral,B,wire,1 mm,5,SEK,kg,10 kg,2026-10-01,,,,,\n"),
		"content/reports/r.md": []byte("# R\n\n```study: " + name + "\n" + block + "\n```\n"),
	})
	if place.Count(lib.Findings, place.Error) > 0 {
		t.Fatal(lib.Findings)
	}
	return Run(lib, lib.Documents[0].Page.Studies[0])
}

func marketed(t testing.TB, name, block string) *Outcome {
	t.Helper()
	o, findings := market(t, name, block)
	if o == nil {
		t.Fatal(findings)
	}
	return o
}

// TestMassIndices: mass against CuMn12Ni2 for equal resistance (check numbers
// of the trade, printed to two or three digits).
func TestMassIndices(t *testing.T) {
	for held, want := range map[string]map[string]float64{
		"length":                 {"cumn": 1, "cuni": 1.21, "nicr": 2.51, "fecral": 2.85, "cu": 0.042},
		"cross-section":          {"cuni": 0.93, "nicr": 0.39, "fecral": 0.25, "cu": 26.4},
		"surface of round wire":  {"cuni": 1.11, "nicr": 1.35, "fecral": 1.27, "cu": 0.36},
		"strip of one thickness": {"cuni": 1.06, "nicr": 0.99, "fecral": 0.85, "cu": 1.06},
	} {
		o := marketed(t, "cost", "materials: [cumn, cuni, nicr, fecral, cu]\nbaseline: cumn\nheld: "+held+"\n")
		for id, index := range want {
			got := *of(o, id).Numbers["mass_index"].Value
			if math.Abs(got-index) > 0.0051 && math.Abs(got-index) > 0.003*index {
				t.Errorf("%s, %s held: %.4f, printed %v", id, held, got, index)
			}
		}
	}
	// Aluminium of 61 %IACS against copper at equal R and L: 0.50 of the mass, 1.64 of the section.
	o := marketed(t, "cost", "materials: [al]\nbaseline: cu\nheld: length\n")
	has(t, of(o, "al"), "mass_index", 0.50, 0.005)
	has(t, of(o, "al"), "area_index", 1.64, 0.002)
}

// TestOffersOnOneFooting: USD at the dated rate, metres through section and
// density; undated, expired, per piece and without a rate are listed, not ranked.
func TestOffersOnOneFooting(t *testing.T) {
	o := marketed(t, "cost", "materials: [cumn, cuni, nicr, fecral]\nbaseline: cumn\nheld: length\non: 2026-10-15\n")
	has(t, of(o, "cumn"), "price", 45, 1e-9) // 50 USD · 0.9
	perKg := 0.30 / (math.Pi / 4 * 1e-6 * 8900)
	has(t, of(o, "cuni"), "price", perKg, 1e-9)
	index := 8900 * 0.49 / (8400 * 0.43)
	has(t, of(o, "cuni"), "cost_index", index*perKg/45, 1e-9)
	has(t, of(o, "cuni"), "flip_price", 45/index, 1e-9)
	has(t, of(o, "cumn"), "flip_price", perKg*index, 1e-9)
	for _, id := range []string{"nicr", "fecral"} {
		if _, ok := of(o, id).Numbers["cost_index"]; ok {
			t.Errorf("%s is ranked without a usable offer", id)
		}
	}
	text := ""
	for _, row := range o.Tables[len(o.Tables)-1].Rows {
		text += strings.Join(row, "|") + "\n"
	}
	for _, why := range []string{"no: undated", "no: expired on 2026-10-10", "no: priced by the piece", "no: no rate from SEK"} {
		if !strings.Contains(text, why) {
			t.Errorf("%q is not told:\n%s", why, text)
		}
	}
	if m := of(marketed(t, "cost", "materials: [bare]\nbaseline: cumn\nheld: length\n"), "bare"); !strings.Contains(strings.Join(m.Reasons, ";"), "no density") {
		t.Errorf("bare: %v", m.Reasons)
	}
}

// TestSubstitute: R at the same geometry goes with ρ₂/ρ₁, the length that
// restores it with the inverse.
func TestSubstitute(t *testing.T) {
	part := "material: cumn\nby: [cuni]\nlength: 60 mm\nwidth: 20 mm\nthickness: 1 mm\nwindow: 0 °C to 100 °C\nterminal_difference: 2 K\ndrop: 50 mV\n"
	o := marketed(t, "substitute", part+"free: length\nrequire: {restored_dimension: 60 mm}\n")
	m := of(o, "cuni")
	has(t, m, "resistance_index", 0.49/0.43, 1e-9)
	has(t, m, "resistance", 0.49e-6*0.06/20e-6*1e3, 1e-9)
	has(t, m, "restored_dimension", 60*0.43/0.49, 1e-9)
	has(t, m, "mass", 60e-3*0.43/0.49*20e-6*8900*1e3, 1e-9)
	has(t, m, "emf_error", -40, 1e-9)
	has(t, m, "greatest_change", 800, 1e-9)
	has(t, of(marketed(t, "substitute", part+"free: width\n"), "cuni"), "restored_dimension", 20*0.49/0.43, 1e-9)
	round := strings.Replace(part, "width: 20 mm\nthickness: 1 mm", "diameter: 2 mm", 1)
	has(t, of(marketed(t, "substitute", round+"free: diameter\n"), "cuni"), "restored_dimension", 2*math.Sqrt(0.49/0.43), 1e-9)
	o = marketed(t, "substitute", part+"free: width\nrequire: {restored_dimension: 20.5 mm}\n")
	if of(o, "cumn").Verdict != Holds || of(o, "cuni").Verdict != CannotBeTold && of(o, "cuni").Verdict != Fails || !strings.Contains(strings.Join(o.Notes, " "), "loses what the design holds") {
		t.Errorf("%q %q %v", of(o, "cumn").Verdict, of(o, "cuni").Verdict, o.Notes)
	}
	_, findings := market(t, "substitute", part+"free: diameter\n")
	if len(findings) != 1 || findings[0].Code != "part-geometry" {
		t.Errorf("%v", findings)
	}
}

// TestOrder: the words are complete, gaps are shown as gaps, and the spread of
// Ω/m is that of the corners.
func TestOrder(t *testing.T) {
	o := marketed(t, "order", "material: cumn\nmethod: IEC 60468\nquantity: 25 kg\n")
	words := o.Tables[0].Rows[0][1]
	for _, part := range []string{"CuMn12Ni2, to ISO 1:2020", "annealed", "strip 1 mm ± 3 % × 10 mm ± 0.5 %", "resistivity at 20\u202f°C 0.43 µΩ·m ± 5 % (governs)", "box, from -10 ppm/K to 10 ppm/K over 20 °C to 60 °C", "certificate 3.1 to EN 10204", "25 kg", "IEC 60468"} {
		if !strings.Contains(words, part) {
			t.Errorf("%q is missing in %q", part, words)
		}
	}
	if strings.Contains(words, "filled in") {
		t.Errorf("a gap where the record states all: %q", words)
	}
	strip := o.Materials[0]
	if strip.Size != "strip 1 mm ± 3 % × 10 mm ± 0.5 %" {
		strip = o.Materials[1]
	}
	n := strip.Numbers["resistance_per_length"]
	if lo, hi := 0.043*0.95/(1.03*1.005), 0.043*1.05/(0.97*0.995); math.Abs(*n.Lower-lo) > 1e-9 || math.Abs(*n.Upper-hi) > 1e-9 {
		t.Errorf("Ω/m %v to %v, want %v to %v", *n.Lower, *n.Upper, lo, hi)
	}
	_, findings := market(t, "order", "material: cuni\n")
	if len(findings) != 1 || findings[0].Code != "stock-missing" {
		t.Errorf("%v", findings)
	}
}
