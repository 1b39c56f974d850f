package fit

import (
	"ohmfolio/generator/columns"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// Header says what a points file holds.
type Header struct {
	Kind      quantity.Kind // resistance, resistivity or ratio
	ValueUnit quantity.Unit
	Relative  bool // the uncertainty is given relative to the value

	temperature, value, uncertainty, uncertaintyT int // fields, −1 when there is none
	temperatureUnit, uncertaintyUnit, unitT       quantity.Unit
}

// HasUncertainty tells whether points can be weighted.
func (h Header) HasUncertainty() bool { return h.uncertainty >= 0 }

// valueKinds are the columns that a value can stand in.
var valueKinds = map[string]quantity.Kind{
	"resistance": quantity.Resistance, "resistivity": quantity.Resistivity, "resistance_ratio": quantity.Ratio,
}

// columnNames are all columns of a points file, for the near word.
var columnNames = []string{"temperature", "resistance", "resistivity", "resistance_ratio", "uncertainty", "uncertainty_T"}

// ReadPoints reads measured points from CSV: temperature and resistance (or
// resistivity, or resistance_ratio), units in the head, optionally the standard
// uncertainties uncertainty and uncertainty_T. Points come out in SI. They are
// not to be used when a finding is an error.
func ReadPoints(src *place.Source) ([]Point, Header, []place.Finding) {
	r := columns.NewReader(src)
	h := Header{temperature: -1, value: -1, uncertainty: -1, uncertaintyT: -1}
	cells := r.Head("temperature / °C,resistance / Ω")
	if cells == nil || !h.read(r, cells) {
		return nil, h, r.Findings()
	}
	var points []Point
	for r.Next() {
		if p, ok := h.point(r); ok {
			points = append(points, p)
		}
	}
	return points, h, r.Findings()
}

// read finds the columns in the head; false after a finding.
func (h *Header) read(r *columns.Reader, cells []columns.Cell) bool {
	take := func(at *int, i int) bool {
		if *at >= 0 {
			r.Add("points-columns", i, "the column "+columns.Quote(cells[i].Name)+" stands twice", "keep one of the two")
			return false
		}
		*at = i
		return true
	}
	for i, c := range cells {
		kind, isValue := valueKinds[c.Name]
		switch {
		case c.Name == "temperature" && take(&h.temperature, i):
			h.temperatureUnit = r.Unit(i, c, quantity.Temperature)
		case isValue && take(&h.value, i):
			h.Kind, h.ValueUnit = kind, r.Unit(i, c, kind)
		case c.Name == "uncertainty":
			take(&h.uncertainty, i)
		case c.Name == "uncertainty_T" && take(&h.uncertaintyT, i):
			h.unitT = r.Unit(i, c, quantity.TemperatureDifference)
		case c.Name != "temperature" && !isValue && c.Name != "uncertainty_T":
			r.Unknown(i, c.Name, columnNames)
		}
	}
	if r.Good() && (h.temperature < 0 || h.value < 0) {
		r.Add("points-columns", -1, "the head names no temperature and value", "name the columns temperature / °C and resistance / Ω")
	}
	if r.Good() && h.uncertainty >= 0 {
		h.readUncertainty(r, cells[h.uncertainty])
	}
	return r.Good()
}

// readUncertainty finds the unit of the uncertainty once the value is known:
// the value's kind, or a share of the value.
func (h *Header) readUncertainty(r *columns.Reader, c columns.Cell) {
	if u, ok := quantity.FindUnit(quantity.Ratio, c.Unit); ok && c.Unit != "" && h.Kind != quantity.Ratio {
		h.uncertaintyUnit, h.Relative = u, true
		return
	}
	h.uncertaintyUnit = r.Unit(h.uncertainty, c, h.Kind)
}

func (h *Header) point(r *columns.Reader) (Point, bool) {
	if name := columns.Head(r.Text(h.temperature)); name == "temperature" {
		r.Add("points-columns", h.temperature, "the head stands here again", "keep one head, and one unit for the whole file")
		return Point{}, false
	}
	t, ok := r.Number(h.temperature)
	y, ok2 := r.Number(h.value)
	if !ok || !ok2 {
		return Point{}, false
	}
	p := Point{T: h.temperatureUnit.ToSI(t), Y: h.ValueUnit.ToSI(y), Line: r.Line()}
	switch {
	case p.T < 0:
		r.Add("temperature-below-absolute-zero", h.temperature, "the temperature "+r.Text(h.temperature)+" lies below absolute zero", "look at the unit: K or °C?")
		return p, false
	case !(p.Y > 0):
		r.Add("row-not-positive", h.value, "the value "+r.Text(h.value)+" is not above zero", "average both polarities, and look at the leads")
		return p, false
	}
	return p, h.uncertainties(r, &p)
}

func (h *Header) uncertainties(r *columns.Reader, p *Point) bool {
	if h.uncertainty >= 0 {
		u, ok := r.Number(h.uncertainty)
		if !ok {
			return false
		}
		p.U = h.uncertaintyUnit.ToSI(u)
		if h.Relative {
			p.U = float64(p.U * p.Y)
		}
		if !(p.U > 0) {
			r.Add("row-not-positive", h.uncertainty, "the uncertainty "+r.Text(h.uncertainty)+" is not above zero", "leave the column out when it is not known")
			return false
		}
	}
	if h.uncertaintyT >= 0 {
		u, ok := r.Number(h.uncertaintyT)
		if !ok {
			return false
		}
		p.UT = h.unitT.ToSI(u)
	}
	return true
}

// ReadRaw reads columns x,y (in any order) of any sign and meaning, for
// comparison with statistical references. Points come out as written.
func ReadRaw(src *place.Source) ([]Point, []place.Finding) {
	r := columns.NewReader(src)
	x, y := -1, -1
	cells := r.Head("x,y")
	for i, c := range cells {
		switch c.Name {
		case "x":
			x = i
		case "y":
			y = i
		}
	}
	if cells != nil && (len(cells) != 2 || x < 0 || y < 0) {
		r.Add("points-columns", -1, "the head is not x,y", "begin with the row x,y or y,x")
	}
	var points []Point
	for r.Good() && r.Next() {
		px, okX := r.Number(x)
		py, okY := r.Number(y)
		if okX && okY {
			points = append(points, Point{T: px, Y: py, Line: r.Line()})
		}
	}
	return points, r.Findings()
}
