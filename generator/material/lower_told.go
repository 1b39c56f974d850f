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
	s.Rho = b.told(b.native.nominal, nil, 1)
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
	s.Rho = b.told(rho, nil, 1)
	return err
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

// parts are the stated numbers that a band could come from.
func (b *lowering) parts(withResistivity bool) []part {
	var list []part
	if withResistivity && b.set.Resistivity != nil {
		list = append(list, part{"resistivity", b.set.Resistivity, 0})
	}
	for i, q := range []*quantity.Quantity{b.set.Alpha, b.set.Beta, b.set.Gamma} {
		if q != nil {
			list = append(list, part{[]string{"α", "β", "γ"}[i], q, i + 1})
		}
	}
	return list
}

// part is one stated number with the power of (T − T_ref) that it goes with.
type part struct {
	name  string
	q     *quantity.Quantity
	power int
}

func (b *lowering) coverage(withResistivity bool) (covers, missing []string) {
	parts := b.parts(withResistivity)
	for _, p := range parts {
		switch {
		case boundsOf(b.set, p.q) != nil:
			covers = append(covers, p.name)
		case b.set.Class == Typical && p.q.Limits != nil:
			missing = append(missing, p.name+": typical values form no limits")
		default:
			missing = append(missing, p.name+": no limits stated")
		}
	}
	if len(parts) == 0 {
		missing = append(missing, "the rows of the table: no limits stated")
	}
	return covers, missing
}

// uncertainty combines the stated uncertainties to first order (JCGM 100,
// 5.1.2), the coefficients taken as uncorrelated.
func (b *lowering) uncertainty(t *Told, withResistivity bool) {
	if b.set.Fitted != nil {
		b.fittedUncertainty(t, withResistivity)
		return
	}
	type term struct {
		u     float64 // relative to y_ref, per K^power
		power int
	}
	var terms []term
	var covers, missing []string
	for _, p := range b.parts(withResistivity) {
		u := p.q.Uncertainty
		if u == nil {
			missing = append(missing, p.name+": no uncertainty stated")
			continue
		}
		standard := math.Max(u.Minus, u.Plus) / u.K
		if p.power == 0 {
			standard /= p.q.Value
		}
		terms, covers, t.K = append(terms, term{standard, p.power}), append(covers, p.name), u.K
	}
	if len(terms) == 0 || len(t.Nominal.Segments) == 0 {
		return
	}
	t.Covers, t.NotCovered = covers, append(missing, "correlation of the coefficients: not stated, taken as none")
	reference := b.set.Reference
	shape, nominal := b.native.nominal, t.Nominal
	t.Uncertainty = func(at float64) float64 {
		y, ok := shape.At(at)
		v, ok2 := nominal.At(at)
		if !ok || !ok2 || y == 0 {
			return math.NaN()
		}
		sum := 0.0
		for _, x := range terms {
			d := x.u
			if x.power == 0 {
				d *= y
			}
			for range x.power {
				d *= at - reference
			}
			sum += float64(d * d)
		}
		return math.Abs(v/y) * math.Sqrt(sum)
	}
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
