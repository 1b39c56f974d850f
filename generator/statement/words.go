package statement

import (
	"fmt"
	"math"
	"path"
	"regexp"
	"strings"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// InWords is the answer to a question asked in prose.
type InWords struct {
	Text    string // the current value, in the unit and rounding of what was written
	Note    string // band and range, for a footnote
	Matches bool   // what was written is still the value, or asked to be filled in
}

// TargetID is the material that a live number's link points to.
func TargetID(target string) string {
	return strings.TrimSuffix(path.Base(target), ".yaml")
}

// The questions that prose may ask; temperatures carry their unit.
var (
	questionAt   = regexp.MustCompile(`^(resistivity|conductivity|resistance-ratio) at (.+?)(?: from (.+))?$`)
	questionOver = regexp.MustCompile(`^greatest change from (.+) to (.+?)(?: about (.+))?$`)
)

// AskInWords answers the question of a live number. written is the text of
// the link: it chooses unit and rounding, "…" lets the program choose.
func AskInWords(lib *library.Library, r *material.Record, question, written string) (InWords, error) {
	if m := questionAt.FindStringSubmatch(question); m != nil {
		return askAt(lib, r, m[1], m[2], m[3], written)
	}
	if m := questionOver.FindStringSubmatch(question); m != nil {
		return askOver(lib, r, m[1], m[2], m[3], written)
	}
	return InWords{}, fmt.Errorf("it is not understood")
}

func temperature(text string) (float64, error) {
	q, p := quantity.Parse(quantity.Temperature, text)
	if p != nil {
		return 0, fmt.Errorf("%s", p.Message)
	}
	return q.Value, nil
}

func askAt(lib *library.Library, r *material.Record, asked, at, from, written string) (InWords, error) {
	q := Question{Quantity: asked}
	var err error
	if q.At, err = temperature(at); err != nil {
		return InWords{}, err
	}
	if from != "" {
		t, err := temperature(from)
		if err != nil {
			return InWords{}, err
		}
		q.Reference = &t
	}
	kind := map[string]quantity.Kind{AskResistivity: quantity.Resistivity, AskConductivity: quantity.Conductivity, AskResistanceRatio: quantity.Ratio}[asked]
	printed, _ := quantity.Parse(kind, written)
	if printed.HasValue() && printed.Unit.Symbol != "" {
		q.Unit = printed.Unit.Symbol
	}
	a, err := Ask(lib, r, q)
	if err != nil {
		return InWords{}, err
	}
	if a.Value == nil {
		return InWords{}, fmt.Errorf("the record states limits without a nominal value")
	}
	unit, err := unitFor(lib, q)
	if err != nil {
		return InWords{}, err
	}
	return asWritten(written, printed, unit, unit.ToSI(*a.Value), a.Digits, a.Band), nil
}

func askOver(lib *library.Library, r *material.Record, from, to, about, written string) (InWords, error) {
	lo, err := temperature(from)
	if err != nil {
		return InWords{}, err
	}
	hi, err := temperature(to)
	if err != nil {
		return InWords{}, err
	}
	if r.Adopted == nil || !r.Adopted.Ratio.HasNominal() {
		return InWords{}, fmt.Errorf("no coefficient")
	}
	ref := r.Adopted.RatioReference
	if about != "" {
		if ref, err = temperature(about); err != nil {
			return InWords{}, err
		}
	}
	m, err := curve.Measure(r.Adopted.Ratio.Nominal, ref, lo, hi)
	if err != nil {
		return InWords{}, err
	}
	printed, _ := quantity.Parse(quantity.Ratio, written)
	unit, _ := quantity.FindUnit(quantity.Ratio, "%")
	if printed.HasValue() {
		unit = printed.Unit
	}
	return asWritten(written, printed, unit, m.Change.Greatest, 3, "from "+quantity.CelsiusText(ref)), nil
}

// asWritten prints si like the author did, to the same place, and tells
// whether what stands there is still right.
func asWritten(written string, printed quantity.Quantity, unit quantity.Unit, si float64, digits int, note string) InWords {
	if !printed.HasValue() {
		return InWords{Text: unit.Format(si, digits), Note: note, Matches: isFill(written)}
	}
	place := decimalsOf(written)
	now := math.Round(unit.FromSI(si)*math.Pow(10, float64(place))) / math.Pow(10, float64(place))
	was := unit.FromSI(printed.Value)
	text := quantity.Fixed(now, place)
	if unit.Symbol != "" && unit.Symbol != "1" {
		text += quantity.NarrowSpace + unit.Symbol
	}
	return InWords{Text: text, Note: note, Matches: math.Abs(now-was) < 0.5*math.Pow(10, -float64(place))}
}

func isFill(written string) bool {
	written = strings.TrimSpace(written)
	return written == "…" || written == "..."
}

var decimals = regexp.MustCompile(`^[^0-9]*[0-9]*\.([0-9]+)`)

// decimalsOf counts the digits after the decimal point of the first number.
func decimalsOf(written string) int {
	if m := decimals.FindStringSubmatch(written); m != nil {
		return len(m[1])
	}
	return 0
}
