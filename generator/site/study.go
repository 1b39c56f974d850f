package site

import (
	"bytes"
	"fmt"
	"html"
	"html/template"
	"strconv"

	"ohmfolio/generator/figure"
	"ohmfolio/generator/library"
	"ohmfolio/generator/output"
	"ohmfolio/generator/study"
)

// studyPart is what study-part.tmpl prints: Given, Asked, Answer.
type studyPart struct {
	ID       string
	Deep     bool // stands under a heading of the page, not right under its title
	Sheet    string
	O        *study.Outcome
	Ranking  []link
	Unranked bool // some answers stand outside the ranking
	Figures  []*figure.Figure
	Tables   []template.HTML
	Own      []template.HTML // tables of single materials
}

func (s *site) studyPart(w *bytes.Buffer, o *study.Outcome, d *library.Document, i int, root string) {
	p := s.partOf(o, d, i, root)
	p.Sheet = root + study.SheetPath(d.Stem, i) + ".html"
	if err := s.look.templates.ExecuteTemplate(w, "study", p); err != nil {
		w.WriteString("<p>" + html.EscapeString(err.Error()) + "</p>")
	}
}

func (s *site) partOf(o *study.Outcome, d *library.Document, i int, root string) *studyPart {
	p := &studyPart{ID: "study-" + strconv.Itoa(i+1), O: o, Deep: d.Page.Studies[i].Level > 1, Unranked: len(o.Ranking) < len(o.Materials)}
	for n, c := range o.Charts {
		p.Figures = append(p.Figures, c.Figure(fmt.Sprintf("%s-%d-%d", d.Stem, i+1, n+1)))
	}
	for _, t := range o.Tables {
		p.Tables = append(p.Tables, s.studyTable(t, o.Title, root))
	}
	for _, ranked := range o.Ranking {
		l := link{Name: ranked}
		if m, ok := o.RankedAs(ranked); ok {
			l = link{m.ShortLabel(), s.materialLink(m.Material, root).Path}
		}
		p.Ranking = append(p.Ranking, l)
	}
	for _, m := range o.Materials {
		for _, t := range m.Tables {
			p.Own = append(p.Own, s.studyTable(t, o.Title, root))
		}
	}
	return p
}

func (s *site) short(id string) string {
	if r := s.in.Library.Material(id); r != nil {
		return r.ShortName()
	}
	return id
}

// studySheet is what study-page.tmpl prints: one study on paper.
type studySheet struct {
	frame
	Part                    *studyPart
	Number, State, Identity string
	Report                  link
	Cautions                cautionList
	PDF                     string
}

// studySheets are the sheets of every study of the reports.
func (s *site) studySheets(d *library.Document) []output.Output {
	var list []output.Output
	for i, o := range s.outcomes(d) {
		list = append(list, s.page(study.SheetPath(d.Stem, i)+".html", "study-page", func() any {
			sheet := studySheet{frame: s.frame(o.Title, "sheet", "../", ""), Part: s.partOf(o, d, i, "../"), Number: study.SheetNumber(s.in.Library.Settings.DocumentPrefix, d.Stem, i), State: "study: " + o.Study,
				Identity: "answer " + o.Print(), Report: link{d.Page.Title, "../" + pagePath(d)}, Cautions: cautionList{"cautions", o.Cautions}}
			if s.in.Library.Settings.PDF {
				sheet.PDF = "../" + study.SheetPath(d.Stem, i) + ".pdf"
			}
			return sheet
		}))
	}
	return list
}

func (s *site) studyTable(t study.Table, of, root string) template.HTML {
	w := tableWriter{of: of}
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
