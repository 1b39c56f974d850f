// Package statement computes, once for each material, the facts that its
// page, its sheet, its data file and the commands all show. Everything a
// template prints is a finished text here; the numbers stand beside it.
package statement

import (
	"ohmfolio/generator/figure"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// A Statement is all that is said of one material.
type Statement struct {
	Record *material.Record
	Set    *material.DataSet // the adopted one, nil when the record has none
	Units  Units

	DocumentNumber string // "FYR-cumn12ni": prefix and ID
	Status         string // "released", "draft, not for use", …
	Headline       []Fact // the five lines a reader looks for first
	Constants      Grid   // re-referenced constants at 0, 20, 23, 25, 27 °C
	Values         Grid   // value table at round steps over the valid range
	Windows        Grid   // TCR measures over the usual windows
	Turning        []string
	Properties     []PropertyRow
	Sets           []SetRow
	Deviations     []Deviation
	PerMetre       Grid // resistance per metre of stock, or of common sizes
	PerMetreOf     string
	Measured       []Measured // one for each data set of measured points
	Classes        Grid       // tolerance classes of a thermometer
	Lots           *Lots      // nil when no lots are recorded
	Equivalents    []EquivalentRow
	Declarations   []DeclarationRow
	Limits         []LimitRow // class figures held against the curve
	NotStated      []string   // "limits of beta", "condition"
	Caveats        []string
	Sources        []SourceRow // the sources cited, in order of first use
	UsedBy         []Use       // filled by the site, which knows the documents

	RhoFigure       *figure.Figure // nil when ρ cannot be told
	RatioFigure     *figure.Figure // nil when R/R_ref cannot be told
	DeviationFigure *figure.Figure // nil when there is no other curve
}

// Units are the house units chosen in reference.yaml.
type Units struct {
	Resistivity, Temperature, Coefficient, Conductivity quantity.Unit
}

// Fact is one line: label, value with unit, ± or limits, and a remark.
type Fact struct{ Label, Value, Band, Remark string }

// Grid is a table of finished texts. Cells that cannot be told say so in
// words or hold "—" when they lie outside the valid range.
type Grid struct {
	Caption string
	Heads   []string // first is the row head's title
	Rows    [][]string
	Notes   []string // printed under the table
}

// PropertyRow is one line of the property table:
// value · unit · at · ± · condition · source (with its checked state).
type PropertyRow struct {
	Name, Value, Unit, At, PlusMinus, Condition, Class string
	SourceID, SourceWhere, Checked, Note               string
	Written                                            string // as the author wrote it
}

// PropertyTable is the property table as pages and sheets print it.
func PropertyTable(rows []PropertyRow) (heads []string, cells [][]string) {
	for _, p := range rows {
		source := p.SourceID
		if p.SourceWhere != "" {
			source += ", " + p.SourceWhere
		}
		cells = append(cells, []string{p.Name, p.Value, p.Unit, p.At, p.PlusMinus, p.Condition, p.Class, source + " (" + p.Checked + ")", p.Note})
	}
	return []string{"Property", "value", "unit", "at", "±", "condition", "class", "source (checked)", "note"}, cells
}

// SetRow describes one data set.
type SetRow struct {
	Name, Model, Basis, Class, Condition, Reference string
	Resistivity, Alpha, Beta, Gamma, Range, Scale   string
	SourceID, SourceWhere, Checked                  string
	Adopted                                         bool
	Caveats                                         []string
}

// Deviation is what another data set differs by from the adopted one.
type Deviation struct {
	Set, Quantity, Range, Greatest, At string
	Grid                               Grid
	Cannot                             string // why it cannot be told, "" when it can
}

// LimitRow holds a class figure against the curve by the same measure.
type LimitRow struct{ Measure, Window, Limit, Curve, Verdict, SourceID, Checked string }

// SourceRow is a cited source with a number for footnotes.
type SourceRow struct {
	Number  int
	ID      string
	Text    string // author, title, number, publisher, edition, year
	Checked string
}

// Use is a document that rests on the material.
type Use struct{ Title, Path, What string } // Path relative to the site's root

// Of computes the statement of r. It never fails: what cannot be told is
// said in words.
func Of(lib *library.Library, r *material.Record) *Statement {
	s := &Statement{Record: r, Set: r.Adopted, Units: UnitsOf(lib)}
	b := builder{lib: lib, r: r, set: r.Adopted, s: s}
	b.identity()
	b.headline()
	b.tables()
	b.properties()
	b.dataSets()
	b.measured()
	b.classes()
	b.lots()
	b.equivalents()
	b.declarations()
	b.figures()
	s.Sources = SourcesOf(lib, r)
	return s
}
