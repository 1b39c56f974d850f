// Package quantity is the unit engine of the trade: it parses, converts and
// prints numbers with units, and keeps what the author wrote beside the
// converted value. Temperatures and temperature differences are two kinds and
// never mix; limits (a specification) and uncertainties (a measurement) are
// two kinds of ±. It knows nothing of materials.
package quantity

import "math"

// Kind says what a number is. Every kind has one SI unit inside the program.
type Kind string

// The kinds, with the SI unit that values are held in.
const (
	Resistivity           Kind = "resistivity"             // Ω·m
	Conductivity          Kind = "conductivity"            // S/m
	MassResistivity       Kind = "mass resistivity"        // Ω·kg/m²
	SheetResistance       Kind = "sheet resistance"        // Ω per square
	ResistancePerLength   Kind = "resistance per length"   // Ω/m
	Resistance            Kind = "resistance"              // Ω
	Coefficient1          Kind = "temperature coefficient" // 1/K
	Coefficient2          Kind = "quadratic coefficient"   // 1/K²
	Coefficient3          Kind = "cubic coefficient"       // 1/K³
	Coefficient4          Kind = "quartic coefficient"     // 1/K⁴
	Temperature           Kind = "temperature"             // K
	TemperatureDifference Kind = "temperature difference"  // K
	Density               Kind = "density"                 // kg/m³
	EMF                   Kind = "thermal EMF"             // V/K
	ThermalConductivity   Kind = "thermal conductivity"    // W/(m·K)
	SpecificHeat          Kind = "specific heat"           // J/(kg·K)
	SurfaceLoad           Kind = "surface load"            // W/m²
	FilmCoefficient       Kind = "film coefficient"        // W/(m²·K)
	ThermalResistance     Kind = "thermal resistance"      // K/W
	CurrentDensity        Kind = "current density"         // A/m²
	Stress                Kind = "stress"                  // Pa
	Length                Kind = "length"                  // m
	Area                  Kind = "area"                    // m²
	Mass                  Kind = "mass"                    // kg
	Current               Kind = "current"                 // A
	Voltage               Kind = "voltage"                 // V
	Power                 Kind = "power"                   // W
	Time                  Kind = "time"                    // s
	Ratio                 Kind = "ratio"                   // 1
	Price                 Kind = "price"                   // currency per unit, not converted
)

// Expansion is a temperature coefficient of length.
const Expansion = Coefficient1

// Limits is a specification's interval in SI; ±Inf when it is one-sided.
type Limits struct{ Lower, Upper float64 }

// Uncertainty is a measurement's expanded uncertainty in SI magnitudes, with
// its coverage factor K.
type Uncertainty struct{ Minus, Plus, K float64 }

// Quantity is one number as written and as converted.
type Quantity struct {
	Text        string // as the author wrote it
	Kind        Kind
	Unit        Unit    // as written
	Value       float64 // SI; NaN when only limits are given
	Digits      int     // significant digits written, of the value or of the limits
	Limits      *Limits
	Uncertainty *Uncertainty

	step      float64 // SI, one unit in the last written place; 0 when unknown
	limitStep float64 // SI, the same of limits that stand beside a value
	fine      float64 // SI, the finest of value and ±: 1 mm ± 0.02 mm is known to 0.01 mm
}

// HasValue tells whether there is a nominal value.
func (q Quantity) HasValue() bool { return q.Text != "" && !math.IsNaN(q.Value) }

// Kinds returns every kind that has units, in the order of the table.
func Kinds() []Kind {
	var list []Kind
	for _, g := range table {
		list = append(list, g.kind)
	}
	return list
}
