package study

import (
	"math"

	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// How the elements are connected, and their shape.
const (
	single   = "single"
	star     = "star"
	delta    = "delta"
	inSeries = "series"
	wire     = "wire"
	strip    = "strip"
)

var radiationShape = &form.Shape{Name: "radiation", Doc: "The element radiates to its surroundings: q = σ·emissivity·efficiency·(T⁴ − charge⁴), common practice.", Fields: []form.Field{
	needed("efficiency", form.Quantity(quantity.Ratio), "Radiating efficiency: 1 for one element that sees nothing hot, 0.5 to 0.6 for grouped elements (common practice).", "0.6"),
	needed("emissivity", form.Quantity(quantity.Ratio), "Emissivity of the element.", "0.9"),
	needed("charge", form.Quantity(quantity.Temperature), "Temperature of what the element radiates to.", "500 °C"),
}}

var convectionShape = &form.Shape{Name: "convection", Doc: "The element heats a moving or still fluid: q = coefficient·(T − ambient).", Fields: []form.Field{
	needed("coefficient", form.Quantity(quantity.FilmCoefficient), "Film coefficient.", "60 W/(m²·K)"),
	needed("ambient", form.Quantity(quantity.Temperature), "Temperature of the fluid.", "20 °C"),
}}

var leadShape = &form.Shape{Name: "lead_ins", Doc: "Cold ends of the same wire.", Fields: []form.Field{
	needed("length", form.Quantity(quantity.Length), "Length at each end.", "100 mm"),
	field("strands", form.Integer, "Wires side by side in a lead-in: 2 when it is bent back and twisted; 1 when it is missing.", "2"),
}}

// heaterKind sizes heating elements and tells what they draw, cold and hot.
var heaterKind = Kind{
	Name:  "heater",
	Title: "Heater",
	Doc: "Sizes a heating element of round wire or strip for a voltage and a power, takes the next size in stock, computes again, and tells resistance cold and hot, " +
		"surface load, the least and the greatest power, and the current at switching on. R(T)/R at 20 °C is the material's own.",
	Fields: []form.Field{
		materialsField,
		needed("voltage", form.Quantity(quantity.Voltage), "Supply voltage with its tolerance; between lines for star and delta.", "230 V ± 10 %"),
		needed("power", form.Quantity(quantity.Power), "Power of all elements together, hot, at the nominal voltage.", "750 W"),
		field("connection", form.OneOf(single, star, delta, inSeries), "One element, three in star or delta, or several in series; single when it is missing.", star),
		field("elements", form.Integer, "How many are in series.", "2"),
		field("element_temperature", form.Quantity(quantity.Temperature), "Temperature of the hot element: assumed, unless radiation or convection is given.", "900 °C"),
		field("radiation", form.Mapping(radiationShape), "Tells temperature from surface load, or surface load from temperature.", "{efficiency: 0.6, emissivity: 0.9, charge: 500 °C}"),
		field("convection", form.Mapping(convectionShape), "As radiation; both together add up.", "{coefficient: 60 W/(m²·K), ambient: 20 °C}"),
		field("surface_load", form.Quantity(quantity.SurfaceLoad), "Greatest surface load of the element itself.", "4 W/cm²"),
		field("shape", form.OneOf(wire, strip), "Round wire or strip; wire when it is missing.", strip),
		field("diameter", form.Quantity(quantity.Length), "A diameter that is already chosen.", "0.50 mm"),
		field("thickness", form.Quantity(quantity.Length), "Thickness of a strip.", "0.25 mm"),
		field("width", form.Quantity(quantity.Length), "Width of a strip; with the thickness, a size that is already chosen.", "5 mm"),
		field("width_to_thickness", form.Quantity(quantity.Ratio), "Width over thickness of a strip whose thickness is free.", "10"),
		field("edges", form.YesNo, "Whether the edges of a strip count as surface; yes when it is missing.", "no"),
		field("length", form.Quantity(quantity.Length), "Heated length of one element, where the space asks for one.", "9 m"),
		field("lead_ins", form.Mapping(leadShape), "Cold ends of the same wire, at 20 °C.", "{length: 100 mm, strands: 2}"),
		field("stock", form.YesNo, "Whether the next size in stock is taken; yes when it is missing.", "no"),
		field("resistance_tolerance", form.Quantity(quantity.Ratio), "Limits of the wire's resistance per metre, or of the element where it is trimmed to its resistance. Without it those of the stock or of the resistivity and the size hold.", "± 5 %"),
		field("start", form.Quantity(quantity.Temperature), "Temperature at switching on; 20 °C when it is missing.", "0 °C"),
		field("build", form.OneOf(builds()...), "The kind of element, to hold the surface load against what is common practice.", "convector spiral"),
	},
	Numbers: []NumberDoc{
		{"resistance_hot", quantity.Resistance, "Ω", 4, "R hot", "Resistance of one element at its working temperature, lead-ins included."},
		{"resistance_cold", quantity.Resistance, "Ω", 4, "R at 20 °C", "Resistance of one element at 20 °C, lead-ins included."},
		{"temperature_factor", quantity.Ratio, "", 4, "R(T)/R20", "R at the element temperature over R at 20 °C."},
		{"element_temperature", quantity.Temperature, "°C", 4, "element", "Temperature of the element: assumed, or from radiation and convection."},
		{"diameter", quantity.Length, "mm", 3, "diameter", "Diameter of the wire."},
		{"thickness", quantity.Length, "mm", 3, "thickness", "Thickness of the strip."},
		{"width", quantity.Length, "mm", 3, "width", "Width of the strip."},
		{"length", quantity.Length, "m", 4, "heated length", "Heated length of one element."},
		{"wire_length", quantity.Length, "m", 4, "to cut", "Length to cut for one element, lead-ins included."},
		{"resistance_per_length", quantity.ResistancePerLength, "Ω/m", 4, "Ω/m cold", "Resistance per metre at 20 °C."},
		{"surface_load", quantity.SurfaceLoad, "W/cm²", 3, "surface load", "Power over the surface of the heated length."},
		{"power", quantity.Power, "W", 4, "power (least to greatest)", "Power of all elements, hot, with the least and the greatest."},
		{"power_min", quantity.Power, "W", 4, "least power", "Least power: lowest voltage, highest resistance."},
		{"power_max", quantity.Power, "W", 4, "greatest power", "Greatest power: highest voltage, lowest resistance."},
		{"inrush_current", quantity.Current, "A", 3, "inrush", "Greatest current of a line at switching on: highest voltage, lowest resistance at the start temperature."},
		{"service_margin", quantity.TemperatureDifference, "K", 3, "below service temperature", "How far the element stays below the material's service temperature."},
		{"mass", quantity.Mass, "g", 3, "mass", "Mass of the wire or strip of all elements, lead-ins included."},
	},
	Run: runHeater,
}

// heater is one run of heater.
type heater struct {
	*work
	voltage, power span
	line           connection
	aim            float64 // Ω of one element, hot: U²/P of its share of both
	hot            float64 // K; NaN when cooling tells it
	start          float64 // K
	cooling        cooling
	load           float64 // W/m² asked; NaN when not asked
	length         span    // heated, asked; unknown when not
	flat           bool
	chosen         *section // a size already chosen
	thickness      span
	slimness       float64 // width over thickness
	edges          float64 // 1 or 0
	leads          leads
	tolerance      *quantity.Quantity
	several        bool // materials, which are then ranked by mass
}

// leads are the cold ends of one element: length is that of both ends.
type leads struct{ length, strands float64 }

// resisting is the length of wire whose resistance the lead-ins have.
func (l leads) resisting() float64 { return l.length / l.strands }

func (l leads) wire() float64 { return l.length * l.strands }

// connection tells what one element gets of voltage and power, and what a line carries.
type connection struct {
	elements         float64
	voltage, current float64 // of an element over that of the line; of a line over that of an element
}

func (w *work) connection() connection {
	word := w.text("connection", single)
	w.onlyWith(word == inSeries, "only elements in series are counted", "elements")
	switch word {
	case star:
		return connection{3, 1 / math.Sqrt(3), 1}
	case delta:
		return connection{3, 1, math.Sqrt(3)}
	case inSeries:
		if !w.has("elements") {
			w.lacking("how many elements are in series?", "elements")
		}
		n := w.count("elements", 2, 2)
		return connection{n, 1 / n, 1}
	}
	return connection{1, 1, 1}
}

func runHeater(w *work) {
	w.out.Cautions = []string{CautionNotApproval, CautionHot, CautionHeater, CautionIsolate, CautionProtective, CautionCodes}
	h := &heater{work: w, load: math.NaN(), hot: math.NaN(), edges: 1}
	h.read()
	records := w.records("materials")
	if w.failed {
		return
	}
	u := h.elementVoltage(h.voltage).v
	h.aim = u * u / h.elementPower()
	h.several = len(records) > 1
	h.notes()
	answers := w.each(records, func(r *material.Record) []*answer { return []*answer{h.size(r)} })
	w.finish(answers)
	h.tables(answers)
	h.chart(answers)
}

// size answers for one material.
func (h *heater) size(r *material.Record) *answer {
	a := h.about(r)
	e := &heating{h: h, a: a, rho: a.rhoAt20()}
	if e.rho.known() && e.design() {
		e.tell()
	}
	return a
}
