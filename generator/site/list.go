package site

import (
	"math"
	"sort"
	"strconv"
	"strings"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
	"ohmfolio/generator/quantity"
	"ohmfolio/generator/study"
)

// listRow is one material in the lists. The Value fields are for sorting, ""
// when there is none.
type listRow struct {
	ID, Name, Family, Status, Range      string
	Rho, RhoValue                        string
	Slope, SlopeValue                    string
	Change, ChangeValue, Warm, WarmValue string
	EMF, Density, Service                string
}

const twenty = quantity.ZeroCelsius + 20

func (s *site) row(r *material.Record) listRow {
	l := listRow{ID: r.ID, Name: r.Name, Family: or(string(r.Family), "not stated"), Status: statusText(r), Rho: "not told at 20\u202f°C", Slope: "no coefficient",
		Change: "not told", Warm: "not told", EMF: propertyText(r, "emf_to_copper"), Density: propertyText(r, "density"), Service: serviceText(r)}
	set := r.Adopted
	if set == nil {
		return l
	}
	l.Range = quantity.CelsiusText(set.Valid.Lo) + " to " + quantity.CelsiusText(set.Valid.Hi)
	if set.Model == material.Point {
		l.Range = "one temperature, " + quantity.CelsiusText(set.Valid.Lo)
	}
	if v, ok := (material.Reading{Told: set.Rho}).At(twenty); ok {
		x := s.units.Resistivity.FromSI(v)
		l.Rho, l.RhoValue = quantity.Number(x, set.Digits()), plain(x)
	}
	l.Slope, l.SlopeValue = slopeAt20(set)
	l.Warm, l.WarmValue = changeOver(set, 20, 60)
	l.Change, l.ChangeValue = changeOver(set, -40, 85)
	return l
}

func or(s, other string) string {
	if s == "" {
		return other
	}
	return s
}

func statusText(r *material.Record) string {
	s := or(string(r.Status), string(material.Draft))
	if r.Invented {
		s += ", invented"
	}
	return s
}

func plain(x float64) string {
	return strconv.FormatFloat(quantity.Round12(x), 'g', 6, 64)
}

// changeOver is the greatest change from 20 °C over a window in °C; the sort
// value is its magnitude.
func changeOver(set *material.DataSet, lo, hi float64) (text, value string) {
	if !set.Ratio.HasNominal() {
		return "no coefficient", ""
	}
	m, err := curve.Measure(set.Ratio.Nominal, twenty, quantity.ZeroCelsius+lo, quantity.ZeroCelsius+hi)
	if err != nil {
		return "outside the range", ""
	}
	return quantity.ChangeText(m.Change.Greatest), plain(math.Abs(m.Change.Greatest))
}

// slopeAt20 is (1/R)·dR/dT of a fixed body at 20 °C in ppm/K: one measure
// that every curve has, whatever its model.
func slopeAt20(set *material.DataSet) (text, value string) {
	if !set.Ratio.HasNominal() {
		return "no coefficient", ""
	}
	v, ok := set.Ratio.Nominal.At(twenty)
	d, ok2 := set.Ratio.Nominal.Slope(twenty)
	if !ok || !ok2 || v == 0 {
		return "outside the range", ""
	}
	return quantity.PPMText(d / v), plain(d / v * 1e6)
}

func propertyText(r *material.Record, name string) string {
	p := r.Property(name)
	if p == nil {
		return "not stated"
	}
	unit := quantity.Units(p.Value.Kind)[0] // one scale for the column
	return strings.TrimSuffix(p.Value.In(unit), quantity.NarrowSpace+unit.Symbol)
}

func serviceText(r *material.Record) string {
	p := r.Property("service_temperature")
	switch {
	case p == nil:
		return "not stated"
	case p.Continuous != nil:
		return p.Continuous.In(p.Continuous.Unit)
	}
	return p.Accuracy.In(p.Accuracy.Unit)
}

// materialsPage is what materials-page.tmpl and side-by-side-page.tmpl print.
type materialsPage struct {
	frame
	Rows     []listRow
	Families []string
	Unit     string
	Reports  []link
	Cautions cautionList
}

func (s *site) rows() []listRow {
	var rows []listRow
	for _, r := range s.in.Library.Materials {
		rows = append(rows, s.row(r))
	}
	sort.SliceStable(rows, func(i, j int) bool { return strings.ToLower(rows[i].Name) < strings.ToLower(rows[j].Name) })
	return rows
}

func (s *site) unit() string {
	return s.units.Resistivity.Symbol
}

func (s *site) materials() output.Output {
	return s.page("materials.html", "materials-page", func() any {
		p := materialsPage{frame: s.frame("Materials", "list", "", "materials.html", "list.js", "reading.js", "evaluate.js", "materials.js"), Rows: s.rows(), Unit: s.unit()}
		p.Families = familiesOf(p.Rows)
		return p
	})
}

func (s *site) sideBySide() output.Output {
	return s.page("side-by-side.html", "side-by-side-page", func() any {
		p := materialsPage{frame: s.frame("Side by side", "beside", "", "side-by-side.html", "list.js", "reading.js", "beside.js"), Rows: s.rows(), Unit: s.unit(), Reports: s.pages("reports"),
			Cautions: cautionList{"cautions", study.SheetCautions()}}
		p.Families = familiesOf(p.Rows)
		return p
	})
}

func (s *site) firstShunt() output.Output {
	return s.page("first-shunt.html", "first-shunt-page", func() any {
		return materialsPage{frame: s.frame("First shunt", "shunt-page", "", "", "list.js", "reading.js", "first-shunt.js"), Families: familiesOf(s.rows()), Cautions: cautionList{"cautions", study.ShuntCautions()}}
	})
}

func familiesOf(rows []listRow) []string {
	var list []string
	seen := map[string]bool{}
	for _, r := range rows {
		if r.Family != "not stated" && !seen[r.Family] {
			seen[r.Family] = true
			list = append(list, r.Family)
		}
	}
	sort.Strings(list)
	return list
}

// findWords is what the text field looks through: lower case.
func findWords(r *material.Record) string {
	parts := append([]string{r.ID, r.Name, string(r.Family)}, r.Formerly...)
	for _, d := range r.Designations {
		parts = append(parts, d.Text)
	}
	for _, c := range r.Composition {
		parts = append(parts, c.Key)
	}
	for _, e := range r.Equivalents {
		parts = append(parts, e.Designation)
	}
	for _, d := range r.Declarations {
		parts = append(parts, d.Substance, d.Number)
	}
	return strings.ToLower(strings.Join(parts, " "))
}
