package statement

import (
	"math"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

func (b *builder) dataSets() {
	for _, set := range b.r.Sets {
		b.s.Sets = append(b.s.Sets, b.setRow(set))
		if set != b.set && b.set != nil {
			b.deviation(set)
		}
	}
}

func (b *builder) setRow(set *material.DataSet) SetRow {
	row := SetRow{Name: set.Name, Model: string(set.Model), Basis: basisText(set.Basis), Class: orNotStated(string(set.Class)),
		Condition: orNotStated(set.Condition), Range: rangeText(set.Valid), Scale: orNotStated(set.Scale),
		SourceID: set.Source.ID, SourceWhere: set.Source.Where, Checked: orNotStated(string(b.lib.CheckedOf(set.Source))),
		Adopted: set == b.set, Caveats: set.Caveats, Reference: "none of its own"}
	if !math.IsNaN(set.Reference) {
		row.Reference = quantity.CelsiusText(set.Reference)
	}
	row.Resistivity, row.Alpha = optional(set.Resistivity), optional(set.Alpha)
	row.Beta, row.Gamma = optional(set.Beta), optional(set.Gamma)
	return row
}

func optional(q *quantity.Quantity) string {
	if q == nil {
		return ""
	}
	return pretty(*q)
}

// SourcesOf lists the sources that a record cites, in order of first use.
func SourcesOf(lib *library.Library, r *material.Record) []SourceRow {
	var rows []SourceRow
	seen := map[string]bool{}
	add := func(c material.Citation) {
		if c.ID == "" || seen[c.ID] {
			return
		}
		seen[c.ID] = true
		row := SourceRow{Number: len(rows) + 1, ID: c.ID, Text: "not in sources.yaml", Checked: orNotStated(string(lib.CheckedOf(c)))}
		if src := lib.Source(c.ID); src != nil {
			row.Text = SourceText(src)
		}
		rows = append(rows, row)
	}
	if r.Adopted != nil {
		add(r.Adopted.Source)
	}
	for _, set := range r.Sets {
		add(set.Source)
	}
	for _, p := range r.Properties {
		add(p.Source)
	}
	for _, l := range r.TCRLimits {
		add(l.Source)
	}
	for _, s := range r.Stock {
		if s.Source != nil {
			add(*s.Source)
		}
	}
	for _, e := range r.Equivalents {
		if e.Source != nil {
			add(*e.Source)
		}
	}
	return rows
}

// SourceText is one line: author, title, number, publisher, edition, year.
func SourceText(s *library.Source) string {
	text := ""
	for _, part := range []string{s.Author, s.Title, s.Number, s.Publisher, s.Edition, s.Year, s.Where} {
		if part == "" {
			continue
		}
		if text != "" {
			text += ", "
		}
		text += part
	}
	return text
}
