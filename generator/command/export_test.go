package command

import (
	"io/fs"
	"maps"
	"os"
	"path"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
)

// parabola has its peak at 30 °C (check numbers of the trade).
const parabola = "name: Parabola\nresistivity: 43 uohm cm\nalpha: 10 ppm/K\nbeta: -0.5 ppm/K²\nbasis: resistance\nreference_temperature: 20 degC\nvalid_range: -40 degC to 125 degC\nsource: standard\n"

// TestExportCommand: each form comes out for the nominal temperature, window
// and step asked for; a draft is warned of; what is wrong is said.
func TestExportCommand(t *testing.T) {
	dir := reference(t, map[string]string{"materials/sources.yaml": sources, "materials/parabola.yaml": parabola, "materials/copper.yaml": copper,
		"materials/hot.yaml": strings.NewReplacer("20 °C to 200 °C", "100 °C to 200 °C", "temperature: 20 °C", "temperature: 100 °C").Replace(tungsten)})
	for _, c := range []struct {
		args string
		code int
		want string
	}{
		// About 60 °C: α is −30 ppm/K of R at 20 °C, and R there is 1 − 400 ppm.
		{"parabola --as simulator --nominal 60°C", 0, "r (tc1=-3.00120048019e-05 tc2=-5.00200080032e-07 tnom=60)"},
		{"parabola --as simulator --nominal 20°C", 0, "r (tc1=1e-05 tc2=-5e-07 tnom=20)"},
		{"parabola --as simulator", 0, "tnom=27)"},
		{"parabola --as header --step 5K", 0, "#define R_PARABOLA_STEP 5000L"},
		{"parabola --as lookup --nominal 0°C --window 0°C~to~100°C", 0, "\r\n0,0,1,"},
		{"parabola --as elements --step 5K", 0, "\r\n-35,238.15,"},
		{"hot --as simulator", 1, "the nominal temperature 27 °C lies outside the valid range 100 °C to 200 °C"},
		{"hot --as simulator --nominal 100°C", 0, "tnom=100)"},
		{"hot --as header", 0, "_ROWS 2\n"},
		{"parabola --as simulator --step 5K", 2, "--step is for tables"},
		{"parabola --as header --step 0K", 2, "above zero"},
		{"parabola --as header --step 5", 2, "--step"},
		{"parabola --as header --window 50°C~to~0°C", 2, "does not rise"},
		{"parabola --as heder", 2, "did you mean header?"},
		{"parabola", 2, "--as takes"},
		{"parabola --as header --data other", 1, `no data set "other"`},
		{"parbola --as header", 1, "did you mean parabola?"},
	} {
		args := append([]string{"export"}, strings.Split(c.args, " ")...)
		for i := range args {
			args[i] = strings.ReplaceAll(args[i], "~", " ")
		}
		code, out, errs := run(append(args, "--folder", dir)...)
		said := out
		if c.code != 0 {
			said = strings.ReplaceAll(errs, "\u202f", " ")
		}
		if code != c.code || !strings.Contains(said, c.want) || (c.code != 0 && out != "") || (c.code == 0 && !strings.Contains(errs, "not for use")) {
			t.Errorf("%s: exit %d\n%s%s", c.args, code, out, errs)
		}
	}
}

// writtenSite publishes and gives every text of the site by path.
func writtenSite(t *testing.T, args ...string) map[string]string {
	t.Helper()
	into := filepath.Join(t.TempDir(), "site")
	if code, _, errs := run(append(args, "--into", into)...); code != 0 {
		t.Fatalf("exit %d: %s", code, errs)
	}
	texts := map[string]string{}
	err := filepath.WalkDir(into, func(file string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		text, err := os.ReadFile(file)
		rel, _ := filepath.Rel(into, file)
		texts[filepath.ToSlash(rel)] = string(text)
		return err
	})
	if err != nil {
		t.Fatal(err)
	}
	return texts
}

// TestLinksToData: every file that a material page offers for download is
// there, and every file for another program is offered by its page.
func TestLinksToData(t *testing.T) {
	texts := writtenSite(t, "publish", "--folder", "../..")
	link := regexp.MustCompile(`href="\.\./(data/[^"]+)"`)
	linked := map[string]bool{}
	for name, text := range texts {
		if !strings.HasPrefix(name, "material/") {
			continue
		}
		for _, m := range link.FindAllStringSubmatch(text, -1) {
			if linked[m[1]] = true; texts[m[1]] == "" {
				t.Errorf("%s offers %s, which is not there", name, m[1])
			}
		}
	}
	n := 0
	for name := range texts {
		if ending := path.Ext(name); strings.HasPrefix(name, "data/") && (ending == ".lib" || ending == ".h" || ending == ".csv") {
			if n++; !linked[name] {
				t.Errorf("no page offers %s", name)
			}
		}
	}
	if n < 100 || !strings.Contains(texts["material/zinc.html"], "For other programs: none, the record tells no resistance over temperature") {
		t.Errorf("%d files; zinc has no curve and its page must say why there is none", n)
	}
}

const offers = "material,supplier,form,size,price,currency,per,quantity,date,valid_until,metal_base,certificate,resistivity_tolerance,note\n" +
	"copper,Nobody and Daughters,wire,1 mm,97531.24,EUR,kg,25 kg,2026-09-21,2026-12-31,included,3.1,,a dear one\n" +
	"copper,Nobody and Daughters,wire,2 mm,86420.13,,kg,25 kg,,,included,3.1,,neither dated nor in a currency\n"

// withoutTopics leaves out the pages that the program makes from its own lists:
// they name the currencies and files that any reference may have.
func withoutTopics(texts map[string]string) map[string]string {
	rest := maps.Clone(texts)
	for _, topic := range allTopics() {
		delete(rest, "guide/"+topic.Name+".html")
	}
	return rest
}

// TestWithoutOffers: with them price and supplier stand on the site; without them
// neither a price nor a supplier nor a finding about them is left in any file,
// and offers that cannot be read stop nobody.
func TestWithoutOffers(t *testing.T) {
	files := map[string]string{"materials/sources.yaml": sources, "materials/copper.yaml": copper, "materials/offers.csv": offers,
		"content/reports/cost.md": "# Cost\n\n```study: cost\nmaterials: [copper]\nbaseline: copper\nheld: length\n```\n"}
	dir := reference(t, files)
	count := func(texts map[string]string) (n int) {
		for _, text := range withoutTopics(texts) {
			for _, word := range []string{"Nobody and Daughters", "97531", "86420", "a dear one", "offers.csv"} {
				n += strings.Count(text, word)
			}
		}
		return n
	}
	if with := writtenSite(t, "publish", "--folder", dir); !strings.Contains(with["report/cost.html"], "97531") || count(with) < 4 {
		t.Error("the site does not show its offers: this test proves nothing")
	}
	if n := count(writtenSite(t, "publish", "--folder", dir, "--without", "offers")); n != 0 {
		t.Errorf("%d traces of offers are left", n)
	}
	for want, args := range map[string][]string{"with": {"publish", "--folder", "../.."}, "without": {"publish", "--folder", "../..", "--without", "offers"}} {
		n := 0
		for _, text := range withoutTopics(writtenSite(t, args...)) {
			n += strings.Count(text, "EUR") + strings.Count(text, "USD")
		}
		if (want == "with") != (n > 0) {
			t.Errorf("the demo %s offers has %d prices or rates", want, n)
		}
	}
	files["materials/offers.csv"] = strings.Replace(offers, "material,", "materials;", 1)
	dir = reference(t, files)
	if code, _, errs := run("publish", "--folder", dir, "--into", filepath.Join(dir, "site")); code != 1 || !strings.Contains(errs, "offers-unreadable") {
		t.Errorf("unreadable offers: exit %d %s", code, errs)
	}
	writtenSite(t, "publish", "--folder", dir, "--without", "offers")
	if code, _, errs := run("publish", "--folder", dir, "--without", "sources"); code != 2 || !strings.Contains(errs, "only offers can be left out") {
		t.Errorf("exit %d %s", code, errs)
	}
}
