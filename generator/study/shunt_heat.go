package study

import (
	"math"

	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// heat finds the element's mean temperature at the continuous current, at the
// upper edge of the ambient: R(T) and the power are solved together.
func (e *element) heat() {
	e.hot = math.NaN()
	switch {
	case e.has("ends"):
		e.endCooled()
	case e.has("thermal_resistance"):
		theta, _ := e.quantity("thermal_resistance")
		e.balance(theta.v, "the thermal resistance")
	case e.has("film"):
		h, _ := e.quantity("film")
		e.balance(1/(h.v*2*e.strips*e.l*(e.w+e.thickness.v)), "the film coefficient")
	default:
		e.a.cannot("element temperature: no cooling is given (ends, film or thermal_resistance); it is taken as that of the surroundings")
	}
}

// resistanceAt is R of the alloy part at t, as a factor of that at the
// calibration temperature.
func (e *element) factor(t float64) float64 {
	f, ok := material.Reading{Told: e.set.Ratio, Ratio: true, Reference: e.reference}.At(t)
	if !ok {
		return math.NaN()
	}
	return f
}

// balance solves T = ambient + I²R(T)·θ. R(T) is read inside the valid range
// only; without a balance there the element runs away, or nobody knows.
func (e *element) balance(theta float64, by string) {
	lost := func(t float64) float64 { return e.hi + e.power*e.factor(t)*theta - t }
	lo, hi := e.hi, e.set.Valid.Hi
	switch {
	case math.IsNaN(lost(lo)):
		e.a.cannot("element temperature: " + quantity.CelsiusText(lo) + " lies outside the valid range " + windowText(e.set.Valid.Lo, e.set.Valid.Hi))
		return
	case lost(hi) > 0:
		e.a.cannot("element temperature: by " + by + " there is no balance up to " + quantity.CelsiusText(hi) + ", where the data end; the element runs away or gets hotter than anybody measured")
		return
	}
	for range 60 {
		mid := (lo + hi) / 2
		if lost(mid) > 0 {
			lo = mid
		} else {
			hi = mid
		}
	}
	e.hot = hi
	e.a.tell("element_temperature", nominal(e.hot))
}

// endCooled is a strip that loses heat through its ends alone: the hottest
// point lies V²/(8kρ) above them, the mean two thirds of that, whatever the
// size. ρ and V are those of the mean temperature; k is taken as constant.
func (e *element) endCooled() {
	ends, _ := e.quantity("ends")
	e.a.tell("terminal_temperature", ends)
	k, ok := e.a.property("thermal_conductivity")
	if !ok || math.IsNaN(k.v) {
		e.a.cannot("element temperature: no thermal conductivity")
		return
	}
	mean, peak := ends.v, 0.0
	for range 30 {
		f := e.factor(mean)
		if math.IsNaN(f) {
			e.a.cannot("element temperature: the mean leaves the valid range " + windowText(e.set.Valid.Lo, e.set.Valid.Hi))
			return
		}
		drop := e.current.v * e.alloy * f
		peak = drop * drop / (8 * k.v * e.rho.v * f)
		mean = ends.v + 2.0/3*peak
	}
	e.hot = mean
	rise := k.through(func(x float64) float64 { return peak * k.v / x })
	rise.banded = false
	e.a.tell("rise_end_cooled_max", rise)
	if p := e.a.Record.Property("service_temperature"); p != nil && p.Continuous != nil && ends.v+peak > p.Continuous.Value {
		e.a.warn("the hottest point, " + quantity.Fixed(ends.v+peak-quantity.ZeroCelsius, 0) + quantity.NarrowSpace + "°C, lies above the service temperature of " + p.Continuous.Text)
	}
	e.a.tell("element_temperature", nominal(mean))
}

// peak is the rise during the peak current with nothing carried off.
func (e *element) peak() {
	current, ok := e.quantity("peak_current")
	duration, ok2 := e.quantity("peak_time")
	if !ok || !ok2 {
		return
	}
	density, okD := e.a.property("density")
	heat, okC := e.a.property("specific_heat")
	if !okD || !okC {
		e.a.cannot("rise of the peak: no " + missingOf(map[string]bool{"density": okD, "specific heat": okC}))
		return
	}
	section := e.strips * e.w * e.thickness.v
	j := current.v / section
	e.a.tell("rise_adiabatic", nominal(j*j*e.rho.v*duration.v/(density.v*heat.v)))
}

func missingOf(there map[string]bool) string {
	missing := map[string]bool{}
	for name, ok := range there {
		if !ok {
			missing[name] = true
		}
	}
	list := sortedKeys(missing)
	text := ""
	for i, name := range list {
		if i > 0 {
			text += " and no "
		}
		text += name
	}
	return text
}

// derate is the continuous current that brings the element to its highest
// service temperature for accuracy, else for continuous service.
func (e *element) derate() {
	p := e.a.Record.Property("service_temperature")
	if p == nil || p.Accuracy == nil && p.Continuous == nil {
		e.a.cannot("derated current: no service temperature")
		return
	}
	limit := p.Accuracy
	if limit == nil {
		limit = p.Continuous
	}
	f := e.factor(limit.Value)
	if math.IsNaN(f) {
		e.a.cannot("derated current: the service temperature " + limit.Text + " lies outside the valid range")
		return
	}
	current := math.NaN()
	switch {
	case e.has("ends"):
		ends, _ := e.quantity("ends")
		k, ok := e.a.property("thermal_conductivity")
		if ok && limit.Value > ends.v {
			current = math.Sqrt(12*k.v*e.rho.v*f*(limit.Value-ends.v)) / (e.alloy * f)
		}
	case e.has("thermal_resistance"):
		theta, _ := e.quantity("thermal_resistance")
		current = math.Sqrt((limit.Value - e.hi) / (theta.v * e.target.v * f))
	case e.has("film"):
		h, _ := e.quantity("film")
		current = math.Sqrt((limit.Value - e.hi) * h.v * 2 * e.strips * e.l * (e.w + e.thickness.v) / (e.target.v * f))
	}
	if math.IsNaN(current) {
		e.a.cannot("derated current: the surroundings or the ends are as hot as the service temperature " + limit.Text)
		return
	}
	e.a.tell("derated_current", nominal(current))
	if current < e.current.v {
		e.a.warn("the continuous current is above " + quantity.Number(current, 3) + quantity.NarrowSpace + "A, at which the element reaches its service temperature of " + limit.Text)
	}
}
