package material

import (
	"fmt"
	"math"
	"sort"
	"time"

	"ohmfolio/generator/columns"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// Lot is one received lot as measured: resistivity at its measuring
// temperature, in SI. NaN stands for what was not measured.
type Lot struct {
	Date        string // ISO
	Name        string // lot or heat number
	Supplier    string
	Temperature float64 // K
	Resistivity float64 // Ω·m
	U           float64 // expanded (k = 2), relative
	Alpha       float64 // 1/K
	Line        int
}

// lotColumns are the columns of a lots file.
var lotColumns = []string{"date", "lot", "resistivity", "resistance_per_length", "section", "temperature", "alpha", "U", "supplier"}

// lotsHead is where the columns of one file stand.
type lotsHead struct {
	at   map[string]int
	unit map[string]quantity.Unit
}

// ReadLots reads received lots: date, lot, resistivity (or
// resistance_per_length with section), temperature, and optionally alpha, U
// (expanded, k = 2, relative to the value) and supplier. Lots come in order of
// their dates. They are not to be used when a finding is an error.
func ReadLots(src *place.Source) ([]Lot, []place.Finding) {
	r := columns.NewReader(src)
	cells := r.Head("date,lot,resistivity / µΩ·cm,temperature / °C,U / %,supplier")
	h := lotsHead{at: map[string]int{}, unit: map[string]quantity.Unit{}}
	h.read(r, cells)
	var lots []Lot
	for cells != nil && r.Good() && r.Next() {
		if l, ok := h.lot(r); ok {
			lots = append(lots, l)
		}
	}
	sort.SliceStable(lots, func(i, j int) bool { return lots[i].Date < lots[j].Date })
	return lots, r.Findings()
}

var lotKinds = map[string]quantity.Kind{
	"resistivity": quantity.Resistivity, "resistance_per_length": quantity.ResistancePerLength, "section": quantity.Area,
	"temperature": quantity.Temperature, "alpha": quantity.Coefficient1, "U": quantity.Ratio,
}

func (h *lotsHead) read(r *columns.Reader, cells []columns.Cell) {
	known := map[string]bool{}
	for _, name := range lotColumns {
		known[name] = true
	}
	for i, c := range cells {
		if !known[c.Name] {
			r.Unknown(i, c.Name, lotColumns)
			continue
		}
		if _, twice := h.at[c.Name]; twice {
			r.Add("points-columns", i, "the column "+columns.Quote(c.Name)+" stands twice", "keep one of the two")
		}
		h.at[c.Name] = i
		if kind, ok := lotKinds[c.Name]; ok {
			h.unit[c.Name] = r.Unit(i, c, kind)
		}
	}
	_, rho := h.at["resistivity"]
	_, length := h.at["resistance_per_length"]
	_, section := h.at["section"]
	_, date := h.at["date"]
	_, lot := h.at["lot"]
	_, temperature := h.at["temperature"]
	if cells != nil && r.Good() && (!date || !lot || !temperature || rho == length || length != section) {
		r.Add("points-columns", -1, "the head lacks what a lot needs", "write date, lot, temperature, and resistivity, or resistance_per_length with section")
	}
}

func (h *lotsHead) lot(r *columns.Reader) (Lot, bool) {
	l := Lot{Date: r.Text(h.at["date"]), Name: r.Text(h.at["lot"]), Line: r.Line(), U: math.NaN(), Alpha: math.NaN()}
	if i, ok := h.at["supplier"]; ok {
		l.Supplier = r.Text(i)
	}
	if _, err := time.Parse("2006-01-02", l.Date); err != nil {
		r.Add("date-not-read", h.at["date"], columns.Quote(l.Date)+" is no date", "write year-month-day: 2026-05-04")
		return l, false
	}
	ok := h.number(r, "temperature", &l.Temperature)
	if _, direct := h.at["resistivity"]; direct {
		ok = h.number(r, "resistivity", &l.Resistivity) && ok
	} else {
		var perLength, section float64
		ok = h.number(r, "resistance_per_length", &perLength) && h.number(r, "section", &section) && ok
		l.Resistivity = float64(perLength * section)
	}
	ok = h.optional(r, "U", &l.U) && h.optional(r, "alpha", &l.Alpha) && ok
	switch {
	case ok && !(l.Resistivity > 0):
		r.Add("row-not-positive", 0, "the resistivity of lot "+columns.Quote(l.Name)+" is not above zero", "look at the reading and its unit")
		return l, false
	case ok && l.Temperature < 0:
		r.Add("temperature-below-absolute-zero", h.at["temperature"], "the temperature lies below absolute zero", "look at the unit")
		return l, false
	}
	return l, ok
}

func (h *lotsHead) number(r *columns.Reader, name string, into *float64) bool {
	x, ok := r.Number(h.at[name])
	*into = h.unit[name].ToSI(x)
	return ok
}

// optional leaves NaN for a column or cell that is not there.
func (h *lotsHead) optional(r *columns.Reader, name string, into *float64) bool {
	i, there := h.at[name]
	if !there || r.Text(i) == "" {
		return true
	}
	return h.number(r, name, into)
}

// readLots reads the lots of a record and finds those that its adopted curve
// cannot be compared with.
func (rd *reader) readLots() {
	n := rd.r.Node.Get("lots")
	if n == nil || rd.beside == nil {
		return
	}
	src := rd.beside(n.Text())
	if src == nil {
		return
	}
	lots, findings := ReadLots(src)
	rd.list.Findings = append(rd.list.Findings, findings...)
	rd.r.Received = lots
	if a := rd.r.Adopted; a != nil && a.Rho == nil && len(lots) > 0 {
		rd.warn("lots-not-compared", n, fmt.Sprintf("%d lots cannot be compared: the adopted data set has no resistivity", len(lots)), "adopt a data set with a resistivity")
	}
}
