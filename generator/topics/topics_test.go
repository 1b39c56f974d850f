package topics

import (
	"strings"
	"testing"
	"unicode/utf8"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
	"ohmfolio/generator/study"
)

var kinds = []place.Kind{{Code: "a-code", Severity: place.Error, Title: "A title", Explanation: "Why.", Mend: "do it"}}

func text(t *testing.T, name string) string {
	t.Helper()
	topic := Find(All(kinds), name)
	if topic == nil {
		t.Fatalf("no topic %s", name)
	}
	var b strings.Builder
	if err := topic.Write(&b); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// cells is every text of a topic.
func cells(name string) string {
	var b strings.Builder
	for _, p := range Find(All(kinds), name).Parts {
		b.WriteString(p.Title + "\n" + p.Text + "\n")
		for _, row := range p.Rows {
			b.WriteString(strings.Join(row, "\n") + "\n")
		}
	}
	return b.String()
}

// TestEverythingIsTold: no unit, key, study, number or finding is left out.
func TestEverythingIsTold(t *testing.T) {
	units, record, studies, findings := cells("units"), cells("record"), cells("studies"), cells("findings")
	for _, k := range quantity.Kinds() {
		for _, u := range quantity.Units(k) {
			if !strings.Contains(units, "\n"+u.ASCII+"\n") {
				t.Errorf("units lack %s", u.ASCII)
			}
		}
	}
	for _, s := range library.Shapes() {
		for _, f := range s.Fields {
			if !strings.Contains(record, "\n"+f.Key+"\n") && !strings.Contains(record, "\n"+f.Key+" (needed)\n") {
				t.Errorf("record lacks %s", f.Key)
			}
		}
	}
	for _, key := range []string{"debye_temperature (needed)", "between_taps", "reviewer", "where"} { // of inner mappings
		if !strings.Contains(record, "\n"+key+"\n") {
			t.Errorf("record lacks %s", key)
		}
	}
	for _, k := range study.Kinds() {
		for _, f := range k.Shape.Fields {
			if !strings.Contains(studies, f.Key) {
				t.Errorf("studies lack %s of %s", f.Key, k.Name)
			}
		}
		for _, n := range k.Numbers {
			if !strings.Contains(studies, "\n"+n.Name+"\n") {
				t.Errorf("studies lack the number %s of %s", n.Name, k.Name)
			}
		}
	}
	if !strings.Contains(findings, "a-code\nerror\nA title. Why.\ndo it\n") {
		t.Errorf("findings: %q", findings)
	}
}

// TestFactors: the international inch is 25.4 mm and the pound 0.45359237 kg
// exactly (1959); 100 % IACS is 58 MS/m (IEC publication 28, 1925).
func TestFactors(t *testing.T) {
	got := text(t, "units")
	for _, line := range []string{
		"  in    in     [in_i]     0.0254 m\n",
		"  lb    lb     [lb_av]    0.45359237 kg\n",
		"  %IACS  %IACS  none       580000 S/m\n",
	} {
		if !strings.Contains(got, line) {
			t.Errorf("no line %q", line)
		}
	}
}

// TestShape: lines fit a terminal, no part is empty, anchors are unique.
func TestShape(t *testing.T) {
	for _, topic := range All(kinds) {
		seen := map[string]bool{}
		for _, p := range topic.Parts {
			if id := Anchor(p.Title); id == "" || seen[id] || len(p.Rows) == 0 {
				t.Errorf("%s: the part %q is empty, or its anchor stands twice", topic.Name, p.Title)
			}
			seen[Anchor(p.Title)] = true
			for _, row := range p.Rows {
				if len(row) != len(p.Heads) {
					t.Errorf("%s: %q does not fit its heads", topic.Name, row)
				}
			}
		}
		for _, line := range strings.Split(text(t, topic.Name), "\n") {
			if n := utf8.RuneCountInString(line); n > width && len(strings.Fields(line)) > 2 {
				t.Errorf("%s: %d letters in %q", topic.Name, n, line)
			}
		}
	}
}
