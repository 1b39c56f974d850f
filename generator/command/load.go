package command

import (
	"encoding/json"
	"errors"
	"io"
	"runtime"

	"ohmfolio/generator/changes"
	"ohmfolio/generator/examine"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/study"
)

// load reads the reference in --folder.
func (s *session) load() (*library.Library, error) { return s.loadWith(library.Options{}) }

// loadWhole reads its editions, too.
func (s *session) loadWhole() (*library.Library, error) {
	return s.loadWith(library.Options{Editions: true})
}

func (s *session) loadWith(o library.Options) (*library.Library, error) {
	lib, err := library.Load(s.folder, o)
	var missing library.MissingError
	if errors.As(err, &missing) {
		return nil, requestError{err}
	}
	return lib, err
}

// judged runs every study of the reference's documents.
func judged(lib *library.Library) (outcomes []examine.Judged, findings []place.Finding) {
	for _, d := range lib.Documents {
		for _, block := range d.Page.Studies {
			o, found := study.Run(lib, block)
			findings = append(findings, found...)
			if o != nil {
				outcomes = append(outcomes, examine.Judged{Document: d, Outcome: o})
			}
		}
	}
	return outcomes, findings
}

// examineAll holds the library against every rule.
func examineAll(lib *library.Library, today string) ([]examine.Judged, []place.Finding) {
	outcomes, more := judged(lib)
	more = append(more, changes.Examine(lib)...)
	return outcomes, examine.Run(lib, outcomes, examine.Options{Today: today, Parallel: runtime.GOMAXPROCS(0), More: more})
}

// loadOne reads the reference and one record of it whose numbers may be
// quoted.
func (s *session) loadOne(id string) (*library.Library, *material.Record, error) {
	lib, err := s.load()
	if err != nil {
		return nil, nil, err
	}
	r, err := s.record(lib, id)
	if err != nil {
		return nil, nil, err
	}
	return lib, r, s.usable(lib, r)
}

// record finds one material for value and tcr; they fail only on the records
// that they use.
func (s *session) record(lib *library.Library, id string) (*material.Record, error) {
	if r := lib.Material(id); r != nil {
		return r, nil
	}
	file := "materials/" + id + ".yaml"
	if broken := inFile(lib.Findings, file); len(broken) > 0 {
		s.printFindings(broken)
		return nil, errShown
	}
	if near := place.Near(id, lib.IDs()); near != "" {
		return nil, wrong("there is no material %q; did you mean %s?", id, near)
	}
	return nil, wrong("there is no material %q; write the stem of a file in materials/", id)
}

func inFile(findings []place.Finding, file string) []place.Finding {
	var list []place.Finding
	for _, f := range findings {
		if f.Position.File == file {
			list = append(list, f)
		}
	}
	return list
}

// usable refuses a record with errors of the rules: its numbers must not be
// quoted.
func (s *session) usable(lib *library.Library, r *material.Record) error {
	findings := inFile(examine.Run(lib, nil, examine.Options{Parallel: 1}), r.Source.File)
	if place.Count(findings, place.Error) == 0 {
		return nil
	}
	s.printFindings(onlyErrors(findings))
	return errShown
}

func onlyErrors(findings []place.Finding) []place.Finding {
	var list []place.Finding
	for _, f := range findings {
		if f.Severity == place.Error {
			list = append(list, f)
		}
	}
	return list
}

func printJSON(w io.Writer, v any) error {
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	return e.Encode(v)
}
