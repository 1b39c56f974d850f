package form

import (
	"strconv"
	"strings"

	"ohmfolio/generator/quantity"
)

// A Leaf is one stated value of a mapping with the path that leads to it:
// "properties.density.value", "stock[2].diameter" (counted from 1), and
// "table.rows[100]" for the row of a table that begins with 100. The ends of a
// range are two leaves, ".from" and ".to".
type Leaf struct {
	Path     string
	Text     string             // as the author wrote it, white space folded
	Number   *float64           // of a plain number
	Quantity *quantity.Quantity // of a number with a unit
}

// Leaves calls visit for every stated value below n, in the order of the
// file. Whatever is spelled in two ways, a citation by its ID alone or as a
// mapping, has one path. The nodes for whose path skip answers true are left
// out with all below them; skip may be nil.
func (n *Node) Leaves(path string, skip func(path string) bool, visit func(Leaf)) {
	if n == nil || (skip != nil && skip(path)) {
		return
	}
	switch n.has {
	case isMapping, isNamed:
		for i, k := range n.keys {
			n.items[i].Leaves(n.below(path, k), skip, visit)
		}
	case isList:
		for i, item := range n.items {
			item.Leaves(path+"["+strconv.Itoa(i+1)+"]", skip, visit)
		}
	case isRows:
		n.rowLeaves(path, visit)
	case isRange:
		lo, hi := n.typed.quantity, n.typed.high
		lo.Digits, hi.Digits = 0, 0 // the ends of a range are exact
		visit(Leaf{Path: path + ".from", Text: lo.In(lo.Unit), Quantity: &lo})
		visit(Leaf{Path: path + ".to", Text: hi.In(hi.Unit), Quantity: &hi})
	case isQuantity:
		visit(Leaf{Path: path, Text: n.folded(), Quantity: &n.typed.quantity})
	case isNumber, isInteger:
		visit(Leaf{Path: path, Text: n.folded(), Number: &n.number})
	default:
		visit(Leaf{Path: path, Text: n.plainText()})
	}
}

// below is the path of a key: the key that a short form stands for adds
// nothing.
func (n *Node) below(path, key string) string {
	switch {
	case path == "":
		return key
	case n.has == isMapping && shortKeys[key]:
		return path
	}
	return path + "." + key
}

func (n *Node) rowLeaves(path string, visit func(Leaf)) {
	for _, row := range n.items {
		if len(row.items) != 2 {
			continue // told by whoever reads the table
		}
		at := strconv.FormatFloat(row.items[0].number, 'g', -1, 64)
		visit(Leaf{Path: path + "[" + at + "]", Text: row.items[1].folded(), Number: &row.items[1].number})
	}
}

func (n *Node) folded() string { return strings.Join(strings.Fields(n.text), " ") }

// plainText is the text of a word; of a unit, the spelling that all have in
// common; of yes or no, one of these two.
func (n *Node) plainText() string {
	switch {
	case n.has == isUnit && n.typed != nil:
		return n.typed.quantity.Unit.Symbol
	case n.has == isYesNo && n.yes:
		return "yes"
	case n.has == isYesNo:
		return "no"
	}
	return n.folded()
}
