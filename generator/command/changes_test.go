package command

import (
	"bytes"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// published publishes a reference under an edition's name and returns the
// folder of the site and the edition's file.
func published(t *testing.T, dir, name string) (site, edition string) {
	t.Helper()
	site, edition = filepath.Join(dir, "public"), filepath.Join(dir, "materials", "editions", name+".json")
	if code, _, errs := run("publish", "--folder", dir, "--edition", name); code != 0 {
		t.Fatalf("exit %d: %s", code, errs)
	}
	return site, edition
}

// TestChangesOfThree: a folder, a site and an edition of the same reference
// say the same of another one. α from 3.9e-3 to 4.0e-3 /K moves R at 100 °C
// from 1.312 to 1.320, by 6097.56 ppm (by hand).
func TestChangesOfThree(t *testing.T) {
	old := yard(t)
	now := reference(t, map[string]string{"materials/sources.yaml": sources, "materials/copper.yaml": strings.Replace(copper, "3.9e-3", "4.0e-3", 1), "materials/tungsten.yaml": tungsten})
	site, edition := published(t, old, "2026-06")
	for _, from := range []string{old, site, edition} {
		code, out, errs := run("changes", from, now, "--format", "json")
		if code != 0 {
			t.Fatalf("%s: exit %d, %s", from, code, errs)
		}
		m := object(t, out)
		wantFields(t, m, "old new materials verdicts")
		list := m["materials"].([]any)
		first := list[0].(map[string]any)
		wantFields(t, first, "id change fields greatest_curve_difference")
		if first["id"] != "copper" || first["change"] != "changed" || list[1].(map[string]any)["change"] != "none" {
			t.Errorf("%s: %v", from, list)
		}
		field := first["fields"].([]any)[0].(map[string]any)
		wantFields(t, field, "path old new relative")
		if field["path"] != "data_sets.data.alpha" || field["old"] != 0.0039 || field["new"] != 0.004 || math.Abs(field["relative"].(float64)-1.0/39) > 1e-9 {
			t.Errorf("%s: %v", from, field)
		}
		g := first["greatest_curve_difference"].(map[string]any)
		wantFields(t, g, "quantity basis ppm at_C common_range_C")
		if math.Abs(g["ppm"].(float64)-6097.561) > 0.001 || g["at_C"] != 100.0 {
			t.Errorf("%s: %v", from, g)
		}
	}
	code, out, _ := run("changes", old, edition)
	if code != 0 || !strings.Contains(out, "no change of meaning") {
		t.Errorf("exit %d: %s", code, out)
	}
}

// TestEditionIsKept: an edition is written once, carried by the site, and
// told in the history of what changed since.
func TestEditionIsKept(t *testing.T) {
	dir := yard(t)
	site, edition := published(t, dir, "2026-06")
	first, err := os.ReadFile(edition)
	if err != nil {
		t.Fatal(err)
	}
	carried, _ := os.ReadFile(filepath.Join(site, "data", "editions", "2026-06.json"))
	if !bytes.Equal(first, carried) {
		t.Error("the site carries another statement than the edition")
	}
	write(t, filepath.Join(dir, "materials", "copper.yaml"), strings.Replace(copper, "3.9e-3", "4.0e-3", 1))
	before := tree(t, dir)
	code, out, errs := run("publish", "--folder", dir, "--edition", "2026-06")
	if code != 1 || out != "" || !strings.Contains(errs, "is there already") {
		t.Errorf("exit %d, %q, %q", code, out, errs)
	}
	for _, name := range []string{"../2026", "June 2026", "2026-06.json", strings.Repeat("1", 50)} {
		if code, _, errs := run("publish", "--folder", dir, "--edition", name); code != 2 || !strings.Contains(errs, "--edition takes") {
			t.Errorf("%q: exit %d, %q", name, code, errs)
		}
	}
	if tree(t, dir) != before {
		t.Error("something was written")
	}
	if code, _, errs := run("publish", "--folder", dir); code != 0 {
		t.Fatal(errs)
	}
	page, _ := os.ReadFile(filepath.Join(site, "material", "copper.html"))
	if !bytes.Contains(page, []byte("2.56\u202f%")) || !bytes.Contains(page, []byte("edition 2026-06")) {
		t.Error("the history does not tell the change")
	}
	if again, _ := os.ReadFile(edition); !bytes.Equal(first, again) {
		t.Error("the edition was altered")
	}
}

// TestBadStatements: a clear error, exit 1, nothing on stdout, nothing
// overwritten.
func TestBadStatements(t *testing.T) {
	dir := yard(t)
	_, edition := published(t, dir, "2026-06")
	text, err := os.ReadFile(edition)
	if err != nil {
		t.Fatal(err)
	}
	bad := t.TempDir()
	for _, c := range []struct{ name, text, says string }{
		{"cut.json", string(text[:len(text)/2]), "cut off or damaged"},
		{"flipped.json", strings.Replace(string(text), "0.0039", "0.0049", 1), "not as it was written"},
		{"newer.json", strings.Replace(string(text), `"format":1`, `"format":7`, 1), "format 7"},
		{"earlier.json", `{"title":"X","materials":[{"id":"x"}]}`, "no format number"},
		{"empty.json", "", "empty"},
		{"other.json", copper, "no statement"},
	} {
		file := filepath.Join(bad, c.name)
		write(t, file, c.text)
		code, out, errs := run("changes", file, dir)
		if code != 1 || out != "" || !strings.Contains(errs, c.says) || !strings.Contains(errs, c.name) {
			t.Errorf("%s: exit %d, %q, %q", c.name, code, out, errs)
		}
		// the same file among the editions stops a publication before anything is written
		kept := filepath.Join(dir, "materials", "editions", "2026-07.json")
		write(t, kept, c.text)
		before := tree(t, dir)
		code, _, errs = run("publish", "--folder", dir, "--edition", "2026-08")
		if code != 1 || !strings.Contains(errs, "edition-") || tree(t, dir) != before {
			t.Errorf("%s among the editions: exit %d, %q", c.name, code, errs)
		}
		os.Remove(kept)
	}
	if code, _, errs := run("changes", bad, dir); code != 1 || !strings.Contains(errs, "neither a reference") {
		t.Errorf("a folder of nothing: exit %d, %q", code, errs)
	}
	if code, _, errs := run("changes", filepath.Join(bad, "gone"), dir); code != 1 || !strings.Contains(errs, "there is no") {
		t.Errorf("a path that is not there: exit %d, %q", code, errs)
	}
	if code, _, _ := run("changes", dir); code != 2 {
		t.Errorf("one state alone: exit %d", code)
	}
	write(t, filepath.Join(dir, "materials", "tungsten.yaml"), "name: [x\n")
	if code, out, errs := run("changes", edition, dir); code != 1 || out != "" || !strings.Contains(errs, "nothing is compared") {
		t.Errorf("a record that cannot be read: exit %d, %q, %q", code, out, errs)
	}
}

func write(t *testing.T, file, text string) {
	t.Helper()
	if err := os.WriteFile(file, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
}

// tree is the names and texts of all files below a folder.
func tree(t *testing.T, dir string) string {
	t.Helper()
	var b strings.Builder
	err := filepath.WalkDir(dir, func(path string, d os.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		text, err := os.ReadFile(path)
		b.WriteString(path + "\n" + string(text))
		return err
	})
	if err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// TestToday: what is past by a given day is a warning, and without a day
// nothing is.
func TestToday(t *testing.T) {
	dir := reference(t, map[string]string{"materials/sources.yaml": sources, "materials/copper.yaml": copper +
		"declarations: [{substance: lead, greatest: <= 0.01 %, basis: per article, document: paper 1, date: 2026-01-01, expires: 2026-12-31}]\n"})
	for today, want := range map[string]bool{"2027-01-01": true, "2026-12-31": false} {
		code, out, _ := run("examine", "--folder", dir, "--today", today)
		if code != 0 || strings.Contains(out, "declaration-expired") != want {
			t.Errorf("%s: exit %d, %s", today, code, out)
		}
	}
	if _, out, _ := run("examine", "--folder", dir); strings.Contains(out, "declaration-expired") {
		t.Error("without a day something is past")
	}
}
