package site

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"html"
	"html/template"
	"strconv"
	"strings"

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
	Asked    []string
	Answer   string
	Ranking  []link
	Unranked bool // some answers stand outside the ranking
	Figures  []*figure.Figure
	Tables   []template.HTML
	Own      []template.HTML // tables of single materials
	Reasons  []remark
	Evidence []string
}

// remark is a reason or a warning with the names of all that it holds for.
type remark struct {
	Text  string
	Names []string
	all   int // answers of the study
}

// Who names them; all of several are just that.
func (r remark) Who() string {
	if r.all > 1 && len(r.Names) == r.all {
		return "all"
	}
	return strings.Join(r.Names, "; ")
}

func (p *studyPart) remark(text, name string) {
	for i := range p.Reasons {
		if p.Reasons[i].Text == text {
			p.Reasons[i].Names = append(p.Reasons[i].Names, name)
			return
		}
	}
	p.Reasons = append(p.Reasons, remark{text, []string{name}, len(p.O.Materials)})
}

func (s *site) studyPart(w *bytes.Buffer, o *study.Outcome, d *library.Document, i int, root string) {
	p := s.partOf(o, d, i, root)
	p.Sheet = root + studyPath(d, i)
	if err := s.look.templates.ExecuteTemplate(w, "study", p); err != nil {
		w.WriteString("<p>" + html.EscapeString(err.Error()) + "</p>")
	}
}

func (s *site) partOf(o *study.Outcome, d *library.Document, i int, root string) *studyPart {
	p := &studyPart{ID: "study-" + strconv.Itoa(i+1), O: o, Deep: d.Page.Studies[i].Level > 1, Answer: answerText(o), Unranked: len(o.Ranking) < len(o.Materials)}
	for n, c := range o.Charts {
		p.Figures = append(p.Figures, chartFigure(c, fmt.Sprintf("%s-%d-%d", d.Stem, i+1, n+1)))
	}
	for _, t := range o.Tables {
		p.Tables = append(p.Tables, s.studyTable(t, o.Title, root))
	}
	for _, ranked := range o.Ranking {
		p.Ranking = append(p.Ranking, s.rankedLink(ranked, root))
	}
	for _, m := range o.Materials {
		s.addAnswer(p, m, root)
	}
	for _, m := range o.Chosen() {
		for _, e := range m.Evidence {
			p.Evidence = once(p.Evidence, evidenceText(e))
		}
	}
	return p
}

func once(list []string, text string) []string {
	for _, have := range list {
		if have == text {
			return list
		}
	}
	return append(list, text)
}

// rankedLink leads to the material of "ID" or "ID, size".
func (s *site) rankedLink(ranked, root string) link {
	id, size, sized := strings.Cut(ranked, ", ")
	l := s.materialLink(id, root)
	l.Name = s.short(id)
	if sized {
		l.Name += ", " + size
	}
	return l
}

// addAnswer adds what one material's answer brings: bounds and evidence once,
// reasons and warnings with its name, tables of its own.
func (s *site) addAnswer(p *studyPart, m study.MaterialOutcome, root string) {
	for _, r := range m.Requirements {
		p.Asked = once(p.Asked, requirementText(r))
	}
	name := s.short(m.Material)
	if m.Material == "" {
		name = m.Name
	}
	if m.Size != "" {
		name += ", " + m.Size
	}
	if !p.O.Listed {
		for _, r := range m.Reasons {
			p.remark(r, name)
		}
	}
	for _, w := range m.Warnings {
		if !p.O.Listed || m.Verdict == study.Holds || m.Verdict == study.HoldsNominally {
			p.remark(w, name)
		}
	}
	for _, t := range m.Tables {
		p.Own = append(p.Own, s.studyTable(t, p.O.Title, root))
	}
}

func evidenceText(e study.Evidence) string {
	return fmt.Sprintf("%s, data %s, revision %d, %s, %s, checked against %s", e.Record, e.Data, e.Revision, e.Fingerprint, e.Status, e.Checked)
}

// answerText counts the verdicts in words; without requirements there is
// nothing to judge.
func answerText(o *study.Outcome) string {
	count := map[study.Verdict]int{}
	for _, m := range o.Materials {
		count[m.Verdict]++
	}
	var parts []string
	for _, v := range []study.Verdict{study.Holds, study.HoldsNominally, study.CannotBeTold, study.Fails} {
		if count[v] == 0 {
			continue
		}
		if len(o.Materials) == 1 {
			return v.Shown() + "."
		}
		parts = append(parts, v.Shown()+": "+strconv.Itoa(count[v]))
	}
	if len(parts) == 0 {
		return "Nothing is required; the numbers stand below."
	}
	return strings.Join(parts, "; ") + " of " + strconv.Itoa(len(o.Materials)) + "."
}

func (s *site) short(id string) string {
	if r := s.in.Library.Material(id); r != nil {
		return r.ShortName()
	}
	return id
}

func requirementText(r study.Requirement) string {
	name := strings.ReplaceAll(r.Name, "_", " ")
	if strings.HasPrefix(r.Bound, ">") || strings.HasPrefix(r.Bound, "<") || strings.HasPrefix(r.Bound, "≥") || strings.HasPrefix(r.Bound, "≤") {
		return name + " " + r.Bound
	}
	if r.Unit == "" && r.Worst == nil {
		return name + " " + r.Bound
	}
	return name + " within " + r.Bound
}

// studySheet is what study-page.tmpl prints: one study on paper.
type studySheet struct {
	frame
	Part                    *studyPart
	Number, State, Identity string
	Report                  link
	Cautions                cautionList
}

// studyPath is where the sheet of a document's study is written.
func studyPath(d *library.Document, i int) string {
	return "study/" + d.Stem + "-" + strconv.Itoa(i+1) + ".html"
}

// studySheets are the sheets of every study of the reports.
func (s *site) studySheets(d *library.Document) []output.Output {
	var list []output.Output
	for i, o := range s.outcomes(d) {
		list = append(list, s.page(studyPath(d, i), "study-page", func() any {
			p := s.partOf(o, d, i, "../")
			number := s.in.Library.Settings.DocumentPrefix + "-" + d.Stem + "-" + strconv.Itoa(i+1)
			return studySheet{frame: s.frame(o.Title, "sheet", "../", ""), Part: p, Number: number, State: "study: " + o.Study,
				Identity: "answer " + answerPrint(o), Report: link{d.Page.Title, "../" + pagePath(d)}, Cautions: cautionList{"cautions", o.Cautions}}
		}))
	}
	return list
}

// answerPrint is a short hash over what the study was given and rests on, so
// that two printed copies of one study can be told apart.
func answerPrint(o *study.Outcome) string {
	h := sha256.New()
	fmt.Fprintln(h, o.Study, o.Title, o.Parameters)
	for _, m := range o.Materials {
		fmt.Fprintln(h, m.Material, m.Size, m.Verdict, m.Evidence)
		for _, r := range m.Requirements {
			fmt.Fprintln(h, r.Name, r.Bound)
		}
	}
	text := hex.EncodeToString(h.Sum(nil)[:4])
	return text[:4] + "-" + text[4:]
}

func pointsOf(s study.Series, ink int) figure.Points {
	p := figure.Points{Label: s.Label, Ink: ink}
	for i, x := range s.X {
		p.List = append(p.List, figure.Point{X: x, Y: s.Y[i]})
	}
	return p
}

// chartFigure gives each series an ink and a dash; after four inks the dashes
// move on, so that sixteen curves can be told apart in grey.
func chartFigure(c study.Chart, id string) *figure.Figure {
	f := &figure.Figure{ID: id, Title: c.Title, Description: c.Description, XTitle: c.XTitle, YTitle: c.YTitle, Width: 720, Height: 400}
	for _, x := range c.Marks {
		f.Marks = append(f.Marks, figure.Mark{X: x})
	}
	for i, s := range c.Series {
		if s.Apart {
			f.Points = append(f.Points, pointsOf(s, i%4+1))
			continue
		}
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
