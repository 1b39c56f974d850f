// Package export writes the data files of a reference: JSON and CSV of every
// material, the whole as one JSON file, and one W3C CSVW description of the
// CSV files. Every file carries identity: material, data set, condition,
// revision, fingerprint, reference temperature, valid range.
package export

import (
	"bytes"
	"encoding/json"

	"ohmfolio/generator/library"
	"ohmfolio/generator/output"
	"ohmfolio/generator/statement"
)

// Outputs lists the data files for all statements.
func Outputs(lib *library.Library, statements []*statement.Statement) []output.Output {
	var list []output.Output
	for _, s := range statements {
		list = append(list,
			output.Output{Path: "data/" + s.Record.ID + ".json", Write: func(w *bytes.Buffer) error { return writeJSON(w, Material(lib, s)) }},
			output.Output{Path: "data/" + s.Record.ID + ".csv", Write: func(w *bytes.Buffer) error { return writeCSV(w, s) }})
	}
	return append(list,
		output.Output{Path: "data/reference.json", Write: func(w *bytes.Buffer) error { return writeReference(w, lib, statements) }},
		output.Output{Path: "data/csv-metadata.json", Write: func(w *bytes.Buffer) error { return writeJSON(w, describeCSV(statements)) }})
}

func writeJSON(w *bytes.Buffer, v any) error {
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	e.SetIndent("", " ")
	return e.Encode(v)
}

type referenceJSON struct {
	Title        string         `json:"title"`
	Organisation string         `json:"organisation"`
	Materials    []MaterialJSON `json:"materials"`
}

func writeReference(w *bytes.Buffer, lib *library.Library, statements []*statement.Statement) error {
	r := referenceJSON{Title: lib.Settings.Title, Organisation: lib.Settings.Organisation, Materials: []MaterialJSON{}}
	for _, s := range statements {
		r.Materials = append(r.Materials, Material(lib, s))
	}
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	return e.Encode(r)
}
