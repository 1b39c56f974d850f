package study

import (
	"math"
	"strings"

	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// twenty is the temperature that drawings and factors are counted from.
const twenty = quantity.ZeroCelsius + 20

// section is the cross-section of a conductor, with the worst case of its limits.
type section struct {
	area, perimeter  span
	diameter         span // of a round wire, unknown otherwise
	thickness, width span // of a strip, unknown otherwise
}

func round(d span) section {
	return section{
		area:      d.through(func(d float64) float64 { return math.Pi / 4 * d * d }),
		perimeter: d.scale(math.Pi), diameter: d, thickness: unknown(), width: unknown(),
	}
}

// text tells the nominal size.
func (s section) text() string {
	if s.diameter.known() {
		return "⌀ " + millimetres(s.diameter.v)
	}
	return millimetres(s.thickness.v) + " × " + millimetres(s.width.v)
}

// flat is a strip; its edges count as surface when edges is 1, and not when it is 0.
func flat(t, w span, edges float64) section {
	return section{
		area: t.times(w), perimeter: t.scale(edges).plus(w).scale(2),
		diameter: unknown(), thickness: t, width: w,
	}
}

// recorded is a value of a record: without limits its ± is unknown.
func recorded(q *quantity.Quantity) span {
	switch {
	case q == nil:
		return unknown()
	case q.Limits != nil:
		return given(*q)
	}
	return nominal(q.Value)
}

// tellMass adds the mass of a volume of the record's material.
func (a *answer) tellMass(volume span) {
	d, ok := a.property("density")
	if !ok {
		a.cannot("no density")
		return
	}
	a.tell("mass", volume.times(d))
}

// rhoAndRatio are ρ at 20 °C and R(t)/R(20 °C) of the adopted data; each that
// is missing is told with its reason.
func (a *answer) rhoAt20() span {
	if a.Record.Adopted == nil {
		a.cannot("no data")
		return unknown()
	}
	rho := rhoAt(a.Record.Adopted, twenty)
	if !rho.known() {
		a.cannot("no resistivity at " + quantity.CelsiusText(twenty))
	}
	return rho
}

func (a *answer) factorAt(t float64) span {
	set := a.Record.Adopted
	if set == nil {
		a.cannot("no data")
		return unknown()
	}
	f := ratioAt(set, t, twenty)
	switch {
	case f.known():
	case set.Ratio == nil:
		a.cannot("no coefficient")
	case !set.Valid.Contains(t):
		a.cannot(quantity.CelsiusText(t) + " lies outside the valid range " + windowText(set.Valid.Lo, set.Valid.Hi))
	default:
		a.cannot("no R(T)/R at " + quantity.CelsiusText(t))
	}
	return f
}

// readingOf reads R(T)/R(20 °C) of a set.
func readingOf(s *material.DataSet) material.Reading {
	return material.Reading{Told: s.Ratio, Ratio: true, Reference: twenty}
}

// tolerance reads “5 %” and “± 5 %” as a factor's worst case.
func tolerance(q quantity.Quantity) (lo, hi float64) {
	if q.Limits != nil {
		return q.Limits.Lower, q.Limits.Upper
	}
	return -math.Abs(q.Value), math.Abs(q.Value)
}

// within sets the limits of a from a tolerance on its nominal value.
func (a span) within(lo, hi float64) span {
	return span{v: a.v, lo: a.v + float64(a.v*lo), hi: a.v + float64(a.v*hi), banded: true, sure: math.NaN()}
}

// fraction is a parameter above zero and not above one.
func (w *work) fraction(n *form.Node, name string, otherwise float64) float64 {
	q, ok := n.Quantity()
	if !ok {
		return otherwise
	}
	if !(q.Value > 0 && q.Value <= 1) {
		w.fail("parameter-out-of-bounds", n, "the "+name+" "+quote(n.Text())+" does not lie between 0 and 1", "write a number above 0 and not above 1")
	}
	return q.Value
}

// count is a whole number not below least.
func (w *work) count(key string, otherwise, least int) float64 {
	n := w.block.Get(key)
	x, ok := n.Int()
	if !ok {
		return float64(otherwise)
	}
	if x < least {
		w.fail("parameter-out-of-bounds", n, inWords(key)+" "+quote(n.Text())+" is too few", "write "+quantity.Number(float64(least), 1)+" or more")
	}
	return float64(x)
}

// lacking is a finding at the block: it needs one of the keys.
func (w *work) lacking(what string, keys ...string) {
	w.fail("parameter-missing", w.block, what, "add "+strings.Join(keys, ", or "))
}

// contradict is a finding at the second of two parameters.
func (w *work) contradict(a, b, why string) {
	w.fail("parameters-contradict", w.block.Get(b), inWords(a)+" and "+inWords(b)+" contradict each other: "+why, "take one of them out")
}

// onlyWith refuses a parameter that has no meaning here.
func (w *work) onlyWith(condition bool, because string, keys ...string) {
	for _, key := range keys {
		if !condition && w.has(key) {
			w.fail("parameters-contradict", w.block.Get(key), inWords(key)+" has no meaning here: "+because, "take it out")
		}
	}
}
