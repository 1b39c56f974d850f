// Package curve holds temperature curves. A model's one duty is to lower itself
// to cubic segments; value, slope, extremes, turning points, coefficients of
// resistance and bands are all told from the segments, so that program, browser
// and exports agree. Temperatures are kelvin, everything else is SI. Nothing
// here knows what a material is.
package curve

import (
	"fmt"
	"math"
	"strconv"
)

// slack is the width, in kelvin, by which a converted temperature may miss the
// edge of a closed range: 212 °F lies in "to 100 °C".
const slack = 1e-9

// A Curve is a chain of segments, ascending, each beginning where the one below
// ends. A curve without segments tells nothing. Curves are not changed after
// they are made and may be shared between goroutines.
type Curve struct {
	Segments []Segment
	// FromTable marks a curve drawn through the rows of a table: its slopes,
	// turning points and extremes are limited by the spacing of the table.
	FromTable bool
}

// Range gives the closed interval on which the curve is told, in kelvin; both
// NaN when it has no segments.
func (c Curve) Range() (lo, hi float64) {
	if len(c.Segments) == 0 {
		return math.NaN(), math.NaN()
	}
	return c.Segments[0].From, c.Segments[len(c.Segments)-1].To
}

// At gives the value at t kelvin. Outside the range, and for NaN, it gives NaN
// and false. On an edge shared by two segments the lower one answers.
func (c Curve) At(t float64) (float64, bool) {
	s, t := c.owner(t)
	if s == nil {
		return math.NaN(), false
	}
	return s.value(t), true
}

// Slope gives the derivative at t, per kelvin, under the rules of At.
func (c Curve) Slope(t float64) (float64, bool) {
	s, t := c.owner(t)
	if s == nil {
		return math.NaN(), false
	}
	return s.slope(t), true
}

// Beyond gives the value at t and, outside the range, what the polynomial of
// the end segment would make of it. It is an extrapolation and only for callers
// that were asked for one in so many words. For a polynomial it is the model
// itself. It is false for a curve without segments and for a t that is not finite.
func (c Curve) Beyond(t float64) (float64, bool) {
	if len(c.Segments) == 0 || finite(t) == 0 {
		return math.NaN(), false
	}
	if v, ok := c.At(t); ok {
		return v, true
	}
	end := &c.Segments[0]
	if t > end.To {
		end = &c.Segments[len(c.Segments)-1]
	}
	return end.value(t), true
}

// Scale gives the curve times k.
func (c Curve) Scale(k float64) Curve {
	return c.mapped(func(x float64) float64 { return float64(x * k) })
}

// mapped gives the curve with every coefficient replaced by f of it; f must be
// linear.
func (c Curve) mapped(f func(float64) float64) Curve {
	out := Curve{Segments: make([]Segment, len(c.Segments)), FromTable: c.FromTable}
	for i, s := range c.Segments {
		for k := range s.C {
			s.C[k] = f(s.C[k])
		}
		out.Segments[i] = s
	}
	return out
}

// Clip gives the part of the curve between lo and hi, both inside its range.
// A part that begins on a shared edge begins with the upper segment. The error
// is an OutsideRange, or says that lo lies above hi.
func (c Curve) Clip(lo, hi float64) (Curve, error) {
	lo, hi, err := c.window(lo, hi)
	if err != nil {
		return Curve{}, err
	}
	first, last := c.index(lo), c.index(hi)
	if first < last && c.Segments[first].To == lo {
		first++ // it would be a piece of no width
	}
	out := Curve{Segments: append([]Segment(nil), c.Segments[first:last+1]...), FromTable: c.FromTable}
	out.Segments[0].From = lo
	out.Segments[last-first].To = hi
	return out, nil
}

// owner gives the segment that answers at t, and t put back into the range when
// it misses an edge by no more than the slack; nil outside.
func (c *Curve) owner(t float64) (*Segment, float64) {
	n := len(c.Segments)
	if n == 0 {
		return nil, t
	}
	lo, hi := c.Segments[0].From, c.Segments[n-1].To
	if !(t >= lo-slack && t <= hi+slack) {
		return nil, t
	}
	t = min(max(t, lo), hi)
	return &c.Segments[c.index(t)], t
}

// index gives the first segment that ends at or above t; t is inside the range.
func (c *Curve) index(t float64) int {
	lo, hi := 0, len(c.Segments)-1
	for lo < hi {
		mid := int(uint(lo+hi) >> 1)
		if c.Segments[mid].To < t {
			lo = mid + 1
		} else {
			hi = mid
		}
	}
	return lo
}

// inside puts t back into the range when it misses an edge by no more than the
// slack; what names t in the error.
func (c *Curve) inside(what string, t float64) (float64, error) {
	lo, hi := c.Range()
	if !(t >= lo-slack && t <= hi+slack) {
		return t, OutsideRange{What: what, T: t, Lo: lo, Hi: hi}
	}
	return min(max(t, lo), hi), nil
}

// window puts the edges of a window back into the range.
func (c *Curve) window(lo, hi float64) (float64, float64, error) {
	lo, err := c.inside("lower edge of the window", lo)
	if err != nil {
		return lo, hi, err
	}
	if hi, err = c.inside("upper edge of the window", hi); err != nil {
		return lo, hi, err
	}
	if lo > hi {
		return lo, hi, fmt.Errorf("the window is inverted: it begins at %s and ends at %s", celsius(lo), celsius(hi))
	}
	return lo, hi, nil
}

// OutsideRange is the error of a temperature at which a curve tells nothing.
type OutsideRange struct {
	What      string  // "reference temperature", "lower edge of the window", …
	T, Lo, Hi float64 // K; Lo and Hi are NaN for a curve without segments
}

// Error names the temperature and the range, in °C.
func (e OutsideRange) Error() string {
	if math.IsNaN(e.Lo) {
		return fmt.Sprintf("%s %s: there is no curve", e.What, celsius(e.T))
	}
	return fmt.Sprintf("%s %s lies outside the valid range %s to %s", e.What, celsius(e.T), celsius(e.Lo), celsius(e.Hi))
}

const zeroCelsius = 273.15 // K, exact by definition of the degree Celsius

// celsius prints a kelvin temperature in °C to a micro-kelvin, without the
// digits that subtraction leaves behind.
func celsius(t float64) string {
	return strconv.FormatFloat(math.Round((t-zeroCelsius)*1e6)/1e6, 'f', -1, 64) + " °C"
}
