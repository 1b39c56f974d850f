package browser

import (
	"context"
	"encoding/json"
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

// within is the parity that is promised: relative to the larger magnitude, or
// to scale where a difference of equal values is compared.
func within(a, b, scale float64) bool {
	return a == b || math.Abs(a-b) <= 1e-9*math.Max(math.Max(math.Abs(a), math.Abs(b)), scale)
}

// told is a curve with the corners of its limits, by a name for messages.
type told struct {
	name    string
	c       curve.Curve
	corners []curve.Curve
}

// question is one random question; answer is what the browser says to it.
type question struct {
	Curve           int
	At, Lo, Hi, Ref float64
}

type answer struct {
	Value, Slope, Re float64
	Constants        [4]float64
	M                struct {
		Slope, Box float64
		Cold, Hot  *float64
		Slopes     struct{ Min, Max float64 }
		Change     struct{ Min, MinAt, Max, MaxAt, Value, At float64 }
	}
	Band, ChangeBand *struct{ Lower, Upper float64 }
	Inverse          []float64
	Turns            []struct {
		At      float64
		Maximum bool
	}
}

const askEvaluator = `(function (curves, corners, questions) {
	return questions.map(function (q) {
		var c = curves[q.Curve], k = corners[q.Curve], m = evaluate.measures(c, q.Ref, q.Lo, q.Hi), v = evaluate.value(c, q.At);
		return { Value: v, Slope: evaluate.slope(c, q.At), Re: evaluate.value(evaluate.rereference(c, q.Ref), q.At), M: m,
			Constants: evaluate.constants(c, q.At), Band: evaluate.band(k, q.At, q.Ref), ChangeBand: evaluate.changeBand(k, q.Ref, q.Lo, q.Hi),
			Inverse: evaluate.inverse(c, v), Turns: evaluate.turningPoints(c) };
	});
})(%s, %s, %s)`

// TestEvaluatorParity: the browser's evaluator and the program's give the same
// values, slopes, measures, bands and turning points to 1e-9, over random
// windows and reference temperatures of every curve of the demo and of random
// curves.
func TestEvaluatorParity(t *testing.T) {
	ctx := chrome(t)
	loadScript(t, ctx, "evaluate")
	random := rand.New(rand.NewSource(1))
	curves := append(demoCurves(t), randomCurves(random, 200)...)
	var questions []question
	for i, k := range curves {
		lo, hi := k.c.Range()
		pick := func() float64 { return lo + random.Float64()*(hi-lo) }
		for range 8 {
			a, b := pick(), pick()
			questions = append(questions, question{Curve: i, At: pick(), Lo: min(a, b), Hi: max(a, b), Ref: pick()})
		}
	}
	var got []answer
	if err := chromedp.Run(ctx, chromedp.Evaluate(fmt.Sprintf(askEvaluator, jsCurves(curves), jsCorners(curves), js(questions)), &got)); err != nil {
		t.Fatal(err)
	}
	if len(got) < 1000 {
		t.Fatalf("only %d questions were answered", len(got))
	}
	for i, q := range questions {
		for _, wrong := range disagreements(curves[q.Curve], q, got[i]) {
			t.Errorf("%s, %+v: %s", curves[q.Curve].name, q, wrong)
		}
	}
}

// disagreements compares one answer of the browser with the program.
func disagreements(k told, q question, a answer) []string {
	var list []string
	same := func(what string, got, want, scale float64) {
		if !within(got, want, scale) {
			list = append(list, fmt.Sprintf("%s: browser %.17g, program %.17g", what, got, want))
		}
	}
	m, err := curve.Measure(k.c, q.Ref, q.Lo, q.Hi)
	if err != nil {
		return append(list, err.Error())
	}
	v, _ := k.c.At(q.At)
	d, _ := k.c.Slope(q.At)
	r, _ := k.c.At(q.Ref)
	steep := math.Max(math.Abs(m.SlopeMin), math.Abs(m.SlopeMax)) // a slope near its zero is known to the size of its terms
	same("value", a.Value, v, 0)
	same("slope", a.Slope, d, steep*v)
	same("re-referenced value", a.Re, v/r, 0)
	same("first constant", a.Constants[0], v, 0)
	same("alpha", a.Constants[1], d/v, steep)
	same("slope at reference", a.M.Slope, m.SlopeAtReference, steep)
	same("least slope", a.M.Slopes.Min, m.SlopeMin, steep)
	same("greatest slope", a.M.Slopes.Max, m.SlopeMax, steep)
	same("box", a.M.Box, m.Box, 1/(q.Hi-q.Lo)) // differences of R/R: the last bits of 1
	same("least change", a.M.Change.Min, m.Change.Min, 1)
	same("greatest change", a.M.Change.Max, m.Change.Max, 1)
	same("change", a.M.Change.Value, m.Change.Greatest, 1)
	for name, pair := range map[string][2]*float64{"cold chord": {a.M.Cold, m.ChordCold}, "hot chord": {a.M.Hot, m.ChordHot}} {
		if (pair[0] == nil) != (pair[1] == nil) {
			list = append(list, name+" is told by one alone")
		} else if pair[0] != nil {
			same(name, *pair[0], *pair[1], math.Max(steep, 1e-6))
		}
	}
	list = append(list, bandDisagreements(k, q, a)...)
	turns := k.c.TurningPoints()
	inner := 0
	for _, p := range turns { // ends of the range are left to the program
		if lo, hi := k.c.Range(); p.T > lo+1e-6 && p.T < hi-1e-6 {
			inner++
			if inner <= len(a.Turns) {
				same("turning point", a.Turns[inner-1].At, p.T, 0)
			}
		}
	}
	if inner != len(a.Turns) {
		list = append(list, fmt.Sprintf("%d turning points, the program has %d", len(a.Turns), inner))
	}
	found := false
	for _, x := range a.Inverse {
		y, _ := k.c.At(x)
		found = found || math.Abs(x-q.At) < 1e-3 || within(y, v, 0)
	}
	if !found {
		list = append(list, fmt.Sprintf("the temperature is not found back from its value: %v", a.Inverse))
	}
	return list
}

func bandDisagreements(k told, q question, a answer) []string {
	if (a.Band == nil) != (len(k.corners) == 0) {
		return []string{"one alone has a band"}
	}
	if len(k.corners) == 0 {
		return nil
	}
	b, _ := curve.Band{Corners: k.corners}.RatioAt(q.At, q.Ref)
	m, err := curve.MeasureBand(k.corners, q.Ref, q.Lo, q.Hi)
	if err != nil {
		return []string{err.Error()}
	}
	if !within(a.Band.Lower, b.Lower, 0) || !within(a.Band.Upper, b.Upper, 0) ||
		!within(a.ChangeBand.Lower, m.Change.Lower, 1) || !within(a.ChangeBand.Upper, m.Change.Upper, 1) {
		return []string{fmt.Sprintf("band: browser %v and %v, program %v and %v", *a.Band, *a.ChangeBand, b, m.Change)}
	}
	return nil
}

func loadScript(t *testing.T, ctx context.Context, name string) {
	t.Helper()
	script, err := os.ReadFile(filepath.Join("..", "..", "themes", name+".js"))
	if err != nil {
		t.Fatal(err)
	}
	if err := chromedp.Run(ctx, chromedp.Navigate("about:blank"), chromedp.Evaluate(string(script)+"; window."+name+" = "+name+"; 1", nil)); err != nil {
		t.Fatal(err)
	}
}

// demoCurves are the resistance ratios of every data set of the demo.
func demoCurves(t *testing.T) []told {
	lib, err := library.Load("../..", library.Options{})
	if err != nil {
		t.Fatal(err)
	}
	var list []told
	for _, r := range lib.Materials {
		for _, set := range r.Sets {
			if !set.Ratio.HasNominal() || set.Valid.Hi <= set.Valid.Lo {
				continue
			}
			k := told{name: r.ID + ", " + set.Name, c: set.Ratio.Nominal}
			if set.Ratio.Limits != nil {
				k.corners = set.Ratio.Limits.Corners
			}
			if e, _ := k.c.Extremes(k.c.Range()); e.Min > 0 { // relative slopes need a positive R
				list = append(list, k)
			}
		}
	}
	return list
}

// randomCurves are chains of cubics that stay positive, with turning points
// and kinks, and with two corners each.
func randomCurves(random *rand.Rand, n int) []told {
	var list []told
	for i := range n {
		var c curve.Curve
		from, y := 100+300*random.Float64(), 1.0
		for range 1 + random.Intn(5) {
			to := from + 20 + 200*random.Float64()
			a := func(size float64) float64 { return size * (2*random.Float64() - 1) }
			s := curve.Segment{From: from, To: to, Centre: from, C: [4]float64{y, a(3e-4), a(1e-6), a(3e-9)}}
			u := to - from
			y = s.C[0] + u*(s.C[1]+u*(s.C[2]+u*s.C[3]))
			c.Segments = append(c.Segments, s)
			from = to
		}
		if e, _ := c.Extremes(c.Range()); e.Min > 0.2 {
			list = append(list, told{name: fmt.Sprintf("random %d", i), c: c, corners: []curve.Curve{c.Scale(1.05), c}})
		}
	}
	return list
}

func js(v any) string {
	text, err := json.Marshal(v)
	if err != nil {
		panic(err)
	}
	return string(text)
}

func segmentsOf(c curve.Curve) [][7]float64 {
	list := [][7]float64{}
	for _, g := range c.Segments {
		list = append(list, [7]float64{g.From, g.To, g.Centre, g.C[0], g.C[1], g.C[2], g.C[3]})
	}
	return list
}

func jsCurves(list []told) string {
	var all [][][7]float64
	for _, k := range list {
		all = append(all, segmentsOf(k.c))
	}
	return js(all)
}

func jsCorners(list []told) string {
	var all [][][][7]float64
	for _, k := range list {
		var corners [][][7]float64
		for _, c := range k.corners {
			corners = append(corners, segmentsOf(c))
		}
		all = append(all, corners)
	}
	return js(all)
}
