package study

import (
	"math"
	"strconv"

	"ohmfolio/generator/quantity"
)

// read takes the parameters and refuses what is open or contradicts.
func (g *winding) read() {
	g.constant = g.text("constant", ownConstant)
	g.strands = g.count("strands", 1, 1)
	g.conductivity, _ = g.positive("conductivity")
	g.space, _ = g.positive("winding_area")
	g.class = math.NaN()
	if g.has("class_temperature") {
		g.class = kelvinOf(g.block.Get("class_temperature"))
	}
	g.readLength()
	g.readWire()
	g.r1, _ = g.positive("cold_resistance")
	g.t1, _ = g.quantity("cold_temperature")
	g.r2, _ = g.positive("hot_resistance")
	g.coolant, _ = g.quantity("coolant")
	g.readReadings()
	if g.failed {
		return
	}
	g.whatIsThere()
}

func (g *winding) readLength() {
	g.turns = g.count("turns", 0, 1)
	mean, hasMean := g.positive("mean_turn")
	length, hasLength := g.positive("length")
	g.length = length
	switch {
	case hasLength && (g.has("turns") || hasMean):
		key := "mean_turn"
		if g.has("turns") {
			key = "turns"
		}
		g.contradict("length", key, "both tell the length of the wire")
	case g.has("turns") != hasMean:
		g.lacking("turns and mean turn go together", "turns with mean_turn", "length")
	case hasMean:
		g.length = mean.scale(g.turns)
	}
}

// readWire finds the bare diameter: R goes with the metal, not with the enamel.
func (g *winding) readWire() {
	unknownWire := section{area: unknown(), diameter: unknown()}
	d, bare := g.positive("diameter")
	over, coated := g.positive("diameter_over_enamel")
	enamel, thick := g.positive("enamel")
	switch {
	case bare && (coated || thick):
		key := "enamel"
		if coated {
			key = "diameter_over_enamel"
		}
		g.contradict("diameter", key, "the diameter is that of the bare wire")
	case g.has("gauge") && (bare || coated || thick):
		g.contradict("gauge", firstOf(g.work, "diameter", "diameter_over_enamel", "enamel"), "the gauge already tells the bare diameter")
	case coated != thick:
		g.lacking("a diameter over enamel is not that of the metal", "enamel with diameter_over_enamel", "diameter")
	case coated:
		d = over.minus(enamel.scale(2))
		if !(d.lo > 0) {
			g.fail("parameter-out-of-bounds", g.block.Get("enamel"), "the enamel is thicker than the wire", "write the thickness on one side")
		}
	case g.has("gauge"):
		n, ok := quantity.ParseAWG(g.text("gauge", ""))
		if !ok {
			g.fail("parameter-out-of-bounds", g.block.Get("gauge"), quote(g.text("gauge", ""))+" is no American wire gauge", "write AWG 24, between AWG 4/0 and AWG 56")
		}
		d = exactly(quantity.AWG(n))
	case !bare:
		g.wire = unknownWire
		return
	}
	g.wire = round(d)
}

func firstOf(w *work, keys ...string) string {
	for _, key := range keys {
		if w.has(key) {
			return key
		}
	}
	return ""
}

func (g *winding) readReadings() {
	n := g.block.Get("readings")
	last := 0.0
	for _, e := range n.List() {
		t, _ := e.Get("time").Quantity()
		r, _ := e.Get("resistance").Quantity()
		switch {
		case !(r.Value > 0):
			g.fail("value-not-positive", e.Get("resistance"), "the resistance "+quote(e.Get("resistance").Text())+" is not above zero", "write a value above zero")
		case !(t.Value > last):
			g.fail("readings-unusable", e.Get("time"), "the reading at "+e.Get("time").Text()+" does not come after the one before it and after switch-off", "write the readings in order of time, counted from switch-off")
		}
		last = t.Value
		g.readings = append(g.readings, reading{t.Value, r.Value})
	}
	least := 4
	if g.text("extrapolation", exponential) == logarithmic {
		least = 3
	}
	switch {
	case n != nil && len(g.readings) < least:
		g.fail("readings-unusable", n, "the extrapolation to switch-off needs "+strconv.Itoa(least)+" readings or more", "give more readings, or hot_resistance for one at switch-off")
	case n != nil && g.readings[len(g.readings)-1].r >= g.readings[0].r:
		g.fail("readings-unusable", n, "the resistance does not fall from the first reading to the last", "give readings of a winding that cools")
	}
}

// whatIsThere: enough for one answer at least, and nothing that is not used.
func (g *winding) whatIsThere() {
	hot := g.r2.known() || len(g.readings) > 0
	switch {
	case g.r2.known() && len(g.readings) > 0:
		g.contradict("hot_resistance", "readings", "both tell the resistance at switch-off")
	case g.r1.known() != g.t1.known():
		g.lacking("a cold resistance and its temperature go together", "cold_resistance with cold_temperature")
	case hot && !g.r1.known():
		g.lacking("the temperature follows from a hot and a cold resistance", "cold_resistance with cold_temperature")
	case !g.r1.known() && !(g.length.known() && g.wire.area.known()):
		g.lacking("there is neither a wire nor a reading to work on", "diameter with length", "gauge with length", "cold_resistance with cold_temperature")
	case g.length.known() != g.wire.area.known():
		g.lacking("the length and the size of the wire go together", "length with diameter")
	}
	g.onlyWith(g.turns > 0, "the fill needs turns", "winding_area")
	g.onlyWith(len(g.readings) > 0, "there are no readings", "extrapolation")
	g.onlyWith(hot, "nothing was read hot", "coolant")
	if g.text("extrapolation", "") == logarithmic && !g.coolant.known() {
		g.lacking("the straight line on log needs the resistance that the winding cools to", "coolant")
	}
}

// notes tells what is assumed.
func (g *winding) notes() {
	g.note("A temperature from resistance is the average of the winding. Hot spots are hotter, by 5 K to 15 K in small machines (common practice).")
	switch g.constant {
	case ownConstant:
		g.note("The law is the material's own R(T), inside its valid range only.")
	default:
		g.note("The law is the straight line through zero resistance at −" + g.constant + quantity.NarrowSpace + "°C, a constant of the trade, also beyond the valid range of the record.")
	}
	switch {
	case g.has("gauge"), g.has("diameter"):
		g.note("The size is that of the bare wire. Winding tension thins it and raises R; that is not in the numbers.")
	case g.has("diameter_over_enamel"):
		g.note("The bare diameter is that over the enamel less the enamel on both sides. Winding tension thins the wire and raises R; that is not in the numbers.")
	}
	if g.has("gauge") {
		g.note("The gauge is taken at its exact diameter, " + millimetres(g.wire.diameter.v) + "; its tolerance is not in the band.")
	}
	if g.conductivity.known() {
		g.note("The conductivity of the wire replaces the resistivity of the record. The change of ρ with temperature stays that of the record (Matthiessen's rule), so the coefficient falls with the conductivity.")
	}
	if len(g.readings) > 0 {
		g.note("The readings are extrapolated to switch-off: " + g.text("extrapolation", exponential) + ", by least squares (common practice; a standard for the machine may ask for another way).")
		if first := g.readings[0].t; first > latestReading {
			g.note("The first reading came " + quantity.Number(first, 3) + quantity.NarrowSpace + "s after switch-off, later than the 30 s that are common practice for small machines.")
		}
	}
}
