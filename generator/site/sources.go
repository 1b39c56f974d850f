package site

import (
	"sort"
	"strings"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
	"ohmfolio/generator/statement"
)

// sourceRow is one source with the materials that cite it.
type sourceRow struct {
	ID, Text, Kind, Checked, Access, Note string
	Newer                                 []string // the editions that followed, to the current one
	Invented                              bool
	Used                                  []link
}

// checkRow is one value, or several of one material, that rest on a source.
type checkRow struct {
	Name, Path, Values, Source, Where, Against, Date, By string
}

type sourcesPage struct {
	frame
	Rows    []sourceRow
	ToCheck []checkRow // not compared with the original yet, memory first
	Checked []checkRow // compared, with who did it and when
}

func (s *site) sources() output.Output {
	return s.page("sources.html", "sources-page", func() any {
		p := sourcesPage{frame: s.frame("Sources", "sources", "", "sources.html")}
		used := s.citedBy()
		lib := s.in.Library
		for _, id := range lib.SourceIDs {
			src := lib.Source(id)
			p.Rows = append(p.Rows, sourceRow{ID: id, Text: statement.SourceText(src), Kind: src.Kind, Checked: checkedText(src), Access: src.Access, Note: src.Note,
				Newer: newer(lib, src), Invented: src.Invented, Used: used[id]})
		}
		p.ToCheck, p.Checked = s.checks()
		return p
	})
}

// newer follows superseded_by to the current edition; a ring ends where it
// began.
func newer(lib *library.Library, src *library.Source) []string {
	var chain []string
	seen := map[string]bool{src.ID: true}
	for next := src.SupersededBy; next != "" && !seen[next]; {
		seen[next] = true
		chain = append(chain, next)
		following := lib.Source(next)
		if following == nil {
			break
		}
		next = following.SupersededBy
	}
	return chain
}

// urgency orders what is to check: memory first, then what nobody says, then
// transcriptions.
var urgency = map[string]int{string(material.Memory): 0, "not stated": 1, string(material.Transcription): 2}

// checks sorts every citation into compared with the original, and not.
func (s *site) checks() (open, done []checkRow) {
	for _, r := range s.in.Library.Materials {
		if r.Status == material.Withdrawn {
			continue
		}
		for _, row := range s.checksOf(r) {
			switch {
			case row.Against != string(material.Original):
				open = append(open, row)
			case row.Date != "" || row.By != "":
				done = append(done, row)
			}
		}
	}
	sort.SliceStable(open, func(i, j int) bool { return urgency[open[i].Against] < urgency[open[j].Against] })
	sort.SliceStable(done, func(i, j int) bool { return done[i].Date > done[j].Date })
	return open, done
}

// checksOf are the citations of one record; values with the same source,
// place and state share a row.
func (s *site) checksOf(r *material.Record) []checkRow {
	var rows []checkRow
	add := func(c material.Citation, what string) {
		row := checkRow{Name: r.ShortName(), Path: "material/" + r.ID + ".html", Values: what, Source: c.ID, Where: c.Where,
			Against: or(string(s.in.Library.CheckedOf(c)), "not stated"), Date: c.Date, By: c.By}
		if src := s.in.Library.Source(c.ID); src != nil && c.Checked == "" {
			row.Date, row.By = src.CheckedDate, src.CheckedBy
		}
		for i := range rows {
			same := rows[i]
			same.Values = row.Values
			if same == row {
				rows[i].Values += ", " + what
				return
			}
		}
		rows = append(rows, row)
	}
	for _, set := range r.Sets {
		add(set.Source, "data set "+set.Name)
	}
	for _, p := range r.Properties {
		add(p.Source, strings.ReplaceAll(p.Name, "_", " "))
	}
	for _, l := range r.TCRLimits {
		add(l.Source, l.Measure+" limit")
	}
	return rows
}
