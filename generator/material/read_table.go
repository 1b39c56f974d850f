package material

import (
	"math"
	"strconv"
	"strings"

	"ohmfolio/generator/form"
	"ohmfolio/generator/quantity"
)

// table reads a printed table: units, rows in rising temperature, factors
// that are 1 at the reference temperature.
func (rd *reader) table(s *DataSet) {
	n := s.Node.Get("table")
	temperature, ok := quantity.FindUnit(quantity.Temperature, n.Get("temperature").Text())
	if !ok {
		rd.add("table-unit", n.Get("temperature"), quote(n.Get("temperature").Text())+" is no unit of temperature", "write K, °C or °F")
		return
	}
	t := &Table{Kelvin: temperature.Symbol == "K"}
	convert, ok := rd.tableUnit(n, t)
	if !ok {
		return
	}
	t.Linear = t.Ratio
	if n.Has("interpolate") {
		t.Linear = n.Get("interpolate").Text() == "linear"
	}
	for i, row := range n.Get("rows").Rows() {
		node := n.Get("rows").List()[i]
		if len(row) != 2 {
			rd.add("row-width", node, "a row has "+strconv.Itoa(len(row))+" numbers", "write [temperature, value]")
			return
		}
		rd.row(t, node, temperature.ToSI(row[0]), convert(row[1]))
		t.Digits = max(t.Digits, digitsWritten(node.List()[1].Text()))
	}
	if len(t.T) < 2 {
		rd.add("rows-too-few", n.Get("rows"), "a table needs two rows at least", "add rows, or give a resistivity without a table")
		return
	}
	rd.eachRow(n, t)
	s.Table = t
	rd.factorAtReference(s, n)
}

// tableUnit finds what the values are; exactly one of three keys says it.
func (rd *reader) tableUnit(n *form.Node, t *Table) (func(float64) float64, bool) {
	count := 0
	for _, key := range []string{"resistivity", "conductivity", "resistance_ratio"} {
		if n.Has(key) {
			count++
		}
	}
	if count != 1 {
		rd.add("table-unit", n, "the table must say one thing that its values are", "write resistivity: µΩ·cm, conductivity: MS/m, or resistance_ratio: 1")
		return nil, false
	}
	kind, key := quantity.Resistivity, "resistivity"
	switch {
	case n.Has("conductivity"):
		kind, key = quantity.Conductivity, "conductivity"
	case n.Has("resistance_ratio"):
		kind, key, t.Ratio = quantity.Ratio, "resistance_ratio", true
	}
	u, ok := quantity.FindUnit(kind, n.Get(key).Text())
	if !ok || u.Symbol == "%IACS" {
		rd.add("table-unit", n.Get(key), quote(n.Get(key).Text())+" is no unit of "+string(kind)+" that a table over temperature can have", "write for example "+quantity.NearUnit(kind, ""))
		return nil, false
	}
	t.Unit = u
	if kind == quantity.Conductivity {
		return func(x float64) float64 { return 1 / u.ToSI(x) }, true
	}
	return u.ToSI, true
}

func (rd *reader) row(t *Table, n *form.Node, temperature, y float64) {
	switch {
	case temperature < 0:
		rd.add("temperature-below-absolute-zero", n, "the temperature of the row lies below absolute zero", "look at the unit: K or °C?")
	case !(y > 0) || math.IsInf(y, 0):
		rd.add("row-not-positive", n, "the value of the row is not above zero", "look for a misprint")
	case len(t.T) > 0 && temperature <= t.T[len(t.T)-1]:
		rd.add("rows-not-rising", n, "the temperatures do not rise here", "sort the rows, and keep each temperature once")
	}
	t.T, t.Y = append(t.T, temperature), append(t.Y, y)
}

// eachRow reads the ± that holds for every row, as a factor about 1. A ratio is
// 1 at its reference temperature whatever the rows are worth, so a table of
// ratios takes none.
func (rd *reader) eachRow(n *form.Node, t *Table) {
	at := n.Get("each_row")
	if at == nil {
		return
	}
	if t.Ratio {
		rd.add("row-tolerance", at, "a table of R/R takes no ± for each row", "state limits of the resistivity, or tcr_limits")
		return
	}
	q, problem := quantity.Parse(quantity.Ratio, "100 % "+at.Text())
	if problem != nil || q.Limits == nil && q.Uncertainty == nil {
		rd.add("row-tolerance", at, quote(at.Text())+" is no ± in per cent", "write for example ± 0.5 % for limits, or ± 0.5 % (k=2) for an uncertainty")
		return
	}
	t.Each = &q
}

// factorAtReference holds a factor table to its definition: 1 at the
// reference temperature (to half a unit of the last printed digit).
func (rd *reader) factorAtReference(s *DataSet, n *form.Node) {
	if !s.Table.Ratio {
		return
	}
	if math.IsNaN(s.Reference) {
		rd.add("reference-temperature-missing", n, "a table of R/R has no reference temperature", "add reference_temperature: the temperature at which the factor is 1")
		return
	}
	for i, t := range s.Table.T {
		if math.Abs(t-s.Reference) < 1e-6 && math.Abs(s.Table.Y[i]-1) > 5e-4 {
			rd.add("factor-not-one", n.Get("rows").List()[i], "the factor at the reference temperature is not 1", "look at the reference temperature, or at the row")
		}
	}
}

func digitsWritten(text string) int {
	text, _, _ = strings.Cut(strings.ToLower(text), "e")
	n, started := 0, false
	for _, c := range text {
		if c < '0' || c > '9' {
			continue
		}
		started = started || c != '0'
		if started {
			n++
		}
	}
	return max(1, n)
}
