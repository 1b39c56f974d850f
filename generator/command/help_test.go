package command

import (
	"os"
	"path/filepath"
	"runtime"
	"runtime/debug"
	"strings"
	"testing"
)

// TestTopics: the topics, a command's help, a typo; and the guide of a site has
// the same pages.
func TestTopics(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "new")
	run("start", dir)
	if code, _, errs := run("publish", "--folder", dir, "--quiet"); code != 0 {
		t.Fatal(errs)
	}
	home, _ := os.ReadFile(filepath.Join(dir, "public", "index.html"))
	for name, want := range map[string]string{"units": "[cml_i]", "record": "debye_temperature", "studies": "greatest_change", "findings": "table-taken"} {
		code, out, errs := run("help", name)
		page, err := os.ReadFile(filepath.Join(dir, "public", "guide", name+".html"))
		if code != 0 || errs != "" || !strings.Contains(out, want) || err != nil || !strings.Contains(string(page), want) {
			t.Errorf("%s: exit %d, %v, %q", name, code, err, errs)
		}
		if !strings.Contains(string(home), `href="guide/`+name+`.html"`) {
			t.Errorf("home does not lead to %s", name)
		}
	}
	_, direct, _ := run("value", "--help")
	if code, out, _ := run("help", "value"); code != 0 || out != direct {
		t.Errorf("help value: exit %d, %q", code, out)
	}
	if code, out, errs := run("help", "unts"); code != 2 || out != "" || !strings.Contains(errs, "did you mean units?") {
		t.Errorf("a typo: exit %d, %q, %q", code, out, errs)
	}
	if code, out, _ := run("help"); code != 0 || !strings.Contains(out, "units, record, studies or findings") {
		t.Errorf("help: exit %d, %q", code, out)
	}
}

// TestOwnGuideWins: a guide of the reference keeps its name.
func TestOwnGuideWins(t *testing.T) {
	dir := yard(t)
	file := filepath.Join(dir, "content", "guides", "units.md")
	if err := os.MkdirAll(filepath.Dir(file), 0o755); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(file, []byte("# Our own units\n\nWe use SI.\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	if code, _, errs := run("publish", "--folder", dir); code != 0 {
		t.Fatal(errs)
	}
	page, err := os.ReadFile(filepath.Join(dir, "public", "guide", "units.html"))
	if err != nil || !strings.Contains(string(page), "We use SI.") {
		t.Errorf("the guide of the reference is gone: %v", err)
	}
}

// TestQuiet: nothing but errors; the exit code stays.
func TestQuiet(t *testing.T) {
	dir := yard(t)
	if code, out, errs := run("publish", "--folder", dir, "--quiet"); code != 0 || out != "" || errs != "" {
		t.Errorf("exit %d, %q, %q", code, out, errs)
	}
	if err := os.WriteFile(filepath.Join(dir, "materials", "bad.yaml"), []byte("nme: x\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	code, out, errs := run("publish", "--folder", dir, "--quiet")
	if code != 1 || out != "" || !strings.Contains(errs, "bad.yaml:1:1: error:") || strings.Contains(errs, "warning:") {
		t.Errorf("with an error: exit %d, %q, %q", code, out, errs)
	}
}

func TestVersion(t *testing.T) {
	code, out, _ := run("version")
	if code != 0 || !strings.HasPrefix(out, "ohmfolio ") || !strings.Contains(out, "built with: "+runtime.Version()+" for "+runtime.GOOS+"/"+runtime.GOARCH) {
		t.Errorf("exit %d, %q", code, out)
	}
	info := &debug.BuildInfo{Main: debug.Module{Version: "v1.2.3"}, Settings: []debug.BuildSetting{{Key: "vcs.revision", Value: "abc"}, {Key: "vcs.modified", Value: "true"}, {Key: "vcs.time", Value: "2026-12-01T00:00:00Z"}}}
	if got := buildText(info); !strings.HasPrefix(got, "ohmfolio v1.2.3\nrevision: abc, with changes\ncommitted: 2026-12-01T00:00:00Z\n") {
		t.Errorf("got %q", got)
	}
	if got := buildText(nil); !strings.HasPrefix(got, "ohmfolio unknown\nrevision: not recorded\n") {
		t.Errorf("got %q", got)
	}
}

// TestCompletion: every shell gets a script, and IDs are offered.
func TestCompletion(t *testing.T) {
	for _, shell := range []string{"bash", "zsh", "fish", "powershell"} {
		if code, out, errs := run("completion", shell); code != 0 || errs != "" || !strings.Contains(out, "ohmfolio") || len(out) < 500 {
			t.Errorf("%s: exit %d, %d bytes, %q", shell, code, len(out), errs)
		}
	}
	if code, out, errs := run("completion", "bsh"); code != 2 || out != "" || !strings.Contains(errs, "did you mean bash?") {
		t.Errorf("a typo: exit %d, %q, %q", code, out, errs)
	}
	if code, out, _ := run("__complete", "value", "--folder", yard(t), ""); code != 0 || !strings.HasPrefix(out, "copper\ntungsten\n") {
		t.Errorf("IDs: exit %d, %q", code, out)
	}
}
