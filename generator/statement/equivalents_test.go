package statement

import (
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
)

// TestEquivalents: by hand, 44/43 is +2.33 %, and 1 + 20e-6·80 over
// 1 + 10e-6·80 is 1.00079936, so 799.4 ppm at 100 °C.
func TestEquivalents(t *testing.T) {
	record := func(rho, alpha, density string) string {
		return "name: X\nsource: s\nbasis: resistance\nresistivity: " + rho + " µΩ·cm\nalpha: " + alpha + " ppm/K\nreference_temperature: 20 °C\nvalid_range: 0 °C to 100 °C\n" +
			"properties:\n  density: {value: " + density + " g/cm³, source: s}\n"
	}
	lib := library.FromFiles(map[string][]byte{
		"materials/sources.yaml": []byte("s: {kind: standard, title: A standard, number: X 1, checked: original}\n"),
		"materials/a.yaml": []byte(record("43.0", "10", "8.4") + "equivalents:\n  - {designation: B, record: b, verdict: near, use: shunts, sign_off: {author: a desk, reviewer: b desk, date: 2026-05-04}}\n" +
			"  - {designation: C, system: EN, verdict: same, use: wire}\n" +
			"declarations: [{substance: lead, number: 7439, limit: 0.1 %, greatest: 0.09 to 0.11 %, basis: per article, document: d, date: 2026-01-01}]\n"),
		"materials/b.yaml": []byte(record("44.0", "20", "8.9")),
	})
	if place.Count(lib.Findings, place.Error) > 0 {
		t.Fatal(lib.Findings)
	}
	s := Of(lib, lib.Material("a"))
	if len(s.Equivalents) != 2 || len(s.Equivalents[1].Differences) != 0 || s.Equivalents[1].By != "not signed off" || s.Equivalents[0].By != "a desk, b desk" || s.Equivalents[0].Date != "2026-05-04" {
		t.Fatalf("%+v", s.Equivalents)
	}
	told := strings.ReplaceAll(strings.Join(s.Equivalents[0].Differences, "\n"), "\u202f", " ")
	for _, want := range []string{"43.0 µΩ·cm here, 44.0 µΩ·cm there, +2.33 %", "10.0 here, 20.0 there", "up to 799 ppm apart, at 100 °C, over 0 °C to 100 °C", "density: 8.4 g/cm³ here, 8.9 g/cm³ there, +5.95 %"} {
		if !strings.Contains(told, want) {
			t.Errorf("%q is not told:\n%s", want, told)
		}
	}
	if d := s.Declarations[0]; !d.Above || d.Substance != "lead (7439)" {
		t.Errorf("%+v", d)
	}
}
