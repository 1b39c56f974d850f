package study

import (
	"math"

	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// substituteKind holds other materials against the one that a part was
// designed with.
var substituteKind = Kind{
	Name:  "substitute",
	Title: "Another material for a part",
	Doc: "Tells what becomes of a part when another material takes the place of its own: the resistance at the same geometry, the dimension that restores it, " +
		"change over the window, thermal EMF, service temperature, mass and cost, and which requirements still hold.",
	Fields: []form.Field{
		needed("material", form.Text, "ID of the material that the part was designed with.", "cumn12ni"),
		needed("by", form.List(form.Text), "IDs of the materials that might take its place.", "[cuni44]"),
		needed("length", form.Quantity(quantity.Length), "Length of the part.", "60 mm"),
		field("diameter", form.Quantity(quantity.Length), "Diameter of a round part.", "2 mm"),
		field("width", form.Quantity(quantity.Length), "Width of a flat part.", "20 mm"),
		field("thickness", form.Quantity(quantity.Length), "Thickness of a flat part.", "1 mm"),
		needed("free", form.OneOf("length", "width", "diameter"), "The dimension that may change to restore the resistance.", "length"),
		windowField,
		field("calibrated_at", form.Quantity(quantity.Temperature), "Temperature that changes are counted from; 20 °C when it is missing (common practice).", "23 °C"),
		field("terminal_difference", form.Quantity(quantity.TemperatureDifference), "Temperature difference between the ends.", "2 K"),
		field("drop", form.Quantity(quantity.Voltage), "Drop over the part, for the error of the thermal EMF.", "50 mV"),
		field("on", form.Date, "Day on which offers must be valid.", "2026-10-15"),
		field("currency", form.Text, "Currency of the cost; EUR when it is missing.", "EUR"),
	},
	Numbers: withChange(
		NumberDoc{"resistivity", quantity.Resistivity, "µΩ·cm", 4, "ρ", "Resistivity at the calibration temperature."},
		NumberDoc{"resistance", quantity.Resistance, "mΩ", 4, "R, same geometry", "Resistance of a part of the same geometry."},
		NumberDoc{"resistance_index", quantity.Ratio, "", 4, "R over that of the design", "The same over the resistance of the part as designed."},
		NumberDoc{"restored_dimension", quantity.Length, "mm", 4, "restored by", "The free dimension that restores the resistance."},
		NumberDoc{"emf_to_copper", quantity.EMF, "µV/K", 3, "EMF to copper", "Thermal EMF against copper."},
		NumberDoc{"emf_error", quantity.Ratio, "ppm", 3, "EMF error", "EMF of the difference between the ends over the drop."},
		NumberDoc{"service_temperature", quantity.Temperature, "°C", 4, "service to", "Highest continuous service temperature that is recorded."},
		NumberDoc{"mass", quantity.Mass, "g", 4, "mass", "Mass of the part with its resistance restored."},
		NumberDoc{"cost", quantity.Price, "EUR/piece", 4, "metal", "Cost of that mass by the best usable offer."},
	),
	Run: runSubstitute,
}

// substitution is one run of substitute.
type substitution struct {
	*work
	own               *material.Record
	length            span
	area, free        span
	lo, hi, reference float64
	prices            *costing
}

func runSubstitute(w *work) {
	w.out.Cautions = comparisonCautions
	s := &substitution{work: w}
	s.own = w.record(w.block.Get("material"))
	others := w.records("by")
	s.lo, s.hi = w.window("window")
	s.reference = w.kelvin("calibrated_at", quantity.ZeroCelsius+20, "common practice")
	s.geometry()
	if w.failed {
		return
	}
	records := append([]*material.Record{s.own}, others...)
	s.prices = &costing{work: w, baseline: s.own, currency: w.text("currency", "EUR"), on: w.text("on", "")}
	if unit, ok := quantity.FindUnit(quantity.Price, s.prices.currency+"/piece"); ok {
		w.units = map[string]quantity.Unit{"cost": unit}
	}
	s.prices.quote(records)
	var answers []*answer
	for i, r := range records {
		a := s.judge(r)
		a.rank = float64(i) // the design first, then as they were named
		answers = append(answers, a)
	}
	w.finish(answers)
	w.out.Ranking = []string{}
	s.show(answers)
}

func (s *substitution) geometry() {
	s.length, _ = s.positive("length")
	diameter, round := s.positive("diameter")
	width, byWidth := s.positive("width")
	thickness, byThickness := s.positive("thickness")
	free := s.text("free", "")
	switch {
	case round == (byWidth || byThickness) || byWidth != byThickness:
		s.fail("part-geometry", s.block, "the section of the part is not told once", "give diameter, or width and thickness")
	case free == "diameter" && !round || free == "width" && round:
		s.fail("part-geometry", s.block.Get("free"), "the part has no "+free, "free a dimension that the part has")
	case round:
		s.area = diameter.through(func(d float64) float64 { return math.Pi / 4 * d * d })
	default:
		s.area = width.times(thickness)
	}
	switch free {
	case "diameter":
		s.free = diameter
	case "width":
		s.free = width
	default:
		s.free = s.length
	}
}

// judge tells the part in one material, and holds it against what is required
// of the part.
func (s *substitution) judge(r *material.Record) *answer {
	a := s.about(r)
	if r == s.own {
		a.Size = "as designed"
	}
	if r.Adopted == nil {
		a.cannot("no data")
		return a
	}
	rho, design := rhoAt(r.Adopted, s.reference), unknown()
	if s.own.Adopted != nil {
		design = rhoAt(s.own.Adopted, s.reference)
	}
	a.tell("resistivity", rho)
	a.tell("resistance", rho.times(s.length).over(s.area))
	s.restore(a, rho, design)
	a.tellSwing(swingOf(r.Adopted, s.reference, s.lo, s.hi))
	s.emf(a)
	if p := r.Property("service_temperature"); p != nil && p.Continuous != nil {
		a.tell("service_temperature", exactly(p.Continuous.Value))
	} else {
		a.cannot("no continuous service temperature")
	}
	return a
}

// restore tells the dimension that gives the resistance of the design again,
// and the mass of such a part: the length goes with 1/ρ, the width with ρ, the
// diameter with √ρ.
func (s *substitution) restore(a *answer, rho, design span) {
	if math.IsNaN(rho.v) || math.IsNaN(design.v) {
		a.cannot("no nominal resistivity of both materials at " + quantity.CelsiusText(s.reference))
		return
	}
	index := rho.over(design)
	if a.Record == s.own {
		index = exactly(1)
	}
	a.tell("resistance_index", index)
	restored, mass := s.free, s.length.v*s.area.v
	k := rho.v / design.v
	switch s.text("free", "") {
	case "length":
		restored, mass = s.free.over(index), mass/k
	case "width":
		restored, mass = s.free.times(index), mass*k
	case "diameter":
		restored, mass = s.free.times(index.through(math.Sqrt)), mass*k
	}
	a.tell("restored_dimension", restored)
	density, ok := a.property("density")
	if !ok || math.IsNaN(density.v) {
		a.cannot("no density")
		return
	}
	a.tell("mass", nominal(mass*density.v))
	if price := s.prices.best(a.Material); !math.IsNaN(price) {
		a.tell("cost", nominal(mass*density.v*price))
	}
}

func (s *substitution) emf(a *answer) {
	emf, ok := a.property("emf_to_copper")
	if !ok {
		a.cannot("no thermal EMF to copper")
		return
	}
	a.tell("emf_to_copper", emf)
	difference, okT := s.quantity("terminal_difference")
	drop, okV := s.positive("drop")
	if okT && okV {
		a.tell("emf_error", emf.times(difference).over(drop))
	}
}

func (s *substitution) show(answers []*answer) {
	s.out.Tables = append(s.out.Tables, s.numbersTables("The part in each material, "+s.text("free", "")+" free", answers, "resistivity", "resistance", "resistance_index", "restored_dimension",
		"greatest_change", "at_temperature", "change_cold", "change_hot", "emf_to_copper", "emf_error", "service_temperature", "mass", "cost")...)
	if t, asked := s.requirementsTable(answers); asked {
		s.out.Tables = append(s.out.Tables, t)
		s.lost(answers)
	}
	s.note("A verdict here is for this part alone. Joining, temper, strength and corrosion are not compared; a permit names quantity, lot or end date.")
}

// lost says which requirements the design holds and another material does not.
func (s *substitution) lost(answers []*answer) {
	held := map[string]bool{}
	for _, r := range answers[0].Requirements {
		held[r.Name] = r.Verdict == Holds || r.Verdict == HoldsNominally
	}
	for _, a := range answers[1:] {
		text := ""
		for _, r := range a.Requirements {
			if held[r.Name] && r.Verdict != Holds && r.Verdict != HoldsNominally {
				text += ", " + inWords(r.Name) + " " + string(r.Verdict)
			}
		}
		if text != "" {
			s.note(a.Label() + " loses what the design holds: " + text[2:] + ".")
		}
	}
}
