package study

import (
	"math"
	"strconv"

	"ohmfolio/generator/form"
	"ohmfolio/generator/quantity"
)

// read takes the parameters and refuses what is open or contradicts.
func (h *heater) read() {
	h.voltage, _ = h.positive("voltage")
	h.power, _ = h.positive("power")
	h.line = h.connection()
	h.start = h.kelvin("start", twenty, "")
	if s, ok := h.positive("surface_load"); ok {
		h.load = s.hi
	}
	h.length, _ = h.positive("length")
	h.cooling = h.readCooling()
	if q, ok := h.block.Get("element_temperature").Quantity(); ok {
		h.hot = q.Value
	}
	if q, ok := h.block.Get("resistance_tolerance").Quantity(); ok {
		h.tolerance = &q
	}
	h.leads = h.readLeads()
	h.readShape()
	if h.failed {
		return
	}
	h.whatDecides()
}

func (h *heater) readLeads() leads {
	n := h.block.Get("lead_ins")
	l := leads{strands: 1}
	if n == nil {
		return l
	}
	q, _ := n.Get("length").Quantity()
	l.length = 2 * q.Value
	if x, ok := n.Get("strands").Int(); ok {
		l.strands = float64(x)
	}
	if q.Value < 0 || l.strands < 1 {
		h.fail("parameter-out-of-bounds", n, "lead-ins need a length and at least one strand", "write a length not below zero, and 1 or more strands")
	}
	return l
}

func (h *heater) readShape() {
	h.flat = h.text("shape", wire) == strip
	h.onlyWith(!h.flat, "a strip has a thickness and a width", "diameter")
	h.onlyWith(h.flat, "only a strip has it; add shape: strip", "thickness", "width", "width_to_thickness", "edges")
	if h.has("edges") && !h.block.Get("edges").Yes() {
		h.edges = 0
	}
	d, round1 := h.positive("diameter")
	t, thick := h.positive("thickness")
	b, wide := h.positive("width")
	n, slim := h.positive("width_to_thickness")
	h.thickness, h.slimness = t, n.v
	switch {
	case round1:
		s := round(d)
		h.chosen = &s
	case thick && wide && slim:
		h.contradict("width", "width_to_thickness", "the thickness and the width already tell it")
	case thick && slim:
		s := flat(t, t.times(n), h.edges)
		h.chosen = &s
	case thick && wide:
		s := flat(t, b, h.edges)
		h.chosen = &s
	case wide:
		h.lacking("the thickness of the strip is open", "thickness")
	case h.flat && !thick && !slim:
		h.lacking("neither thickness nor proportion of the strip is given", "thickness", "width_to_thickness")
	}
}

// whatDecides: the size comes from a chosen size, a length, a surface load, or
// from a model with an element temperature; the temperature is assumed, or
// comes from a model.
func (h *heater) whatDecides() {
	if math.IsNaN(h.hot) && !h.cooling.any() {
		h.lacking("the temperature of the element is neither given nor can it be computed", "element_temperature", "radiation", "convection")
	}
	fromModel := h.cooling.any() && !math.IsNaN(h.hot)
	if h.chosen == nil && !h.length.known() && math.IsNaN(h.load) && !fromModel {
		h.lacking("nothing decides the size", "surface_load", "length", "diameter", "element_temperature with radiation")
	}
	if h.cooling.any() && h.hot <= h.cooling.coldest() {
		h.fail("parameter-out-of-bounds", h.block.Get("element_temperature"), "the element is not hotter than what it heats", "write an element temperature above it")
	}
}

// cooling takes heat from the element: radiation, convection, or both.
type cooling struct {
	radiant, charge float64 // σ·emissivity·efficiency; K. 0 without radiation
	film, ambient   float64 // W/(m²·K); K. 0 without convection
}

// stefanBoltzmann in W/(m²·K⁴): exact since the SI of 2019, 2π⁵k⁴/15h³c²; to
// ten digits here (CODATA 2018).
const stefanBoltzmann = 5.670374419e-8

func (h *heater) readCooling() cooling {
	var c cooling
	if n := h.block.Get("radiation"); n != nil {
		c.radiant = stefanBoltzmann * h.fraction(n.Get("efficiency"), "radiating efficiency", 1) * h.fraction(n.Get("emissivity"), "emissivity", 1)
		c.charge = kelvinOf(n.Get("charge"))
	}
	if n := h.block.Get("convection"); n != nil {
		q, _ := n.Get("coefficient").Quantity()
		if !(q.Value > 0) {
			h.fail("value-not-positive", n.Get("coefficient"), "the film coefficient "+quote(n.Get("coefficient").Text())+" is not above zero", "write a value above zero")
		}
		c.film, c.ambient = q.Value, kelvinOf(n.Get("ambient"))
	}
	return c
}

func kelvinOf(n *form.Node) float64 {
	q, _ := n.Quantity()
	return q.Value
}

func (c cooling) any() bool { return c.radiant > 0 || c.film > 0 }

// coldest is the temperature at which no heat flows, or the lower one of two.
func (c cooling) coldest() float64 {
	switch {
	case c.film == 0:
		return c.charge
	case c.radiant == 0:
		return c.ambient
	}
	return math.Min(c.ambient, c.charge)
}

// flux is the heat per surface at t (K), W/m²:
//
//	q = σ·ε·K·(T⁴ − T_charge⁴) + h·(T − T_ambient)
func (c cooling) flux(t float64) float64 {
	fourth := func(x float64) float64 { return x * x * x * x }
	return c.radiant*(fourth(t)-fourth(c.charge)) + c.film*(t-c.ambient)
}

// temperature is where the flux is q; it rises with the temperature.
func (c cooling) temperature(q float64) float64 {
	lo, hi := c.coldest(), c.coldest()+100
	for c.flux(hi) < q {
		hi *= 2
	}
	return root(lo, hi, func(t float64) float64 { return c.flux(t) - q })
}

// notes tells what is assumed.
func (h *heater) notes() {
	switch {
	case !h.cooling.any():
		h.note("The element temperature " + quantity.CelsiusText(h.hot) + " is assumed, not computed: it depends on how the element gives off its heat.")
	case math.IsNaN(h.hot):
		h.note("The element temperature is computed from its surface load; emissivity, efficiency and film coefficient are as given, and it is the same all along the element.")
	default:
		h.note("The surface load follows from the element temperature asked; after the size is taken, the temperature is computed again from the load.")
	}
	if !h.has("start") {
		h.note("Switched on at " + quantity.CelsiusText(twenty) + ", since no start temperature is given.")
	}
	if h.power.wide() {
		h.note("The ± of the power is not used for the size. Require power_min and power_max instead.")
	}
	if h.line.elements > 1 {
		h.note("Resistance, length and surface load are those of one element of " + strconv.Itoa(int(h.line.elements)) + "; power and mass those of all.")
	}
	if h.several {
		h.note("Ranked by mass, least first.")
	}
	if h.leads.length > 0 {
		h.note("Lead-ins are of the same wire and stay at " + quantity.CelsiusText(twenty) + ".")
	}
	if !h.has("resistance_tolerance") {
		h.note("No tolerance of the resistance per metre is given: the band is made of what the stock states for it, otherwise of the limits of the resistivity and of the size. ± 5 %, for thin wire ± 8 %, is common practice.")
	}
	h.note("The band of the power keeps the element at one temperature. Coiling stretches the wire and raises its resistance; it is not in the numbers.")
}
