package topics

import (
	"fmt"
	"io"
	"strings"
	"unicode/utf8"
)

// width is how long a line of help may be.
const width = 78

// Write writes the topic for a terminal: short tables in columns, long ones
// row by row.
func (t Topic) Write(w io.Writer) error {
	var b strings.Builder
	b.WriteString(t.Title + "\n\n" + wrap(t.Lead, ""))
	for _, p := range t.Parts {
		b.WriteString("\n" + p.Title + "\n")
		if p.Text != "" {
			b.WriteString(wrap(p.Text, "  "))
		}
		if widths, ok := p.widths(); ok {
			p.columns(&b, widths)
		} else {
			p.list(&b)
		}
	}
	_, err := io.WriteString(w, b.String())
	return err
}

// widths are those of the columns; not ok when they do not fit on a line.
func (p Part) widths() ([]int, bool) {
	widths, sum := make([]int, len(p.Heads)), 2
	for i := range p.Heads {
		for _, row := range append([][]string{p.Heads}, p.Rows...) {
			widths[i] = max(widths[i], utf8.RuneCountInString(row[i]))
		}
		sum += widths[i] + 2
	}
	return widths, sum <= width
}

func (p Part) columns(b *strings.Builder, widths []int) {
	for _, row := range append([][]string{p.Heads}, p.Rows...) {
		line := " "
		for i, cell := range row {
			line += " " + cell + strings.Repeat(" ", widths[i]-utf8.RuneCountInString(cell)+1)
		}
		b.WriteString(strings.TrimRight(line, " ") + "\n")
	}
}

// list writes each row as its first cell with the others below it.
func (p Part) list(b *strings.Builder) {
	for _, row := range p.Rows {
		fmt.Fprintf(b, "  %s\n", row[0])
		for i, cell := range row[1:] {
			if cell != "" {
				b.WriteString(wrap(p.Heads[i+1]+": "+cell, "      "))
			}
		}
	}
}

// wrap breaks a text into lines that begin with indent.
func wrap(text, indent string) string {
	var b strings.Builder
	line := indent
	for _, word := range strings.Fields(text) {
		if utf8.RuneCountInString(line)+1+utf8.RuneCountInString(word) > width && strings.TrimSpace(line) != "" {
			b.WriteString(line + "\n")
			line = indent
		}
		if strings.TrimSpace(line) != "" {
			line += " "
		}
		line += word
	}
	return b.String() + line + "\n"
}
