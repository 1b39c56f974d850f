package study

import (
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// The numbers of a change over a window, shared by the studies that look at one.
var changeNumbers = []NumberDoc{
	{"greatest_change", quantity.Ratio, "ppm", 4, "greatest change", "Change of R over the window from its value at the reference temperature: the one of largest magnitude."},
	{"change_least", quantity.Ratio, "ppm", 4, "least change", "Lowest change of R over the window."},
	{"change_most", quantity.Ratio, "ppm", 4, "greatest rise", "Highest change of R over the window."},
	{"change_cold", quantity.Ratio, "ppm", 4, "cold side", "Greatest change of R below the reference temperature."},
	{"change_hot", quantity.Ratio, "ppm", 4, "hot side", "Greatest change of R above the reference temperature."},
	{"at_temperature", quantity.Temperature, "°C", 4, "at", "Temperature of the greatest change."},
	{"box", quantity.Coefficient1, "ppm/K", 3, "box", "Box coefficient over the window."},
	{"turning_point", quantity.Temperature, "°C", 4, "turns at", "Turning point of R inside the window."},
}

// withChange joins the numbers of a change and those of a study.
func withChange(more ...NumberDoc) []NumberDoc {
	return append(append([]NumberDoc{}, changeNumbers...), more...)
}

// swing is the change of R over a window with the worst case of the limits.
type swing struct {
	measures       curve.Measures // of the nominal curve; zero without one
	nominal        bool
	greatest       span
	least, most    span
	box            span
	cold, hot      span // unknown where the reference lies at the edge
	partly         string
	lo, hi         float64 // the part of the window that the data cover
	cannot         string
	coldAt, hotAt  float64
	greatestAt     float64
	turning        []float64 // K, inside the window
	limitedByTable bool
}

// swingOf measures a set over [lo, hi] about reference (K). Where the data
// cover only a part of the window, that part is measured and named.
func swingOf(set *material.DataSet, reference, lo, hi float64) swing {
	s := swing{cold: unknown(), hot: unknown()}
	switch {
	case set == nil:
		s.cannot = "no data"
		return s
	case set.Ratio == nil || (!set.Ratio.HasNominal() && set.Ratio.Limits == nil):
		s.cannot = "no coefficient"
		return s
	case !set.Valid.Contains(reference):
		s.cannot = quantity.CelsiusText(reference) + " lies outside the valid range " + windowText(set.Valid.Lo, set.Valid.Hi)
		return s
	}
	s.lo, s.hi = math.Max(lo, set.Valid.Lo), math.Min(hi, set.Valid.Hi)
	if s.lo >= s.hi {
		s.cannot = "the valid range " + windowText(set.Valid.Lo, set.Valid.Hi) + " and the window share nothing"
		return s
	}
	if s.lo > lo+material.Slack || s.hi < hi-material.Slack {
		s.partly = windowText(s.lo, s.hi)
	}
	if set.Ratio.HasNominal() {
		if s.cannot = s.measureNominal(set, reference); s.cannot != "" {
			return s
		}
	} else {
		s.greatest, s.least, s.most, s.box = unknown(), unknown(), unknown(), unknown()
	}
	if set.Ratio.Limits != nil {
		s.worstCase(set, reference)
	}
	return s
}

func (s *swing) measureNominal(set *material.DataSet, reference float64) (cannot string) {
	m, err := curve.Measure(set.Ratio.Nominal, reference, s.lo, s.hi)
	if err != nil {
		return err.Error()
	}
	s.nominal, s.measures = true, m
	s.greatest, s.least, s.most, s.box = nominal(m.Change.Greatest), nominal(m.Change.Min), nominal(m.Change.Max), nominal(m.Box)
	s.greatestAt, s.limitedByTable = m.Change.GreatestAt, m.FromTable
	for _, t := range m.TurningPoints {
		if t.Inside {
			s.turning = append(s.turning, t.T)
		}
	}
	s.cold, s.coldAt = side(set.Ratio.Nominal, reference, s.lo, math.Min(reference, s.hi))
	s.hot, s.hotAt = side(set.Ratio.Nominal, reference, math.Max(reference, s.lo), s.hi)
	return ""
}

// side is the greatest change on one side of the reference temperature.
func side(c curve.Curve, reference, lo, hi float64) (span, float64) {
	if hi-lo <= material.Slack {
		return unknown(), math.NaN()
	}
	m, err := curve.Measure(c, reference, lo, hi)
	if err != nil {
		return unknown(), math.NaN()
	}
	return nominal(m.Change.Greatest), m.Change.GreatestAt
}

// worstCase widens every number by the corners of the stated limits.
func (s *swing) worstCase(set *material.DataSet, reference float64) {
	band, err := curve.MeasureBand(set.Ratio.Limits.Corners, reference, s.lo, s.hi)
	if err != nil {
		return
	}
	widen := func(x *span, lo, hi float64) { x.lo, x.hi, x.banded = lo, hi, true }
	widen(&s.greatest, band.Change.Lower, band.Change.Upper)
	s.greatest.sure = sureChange(set, reference, s.lo, s.hi)
	// Nothing finer than the whole band is claimed for the two ends of the change.
	widen(&s.least, band.Change.Lower, math.Max(s.least.v, 0))
	widen(&s.most, math.Min(s.most.v, 0), band.Change.Upper)
	if !s.nominal {
		s.least, s.most = unknown(), unknown()
	}
	widen(&s.box, 0, band.Box.Upper)
	for _, x := range []struct {
		into   *span
		lo, hi float64
	}{{&s.cold, s.lo, math.Min(reference, s.hi)}, {&s.hot, math.Max(reference, s.lo), s.hi}} {
		if x.hi-x.lo <= material.Slack {
			continue
		}
		if b, err := curve.MeasureBand(set.Ratio.Limits.Corners, reference, x.lo, x.hi); err == nil {
			widen(x.into, b.Change.Lower, b.Change.Upper)
			x.into.sure = sureChange(set, reference, x.lo, x.hi)
		}
	}
}

// sureChange is the change that every curve within the limits reaches at one
// end of the window: where both limits lie on the same side of zero, the one
// nearer to it.
func sureChange(set *material.DataSet, reference, lo, hi float64) float64 {
	read := material.Reading{Told: set.Ratio, Ratio: true, Reference: reference}
	sure := 0.0
	for _, t := range []float64{lo, hi} {
		l, ok := read.Limits(t)
		if ok && (l.Lower-1)*(l.Upper-1) > 0 {
			sure = math.Max(sure, math.Min(math.Abs(l.Lower-1), math.Abs(l.Upper-1)))
		}
	}
	return sure
}

// tellSwing names the numbers of a change, and why they are not there.
func (a *answer) tellSwing(s swing) {
	if s.cannot != "" {
		a.cannot(s.cannot)
		return
	}
	if s.partly != "" {
		a.Partly = s.partly
		a.reason("data cover only " + s.partly + " of the window")
	}
	if !s.nominal {
		a.reason("limits only, no nominal: the worst case is told, and nothing is ranked")
	}
	a.tellAt("greatest_change", s.greatest, s.greatestAt)
	a.tell("change_least", s.least)
	a.tell("change_most", s.most)
	a.tellAt("change_cold", s.cold, s.coldAt)
	a.tellAt("change_hot", s.hot, s.hotAt)
	a.tell("box", s.box)
	if s.nominal {
		a.tell("at_temperature", nominal(s.greatestAt))
	} else {
		delete(a.at, "greatest_change")
	}
	if len(s.turning) > 0 {
		a.tell("turning_point", nominal(s.turning[0]))
	}
	if s.limitedByTable {
		a.Warnings = append(a.Warnings, "extremes are limited by the spacing of the table")
	}
}
