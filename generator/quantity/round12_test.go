package quantity

import (
	"math"
	"math/rand/v2"
	"strconv"
	"testing"
)

// Round12 by arithmetic is what printing twelve digits and reading them gives,
// but for ties of the thirteenth digit, where one unit of the twelfth may differ.
func TestRound12(t *testing.T) {
	random := rand.New(rand.NewPCG(12, 1))
	for range 200000 {
		x := (random.Float64() - 0.5) * math.Pow(10, 40*(random.Float64()-0.5))
		got := Round12(x)
		want, _ := strconv.ParseFloat(strconv.FormatFloat(x, 'g', 12, 64), 64)
		if again, _ := strconv.ParseFloat(strconv.FormatFloat(got, 'g', 12, 64), 64); again != got {
			t.Fatalf("Round12(%v) = %v has more than twelve digits", x, got)
		}
		if got != want && math.Abs(got-x) > math.Abs(want-x)*(1+1e-3) {
			t.Fatalf("Round12(%v) = %v, want %v", x, got, want)
		}
	}
	for _, x := range []float64{0, math.Inf(1), 5e-324, math.MaxFloat64, 40.85, 0.3, 1e11, 999999999999.5, 1e-11} {
		want, _ := strconv.ParseFloat(strconv.FormatFloat(x, 'g', 12, 64), 64)
		if got := Round12(x); got != want {
			t.Errorf("Round12(%v) = %v, want %v", x, got, want)
		}
	}
}
