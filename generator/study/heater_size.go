package study

import (
	"math"

	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// heating is the design of one element in one material.
type heating struct {
	h *heater
	a *answer

	rho      span // at 20 °C, Ω·m
	section  section
	perMetre span     // Ω/m at 20 °C
	hot      float64  // K
	factor   span     // R(hot)/R(20 °C)
	length   span     // heated, m
	from     string   // where the size comes from
	computed *section // that the stock size stands for; nil when none was computed
}

func (h *heater) elementVoltage(u span) span { return u.scale(h.line.voltage) }

func (h *heater) elementPower() float64 { return h.power.v / h.line.elements }

// design finds section, temperature and length; false when one cannot be told.
func (e *heating) design() bool {
	if e.h.chosen != nil {
		e.from = "chosen"
		if s := e.held(*e.h.chosen); s != nil {
			e.from = "stock"
			return e.build(e.sectionOf(*s), s)
		}
		return e.build(*e.h.chosen, nil)
	}
	s, ok := e.ideal()
	if !ok {
		return false
	}
	e.from = "computed"
	return e.take(s)
}

// held is the stock size that was chosen by its nominal size, whose limits
// and resistance per metre then hold; nil when there is none, or when the
// choice has limits of its own.
func (e *heating) held(chosen section) *material.Stock {
	if !e.fromStock() || chosen.area.wide() {
		return nil
	}
	for i := range e.a.Record.Stock {
		s := &e.a.Record.Stock[i]
		if e.fits(s) && math.Abs(e.sizeOf(e.sectionOf(*s))/e.sizeOf(chosen)-1) < 1e-9 {
			return s
		}
	}
	return nil
}

func (e *heating) fromStock() bool { return !e.h.has("stock") || e.h.block.Get("stock").Yes() }

// ideal is the section that meets the load or the length exactly.
func (e *heating) ideal() (section, bool) {
	byLength := e.h.length.known()
	load := e.target()
	hot := e.h.hot
	if math.IsNaN(hot) && !byLength {
		hot = e.h.cooling.temperature(load)
	}
	short := func(s section) float64 {
		t := hot
		if math.IsNaN(t) { // by length: the temperature follows from the load
			t = e.h.cooling.temperature(e.h.elementPower() / (s.perimeter.v * e.h.length.v))
		}
		f := e.factorValue(t)
		if byLength {
			return s.area.v - float64(e.rho.v*(e.h.length.v*f+e.h.leads.resisting()))/e.h.aim
		}
		l := e.lengthFor(s.area.v, f)
		return s.perimeter.v*l - e.h.elementPower()/load
	}
	if !math.IsNaN(hot) && math.IsNaN(e.factorValue(hot)) {
		e.a.factorAt(hot) // tells why
		return section{}, false
	}
	x := root(1e-7, 1, func(x float64) float64 {
		d := short(e.shaped(x))
		if math.IsNaN(d) {
			return -1 // hotter than the data reach: too thin
		}
		return d
	})
	s := e.shaped(x)
	if d := short(s); math.IsNaN(d) || x > 0.9 {
		e.a.cannot("no size of this material meets what is asked within its valid range")
		return section{}, false
	}
	return s, true
}

// target is the surface load to size for: the lower one of what is asked and
// what the cooling carries at the temperature asked.
func (e *heating) target() float64 {
	load := e.h.load
	if e.h.cooling.any() && !math.IsNaN(e.h.hot) {
		if q := e.h.cooling.flux(e.h.hot); math.IsNaN(load) || q < load {
			load = q
		}
	}
	return load
}

// shaped is the section of free dimension x: the diameter, the width of a
// strip of given thickness, or the thickness of one of given proportion.
func (e *heating) shaped(x float64) section {
	switch {
	case !e.h.flat:
		return round(nominal(x))
	case e.h.thickness.known():
		return flat(e.h.thickness, nominal(x), e.h.edges)
	}
	return flat(nominal(x), nominal(float64(x*e.h.slimness)), e.h.edges)
}

// factorValue is the nominal R(t)/R(20 °C), NaN without one.
func (e *heating) factorValue(t float64) float64 {
	if e.a.Record.Adopted == nil {
		return math.NaN()
	}
	return ratioAt(e.a.Record.Adopted, t, twenty).v
}

// lengthFor is the heated length of a section of that area that gives the
// resistance aimed at, the lead-ins' share taken off.
func (e *heating) lengthFor(area, factor float64) float64 {
	return (float64(e.h.aim*area)/e.rho.v - e.h.leads.resisting()) / factor
}

// take builds with the stock size that suits, or with the ideal one.
func (e *heating) take(ideal section) bool {
	var best *material.Stock
	if e.fromStock() {
		best = e.suits(ideal)
		if best == nil {
			e.a.warn("no " + e.h.formWord() + " in stock that suits: the size is as computed")
		}
	}
	if best == nil {
		return e.build(ideal, nil)
	}
	e.from, e.computed = "stock", &ideal
	return e.build(e.sectionOf(*best), best)
}

func (h *heater) formWord() string {
	if h.flat {
		return strip
	}
	return wire
}

// suits finds the stock size next to the ideal one: by load, the smallest
// whose load is no higher, else the largest; by length, the nearest.
func (e *heating) suits(ideal section) *material.Stock {
	var above, below, near *material.Stock
	var aboveSize, belowSize, nearest float64
	goal := e.sizeOf(ideal)
	for i := range e.a.Record.Stock {
		s := &e.a.Record.Stock[i]
		if !e.fits(s) {
			continue
		}
		size := e.sizeOf(e.sectionOf(*s))
		if off := math.Abs(math.Log(size / goal)); near == nil || off < nearest {
			near, nearest = s, off
		}
		if size >= goal*(1-1e-9) {
			if above == nil || size < aboveSize {
				above, aboveSize = s, size
			}
		} else if below == nil || size > belowSize {
			below, belowSize = s, size
		}
	}
	switch {
	case e.h.length.known():
		return near
	case above != nil:
		return above
	}
	return below
}

// sizeOf orders sections by surface load: the load at given R falls as
// perimeter × area rises.
func (e *heating) sizeOf(s section) float64 { return float64(s.perimeter.v * s.area.v) }

func (e *heating) fits(s *material.Stock) bool {
	if e.h.flat {
		return (s.Form == strip || s.Form == "foil") && s.Thickness != nil && s.Width != nil &&
			(!e.h.thickness.known() || math.Abs(s.Thickness.Value/e.h.thickness.v-1) < 1e-3)
	}
	return s.Form == wire && s.Diameter != nil
}

func (e *heating) sectionOf(s material.Stock) section {
	if e.h.flat {
		return flat(recorded(s.Thickness), recorded(s.Width), e.h.edges)
	}
	return round(recorded(s.Diameter))
}

// build fixes the section and solves length and temperature for it.
func (e *heating) build(s section, stock *material.Stock) bool {
	e.section = s
	e.perMetre = e.rho.over(s.area)
	if stock != nil && stock.Resistance != nil {
		e.perMetre = recorded(stock.Resistance)
	}
	if q := e.h.tolerance; q != nil {
		e.perMetre = e.perMetre.within(tolerance(*q))
	}
	if !e.settle() {
		return false
	}
	e.factor = e.a.factorAt(e.hot)
	if !e.factor.known() {
		return false
	}
	if e.h.chosen != nil && e.h.length.known() {
		e.length = e.h.length
	} else {
		e.length = exactly(e.lengthAt(e.factor.v))
	}
	if !(e.length.v > 0) {
		e.a.cannot("the lead-ins alone have more than the resistance aimed at")
		return false
	}
	return true
}

// lengthAt is the heated length that gives the resistance aimed at.
func (e *heating) lengthAt(factor float64) float64 {
	return (e.h.aim/e.perMetre.v - e.h.leads.resisting()) / factor
}

// settle finds the temperature of the built element: the one assumed, or where
// the cooling carries off the surface load.
func (e *heating) settle() bool {
	if !e.h.cooling.any() {
		e.hot = e.h.hot
		return true
	}
	set := e.a.Record.Adopted
	excess := func(t float64) float64 {
		f := e.factorValue(t)
		l, p := e.lengthAt(f), e.h.elementPower()
		if e.h.chosen != nil && e.h.length.known() {
			u := e.h.elementVoltage(e.h.voltage).v
			l = e.h.length.v
			p = float64(u*u) / float64(e.perMetre.v*(l*f+e.h.leads.resisting()))
		}
		return e.h.cooling.flux(t) - p/float64(e.section.perimeter.v*l)
	}
	lo, hi := math.Max(set.Valid.Lo, e.h.cooling.coldest()), set.Valid.Hi
	switch {
	case !(lo < hi):
		e.a.cannot("the valid range " + windowText(set.Valid.Lo, set.Valid.Hi) + " ends below what is heated")
	case math.IsNaN(e.factorValue(hi)):
		e.a.factorAt(hi)
	case excess(hi) < 0:
		e.a.cannot("the element gets hotter than " + quantity.CelsiusText(hi) + ", where the valid range ends")
	case excess(lo) > 0:
		e.a.cannot("the element stays below " + quantity.CelsiusText(lo) + ", where the valid range begins")
	default:
		e.hot = root(lo, hi, excess)
		return true
	}
	return false
}
