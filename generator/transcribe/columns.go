package transcribe

import (
	"fmt"
	"strings"

	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
)

// Columns is a keeper's own mapping, read from a small YAML file.
type Columns struct {
	node *form.Node
	src  *place.Source
}

// everyKeys are the keys of a record that may be the same for all rows.
var everyKeys = []string{"family", "class", "condition", "basis", "reference_temperature", "valid_range"}

// ColumnsShape is the form of a --columns file.
var ColumnsShape = &form.Shape{Name: "a --columns file", Doc: "What the columns of a table hold.", Fields: []form.Field{
	{Key: "columns", Is: form.Named(form.Mapping(&form.Shape{Name: "a column", Doc: "What one column holds.", Fields: []form.Field{
		{Key: "is", Required: true, Is: form.OneOf(targetKeys()...), Doc: "Key of the record, or nothing for a column to leave out.", Example: "resistivity"},
		{Key: "unit", Is: form.Text, Doc: "Unit of the cells.", Example: "µΩ·cm"},
	}})), Doc: "Columns by the text of their heads.", Example: "{Rho 20: {is: resistivity, unit: µΩ·cm}}"},
	{Key: "every_row", Is: form.Mapping(everyShape()), Doc: "What holds for every row that does not say otherwise."},
}}

func everyShape() *form.Shape {
	s := &form.Shape{Name: "every_row", Doc: "What holds for every row."}
	for _, f := range material.Shape().Fields {
		for _, key := range everyKeys {
			if f.Key == key {
				s.Fields = append(s.Fields, f)
			}
		}
	}
	return s
}

// ReadColumns reads a --columns file; nil when it has findings.
func ReadColumns(src *place.Source) (*Columns, []place.Finding) {
	node, findings := form.Read(src, ColumnsShape)
	if len(findings) > 0 || node == nil {
		return nil, findings
	}
	c := &Columns{node, src}
	return c, c.units()
}

// units finds units that the columns cannot have.
func (c *Columns) units() []place.Finding {
	l := place.List{Source: c.src}
	heads := c.node.Get("columns")
	for _, head := range heads.Keys() {
		n := heads.Get(head)
		t, unit := targetOf(n.Get("is").Text()), n.Get("unit")
		if unit != nil && (t == nil || !t.takes(unit.Text())) {
			l.Add("unit-unknown", place.Error, unit.Position(), "“"+unit.Text()+"” is no unit of "+n.Get("is").Text(), "write the unit that the cells are in")
		}
	}
	return l.Findings
}

// apply puts the keeper's mapping over what the heads told.
func (c *Columns) apply(list []column) []place.Finding {
	if c == nil {
		return nil
	}
	l := place.List{Source: c.src}
	heads := c.node.Get("columns")
	for _, head := range heads.Keys() {
		n, found := heads.Get(head), false
		for i := range list {
			if list[i].head != strings.Join(strings.Fields(head), " ") {
				continue
			}
			found = true
			is := n.Get("is").Text()
			list[i].target, list[i].left = targetOf(is), is == nothing
			if u := n.Get("unit"); u != nil {
				list[i].unit = u.Text()
			} else if t := list[i].target; t == nil || !t.takes(list[i].unit) {
				list[i].unit = ""
			}
		}
		if !found {
			mend := "write the head as it stands in the table"
			if near := place.Near(head, headsOf(list)); near != "" {
				mend = "did you mean “" + near + "”?"
			}
			l.Add("table-column", place.Error, n.KeyPosition(), "the table has no column “"+head+"”", mend)
		}
	}
	return l.Findings
}

func headsOf(list []column) []string {
	var heads []string
	for _, c := range list {
		heads = append(heads, c.head)
	}
	return heads
}

// every gives what the keeper says of all rows, as it was written.
func (c *Columns) every(key string) string {
	if c == nil {
		return ""
	}
	n := c.node.Get("every_row").Get(key)
	if n == nil {
		return ""
	}
	if lo, _, ok := n.Range(); ok {
		return lo.Text
	}
	if q, ok := n.Quantity(); ok {
		return q.Text
	}
	return n.Text()
}

// show writes the mapping in the form of a --columns file.
func show(list []column, c *Columns) string {
	var b strings.Builder
	b.WriteString("columns:\n")
	seen := map[string]bool{}
	for _, col := range list {
		if col.head == "" || seen[col.head] {
			continue
		}
		seen[col.head] = true
		is, mark := nothing, ""
		if col.target != nil {
			is = col.target.key
		} else if !col.left {
			mark = " # not understood; its cells are kept as comments"
		}
		unit := ""
		switch {
		case col.unit != "":
			unit = ", unit: " + yamlText(col.unit)
		case col.target != nil && col.target.numeric():
			mark = " # no unit in the head: every cell must have its own"
		}
		if mark != "" && col.target == nil {
			fmt.Fprintf(&b, "  # %s: {is: …}%s\n", yamlText(col.head), mark)
			continue
		}
		fmt.Fprintf(&b, "  %s: {is: %s%s}%s\n", yamlText(col.head), is, unit, mark)
	}
	first := true
	for _, key := range everyKeys {
		if text := c.every(key); text != "" {
			if first {
				b.WriteString("every_row:\n")
				first = false
			}
			fmt.Fprintf(&b, "  %s: %s\n", key, yamlText(text))
		}
	}
	return b.String()
}
