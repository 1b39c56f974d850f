package study

import (
	"fmt"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
)

// thousand is a library of 1,000 heater alloys with 13 rows of factors, limits
// on ρ, stock, density, and one study over all of them.
func thousand(b *testing.B, fence, block string) *library.Library {
	files := map[string][]byte{"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: N}\n")}
	var ids []string
	for i := range 1000 {
		id := fmt.Sprintf("alloy-%03d", i)
		ids = append(ids, id)
		var rows []string
		for k := range 13 {
			rows = append(rows, fmt.Sprintf("[%d, %.4f]", max(20, 100*k), 1+0.004*float64(k)+1e-5*float64(i*k)))
		}
		files["materials/"+id+".yaml"] = []byte("name: X\nsource: s\nbasis: resistance\nreference_temperature: 20 °C\nresistivity: 1.08 ± 0.05 Ω·mm²/m\n" +
			"table: {temperature: °C, resistance_ratio: 1, interpolate: linear, rows: [" + strings.Join(rows, ", ") + "]}\nvalid_range: 20 °C to 1200 °C\n" +
			"properties: {density: {value: 8.4 g/cm³, source: s}}\nstock: [{form: wire, diameter: 0.4 mm ± 0.008 mm}, {form: wire, diameter: 0.5 mm ± 0.01 mm}]\n")
	}
	block = strings.ReplaceAll(block, "ALL", strings.Join(ids, ", "))
	if strings.Contains(block, "PARTS") {
		var parts []string
		for _, id := range ids {
			parts = append(parts, "{material: "+id+", resistance: 1 Ω}")
		}
		block = strings.ReplaceAll(block, "PARTS", strings.Join(parts, ", "))
	}
	files["content/reports/r.md"] = []byte("# R\n\n```study: " + fence + "\n" + block + "\n```\n")
	lib := library.FromFiles(files)
	if place.Count(lib.Findings, place.Error) > 0 {
		b.Fatal(lib.Findings)
	}
	return lib
}

// BenchmarkHeat: every study of this room over 1,000 materials; the aim is under 50 ms.
func BenchmarkHeat(b *testing.B) {
	for _, c := range []struct{ name, fence, block string }{
		{"heater by load", "heater", "materials: [ALL]\nvoltage: 230 V ± 10 %\npower: 750 W\nelement_temperature: 900 °C\nsurface_load: 4 W/cm²"},
		{"heater by radiation", "heater", "materials: [ALL]\nvoltage: 230 V ± 10 %\npower: 750 W\nsurface_load: 4 W/cm²\nradiation: {efficiency: 0.6, emissivity: 0.9, charge: 200 °C}"},
		{"heater by length", "heater", "materials: [ALL]\nvoltage: 230 V ± 10 %\npower: 750 W\nlength: 9 m\nradiation: {efficiency: 0.6, emissivity: 0.9, charge: 200 °C}"},
		{"winding", "winding", "materials: [ALL]\nlength: 100 m\ndiameter: 0.5 mm ± 0.005 mm\ncold_resistance: 80 Ω\ncold_temperature: 20 °C\nhot_resistance: 81 Ω\ncoolant: 23 °C"},
		{"winding by cooling", "winding", "materials: [ALL]\ncold_resistance: 3.6 Ω\ncold_temperature: 20 °C\ncoolant: 20 °C\n" + readingsOf(0.0002)},
		{"series", "series", "parts: [PARTS]\nwindow: 20 °C to 900 °C"},
	} {
		b.Run(c.name, func(b *testing.B) {
			lib := thousand(b, c.fence, c.block)
			if o, findings := Run(lib, lib.Documents[0].Page.Studies[0]); o == nil {
				b.Fatal(findings)
			}
			for b.Loop() {
				Run(lib, lib.Documents[0].Page.Studies[0])
			}
		})
	}
}
