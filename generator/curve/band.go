package curve

import (
	"errors"
	"math"
)

// A Band is the worst case of stated limits: the curves at all corners of them.
// Covers and NotCovered name what the limits contain and what has none.
type Band struct {
	Corners            []Curve
	Covers, NotCovered []string
}

// At gives the smallest and greatest value of any corner at t kelvin. It is
// false without corners and when one of them does not tell t.
func (b Band) At(t float64) (Bounds, bool) {
	return b.over(func(c Curve) (float64, bool) { return c.At(t) })
}

// RatioAt gives the bounds of value(t)/value(reference), each corner divided by
// itself: the value at the reference temperature drops out, so limits on it
// alone make no band of a ratio.
func (b Band) RatioAt(t, reference float64) (Bounds, bool) {
	return b.over(func(c Curve) (float64, bool) {
		there, ok := c.At(t)
		at, known := c.At(reference)
		return there / at, ok && known && at != 0
	})
}

func (b Band) over(value func(Curve) (float64, bool)) (Bounds, bool) {
	out := nothing()
	for _, c := range b.Corners {
		v, ok := value(c)
		if !ok {
			return Bounds{math.NaN(), math.NaN()}, false
		}
		out.widen(v)
	}
	if len(b.Corners) == 0 {
		return Bounds{math.NaN(), math.NaN()}, false
	}
	return out, true
}

func nothing() Bounds { return Bounds{math.Inf(1), math.Inf(-1)} }

func (b *Bounds) widen(v float64) {
	b.Lower, b.Upper = math.Min(b.Lower, v), math.Max(b.Upper, v)
}

// BandMeasures are the bounds of the measures of every corner of a band.
//
// Change runs from the smallest change of any corner to the greatest, over the
// window; with SlopeAtReference, Slope and the chords it bounds every curve
// inside the limits, because each of them is monotone in each coefficient. So
// does Box.Upper. Box.Lower is only the smallest box of a corner: a curve inside
// the limits, its coefficient nearer to zero, may have a smaller one.
type BandMeasures struct {
	Reference, Lo, Hi   float64
	SlopeAtReference    Bounds
	Slope               Bounds
	ChordCold, ChordHot *Bounds // nil when that edge is not on its side
	Box                 Bounds
	Change              Bounds
}

// MeasureBand gives the bounds of the measures over the corners. It fails where
// Measure fails for any of them, and without corners.
func MeasureBand(corners []Curve, reference, lo, hi float64) (BandMeasures, error) {
	if len(corners) == 0 {
		return BandMeasures{}, errors.New("there are no limits")
	}
	out := BandMeasures{SlopeAtReference: nothing(), Slope: nothing(), Box: nothing(), Change: nothing()}
	for _, c := range corners {
		m, err := Measure(c, reference, lo, hi)
		if err != nil {
			return BandMeasures{}, err
		}
		out.Reference, out.Lo, out.Hi = m.Reference, m.Lo, m.Hi
		out.widen(m)
	}
	return out, nil
}

func (b *BandMeasures) widen(m Measures) {
	b.SlopeAtReference.widen(m.SlopeAtReference)
	b.Slope.widen(m.SlopeMin)
	b.Slope.widen(m.SlopeMax)
	b.Box.widen(m.Box)
	b.Change.widen(m.Change.Min)
	b.Change.widen(m.Change.Max)
	b.ChordCold = widenChord(b.ChordCold, m.ChordCold)
	b.ChordHot = widenChord(b.ChordHot, m.ChordHot)
}

func widenChord(b *Bounds, v *float64) *Bounds {
	if v == nil {
		return b
	}
	if b == nil {
		n := nothing()
		b = &n
	}
	b.widen(*v)
	return b
}
