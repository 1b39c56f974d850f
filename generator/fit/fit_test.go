package fit

import (
	"encoding/json"
	"math"
	"os"
	"strconv"
	"testing"

	"ohmfolio/generator/published"
)

type certified struct {
	Intercept bool `json:"intercept"`
	Degree    int  `json:"polynomial_degree"`
	Certified struct {
		Parameters []struct {
			Estimate string `json:"estimate"`
			Sd       string `json:"standard_deviation"`
		} `json:"parameters"`
		ResidualSD string `json:"residual_standard_deviation"`
		RSquared   string `json:"r_squared"`
	} `json:"certified"`
}

func dataset(t testing.TB, name string) (c certified, points []Point) {
	t.Helper()
	text, err := os.ReadFile("testdata/" + name + ".json")
	if err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(text, &c); err != nil {
		t.Fatal(err)
	}
	for _, row := range published.Rows(t, name+".csv") {
		points = append(points, Point{T: published.Number(t, row["x"]), Y: published.Number(t, row["y"])})
	}
	return c, points
}

// digits is the log relative error of got against a certified decimal string,
// 15 at the most; the absolute error where the certified value is 0.
func digits(t testing.TB, got float64, want string) float64 {
	w, err := strconv.ParseFloat(want, 64)
	if err != nil {
		t.Fatal(err)
	}
	if got == w {
		return 15
	}
	e := math.Abs(got - w)
	if w != 0 {
		e /= math.Abs(w)
	}
	return math.Min(15, -math.Log10(e))
}

// TestStRD reaches, for the worst parameter, at least the digits that a
// well-kept fitter with scaled columns does (numpy's Polynomial.fit: 12.1,
// 12.4, 8.8, 12.3, 9.1 for norris, pontius, wampler1 to 3).
func TestStRD(t *testing.T) {
	for name, least := range map[string][2]float64{ // of estimates, of standard deviations
		"norris": {12.1, 12}, "pontius": {12.0, 11}, "noint1": {13, 12}, "noint2": {13, 12}, "wampler1": {8.8, 0}, "wampler2": {12.0, 0}, "wampler3": {9.0, 9},
	} {
		c, points := dataset(t, name)
		r, err := Polynomial(points, Options{Degree: max(1, c.Degree), Origin: !c.Intercept})
		if err != nil {
			t.Fatal(name, err)
		}
		b := r.B
		if !c.Intercept {
			b = b[1:]
		}
		worst, worstSD := 15.0, 15.0
		for i, p := range c.Certified.Parameters {
			worst = math.Min(worst, digits(t, b[i], p.Estimate))
			k := i + len(r.B) - len(b)
			if p.Sd != "0" && p.Sd != "0.0" && p.Sd != "0.00000000000000" {
				worstSD = math.Min(worstSD, digits(t, math.Sqrt(r.Covariance[k][k]), p.Sd))
			}
		}
		r2 := digits(t, r.RSquared, c.Certified.RSquared)
		t.Logf("%s: %.1f digits of the estimates, %.1f of the standard deviations, %.1f of R²", name, worst, worstSD, r2)
		if worst < least[0] || worstSD < least[1] || r2 < 9 {
			t.Errorf("%s: %.1f digits of the estimates (least %.1f), %.1f of the standard deviations, %.1f of R²", name, worst, least[0], worstSD, r2)
		}
	}
}

// TestGUMH3 is JCGM 100, annex H.3, in full: calibration of a thermometer.
func TestGUMH3(t *testing.T) {
	var h struct {
		Published map[string]map[string]any `json:"published"`
		Exact     map[string]map[string]any `json:"recomputed_50_digit"`
	}
	text, err := os.ReadFile("testdata/h3_thermometer.json")
	if err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(text, &h); err != nil {
		t.Fatal(err)
	}
	var points []Point
	for _, row := range published.Rows(t, "h3_thermometer.csv") {
		points = append(points, h3Point(t, row))
	}
	for name, reference := range map[string]float64{"t0=20": 20, "t0=mean": 24.008454545454545455} {
		r, err := Polynomial(points, Options{Reference: reference, Degree: 1})
		if err != nil {
			t.Fatal(err)
		}
		b30, u30 := r.At(30)
		correlation := Correlation(r.Covariance)[0][1]
		for key, got := range map[string]float64{"y1": r.B[0], "y2": r.B[1], "u_y1": math.Sqrt(r.Covariance[0][0]), "u_y2": math.Sqrt(r.Covariance[1][1]),
			"s": r.SD, "residual_sum_of_squares": r.RSS, "b_30degC": b30, "u_b_30degC": u30} {
			if d := digits(t, got, h.Exact[name][key].(string)); d < 10 {
				t.Errorf("%s, %s: %g agrees to %.1f digits", name, key, got, d)
			}
		}
		if name == "t0=20" && math.Abs(correlation+0.930) > 0.0005 {
			t.Errorf("r(y1, y2) = %g, published −0.930", correlation)
		}
		if name == "t0=mean" && math.Abs(correlation) > 1e-9 {
			t.Errorf("about the mean the parameters are uncorrelated, not %g", correlation)
		}
		again := r.About(20)
		if d := math.Abs(again.B[0] - (-0.17120379013134997706)); d > 1e-14 {
			t.Errorf("re-referenced to 20: off by %g", d)
		}
	}
	for key, want := range map[string]float64{"y1": -0.1712, "u_y1": 0.0029, "y2": 0.00218, "u_y2": 0.00067} {
		if got, _ := strconv.ParseFloat(h.Published["t0=20"][key].(string), 64); got != want {
			t.Errorf("the published %s is %g in the file", key, got)
		}
	}
}

func h3Point(t *testing.T, row map[string]string) Point {
	t.Helper()
	return Point{T: published.Number(t, row["t_k_degC"]), Y: published.Number(t, row["b_k_degC"])}
}

// TestThreePoints: three well spread points determine α and β exactly; the
// parabola α = 10 ppm/K, β = −0.5 ppm/K² about 20 °C, by hand.
func TestThreePoints(t *testing.T) {
	y := func(c float64) float64 { return 2 * (1 + 10e-6*(c-20) - 0.5e-6*(c-20)*(c-20)) }
	r, err := Polynomial([]Point{{T: 0, Y: y(0)}, {T: 40, Y: y(40)}, {T: 80, Y: y(80)}}, Options{Reference: 20, Degree: 2})
	if err != nil {
		t.Fatal(err)
	}
	list, _, _ := r.Relative()
	if math.Abs(list[0].Value-2) > 1e-14 || math.Abs(list[1].Value-10e-6) > 1e-15 || math.Abs(list[2].Value+0.5e-6) > 1e-17 {
		t.Errorf("%+v", list)
	}
	if len(r.Warnings) != 1 || r.Dof != 0 {
		t.Errorf("no warning that nothing is left over: %v", r.Warnings)
	}
}

// TestRatioCovariance: u(b1/b0) by the formula for a quotient of correlated
// quantities, by hand.
func TestRatioCovariance(t *testing.T) {
	c, points := dataset(t, "norris")
	_ = c
	r, err := Polynomial(points, Options{Reference: 400, Degree: 1})
	if err != nil {
		t.Fatal(err)
	}
	list, _, _ := r.Relative()
	b0, b1 := r.B[0], r.B[1]
	want := math.Sqrt(r.Covariance[1][1]/(b0*b0) + b1*b1*r.Covariance[0][0]/math.Pow(b0, 4) - 2*b1*r.Covariance[0][1]/math.Pow(b0, 3))
	if math.Abs(list[1].U/want-1) > 1e-12 {
		t.Errorf("u(α) = %g, want %g", list[1].U, want)
	}
}

func TestHoldAndOrigin(t *testing.T) {
	points := []Point{{T: 20, Y: 1.1}, {T: 30, Y: 1.2}, {T: 40, Y: 1.31}, {T: 60, Y: 1.5}}
	r, err := Polynomial(points, Options{Reference: 20, Degree: 1, Hold: true, Held: 1})
	if err != nil {
		t.Fatal(err)
	}
	// least squares of y − 1 on τ without an intercept: Σ τ(y−1)/Σ τ², by hand
	want := (10*0.2 + 20*0.31 + 40*0.5) / (100 + 400 + 1600.0)
	if r.B[0] != 1 || math.Abs(r.B[1]-want) > 1e-15 || r.Covariance[0][0] != 0 || r.Dof != 3 {
		t.Errorf("%+v", r.B)
	}
}

// TestWeighted: with given uncertainties the covariance is unscaled; the
// weighted mean of a slope through the origin, by hand.
func TestWeighted(t *testing.T) {
	points := []Point{{T: 1, Y: 1.0, U: 0.1}, {T: 2, Y: 2.2, U: 0.2}}
	r, err := Polynomial(points, Options{Degree: 1, Origin: true, Weighted: true})
	if err != nil {
		t.Fatal(err)
	}
	s := 1/0.01 + 4/0.04
	if want := (1.0/0.01 + 2*2.2/0.04) / s; math.Abs(r.B[1]-want) > 1e-14 || math.Abs(r.Covariance[1][1]-1/s) > 1e-15 {
		t.Errorf("%v ± %v", r.B, r.Covariance)
	}
	if math.IsNaN(r.ChiSquare) {
		t.Error("no χ²/ν")
	}
}

func TestLackOfFitAndOutliers(t *testing.T) {
	var points []Point
	for i := range 20 {
		x := float64(i % 10)
		points = append(points, Point{T: x, Y: 1 + 0.1*x + 0.02*x*x + 0.001*float64(i%3)})
	}
	straight, _ := Polynomial(points, Options{Degree: 1})
	bent, _ := Polynomial(points, Options{Degree: 2})
	if straight.LackOfFit == nil || straight.LackOfFit.P > 1e-6 || bent.LackOfFit.P < 1e-3 {
		t.Errorf("lack of fit %+v and %+v", straight.LackOfFit, bent.LackOfFit)
	}
	points[7].Y += 0.1
	r, _ := Polynomial(points, Options{Degree: 2})
	if len(r.Outliers) != 1 || r.Outliers[0] != 7 || r.N != 20 {
		t.Errorf("outliers %v", r.Outliers)
	}
	sum := 0.0
	for _, h := range r.Leverage {
		sum += h
	}
	if math.Abs(sum-3) > 1e-9 {
		t.Errorf("the leverages sum to %g, not to the 3 coefficients", sum)
	}
}

func TestRefuses(t *testing.T) {
	for name, c := range map[string]struct {
		points []Point
		o      Options
	}{
		"too few":    {[]Point{{T: 1, Y: 1}}, Options{Degree: 1}},
		"one place":  {[]Point{{T: 1, Y: 1}, {T: 1, Y: 2}, {T: 1, Y: 3}}, Options{Degree: 1}},
		"two places": {[]Point{{T: 1, Y: 1}, {T: 1, Y: 2}, {T: 2, Y: 3}}, Options{Degree: 2}},
		"not finite": {[]Point{{T: 1, Y: 1}, {T: math.NaN(), Y: 2}, {T: 2, Y: 3}}, Options{Degree: 1}},
		"degree":     {[]Point{{T: 1, Y: 1}, {T: 2, Y: 2}}, Options{Degree: 11}},
		"no weight":  {[]Point{{T: 1, Y: 1, U: 1}, {T: 2, Y: 2}, {T: 3, Y: 2, U: 1}}, Options{Degree: 1, Weighted: true}},
	} {
		if _, err := Polynomial(c.points, c.o); err == nil {
			t.Errorf("%s: no error", name)
		}
	}
}

// TestCoverage: JCGM 100, table G.2, all rows and levels; its columns 68.27,
// 95.45 and 99.73 mean exactly 1, 2 and 3 sigma, and its 1.70 for 35 degrees of
// freedom at 90 % is a misprint of 1.69.
func TestCoverage(t *testing.T) {
	sigmas := map[string]float64{"68.27": 1, "95.45": 2, "99.73": 3}
	compared := 0
	for _, row := range published.Rows(t, "t_factors_table_G2.csv") {
		p := published.Number(t, row["p_percent"]) / 100
		if n, ok := sigmas[row["p_percent"]]; ok {
			p = math.Erf(n / math.Sqrt2)
		}
		dof, ok := published.Optional(row["dof"])
		if !ok {
			dof = math.Inf(1)
		}
		got := CoverageFactor(p, dof)
		if d := digits(t, got, row["computed_16_digits"]); d < 9 {
			t.Errorf("dof %s at %s %%: %.12g agrees to %.1f digits with %s", row["dof"], row["p_percent"], got, d, row["computed_16_digits"])
		}
		if misprint := row["dof"] == "35" && row["p_percent"] == "90"; !misprint && math.Abs(got-published.Number(t, row["published"])) > 0.00501 {
			t.Errorf("dof %s at %s %%: %g, printed %s", row["dof"], row["p_percent"], got, row["published"])
		}
		compared++
	}
	if compared < 150 {
		t.Errorf("only %d factors were compared", compared)
	}
}

// TestEffectiveDof: JCGM 100, G.4.1 (18.9987, printed as 19.0) and H.1.6
// (16.7646, printed as 16.7).
func TestEffectiveDof(t *testing.T) {
	for want, c := range map[float64][2][]float64{
		18.9987423143: {{0.25, 0.57, 0.82}, {9, 4, 14}},
		16.7645539809: {{25, 9.7, 2.9, 16.6}, {18, 25.6, 50, 2}},
	} {
		if got := EffectiveDof(c[0], c[1]); math.Abs(got-want) > 1e-9 {
			t.Errorf("%g, want %g", got, want)
		}
	}
	if !math.IsInf(EffectiveDof([]float64{1, 2}, []float64{math.Inf(1), math.Inf(1)}), 1) {
		t.Error("without limit")
	}
}

func quadratic(n int) []Point {
	points := make([]Point, n)
	for i := range points {
		x := -40 + 125*float64(i)/float64(n)
		points[i] = Point{T: x, Y: 1 + 1e-5*x - 5e-7*x*x + 1e-7*math.Sin(float64(i))}
	}
	return points
}

func benchmarkFit(b *testing.B, n int) {
	points := quadratic(n)
	for b.Loop() {
		if _, err := Polynomial(points, Options{Reference: 20, Degree: 2}); err != nil {
			b.Fatal(err)
		}
	}
}

// Targets: 100 µs and 0.5 s.
func BenchmarkFit1000(b *testing.B)    { benchmarkFit(b, 1000) }
func BenchmarkFit1000000(b *testing.B) { benchmarkFit(b, 1000000) }
