package export

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/published"
)

// TestFilesAreToldTruly: what ID.json and the page say is what is written, and
// the reason for a refusal is what the writer says. No writer fails otherwise.
func TestFilesAreToldTruly(t *testing.T) {
	lib, files := written(t)
	refused := 0
	for _, r := range lib.Materials {
		var m materialFile
		if err := json.Unmarshal([]byte(files["data/"+r.ID+".json"]), &m); err != nil || len(m.Files) != len(kinds) {
			t.Fatalf("%s: %d files, %v", r.ID, len(m.Files), err)
		}
		for i, k := range kinds {
			var b bytes.Buffer
			err := k.write(&b, lib, r, Order{})
			text, there := files["data/"+r.ID+k.ending]
			switch {
			case err != nil && (there || m.Files[i].Refused != err.Error() || b.Len() > 0):
				t.Errorf("%s%s: written %t, told %q, refused for %v", r.ID, k.ending, there, m.Files[i].Refused, err)
			case err == nil && (!there || m.Files[i].Path != "data/"+r.ID+k.ending || !strings.Contains(text, r.Fingerprint)):
				t.Errorf("%s%s: written %t, told %q", r.ID, k.ending, there, m.Files[i].Path)
			case err != nil:
				refused++
			}
			for j := range len(text) {
				if text[j] >= 0x80 {
					t.Fatalf("%s%s: a byte that is not ASCII", r.ID, k.ending)
				}
			}
		}
	}
	if refused < 10 {
		t.Errorf("only %d files are refused: the demo has materials without a curve", refused)
	}
}

// TestRefusals: each refusal says in words why.
func TestRefusals(t *testing.T) {
	window := func(lo, hi float64) *material.Window { return &material.Window{Lo: lo + 273.15, Hi: hi + 273.15} }
	at := func(c float64) *float64 { c += 273.15; return &c }
	quadratic := parabolic("10", "-0.5", "20", "-40", "125")
	ratios := strings.Replace(quadratic, "resistivity: 43 µΩ·cm\n", "", 1)
	cases := []struct {
		name, record string
		order        Order
		kind         int
		want         string
	}{
		{"27 °C outside", parabolic("10", "-0.5", "60", "50", "125"), Order{}, 0, "nominal temperature 27 °C lies outside the valid range 50 °C to 125 °C"},
		{"own reference inside", parabolic("10", "-0.5", "60", "50", "125"), Order{}, 1, ""},
		{"nominal at the edge", quadratic, Order{Nominal: at(125)}, 0, ""},
		{"nominal beyond the edge", quadratic, Order{Nominal: at(125.001)}, 0, "nominal temperature"},
		{"window at the edge", quadratic, Order{Window: window(-40, 125)}, 1, ""},
		{"window beyond the edge", quadratic, Order{Window: window(-40, 125.01)}, 1, "reaches outside the valid range"},
		{"no width", quadratic, Order{Window: window(20, 20.001)}, 0, "no width"},
		{"no coefficient", "name: A point\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\nsource: standard\n", Order{}, 0, "no coefficient"},
		{"limits alone", "name: Limits\nresistivity: 43 µΩ·cm\nalpha: -3 to 5 ppm/K\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 50 °C\nsource: standard\n", Order{}, 1, "limits without a nominal curve"},
		{"no resistivity", ratios, Order{}, 3, "ratios only"},
		{"no such set", quadratic, Order{Set: "other"}, 0, `no data set "other"`},
		{"odd step", quadratic, Order{Step: 0.0005}, 2, "whole number of thousandths"},
		{"step too long", quadratic, Order{Step: 1000}, 2, "ask for 2 to"},
		{"step too short", quadratic, Order{Step: 0.001}, 1, "ask for 2 to"},
		{"elements with a step too short", quadratic, Order{Step: 0.001}, 3, "more than 65536 rows"},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			lib, r := invented(t, c.record)
			var b bytes.Buffer
			err := kinds[c.kind].write(&b, lib, r, c.order)
			if (c.want == "") != (err == nil) || err != nil && !strings.Contains(strings.ReplaceAll(err.Error(), "\u202f", " "), c.want) {
				t.Errorf("error %v, want %q", err, c.want)
			}
		})
	}
}

// hostile is a text that tries to become a line of a simulator, of C or a
// formula of a spreadsheet, whatever line ends a program knows.
const hostile = "=cmd|'/c'!A1\n.end\r\n+ more\u2028*# quit\u0085#include \"x\" */ int evil; /* \\\n??/ \"\x00 ü Ω 電"

func hostileRecord(t *testing.T) (*library.Library, *material.Record) {
	lib, r := invented(t, steppedRecord)
	r.Name, r.NotFor = hostile, hostile
	r.Adopted.Name, r.Adopted.Condition, r.Adopted.Source.ID = hostile, hostile, hostile
	r.Adopted.Caveats = []string{hostile}
	return lib, r
}

// TestHostileTexts: no name becomes a line of its own in a simulator file, code
// in a header or a formula in a table.
func TestHostileTexts(t *testing.T) {
	lib, r := hostileRecord(t)
	text := simulatorText(t, lib, r, Order{})
	begins := []string{"* ", "*\n", ".model r_x_1 ", ".subckt r_x_1_curve ", ".func r_x_1_", "+ +", "r1 a b r=", ".ends\n"}
	for _, line := range strings.SplitAfter(text, "\n") {
		good := line == ""
		for _, b := range begins {
			good = good || strings.HasPrefix(line, b)
		}
		if !good {
			t.Errorf("a line of its own: %q", line)
		}
	}
	if strings.ContainsAny(text, "\r\x00\x85") || !strings.Contains(text, "<U+96FB>") {
		t.Error("control characters or lost letters")
	}
	for i, table := range []func(*bytes.Buffer, *library.Library, *material.Record, Order) error{LookupCSV, Elements, func(w *bytes.Buffer, _ *library.Library, r *material.Record, _ Order) error { return writeCSV(w, r) }} {
		var b bytes.Buffer
		if err := table(&b, lib, r, Order{}); err != nil {
			t.Fatal(err)
		}
		rows, err := csv.NewReader(&b).ReadAll()
		if err != nil || len(rows) < 3 {
			t.Fatalf("table %d: %d rows, %v", i, len(rows), err)
		}
		for _, row := range rows[1:] {
			for _, c := range row {
				if _, number := published.Optional(c); !number && c != "" && strings.ContainsAny(c[:1], "=+-@\t\r|%") {
					t.Errorf("table %d: the cell %q would run as a formula", i, c)
				}
			}
		}
	}
}

// FuzzTexts: whatever a text holds, it is one line of printable ASCII, cannot
// end a comment or a string of C, and is no formula.
func FuzzTexts(f *testing.F) {
	f.Add(hostile)
	f.Add("*/*/**//*")
	f.Add(" =1")
	f.Add("\u200b=1")
	f.Add("???/\\")
	f.Fuzz(func(t *testing.T, s string) {
		for _, out := range []string{plain(s), inComment(s), inQuotes(s), cell(s)} {
			for i := range len(out) {
				if out[i] < 0x20 || out[i] > 0x7e {
					t.Fatalf("%q becomes %q", s, out)
				}
			}
		}
		if c := inComment(s); strings.Contains(c, "*/") || strings.Contains(c, "/*") {
			t.Errorf("a comment of %q", c)
		}
		if c := cell(s); c != "" && strings.ContainsAny(c[:1], "=+-@|% ") {
			t.Errorf("a cell of %q", c)
		}
		if q, err := strconv.Unquote(strings.ReplaceAll(inQuotes(s), `\?`, "?")); err != nil || q != plain(s) || strings.Contains(inQuotes(s), "??") {
			t.Errorf("quoted %s: %v", inQuotes(s), err)
		}
	})
}

// TestHostileTextsInPrograms: simulator and compiler take the hostile files,
// and nothing of the texts takes effect.
func TestHostileTextsInPrograms(t *testing.T) {
	published.Need(t, "ngspice", "ngspice")
	published.Need(t, "gcc", "gcc")
	lib, r := hostileRecord(t)
	got := resistances(t, simulatorText(t, lib, r, Order{}), []string{"x@ n@ 0 r_x_1_curve base=1"}, []float64{27})
	if off := got[0][0] - 1; off > 1e-9 || off < -1e-9 {
		t.Errorf("R(27 °C)/R(27 °C) is %g", got[0][0])
	}
	var b bytes.Buffer
	if err := LookupHeader(&b, lib, r, Order{}); err != nil {
		t.Fatal(err)
	}
	compile(t, "char evil;\n"+b.String()) // "int evil" would be another type
	code := regexp.MustCompile(`(?s)/\*.*?\*/`).ReplaceAllString(b.String(), "")
	if strings.Contains(code, "evil") || strings.Contains(code, "*/") || strings.Contains(code, "??/") {
		t.Errorf("a text has become code: %s", code)
	}
}

// TestOrderAsked: another data set, another nominal and a window are obeyed.
func TestOrderAsked(t *testing.T) {
	lib, r := invented(t, steppedRecord)
	cold := 223.15
	text := simulatorText(t, lib, r, Order{Set: "low", Nominal: &cold})
	if !strings.Contains(text, "tnom=-50)") || !strings.Contains(text, "data set: low\n") || strings.Contains(text, ".subckt") {
		t.Errorf("the straight line of the lower piece about −50 °C is not there: %s", text)
	}
	var b bytes.Buffer
	if err := LookupHeader(&b, lib, r, Order{Window: &material.Window{Lo: 263.15, Hi: 313.15}, Step: 2.5}); err != nil {
		t.Fatal(err)
	}
	if h := readHeader(t, b.String()); h.first != -10000 || h.step != 2500 || h.rows != 21 {
		t.Errorf("table %+v", h)
	}
}
