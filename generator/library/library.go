// Package library holds a whole reference, loaded once and passed to all
// above as one read-only value.
package library

import (
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/words"
)

// A Library is a whole reference: records, sources, offers and documents.
// It is read-only after Load and safe for use by several goroutines.
type Library struct {
	Folder    string
	Settings  Settings           // content/reference.yaml
	Materials []*material.Record // sorted by ID; unreadable ones are left out
	Sources   map[string]*Source // by ID
	SourceIDs []string           // sorted
	Documents []*Document        // home, guides, reports in reading order
	Offers    []Offer
	Editions  []EditionFile   // materials/editions, by name; only when they were asked for
	Findings  []place.Finding // what reading found, sorted

	byID map[string]*material.Record
	kept map[string]kept // by file, for the next reading
}

// Settings is content/reference.yaml.
type Settings struct {
	Title, Organisation, Contact, Address string
	Paper                                 []string // "A4", "Letter"
	Units                                 Units
	DocumentPrefix                        string
	Guides, Reports                       []string // reading order, stems
	PDF                                   bool
	Rates                                 []Rate // exchange rates
}

// Rate is one dated exchange rate: one unit of From in units of To.
type Rate struct {
	From, To, Date, Source string
	Rate                   float64
}

// A Source is one entry of materials/sources.yaml.
type Source struct {
	ID, Kind, Author, Title, Number, Publisher, Edition, Year, Where string
	Checked                                                          material.Checked
	CheckedDate                                                      string
	CheckedBy                                                        string
	SupersededBy                                                     string
	Access                                                           string // where the company's copy is
	Note                                                             string
	Invented                                                         bool
	Position                                                         place.Position
}

// An EditionFile is the text of one frozen statement.
type EditionFile struct {
	Name string // the file's stem
	File string // below the reference's folder
	Text []byte
}

// A Document is one Markdown page of content/.
type Document struct {
	Room   string // "", "guides", "reports"
	Stem   string // "home"
	Source *place.Source
	Page   *words.Page
}

// An Offer is one row of materials/offers.csv, as written.
type Offer struct {
	Material, Supplier, Form, Size, Price, Currency, Per, Quantity, Date, ValidUntil string
	MetalBase, Certificate, ResistivityTolerance, Note                               string
	Position                                                                         place.Position
}
