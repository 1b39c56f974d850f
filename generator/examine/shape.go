package examine

import (
	"fmt"
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

func rowNode(s *material.DataSet, i int) *form.Node {
	rows := s.Node.Get("table").Get("rows").List()
	if i < len(rows) {
		return rows[i]
	}
	return s.Node.Get("table")
}

var referenceOutsideRange = Rule{
	Kind: place.Kind{
		Code: "reference-outside-range", Severity: place.Error, Title: "The reference temperature lies outside the valid range",
		Explanation: "A curve is told about its reference temperature; outside the valid range there is no value to refer to.",
		Trigger:     record("name: X\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 40 °C to 60 °C\nsource: standard\n"),
		Mend:        "widen the valid range if the source covers it, or re-reference the values",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			if !math.IsNaN(s.Reference) && !s.Valid.Contains(s.Reference) {
				p.findAt(r, s.Node.Get("reference_temperature"), "the reference temperature "+quantity.CelsiusText(s.Reference)+
					" lies outside the valid range "+windowText(s.Valid), p.rule.Kind.Mend)
			}
		}
	},
}

func windowText(w material.Window) string {
	return quantity.CelsiusText(w.Lo) + " to " + quantity.CelsiusText(w.Hi)
}

var referenceUnusual = Rule{
	Kind: place.Kind{
		Code: "reference-unusual", Severity: place.Warning, Title: "An unusual reference temperature",
		Explanation: "The trade uses 0, 20 (standards), 23 (JIS), 25 (wire and component tests) and 27 °C (simulators). Another one is often a slip.",
		Trigger:     record("name: X\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nbasis: resistance\nreference_temperature: 22 °C\nvalid_range: 0 °C to 60 °C\nsource: standard\n"),
		Mend:        "look at the source again; a rare temperature may stand",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			// A chord is counted from wherever its source says.
			if s.Model != material.ChordModel && !math.IsNaN(s.Reference) && !usualReference(s.Reference) {
				p.findAt(r, s.Node.Get("reference_temperature"), "the reference temperature "+quantity.CelsiusText(s.Reference)+
					" is none of the usual 0, 20, 23, 25 and 27\u202f°C", p.rule.Kind.Mend)
			}
		}
	},
}

func usualReference(t float64) bool {
	for _, c := range []float64{0, 20, 21, 23, 25, 27} {
		if math.Abs(t-quantity.ZeroCelsius-c) < 0.01 {
			return true
		}
	}
	return math.Abs(t-293) < 0.2 || math.Abs(t-300) < 0.2 || math.Abs(t-298) < 0.2
}

var rangeTooWideForLine = Rule{
	Kind: place.Kind{
		Code: "straight-line-too-far", Severity: place.Warning, Title: "A straight line over a wide range",
		Explanation: "α alone describes a straight line. Far from the reference temperature no metal follows it: tungsten at 3000 °C has a third more than the line says.",
		Trigger:     record("name: X\nresistivity: 5.5 µΩ·cm\nalpha: 4.4e-3 /K\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 20 °C to 3000 °C\nsource: standard\n"),
		Mend:        "narrow the valid range, add β and γ, or give the table",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			far := math.Max(s.Valid.Hi-s.Reference, s.Reference-s.Valid.Lo)
			if s.Model == material.PolynomialModel && s.Beta == nil && s.Gamma == nil && far > 200 {
				p.findAt(r, s.Node.Get("valid_range"), fmt.Sprintf("data set %s draws a straight line as far as %.0f K from its reference temperature", s.Name, far), p.rule.Kind.Mend)
			}
		}
	},
}

var turningPointHidden = Rule{
	Kind: place.Kind{
		Code: "turning-point-inside", Severity: place.Note, Title: "The curve turns inside the valid range",
		Explanation: "R rises and falls again within the range, so α alone hides most of what the curve does. Judge such an alloy by its change over the window.",
		Trigger:     record("name: X\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nbeta: -0.5 ppm/K²\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 80 °C\nsource: standard\n"),
		Mend:        "nothing to mend: state the change over the window wherever α is quoted",
	},
	Record: func(p *Pass, r *material.Record) {
		s := r.Adopted
		if s == nil || s.Model != material.PolynomialModel || !s.Ratio.HasNominal() {
			return
		}
		for _, t := range s.Ratio.Nominal.TurningPoints() {
			p.findAt(r, s.Node.Get("alpha"), "the curve turns at "+quantity.CelsiusText(t.T)+", inside the valid range; α alone hides it", p.rule.Kind.Mend)
		}
	},
}

var betaUnlikely = Rule{
	Kind: place.Kind{
		Code: "beta-unlikely", Severity: place.Warning, Title: "β does not fit a copper-manganese alloy",
		Explanation: "Copper-manganese resistance alloys are downward parabolas: β lies between −1 and 0 ppm/K². A missing β lets a low α look perfect far away; a positive one is a slip of sign.",
		Trigger:     record("name: X\nfamily: resistance alloys\ncomposition: {Cu: balance, Mn: 12 %}\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nbeta: 0.5 ppm/K²\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nsource: standard\n"),
		Mend:        "look for β in the source; its unit is ppm/K² and its sign minus",
	},
	Record: func(p *Pass, r *material.Record) {
		if r.Family != material.ResistanceAlloys || !hasElements(r, "Cu", "Mn") || startsWith(r, "Ni") {
			return
		}
		for _, s := range r.Sets {
			if s.Alpha == nil || s.Model != material.PolynomialModel {
				continue
			}
			switch {
			case s.Beta == nil && s.Valid.Hi-s.Valid.Lo > 40:
				p.findAt(r, s.Node.Get("alpha"), s.Label()+" has no β over a range of more than 40 K", p.rule.Kind.Mend)
			case s.Beta != nil && s.Beta.HasValue() && (s.Beta.Value > 0 || s.Beta.Value < -1.2e-6):
				p.findAt(r, s.Node.Get("beta"), "β = "+quote(s.Beta.Text)+" does not fit a copper-manganese alloy", p.rule.Kind.Mend)
			}
		}
	},
}

// hasElements tells whether the composition names all of the elements, with
// more than a trace of manganese.
func hasElements(r *material.Record, elements ...string) bool {
	for _, e := range elements {
		found := false
		for _, c := range r.Composition {
			found = found || (c.Key == e && leading(c.Text) >= 5)
		}
		if !found {
			return false
		}
	}
	return true
}

// leading is the first number in text; "balance" counts as the rest.
func leading(text string) float64 {
	var x float64
	if _, err := fmt.Sscanf(text, "%g", &x); err != nil {
		return 100
	}
	return x
}

func startsWith(r *material.Record, element string) bool {
	return len(r.Composition) > 0 && r.Composition[0].Key == element
}

var alphaConductivityMismatch = Rule{
	Kind: place.Kind{
		Code: "alpha-conductivity-mismatch", Severity: place.Warning, Title: "α does not fit the conductivity",
		Explanation: "For copper α at 20 °C is proportional to conductivity: 0.00393 × (% IACS/100) (NBS Handbook 100); for conductor aluminium 0.00403 × (conductivity/61 % IACS). A hard-drawn or alloyed conductor with the annealed α is a pair of values that no piece has.",
		Trigger:     record("name: Copper, hard drawn\nfamily: standard conductors\nresistivity: 1.777 µΩ·cm\nalpha: 4.2e-3 /K\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 100 °C\nsource: standard\n"),
		Mend:        "take α and ρ of the same condition from the same source",
	},
	Record: func(p *Pass, r *material.Record) {
		if r.Family != material.StandardConductors {
			return
		}
		for _, s := range r.Sets {
			if s.Alpha == nil || s.Resistivity == nil || !s.Alpha.HasValue() || !s.Resistivity.HasValue() || s.Basis != material.Resistance {
				continue
			}
			poly, ok := s.Polynomial()
			if !ok {
				continue
			}
			at20 := poly.Rereference(quantity.ZeroCelsius + 20)
			want := expectedAlpha(at20.Y0)
			if want > 0 && math.Abs(at20.Alpha/want-1) > 0.02 {
				p.findAt(r, s.Node.Get("alpha"), fmt.Sprintf("α at 20 °C is %s /K; the conductivity makes it about %s /K",
					quantity.Number(at20.Alpha, 4), quantity.Number(want, 4)), p.rule.Kind.Mend)
			}
		}
	},
}

// expectedAlpha is α at 20 °C from ρ at 20 °C (Ω·m) for copper and conductor
// aluminium, 0 for anything else.
func expectedAlpha(rho float64) float64 {
	const iacs = 1.0 / 58e6
	switch {
	case rho > 1.6e-8 && rho < 2.1e-8:
		return 0.00393 * iacs / rho
	case rho > 2.6e-8 && rho < 3.1e-8:
		return 0.00403 * 2.8264e-8 / rho
	}
	return 0
}

var classCopiedIntoAlpha = Rule{
	Kind: place.Kind{
		Code: "class-copied-into-alpha", Severity: place.Warning, Title: "A TCR class seems to be copied into α",
		Explanation: "A figure such as ±20 ppm/K is a limit of a measure over a window, never a coefficient. As α it would draw a straight line that no lot follows.",
		Trigger:     record("name: X\nfamily: resistance alloys\nresistivity: 43 µΩ·cm\nalpha: 20 ppm/K\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nsource: standard\ntcr_limits: [{measure: box, window: 20 °C to 60 °C, from: -20 ppm/K, to: 20 ppm/K, source: standard}]\n"),
		Mend:        "keep the figure under tcr_limits, and give α only where a source states the coefficient",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			if s.Alpha == nil || !s.Alpha.HasValue() || s.Alpha.Value == 0 {
				continue
			}
			for _, l := range r.TCRLimits {
				if l.From.HasValue() && l.To.HasValue() && l.From.Value == -l.To.Value && math.Abs(s.Alpha.Value) == l.To.Value {
					p.findAt(r, s.Node.Get("alpha"), "α = "+quote(s.Alpha.Text)+" is the figure of the class ±"+quantity.PPMText(l.To.Value)+"\u202fppm/K", p.rule.Kind.Mend)
				}
			}
		}
	},
}

var coefficientTableDisagree = Rule{
	Kind: place.Kind{
		Code: "coefficient-table-disagree", Severity: place.Warning, Title: "A coefficient and a table of the same record disagree",
		Explanation: "The slope of the table at the reference temperature and the stated α differ by more than a tenth, and by more than 10 ppm/K: one of them is of another condition, basis or material.",
		Trigger: record("name: X\nadopt: line\ndata_sets:\n  line: {source: standard, basis: resistance, resistivity: 10 µΩ·cm, alpha: 2e-3 /K, reference_temperature: 20 °C, valid_range: 0 °C to 100 °C}\n" +
			"  factors: {source: standard, basis: resistance, resistivity: 10 µΩ·cm, reference_temperature: 20 °C, table: {temperature: °C, resistance_ratio: 1, rows: [[0, 0.92], [20, 1], [100, 1.32]], interpolate: linear}}\n"),
		Mend: "look at the condition and basis of both",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			if s.Alpha == nil || !s.Alpha.HasValue() {
				continue
			}
			for _, t := range r.Sets {
				if t.Table != nil && t.Ratio.HasNominal() {
					compareSlope(p, r, s, t)
				}
			}
		}
	},
}

func compareSlope(p *Pass, r *material.Record, s, t *material.DataSet) {
	m, err := curve.Measure(t.Ratio.Nominal, s.Reference, math.Max(t.Valid.Lo, s.Valid.Lo), math.Min(t.Valid.Hi, s.Valid.Hi))
	if err != nil {
		return
	}
	d := math.Abs(m.SlopeAtReference - s.Alpha.Value)
	if d > 0.1*math.Abs(s.Alpha.Value) && d > 10e-6 {
		p.findAt(r, s.Node.Get("alpha"), fmt.Sprintf("α of %s is %s; the table of %s has a slope of %s ppm/K at %s", s.Name, quote(s.Alpha.Text),
			t.Name, quantity.PPMText(m.SlopeAtReference), quantity.CelsiusText(s.Reference)), p.rule.Kind.Mend)
	}
}
