package form

import (
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// A Node is a checked value. All methods are safe on nil, which stands for a
// key that is absent.
type Node struct {
	src       *place.Source
	at, keyAt spot
	has       what
	converted bool // the typed value below is good
	yes       bool
	text      string
	keys      []string
	items     []*Node // values of a mapping (with keys) or elements of a list
	number    float64 // also of an integer
	typed     *typed  // nil for texts and plain numbers
}

// spot is a place without its file: a record has a hundred nodes, and a
// library thousands of records.
type spot struct{ line, column, length int32 }

func (s spot) in(src *place.Source) place.Position {
	if src == nil || s.line == 0 {
		return place.Position{}
	}
	return place.Position{File: src.File, Line: int(s.line), Column: int(s.column), Length: int(s.length)}
}

// typed is the value of a quantity, a range or a list of rows.
type typed struct {
	quantity, high quantity.Quantity // high is the upper end of a range
	rows           [][]float64
}

// Get returns the value at key, nil when it is absent.
func (n *Node) Get(key string) *Node {
	if n == nil {
		return nil
	}
	for i, k := range n.keys {
		if k == key {
			return n.items[i]
		}
	}
	return nil
}

// Has tells whether key is there.
func (n *Node) Has(key string) bool { return n.Get(key) != nil }

// Text is the scalar as written, "" for anything else.
func (n *Node) Text() string {
	if n == nil {
		return ""
	}
	return n.text
}

// Int is the integer; false when there is none.
func (n *Node) Int() (int, bool) {
	if n == nil || n.has != isInteger {
		return 0, false
	}
	return int(n.number), n.converted
}

// Number is the plain number; false when there is none.
func (n *Node) Number() (float64, bool) {
	if n == nil || n.has != isNumber {
		return 0, false
	}
	return n.number, n.converted
}

// Yes tells whether yes is written.
func (n *Node) Yes() bool { return n != nil && n.yes }

// List returns the elements of a list, or the values of a mapping.
func (n *Node) List() []*Node {
	if n == nil {
		return nil
	}
	return n.items
}

// Keys returns the keys of a mapping in file order.
func (n *Node) Keys() []string {
	if n == nil {
		return nil
	}
	return n.keys
}

// IsMapping tells whether n is a mapping.
func (n *Node) IsMapping() bool { return n != nil && (n.has == isMapping || n.has == isNamed) }

// Quantity is the number with its unit; false when there is none.
func (n *Node) Quantity() (quantity.Quantity, bool) {
	if n == nil || n.has != isQuantity || n.typed == nil {
		return quantity.Quantity{}, false
	}
	return n.typed.quantity, n.converted
}

// Range is the pair of values; false when there is none.
func (n *Node) Range() (lo, hi quantity.Quantity, ok bool) {
	if n == nil || n.has != isRange || n.typed == nil {
		return lo, hi, false
	}
	return n.typed.quantity, n.typed.high, n.converted
}

// Rows are the lists of numbers; nil when there are none.
func (n *Node) Rows() [][]float64 {
	if n == nil || n.typed == nil {
		return nil
	}
	return n.typed.rows
}

// Position is where the value stands; the zero Position for nil.
func (n *Node) Position() place.Position {
	if n == nil {
		return place.Position{}
	}
	return n.at.in(n.src)
}

// KeyPosition is where the key stands that leads to the value; where the
// value stands for elements of a list.
func (n *Node) KeyPosition() place.Position {
	if n == nil {
		return place.Position{}
	}
	if n.keyAt.line == 0 {
		return n.at.in(n.src)
	}
	return n.keyAt.in(n.src)
}
