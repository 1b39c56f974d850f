package study

import (
	"math"

	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// shuntKind sizes a shunt from sheet or strip and tells its error budget.
var shuntKind = Kind{
	Name:  "shunt",
	Title: "Shunt",
	Doc: "Sizes a shunt element from strip for each material and thickness: width, length, load, element temperature, change over the window widened by its own heat, " +
		"copper between the taps, thermal EMF, error budget, fault current, and where to aim when cutting only raises R.",
	Fields: []form.Field{
		materialsField,
		needed("current", form.Quantity(quantity.Current), "Continuous current, full scale.", "200 A"),
		field("rated_current", form.Quantity(quantity.Current), "Current that the part is sold for; continuous use above two thirds of it is warned of (common practice).", "300 A"),
		field("smallest_current", form.Quantity(quantity.Current), "Smallest current that must be measured.", "2 A"),
		field("peak_current", form.Quantity(quantity.Current), "Peak or fault current.", "2 kA"),
		field("peak_time", form.Quantity(quantity.Time), "How long the peak lasts.", "100 ms"),
		field("supply", form.OneOf("direct", "alternating"), "Kind of current; direct when it is missing.", "direct"),
		field("resistance", form.Quantity(quantity.Resistance), "Resistance between the potential taps.", "250 µΩ"),
		field("drop", form.Quantity(quantity.Voltage), "Drop at full scale, instead of the resistance.", "50 mV"),
		needed("thickness", form.Either(form.Quantity(quantity.Length), form.List(form.Quantity(quantity.Length))), "Thickness of the stock, one or several.", "[1 mm ± 0.02 mm, 2 mm]"),
		field("length", form.Quantity(quantity.Length), "Length between the potential taps.", "20 mm"),
		field("width", form.Quantity(quantity.Length), "Width of each strip, instead of the length.", "35 mm"),
		field("width_tolerance", form.Quantity(quantity.Ratio), "± of the width as cut.", "0.5 %"),
		field("strips", form.Integer, "Parallel strips; 1 when it is missing.", "2"),
		needed("ambient", form.Range(quantity.Temperature), "Temperature of the surroundings, and of the ends at no current.", "-40 °C to 60 °C"),
		field("calibrated_at", form.Quantity(quantity.Temperature), "Temperature at which the finished shunt is measured; 23 °C when it is missing (common practice).", "23 °C"),
		field("ends", form.Quantity(quantity.Temperature), "Temperature of the ends at the continuous current: cooling through the ends alone.", "70 °C"),
		field("film", form.Quantity(quantity.FilmCoefficient), "Film coefficient of cooling by air alone, over all faces of the strips.", "10 W/(m²·K)"),
		field("thermal_resistance", form.Quantity(quantity.ThermalResistance), "Thermal resistance from the element to the surroundings.", "2 K/W"),
		field("copper_share", form.Quantity(quantity.Ratio), "Share of copper in the resistance between the taps.", "1 %"),
		field("terminal_difference", form.Quantity(quantity.TemperatureDifference), "Temperature difference between the two ends.", "2 K"),
		field("tolerance", form.Quantity(quantity.Ratio), "What calibration leaves of the initial error.", "0.02 %"),
		field("drift", form.Quantity(quantity.Ratio), "Allowance for drift over the life.", "0.05 %"),
		field("offset", form.Quantity(quantity.Voltage), "Offset of the instrument.", "5 µV"),
	},
	Numbers: withChange(
		NumberDoc{"resistance", quantity.Resistance, "µΩ", 4, "R as cut", "Resistance of the element as cut to nominal size, over the limits of ρ, thickness and width."},
		NumberDoc{"width", quantity.Length, "mm", 3, "width", "Width of each strip for the resistance wanted."},
		NumberDoc{"length", quantity.Length, "mm", 3, "length", "Length between the potential taps."},
		NumberDoc{"squares", quantity.Ratio, "", 3, "squares", "Length over width."},
		NumberDoc{"power", quantity.Power, "W", 3, "power", "Power at the continuous current."},
		NumberDoc{"current_density", quantity.CurrentDensity, "A/mm²", 3, "current density", "Continuous current over the section of all strips."},
		NumberDoc{"surface_load", quantity.SurfaceLoad, "W/cm²", 3, "surface load", "Power over the faces and edges, P/(2nL(w+t))."},
		NumberDoc{"element_temperature", quantity.Temperature, "°C", 3, "element", "Mean temperature of the element at the continuous current, at the upper edge of the ambient."},
		NumberDoc{"terminal_temperature", quantity.Temperature, "°C", 3, "ends", "Temperature of the ends at the continuous current."},
		NumberDoc{"rise_end_cooled_max", quantity.TemperatureDifference, "K", 3, "peak above the ends", "Hottest point above the ends when only the ends cool, V²/(8kρ)."},
		NumberDoc{"rise_adiabatic", quantity.TemperatureDifference, "K", 3, "rise of the peak", "Rise during the peak with nothing carried off, J²ρτ/(δc)."},
		NumberDoc{"alpha_effective", quantity.Coefficient1, "ppm/K", 3, "α with copper", "Slope of the whole between the taps at the calibration temperature."},
		NumberDoc{"beta_effective", quantity.Coefficient2, "ppm/K²", 3, "β with copper", "Half the second derivative of the whole there."},
		NumberDoc{"copper_share_max", quantity.Ratio, "%", 2, "copper at most", "Greatest share of copper that keeps the required greatest change."},
		NumberDoc{"emf_error_full", quantity.Ratio, "ppm", 3, "EMF, full scale", "Thermal EMF of the temperature difference of the ends, over the drop at full scale."},
		NumberDoc{"emf_error_small", quantity.Ratio, "ppm", 3, "EMF, smallest", "The same over the drop at the smallest current."},
		NumberDoc{"budget_worst", quantity.Ratio, "ppm", 3, "budget, worst", "Worst case of all terms at full scale, signs kept."},
		NumberDoc{"budget_rss", quantity.Ratio, "ppm", 3, "budget, likely", "Change with temperature plus the root of the sum of squares of the others, at full scale."},
		NumberDoc{"trim_aim", quantity.Resistance, "µΩ", 4, "aim", "Resistance to aim at so that the highest piece is still at the target; cutting only raises R."},
		NumberDoc{"derated_current", quantity.Current, "A", 3, "derated to", "Continuous current that keeps the element at its highest service temperature."},
	),
	Run: runShunt,
}

var shuntFindings = []place.Kind{
	{
		Code: "shunt-geometry", Severity: place.Error, Title: "A shunt whose geometry is not told once",
		Explanation: "The resistance wanted, or the drop at the current, and either the length or the width determine an element of a given thickness.",
		Trigger:     triggerFence("study: shunt", "materials: [copper]\ncurrent: 200 A\nresistance: 250 µΩ\nthickness: 1 mm\nambient: 0 °C to 60 °C"),
		Mend:        "give resistance or drop, and length or width",
	},
	{
		Code: "value-not-positive", Severity: place.Error, Title: "A parameter of a study that is not above zero",
		Explanation: "Currents, voltages, powers, resistances and lengths of a study are magnitudes.",
		Trigger:     triggerFence("study: shunt", "materials: [copper]\ncurrent: -200 A\nresistance: 250 µΩ\nthickness: [1 mm]\nlength: 20 mm\nambient: 0 °C to 60 °C"),
		Mend:        "write a value above zero",
	},
}

// shunt is one run of the study; SI throughout.
type shunt struct {
	*work
	current, target   span
	thicknesses       []quantity.Quantity
	length, width     span
	strips            float64
	lo, hi, reference float64 // ambient and calibration, K
	copper            span
	copperKnown       bool
	widthTolerance    float64
}

func runShunt(w *work) {
	w.out.Cautions = []string{CautionNotApproval, CautionHot, CautionBattery, CautionIsolate, CautionProtective, CautionCodes}
	s := &shunt{work: w, strips: 1, copper: exactly(0)}
	s.read()
	records := w.records("materials")
	if w.failed {
		return
	}
	answers := w.each(records, s.sizes)
	w.order(answers)
	s.writeBudgets(answers)
	w.finish(answers)
	s.show(answers)
}

// read checks the parameters.
func (s *shunt) read() {
	s.current, _ = s.positive("current")
	for _, key := range []string{"rated_current", "smallest_current", "peak_current", "peak_time", "film", "thermal_resistance"} {
		s.positive(key)
	}
	s.lo, s.hi = s.window("ambient")
	s.reference = s.kelvin("calibrated_at", quantity.ZeroCelsius+23, "common practice")
	n := s.block.Get("thickness")
	list := n.List()
	if len(list) == 0 {
		list = []*form.Node{n}
	}
	for _, e := range list {
		if q, ok := e.Quantity(); ok && q.HasValue() && q.Value > 0 {
			s.thicknesses = append(s.thicknesses, q)
		} else {
			s.fail("value-not-positive", e, "the thickness "+quote(e.Text())+" is not above zero", "write a value above zero")
		}
	}
	if k, ok := s.block.Get("strips").Int(); ok {
		if s.strips = float64(k); k < 1 {
			s.fail("value-not-positive", s.block.Get("strips"), "a shunt needs one strip at least", "write 1 or more")
		}
	}
	s.copper, s.copperKnown = s.quantity("copper_share")
	if !s.copperKnown {
		s.copper = exactly(0)
	}
	if q, ok := s.quantity("width_tolerance"); ok {
		s.widthTolerance = math.Abs(q.hi)
	}
	s.geometry()
}

func (s *shunt) geometry() {
	resistance, byR := s.positive("resistance")
	drop, byDrop := s.positive("drop")
	s.length, _ = s.positive("length")
	s.width, _ = s.positive("width")
	switch {
	case byR == byDrop:
		s.fail("shunt-geometry", s.block, "either resistance or drop tells what the shunt must be", "give one of the two")
	case s.has("length") == s.has("width"):
		s.fail("shunt-geometry", s.block, "either length or width is given, and the other is computed", "give one of the two")
	}
	if byDrop {
		resistance = drop.over(s.current)
	}
	s.target = resistance
}

// sizes is one material in every thickness.
func (s *shunt) sizes(r *material.Record) []*answer {
	var list []*answer
	changes := map[float64]totalChange{}
	for _, t := range s.thicknesses {
		list = append(list, s.size(r, t, changes))
	}
	return list
}

func (s *shunt) size(r *material.Record, t quantity.Quantity, changes map[float64]totalChange) *answer {
	a := s.about(r)
	a.Size = t.Text
	set := r.Adopted
	if set == nil || set.Rho == nil || set.Ratio == nil {
		a.cannot("no resistivity with a coefficient")
		return a
	}
	rho := rhoAt(set, s.reference)
	if !rho.known() || math.IsNaN(rho.v) {
		a.cannot("no nominal resistivity at " + quantity.CelsiusText(s.reference))
		return a
	}
	e := &element{shunt: s, a: a, set: set, rho: rho, thickness: given(t), changes: changes}
	e.dimensions()
	e.heat()
	e.change()
	e.emf()
	e.peak()
	e.derate()
	e.budget()
	e.warnings()
	if g, ok := a.spans["greatest_change"]; ok {
		a.rank = math.Abs(g.v)
	}
	return a
}

// An element is one strip of one material and thickness.
type element struct {
	*shunt
	a         *answer
	set       *material.DataSet
	rho       span // Ω·m at the calibration temperature
	thickness span
	alloy     float64 // target resistance of the alloy alone, Ω
	w, l      float64 // nominal size, m
	power     float64
	hot       float64                 // K, mean element temperature at full current; NaN unknown
	changes   map[float64]totalChange // of the material, by the upper edge of the window
}

// dimensions makes R of the alloy from ρ, thickness, length and width:
//
//	w = ρL/(n·t·R),  L = R·n·w·t/ρ
//
// with the copper's share taken off. ρ and R are those of the calibration
// temperature.
func (e *element) dimensions() {
	a := e.a
	e.alloy = e.target.v * (1 - e.copper.v)
	part := e.target.times(exactly(1).minus(e.copper))
	width, length := e.width, e.length
	if e.has("length") {
		width = e.rho.times(length).over(part.times(e.thickness).scale(e.strips))
	} else {
		length = part.times(e.thickness).times(width).scale(e.strips).over(e.rho)
	}
	e.w, e.l = width.v, length.v
	a.tell("width", width)
	a.tell("length", length)
	a.tell("squares", exactly(e.l/e.w))
	current := e.current
	a.tell("current_density", current.over(width.times(e.thickness).scale(e.strips)))
	power := current.times(current).times(e.target)
	e.power = current.v * current.v * e.target.v
	a.tell("power", power)
	surface := length.times(width.plus(e.thickness)).scale(2 * e.strips)
	a.tell("surface_load", power.over(surface))
	e.asCut()
}

// asCut is the resistance of a piece cut to nominal size, over the limits of
// ρ, thickness and width, and where to aim when cutting only raises R:
//
//	R_aim = R_target/[(1 + a_ρ)/((1 − a_t)(1 − a_w))]
func (e *element) asCut() {
	width := span{v: e.w, lo: e.w * (1 - e.widthTolerance), hi: e.w * (1 + e.widthTolerance), banded: true, sure: math.NaN()}
	cut := e.rho.scale(e.l).over(width.times(e.thickness).scale(e.strips)).scale(1 / (1 - e.copper.v))
	e.a.tell("resistance", cut)
	if cut.wide() {
		e.a.tell("trim_aim", exactly(e.target.v*e.target.v/cut.hi))
	}
}
