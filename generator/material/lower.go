package material

import (
	"fmt"
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// unknownExpansion is the expansion assumed, in caveats only, where a record
// states none: the largest that common conductors have is near 30 ppm/K.
const unknownExpansion = 30e-6

// joinTolerance is how well pieces must meet where no limits say more.
const joinTolerance = 1e-3

// lowerAll lowers every data set; pieces last, since they join others.
func (rd *reader) lowerAll() {
	for _, s := range rd.r.Sets {
		if s.Model != PiecesModel {
			rd.lower(s)
		}
	}
	for _, s := range rd.r.Sets {
		if s.Model == PiecesModel {
			rd.join(s)
		}
	}
}

// native is what a model gives before any conversion: a curve y(T), whether
// it is in Ω·m or R/R_ref, and the same for every corner of the limits.
type native struct {
	nominal  curve.Curve
	corners  []curve.Curve // nil when no coefficient has limits
	absolute bool          // y is ρ already
}

func (rd *reader) lower(s *DataSet) {
	n, err := rd.native(s)
	if err != nil {
		rd.list.Add("curve-not-told", place.Error, s.Node.Position(), s.Label()+": "+err.Error(), "look at the coefficients and the valid range")
		return
	}
	s.RatioReference = ratioReference(s)
	rd.caveats(s)
	if s.Model == Point {
		rd.point(s)
		return
	}
	if len(n.nominal.Segments) == 0 && n.corners == nil {
		return
	}
	b := &lowering{set: s, native: n}
	b.expansion, b.expands = rd.r.Expansion()
	if err := b.fill(); err != nil {
		rd.list.Add("curve-not-told", place.Error, s.Node.Position(), s.Label()+": "+err.Error(), "look at the coefficients and the valid range")
	}
}

// ratioReference: the set's own reference temperature, else 20 °C when inside
// the range, else the lower end.
func ratioReference(s *DataSet) float64 {
	usual := quantity.ZeroCelsius + 20
	switch {
	case !math.IsNaN(s.Reference) && s.Valid.Contains(s.Reference):
		return s.Reference
	case s.Valid.Contains(usual):
		return usual
	}
	return s.Valid.Lo
}

// native lowers the model by itself.
func (rd *reader) native(s *DataSet) (native, error) {
	switch s.Model {
	case PolynomialModel:
		return polynomialNative(s), nil
	case PointsModel:
		if s.Fitted == nil {
			return native{}, nil
		}
		return polynomialNative(s), nil
	case TableModel:
		c, err := curve.Table(s.Table.T, s.Table.Y, s.Table.Linear)
		if err != nil {
			return native{}, err
		}
		c, err = c.Clip(s.Valid.Lo, s.Valid.Hi)
		return native{nominal: c, absolute: !s.Table.Ratio}, err
	case CallendarModel:
		return callendarNative(s)
	case ChordModel:
		p := curve.Polynomial{Y0: 1, Alpha: s.Chord.Value.Value, Reference: s.Chord.From}
		return native{nominal: p.Curve(s.Valid.Lo, s.Valid.Hi)}, nil
	case BlochModel:
		return blochNative(s)
	}
	return native{}, nil
}

// callendarNative has every corner of the limits of A, B and C.
func callendarNative(s *DataSet) (native, error) {
	c, err := s.Callendar.Curve(s.Valid.Lo, s.Valid.Hi)
	n := native{nominal: c}
	corners := []curve.CallendarVanDusen{*s.Callendar}
	limited := false
	for _, p := range s.stated() {
		b := boundsOf(s, p.q)
		if b == nil {
			continue
		}
		limited = true
		var both []curve.CallendarVanDusen
		for _, corner := range corners {
			low, high := corner, corner
			*coefficientOf(&low, p.name), *coefficientOf(&high, p.name) = b.Lower, b.Upper
			both = append(both, low, high)
		}
		corners = both
	}
	if !limited || err != nil {
		return n, err
	}
	for _, corner := range corners {
		c, err := corner.Curve(s.Valid.Lo, s.Valid.Hi)
		if err != nil {
			return native{}, err
		}
		n.corners = append(n.corners, c)
	}
	return n, nil
}

func coefficientOf(c *curve.CallendarVanDusen, name string) *float64 {
	switch name {
	case "A":
		return &c.A
	case "B":
		return &c.B
	}
	return &c.C
}

func blochNative(s *DataSet) (native, error) {
	n := s.Node.Get("bloch_gruneisen")
	residual, _ := n.Get("residual").Quantity()
	theta, _ := n.Get("debye_temperature").Quantity()
	amplitude, _ := n.Get("amplitude").Quantity()
	exponent, _ := n.Get("exponent").Int()
	m := curve.BlochGruneisen{Residual: residual.Value, Theta: theta.Value, Amplitude: amplitude.Value, Exponent: exponent}
	c, err := m.Curve(s.Valid.Lo, s.Valid.Hi)
	return native{nominal: c, absolute: true}, err
}

// polynomialNative gives R/R_ref (or ρ/ρ_ref) and its corners.
func polynomialNative(s *DataSet) native {
	p := curve.Polynomial{Y0: 1, Alpha: valueOf(s.Alpha), Beta: valueOf(s.Beta), Gamma: valueOf(s.Gamma), Reference: s.Reference}
	n := native{}
	if !math.IsNaN(p.Alpha) && !math.IsNaN(p.Beta) && !math.IsNaN(p.Gamma) {
		n.nominal = p.Curve(s.Valid.Lo, s.Valid.Hi)
	}
	a, b, c := boundsOf(s, s.Alpha), boundsOf(s, s.Beta), boundsOf(s, s.Gamma)
	if a == nil && b == nil && c == nil {
		return n
	}
	for _, corner := range p.Corners(nil, a, b, c) {
		n.corners = append(n.corners, corner.Curve(s.Valid.Lo, s.Valid.Hi))
	}
	return n
}

// valueOf is 0 for a coefficient that is absent, NaN for limits alone.
func valueOf(q *quantity.Quantity) float64 {
	if q == nil {
		return 0
	}
	return q.Value
}

// boundsOf gives two-sided limits; typical values never form any.
func boundsOf(s *DataSet, q *quantity.Quantity) *curve.Bounds {
	if q == nil || q.Limits == nil || s.Class == Typical || math.IsInf(q.Limits.Lower, 0) || math.IsInf(q.Limits.Upper, 0) {
		return nil
	}
	return &curve.Bounds{Lower: q.Limits.Lower, Upper: q.Limits.Upper}
}

// point is a resistivity without a coefficient: one value at one temperature.
func (rd *reader) point(s *DataSet) {
	if s.Resistivity == nil {
		return
	}
	at := func(v float64) curve.Curve {
		return curve.Curve{Segments: []curve.Segment{{From: s.Reference, To: s.Reference, Centre: s.Reference, C: [4]float64{v}}}}
	}
	t := &Told{}
	if s.Resistivity.HasValue() {
		t.Nominal = at(s.Resistivity.Value)
	}
	if b := boundsOf(s, s.Resistivity); b != nil {
		t.Limits = &curve.Band{Corners: []curve.Curve{at(b.Lower), at(b.Upper)}, Covers: []string{"resistivity"}}
	}
	s.Valid = Window{Lo: s.Reference, Hi: s.Reference}
	s.Rho = t
}

// tellsResistivity: a set of ratios alone has no ρ to be careful about.
func tellsResistivity(s *DataSet) bool {
	return s.Resistivity != nil || s.Model == BlochModel || s.Model == TableModel && !s.Table.Ratio || s.Rho.HasNominal()
}

// caveats are the sentences that go with every number of the set.
func (rd *reader) caveats(s *DataSet) {
	gamma, known := rd.r.Expansion()
	if !known {
		gamma = unknownExpansion
	}
	by := fmt.Sprintf("may differ by up to %s\u202fppm/K × (T − T_ref)", quantity.Number(gamma*1e6, 2))
	switch {
	case s.Model == Point:
		s.Caveats = append(s.Caveats, "no coefficient: one value at one temperature, no curve")
	case s.Basis == "":
		s.Caveats = append(s.Caveats, "basis not stated: "+by)
	case s.Basis == Uncorrected && math.IsNaN(s.DimensionsAt) && known:
		s.Caveats = append(s.Caveats, "temperature of the dimensions not stated: ρ is not corrected for expansion and "+by)
	case !known && s.Basis == Resistivity:
		s.Caveats = append(s.Caveats, "no expansion recorded: R/R is the ratio of resistivities and "+by)
	case !known && tellsResistivity(s):
		s.Caveats = append(s.Caveats, "no expansion recorded: ρ is told on the dimensions of the reference temperature and "+by)
	}
}
