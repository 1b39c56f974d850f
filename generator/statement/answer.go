package statement

import (
	"fmt"
	"math"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// The quantities that can be asked of a material.
const (
	AskResistivity     = "resistivity"
	AskConductivity    = "conductivity"
	AskResistanceRatio = "resistance-ratio"
)

// A Question asks one number of one material.
type Question struct {
	Quantity    string   // one of the Ask constants
	At          float64  // K
	Reference   *float64 // K, of a resistance ratio; nil: the set's own
	Set         string   // data set, "" for the adopted one
	Unit        string   // "" for the house unit
	Extrapolate bool     // only when a person asked in so many words
}

// Interval is a pair of limits with what they contain and what not.
type Interval struct {
	Lower      float64  `json:"lower"`
	Upper      float64  `json:"upper"`
	Covers     []string `json:"covers"`
	NotCovered []string `json:"not_covered"`
}

// Expanded is an expanded uncertainty as an interval. Dof is null when the
// degrees of freedom are not stated.
type Expanded struct {
	Lower      float64  `json:"lower"`
	Upper      float64  `json:"upper"`
	K          float64  `json:"k"`
	Dof        *float64 `json:"dof"`
	Covers     []string `json:"covers"`
	NotCovered []string `json:"not_covered"`
}

// An Answer is one number with all that must travel with it. Its JSON form
// is the contract of the value command.
type Answer struct {
	Material         string     `json:"material"`
	Data             string     `json:"data"`
	Quantity         string     `json:"quantity"`
	TemperatureC     float64    `json:"temperature_C"`
	ReferenceC       *float64   `json:"reference_C"`
	Value            *float64   `json:"value"`
	Unit             string     `json:"unit"`
	Limits           *Interval  `json:"limits"`
	Uncertainty      *Expanded  `json:"uncertainty"`
	WithinValidRange bool       `json:"within_valid_range"`
	Extrapolated     bool       `json:"extrapolated"`
	ValidRangeC      [2]float64 `json:"valid_range_C"`
	Basis            string     `json:"basis"`
	Class            string     `json:"class"`
	Condition        string     `json:"condition"`
	Checked          string     `json:"checked"`
	Source           string     `json:"source"`
	Status           string     `json:"status"`
	Revision         int        `json:"revision"`
	Fingerprint      string     `json:"fingerprint"`
	Caveats          []string   `json:"caveats"`

	Digits int    `json:"-"` // significant digits the source justifies
	Text   string `json:"-"` // value with unit
	Band   string `json:"-"` // limits or uncertainty as text, "" when unknown
}

// Ask answers q of the record r. A source that states limits without a
// nominal gives an answer whose Value is nil and whose Limits are there. The
// error says in words why there is nothing to tell; the answer that comes with
// it tells range, basis and source all the same.
func Ask(lib *library.Library, r *material.Record, q Question) (Answer, error) {
	set := r.Set(q.Set)
	if set == nil {
		return Answer{Material: r.ID}, fmt.Errorf("%s has no data set %q; it has %s", r.ID, q.Set, setNames(r))
	}
	a := answerFrame(lib, r, set, q)
	told, err := toldFor(set, q.Quantity)
	if err != nil {
		return a, err
	}
	if err := checkRange(set, q, &a); err != nil {
		return a, err
	}
	unit, err := unitFor(lib, q)
	if err != nil {
		return a, err
	}
	a.Unit = unit.Symbol
	if unit.Symbol == "" {
		a.Unit = "1"
	}
	fill(&a, set, told, q, unit)
	if a.Value == nil {
		if a.Limits != nil {
			a.Text = "no nominal value"
			return a, nil
		}
		return a, fmt.Errorf("%s, data set %s, cannot tell %s at %s", r.ID, set.Name, q.Quantity, quantity.CelsiusText(q.At))
	}
	return a, nil
}

func answerFrame(lib *library.Library, r *material.Record, set *material.DataSet, q Question) Answer {
	a := Answer{
		Material: r.ID, Data: set.Name, Quantity: q.Quantity,
		TemperatureC: quantity.Round12(q.At - quantity.ZeroCelsius),
		ValidRangeC:  [2]float64{quantity.Round12(set.Valid.Lo - quantity.ZeroCelsius), quantity.Round12(set.Valid.Hi - quantity.ZeroCelsius)},
		Basis:        orNotStated(string(set.Basis)), Class: orNotStated(string(set.Class)),
		Condition: orNotStated(set.Condition), Checked: orNotStated(string(lib.CheckedOf(set.Source))),
		Source: set.Source.ID, Status: string(r.Status), Revision: r.Revision, Fingerprint: r.Fingerprint,
		Caveats: append([]string{}, set.Caveats...),
	}
	a.WithinValidRange = set.Valid.Contains(q.At)
	if q.Quantity == AskResistanceRatio {
		ref := referenceOf(set, q.Reference)
		c := quantity.Round12(ref - quantity.ZeroCelsius)
		a.ReferenceC = &c
		a.WithinValidRange = a.WithinValidRange && set.Valid.Contains(ref)
	}
	return a
}

// referenceOf is the reference temperature of a ratio: the one asked for,
// otherwise the set's own.
func referenceOf(set *material.DataSet, asked *float64) float64 {
	if asked != nil {
		return *asked
	}
	return set.RatioReference
}

func toldFor(set *material.DataSet, asked string) (*material.Told, error) {
	switch asked {
	case AskResistivity, AskConductivity:
		if set.Rho == nil {
			return nil, fmt.Errorf("data set %s answers ratios only: it has no resistivity", set.Name)
		}
		return set.Rho, nil
	case AskResistanceRatio:
		if set.Ratio == nil {
			return nil, fmt.Errorf("data set %s cannot tell a resistance ratio: no coefficient", set.Name)
		}
		return set.Ratio, nil
	}
	return nil, fmt.Errorf("%q is no quantity of this command; ask for %s, %s or %s",
		asked, AskResistivity, AskConductivity, AskResistanceRatio)
}

// checkRange refuses a temperature outside the valid range unless the
// question says to extrapolate, and marks the answer then.
func checkRange(set *material.DataSet, q Question, a *Answer) error {
	if a.WithinValidRange {
		return nil
	}
	if !q.Extrapolate {
		at := q.At
		if set.Valid.Contains(at) && a.ReferenceC != nil {
			at = *a.ReferenceC + quantity.ZeroCelsius
		}
		return OutsideError{At: at, Valid: set.Valid}
	}
	a.Extrapolated = true
	a.Caveats = append(a.Caveats, "extrapolated beyond the valid range "+rangeText(set.Valid)+
		": a guess by the formula, not data; verify by test before anything depends on it")
	return nil
}

// OutsideError says that a temperature lies outside the valid range.
type OutsideError struct {
	At    float64 // K
	Valid material.Window
}

func (e OutsideError) Error() string {
	return fmt.Sprintf("%s lies outside the valid range %s; no value is given there", quantity.CelsiusText(e.At), rangeText(e.Valid))
}

// unitFor finds the unit asked for, or the house unit.
func unitFor(lib *library.Library, q Question) (quantity.Unit, error) {
	kind := map[string]quantity.Kind{AskResistivity: quantity.Resistivity, AskConductivity: quantity.Conductivity,
		AskResistanceRatio: quantity.Ratio}[q.Quantity]
	if q.Unit == "" {
		return houseUnit(lib, kind), nil
	}
	u, ok := quantity.FindUnit(kind, q.Unit)
	if !ok {
		return u, fmt.Errorf("%q is no unit of %s; try %s", q.Unit, q.Quantity, unitList(kind))
	}
	if u.Symbol == "%IACS" && math.Abs(q.At-(quantity.ZeroCelsius+20)) > 1e-9 {
		return u, fmt.Errorf("%%IACS is a conductivity at 20 °C; at %s ask for MS/m", quantity.CelsiusText(q.At))
	}
	return u, nil
}

// fill computes value and bands in SI and converts them to unit.
func fill(a *Answer, set *material.DataSet, told *material.Told, q Question, unit quantity.Unit) {
	e := material.Reading{Told: told, Extrapolate: a.Extrapolated}
	if q.Quantity == AskResistanceRatio {
		e.Ratio, e.Reference = true, referenceOf(set, q.Reference)
	}
	convert := func(x float64) float64 { return quantity.Round12(unit.FromSI(x)) }
	if q.Quantity == AskConductivity {
		convert = func(x float64) float64 { return quantity.Round12(unit.FromSI(1 / x)) }
	}
	a.Digits = set.Digits()
	if e.Ratio {
		a.Digits = set.RatioDecimals() + 1
	}
	v, ok := e.At(q.At)
	if ok {
		x := convert(v)
		a.Value = &x
		a.Text = unit.Format(unit.ToSI(x), a.Digits)
	}
	if b, ok := e.Limits(q.At); ok {
		lo, hi := ordered(convert(b.Lower), convert(b.Upper))
		a.Limits = &Interval{Lower: lo, Upper: hi, Covers: limitCovers(told), NotCovered: limitNotCovered(told)}
		a.Band = "limits " + unit.Format(unit.ToSI(lo), a.Digits+1) + " to " + unit.Format(unit.ToSI(hi), a.Digits+1)
	}
	if ok && told.Uncertainty != nil && !a.Extrapolated && (!e.Ratio || e.Reference == set.RatioReference) {
		fillUncertainty(a, told, v, q.At, convert, unit)
	}
}

func fillUncertainty(a *Answer, told *material.Told, v, at float64, convert func(float64) float64, unit quantity.Unit) {
	k := told.K
	if k == 0 {
		k = 2
	}
	u := float64(k * told.Uncertainty(at))
	lo, hi := ordered(convert(v-u), convert(v+u))
	a.Uncertainty = &Expanded{Lower: lo, Upper: hi, K: k, Covers: nonNil(told.Covers), NotCovered: nonNil(told.NotCovered)}
	if a.Band == "" {
		a.Band = fmt.Sprintf("%s to %s (k=%g)", unit.Format(unit.ToSI(lo), a.Digits+1), unit.Format(unit.ToSI(hi), a.Digits+1), k)
	}
}

func limitCovers(t *material.Told) []string     { return nonNil(t.Limits.Covers) }
func limitNotCovered(t *material.Told) []string { return nonNil(t.Limits.NotCovered) }

func ordered(a, b float64) (float64, float64) {
	if a > b {
		return b, a
	}
	return a, b
}
