package material

import (
	"math"

	"ohmfolio/generator/curve"
)

// HasNominal tells whether there is a nominal curve; it is safe on nil.
func (t *Told) HasNominal() bool { return t != nil && len(t.Nominal.Segments) > 0 }

// A Reading reads a Told at a temperature, as itself or over its value at a
// reference temperature.
type Reading struct {
	Told        *Told
	Ratio       bool
	Reference   float64 // K, used when Ratio
	Extrapolate bool    // only when a person asked in so many words
}

// At gives the nominal value at t (K); false outside the valid range, unless
// Extrapolate, and when there is no nominal.
func (r Reading) At(t float64) (float64, bool) {
	if !r.Told.HasNominal() {
		return 0, false
	}
	v, ok := r.read(r.Told.Nominal, t)
	if !ok || !r.Ratio {
		return v, ok
	}
	at, ok := r.read(r.Told.Nominal, r.Reference)
	if !ok || at == 0 {
		return 0, false
	}
	return v / at, true
}

func (r Reading) read(c curve.Curve, t float64) (float64, bool) {
	if r.Extrapolate {
		return c.Beyond(t)
	}
	return c.At(t)
}

// Limits gives the pointwise worst case over all corners at t; false when no
// limits are stated. An extrapolated value has no band: nobody knows it.
func (r Reading) Limits(t float64) (curve.Bounds, bool) {
	if r.Told == nil || r.Told.Limits == nil || r.Extrapolate {
		return curve.Bounds{}, false
	}
	if r.Ratio {
		return r.Told.Limits.RatioAt(t, r.Reference)
	}
	return r.Told.Limits.At(t)
}

// Slack is the tolerance of a closed valid range in kelvin after conversion,
// so that 212 °F lies in "to 100 °C".
const Slack = 1e-9

// Contains tells whether t (K) lies in the closed window.
func (w Window) Contains(t float64) bool { return t >= w.Lo-Slack && t <= w.Hi+Slack }

// Label names the set in messages: the record itself where it has but one.
func (s *DataSet) Label() string {
	if s.Name == soleName {
		return "the record"
	}
	return "data set " + s.Name
}

// Digits is the number of significant digits that the source justifies for an
// absolute value: those of the resistivity as printed, or of the table's rows,
// at least three.
func (s *DataSet) Digits() int {
	switch {
	case s.Table != nil && !s.Table.Ratio:
		return max(3, s.Table.Digits)
	case s.Resistivity != nil:
		return max(3, s.Resistivity.Digits)
	}
	return 4
}

// RatioDecimals is how many decimals of R/R_ref the source justifies: the last
// printed digit of α at the far end of the range, or of a table's rows.
func (s *DataSet) RatioDecimals() int {
	switch {
	case s.Alpha != nil && s.Alpha.HasValue() && s.Alpha.Value != 0:
		last := math.Pow(10, math.Floor(math.Log10(math.Abs(s.Alpha.Value)))-float64(s.Alpha.Digits-1))
		span := math.Max(math.Abs(s.Valid.Hi-s.RatioReference), math.Abs(s.Valid.Lo-s.RatioReference))
		return max(3, min(6, int(-math.Floor(math.Log10(last*math.Max(span, 1))))))
	case s.Table != nil:
		return max(3, min(5, s.Table.Digits))
	}
	return 5
}

// Polynomial is the set's own polynomial in its native basis (Y0 is the
// resistivity, 1 when there is none); false for other models and for limits
// without a nominal.
func (s *DataSet) Polynomial() (curve.Polynomial, bool) {
	if s.Model != PolynomialModel && s.Fitted == nil {
		return curve.Polynomial{}, false
	}
	p := curve.Polynomial{Y0: 1, Reference: s.Reference}
	if s.Resistivity != nil && s.Resistivity.HasValue() {
		p.Y0 = s.Resistivity.Value
	}
	return p, s.coefficients(&p)
}

// coefficients fills α, β and γ; false when one that is stated has limits only.
func (s *DataSet) coefficients(p *curve.Polynomial) bool {
	ok := true
	if s.Alpha != nil {
		p.Alpha, ok = s.Alpha.Value, ok && s.Alpha.HasValue()
	}
	if s.Beta != nil {
		p.Beta, ok = s.Beta.Value, ok && s.Beta.HasValue()
	}
	if s.Gamma != nil {
		p.Gamma, ok = s.Gamma.Value, ok && s.Gamma.HasValue()
	}
	return ok
}
