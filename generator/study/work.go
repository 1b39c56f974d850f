package study

import (
	"math"
	"strconv"
	"strings"

	"ohmfolio/generator/form"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// work is one study at work: what it was given, and the result as it grows.
type work struct {
	lib    *library.Library
	block  *form.Node // the checked parameters
	report *place.List
	kind   Kind
	out    *Outcome
	failed bool                     // a finding stops the study
	house  quantity.Unit            // of resistivity
	units  map[string]quantity.Unit // of numbers that have others than usual, by name
}

// fail adds a finding that stops the study.
func (w *work) fail(code string, at *form.Node, message, mend string) {
	w.failed = true
	w.report.Add(code, place.Error, at.Position(), message, mend)
}

// note adds an assumption or remark that goes with the whole result.
func (w *work) note(text string) { w.out.Notes = append(w.out.Notes, text) }

// has tells whether a parameter was given.
func (w *work) has(key string) bool { return w.block.Has(key) }

// text is a word, or otherwise when it was not given.
func (w *work) text(key, otherwise string) string {
	if w.block.Has(key) {
		return w.block.Get(key).Text()
	}
	return otherwise
}

// quantity is a parameter in SI with its limits; without any it is taken as
// exact, since it was given and not measured.
func (w *work) quantity(key string) (span, bool) {
	q, ok := w.block.Get(key).Quantity()
	if !ok {
		return unknown(), false
	}
	return given(q), true
}

func given(q quantity.Quantity) span {
	switch {
	case q.Limits != nil && q.HasValue():
		return span{v: q.Value, lo: q.Limits.Lower, hi: q.Limits.Upper, banded: true, sure: math.NaN()}
	case q.Limits != nil:
		return span{v: (q.Limits.Lower + q.Limits.Upper) / 2, lo: q.Limits.Lower, hi: q.Limits.Upper, banded: true, sure: math.NaN()}
	}
	return exactly(q.Value)
}

// positive is a parameter that must be above zero; a finding otherwise.
func (w *work) positive(key string) (span, bool) {
	s, ok := w.quantity(key)
	if ok && !(s.lo > 0) {
		n := w.block.Get(key)
		w.fail("value-not-positive", n, inWords(key)+" "+quote(n.Text())+" is not above zero", "write a value above zero")
	}
	return s, ok
}

// kelvin is a temperature, or otherwise with a note that says so.
func (w *work) kelvin(key string, otherwise float64, why string) float64 {
	if q, ok := w.block.Get(key).Quantity(); ok {
		return q.Value
	}
	if why != "" {
		w.note(inWords(key) + " " + quantity.CelsiusText(otherwise) + ": " + why)
	}
	return otherwise
}

// window is a rising range of temperature.
func (w *work) window(key string) (lo, hi float64) {
	n := w.block.Get(key)
	a, b, ok := n.Range()
	if ok && !(a.Value < b.Value) {
		w.fail("window-inverted", n, "the "+inWords(key)+" "+n.Text()+" does not rise", "write the lower temperature first")
	}
	return a.Value, b.Value
}

// records are the materials named under key; an unknown one is a finding.
func (w *work) records(key string) []*material.Record {
	var list []*material.Record
	for _, n := range w.block.Get(key).List() {
		if r := w.record(n); r != nil {
			list = append(list, r)
		}
	}
	return list
}

func (w *work) record(n *form.Node) *material.Record {
	if r := w.lib.Material(n.Text()); r != nil {
		return r
	}
	mend := "write the ID of a record, which is its file name without .yaml"
	if near := place.Near(n.Text(), w.lib.IDs()); near != "" {
		mend = "did you mean " + near + "?"
	}
	w.fail("study-material-unknown", n, "there is no material "+quote(n.Text()), mend)
	return nil
}

// parameters tells what was given, in the order of the block.
func (w *work) parameters() {
	for i, key := range w.block.Keys() {
		if key == "title" || key == "require" || key == "binding" {
			continue
		}
		w.out.Parameters = append(w.out.Parameters, Parameter{inWords(key), givenText(w.block.List()[i])})
	}
}

func givenText(n *form.Node) string {
	if n.IsMapping() {
		var parts []string
		for i, key := range n.Keys() {
			parts = append(parts, inWords(key)+" "+givenText(n.List()[i]))
		}
		return strings.Join(parts, ", ")
	}
	if list := n.List(); len(list) > 0 {
		if list[0].IsMapping() {
			return strconv.Itoa(len(list)) + ", as in the tables"
		}
		var parts []string
		for _, e := range n.List() {
			parts = append(parts, givenText(e))
		}
		return strings.Join(parts, "; ")
	}
	return n.Text()
}

// inWords turns the name of a number or a key into words.
func inWords(name string) string { return strings.ReplaceAll(name, "_", " ") }

// houseResistivity is the house unit of resistivity.
func (w *work) houseResistivity() quantity.Unit {
	if w.house.Symbol != "" {
		return w.house
	}
	u, ok := quantity.FindUnit(quantity.Resistivity, w.lib.Settings.Units.Resistivity)
	if !ok {
		u, _ = quantity.FindUnit(quantity.Resistivity, "µΩ·cm")
	}
	w.house = u
	return u
}
