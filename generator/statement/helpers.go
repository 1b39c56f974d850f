package statement

import (
	"strings"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

const outside = "—" // a cell outside the valid range

func rangeText(w material.Window) string {
	return quantity.CelsiusText(w.Lo) + " to " + quantity.CelsiusText(w.Hi)
}

func orNotStated(s string) string {
	if s == "" {
		return "not stated"
	}
	return s
}

func nonNil(s []string) []string {
	if s == nil {
		return []string{}
	}
	return s
}

func setNames(r *material.Record) string {
	names := make([]string, len(r.Sets))
	for i, s := range r.Sets {
		names[i] = s.Name
	}
	return strings.Join(names, ", ")
}

func unitList(k quantity.Kind) string {
	var names []string
	for _, u := range quantity.Units(k) {
		names = append(names, u.Symbol)
	}
	return strings.Join(names, ", ")
}

// houseUnit is the unit that reference.yaml chose for a kind.
func houseUnit(lib *library.Library, k quantity.Kind) quantity.Unit {
	u := UnitsOf(lib)
	switch k {
	case quantity.Resistivity:
		return u.Resistivity
	case quantity.Conductivity:
		return u.Conductivity
	case quantity.Coefficient1:
		return u.Coefficient
	case quantity.Temperature:
		return u.Temperature
	}
	one, _ := quantity.FindUnit(quantity.Ratio, "1")
	return one
}
