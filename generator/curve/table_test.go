package curve

import (
	"encoding/json"
	"math"
	"math/big"
	"math/rand/v2"
	"os"
	"testing"

	"gonum.org/v1/gonum/interp"

	"ohmfolio/generator/published"
)

func nodes(t *testing.T, file string) (x, y []float64) {
	for _, row := range published.Rows(t, file) {
		x, y = append(x, published.Number(t, row["x"])), append(y, published.Number(t, row["y"]))
	}
	return x, y
}

func readJSON(t *testing.T, file string, into any) {
	t.Helper()
	text, err := os.ReadFile("testdata/" + file)
	if err == nil {
		err = json.Unmarshal(text, into)
	}
	if err != nil {
		t.Fatal(err)
	}
}

// Source: nodes of Fritsch and Carlson (1980) and of Akima (1970); slopes and
// values in 50-digit arithmetic, cross-checked with scipy, gonum and R (derived).
func TestFritschButlandReferenceValues(t *testing.T) {
	type told struct {
		Slopes []string `json:"slopes"`
		Values []string `json:"values"`
	}
	var file struct {
		Datasets map[string]struct {
			Query  []string `json:"query_x"`
			Cubic  told     `json:"fritsch_butland_pchip"`
			Linear told     `json:"piecewise_linear"`
		} `json:"datasets"`
	}
	readJSON(t, "reference_values.json", &file)
	for name, set := range file.Datasets {
		x, y := nodes(t, name+".csv")
		cubic := must(t)(Table(x, y, false))
		linear := must(t)(Table(x, y, true))
		for i, q := range set.Query {
			want := published.Number(t, set.Cubic.Values[i])
			near(t, name+" cubic at "+q, at(t, cubic, published.Number(t, q)), want, 4e-15*math.Max(1, math.Abs(want))) // the abscissae are rounded, the slopes up to 30
			want = published.Number(t, set.Linear.Values[i])
			near(t, name+" linear at "+q, at(t, linear, published.Number(t, q)), want, 4e-15*math.Max(1, math.Abs(want))) // the abscissae are rounded, the slopes up to 30
		}
		for i, text := range set.Cubic.Slopes {
			want := published.Number(t, text)
			got, _ := cubic.Slope(x[i])
			near(t, name+" slope", got, want, 1e-13*math.Max(1e-2, math.Abs(want)))
		}
	}
}

// Source: closed forms in exact rationals (derived).
func TestTableClosedForms(t *testing.T) {
	var file struct {
		Cases []struct {
			Name, Method string
			X, Y         []float64
			Slopes       []json.RawMessage
			At, Value    []string
		}
	}
	readJSON(t, "closed_forms.json", &file)
	compared := 0
	for _, k := range file.Cases {
		if k.Method != "fritsch_butland_pchip" && k.Method != "any monotone cubic" {
			continue
		}
		curve := must(t)(Table(k.X, k.Y, false))
		for i, text := range k.At {
			near(t, k.Name+" at "+text, at(t, curve, rational(t, text)), rational(t, k.Value[i]), 1e-15)
			compared++
		}
	}
	if compared < 7 {
		t.Errorf("only %d values were compared", compared)
	}
	line := must(t)(Table([]float64{0, 1, 4, 10}, []float64{2, 5, 14, 32}, false))
	for _, x := range []float64{0, 0.5, 2, 7.25, 10} {
		near(t, "straight rows", at(t, line, x), 2+3*x, 1e-14)
	}
}

func rational(t *testing.T, text string) float64 {
	t.Helper()
	r, ok := new(big.Rat).SetString(text)
	if !ok {
		t.Fatalf("%q is no number", text)
	}
	v, _ := r.Float64()
	return v
}

// Source: gonum interp.FritschButland and interp.PiecewiseLinear, run beside ours.
func TestTableAgreesWithGonum(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 2))
	for range 300 {
		x, y := randomTable(random)
		var monotone interp.FritschButland
		var straight interp.PiecewiseLinear
		if err := monotone.Fit(x, y); err != nil {
			t.Fatal(err)
		}
		if err := straight.Fit(x, y); err != nil {
			t.Fatal(err)
		}
		cubic, linear := must(t)(Table(x, y, false)), must(t)(Table(x, y, true))
		span := x[len(x)-1] - x[0]
		for i := range 40 {
			q := math.Min(x[0]+span*float64(i)/39, x[len(x)-1])
			near(t, "cubic", at(t, cubic, q), monotone.Predict(q), 1e-12*1e-7)
			near(t, "linear", at(t, linear, q), straight.Predict(q), 1e-12*1e-7)
			slope, _ := cubic.Slope(q)
			near(t, "slope", slope, monotone.PredictDerivative(q), 1e-10*1e-7)
		}
	}
}

// randomTable makes a table of 2 to 12 rows with values of the size of a
// metal's resistivity, some of them equal or turning.
func randomTable(random *rand.Rand) (x, y []float64) {
	t, v := 20+200*random.Float64(), 1e-8*(1+random.Float64())
	for range 2 + random.IntN(11) {
		x, y = append(x, t), append(y, v)
		t += 0.5 + 80*random.Float64()
		if random.IntN(5) > 0 {
			v = math.Max(v+1e-8*(random.Float64()-0.3), 1e-9)
		}
	}
	return x, y
}

func TestTableReproducesItsRows(t *testing.T) {
	random := rand.New(rand.NewPCG(3, 4))
	for range 200 {
		x, y := randomTable(random)
		for _, linear := range []bool{true, false} {
			curve := must(t)(Table(x, y, linear))
			if !curve.FromTable {
				t.Fatal("a table that does not say so")
			}
			for i := range x {
				near(t, "row", at(t, curve, x[i]), y[i], 4*epsilon*1e-7)
				if i > 0 && at(t, curve, x[i]) != y[i] {
					t.Errorf("row %d is not reproduced to the last bit", i+1)
				}
			}
		}
	}
}

func TestWrongTables(t *testing.T) {
	for name, k := range map[string]struct{ x, y []float64 }{
		"empty":          {nil, nil},
		"one row":        {[]float64{1}, []float64{1}},
		"unequal":        {[]float64{1, 2}, []float64{1}},
		"not ascending":  {[]float64{1, 3, 2}, []float64{1, 2, 3}},
		"repeated":       {[]float64{1, 2, 2}, []float64{1, 2, 3}},
		"not a number":   {[]float64{1, 2, 3}, []float64{1, math.NaN(), 3}},
		"infinite":       {[]float64{1, 2, math.Inf(1)}, []float64{1, 2, 3}},
		"nan as a place": {[]float64{1, math.NaN(), 3}, []float64{1, 2, 3}},
	} {
		if _, err := Table(k.x, k.y, false); err == nil {
			t.Errorf("%s: no error", name)
		}
	}
}
