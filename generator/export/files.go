package export

import (
	"bytes"
	"errors"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
)

// A File is a material for another kind of program, or why there is none.
type File struct {
	For     string `json:"for"`
	Path    string `json:"file,omitempty"`
	Refused string `json:"refused,omitempty"`
}

// kind is one kind of file for other programs.
type kind struct {
	use     string // on the material page, and in ID.json
	ending  string
	nominal func(*material.DataSet) float64
	write   func(w *bytes.Buffer, lib *library.Library, r *material.Record, o Order) error
}

var kinds = []kind{
	{"circuit simulators", ".lib", simulatorNominal, Simulator},
	{"firmware (header of C)", "-lookup.h", ownReference, LookupHeader},
	{"firmware (CSV)", "-lookup.csv", ownReference, LookupCSV},
	{"finite elements", "-elements.csv", ownReference, Elements},
}

// refusal tells why there is no file of this kind, nil when there is one. It
// is what the writer itself would say.
func (k kind) refusal(r *material.Record) error {
	t, err := Order{}.look(r, k.nominal)
	if err == nil && k.use == "finite elements" {
		err = t.needsResistivity()
	}
	return err
}

var errNoResistivity = errors.New("it tells ratios only and no resistivity")

func (t *task) needsResistivity() error {
	if t.set.Rho.HasNominal() {
		if _, ok := t.set.Rho.Nominal.At(t.nominal); ok {
			return nil
		}
	}
	return errNoResistivity
}

// Files lists what there is of a material for other programs.
func Files(r *material.Record) []File {
	var list []File
	for _, k := range kinds {
		f := File{For: k.use}
		if err := k.refusal(r); err != nil {
			f.Refused = err.Error()
		} else {
			f.Path = "data/" + r.ID + k.ending
		}
		list = append(list, f)
	}
	return list
}

// forPrograms lists the outputs of one material for other programs.
func forPrograms(lib *library.Library, r *material.Record) []output.Output {
	var list []output.Output
	for _, k := range kinds {
		if k.refusal(r) == nil {
			list = append(list, output.Output{Path: "data/" + r.ID + k.ending, Write: func(w *bytes.Buffer) error { return k.write(w, lib, r, Order{}) }})
		}
	}
	return list
}
