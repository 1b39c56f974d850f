package transcribe

import (
	"encoding/csv"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
)

// nasty are texts that mean something to YAML, HTML, a spreadsheet or a
// terminal.
var nasty = []string{
	"", " ", "-", "---", "...", "- a", "? a", ": a", "a: b", "a:", "a #b", "#", "# a", "&a", "*a", "!a", "!!str a", "|", ">", "|-\n a", "%a", "@a", "`a`",
	"{", "}", "[", "]", "{a: b}", "[a, b]", "a, b", ",", "'", "''", "it's", `"`, `""`, `a"b`, `\`, `a\nb`, `a\`, "a\nb", "a\r\nb", "a\tb", "yes", "No", "true", "null", "~", "NaN", ".inf",
	"1", "1.5", "1e3", "0x1f", "0o17", "1_000", "12:30", "2026-12-01", "<<", "=", "=1+1", "=HYPERLINK(\"x\")", "+1", "-1", "@SUM(A1)", "<script>alert(1)</script>", "&amp;", "</pre>", "%s%d", "$(x)", "../../etc", "..\\x", "con", "nul", "sources",
	"µΩ·cm", "Ω", "Ω", "°", "−5", "5 µΩ·cm", "5 ± 1", "5 µΩ·cm ± 5 %", "± 5", "+/-5", "1e999 µΩ·cm", "1e-999", "-300 °C", "0 to", "to 5", "5 to 1", "<= 5", "1,5", "1.234,5", "1,234.5", "1;5",
	"\u200b", "\u202e", "e\u0301", "铜", "🔥", "\u00a0", "\u2028", "\u0085", "\x00", "\x1b[31m", "\x7f", "\xff", "\xb5", "\ufeff", "\ufffd", "\ufffe", strings.Repeat("x", 3000), strings.Repeat("é", 300),
}

const full = "Name,Family,Designation,Applies to,Not for,Notes,Source,Class of value,Condition,Basis,Tref [°C],Valid range [°C],Resistivity [µΩ·cm],Conductivity [MS/m],TCR [ppm/K],Beta [ppm/K²],Gamma [/K³],Density [g/cm³],CTE [ppm/K],EMF to copper [µV/K],Thermal conductivity [W/(m·K)],Specific heat [J/(kg·K)],Melting point [°C],Tensile strength [MPa],Elongation [%],Colour\n"

var good = []string{"Alloy", "resistance alloys", "A1", "strip", "boats", "none yet", "book", "typical", "annealed", "resistance", "20", "0 to 60", "43", "", "10", "-0.5", "1e-9", "8.4", "18", "-1", "22", "410", "960 to 1020", "390", "20", "red"}

// sound holds every draft against the rules again, as a reader would.
func sound(t *testing.T, what string, r Result) {
	t.Helper()
	seen := map[string]bool{}
	for _, d := range r.Drafts {
		if !library.PlainID(d.ID) || seen[d.ID] {
			t.Errorf("%q: the ID %q", what, d.ID)
		}
		seen[d.ID] = true
		if f := firstError(check(d.ID, d.Text)); f != nil {
			t.Errorf("%q: %s at line %d of\n%s", what, f.Message, f.Position.Line, d.Text)
		}
		if !strings.HasPrefix(string(d.Text), "# Draft from line ") {
			t.Errorf("%q: begins otherwise:\n%s", what, d.Text)
		}
	}
	if r.Mapping != "" {
		if _, findings := ReadColumns(place.NewSource("columns.yaml", []byte(r.Mapping))); len(findings) > 0 {
			t.Errorf("%q: the mapping is not read back: %s\n%s", what, findings[0].Message, r.Mapping)
		}
	}
}

func row(cells []string) string {
	var b strings.Builder
	w := csv.NewWriter(&b)
	w.Write(cells)
	w.Flush()
	return b.String()
}

func TestGoodRow(t *testing.T) {
	r := ran(full+row(good), nil)
	text := only(t, r)
	if found(r) != "table-column:1:355" || strings.Count(text, "\n") < 25 {
		t.Errorf("found %s in\n%s", found(r), text)
	}
}

// TestNastyCells puts every nasty text into every cell of a row and of the
// head: every draft that comes out is accepted by all rules, and no text is
// lost without a finding.
func TestNastyCells(t *testing.T) {
	heads, err := csv.NewReader(strings.NewReader(full)).Read()
	if err != nil {
		t.Fatal(err)
	}
	for column := range good {
		for i, text := range nasty {
			for _, mode := range []func(*Options){nil, comma} {
				if mode != nil && (match(heads[column]).unit == "" || (i+column)%3 > 0) {
					continue // the flag is about numbers; a third of the texts is enough for each
				}
				cells := append([]string{}, good...)
				cells[column] = text
				r := ran(full+row(cells), mode)
				sound(t, text, r)
				if len(r.Drafts) == 0 && place.Count(r.Findings, place.Error) == 0 && !isEmpty(strings.TrimSpace(text)) {
					t.Errorf("%q in %s: no draft and no finding in error", text, heads[column])
				}
			}
			if (i+column)%3 > 0 {
				continue // a third of the texts in every head, every text in a third of them
			}
			names := append([]string{}, heads...)
			names[column] = text
			sound(t, text, ran(row(names)+row(good), nil))
		}
	}
}

// FuzzTable is seeded from the tables that the demo holds and from rows of
// every kind.
func FuzzTable(f *testing.F) {
	f.Add([]byte(full+row(good)), false)
	f.Add([]byte("\ufeffName;Resistivity [µΩ·cm];Tref\r\nA;1,7 ± 5 %;20 °C\r\n"), true)
	for _, k := range Kinds {
		f.Add([]byte(k.Trigger), false)
	}
	files, _ := filepath.Glob("../../materials/*.csv")
	if len(files) == 0 {
		f.Fatal("no table to begin with")
	}
	for _, file := range files {
		text, err := os.ReadFile(file)
		if err != nil {
			f.Fatal(err)
		}
		f.Add(text, false)
	}
	f.Fuzz(func(t *testing.T, text []byte, comma bool) {
		r := ran(string(text), func(o *Options) { o.Comma = comma })
		sound(t, string(text), r)
		for _, c := range r.Findings {
			if c.Position.Line > 0 && c.Position.Column < 1 {
				t.Errorf("a place without a column: %+v", c)
			}
		}
	})
}
