// Package material holds the record of one material: read from YAML, checked
// in form, lowered to curves, and summed up in a fingerprint. It opens no
// file; the library hands it the text.
//
// Inside, temperatures are kelvin, resistivities Ω·m, coefficients powers of
// 1/K. What the author wrote stays beside every converted number.
package material

import (
	"unicode/utf8"

	"ohmfolio/generator/form"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// A Record is one material as its file states it.
type Record struct {
	ID     string        // the file's stem
	Source *place.Source // the file
	Node   *form.Node    // the checked YAML, for the places of findings

	Name         string
	Family       Family
	Formerly     []string // earlier IDs
	Designations []Pair   // system and text
	Composition  []Pair   // element and text
	AppliesTo    string
	NotFor       string
	Notes        string
	Invented     bool // demo data, shown as such

	Status          Status
	Revision        int
	SignOff         *SignOff // nil when there is none
	ReplacedBy      string   // ID, of a withdrawn record
	WithdrawnReason string

	Sets       []*DataSet // in file order; the smallest record has one, named "data"
	Adopted    *DataSet   // one of Sets; nil only when there is none
	TCRLimits  []TCRLimit
	Properties []Property // in file order
	Stock      []Stock

	Equivalents  []Equivalent
	Declarations []Declaration

	Lots     string // CSV beside the record
	Received []Lot  // of that file, in order of dates

	Fingerprint string // over the meaning that a sheet states
}

// Pair is a key with its text, in file order.
type Pair struct{ Key, Text string }

// Status is the state of a record. The zero value means draft.
type Status string

// The states of a record.
const (
	Draft     Status = "draft"
	InReview  Status = "in review"
	Released  Status = "released"
	Withdrawn Status = "withdrawn"
)

// Family groups materials that the same plausibility rules fit; "" is not stated.
type Family string

// The families.
const (
	PureMetals         Family = "pure metals"
	StandardConductors Family = "standard conductors"
	ConductorAlloys    Family = "conductor alloys"
	ResistanceAlloys   Family = "resistance alloys"
	HeaterAlloys       Family = "heater alloys"
	ThermometerMetals  Family = "thermometer metals"
	StructuralAlloys   Family = "structural alloys"
)

// SignOff says who answers for a revision. Dates are ISO text, as written.
type SignOff struct {
	Author, Reviewer, Date, Reason, Due string
	Node                                *form.Node
}

// A Citation points to a source of materials/sources.yaml.
type Citation struct {
	ID      string
	Where   string  // "table 1"
	Checked Checked // "" means: as the source itself says; see library.CheckedOf
	Date    string  // ISO date of the check
	By      string  // role
	Node    *form.Node
}

// Checked says against what a value was compared.
type Checked string

// The checked states.
const (
	Original      Checked = "original"
	Transcription Checked = "transcription"
	Memory        Checked = "memory"
)

// Class of a value; "" is not stated. Typical values never form limits.
type Class string

// The classes.
const (
	Specified  Class = "specified"
	Typical    Class = "typical"
	Measured   Class = "measured"
	Calculated Class = "calculated"
	Textbook   Class = "textbook"
)

// Basis says what was measured; "" is not stated and nothing is converted.
type Basis string

// The bases (definitions: a fixed body, volume resistivity corrected for
// expansion, or resistivity on the dimensions of one temperature).
const (
	Resistance  Basis = "resistance"
	Resistivity Basis = "resistivity"
	Uncorrected Basis = "resistivity, uncorrected"
)

// Property is one property of a material with its own source.
type Property struct {
	Name       string // key: "density"
	Value      quantity.Quantity
	At         *quantity.Quantity // temperature, nil when not stated
	Window     *Window
	Class      Class
	Condition  string
	Note       string
	Source     Citation
	Accuracy   *quantity.Quantity // of service_temperature
	Continuous *quantity.Quantity // of service_temperature
	Node       *form.Node
}

// A Window is a closed interval of temperature in kelvin, with its text.
type Window struct {
	Lo, Hi float64
	Text   string
}

// TCRLimit is a class figure: a limit of a measure, never a coefficient.
type TCRLimit struct {
	Measure   string // box, chord, slope
	Reference float64
	Window    Window
	From, To  quantity.Quantity
	ClassName string
	Source    Citation
	Node      *form.Node
}

// Stock is one form in which the material is held.
type Stock struct {
	Form                       string // strip, sheet, foil, wire, bar
	Thickness, Width, Diameter *quantity.Quantity
	Gauge                      string             // "AWG 24"
	Resistance                 *quantity.Quantity // Ω/m
	Note                       string
	Source                     *Citation
	Node                       *form.Node
}

// longName is from how many letters on a name is too long for a label.
const longName = 24

// ShortName is what labels and lists have room for: the short designation,
// with the lot where there is one, else the name, else the ID.
func (r *Record) ShortName() string {
	short, lot := "", ""
	for _, d := range r.Designations {
		switch d.Key {
		case "short":
			short = d.Text
		case "lot":
			lot = " lot " + d.Text
		}
	}
	switch {
	case short != "":
		return short + lot
	case utf8.RuneCountInString(r.Name) <= longName:
		return r.Name
	}
	return r.ID
}

// Property returns the property called name, nil when there is none.
func (r *Record) Property(name string) *Property {
	for i := range r.Properties {
		if r.Properties[i].Name == name {
			return &r.Properties[i]
		}
	}
	return nil
}

// Expansion returns the linear expansion in 1/K, and false when the record
// has none with a value.
func (r *Record) Expansion() (float64, bool) {
	p := r.Property("expansion")
	if p == nil || !p.Value.HasValue() {
		return 0, false
	}
	return p.Value.Value, true
}

// Set returns the data set called name, the adopted one for "", nil when
// there is none.
func (r *Record) Set(name string) *DataSet {
	if name == "" {
		return r.Adopted
	}
	for _, s := range r.Sets {
		if s.Name == name {
			return s
		}
	}
	return nil
}
