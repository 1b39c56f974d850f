package changes

import (
	"bytes"
	"math"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
	"ohmfolio/generator/study"
)

const sources = "s: {kind: standard, title: A standard, number: X 1, checked: original}\nt: {kind: standard, title: Another, number: X 2, checked: original}\n"

const copper = `name: Copper, annealed
family: standard conductors
status: released
revision: 3
sign_off: {author: a desk, reviewer: b desk, date: 2026-05-04, reason: first issue, due: 2028-05-04}
source: {id: s, where: table 1}
class: specified
condition: annealed
basis: resistance
resistivity: 1.7241 µΩ·cm ± 0.5 %
alpha: 3.93e-3 /K
reference_temperature: 20 °C
valid_range: 0 °C to 100 °C
`

const report = "# A report\n\n```study: compare\ntitle: Less than a third\nmaterials: [copper]\nwindow: 20 °C to 100 °C\nrequire: {greatest_change: 32 %}\n```\n"

// frozen freezes a reference made of records by ID and one report.
func frozen(t testing.TB, records map[string]string, words string) *Statement {
	t.Helper()
	files := map[string][]byte{"materials/sources.yaml": []byte(sources), "content/reports/report.md": []byte(words)}
	for id, text := range records {
		files["materials/"+id+".yaml"] = []byte(text)
	}
	lib := library.FromFiles(files)
	if place.Count(lib.Findings, place.Error) > 0 {
		t.Fatal(lib.Findings)
	}
	outcomes := map[string][]*study.Outcome{}
	for _, d := range lib.Documents {
		for _, block := range d.Page.Studies {
			o, findings := study.Run(lib, block)
			if o == nil {
				t.Fatal(findings)
			}
			outcomes["reports/report"] = append(outcomes["reports/report"], o)
		}
	}
	return Freeze(lib, outcomes, "")
}

func one(text string) map[string]string { return map[string]string{"copper": text} }

func compared(t *testing.T, old, now map[string]string) *Report {
	t.Helper()
	return Compare(frozen(t, old, report), frozen(t, now, report), "old", "new")
}

func (r *Report) of(id string) *Change {
	for i := range r.Materials {
		if r.Materials[i].ID == id {
			return &r.Materials[i]
		}
	}
	return nil
}

func (c *Change) field(path string) *Field {
	for i := range c.Fields {
		if c.Fields[i].Path == path {
			return &c.Fields[i]
		}
	}
	return nil
}

// TestReformat: spelling, order, comments, and the layout with one named data
// set change nothing.
func TestReformat(t *testing.T) {
	lines := strings.SplitAfter(copper, "\n")
	set := strings.ReplaceAll("\n"+strings.Join(lines[5:], ""), "\n", "\n    ")
	for name, text := range map[string]string{
		"comment": "# a comment\n" + copper,
		"order":   strings.Join(append(append([]string{}, lines[8:]...), lines[:8]...), ""),
		"CRLF":    strings.ReplaceAll(copper, "\n", "\r\n"),
		"ASCII":   strings.NewReplacer("µΩ·cm ± 0.5 %", "uohm cm +/- 0.5 %", "20 °C", "20 degC").Replace(copper),
		"block":   strings.Replace(copper, "source: {id: s, where: table 1}", "source:\n  where: 'table  1'\n  id: s", 1),
		"layout":  strings.Join(lines[:5], "") + "data_sets:\n  data:" + strings.TrimRight(set, " ") + "\n",
	} {
		r := compared(t, one(copper), one(text))
		if !r.Same || r.of("copper").Change != Unchanged || !strings.Contains(r.Text(), "no change of meaning") {
			t.Errorf("%s: %+v\n%s", name, r.of("copper").Fields, r.Text())
		}
	}
}

// TestValue: α from 3.93e-3 to 4.03e-3 /K is +2.5445 %; the curve at 100 °C,
// 1.3144 against 1.3224, differs by 6086.4 ppm; 32 % no longer hold, since the
// change is 31.44 % and then 32.24 %. All by hand.
func TestValue(t *testing.T) {
	r := compared(t, one(copper), one(strings.Replace(copper, "3.93e-3", "4.03e-3", 1)))
	c := r.of("copper")
	f := c.field("data_sets.data.alpha")
	if c.Change != Changed || f == nil || f.Old != 3.93e-3 || f.New != 4.03e-3 || f.Unit != "/K" || math.Abs(*f.Relative-0.0254452926) > 1e-9 {
		t.Fatalf("%+v %+v", c, f)
	}
	if g := c.Greatest; g == nil || math.Abs(g.PPM-6086.427) > 0.001 || g.AtC != 100 || g.Basis != "resistance" || g.CommonRangeC != [2]float64{0, 100} {
		t.Errorf("%+v", g)
	}
	if len(r.Verdicts) != 1 || r.Verdicts[0].New != "fails" || math.Abs(*r.Verdicts[0].MarginOld-0.0175) > 1e-9 || math.Abs(*r.Verdicts[0].MarginNew+0.0075) > 1e-9 {
		t.Errorf("%+v", r.Verdicts)
	}
	if len(r.Documents) != 1 || r.Documents[0].Path != "report/report.html" || r.Same {
		t.Errorf("%+v", r.Documents)
	}
}

// TestMeaning: what means something else although the curve agrees.
func TestMeaning(t *testing.T) {
	// about 25 °C: ρ·(1 + 0.00393·5) = 1.757978565 µΩ·cm, α = 0.00393/1.01965
	rereferenced := strings.NewReplacer("1.7241 µΩ·cm ± 0.5 %", "1.757978565 µΩ·cm ± 0.5 %", "3.93e-3 /K", "3.85426371794243e-3 /K", "reference_temperature: 20", "reference_temperature: 25").Replace(copper)
	for _, c := range []struct {
		name, now, says string
		agrees          bool
	}{
		{"reference", rereferenced, "reference temperature: 20\u202f°C → 25\u202f°C", true},
		{"basis", strings.Replace(copper, "basis: resistance", "basis: resistivity", 1), "basis: resistance → resistivity", true},
		{"range", strings.Replace(copper, "0 °C to 100 °C", "0 °C to 90 °C", 1), "valid range: 0\u202f°C to 100\u202f°C → 0\u202f°C to 90\u202f°C", true},
		{"limits", strings.Replace(copper, "0.5 %", "0.6 %", 1), "limits", true},
		{"no limits", strings.Replace(copper, " ± 0.5 %", "", 1), "limits of resistivity: no band any more", true},
		{"condition", strings.Replace(copper, "condition: annealed", "condition: hard drawn", 1), "condition: annealed → hard drawn", true},
		{"adopted", adopting("b"), "adopted data set: a → b", false},
	} {
		old := copper
		if c.name == "adopted" {
			old = adopting("a")
		}
		r := compared(t, one(old), one(c.now))
		m := r.of("copper")
		if !strings.Contains(strings.Join(m.Effects(), "\n"), c.says) || r.Same {
			t.Errorf("%s: %q", c.name, m.Effects())
		}
		if (m.Greatest.PPM == 0) != c.agrees {
			t.Errorf("%s: the curves differ by %g ppm", c.name, m.Greatest.PPM)
		}
	}
	r := compared(t, one(copper), one(strings.Replace(copper, "0.5 %", "0.6 %", 1)))
	if b := r.of("copper").Band; b == nil || math.Abs(b.LowerPPM+1005.025) > 0.001 || math.Abs(b.UpperPPM-995.025) > 0.001 { // 0.994/0.995 and 1.006/1.005
		t.Errorf("band %+v", b)
	}
	if f := compared(t, one(adopting("a")), one(adopting("b"))).of("copper").field("adopted.resistivity"); f == nil || f.Old != 1.7241 || f.New != 1.75 {
		t.Errorf("adopted.resistivity: %+v", f)
	}
}

func adopting(name string) string {
	const set = "{source: s, basis: resistance, resistivity: 1.7241 µΩ·cm, alpha: 3.93e-3 /K, reference_temperature: 20 °C, valid_range: 0 °C to 100 °C}\n"
	return "name: Copper\nadopt: " + name + "\ndata_sets:\n  a: " + set + "  b: " + strings.Replace(set, "1.7241", "1.75", 1)
}

// TestEveryValueShows: whatever stated value changes, a field tells it.
func TestEveryValueShows(t *testing.T) {
	for _, c := range []struct{ from, to, path string }{
		{"Copper, annealed", "Copper, soft", "name"}, {"table 1", "table 2", "data_sets.data.source.where"}, {"id: s", "id: t", "data_sets.data.source"},
		{"3.93e-3", "3.930e-3", "data_sets.data.alpha.digits"}, {"0.5 %", "0.6 %", "data_sets.data.resistivity.upper"}, {"to 100", "to 101", "data_sets.data.valid_range.to"},
		{"revision: 3", "revision: 4", "revision"}, {"first issue", "second issue", "sign_off.reason"}, {"status: released", "status: in review", "status"},
	} {
		now := strings.Replace(copper, c.from, c.to, 1)
		m := compared(t, one(copper), one(now)).of("copper")
		if m.field(c.path) == nil || m.Change != Changed {
			t.Errorf("%s → %s: %s is not among %+v", c.from, c.to, c.path, m.Fields)
		}
	}
	if r := compared(t, one(copper), one(strings.Replace(copper, "revision: 3", "revision: 4", 1))); !r.Same {
		t.Error("a revision alone is no change of meaning")
	}
}

func TestComingAndGoing(t *testing.T) {
	old := map[string]string{"copper": copper, "old-name": copper, "gone": copper, "bad": copper}
	now := map[string]string{"copper": copper, "new-name": copper + "formerly: [old-name]\n", "fresh": copper,
		"bad": strings.Replace(copper, "status: released", "status: withdrawn\nreplaced_by: copper\nwithdrawn_reason: wrong", 1)}
	r := compared(t, old, now)
	for id, want := range map[string]string{"copper": Unchanged, "new-name": Renamed, "gone": Removed, "fresh": Added, "bad": Changed} {
		if c := r.of(id); c == nil || c.Change != want || c.Withdrawn != (id == "bad") {
			t.Errorf("%s: %+v", id, c)
		}
	}
	if c := r.of("new-name"); c.Was != "old-name" || r.of("old-name") != nil {
		t.Errorf("%+v", c)
	}
	if !strings.Contains(r.Text(), "WITHDRAWN, replaced by copper") || r.Same {
		t.Error(r.Text())
	}
}

// TestLostMargin: the greatest loss first, what cannot be told before all.
func TestLostMargin(t *testing.T) {
	x := func(v float64) *float64 { return &v }
	list := []Flip{{Title: "a", MarginOld: x(0.3), MarginNew: x(0.2)}, {Title: "b", MarginOld: x(0.3), MarginNew: x(-0.2)}, {Title: "c", MarginOld: x(0.3)}}
	byLostMargin(list)
	if list[0].Title != "c" || list[1].Title != "b" || list[2].Title != "a" {
		t.Errorf("%+v", list)
	}
}

func TestHistory(t *testing.T) {
	second := strings.NewReplacer("revision: 3", "revision: 4", "3.93e-3", "3.94e-3", "first issue", "measured again").Replace(copper)
	a, b := frozen(t, map[string]string{"old-copper": copper}, "# R\n"), frozen(t, one(copper+"formerly: [old-copper]\n"), "# R\n")
	c, now := frozen(t, one(second+"formerly: [old-copper]\n"), "# R\n"), frozen(t, one(second+"formerly: [old-copper]\n"), "# R\n")
	a.Edition, b.Edition, c.Edition = "a", "b", "c"
	list := History([]*Statement{a, b, c, now}, "copper")
	if len(list) != 3 || list[0].Statement != "c" || list[0].Revision != 4 || list[0].Reason != "measured again" || list[0].Change.field("data_sets.data.alpha") == nil ||
		list[1].Statement != "b" || list[1].Change.Change != Renamed || list[2].Statement != "a" || list[2].Change != nil {
		t.Errorf("%+v", list)
	}
}

func written(t testing.TB, s *Statement) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := s.Write(&b); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

// TestSizes: one material judged in several sizes is compared size by size.
func TestSizes(t *testing.T) {
	x := func(v float64) *float64 { return &v }
	state := func(thin, thick string, margin float64) *Statement {
		return &Statement{Studies: []Study{{Study: "shunt", Title: "A shunt", Document: "report/x.html", Materials: []Verdict{
			{Material: "m", Size: "1 mm", Verdict: thin, Requirements: []study.Requirement{{Margin: x(0.5)}, {Margin: x(margin)}}},
			{Material: "m", Size: "2 mm", Verdict: thick, Requirements: []study.Requirement{{Margin: nil}}}}}}}
	}
	r := Compare(state("holds", "fails", 0.1), state("holds", "cannot be told", 0.05), "old", "new")
	if len(r.Verdicts) != 1 || r.Verdicts[0].Size != "2 mm" || r.Verdicts[0].New != "cannot be told" || r.Verdicts[0].MarginOld != nil {
		t.Errorf("%+v", r.Verdicts)
	}
	if len(r.Margins) != 1 || r.Margins[0].Size != "1 mm" || *r.Margins[0].MarginNew != 0.05 {
		t.Errorf("%+v", r.Margins)
	}
	if r := Compare(state("holds", "fails", 0.1), &Statement{}, "old", "new"); len(r.Studies) != 1 || r.Studies[0].Change != Removed {
		t.Errorf("%+v", r.Studies)
	}
}

// TestSources: a newer edition and another checked state are told, and are no
// change of meaning of a material that does not cite them.
func TestSources(t *testing.T) {
	old := &Statement{Sources: []Source{{ID: "a", Text: "A", Checked: "original"}, {ID: "b", Text: "B", Checked: "memory"}, {ID: "c", Text: "C"}}}
	now := &Statement{Sources: []Source{{ID: "a", Text: "A", Checked: "original", SupersededBy: "d"}, {ID: "b", Text: "B", Checked: "original"}, {ID: "d", Text: "D"}}}
	r := Compare(old, now, "old", "new")
	var told []string
	for _, c := range r.Sources {
		told = append(told, c.ID+" "+c.Change)
	}
	if strings.Join(told, ", ") != "a changed, b changed, c removed, d added" || r.Sources[0].field("superseded_by").New != "d" || !r.Same {
		t.Errorf("%v %+v", told, r.Sources)
	}
	if text := r.Text(); !strings.Contains(text, "source b: changed\n  checked: memory → original\n") {
		t.Error(text)
	}
}
