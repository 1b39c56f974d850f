package command

import (
	"bytes"
	"encoding/json"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// run runs the program as a stranger would and returns what it said.
func run(args ...string) (code int, stdout, stderr string) {
	var out, errs bytes.Buffer
	code = Run(args, &out, &errs)
	return code, out.String(), errs.String()
}

// reference writes files below a temporary folder.
func reference(t *testing.T, files map[string]string) string {
	t.Helper()
	dir := t.TempDir()
	for name, text := range files {
		file := filepath.Join(dir, filepath.FromSlash(name))
		if err := os.MkdirAll(filepath.Dir(file), 0o755); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(file, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	return dir
}

const sources = "standard: {kind: standard, title: A standard, number: X 1, checked: original}\n"

// copper is the smallest record of the README; 0.0039 /K is common practice.
const copper = "name: Copper\nresistivity: 1.7241 uohm cm\nalpha: 3.9e-3 /K\nbasis: resistance\nreference_temperature: 20 degC\nvalid_range: 0 degC to 100 degC\nsource: standard\n"

const tungsten = "name: Tungsten\nresistivity: 5.5 µΩ·cm\nalpha: 0.0044 /K\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 20 °C to 200 °C\nsource: standard\n"

func yard(t *testing.T) string {
	return reference(t, map[string]string{"materials/sources.yaml": sources, "materials/copper.yaml": copper, "materials/tungsten.yaml": tungsten})
}

// object decodes JSON of stdout.
func object(t *testing.T, text string) map[string]any {
	t.Helper()
	var m map[string]any
	if err := json.Unmarshal([]byte(text), &m); err != nil {
		t.Fatalf("%v in %q", err, text)
	}
	return m
}

// TestFactsOfTheTrade: common practice. Copper of 0.42 Ω at 20 °C has 0.55 Ω
// at 100 °C; a filament of 2.0 Ω at 20 °C has about 28 Ω at 3000 °C by the
// straight line, which is refused unless asked for and then marked.
func TestFactsOfTheTrade(t *testing.T) {
	dir := yard(t)
	code, out, _ := run("value", "copper", "resistance-ratio", "--at", "100 °C", "--folder", dir, "--format", "json")
	if v := object(t, out)["value"].(float64); code != 0 || math.Abs(0.42*v-0.55) > 0.005 {
		t.Errorf("copper: 0.42 Ω becomes %g Ω (exit %d)", 0.42*v, code)
	}
	code, out, errs := run("value", "tungsten", "resistance-ratio", "--at", "3000 °C", "--folder", dir, "--format", "json")
	if code != 1 || out != "" || !strings.Contains(errs, "outside the valid range") {
		t.Errorf("tungsten at 3000 °C: exit %d, %q, %q", code, out, errs)
	}
	code, out, _ = run("value", "tungsten", "resistance-ratio", "--at", "3000 °C", "--folder", dir, "--format", "json", "--extrapolate")
	m := object(t, out)
	if v := m["value"].(float64); code != 0 || math.Abs(2*v-28.2) > 0.1 || m["extrapolated"] != true || m["within_valid_range"] != false {
		t.Errorf("tungsten by the straight line: %g Ω, %v", 2*v, m)
	}
	_, out, _ = run("value", "tungsten", "resistance-ratio", "--at", "3000 °C", "--folder", dir, "--extrapolate")
	if !strings.Contains(out, "EXTRAPOLATED") {
		t.Errorf("the text does not mark it: %q", out)
	}
}

// TestContractFields: the names of value and tcr are a contract.
func TestContractFields(t *testing.T) {
	dir := yard(t)
	_, out, _ := run("value", "copper", "resistivity", "--at", "50 °C", "--folder", dir, "--format", "json")
	wantFields(t, object(t, out), "material data quantity temperature_C reference_C value unit limits uncertainty within_valid_range extrapolated valid_range_C basis class condition checked source status revision fingerprint")
	_, out, _ = run("tcr", "copper", "--window", "0 °C to 100 °C", "--folder", dir, "--format", "json")
	m := object(t, out)
	wantFields(t, m, "material data basis reference_C window_C slope_ppm_per_K chord_ppm_per_K box_ppm_per_K change turning_points limits source status revision fingerprint")
	wantFields(t, m["slope_ppm_per_K"].(map[string]any), "at_reference min max")
	wantFields(t, m["chord_ppm_per_K"].(map[string]any), "cold hot")
	wantFields(t, m["change"].(map[string]any), "min_ppm min_at_C max_ppm max_at_C greatest_ppm greatest_at_C")
	if m["chord_ppm_per_K"].(map[string]any)["hot"].(float64) != 3900 {
		t.Errorf("the hot chord of a straight line is its α: %v", m)
	}
	_, out, _ = run("examine", "--folder", dir, "--format", "json")
	m = object(t, out)
	wantFields(t, m, "findings counts")
	wantFields(t, m["findings"].([]any)[0].(map[string]any), "code severity file line column message mend")
}

func wantFields(t *testing.T, m map[string]any, names string) {
	t.Helper()
	for _, n := range strings.Fields(names) {
		if _, ok := m[n]; !ok {
			t.Errorf("the field %s is missing", n)
		}
	}
}

// TestMistakes: exit code, silence on stdout, and words that say what to do.
func TestMistakes(t *testing.T) {
	dir := yard(t)
	for _, c := range []struct {
		args string
		code int
		says string
	}{
		{"value coper resistivity --at 20degC", 1, "did you mean copper"},
		{"value copper resistivity --at 20", 2, "no unit"},
		{"value copper resistivity --at 20,5degC", 2, "decimal point"},
		{"value copper resistivity", 2, "--at"},
		{"value copper resistance --at 20degC", 2, "takes resistivity, conductivity, resistance-ratio"},
		{"value copper", 2, "a material and a quantity"},
		{"value copper resistivity --at 20degC --unit furlong", 1, "furlong"},
		{"value copper conductivity --at 25degC --unit %IACS", 1, "20 °C"},
		{"value copper resistivity --at 150degC", 1, "0 °C to 100 °C"},
		{"value copper resistivity --at 20degC --data other", 1, "no data set"},
		{"value copper resistivity --att 20degC", 2, "--help"},
		{"tcr copper", 2, "--window"},
		{"tcr copper --window 20degC", 2, "is no range"},
		{"tcr copper --window 100degC_to_0degC", 2, "lower temperature first"},
		{"examine nickel", 1, "no material"},
		{"examine --format xml", 2, "text, json, sarif"},
		{"examine --today tomorrow", 2, "2026"},
		{"pubish", 2, "pubish"},
	} {
		args := strings.Fields(c.args)
		for i := range args {
			args[i] = strings.ReplaceAll(args[i], "_", " ")
		}
		code, out, errs := run(append(args, "--folder", dir)...)
		errs = strings.ReplaceAll(errs, "\u202f", " ")
		if code != c.code || !strings.Contains(errs, c.says) || (out != "" && !strings.HasPrefix(c.args, "examine")) {
			t.Errorf("%s: exit %d (want %d), stdout %q, stderr %q", c.args, code, c.code, out, errs)
		}
	}
	code, _, errs := run("publish", "--folder", t.TempDir())
	if code != 1 || !strings.Contains(errs, "materials") {
		t.Errorf("an empty folder: exit %d, %q", code, errs)
	}
}

// TestNegativeTemperatures work as values of flags.
func TestNegativeTemperatures(t *testing.T) {
	dir := reference(t, map[string]string{"materials/sources.yaml": sources,
		"materials/copper.yaml": strings.Replace(copper, "0 degC to 100 degC", "-60 degC to 100 degC", 1)})
	for _, at := range [][]string{{"--at", "-40 °C"}, {"--at", "-40degC"}, {"--at=-40 °C"}, {"--at", "−40 °C"}} {
		code, out, errs := run(append([]string{"value", "copper", "resistivity", "--folder", dir, "--format", "json"}, at...)...)
		if code != 0 || object(t, out)["temperature_C"].(float64) != -40 {
			t.Errorf("%v: exit %d, %q %q", at, code, out, errs)
		}
	}
	if code, _, errs := run("tcr", "copper", "--folder", dir, "--window", "-40 °C to 85 °C", "--reference", "-10 °C"); code != 0 {
		t.Errorf("a window below zero: exit %d, %q", code, errs)
	}
}

// TestPublishWritesNothingInError: an existing site stays as it was.
func TestPublishWritesNothingInError(t *testing.T) {
	dir := yard(t)
	if code, out, errs := run("publish", "--folder", dir); code != 0 || !strings.HasPrefix(out, "2 materials, ") || !strings.Contains(out, "public/index.html") {
		t.Fatalf("exit %d, %q, %q", code, out, errs)
	}
	before := snapshot(t, filepath.Join(dir, "public"))
	os.WriteFile(filepath.Join(dir, "materials", "copper.yaml"), []byte(strings.Replace(copper, "resistivity", "resistvity", 1)), 0o644)
	report := filepath.Join(t.TempDir(), "report.json")
	code, out, errs := run("publish", "--folder", dir, "--report", report)
	if code != 1 || out != "" || !strings.Contains(errs, "nothing is written") || !strings.Contains(errs, "did you mean resistivity?") {
		t.Errorf("exit %d, %q, %q", code, out, errs)
	}
	if after := snapshot(t, filepath.Join(dir, "public")); len(after) != len(before) {
		t.Error("the old site was touched")
	} else {
		for name, text := range before {
			if after[name] != text {
				t.Errorf("%s was touched", name)
			}
		}
	}
	text, err := os.ReadFile(report)
	if err != nil {
		t.Fatal(err)
	}
	wantFields(t, object(t, string(text)), "written pages files bytes seconds findings failing")
}

func snapshot(t *testing.T, dir string) map[string]string {
	t.Helper()
	files := map[string]string{}
	err := filepath.WalkDir(dir, func(path string, d os.DirEntry, err error) error {
		if err == nil && !d.IsDir() {
			text, err := os.ReadFile(path)
			files[path] = string(text)
			return err
		}
		return err
	})
	if err != nil {
		t.Fatal(err)
	}
	return files
}

// TestBindingStudy: a binding study that does not hold exits with 1, and the
// site is written with its verdict all the same.
func TestBindingStudy(t *testing.T) {
	signed := copper + "class: specified\ncondition: annealed\nstatus: released\nrevision: 1\nsign_off: {author: a, reviewer: b, date: 2026-01-01, reason: r, due: 2028-01-01}\n"
	block := "# R\n\n```study: compare\nmaterials: [copper]\nwindow: 0 °C to 100 °C\nbinding: yes\nrequire: {greatest_change: 1 %}\n```\n"
	dir := reference(t, map[string]string{"materials/sources.yaml": sources, "materials/copper.yaml": signed, "content/reports/r.md": block})
	code, out, errs := run("publish", "--folder", dir)
	if code != 1 || out != "" || !strings.Contains(errs, "fails") {
		t.Errorf("exit %d, %q, %q", code, out, errs)
	}
	page, err := os.ReadFile(filepath.Join(dir, "public", "report", "r.html"))
	if err != nil || !strings.Contains(string(page), "FAILS") {
		t.Errorf("the page does not carry the verdict: %v", err)
	}
}

// TestBrokenDecisionNamesTheRecord: a decision that held at the last
// publication and fails now says which record changed.
func TestBrokenDecisionNamesTheRecord(t *testing.T) {
	signed := strings.Replace(copper, "alpha: 3.9e-3 /K", "alpha: 3.93e-3 /K ± 0.01e-3 /K", 1) +
		"class: specified\ncondition: annealed\nstatus: released\nrevision: 1\nsign_off: {author: a, reviewer: b, date: 2026-01-01, reason: r, due: 2028-01-01}\n"
	block := "# R\n\n```study: compare\nmaterials: [copper]\nwindow: 0 °C to 100 °C\nbinding: yes\nrequire: {greatest_change: 32 %}\n```\n"
	dir := reference(t, map[string]string{"materials/sources.yaml": sources, "materials/copper.yaml": signed, "content/reports/r.md": block})
	if code, _, errs := run("publish", "--folder", dir); code != 0 {
		t.Fatalf("exit %d, %q", code, errs)
	}
	os.WriteFile(filepath.Join(dir, "materials", "copper.yaml"), []byte(strings.Replace(signed, "3.93e-3 /K ±", "4.26e-3 /K ±", 1)), 0o644)
	report := filepath.Join(t.TempDir(), "report.json")
	code, out, errs := run("publish", "--folder", dir, "--report", report)
	if code != 1 || out != "" || !strings.Contains(errs, "held before copper changed") {
		t.Errorf("exit %d, %q, %q", code, out, errs)
	}
	text, _ := os.ReadFile(report)
	if !strings.Contains(string(text), `"changed": [`) || !strings.Contains(string(text), `"copper"`) {
		t.Errorf("report %s", text)
	}
}

// TestStudyFile runs one study without a site; its places are those of the
// file, and a binding study that does not hold exits with 1.
func TestStudyFile(t *testing.T) {
	dir := yard(t)
	file := filepath.Join(t.TempDir(), "s.yaml")
	try := func(text string, more ...string) (int, string, string) {
		os.WriteFile(file, []byte(text), 0o644)
		return run(append([]string{"study", file, "--folder", dir}, more...)...)
	}
	good := "# a question\nstudy: compare\nmaterials: [copper]\nwindow: 0 °C to 100 °C\nrequire: {greatest_change: 50 %}\n"
	code, out, errs := try(good, "--format", "json")
	if code != 0 {
		t.Fatalf("exit %d, %q", code, errs)
	}
	o := object(t, out)
	wantFields(t, o, "study title parameters materials ranking cautions")
	wantFields(t, o["materials"].([]any)[0].(map[string]any), "material verdict reasons requirements numbers tables warnings evidence")
	if code, out, _ := try(good); code != 0 || !strings.Contains(out, "greatest change") || !strings.Contains(out, "not an approval") {
		t.Errorf("as text: exit %d, %q", code, out)
	}
	for text, want := range map[string]string{
		"materials: [copper]\nwindow: 0 °C to 100 °C\n":              "names no study",
		strings.Replace(good, "compare", "compere", 1):               "did you mean compare?",
		strings.Replace(good, "[copper]", "[coper]", 1):              ":3:13:",
		strings.Replace(good, "0 °C to 100 °C", "100 °C to 0 °C", 1): ":4:9:",
	} {
		if code, out, errs := try(text); code != 1 || out != "" || !strings.Contains(errs, want) {
			t.Errorf("%q: exit %d, %q, %q", text, code, out, errs)
		}
	}
	if code, out, errs := try(strings.Replace(good, "50 %", "1 %", 1) + "binding: yes\n"); code != 1 || !strings.Contains(errs, "does not hold") {
		t.Errorf("binding: exit %d, %q %q", code, out, errs)
	}
	if code, _, errs := run("study", filepath.Join(dir, "none.yaml"), "--folder", dir); code != 1 || errs == "" {
		t.Errorf("no file: exit %d, %q", code, errs)
	}
}

// TestHelp: every command has a form and an example of its own.
func TestHelp(t *testing.T) {
	for _, c := range []string{"publish", "examine", "value", "tcr", "fit", "study", "export"} {
		code, out, _ := run(c, "--help")
		if code != 0 || !strings.Contains(out, "Example:") || !strings.Contains(out, "ohmfolio "+c) {
			t.Errorf("help of %s: exit %d\n%s", c, code, out)
		}
	}
}
