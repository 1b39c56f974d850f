package study

import (
	"math"

	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// Extrapolations of a cooling curve to switch-off.
const (
	exponential   = "exponential"
	logarithmic   = "straight line on log"
	ownConstant   = "own"
	latestReading = 30.0 // s
)

var coolingShape = &form.Shape{Name: "cooling", Doc: "One reading while the winding cools.", Fields: []form.Field{
	needed("time", form.Quantity(quantity.Time), "Time since switch-off.", "20 s"),
	needed("resistance", form.Quantity(quantity.Resistance), "Resistance read.", "4.20 Ω"),
}}

// windingKind tells the resistance of a winding, and its temperature from it.
var windingKind = Kind{
	Name:  "winding",
	Title: "Winding",
	Doc: "Resistance of a winding at 20 °C and hot, from turns and wire; and the average temperature and rise of a winding from its resistance cold and hot. " +
		"The law is the material's own, or one of the zero-resistance temperatures in use.",
	Fields: []form.Field{
		materialsField,
		field("turns", form.Integer, "Turns, with mean_turn.", "420"),
		field("mean_turn", form.Quantity(quantity.Length), "Mean length of a turn.", "182 mm"),
		field("length", form.Quantity(quantity.Length), "Length of the wire, instead of turns.", "76.4 m"),
		field("diameter", form.Quantity(quantity.Length), "Diameter of the bare wire, with its limits.", "0.50 mm ± 0.005 mm"),
		field("gauge", form.Text, "American wire gauge of the bare wire.", "AWG 24"),
		field("diameter_over_enamel", form.Quantity(quantity.Length), "Diameter over the enamel; needs enamel.", "0.56 mm"),
		field("enamel", form.Quantity(quantity.Length), "Thickness of the enamel on one side.", "0.03 mm"),
		field("strands", form.Integer, "Equal wires side by side; 1 when it is missing.", "2"),
		field("winding_area", form.Quantity(quantity.Area), "Cross-section of the space that the winding fills, for the share of it that is metal.", "320 mm²"),
		field("conductivity", form.Quantity(quantity.Conductivity), "Conductivity of the wire at 20 °C, where it is not that of the record.", "97 %IACS"),
		field("class_temperature", form.Quantity(quantity.Temperature), "Temperature for the hot resistance.", "130 °C"),
		field("cold_resistance", form.Quantity(quantity.Resistance), "Resistance of the cold winding.", "3.42 Ω"),
		field("cold_temperature", form.Quantity(quantity.Temperature), "Temperature of the winding at the cold reading.", "20 °C"),
		field("hot_resistance", form.Quantity(quantity.Resistance), "Resistance at switch-off.", "4.22 Ω"),
		field("readings", form.List(form.Mapping(coolingShape)), "Readings while the winding cools, extrapolated to switch-off.", "[{time: 20 s, resistance: 4.20 Ω}]"),
		field("extrapolation", form.OneOf(exponential, logarithmic), "How the readings are extrapolated; exponential when it is missing.", logarithmic),
		field("coolant", form.Quantity(quantity.Temperature), "Temperature of the coolant or the ambient air at the end.", "23 °C"),
		field("constant", form.OneOf(ownConstant, "234.5", "235", "225", "228"), "The material's own R(T), or a zero-resistance temperature below 0 °C: 234.5 or 235 for copper, 225 or 228 for aluminium. Own when it is missing.", "235"),
	},
	Numbers: []NumberDoc{
		{"resistance_20", quantity.Resistance, "Ω", 4, "R at 20 °C", "Resistance at 20 °C: computed from the wire, or the cold reading moved to 20 °C."},
		{"resistance_hot", quantity.Resistance, "Ω", 4, "R hot", "Resistance at the class temperature; without one, the hot reading."},
		{"temperature", quantity.Temperature, "°C", 4, "average temperature", "Average temperature of the winding from its resistance."},
		{"rise", quantity.TemperatureDifference, "K", 4, "rise", "Average temperature less that of the coolant at the end."},
		{"zero_resistance_temperature", quantity.Temperature, "°C", 4, "zero resistance at", "Where the straight line through R at 20 °C reaches zero."},
		{"against_computed", quantity.Ratio, "%", 3, "read against computed", "Resistance at 20 °C from the cold reading, against the computed one."},
		{"fill", quantity.Ratio, "%", 3, "metal in the winding area", "Cross-section of the metal of all turns over the winding area."},
		{"length", quantity.Length, "m", 4, "wire", "Length of the wire."},
		{"mass", quantity.Mass, "g", 3, "bare mass", "Mass of the bare wire."},
	},
	Run: runWinding,
}

// winding is one run of winding.
type winding struct {
	*work
	wire         section // bare
	length       span
	turns        float64 // 0 when the length is given
	strands      float64
	space        span // m², unknown when not given
	conductivity span
	class        float64 // K, NaN when not asked
	r1, t1       span
	r2           span
	readings     []reading
	fitted       cooled // the exponential through them, the same for every material
	unfit        string // why there is none
	coolant      span
	constant     string
}

type reading struct{ t, r float64 }

func runWinding(w *work) {
	w.out.Cautions = []string{CautionNotApproval, CautionHot, CautionInductive, CautionIsolate, CautionProtective, CautionCodes}
	g := &winding{work: w}
	g.read()
	records := w.records("materials")
	if w.failed {
		return
	}
	if len(g.readings) > 0 && g.text("extrapolation", exponential) == exponential {
		g.fitted, g.unfit = fitExponential(g.readings)
	}
	g.notes()
	var answers []*answer
	for _, r := range records {
		answers = append(answers, g.measure(r))
	}
	w.finish(answers)
	g.tables(answers)
}

// wound is a winding in one material.
type wound struct {
	g    *winding
	a    *answer
	law  law
	hot  span // R at switch-off
	from string
}

func (g *winding) measure(r *material.Record) *answer {
	a := g.about(r)
	if r.Adopted == nil {
		a.cannot("no data")
		return a
	}
	x := &wound{g: g, a: a, law: g.lawOf(r.Adopted)}
	x.tellLaw()
	computed := x.tellComputed()
	x.tellCold(computed)
	x.tellHot()
	return a
}

// tellComputed is R at 20 °C from the wire, the mass, and R at the class temperature.
func (x *wound) tellComputed() span {
	g, a := x.g, x.a
	if !g.length.known() || !g.wire.area.known() {
		return unknown()
	}
	a.tell("length", g.length)
	a.tellMass(g.wire.area.times(g.length).scale(g.strands))
	if g.space.known() {
		a.tell("fill", g.wire.area.scale(g.strands*g.turns).over(g.space))
	}
	var rho span
	if g.conductivity.known() {
		rho = g.conductivity.through(func(s float64) float64 { return 1 / s })
	} else {
		rho = a.rhoAt20()
	}
	r := rho.times(g.length).over(g.wire.area.scale(g.strands))
	a.tell("resistance_20", r)
	return r
}

// tellCold moves the cold reading to 20 °C, and holds it against the computed one.
func (x *wound) tellCold(computed span) {
	if !x.g.r1.known() {
		x.tellClass(computed)
		return
	}
	at20 := x.g.r1.over(x.law.factor(x.g.t1))
	if !at20.known() {
		x.a.cannot("the cold reading at " + quantity.CelsiusText(x.g.t1.v) + " cannot be moved to 20 °C: " + x.law.why(x.g.t1.v))
	}
	if computed.known() {
		x.a.tell("against_computed", at20.over(computed).minus(exactly(1)))
	} else {
		x.a.tell("resistance_20", at20)
		computed = at20
	}
	x.tellClass(computed)
}

func (x *wound) tellClass(at20 span) {
	if math.IsNaN(x.g.class) || !at20.known() {
		return
	}
	f := x.law.factor(exactly(x.g.class))
	if !f.known() {
		x.a.cannot(x.law.why(x.g.class))
		return
	}
	x.a.tell("resistance_hot", at20.times(f))
}

// tellHot is the average temperature and the rise.
func (x *wound) tellHot() {
	g, a := x.g, x.a
	x.hot = g.r2
	if len(g.readings) > 0 {
		c, why := x.extrapolate()
		if why != "" {
			a.cannot(why)
			return
		}
		x.hot = nominal(c.at(0))
		if g.fitted.tau == 0 { // of this material alone
			a.Tables = append(a.Tables, c.table(g.readings))
		}
		x.drawn(c)
	}
	if !x.hot.known() {
		return
	}
	if math.IsNaN(g.class) {
		a.tell("resistance_hot", x.hot)
	}
	t := x.law.temperature(x.hot.over(g.r1), g.t1)
	if !t.known() {
		a.cannot(x.law.whyNot(x.hot.v / g.r1.v))
		return
	}
	a.tell("temperature", t)
	if !g.coolant.known() {
		a.cannot("no rise without the temperature of the coolant at the end")
		return
	}
	a.tell("rise", t.minus(g.coolant))
}

// tellLaw names the zero-resistance temperature, and warns of another metal's.
func (x *wound) tellLaw() {
	zero := x.law.zero()
	if !zero.known() {
		x.a.cannot(x.law.why(twenty))
		return
	}
	x.a.tell("zero_resistance_temperature", zero)
	own := x.law.ownZero()
	if off := zero.v - own; !math.IsNaN(own) && math.Abs(off) > otherMetal {
		x.a.warn("the constant " + x.g.constant + " lies " + quantity.Fixed(math.Abs(off), 1) + quantity.NarrowSpace + "K from the material's own " + quantity.Fixed(own-quantity.ZeroCelsius, 1) + quantity.NarrowSpace + "°C: is it another metal's?")
	}
}

// otherMetal: the constants of one metal in use differ by less, those of
// copper and aluminium by more (common practice).
const otherMetal = 5.0 // K
