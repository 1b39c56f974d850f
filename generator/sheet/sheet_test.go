package sheet

import (
	"bytes"
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/signintech/gopdf"

	"ohmfolio/generator/copycheck"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/published"
	"ohmfolio/generator/statement"
	"ohmfolio/generator/study"
)

func demo(t testing.TB) *Input {
	t.Helper()
	lib, err := library.Load(filepath.Join("..", ".."), library.Options{})
	if err != nil {
		t.Fatal(err)
	}
	return inputOf(lib)
}

func inputOf(lib *library.Library) *Input {
	return &Input{Library: lib, Statement: func(r *material.Record) *statement.Statement { return statement.Of(lib, r) }, Cautions: study.SheetCautions()}
}

func written(t testing.TB, in *Input, id, paper string) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := Write(&b, in, in.Statement(in.Library.Material(id)), papers[paper]); err != nil {
		t.Fatal(id, err)
	}
	return b.Bytes()
}

func onDisk(t *testing.T, text []byte) string {
	t.Helper()
	file := filepath.Join(t.TempDir(), "s.pdf")
	if err := os.WriteFile(file, text, 0o644); err != nil {
		t.Fatal(err)
	}
	return file
}

func run(t *testing.T, program, debianPackage string, args ...string) string {
	t.Helper()
	published.Need(t, program, debianPackage)
	c := exec.Command(program, args...)
	var errors strings.Builder
	c.Stderr = &errors
	out, err := c.Output()
	if err != nil {
		t.Fatalf("%s %v: %v\n%s%s", program, args, err, out, errors.String())
	}
	return string(out)
}

// TestEverySheet holds every sheet of the demo on both papers against poppler
// and qpdf: sound files, fonts embedded with their signs, page n of N on each
// page, identity on each page, cautions, and the same bytes twice.
func TestEverySheet(t *testing.T) {
	in := demo(t)
	for i, r := range in.Library.Materials {
		paper := []string{"A4", "Letter"}[i%2]
		text := written(t, in, r.ID, paper)
		if !bytes.Equal(text, written(t, in, r.ID, paper)) {
			t.Errorf("%s: other bytes the second time", r.ID)
		}
		file := onDisk(t, text)
		run(t, "qpdf", "qpdf", "--check", file)
		info := run(t, "pdfinfo", "poppler-utils", file)
		if !strings.Contains(info, "Title:           "+in.Statement(r).DocumentNumber) {
			t.Errorf("%s: no title in %s", r.ID, info)
		}
		for _, line := range strings.Split(strings.TrimSpace(run(t, "pdffonts", "poppler-utils", file)), "\n")[2:] {
			if f := strings.Fields(line); len(f) < 6 || f[len(f)-5] != "yes" || f[len(f)-3] != "yes" {
				t.Errorf("%s: a font is not embedded, or its signs have no names: %s", r.ID, line)
			}
		}
		pages := strings.Split(strings.TrimSuffix(run(t, "pdftotext", "poppler-utils", "-layout", file, "-"), "\f"), "\f")
		for n, page := range pages {
			for _, part := range []string{"page " + strconv.Itoa(n+1) + " of " + strconv.Itoa(len(pages)), in.Statement(r).DocumentNumber, r.Fingerprint, "revision " + strconv.Itoa(r.Revision)} {
				if !strings.Contains(page, part) {
					t.Errorf("%s, page %d: %q is missing", r.ID, n+1, part)
				}
			}
			if r.Status != material.Released && !strings.Contains(page, "not for use") {
				t.Errorf("%s, page %d does not say that it is not for use", r.ID, n+1)
			}
		}
		all := strings.Join(pages, "\n")
		if !strings.Contains(all, "Cautions") || !strings.Contains(all, "not an approval") {
			t.Errorf("%s: no cautions", r.ID)
		}
		if strings.Contains(all, "?") && !strings.Contains(r.Notes, "?") {
			t.Errorf("%s: a sign that the fonts do not have: %s", r.ID, regexp.MustCompile(`.{0,30}\?.{0,30}`).FindString(all))
		}
	}
}

// TestReadingOrder: the text comes out as a person reads it, with units and
// Greek letters.
func TestReadingOrder(t *testing.T) {
	in := demo(t)
	text := run(t, "pdftotext", "poppler-utils", "-layout", onDisk(t, written(t, in, "cumn12ni", "A4")), "-")
	last := -1
	for _, part := range []string{"Copper-manganese-nickel resistance alloy", "Resistivity at 25 °C", "µΩ·cm", "β about 25 °C", "ppm/K²", "Cautions", "not an approval", "Values at round steps", "Properties", "thermal EMF", "Not stated", "Sources", "Author:"} {
		at := strings.Index(text, part)
		if at < last {
			t.Errorf("%q stands before what comes before it, or is missing", part)
		}
		last = max(last, at)
	}
}

// TestCodeIsRead: the QR code on the rendered page is read back by an
// independent decoder, zbarimg (Debian zbar-tools).
func TestCodeIsRead(t *testing.T) {
	in := demo(t)
	published.Need(t, "zbarimg", "zbar-tools")
	for _, id := range []string{"cumn12ni", "platinum-thermometer", "copper-annealed"} {
		r := in.Library.Material(id)
		file := onDisk(t, written(t, in, id, "A4"))
		image := filepath.Join(t.TempDir(), "page")
		run(t, "pdftoppm", "poppler-utils", "-r", "150", "-gray", "-png", "-f", "1", "-l", "1", "-singlefile", file, image)
		got := strings.TrimSpace(run(t, "zbarimg", "zbar-tools", "-q", "--raw", image+".png"))
		want := copycheck.Address(in.Library.Settings.Address, copycheck.Characters(r.ID, r.Revision, r.Fingerprint))
		if got != want || !strings.HasPrefix(want, "https://") {
			t.Errorf("%s: read %q, want %q", id, got, want)
		}
	}
}

// TestLongTables: a table over several pages has its head on each, and no row is
// split between two.
func TestLongTables(t *testing.T) {
	in := demo(t)
	face, err := theTypeface()
	if err != nil {
		t.Fatal(err)
	}
	d := newDoc(face, papers["Letter"])
	var rows [][]string
	for i := range 150 {
		rows = append(rows, []string{"row " + strconv.Itoa(i), strings.Repeat("words that need more than one line ", 5), "end " + strconv.Itoa(i)})
	}
	d.table("A long table", []string{"First head", "second head", "third head"}, rows, nil)
	var b bytes.Buffer
	if err := d.write(&b, (&sheet{doc: d, in: in, s: in.Statement(in.Library.Materials[0])}).identity()); err != nil {
		t.Fatal(err)
	}
	pages := strings.Split(strings.TrimSuffix(run(t, "pdftotext", "poppler-utils", "-layout", onDisk(t, b.Bytes()), "-"), "\f"), "\f")
	if len(pages) < 3 {
		t.Fatalf("%d pages", len(pages))
	}
	for n, page := range pages {
		if !strings.Contains(page, "First head") || !strings.Contains(page, "third head") {
			t.Errorf("page %d has no head", n+1)
		}
		if n > 0 && !strings.Contains(page, "continued") {
			t.Errorf("page %d does not say that the table goes on", n+1)
		}
	}
	for i := range 150 {
		for n, page := range pages {
			if has := regexp.MustCompile(`row ` + strconv.Itoa(i) + `\b`).MatchString(page); has != regexp.MustCompile(`end `+strconv.Itoa(i)+`\b`).MatchString(page) {
				t.Errorf("row %d is split at page %d", i, n+1)
			}
		}
	}
}

// TestHostile: no text of a record breaks the file, whatever it holds.
func TestHostile(t *testing.T) {
	nasty := `)(\ <</JS (app.alert(1))>> endstream %PDF ` + strings.Repeat("Ω", 400) + " \U0001f600 \u202e"
	lib := library.FromFiles(map[string][]byte{
		"content/reference.yaml": []byte("title: 'T )( \\'\npdf: yes\n"),
		"materials/sources.yaml": []byte("s: {kind: standard, title: '" + nasty + "', number: N}\n"),
		"materials/x.yaml":       []byte("name: 'X " + nasty + "'\nsource: s\nnotes: '" + nasty + nasty + "'\nbasis: resistance\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\nalpha: 10 ppm/K\nvalid_range: 0 °C to 60 °C\n"),
	})
	if place.Count(lib.Findings, place.Error) > 0 {
		t.Fatal(lib.Findings)
	}
	text := written(t, inputOf(lib), "x", "A4")
	run(t, "qpdf", "qpdf", "--check", onDisk(t, text))
	if bytes.Contains(text, []byte("/JS")) {
		t.Error("a script reached the file")
	}
}

// TestDashes: pieces and gaps follow the dash along a bent line, and nothing of
// the length is lost.
func TestDashes(t *testing.T) {
	line := []gopdf.Point{{X: 0, Y: 0}, {X: 10, Y: 0}, {X: 10, Y: 7}, {X: 30, Y: 7}}
	pieces := dashed(line, []float64{4, 2})
	sum := 0.0
	for _, p := range pieces {
		for i := 1; i < len(p); i++ {
			sum += math.Hypot(p[i].X-p[i-1].X, p[i].Y-p[i-1].Y)
		}
	}
	// 37 = 6 whole dashes of 4 with their gaps of 2 (36), and 1 of the seventh
	if len(pieces) != 7 || math.Abs(sum-25) > 1e-9 {
		t.Errorf("%d pieces of %v in all", len(pieces), sum)
	}
	out := ribbon([]gopdf.Point{{X: 0, Y: 0}, {X: 10, Y: 0}}, 2)
	if len(out) != 4 || math.Abs(math.Abs(out[0].Y)-1) > 1e-12 || out[0].Y != -out[3].Y {
		t.Errorf("ribbon %v", out)
	}
}

func BenchmarkSheet(b *testing.B) {
	in := demo(b)
	s := in.Statement(in.Library.Material("cumn12ni"))
	var w bytes.Buffer
	for b.Loop() {
		w.Reset()
		if err := Write(&w, in, s, papers["A4"]); err != nil {
			b.Fatal(err)
		}
	}
}

// TestStudySheets sets every study of the demo; the cautions stand on the page
// of the answer, and every table of the study is there.
func TestStudySheets(t *testing.T) {
	in := demo(t)
	n := 0
	for _, d := range in.Library.Documents {
		for i, block := range d.Page.Studies {
			o, findings := study.Run(in.Library, block)
			if o == nil {
				t.Fatal(findings)
			}
			n++
			var b bytes.Buffer
			if err := WriteStudy(&b, in, Study{d.Stem, i, d.Page.Title, o}, papers["A4"]); err != nil {
				t.Fatal(err)
			}
			file := onDisk(t, b.Bytes())
			run(t, "qpdf", "qpdf", "--check", file)
			text := run(t, "pdftotext", "poppler-utils", "-layout", file, "-")
			first, _, _ := strings.Cut(text, "\f")
			for _, part := range []string{"Given", "Answer", "Cautions", "not an approval", "page 1 of"} {
				if !strings.Contains(first, part) {
					t.Errorf("%s, %q: %q is not on the first page", d.Stem, o.Title, part)
				}
			}
			if text = strings.ReplaceAll(text, d.Page.Title, ""); strings.Contains(text, "?") {
				t.Errorf("%s, %q: a sign that the fonts do not have: %s", d.Stem, o.Title, regexp.MustCompile(`.{0,30}\?.{0,30}`).FindString(text))
			}
		}
	}
	if n < 8 {
		t.Errorf("only %d studies", n)
	}
}
