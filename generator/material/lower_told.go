package material

import (
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/quantity"
)

// lowering turns the native curve of one data set into what it tells of ρ and
// of R/R_ref.
type lowering struct {
	set       *DataSet
	native    native
	expansion float64 // linear, 1/K
	expands   bool    // known
}

func (b *lowering) fill() error {
	if b.native.absolute {
		return b.fromResistivity()
	}
	if b.set.Basis == Resistivity {
		return b.fromRatioOfResistivity()
	}
	return b.fromResistance()
}

// fromResistance: the native curve is R/R_ref of a fixed body; ρ needs a
// resistivity, and the expansion for its correction.
func (b *lowering) fromResistance() error {
	b.set.Ratio = b.told(b.native.nominal, b.native.corners, 1)
	if b.set.Resistivity == nil {
		return nil
	}
	at := b.set.Reference
	if b.set.Basis == Uncorrected {
		at = b.set.DimensionsAt
	}
	convert := func(c curve.Curve) (curve.Curve, error) { return c, nil }
	if b.expands && b.set.Basis != "" && !math.IsNaN(at) {
		convert = func(c curve.Curve) (curve.Curve, error) { return curve.Resistivity(c, b.expansion, at) }
	}
	return b.resistivity(convert)
}

// fromRatioOfResistivity: the native curve is ρ/ρ_ref.
func (b *lowering) fromRatioOfResistivity() error {
	if b.set.Resistivity != nil {
		if err := b.resistivity(func(c curve.Curve) (curve.Curve, error) { return c, nil }); err != nil {
			return err
		}
	}
	return b.ratioOf(b.native.nominal, b.native.corners, 1)
}

// fromResistivity: the native curve is ρ in Ω·m.
func (b *lowering) fromResistivity() error {
	s := b.set
	s.Rho = b.told(b.native.nominal, b.rowCorners(), 0)
	if s.Basis == Uncorrected {
		return b.fromUncorrected()
	}
	return b.ratioOf(b.native.nominal, nil, 1)
}

// fromUncorrected: ρ on the dimensions of one temperature behaves as R; the
// true ρ is corrected where the expansion is known.
func (b *lowering) fromUncorrected() error {
	s := b.set
	ratio, ok := curve.Ratio(b.native.nominal, s.RatioReference)
	if !ok {
		return nil
	}
	s.Ratio = b.told(ratio, nil, 1)
	if !b.expands || math.IsNaN(s.DimensionsAt) {
		return nil
	}
	rho, err := curve.Resistivity(b.native.nominal, b.expansion, s.DimensionsAt)
	if err != nil {
		return err
	}
	var corners []curve.Curve
	for _, c := range b.rowCorners() {
		c, err := curve.Resistivity(c, b.expansion, s.DimensionsAt)
		if err != nil {
			return err
		}
		corners = append(corners, c)
	}
	s.Rho = b.told(rho, corners, 0)
	return nil
}

// ratioOf makes R/R_ref of a fixed body from curves of ρ; without a known
// expansion the ratio of resistivities stands for it, with its caveat.
func (b *lowering) ratioOf(nominal curve.Curve, corners []curve.Curve, _ float64) error {
	convert := func(c curve.Curve) (curve.Curve, error) {
		if b.expands && len(c.Segments) > 0 {
			var err error
			if c, err = curve.Resistance(c, b.expansion, b.set.RatioReference); err != nil {
				return c, err
			}
		}
		r, ok := curve.Ratio(c, b.set.RatioReference)
		if !ok {
			return curve.Curve{}, nil
		}
		return r, nil
	}
	n, err := convert(nominal)
	if err != nil {
		return err
	}
	var list []curve.Curve
	for _, c := range corners {
		r, err := convert(c)
		if err != nil {
			return err
		}
		list = append(list, r)
	}
	b.set.Ratio = b.told(n, list, 1)
	return nil
}

// resistivity makes ρ = ρ_ref·y(T) with every corner of ρ_ref and of the
// coefficients.
func (b *lowering) resistivity(convert func(curve.Curve) (curve.Curve, error)) error {
	q := *b.set.Resistivity
	nominal := curve.Curve{}
	if q.HasValue() && len(b.native.nominal.Segments) > 0 {
		c, err := convert(b.native.nominal)
		if err != nil {
			return err
		}
		nominal = c.Scale(q.Value)
	}
	corners, err := b.resistivityCorners(q, convert)
	if err != nil {
		return err
	}
	b.set.Rho = b.told(nominal, corners, 0)
	return nil
}

func (b *lowering) resistivityCorners(q quantity.Quantity, convert func(curve.Curve) (curve.Curve, error)) ([]curve.Curve, error) {
	bounds := boundsOf(b.set, &q)
	shapes := b.native.corners
	if bounds == nil && shapes == nil {
		return nil, nil
	}
	if shapes == nil {
		shapes = []curve.Curve{b.native.nominal}
	}
	scales := []float64{q.Value}
	if bounds != nil {
		scales = []float64{bounds.Lower, bounds.Upper}
	} else if !q.HasValue() {
		return nil, nil
	}
	var list []curve.Curve
	for _, shape := range shapes {
		c, err := convert(shape)
		if err != nil {
			return nil, err
		}
		for _, k := range scales {
			list = append(list, c.Scale(k))
		}
	}
	return list, nil
}

// told wraps a nominal curve and its corners; what the band covers is named.
// power is 1 for a ratio, from which the resistivity cancels, and 0 for ρ.
func (b *lowering) told(nominal curve.Curve, corners []curve.Curve, power int) *Told {
	t := &Told{Nominal: nominal}
	covers, missing := b.coverage(power == 0)
	if len(corners) > 0 {
		t.Limits = &curve.Band{Corners: corners, Covers: covers, NotCovered: missing}
	}
	t.NoLimits = missing
	b.uncertainty(t, power == 0)
	return t
}

// fittedUncertainty comes from the covariance of the fit and the common parts.
func (b *lowering) fittedUncertainty(t *Told, absolute bool) {
	f, nominal, shape := b.set.Fitted, t.Nominal, b.native.nominal
	t.K = math.Round(f.K*100) / 100
	t.Covers = []string{"scatter of the fit, with its covariance"}
	for _, line := range f.Budget {
		if absolute || line.Alpha > 0 {
			t.Covers = append(t.Covers, line.From)
		}
	}
	if absolute && len(f.Budget) == 0 {
		t.NotCovered = []string{"thermometer, bridge and geometry: no uncertainty stated"}
	}
	t.Uncertainty = func(at float64) float64 {
		y, ok := shape.At(at)
		v, ok2 := nominal.At(at)
		if !ok || !ok2 || y == 0 {
			return math.NaN()
		}
		return math.Abs(v/y) * f.uncertaintyAt(at, absolute)
	}
}
