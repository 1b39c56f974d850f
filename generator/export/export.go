// Package export writes the data files of a reference: JSON and CSV of every
// material, one W3C CSVW description of the CSV files, a simulator line, a
// look-up table for firmware and a table for finite elements. The whole as one
// JSON file is a statement, which package changes writes. Every file carries
// identity: material, data set, condition,
// revision, fingerprint, reference temperature, valid range.
package export

import (
	"bytes"
	"encoding/json"
	"sync"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
)

// Outputs lists the data files of a reference.
func Outputs(lib *library.Library) []output.Output {
	var list []output.Output
	for _, r := range lib.Materials {
		list = append(list,
			output.Output{Path: "data/" + r.ID + ".json", Write: func(w *bytes.Buffer) error { return writeJSON(w, Material(lib, r)) }},
			output.Output{Path: "data/" + r.ID + ".csv", Write: func(w *bytes.Buffer) error { return writeCSV(w, r) }})
		list = append(list, forPrograms(lib, r)...)
	}
	return append(list,
		output.Output{Path: "data/csv-metadata.json", Write: func(w *bytes.Buffer) error { return writeJSON(w, describeCSV(lib)) }})
}

// forPrograms lists the files that a circuit simulator, firmware and a
// finite-element program read, where the material can tell what they need.
func forPrograms(lib *library.Library, r *material.Record) []output.Output {
	var list []output.Output
	if r.TellsRatioAt(SimulatorNominal) {
		list = append(list, output.Output{Path: "data/" + r.ID + ".lib", Write: func(w *bytes.Buffer) error {
			l, err := Simulator(r, SimulatorNominal, 0, 0)
			if err != nil {
				return err
			}
			WriteSimulator(w, lib, r, l)
			return nil
		}})
	}
	if r.TellsRatio() {
		lookup := sync.OnceValues(func() (Lookup, error) { return NewLookup(r) })
		list = append(list,
			output.Output{Path: "data/" + r.ID + "-lookup.h", Write: func(w *bytes.Buffer) error {
				l, err := lookup()
				if err != nil {
					w.WriteString("/* " + plainASCII(err.Error()) + " */\n")
					return nil
				}
				WriteHeader(w, lib, r, l)
				return nil
			}},
			output.Output{Path: "data/" + r.ID + "-lookup.csv", Write: func(w *bytes.Buffer) error {
				l, err := lookup()
				if err != nil {
					l = Lookup{}
				}
				return WriteLookup(w, r, l)
			}})
	}
	if r.TellsResistivity() {
		list = append(list, output.Output{Path: "data/" + r.ID + "-elements.csv", Write: func(w *bytes.Buffer) error {
			t, err := Elements(r)
			if err != nil {
				return err
			}
			return WriteElements(w, r, t)
		}})
	}
	return list
}

func writeJSON(w *bytes.Buffer, v any) error {
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	e.SetIndent("", " ")
	return e.Encode(v)
}
