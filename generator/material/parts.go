package material

import (
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/quantity"
)

// part is one stated number that a band can come from: its name, its value
// with ±, and how y/y_ref moves with it at t (nil for ρ_ref itself, with which
// y moves in proportion).
type part struct {
	name  string
	q     *quantity.Quantity
	moves func(t float64) float64
}

// power is how y/y_ref moves with the coefficient of (T − from)ⁿ.
func power(from float64, n int) func(float64) float64 {
	return func(t float64) float64 {
		x := 1.0
		for range n {
			x *= t - from
		}
		return x
	}
}

// stated are the coefficients of the set as written.
func (s *DataSet) stated() []part {
	var list []part
	add := func(name string, q *quantity.Quantity, moves func(float64) float64) {
		if q != nil {
			list = append(list, part{name, q, moves})
		}
	}
	add("α", s.Alpha, power(s.Reference, 1))
	add("β", s.Beta, power(s.Reference, 2))
	add("γ", s.Gamma, power(s.Reference, 3))
	if s.Callendar != nil {
		n := s.Node.Get("callendar_van_dusen")
		add("A", pointer(n.Get("A")), power(quantity.ZeroCelsius, 1))
		add("B", pointer(n.Get("B")), power(quantity.ZeroCelsius, 2))
		add("C", pointer(n.Get("C")), func(t float64) float64 {
			c := t - quantity.ZeroCelsius
			if c >= 0 {
				return 0
			}
			return (c - 100) * c * c * c
		})
	}
	return list
}

// parts are the stated numbers that a band could come from.
func (b *lowering) parts(withResistivity bool) []part {
	var list []part
	if withResistivity && b.set.Resistivity != nil {
		list = append(list, part{"resistivity", b.set.Resistivity, nil})
	}
	if withResistivity && b.set.Table != nil && b.set.Table.Each != nil {
		list = append(list, part{"each row of the table", b.set.Table.Each, nil})
	}
	return append(list, b.set.stated()...)
}

// rowCorners are the curves of a table's rows at their limits, all rows
// together.
func (b *lowering) rowCorners() []curve.Curve {
	if b.set.Table == nil || b.set.Table.Each == nil {
		return nil
	}
	bounds := boundsOf(b.set, b.set.Table.Each)
	if bounds == nil {
		return nil
	}
	return []curve.Curve{b.native.nominal.Scale(bounds.Lower), b.native.nominal.Scale(bounds.Upper)}
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
	switch {
	case len(parts) > 0:
	case b.set.Table != nil && b.set.Table.Each != nil:
		missing = append(missing, "how the rows of the table err together: not stated")
	case b.set.Model == BlochModel || b.set.Model == PiecesModel:
		missing = append(missing, "the parameters of the curve: no limits stated")
	default:
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
		u     float64 // standard, relative to y_ref, per unit of moves
		moves func(float64) float64
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
		if p.moves == nil {
			standard /= p.q.Value
		}
		terms, covers, t.K = append(terms, term{standard, p.moves}), append(covers, p.name), u.K
	}
	if len(terms) == 0 || len(t.Nominal.Segments) == 0 {
		return
	}
	t.Covers, t.NotCovered = covers, missing
	if len(terms) > 1 {
		t.NotCovered = append(missing, "correlation of the coefficients: not stated, taken as none")
	}
	shape, nominal := b.native.nominal, t.Nominal
	t.Uncertainty = func(at float64) float64 {
		y, ok := shape.At(at)
		v, ok2 := nominal.At(at)
		if !ok || !ok2 || y == 0 {
			return math.NaN()
		}
		sum := 0.0
		for _, x := range terms {
			d := x.u * y // ρ_ref and rows move y in proportion
			if x.moves != nil {
				d = x.u * x.moves(at)
			}
			sum += float64(d * d)
		}
		return math.Abs(v/y) * math.Sqrt(sum)
	}
}
