package material

import (
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/form"
	"ohmfolio/generator/quantity"
)

// Model names how a data set describes its curve.
type Model string

// The models. Point is a resistivity without a coefficient: a point, no curve.
const (
	Point           Model = "point"
	PolynomialModel Model = "polynomial"
	TableModel      Model = "table"
	CallendarModel  Model = "callendar-van-dusen"
	BlochModel      Model = "bloch-gruneisen"
	PointsModel     Model = "points"
	PiecesModel     Model = "pieces"
	ChordModel      Model = "chord"
)

// A DataSet is one source's description of the material in one condition.
type DataSet struct {
	Name         string
	Node         *form.Node
	Source       Citation
	Class        Class
	Condition    string
	Basis        Basis
	Scale        string  // temperature scale as written, "" when not stated
	DimensionsAt float64 // K, of basis Uncorrected; NaN when not stated
	Model        Model

	Reference   float64            // K; NaN when the set has none (a table of ρ)
	Resistivity *quantity.Quantity // at Reference, as ρ in Ω·m; Text is what was written
	WrittenAs   string             // key it was written under: "resistivity", "conductivity", …
	Alpha       *quantity.Quantity
	Beta        *quantity.Quantity
	Gamma       *quantity.Quantity
	Chord       *Chord
	Table       *Table
	Callendar   *curve.CallendarVanDusen
	Classes     []ToleranceClass // of a thermometer
	Pieces      []string
	PointsFile  string
	Fitted      *Fitted // of measured points

	Valid Window // K; a Point without valid_range has Lo = Hi = Reference

	// Computed by Lower. A nil curve means that the set cannot tell it.
	Rho   *Told // volume resistivity, Ω·m
	Ratio *Told // R(T)/R(RatioReference) of a fixed body
	// RatioReference is Reference when there is one, else 20 °C when inside
	// the range, else the lower end.
	RatioReference float64
	// Caveats are plain sentences that go with every number of the set:
	// "basis not stated: may differ by up to 30 ppm/K × (T − T_ref)".
	Caveats []string
}

// Chord is a supplier's mean coefficient between two temperatures.
type Chord struct {
	Value    quantity.Quantity
	From, To float64 // K
}

// ToleranceClass is a class of thermometers: ±(AtZero + PerDegree·|t|) in
// kelvin, t in °C (IEC 60751, clause on tolerances).
type ToleranceClass struct {
	Name              string
	AtZero, PerDegree float64
	Window            *Window // where the source states it, nil when not stated
}

// At is the tolerance in kelvin at t (K); false outside the stated window.
func (c ToleranceClass) At(t float64) (float64, bool) {
	if c.Window != nil && !c.Window.Contains(t) {
		return 0, false
	}
	return c.AtZero + float64(c.PerDegree*math.Abs(t-quantity.ZeroCelsius)), true
}

// Table is a printed table: temperatures in kelvin, values in SI or ratios.
type Table struct {
	T, Y   []float64
	Ratio  bool // Y is R/R_ref, otherwise resistivity in Ω·m
	Linear bool
	Unit   quantity.Unit      // of Y as printed
	Kelvin bool               // temperatures were printed in kelvin
	Each   *quantity.Quantity // ± of each row as a factor of 1, nil when none is stated
	Digits int                // significant digits of the rows, the most that any has
}

// Told is what a data set can tell of one quantity.
type Told struct {
	Nominal curve.Curve // no segments when the source gives limits without a nominal
	Limits  *curve.Band // nil when no limits are stated
	// Uncertainty is the standard uncertainty (k = 1) at T, nil when none is stated.
	Uncertainty func(t float64) float64
	K           float64  // coverage factor the source printed, 2 when several differ
	Covers      []string // what Uncertainty contains: "resistivity", "alpha"
	NotCovered  []string // what it does not: "beta: without uncertainty"
	NoLimits    []string // why limits are missing or incomplete: "α: no limits stated"
}
