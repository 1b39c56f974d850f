// Package columns reads CSV files with units in their heads: measured points,
// received lots. Every fault has its line and column (in code points), and a
// file of rubbish is told in a few findings. It knows nothing of what the
// columns mean.
package columns

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"
	"unicode/utf8"

	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// MaxBytes is the most that such a file may have.
const MaxBytes = 64 << 20

// Shown is how many findings of one file are told one by one.
const Shown = 20

// Cell is one cell of the head.
type Cell struct{ Name, Unit string }

// Reader reads one file row by row.
type Reader struct {
	src    *place.Source
	csv    *csv.Reader
	list   place.List
	width  int
	row    []string
	untold int
}

// NewReader begins to read src.
func NewReader(src *place.Source) *Reader {
	r := &Reader{src: src, list: place.List{Source: src}}
	r.csv = csv.NewReader(bytes.NewReader(bytes.TrimPrefix(src.Text, []byte("\ufeff"))))
	r.csv.ReuseRecord, r.csv.FieldsPerRecord, r.csv.TrimLeadingSpace = true, -1, true
	return r
}

// Findings are what was found, the last one telling how many more there are.
func (r *Reader) Findings() []place.Finding {
	if r.untold > 0 {
		r.list.Add("points-unreadable", place.Error, place.Position{File: r.src.File}, fmt.Sprintf("%d more findings of this kind are not shown", r.untold), "mend the first ones, then look again")
		r.untold = 0
	}
	return r.list.Findings
}

// Good tells whether nothing was found yet.
func (r *Reader) Good() bool { return len(r.list.Findings) == 0 }

// Add reports a finding at a field of the current row, at the file's first
// place for a negative field.
func (r *Reader) Add(code string, field int, message, mend string) {
	if len(r.list.Findings) >= Shown {
		r.untold++
		return
	}
	line, column := 1, 1
	if field >= 0 {
		line, column = r.csv.FieldPos(field)
		column = r.codePoints(line, column)
	}
	r.list.Add(code, place.Error, r.src.At(line, column, 1), message, mend)
}

// codePoints turns a column in bytes, as CSV tells it, into one in code points.
func (r *Reader) codePoints(line, column int) int {
	text := r.src.Line(line)
	return utf8.RuneCountInString(text[:max(0, min(column-1, len(text)))]) + 1
}

// Head reads the first row; nil after a finding that leaves nothing to read.
func (r *Reader) Head(example string) []Cell {
	if len(r.src.Text) > MaxBytes {
		r.list.Add("file-too-large", place.Error, place.Position{File: r.src.File}, "the file is larger than 64 MiB", "split it, or average the readings")
		return nil
	}
	row, err := r.csv.Read()
	switch {
	case err != nil:
		r.Add("points-unreadable", -1, "the file has no head", "begin with a row such as "+example)
		return nil
	case len(row) == 1 && strings.Contains(row[0], ";"):
		r.Add("points-semicolons", 0, "the columns are separated by semicolons", "save the file with commas between columns and decimal points")
		return nil
	}
	r.width = len(row)
	var cells []Cell
	for _, cell := range row {
		cells = append(cells, split(cell))
	}
	return cells
}

// split splits "temperature / °C", "temperature [°C]" and "temperature (°C)"
// into name and unit.
func split(cell string) Cell {
	cell = strings.TrimSpace(cell)
	if i := strings.Index(cell, " / "); i >= 0 {
		return Cell{strings.TrimSpace(cell[:i]), strings.TrimSpace(cell[i+3:])}
	}
	for _, pair := range []string{"[]", "()"} {
		if i := strings.IndexByte(cell, pair[0]); i > 0 && strings.HasSuffix(cell, pair[1:]) {
			return Cell{strings.TrimSpace(cell[:i]), strings.TrimSpace(cell[i+1 : len(cell)-1])}
		}
	}
	return Cell{Name: cell}
}

// Unknown reports a column that is not one of known.
func (r *Reader) Unknown(field int, name string, known []string) {
	mend := "the columns are " + strings.Join(known, ", ")
	if near := place.Near(name, known); near != "" {
		mend = "did you mean " + near + "?"
	}
	r.Add("points-columns", field, "the column "+Quote(name)+" is not known", mend)
}

// Unit finds the unit of a column in the head.
func (r *Reader) Unit(field int, c Cell, kind quantity.Kind) quantity.Unit {
	spelled := c.Unit
	if spelled == "" && kind == quantity.Ratio {
		spelled = "1"
	}
	if spelled == "" {
		r.Add("unit-missing", field, "the column "+Quote(c.Name)+" has no unit", "write it in the head: "+c.Name+" / "+quantity.Units(kind)[0].Symbol)
		return quantity.Unit{}
	}
	u, ok := quantity.FindUnit(kind, spelled)
	if !ok {
		r.Add("unit-unknown", field, Quote(spelled)+" is no unit of "+string(kind), "write for example "+quantity.NearUnit(kind, ""))
	}
	return u
}

// Next goes to the next row with as many cells as the head; false at the end.
func (r *Reader) Next() bool {
	for {
		row, err := r.csv.Read()
		if errors.Is(err, io.EOF) {
			return false
		}
		if err != nil {
			r.broken(err)
			return false
		}
		r.row = row
		if len(row) == r.width {
			return true
		}
		r.wrongWidth(row)
	}
}

func (r *Reader) broken(err error) {
	var p *csv.ParseError
	line, column := 1, 1
	if errors.As(err, &p) {
		line, column, err = p.Line, r.codePoints(p.Line, p.Column), p.Err
	}
	r.list.Add("points-unreadable", place.Error, r.src.At(line, column, 1), "the row cannot be read: "+err.Error(), "look at the quotes in this row")
}

func (r *Reader) wrongWidth(row []string) {
	if len(row) == 1 && strings.TrimSpace(row[0]) == "" {
		return
	}
	message, mend := fmt.Sprintf("the row has %d cells, the head %d", len(row), r.width), "write every column in every row"
	if len(row) > r.width {
		mend = "if numbers have commas, write decimal points"
	}
	r.Add("points-unreadable", 0, message, mend)
}

// Text is the cell at field, without blanks around it.
func (r *Reader) Text(field int) string { return strings.TrimSpace(r.row[field]) }

// Line is the line of the current row.
func (r *Reader) Line() int {
	line, _ := r.csv.FieldPos(0)
	return line
}

// Number reads a number of the current row; false after a finding.
func (r *Reader) Number(field int) (float64, bool) {
	text := r.Text(field)
	if rest, ok := strings.CutPrefix(text, "−"); ok {
		text = "-" + rest
	}
	x, err := strconv.ParseFloat(text, 64)
	switch {
	case strings.Contains(text, ","):
		r.Add("comma-decimal", field, "the number "+Quote(text)+" has a comma", "write a decimal point: "+strings.Replace(text, ",", ".", 1))
	case text == "":
		r.Add("value-missing", field, "no number stands here", "write the reading, or take the row out")
	case err != nil && !math.IsInf(x, 0):
		r.Add("number-not-read", field, Quote(text)+" is no number", "write a plain number with a decimal point; units stand in the head")
	case math.IsNaN(x) || math.IsInf(x, 0):
		r.Add("number-not-finite", field, "the number "+Quote(text)+" is not finite", "take the row out")
	default:
		return x, true
	}
	return 0, false
}

// Quote quotes a text in a message, cut when it is long.
func Quote(s string) string {
	if len(s) > 60 {
		s = strings.ToValidUTF8(s[:60], "") + "…"
	}
	return "“" + s + "”"
}

// Split splits a cell of a head into name and unit.
func Split(cell string) Cell { return split(cell) }

// Head is the name in a cell that may be one of a head.
func Head(cell string) string { return split(cell).Name }
