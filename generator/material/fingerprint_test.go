package material

import (
	"strings"
	"testing"

	"ohmfolio/generator/place"
)

const stated = `name: Copper, annealed
family: standard conductors
status: released
revision: 3
sign_off: {author: a desk, reviewer: b desk, date: 2026-05-04, reason: r, due: 2028-05-04}
source: {id: s, where: table 1}
class: specified
condition: annealed
basis: resistance
resistivity: 1.7241 µΩ·cm ± 0.5 %
alpha: 3.93e-3 /K
reference_temperature: 20 °C
valid_range: 0 °C to 100 °C
properties:
  density: {value: 8.89 g/cm³, at: 20 °C, source: s}
notes: A remark.
`

func print(t *testing.T, text string) string {
	t.Helper()
	r, findings := Read("x", place.NewSource("materials/x.yaml", []byte(text)), nil)
	if place.Count(findings, place.Error) > 0 {
		t.Fatalf("%v in\n%s", findings, text)
	}
	return r.Fingerprint
}

// TestFingerprintKeeps: spelling, order, comments and who signed change nothing.
func TestFingerprintKeeps(t *testing.T) {
	want := print(t, stated)
	lines := strings.SplitAfter(stated, "\n")
	reordered := strings.Join(append(append([]string{}, lines[8:13]...), append(append([]string{}, lines[:8]...), lines[13:]...)...), "")
	for name, text := range map[string]string{
		"comment":      "# a comment\n" + stated,
		"order":        reordered,
		"CRLF":         strings.ReplaceAll(stated, "\n", "\r\n"),
		"ASCII":        strings.NewReplacer("µΩ·cm ± 0.5 %", "uohm cm +/- 0.5 %", "20 °C", "20 degC").Replace(stated),
		"block":        strings.Replace(stated, "source: {id: s, where: table 1}", "source:\n  id: s\n  where: 'table  1'", 1),
		"short source": strings.Replace(stated, "at: 20 °C, source: s}", "at: 20 °C, source: {id: s}}", 1),
		"sign-off":     strings.Replace(stated, "revision: 3", "revision: 4", 1),
		"due":          strings.Replace(stated, "2028-05-04", "2029-05-04", 1),
	} {
		if got := print(t, text); got != want {
			t.Errorf("%s: %s, was %s", name, got, want)
		}
	}
}

// TestFingerprintAlters: any change of a stated value alters it.
func TestFingerprintAlters(t *testing.T) {
	was := print(t, stated)
	for _, change := range [][2]string{
		{"Copper, annealed", "Copper, annealed wire"}, {"standard conductors", "conductor alloys"}, {"table 1", "table 2"}, {"specified", "typical"},
		{"condition: annealed", "condition: hard drawn"}, {"basis: resistance", "basis: resistivity"}, {"1.7241", "1.7242"}, {"0.5 %", "0.6 %"}, {"3.93e-3", "3.94e-3"},
		{"3.93e-3", "3.930e-3"}, {"reference_temperature: 20", "reference_temperature: 25"}, {"to 100 °C", "to 101 °C"}, {"8.89", "8.9"}, {"A remark", "Another remark"}, {"at: 20 °C", "at: 21 °C"},
	} {
		text := strings.Replace(stated, change[0], change[1], 1)
		if text == stated || print(t, text) == was {
			t.Errorf("%q → %q leaves the fingerprint", change[0], change[1])
		}
	}
}
