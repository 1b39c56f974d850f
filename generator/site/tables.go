package site

import (
	"html"
	"html/template"
	"strings"

	"ohmfolio/generator/statement"
)

// wideCell is from how many bytes on a cell gets room of its own, so that a
// long text does not become a tower of short lines.
const wideCell = 24

// tableWriter writes one table. Tables are the bulk of a page; writing them
// here, every text escaped, is ten times faster than template loops.
type tableWriter struct {
	b  strings.Builder
	of string // what the table belongs to, where a page has several of one caption
}

func (t *tableWriter) begin(caption string, heads []string, first []string) {
	t.b.WriteString(`<div class="scroll" tabindex="0" role="region" aria-label="`)
	t.text(plainLabel(caption, heads))
	if t.of != "" {
		t.text(", " + t.of)
	}
	t.b.WriteString(`"><table>`)
	if caption != "" {
		t.b.WriteString("<caption>")
		t.text(caption)
		t.b.WriteString("</caption>")
	}
	t.b.WriteString("<thead><tr>")
	for i, h := range heads {
		if i < len(first) && numeric(first[i]) && (i > 0 || wholeNumber(first[i])) {
			t.b.WriteString(`<th scope="col" class="n">`) // above its numbers
		} else {
			t.b.WriteString(`<th scope="col">`)
		}
		t.text(h)
		t.b.WriteString("</th>")
	}
	t.b.WriteString("</tr></thead>\n<tbody>")
}

func plainLabel(caption string, heads []string) string {
	if caption != "" {
		return caption
	}
	return "table of " + strings.Join(heads, ", ")
}

// row writes one row; the first cell is its head, written as HTML when first
// is not empty.
func (t *tableWriter) row(cells []string, first string) {
	t.b.WriteString("<tr>")
	for i, c := range cells {
		switch {
		case i == 0 && first != "":
			t.b.WriteString(`<th scope="row"` + wideClass(c) + `>` + first + "</th>")
		case i == 0 && wholeNumber(c):
			t.b.WriteString(`<th scope="row" class="n">`)
			t.text(c)
			t.b.WriteString("</th>")
		case i == 0:
			t.b.WriteString(`<th scope="row"` + wideClass(c) + `>`)
			t.text(c)
			t.b.WriteString("</th>")
		case numeric(c):
			t.b.WriteString(`<td class="n">`)
			t.text(c)
			t.b.WriteString("</td>")
		case len(c) > wideCell:
			t.b.WriteString(`<td class="w">`)
			t.text(c)
			t.b.WriteString("</td>")
		default:
			t.b.WriteString("<td>")
			t.text(c)
			t.b.WriteString("</td>")
		}
	}
	t.b.WriteString("</tr>\n")
}

func wideClass(cell string) string {
	if len(cell) > wideCell {
		return ` class="w"`
	}
	return ""
}

func (t *tableWriter) end(notes []string) template.HTML {
	t.b.WriteString("</tbody></table></div>\n")
	if len(notes) > 0 {
		t.b.WriteString(`<ul class="notes">`)
		for _, n := range notes {
			t.b.WriteString("<li>")
			t.text(n)
			t.b.WriteString("</li>")
		}
		t.b.WriteString("</ul>\n")
	}
	return template.HTML(t.b.String())
}

func (t *tableWriter) text(s string) {
	if strings.ContainsAny(s, `&<>"'`) {
		s = html.EscapeString(s)
	}
	t.b.WriteString(s)
}

// numeric tells whether a cell is to stand on the right: it begins with a
// digit, a sign, or is the dash of an outside value.
func numeric(s string) bool {
	s = strings.TrimPrefix(strings.TrimPrefix(s, "−"), "+")
	return s != "" && (s[0] >= '0' && s[0] <= '9' || s == "—")
}

// wholeNumber tells whether a row's head is a number and nothing else.
func wholeNumber(s string) bool {
	return numeric(s) && strings.Trim(s, "−0123456789.—") == ""
}

func firstRow(rows [][]string) []string {
	if len(rows) == 0 {
		return nil
	}
	return rows[len(rows)/2] // the middle one: ends may lie outside a range
}

func gridHTML(g statement.Grid) template.HTML {
	var t tableWriter
	t.b.Grow(4096)
	t.begin(g.Caption, g.Heads, firstRow(g.Rows))
	for _, row := range g.Rows {
		t.row(row, "")
	}
	return t.end(g.Notes)
}

func propertiesHTML(rows []statement.PropertyRow) template.HTML {
	var t tableWriter
	heads, cells := statement.PropertyTable(rows)
	t.begin("Properties, each with its own source", heads, nil)
	for _, row := range cells {
		t.row(row, "")
	}
	return t.end(nil)
}

func setsHTML(rows []statement.SetRow) template.HTML {
	var t tableWriter
	t.begin("Data sets of this record; the adopted one is the house value", []string{"Data set", "model", "basis", "reference", "ρ", "α", "β", "valid range", "class", "condition", "scale", "source (checked)"}, nil)
	for _, s := range rows {
		name := s.Name
		if s.Adopted {
			name += " (adopted)"
		}
		source := s.SourceID
		if s.SourceWhere != "" {
			source += ", " + s.SourceWhere
		}
		t.row([]string{name, s.Model, s.Basis, s.Reference, s.Resistivity, s.Alpha, s.Beta, s.Range, s.Class, s.Condition, s.Scale, source + " (" + s.Checked + ")"}, "")
	}
	return t.end(nil)
}
