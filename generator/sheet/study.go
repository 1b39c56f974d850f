package sheet

import (
	"bytes"
	"strings"

	"ohmfolio/generator/output"
	"ohmfolio/generator/study"
)

// Study is one study of a document, to be set on paper.
type Study struct {
	Stem     string // of the document
	Index    int    // of the study in it, from 0
	Document string // its title
	Outcome  *study.Outcome
}

// studies lists the sheets of the studies on the first paper.
func studies(in *Input) []output.Output {
	var list []output.Output
	for _, s := range in.Studies {
		list = append(list, output.Output{Path: study.SheetPath(s.Stem, s.Index) + ".pdf", Write: func(w *bytes.Buffer) error {
			return WriteStudy(w, in, s, papers[in.Library.Settings.Paper[0]])
		}})
	}
	return list
}

// WriteStudy sets one study: Given, Asked, Answer, the cautions beside the
// answer, figures, tables, remarks, assumptions, and what it rests on.
func WriteStudy(w *bytes.Buffer, in *Input, s Study, p paper) error {
	t, err := theTypeface()
	if err != nil {
		return err
	}
	d, o := newDoc(t, p), s.Outcome
	d.bookmark(o.Title)
	d.paragraph(bold, titleSize, o.Title)
	var given []string
	for _, x := range o.Parameters {
		given = append(given, x.Name+" "+x.Text)
	}
	d.labelled("Given", strings.Join(given, " · "))
	if asked := o.Asked(); len(asked) > 0 {
		if o.Binding {
			asked = append(asked, "binding")
		}
		d.labelled("Asked", strings.Join(asked, ", ")+".")
	}
	d.labelled("Answer", o.AnswerText()+ranked(o))
	d.cautions(o.Cautions)
	for i, c := range o.Charts {
		if err := d.figures(c.Figure(study.SheetPath(s.Stem, i))); err != nil {
			return err
		}
	}
	d.studyTables(o)
	d.heading("Rests on")
	for _, e := range o.EvidenceTexts() {
		d.paragraph(regular, bodySize, e)
	}
	number := study.SheetNumber(in.Library.Settings.DocumentPrefix, s.Stem, s.Index)
	return d.write(w, identity{left: number, state: "study: " + o.Study, right: "answer " + o.Print(), author: in.Library.Settings.Organisation,
		foot:  "A calculation, not an approval. A changed record changes the answer: check " + s.Document + " before use.",
		title: number + ", " + o.Title, subject: "Study of " + s.Document})
}

func ranked(o *study.Outcome) string {
	if len(o.Ranking) == 0 {
		return ""
	}
	var names []string
	for _, line := range o.Ranking {
		if m, ok := o.RankedAs(line); ok {
			line = m.ShortLabel()
		}
		names = append(names, line)
	}
	return " Ranked: " + strings.Join(names, ", ") + "."
}

// labelled sets a paragraph behind a bold word.
func (d *doc) labelled(label, text string) {
	d.paragraph(bold, bodySize, label)
	d.y -= bodySize * 0.35
	d.paragraph(regular, bodySize, text)
}

func (d *doc) studyTables(o *study.Outcome) {
	set := func(t study.Table) {
		if t.Caption != "" {
			d.bookmark(t.Caption)
		}
		d.table(t.Caption, t.Heads, t.Rows, nil)
	}
	for _, t := range o.Tables {
		set(t)
	}
	for _, r := range o.Remarks() {
		d.paragraph(regular, bodySize, r.Who()+": "+r.Text)
	}
	for _, m := range o.Materials {
		for _, t := range m.Tables {
			set(t)
		}
	}
	if len(o.Notes) > 0 {
		d.heading("Assumed")
		for _, n := range o.Notes {
			d.paragraph(regular, bodySize, n)
		}
	}
}
