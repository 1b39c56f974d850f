package curve

import "math"

// A Polynomial is the usual form in which a coefficient is printed:
//
//	y(T) = Y0·(1 + Alpha·τ + Beta·τ² + Gamma·τ³),  τ = T − Reference
//
// Y0 has the unit of y, Alpha is K⁻¹, Beta K⁻², Gamma K⁻³, Reference K. Y0 or a
// coefficient is NaN when a source gives limits and no nominal value.
type Polynomial struct{ Y0, Alpha, Beta, Gamma, Reference float64 }

// At gives y at t kelvin, whatever range the source may have.
func (p Polynomial) At(t float64) float64 {
	return float64(p.Y0 * p.shape(t-p.Reference))
}

// shape is 1 + ατ + βτ² + γτ³.
func (p Polynomial) shape(tau float64) float64 {
	return 1 + float64(tau*(p.Alpha+float64(tau*(p.Beta+float64(tau*p.Gamma)))))
}

// Rereference gives the same polynomial about t1 kelvin, with δ = t1 − Reference
// and p(δ) = 1 + αδ + βδ² + γδ³:
//
//	y₁ = y₀·p(δ)   α₁ = p′(δ)/p(δ)   β₁ = p″(δ)/2p(δ)   γ₁ = p‴(δ)/6p(δ)
//
// It is exact in the basis in which the polynomial was measured. Where p(δ) is
// zero there is no such form and the coefficients are not finite.
func (p Polynomial) Rereference(t1 float64) Polynomial {
	d := t1 - p.Reference
	shape := p.shape(d)
	return Polynomial{
		Y0:        float64(p.Y0 * shape),
		Alpha:     (p.Alpha + float64(d*(2*p.Beta+float64(d*(3*p.Gamma))))) / shape,
		Beta:      (p.Beta + float64(3*p.Gamma*d)) / shape,
		Gamma:     p.Gamma / shape,
		Reference: t1,
	}
}

// Curve lowers the polynomial to one segment from lo to hi kelvin, exactly. A
// polynomial with a part that is not finite, and a range that is inverted or
// not finite, give a curve without segments.
func (p Polynomial) Curve(lo, hi float64) Curve {
	s := Segment{From: lo, To: hi, Centre: p.Reference, C: [4]float64{
		p.Y0, float64(p.Y0 * p.Alpha), float64(p.Y0 * p.Beta), float64(p.Y0 * p.Gamma)}}
	for _, x := range []float64{lo, hi, s.Centre, s.C[0], s.C[1], s.C[2], s.C[3]} {
		if finite(x) == 0 {
			return Curve{}
		}
	}
	if lo > hi {
		return Curve{}
	}
	return Curve{Segments: []Segment{s}}
}

// Bounds are the limits of a value, in its SI unit: a specification's ±, not an
// uncertainty.
type Bounds struct{ Lower, Upper float64 }

// Corners gives the polynomials at all corners of the limits given: two values
// of each coefficient that has limits, the nominal one of each that has none
// (nil). y is linear in each of them, so at every temperature the extremes of y
// stand at corners. Limits of no width make one value. A coefficient that is NaN
// and has no limits leaves nothing to draw: nil.
func (p Polynomial) Corners(y0, alpha, beta, gamma *Bounds) []Polynomial {
	corners := []Polynomial{p}
	for _, part := range []struct {
		limits *Bounds
		of     func(*Polynomial) *float64
	}{
		{y0, func(p *Polynomial) *float64 { return &p.Y0 }},
		{alpha, func(p *Polynomial) *float64 { return &p.Alpha }},
		{beta, func(p *Polynomial) *float64 { return &p.Beta }},
		{gamma, func(p *Polynomial) *float64 { return &p.Gamma }},
	} {
		if part.limits == nil {
			if math.IsNaN(*part.of(&p)) {
				return nil
			}
			continue
		}
		corners = split(corners, *part.limits, part.of)
	}
	return corners
}

// split gives every polynomial twice, with the part at its lower and at its
// upper limit.
func split(corners []Polynomial, limits Bounds, of func(*Polynomial) *float64) []Polynomial {
	values := []float64{limits.Lower, limits.Upper}
	if limits.Lower == limits.Upper {
		values = values[:1]
	}
	var out []Polynomial
	for _, c := range corners {
		for _, v := range values {
			*of(&c) = v
			out = append(out, c)
		}
	}
	return out
}
