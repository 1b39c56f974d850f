package export

import (
	"errors"
	"fmt"
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// An Order asks for a file for another program; its zero value takes the
// usual: the adopted data set over its whole valid range.
type Order struct {
	Set     string           // data set, "" for the adopted one
	Nominal *float64         // K; nil: 27 °C for simulators, else the set's own reference temperature
	Window  *material.Window // K; nil: the whole valid range
	Step    float64          // K between rows; 0: chosen
}

// task is an order that has been looked at: there is a curve over the window
// and the nominal temperature lies on it.
type task struct {
	record  *material.Record
	set     *material.DataSet
	ratio   curve.Curve // R/R(nominal) over the valid range
	scale   float64     // R(nominal)/R(reference temperature)
	nominal float64     // K
	lo, hi  float64     // K, the window
	step    float64     // K, 0: chosen
}

// take looks at an order and tells the curve about its nominal temperature.
func (o Order) take(r *material.Record, usual func(*material.DataSet) float64) (task, error) {
	t, err := o.look(r, usual)
	if err != nil {
		return task{}, err
	}
	t.ratio, _ = curve.Ratio(t.set.Ratio.Nominal, t.nominal)
	return t, nil
}

// look is take without the curve. The error says in words why nothing can be
// handed over.
func (o Order) look(r *material.Record, usual func(*material.DataSet) float64) (task, error) {
	set := r.Set(o.Set)
	switch {
	case set == nil && o.Set != "":
		return task{}, fmt.Errorf("there is no data set %q", o.Set)
	case set == nil:
		return task{}, errors.New("there is no data set")
	case set.Ratio == nil:
		return task{}, fmt.Errorf("%s tells no resistance over temperature: it has no coefficient", set.Label())
	case !set.Ratio.HasNominal():
		return task{}, fmt.Errorf("%s states limits without a nominal curve", set.Label())
	}
	t := task{record: r, set: set, nominal: usual(set), lo: set.Valid.Lo, hi: set.Valid.Hi, step: o.Step}
	if o.Nominal != nil {
		t.nominal = *o.Nominal
	}
	if !set.Valid.Contains(t.nominal) {
		return task{}, fmt.Errorf("the nominal temperature %s lies outside the valid range %s to %s", quantity.CelsiusText(t.nominal), quantity.CelsiusText(t.lo), quantity.CelsiusText(t.hi))
	}
	if o.Window != nil {
		t.lo, t.hi = o.Window.Lo, o.Window.Hi
	}
	if !set.Valid.Contains(t.lo) || !set.Valid.Contains(t.hi) {
		return task{}, fmt.Errorf("the window %s to %s reaches outside the valid range %s to %s", quantity.CelsiusText(t.lo), quantity.CelsiusText(t.hi),
			quantity.CelsiusText(set.Valid.Lo), quantity.CelsiusText(set.Valid.Hi))
	}
	if !(t.hi-t.lo >= narrowest) {
		return task{}, errors.New("the window has no width")
	}
	if t.scale, _ = set.Ratio.Nominal.At(t.nominal); !(t.scale > 0) || math.IsInf(t.scale, 0) {
		return task{}, errors.New("the curve has no resistance above zero at the nominal temperature")
	}
	return t, nil
}

// narrowest is the width of window, in kelvin, below which no table has rows.
const narrowest = 0.01

// room27 is the nominal temperature of most circuit simulators.
const room27 = quantity.ZeroCelsius + 27

func simulatorNominal(*material.DataSet) float64 { return room27 }

func ownReference(set *material.DataSet) float64 { return set.RatioReference }

// chordBound bounds how far c may lie from its chord between a and b, by
//
//	h²/8·max|c″| + Σ|jump of c′|·(x − a)(b − x)/h + Σ|jump of c|,  h = b − a,
//
// the jumps being those at the knots x from a to b. c″ of a cubic is a straight
// line: its largest size stands at an end. For a parabola of coefficient β it
// is |β|h²/4. begin is a segment not above a; the last one that was looked at
// comes back, for the next interval.
func chordBound(c curve.Curve, a, b float64, begin int) (bound float64, at int) {
	h, bend, i := b-a, 0.0, begin
	for i < len(c.Segments)-1 && c.Segments[i].To < a-onKnot {
		i++
	}
	at = i
	for ; ; i++ {
		s := &c.Segments[i]
		if from, to := math.Max(a, s.From), math.Min(b, s.To); from < to {
			bend = math.Max(bend, math.Max(math.Abs(second(s, from)), math.Abs(second(s, to))))
		}
		if i == len(c.Segments)-1 || s.To > b+onKnot {
			return bound + float64(float64(h*h)/8*bend), at
		}
		next, x := &c.Segments[i+1], s.To
		if inside := (x - a) * (b - x); inside > 0 {
			bound += math.Abs(first(next, x)-first(s, x)) * inside / h
		}
		bound += math.Abs(valueOf(next, x) - valueOf(s, x))
		at = i
	}
}

// onKnot is how near, in kelvin, a row may be to a knot to count as on it.
const onKnot = 1e-9

func valueOf(s *curve.Segment, t float64) float64 {
	u := t - s.Centre
	return s.C[0] + float64(u*(s.C[1]+float64(u*(s.C[2]+float64(u*s.C[3])))))
}

func first(s *curve.Segment, t float64) float64 {
	u := t - s.Centre
	return s.C[1] + float64(u*(2*s.C[2]+float64(u*(3*s.C[3]))))
}

func second(s *curve.Segment, t float64) float64 {
	return 2*s.C[2] + float64(6*s.C[3]*(t-s.Centre))
}
