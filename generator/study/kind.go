package study

import (
	"ohmfolio/generator/form"
	"ohmfolio/generator/quantity"
)

// A Kind of study: its name in a block, its parameters, the numbers that it
// tells and that may be required, and how it runs.
type Kind struct {
	Name    string
	Title   string
	Doc     string
	Fields  []form.Field // its own parameters; title, require and binding are added
	Numbers []NumberDoc
	Run     func(w *work)

	Shape *form.Shape // of the whole block
	index map[string]indexed
}

// indexed is a number with its unit looked up.
type indexed struct {
	doc  *NumberDoc
	unit quantity.Unit
}

// NumberDoc describes one named number of a result.
type NumberDoc struct {
	Name   string
	Kind   quantity.Kind
	Unit   string // the unit that it is told in
	Digits int
	Head   string // short words for the head of a column
	Doc    string
}

// whole adds what every study has: a title, requirements by the names of the
// numbers, and whether they bind.
func (k Kind) whole() Kind {
	require := &form.Shape{Name: "require", Doc: "Bounds on the numbers, by their names. A plain value bounds the magnitude from above; “>= 2 mm” and “40 to 50 µΩ·cm” are bounds of the value itself."}
	for _, n := range k.Numbers {
		require.Fields = append(require.Fields, form.Field{Key: n.Name, Is: form.Quantity(n.Kind), Doc: n.Doc, Example: n.example()})
	}
	fields := []form.Field{{Key: "title", Is: form.Text, Doc: "Title of the study.", Example: k.Title}}
	fields = append(fields, k.Fields...)
	fields = append(fields,
		form.Field{Key: "require", Is: form.Mapping(require), Doc: "Bounds on the numbers, by their names."},
		form.Field{Key: "binding", Is: form.YesNo, Doc: "Whether a requirement that does not hold fails the publication.", Example: "yes"})
	k.index = map[string]indexed{}
	for i, n := range k.Numbers {
		k.index[n.Name] = indexed{&k.Numbers[i], n.unit()}
	}
	k.Shape = &form.Shape{Name: k.Name, Doc: k.Doc, Fields: fields}
	return k
}

func (n NumberDoc) unit() quantity.Unit {
	u, _ := quantity.FindUnit(n.Kind, n.Unit)
	return u
}

func (n NumberDoc) example() string { return quantity.Number(1, 1) + " " + n.Unit }

func (k *Kind) number(name string) *NumberDoc {
	if n, ok := k.index[name]; ok {
		return n.doc
	}
	panic("study " + k.Name + " has no number " + name)
}

// materialsField is the list of records that a study works on.
var materialsField = form.Field{Key: "materials", Required: true, Is: form.List(form.Text), Doc: "IDs of the records.", Example: "[cumn12ni, cuni44]"}

var windowField = form.Field{Key: "window", Required: true, Is: form.Range(quantity.Temperature), Doc: "The window of temperature.", Example: "-40 °C to 85 °C"}

// field shortens the declaration of a parameter that may be missing.
func field(key string, is form.Type, doc, example string) form.Field {
	return form.Field{Key: key, Is: is, Doc: doc, Example: example}
}

func needed(key string, is form.Type, doc, example string) form.Field {
	return form.Field{Key: key, Required: true, Is: is, Doc: doc, Example: example}
}
