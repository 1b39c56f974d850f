// Package study holds the engineering studies, one a file under one
// contract: parameters in; out come numbers, verdicts, plain series for
// figures, tables, cautions, and the records and revisions a result rests on.
package study

import (
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
)

// Verdict of a requirement or a material (definitions: verdicts).
type Verdict string

// The verdicts.
const (
	Holds          Verdict = "holds"
	HoldsNominally Verdict = "holds on nominal values"
	CannotBeTold   Verdict = "cannot be told"
	Fails          Verdict = "fails"
	NotAsked       Verdict = "" // nothing was required
)

// Shown is the verdict as pages print it: one that fails must not be missed.
func (v Verdict) Shown() string {
	if v == Fails {
		return "FAILS"
	}
	return string(v)
}

// Outcome is the whole result of one study. Its JSON form is a contract.
type Outcome struct {
	Study      string            `json:"study"`
	Title      string            `json:"title"`
	Binding    bool              `json:"binding"`
	Parameters []Parameter       `json:"parameters"`
	Materials  []MaterialOutcome `json:"materials"`
	Ranking    []string          `json:"ranking"`
	Notes      []string          `json:"notes"` // assumptions, and what is left out
	Cautions   []string          `json:"cautions"`
	Charts     []Chart           `json:"-"`
	Tables     []Table           `json:"tables"`
	Choice     bool              `json:"-"` // one material that holds is enough
	Listed     bool              `json:"-"` // the reasons stand in the tables already
	Position   place.Position    `json:"-"`
}

// Parameter is one parameter as it was given.
type Parameter struct {
	Name string `json:"name"`
	Text string `json:"text"`
}

// MaterialOutcome is what a study says of one material.
type MaterialOutcome struct {
	Material     string            `json:"material"`
	Size         string            `json:"size,omitempty"` // where one material is judged in several sizes
	Verdict      Verdict           `json:"verdict"`
	Reasons      []string          `json:"reasons"`
	Requirements []Requirement     `json:"requirements"`
	Numbers      map[string]Number `json:"numbers"`
	Tables       []Table           `json:"tables"`
	Warnings     []string          `json:"warnings"`
	Evidence     []Evidence        `json:"evidence"`

	Name   string           `json:"-"` // as a table shows it
	Record *material.Record `json:"-"` // nil when the answer is about several
	Partly string           `json:"-"` // the part of the window judged, "" when whole
}

// Requirement is one bound and how a material stands to it.
type Requirement struct {
	Name    string   `json:"name"`
	Unit    string   `json:"unit"`
	Bound   string   `json:"bound"` // as it was written
	Limit   float64  `json:"limit"`
	Worst   *float64 `json:"worst"`
	AtC     *float64 `json:"at_C"`
	Margin  *float64 `json:"margin"` // (limit − worst)/limit
	Verdict Verdict  `json:"verdict"`
}

// Number is one named number of a result.
type Number struct {
	Value *float64 `json:"value"`
	Unit  string   `json:"unit"`
	Lower *float64 `json:"lower"`
	Upper *float64 `json:"upper"`
	Kind  string   `json:"kind"` // "limits", "partial limits", "nominal", "exact"
}

// Label names the answer in a table: the material, with its size.
func (m MaterialOutcome) Label() string {
	switch {
	case m.Size == "":
		return m.Name
	case m.Record != nil:
		return m.Record.ShortName() + ", " + m.Size
	}
	return m.Name + ", " + m.Size
}

// Ranked names the answer in a ranking: the ID, with its size.
func (m MaterialOutcome) Ranked() string {
	if m.Size != "" {
		return m.Material + ", " + m.Size
	}
	return m.Material
}

// Evidence names the record a result rests on.
type Evidence struct {
	Record      string `json:"record"`
	Data        string `json:"data"`
	Revision    int    `json:"revision"`
	Fingerprint string `json:"fingerprint"`
	Status      string `json:"status"`
	Checked     string `json:"checked"`
}

// Chart is plain series for one figure.
type Chart struct {
	Title, Description, XTitle, YTitle string
	Series                             []Series
	Marks                              []float64 // on the x axis
}

// Series is one curve of a chart, with its band when there is one.
type Series struct {
	Label        string
	X, Y         []float64 // no Y when there is a band and no nominal
	Lower, Upper []float64 // nil when there is no band
	Apart        bool      // measured points, not joined
}

// Table is a plain table of text: a caption, heads, rows.
type Table struct {
	Caption string     `json:"caption"`
	Heads   []string   `json:"heads"`
	Rows    [][]string `json:"rows"`
	Links   []string   `json:"-"` // material ID for each row's first cell, "" for none
}
