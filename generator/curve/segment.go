package curve

import "math"

// A Segment is a cubic on a closed interval of temperature:
//
//	value(T) = C[0] + C[1]·u + C[2]·u² + C[3]·u³,  u = T − Centre
//
// From, To and Centre are kelvin; C carries the unit of the value per K⁰…K³.
// Centre need not lie inside the interval: a polynomial keeps its reference
// temperature there, so that its own coefficients stay readable.
type Segment struct {
	From, To, Centre float64
	C                [4]float64
}

// Products are written float64(x*y) throughout this package: without the
// conversion a compiler may fuse the following addition, and the last bit
// would then depend on the processor.

// value gives the cubic at t, which may lie outside the interval.
func (s *Segment) value(t float64) float64 {
	u := t - s.Centre
	return s.C[0] + float64(u*(s.C[1]+float64(u*(s.C[2]+float64(u*s.C[3])))))
}

// slope gives the derivative at t, per kelvin.
func (s *Segment) slope(t float64) float64 {
	u := t - s.Centre
	return s.C[1] + float64(u*(2*s.C[2]+float64(u*(3*s.C[3]))))
}

// bend gives the second derivative at t, per kelvin squared.
func (s *Segment) bend(t float64) float64 {
	return 2*s.C[2] + float64(6*s.C[3]*(t-s.Centre))
}

// stationary gives the temperatures, ascending, at which the slope is zero and
// changes sign, wherever they lie, and how many they are. A point where the
// slope only touches zero turns nothing and is left out.
func (s *Segment) stationary() (t [2]float64, n int) {
	u, n := quadraticRoots(s.C[1], 2*s.C[2], 3*s.C[3])
	for i := 0; i < n; i++ {
		t[i] = s.Centre + u[i]
	}
	return t, n
}

// magnitude gives the larger absolute value at the two ends.
func (s *Segment) magnitude() float64 {
	return math.Max(math.Abs(s.value(s.From)), math.Abs(s.value(s.To)))
}

// hermite gives the cubic with the values ya, yb and the slopes da, db at a, b.
// Its centre is b, so that the value at b, the edge it owns, is yb to the last
// bit. a < b is required.
func hermite(a, b, ya, yb, da, db float64) Segment {
	h := b - a
	secant := (yb - ya) / h
	return Segment{From: a, To: b, Centre: b, C: [4]float64{
		yb,
		db,
		(2*db + da - float64(3*secant)) / h,
		(da + db - 2*secant) / float64(h*h),
	}}
}
