package curve

import (
	"errors"
	"math"
)

// BlochGruneisen is the resistivity of a pure metal by phonon scattering:
//
//	ρ(T) = Residual + Amplitude·(T/Theta)ⁿ·Jₙ(Theta/T)
//	Jₙ(u) = ∫₀ᵘ xⁿ/[(eˣ − 1)(1 − e⁻ˣ)] dx
//
// Residual and Amplitude are Ω·m, Theta (the Debye temperature of the
// resistivity) kelvin, the Exponent n is 2 to 5: 5 for simple metals, 3 and 2
// where electrons scatter between bands and from one another.
//
// Source: J. M. Ziman, Electrons and Phonons (1960), chapter 9; from memory.
type BlochGruneisen struct {
	Residual, Theta, Amplitude float64
	Exponent                   int
}

// At gives ρ at t kelvin, t ≥ 0; at 0 it is the residual resistivity.
func (m BlochGruneisen) At(t float64) float64 {
	if t == 0 {
		return m.Residual
	}
	power := math.Pow(t/m.Theta, float64(m.Exponent))
	return m.Residual + float64(m.Amplitude*float64(power*debyeIntegral(m.Exponent, m.Theta/t)))
}

// slope is the derivative of At, with g the integrand:
//
//	dρ/dT = Amplitude·(T/Theta)ⁿ·(n·Jₙ(u) − u·g(u))/T,  u = Theta/T
func (m BlochGruneisen) slope(t float64) float64 {
	if t == 0 {
		return 0
	}
	u := m.Theta / t
	power := math.Pow(t/m.Theta, float64(m.Exponent))
	inner := float64(float64(m.Exponent)*debyeIntegral(m.Exponent, u)) - float64(u*debyeIntegrand(m.Exponent, u))
	return float64(m.Amplitude*float64(power*inner)) / t
}

// Curve lowers the model from lo to hi kelvin, within 1e-7. Without a residual
// resistivity it cannot reach absolute zero, where ρ itself vanishes.
func (m BlochGruneisen) Curve(lo, hi float64) (Curve, error) {
	switch {
	case m.Exponent < 2 || m.Exponent > 5:
		return Curve{}, errors.New("the exponent must be 2, 3, 4 or 5")
	case !(m.Theta > 0) || !(m.Amplitude > 0) || !(m.Residual >= 0):
		return Curve{}, errors.New("the Debye temperature and the amplitude must be above zero, the residual resistivity not below it")
	case !(lo >= 0):
		return Curve{}, errors.New("the range begins below absolute zero")
	}
	return Approximate(m.At, m.slope, lo, hi, 1e-7)
}

// debyeIntegrand is xⁿ/[(eˣ − 1)(1 − e⁻ˣ)], n ≥ 2; xⁿ⁻² near zero.
func debyeIntegrand(n int, x float64) float64 {
	if x < 1e-8 {
		return math.Pow(x, float64(n-2))
	}
	// (eˣ − 1)(1 − e⁻ˣ) = 4·sinh²(x/2), which neither cancels nor, below
	// endOfIntegrand, overflows.
	s := 2 * math.Sinh(0.5*x)
	return math.Pow(x, float64(n)) / float64(s*s)
}
