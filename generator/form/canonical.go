package form

import (
	"bytes"
	"sort"
	"strconv"
	"strings"

	"ohmfolio/generator/quantity"
)

// Canonical writes what n means, whatever way it is spelled: keys sorted,
// quantities in SI to 12 digits, white space in texts folded. Keys for which
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
	case n.has == isYesNo:
		w.WriteString(strconv.FormatBool(n.yes))
	default:
		w.WriteString(strconv.Quote(strings.Join(strings.Fields(n.text), " ")))
	}
}

func (n *Node) canonicalMapping(w *bytes.Buffer, skip func(key string) bool) {
	keys := append([]string{}, n.keys...)
	sort.Strings(keys)
	w.WriteByte('{')
	for _, k := range keys {
		if skip(k) {
			continue
		}
		w.WriteString(strconv.Quote(k))
		w.WriteByte(':')
		n.Get(k).short().Canonical(w, skip)
		w.WriteByte(',')
	}
	w.WriteByte('}')
}

// short turns {id: x} into x, which means the same.
func (n *Node) short() *Node {
	if n.has == isMapping && len(n.keys) == 1 && n.keys[0] == "id" {
		return n.items[0]
	}
	return n
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
