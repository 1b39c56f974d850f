package fit

import (
	"math"

	"gonum.org/v1/gonum/mat"
)

// coefficients turns the scaled solution into powers of (T − Reference), with
// its covariance factor R⁻¹R⁻ᵀ carried through the same linear map.
func (r *Result) coefficients(a *mat.VecDense) {
	m := r.scale.toPowers(r.Options)
	var b mat.VecDense
	b.MulVec(m, a)
	r.B = append([]float64{}, b.RawVector().Data...)
	if r.Options.Hold {
		r.B[0] += r.Options.Held
	}
	var half, cov mat.Dense
	half.Mul(m, r.inv)
	cov.Mul(&half, half.T())
	n := len(r.B)
	r.Covariance = make([][]float64, n)
	for i := range n {
		r.Covariance[i] = make([]float64, n)
		for j := range n {
			r.Covariance[i][j] = cov.At(i, j)
		}
	}
}

// toPowers is the matrix that turns Σ a_k u^(k+lowest) into Σ b_j τ^j with
// u = (τ + d)/half, d = Reference − centre:
//
//	b_j = Σ_k a_k · C(k, j) · d^(k−j) / half^k
func (s scaling) toPowers(o Options) *mat.Dense {
	d := o.Reference - s.centre
	m := mat.NewDense(o.Degree+1, s.columns, nil)
	for column := range s.columns {
		k := column + s.lowest
		for j := 0; j <= k; j++ {
			m.Set(j, column, float64(binomial(k, j)*math.Pow(d, float64(k-j)))/math.Pow(s.half, float64(k)))
		}
	}
	return m
}

func binomial(n, k int) float64 {
	x := 1.0
	for i := range k {
		x = x * float64(n-i) / float64(i+1)
	}
	return x
}

// Coefficient is one coefficient with its standard uncertainty.
type Coefficient struct {
	Name  string
	Value float64
	U     float64
}

// Relative gives b_0 and α, β, γ … = b_k/b_0 with the covariance carried
// through the ratio (JCGM 100, 5.2.2):
//
//	∂(b_k/b_0)/∂b_0 = −b_k/b_0²,  ∂(b_k/b_0)/∂b_k = 1/b_0
//
// The covariance returned is of [b_0, α, β, …]. ok is false when b_0 is 0.
func (r *Result) Relative() (list []Coefficient, covariance [][]float64, ok bool) {
	if r.B[0] == 0 {
		return nil, nil, false
	}
	n := len(r.B)
	j := mat.NewDense(n, n, nil)
	j.Set(0, 0, 1)
	values := []float64{r.B[0]}
	for k := 1; k < n; k++ {
		values = append(values, r.B[k]/r.B[0])
		j.Set(k, 0, -r.B[k]/(r.B[0]*r.B[0]))
		j.Set(k, k, 1/r.B[0])
	}
	covariance = transform(j, r.Covariance)
	for k := range n {
		list = append(list, Coefficient{coefficientName(k), values[k], math.Sqrt(math.Max(0, covariance[k][k]))})
	}
	return list, covariance, true
}

var greek = []string{"value at the reference temperature", "alpha", "beta", "gamma"}

func coefficientName(k int) string {
	if k < len(greek) {
		return greek[k]
	}
	return "coefficient " + string(rune('0'+k%10))
}

// transform is J·C·Jᵀ.
func transform(j *mat.Dense, c [][]float64) [][]float64 {
	n := len(c)
	m := mat.NewDense(n, n, nil)
	for i := range n {
		m.SetRow(i, c[i])
	}
	var half, out mat.Dense
	half.Mul(j, m)
	out.Mul(&half, j.T())
	rows, _ := j.Dims()
	list := make([][]float64, rows)
	for i := range rows {
		list[i] = mat.Row(nil, i, &out)
	}
	return list
}

// Correlation is the correlation matrix of a covariance; 0 beside a
// coefficient that has none.
func Correlation(c [][]float64) [][]float64 {
	out := make([][]float64, len(c))
	for i := range c {
		out[i] = make([]float64, len(c))
		for j := range c {
			if d := math.Sqrt(float64(c[i][i] * c[j][j])); d > 0 {
				out[i][j] = c[i][j] / d
			}
		}
	}
	return out
}

// At gives the fitted value at t and the standard uncertainty of the curve.
func (r *Result) At(t float64) (y, u float64) {
	tau := t - r.Options.Reference
	x := make([]float64, len(r.B))
	p := 1.0
	for k := range x {
		x[k] = p
		p = float64(p * tau)
	}
	for k := len(r.B) - 1; k >= 0; k-- {
		y = float64(y*tau) + r.B[k]
	}
	v := 0.0
	for i := range x {
		for j := range x {
			v += float64(float64(x[i]*x[j]) * r.Covariance[i][j])
		}
	}
	return y, math.Sqrt(math.Max(0, v))
}

// About re-references the fit to another temperature, exactly, with its
// covariance: b'_j = Σ_k C(k, j) d^(k−j) b_k.
func (r *Result) About(t float64) Result {
	d := t - r.Options.Reference
	n := len(r.B)
	m := mat.NewDense(n, n, nil)
	for j := range n {
		for k := j; k < n; k++ {
			m.Set(j, k, float64(binomial(k, j)*math.Pow(d, float64(k-j))))
		}
	}
	var b mat.VecDense
	b.MulVec(m, mat.NewVecDense(n, append([]float64{}, r.B...)))
	out := *r
	out.Options.Reference = t
	out.B = append([]float64{}, b.RawVector().Data...)
	out.Covariance = transform(m, r.Covariance)
	return out
}
