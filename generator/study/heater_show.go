package study

import (
	"math"
	"strconv"

	"ohmfolio/generator/quantity"
)

// tell names the numbers of a finished design.
func (e *heating) tell() {
	h, a := e.h, e.a
	lead := exactly(h.leads.resisting())
	cold := e.perMetre.times(e.length.plus(lead))
	hot := e.perMetre.times(e.length.times(e.factor).plus(lead))
	cut := e.length.plus(exactly(h.leads.wire()))
	squareOver := func(u, r float64) float64 { return float64(u*u) / r }
	each := h.elementVoltage(h.voltage).by(hot, squareOver)
	power := each.scale(h.line.elements)

	a.tell("diameter", e.section.diameter)
	a.tell("thickness", e.section.thickness)
	a.tell("width", e.section.width)
	a.tell("resistance_per_length", e.perMetre)
	a.tell("length", e.length)
	a.tell("wire_length", cut)
	a.tell("resistance_cold", cold)
	a.tell("resistance_hot", hot)
	a.tell("temperature_factor", e.factor)
	a.tell("element_temperature", h.told(nominal(e.hot)))
	a.tell("surface_load", each.over(e.section.perimeter.times(e.length)))
	a.tell("power", power)
	a.tell("power_min", end(power, power.lo))
	a.tell("power_max", end(power, power.hi))
	a.tellMass(e.section.area.times(cut).scale(h.line.elements))
	e.tellInrush()
	e.tellService()
	e.warnings()
	if n, ok := a.spans["mass"]; ok && h.several {
		a.rank = n.v
	}
}

// told: an assumed temperature was given, so it is exact.
func (h *heater) told(t span) span {
	if !h.cooling.any() {
		return exactly(t.v)
	}
	return t
}

// end is one end of a band as a number of its own.
func end(band span, at float64) span {
	return span{v: at, lo: at, hi: at, banded: band.banded, sure: math.NaN()}
}

// tellInrush: the greatest line current at the start temperature.
func (e *heating) tellInrush() {
	start := e.a.factorAt(e.h.start)
	if !start.known() {
		return
	}
	r := e.perMetre.times(e.length.times(start).plus(exactly(e.h.leads.resisting())))
	i := e.h.elementVoltage(e.h.voltage).over(r).scale(e.h.line.current)
	e.a.tell("inrush_current", end(i, i.hi))
	if e.factor.hi < start.lo {
		e.a.warn("R is lower hot than at the start: the greatest current flows hot")
	}
}

// tellService holds the element against the material's service temperature.
func (e *heating) tellService() {
	p := e.a.Record.Property("service_temperature")
	limit := unknown()
	switch {
	case p == nil:
	case p.Continuous != nil:
		limit = nominal(p.Continuous.Value)
	case p.Value.HasValue():
		limit = nominal(p.Value.Value)
	}
	if !limit.known() {
		e.a.cannot("no service temperature")
		return
	}
	e.a.tell("service_margin", exactly(limit.v-e.hot))
	if e.hot > limit.v {
		e.a.warn("the element is at " + quantity.CelsiusText(e.hot) + ", above the service temperature " + quantity.CelsiusText(limit.v))
	}
}

func (e *heating) warnings() {
	a := e.a
	load := a.spans["surface_load"].v
	if goal := e.target(); load > goal*(1+1e-6) {
		a.warn("the surface load " + loadText(load) + " is above the " + loadText(goal) + " sized for")
	}
	if e.hot > e.h.hot+hotter {
		a.warn("the element gets " + quantity.Fixed(e.hot-quantity.ZeroCelsius, 0) + quantity.NarrowSpace + "°C, above the " + quantity.CelsiusText(e.h.hot) + " asked")
	}
	if goal := e.target(); e.computed != nil && load < goal*muchLess {
		a.warn("the size in stock carries " + loadText(load) + ", far below the " + loadText(goal) + " asked: " + e.computed.text() + " would do")
	}
	if b, ok := findBuild(e.h.text("build", "")); ok && (load < b.low || load > b.high) {
		a.warn("the surface load " + loadText(load) + " lies outside what is common practice for " + b.name + ", " + loadText(b.low) + " to " + loadText(b.high))
	}
	if e.h.flat || e.from == "stock" || e.h.tolerance != nil {
		return
	}
	if e.h.chosen == nil {
		a.warn("the size is computed and is nobody's stock")
	}
}

// hotter than asked by more than this is told.
const hotter = 0.5 // K

// muchLess of the surface load asked is a size in stock that wastes material.
const muchLess = 0.5

func loadText(si float64) string {
	u, _ := quantity.FindUnit(quantity.SurfaceLoad, "W/cm²")
	return quantity.Number(u.FromSI(si), 3) + quantity.NarrowSpace + u.Symbol
}

// build is a range of surface load that one maker advises for a kind of
// element; lower for frequent switching. Common practice, no standard.
type build struct {
	name      string
	low, high float64 // W/m²
}

var buildList = []build{
	{"convector spiral", 3.5e4, 4.5e4},
	{"fan heater spiral", 9e4, 15e4},
	{"hotplate, sheathed", 17e4, 22e4},
	{"oven, sheathed", 8e4, 12e4},
	{"pencil bar", 6e4, 9.5e4},
	{"spiral in free air", 4.5e4, 6e4},
	{"toaster, on mica", 3e4, 4e4},
	{"water, sheathed", 25e4, 35e4},
}

func builds() []string {
	var list []string
	for _, b := range buildList {
		list = append(list, b.name)
	}
	return list
}

func findBuild(name string) (build, bool) {
	for _, b := range buildList {
		if b.name == name {
			return b, true
		}
	}
	return build{}, false
}

// tables: what to draw and wind; what it draws; R(T)/R at 20 °C.
func (h *heater) tables(answers []*answer) {
	h.out.Tables = append(h.out.Tables,
		h.numbersTables("The element", answers, "diameter", "thickness", "width", "resistance_per_length", "length", "wire_length", "resistance_cold", "temperature_factor", "resistance_hot", "mass")...)
	h.out.Tables = append(h.out.Tables,
		h.numbersTable("What it draws", answers, "element_temperature", "service_margin", "surface_load", "power", "inrush_current"))
	if t, asked := h.requirementsTable(answers); asked {
		h.out.Tables = append(h.out.Tables, t)
	}
	if t, ok := h.factors(answers); ok {
		h.out.Tables = append(h.out.Tables, t)
	}
}

// widest is how many materials a table of factors and a figure have room for.
const widest = 8

// factors is R(T)/R at 20 °C in hundreds of degrees, each material's own, with
// the condition that it holds for.
func (h *heater) factors(answers []*answer) (Table, bool) {
	shown := answers
	if len(shown) > widest {
		h.note("The table of R(T)/R at 20 °C shows the first " + strconv.Itoa(widest) + " materials.")
		shown = shown[:widest]
	}
	t := Table{Caption: "R(T)/R at 20 °C, each material's own", Heads: []string{"temperature, °C"}}
	condition := []string{"condition"}
	hottest := 0.0
	for _, a := range shown {
		t.Heads = append(t.Heads, a.Record.ShortName())
		c := "no data"
		if s := a.Record.Adopted; s != nil {
			c = s.Condition
			if s.Ratio != nil {
				hottest = math.Max(hottest, s.Valid.Hi)
			}
		}
		if c == "" {
			c = "not stated"
		}
		condition = append(condition, c)
	}
	t.Rows = append(t.Rows, condition)
	for c := 100.0; c+quantity.ZeroCelsius <= hottest+1e-9; c += 100 {
		row := []string{quantity.Fixed(c, 0)}
		for _, a := range shown {
			row = append(row, factorText(a, c+quantity.ZeroCelsius))
		}
		t.Rows = append(t.Rows, row)
	}
	return t, len(t.Rows) > 1
}

func factorText(a *answer, kelvin float64) string {
	s := a.Record.Adopted
	if s == nil || s.Ratio == nil {
		return string(CannotBeTold)
	}
	f := ratioAt(s, kelvin, twenty)
	switch {
	case !s.Valid.Contains(kelvin):
		return "outside range"
	case math.IsNaN(f.v):
		return string(CannotBeTold)
	}
	decimals := s.RatioDecimals()
	if s.Table != nil {
		decimals = s.Table.Digits - 1 // as printed: one digit stands before the point
	}
	return quantity.Fixed(f.v, max(3, min(4, decimals)))
}

// chart draws R(T)/R at 20 °C with the temperature of the elements marked.
func (h *heater) chart(answers []*answer) {
	chart := Chart{Title: "R(T)/R at 20 °C", XTitle: "temperature in °C", YTitle: "R/R at 20 °C",
		Description: "R(T)/R at 20 °C of each material over its valid range; upright lines mark the temperature of the elements."}
	marked := map[float64]bool{}
	for i, a := range answers {
		s := a.Record.Adopted
		if i >= widest || s == nil || s.Ratio == nil || !s.Valid.Contains(twenty) {
			continue
		}
		read := readingOf(s)
		if line, ok := seriesOf(a.Record.ShortName(), s, read, s.Valid.Lo, s.Valid.Hi, func(x float64) float64 { return x }); ok {
			chart.Series = append(chart.Series, line)
		}
		if n, ok := a.spans["element_temperature"]; ok && !marked[n.v] {
			marked[n.v] = true
			chart.Marks = append(chart.Marks, n.v-quantity.ZeroCelsius)
		}
	}
	if len(chart.Series) > 0 {
		h.out.Charts = append(h.out.Charts, chart)
	}
}
