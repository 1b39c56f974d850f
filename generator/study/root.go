package study

import "math"

// root finds where a rising function crosses zero in [lo, hi], by
// Chandrupatla's method: inverse quadratic interpolation where it is safe,
// halving where it is not. Where there is no crossing it gives the nearer end.
//
//	T. R. Chandrupatla, Advances in Engineering Software 28 (1997) 145 (from memory)
func root(lo, hi float64, f func(float64) float64) float64 {
	a, b := hi, lo
	fa, fb := f(a), f(b)
	switch {
	case fb >= 0:
		return lo
	case fa <= 0:
		return hi
	}
	t := 0.5
	for range 200 {
		x := a + float64(t*(b-a))
		fx := f(x)
		c, fc := a, fa
		if (fx > 0) != (fa > 0) {
			c, b, fc, fb = b, a, fb, fa
		}
		a, fa = x, fx
		best, least := a, math.Abs(fa)
		if math.Abs(fb) < least {
			best, least = b, math.Abs(fb)
		}
		limit := 2 * 0x1p-52 * math.Abs(best) / math.Abs(b-c)
		if limit > 0.5 || least == 0 {
			return best
		}
		t = 0.5
		xi, phi := (a-b)/(c-b), (fa-fb)/(fc-fb)
		if float64(phi*phi) < xi && float64((1-phi)*(1-phi)) < 1-xi {
			t = fa/(fb-fa)*fc/(fb-fc) + float64((c-a)/(b-a)*(fa/(fc-fa))*(fb/(fc-fb)))
		}
		t = min(1-limit, max(limit, t))
	}
	return a
}
