package material

import (
	"ohmfolio/generator/curve"
	"ohmfolio/generator/place"
)

// join makes one curve of ρ from adjoining pieces; the lower piece owns the
// shared edge.
func (rd *reader) join(s *DataSet) {
	var curves []curve.Curve
	for i, name := range s.Pieces {
		t := rd.r.Set(name)
		if !t.Rho.HasNominal() {
			rd.cannotJoin(s, "the piece "+quote(name)+" has no curve of ρ")
			return
		}
		curves = append(curves, t.Rho.Nominal)
		if i == 0 {
			s.Valid.Lo, s.Basis = t.Valid.Lo, t.Basis
		}
		s.Valid.Hi = t.Valid.Hi
	}
	c, err := curve.Pieces(curves, joinTolerance)
	if err != nil {
		rd.cannotJoin(s, err.Error())
		return
	}
	s.RatioReference = ratioReference(s)
	rd.caveats(s)
	b := &lowering{set: s, native: native{nominal: c, absolute: true}}
	b.expansion, b.expands = rd.r.Expansion()
	if err := b.fill(); err != nil {
		rd.cannotJoin(s, err.Error())
	}
}

func (rd *reader) cannotJoin(s *DataSet, why string) {
	rd.list.Add("pieces-do-not-join", place.Error, s.Node.Get("pieces").Position(), s.Label()+": "+why, "name pieces whose valid ranges adjoin and whose values meet within 0.1 %")
}
