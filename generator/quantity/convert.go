package quantity

import "math"

// ResistivityFromConductivity turns σ into ρ = 1/σ. Limits and uncertainties
// change places and become asymmetric.
func ResistivityFromConductivity(q Quantity) Quantity {
	r := q
	r.Kind, r.Value = Resistivity, 1/q.Value
	if q.Limits != nil {
		r.Limits = &Limits{reciprocal(q.Limits.Upper), reciprocal(q.Limits.Lower)}
		if q.Limits.Lower <= 0 {
			r.Limits.Upper = math.Inf(1)
		}
	}
	if u := q.Uncertainty; u != nil {
		r.Uncertainty = &Uncertainty{Minus: 1/q.Value - 1/(q.Value+u.Plus), Plus: 1/(q.Value-u.Minus) - 1/q.Value, K: u.K}
	}
	return r
}

func reciprocal(x float64) float64 {
	if math.IsInf(x, 0) {
		return 0
	}
	return 1 / x
}

// ResistivityFromMass turns a mass resistivity (Ω·kg/m²) into ρ = ρ_m/δ with
// the density δ in kg/m³. The ± of the density is not carried: the printed
// mass resistivity is what was measured.
func ResistivityFromMass(q Quantity, density float64) Quantity {
	return scaled(q, Resistivity, 1/density)
}

// ResistivityFromSheet turns a sheet resistance (Ω per square) into
// ρ = R□·t with the thickness t in m.
func ResistivityFromSheet(q Quantity, thickness float64) Quantity {
	return scaled(q, Resistivity, thickness)
}

func scaled(q Quantity, k Kind, f float64) Quantity {
	r := q
	r.Kind, r.Value = k, float64(q.Value*f)
	if q.Limits != nil {
		r.Limits = &Limits{float64(q.Limits.Lower * f), float64(q.Limits.Upper * f)}
	}
	if u := q.Uncertainty; u != nil {
		r.Uncertainty = &Uncertainty{float64(u.Minus * f), float64(u.Plus * f), u.K}
	}
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
