package export

import (
	"bytes"
	"fmt"
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/published"
	"ohmfolio/generator/statement"
)

// invented loads one record from memory with a source and an expansion.
func invented(t testing.TB, record string) (*library.Library, *material.Record) {
	t.Helper()
	lib := library.FromFiles(map[string][]byte{
		"materials/sources.yaml": []byte("standard: {kind: standard, title: A standard, number: X 1, checked: original}\n"),
		"materials/x-1.yaml":     []byte(record)})
	r := lib.Material("x-1")
	if r == nil || r.Adopted == nil {
		t.Fatalf("the record is not read: %v", lib.Findings)
	}
	return lib, r
}

// parabolic is a record of a parabola about a reference temperature, in ppm.
func parabolic(alpha, beta, reference, from, to string) string {
	return "name: Invented\nresistivity: 43 µΩ·cm\nbasis: resistance\nalpha: " + alpha + " ppm/K\nbeta: " + beta + " ppm/K²\nreference_temperature: " + reference +
		" °C\nvalid_range: " + from + " °C to " + to + " °C\nsource: standard\n"
}

func simulatorText(t testing.TB, lib *library.Library, r *material.Record, o Order) string {
	t.Helper()
	var b bytes.Buffer
	if err := Simulator(&b, lib, r, o); err != nil {
		t.Fatalf("%s: %v", r.ID, err)
	}
	return b.String()
}

var modelLine = regexp.MustCompile(`(?m)^\.model \S+ r \(tc1=(\S+) tc2=(\S+) tnom=(\S+)\)$`)

// TestRereferenced holds TC1, TC2 and the base value against vectors computed
// from R = R0(1 + α(T − T0) + β(T − T0)²) outside this program (curve/testdata/SOURCES.md).
func TestRereferenced(t *testing.T) {
	n := 0
	for _, row := range published.Rows(t, "../../curve/testdata/quadratic_vectors.csv") {
		if row["T1_C"] != "27" {
			continue
		}
		n++
		lib, r := invented(t, parabolic(row["alpha_1e-6/K"], row["beta_1e-6/K2"], row["T0_C"], "-40", "125"))
		text := simulatorText(t, lib, r, Order{})
		m := modelLine.FindStringSubmatch(text)
		if m == nil || m[3] != "27" || strings.Contains(text, ".subckt") {
			t.Fatalf("%s: %s", row["id"], text)
		}
		// Half of the last of the file's 12 digits, and of the vectors' last.
		near := func(what, got string, want, within float64) {
			within += 5e-13 * math.Abs(want)
			if math.Abs(published.Number(t, got)-want) > within {
				t.Errorf("%s: %s is %s, want %g", row["id"], what, got, want)
			}
		}
		near("TC1", m[1], published.Number(t, row["alpha_T1_1e-6/K"])*1e-6, 6e-16)
		near("TC2", m[2], published.Number(t, row["beta_T1_1e-6/K2"])*1e-6, 6e-16)
		base := regexp.MustCompile(`they are (\S+) times`).FindStringSubmatch(text)
		near("base value", base[1], published.Number(t, row["R_T1_over_R_T0"]), 1e-12)
	}
	if n < 5 {
		t.Errorf("only %d vectors about 27 °C", n)
	}
}

// resistances runs a netlist of two-terminal parts through ngspice (Debian
// package ngspice) at each temperature in °C and returns their ohms. The
// circuit's own nominal temperature is set to 25 °C: it must not matter.
func resistances(t *testing.T, lib string, parts []string, celsius []float64) [][]float64 {
	t.Helper()
	dir := t.TempDir()
	if err := os.WriteFile(filepath.Join(dir, "material.lib"), []byte(lib), 0o644); err != nil {
		t.Fatal(err)
	}
	var b strings.Builder
	b.WriteString("ohms\n.include material.lib\n.options tnom=25 reltol=1e-12\n")
	for i, p := range parts {
		fmt.Fprintf(&b, "i%d 0 n%d 1\n%s\n", i, i, strings.ReplaceAll(p, "@", strconv.Itoa(i)))
	}
	b.WriteString(".control\nset numdgt=16\n")
	for _, c := range celsius {
		fmt.Fprintf(&b, "set temp=%s\nop\n", number(c))
		for i := range parts {
			fmt.Fprintf(&b, "print v(n%d)\n", i)
		}
	}
	b.WriteString(".endc\n.end\n")
	if err := os.WriteFile(filepath.Join(dir, "ohms.cir"), []byte(b.String()), 0o644); err != nil {
		t.Fatal(err)
	}
	c := exec.Command("ngspice", "-b", "ohms.cir")
	c.Dir = dir
	out, err := c.CombinedOutput()
	found := regexp.MustCompile(`v\(n\d+\) = (\S+)`).FindAllStringSubmatch(string(out), -1)
	if len(found) != len(parts)*len(celsius) {
		t.Fatalf("ngspice (%v) tells %d of %d voltages:\n%s", err, len(found), len(parts)*len(celsius), out)
	}
	var rows [][]float64
	for i := range celsius {
		var row []float64
		for j := range parts {
			row = append(row, published.Number(t, found[i*len(parts)+j][1]))
		}
		rows = append(rows, row)
	}
	return rows
}

// asked is what the value command answers: R(T)/R(nominal).
func asked(t *testing.T, lib *library.Library, r *material.Record, kelvin, nominal float64) float64 {
	t.Helper()
	a, err := statement.Ask(lib, r, statement.Question{Quantity: statement.AskResistanceRatio, At: kelvin, Reference: &nominal})
	if err != nil || a.Value == nil {
		t.Fatalf("%s at %g K: %v", r.ID, kelvin, err)
	}
	return *a.Value
}

var statedError = regexp.MustCompile(`largest error of the fit: (\S+) ppm of the base value, at (\S+) degC`)

// TestThroughSimulator runs every material of the demo that has a simulator
// file, and an invented one whose pieces join with a step, through ngspice at
// five temperatures and at the one where the fit is said to be worst: the model
// is within the error that the file states, the expression within 1e-9.
func TestThroughSimulator(t *testing.T) {
	published.Need(t, "ngspice", "ngspice")
	lib, _ := written(t)
	exact, fitted := 0, 0
	for _, r := range lib.Materials {
		if kinds[0].refusal(r) == nil {
			if throughSimulator(t, lib, r, Order{}) {
				exact++
			} else {
				fitted++
			}
		}
	}
	if exact < 10 || fitted < 10 {
		t.Errorf("%d exact and %d fitted models", exact, fitted)
	}
	lib, r := invented(t, steppedRecord)
	if throughSimulator(t, lib, r, Order{}) {
		t.Error("a curve with a step is called exact")
	}
	cold := 250.0
	lib, r = invented(t, parabolic("10", "-0.5", "20", "-40", "125"))
	throughSimulator(t, lib, r, Order{Nominal: &cold})
}

// steppedRecord has two pieces that meet within 0.05 %.
const steppedRecord = `name: Two pieces
adopt: joined
data_sets:
  low: {source: standard, basis: resistivity, table: {temperature: °C, resistivity: µΩ·cm, rows: [[-100, 8], [0, 10]]}, valid_range: -100 °C to 0 °C}
  high: {source: standard, basis: resistivity, table: {temperature: °C, resistivity: µΩ·cm, rows: [[0, 10.005], [50, 11.2], [100, 12.1]]}, valid_range: 0 °C to 100 °C}
  joined: {source: standard, pieces: [low, high]}
`

func throughSimulator(t *testing.T, lib *library.Library, r *material.Record, o Order) (exact bool) {
	text := simulatorText(t, lib, r, o)
	within, worstAt := 1e-10, math.NaN()
	valid := r.Adopted.Valid
	var celsius []float64
	for i := range 5 {
		celsius = append(celsius, valid.Lo-273.15+float64(i)/4*(valid.Hi-valid.Lo))
	}
	parts := []string{"r@ n@ 0 1 " + word(r.ID)}
	if m := statedError.FindStringSubmatch(text); m != nil {
		within, worstAt = published.Number(t, m[1])*1e-6, published.Number(t, m[2])
		celsius = append(celsius, worstAt)
		parts = append(parts, "x@ n@ 0 "+word(r.ID)+"_curve base=1")
	}
	nominal := room27
	if o.Nominal != nil {
		nominal = *o.Nominal
	}
	ohms := resistances(t, text, parts, celsius)
	for i, c := range celsius {
		want := asked(t, lib, r, c+273.15, nominal)
		off := math.Abs(ohms[i][0] - want)
		if off > within*1.0001+1e-10 || (c == worstAt && off < 0.98*within) {
			t.Errorf("%s at %g °C: the model gives %.12g, the program %.12g, stated error %g", r.ID, c, ohms[i][0], want, within)
		}
		if len(parts) > 1 && math.Abs(ohms[i][1]-want) > 1e-9*math.Max(1, want) {
			t.Errorf("%s at %g °C: the expression gives %.12g, the program %.12g", r.ID, c, ohms[i][1], want)
		}
	}
	return len(parts) == 1
}

// TestNominalLeftAlone: the check number of the trade. Data about 20 °C, +10
// ppm/K and −0.5 ppm/K², put unchanged into a simulator whose nominal is 27 °C
// give −2262 ppm at 105 °C instead of −2762.5; copper is off by 2.75 % of R at
// 20 °C. The file gives the right one.
func TestNominalLeftAlone(t *testing.T) {
	published.Need(t, "ngspice", "ngspice")
	lib, r := invented(t, parabolic("10", "-0.5", "20", "-40", "125"))
	text := simulatorText(t, lib, r, Order{})
	base := regexp.MustCompile(`they are (\S+) times`).FindStringSubmatch(text)[1]
	ohms := resistances(t, text+".model careless r (tc1=10e-6 tc2=-0.5e-6 tnom=27)\n",
		[]string{"r@ n@ 0 " + base + " r_x_1", "r@ n@ 0 1 careless"}, []float64{-40, 20, 60, 85, 105, 125})
	for i, want := range []float64{-2400, 0, -400, -1462.5, -2762.5, -4462.5} {
		if got := (ohms[i][0] - 1) * 1e6; math.Abs(got-want) > 1e-4 {
			t.Errorf("change %.5f ppm, want %g", got, want)
		}
	}
	if got := (ohms[4][1] - 1) * 1e6; math.Abs(got+2262) > 1e-4 {
		t.Errorf("left at 27 °C: %.5f ppm, want −2262", got)
	}
	lib, r = invented(t, parabolic("3930", "0", "20", "0", "100"))
	text = simulatorText(t, lib, r, Order{})
	base = regexp.MustCompile(`they are (\S+) times`).FindStringSubmatch(text)[1]
	ohms = resistances(t, text+".model careless r (tc1=3930e-6 tnom=27)\n", []string{"r@ n@ 0 " + base + " r_x_1", "r@ n@ 0 1 careless"}, []float64{100})
	if off := ohms[0][0] - ohms[0][1]; math.Abs(off-0.02751) > 1e-6 {
		t.Errorf("copper is off by %g of R at 20 °C, want 0.02751", off)
	}
}

// TestFitAgainstLeastSquares: TC1 and TC2 of a table are those that a general
// least-squares program finds for a fine sampling of the same straight lines.
func TestFitAgainstLeastSquares(t *testing.T) {
	lib, r := invented(t, "name: A table\nbasis: resistance\nresistivity: 109 µΩ·cm\nreference_temperature: 20 °C\nsource: standard\nvalid_range: 20 °C to 1000 °C\n"+
		"table: {temperature: °C, resistance_ratio: 1, rows: [[20, 1], [100, 1.006], [500, 1.05], [600, 1.04], [1000, 1.05]], interpolate: linear}\n")
	lo, hi := 373.15, 1173.15
	m := modelLine.FindStringSubmatch(simulatorText(t, lib, r, Order{Window: &material.Window{Lo: lo, Hi: hi}}))
	want := published.Scipy(t, `t = np.linspace(100, 900, 2000001)
x, y = [20, 100, 500, 600, 1000], [1, 1.006, 1.05, 1.04, 1.05]
d, at27 = t - 27, np.interp(27, x, y)
tell(np.linalg.lstsq(np.stack([d, d*d], 1), np.interp(t, x, y)/at27 - 1, rcond=None)[0])
`)[0]
	for i, w := range want {
		if got := published.Number(t, m[i+1]); math.Abs(got/w-1) > 1e-5 {
			t.Errorf("TC%d is %g, least squares on samples %g", i+1, got, w)
		}
	}
}
