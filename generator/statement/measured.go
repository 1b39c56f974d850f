package statement

import (
	"math"
	"strconv"

	"ohmfolio/generator/figure"
	"ohmfolio/generator/fit"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// Measured is what is shown of measured points: the fit in words, residuals as
// a figure with its table, coefficients with covariance, and the parts of the
// uncertainty that are common to all points, each on its own line.
type Measured struct {
	Set          string
	Summary      string
	Warnings     []string
	Residuals    Grid
	Coefficients Grid
	Budget       Grid
	Figure       *figure.Figure
}

// shownResiduals is how many points a residual table shows; of more, every
// n-th and all outliers.
const shownResiduals = 60

func (b *builder) measured() {
	for _, set := range b.r.Sets {
		if set.Fitted != nil {
			b.s.Measured = append(b.s.Measured, b.measuredOf(set))
		}
	}
}

func (b *builder) measuredOf(set *material.DataSet) Measured {
	f := set.Fitted
	m := Measured{Set: set.Name, Summary: f.Describe(), Warnings: f.Result.Warnings, Residuals: residualTable(set), Coefficients: coefficientTable(set), Budget: budgetTable(set)}
	m.Figure = &figure.Figure{ID: "residuals-" + strconv.Itoa(len(b.s.Measured)), Title: b.r.Name + ": residuals of " + set.Name, Width: figureWidth, Height: figureHeight,
		Description: "Difference of each measured point from the fitted curve. The table below holds the same numbers.", XTitle: "temperature in °C", YTitle: "residual in ppm"}
	points := figure.Points{Ink: 1}
	for i, p := range f.Points {
		points.List = append(points.List, figure.Point{X: p.T - quantity.ZeroCelsius, Y: residualPPM(f, i), ErrX: p.UT, ErrY: p.U / f.Result.B[0] * 1e6})
	}
	m.Figure.Points = []figure.Points{points}
	m.Figure.Lines = []figure.Line{{X: []float64{set.Valid.Lo - quantity.ZeroCelsius, set.Valid.Hi - quantity.ZeroCelsius}, Y: []float64{0, 0}, Ink: 4, Thin: true, Dash: 2}}
	return m
}

func residualPPM(f *material.Fitted, i int) float64 {
	return float64(f.Result.Residuals[i] / f.Result.B[0] * 1e6)
}

func residualTable(set *material.DataSet) Grid {
	f := set.Fitted
	g := Grid{Caption: "Points and residuals of " + set.Name, Heads: []string{"T in °C", "measured / value at " + quantity.CelsiusText(set.Reference), "fitted", "residual, ppm", "leverage", "remark"}}
	outlier := map[int]bool{}
	for _, i := range f.Result.Outliers {
		outlier[i] = true
	}
	every := (len(f.Points) + shownResiduals - 1) / shownResiduals
	for i, p := range f.Points {
		if i%every != 0 && !outlier[i] {
			continue
		}
		y, _ := f.Result.At(p.T)
		remark := ""
		if outlier[i] {
			remark = "outlier, kept"
		}
		g.Rows = append(g.Rows, []string{quantity.DegreesText(p.T), quantity.Fixed(p.Y/f.Result.B[0], 6), quantity.Fixed(y/f.Result.B[0], 6),
			quantity.Fixed(residualPPM(f, i), 1), quantity.Fixed(f.Result.Leverage[i], 2), remark})
	}
	g.Notes = []string{"An outlier is a point whose residual, over its own uncertainty without it, is beyond Student's t at 5 % for all points together. It stays in the fit."}
	if every > 1 {
		g.Notes = append(g.Notes, "Every "+strconv.Itoa(every)+"th point is shown, and all outliers.")
	}
	return g
}

func coefficientTable(set *material.DataSet) Grid {
	list, covariance, ok := set.Fitted.Result.Relative()
	g := Grid{Caption: "Coefficients of " + set.Name + " about " + quantity.CelsiusText(set.Reference) + ", standard uncertainties of the fit alone", Heads: []string{"Coefficient", "value", "standard uncertainty"}}
	if !ok {
		return g
	}
	names := []string{"value at the reference temperature", "α", "β", "γ"}
	units := []string{"", "ppm/K", "ppm/K²", "ppm/K³"}
	correlation := fit.Correlation(covariance)
	for i := range list {
		g.Heads = append(g.Heads, "r with "+names[i])
	}
	for i, c := range list {
		row := []string{names[i] + ", over itself", "1", quantity.Number(c.U/c.Value, 2)}
		if i > 0 {
			row = []string{names[i] + " in " + units[i], quantity.Number(c.Value*1e6, 6), quantity.Number(c.U*1e6, 2)}
		}
		for j := range list {
			row = append(row, quantity.Fixed(correlation[i][j], 3))
		}
		g.Rows = append(g.Rows, row)
	}
	r := set.Fitted.Result
	g.Notes = append(g.Notes, "R² "+quantity.Fixed(r.RSquared, 6)+"; coverage factor k = "+quantity.Fixed(set.Fitted.K, 2)+" for 95.45 % and "+strconv.Itoa(r.Dof)+" degrees of freedom.")
	if !math.IsNaN(r.ChiSquare) {
		g.Notes = append(g.Notes, "Weighted by the given uncertainties, covariance unscaled; χ²/ν = "+quantity.Number(r.ChiSquare, 3)+".")
	}
	if note := specimenNote(set); note != "" {
		g.Notes = append(g.Notes, note)
	}
	if l := r.LackOfFit; l != nil {
		g.Notes = append(g.Notes, "Lack of fit: F("+strconv.Itoa(l.Dof1)+", "+strconv.Itoa(l.Dof2)+") = "+quantity.Number(l.F, 3)+", p = "+quantity.Number(l.P, 2)+".")
	}
	return g
}

// specimenNote lets a reader recompute ρ by hand: R of the fit, A/L of the
// specimen, and how far expansion moved it.
func specimenNote(set *material.DataSet) string {
	f := set.Fitted
	if math.IsNaN(f.Section) || set.Resistivity == nil {
		return ""
	}
	note := "ρ = R·A/L: R at " + quantity.CelsiusText(set.Reference) + " is " + quantity.Number(f.Result.B[0], 7) + quantity.NarrowSpace + "Ω by the fit, A/L of the specimen " +
		quantity.Number(f.Section*1e3, 6) + quantity.NarrowSpace + "mm"
	if at, ok := set.Node.Get("specimen").Get("at").Quantity(); ok {
		note += " at " + quantity.CelsiusText(at.Value)
		switch {
		case f.Moved != 1:
			note += ", times " + quantity.Fixed(f.Moved, 6) + " by expansion to the reference temperature"
		case at.Value != set.Reference:
			note += ", not moved to the reference temperature: no expansion recorded"
		}
	}
	return note + "."
}

func budgetTable(set *material.DataSet) Grid {
	f := set.Fitted
	g := Grid{Caption: "Uncertainty of " + set.Name + " at " + quantity.CelsiusText(set.Reference) + ", standard (k = 1)", Heads: []string{"Part", "on the value, ppm", "on α, ppm/K"}}
	list, _, ok := f.Result.Relative()
	if !ok {
		return g
	}
	value, alpha := list[0].U/list[0].Value, list[1].U
	g.Rows = append(g.Rows, []string{"scatter of the fit", quantity.Number(value*1e6, 2), quantity.Number(alpha*1e6, 2)})
	sumV, sumA := float64(value*value), float64(alpha*alpha)
	for _, line := range f.Budget {
		g.Rows = append(g.Rows, []string{line.From, quantity.Number(line.Value*1e6, 2), quantity.Number(line.Alpha*1e6, 2)})
		sumV, sumA = sumV+float64(line.Value*line.Value), sumA+float64(line.Alpha*line.Alpha)
	}
	g.Rows = append(g.Rows, []string{"together, root of the sum of squares", quantity.Number(math.Sqrt(sumV)*1e6, 2), quantity.Number(math.Sqrt(sumA)*1e6, 2)})
	g.Notes = []string{"Parts below the first line are common to all points and were added after the fit; geometry does not touch α."}
	return g
}

// measuredPoints are the points of a set for its figure: as far off the curve
// as they are off the fit, whatever conversion lies between.
func measuredPoints(set *material.DataSet, e material.Reading, convert func(float64) float64, ink int) (figure.Points, bool) {
	f := set.Fitted
	if f == nil {
		return figure.Points{}, false
	}
	points := figure.Points{Label: set.Name, Ink: ink}
	every := (len(f.Points) + 199) / 200 // what a figure can show
	for i := 0; i < len(f.Points); i += every {
		p := f.Points[i]
		fitted, _ := f.Result.At(p.T)
		v, ok := e.At(p.T)
		if !ok {
			continue
		}
		y := convert(float64(v * p.Y / fitted))
		points.List = append(points.List, figure.Point{X: p.T - quantity.ZeroCelsius, Y: y, ErrX: p.UT, ErrY: math.Abs(convert(float64(v*(p.Y+p.U)/fitted)) - y)})
	}
	return points, len(points.List) > 0
}
