package study

import (
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/quantity"
)

// warnings of the trade (common practice, job D4 to D9).
func (e *element) warnings() {
	if e.l < 2*e.w {
		e.a.warn("shorter than twice its width: the current crowds, and taps off the centre line read another resistance")
	}
	if rated, ok := e.quantity("rated_current"); ok && e.current.v > rated.v*2/3 {
		e.a.warn("continuous current above two thirds of the rated current (0.44 of the rated power is common practice)")
	}
	if e.target.v < 5e-3 && !e.copperKnown {
		e.a.warn("copper between the taps is not given: each 1\u202f% of it adds " + quantity.PPMText(0.01*e.copperSlope()) + "\u202fppm/K")
	}
	e.contradiction()
}

// contradiction names the pair of requirements that no length can satisfy
// together: a width at most, which wants a short element, and a surface load
// at most, which wants a long one.
func (e *element) contradiction() {
	require := e.block.Get("require")
	width, okW := require.Get("width").Quantity()
	load, okQ := require.Get("surface_load").Quantity()
	if !okW || !okQ || !width.HasValue() || !load.HasValue() {
		return
	}
	perLength := e.rho.v / (e.strips * e.thickness.v * e.alloy) // w = perLength · L
	longest := width.Value / perLength
	// P/(2nL(w + t)) = q with w = perLength·L: a quadratic in L.
	t := e.thickness.v
	shortest := (-t + math.Sqrt(t*t+4*perLength*e.power/(2*e.strips*load.Value))) / (2 * perLength)
	if shortest > longest {
		e.a.reason("width and surface load contradict each other at this thickness: a width within " + width.Text + " needs a length of " +
			millimetres(longest) + " at most, a surface load within " + load.Text + " one of " + millimetres(shortest) + " at least; more strips, or thinner stock, would give both")
	}
}

func millimetres(x float64) string { return quantity.Number(x*1e3, 3) + quantity.NarrowSpace + "mm" }

// show makes the tables and the figure.
func (s *shunt) show(answers []*answer) {
	caption := "Elements of " + quantity.Number(s.target.v*1e6, 4) + quantity.NarrowSpace + "µΩ between the taps, for " + quantity.Number(s.current.v, 4) + quantity.NarrowSpace + "A"
	s.out.Tables = append(s.out.Tables,
		s.numbersTables(caption, answers, "width", "length", "squares", "resistance", "trim_aim", "current_density", "power", "surface_load")...)
	s.out.Tables = append(s.out.Tables,
		s.numbersTables("Temperature and error of the same elements", answers, "terminal_temperature", "element_temperature", "rise_end_cooled_max", "rise_adiabatic", "derated_current",
			"greatest_change", "at_temperature", "alpha_effective", "beta_effective", "copper_share_max", "emf_error_full", "emf_error_small", "budget_worst", "budget_rss")...)
	if t, asked := s.requirementsTable(answers); asked {
		s.out.Tables = append(s.out.Tables, t)
	}
	s.assumptions()
	s.chart(answers)
	held := false
	for _, a := range answers {
		held = held || a.Verdict == Holds || a.Verdict == HoldsNominally || a.Verdict == NotAsked
	}
	if !held {
		s.note("No material and thickness given here holds every requirement. " + nearest(answers) + s.remedy(answers))
	}
}

// remedy says what would give a solution: how a load or a density that is too
// high follows from the length.
func (s *shunt) remedy(answers []*answer) string {
	if !s.has("length") {
		return ""
	}
	best, name := 0.0, ""
	for _, a := range answers {
		for _, r := range a.Requirements {
			if r.Worst == nil || r.Margin == nil || *r.Margin >= 0 {
				continue
			}
			factor := *r.Worst / r.Limit
			switch r.Name {
			case "surface_load":
				factor = math.Sqrt(factor)
			case "current_density":
			default:
				continue
			}
			if best == 0 || factor < best {
				best, name = factor, r.Name
			}
		}
	}
	if best == 0 {
		return ""
	}
	return " For the same resistance a length near " + millimetres(s.length.v*best) + " would bring the " + inWords(name) + " within its bound."
}

func (s *shunt) assumptions() {
	s.note("ρ and R are those of the calibration temperature, " + quantity.CelsiusText(s.reference) + "; the length counts between the potential taps.")
	switch {
	case s.has("ends"):
		s.note("Cooling through the ends alone: the hottest point lies V²/(8kρ) above them and the mean two thirds of that. Faces that cool too make it cooler; unequal ends move the hot spot.")
	case s.has("film"):
		s.note("Cooling by air over all faces and edges of the strips; nothing through the ends.")
	case s.has("thermal_resistance"):
		s.note("Cooling by one thermal resistance from the mean of the element to the surroundings.")
	}
	s.note("Copper between the taps as standard annealed copper, 3.93e-3 /K at 20 °C (IEC 60028), at the temperature of the element.")
	s.note("Left out: crowding of the current at the joints, steady heating by neighbouring parts, and drift by itself.")
}

// chart draws the change of the whole between the taps, the first thickness of
// each material, to the hottest element.
func (s *shunt) chart(answers []*answer) {
	unit := changeUnit(answers)
	chart := Chart{Title: s.out.Title, XTitle: "temperature of the element in °C", YTitle: "change of R from " + quantity.CelsiusText(s.reference) + " in " + unit,
		Description: "Change of R between the taps, alloy and copper together, from the lowest ambient to the hottest element."}
	drawn := map[string]bool{}
	convert := perUnit(unit)
	for _, a := range answers {
		set := a.Record.Adopted
		if drawn[a.Material] || set == nil || !set.Ratio.HasNominal() {
			continue
		}
		alloy, ok := curve.Ratio(set.Ratio.Nominal, s.reference)
		if !ok {
			continue
		}
		drawn[a.Material] = true
		whole := mixed(alloy, s.copper.v, s.copperSlope(), s.reference)
		hi := s.hi
		if t, ok := a.spans["element_temperature"]; ok {
			hi = math.Max(hi, t.v)
		}
		lo, hi := max(s.lo, set.Valid.Lo), min(hi, set.Valid.Hi)
		line := Series{Label: a.Record.ShortName()}
		for i := range seriesPoints {
			t := min(lo+float64((hi-lo)*float64(i)/(seriesPoints-1)), hi)
			if v, ok := whole.At(t); ok {
				line.X, line.Y = append(line.X, t-quantity.ZeroCelsius), append(line.Y, convert(v))
			}
		}
		if len(line.X) > 1 {
			chart.Series = append(chart.Series, line)
		}
	}
	if len(chart.Series) > 0 {
		s.out.Charts = append(s.out.Charts, chart)
	}
}
