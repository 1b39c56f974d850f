package statement

import "ohmfolio/generator/material"

// coefficientDigits is how many digits of re-referenced coefficients are
// printed: one more than α was written with, since re-referencing is exact and
// nobody should lose a digit by going there and back.
func coefficientDigits(set *material.DataSet) int {
	if set.Alpha == nil {
		return 3
	}
	return max(3, set.Alpha.Digits+1)
}
