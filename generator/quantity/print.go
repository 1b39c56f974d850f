package quantity

import (
	"math"
	"strconv"
	"strings"
)

// Number prints x with the given significant digits and a true minus; plain
// between 1e-4 and 1e7, otherwise as 5.0×10⁻⁷. Digits below one count as one.
func Number(x float64, digits int) string {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return "not a number"
	}
	digits = max(1, min(15, digits))
	if x == 0 {
		return "0"
	}
	exp := exponentOf(x, digits)
	if exp < -4 || exp > 6 {
		return scientific(x, digits)
	}
	return Fixed(roundTo(x, digits-1-exp), max(0, digits-1-exp))
}

// exponentOf is the decimal exponent of x after rounding to digits.
func exponentOf(x float64, digits int) int {
	s := strconv.FormatFloat(math.Abs(halfAway(x)), 'e', digits-1, 64)
	e, _ := strconv.Atoi(s[strings.IndexByte(s, 'e')+1:])
	return e
}

// roundTo rounds to a number of decimals, which may be negative.
func roundTo(x float64, decimals int) float64 {
	if decimals >= 0 {
		return x
	}
	p := math.Pow(10, float64(-decimals))
	return math.Round(x/p) * p
}

func scientific(x float64, digits int) string {
	s := strconv.FormatFloat(halfAway(x), 'e', digits-1, 64)
	mantissa, exponent, _ := strings.Cut(s, "e")
	e, _ := strconv.Atoi(exponent)
	return strings.Replace(mantissa, "-", "−", 1) + "×10" + superscript(e)
}

var superDigits = [...]string{"⁰", "¹", "²", "³", "⁴", "⁵", "⁶", "⁷", "⁸", "⁹"}

func superscript(n int) string {
	var b strings.Builder
	if n < 0 {
		b.WriteString("⁻")
		n = -n
	}
	for _, c := range strconv.Itoa(n) {
		b.WriteString(superDigits[c-'0'])
	}
	return b.String()
}

// Format prints an SI value in u with the given significant digits.
func (u Unit) Format(si float64, digits int) string {
	return u.with(Number(u.FromSI(si), digits))
}

// with puts the unit behind a printed number: nothing for a plain ratio, a
// narrow space otherwise.
func (u Unit) with(number string) string {
	if u.Symbol == "" {
		return number
	}
	return number + NarrowSpace + u.Symbol
}

// In prints q in unit u with no more digits than its source justifies: the
// value, "± x unit (k=2)" when it has an uncertainty, and its limits behind a
// comma; a quantity without a value prints its limits alone. Parse reads all
// of these back.
func (q Quantity) In(u Unit) string {
	if !q.HasValue() {
		return q.limitsIn(u)
	}
	text := u.Format(q.Value, DigitsAfterConversion(q, u))
	if q.Uncertainty != nil {
		text += " " + q.uncertaintyIn(u)
	}
	if q.Limits != nil {
		text += ", " + q.limitsIn(u)
	}
	return text
}

// Band prints the ± alone in unit u, "" when none is stated.
func (q Quantity) Band(u Unit) string {
	var parts []string
	if q.Limits != nil {
		parts = append(parts, q.limitsIn(u))
	}
	if q.Uncertainty != nil {
		parts = append(parts, q.uncertaintyIn(u))
	}
	return strings.Join(parts, "; ")
}

// limitsIn prints limits, rounded inward where they are rounded.
func (q Quantity) limitsIn(u Unit) string {
	if q.Limits == nil {
		return ""
	}
	lo, hi := u.FromSI(q.Limits.Lower), u.FromSI(q.Limits.Upper)
	place, coarsest := q.limitPlace(u, lo, hi)
	l, h := inward(lo, hi, place)
	for place < coarsest && wholeTen(l) && wholeTen(h) {
		place, l, h = place+1, l/10, h/10
	}
	switch {
	case math.IsInf(lo, -1):
		return u.with("at most " + counted(h, place))
	case math.IsInf(hi, 1):
		return u.with("at least " + counted(l, place))
	}
	return u.with(counted(l, place) + " to " + counted(h, place))
}

// wholeTen tells whether an end loses nothing with one place less.
func wholeTen(count float64) bool { return math.IsInf(count, 0) || math.Mod(count, 10) == 0 }

// counted prints count units of the decimal place.
func counted(count float64, place int) string {
	x := scaleTen(count, place)
	return Number(x, digitsAt(x, math.Pow10(place)))
}

// uncertaintyIn prints an expanded uncertainty with two digits (JCGM 100,
// 7.2.6) and its coverage factor.
func (q Quantity) uncertaintyIn(u Unit) string {
	plus, minus := q.Uncertainty.Plus/u.factor, q.Uncertainty.Minus/u.factor
	text := "± " + Number(plus, 2)
	if math.Abs(plus-minus) > 1e-9*math.Abs(plus) {
		text = "+" + Number(plus, 2) + "/−" + Number(minus, 2)
	}
	u.Symbol = u.differenceSymbol()
	return u.with(text) + " (k=" + strconv.FormatFloat(q.Uncertainty.K, 'g', -1, 64) + ")"
}

// differenceSymbol is the unit of a ±: of a temperature, a difference.
func (u Unit) differenceSymbol() string {
	switch {
	case u.Kind != Temperature:
		return u.Symbol
	case u.Symbol == "°F":
		return "Δ°F"
	}
	return "K"
}
