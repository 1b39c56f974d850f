package transcribe

import (
	"fmt"
	"math"

	"ohmfolio/generator/columns"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// fill takes the cells of a row into the draft, in the order of targets.
func (r *run) fill(d *draft, row []cell) {
	for i := range targets {
		t := &targets[i]
		switch t.key {
		case "source":
			r.fillSource(d, row, t)
			continue
		case "reference_temperature":
			r.fillReference(d, row, t)
			continue
		}
		for j, c := range r.columns {
			if c.target == t && j < len(row) && !isEmpty(row[j].text) {
				d.lines = append(d.lines, r.line(c, row[j]))
			}
		}
		r.fillEvery(d, row, t)
	}
	r.fillRest(d, row)
}

// line reads one cell of a column that is understood.
func (r *run) line(c column, from cell) line {
	l := line{target: c.target, key: c.target.key, cell: from, value: from.text}
	if !c.target.numeric() {
		return l
	}
	n := c.read(from.text, r.Comma)
	if n.comma {
		r.list.Add("table-comma", place.Error, from.at, "the number "+columns.Quote(from.text)+" has a comma", "give --comma when the whole table has decimal commas; otherwise correct the cell")
		r.commas++
	}
	l.value, l.doubt, l.mend = n.text, n.doubt, n.mend
	if n.doubt == "" {
		l.key = numberKey(c.target, n.kind)
	}
	return l
}

// fillEvery adds what the keeper says of every row where the row says nothing.
func (r *run) fillEvery(d *draft, row []cell, t *target) {
	text := r.Columns.every(t.key)
	if text == "" || d.live(t.key) {
		return
	}
	d.lines = append(d.lines, line{target: t, key: t.key, value: text, cell: cell{text, row[0].at}})
}

func (d *draft) live(key string) bool {
	return d.text(key) != ""
}

// text is the value of a live key, "" when there is none.
func (d *draft) text(key string) string {
	for _, l := range d.lines {
		if l.key == key && l.doubt == "" {
			return l.value
		}
	}
	return ""
}

func sameTemperature(a, b string) bool {
	x, p := quantity.Parse(quantity.Temperature, a)
	y, problem := quantity.Parse(quantity.Temperature, b)
	return p == nil && problem == nil && math.Abs(x.Value-y.Value) < 1e-9
}

// fillSource cites the source of the whole table, or the row's own.
func (r *run) fillSource(d *draft, row []cell, t *target) {
	if own := r.cellOf(row, "source"); !isEmpty(own.text) {
		if contains(r.SourceIDs, own.text) {
			d.source = own.text
		} else {
			mend := "add the source to materials/sources.yaml and write its ID"
			if near := place.Near(own.text, r.SourceIDs); near != "" {
				mend = "did you mean " + near + "?"
			}
			r.warn("table-sources", own, columns.Quote(own.text)+" is no ID of sources.yaml; it is kept as a comment", mend)
			d.rest = append(d.rest, line{key: "source in the table", cell: own})
		}
	}
	where := fmt.Sprintf("line %d of the table", row[0].at.Line)
	d.lines = append(d.lines, line{target: t, key: "source", value: "{id: " + yamlText(d.source) + ", where: " + yamlText(where) + "}", cell: row[0]})
}

func contains(list []string, s string) bool {
	for _, x := range list {
		if x == s {
			return true
		}
	}
	return false
}

// fillReference takes the reference temperature from its column, from the
// heads of resistivity and coefficients, or from what holds for every row.
func (r *run) fillReference(d *draft, row []cell, t *target) {
	for j, c := range r.columns {
		if c.target == t && j < len(row) && !isEmpty(row[j].text) {
			d.lines = append(d.lines, r.line(c, row[j]))
		}
	}
	text := ""
	for j, c := range r.columns {
		if c.target == nil || c.reference == "" || j >= len(row) || isEmpty(row[j].text) {
			continue
		}
		if text != "" && text != c.reference {
			r.warn("table-cell", row[j], "the heads name two reference temperatures, "+text+" and "+c.reference, "write two data sets, one for each temperature")
			return
		}
		text = c.reference
	}
	if own := d.text(t.key); own != "" && text != "" && !sameTemperature(own, text) {
		r.warn("table-cell", row[0], "the row says "+own+" and a head says "+text+"; the row counts", "correct the head or the cell")
	}
	if text != "" && !d.live(t.key) {
		d.lines = append(d.lines, line{target: t, key: t.key, value: text, cell: cell{text, row[0].at}})
	}
	r.fillEvery(d, row, t)
}

// fillRest keeps the cells that belong to no target.
func (r *run) fillRest(d *draft, row []cell) {
	for j, c := range r.columns {
		if c.target == nil && !c.left && j < len(row) && !isEmpty(row[j].text) {
			key := c.head
			if key == "" {
				key = fmt.Sprintf("column %d", j+1)
			}
			d.rest = append(d.rest, line{key: key, cell: row[j]})
		}
	}
}
