package study

import (
	"math"

	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// The decision rules of JCGM 106, clause 8, in words.
const (
	ruleSimple      = "simple"
	ruleGuarded     = "guarded"
	ruleConditional = "conditional"
)

// acceptanceKind is a card for incoming inspection.
var acceptanceKind = Kind{
	Name:  "acceptance",
	Title: "Incoming inspection",
	Doc: "Makes a card for incoming inspection: limits at 20 °C moved to the temperatures of the bench, acceptance limits under a decision rule chosen beforehand, " +
		"and, for readings, the value at 20 °C, its zone and its agreement with the supplier's value.",
	Fields: []form.Field{
		needed("material", form.Text, "ID of the record.", "cumn12ni"),
		field("limits", form.Quantity(quantity.ResistancePerLength, quantity.Resistance, quantity.Resistivity), "Limits as ordered, at the temperature of the order; computed from the record's ρ and the dimensions when they are missing.", "3.42 Ω/m ± 5 %"),
		field("diameter", form.Quantity(quantity.Length), "Diameter of a wire with its limits.", "0.40 mm ± 0.008 mm"),
		field("width", form.Quantity(quantity.Length), "Width of a strip with its limits.", "10 mm ± 0.05 mm"),
		field("thickness", form.Quantity(quantity.Length), "Thickness of a strip with its limits.", "1 mm ± 0.02 mm"),
		field("length", form.Quantity(quantity.Length), "Length of the piece, when R of a piece is judged.", "1 m ± 1 mm"),
		field("ordered_at", form.Quantity(quantity.Temperature), "Temperature that the limits hold at; 20 °C when it is missing (common practice).", "20 °C"),
		field("bench", form.Range(quantity.Temperature), "Temperatures of the bench; 15 °C to 30 °C when it is missing.", "15 °C to 30 °C"),
		field("rule", form.OneOf(ruleSimple, ruleGuarded, ruleConditional), "Decision rule, chosen before any reading: simple acceptance, guarded by U, or conditional zones.", ruleGuarded),
		field("uncertainty", form.Quantity(quantity.Ratio), "Expanded uncertainty (k = 2) of a reading, relative, without that of the temperature.", "0.5 %"),
		field("temperature_uncertainty", form.Quantity(quantity.TemperatureDifference), "Expanded uncertainty (k = 2) of the temperature of the piece.", "0.5 K"),
		field("readings", form.List(form.Mapping(readingShape)), "Readings to judge.", "[{lot: A1, forward: 3.441 Ω/m, reverse: 3.439 Ω/m, temperature: 23.4 °C}]"),
	},
	Numbers: []NumberDoc{
		{"en", quantity.Ratio, "", 2, "E_n", "Difference from the supplier's value over the root of both squared uncertainties; above 1 the two disagree."},
		{"probability", quantity.Ratio, "%", 3, "probability within limits", "Probability that the true value lies within the limits (JCGM 106, clause 7), for a normal distribution."},
	},
	Run: runAcceptance,
}

var readingShape = &form.Shape{Name: "readings", Doc: "One reading of one lot.", Fields: []form.Field{
	{Key: "lot", Required: true, Is: form.Text, Doc: "Lot or heat number.", Example: "A1"},
	{Key: "forward", Required: true, Is: form.Quantity(quantity.ResistancePerLength, quantity.Resistance, quantity.Resistivity), Doc: "Reading.", Example: "3.441 Ω/m"},
	{Key: "reverse", Is: form.Quantity(quantity.ResistancePerLength, quantity.Resistance, quantity.Resistivity), Doc: "Reading with the current reversed.", Example: "3.439 Ω/m"},
	{Key: "temperature", Required: true, Is: form.Quantity(quantity.Temperature), Doc: "Temperature of the piece.", Example: "23.4 °C"},
	{Key: "uncertainty", Is: form.Quantity(quantity.Ratio), Doc: "Expanded uncertainty (k = 2) of this reading, when it is another than the card's.", Example: "0.4 %"},
	{Key: "supplier", Is: form.Quantity(quantity.ResistancePerLength, quantity.Resistance, quantity.Resistivity), Doc: "The supplier's value at the temperature of the order.", Example: "3.43 Ω/m"},
	{Key: "supplier_uncertainty", Is: form.Quantity(quantity.Ratio), Doc: "Its expanded uncertainty (k = 2).", Example: "0.5 %"},
}}

var acceptanceFindings = []place.Kind{
	{
		Code: "decision-rule-missing", Severity: place.Error, Title: "No decision rule was chosen",
		Explanation: "A rule chosen after seeing the number is none. simple accepts up to the limit (up to half of the pieces at it may be bad), guarded keeps U inside it, conditional names four zones.",
		Trigger:     triggerFence("study: acceptance", "material: copper\nlimits: 1 Ω/m ± 5 %\nuncertainty: 0.5 %"),
		Mend:        "add rule: simple, guarded or conditional",
	},
	{
		Code: "reading-of-another-kind", Severity: place.Error, Title: "A reading is not of what the limits judge",
		Explanation: "Resistance of a piece, resistance per length and resistivity are three quantities.",
		Trigger:     triggerFence("study: acceptance", "material: copper\nlimits: 1 Ω/m ± 5 %\nrule: simple\nreadings: [{lot: A, forward: 1 Ω, temperature: 23 °C}]"),
		Mend:        "write the reading in the unit of the limits",
	},
}

// A card is one run of the study; SI throughout.
type card struct {
	*work
	record     *material.Record
	set        *material.DataSet
	unit       quantity.Unit // of the quantity judged
	limits     span          // at the temperature of the order
	ordered    float64       // K
	lo, hi     float64       // bench, K
	rule       string
	u, ut      float64 // expanded: relative, and of the temperature in K
	slope      float64 // |α| at the order's temperature, 1/K
	cannotSay  string
	guard      float64 // relative to the nominal value
	acceptable span
}

func runAcceptance(w *work) {
	w.out.Cautions = []string{CautionNotApproval, CautionIsolate, CautionInductive, CautionCodes}
	c := &card{work: w, rule: w.text("rule", "")}
	c.record = w.record(w.block.Get("material"))
	if !w.has("rule") {
		w.fail("decision-rule-missing", w.block, "no decision rule is given", "add rule: simple, guarded or conditional, before any reading")
	}
	c.ordered = w.kelvin("ordered_at", quantity.ZeroCelsius+20, "common practice")
	c.lo, c.hi = quantity.ZeroCelsius+15, quantity.ZeroCelsius+30
	if w.has("bench") {
		c.lo, c.hi = w.window("bench")
	}
	if w.failed {
		return
	}
	c.set = c.record.Adopted
	c.uncertainties()
	c.findLimits()
	c.accept()
	answers := c.readings()
	if w.failed {
		return
	}
	w.finish(answers)
	w.out.Ranking = []string{} // lots stand in the order of the readings
	c.show(answers)
}

func (c *card) uncertainties() {
	if q, ok := c.quantity("uncertainty"); ok {
		c.u = math.Abs(q.hi)
	} else {
		c.u = math.NaN()
	}
	if q, ok := c.quantity("temperature_uncertainty"); ok {
		c.ut = math.Abs(q.hi)
	}
	if c.set != nil && c.set.Ratio.HasNominal() {
		if d, ok := c.set.Ratio.Nominal.Slope(c.ordered); ok {
			if at, ok := c.set.Ratio.Nominal.At(c.ordered); ok {
				c.slope = math.Abs(d / at)
			}
		}
	}
}

// findLimits takes the limits as ordered, or makes them of ρ and dimensions.
func (c *card) findLimits() {
	if q, ok := c.block.Get("limits").Quantity(); ok {
		c.unit = q.Unit
		c.limits = given(q)
		if q.Limits == nil {
			c.cannotSay = "the limits “" + q.Text + "” have no ±"
		}
		return
	}
	if c.set == nil || c.set.Rho == nil {
		c.cannotSay = "no resistivity"
		return
	}
	rho := rhoAt(c.set, c.ordered)
	if !rho.banded {
		c.cannotSay = "no limits of the resistivity"
	}
	section, shaped := c.section()
	length, piece := c.quantity("length")
	switch {
	case piece && !shaped:
		c.cannotSay = "no section: give diameter, or width and thickness"
	case piece:
		c.limits = rho.times(length).over(section)
		c.unit, _ = quantity.FindUnit(quantity.Resistance, fitting(c.limits.v, []string{"µΩ", "mΩ", "Ω"}, []float64{1e-3, 1, math.Inf(1)}))
	case shaped:
		c.limits = rho.over(section)
		c.unit, _ = quantity.FindUnit(quantity.ResistancePerLength, fitting(c.limits.v, []string{"mΩ/m", "Ω/m"}, []float64{1, math.Inf(1)}))
	default:
		c.limits, c.unit = rho, c.houseResistivity()
	}
}

func fitting(si float64, units []string, below []float64) string {
	for i, u := range units {
		if si < below[i] {
			return u
		}
	}
	return units[len(units)-1]
}

func (c *card) section() (span, bool) {
	if d, ok := c.positive("diameter"); ok {
		return d.times(d).scale(math.Pi / 4).tight(d.through(func(x float64) float64 { return math.Pi / 4 * x * x })), true
	}
	w, okW := c.positive("width")
	t, okT := c.positive("thickness")
	return w.times(t), okW && okT
}

// tight takes the band of b: where the same value stands twice in a product,
// the corners of a product of two would be too wide.
func (a span) tight(b span) span {
	a.lo, a.hi = b.lo, b.hi
	return a
}

// accept makes the acceptance limits under the rule: AL = TL ∓ g, with
// g = U for guarded acceptance (JCGM 106, clause 8.3), U being that of the
// reading and of the temperature together, √(U² + (α·U_t)²).
func (c *card) accept() {
	c.acceptable = c.limits
	if c.cannotSay != "" {
		return
	}
	half := (c.limits.hi - c.limits.lo) / 2 / c.nominal()
	u := c.expanded(c.u)
	switch {
	case math.IsNaN(u) && c.rule == ruleSimple:
		c.note("No uncertainty is given: nobody can say how likely a piece at the limit is good.")
		return
	case math.IsNaN(u):
		c.cannotSay = "no uncertainty: the rule needs one"
	case u >= half:
		c.cannotSay = "the uncertainty " + quantity.ChangeText(u) + " eats the whole tolerance of ±" + quantity.ChangeText(half)
	case u > half/3:
		c.cannotSay = "the uncertainty " + quantity.ChangeText(u) + " is more than a third of the tolerance of ±" + quantity.ChangeText(half) + "; measure better first"
	case c.rule != ruleSimple:
		c.guard = u
	}
	if u > half/10 && c.cannotSay == "" {
		c.note("The uncertainty is more than a tenth of the tolerance (common practice asks for a tenth).")
	}
	g := c.guard * c.nominal()
	c.acceptable.lo, c.acceptable.hi = c.limits.lo+g, c.limits.hi-g
}

func (c *card) nominal() float64 {
	if !math.IsNaN(c.limits.v) {
		return c.limits.v
	}
	return (c.limits.lo + c.limits.hi) / 2
}

func (c *card) expanded(u float64) float64 { return math.Hypot(u, c.slope*c.ut) }

// factor is R(t)/R(order) with its limits, of the adopted curve.
func (c *card) factor(t float64) span {
	if c.set == nil || c.set.Ratio == nil {
		return unknown()
	}
	return ratioAt(c.set, t, c.ordered)
}

// readings judges each reading; without any there is the card alone.
func (c *card) readings() []*answer {
	list := c.block.Get("readings").List()
	if len(list) == 0 {
		return []*answer{c.answer()}
	}
	var answers []*answer
	for _, n := range list {
		a := c.answer()
		a.Size = "lot " + n.Get("lot").Text()
		a.rank = float64(len(answers))
		c.reading(a, n)
		answers = append(answers, a)
	}
	return answers
}

// answer begins with the numbers that every lot shares.
func (c *card) answer() *answer {
	a := c.about(c.record)
	if c.cannotSay != "" {
		a.cannot(c.cannotSay)
		a.Verdict = CannotBeTold
	}
	if c.unit.Symbol != "" {
		a.put("lower_at_20", c.limits.lo, c.unit)
		a.put("upper_at_20", c.limits.hi, c.unit)
		a.put("lower_accept", c.acceptable.lo, c.unit)
		a.put("upper_accept", c.acceptable.hi, c.unit)
	}
	return a
}

// put adds a number in the unit of the quantity judged.
func (a *answer) put(name string, si float64, u quantity.Unit) {
	a.Numbers[name] = Number{Value: number(u.FromSI(si)), Unit: u.Symbol, Kind: "nominal"}
}

// sameKind tells whether a reading is of the quantity judged.
func (c *card) sameKind(n *form.Node) (float64, bool) {
	q, ok := n.Quantity()
	if !ok {
		return math.NaN(), false
	}
	if c.unit.Symbol != "" && q.Kind != c.unit.Kind {
		c.fail("reading-of-another-kind", n, "the reading "+quote(q.Text)+" is a "+string(q.Kind)+", and the limits are those of a "+string(c.unit.Kind), "write the reading in "+c.unit.Symbol)
		return math.NaN(), false
	}
	return q.Value, true
}

// reading corrects one reading to the temperature of the order and says where
// it lies.
func (c *card) reading(a *answer, n *form.Node) {
	value, ok := c.sameKind(n.Get("forward"))
	if reverse, both := c.sameKind(n.Get("reverse")); both {
		value = (value + reverse) / 2
	} else if ok {
		a.warn("one polarity only: thermal EMF is not cancelled")
	}
	t, okT := n.Get("temperature").Quantity()
	if !ok || !okT || c.failed {
		return
	}
	f := c.factor(t.Value)
	if math.IsNaN(f.v) {
		a.cannot("no curve at " + quantity.CelsiusText(t.Value))
		a.Verdict = CannotBeTold
		return
	}
	corrected := value / f.v
	a.put("corrected", corrected, c.unit)
	own := c.u
	if q, ok := n.Get("uncertainty").Quantity(); ok {
		own = math.Abs(q.Value)
	}
	u := c.expanded(own)
	c.against(a, n, corrected, u)
	if c.cannotSay != "" {
		return
	}
	if !math.IsNaN(u) {
		a.tell("probability", exactly(conformance(c.limits, corrected, u*corrected/2)))
	}
	zone, verdict := c.zone(corrected, u)
	a.Numbers["zone"] = Number{Kind: zone}
	a.Verdict = verdict
	if verdict != Holds {
		a.reason(a.Size + ": " + zone)
	}
}

// zone says where a corrected value lies under the rule.
func (c *card) zone(x, u float64) (string, Verdict) {
	inside := x >= c.limits.lo && x <= c.limits.hi
	accepted := x >= c.acceptable.lo && x <= c.acceptable.hi
	g := c.guard * c.nominal()
	outside := x < c.limits.lo-g || x > c.limits.hi+g
	switch c.rule {
	case ruleSimple:
		if inside {
			return "accept", Holds
		}
		return "reject", Fails
	case ruleGuarded:
		switch {
		case accepted:
			return "accept", Holds
		case inside:
			return "within the limits, not by its uncertainty: not accepted", CannotBeTold
		}
		return "reject", Fails
	}
	switch {
	case accepted:
		return "pass", Holds
	case inside:
		return "conditional pass", CannotBeTold
	case outside:
		return "fail", Fails
	}
	return "conditional fail", CannotBeTold
}

// conformance is the probability that the true value lies within the limits,
// for a normal distribution about x with standard uncertainty u.
func conformance(limits span, x, u float64) float64 {
	phi := func(z float64) float64 { return 0.5 * math.Erfc(-z/math.Sqrt2) }
	return phi((limits.hi-x)/u) - phi((limits.lo-x)/u)
}

// against compares with the supplier's own value: E_n.
func (c *card) against(a *answer, n *form.Node, x, u float64) {
	theirs, ok := c.sameKind(n.Get("supplier"))
	if !ok {
		return
	}
	q, ok := n.Get("supplier_uncertainty").Quantity()
	if !ok || math.IsNaN(u) {
		a.cannot("E_n: an uncertainty is missing")
		return
	}
	en := math.Abs(x-theirs) / math.Hypot(u*x, math.Abs(q.Value)*theirs)
	a.tell("en", exactly(en))
	if en > 1 {
		a.warn("E_n above 1: the two results disagree beyond their uncertainties; look first whether both used the same α and temperature")
	}
}
