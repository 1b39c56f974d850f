package form

import (
	"bytes"
	"sort"
	"strconv"

	"ohmfolio/generator/quantity"
)

// Canonical writes what n means, whatever way it is spelled: keys sorted,
// units and quantities in SI to 12 digits, white space in texts folded. Keys for which
// skip answers true are left out.
func (n *Node) Canonical(w *bytes.Buffer, skip func(key string) bool) {
	switch {
	case n == nil:
		w.WriteString("~")
	case n.has == isMapping || n.has == isNamed:
		n.canonicalMapping(w, skip)
	case n.has == isList || n.has == isRows:
		w.WriteByte('[')
		for _, item := range n.items {
			item.Canonical(w, skip)
			w.WriteByte(',')
		}
		w.WriteByte(']')
	case n.has == isQuantity:
		canonicalQuantity(w, n.typed.quantity)
	case n.has == isRange:
		canonicalNumber(w, n.typed.quantity.Value)
		canonicalNumber(w, n.typed.high.Value)
	case n.has == isNumber, n.has == isInteger:
		canonicalNumber(w, n.number)
	default:
		w.WriteString(strconv.Quote(n.plainText()))
	}
}

func (n *Node) canonicalMapping(w *bytes.Buffer, skip func(key string) bool) {
	keys := append([]string{}, n.keys...)
	sort.Strings(keys)
	w.WriteByte('{')
	for _, k := range keys {
		if n.has == isMapping && skip(k) { // free names mean nothing of themselves
			continue
		}
		w.WriteString(strconv.Quote(k))
		w.WriteByte(':')
		n.Get(k).short(skip).Canonical(w, skip)
		w.WriteByte(',')
	}
	w.WriteByte('}')
}

// shortKeys are the keys that a short form stands for: a citation by its ID
// alone, a checked state by its word alone.
var shortKeys = map[string]bool{"id": true, "against": true}

// short turns {id: x} into x, which means the same; keys that are skipped do
// not count.
func (n *Node) short(skip func(key string) bool) *Node {
	if n.has != isMapping {
		return n
	}
	var only *Node
	for i, k := range n.keys {
		switch {
		case skip(k):
		case shortKeys[k]:
			only = n.items[i]
		default:
			return n
		}
	}
	if only == nil {
		return n
	}
	return only
}

func canonicalQuantity(w *bytes.Buffer, q quantity.Quantity) {
	canonicalNumber(w, q.Value)
	w.WriteString(strconv.Itoa(q.Digits))
	if q.Limits != nil {
		w.WriteByte('L')
		canonicalNumber(w, q.Limits.Lower)
		canonicalNumber(w, q.Limits.Upper)
	}
	if q.Uncertainty != nil {
		w.WriteByte('U')
		canonicalNumber(w, q.Uncertainty.Minus)
		canonicalNumber(w, q.Uncertainty.Plus)
		canonicalNumber(w, q.Uncertainty.K)
	}
}

func canonicalNumber(w *bytes.Buffer, x float64) {
	w.WriteString(strconv.FormatFloat(quantity.Round12(x), 'g', 12, 64))
	w.WriteByte(';')
}
