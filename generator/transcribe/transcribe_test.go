package transcribe

import (
	"fmt"
	"strings"
	"testing"

	"ohmfolio/generator/examine"
	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

const sources = "house: {kind: handbook, title: A table, publisher: the yard, checked: memory}\nbook: {kind: handbook, title: A book, publisher: X, checked: memory}\n"

// check holds one draft against every rule, as the command does.
func check(id string, text []byte) []place.Finding {
	file := "materials/" + id + ".yaml"
	var list []place.Finding
	for _, f := range examine.Run(library.FromFiles(map[string][]byte{"materials/sources.yaml": []byte(sources), file: text}), nil, examine.Options{Parallel: 1}) {
		if f.Position.File == file {
			list = append(list, f)
		}
	}
	return list
}

func options() Options {
	return Options{Source: "house", SourceIDs: []string{"book", "house"}, Check: check, PlainID: library.PlainID}
}

func ran(text string, change func(*Options)) Result {
	o := options()
	if change != nil {
		change(&o)
	}
	return Run(place.NewSource("table.csv", []byte(text)), o)
}

func comma(o *Options) { o.Comma = true }

// found writes findings as "code:line:column".
func found(r Result) string {
	var list []string
	for _, f := range r.Findings {
		list = append(list, fmt.Sprintf("%s:%d:%d", f.Code, f.Position.Line, f.Position.Column))
	}
	return strings.Join(list, " ")
}

func only(t *testing.T, r Result) string {
	t.Helper()
	if len(r.Drafts) != 1 {
		t.Fatalf("%d drafts, found %s", len(r.Drafts), found(r))
	}
	return string(r.Drafts[0].Text)
}

func TestHeads(t *testing.T) {
	for head, want := range map[string]string{
		"Resistivity [µΩ·cm]":             "resistivity µΩ·cm",
		"Resistivity (uohm cm)":           "resistivity uohm cm",
		"Resistivity / µΩ·cm":             "resistivity µΩ·cm",
		"Electrical resistivity, µΩ·cm":   "resistivity µΩ·cm",
		"Resistivity at 20 °C [Ω·mm²/m]":  "resistivity Ω·mm²/m @20 °C",
		"Resistivity (20 °C) [Ω·mm²/m]":   "resistivity Ω·mm²/m @20 °C",
		"resistivity @ -40 degC (µΩ·cm)":  "resistivity µΩ·cm @-40 degC",
		"Resistivity [%IACS]":             "resistivity %IACS",
		"Conductivity MS/m":               "conductivity MS/m",
		"Thermal conductivity [W/(m·K)]":  "thermal_conductivity W/(m·K)",
		"TCR ppm/°C":                      "alpha ppm/°C",
		"TCR (ppm/K)":                     "alpha ppm/K",
		"TCR [ppm/K²]":                    "beta ppm/K²",
		"Temp. coeff. in ppm/K":           "alpha ppm/K",
		"Density (g/cm3)":                 "density g/cm3",
		"Dichte g/cm³":                    "density g/cm³",
		"CTE [µm/m/K]":                    "expansion µm/m/K",
		"Tref":                            "reference_temperature ",
		"Tref [°C]":                       "reference_temperature °C",
		"Alloy name":                      "name ",
		"Temperature range, °C":           "valid_range °C",
		"Melting point °C":                "melting_temperature °C",
		"Resistivity tolerance [%]":       "",
		"Max. resistivity [µΩ·cm]":        "",
		"Density [µΩ·cm]":                 "",
		"Resistance [Ω/m]":                "",
		"Colour":                          "",
		"Supplier name":                   "",
		"":                                "",
		"[]":                              "",
		"Grade A":                         "short ",
		"Specific resistance [Ω·cmil/ft]": "resistivity Ω·cmil/ft",
		"EMF vs Cu [µV/K]":                "emf_to_copper µV/K",
		"Tensile strength (N/mm²)":        "tensile_strength N/mm²",
		"Spezifischer Widerstand [µΩ·cm]": "resistivity µΩ·cm",
	} {
		c := match(head)
		got := ""
		if c.target != nil {
			got = c.target.key + " " + c.unit
		}
		if c.reference != "" {
			got += " @" + c.reference
		}
		if got != want {
			t.Errorf("%q is %q, want %q", head, got, want)
		}
	}
}

// TestDraft: the whole way of one row, on one text, in several files that hold
// the same table: LF, CRLF, a byte-order mark, quotes, semicolons.
func TestDraft(t *testing.T) {
	const want = `# Draft from line 2 of a table. Compare every value with its source before it is used.
name: "Cupro-nickel, Höhe 1"
source: {id: house, where: line 2 of the table}
reference_temperature: 20 °C
valid_range: 0 to 100 °C
resistivity: 49.5 µΩ·cm ± 5 %
alpha: -80 to 40 ppm/K
properties:
  density: {value: 8.9 g/cm3, source: house}
# Colour: "red": {a
`
	lf := "Name,Resistivity [µΩ·cm],TCR ppm/K,Density (g/cm3),Tref [°C],Valid range [°C],Colour\n\"Cupro-nickel, Höhe 1\",49.5 ± 5 %,-80 to 40,8.9,20,0–100,\"\"\"red\"\": {a\"\n"
	semicolons := "Name;Resistivity [µΩ·cm];TCR ppm/K;Density (g/cm3);Tref [°C];Valid range [°C];Colour\nCupro-nickel, Höhe 1;49,5 ± 5 %;-80 to 40;8,9;20;0–100;\"\"\"red\"\": {a\"\n"
	for name, r := range map[string]Result{
		"LF":         ran(lf, nil),
		"CRLF":       ran(strings.ReplaceAll(lf, "\n", "\r\n"), nil),
		"mark":       ran("\ufeff"+lf, nil),
		"no end":     ran(strings.TrimSuffix(lf, "\n"), nil),
		"semicolons": ran(semicolons, comma),
		"commas":     ran(strings.NewReplacer("49.5 ± 5 %", `"49,5 ± 5 %"`, "8.9", `"8,9"`).Replace(lf), comma),
	} {
		if got := only(t, r); got != want {
			t.Errorf("%s:\n%s\nwant\n%s", name, got, want)
		}
		if found(r) != "table-column:1:79" && name != "semicolons" {
			t.Errorf("%s: found %s", name, found(r))
		}
		if id := r.Drafts[0].ID; id != "cupro-nickel-hoehe-1" {
			t.Errorf("the ID is %s", id)
		}
	}
}

// TestConductivity: 100 % IACS is 58 MS/m exactly (IEC publication 28, 1925),
// which is 1.7241 µΩ·cm; the cell is kept as the table has it.
func TestConductivity(t *testing.T) {
	for _, text := range []string{"Name,Resistivity [%IACS],Tref [°C]\nA,100,20\n", "Name,Conductivity [MS/m],Tref [°C]\nA,58,20\n", "Name,Resistivity [µΩ·cm],Tref [°C]\nA,58 MS/m,20\n"} {
		r := ran(text, nil)
		lib := library.FromFiles(map[string][]byte{"materials/sources.yaml": []byte(sources), "materials/a.yaml": []byte(only(t, r))})
		q, _ := quantity.Parse(quantity.Resistivity, "1.7241 µΩ·cm")
		set := lib.Material("a").Sets[0]
		if got := set.Resistivity.Value; got < 0.9999*q.Value || got > 1.0001*q.Value {
			t.Errorf("%q gives %g Ω·m", text, got)
		}
	}
	r := ran("Name,Resistivity [µΩ·cm],Conductivity [%IACS],Tref [°C]\nA,1.7241,61,20\n", nil)
	if text := only(t, r); !strings.Contains(text, "# conductivity: 61   (the row tells a resistivity too; they differ by 64 %)") || found(r) != "table-cell:2:10" {
		t.Errorf("found %s in\n%s", found(r), text)
	}
}

func TestFindings(t *testing.T) {
	for _, c := range []struct {
		text, want string
		change     func(*Options)
	}{
		{"Name,Density [g/cm³],Resistivity [µΩ·cm],Tref\nA,about 8,1,20 °C\n", "table-cell:2:3", nil},
		{"Name,Resistivity [µΩ·cm],Tref\nA,1,20\n", "table-row:2:1 table-cell:2:5", nil},
		{"Name,Resistivity [µΩ·cm],TCR [ppm/K],Tref,Valid range [°C]\nA,1,±20,20 °C,0 to 60\n", "table-cell:2:5", nil},
		{"Name,Resistivity [µΩ·cm],Tref\nA,\"1,7\",20 °C\n", "table-comma:2:3", nil},
		{"Name;Resistivity [µΩ·cm];Tref\nA;1,7;20 °C\n", "table-semicolons:1:1", nil},
		{"Name;Resistivity [µΩ·cm];Tref;Density [g/cm³]\nA;1,7;20 °C;8.9\n", "table-cell:2:13", comma},
		{"Name,Resistivity [nΩ·m],Tref\nA,\"1,024.5\",20 °C\n", "table-row:2:1 table-cell:2:3", nil},
		{"Name,Resistivity [µΩ·cm],Tref,Source\nA,1,20 °C,book\nB,1,20 °C,bok\n", "table-sources:3:11", nil},
		{"Name,Resistivity [µΩ·cm],Rho [µΩ·cm],Tref\nA,1,1,20 °C\n", "table-column:1:26", nil},
		{"Name,Resistivity [µΩ·cm],Tref\nA,1,20 °C,9\n", "table-cell:2:11", nil},
		{"Name,Resistivity [µΩ·cm],Tref\nA b,1,20 °C\nA-B,1,20 °C\n", "table-name:3:1", nil},
		{"Name,Resistivity [µΩ·cm],Tref\n,1,20 °C\n", "table-name:2:1", nil},
		{"Name,Resistivity [µΩ·cm],Tref\nnul,1,20 °C\n铜,1,20 °C\n", "table-name:2:1 table-name:3:1", nil},
		{"Name,Resistivity [µΩ·cm] at 20 °C,TCR at 25 °C [ppm/K]\nA,1,1\n", "table-row:2:1 table-cell:2:5", nil},
		{"Name,Resistivity [µΩ·cm] at 20 °C,Tref\nA,1,25 °C\nB,1,68 °F\n", "table-cell:2:1", nil},
		{"Name,Family,Resistivity [µΩ·cm],Tref\nA,shiny,1,20 °C\n", "table-cell:2:3", nil},
		{"a,b\n1,2\n", "table-head:1:1", nil},
		{"", "table-head:1:1", nil},
		{"Name,Resistivity [\xb5Ohm cm]\nA,1\n", "table-encoding:1:19", nil},
		{"Name,Resistivity [ÂµÎ©Â·cm]\nA,1\n", "table-encoding:1:19", nil},
		{"\xff\xfeN\x00a\x00", "table-encoding:0:0", nil},
		{"PK\x03\x04rest", "table-encoding:0:0", nil},
		{"Name,Resistivity [\ufffd]\nA,1\n", "table-encoding:1:19", nil},
		{"Name,Density\rA,1\r", "control-character:1:13", nil},
	} {
		r := ran(c.text, c.change)
		if found(r) != c.want {
			t.Errorf("%q: found %s, want %s", c.text, found(r), c.want)
		}
		for _, f := range r.Findings {
			if f.Mend == "" || f.Message == "" || (f.Position.Line > 0 && f.Line == "" && f.Position.Line > 1) {
				t.Errorf("%q: not told how to mend: %+v", c.text, f)
			}
		}
	}
}

// TestTriggers runs the smallest table of every kind of finding.
func TestTriggers(t *testing.T) {
	known := map[string]bool{}
	for _, k := range examine.Catalogue() {
		known[k.Code] = true
	}
	for i, k := range Kinds {
		if known[k.Code] || i > 0 && Kinds[i-1].Code >= k.Code {
			t.Errorf("%s stands elsewhere too, or is not sorted", k.Code)
		}
		if k.Trigger == "" {
			continue // table-taken: the command writes, and tests it
		}
		if r := ran(k.Trigger, nil); !strings.Contains(found(r), k.Code+":") {
			t.Errorf("%s is not found by its trigger: %s", k.Code, found(r))
		}
	}
}

func TestColumns(t *testing.T) {
	read := func(text string) (*Columns, []place.Finding) {
		return ReadColumns(place.NewSource("columns.yaml", []byte(text)))
	}
	for text, want := range map[string]string{
		"columns:\n  R20: {is: resistivty}\n":               "2",
		"columns:\n  R20: {is: resistivity, unit: g/cm3}\n": "2",
		"colums: {}\n":                                    "1",
		"every_row: {basis: sand}\n":                      "1",
		"every_row: {basis: resistance}\nevery_row: {}\n": "2",
	} {
		c, findings := read(text)
		if len(findings) == 0 || fmt.Sprint(findings[0].Position.Line) != want {
			t.Errorf("%q: %v %+v", text, c, findings)
		}
	}
	c, findings := read("columns:\n  R20: {is: resistivity, unit: µΩ·cm}\n  Colour: {is: nothing}\n  What: {is: name}\nevery_row: {reference_temperature: 20 °C, valid_range: 0 °C to 60 °C, basis: resistance, class: typical, condition: annealed}\n")
	if len(findings) > 0 {
		t.Fatalf("%+v", findings)
	}
	r := ran("What,R20,TCR ppm/K,Colour\nA,43,10,red\n", func(o *Options) { o.Columns = c })
	want := "name: A\nsource: {id: house, where: line 2 of the table}\nclass: typical\ncondition: annealed\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\n"
	if text := only(t, r); !strings.HasSuffix(text, "\n"+want) || found(r) != "" {
		t.Errorf("found %s in\n%s", found(r), text)
	}
	again, findings := read(r.Mapping)
	if len(findings) > 0 {
		t.Fatalf("the mapping is no file of columns: %+v\n%s", findings, r.Mapping)
	}
	if second := ran("What,R20,TCR ppm/K,Colour\nA,43,10,red\n", func(o *Options) { o.Columns = again }); only(t, second) != only(t, r) {
		t.Errorf("the printed mapping reads the table otherwise:\n%s", r.Mapping)
	}
	if r := ran("What,R2,TCR ppm/K\nA,43,10\n", func(o *Options) { o.Columns = c }); len(r.Drafts) > 0 || !strings.Contains(found(r), "table-column:2:3") {
		t.Errorf("a column that is not there: %s", found(r))
	}
}

// TestSixty: sixty rows with one fault each give sixty findings alike, which
// print as one group.
func TestSixty(t *testing.T) {
	text := "Name,Resistivity [µΩ·cm],TCR ppm/K,Tref [°C]\n"
	for i := range 60 {
		text += fmt.Sprintf("Alloy %d,%d,10,20\n", i, 40+i)
	}
	r := ran(text, nil)
	var b strings.Builder
	place.Print(&b, r.Findings, place.PrintOptions{Group: true})
	if len(r.Drafts) != 60 || len(r.Findings) != 60 || strings.Count(b.String(), "\n") != 5 {
		t.Errorf("%d drafts, %d findings, printed\n%s", len(r.Drafts), len(r.Findings), b.String())
	}
}
