package site

import (
	"bytes"
	"fmt"
	"html"
	"html/template"
	"strconv"
	"strings"

	"ohmfolio/generator/figure"
	"ohmfolio/generator/library"
	"ohmfolio/generator/study"
)

// studyPart is what study-part.tmpl prints.
type studyPart struct {
	ID       string
	Deep     bool // stands under a heading of the page, not right under its title
	O        *study.Outcome
	Figures  []*figure.Figure
	Tables   []template.HTML
	Ranking  []link
	Asked    []string
	Reasons  []string
	Evidence []string
}

func (s *site) studyPart(w *bytes.Buffer, o *study.Outcome, d *library.Document, i int, root string) {
	p := studyPart{ID: "study-" + strconv.Itoa(i+1), O: o, Deep: d.Page.Studies[i].Level > 1}
	for n, c := range o.Charts {
		p.Figures = append(p.Figures, chartFigure(c, fmt.Sprintf("%s-%d-%d", d.Stem, i+1, n+1)))
	}
	for _, t := range o.Tables {
		p.Tables = append(p.Tables, s.studyTable(t, root))
	}
	for _, id := range o.Ranking {
		l := s.materialLink(id, root)
		l.Name = s.short(id)
		p.Ranking = append(p.Ranking, l)
	}
	for _, m := range o.Materials {
		for _, r := range m.Requirements {
			p.Asked = append(p.Asked, s.short(m.Material)+": "+requirementText(r)+" "+r.Verdict.Shown())
		}
		for _, r := range append(m.Reasons, m.Warnings...) {
			p.Reasons = append(p.Reasons, s.short(m.Material)+": "+r)
		}
		for _, e := range m.Evidence {
			p.Evidence = append(p.Evidence, fmt.Sprintf("%s, data %s, revision %d, %s, %s, checked against %s", e.Record, e.Data, e.Revision, e.Fingerprint, e.Status, e.Checked))
		}
	}
	if err := s.look.templates.ExecuteTemplate(w, "study", p); err != nil {
		w.WriteString("<p>" + html.EscapeString(err.Error()) + "</p>")
	}
}

func (s *site) short(id string) string {
	if r := s.in.Library.Material(id); r != nil {
		return r.ShortName()
	}
	return id
}

func requirementText(r study.Requirement) string {
	return strings.ReplaceAll(r.Name, "_", " ") + " within " + r.Bound
}

// chartFigure gives each series an ink and a dash; after four inks the dashes
// move on, so that sixteen curves can be told apart in grey.
func chartFigure(c study.Chart, id string) *figure.Figure {
	f := &figure.Figure{ID: id, Title: c.Title, Description: c.Description, XTitle: c.XTitle, YTitle: c.YTitle, Width: 720, Height: 400}
	for i, s := range c.Series {
		ink, dash := i%4+1, (i+i/4)%4+1
		bandLabel := s.Label
		if len(s.Y) > 0 {
			bandLabel = ""
			f.Lines = append(f.Lines, figure.Line{Label: s.Label, X: s.X, Y: s.Y, Ink: ink, Dash: dash})
		}
		if len(s.Lower) > 0 {
			f.Areas = append(f.Areas, figure.Area{Label: bandLabel, X: s.X, Lower: s.Lower, Upper: s.Upper, Ink: ink})
		}
	}
	return f
}

func (s *site) studyTable(t study.Table, root string) template.HTML {
	var w tableWriter
	w.begin(t.Caption, t.Heads, firstRow(t.Rows))
	for i, row := range t.Rows {
		first := ""
		if i < len(t.Links) && t.Links[i] != "" && len(row) > 0 {
			l := s.materialLink(t.Links[i], root)
			first = `<a href="` + html.EscapeString(l.Path) + `">` + html.EscapeString(row[0]) + "</a>"
		}
		w.row(row, first)
	}
	return w.end(nil)
}
