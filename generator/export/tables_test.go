package export

import (
	"bytes"
	"encoding/csv"
	"math"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/published"
)

// TestChordBound: a straight line through two points of a parabola errs by
// |β|h²/4: 12.5 ppm at 10 K and 3.125 ppm at 5 K for −0.5 ppm/K² (common
// practice; check numbers of the trade).
func TestChordBound(t *testing.T) {
	c := curve.Polynomial{Y0: 1, Alpha: 10e-6, Beta: -0.5e-6, Reference: 293.15}.Curve(233.15, 378.15)
	for h, want := range map[float64]float64{10: 12.5e-6, 5: 3.125e-6} {
		if got, _ := chordBound(c, 300, 300+h, 0); math.Abs(got-want) > 1e-15 {
			t.Errorf("step %g K: %g, want %g", h, got, want)
		}
	}
}

var defined = regexp.MustCompile(`(?m)^#define R_\w+_(FIRST|STEP|COUNT_PPB|NOMINAL|ROWS) \(?(-?\d+)`)

// header is a table as a compiler would see it.
type header struct {
	first, step, ppb, nominal, rows int64
	counts                          []int64
	stated                          float64 // counts
}

func readHeader(t *testing.T, text string) header {
	t.Helper()
	h := header{}
	into := map[string]*int64{"FIRST": &h.first, "STEP": &h.step, "COUNT_PPB": &h.ppb, "NOMINAL": &h.nominal, "ROWS": &h.rows}
	for _, m := range defined.FindAllStringSubmatch(text, -1) {
		*into[m[1]] = int64(published.Number(t, m[2]))
	}
	body := text[strings.LastIndex(text, "{")+1 : strings.LastIndex(text, "}")]
	for _, cell := range strings.Split(body, ",") {
		h.counts = append(h.counts, int64(published.Number(t, cell)))
	}
	h.stated = published.Number(t, regexp.MustCompile(`stay within (\S+) counts`).FindStringSubmatch(text)[1])
	if int64(len(h.counts)) != h.rows || !(h.stated < 1) {
		t.Errorf("%d counts for %d rows, stated error %g", len(h.counts), h.rows, h.stated)
	}
	return h
}

// at interpolates as firmware does: exact line, and the rounded whole number.
func (h header) at(milli int64) (line float64, rounded int64) {
	i := min((milli-h.first)/h.step, h.rows-2)
	rest := milli - h.first - i*h.step
	d := h.counts[i+1] - h.counts[i]
	return float64(h.counts[i]) + float64(d)*float64(rest)/float64(h.step), h.counts[i] + int64(math.Round(float64(d*rest)/float64(h.step)))
}

// steepRecord has kinks that no even step meets and a valid range in kelvin
// whose thousandths are a prime number, so that no step divides it.
const steepRecord = "name: Kinks\nbasis: resistivity\nsource: standard\nvalid_range: 3.001 K to 301.024 K\n" +
	"table: {temperature: K, resistivity: µΩ·cm, rows: [[3.001, 0.01], [17.77, 0.012], [41.3, 0.3], [301.024, 1.7]], interpolate: linear}\n"

// TestLookupExhaustively compares every table of the demo, and two invented
// ones, with the program's own values at every thousandth of a degree: the
// straight line stays within the stated error, which is under one count; the
// rounded number within half a count more.
func TestLookupExhaustively(t *testing.T) {
	lib, files := written(t)
	n := 0
	for _, r := range lib.Materials {
		if text, ok := files["data/"+r.ID+"-lookup.h"]; ok {
			n++
			exhaust(t, r, text)
			sameTable(t, r, text, files["data/"+r.ID+"-lookup.csv"])
		}
	}
	if n < 25 {
		t.Errorf("%d tables", n)
	}
	for _, record := range []string{steppedRecord, steepRecord} {
		for _, step := range []float64{0, 0.5, 7} {
			lib, r := invented(t, record)
			var b bytes.Buffer
			if err := LookupHeader(&b, lib, r, Order{Step: step}); err != nil {
				t.Fatal(err)
			}
			exhaust(t, r, b.String())
		}
	}
}

func exhaust(t *testing.T, r *material.Record, text string) {
	t.Helper()
	h := readHeader(t, text)
	c, scale := r.Adopted.Ratio.Nominal, 1e-9*float64(h.ppb)
	reference, ok := c.At(273.15 + float64(h.nominal)/1000)
	last := h.first + (h.rows-1)*h.step
	if lo, hi := r.Adopted.Valid.Lo, r.Adopted.Valid.Hi; !ok || float64(h.first)/1000+273.15 < lo-1e-6 || float64(last)/1000+273.15 > hi+1e-6 {
		t.Fatalf("%s: %d to %d reaches outside %g to %g K", r.ID, h.first, last, lo, hi)
	}
	worst := 0.0
	for m := h.first; m <= last; m++ {
		v, _ := c.At(273.15 + float64(m)/1000)
		want := (v/reference - 1) / scale
		line, rounded := h.at(m)
		off := math.Abs(line - want)
		worst = math.Max(worst, off)
		if off > h.stated+1e-6 || math.Abs(float64(rounded)-want) > h.stated+0.5+1e-6 {
			t.Fatalf("%s at %d m°C: line %g, rounded %d, curve %g, stated %g counts", r.ID, m, line, rounded, want, h.stated)
		}
	}
	if worst < 0.05 && h.stated > 0.55 {
		t.Errorf("%s: the largest error is %g counts: the comparison sees nothing", r.ID, worst)
	}
}

// sameTable: the CSV has the rows of the header.
func sameTable(t *testing.T, r *material.Record, text, table string) {
	t.Helper()
	h := readHeader(t, text)
	rows, err := csv.NewReader(strings.NewReader(table)).ReadAll()
	if err != nil || len(rows) != len(h.counts)+1 {
		t.Fatalf("%s: %d rows, %v", r.ID, len(rows), err)
	}
	for i, row := range rows[1:] {
		if int64(published.Number(t, row[0])) != h.first+int64(i)*h.step || int64(published.Number(t, row[1])) != h.counts[i] ||
			published.Number(t, row[2])*1000 != float64(h.ppb) || published.Number(t, row[3]) != h.stated {
			t.Fatalf("%s: row %v", r.ID, row)
		}
	}
}

// TestLookupOfAnyCurve: tables through random rows, straight or curved, with a
// step at one knot, are chosen and within their bound; seeds are fixed.
func TestLookupOfAnyCurve(t *testing.T) {
	for seed := range uint64(300) {
		random := rand.New(rand.NewPCG(seed, 4))
		l, err := randomTask(t, random).lookupOf()
		if err != nil || len(l.counts) > mostRows || !(l.bound < 1) {
			t.Fatalf("seed %d: %v, %+v", seed, err, l)
		}
		last := l.first + int64(len(l.counts)-1)*l.stepM
		for range 3000 {
			m := l.first + random.Int64N(last-l.first)
			i := (m - l.first) / l.stepM
			line := float64(l.counts[i]) + float64(l.counts[i+1]-l.counts[i])*float64(m-l.first-i*l.stepM)/float64(l.stepM)
			v, _ := l.ratio.At(273.15 + float64(m)/1000)
			if off := math.Abs(line - (v-1)/(l.ppm*1e-6)); off > l.bound+1e-6 {
				t.Fatalf("seed %d at %d m°C: off by %g counts, proven %g", seed, m, off, l.bound)
			}
		}
		if left := l.uncovered(); left < 0 || left >= l.stepM {
			t.Errorf("seed %d: %d thousandths are left over, step %d", seed, left, l.stepM)
		}
	}
}

// randomTask has 2 to 12 rows of R/R(nominal) from 0.05 to 5, and a step of
// 500 ppm at some knot of half of the seeds.
func randomTask(t *testing.T, random *rand.Rand) task {
	t.Helper()
	n := 2 + random.IntN(11)
	kelvin, ratio := make([]float64, n), make([]float64, n)
	at := 4 + 100*random.Float64()
	for i := range n {
		kelvin[i], ratio[i] = at, 0.05+5*random.Float64()*random.Float64()
		at += 0.1 + 150*random.Float64()*random.Float64()
	}
	c, err := curve.Table(kelvin, ratio, random.IntN(2) == 0)
	if err != nil {
		t.Fatal(err)
	}
	if k := random.IntN(2 * len(c.Segments)); k < len(c.Segments) {
		for i := k; i < len(c.Segments); i++ {
			c.Segments[i].C[0] += 0.0005
		}
	}
	return task{ratio: c, nominal: kelvin[0], lo: kelvin[0], hi: kelvin[n-1]}
}

// TestThermometerTable: IEC 60751 tells R(100 °C)/R(0 °C) = 1.3851 and
// R(−200 °C)/R(0 °C) = 0.1852; a table in steps of 5 K must say so.
func TestThermometerTable(t *testing.T) {
	lib, _ := written(t)
	var b bytes.Buffer
	if err := LookupHeader(&b, lib, lib.Material("platinum-thermometer"), Order{Step: 5}); err != nil {
		t.Fatal(err)
	}
	h := readHeader(t, b.String())
	for milli, want := range map[int64]float64{100000: 1.3851, -200000: 0.1852, 0: 1, 850000: 3.9048} {
		line, _ := h.at(milli)
		if got := 1 + line*float64(h.ppb)*1e-9; math.Abs(got-want) > 6e-5 {
			t.Errorf("%d m°C: %g, want %g", milli, got, want)
		}
	}
}

// TestElements: ascending, first and last row on the limits of the data, and
// between the rows both columns within the stated error of the curves, which is
// 10 ppm unless that takes too many rows.
func TestElements(t *testing.T) {
	lib, files := written(t)
	n := 0
	for _, r := range lib.Materials {
		if text, ok := files["data/"+r.ID+"-elements.csv"]; ok {
			n++
			elementsHold(t, r, text, true)
		}
	}
	if n < 20 {
		t.Errorf("%d tables", n)
	}
	lib, r := invented(t, steppedRecord)
	for _, step := range []float64{0, 3, 150} {
		var b bytes.Buffer
		if err := Elements(&b, lib, r, Order{Step: step}); err != nil {
			t.Fatal(err)
		}
		elementsHold(t, r, b.String(), false) // no row resolves a step
	}
}

func elementsHold(t *testing.T, r *material.Record, text string, smooth bool) {
	t.Helper()
	all, err := csv.NewReader(strings.NewReader(text)).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	rows := all[1:]
	num := func(i, column int) float64 { return published.Number(t, rows[i][column]) }
	set, last := r.Adopted, len(rows)-1
	if math.Abs(num(0, 1)-set.Valid.Lo) > 1e-8 || math.Abs(num(last, 1)-set.Valid.Hi) > 1e-8 || rows[0][5] != "SI" || rows[0][8] != "no value" {
		t.Errorf("%s: %v to %v", r.ID, rows[0], rows[last])
	}
	if num(0, 7) > 10 && len(rows) < mostRows/2 && smooth {
		t.Errorf("%s: %s ppm with %d rows", r.ID, rows[0][7], len(rows))
	}
	ratio, _ := curve.Ratio(set.Ratio.Nominal, num(0, 4)+273.15)
	at, _ := set.Rho.Nominal.At(num(0, 4) + 273.15)
	for i := 1; i <= last; i++ {
		if num(i, 1) <= num(i-1, 1) {
			t.Fatalf("%s: row %d does not rise", r.ID, i+1)
		}
		for k := range 9 {
			x := float64(k+1) / 10
			kelvin := num(i-1, 1) + x*(num(i, 1)-num(i-1, 1))
			rho, _ := set.Rho.Nominal.At(kelvin)
			fixed, _ := ratio.At(kelvin)
			for column, want := range map[int]float64{2: rho, 3: at * fixed} {
				got := num(i-1, column) + x*(num(i, column)-num(i-1, column))
				if math.Abs(got/want-1) > num(0, 7)*1e-6+1e-11 {
					t.Fatalf("%s, column %d at %g K: line %g, curve %g, stated %s ppm", r.ID, column, kelvin, got, want, rows[0][7])
				}
			}
		}
	}
}

// TestHeaderCompiles: a compiler (Debian package gcc) takes every header of
// the demo without a warning.
func TestHeaderCompiles(t *testing.T) {
	published.Need(t, "gcc", "gcc")
	_, files := written(t)
	var b strings.Builder
	for path, text := range files {
		if strings.HasSuffix(path, ".h") {
			b.WriteString(text)
		}
	}
	compile(t, b.String())
}

func compile(t *testing.T, text string) {
	t.Helper()
	file := filepath.Join(t.TempDir(), "tables.c")
	if err := os.WriteFile(file, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
	c := exec.Command("gcc", "-std=c99", "-ffreestanding", "-fsyntax-only", "-Wall", "-Wextra", "-pedantic", "-Werror", "-Wno-unused-const-variable", "-Wno-unused-variable", file)
	if out, err := c.CombinedOutput(); err != nil {
		t.Errorf("%v\n%s", err, out)
	}
}

// BenchmarkFiles writes all four files of every material of the demo.
func BenchmarkFiles(b *testing.B) {
	lib, err := library.Load("../..", library.Options{})
	if err != nil {
		b.Fatal(err)
	}
	var w bytes.Buffer
	for b.Loop() {
		for _, r := range lib.Materials {
			for _, o := range forPrograms(lib, r) {
				w.Reset()
				if err := o.Write(&w); err != nil {
					b.Fatal(err)
				}
			}
		}
	}
	b.ReportMetric(float64(b.Elapsed().Microseconds())/float64(b.N*len(lib.Materials)), "µs/material")
}
