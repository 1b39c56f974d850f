package site

import (
	"bytes"
	"fmt"
	"path"
	"regexp"
	"strings"
	"testing"

	"ohmfolio/generator/changes"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
	"ohmfolio/generator/place"
	"ohmfolio/generator/statement"
	"ohmfolio/generator/study"
	"ohmfolio/themes"
)

// inputOf makes the input of a library, with its studies run.
func inputOf(lib *library.Library) *Input {
	in := &Input{Library: lib, Theme: themes.Files, Outcomes: map[string][]*study.Outcome{}, Findings: lib.Findings,
		Statement: func(r *material.Record) *statement.Statement { return statement.Of(lib, r) }}
	for _, d := range lib.Documents {
		for _, block := range d.Page.Studies {
			if o, _ := study.Run(lib, block); o != nil {
				key := strings.TrimPrefix(d.Room+"/"+d.Stem, "/")
				in.Outcomes[key] = append(in.Outcomes[key], o)
			}
		}
	}
	editions, findings := changes.Editions(lib)
	in.Findings = append(in.Findings, findings...)
	now := changes.Freeze(lib, in.Outcomes, "")
	in.HasEditions = len(editions) > 0
	in.Editions = func() []changes.Row { return changes.Rows(editions) }
	in.History = func(id string) []changes.Entry {
		return changes.History(append(append([]*changes.Statement{}, editions...), now), id)
	}
	in.Changes = func() *changes.Report {
		if len(editions) == 0 {
			return nil
		}
		return changes.Compare(editions[len(editions)-1], now, editions[len(editions)-1].Edition, "now")
	}
	in.Answer = func(question, written, id string) (string, string, bool) {
		a, err := statement.AskInWords(lib, lib.Material(id), question, written)
		return a.Text, a.Note, err == nil
	}
	return in
}

func demo(t testing.TB) *library.Library {
	t.Helper()
	lib, err := library.Load("../..", library.Options{Editions: true})
	if err != nil {
		t.Fatal(err)
	}
	return lib
}

// render writes every output and returns the texts by path.
func render(t testing.TB, in *Input) map[string]string {
	t.Helper()
	list, err := Outputs(in)
	if err != nil {
		t.Fatal(err)
	}
	pages := map[string]string{}
	for _, o := range list {
		var b bytes.Buffer
		if err := o.Write(&b); err != nil {
			t.Fatalf("%s: %v", o.Path, err)
		}
		pages[o.Path] = b.String()
	}
	return pages
}

var reference = regexp.MustCompile(`(?:href|src)="([^"]*)"`)

// TestLinksResolve: every relative link leads to an output, and every anchor
// to an id on its page.
func TestLinksResolve(t *testing.T) {
	pages := render(t, inputOf(demo(t)))
	for path := range pages {
		if strings.HasPrefix(path, "sheet/") || strings.HasPrefix(path, "study/") { // written by package sheet
			pages[strings.TrimSuffix(path, ".html")+".pdf"] = ""
		}
	}
	for from, text := range pages {
		if !strings.HasSuffix(from, ".html") {
			continue
		}
		for _, m := range reference.FindAllStringSubmatch(text, -1) {
			checkLink(t, pages, from, m[1])
		}
	}
}

func checkLink(t *testing.T, pages map[string]string, from, target string) {
	t.Helper()
	file, anchor, _ := strings.Cut(target, "#")
	if strings.Contains(file, ":") {
		t.Errorf("%s links outside: %s", from, target)
		return
	}
	to := from
	if file != "" {
		to = path.Join(path.Dir(from), file)
	}
	if strings.HasPrefix(to, "data/") && !strings.HasSuffix(to, ".js") {
		return // the data files are another room's
	}
	text, ok := pages[to]
	if !ok {
		t.Errorf("%s links to %s, which is not written", from, target)
	} else if anchor != "" && to != "check.html" && !strings.Contains(text, `id="`+anchor+`"`) {
		t.Errorf("%s links to %s, and %s has no such id", from, target, to)
	}
}

// TestPolicy: no page has an inline style or script, which its own policy
// would refuse.
func TestPolicy(t *testing.T) {
	inline := regexp.MustCompile(`(?i)<style|\sstyle=|\son[a-z]+="|<script>`)
	for name, text := range render(t, inputOf(demo(t))) {
		if strings.HasSuffix(name, ".html") {
			if m := inline.FindString(text); m != "" {
				t.Errorf("%s has %q", name, m)
			}
			if !strings.Contains(text, "default-src 'none'") {
				t.Errorf("%s states no policy", name)
			}
		}
	}
}

// nasty is text that tries to leave its place.
const nasty = `</td></script><script>alert(1)</script><img src=x onerror=alert(2)>"'&{{.}}`

// TestTextStaysText puts hostile text into every text of a record and of a
// page, and looks for anything that came out as markup.
func TestTextStaysText(t *testing.T) {
	quoted := "'" + strings.ReplaceAll(nasty, "'", "''") + "'"
	record := fmt.Sprintf(`name: %[1]s
family: resistance alloys
designations: {short: %[1]s, other: %[1]s}
composition: {Cu: %[1]s}
applies_to: %[1]s
not_for: %[1]s
notes: %[1]s
status: withdrawn
withdrawn_reason: %[1]s
replaced_by: x
sign_off: {author: %[1]s, reviewer: %[1]s, reason: %[1]s, date: 2026-01-01, due: 2026-01-02}
condition: %[1]s
source: {id: s, where: %[1]s}
basis: resistance
resistivity: 43 µΩ·cm ± 5 %%
alpha: 10 ppm/K ± 5 ppm/K
reference_temperature: 20 °C
valid_range: 0 °C to 60 °C
properties:
  density: {value: 8.4 g/cm³, condition: %[1]s, note: %[1]s, source: s}
stock: [{form: wire, diameter: 1 mm, note: %[1]s}]
equivalents: [{designation: %[1]s, system: %[1]s, record: x, verdict: near, use: %[1]s, reason: %[1]s, sign_off: {author: %[1]s, reviewer: %[1]s}}]
declarations: [{substance: %[1]s, number: %[1]s, basis: per article, exemption: %[1]s, document: %[1]s, date: 2026-01-01, note: %[1]s}]
`, quoted)
	lib := library.FromFiles(map[string][]byte{
		"materials/sources.yaml":    []byte("s: {kind: standard, title: " + quoted + ", number: " + quoted + ", note: " + quoted + "}\n"),
		"materials/x.yaml":          []byte(record),
		"content/reference.yaml":    []byte("title: " + quoted + "\norganisation: " + quoted + "\ncontact: " + quoted + "\n"),
		"content/home.md":           []byte("# " + nasty + "\n\n" + nasty + "\n"),
		"content/reports/report.md": []byte("# Report\n\n" + nasty + "\n\n```study: compare\ntitle: " + quoted + "\nmaterials: [x]\nwindow: 0 °C to 60 °C\n```\n"),
	})
	if place.Count(lib.Findings, place.Error) > 0 {
		t.Fatalf("the hostile record is refused: %v", lib.Findings)
	}
	in := inputOf(lib)
	hostile := changes.Change{ID: "x", Name: nasty, Was: nasty, Change: changes.Renamed, Meaning: []string{nasty}, Fields: []changes.Field{{Path: nasty, OldText: nasty, NewText: nasty}}}
	in.Changes = func() *changes.Report {
		flips := []changes.Flip{{Title: nasty, Document: nasty, Material: nasty, Old: nasty, New: nasty}}
		return &changes.Report{Old: nasty, New: nasty, Materials: []changes.Change{hostile}, Verdicts: flips, Margins: flips,
			Studies: []changes.Moved{{Title: nasty}}, Documents: []changes.Affected{{Path: nasty, Title: nasty, Materials: []string{nasty}}}}
	}
	in.Editions = func() []changes.Row { return []changes.Row{{Name: nasty, Report: in.Changes()}} }
	in.History = func(string) []changes.Entry {
		return []changes.Entry{{Statement: nasty, Reason: nasty, Author: nasty, Reviewer: nasty, Status: nasty, Date: nasty, Change: &hostile}}
	}
	in.Findings = append(in.Findings, place.Finding{Severity: place.Warning, Message: nasty, Code: "x"})
	for name, text := range render(t, in) {
		if strings.HasSuffix(name, ".html") && (strings.Contains(text, "<script>alert") || strings.Contains(text, "<img") || strings.Contains(text, "{{") && strings.Contains(text, "alert(1)</script>")) {
			t.Errorf("%s lets text out as markup", name)
		}
		if strings.HasPrefix(name, "data/list") && strings.Contains(text, "</script>") {
			t.Errorf("%s could end a script element", name)
		}
	}
}

// TestSameTwice: the same input gives the same bytes.
func TestSameTwice(t *testing.T) {
	first, second := render(t, inputOf(demo(t))), render(t, inputOf(demo(t)))
	for name, text := range first {
		if second[name] != text {
			t.Errorf("%s differs between two runs", name)
		}
	}
}

// TestBrokenTheme names the template.
func TestBrokenTheme(t *testing.T) {
	in := inputOf(demo(t))
	in.Theme = brokenTheme{}
	if _, err := Outputs(in); err == nil || !strings.Contains(err.Error(), "frame.tmpl") {
		t.Errorf("error %v", err)
	}
}

// BenchmarkMaterialPage is one page with its figures, its statement included.
// Target: 0.7 ms.
func BenchmarkMaterialPage(b *testing.B) { benchmarkPage(b, "material/cumn12ni-strip-lot.html") }

// BenchmarkSheet is one sheet with its figures.
func BenchmarkSheet(b *testing.B) { benchmarkPage(b, "sheet/cumn12ni-strip-lot.html") }

func benchmarkPage(b *testing.B, name string) {
	list, err := Outputs(inputOf(demo(b)))
	if err != nil {
		b.Fatal(err)
	}
	var page output.Output
	for _, o := range list {
		if o.Path == name {
			page = o
		}
	}
	var buf bytes.Buffer
	for b.Loop() {
		buf.Reset()
		if err := page.Write(&buf); err != nil {
			b.Fatal(err)
		}
	}
	b.SetBytes(int64(buf.Len()))
}
