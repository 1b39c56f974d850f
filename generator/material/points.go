package material

import (
	"fmt"
	"math"
	"strconv"

	"ohmfolio/generator/fit"
	"ohmfolio/generator/form"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// Fitted is what measured points gave: the fit, and the parts of the
// uncertainty that are common to all points and were added after it.
type Fitted struct {
	Result  fit.Result
	Points  []fit.Point
	Section float64 // A/L of the specimen as measured, in m; NaN when ρ is not told
	Moved   float64 // by expansion from the temperature of the dimensions to the reference temperature, as a factor of A/L
	Budget  []BudgetLine
	K       float64 // coverage factor for 95.45 % and the fit's degrees of freedom
}

// BudgetLine is one common part: its standard uncertainty relative to the
// value at the reference temperature, and in 1/K for α.
type BudgetLine struct {
	From  string  // thermometer, bridge, width, …
	Value float64 // relative, on ρ or R at the reference temperature
	Alpha float64 // 1/K, on α
}

// fitPoints reads and fits the points of a data set, and states the
// coefficients as if they had been written, with their uncertainties.
func (rd *reader) fitPoints(s *DataSet) {
	o, ok := rd.fitOptions(s)
	if !ok || rd.beside == nil {
		return
	}
	src := rd.beside(s.PointsFile)
	if src == nil {
		return
	}
	points, header, findings := fit.ReadPoints(src)
	rd.list.Findings = append(rd.list.Findings, findings...)
	if place.Count(findings, place.Error) > 0 {
		return
	}
	o.Weighted = header.HasUncertainty()
	r, err := fit.Polynomial(points, o)
	if err != nil {
		rd.add("points-not-fitted", s.Node.Get("points"), "the points of "+s.PointsFile+" cannot be fitted: "+err.Error(), "lower the degree, or measure at more temperatures")
		return
	}
	f := &Fitted{Result: r, Points: points, Section: math.NaN(), K: fit.CoverageFactor(math.Erf(2/math.Sqrt2), float64(max(1, r.Dof)))}
	s.Fitted, s.Reference = f, o.Reference
	rd.specimen(s, header)
	s.state(header)
	rd.pointsRange(s)
	rd.fitWarnings(s)
}

func (rd *reader) fitOptions(s *DataSet) (fit.Options, bool) {
	n := s.Node.Get("fit")
	if n == nil {
		rd.add("fit-missing", s.Node.Get("points"), "the points have no fit:", "add fit: {reference_temperature: 25 °C, degree: 2}")
		return fit.Options{}, false
	}
	q, okT := n.Get("reference_temperature").Quantity()
	degree, okD := n.Get("degree").Int()
	if okD && (degree < 1 || degree > 3) {
		rd.add("fit-missing", n.Get("degree"), "the degree must be 1, 2 or 3", "write the lowest degree that fits")
		return fit.Options{}, false
	}
	return fit.Options{Reference: q.Value, Degree: degree}, okT && okD
}

// state writes the fitted numbers as quantities, so that pages show them like
// any others: expanded uncertainty with k, two digits (JCGM 100, 7.2.6).
func (s *DataSet) state(h fit.Header) {
	list, _, ok := s.Fitted.Result.Relative()
	if !ok {
		return
	}
	ppm := [...]quantity.Kind{"", quantity.Coefficient1, quantity.Coefficient2, quantity.Coefficient3}
	into := [...]**quantity.Quantity{nil, &s.Alpha, &s.Beta, &s.Gamma}
	for i := 1; i < len(list); i++ {
		unit := quantity.Units(ppm[i])[0]
		u := list[i].U
		if i == 1 {
			u = s.Fitted.with(u, func(b BudgetLine) float64 { return b.Alpha })
		}
		*into[i] = fittedQuantity(ppm[i], unit, list[i].Value, u, s.Fitted.K)
	}
	scale := float64(s.Fitted.Section * s.Fitted.Moved)
	switch {
	case h.Kind == quantity.Resistivity:
		scale = 1
	case math.IsNaN(scale):
		return
	}
	value := float64(list[0].Value * scale)
	u := s.Fitted.with(list[0].U/list[0].Value, func(b BudgetLine) float64 { return b.Value }) * value
	unit, _ := quantity.FindUnit(quantity.Resistivity, "µΩ·cm")
	s.Resistivity, s.WrittenAs = fittedQuantity(quantity.Resistivity, unit, value, u, s.Fitted.K), "points"
}

// with adds the common parts to the fit's own standard uncertainty u.
func (f *Fitted) with(u float64, part func(BudgetLine) float64) float64 {
	sum := float64(u * u)
	for _, b := range f.Budget {
		sum += float64(part(b) * part(b))
	}
	return math.Sqrt(sum)
}

func fittedQuantity(kind quantity.Kind, unit quantity.Unit, si, u, k float64) *quantity.Quantity {
	q := &quantity.Quantity{Kind: kind, Unit: unit, Value: si, Digits: 4, Text: "fitted"}
	if u > 0 {
		q.Uncertainty = &quantity.Uncertainty{Minus: float64(u * k), Plus: float64(u * k), K: math.Round(k*100) / 100}
		shown := unit.FromSI(si)
		place := 1 - int(math.Floor(math.Log10(math.Abs(unit.FromSI(float64(u*k))))))
		if shown != 0 {
			q.Digits = max(1, int(math.Floor(math.Log10(math.Abs(shown))))+1+place)
		}
	}
	q.Text = q.In(unit)
	return q
}

// pointsRange warns when the points do not span the range that is claimed.
func (rd *reader) pointsRange(s *DataSet) {
	lo, hi := math.Inf(1), math.Inf(-1)
	for _, p := range s.Fitted.Points {
		lo, hi = math.Min(lo, p.T), math.Max(hi, p.T)
	}
	n := s.Node.Get("valid_range")
	if n == nil {
		s.Valid = Window{Lo: lo, Hi: hi}
		return
	}
	if slack := 0.05 * (hi - lo); s.Valid.Lo < lo-slack || s.Valid.Hi > hi+slack {
		rd.warn("range-beyond-points", n, "the valid range "+quote(n.Text())+" reaches beyond the points, which go from "+quantity.CelsiusText(lo)+" to "+quantity.CelsiusText(hi), "narrow the range, or measure further")
	}
}

func (rd *reader) fitWarnings(s *DataSet) {
	for _, w := range s.Fitted.Result.Warnings {
		rd.warn("fit-doubtful", s.Node.Get("points"), "the fit of "+s.PointsFile+": "+w, "look at the residuals on the page")
	}
}

func (rd *reader) warn(code string, n *form.Node, message, mend string) {
	rd.list.Add(code, place.Warning, n.Position(), message, mend)
}

// specimen turns R into ρ = R·A/L with the geometry, and notes the common
// parts of the uncertainty (each relative; thickness and width once, a
// diameter twice).
func (rd *reader) specimen(s *DataSet, h fit.Header) {
	n := s.Node.Get("specimen")
	f := s.Fitted
	rd.thermometer(s, n)
	rd.part(f, n, "bridge", 1, true)
	if h.Kind != quantity.Resistance || n == nil {
		return
	}
	length, ok := n.Get("between_taps").Quantity()
	area, why := rd.section(s, n)
	if !ok || !(length.Value > 0) || !(area > 0) {
		if why == "" {
			why = "the length between the taps is missing"
		}
		rd.warn("specimen-incomplete", n, "ρ is not told from the points: "+why, "add between_taps and width with thickness, diameter, or mass with length and the density")
		return
	}
	f.Section = area / length.Value
	f.Moved = 1
	at, stated := n.Get("at").Quantity()
	if gamma, known := rd.r.Expansion(); known && stated {
		f.Moved = 1 + float64(gamma*(f.Result.Options.Reference-at.Value))
	}
	rd.part(f, n, "between_taps", 1, false)
}

// section is the cross-section in m², 0 with the reason when it cannot be told.
func (rd *reader) section(s *DataSet, n *form.Node) (area float64, why string) {
	value := func(key string) float64 { q, _ := n.Get(key).Quantity(); return q.Value }
	switch {
	case n.Has("width") && n.Has("thickness"):
		rd.part(s.Fitted, n, "width", 1, false)
		rd.part(s.Fitted, n, "thickness", 1, false)
		return float64(value("width") * value("thickness")), ""
	case n.Has("diameter"):
		rd.part(s.Fitted, n, "diameter", 2, false)
		return float64(math.Pi/4*value("diameter")) * value("diameter"), ""
	case n.Has("mass") && n.Has("length"):
		d := rd.r.Property("density")
		if d == nil || !d.Value.HasValue() {
			return 0, "the density is missing"
		}
		rd.part(s.Fitted, n, "mass", 1, false)
		rd.part(s.Fitted, n, "length", 1, false)
		if u := d.Value.Uncertainty; u != nil {
			s.Fitted.Budget = append(s.Fitted.Budget, BudgetLine{From: "density", Value: u.Plus / u.K / d.Value.Value})
		}
		return value("mass") / float64(d.Value.Value*value("length")), ""
	}
	return 0, "the section is missing"
}

// part adds the uncertainty of one key of the specimen, times how often it
// counts. A share (bridge) stands for itself.
func (rd *reader) part(f *Fitted, n *form.Node, key string, times float64, share bool) {
	q, ok := n.Get(key).Quantity()
	if !ok || q.Uncertainty == nil {
		return
	}
	u := math.Max(q.Uncertainty.Plus, q.Uncertainty.Minus) / q.Uncertainty.K
	if !share {
		u /= q.Value
	}
	f.Budget = append(f.Budget, BudgetLine{From: inWords(key), Value: times * math.Abs(u)})
}

func inWords(key string) string {
	if key == "between_taps" {
		return "length between taps"
	}
	return key
}

// thermometer adds what a temperature wrong by the same amount everywhere
// does: the curve shifts along the axis. The uncertainty is the specimen's
// thermometer, otherwise the mean of the points' own uncertainty_T, taken as
// common.
func (rd *reader) thermometer(s *DataSet, n *form.Node) {
	u, from := 0.0, "thermometer"
	if q, ok := n.Get("thermometer").Quantity(); ok && q.Uncertainty != nil {
		u = q.Uncertainty.Plus / q.Uncertainty.K
	} else {
		for _, p := range s.Fitted.Points {
			u += p.UT / float64(len(s.Fitted.Points))
		}
		from = "temperatures of the points, taken as common"
	}
	list, _, ok := s.Fitted.Result.Relative()
	if !(u > 0) || !ok {
		return
	}
	moved := s.Fitted.Result.About(s.Fitted.Result.Options.Reference + u)
	shifted, _, ok := moved.Relative()
	if !ok {
		return
	}
	s.Fitted.Budget = append(s.Fitted.Budget, BudgetLine{From: from + " (" + strconv.FormatFloat(u, 'g', 3, 64) + " K)",
		Value: math.Abs(shifted[0].Value/list[0].Value - 1), Alpha: math.Abs(shifted[1].Value - list[1].Value)})
}

// relativeU is the standard uncertainty of R(t)/R(reference) from the fit's
// covariance: with x_k = τ^k, y = Σ b_k τ^k and b_0 the value at the reference,
//
//	∂(y/b_0)/∂b_0 = (1 − y/b_0)/b_0,  ∂(y/b_0)/∂b_k = τ^k/b_0
func (f *Fitted) relativeU(t float64) float64 {
	r := &f.Result
	tau := t - r.Options.Reference
	y, _ := r.At(t)
	g := make([]float64, len(r.B))
	g[0] = (1 - y/r.B[0]) / r.B[0]
	p := 1.0
	for k := 1; k < len(g); k++ {
		p = float64(p * tau)
		g[k] = p / r.B[0]
	}
	sum := 0.0
	for i := range g {
		for j := range g {
			sum += float64(float64(g[i]*g[j]) * r.Covariance[i][j])
		}
	}
	return math.Sqrt(math.Max(0, sum))
}

// uncertaintyAt gives the standard uncertainty of the set's quantity at t:
// for ρ the fit's own with all common parts, for the ratio the covariance with
// the thermometer's part of α over (t − reference).
func (f *Fitted) uncertaintyAt(t float64, absolute bool) float64 {
	y, u := f.Result.At(t)
	ratio := y / f.Result.B[0]
	if absolute {
		return ratio * f.with(u/y, func(b BudgetLine) float64 { return b.Value })
	}
	alpha := f.with(0, func(b BudgetLine) float64 { return b.Alpha })
	return math.Hypot(f.relativeU(t), float64(alpha*(t-f.Result.Options.Reference)))
}

// Describe says in one line what the points gave.
func (f *Fitted) Describe() string {
	return fmt.Sprintf("%d points, %d degrees of freedom, residual standard deviation %s ppm, largest residual %s ppm", f.Result.N, f.Result.Dof,
		quantity.Number(f.Result.Scatter()/f.Result.B[0]*1e6, 2), quantity.Number(f.Result.LargestResidual(), 2))
}
