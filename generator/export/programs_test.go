package export

import (
	"bytes"
	"encoding/csv"
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/published"
	"ohmfolio/generator/quantity"
)

func yardLibrary(t testing.TB) *library.Library {
	t.Helper()
	lib, err := library.Load(filepath.Join("..", ".."), library.Options{})
	if err != nil {
		t.Fatal(err)
	}
	return lib
}

func recordOf(t testing.TB, body string) *material.Record {
	t.Helper()
	r, findings := material.Read("x", place.NewSource("materials/x.yaml", []byte("name: X\nsource: s\n"+body)), nil)
	if place.Count(findings, place.Error) > 0 {
		t.Fatal(findings)
	}
	return r
}

// TestSimulatorVectors: α = +10 ppm/K, β = −0.5 ppm/K² about 20 °C at 105 °C is
// −2762.5 ppm; left at a nominal of 27 °C the same coefficients give −2262
// (check numbers of the trade, recomputed there). And the re-referenced rows of
// alloys/quadratic_vectors (ngspice's own law, restemp.c): 5e-6 and −0.5e-6 at
// 20 °C are −1.999979e-6 and −4.99994750e-7 at 27 °C.
func TestSimulatorVectors(t *testing.T) {
	r := recordOf(t, "basis: resistance\nreference_temperature: 20 °C\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nbeta: -0.5 ppm/K²\nvalid_range: -55 °C to 125 °C\n")
	l, err := Simulator(r, SimulatorNominal, 0, 0)
	if err != nil || !l.Exact {
		t.Fatal(l, err)
	}
	law := func(l Line, t float64) float64 {
		d := t - l.Nominal
		return 1 + l.TC1*d + l.TC2*d*d
	}
	if got := l.Over*law(l, quantity.ZeroCelsius+105) - 1; math.Abs(got+2762.5e-6) > 1e-15 {
		t.Errorf("at 105 °C %v ppm", got*1e6)
	}
	wrong := Line{Nominal: SimulatorNominal, TC1: 10e-6, TC2: -0.5e-6}
	if got := law(wrong, quantity.ZeroCelsius+105) - 1; math.Abs(got+2262e-6) > 1e-9 {
		t.Errorf("left at 27 °C %v ppm", got*1e6)
	}
	r = recordOf(t, "basis: resistance\nreference_temperature: 20 °C\nresistivity: 43 µΩ·cm\nalpha: 5 ppm/K\nbeta: -0.5 ppm/K²\nvalid_range: 0 °C to 60 °C\n")
	l, _ = Simulator(r, SimulatorNominal, 0, 0)
	if math.Abs(l.TC1+1.999979e-6) > 5e-13 || math.Abs(l.TC2+4.99994750e-7) > 5e-16 || math.Abs(l.Over-1.0000105) > 1e-14 {
		t.Errorf("re-referenced: %v %v %v", l.TC1, l.TC2, l.Over)
	}
	if _, err := Simulator(r, quantity.ZeroCelsius+70, 0, 0); err == nil || !strings.Contains(err.Error(), "outside the valid range") {
		t.Errorf("a nominal temperature outside the range: %v", err)
	}
}

// TestNgspice runs the written lines of the demo through ngspice (Debian) at
// five temperatures of each valid range, against the program's own curve. An
// exact line and an expression agree to 1e-9, a fitted line within its stated
// error.
func TestNgspice(t *testing.T) {
	published.Need(t, "ngspice", "ngspice")
	lib := yardLibrary(t)
	for _, c := range []struct {
		id     string
		lo, hi float64 // °C, 0 0 for the whole range
	}{{"cumn12ni", 0, 0}, {"copper-annealed", 0, 0}, {"cuni44", 0, 0}, {"nicr8020", 0, 0}, {"platinum-thermometer", 0, 850}, {"platinum-thermometer", 0, 0}} {
		r := lib.Material(c.id)
		lo, hi := c.lo, c.hi
		if lo != hi {
			lo, hi = lo+quantity.ZeroCelsius, hi+quantity.ZeroCelsius
		}
		l, err := Simulator(r, SimulatorNominal, lo, hi)
		if err != nil {
			t.Fatal(c.id, err)
		}
		var text bytes.Buffer
		WriteSimulator(&text, lib, r, l)
		name := symbol(r.ID)
		for i := range 5 {
			at := l.Lo + (l.Hi-l.Lo)*(0.02+0.24*float64(i))
			want, _ := curve.Ratio(r.Adopted.Ratio.Nominal, l.Nominal)
			y, _ := want.At(at)
			circuit := "R1 1 0 1 r_" + name
			tolerance := 1e-9 + math.Abs(l.Error)*1.0000001
			if simulated := ngspice(t, text.String(), circuit, at); math.Abs(simulated-y) > tolerance {
				t.Errorf("%s at %.1f °C: the line gives %.10f, the curve %.10f, stated error %g", c.id, at-quantity.ZeroCelsius, simulated, y, l.Error)
			}
			if strings.Contains(text.String(), ".func f_") {
				if simulated := ngspice(t, text.String(), "R1 1 0 R='1*f_"+name+"(temper)'", at); math.Abs(simulated-y) > 1e-9 {
					t.Errorf("%s at %.1f °C: the expression gives %.10f, the curve %.10f", c.id, at-quantity.ZeroCelsius, simulated, y)
				}
			}
		}
	}
}

// ngspice gives the resistance of one element at a temperature: V over I, since
// its own listing stays at the nominal value.
func ngspice(t *testing.T, lines, element string, kelvin float64) float64 {
	t.Helper()
	file := filepath.Join(t.TempDir(), "c.cir")
	text := "* check\n" + lines + "V1 1 0 DC 1\n" + element + "\n.options temp=" + number(kelvin-quantity.ZeroCelsius) + "\n.control\nset numdgt=14\nop\nprint -i(v1)\n.endc\n.end\n"
	if err := os.WriteFile(file, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
	out, err := exec.Command("ngspice", "-b", file).CombinedOutput()
	for _, line := range strings.Split(string(out), "\n") {
		if _, value, ok := strings.Cut(line, "-i(v1) = "); ok {
			return 1 / published.Number(t, strings.TrimSpace(value))
		}
	}
	t.Fatalf("ngspice: %v\n%s\n%s", err, out, text)
	return 0
}

// TestLookupError confirms the stated error by exhaustive comparison: linear
// interpolation of the integers against the curve, every hundredth of a kelvin
// or 200,000 points.
func TestLookupError(t *testing.T) {
	tables := 0
	for _, r := range yardLibrary(t).Materials {
		if !r.TellsRatio() {
			continue
		}
		l, err := NewLookup(r)
		if err != nil {
			t.Errorf("%s: %v", r.ID, err)
			continue
		}
		tables++
		worst := 0.0
		first, last := l.kelvin(0), l.kelvin(len(l.Counts)-1)
		n := int(math.Min(200000, math.Round((last-first)*100)))
		for i := range n + 1 {
			at := clamp(first+(last-first)*float64(i)/float64(n), r.Adopted.Valid)
			k := min(int((at-first)*100/float64(l.Step)), len(l.Counts)-2)
			part := (at - l.kelvin(k)) * 100 / float64(l.Step)
			counts := float64(l.Counts[k])*(1-part) + float64(l.Counts[k+1])*part
			y, _ := material.Reading{Told: r.Adopted.Ratio, Ratio: true, Reference: l.Reference}.At(at)
			worst = math.Max(worst, math.Abs(counts-y*float64(l.Scale)))
		}
		if worst >= 1 || worst > l.Error+1e-6 {
			t.Errorf("%s: off by %v counts, stated %v", r.ID, worst, l.Error)
		}
		if l.Error > 0.01 && worst < l.Error*0.98 {
			t.Errorf("%s: off by %v counts at most, and %v are stated", r.ID, worst, l.Error)
		}
	}
	if tables < 20 {
		t.Errorf("only %d tables", tables)
	}
}

// TestParabolaStep: linear interpolation of a parabola errs by |β|h²/4; for
// β = −0.5 ppm/K² 12.5 ppm at 10 K and 3.1 ppm at 5 K (check numbers of the
// trade; |f″|h²/8 with f″ = 2β).
func TestParabolaStep(t *testing.T) {
	r := recordOf(t, "basis: resistance\nreference_temperature: 20 °C\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nbeta: -0.5 ppm/K²\nvalid_range: 0 °C to 100 °C\n")
	for step, want := range map[int]float64{1000: 12.5, 500: 3.125} {
		l := Lookup{Reference: r.Adopted.RatioReference, Step: step, Scale: 100000000}
		c, _ := curve.Ratio(r.Adopted.Ratio.Nominal, l.Reference)
		if !l.fill(c, r.Adopted.Valid) || math.Abs(l.Error/100-want) > 0.02 {
			t.Errorf("step %d: %v ppm, want %v", step, l.Error/100, want)
		}
	}
}

// TestElementsInterpolate: between the rows linear interpolation is within
// 10 ppm of the curve, and rows ascend within the valid range.
func TestElementsInterpolate(t *testing.T) {
	for _, r := range yardLibrary(t).Materials {
		if !r.TellsResistivity() {
			continue
		}
		rows, err := Elements(r)
		if err != nil {
			t.Fatal(err)
		}
		for i := 1; i < len(rows); i++ {
			a, _ := r.Adopted.Rho.Nominal.At(rows[i-1])
			b, _ := r.Adopted.Rho.Nominal.At(rows[i])
			for _, f := range []float64{0.25, 0.5, 0.75} {
				y, ok := r.Adopted.Rho.Nominal.At(rows[i-1] + f*(rows[i]-rows[i-1]))
				if !ok || rows[i] <= rows[i-1] || math.Abs(a+f*(b-a)-y) > elementError*y*1.0001 {
					t.Fatalf("%s between %v and %v K: %v, the curve %v", r.ID, rows[i-1], rows[i], a+f*(b-a), y)
				}
			}
		}
	}
}

// TestHostileNames: nothing in a record can end a comment, begin a statement,
// or become a formula.
func TestHostileNames(t *testing.T) {
	lib := library.FromFiles(map[string][]byte{
		"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: N}\n"),
		"materials/x.yaml":       []byte("name: \"X */ int evil; /*\\n.include evil\\n+ * R1 1 0 0\"\nsource: s\nclass: typical\ncondition: \"=1+1\\n.end\"\nbasis: resistance\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\nalpha: 10 ppm/K\nvalid_range: 0 °C to 60 °C\n"),
	})
	r := lib.Material("x")
	var text bytes.Buffer
	l, err := Simulator(r, SimulatorNominal, 0, 0)
	if err != nil {
		t.Fatal(err)
	}
	WriteSimulator(&text, lib, r, l)
	for _, line := range strings.Split(strings.TrimSpace(text.String()), "\n") {
		if !strings.HasPrefix(line, "* ") && !strings.HasPrefix(line, ".model r_x r (") {
			t.Errorf("a line of its own: %q", line)
		}
	}
	text.Reset()
	table, err := NewLookup(r)
	if err != nil {
		t.Fatal(err)
	}
	WriteHeader(&text, lib, r, table)
	if head, _, ok := strings.Cut(text.String(), " */\n#include <stdint.h>\n"); !ok || strings.Contains(head, "*/") {
		t.Errorf("a comment ends early:\n%s", text.String())
	}
	for _, c := range text.String() {
		if c > 0x7e {
			t.Fatalf("not plain: %q", c)
		}
	}
	text.Reset()
	rows, _ := Elements(r)
	if err := WriteElements(&text, r, rows); err != nil {
		t.Fatal(err)
	}
	all, err := csv.NewReader(&text).ReadAll()
	if err != nil || !strings.HasPrefix(all[1][2], "'=") {
		t.Errorf("a formula: %v %v", all[1], err)
	}
}

func BenchmarkForPrograms(b *testing.B) {
	lib := yardLibrary(b)
	r := lib.Material("cumn12ni")
	var w bytes.Buffer
	for b.Loop() {
		for _, o := range forPrograms(lib, r) {
			w.Reset()
			if err := o.Write(&w); err != nil {
				b.Fatal(err)
			}
		}
	}
}
