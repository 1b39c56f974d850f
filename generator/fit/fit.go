// Package fit turns measured points into the coefficients of a polynomial
// with their covariance: least squares by QR on centred and scaled columns.
// It knows no curve and no material.
//
// Units are those of the points: temperatures as given, values as given;
// b_k is in value per temperature^k.
package fit

import (
	"errors"
	"fmt"
	"math"

	"gonum.org/v1/gonum/mat"
)

// Point is one measured point. U is its standard uncertainty (k = 1) in the
// value's unit, UT that of its temperature; 0 when not stated.
type Point struct {
	T, Y  float64
	U, UT float64
	Line  int // in the file, 0 when there is none
}

// Options of a fit.
type Options struct {
	Reference float64 // temperature that the powers are about
	Degree    int     // 1…10
	Hold      bool    // the value at Reference is held at Held and not fitted
	Held      float64
	Origin    bool // through the origin: Hold with Held 0, R² uncentred
	Weighted  bool // by 1/U²; every point needs its U
}

// Result is a fitted polynomial Σ b_k (T − Reference)^k.
type Result struct {
	Options    Options
	N, Dof     int
	B          []float64   // b_0…b_n; b_0 is Held when it was held
	Covariance [][]float64 // of B; unscaled when weighted, scaled by s² otherwise
	RSS        float64     // Σ w r²
	SD         float64     // √(RSS/dof); 0 without degrees of freedom
	ChiSquare  float64     // RSS/dof of a weighted fit, NaN otherwise
	RSquared   float64
	LackOfFit  *LackOfFit // nil when no temperature repeats
	Residuals  []float64  // y − fit, by point
	Leverage   []float64
	Outliers   []int // points by index; kept in the fit
	Warnings   []string

	scale scaling
	inv   *mat.TriDense // R⁻¹ of the scaled problem
}

// LackOfFit compares the scatter about the curve with that of repeated
// temperatures: P is the chance of an F as large when the curve is right.
type LackOfFit struct {
	F          float64
	Dof1, Dof2 int
	P          float64
}

// MaxDegree is the highest degree that is fitted.
const MaxDegree = 10

// Polynomial fits a polynomial to the points. It refuses too few points, all
// at one temperature, points that are not finite, and a weighted fit with a
// point whose uncertainty is not above zero.
func Polynomial(points []Point, o Options) (Result, error) {
	if o.Origin {
		o.Hold, o.Held = true, 0
	}
	if err := check(points, o); err != nil {
		return Result{}, err
	}
	r := Result{Options: o, N: len(points), ChiSquare: math.NaN(), scale: scalingOf(points, o)}
	p := r.scale.columns
	r.Dof = r.N - p
	triangle, right := r.scale.decompose(points, o)
	inv := mat.NewTriDense(p, mat.Upper, nil)
	if err := inv.InverseTri(triangle); err != nil {
		return Result{}, errors.New("the points do not determine a polynomial of this degree; lower it, or spread the temperatures")
	}
	r.inv = inv
	var a mat.VecDense
	a.MulVec(inv, right)
	r.coefficients(&a)
	r.residuals(points)
	r.statistics(points)
	return r, nil
}

func check(points []Point, o Options) error {
	if o.Degree < 1 || o.Degree > MaxDegree {
		return fmt.Errorf("the degree must lie between 1 and %d", MaxDegree)
	}
	need := o.Degree + 1
	if o.Hold {
		need--
	}
	different := map[float64]bool{}
	for i, q := range points {
		if !finite(q.T) || !finite(q.Y) {
			return fmt.Errorf("point %d is not finite", i+1)
		}
		if o.Weighted && !(q.U > 0) {
			return fmt.Errorf("point %d has no uncertainty to weigh it by", i+1)
		}
		if len(different) <= need {
			different[q.T] = true
		}
	}
	if len(points) < need {
		return fmt.Errorf("%d points do not determine %d coefficients", len(points), need)
	}
	if len(different) < need {
		return fmt.Errorf("the points stand at %d different temperatures; degree %d needs %d", len(different), o.Degree, need)
	}
	return nil
}

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

// scaling maps temperatures to u = (T − centre)/half, which lies in [−1, 1]
// for a free fit; a held value keeps the reference as its centre.
type scaling struct {
	centre, half float64
	lowest       int // lowest power that is fitted
	columns      int
}

func scalingOf(points []Point, o Options) scaling {
	lo, hi := math.Inf(1), math.Inf(-1)
	for _, q := range points {
		lo, hi = math.Min(lo, q.T), math.Max(hi, q.T)
	}
	if o.Hold {
		half := math.Max(math.Abs(lo-o.Reference), math.Abs(hi-o.Reference))
		return scaling{centre: o.Reference, half: half, lowest: 1, columns: o.Degree}
	}
	return scaling{centre: lo + (hi-lo)/2, half: (hi - lo) / 2, columns: o.Degree + 1}
}

// row writes the powers of u at t into dst, times w.
func (s scaling) row(dst []float64, t, w float64) {
	u := (t - s.centre) / s.half
	x := w
	if s.lowest == 1 {
		x = float64(w * u)
	}
	for k := range dst {
		dst[k] = x
		x = float64(x * u)
	}
}

// block is how many rows are decomposed at once: few enough to stay in the
// cache, so that a million points need no large matrix.
const block = 512

// decompose triangularises [X | y] block by block: the triangle so far stands
// above the next rows. It returns R and Qᵀy.
func (s scaling) decompose(points []Point, o Options) (*mat.TriDense, *mat.VecDense) {
	p := s.columns
	kept := mat.NewDense(p+1, p+1, nil)
	for from := 0; from < len(points); from += block {
		to := min(from+block, len(points))
		rows := mat.NewDense(p+1+max(to-from, 1), p+1, nil)
		rows.Slice(0, p+1, 0, p+1).(*mat.Dense).Copy(kept)
		for i, q := range points[from:to] {
			w := weight(q, o)
			line := rows.RawRowView(p + 1 + i)
			s.row(line[:p], q.T, w)
			line[p] = float64((q.Y - o.Held) * w)
		}
		var qr mat.QR
		qr.Factorize(rows)
		var upper mat.Dense
		qr.RTo(&upper)
		kept.Copy(upper.Slice(0, p+1, 0, p+1))
	}
	triangle, right := mat.NewTriDense(p, mat.Upper, nil), mat.NewVecDense(p, nil)
	for i := range p {
		for j := i; j < p; j++ {
			triangle.SetTri(i, j, kept.At(i, j))
		}
		right.SetVec(i, kept.At(i, p))
	}
	return triangle, right
}

// weight is 1/U of a weighted fit, 1 otherwise.
func weight(q Point, o Options) float64 {
	if o.Weighted {
		return 1 / q.U
	}
	return 1
}
