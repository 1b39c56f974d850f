// Package changes freezes what a reference states into one file, an edition,
// and tells in effect what differs between two such statements: values,
// curves, bands, verdicts, documents. It compares meanings, never spellings.
package changes

import (
	"ohmfolio/generator/export"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/study"
)

// Format is the number of the statement's format. A program reads its own
// and earlier ones; a later one is refused.
const Format = 1

// A Statement is everything that a reference states at one time: an edition's
// file and the site's data/reference.json are its JSON form.
type Statement struct {
	Format       int        `json:"format"`
	Edition      string     `json:"edition"` // "" for a state that nobody named
	Title        string     `json:"title"`
	Organisation string     `json:"organisation"`
	Materials    []Material `json:"materials"` // sorted by ID
	Studies      []Study    `json:"studies"`   // in the order of documents
	Documents    []Document `json:"documents"` // those that rest on a material
	Sources      []Source   `json:"sources"`   // sorted by ID

	// Instead of Materials, one of these: the records of a library that is
	// stated as asked for, or the lines of a file that was opened.
	lib   *library.Library
	live  []*material.Record // sorted by ID
	lines []line
}

// Material is one record as it was stated.
type Material struct {
	export.MaterialJSON
	Adopted         string   `json:"adopted"`
	Formerly        []string `json:"formerly"`
	SignOff         *SignOff `json:"sign_off"`
	ReplacedBy      string   `json:"replaced_by,omitempty"`
	WithdrawnReason string   `json:"withdrawn_reason,omitempty"`
	Corners         *Corners `json:"corners"` // of the stated limits, null when none are
	Stated          []Stated `json:"stated"`  // every stated value, sorted by path
}

// SignOff says who answered for the revision.
type SignOff struct {
	Author   string `json:"author"`
	Reviewer string `json:"reviewer"`
	Date     string `json:"date"`
	Reason   string `json:"reason"`
	Due      string `json:"due"`
}

// Corners are the curves at the corners of the stated limits: of the
// resistivity where that is told, otherwise of R/R_ref.
type Corners struct {
	Quantity string                 `json:"quantity"`
	Curves   [][]export.SegmentJSON `json:"curves"`
}

// Stated is one stated value of a record: a text, a plain number, or a number
// with a unit in SI beside what was written.
type Stated struct {
	Path   string   `json:"path"`
	Text   string   `json:"text"`
	Kind   string   `json:"kind,omitempty"` // of quantity
	Unit   string   `json:"unit,omitempty"` // that it was written in
	Number *float64 `json:"number,omitempty"`
	SI     *float64 `json:"si,omitempty"`
	Lower  *float64 `json:"lower,omitempty"` // limits, SI
	Upper  *float64 `json:"upper,omitempty"`
	Minus  *float64 `json:"minus,omitempty"` // expanded uncertainty, SI
	Plus   *float64 `json:"plus,omitempty"`
	K      *float64 `json:"k,omitempty"`
	Digits int      `json:"digits,omitempty"` // significant digits written
}

// Study is one judged study with the evidence that it rests on.
type Study struct {
	Study      string            `json:"study"`
	Title      string            `json:"title"`
	Document   string            `json:"document"` // "report/x.html"
	Binding    bool              `json:"binding"`
	NotHeld    int               `json:"not_held"` // answers by which a binding decision does not hold
	Parameters []study.Parameter `json:"parameters"`
	Materials  []Verdict         `json:"materials"`
}

// Verdict is what a study said of one material.
type Verdict struct {
	Material     string              `json:"material"`
	Size         string              `json:"size,omitempty"` // where one material is judged in several sizes
	Verdict      string              `json:"verdict"`
	Requirements []study.Requirement `json:"requirements"`
	Evidence     []study.Evidence    `json:"evidence"`
}

// Source is one source as it was recorded.
type Source struct {
	ID           string `json:"id"`
	Text         string `json:"text"` // author, title, number, publisher, edition, year
	Checked      string `json:"checked"`
	SupersededBy string `json:"superseded_by,omitempty"`
	Note         string `json:"note,omitempty"`
}

// Document is a page whose words or studies rest on materials.
type Document struct {
	Path    string   `json:"path"`
	Title   string   `json:"title"`
	RestsOn []string `json:"rests_on"` // sorted IDs
}

// set gives the adopted data set, nil when there is none.
func (m *Material) set() *export.DataSetJSON {
	for i := range m.DataSets {
		if m.DataSets[i].Adopted {
			return &m.DataSets[i]
		}
	}
	return nil
}
