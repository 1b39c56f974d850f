package statement

import (
	"fmt"
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// usualReferences are the reference temperatures shown side by side, in °C:
// 0 and 20 (standards), 23 (JIS), 25 (wire and component tests), 27
// (simulators). Common practice.
var usualReferences = []float64{0, 20, 23, 25, 27}

// usualWindows are the windows of the TCR table in °C. Common practice:
// ambient, a shunt's usual limits, outdoor and military electronics, hot work.
var usualWindows = [][2]float64{{0, 100}, {20, 60}, {-40, 85}, {-55, 125}, {20, 100}, {20, 500}}

func (b *builder) tables() {
	if b.set == nil {
		return
	}
	b.s.Constants = b.constants()
	b.s.Values = b.values()
	b.s.Windows = b.windows()
	b.perMetre()
}

// constants re-references the constants to the usual temperatures. For a
// polynomial they are exact in the native basis; for other models ρ and the
// slope of R are given instead.
func (b *builder) constants() Grid {
	g := Grid{Caption: "The same curve told about other reference temperatures", Heads: []string{"Constant"}}
	for _, c := range usualReferences {
		g.Heads = append(g.Heads, quantity.CelsiusText(quantity.ZeroCelsius+c))
	}
	poly, native := b.set.Polynomial()
	rows := []struct {
		name string
		cell func(t float64) string
	}{{"ρ in " + b.s.Units.Resistivity.Symbol, func(t float64) string { return b.rhoText(t) }}}
	if native {
		n := coefficientDigits(b.set)
		rows = append(rows,
			constantRow{"α in ppm/K", func(t float64) string { return quantity.Number(poly.Rereference(t).Alpha*1e6, n) }})
		if b.set.Beta != nil || b.set.Gamma != nil {
			rows = append(rows, constantRow{"β in ppm/K²", func(t float64) string { return quantity.Number(poly.Rereference(t).Beta*1e6, n) }})
		}
		if b.set.Gamma != nil {
			rows = append(rows, constantRow{"γ in ppm/K³", func(t float64) string { return quantity.Number(poly.Rereference(t).Gamma*1e6, n) }})
		}
		g.Notes = append(g.Notes, "Exact re-referencing in the native basis ("+orNotStated(string(b.set.Basis))+").")
	} else {
		rows = append(rows, constantRow{"slope of R in ppm/K", b.slopeText})
		g.Notes = append(g.Notes, "The curve is no polynomial: the slope (1/R)·dR/dT stands in the place of α.")
	}
	for _, row := range rows {
		cells := []string{row.name}
		for _, c := range usualReferences {
			cells = append(cells, b.insideCell(quantity.ZeroCelsius+c, row.cell))
		}
		g.Rows = append(g.Rows, cells)
	}
	g.Notes = append(g.Notes, outside+" lies outside the valid range.")
	return g
}

type constantRow = struct {
	name string
	cell func(t float64) string
}

func (b *builder) insideCell(t float64, cell func(float64) string) string {
	if !b.set.Valid.Contains(t) {
		return outside
	}
	return cell(t)
}

func (b *builder) rhoText(t float64) string {
	if !b.set.Rho.HasNominal() {
		return "no resistivity"
	}
	v, ok := b.set.Rho.Nominal.At(t)
	if !ok {
		return outside
	}
	return quantity.Number(b.s.Units.Resistivity.FromSI(v), b.set.Digits())
}

func (b *builder) slopeText(t float64) string {
	if !b.set.Ratio.HasNominal() {
		return "no coefficient"
	}
	v, ok := b.set.Ratio.Nominal.At(t)
	d, ok2 := b.set.Ratio.Nominal.Slope(t)
	if !ok || !ok2 || v == 0 {
		return outside
	}
	return quantity.Number(d/v*1e6, 4)
}

// values is the table at round steps over the valid range, with its ends and
// the reference temperature.
func (b *builder) values() Grid {
	kelvin := b.set.Table != nil && b.set.Table.Kelvin
	g := Grid{Caption: "Values at round steps over the valid range", Heads: b.valueHeads(kelvin)}
	if b.set.Rho == nil && b.set.Ratio == nil {
		g.Notes = []string{"No curve: the record states neither a coefficient nor a table."}
		return g
	}
	for _, t := range roundSteps(b.set.Valid, b.reference(), kelvin, 18) {
		g.Rows = append(g.Rows, b.valueRow(t, kelvin))
	}
	g.Notes = b.valueNotes()
	return g
}

func (b *builder) valueHeads(kelvin bool) []string {
	heads := []string{"T in °C"}
	if kelvin {
		heads = []string{"T in K", "T in °C"}
	}
	if b.set.Rho != nil {
		heads = append(heads, "ρ in "+b.s.Units.Resistivity.Symbol)
		if b.set.Rho.Limits != nil {
			heads = append(heads, "ρ, limits")
		}
		if b.set.Rho.Uncertainty != nil {
			heads = append(heads, fmt.Sprintf("U of ρ (k=%g)", b.set.Rho.K))
		}
	}
	if b.set.Ratio != nil {
		heads = append(heads, "R/R at "+quantity.CelsiusText(b.reference()), "change")
		if b.set.Ratio.Limits != nil {
			heads = append(heads, "change, limits")
		}
	}
	return heads
}

func (b *builder) valueRow(t float64, kelvin bool) []string {
	row := []string{quantity.DegreesText(t)}
	if kelvin {
		row = []string{quantity.KelvinText(t), quantity.DegreesText(t)}
	}
	if b.set.Rho != nil {
		row = append(row, b.rhoText(t))
		if b.set.Rho.Limits != nil {
			row = append(row, b.limitText(t))
		}
		if b.set.Rho.Uncertainty != nil {
			row = append(row, quantity.Number(b.s.Units.Resistivity.FromSI(float64(b.set.Rho.K*b.set.Rho.Uncertainty(t))), 2))
		}
	}
	if b.set.Ratio != nil {
		row = append(row, b.ratioCells(t)...)
	}
	return row
}

func (b *builder) limitText(t float64) string {
	l, ok := b.set.Rho.Limits.At(t)
	if !ok {
		return outside
	}
	u, n := b.s.Units.Resistivity, b.set.Digits()+1
	return quantity.Number(u.FromSI(l.Lower), n) + " to " + quantity.Number(u.FromSI(l.Upper), n)
}

func (b *builder) ratioCells(t float64) []string {
	e := material.Reading{Told: b.set.Ratio, Ratio: true, Reference: b.reference()}
	cells := []string{outside, outside}
	if !b.set.Ratio.HasNominal() {
		cells = []string{"no nominal", "no nominal"}
	} else if v, ok := e.At(t); ok {
		cells = []string{quantity.Fixed(v, b.set.RatioDecimals()), quantity.ChangeText(v - 1)}
	}
	if b.set.Ratio.Limits == nil {
		return cells
	}
	l, ok := e.Limits(t)
	if !ok {
		return append(cells, outside)
	}
	return append(cells, quantity.ChangeText(l.Lower-1)+" to "+quantity.ChangeText(l.Upper-1))
}

func (b *builder) valueNotes() []string {
	var notes []string
	if b.set.Rho != nil {
		notes = append(notes, bandNote("ρ", b.set.Rho)...)
	}
	if b.set.Ratio != nil {
		notes = append(notes, bandNote("R/R", b.set.Ratio)...)
	}
	return notes
}

func notCovered(list []string) string {
	if len(list) == 0 {
		return "."
	}
	return "; not covered: " + joined(list, "") + "."
}

func bandNote(name string, t *material.Told) []string {
	var notes []string
	if t.Limits == nil && t.Uncertainty == nil {
		notes = append(notes, name+" is shown without a band: "+joined(t.NoLimits, "none is stated")+".")
	}
	if t.Limits != nil {
		notes = append(notes, name+" limits: worst case from "+joined(t.Limits.Covers, "")+notCovered(t.Limits.NotCovered))
	}
	if t.Uncertainty != nil {
		notes = append(notes, fmt.Sprintf("%s uncertainty (k=%g) from %s%s", name, t.K, joined(t.Covers, ""), notCovered(t.NotCovered)))
	}
	return notes
}

// windows is the table of TCR measures over the usual windows and the whole
// valid range.
func (b *builder) windows() Grid {
	g := Grid{
		Caption: "Temperature coefficient of resistance about " + quantity.CelsiusText(b.reference()) + ", in ppm/K, by each measure",
		Heads:   []string{"Window", "slope at " + quantity.CelsiusText(b.reference()), "slope, least to greatest", "chord, cold", "chord, hot", "box", "greatest change"},
	}
	if !b.set.Ratio.HasNominal() {
		g.Notes = []string{"Cannot be told: no coefficient with a nominal value."}
		return g
	}
	windows := append([]material.Window{}, b.set.Valid)
	for _, w := range usualWindows {
		windows = append(windows, material.Window{Lo: quantity.ZeroCelsius + w[0], Hi: quantity.ZeroCelsius + w[1]})
	}
	for i, w := range windows {
		if i > 0 && w.Lo == b.set.Valid.Lo && w.Hi == b.set.Valid.Hi {
			continue
		}
		g.Rows = append(g.Rows, b.windowRow(w, i == 0))
	}
	g.Notes = b.windowNotes()
	return g
}

func (b *builder) windowNotes() []string {
	notes := []string{outside + ": the window or the reference temperature reaches outside the valid range."}
	if b.set.Ratio.Nominal.FromTable {
		notes = append(notes, "Slopes, turning points and extremes are limited by the spacing of the table.")
	}
	return notes
}

func (b *builder) windowRow(w material.Window, whole bool) []string {
	name := rangeText(w)
	if whole {
		name = "valid range: " + name
	}
	m, err := curve.Measure(b.set.Ratio.Nominal, b.reference(), w.Lo, w.Hi)
	if err != nil {
		return []string{name, outside, outside, outside, outside, outside, outside}
	}
	return []string{name, quantity.PPMText(m.SlopeAtReference), quantity.PPMText(m.SlopeMin) + " to " + quantity.PPMText(m.SlopeMax),
		chordText(m.ChordCold), chordText(m.ChordHot), quantity.PPMText(m.Box),
		quantity.ChangeText(m.Change.Greatest) + " at " + quantity.CelsiusText(m.Change.GreatestAt)}
}

func chordText(c *float64) string {
	if c == nil {
		return "none on this side"
	}
	return quantity.PPMText(*c)
}

// roundSteps gives temperatures at a round step (1, 2, 5 times a power of
// ten) with both ends of w and the reference temperature, at most about n.
func roundSteps(w material.Window, reference float64, kelvin bool, n int) []float64 {
	offset := quantity.ZeroCelsius
	if kelvin {
		offset = 0
	}
	step := niceStep((w.Hi - w.Lo) / float64(n))
	steps := []float64{w.Lo}
	for i := math.Ceil((w.Lo - offset) / step); ; i++ {
		t := offset + float64(i*step)
		if t >= w.Hi-material.Slack {
			break
		}
		if t > w.Lo+material.Slack {
			steps = append(steps, t)
		}
	}
	if w.Hi > w.Lo {
		steps = append(steps, w.Hi)
	}
	return insertStep(steps, reference)
}

func insertStep(steps []float64, t float64) []float64 {
	for i, s := range steps {
		if math.Abs(s-t) < 1e-6 {
			return steps
		}
		if s > t {
			if i == 0 {
				return steps
			}
			return append(steps[:i], append([]float64{t}, steps[i:]...)...)
		}
	}
	return steps
}

func niceStep(least float64) float64 {
	if !(least > 0) {
		return 1
	}
	p := math.Pow(10, math.Floor(math.Log10(least)))
	for _, m := range []float64{1, 2, 5, 10} {
		if float64(m*p) >= least-1e-9 {
			return float64(m * p)
		}
	}
	return float64(10 * p)
}
