package command

import (
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"ohmfolio/generator/start"
)

// TestStart: a new reference has no findings but notes, publishes, and is
// refused a second time; the folder's name is long and not ASCII.
func TestStart(t *testing.T) {
	dir := filepath.Join(t.TempDir(), strings.Repeat("länger ", 20), "Werkstoffe Ω")
	code, out, errs := run("start", dir)
	shown := `"` + filepath.ToSlash(dir) + `"`
	if code != 0 || !strings.Contains(out, "ohmfolio examine --folder "+shown+"\n  ohmfolio publish --folder "+shown+"\n") {
		t.Fatalf("exit %d, %q, %q", code, out, errs)
	}
	if code, out, errs := run("examine", "--folder", dir); code != 0 || strings.Contains(out+errs, "error:") || strings.Contains(out+errs, "warning:") {
		t.Errorf("examine: exit %d, %s%s", code, out, errs)
	}
	if code, out, errs := run("publish", "--folder", dir); code != 0 || !strings.HasPrefix(out, "3 materials, ") {
		t.Errorf("publish: exit %d, %q, %q", code, out, errs)
	}
	report, err := os.ReadFile(filepath.Join(dir, "public", "report", "copper-or-resistance-alloy.html"))
	for _, verdict := range []string{"FAILS", "holds on nominal values", "holds"} {
		if err != nil || !strings.Contains(string(report), verdict) {
			t.Errorf("the report shows no %s: %v", verdict, err)
		}
	}
	before := everything(t, dir)
	code, out, errs = run("start", dir)
	if code != 1 || out != "" || !strings.Contains(errs, "is not empty") {
		t.Errorf("a second start: exit %d, %q, %q", code, out, errs)
	}
	if everything(t, dir) != before {
		t.Error("a second start changed something")
	}
}

func TestStartRefusals(t *testing.T) {
	dir := t.TempDir()
	file := filepath.Join(dir, "file")
	if err := os.WriteFile(file, []byte("mine"), 0o644); err != nil {
		t.Fatal(err)
	}
	for _, target := range []string{dir, file} {
		if code, out, errs := run("start", target); code != 1 || out != "" || !strings.Contains(errs, "a new reference needs a new or an empty folder") {
			t.Errorf("%s: exit %d, %q, %q", target, code, out, errs)
		}
	}
	if got := everything(t, dir); got != "file mine\n" {
		t.Errorf("the folder holds %q", got)
	}
	if code, _, _ := run("start"); code != 2 {
		t.Error("start without a folder")
	}
}

// everything is every file below dir with its text.
func everything(t *testing.T, dir string) string {
	t.Helper()
	var b strings.Builder
	err := filepath.WalkDir(dir, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		text, err := os.ReadFile(path)
		rel, _ := filepath.Rel(dir, path)
		b.WriteString(filepath.ToSlash(rel) + " " + string(text) + "\n")
		return err
	})
	if err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// TestExampleIsNotTheDemo: the embedded files are those of the example's own
// folder, and none is a file of the demo.
func TestExampleIsNotTheDemo(t *testing.T) {
	n := 0
	err := fs.WalkDir(start.Files(), ".", func(name string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		n++
		text, err := fs.ReadFile(start.Files(), name)
		if demo, missing := os.ReadFile(filepath.Join("..", "..", filepath.FromSlash(name))); missing == nil && string(demo) == string(text) {
			t.Errorf("%s is the demo's", name)
		}
		if strings.Contains(string(text), "Skerry") {
			t.Errorf("%s speaks of the demo", name)
		}
		return err
	})
	if err != nil || n != 8 {
		t.Errorf("%d files, %v", n, err)
	}
}

// TestLineEndsAndMarks: a reference whose files all have CRLF line ends and a
// byte-order mark is published as one without, byte for byte in its pages.
func TestLineEndsAndMarks(t *testing.T) {
	plain, windows := filepath.Join(t.TempDir(), "a"), filepath.Join(t.TempDir(), "b")
	for _, dir := range []string{plain, windows} {
		if code, _, errs := run("start", dir); code != 0 {
			t.Fatal(errs)
		}
	}
	err := filepath.WalkDir(windows, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		text, err := os.ReadFile(path)
		if err != nil {
			return err
		}
		return os.WriteFile(path, []byte("\ufeff"+strings.ReplaceAll(string(text), "\n", "\r\n")), 0o644)
	})
	if err != nil {
		t.Fatal(err)
	}
	for _, dir := range []string{plain, windows} {
		if code, _, errs := run("publish", "--folder", dir); code != 0 {
			t.Fatalf("%s: %s", dir, errs)
		}
	}
	a, b := everything(t, filepath.Join(plain, "public")), everything(t, filepath.Join(windows, "public"))
	if a != b {
		for i := range min(len(a), len(b)) {
			if a[i] != b[i] {
				t.Fatalf("the sites differ: %q and %q", a[max(0, i-200):i+60], b[max(0, i-200):min(len(b), i+60)])
			}
		}
		t.Fatal("the sites differ in length")
	}
}
