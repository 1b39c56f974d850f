package material

import (
	"math"
	"strings"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/form"
	"ohmfolio/generator/quantity"
)

// notStated stands for a temperature that the record does not state.
var notStated = math.NaN()

// modelKeys are the keys of which a data set has at most one: each is a way
// to describe a curve.
var modelKeys = []struct {
	key   string
	model Model
}{
	{"alpha", PolynomialModel}, {"table", TableModel}, {"callendar_van_dusen", CallendarModel}, {"bloch_gruneisen", BlochModel},
	{"points", PointsModel}, {"pieces", PiecesModel}, {"chord", ChordModel},
}

var resistivityKeys = []string{"resistivity", "conductivity", "mass_resistivity", "sheet_resistance"}

// dataSets reads both layouts: keys at the top of the record, or data_sets
// with the name of the adopted one.
func (rd *reader) dataSets() {
	n := rd.r.Node
	sets := n.Get("data_sets")
	if sets == nil {
		s := rd.dataSet(soleName, n)
		rd.r.Sets, rd.r.Adopted = []*DataSet{s}, s
		return
	}
	for _, f := range dataSetFields {
		if at := n.Get(f.Key); at != nil {
			rd.add("layouts-mixed", at, "the key "+f.Key+" stands at the top although there are data_sets", "move it into the data set that it belongs to")
		}
	}
	for i, name := range sets.Keys() {
		rd.r.Sets = append(rd.r.Sets, rd.dataSet(name, sets.List()[i]))
	}
	rd.adopt()
	rd.piecesKnown()
}

func (rd *reader) adopt() {
	n := rd.r.Node.Get("adopt")
	if n == nil {
		if len(rd.r.Sets) == 1 {
			rd.r.Adopted = rd.r.Sets[0]
			return
		}
		rd.add("adopt-missing", rd.r.Node.Get("data_sets"), "there are "+quantity.Number(float64(len(rd.r.Sets)), 3)+" data sets and none is adopted", "add adopt: with the name of the house value")
		return
	}
	rd.r.Adopted = rd.r.Set(n.Text())
	if rd.r.Adopted == nil || n.Text() == "" {
		rd.add("adopt-unknown", n, "adopt names "+quote(n.Text())+", which is no data set here", "write one of "+strings.Join(rd.r.Node.Get("data_sets").Keys(), ", "))
	}
}

func (rd *reader) piecesKnown() {
	for _, s := range rd.r.Sets {
		for _, name := range s.Pieces {
			if t := rd.r.Set(name); t == nil || name == "" || t == s || t.Model == PiecesModel {
				rd.add("piece-unknown", s.Node.Get("pieces"), "the piece "+quote(name)+" is no data set that can be joined", "name data sets of this record with a curve of their own")
			}
		}
	}
}

func (rd *reader) dataSet(name string, n *form.Node) *DataSet {
	s := &DataSet{Name: name, Node: n, Class: Class(n.Get("class").Text()), Condition: n.Get("condition").Text(), Basis: Basis(n.Get("basis").Text()),
		Scale: n.Get("temperature_scale").Text(), DimensionsAt: notStated, Reference: notStated, RatioReference: notStated, PointsFile: n.Get("points").Text()}
	if n.Has("source") {
		s.Source = ReadCitation(n.Get("source"))
	} else {
		rd.add("source-missing", n, "the values have no source", "add source: with an ID of materials/sources.yaml")
	}
	if q, ok := n.Get("dimensions_at").Quantity(); ok {
		s.DimensionsAt = q.Value
	}
	if q, ok := n.Get("reference_temperature").Quantity(); ok {
		s.Reference = q.Value
	}
	s.Alpha, s.Beta, s.Gamma = pointer(n.Get("alpha")), pointer(n.Get("beta")), pointer(n.Get("gamma"))
	rd.resistivity(s)
	rd.model(s)
	rd.validRange(s)
	rd.classes(s)
	if s.Model == PointsModel {
		rd.fitPoints(s)
	}
	return s
}

// resistivity reads whichever way it was given.
func (rd *reader) resistivity(s *DataSet) {
	for _, key := range resistivityKeys {
		n := s.Node.Get(key)
		if n == nil {
			continue
		}
		if s.WrittenAs != "" {
			rd.add("resistivity-twice", n, "both "+s.WrittenAs+" and "+key+" are given", "keep the one that the source prints")
			return
		}
		s.WrittenAs = key
		q, ok := n.Quantity()
		if !ok {
			return
		}
		s.Resistivity = rd.converted(s, key, q)
	}
	if s.Resistivity != nil && s.Resistivity.HasValue() && s.Resistivity.Value <= 0 {
		rd.add("resistivity-not-positive", s.Node.Get(s.WrittenAs), "the resistivity "+quote(s.Resistivity.Text)+" is not above zero", "look at sign and unit")
	}
	if s.WrittenAs != "" && math.IsNaN(s.Reference) && !s.Node.Has("reference_temperature") {
		rd.add("reference-temperature-missing", s.Node.Get(s.WrittenAs), "the "+strings.ReplaceAll(s.WrittenAs, "_", " ")+" has no reference temperature", "add reference_temperature: as the source states it, for example 20 °C")
	}
}

func (rd *reader) converted(s *DataSet, key string, q quantity.Quantity) *quantity.Quantity {
	switch key {
	case "conductivity":
		if q.Unit.Symbol == "%IACS" && math.Abs(s.Reference-quantity.ZeroCelsius-20) > 0.01 {
			rd.add("iacs-not-at-20", s.Node.Get(key), "%IACS is a conductivity at 20 °C, and the reference temperature is another", "write MS/m, or the reference temperature 20 °C")
		}
		q = quantity.ResistivityFromConductivity(q)
	case "mass_resistivity":
		d := rd.r.Property("density")
		if d == nil || !d.Value.HasValue() {
			rd.add("density-missing", s.Node.Get(key), "a mass resistivity needs the density", "add properties: density")
			return nil
		}
		q = quantity.ResistivityFromMass(q, d.Value.Value)
	case "sheet_resistance":
		t, ok := s.Node.Get("thickness").Quantity()
		if !ok || !(t.Value > 0) {
			rd.add("thickness-missing", s.Node.Get(key), "a sheet resistance needs a thickness", "add thickness: as the source states it")
			return nil
		}
		q = quantity.ResistivityFromSheet(q, t.Value)
	}
	return &q
}

// model finds the one way in which the curve is described.
func (rd *reader) model(s *DataSet) {
	s.Model = Point
	for _, m := range modelKeys {
		n := s.Node.Get(m.key)
		if n == nil {
			continue
		}
		if s.Model != Point {
			rd.add("curve-twice", n, "both "+modelKey(s.Model)+" and "+m.key+" describe a curve", "give each its own data set")
			continue
		}
		s.Model = m.model
	}
	if s.Model == Point && (s.Beta != nil || s.Gamma != nil) {
		rd.add("alpha-missing", s.Node, "β or γ is given without α", "add alpha: (0 ppm/K where the source says so)")
	}
	if s.Model == Point && s.Resistivity == nil && s.WrittenAs == "" {
		rd.add("data-missing", s.Node, s.Label()+" states neither a resistivity nor a curve", "add resistivity:, alpha: or table:")
	}
	rd.modelParts(s)
}

func modelKey(m Model) string {
	for _, k := range modelKeys {
		if k.model == m {
			return k.key
		}
	}
	return string(m)
}

func (rd *reader) modelParts(s *DataSet) {
	n := s.Node
	switch s.Model {
	case PolynomialModel:
		if s.WrittenAs == "" && math.IsNaN(s.Reference) && !n.Has("reference_temperature") {
			rd.add("reference-temperature-missing", n.Get("alpha"), "the coefficient has no reference temperature", "add reference_temperature: as the source states it, for example 20 °C")
		}
	case TableModel:
		rd.table(s)
	case CallendarModel:
		rd.callendar(s)
	case ChordModel:
		rd.chord(s)
	case BlochModel:
		rd.bloch(s)
	case PiecesModel:
		for _, p := range n.Get("pieces").List() {
			s.Pieces = append(s.Pieces, p.Text())
		}
	}
}

func (rd *reader) callendar(s *DataSet) {
	n := s.Node.Get("callendar_van_dusen")
	c := &curve.CallendarVanDusen{}
	for key, into := range map[string]*float64{"A": &c.A, "B": &c.B, "C": &c.C} {
		if q, ok := n.Get(key).Quantity(); ok {
			*into = q.Value
		}
	}
	if math.IsNaN(s.Reference) {
		s.Reference = quantity.ZeroCelsius
	}
	if math.Abs(s.Reference-quantity.ZeroCelsius) > 1e-9 {
		rd.add("callendar-reference", s.Node.Get("reference_temperature"), "Callendar-Van Dusen coefficients are told about 0 °C", "write reference_temperature: 0 °C")
	}
	s.Callendar = c
}

func (rd *reader) classes(s *DataSet) {
	for _, n := range s.Node.Get("tolerance_classes").List() {
		c := ToleranceClass{Name: n.Get("name").Text()}
		zero, ok := n.Get("at_zero").Quantity()
		c.AtZero = zero.Value
		c.PerDegree, _ = n.Get("per_degree").Number()
		if lo, hi, ok := n.Get("window").Range(); ok {
			c.Window = &Window{lo.Value, hi.Value, n.Get("window").Text()}
			rd.rising(n.Get("window"), *c.Window)
		}
		if ok && !(c.AtZero > 0 && c.PerDegree >= 0) {
			rd.add("tolerance-class-not-positive", n, "the tolerance class "+quote(c.Name)+" is not above zero", "write at_zero and per_degree as the source prints them")
			continue
		}
		s.Classes = append(s.Classes, c)
	}
}

func (rd *reader) chord(s *DataSet) {
	n := s.Node.Get("chord")
	v, ok := n.Get("value").Quantity()
	from, okFrom := n.Get("from").Quantity()
	to, okTo := n.Get("to").Quantity()
	if !ok || !okFrom || !okTo {
		return
	}
	if from.Value == to.Value {
		rd.add("range-inverted", n, "a chord needs two different temperatures", "write from and to as the source states them")
	}
	s.Chord = &Chord{v, from.Value, to.Value}
	if math.IsNaN(s.Reference) {
		s.Reference = from.Value
	}
}

func (rd *reader) bloch(s *DataSet) {
	if e, ok := s.Node.Get("bloch_gruneisen").Get("exponent").Int(); ok && e != 2 && e != 3 && e != 5 {
		rd.add("exponent-unknown", s.Node.Get("bloch_gruneisen").Get("exponent"), "the exponent must be 2, 3 or 5", "write the exponent that the source fits with")
	}
}

// validRange reads the range, or takes it from what the data cover.
func (rd *reader) validRange(s *DataSet) {
	n := s.Node.Get("valid_range")
	if lo, hi, ok := n.Range(); ok {
		s.Valid = Window{lo.Value, hi.Value, n.Text()}
		rd.rising(n, s.Valid)
		rd.insideTable(s, n)
		return
	}
	switch {
	case n != nil: // told already
	case s.Table != nil && len(s.Table.T) > 0:
		s.Valid = Window{Lo: s.Table.T[0], Hi: s.Table.T[len(s.Table.T)-1]}
	case s.Chord != nil:
		s.Valid = Window{Lo: math.Min(s.Chord.From, s.Chord.To), Hi: math.Max(s.Chord.From, s.Chord.To)}
	case s.Model == Point:
		s.Valid = Window{Lo: s.Reference, Hi: s.Reference}
	case s.Model == PolynomialModel || s.Model == CallendarModel || s.Model == BlochModel:
		rd.add("valid-range-missing", s.Node, s.Label()+" has a curve and no valid range", "add valid_range: as far as the source's own data go, for example 0 °C to 100 °C")
	}
}

func (rd *reader) insideTable(s *DataSet, n *form.Node) {
	if s.Table == nil || len(s.Table.T) == 0 {
		return
	}
	w := Window{Lo: s.Table.T[0], Hi: s.Table.T[len(s.Table.T)-1]}
	if !w.Contains(s.Valid.Lo) || !w.Contains(s.Valid.Hi) {
		rd.add("range-beyond-table", n, "the valid range "+quote(n.Text())+" reaches beyond the table, which goes from "+quantity.CelsiusText(w.Lo)+" to "+quantity.CelsiusText(w.Hi), "narrow the range, or leave it out")
	}
}
