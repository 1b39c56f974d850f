// Package export writes the data files of a reference: JSON and CSV of every
// material, one W3C CSVW description of the CSV files, and what circuit
// simulators, firmware and finite-element programs read. The whole as one JSON
// file is a statement, which package changes writes. Every file carries
// identity: material, data set, condition, revision, fingerprint, reference
// temperature, valid range.
package export

import (
	"bytes"
	"encoding/json"

	"ohmfolio/generator/library"
	"ohmfolio/generator/output"
)

// materialFile is data/ID.json: what is stated, and the files beside it.
type materialFile struct {
	MaterialJSON
	Files []File `json:"files"`
}

// Outputs lists the data files of a reference.
func Outputs(lib *library.Library) []output.Output {
	var list []output.Output
	for _, r := range lib.Materials {
		list = append(list,
			output.Output{Path: "data/" + r.ID + ".json", Write: func(w *bytes.Buffer) error { return writeJSON(w, materialFile{Material(lib, r), Files(r)}) }},
			output.Output{Path: "data/" + r.ID + ".csv", Write: func(w *bytes.Buffer) error { return writeCSV(w, r) }})
		list = append(list, forPrograms(lib, r)...)
	}
	list = append(list, schemaOutputs()...)
	return append(list,
		output.Output{Path: "data/csv-metadata.json", Write: func(w *bytes.Buffer) error { return writeJSON(w, describeCSV(lib)) }})
}

func writeJSON(w *bytes.Buffer, v any) error {
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	e.SetIndent("", " ")
	return e.Encode(v)
}
