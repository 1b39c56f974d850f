package statement

import (
	"math"

	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// classPoints are the temperatures at which tolerance classes are told, in °C.
var classPoints = []float64{-200, -100, -50, 0, 50, 100, 150, 200, 300, 400, 500, 600, 650, 800, 850}

// classes tells the tolerance classes of a thermometer in temperature, and in
// resistance through the slope of the adopted curve, for 100 Ω at its
// reference temperature.
func (b *builder) classes() {
	if b.set == nil || len(b.set.Classes) == 0 || !b.set.Ratio.HasNominal() {
		return
	}
	g := Grid{Caption: "Tolerance classes, as ± temperature and as ± resistance of a sensor of 100" + quantity.NarrowSpace + "Ω at " + quantity.CelsiusText(b.set.RatioReference),
		Heads: []string{"T in °C"}}
	for _, c := range b.set.Classes {
		g.Heads = append(g.Heads, c.Name+", K", c.Name+", Ω")
		g.Notes = append(g.Notes, classNote(c))
	}
	for _, celsius := range classPoints {
		t := celsius + quantity.ZeroCelsius
		if !b.set.Valid.Contains(t) {
			continue
		}
		row := []string{quantity.Number(celsius, 4)}
		for _, c := range b.set.Classes {
			row = append(row, b.classCells(c, t)...)
		}
		g.Rows = append(g.Rows, row)
	}
	g.Notes = append(g.Notes, outside+" lies outside the range of the class.")
	b.s.Classes = g
}

// ClassTolerance is the tolerance of c at t (K) in kelvin, and as a change of
// R/R(reference) by the slope of the curve there; false outside its range.
func ClassTolerance(set *material.DataSet, c material.ToleranceClass, t float64) (kelvin, ratio float64, ok bool) {
	kelvin, ok = c.At(t)
	slope, inside := set.Ratio.Nominal.Slope(t)
	at, okRef := set.Ratio.Nominal.At(set.RatioReference)
	return kelvin, math.Abs(float64(kelvin * slope / at)), ok && inside && okRef
}

func (b *builder) classCells(c material.ToleranceClass, t float64) []string {
	kelvin, ratio, ok := ClassTolerance(b.set, c, t)
	if !ok {
		return []string{outside, outside}
	}
	return []string{quantity.Fixed(kelvin, 3), quantity.Fixed(float64(ratio*100), 3)}
}

func classNote(c material.ToleranceClass) string {
	note := "Class " + c.Name + ": ±(" + quantity.Number(c.AtZero, 3) + " + " + quantity.Number(c.PerDegree, 3) + "·|t|)" + quantity.NarrowSpace + "K, t in °C"
	if c.Window == nil {
		return note + "; its range is not stated here, look it up in the source."
	}
	return note + ", " + quantity.CelsiusText(c.Window.Lo) + " to " + quantity.CelsiusText(c.Window.Hi) + "."
}
