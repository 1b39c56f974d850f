package quantity

import "math"

// DigitsAfterConversion is how many significant digits of q in unit u its
// source justifies. The last printed place is the power of ten nearest, in
// ratio, to one unit in the last place that the author wrote: 36 ft are
// 11.0 m (the example of NIST SP 811, B.7, quoted from memory), 20 °C are
// 293 K and 0.43 µΩ·m are 260 Ω·cmil/ft. A ± written to finer places tells
// that the value is known so far: 1 mm ± 0.02 mm are 39 mil. In the unit of
// the author it is the number of digits written. Of limits without a value it is that of the end
// further from zero.
func DigitsAfterConversion(q Quantity, u Unit) int {
	step := q.step
	if u != q.Unit {
		step = q.fine
	}
	if !(step > 0) || u.factor == 0 {
		return max(1, q.Digits)
	}
	return digitsAt(q.magnitude(u), scaleTen(1, nearestPlace(step/u.factor)))
}

// magnitude is the value in u, or that of the limits further from zero.
func (q Quantity) magnitude(u Unit) float64 {
	if q.HasValue() || q.Limits == nil {
		return u.FromSI(q.Value)
	}
	lo, hi := u.FromSI(q.Limits.Lower), u.FromSI(q.Limits.Upper)
	if math.IsInf(hi, 0) || (!math.IsInf(lo, 0) && math.Abs(lo) > math.Abs(hi)) {
		return lo
	}
	return hi
}

// nearestPlace is the decimal place, as a power of ten, nearest to step.
func nearestPlace(step float64) int {
	return int(math.Round(math.Log10(step)))
}

// digitsAt counts the significant digits of x down to the place of step, a
// power of ten; at least one.
func digitsAt(x, step float64) int {
	x = math.Round(math.Abs(x) / step)
	if !(x >= 1) || math.IsInf(x, 0) {
		return 1
	}
	return int(math.Floor(math.Log10(x)+1e-12)) + 1
}

// limitPlace is the last place in which limits lo and hi, in u, are printed,
// and the coarsest place that trailing zeros may be dropped to. In the unit of
// the author limits keep the places that were written. Limits that were
// computed, from a ± in % or by a conversion, keep two digits of half their
// width, or one digit more than was written.
func (q Quantity) limitPlace(u Unit, lo, hi float64) (place, coarsest int) {
	own, step := u == q.Unit, q.limitStep
	if !q.HasValue() {
		step = q.step
	}
	if own && step > 0 {
		place = nearestPlace(step / u.factor)
		if q.HasValue() && q.step > 0 {
			place = min(place, nearestPlace(q.step/u.factor))
		}
		return place, place
	}
	coarsest = 1000
	if own && q.step > 0 {
		coarsest = nearestPlace(q.step / u.factor)
	}
	if half := (hi - lo) / 2; half > 0 && !math.IsInf(half, 0) {
		place = int(math.Floor(math.Log10(half))) - 1
	} else {
		place = exponentOf(q.magnitude(u), 1) - max(1, q.Digits)
	}
	return place, max(place, coarsest)
}

// inward counts limits in units of a decimal place so that they enclose no
// more than before; what differs by rounding error alone is not moved.
func inward(lo, hi float64, place int) (l, h float64) {
	l, h = scaleTen(lo, -place), scaleTen(hi, -place)
	return math.Ceil(l - slack(l)), math.Floor(h + slack(h))
}

func slack(x float64) float64 {
	if math.IsInf(x, 0) {
		return 0
	}
	return 1e-9 + 1e-12*math.Abs(x)
}

// scaleTen is x·10^n, divided where n is negative, so that 41 tenths are the
// float64 nearest to 4.1.
func scaleTen(x float64, n int) float64 {
	if n < 0 {
		return x / math.Pow10(-n)
	}
	return float64(x * math.Pow10(n))
}

// RoundInward rounds limits of acceptance to decimals (negative: tens,
// hundreds) so that the printed interval lies inside the true one.
func RoundInward(lo, hi float64, decimals int) (float64, float64) {
	l, h := inward(lo, hi, -decimals)
	return scaleTen(l, -decimals), scaleTen(h, -decimals)
}

// RoundOutward rounds a band that must hold every value to decimals, so that
// the printed interval encloses the true one.
func RoundOutward(lo, hi float64, decimals int) (float64, float64) {
	l, h := scaleTen(lo, decimals), scaleTen(hi, decimals)
	return scaleTen(math.Floor(l+slack(l)), -decimals), scaleTen(math.Ceil(h-slack(h)), -decimals)
}

// RoundUncertainty rounds an uncertainty to two significant digits and the
// value to the same place (JCGM 100, 7.2.6); decimals is that place. Without
// an uncertainty above zero the value keeps six digits.
func RoundUncertainty(value, uncertainty float64) (v, u string, decimals int) {
	if !(uncertainty > 0) || math.IsInf(uncertainty, 0) {
		return Number(value, 6), "0", 0
	}
	decimals = 1 - exponentOf(uncertainty, 2)
	return Fixed(roundTo(value, decimals), max(0, decimals)), Fixed(roundTo(uncertainty, decimals), max(0, decimals)), decimals
}
