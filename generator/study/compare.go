package study

import (
	"math"
	"sort"
	"strings"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// What a comparison may show and rank by.
const (
	showChange = "change"
	showRatio  = "resistance-ratio"
	showRho    = "resistivity"

	rankChange = "greatest_change"
	rankBox    = "box"
	rankRho    = "resistivity"
)

// compareKind puts materials side by side over one window.
var compareKind = Kind{
	Name:  "compare",
	Title: "Comparison",
	Doc: "Puts materials side by side over one window about one reference temperature: one figure, one table of every measure, ranked. " +
		"Materials whose data end before the window does are told apart, over the part they cover.",
	Shape: &form.Shape{Name: "compare", Doc: "Parameters of a comparison.", Fields: []form.Field{
		{Key: "title", Is: form.Text, Doc: "Title of the comparison.", Example: "Low-TCR alloys for shunts"},
		{Key: "materials", Required: true, Is: form.List(form.Text), Doc: "IDs of the records to compare.", Example: "[cumn12ni, cuni44]"},
		{Key: "window", Required: true, Is: form.Range(quantity.Temperature), Doc: "The window of temperature.", Example: "-40 °C to 85 °C"},
		{Key: "reference_temperature", Is: form.Quantity(quantity.Temperature), Doc: "Temperature that changes are counted from; 20 °C when it is missing (common practice).", Example: "20 °C"},
		{Key: "show", Is: form.OneOf(showChange, showRatio, showRho), Doc: "What the figure shows.", Example: showChange},
		{Key: "rank_by", Is: form.OneOf(rankChange, rankBox, rankRho), Doc: "The number that orders the table, least first.", Example: rankChange},
		{Key: "require", Is: form.Mapping(compareRequire), Doc: "Bounds on the numbers, by their names.", Example: "{greatest_change: 0.3 %}"},
		{Key: "binding", Is: form.YesNo, Doc: "Whether a requirement that does not hold fails the publication.", Example: "yes"},
	}},
	Run: runCompare,
}

var compareRequire = &form.Shape{Name: "require", Doc: "What may be required of a comparison.", Fields: []form.Field{
	{Key: rankChange, Is: form.Quantity(quantity.Ratio), Doc: "Greatest magnitude of the change of R over the window.", Example: "0.3 %"},
	{Key: rankBox, Is: form.Quantity(quantity.Coefficient1), Doc: "Greatest box coefficient over the window.", Example: "20 ppm/K"},
}}

// comparison is one run of compare.
type comparison struct {
	in        *Input
	out       *Outcome
	lo, hi    float64 // K
	reference float64 // K
	show      string
	rank      string
}

func runCompare(in *Input) *Outcome {
	c := &comparison{in: in, show: showChange, rank: rankChange, reference: quantity.ZeroCelsius + 20}
	c.out = &Outcome{Title: in.Block.Get("title").Text(), Binding: in.Block.Get("binding").Yes(),
		Materials: []MaterialOutcome{}, Ranking: []string{}, Tables: []Table{}, Cautions: comparisonCautions}
	if c.out.Title == "" {
		c.out.Title = "Comparison"
	}
	if !c.parameters() {
		return nil
	}
	for _, name := range in.Block.Get("materials").List() {
		c.judge(name)
	}
	if place.Count(in.Report.Findings, place.Error) > 0 {
		return nil
	}
	c.order()
	c.tables()
	c.chart()
	return c.out
}

// parameters reads the block; false after a finding that stops the study.
func (c *comparison) parameters() bool {
	b := c.in.Block
	lo, hi, _ := b.Get("window").Range()
	c.lo, c.hi = lo.Value, hi.Value
	if c.lo >= c.hi {
		c.in.Report.Add("window-inverted", place.Error, b.Get("window").Position(),
			"the window "+b.Get("window").Text()+" does not rise", "write the lower temperature first")
		return false
	}
	if q, ok := b.Get("reference_temperature").Quantity(); ok {
		c.reference = q.Value
	}
	if b.Has("show") {
		c.show = b.Get("show").Text()
	}
	if b.Has("rank_by") {
		c.rank = b.Get("rank_by").Text()
	}
	c.out.Parameters = []Parameter{
		{"window", quantity.CelsiusText(c.lo) + " to " + quantity.CelsiusText(c.hi)},
		{"reference temperature", quantity.CelsiusText(c.reference)},
		{"figure shows", inWords(c.show)}, {"ranked by", inWords(c.rank)},
	}
	return true
}

// inWords turns the name of a number into words.
func inWords(name string) string { return strings.ReplaceAll(name, "_", " ") }

// judge adds one material: found, measured over the window or the part of it
// that its data cover, and held against what is required.
func (c *comparison) judge(name *form.Node) {
	r := c.in.Library.Material(name.Text())
	if r == nil {
		c.unknown(name)
		return
	}
	m := MaterialOutcome{Material: r.ID, Record: r, Reasons: []string{}, Requirements: []Requirement{}, Numbers: map[string]Number{},
		Tables: []Table{}, Warnings: []string{}, Evidence: []Evidence{evidenceOf(c.in.Library, r)}}
	c.measure(&m, r.Adopted)
	c.require(&m)
	warnState(&m, r)
	c.out.Materials = append(c.out.Materials, m)
}

func (c *comparison) unknown(name *form.Node) {
	mend := "write the ID of a record, which is its file name without .yaml"
	if near := place.Near(name.Text(), c.in.Library.IDs()); near != "" {
		mend = "did you mean " + near + "?"
	}
	c.in.Report.Add("study-material-unknown", place.Error, name.Position(), "there is no material "+quote(name.Text()), mend)
}

// measure fills the numbers. Over a part of the window they are told all the
// same, with the part named.
func (c *comparison) measure(m *MaterialOutcome, set *material.DataSet) {
	if set == nil {
		m.Reasons = append(m.Reasons, "cannot be told: no data")
		return
	}
	c.resistivity(m, set)
	if set.Ratio == nil || (!set.Ratio.HasNominal() && set.Ratio.Limits == nil) {
		m.Reasons = append(m.Reasons, "cannot be told: no coefficient")
		return
	}
	if !set.Valid.Contains(c.reference) {
		m.Reasons = append(m.Reasons, "cannot be told: "+quantity.CelsiusText(c.reference)+" lies outside the valid range "+windowText(set.Valid.Lo, set.Valid.Hi))
		return
	}
	lo, hi := math.Max(c.lo, set.Valid.Lo), math.Min(c.hi, set.Valid.Hi)
	if lo >= hi {
		m.Reasons = append(m.Reasons, "cannot be told: the valid range "+windowText(set.Valid.Lo, set.Valid.Hi)+" and the window share nothing")
		return
	}
	if lo > c.lo+material.Slack || hi < c.hi-material.Slack {
		m.Partly = windowText(lo, hi)
		m.Reasons = append(m.Reasons, "data cover only "+m.Partly+" of the window")
	}
	if !set.Ratio.HasNominal() {
		m.Reasons = append(m.Reasons, "limits only, no nominal: the worst case is told, and nothing is ranked")
		c.worstCase(m, set, lo, hi)
		return
	}
	measures, err := curve.Measure(set.Ratio.Nominal, c.reference, lo, hi)
	if err != nil {
		m.Reasons = append(m.Reasons, "cannot be told: "+err.Error())
		return
	}
	c.numbers(m, set, measures, lo, hi)
}

func (c *comparison) resistivity(m *MaterialOutcome, set *material.DataSet) {
	read := material.Reading{Told: set.Rho}
	v, ok := read.At(c.reference)
	if !ok {
		return
	}
	u := c.houseUnit()
	n := Number{Value: number(u.FromSI(v)), Unit: u.Symbol, Kind: "nominal", Text: quantity.Number(u.FromSI(v), set.Digits())}
	if l, ok := read.Limits(c.reference); ok {
		n.Lower, n.Upper, n.Kind = number(u.FromSI(l.Lower)), number(u.FromSI(l.Upper)), "limits"
	}
	m.Numbers[rankRho] = n
}

func (c *comparison) houseUnit() quantity.Unit {
	if u, ok := quantity.FindUnit(quantity.Resistivity, c.in.Library.Settings.Units.Resistivity); ok {
		return u
	}
	u, _ := quantity.FindUnit(quantity.Resistivity, "µΩ·cm")
	return u
}

// numbers names every measure over [lo, hi], with the worst case of the
// stated limits where there are any.
func (c *comparison) numbers(m *MaterialOutcome, set *material.DataSet, t curve.Measures, lo, hi float64) {
	set1 := func(name string, v float64, unit, text string) {
		m.Numbers[name] = Number{Value: number(v), Unit: unit, Kind: "nominal", Text: text}
	}
	change := func(name string, v float64) { set1(name, v*1e6, "ppm", quantity.ChangeText(v)) }
	perK := func(name string, v float64) { set1(name, v*1e6, "ppm/K", quantity.PPMText(v)) }
	change(rankChange, t.Change.Greatest)
	change("change_least", t.Change.Min)
	change("change_most", t.Change.Max)
	set1("greatest_at", t.Change.GreatestAt-quantity.ZeroCelsius, "°C", quantity.DegreesText(t.Change.GreatestAt))
	perK(rankBox, t.Box)
	perK("slope", t.SlopeAtReference)
	if t.ChordCold != nil {
		perK("chord_cold", *t.ChordCold)
	}
	if t.ChordHot != nil {
		perK("chord_hot", *t.ChordHot)
	}
	c.worstCase(m, set, lo, hi)
}

// worstCase widens change and box by the corners of the stated limits.
func (c *comparison) worstCase(m *MaterialOutcome, set *material.DataSet, lo, hi float64) {
	if set.Ratio.Limits == nil {
		return
	}
	greatest, box := newInterval(), newInterval()
	for _, corner := range set.Ratio.Limits.Corners {
		t, err := curve.Measure(corner, c.reference, lo, hi)
		if err != nil {
			return
		}
		greatest.add(t.Change.Min * 1e6)
		greatest.add(t.Change.Max * 1e6)
		box.add(t.Box * 1e6)
	}
	greatest.sure, box.sure = c.sureChange(set, lo, hi), 0
	greatest.into(m.Numbers, rankChange, "ppm", quantity.ChangeText(greatest.lo*1e-6)+" to "+quantity.ChangeText(greatest.hi*1e-6))
	box.into(m.Numbers, rankBox, "ppm/K", "at most "+quantity.PPMText(box.hi*1e-6))
}

// sureChange is the change in ppm that every curve within the limits reaches
// at one end of the window: where both limits lie on the same side of zero,
// the one nearer to it.
func (c *comparison) sureChange(set *material.DataSet, lo, hi float64) float64 {
	read := material.Reading{Told: set.Ratio, Ratio: true, Reference: c.reference}
	sure := 0.0
	for _, t := range []float64{lo, hi} {
		l, ok := read.Limits(t)
		if ok && (l.Lower-1)*(l.Upper-1) > 0 {
			sure = math.Max(sure, math.Min(math.Abs(l.Lower-1), math.Abs(l.Upper-1))*1e6)
		}
	}
	return sure
}

// order sorts the materials: whole windows before parts, then by the number
// that ranks them, by magnitude, then by ID. Ranking holds the whole ones.
func (c *comparison) order() {
	value := func(m MaterialOutcome) float64 {
		if n, ok := m.Numbers[c.rank]; ok && n.Value != nil {
			return math.Abs(*n.Value)
		}
		return math.Inf(1)
	}
	sort.SliceStable(c.out.Materials, func(i, j int) bool {
		a, b := c.out.Materials[i], c.out.Materials[j]
		if (a.Partly == "") != (b.Partly == "") {
			return a.Partly == ""
		}
		if value(a) != value(b) {
			return value(a) < value(b)
		}
		return a.Material < b.Material
	})
	for _, m := range c.out.Materials {
		if m.Partly == "" && !math.IsInf(value(m), 1) {
			c.out.Ranking = append(c.out.Ranking, m.Material)
		}
	}
}
