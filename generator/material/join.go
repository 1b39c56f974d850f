package material

import (
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// join makes one curve from adjoining pieces; the lower piece owns the shared
// edge. Pieces that all tell ρ join in ρ; otherwise they join in R/R, when all
// are told about one reference temperature.
func (rd *reader) join(s *DataSet) {
	var pieces []*DataSet
	for _, name := range s.Pieces {
		pieces = append(pieces, rd.r.Set(name))
	}
	if len(pieces) == 0 {
		return
	}
	told, absolute, why := tellingPieces(pieces)
	if why != "" {
		rd.cannotJoin(s, why)
		return
	}
	var curves []curve.Curve
	for _, t := range told {
		curves = append(curves, t.Nominal)
	}
	c, err := curve.Pieces(curves, func(i int) float64 { return jointTolerance(told[i], told[i+1], pieces[i].Valid.Hi) })
	if err != nil {
		rd.cannotJoin(s, err.Error())
		return
	}
	s.Valid.Lo, s.Valid.Hi, s.Basis = pieces[0].Valid.Lo, pieces[len(pieces)-1].Valid.Hi, pieces[0].Basis
	if !absolute {
		s.Reference = pieces[0].Reference
	}
	s.RatioReference = ratioReference(s)
	b := &lowering{set: s, native: native{nominal: c, absolute: absolute}}
	b.expansion, b.expands = rd.r.Expansion()
	if err := b.fill(); err != nil {
		rd.cannotJoin(s, err.Error())
		return
	}
	rd.caveats(s)
	pieceUncertainty(s, pieces, told, absolute)
}

// tellingPieces finds the quantity that every piece tells, or why there is none.
func tellingPieces(pieces []*DataSet) (told []*Told, absolute bool, why string) {
	for _, p := range pieces {
		if p.Rho.HasNominal() {
			told = append(told, p.Rho)
		}
	}
	if len(told) == len(pieces) {
		return told, true, ""
	}
	told = nil
	for _, p := range pieces {
		switch {
		case p.Basis == Resistivity:
			return nil, false, "the piece " + quote(p.Name) + " has no curve of ρ"
		case !p.Ratio.HasNominal():
			return nil, false, "the piece " + quote(p.Name) + " has no curve"
		case !(math.Abs(p.Reference-pieces[0].Reference) < Slack):
			return nil, false, "the piece " + quote(p.Name) + " tells R/R about " + referenceText(p) + ", the first one about " + referenceText(pieces[0])
		}
		told = append(told, p.Ratio)
	}
	return told, false, ""
}

func referenceText(s *DataSet) string {
	if math.IsNaN(s.Reference) {
		return "no temperature"
	}
	return quantity.CelsiusText(s.Reference)
}

// jointTolerance is how far apart two pieces may be where they meet: their
// stated limits, else 0.1 %.
func jointTolerance(lower, upper *Told, edge float64) float64 {
	half := func(t *Told) float64 {
		if l, ok := (Reading{Told: t}).Limits(edge); ok && l.Lower > 0 {
			return (l.Upper - l.Lower) / (l.Upper + l.Lower)
		}
		return 0
	}
	return math.Max(joinTolerance, half(lower)+half(upper))
}

// pieceUncertainty is at each temperature that of the piece that owns it.
func pieceUncertainty(s *DataSet, pieces []*DataSet, told []*Told, absolute bool) {
	into := s.Ratio
	if absolute {
		into = s.Rho
	}
	for _, t := range told {
		if t.Uncertainty == nil {
			return
		}
		into.K, into.Covers, into.NotCovered = t.K, t.Covers, t.NotCovered
	}
	into.Uncertainty = func(at float64) float64 {
		for i, p := range pieces {
			if at <= p.Valid.Hi || i == len(pieces)-1 {
				return told[i].Uncertainty(at)
			}
		}
		return math.NaN()
	}
}

func (rd *reader) cannotJoin(s *DataSet, why string) {
	rd.list.Add("pieces-do-not-join", place.Error, s.Node.Get("pieces").Position(), s.Label()+": "+why, "name pieces whose valid ranges adjoin and whose values meet within their limits, or within 0.1 %")
}
