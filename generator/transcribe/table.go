package transcribe

import (
	"bytes"
	"encoding/csv"
	"errors"
	"io"
	"strings"
	"unicode/utf8"

	"ohmfolio/generator/place"
)

// searched is how many rows from the top may hold the head.
const searched = 10

// cell is one cell with its place.
type cell struct {
	text string // one line, without blanks around it
	at   place.Position
}

// table is the rows of one file.
type table struct {
	src  *place.Source
	list place.List
	rows [][]cell
}

// readTable reads every row; findings in error stand in the list.
func readTable(src *place.Source, comma bool) *table {
	t := &table{src: src, list: place.List{Source: src}}
	if !readable(&t.list, src) {
		return t
	}
	text := bytes.TrimPrefix(src.Text, []byte("\ufeff"))
	separator := ','
	if semicolons(text) {
		if !comma {
			t.list.Add("table-semicolons", place.Error, src.At(1, 1, 1), "semicolons stand between the columns", "give --comma, which also reads decimal commas")
			return t
		}
		separator = ';'
	}
	r := csv.NewReader(bytes.NewReader(text))
	r.Comma, r.FieldsPerRecord, r.ReuseRecord = separator, -1, true
	for {
		row, err := r.Read()
		if errors.Is(err, io.EOF) {
			return t
		}
		if err != nil {
			t.broken(err)
			continue
		}
		t.add(r, row)
	}
}

// semicolons tells whether the first line with a separator has more semicolons
// than commas.
func semicolons(text []byte) bool {
	for line := range bytes.Lines(text) {
		if s, c := bytes.Count(line, []byte(";")), bytes.Count(line, []byte(",")); s+c > 0 {
			return s > c
		}
	}
	return false
}

func (t *table) broken(err error) {
	var p *csv.ParseError
	line, column := 1, 1
	if errors.As(err, &p) {
		line, column, err = p.Line, t.codePoints(p.Line, p.Column), p.Err
	}
	t.list.Add("table-row", place.Error, t.src.At(line, column, 1), "the row cannot be read: "+err.Error(), "look at the quotes in this row")
}

// codePoints turns a column in bytes into one in code points.
func (t *table) codePoints(line, column int) int {
	text := t.src.Line(line)
	return utf8.RuneCountInString(text[:max(0, min(column-1, len(text)))]) + 1
}

// add keeps a row unless all its cells are empty.
func (t *table) add(r *csv.Reader, row []string) {
	if strings.TrimSpace(strings.Join(row, "")) == "" {
		return
	}
	cells := make([]cell, len(row))
	for i, text := range row {
		line, column := r.FieldPos(i)
		text = strings.Join(strings.Fields(text), " ")
		cells[i] = cell{text, t.src.At(line, t.codePoints(line, column), max(1, utf8.RuneCountInString(text)))}
	}
	t.rows = append(t.rows, cells)
}
