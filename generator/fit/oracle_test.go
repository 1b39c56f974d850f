package fit

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"ohmfolio/generator/published"
)

// scattered makes n points of a quadratic with scatter, as a bath gives them.
func scattered(random *rand.Rand, n int) (points []Point, t, y, u []float64) {
	for i := range n {
		p := Point{T: -40 + 150*float64(i)/float64(n-1) + random.Float64(), U: 1e-6 * (1 + random.Float64())}
		x := p.T - 25
		p.Y = 1 + 12e-6*x - 0.5e-6*x*x + p.U*random.NormFloat64()
		points, t, y, u = append(points, p), append(t, p.T-25), append(y, p.Y), append(u, p.U)
	}
	return points, t, y, u
}

func agree(t *testing.T, what string, got, want, relative float64) {
	t.Helper()
	if math.Abs(got-want) > relative*math.Abs(want) || math.IsNaN(got) {
		t.Errorf("%s: %.15g, the reference program says %.15g", what, got, want)
	}
}

// TestAgainstNumpy holds coefficients and covariance, scaled by the scatter
// and unscaled with stated uncertainties, against numpy's polyfit (python3-scipy).
// numpy gives the highest power first.
func TestAgainstNumpy(t *testing.T) {
	random := rand.New(rand.NewPCG(3, 1))
	for _, degree := range []int{1, 2, 3} {
		for _, weighted := range []bool{false, true} {
			points, x, y, u := scattered(random, 9+degree)
			call := "cov=True"
			if weighted {
				call = "w=1/u, cov='unscaled'"
			}
			lines := published.Scipy(t, fmt.Sprintf("x=np.array([%s]); y=np.array([%s]); u=np.array([%s])\nb, c = np.polyfit(x, y, %d, %s)\ntell(b)\ntell(c)\n",
				published.List(x), published.List(y), published.List(u), degree, call))
			r, err := Polynomial(points, Options{Reference: 25, Degree: degree, Weighted: weighted})
			if err != nil {
				t.Fatal(err)
			}
			for i := range degree + 1 {
				agree(t, fmt.Sprintf("b_%d of degree %d, weighted %v", i, degree, weighted), r.B[i], lines[0][degree-i], 1e-8)
				for j := range degree + 1 {
					size := math.Sqrt(r.Covariance[i][i] * r.Covariance[j][j])
					want := lines[1][(degree-i)*(degree+1)+degree-j]
					if math.Abs(r.Covariance[i][j]-want) > 1e-9*size {
						t.Errorf("covariance %d,%d of degree %d, weighted %v: %g, numpy says %g", i, j, degree, weighted, r.Covariance[i][j], want)
					}
				}
			}
		}
	}
}

// TestAgainstR holds the confidence band, R², leverage, the studentised
// residuals behind the outliers, and the lack-of-fit F against R's lm, predict,
// hatvalues, rstudent and anova.
func TestAgainstR(t *testing.T) {
	random := rand.New(rand.NewPCG(4, 1))
	points, _, _, _ := scattered(random, 8)
	for i := range 4 { // repeated temperatures
		p := points[2*i]
		p.Y += 2e-6 * random.NormFloat64()
		points = append(points, p)
	}
	points[5].Y += 40e-6 // a gross error
	var x, y []float64
	for _, p := range points {
		x, y = append(x, p.T-25), append(y, p.Y)
	}
	lines := published.R(t, fmt.Sprintf(`d <- data.frame(x=c(%s), y=c(%s))
m <- lm(y ~ x + I(x^2), d)
for (at in c(-60, 0, 33.3, 90)) { p <- predict(m, data.frame(x=at), se.fit=TRUE); tell(p$fit, p$se.fit) }
tell(summary(m)$r.squared, summary(m)$sigma)
tell(hatvalues(m))
tell(rstudent(m))
a <- anova(m, lm(y ~ factor(x), d)); tell(a$F[2], a$Df[2], a$Res.Df[2], a[["Pr(>F)"]][2])
tell(qt(0.975, m$df.residual))
`, published.List(x), published.List(y)))
	r, err := Polynomial(points, Options{Reference: 25, Degree: 2})
	if err != nil {
		t.Fatal(err)
	}
	for i, at := range []float64{-60, 0, 33.3, 90} {
		v, u := r.At(25 + at)
		agree(t, "fitted value", v, lines[i][0], 1e-12)
		agree(t, "its standard uncertainty", u, lines[i][1], 1e-9)
	}
	agree(t, "R²", r.RSquared, lines[4][0], 1e-10)
	agree(t, "residual sd", r.SD, lines[4][1], 1e-9)
	for i := range points {
		agree(t, "leverage", r.Leverage[i], lines[5][i], 1e-9)
		agree(t, "studentised residual", r.studentised(i, points[i]), math.Abs(lines[6][i]), 1e-6)
	}
	if len(r.Outliers) != 1 || r.Outliers[0] != 5 {
		t.Errorf("outliers %v, the gross error is point 5", r.Outliers)
	}
	l := r.LackOfFit
	if l == nil {
		t.Fatal("temperatures repeat and no lack of fit is told")
	}
	agree(t, "lack-of-fit F", l.F, lines[7][0], 1e-8)
	agree(t, "its P", l.P, lines[7][3], 1e-7)
	if float64(l.Dof1) != lines[7][1] || float64(l.Dof2) != lines[7][2] {
		t.Errorf("degrees of freedom %d, %d; R says %v", l.Dof1, l.Dof2, lines[7][1:3])
	}
	agree(t, "coverage factor", CoverageFactor(0.95, float64(r.Dof)), lines[8][0], 1e-10)
}

// TestThermometerBandAgainstR is GUM annex H.3 with the band of R's predict.
func TestThermometerBandAgainstR(t *testing.T) {
	var x, y []float64
	var points []Point
	for _, row := range published.Rows(t, "h3_thermometer.csv") {
		p := h3Point(t, row)
		points, x, y = append(points, p), append(x, p.T), append(y, p.Y)
	}
	lines := published.R(t, fmt.Sprintf("d <- data.frame(x=c(%s)-20, y=c(%s)); m <- lm(y ~ x, d)\np <- predict(m, data.frame(x=10), se.fit=TRUE); tell(p$fit, p$se.fit)\n", published.List(x), published.List(y)))
	r, err := Polynomial(points, Options{Reference: 20, Degree: 1})
	if err != nil {
		t.Fatal(err)
	}
	v, u := r.At(30)
	agree(t, "correction at 30 °C", v, lines[0][0], 1e-10)
	agree(t, "its uncertainty", u, lines[0][1], 1e-10)
}
