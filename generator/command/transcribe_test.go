package command

import (
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

const alloys = "Name,Resistivity [µΩ·cm],TCR ppm/°C,Density (g/cm3),Tref [°C],Valid range [°C]\r\n\"Copper, annealed\",1.7241,3930,8.89,20,0 to 100\r\nCuNi44,49,-80 to 40,about 8.9,20,20 to 100\r\n"

// house is a reference with one source, and a table in a folder with a long
// name that is not ASCII.
func house(t *testing.T, table string) (dir, file string) {
	dir = reference(t, map[string]string{"materials/sources.yaml": sources})
	file = filepath.Join(dir, strings.Repeat("länger und länger ", 8), strings.Repeat("Ω", 60), "Tabelle der Werkstoffe µ.csv")
	if err := os.MkdirAll(filepath.Dir(file), 0o755); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(file, []byte(table), 0o644); err != nil {
		t.Fatal(err)
	}
	return dir, file
}

func TestTranscribe(t *testing.T) {
	dir, file := house(t, "\ufeff"+alloys)
	code, out, errs := run("transcribe", file, "--source", "standard", "--folder", dir, "--try")
	if list, _ := os.ReadDir(filepath.Join(dir, "materials")); code != 0 || len(list) != 1 || !strings.Contains(out, "2 of 2 rows would become drafts") {
		t.Errorf("--try: exit %d, %d files, %q, %q", code, len(list), out, errs)
	}
	code, out, errs = run("transcribe", file, "--source", "standard", "--folder", dir)
	if code != 0 || out != "2 of 2 rows are drafts in materials/ now; go on with: ohmfolio examine\n" {
		t.Errorf("exit %d, %q, %q", code, out, errs)
	}
	if !strings.HasPrefix(errs, "The columns are read so") || !strings.Contains(errs, "  TCR ppm/°C: {is: alpha, unit: ppm/°C}\n") || !strings.Contains(errs, "Tabelle der Werkstoffe µ.csv:3:21: warning: density is kept as a comment") {
		t.Errorf("the mapping or the finding is missing: %q", errs)
	}
	if code, out, errs := run("examine", "--folder", dir); code != 0 || strings.Contains(out+errs, "error:") {
		t.Errorf("examine finds fault with the drafts: exit %d, %s%s", code, out, errs)
	}
	code, _, errs = run("publish", "--folder", dir)
	if code != 0 {
		t.Errorf("the drafts cannot be published: %s", errs)
	}
	page, err := os.ReadFile(filepath.Join(dir, "public", "material", "cuni44.html"))
	if err != nil || !strings.Contains(string(page), "draft") {
		t.Errorf("the page of a draft: %v", err)
	}
}

func TestTranscribeNeverOverwrites(t *testing.T) {
	dir, file := house(t, alloys)
	mine := filepath.Join(dir, "materials", "cuni44.yaml")
	if err := os.WriteFile(mine, []byte("name: mine\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	for _, args := range [][]string{{"--try"}, nil, nil} {
		code, out, errs := run(append([]string{"transcribe", file, "--source", "standard", "--folder", dir}, args...)...)
		if text, _ := os.ReadFile(mine); string(text) != "name: mine\n" {
			t.Fatalf("the record is overwritten: %q", text)
		}
		if code != 1 || out != "" || !strings.Contains(errs, ":3:1: error: materials/cuni44.yaml exists and is not overwritten [table-taken]") {
			t.Errorf("exit %d, %q, %q", code, out, errs)
		}
	}
}

func TestTranscribeRefusals(t *testing.T) {
	dir, file := house(t, alloys)
	bad := filepath.Join(dir, "bad.yaml")
	if err := os.WriteFile(bad, []byte("colums: {}\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	for want, args := range map[string][]string{
		"2 transcribe needs --source":      {file},
		"1 did you mean standard?":         {file, "--source", "standart"},
		"1 add it there first":             {file, "--source", "quite-another"},
		"1 the table cannot be read":       {file + "x", "--source", "standard"},
		"1 is a folder":                    {dir, "--source", "standard"},
		"1 bad.yaml:1:1":                   {file, "--source", "standard", "--columns", bad},
		"2 transcribe takes a CSV file":    {},
		"1 the file of columns cannot be ": {file, "--source", "standard", "--columns", bad + "x"},
	} {
		code, out, errs := run(append([]string{"transcribe", "--folder", dir}, args...)...)
		if fmt.Sprint(code) != want[:1] || out != "" || !strings.Contains(errs, want[2:]) {
			t.Errorf("%v: exit %d, %q, %q", args, code, out, errs)
		}
	}
	if list, _ := os.ReadDir(filepath.Join(dir, "materials")); len(list) != 1 {
		t.Errorf("something was written: %v", list)
	}
}
