package curve

import (
	"errors"
	"fmt"
	"math"
)

// CallendarVanDusen is the equation of industrial resistance thermometers, t in °C:
//
//	R(t)/R(0 °C) = 1 + A·t + B·t²                      t ≥ 0
//	R(t)/R(0 °C) = 1 + A·t + B·t² + C·(t − 100)·t³     t < 0
//
// A is °C⁻¹, B °C⁻², C °C⁻⁴. IEC 60751 gives the coefficients of platinum
// thermometer wire; they are not those of pure platinum.
//
// Source: IEC 60751, clause 4.
type CallendarVanDusen struct{ A, B, C float64 }

// Ratio gives R/R(0 °C) at t kelvin, whatever the range.
func (m CallendarVanDusen) Ratio(t float64) float64 {
	c := t - zeroCelsius
	r := 1 + float64(c*(m.A+float64(c*m.B)))
	if c < 0 {
		r += float64(m.C * float64((c-100)*float64(c*float64(c*c))))
	}
	return r
}

// slope gives the derivative of Ratio, per kelvin.
func (m CallendarVanDusen) slope(t float64) float64 {
	c := t - zeroCelsius
	d := m.A + float64(2*m.B*c)
	if c < 0 {
		d += float64(m.C * float64(float64(c*c)*(4*c-300)))
	}
	return d
}

// Curve lowers the equation from lo to hi kelvin: exactly above 0 °C, within
// 1e-9 of the ratio below, where it is of the fourth power. The ratio must be
// positive throughout.
func (m CallendarVanDusen) Curve(lo, hi float64) (Curve, error) {
	if !(lo < hi) || finite(lo) == 0 || finite(hi) == 0 {
		return Curve{}, fmt.Errorf("cannot lower the equation from %s to %s", celsius(lo), celsius(hi))
	}
	var out Curve
	if lo < zeroCelsius && m.C != 0 {
		cold, err := Approximate(m.Ratio, m.slope, lo, math.Min(hi, zeroCelsius), 1e-9)
		if err != nil {
			return Curve{}, err
		}
		out, lo = cold, zeroCelsius
	}
	if lo < hi {
		warm := Polynomial{Y0: 1, Alpha: m.A, Beta: m.B, Reference: zeroCelsius}
		out.Segments = append(out.Segments, warm.Curve(lo, hi).Segments...)
	}
	first, last := out.Range()
	if e, ok := out.Extremes(first, last); !ok || !(e.Min > 0) {
		return Curve{}, errors.New("the coefficients A, B, C do not give a positive resistance over the range")
	}
	return out, nil
}

// Temperature gives the kelvin temperature at which Ratio is ratio, on the
// branch that passes through 1 at 0 °C. Above 0 °C it is the root of the
// parabola in the form that does not cancel; below, Newton's steps from there.
// It is false when no temperature above absolute zero has that ratio.
func (m CallendarVanDusen) Temperature(ratio float64) (float64, bool) {
	root := math.Sqrt(float64(m.A*m.A) + float64(4*m.B*(ratio-1)))
	t := zeroCelsius + 2*(ratio-1)/(m.A+math.Copysign(root, m.A))
	if math.IsNaN(t) || math.IsInf(t, 0) {
		return math.NaN(), false
	}
	if t < zeroCelsius && m.C != 0 {
		t = m.refine(t, ratio)
	}
	if !(t >= 0) || !(math.Abs(m.Ratio(t)-ratio) <= 1e-12*math.Max(1, math.Abs(ratio))) {
		return math.NaN(), false
	}
	return t, true
}

// refine takes Newton's steps towards Ratio(t) = ratio below 0 °C. The result
// is only as good as the caller's check of it.
func (m CallendarVanDusen) refine(t, ratio float64) float64 {
	for range 30 {
		step := (m.Ratio(t) - ratio) / m.slope(t)
		t -= step
		if !(math.Abs(step) > 1e-10) {
			return t
		}
	}
	return t
}
