package quantity

import (
	"math"
	"strconv"
	"strings"
)

// ZeroCelsius is 0 °C in kelvin, exact by definition.
const ZeroCelsius = 273.15

// NarrowSpace stands between number and unit; it never breaks a line.
const NarrowSpace = "\u202f"

// DegreesText prints a temperature given in kelvin as °C without the unit, at
// most three decimals, with a true minus.
func DegreesText(kelvin float64) string {
	return trimmed(kelvin - ZeroCelsius)
}

// CelsiusText prints a temperature given in kelvin as "−40 °C".
func CelsiusText(kelvin float64) string { return DegreesText(kelvin) + NarrowSpace + "°C" }

// KelvinText prints a temperature in kelvin without the unit, at most three
// decimals.
func KelvinText(kelvin float64) string { return trimmed(kelvin) }

func trimmed(x float64) string {
	x = math.Round(x*1000) / 1000
	s := strconv.FormatFloat(math.Abs(x), 'f', -1, 64)
	if x < 0 {
		return "−" + s
	}
	return s
}

// Fixed prints x with a given number of decimals and a true minus; a half of
// the last place is rounded away from zero, and a number that rounds to zero
// has no sign.
func Fixed(x float64, decimals int) string {
	s := strconv.FormatFloat(halfAway(x), 'f', decimals, 64)
	if strings.Trim(s, "-0.") == "" {
		return strings.TrimPrefix(s, "-")
	}
	return strings.Replace(s, "-", "−", 1)
}

// halfAway moves x by less than half of its 15th digit away from zero, so that
// 273.15, whose float64 lies a hair below, is 273.2 to one decimal.
func halfAway(x float64) float64 {
	if y := x + float64(x*3e-16); !math.IsInf(y, 0) {
		return y
	}
	return x
}

// PPMText prints a relative number (1) in ppm without the unit: one decimal
// below 100 ppm, none above.
func PPMText(x float64) string {
	p := float64(x * 1e6)
	if math.Abs(p) < 99.95 {
		return Fixed(p, 1)
	}
	return Fixed(p, 0)
}

// ChangeText prints a relative change (1) with its unit, in ppm below one per
// cent and in % from there on.
func ChangeText(x float64) string {
	if math.Abs(x) >= 0.01 {
		return Fixed(float64(x*100), 2) + NarrowSpace + "%"
	}
	return PPMText(x) + NarrowSpace + "ppm"
}

// Round12 keeps 12 significant digits: last bits differ between processors,
// and data files must not.
func Round12(x float64) float64 {
	if x == 0 || math.IsNaN(x) || math.IsInf(x, 0) {
		return x
	}
	// A 12-digit integer over an exact power of ten is the float nearest to its
	// decimal, and quicker than printing and reading it.
	if k := 11 - int(math.Floor(math.Log10(math.Abs(x)))); k >= 0 && k < len(exactTens) {
		if n := math.Round(float64(x * exactTens[k])); math.Abs(n) < 1e12 && math.Abs(n) >= 1e11 {
			return n / exactTens[k]
		}
	}
	r, _ := strconv.ParseFloat(strconv.FormatFloat(x, 'g', 12, 64), 64)
	return r
}

// exactTens are the powers of ten that a float64 holds exactly.
var exactTens = [...]float64{1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18, 1e19, 1e20, 1e21, 1e22}
