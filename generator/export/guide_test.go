package export

import (
	"bytes"
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"ohmfolio/generator/published"
)

// fenced is the block of the guide in a language.
func fenced(t *testing.T, language string) string {
	t.Helper()
	text, err := os.ReadFile("../../content/guides/handing-data-to-programs.md")
	if err != nil {
		t.Fatal(err)
	}
	_, block, found := strings.Cut(string(text), "```"+language+"\n")
	if block, _, _ = strings.Cut(block, "```"); !found {
		t.Fatalf("the guide has no block in %s", language)
	}
	return block
}

// TestGuideNetlist: ngspice runs the netlist of the guide, and the drop across
// the shunt is that of the program's own curve.
func TestGuideNetlist(t *testing.T) {
	published.Need(t, "ngspice", "ngspice")
	lib, files := written(t)
	dir := t.TempDir()
	netlist := strings.Replace(fenced(t, "spice"), ".end\n", ".control\nset numdgt=16\nop\nprint v(a)\n.endc\n.end\n", 1)
	for name, text := range map[string]string{"shunt.cir": netlist, "cumn12ni.lib": files["data/cumn12ni.lib"]} {
		if err := os.WriteFile(filepath.Join(dir, name), []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	c := exec.Command("ngspice", "-b", "shunt.cir")
	c.Dir = dir
	out, _ := c.CombinedOutput()
	m := regexp.MustCompile(`v\(a\) = (\S+)`).FindSubmatch(out)
	if m == nil {
		t.Fatalf("%s", out)
	}
	want := 200 * 250e-6 * asked(t, lib, lib.Material("cumn12ni"), 273.15+85, room27)
	if got := published.Number(t, string(m[1])); math.Abs(got/want-1) > 1e-10 {
		t.Errorf("the drop is %.12g V, want %.12g", got, want)
	}
}

// TestGuideFunction: a compiler takes the function of the guide.
func TestGuideFunction(t *testing.T) {
	published.Need(t, "gcc", "gcc")
	lib, _ := written(t)
	var b bytes.Buffer
	if err := LookupHeader(&b, lib, lib.Material("cumn12ni"), Order{}); err != nil {
		t.Fatal(err)
	}
	function := strings.Replace(fenced(t, "c"), "#include \"cumn12ni-lookup.h\"\n", b.String(), 1)
	compile(t, function+"int ask(int32_t t, int32_t *n) { return change_at(t, n); }\n")
}
