package statement

import (
	"math"
	"strconv"

	"ohmfolio/generator/figure"
	"ohmfolio/generator/fit"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// Lots is what is shown of received lots: their deviation from the house value
// in time order, its statistics, and a computed proposal.
type Lots struct {
	Figure     *figure.Figure // nil for fewer than two lots
	Table      Grid
	Statistics []Fact
	Proposal   string // "house value stands", "propose a change", or why neither
}

// leastLots is how many lots a shift test needs to say anything.
const leastLots = 3

// ShiftTest is Student's t test of a mean deviation against zero, two-sided at
// 5 %: the house value is left when |mean| > t(0.975, n−1)·s/√n.
type ShiftTest struct {
	N                  int
	Mean, SD, Min, Max float64 // relative
	Critical           float64 // t(0.975, n−1)·s/√n
	Shifted            bool
}

// Shift tests relative deviations; Critical is NaN for fewer than two.
func Shift(deviations []float64) ShiftTest {
	s := ShiftTest{N: len(deviations), Min: math.Inf(1), Max: math.Inf(-1), Critical: math.NaN()}
	for _, d := range deviations {
		s.Mean += d / float64(s.N)
		s.Min, s.Max = math.Min(s.Min, d), math.Max(s.Max, d)
	}
	if s.N < 2 {
		return s
	}
	sum := 0.0
	for _, d := range deviations {
		sum += float64((d - s.Mean) * (d - s.Mean))
	}
	s.SD = math.Sqrt(sum / float64(s.N-1))
	s.Critical = fit.CoverageFactor(0.95, float64(s.N-1)) * s.SD / math.Sqrt(float64(s.N))
	s.Shifted = math.Abs(s.Mean) > s.Critical
	return s
}

func (b *builder) lots() {
	if len(b.r.Received) == 0 || b.set == nil || !b.set.Rho.HasNominal() {
		return
	}
	l := &Lots{Table: Grid{Caption: "Received lots against the house value at their own temperature",
		Heads: []string{"Date", "lot", "supplier", "T in °C", "ρ in " + b.s.Units.Resistivity.Symbol, "deviation", "U (k=2)", "judged"}}}
	var deviations []float64
	points := figure.Points{Ink: 1}
	for _, lot := range b.r.Received {
		d, row, ok := b.lotRow(lot)
		l.Table.Rows = append(l.Table.Rows, row)
		if !ok {
			continue
		}
		deviations = append(deviations, d)
		u := lot.U
		if math.IsNaN(u) {
			u = 0
		}
		points.List = append(points.List, figure.Point{X: float64(len(deviations)), Y: float64(d * 100), ErrY: float64(u * 100)})
	}
	l.Table.Notes = []string{"Deviation = ρ of the lot over the house value at the lot's measuring temperature, less 1."}
	test := Shift(deviations)
	l.Statistics, l.Proposal = statisticsOf(test), b.proposal(test)
	if len(points.List) > 1 {
		l.Figure = b.lotFigure(points)
	}
	b.s.Lots = l
}

func (b *builder) lotRow(lot material.Lot) (float64, []string, bool) {
	u := "not stated"
	if !math.IsNaN(lot.U) {
		u = quantity.Fixed(float64(lot.U*100), 2) + quantity.NarrowSpace + "%"
	}
	row := []string{lot.Date, lot.Name, orNotStated(lot.Supplier), quantity.DegreesText(lot.Temperature), quantity.Number(b.s.Units.Resistivity.FromSI(lot.Resistivity), 4)}
	house, ok := b.set.Rho.Nominal.At(lot.Temperature)
	if !ok {
		return 0, append(row, "cannot be told", u, "measured outside the valid range"), false
	}
	d := lot.Resistivity/house - 1
	return d, append(row, quantity.Fixed(float64(d*100), 2)+quantity.NarrowSpace+"%", u, b.judgeLot(lot)), true
}

// judgeLot holds a lot against the limits of the house value; its own
// uncertainty decides whether the answer is certain.
func (b *builder) judgeLot(lot material.Lot) string {
	l, ok := material.Reading{Told: b.set.Rho}.Limits(lot.Temperature)
	if !ok {
		return "no limits stated"
	}
	half := float64(lot.Resistivity * lot.U)
	switch {
	case lot.Resistivity < l.Lower || lot.Resistivity > l.Upper:
		return "outside limits"
	case !math.IsNaN(half) && (lot.Resistivity-half < l.Lower || lot.Resistivity+half > l.Upper):
		return "within limits, not by its uncertainty"
	}
	return "within limits"
}

func statisticsOf(s ShiftTest) []Fact {
	percent := func(x float64) string { return quantity.Fixed(float64(x*100), 3) + quantity.NarrowSpace + "%" }
	facts := []Fact{{Label: "Lots compared", Value: strconv.Itoa(s.N)}}
	if s.N == 0 {
		return facts
	}
	facts = append(facts, Fact{Label: "Mean deviation", Value: percent(s.Mean)}, Fact{Label: "Least and greatest", Value: percent(s.Min) + " to " + percent(s.Max)})
	if s.N > 1 {
		facts = append(facts, Fact{Label: "Standard deviation", Value: percent(s.SD)},
			Fact{Label: "Shift test", Value: "mean beyond ±" + percent(s.Critical) + " would be a shift", Remark: "t(0.975, " + strconv.Itoa(s.N-1) + ")·s/√n, Student"})
	}
	return facts
}

// proposal is what the lots say of the house value. A person decides.
func (b *builder) proposal(s ShiftTest) string {
	switch {
	case s.N < leastLots:
		return "Nothing is proposed: a shift test needs " + strconv.Itoa(leastLots) + " lots at least."
	case !s.Shifted:
		return "House value stands: the mean deviation is not told apart from zero."
	}
	house, _ := b.set.Rho.Nominal.At(b.reference())
	u := b.s.Units.Resistivity
	return "Propose a change: the lots lie " + quantity.Fixed(float64(s.Mean*100), 2) + quantity.NarrowSpace + "% from the house value, beyond chance; their mean is " +
		u.Format(float64(house*(1+s.Mean)), b.set.Digits()) + " at " + quantity.CelsiusText(b.reference()) + ". Look first whether supplier, temper and method are the same."
}

// lotFigure shows the lots in order, with the limits of the house value.
func (b *builder) lotFigure(points figure.Points) *figure.Figure {
	f := &figure.Figure{ID: "lots", Title: b.r.Name + ": received lots", Width: figureWidth, Height: figureHeight,
		Description: "Deviation of received lots from the house value in order of their dates. The table below holds the same numbers.",
		XTitle:      "lots in order of dates", YTitle: "deviation in %", Points: []figure.Points{points}}
	x := []float64{0.5, float64(len(points.List)) + 0.5}
	f.Lines = []figure.Line{{Label: "house value", X: x, Y: []float64{0, 0}, Ink: 4, Thin: true}}
	house, ok := b.set.Rho.Nominal.At(b.reference())
	l, limited := material.Reading{Told: b.set.Rho}.Limits(b.reference())
	if ok && limited {
		lo, hi := float64((l.Lower/house-1)*100), float64((l.Upper/house-1)*100)
		f.Lines = append(f.Lines, figure.Line{Label: "upper limit", X: x, Y: []float64{hi, hi}, Ink: 2, Dash: 2, Thin: true},
			figure.Line{Label: "lower limit", X: x, Y: []float64{lo, lo}, Ink: 2, Dash: 2, Thin: true})
	}
	return f
}
