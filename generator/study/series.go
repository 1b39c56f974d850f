package study

import (
	"math"
	"strconv"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

var partShape = &form.Shape{Name: "part", Doc: "One part of a series.", Fields: []form.Field{
	field("name", form.Text, "What the part is.", "terminals"),
	needed("material", form.Text, "ID of the record.", "copper-annealed"),
	field("resistance", form.Quantity(quantity.Resistance), "Resistance at the reference temperature, instead of dimensions.", "240 µΩ"),
	field("length", form.Quantity(quantity.Length), "Length of the part.", "60 mm"),
	field("area", form.Quantity(quantity.Area), "Cross-section.", "200 mm²"),
	field("diameter", form.Quantity(quantity.Length), "Diameter of a round part.", "2 mm"),
	field("thickness", form.Quantity(quantity.Length), "Thickness of a flat part.", "5 mm"),
	field("width", form.Quantity(quantity.Length), "Width of a flat part.", "40 mm"),
	field("count", form.Integer, "How many equal parts; 1 when it is missing.", "2"),
}}

// seriesKind adds dissimilar parts up, and tells what each contributes.
var seriesKind = Kind{
	Name:  "series",
	Title: "Parts in series",
	Doc: "Total resistance of dissimilar parts in series, the effective coefficients, and the share of each part over a window: alloy and copper terminals, sections of a bus bar, a coil with its swamping resistor. " +
		"All parts have one temperature.",
	Fields: []form.Field{
		needed("parts", form.List(form.Mapping(partShape)), "The parts, in their order.", "[{material: cumn12ni, resistance: 250 µΩ}, {material: copper-annealed, resistance: 5 µΩ}]"),
		windowField,
		field("reference_temperature", form.Quantity(quantity.Temperature), "Temperature of the resistances, and that changes are counted from; 20 °C when it is missing (common practice).", "20 °C"),
	},
	Numbers: withChange(
		NumberDoc{"resistance", quantity.Resistance, "mΩ", 4, "total R", "Total resistance at the reference temperature."},
		NumberDoc{"alpha_effective", quantity.Coefficient1, "ppm/K", 3, "effective α", "Sum of share × α, all at the reference temperature."},
		NumberDoc{"beta_effective", quantity.Coefficient2, "ppm/K²", 3, "effective β", "Sum of share × β, all at the reference temperature."},
	),
	Run: runSeries,
}

// series is one run of series.
type series struct {
	*work
	lo, hi, reference float64 // K
	parts             []part
}

// part is one part: its resistance at the reference temperature and its curve.
type part struct {
	name   string
	node   *form.Node
	record *material.Record
	r      span
}

func runSeries(w *work) {
	w.out.Cautions = []string{CautionNotApproval, CautionHot, CautionIsolate, CautionBattery, CautionProtective, CautionCodes}
	s := &series{work: w}
	s.lo, s.hi = w.window("window")
	s.reference = w.kelvin("reference_temperature", twenty, "common practice")
	for i, n := range w.block.Get("parts").List() {
		s.read(n, i)
	}
	if len(s.parts) == 0 && !w.failed {
		w.fail("parameter-missing", w.block.Get("parts"), "there are no parts", "write one part or more")
	}
	if w.failed {
		return
	}
	w.note("All parts have the same temperature. A joint's own resistance is in the numbers only where it is given as a part.")
	a := s.aboutAll()
	total := s.measure(a)
	w.finish([]*answer{a})
	s.show(a, total)
}

// read takes one part; R follows from dimensions where it is not given.
func (s *series) read(n *form.Node, i int) {
	w := &work{lib: s.lib, block: n, report: s.report, kind: s.kind, out: s.out}
	defer func() { s.failed = s.failed || w.failed }()
	p := part{node: n, record: w.record(n.Get("material"))}
	if p.record == nil {
		return
	}
	p.name = w.text("name", p.record.ShortName())
	r, hasR := w.positive("resistance")
	length, hasLength := w.positive("length")
	area, hasArea := w.partArea()
	switch {
	case hasR && (hasLength || hasArea):
		w.contradict("resistance", firstOf(w, "length", "area", "diameter", "thickness", "width"), "both tell the resistance of the part")
	case hasR:
		p.r = r
	case hasLength && hasArea:
		p.r = unknown()
		if p.record.Adopted != nil {
			p.r = rhoAt(p.record.Adopted, s.reference).times(length).over(area)
		}
	default:
		w.fail("parameter-missing", n, "part "+strconv.Itoa(i+1)+", "+p.name+", has no resistance", "add resistance, or length with area, diameter, or thickness and width")
	}
	p.r = p.r.scale(w.count("count", 1, 1))
	s.parts = append(s.parts, p)
}

func (w *work) partArea() (span, bool) {
	a, hasArea := w.positive("area")
	d, hasDiameter := w.positive("diameter")
	t, thick := w.positive("thickness")
	b, wide := w.positive("width")
	switch {
	case hasArea && (hasDiameter || thick || wide):
		w.contradict("area", firstOf(w, "diameter", "thickness", "width"), "both tell the cross-section")
	case hasDiameter && (thick || wide):
		w.contradict("diameter", firstOf(w, "thickness", "width"), "a part is round or flat")
	case thick != wide:
		w.fail("parameter-missing", w.block, "the cross-section is open", "add thickness and width together")
	case hasDiameter:
		return round(d).area, true
	case thick:
		return t.times(b), true
	}
	return a, hasArea
}

// aboutAll begins the one answer; about several records it names none.
func (s *series) aboutAll() *answer {
	var all *answer
	ids := map[string]bool{}
	for _, p := range s.parts {
		if ids[p.record.ID] {
			continue
		}
		ids[p.record.ID] = true
		one := s.about(p.record)
		for i, text := range one.Warnings {
			one.Warnings[i] = p.record.ShortName() + ": " + text
		}
		if all == nil {
			all = one
			continue
		}
		all.Material, all.Record = "", nil
		all.Evidence = append(all.Evidence, one.Evidence...)
		all.Warnings = append(all.Warnings, one.Warnings...)
	}
	all.Name = s.out.Title
	return all
}

// measure adds the parts up and names the numbers.
func (s *series) measure(a *answer) *material.DataSet {
	total := exactly(0)
	for _, p := range s.parts {
		set := p.record.Adopted
		switch {
		case set == nil:
			a.cannot(p.name + ": no data")
		case !p.r.known():
			a.cannot(p.name + ": no resistivity at " + quantity.CelsiusText(s.reference))
		case set.Ratio == nil || !set.Ratio.HasNominal():
			a.cannot(p.name + ": no nominal coefficient")
		case !set.Valid.Contains(s.reference):
			a.cannot(p.name + ": " + quantity.CelsiusText(s.reference) + " lies outside the valid range " + windowText(set.Valid.Lo, set.Valid.Hi))
		default:
			total = total.plus(p.r)
			continue
		}
		total = unknown()
	}
	a.tell("resistance", total)
	if !total.known() || len(a.Reasons) > 0 {
		return nil
	}
	sum := s.sum()
	a.tellSwing(swingOf(sum, s.reference, s.lo, s.hi))
	if !(sum.Valid.Lo < sum.Valid.Hi) {
		return nil
	}
	s.coefficients(a, sum)
	return sum
}

// coefficients are those of the sum at the reference temperature, which are
// the sums of share × coefficient.
func (s *series) coefficients(a *answer, sum *material.DataSet) {
	alpha, beta := nominal(math.NaN()), nominal(math.NaN())
	alpha.v, beta.v = constants(sum.Ratio.Nominal, s.reference)
	alpha.lo, alpha.hi, beta.lo, beta.hi = alpha.v, alpha.v, beta.v, beta.v
	if sum.Ratio.Limits != nil {
		alpha.banded, beta.banded = true, true
		for _, c := range sum.Ratio.Limits.Corners {
			x, y := constants(c, s.reference)
			alpha.lo, alpha.hi = math.Min(alpha.lo, x), math.Max(alpha.hi, x)
			beta.lo, beta.hi = math.Min(beta.lo, y), math.Max(beta.hi, y)
		}
	}
	a.tell("alpha_effective", alpha)
	if sum.Ratio.Nominal.FromTable {
		a.cannot("no effective β: a part is told by a table")
		return
	}
	a.tell("beta_effective", beta)
}

// constants are α = p′/p and β = p″/2p at t.
func constants(c curve.Curve, t float64) (alpha, beta float64) {
	at, _ := c.At(t)
	slope, _ := c.Slope(t)
	for _, g := range c.Segments {
		if t >= g.From-material.Slack && t <= g.To+material.Slack {
			return slope / at, (g.C[2] + float64(3*g.C[3]*(t-g.Centre))) / at
		}
	}
	return math.NaN(), math.NaN()
}
