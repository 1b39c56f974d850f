package quantity

import "math"

// ResistivityFromConductivity turns a conductivity in S/m into
//
//	ρ = 1/σ
//
// in Ω·m. Limits and uncertainties change places, and a symmetric ± becomes
// asymmetric: ρ₋ = ρ − 1/(σ + a), ρ₊ = 1/(σ − a) − ρ. A lower limit of σ at or
// below zero gives no upper limit of ρ. Text stays as the author wrote it; the
// unit is the usual one of resistivity. The value must be above zero.
func ResistivityFromConductivity(q Quantity) Quantity {
	r := derived(q)
	r.Value = 1 / q.Value
	r.step, r.fine = math.Abs(q.step/q.Value/q.Value), math.Abs(q.fine/q.Value/q.Value)
	if q.Limits != nil {
		r.Limits = &Limits{math.Inf(-1), math.Inf(1)}
		if q.Limits.Lower > 0 {
			r.Limits.Upper = 1 / q.Limits.Lower
		}
		if q.Limits.Upper > 0 && !math.IsInf(q.Limits.Upper, 0) {
			r.Limits.Lower = 1 / q.Limits.Upper
		}
	}
	if u := q.Uncertainty; u != nil {
		r.Uncertainty = &Uncertainty{Minus: 1/q.Value - 1/(q.Value+u.Plus), Plus: math.Inf(1), K: u.K}
		if u.Minus < q.Value {
			r.Uncertainty.Plus = 1/(q.Value-u.Minus) - 1/q.Value
		}
	}
	return r
}

// ResistivityFromMass turns a mass resistivity ρ_m in Ω·kg/m² into
//
//	ρ = ρ_m/δ
//
// in Ω·m, with the density δ in kg/m³, which must be above zero. The ± of the
// density is not carried: the printed mass resistivity is what was measured.
func ResistivityFromMass(q Quantity, density float64) Quantity {
	return scaled(q, 1/density)
}

// ResistivityFromSheet turns a sheet resistance R□ in Ω per square into
//
//	ρ = R□·t
//
// in Ω·m, with the thickness t in m, which must be above zero. The ± of the
// thickness is not carried.
func ResistivityFromSheet(q Quantity, thickness float64) Quantity {
	return scaled(q, thickness)
}

func scaled(q Quantity, f float64) Quantity {
	r := derived(q)
	r.Value, r.step, r.fine = float64(q.Value*f), float64(q.step*f), float64(q.fine*f)
	if q.Limits != nil {
		r.Limits = &Limits{float64(q.Limits.Lower * f), float64(q.Limits.Upper * f)}
	}
	if u := q.Uncertainty; u != nil {
		r.Uncertainty = &Uncertainty{float64(u.Minus * f), float64(u.Plus * f), u.K}
	}
	return r
}

// derived is q as a resistivity that is still to be filled in.
func derived(q Quantity) Quantity {
	r := q
	r.Kind, r.limitStep = Resistivity, 0
	r.Unit = Units(Resistivity)[0]
	return r
}

// AWG is the diameter in m of American wire gauge n, exact by definition:
//
//	d = 0.005 in · 92^((36−n)/39)
//
// Gauges 00, 000 and 0000 are n = −1, −2 and −3 (ASTM B258).
func AWG(n int) float64 {
	return float64(0.005 * inch * math.Pow(92, float64(36-n)/39))
}

// ParseAWG reads "AWG 24", "24 AWG" or "AWG 4/0"; ok is false for anything
// else and for sizes outside 0000 to 56.
func ParseAWG(text string) (n int, ok bool) {
	s := scanner{text: text}
	s.skipBlank()
	named := s.take("AWG", "awg")
	s.skipBlank()
	n, ok = s.gauge()
	s.skipBlank()
	if !named {
		ok = ok && s.take("AWG", "awg")
	}
	s.skipBlank()
	return n, ok && s.at == len(s.text) && n >= -3 && n <= 56
}

func (s *scanner) gauge() (int, bool) {
	for i, z := range []string{"0000", "000", "00"} {
		if s.take(z) {
			return i - 3, true
		}
	}
	w, ok, p := s.number()
	if !ok || p != nil || w.value != math.Trunc(w.value) {
		return 0, false
	}
	if s.take("/0") {
		return 1 - int(w.value), true
	}
	return int(w.value), true
}
