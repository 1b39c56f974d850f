package transcribe

import (
	"ohmfolio/generator/quantity"
)

// target is one thing that a column may hold.
type target struct {
	key     string // of the record
	group   string // the mapping that holds the key, "" for the record itself
	kinds   []quantity.Kind
	isRange bool
	heads   []string // words of a head, folded; the longest that fits wins
}

// targets are sorted as a draft has them.
var targets = []target{
	{key: "name", heads: []string{"name", "material", "alloy", "material name", "alloy name", "werkstoff"}},
	{key: "family", heads: []string{"family"}},
	{key: "short", group: "designations", heads: []string{"designation", "short name", "short designation", "symbol", "grade"}},
	{key: "applies_to", heads: []string{"applies to", "product form"}},
	{key: "not_for", heads: []string{"not for"}},
	{key: "notes", heads: []string{"notes", "note", "remarks", "remark"}},
	{key: "source", heads: []string{"source", "source id", "citation"}},
	{key: "class", heads: []string{"class of value", "class of values"}},
	{key: "condition", heads: []string{"condition", "temper"}},
	{key: "basis", heads: []string{"basis"}},
	{key: "reference_temperature", kinds: []quantity.Kind{quantity.Temperature},
		heads: []string{"reference temperature", "reference temp", "ref temperature", "ref temp", "tref", "t ref"}},
	{key: "valid_range", kinds: []quantity.Kind{quantity.Temperature}, isRange: true, heads: []string{"valid range", "temperature range", "valid"}},
	{key: "resistivity", kinds: []quantity.Kind{quantity.Resistivity, quantity.Conductivity},
		heads: []string{"resistivity", "electrical resistivity", "volume resistivity", "specific resistance", "rho", "ρ", "spezifischer widerstand"}},
	{key: "conductivity", kinds: []quantity.Kind{quantity.Conductivity, quantity.Resistivity},
		heads: []string{"conductivity", "electrical conductivity", "iacs", "elektrische leitfähigkeit"}},
	{key: "alpha", kinds: []quantity.Kind{quantity.Coefficient1},
		heads: []string{"tcr", "alpha", "α", "temperature coefficient", "temperature coefficient of resistance", "temp coefficient", "temp coeff", "temperaturkoeffizient"}},
	{key: "beta", kinds: []quantity.Kind{quantity.Coefficient2}, heads: []string{"beta", "β", "tcr2", "tcr 2", "quadratic coefficient"}},
	{key: "gamma", kinds: []quantity.Kind{quantity.Coefficient3}, heads: []string{"gamma", "γ", "cubic coefficient"}},
	{key: "density", group: "properties", kinds: []quantity.Kind{quantity.Density}, heads: []string{"density", "mass density", "dichte"}},
	{key: "expansion", group: "properties", kinds: []quantity.Kind{quantity.Expansion},
		heads: []string{"expansion", "thermal expansion", "linear expansion", "cte", "coefficient of expansion", "coefficient of thermal expansion"}},
	{key: "emf_to_copper", group: "properties", kinds: []quantity.Kind{quantity.EMF},
		heads: []string{"emf to copper", "emf against copper", "emf to cu", "emf vs cu", "emf vs copper", "thermal emf to copper", "thermal emf vs copper"}},
	{key: "thermal_conductivity", group: "properties", kinds: []quantity.Kind{quantity.ThermalConductivity}, heads: []string{"thermal conductivity", "wärmeleitfähigkeit"}},
	{key: "specific_heat", group: "properties", kinds: []quantity.Kind{quantity.SpecificHeat}, heads: []string{"specific heat", "specific heat capacity", "heat capacity"}},
	{key: "melting_temperature", group: "properties", kinds: []quantity.Kind{quantity.Temperature},
		heads: []string{"melting temperature", "melting point", "melting range", "schmelzpunkt"}},
	{key: "tensile_strength", group: "properties", kinds: []quantity.Kind{quantity.Stress}, heads: []string{"tensile strength", "zugfestigkeit"}},
	{key: "elongation", group: "properties", kinds: []quantity.Kind{quantity.Ratio}, heads: []string{"elongation", "elongation at fracture"}},
}

// nothing is the word for a column that is left out.
const nothing = "nothing"

func targetOf(key string) *target {
	for i := range targets {
		if targets[i].key == key {
			return &targets[i]
		}
	}
	return nil
}

// targetKeys are the words that a --columns file may use.
func targetKeys() []string {
	var list []string
	for _, t := range targets {
		list = append(list, t.key)
	}
	return append(list, nothing)
}

// takes tells whether spelled is a unit of the target.
func (t *target) takes(spelled string) bool {
	for _, k := range t.kinds {
		if _, ok := quantity.FindUnit(k, spelled); ok && spelled != "" {
			return true
		}
	}
	return false
}

// numeric tells whether the target holds a quantity.
func (t *target) numeric() bool { return len(t.kinds) > 0 }
