// Package sheet writes spec sheets as PDF without a browser: the content of
// the HTML sheet, vector figures from the same drawing, embedded fonts,
// bookmarks, and page n of N. The same input gives the same bytes.
package sheet

import (
	"bytes"
	"strconv"
	"strings"

	"ohmfolio/generator/copycheck"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
	"ohmfolio/generator/statement"
)

// Input is what the sheets are made of.
type Input struct {
	Library   *library.Library
	Statement func(r *material.Record) *statement.Statement
	Cautions  []string
	Studies   []Study
}

// Path is where the sheet of a material is written; "" for the first paper of
// reference.yaml.
func Path(id, paper string) string {
	if paper == "" {
		return "sheet/" + id + ".pdf"
	}
	return "sheet/" + id + "-" + strings.ToLower(paper) + ".pdf"
}

// Outputs lists the sheets where reference.yaml says pdf: yes; nothing
// otherwise. The first paper has the plain name.
func Outputs(in *Input) []output.Output {
	if !in.Library.Settings.PDF {
		return nil
	}
	var list []output.Output
	for _, r := range in.Library.Materials {
		for i, name := range in.Library.Settings.Paper {
			suffix := name
			if i == 0 {
				suffix = ""
			}
			list = append(list, output.Output{Path: Path(r.ID, suffix), Write: func(w *bytes.Buffer) error {
				return Write(w, in, in.Statement(r), papers[name])
			}})
		}
	}
	return append(list, studies(in)...)
}

// Write sets one sheet.
func Write(w *bytes.Buffer, in *Input, s *statement.Statement, p paper) error {
	t, err := theTypeface()
	if err != nil {
		return err
	}
	d := newDoc(t, p)
	b := &sheet{doc: d, in: in, s: s}
	if err := b.lay(); err != nil {
		return err
	}
	return d.write(w, b.identity())
}

// sheet is one sheet being laid out.
type sheet struct {
	*doc
	in *Input
	s  *statement.Statement
}

// identity is what every page carries.
func (b *sheet) identity() identity {
	r := b.s.Record
	id := identity{
		left: b.s.DocumentNumber, state: "revision " + strconv.Itoa(r.Revision) + " · " + b.s.Status, right: "fingerprint " + r.Fingerprint,
		foot:  "Printed copy: check the revision against the index of " + b.in.Library.Settings.Title + " before use.",
		title: b.s.DocumentNumber + ", " + r.Name, subject: "Spec sheet, revision " + strconv.Itoa(r.Revision) + ", fingerprint " + r.Fingerprint,
		author: b.in.Library.Settings.Organisation,
	}
	if r.SignOff != nil {
		id.right = r.SignOff.Date + " · " + id.right
		id.date = r.SignOff.Date
	}
	return id
}

// lay sets the parts in the order of the HTML sheet.
func (b *sheet) lay() error {
	r := b.s.Record
	if err := b.code(); err != nil {
		return err
	}
	b.bookmark(r.Name)
	b.paragraph(bold, titleSize, r.Name)
	if r.Invented {
		b.paragraph(bold, bodySize, "Invented data of the example. Not for use.")
	}
	if b.s.Status != "released" {
		text := b.s.Status + "."
		if r.ReplacedBy != "" {
			text += " Replaced by " + r.ReplacedBy + "."
		}
		b.paragraph(bold, bodySize, strings.TrimSpace(text+" "+r.WithdrawnReason))
	}
	b.facts()
	for _, c := range b.s.Caveats {
		b.paragraph(regular, bodySize, c)
	}
	b.cautions(b.in.Cautions)
	if err := b.figures(b.s.RhoFigure, b.s.RatioFigure); err != nil {
		return err
	}
	b.tables()
	b.words()
	return nil
}

// code sets the QR code of the check page, or its characters alone where the
// site's address is not known.
func (b *sheet) code() error {
	r := b.s.Record
	characters := copycheck.Characters(r.ID, r.Revision, r.Fingerprint)
	address := copycheck.Address(b.in.Library.Settings.Address, characters)
	if address == "" {
		return nil
	}
	c, err := copycheck.New(address)
	if err != nil {
		return err
	}
	const side = 68.0
	module := side / float64(c.Size+2*copycheck.Quiet)
	x, y := b.paper.width-margin-side, b.y
	c.Runs(func(row, from, length int) {
		b.add(stroke{what: aBox, x: x + float64(from+copycheck.Quiet)*module, y: y + float64(row+copycheck.Quiet)*module, w: float64(length) * module, h: module})
	})
	b.right, b.below = side+8, y+side+2
	return nil
}

// facts set label and value, two columns of them.
func (b *sheet) facts() {
	const label = 166.0
	for _, f := range b.s.Headline {
		value := f.Value
		for _, more := range []string{f.Band, f.Remark} {
			if more != "" {
				value += "  " + more
			}
		}
		lines := b.t.wrap(regular, bodySize, b.t.plain(value), b.room()-label)
		step := bodySize * lead
		b.need(step * float64(len(lines)))
		b.textAt(regular, bodySize, margin, b.y+step-bodySize*0.3, 0.25, b.t.plain(f.Label))
		for _, line := range lines {
			b.y += step
			b.textAt(regular, bodySize, margin+label, b.y-bodySize*0.3, 0, line)
		}
		b.y += 1
	}
	b.y += 4
}

func (b *sheet) tables() {
	section := func(head string, g statement.Grid) {
		if len(g.Rows) > 0 {
			b.bookmark(head)
			b.table(g.Caption, g.Heads, g.Rows, g.Notes)
		}
	}
	section("Values", b.s.Values)
	section("Constants", b.s.Constants)
	section("Temperature coefficient", b.s.Windows)
	if len(b.s.Properties) > 0 {
		b.bookmark("Properties")
		heads, rows := statement.PropertyTable(b.s.Properties)
		b.table("Properties", heads, rows, nil)
	}
	section("Per metre", b.s.PerMetre)
}

func (b *sheet) words() {
	r := b.s.Record
	if len(b.s.Equivalents) > 0 {
		b.heading("Equivalents")
		for _, e := range b.s.Equivalents {
			b.paragraph(regular, bodySize, e.Text())
		}
	}
	if len(b.s.Declarations) > 0 {
		b.heading("Declarations")
		for _, e := range b.s.Declarations {
			b.paragraph(regular, bodySize, e.Text())
		}
	}
	if r.Notes != "" {
		b.paragraph(regular, bodySize, r.Notes)
	}
	missing := "Not stated: nothing that a reader usually looks for."
	if len(b.s.NotStated) > 0 {
		missing = "Not stated: " + strings.Join(b.s.NotStated, ", ") + "."
	}
	b.paragraph(regular, bodySize, missing)
	b.heading("Sources")
	for _, s := range b.s.Sources {
		b.paragraph(regular, bodySize, strconv.Itoa(s.Number)+". "+s.Text+" ("+s.ID+", checked against: "+s.Checked+")")
	}
	if so := r.SignOff; so != nil {
		text := "Author: " + so.Author + " · reviewer: " + so.Reviewer + " · " + so.Date + " · reason: " + so.Reason
		if so.Due != "" {
			text += " · review due " + so.Due
		}
		b.paragraph(regular, bodySize, text)
	}
	b.paragraph(regular, bodySize, "To check this copy: "+copycheck.Characters(r.ID, r.Revision, r.Fingerprint)+" on the check page of "+b.in.Library.Settings.Title+".")
}

// cautions stand together, on the page of the first numbers.
func (d *doc) cautions(list []string) {
	room := headSize * lead * 2
	for _, c := range list {
		room += bodySize * (lead*float64(len(d.t.wrap(regular, bodySize, d.t.plain(c), d.paper.width-2*margin))) + 0.35)
	}
	d.need(room)
	d.heading("Cautions")
	for _, c := range list {
		d.paragraph(regular, bodySize, c)
	}
	d.y += 4
}
