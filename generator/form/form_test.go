package form

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

var sampleShape = &Shape{Name: "a sample", Fields: []Field{
	{Key: "name", Required: true, Is: Text, Example: "X"},
	{Key: "resistivity", Is: Quantity(quantity.Resistivity)},
	{Key: "density", Is: Mapping(&Shape{Name: "density", Fields: []Field{{Key: "value", Is: Quantity(quantity.Density)}, {Key: "note", Is: Text}}})},
	{Key: "range", Is: Range(quantity.Temperature)},
	{Key: "status", Is: OneOf("draft", "released")},
	{Key: "count", Is: Integer}, {Key: "on", Is: YesNo}, {Key: "date", Is: Date}, {Key: "rows", Is: Rows},
	{Key: "list", Is: List(Text)}, {Key: "names", Is: Named(Text)}, {Key: "either", Is: Either(Text, List(Text))},
}}

// TestFindings: each line that is wrong says in a comment what is wanted; a
// missing finding fails and so does an extra one.
func TestFindings(t *testing.T) {
	for _, text := range []string{
		"name: X\nresistvity: 43 µΩ·cm # want key-unknown 1\n",
		"name: X\nname: Y # want key-repeated 1\n",
		"resistivity: 43 µΩ·cm # want key-missing 1\n",
		"name: X\nresistivity: 43 # want unit-missing 14\n",
		"name: X\nresistivity: 43,1 µΩ·cm # want comma-decimal 14\n",
		"name: X\nresistivity: 43 µΩ·cn # want unit-unknown 17\n",
		"name: X\nresistivity: \"43 µΩ·cn\" # want unit-unknown 18\n",
		"name: X\ndensity: {value: 8,4 g/cm³} # want comma-decimal 18\n",
		"name: X\ndensity: {value: 8.4 g/cm³, note: a}\n",
		"name: X\nstatus: releasd # want word-unknown 9\n",
		"name: X\ncount: many # want type-wrong 8\n",
		"name: X\non: perhaps # want type-wrong 5\n",
		"name: X\ndate: 4.5.2026 # want date-not-read 7\n",
		"name: X\nrows: [[1, 2], [x, 3]] # want type-wrong 17\n",
		"name: X\nrows: [[1, .inf]] # want type-wrong 12\n",
		"name: X\nlist: a # want type-wrong 7\n",
		"name: X\neither: {a: b} # want type-wrong 9\n",
		"name: X\nstatus: # want value-missing 8\n",
		"name: &a X # want yaml-alias 7\n",
		"name: X # want yaml-syntax 0\nlist: [*a]\n",
		"name: !!str X # want yaml-tag 7\n",
		"name: X\n<<: {status: draft} # want yaml-alias 1\n",
		"name: X\n--- # want yaml-second-document 1\nname: Y\n",
		"name: [X # want yaml-syntax 0\n",
		"name: X\nrange: 100 °C to 0 °C\neither: [a, b]\nnames: {a: b}\n",
	} {
		_, findings := Read(place.NewSource("x.yaml", []byte(text)), sampleShape)
		want := wanted(text)
		for _, f := range findings {
			key := f.Code
			if want[f.Position.Line] == "" && f.Code == "yaml-syntax" { // YAML names the line after
				f.Position.Line = max(1, f.Position.Line-1)
			}
			if w := want[f.Position.Line]; !strings.HasPrefix(w, key+" ") || (f.Position.Column > 0 && w != key+" "+itoa(f.Position.Column)) {
				t.Errorf("%q: found %s at %d:%d, wanted %q there", text, f.Code, f.Position.Line, f.Position.Column, want[f.Position.Line])
			}
			delete(want, f.Position.Line)
		}
		for line, w := range want {
			t.Errorf("%q: %s on line %d is not found", text, w, line)
		}
	}
}

func itoa(n int) string { return quantity.KelvinText(float64(n)) }

func wanted(text string) map[int]string {
	want := map[int]string{}
	for i, line := range strings.Split(text, "\n") {
		if _, w, ok := strings.Cut(line, "# want "); ok {
			want[i+1] = w
		}
	}
	return want
}

// TestBytes: what is found before YAML is read.
func TestBytes(t *testing.T) {
	for name, text := range map[string]string{
		"lone CR": "name: X\rstatus: draft\n", "NEL": "name: X\u0085\n", "control": "name: X\x01\n", "not UTF-8": "name: \xff\n", "separator": "name: X\u2028\n", "late BOM": "name: \ufeffX\n",
	} {
		n, findings := Read(place.NewSource("x.yaml", []byte(text)), sampleShape)
		if n != nil || len(findings) != 1 || findings[0].Code != "control-character" || findings[0].Position.Column == 0 {
			t.Errorf("%s: %v", name, findings)
		}
	}
	for name, text := range map[string]string{"BOM": "\ufeffname: X\n", "CRLF": "name: X\r\nstatus: draft\r\n", "CJK": "name: 銅\n"} {
		if n, findings := Read(place.NewSource("x.yaml", []byte(text)), sampleShape); n == nil || len(findings) > 0 {
			t.Errorf("%s: %v", name, findings)
		}
	}
}

// TestShiftedBlock: a block inside a Markdown file reports the file's own
// lines and columns.
func TestShiftedBlock(t *testing.T) {
	src := &place.Source{File: "a.md", Text: []byte("name: X\nstatus: releasd\n"), First: 11, Shift: 4}
	_, findings := Read(src, sampleShape)
	if len(findings) != 1 || findings[0].Position.String() != "a.md:12:13" {
		t.Errorf("%v", findings)
	}
}

func TestPercentIsExplained(t *testing.T) {
	_, findings := Read(place.NewSource("x.yaml", []byte("name: X\nstatus: %IACS\n")), sampleShape)
	if len(findings) != 1 || !strings.Contains(findings[0].Mend, `"%IACS"`) || findings[0].Position.Line != 2 {
		t.Errorf("%+v", findings)
	}
}

// FuzzRead: no text panics, and every finding says something about the file.
func FuzzRead(f *testing.F) {
	files, _ := filepath.Glob("../../materials/*.yaml")
	for _, name := range files[:min(8, len(files))] {
		text, err := os.ReadFile(name)
		if err != nil {
			f.Fatal(err)
		}
		f.Add(text)
	}
	f.Add([]byte("a: &x [*x]\n"))
	f.Fuzz(func(t *testing.T, text []byte) {
		_, findings := Read(place.NewSource("x.yaml", text), sampleShape)
		for _, p := range findings {
			if p.Code == "" || p.Message == "" || p.Position.File != "x.yaml" {
				t.Fatalf("a finding that says nothing: %+v", p)
			}
		}
	})
}

func BenchmarkRead(b *testing.B) {
	src := place.NewSource("x.yaml", []byte("name: Copper\nresistivity: 1.7241 µΩ·cm\nrange: 0 °C to 100 °C\nstatus: draft\ncount: 3\ndate: 2026-01-01\n"))
	for b.Loop() {
		Read(src, sampleShape)
	}
}
