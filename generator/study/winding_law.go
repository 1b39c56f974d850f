package study

import (
	"math"

	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// law is R(T)/R(20 °C) of a winding: a straight line through a zero-resistance
// temperature, or the material's own curve.
type law struct {
	set  *material.DataSet
	line float64 // K where the line reaches zero; NaN for the own curve
	// steeper is ρ of the record over ρ of the wire: other impurities leave
	// dρ/dT as it is (Matthiessen's rule), so that
	//
	//	R(T)/R(20 °C) = 1 + steeper·(R_own(T)/R_own(20 °C) − 1)
	//
	// For copper it makes α proportional to the conductivity. 1 when the wire
	// is that of the record.
	steeper float64
}

func (g *winding) lawOf(set *material.DataSet) law {
	l := law{set: set, line: math.NaN(), steeper: 1}
	switch g.constant {
	case "234.5":
		l.line = quantity.ZeroCelsius - 234.5
	case "235":
		l.line = quantity.ZeroCelsius - 235
	case "225":
		l.line = quantity.ZeroCelsius - 225
	case "228":
		l.line = quantity.ZeroCelsius - 228
	}
	if g.conductivity.known() {
		l.steeper = rhoAt(set, twenty).v * g.conductivity.v
	}
	return l
}

func (l law) straight() bool { return !math.IsNaN(l.line) }

// factor is R(t)/R(20 °C).
func (l law) factor(t span) span {
	if l.straight() {
		return t.through(func(t float64) float64 { return (t - l.line) / (twenty - l.line) })
	}
	lo, mid, hi := l.own(t.lo, twenty), l.own(t.v, twenty), l.own(t.hi, twenty)
	out := mid
	out.lo, out.hi = math.Min(math.Min(lo.lo, hi.lo), mid.lo), math.Max(math.Max(lo.hi, hi.hi), mid.hi)
	return out
}

// own is R(t)/R(reference) of the material's own curve.
func (l law) own(t, reference float64) span {
	f := ratioAt(l.set, t, reference)
	if l.steeper == 1 {
		return f
	}
	a, b := ratioAt(l.set, t, twenty).v, ratioAt(l.set, reference, twenty).v
	return nominal((1 + float64(l.steeper*(a-1))) / (1 + float64(l.steeper*(b-1))))
}

// zero is the zero-resistance temperature: of the line, or of the tangent at 20 °C.
func (l law) zero() span {
	if l.straight() {
		return exactly(l.line)
	}
	return nominal(l.ownZero())
}

// ownZero is where the tangent at 20 °C to the own curve reaches zero: T − 1/α.
func (l law) ownZero() float64 {
	if !l.set.Ratio.HasNominal() {
		return math.NaN()
	}
	slope, ok := l.set.Ratio.Nominal.Slope(twenty)
	at, known := l.set.Ratio.Nominal.At(twenty)
	if !ok || !known || slope == 0 {
		return math.NaN()
	}
	return twenty - at/float64(slope*l.steeper)
}

// temperature is where R is ratio times that at t1.
func (l law) temperature(ratio, t1 span) span {
	if l.straight() {
		z := exactly(l.line)
		return t1.minus(z).times(ratio).plus(z)
	}
	if !l.rises() {
		return unknown()
	}
	out := nominal(l.inverse(ratio.v, t1.v, func(s span) float64 { return s.v }))
	if !out.known() {
		return out
	}
	lower := func(s span) float64 { return s.lo }
	upper := func(s span) float64 { return s.hi }
	out.banded = ratio.banded && t1.banded && l.set.Ratio.Limits != nil && l.steeper == 1
	for _, t := range []float64{t1.lo, t1.hi} {
		for _, q := range []float64{ratio.lo, ratio.hi} {
			a, b := l.inverse(q, t, upper), l.inverse(q, t, lower)
			if math.IsNaN(a) || math.IsNaN(b) {
				out.banded = false // the worst case leaves the valid range
				continue
			}
			out.lo, out.hi = math.Min(out.lo, math.Min(a, b)), math.Max(out.hi, math.Max(a, b))
		}
	}
	return out
}

// inverse finds t in the valid range with R(t)/R(t1) = ratio; NaN when there is none.
func (l law) inverse(ratio, t1 float64, take func(span) float64) float64 {
	at := func(t float64) float64 { return take(l.own(t, t1)) - ratio }
	lo, hi := l.set.Valid.Lo, l.set.Valid.Hi
	if a, b := at(lo), at(hi); !(a <= 1e-12 && b >= -1e-12) {
		return math.NaN()
	}
	return root(lo, hi, at)
}

// rises tells whether the own curve rises all over its range.
func (l law) rises() bool {
	const steps = 32
	last := math.Inf(-1)
	for i := range steps + 1 {
		t := l.set.Valid.Lo + float64((l.set.Valid.Hi-l.set.Valid.Lo)*float64(i)/steps)
		f := l.own(t, twenty).v
		if !(f > last) {
			return false
		}
		last = f
	}
	return true
}

// why the factor at t is not told.
func (l law) why(t float64) string {
	switch {
	case l.set.Ratio == nil || !l.set.Ratio.HasNominal() && l.set.Ratio.Limits == nil:
		return "no coefficient"
	case !l.set.Valid.Contains(t):
		return quantity.CelsiusText(t) + " lies outside the valid range " + windowText(l.set.Valid.Lo, l.set.Valid.Hi) + "; a constant carries the straight line of the trade beyond it"
	}
	return "no R(T)/R at " + quantity.CelsiusText(t)
}

// whyNot tells why no temperature has that ratio.
func (l law) whyNot(ratio float64) string {
	switch {
	case l.set.Ratio == nil || !l.set.Ratio.HasNominal():
		return "no coefficient"
	case !l.rises():
		return "R does not rise all over the valid range, so that it names no temperature"
	}
	return "a resistance of " + quantity.Fixed(ratio, 4) + " times the cold one lies outside the valid range " + windowText(l.set.Valid.Lo, l.set.Valid.Hi) + "; a constant carries the straight line of the trade beyond it"
}
