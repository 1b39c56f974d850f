package curve

import "math"

// debyeIntegral is Jₙ(u) for n from 2 to 5, in closed forms. With
// (eˣ − 1)(1 − e⁻ˣ) = 4·sinh²(x/2), up to seriesEnd term by term:
//
//	x²/(4·sinh²(x/2)) = Σₖ −(2k − 1)·B₂ₖ·x²ᵏ/(2k)!
//	Jₙ(u) = Σₖ −(2k − 1)·B₂ₖ/(2k)! · uⁿ⁻¹⁺²ᵏ/(n − 1 + 2k)
//
// and beyond, from the integral to infinity, n!·ζ(n), less the rest, with
// 1/(4·sinh²(x/2)) = Σₖ k·e⁻ᵏˣ:
//
//	Jₙ(u) = n!·ζ(n) − Σₖ e⁻ᵏᵘ Σⱼ (n!/j!)·uʲ·kʲ⁻ⁿ
//
// Both are exact but for rounding. Bernoulli numbers and ζ: M. Abramowitz,
// I. A. Stegun, Handbook of Mathematical Functions, chapter 23; from memory,
// a test holds the result against numerical integration.
func debyeIntegral(n int, u float64) float64 {
	if u <= seriesEnd {
		return debyeSeries(n, u)
	}
	if u > endOfExponential {
		return debyeInfinite[n]
	}
	return debyeInfinite[n] - debyeRest(n, u)
}

// endOfExponential is where e⁻ᵘ·uⁿ is far below the last bit.
const endOfExponential = 200.0

// seriesEnd: the series converges below 2π; at 2 fourteen terms reach the
// last bit, and the rest beyond needs twenty exponentials.
const seriesEnd = 2.0

// sinhSeries are the coefficients −(2k − 1)·B₂ₖ/(2k)!.
var sinhSeries = makeSinhSeries()

func makeSinhSeries() []float64 {
	bernoulli := [][2]float64{{1, 1}, {1, 6}, {-1, 30}, {1, 42}, {-1, 30}, {5, 66}, {-691, 2730}, {7, 6}, {-3617, 510}, {43867, 798}, {-174611, 330},
		{854513, 138}, {-236364091, 2730}, {8553103, 6}, {-23749461029, 870}, {8615841276005, 14322}, {-7709321041217, 510}}
	factorial, list := 1.0, make([]float64, len(bernoulli))
	for k, b := range bernoulli {
		if k > 0 {
			factorial *= float64(2*k-1) * float64(2*k)
		}
		list[k] = -float64(2*k-1) * b[0] / b[1] / factorial
	}
	return list
}

func debyeSeries(n int, u float64) float64 {
	square := float64(u * u)
	power := math.Pow(u, float64(n-1))
	sum := 0.0
	for k, c := range sinhSeries {
		sum += float64(c*power) / float64(n-1+2*k)
		power = float64(power * square)
	}
	return sum
}

// debyeInfinite is n!·ζ(n).
var debyeInfinite = [...]float64{2: math.Pi * math.Pi / 3, 3: 6 * 1.2020569031595942854, 4: 24 * math.Pi * math.Pi * math.Pi * math.Pi / 90, 5: 120 * 1.0369277551433699263}

// debyeRest is the integral from u to infinity.
func debyeRest(n int, u float64) float64 {
	sum := 0.0
	for k := 1; ; k++ {
		ku := float64(float64(k) * u)
		term := float64(math.Exp(-ku)*gammaPolynomial(n, ku)) / math.Pow(float64(k), float64(n))
		sum += term
		if term < 1e-18*sum {
			return sum
		}
	}
}

// gammaPolynomial is Σⱼ (n!/j!)·xʲ for j from 0 to n, so that e⁻ˣ times it is
// the upper incomplete gamma function Γ(n + 1, x).
func gammaPolynomial(n int, x float64) float64 {
	sum, term := 1.0, 1.0 // j = n, where n!/n! = 1; xʲ is divided out
	if x == 0 {
		for j := 2; j <= n; j++ {
			sum *= float64(j)
		}
		return sum
	}
	for j := n; j > 0; j-- {
		term = float64(term*float64(j)) / x
		sum += term
	}
	return float64(sum * math.Pow(x, float64(n)))
}
