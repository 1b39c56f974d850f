package export

import (
	"bytes"
	"fmt"
	"math"
	"sort"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// finest is the place in sizes of how far the line between two rows may lie from the
// curve, relative to the value, where no step was asked for: 10 ppm, more
// where that would take more than mostRows.
const finest = 3

// Elements writes resistivity over temperature for finite-element programs,
// ascending, from limit to limit of the data. A mesh that grows with
// temperature takes the volume resistivity, one that does not takes the
// resistivity on fixed dimensions, in which the growth is contained. There is
// no column of conductivity: straight lines between its values would be another
// curve, and two rows are enough for a metal whose resistivity is a straight line.
func Elements(w *bytes.Buffer, _ *library.Library, r *material.Record, o Order) error {
	t, err := o.take(r, ownReference)
	if err != nil {
		return err
	}
	if err := t.needsResistivity(); err != nil {
		return err
	}
	if n := (t.hi - t.lo) / t.step; t.step > 0 && n >= mostOrderedRows {
		return fmt.Errorf("the step gives more than %d rows", mostOrderedRows)
	}
	at, _ := t.set.Rho.Nominal.At(t.nominal)
	fixed := t.ratio.Scale(at)
	rows, worst := t.elementRows(fixed)
	c := newCSV(w, tableSchemas[1].columns, append([]string{number(t.nominal - quantity.ZeroCelsius), "SI", t.expansionWords(), ppmUp(worst), noValue, noValue}, t.identityCells()...))
	for _, k := range rows {
		rho, _ := t.set.Rho.Nominal.At(k)
		f, _ := fixed.At(k)
		c.row(number(k-quantity.ZeroCelsius), number(k), number(rho), number(f))
	}
	return nil
}

// elementRows are the temperatures of the rows and the largest proven distance
// of the line between two of them from either curve, relative to the value.
func (t *task) elementRows(fixed curve.Curve) (rows []float64, worst float64) {
	rho := t.set.Rho.Nominal
	if t.step > 0 {
		rows = t.evenRows()
	} else {
		rows = t.chosenRows(rho, fixed)
	}
	i, j := 0, 0
	for k := 1; k < len(rows); k++ {
		var a, b float64
		a, i = chordBound(rho, rows[k-1], rows[k], i)
		b, j = chordBound(fixed, rows[k-1], rows[k], j)
		worst = math.Max(worst, math.Max(a/least(rho, rows[k-1], rows[k]), b/least(fixed, rows[k-1], rows[k])))
	}
	return rows, worst
}

// least is the smallest size of c between two rows.
func least(c curve.Curve, a, b float64) float64 {
	e, _ := c.Extremes(a, b)
	return math.Abs(e.Min)
}

func (t *task) evenRows() []float64 {
	var rows []float64
	for i := 0.0; t.lo+float64(i*t.step) < t.hi-1e-9; i++ {
		rows = append(rows, t.lo+float64(i*t.step))
	}
	return append(rows, t.hi)
}

// chosenRows has every knot of both curves and, between two knots, as many
// even steps as keep the line within the bound.
func (t *task) chosenRows(rho, fixed curve.Curve) []float64 {
	knots := t.knots(rho, fixed)
	off := make([]float64, len(knots))
	i, j := 0, 0
	for k := 1; k < len(knots); k++ {
		var a, b float64
		a, i = chordBound(rho, knots[k-1], knots[k], i)
		b, j = chordBound(fixed, knots[k-1], knots[k], j)
		off[k] = math.Max(a/least(rho, knots[k-1], knots[k]), b/least(fixed, knots[k-1], knots[k]))
	}
	for _, ppm := range sizes[finest:] {
		if rows := divided(knots, off, ppm*1e-6); rows != nil {
			return rows
		}
	}
	return knots
}

// divided cuts each interval so that its distance, which goes with the square
// of the step, falls to within; nil when that takes too many rows.
func divided(knots, off []float64, within float64) []float64 {
	rows := []float64{knots[0]}
	for k := 1; k < len(knots); k++ {
		n := math.Max(1, math.Ceil(math.Sqrt(off[k]/within)-1e-9))
		if float64(len(rows))+n > mostRows {
			return nil
		}
		for m := 1.0; m < n; m++ {
			rows = append(rows, knots[k-1]+float64((knots[k]-knots[k-1])*m/n))
		}
		rows = append(rows, knots[k])
	}
	return rows
}

// knots are the ends of the window and the joints of both curves inside it.
func (t *task) knots(curves ...curve.Curve) []float64 {
	list := []float64{t.lo, t.hi}
	for _, c := range curves {
		for _, s := range c.Segments {
			if s.To > t.lo && s.To < t.hi {
				list = append(list, s.To)
			}
		}
	}
	sort.Float64s(list)
	kept := list[:1]
	for _, k := range list[1:] {
		if k-kept[len(kept)-1] > 1e-6 {
			kept = append(kept, k)
		}
	}
	kept[len(kept)-1] = t.hi
	return kept
}

// expansionWords say whether the growth of the body has been taken out of the
// volume resistivity. Where it has not, both columns are on fixed dimensions.
func (t *task) expansionWords() string {
	_, known := t.record.Expansion()
	s := t.set
	switch {
	case s.Basis == "":
		return "not known: basis not stated"
	case s.Basis == material.Resistivity:
		return "corrected"
	case known && (s.Basis != material.Uncorrected || !math.IsNaN(s.DimensionsAt)):
		return "corrected"
	}
	return "not corrected: no expansion recorded"
}
