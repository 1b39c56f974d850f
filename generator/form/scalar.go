package form

import (
	"math"
	"strconv"
	"strings"
	"time"

	"gopkg.in/yaml.v3"

	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

func (r *reader) sequence(y *yaml.Node, of Type) *Node {
	if y.Kind != yaml.SequenceNode {
		r.wrongType(y, List(of))
		return nil
	}
	n := r.node(y, isList)
	for _, e := range y.Content {
		if v := r.value(e, of); v != nil {
			n.items = append(n.items, v)
		}
	}
	return n
}

func (r *reader) numberRows(y *yaml.Node) *Node {
	if y.Kind != yaml.SequenceNode {
		r.wrongType(y, Rows)
		return nil
	}
	n := r.node(y, isRows)
	n.converted, n.typed = true, &typed{}
	for _, row := range y.Content {
		item, values, ok := r.numberRow(row)
		if !ok {
			n.converted = false
			continue
		}
		n.items, n.typed.rows = append(n.items, item), append(n.typed.rows, values)
	}
	return n
}

func (r *reader) numberRow(y *yaml.Node) (*Node, []float64, bool) {
	if y.Kind != yaml.SequenceNode || !r.plain(y) {
		r.add("type-wrong", r.at(y), kindOf(y)+" stands where a row of numbers is needed", "write [temperature, value]")
		return nil, nil, false
	}
	n := r.node(y, isList)
	values := make([]float64, 0, len(y.Content))
	for _, c := range y.Content {
		x, ok := r.finite(c)
		if !ok {
			return nil, nil, false
		}
		values = append(values, x)
		item := r.node(c, isNumber)
		item.text, item.number, item.converted = c.Value, x, true
		n.items = append(n.items, item)
	}
	return n, values, true
}

func (r *reader) finite(y *yaml.Node) (float64, bool) {
	x, err := strconv.ParseFloat(strings.Replace(y.Value, "−", "-", 1), 64)
	switch {
	case y.Kind != yaml.ScalarNode || (err != nil && !math.IsInf(x, 0)):
		r.add("type-wrong", r.at(y), kindOf(y)+" stands where a number is needed", "write a plain number with a decimal point")
		return 0, false
	case math.IsNaN(x) || math.IsInf(x, 0):
		r.add("number-not-finite", r.at(y), "the number "+quote(y.Value)+" is not finite", "write the number that the source prints")
		return 0, false
	}
	return x, true
}

// scalar reads text, numbers, words, dates, quantities and ranges.
func (r *reader) scalar(y *yaml.Node, t Type) *Node {
	if y.Kind != yaml.ScalarNode {
		r.wrongType(y, t)
		return nil
	}
	n := r.node(y, t.what)
	n.text, n.converted = y.Value, true
	if y.Value == "" {
		r.add("value-missing", n.Position(), "no value stands here", "write "+t.Describe()+", or take the key out")
		return nil
	}
	switch t.what {
	case isInteger:
		r.integer(y, n, t)
	case isNumber:
		n.number, n.converted = r.finite(y)
	case isYesNo:
		r.yesNo(y, n, t)
	case isDate:
		if _, err := time.Parse("2006-01-02", y.Value); err != nil {
			n.converted = false
			r.add("date-not-read", n.Position(), quote(y.Value)+" is no date", "write year-month-day: 2026-05-04")
		}
	case isOneOf:
		r.oneOf(y, n, t)
	case isUnit:
		if u, ok := quantity.FindUnit(t.kinds[0], y.Value); ok {
			n.typed = &typed{quantity: quantity.Quantity{Unit: u}}
		}
	case isQuantity:
		q, p := quantity.ParseOneOf(y.Value, t.kinds...)
		n.typed, n.converted = &typed{quantity: q}, r.problem(y, p)
	case isRange:
		lo, hi, p := quantity.ParseRange(t.kinds[0], y.Value)
		n.typed, n.converted = &typed{quantity: lo, high: hi}, r.problem(y, p)
	}
	return n
}

func (r *reader) integer(y *yaml.Node, n *Node, t Type) {
	x, err := strconv.Atoi(y.Value)
	n.number, n.converted = float64(x), err == nil
	if err != nil {
		r.wrongType(y, t)
	}
}

func (r *reader) yesNo(y *yaml.Node, n *Node, t Type) {
	switch y.Value {
	case "yes", "true":
		n.yes = true
	case "no", "false":
	default:
		n.converted = false
		r.wrongType(y, t)
	}
}

func (r *reader) oneOf(y *yaml.Node, n *Node, t Type) {
	for _, w := range t.words {
		if y.Value == w {
			return
		}
	}
	n.converted = false
	mend := "write one of " + strings.Join(t.words, ", ")
	if near := place.Near(y.Value, t.words); near != "" {
		mend = "did you mean " + near + "? Otherwise " + mend
	}
	r.add("word-unknown", n.Position(), quote(y.Value)+" is not one of the words known here", mend)
}

// problem turns a quantity's problem into a finding with its caret inside the
// scalar; it tells whether there was none.
func (r *reader) problem(y *yaml.Node, p *quantity.Problem) bool {
	if p == nil {
		return true
	}
	at := r.at(y)
	if y.Style&(yaml.DoubleQuotedStyle|yaml.SingleQuotedStyle) != 0 {
		at.Column++
	}
	at.Column += p.Offset
	at.Length = p.Length
	r.add(p.Code, at, p.Message, p.Mend)
	return false
}
