package curve

import (
	"math/rand/v2"
	"slices"
	"testing"
)

func TestDoubleRootIsNone(t *testing.T) {
	random := rand.New(rand.NewPCG(21, 1))
	for range 10_000 {
		r, k := 600*random.Float64()-300, 1e-12*random.Float64()
		if x, n := quadraticRoots(k*r*r, -2*k*r, k); n != 0 {
			t.Fatalf("%g·(x − %g)²: got roots %v", k, r, x)
		}
	}
}

// Roots chosen first, the polynomial multiplied out from them.
func TestCrossingsFindsChosenRoots(t *testing.T) {
	random := rand.New(rand.NewPCG(22, 1))
	for range 5000 {
		degree := 1 + random.IntN(4)
		p, roots := []float64{1e-9}, []float64{}
		for i := range degree {
			r := -300 + 150*float64(i) + 100*random.Float64() // at least 50 apart
			roots = append(roots, r)
			p = append(p, 0)
			for k := len(p) - 1; k >= 0; k-- {
				p[k] *= -r
				if k > 0 {
					p[k] += p[k-1]
				}
			}
		}
		got := crossings(p, -400, 400, nil)
		if len(got) != degree || !slices.IsSorted(got) {
			t.Fatalf("roots %v: got %v", roots, got)
		}
		for i := range got {
			near(t, "root", got[i], roots[i], 1e-9)
		}
		if inside := crossings(p, roots[0]+1, 400, nil); len(inside) != degree-1 {
			t.Fatalf("without the first of %v: got %v", roots, inside)
		}
	}
	if got := crossings([]float64{1}, -1, 1, nil); len(got) != 0 {
		t.Errorf("a constant has no roots: got %v", got)
	}
	if got := crossings([]float64{0, 0, 0, 0, 0}, -1, 1, nil); len(got) != 0 {
		t.Errorf("zero crosses nothing: got %v", got)
	}
}
