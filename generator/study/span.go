package study

import (
	"math"

	"ohmfolio/generator/material"
)

// span is a value in SI with the worst case of what it depends on: lo to hi
// holds every value that the stated limits allow. It is banded when all it
// depends on is known with limits, or was given and is taken as exact.
type span struct {
	v, lo, hi float64 // v is NaN without a nominal value
	banded    bool
	sure      float64 // magnitude that every case reaches; NaN when lo and hi tell it
}

// exactly is a given value, taken as exact.
func exactly(x float64) span { return span{v: x, lo: x, hi: x, banded: true, sure: math.NaN()} }

// nominal is a value without limits.
func nominal(x float64) span { return span{v: x, lo: x, hi: x, sure: math.NaN()} }

func unknown() span { return nominal(math.NaN()) }

func (a span) known() bool { return !math.IsNaN(a.lo) && !math.IsNaN(a.hi) }

// wide tells whether there is a band to show.
func (a span) wide() bool { return a.known() && a.hi > a.lo }

// by combines two values that vary independently by a function monotone in
// each: its extremes lie at the corners.
func (a span) by(b span, f func(x, y float64) float64) span {
	out := span{v: f(a.v, b.v), lo: math.Inf(1), hi: math.Inf(-1), banded: a.banded && b.banded, sure: math.NaN()}
	for _, x := range []float64{a.lo, a.hi} {
		for _, y := range []float64{b.lo, b.hi} {
			z := f(x, y)
			if math.IsNaN(z) {
				return span{v: out.v, lo: math.NaN(), hi: math.NaN(), sure: math.NaN()}
			}
			out.lo, out.hi = math.Min(out.lo, z), math.Max(out.hi, z)
		}
	}
	return out
}

func (a span) times(b span) span { return a.by(b, func(x, y float64) float64 { return x * y }) }
func (a span) over(b span) span  { return a.by(b, func(x, y float64) float64 { return x / y }) }
func (a span) plus(b span) span  { return a.by(b, func(x, y float64) float64 { return x + y }) }
func (a span) minus(b span) span { return a.by(b, func(x, y float64) float64 { return x - y }) }
func (a span) scale(k float64) span {
	return a.by(exactly(k), func(x, y float64) float64 { return x * y })
}

// through applies a monotone function.
func (a span) through(f func(float64) float64) span {
	return a.by(exactly(0), func(x, _ float64) float64 { return f(x) })
}

// hull holds both.
func (a span) hull(b span) span {
	a.lo, a.hi, a.banded = math.Min(a.lo, b.lo), math.Max(a.hi, b.hi), a.banded && b.banded
	return a
}

// magnitude is |a|, for bounds that hold on both sides of zero.
func (a span) magnitude() span {
	out := span{v: math.Abs(a.v), lo: math.Min(math.Abs(a.lo), math.Abs(a.hi)), hi: math.Max(math.Abs(a.lo), math.Abs(a.hi)), banded: a.banded, sure: math.NaN()}
	switch {
	case !math.IsNaN(a.sure):
		out.lo = a.sure
	case a.lo < 0 && a.hi > 0:
		out.lo = 0
	}
	return out
}

// toldAt reads a quantity of a data set at t (K) with its limits.
func toldAt(read material.Reading, t float64) span {
	v, ok := read.At(t)
	l, limited := read.Limits(t)
	switch {
	case ok && limited:
		return span{v: v, lo: l.Lower, hi: l.Upper, banded: true, sure: math.NaN()}
	case limited:
		return span{v: math.NaN(), lo: l.Lower, hi: l.Upper, banded: true, sure: math.NaN()}
	case ok:
		return nominal(v)
	}
	return unknown()
}

// rhoAt is ρ of a set at t (K).
func rhoAt(s *material.DataSet, t float64) span { return toldAt(material.Reading{Told: s.Rho}, t) }

// ratioAt is R(t)/R(reference) of a set.
func ratioAt(s *material.DataSet, t, reference float64) span {
	return toldAt(material.Reading{Told: s.Ratio, Ratio: true, Reference: reference}, t)
}
