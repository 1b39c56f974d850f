// Package topics writes the reference parts of the guide from the lists that
// the program itself works with: units, keys of the record, studies, findings.
// The help of the command line and the pages of the guide show the same.
package topics

import (
	"strconv"
	"strings"

	"ohmfolio/generator/form"
	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
	"ohmfolio/generator/study"
)

// A Topic is one page of the guide.
type Topic struct {
	Name, Title, Lead string
	Parts             []Part
}

// A Part is one table of a topic.
type Part struct {
	Title, Text string
	Heads       []string
	Rows        [][]string
}

// All is every topic; kinds is the catalogue of findings.
func All(kinds []place.Kind) []Topic {
	return []Topic{units(), record(), studies(), findings(kinds)}
}

// Find finds a topic by its name, nil when there is none.
func Find(all []Topic, name string) *Topic {
	for i := range all {
		if all[i].Name == name {
			return &all[i]
		}
	}
	return nil
}

func units() Topic {
	t := Topic{Name: "units", Title: "Units", Lead: "Every unit that records, tables and flags take. Each may be written as a symbol or in ASCII; a product is a dot, a star or a space. " +
		"The first of a kind is the usual one. A temperature and a temperature difference are two kinds."}
	for _, k := range quantity.Kinds() {
		p := Part{Title: string(k), Heads: []string{"Unit", "ASCII", "UCUM code", "1 of it is, in SI"}}
		if k == quantity.Price {
			p.Text = "Currencies are never converted."
		}
		for _, u := range quantity.Units(k) {
			p.Rows = append(p.Rows, []string{or(u.Symbol, "(none)"), u.ASCII, or(u.UCUM, "none"), inSI(k, u)})
		}
		t.Parts = append(t.Parts, p)
	}
	return t
}

func or(s, other string) string {
	if s == "" {
		return other
	}
	return s
}

// inSI tells what 1 of the unit is in the SI unit of its kind.
func inSI(k quantity.Kind, u quantity.Unit) string {
	if k == quantity.Price {
		return "not converted"
	}
	text := strconv.FormatFloat(quantity.Round12(u.ToSI(1)), 'g', -1, 64)
	for _, other := range quantity.Units(k) {
		if other.ToSI(1) == 1 && other.ToSI(0) == 0 {
			return strings.TrimSpace(text + " " + other.Symbol)
		}
	}
	return text
}

func record() Topic {
	t := Topic{Name: "record", Title: "Keys of the files", Lead: "Every key of a material record, of sources.yaml and of reference.yaml. A key that stands in no table is an error."}
	seen := map[*form.Shape]bool{}
	for _, s := range library.Shapes() {
		t.add(s, seen)
	}
	return t
}

// add adds a shape and the shapes inside it, each once.
func (t *Topic) add(s *form.Shape, seen map[*form.Shape]bool) {
	if seen[s] {
		return
	}
	seen[s] = true
	t.Parts = append(t.Parts, shapePart(s.Name, s.Doc, s.Fields))
	for _, f := range s.Fields {
		for _, inner := range f.Is.Shapes() {
			t.add(inner, seen)
		}
	}
}

func shapePart(title, text string, fields []form.Field) Part {
	p := Part{Title: title, Text: text, Heads: []string{"Key", "holds", "meaning", "example"}}
	for _, f := range fields {
		key := f.Key
		if f.Required {
			key += " (needed)"
		}
		p.Rows = append(p.Rows, []string{key, f.Is.Describe(), f.Doc, f.Example})
	}
	return p
}

func studies() Topic {
	t := Topic{Name: "studies", Title: "Studies", Lead: "A study is a fenced block of a report whose first line is ```study: NAME. Its body holds the parameters, one a line. " +
		"What require: may bound bears the name of the number."}
	for _, k := range study.Kinds() {
		t.Parts = append(t.Parts, shapePart("study: "+k.Name, k.Doc, k.Shape.Fields))
		p := Part{Title: "study: " + k.Name + ", its numbers", Heads: []string{"Number", "unit", "meaning"}}
		for _, n := range k.Numbers {
			p.Rows = append(p.Rows, []string{n.Name, or(n.Unit, "1"), n.Doc})
		}
		t.Parts = append(t.Parts, p)
	}
	return t
}

func findings(kinds []place.Kind) Topic {
	t := Topic{Name: "findings", Title: "Findings", Lead: "Everything that examine and transcribe may find, by its code. An error stops a publication, a warning or a note does not."}
	p := Part{Title: "by code", Heads: []string{"Code", "severity", "meaning", "mend"}}
	for _, k := range kinds {
		p.Rows = append(p.Rows, []string{k.Code, string(k.Severity), k.Title + ". " + k.Explanation, k.Mend})
	}
	t.Parts = []Part{p}
	return t
}

// Anchor is the place of a part on its page.
func Anchor(title string) string {
	return strings.Join(strings.FieldsFunc(strings.ToLower(title), func(r rune) bool { return (r < 'a' || r > 'z') && (r < '0' || r > '9') }), "-")
}
