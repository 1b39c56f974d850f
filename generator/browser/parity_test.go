package browser

import (
	"fmt"
	"math"
	"math/rand"
	"os"
	"path/filepath"
	"testing"

	"github.com/chromedp/chromedp"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
)

// TestEvaluatorParity: the browser's evaluator and the program's give the
// same values, extremes and changes to 1e-9 relative, over random windows of
// every curve of the demo.
func TestEvaluatorParity(t *testing.T) {
	ctx := chrome(t)
	lib, err := library.Load("../..", library.Options{})
	if err != nil {
		t.Fatal(err)
	}
	script, err := os.ReadFile(filepath.Join("..", "..", "themes", "evaluate.js"))
	if err != nil {
		t.Fatal(err)
	}
	if err := chromedp.Run(ctx, chromedp.Navigate("about:blank"), chromedp.Evaluate(string(script)+"; window.evaluate = evaluate; 1", nil)); err != nil {
		t.Fatal(err)
	}
	random := rand.New(rand.NewSource(1))
	checked := 0
	for _, r := range lib.Materials {
		if r.Adopted == nil || !r.Adopted.Ratio.HasNominal() || r.Adopted.Valid.Hi <= r.Adopted.Valid.Lo {
			continue
		}
		c := r.Adopted.Ratio.Nominal
		lo, hi := c.Range()
		for range 5 {
			a, b, ref := lo+random.Float64()*(hi-lo), lo+random.Float64()*(hi-lo), lo+random.Float64()*(hi-lo)
			if a > b {
				a, b = b, a
			}
			m, err := curve.Measure(c, ref, a, b)
			if err != nil {
				continue
			}
			v, _ := c.At(ref)
			var got struct{ Value, Change float64 }
			if err := chromedp.Run(ctx, chromedp.Evaluate(fmt.Sprintf(`(function (c) { return { Value: evaluate.value(c, %.17g), Change: evaluate.change(c, %.17g, %.17g, %.17g).value }; })(%s)`,
				ref, ref, a, b, asJS(c)), &got)); err != nil {
				t.Fatal(err)
			}
			if math.Abs(got.Value/v-1) > 1e-9 || math.Abs(got.Change-m.Change.Greatest) > 1e-9 {
				t.Errorf("%s, %g to %g about %g: browser %+v, program %v and %v", r.ID, a, b, ref, got, v, m.Change.Greatest)
			}
			checked++
		}
	}
	if checked < 50 {
		t.Errorf("only %d windows were compared", checked)
	}
}

func asJS(c curve.Curve) string {
	s := "["
	for i, g := range c.Segments {
		if i > 0 {
			s += ","
		}
		s += fmt.Sprintf("[%.17g,%.17g,%.17g,%.17g,%.17g,%.17g,%.17g]", g.From, g.To, g.Centre, g.C[0], g.C[1], g.C[2], g.C[3])
	}
	return s + "]"
}
