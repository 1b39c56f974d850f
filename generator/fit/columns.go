package fit

import (
	"strings"

	"ohmfolio/generator/quantity"
)

// Column is one column of a points file: what it holds and in which unit.
type Column struct {
	Name string
	Unit quantity.Unit
}

// Header says what a points file holds.
type Header struct {
	Temperature  int // index of the column
	Value        int
	Uncertainty  int // standard uncertainty of the value, −1 when there is none
	UncertaintyT int // standard uncertainty of the temperature, −1 when there is none
	Kind         quantity.Kind
	ValueUnit    quantity.Unit
	Relative     bool // the uncertainty is given relative to the value
	Columns      []Column
}

// HasUncertainty tells whether points can be weighted.
func (h Header) HasUncertainty() bool { return h.Uncertainty >= 0 }

// splitHead splits "temperature / °C", "temperature [°C]" and
// "temperature (°C)" into name and unit.
func splitHead(cell string) (name, unit string) {
	cell = strings.TrimSpace(cell)
	if i := strings.Index(cell, " / "); i >= 0 {
		return strings.TrimSpace(cell[:i]), strings.TrimSpace(cell[i+3:])
	}
	for _, pair := range []string{"[]", "()"} {
		if i := strings.IndexByte(cell, pair[0]); i > 0 && strings.HasSuffix(cell, pair[1:]) {
			return strings.TrimSpace(cell[:i]), strings.TrimSpace(cell[i+1 : len(cell)-1])
		}
	}
	return cell, ""
}

// valueKinds are the columns that a value can stand in.
var valueKinds = map[string]quantity.Kind{
	"resistance": quantity.Resistance, "resistivity": quantity.Resistivity, "resistance_ratio": quantity.Ratio,
}

// columnNames are all columns of a points file, for the near word.
var columnNames = []string{"temperature", "resistance", "resistivity", "resistance_ratio", "uncertainty", "uncertainty_T"}
