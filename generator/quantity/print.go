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
	s := strconv.FormatFloat(math.Abs(x), 'e', digits-1, 64)
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
	s := strconv.FormatFloat(x, 'e', digits-1, 64)
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

// DigitsAfterConversion is how many significant digits of q in unit u its
// source justifies: as many as were written.
func DigitsAfterConversion(q Quantity, u Unit) int { return max(1, q.Digits) }

// In prints q in unit u: value and ±, or its limits, with no more digits than
// were written.
func (q Quantity) In(u Unit) string {
	n := DigitsAfterConversion(q, u)
	if !q.HasValue() {
		return q.limitsIn(u, n)
	}
	text := u.Format(q.Value, n)
	if q.Limits != nil {
		text += ", " + q.limitsIn(u, n+1)
	}
	if q.Uncertainty != nil {
		text += " " + q.uncertaintyIn(u)
	}
	return text
}

// Band prints the ± alone in unit u, "" when none is stated.
func (q Quantity) Band(u Unit) string {
	var parts []string
	if q.Limits != nil {
		parts = append(parts, q.limitsIn(u, max(1, q.Digits)+boolInt(q.HasValue())))
	}
	if q.Uncertainty != nil {
		parts = append(parts, q.uncertaintyIn(u))
	}
	return strings.Join(parts, "; ")
}

func boolInt(b bool) int {
	if b {
		return 1
	}
	return 0
}

func (q Quantity) limitsIn(u Unit, digits int) string {
	if q.Limits == nil {
		return ""
	}
	lo, hi := u.FromSI(q.Limits.Lower), u.FromSI(q.Limits.Upper)
	switch {
	case math.IsInf(lo, -1):
		return u.with("at most " + trimmedNumber(hi, digits))
	case math.IsInf(hi, 1):
		return u.with("at least " + trimmedNumber(lo, digits))
	}
	return u.with(trimmedNumber(lo, digits) + " to " + trimmedNumber(hi, digits))
}

// trimmedNumber prints a limit without zeros that only the extra digit added.
func trimmedNumber(x float64, digits int) string {
	s := Number(x, digits)
	if strings.Contains(s, ".") && !strings.Contains(s, "×") {
		s = strings.TrimSuffix(strings.TrimRight(s, "0"), ".")
	}
	return s
}

// uncertaintyIn prints an expanded uncertainty with two digits (JCGM 100,
// 7.2.6) and its coverage factor.
func (q Quantity) uncertaintyIn(u Unit) string {
	plus, minus := q.Uncertainty.Plus/u.factor, q.Uncertainty.Minus/u.factor
	text := "± " + Number(plus, 2)
	if math.Abs(plus-minus) > 1e-9*math.Abs(plus) {
		text = "+" + Number(plus, 2) + "/−" + Number(minus, 2)
	}
	return u.with(text) + " (k=" + strconv.FormatFloat(q.Uncertainty.K, 'g', -1, 64) + ")"
}

// RoundUncertainty rounds an uncertainty to two significant digits and the
// value to the same place (JCGM 100, 7.2.6); decimals is that place.
func RoundUncertainty(value, uncertainty float64) (v, u string, decimals int) {
	if !(uncertainty > 0) {
		return Number(value, 6), "0", 0
	}
	decimals = 1 - exponentOf(uncertainty, 2)
	return Fixed(roundTo(value, decimals), max(0, decimals)), Fixed(roundTo(uncertainty, decimals), max(0, decimals)), decimals
}

// RoundInward rounds a pair of acceptance limits to decimals so that the
// printed interval lies inside the true one.
func RoundInward(lo, hi float64, decimals int) (float64, float64) {
	p := math.Pow(10, float64(decimals))
	return math.Ceil(lo*p-1e-9) / p, math.Floor(hi*p+1e-9) / p
}
