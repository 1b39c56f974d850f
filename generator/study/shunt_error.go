package study

import (
	"math"
	"sort"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/quantity"
)

// Standard annealed copper: α at 20 °C of the resistance of a body (IEC 60028).
const copperAlpha = 3.93e-3

// copperFactor is R of copper at t over that at the calibration temperature.
func (s *shunt) copperSlope() float64 {
	at := 1 + copperAlpha*(s.reference-quantity.ZeroCelsius-20)
	return copperAlpha / at
}

// totalChange is the change of alloy and copper together over a window.
type totalChange struct {
	swing
	alpha, beta float64
	shareMax    float64
}

// change tells R between the taps over the ambient, widened by the element's
// own heat: alloy and copper in series, each over its share at the calibration
// temperature.
func (e *element) change() {
	hi := e.hi
	if e.hot > hi {
		hi = e.hot
	}
	c, done := e.changes[hi]
	if !done {
		c = e.shunt.totalChange(e, hi)
		e.changes[hi] = c
	}
	e.a.tellSwing(c.swing)
	if c.cannot != "" {
		return
	}
	if !math.IsNaN(c.alpha) {
		e.a.tell("alpha_effective", nominal(c.alpha))
		e.a.tell("beta_effective", nominal(c.beta))
	}
	if !math.IsNaN(c.shareMax) {
		e.a.tell("copper_share_max", nominal(c.shareMax))
	}
}

func (s *shunt) totalChange(e *element, hi float64) totalChange {
	c := totalChange{swing: swingOf(e.set, s.reference, s.lo, hi), alpha: math.NaN(), beta: math.NaN(), shareMax: math.NaN()}
	if c.cannot != "" || !c.nominal {
		return c
	}
	alloy, ok := curve.Ratio(e.set.Ratio.Nominal, s.reference)
	if !ok {
		return c
	}
	share := s.copper.v
	whole := mixed(alloy, share, s.copperSlope(), s.reference)
	c.alpha, c.beta = slopes(whole, s.reference)
	if share != 0 {
		c.remeasure(e, whole, s)
	}
	if bound, ok := s.block.Get("require").Get("greatest_change").Quantity(); ok && bound.HasValue() {
		c.shareMax = greatestShare(alloy, s.copperSlope(), s.reference, c.lo, c.hi, math.Abs(bound.Value))
	}
	return c
}

// mixed is (1 − f)·r(T) + f·(1 + α(T − reference)), exactly, segment by segment.
func mixed(alloy curve.Curve, f, alpha, reference float64) curve.Curve {
	out := curve.Curve{FromTable: alloy.FromTable, Segments: append([]curve.Segment(nil), alloy.Segments...)}
	mixInto(out.Segments, alloy, f, alpha, reference)
	return out
}

func mixInto(into []curve.Segment, alloy curve.Curve, f, alpha, reference float64) {
	for i := range into {
		g := &into[i]
		for k := range g.C {
			g.C[k] = float64(alloy.Segments[i].C[k] * (1 - f))
		}
		g.C[0] += float64(f * (1 + float64(alpha*(g.Centre-reference))))
		g.C[1] += float64(f * alpha)
	}
}

// slopes are α and β about t of a curve that is 1 there.
func slopes(c curve.Curve, t float64) (alpha, beta float64) {
	alpha, _ = c.Slope(t)
	for _, g := range c.Segments {
		if t >= g.From && t <= g.To {
			return alpha, g.C[2] + float64(3*g.C[3]*(t-g.Centre))
		}
	}
	return alpha, math.NaN()
}

// remeasure replaces the alloy's change by that of the whole, with the copper
// share at both of its limits and the alloy at every corner of its own.
func (c *totalChange) remeasure(e *element, whole curve.Curve, s *shunt) {
	m, err := curve.Measure(whole, s.reference, c.lo, c.hi)
	if err != nil {
		c.cannot = err.Error()
		return
	}
	corners := []curve.Curve{}
	banded := e.set.Ratio.Limits != nil
	shapes := []curve.Curve{e.set.Ratio.Nominal}
	if banded {
		shapes = e.set.Ratio.Limits.Corners
	}
	for _, shape := range shapes {
		if r, ok := curve.Ratio(shape, s.reference); ok {
			corners = append(corners, mixed(r, s.copper.lo, s.copperSlope(), s.reference), mixed(r, s.copper.hi, s.copperSlope(), s.reference))
		}
	}
	band, err := curve.MeasureBand(corners, s.reference, c.lo, c.hi)
	if err != nil {
		c.cannot = err.Error()
		return
	}
	wide := func(v, lo, hi float64) span { return span{v: v, lo: lo, hi: hi, banded: banded, sure: math.NaN()} }
	if !banded && s.copper.lo == s.copper.hi {
		wide = func(v, _, _ float64) span { return nominal(v) }
	}
	c.greatest, c.greatestAt = wide(m.Change.Greatest, band.Change.Lower, band.Change.Upper), m.Change.GreatestAt
	c.greatest.sure = math.NaN()
	if c.greatest.wide() {
		c.greatest.sure = 0
	}
	c.least, c.most = wide(m.Change.Min, band.Change.Lower, math.Max(m.Change.Min, 0)), wide(m.Change.Max, math.Min(m.Change.Max, 0), band.Change.Upper)
	c.box = wide(m.Box, 0, band.Box.Upper)
	c.turning = nil
	for _, t := range m.TurningPoints {
		if t.Inside {
			c.turning = append(c.turning, t.T)
		}
	}
	c.cold, c.coldAt = side(whole, s.reference, c.lo, math.Min(s.reference, c.hi))
	c.hot, c.hotAt = side(whole, s.reference, math.Max(s.reference, c.lo), c.hi)
}

// greatestShare is the largest share of copper whose whole stays within the
// bound over the window; NaN when none does. The greatest change is convex in
// the share, so one minimum and one root tell it.
func greatestShare(alloy curve.Curve, alpha, reference, lo, hi, bound float64) float64 {
	whole := mixed(alloy, 0, alpha, reference)
	worst := func(f float64) float64 {
		mixInto(whole.Segments, alloy, f, alpha, reference)
		e, _ := whole.Extremes(lo, hi)
		return math.Max(math.Abs(e.Min-1), math.Abs(e.Max-1))
	}
	a, b := 0.0, 1.0
	for range 26 {
		x, y := a+(b-a)*0.382, a+(b-a)*0.618
		if worst(x) <= worst(y) {
			b = y
		} else {
			a = x
		}
	}
	least := (a + b) / 2
	if worst(0) <= worst(least) {
		least = 0
	}
	if worst(least) > bound {
		return math.NaN()
	}
	if worst(1) <= bound {
		return 1
	}
	a, b = least, 1
	for range 26 {
		if mid := (a + b) / 2; worst(mid) <= bound {
			a = mid
		} else {
			b = mid
		}
	}
	return a
}

// emf is the error of the thermal EMF against copper, S·ΔT/(I·R).
func (e *element) emf() {
	difference, ok := e.quantity("terminal_difference")
	if !ok {
		return
	}
	emf, known := e.a.property("emf_to_copper")
	if !known {
		e.a.cannot("EMF error: no thermal EMF to copper")
		return
	}
	error := emf.times(difference).over(e.current.times(e.target))
	e.a.tell("emf_error_full", error)
	if small, ok := e.quantity("smallest_current"); ok {
		e.a.tell("emf_error_small", emf.times(difference).over(small.times(e.target)))
	}
	if e.text("supply", "direct") == "direct" && emf.magnitude().hi > 5e-6 {
		e.a.warn("EMF to copper above 5\u202fµV/K on direct current: each kelvin between the ends is " + quantity.ChangeText(emf.magnitude().hi/(e.current.v*e.target.v)) + " of full scale")
	}
}

// A term of the error budget, relative: at full scale and at the smallest current.
type term struct {
	name, basis, distribution, removed string
	full, small                        span // signed where the sign is known
	signed                             bool
}

// terms lists what is known of the error.
func (e *element) terms() []term {
	var list []term
	drop := e.current.v * e.target.v
	smallest, hasSmall := e.quantity("smallest_current")
	relative := func(x span) term { return term{full: x, small: x} }
	overDrop := func(x span) term {
		t := term{full: x.scale(1 / drop), small: unknown()}
		if hasSmall {
			t.small = x.scale(1 / (smallest.v * e.target.v))
		}
		return t
	}
	add := func(t term, name, basis, distribution, removed string, signed bool) {
		t.name, t.basis, t.distribution, t.removed, t.signed = name, basis, distribution, removed, signed
		list = append(list, t)
	}
	if x, ok := e.quantity("tolerance"); ok {
		add(relative(x), "calibration", "given", "rectangular", "what calibration leaves", false)
	}
	if g, ok := e.a.spans["greatest_change"]; ok && e.a.Partly == "" {
		change := g
		change.lo, change.hi = math.Min(e.a.spans["change_least"].lo, 0), math.Max(e.a.spans["change_most"].hi, 0)
		add(relative(change), "temperature, with own heat", "from "+quantity.CelsiusText(e.reference)+", over "+quantity.CelsiusText(e.lo)+" to "+quantity.Fixed(math.Max(e.hi, orLess(e.hot))-quantity.ZeroCelsius, 1)+quantity.NarrowSpace+"°C", "one-sided, sign kept", "no", true)
	}
	if x, ok := e.a.spans["emf_error_full"]; ok {
		t := term{full: x, small: unknown()}
		if y, ok := e.a.spans["emf_error_small"]; ok {
			t.small = y
		}
		add(t, "thermal EMF", "ends apart by "+e.block.Get("terminal_difference").Text(), "sign of the difference unknown", "no", false)
	}
	if x, ok := e.quantity("drift"); ok {
		add(relative(x), "drift", "given", "rectangular", "by recalibration", false)
	}
	if x, ok := e.quantity("offset"); ok {
		add(overDrop(x), "offset of the instrument", "given", "rectangular", "by a zero reading", false)
	}
	return list
}

func orLess(x float64) float64 {
	if math.IsNaN(x) {
		return math.Inf(-1)
	}
	return x
}

// total adds terms: parts with a known sign keep it and are never squared.
func total(list []term, of func(term) span) (worst, rss float64, ok bool) {
	var up, down, one, squares float64
	for _, t := range list {
		x := of(t)
		if !x.known() {
			return 0, 0, false
		}
		m := x.magnitude().hi
		if t.signed {
			up, down, one = up+math.Max(x.hi, 0), down+math.Min(x.lo, 0), one+m
			continue
		}
		up, down, squares = up+m, down-m, squares+m*m
	}
	return math.Max(up, -down), one + math.Sqrt(squares), len(list) > 0
}

// budget tells the totals and the table of terms. Without the change with
// temperature there is no budget: it would look complete and not be.
func (e *element) budget() {
	list := e.terms()
	if _, ok := e.a.spans["greatest_change"]; !ok || e.a.Partly != "" || len(list) < 2 {
		return
	}
	worst, rss, _ := total(list, func(t term) span { return t.full })
	e.a.tell("budget_worst", nominal(worst))
	e.a.tell("budget_rss", nominal(rss))
	e.a.terms = list
}

// mostBudgets is how many budgets are written out, the best first: the totals
// of all stand in the table of the elements.
const mostBudgets = 6

func (s *shunt) writeBudgets(answers []*answer) {
	written, all := 0, 0
	for _, a := range answers {
		list := a.terms
		if list == nil {
			continue
		}
		if all++; written == mostBudgets {
			continue
		}
		written++
		worst, rss, _ := total(list, func(t term) span { return t.full })
		smallWorst, smallRSS, small := total(list, func(t term) span { return t.small })
		a.Tables = append(a.Tables, budgetTable(a.Label(), list, worst, rss, smallWorst, smallRSS, small))
	}
	if written < all {
		s.note("Error budgets are written out for the first " + quantity.Number(mostBudgets, 3) + "; the totals of all stand in the table.")
	}
}

func budgetTable(label string, list []term, worst, rss, smallWorst, smallRSS float64, small bool) Table {
	ppm := func(s span, signed bool) string {
		switch {
		case !s.known():
			return "no smallest current"
		case signed:
			return quantity.PPMText(s.lo) + " to " + quantity.PPMText(s.hi)
		}
		return "±" + quantity.PPMText(s.magnitude().hi)
	}
	t := Table{Caption: "Error budget: " + label, Heads: []string{"Term", "basis", "distribution", "removed by calibration", "ppm at full scale", "ppm at the smallest current"}}
	for _, x := range list {
		t.Rows = append(t.Rows, []string{x.name, x.basis, x.distribution, x.removed, ppm(x.full, x.signed), ppm(x.small, x.signed)})
	}
	at := func(x float64) string {
		if !small {
			return "no smallest current"
		}
		return quantity.PPMText(x)
	}
	t.Rows = append(t.Rows,
		[]string{"worst case", "signs kept, magnitudes added", "", "", quantity.PPMText(worst), at(smallWorst)},
		[]string{"likely", "temperature, plus root of the sum of squares", "", "", quantity.PPMText(rss), at(smallRSS)},
		[]string{"largest", largest(list), "", "", "", ""})
	return t
}

// largest names the three largest terms at full scale.
func largest(list []term) string {
	sorted := append([]term{}, list...)
	sort.SliceStable(sorted, func(i, j int) bool { return sorted[i].full.magnitude().hi > sorted[j].full.magnitude().hi })
	text := ""
	for i, t := range sorted {
		if i == 3 {
			break
		}
		if i > 0 {
			text += ", "
		}
		text += t.name
	}
	return text
}
