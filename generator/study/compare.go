package study

import (
	"math"

	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// What a comparison may show.
const (
	showChange    = "change"
	showRatio     = "resistance-ratio"
	showRho       = "resistivity"
	showDeviation = "deviation"
)

// compareKind puts materials side by side over one window.
var compareKind = Kind{
	Name:  "compare",
	Title: "Comparison",
	Doc: "Puts materials side by side over one window about one reference temperature: one figure, one table of every measure, ranked. " +
		"Materials whose data end before the window does are told apart, over the part they cover.",
	Fields: []form.Field{
		materialsField,
		windowField,
		field("reference_temperature", form.Quantity(quantity.Temperature), "Temperature that changes are counted from; 20 °C when it is missing (common practice).", "20 °C"),
		field("show", form.OneOf(showChange, showRatio, showRho, showDeviation), "What the figure shows; deviation needs a baseline.", showChange),
		field("baseline", form.Text, "The material that the others are told to deviate from, in the quantity shown.", "cumn12ni"),
		field("rank_by", form.OneOf("greatest_change", "box", "resistivity"), "The number that orders the table, least first.", "greatest_change"),
	},
	Numbers: withChange(
		NumberDoc{"resistivity", quantity.Resistivity, "µΩ·cm", 4, "ρ", "Resistivity at the reference temperature."},
		NumberDoc{"slope", quantity.Coefficient1, "ppm/K", 3, "slope", "Slope at the reference temperature."},
		NumberDoc{"chord_cold", quantity.Coefficient1, "ppm/K", 3, "chord cold", "Chord from the reference temperature to the lower edge."},
		NumberDoc{"chord_hot", quantity.Coefficient1, "ppm/K", 3, "chord hot", "Chord from the reference temperature to the upper edge."},
		NumberDoc{"deviation", quantity.Ratio, "ppm", 4, "from the baseline", "Greatest deviation of R/R(reference) from that of the baseline over what both cover of the window."},
	),
	Run: runCompare,
}

// comparison is one run of compare.
type comparison struct {
	*work
	lo, hi    float64 // K
	reference float64 // K
	show      string
	rank      string
	baseline  *material.Record
}

func runCompare(w *work) {
	w.out.Cautions = comparisonCautions
	c := &comparison{work: w, show: w.text("show", showChange), rank: w.text("rank_by", "greatest_change")}
	c.lo, c.hi = w.window("window")
	c.reference = w.kelvin("reference_temperature", quantity.ZeroCelsius+20, "common practice")
	if w.has("baseline") {
		c.baseline = w.record(w.block.Get("baseline"))
	} else if c.show == showDeviation {
		w.fail("baseline-missing", w.block.Get("show"), "a deviation needs a baseline", "add baseline: with the ID of a material")
	}
	records := w.records("materials")
	if w.failed {
		return
	}
	answers := w.each(records, func(r *material.Record) []*answer { return []*answer{c.measure(r)} })
	w.finish(answers)
	c.tables(answers)
	c.chart(answers)
}

// measure fills the numbers. Over a part of the window they are told all the
// same, with the part named.
func (c *comparison) measure(r *material.Record) *answer {
	a := c.about(r)
	if r.Adopted != nil {
		a.tell("resistivity", rhoAt(r.Adopted, c.reference))
	}
	s := swingOf(r.Adopted, c.reference, c.lo, c.hi)
	a.tellSwing(s)
	if s.nominal {
		m := s.measures
		a.tell("slope", nominal(m.SlopeAtReference))
		for name, chord := range map[string]*float64{"chord_cold": m.ChordCold, "chord_hot": m.ChordHot} {
			if chord != nil {
				a.tell(name, nominal(*chord))
			}
		}
	}
	c.deviate(a)
	if n, ok := a.spans[c.rank]; ok {
		a.rank = math.Abs(n.v)
	}
	return a
}

// deviationPoints over a window: extremes between two of them are off by far
// less than what is printed.
const deviationPoints = 512

// deviate tells how far R/R(reference) lies from that of the baseline.
func (c *comparison) deviate(a *answer) {
	if c.baseline == nil || c.baseline.ID == a.Material || c.baseline.Adopted == nil || a.Record.Adopted == nil {
		return
	}
	greatest, at := 0.0, math.NaN()
	for i := range deviationPoints + 1 {
		t := c.lo + float64((c.hi-c.lo)*float64(i)/deviationPoints)
		d, ok := c.deviationAt(a.Record.Adopted, t)
		if ok && (math.IsNaN(at) || math.Abs(d) > math.Abs(greatest)) {
			greatest, at = d, t
		}
	}
	if !math.IsNaN(at) {
		a.tellAt("deviation", nominal(greatest), at)
	}
}

func (c *comparison) deviationAt(set *material.DataSet, t float64) (float64, bool) {
	there := ratioAt(set, t, c.reference)
	base := ratioAt(c.baseline.Adopted, t, c.reference)
	d := there.v/base.v - 1
	return d, !math.IsNaN(d)
}
