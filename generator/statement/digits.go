package statement

import "ohmfolio/generator/material"

// coefficientDigits is how many digits of re-referenced coefficients are
// printed: those of α as written, at least three.
func coefficientDigits(set *material.DataSet) int {
	if set.Alpha == nil {
		return 3
	}
	return max(3, set.Alpha.Digits)
}
