// Package transcribe turns the rows of a spreadsheet, saved as CSV, into draft
// records. Columns are matched by the words and the unit in their heads. What
// is doubtful stays in the draft as a comment, with a finding at its cell;
// nothing is guessed and nothing is lost. It writes no file.
package transcribe

import (
	"fmt"

	"ohmfolio/generator/columns"
	"ohmfolio/generator/place"
)

// Options say how one table is read.
type Options struct {
	Source    string   // ID of the source of every row
	SourceIDs []string // the IDs of sources.yaml, for a column of sources
	Comma     bool     // numbers have decimal commas, semicolons may stand between columns
	Columns   *Columns // the keeper's own mapping, nil for none
	// Check examines the text of one draft; what it finds in error is taken
	// out of the draft and kept as a comment.
	Check func(id string, text []byte) []place.Finding
	// PlainID tells whether an ID may be the name of a record.
	PlainID func(id string) bool
}

// A Draft is one record to be written.
type Draft struct {
	ID   string
	Text []byte
	At   place.Position // of the name in the table
}

// A Result is what a table gave.
type Result struct {
	Mapping  string // in the form of a --columns file, "" when there is no head
	Rows     int    // rows below the head that are not empty
	Drafts   []Draft
	Findings []place.Finding
}

// run is one table being read.
type run struct {
	Options
	*table
	columns []column
	ids     ids
	more    []place.Finding // of the --columns file
	commas  int             // in numbers, that nobody allowed
}

// Run reads the table. A finding in error about the table as a whole leaves
// no drafts.
func Run(src *place.Source, o Options) Result {
	r := &run{Options: o, table: readTable(src, o.Comma)}
	r.ids = ids{map[string]bool{}, o.PlainID}
	var result Result
	if place.Count(r.list.Findings, place.Error) == 0 || len(r.rows) > 1 {
		if rows := r.head(); rows != nil {
			result.Mapping, result.Rows = show(r.columns, o.Columns), len(rows)
			result.Drafts = r.drafts(rows)
		}
	}
	result.Findings = append(r.more, r.list.Findings...)
	if r.whole() {
		result.Drafts = nil
	}
	place.Sort(result.Findings)
	return result
}

// whole tells whether a finding concerns the table as a whole.
func (r *run) whole() bool {
	for _, f := range r.list.Findings {
		if f.Severity == place.Error && f.Code != "table-row" {
			return true
		}
	}
	return len(r.more) > 0
}

func (r *run) warn(code string, c cell, message, mend string) {
	r.list.Add(code, place.Warning, c.at, message, mend)
}

// head finds the row that names the columns, and returns those below it.
func (r *run) head() [][]cell {
	for i, row := range r.rows[:min(len(r.rows), searched)] {
		r.columns = nil
		for _, c := range row {
			r.columns = append(r.columns, match(c.text))
		}
		more := r.Columns.apply(r.columns)
		if len(row) > 1 && r.has("name") {
			r.more = more
			r.settle(row)
			return r.rows[i+1:]
		}
	}
	at := cell{at: r.src.At(1, 1, 1)}
	if len(r.rows) > 0 {
		at = r.rows[0][0]
	}
	r.list.Add("table-head", place.Error, at.at, "no row near the top has a column of names", "write Name over the names of the materials, or name that column in a file for --columns")
	return nil
}

func (r *run) has(key string) bool {
	for _, c := range r.columns {
		if c.target != nil && c.target.key == key {
			return true
		}
	}
	return false
}

// settle finds columns that are not understood and those that say one thing
// twice; the first of them counts.
func (r *run) settle(row []cell) {
	seen := map[*target]string{}
	for i := range r.columns {
		c := &r.columns[i]
		switch first, twice := seen[c.target]; {
		case c.left || c.head == "":
		case c.target == nil:
			r.warn("table-column", row[i], "the column "+columns.Quote(c.head)+" is not understood; its cells are kept as comments", "name it in a file for --columns, as the mapping shows")
		case twice:
			r.warn("table-column", row[i], "the column "+columns.Quote(c.head)+" tells "+c.target.key+" as "+columns.Quote(first)+" does; its cells are kept as comments", "say in a file for --columns which one counts")
			c.target = nil
		default:
			seen[c.target] = c.head
		}
	}
}

func (r *run) drafts(rows [][]cell) []Draft {
	var list []Draft
	for _, row := range rows {
		if d := r.draft(row); d != nil {
			list = append(list, *d)
		}
	}
	return list
}

// draft makes the record of one row.
func (r *run) draft(row []cell) *Draft {
	name := r.cellOf(row, "name")
	if isEmpty(name.text) {
		r.warn("table-name", row[0], "the row has no name; it is left out", "write a name, or take the row out")
		return nil
	}
	if len(row) > len(r.columns) {
		r.warn("table-cell", row[len(r.columns)], fmt.Sprintf("the row has %d cells, the head %d; what is over is not read", len(row), len(r.columns)), "look for a comma or semicolon inside a cell that has no quotes")
	}
	id := r.ids.next(name.text, name.at.Line)
	if id != idOf(name.text) {
		r.warn("table-name", name, columns.Quote(name.text)+" gives no ID of its own; the draft is "+id, "rename the draft's file, or the row")
	}
	d := &draft{id: id, source: r.Source, head: fmt.Sprintf("# Draft from line %d of a table. Compare every value with its source before it is used.", name.at.Line)}
	r.fill(d, row)
	if r.commas > 0 {
		return nil // nothing is written, and more findings would hide the reason
	}
	d.one()
	r.tell(d)
	text := r.accepted(d, name)
	if text == nil {
		return nil
	}
	r.tell(d)
	return &Draft{ID: id, Text: text, At: name.at}
}

// tell reports the comments of a draft, each once.
func (r *run) tell(d *draft) {
	for i := range d.lines {
		l := &d.lines[i]
		if l.doubt == "" || l.told {
			continue
		}
		l.told = true
		r.warn("table-cell", l.cell, l.key+" is kept as a comment: "+l.doubt, l.mend)
	}
}

func (r *run) cellOf(row []cell, key string) cell {
	for i, c := range r.columns {
		if c.target != nil && c.target.key == key && i < len(row) {
			return row[i]
		}
	}
	return cell{at: row[0].at}
}

// accepted takes out of a draft what the check finds in error, and returns its
// text; nil when nothing is left that a reference accepts.
func (r *run) accepted(d *draft, name cell) []byte {
	var first *place.Finding
	for {
		w := d.write()
		f := firstError(r.Check(d.id, w.text))
		if f == nil {
			return w.text
		}
		if first == nil {
			first = f
		}
		if !d.suspect(w.lines[f.Position.Line], f.Message, f.Mend) {
			r.list.Add("table-row", place.Error, name.at, "no draft can be made of the row: "+first.Message, first.Mend)
			return nil
		}
	}
}

func firstError(findings []place.Finding) *place.Finding {
	for i := range findings {
		if findings[i].Severity == place.Error {
			return &findings[i]
		}
	}
	return nil
}
