package curve

import (
	"errors"
	"math"
	"testing"
)

// within is the same tolerance at every joint.
func within(relative float64) func(int) float64 { return func(int) float64 { return relative } }

func TestPiecesJoin(t *testing.T) {
	lower := Polynomial{Y0: 1, Alpha: 0.004, Reference: c(20)}.Curve(c(0), c(100))
	upper := Polynomial{Y0: 1.3205, Alpha: 0.003, Reference: c(100)}.Curve(c(100), c(300)) // 0.038 % above 1.32
	joined := must(t)(Pieces([]Curve{lower, upper}, within(0.001)))
	near(t, "the edge is the lower piece's", at(t, joined, c(100)), 1.32, 1e-14)
	near(t, "above it", at(t, joined, c(200)), 1.3205*1.3, 1e-12)
	e, _ := joined.Extremes(c(50), c(100))
	near(t, "up to the edge the step does not count", e.Max, 1.32, 1e-14)

	var gap Gap
	if _, err := Pieces([]Curve{lower, upper}, within(0.0001)); !errors.As(err, &gap) {
		t.Fatalf("a step beyond the tolerance: got %v", err)
	}
	near(t, "below", gap.Below, 1.32, 1e-14)
	near(t, "above", gap.Above, 1.3205, 1e-14)
	apart := Polynomial{Y0: 1.32, Reference: c(101)}.Curve(c(101), c(300))
	if _, err := Pieces([]Curve{lower, apart}, within(0.001)); !errors.As(err, &gap) || gap.From != c(101) {
		t.Errorf("pieces that do not meet: got %v", err)
	}
	if _, err := Pieces([]Curve{upper, lower}, within(0.001)); err == nil {
		t.Error("pieces in the wrong order")
	}
	if _, err := Pieces(nil, within(0.001)); err == nil {
		t.Error("no pieces")
	}
	if _, err := Pieces([]Curve{lower, {}}, within(0.001)); err == nil {
		t.Error("a piece without a curve")
	}
}

func TestPiecesLeaveNoCrack(t *testing.T) {
	lower := worked.Curve(c(-40), c(60))
	upper := worked.Curve(c(60)+0.9e-9, c(125))
	joined := must(t)(Pieces([]Curve{lower, upper}, within(1e-6)))
	for k := c(60); k < c(60)+1e-9; k = math.Nextafter(k, c(125)) {
		if _, ok := joined.At(k); !ok {
			t.Fatalf("a crack at %.17g K", k)
		}
	}
	table := must(t)(Table([]float64{c(-100), c(-40)}, []float64{0.99, worked.At(c(-40))}, true))
	if !must(t)(Pieces([]Curve{table, lower}, within(1e-6))).FromTable {
		t.Error("one piece from a table marks the whole")
	}
}
