package fit

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// outlierChance is the chance of naming a good point an outlier, over all
// points together (Bonferroni).
const outlierChance = 0.05

// residuals fills residuals, leverage and the sum of squares. The covariance
// is scaled by s² unless the uncertainties were given.
func (r *Result) residuals(points []Point) {
	p := r.scale.columns
	row, z := make([]float64, p), make([]float64, p)
	r.Residuals, r.Leverage = make([]float64, r.N), make([]float64, r.N)
	for i, q := range points {
		w := weight(q, r.Options)
		r.Residuals[i] = q.Y - r.value(q.T)
		r.RSS += float64(float64(w*r.Residuals[i]) * float64(w*r.Residuals[i]))
		r.scale.row(row, q.T, w)
		r.Leverage[i] = r.leverage(row, z)
	}
	if r.Dof > 0 {
		r.SD = math.Sqrt(r.RSS / float64(r.Dof))
	}
	if r.Options.Weighted {
		if r.Dof > 0 {
			r.ChiSquare = r.RSS / float64(r.Dof)
		}
		return
	}
	for i := range r.Covariance {
		for j := range r.Covariance {
			r.Covariance[i][j] *= float64(r.SD * r.SD)
		}
	}
}

func (r *Result) value(t float64) float64 {
	tau, y := t-r.Options.Reference, 0.0
	for k := len(r.B) - 1; k >= 0; k-- {
		y = float64(y*tau) + r.B[k]
	}
	return y
}

// leverage is ‖R⁻ᵀx‖² of one weighted row x.
func (r *Result) leverage(row, z []float64) float64 {
	sum := 0.0
	for j := range row {
		z[j] = 0
		for i := 0; i <= j; i++ {
			z[j] += float64(row[i] * r.inv.At(i, j))
		}
		sum += float64(z[j] * z[j])
	}
	return sum
}

func (r *Result) statistics(points []Point) {
	r.RSquared = r.rSquared(points)
	r.LackOfFit = r.lackOfFit(points)
	r.outliers(points)
	r.warn()
}

// rSquared is 1 − RSS/SS, about the weighted mean; about zero when the curve
// goes through the origin.
func (r *Result) rSquared(points []Point) float64 {
	mean, sum := 0.0, 0.0
	if !r.Options.Origin {
		for _, q := range points {
			w := weight(q, r.Options)
			mean += float64(float64(w*w) * q.Y)
			sum += float64(w * w)
		}
		mean /= sum
	}
	total := 0.0
	for _, q := range points {
		d := float64(weight(q, r.Options) * (q.Y - mean))
		total += float64(d * d)
	}
	if total == 0 {
		return math.NaN()
	}
	return 1 - r.RSS/total
}

// lackOfFit is told when temperatures repeat; nil otherwise.
func (r *Result) lackOfFit(points []Point) *LackOfFit {
	if rising(points) {
		return nil
	}
	type group struct{ w, wy float64 }
	groups := map[float64]*group{}
	for _, q := range points {
		g := groups[q.T]
		if g == nil {
			g = &group{}
			groups[q.T] = g
		}
		w := weight(q, r.Options)
		g.w, g.wy = g.w+float64(w*w), g.wy+float64(float64(w*w)*q.Y)
	}
	l := LackOfFit{Dof1: len(groups) - r.scale.columns, Dof2: r.N - len(groups)}
	if l.Dof1 < 1 || l.Dof2 < 1 {
		return nil
	}
	pure := 0.0
	for _, q := range points {
		g := groups[q.T]
		d := float64(weight(q, r.Options) * (q.Y - g.wy/g.w))
		pure += float64(d * d)
	}
	if pure == 0 {
		return nil
	}
	l.F = math.Max(0, r.RSS-pure) / float64(l.Dof1) / (pure / float64(l.Dof2))
	l.P = distuv.F{D1: float64(l.Dof1), D2: float64(l.Dof2)}.Survival(l.F)
	return &l
}

// rising tells whether no temperature can repeat, without a look at each.
func rising(points []Point) bool {
	for i := 1; i < len(points); i++ {
		if points[i].T <= points[i-1].T {
			return false
		}
	}
	return true
}

// outliers names points whose externally studentised residual is beyond what
// Student's t allows at the Bonferroni level. They stay in the fit.
func (r *Result) outliers(points []Point) {
	if r.Dof < 2 || r.RSS == 0 {
		return
	}
	t := distuv.StudentsT{Sigma: 1, Nu: float64(r.Dof - 1)}
	level := outlierChance / 2 / float64(r.N)
	largest := 0.0 // passed as too small already: the chance falls with t
	for i, q := range points {
		v := r.studentised(i, q)
		if v <= largest {
			continue
		}
		if t.Survival(v) < level {
			r.Outliers = append(r.Outliers, i)
		} else {
			largest = v
		}
	}
}

// studentised is the residual of point i over its own uncertainty, estimated
// without it; +Inf when the others lie exactly on the curve, 0 for a point
// that the curve cannot miss.
func (r *Result) studentised(i int, q Point) float64 {
	free := 1 - r.Leverage[i]
	if free < 1e-12 {
		return 0
	}
	e := float64(weight(q, r.Options) * r.Residuals[i])
	without := (r.RSS - float64(e*e)/free) / float64(r.Dof-1)
	if !(without > 0) {
		return math.Inf(1)
	}
	return math.Abs(e) / math.Sqrt(float64(without*free))
}

// warn says when the degree is more than the data support.
func (r *Result) warn() {
	if r.Dof == 0 {
		r.Warnings = append(r.Warnings, "as many coefficients as points: there are no residuals, and nothing tells how good the fit is")
		return
	}
	top := len(r.B) - 1
	u := math.Sqrt(math.Max(0, r.Covariance[top][top]))
	if t := (distuv.StudentsT{Sigma: 1, Nu: float64(r.Dof)}); u > 0 && t.Survival(math.Abs(r.B[top])/u) > 0.025 {
		r.Warnings = append(r.Warnings, fmt.Sprintf("the degree is more than the data support: the coefficient of power %d is not told apart from zero; try degree %d", top, top-1))
	}
	if r.LackOfFit != nil && r.LackOfFit.P < 0.05 {
		r.Warnings = append(r.Warnings, "lack of fit: repeated temperatures scatter less than the curve misses them; try a higher degree")
	}
	if len(r.Outliers) > 0 {
		r.Warnings = append(r.Warnings, fmt.Sprintf("%d point(s) lie further off than chance allows; they are kept in the fit", len(r.Outliers)))
	}
}

// LargestResidual is the residual of largest magnitude over the value at the
// reference temperature, with its sign, in ppm; NaN when that value is 0.
func (r *Result) LargestResidual() float64 {
	largest := 0.0
	for _, e := range r.Residuals {
		if math.Abs(e) > math.Abs(largest) {
			largest = e
		}
	}
	return largest / r.B[0] * 1e6
}

// Scatter is the residual standard deviation in the value's unit, whether or
// not the fit was weighted: √(Σ r²/dof).
func (r *Result) Scatter() float64 {
	if r.Dof == 0 {
		return 0
	}
	sum := 0.0
	for _, e := range r.Residuals {
		sum += float64(e * e)
	}
	return math.Sqrt(sum / float64(r.Dof))
}

// EffectiveDof is the Welch-Satterthwaite number of degrees of freedom of a
// sum of independent components with standard uncertainties u and degrees of
// freedom dof (JCGM 100, G.4); +Inf when no component with finite dof counts.
// It is not truncated.
func EffectiveDof(u, dof []float64) float64 {
	sum, parts := 0.0, 0.0
	for i := range u {
		sum += float64(u[i] * u[i])
		if !math.IsInf(dof[i], 1) {
			parts += math.Pow(u[i], 4) / dof[i]
		}
	}
	if parts == 0 {
		return math.Inf(1)
	}
	return float64(sum*sum) / parts
}

// CoverageFactor is k for a level of confidence p and effective degrees of
// freedom (JCGM 100, G.3.2); the normal distribution's for +Inf.
func CoverageFactor(p, dof float64) float64 {
	if math.IsInf(dof, 1) {
		return distuv.UnitNormal.Quantile(0.5 + p/2)
	}
	return distuv.StudentsT{Sigma: 1, Nu: dof}.Quantile(0.5 + p/2)
}
