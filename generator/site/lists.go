package site

import (
	"html/template"
	"sort"
	"strconv"
	"strings"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
	"ohmfolio/generator/statement"
	"ohmfolio/generator/study"
)

// homePage is what home-page.tmpl prints.
type homePage struct {
	frame
	Count, Released int
	Body            template.HTML
	Reports, Guides []link
}

func (s *site) home() output.Output {
	return s.page("index.html", "home-page", func() any {
		p := homePage{frame: s.frame("Home", "home", "", ""), Count: len(s.in.Library.Materials), Reports: s.pages("reports"), Guides: append(s.pages("guides"), s.topicLinks()...)}
		for _, r := range s.in.Library.Materials {
			if r.Status == material.Released {
				p.Released++
			}
		}
		for _, d := range s.in.Library.Documents {
			if d.Room == "" {
				p.frame.Title, p.Body = d.Page.Title, s.body(d, "")
			}
		}
		return p
	})
}

func checkedText(src *library.Source) string {
	t := or(string(src.Checked), "not stated")
	if src.CheckedDate != "" {
		t += ", " + src.CheckedDate
	}
	if src.CheckedBy != "" {
		t += ", " + src.CheckedBy
	}
	return t
}

func (s *site) citedBy() map[string][]link {
	used := map[string][]link{}
	for _, r := range s.in.Library.Materials {
		for _, row := range statement.SourcesOf(s.in.Library, r) {
			used[row.ID] = append(used[row.ID], link{r.ShortName(), "material/" + r.ID + ".html"})
		}
	}
	return used
}

func (s *site) words() output.Output {
	return s.page("words.html", "words-page", func() any {
		return struct {
			frame
			Terms    []term
			HasGuide bool
		}{s.frame("Words", "words", "", ""), terms, linkTo(s.pages("guides"), "guide/how-to-read-a-sheet.html")}
	})
}

func linkTo(list []link, path string) bool {
	for _, l := range list {
		if l.Path == path {
			return true
		}
	}
	return false
}

// decisionRow is one requirement of one study.
type decisionRow struct {
	Title, Path, Material, Size, Name, Requirement, Verdict, Margin, Evidence string
	Binding                                                                   bool
	margin                                                                    float64
}

func (s *site) decisions() output.Output {
	return s.page("decisions.html", "decisions-page", func() any {
		return struct {
			frame
			Rows     []decisionRow
			Reports  []link
			Cautions cautionList
		}{s.frame("Decisions", "decisions", "", "decisions.html"), s.decisionRows(), s.pages("reports"), cautionList{"cautions", study.SheetCautions()}}
	})
}

// decisionRows are sorted by margin, the worst first; what cannot be told
// comes before all.
func (s *site) decisionRows() []decisionRow {
	var rows []decisionRow
	for _, d := range s.in.Library.Documents {
		for _, o := range s.outcomes(d) {
			for _, m := range o.Materials {
				for _, r := range m.Requirements {
					rows = append(rows, s.decisionRow(d, o, m, r))
				}
			}
		}
	}
	sort.SliceStable(rows, func(i, j int) bool { return rows[i].margin < rows[j].margin })
	return rows
}

func (s *site) decisionRow(d *library.Document, o *study.Outcome, m study.MaterialOutcome, r study.Requirement) decisionRow {
	row := decisionRow{Title: o.Title, Path: pagePath(d), Size: m.Size, Material: m.Material, Name: s.short(m.Material), Requirement: r.Text(),
		Verdict: r.Verdict.Shown(), Margin: "cannot be told", Binding: o.Binding, margin: -1e9}
	if r.Margin != nil {
		row.Margin, row.margin = quantity.Fixed(*r.Margin*100, 1)+quantity.NarrowSpace+"%", *r.Margin
	}
	var evidence []string
	for _, e := range m.Evidence {
		evidence = append(evidence, e.Record+", revision "+strconv.Itoa(e.Revision)+", "+e.Fingerprint+", "+e.Status)
	}
	row.Evidence = strings.Join(evidence, "; ")
	if m.Material == "" {
		row.Name = m.Name
	}
	return row
}

// reviewPage is what review-page.tmpl prints.
type reviewPage struct {
	frame
	Due       []dueRow
	Open      []openRow
	Unchecked []openRow
	Expiring  []expiringRow
	Findings  []findingRow
}

type dueRow struct {
	ID, Name, Date, Due string
	Revision            int
}

// expiringRow is a declaration or an offer with its last day.
type expiringRow struct{ Day, ID, Name, What string }

type openRow struct{ ID, Name, Status, What string }

type findingRow struct{ Severity, Where, Message, Code string }

func (s *site) review() output.Output {
	return s.page("review.html", "review-page", func() any {
		p := reviewPage{frame: s.frame("State of review", "review", "", "", "review.js")}
		for _, r := range s.in.Library.Materials {
			s.reviewOf(&p, r)
		}
		s.offersOf(&p)
		sort.SliceStable(p.Expiring, func(i, j int) bool { return p.Expiring[i].Day < p.Expiring[j].Day })
		sort.SliceStable(p.Due, func(i, j int) bool { return p.Due[i].Due < p.Due[j].Due })
		for _, f := range s.in.Findings {
			if f.Severity != place.Note {
				p.Findings = append(p.Findings, findingRow{string(f.Severity), f.Position.String(), f.Message, f.Code})
			}
		}
		return p
	})
}

func (s *site) reviewOf(p *reviewPage, r *material.Record) {
	if r.SignOff != nil && r.SignOff.Due != "" && r.Status != material.Withdrawn {
		p.Due = append(p.Due, dueRow{r.ID, r.Name, r.SignOff.Date, r.SignOff.Due, r.Revision})
	}
	for _, d := range r.Declarations {
		if d.Expires != "" && r.Status != material.Withdrawn {
			p.Expiring = append(p.Expiring, expiringRow{d.Expires, r.ID, r.ShortName(), "declaration on " + d.Substance + ", " + d.Document})
		}
	}
	if r.Status != material.Released {
		p.Open = append(p.Open, openRow{ID: r.ID, Name: r.Name, Status: statusText(r)})
	}
	var what []string
	for _, src := range statement.SourcesOf(s.in.Library, r) {
		if src.Checked == string(material.Memory) || src.Checked == "not stated" {
			what = append(what, src.ID+": "+src.Checked)
		}
	}
	if len(what) > 0 {
		p.Unchecked = append(p.Unchecked, openRow{ID: r.ID, Name: r.Name, What: strings.Join(what, ", ")})
	}
}

func (s *site) offersOf(p *reviewPage) {
	for _, o := range s.in.Library.Offers {
		r := s.in.Library.Material(o.Material)
		if o.ValidUntil != "" && r != nil {
			p.Expiring = append(p.Expiring, expiringRow{o.ValidUntil, r.ID, r.ShortName(), "offer of " + o.Supplier + ", " + o.Form + " " + o.Size})
		}
	}
}
