package library

import (
	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
)

// Material finds a record by its ID, or by an earlier one; nil when there is
// none.
func (l *Library) Material(id string) *material.Record { return l.byID[id] }

// IDs lists the IDs of all records, sorted.
func (l *Library) IDs() []string {
	list := make([]string, len(l.Materials))
	for i, r := range l.Materials {
		list[i] = r.ID
	}
	return list
}

// Source finds a source by its ID; nil when there is none.
func (l *Library) Source(id string) *Source { return l.Sources[id] }

// CheckedOf is the checked state of a citation: its own, else the source's,
// "" when neither states one.
func (l *Library) CheckedOf(c material.Citation) material.Checked {
	if c.Checked != "" {
		return c.Checked
	}
	if s := l.Sources[c.ID]; s != nil {
		return s.Checked
	}
	return ""
}

// Schemas are the JSON Schemas of records, sources and reference.yaml by file
// name, for editors.
func Schemas() (map[string][]byte, error) {
	out := map[string][]byte{}
	for _, s := range []struct {
		file, title string
		is          form.Type
	}{
		{"record.schema.json", "Material record", form.Mapping(material.Shape())},
		{"sources.schema.json", "Sources", form.Named(form.Mapping(sourceShape))},
		{"reference.schema.json", "Settings of the reference", form.Mapping(settingsShape)},
	} {
		text, err := form.Schema(s.is, s.file, s.title)
		if err != nil {
			return nil, err
		}
		out[s.file] = text
	}
	return out, nil
}

// Shapes are the forms of the files of a reference.
func Shapes() []*form.Shape { return []*form.Shape{material.Shape(), sourceShape, settingsShape} }
