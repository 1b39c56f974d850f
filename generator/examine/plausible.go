package examine

import (
	"fmt"
	"math"

	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// Plausible ranges, derived from the published tables in the reference data
// (conductor and alloy standards, wire tables, maker sheets). They catch
// slips of units, not unusual metals: every finding is a warning.
type span struct{ lo, hi float64 }

func (s span) has(x float64) bool { return x >= s.lo && x <= s.hi }

// familyResistivity is ρ near 20 °C in Ω·m that members of a family have.
var familyResistivity = map[material.Family]span{
	material.PureMetals:         {1.4e-8, 60e-8},
	material.StandardConductors: {1.5e-8, 4e-8},
	material.ConductorAlloys:    {1.6e-8, 40e-8},
	material.ResistanceAlloys:   {4.5e-8, 160e-8},
	material.HeaterAlloys:       {40e-8, 170e-8},
	material.ThermometerMetals:  {1.4e-8, 60e-8},
	material.StructuralAlloys:   {2.5e-8, 200e-8},
}

// slips are the mix-ups of the trade: the factor by which the written number
// is too large, and what was probably read as what.
var slips = []struct {
	factor float64
	text   string
}{
	{100, "×100: µΩ·m read as µΩ·cm?"}, {0.01, "×0.01: µΩ·cm read as µΩ·m, or Ω·mm²/m read as µΩ·cm?"},
	{10, "×10: nΩ·m read as µΩ·cm?"}, {0.1, "×0.1: µΩ·cm read as nΩ·m?"},
	{1000, "×1000: the µ printed as m?"}, {0.001, "×0.001: the m printed as µ?"},
	{6.0153, "×6.015: Ω·cmil/ft read as µΩ·cm?"}, {1 / 6.0153, "×0.166: µΩ·cm read as Ω·cmil/ft?"},
	{4 / math.Pi, "×4/π: square mil read as circular mil?"},
}

var resistivityUnlikely = Rule{
	Kind: place.Kind{
		Code: "resistivity-unlikely", Severity: place.Warning, Title: "The resistivity is outside what its family has",
		Explanation: "Wrong by a hundred is the usual slip (µΩ·m for µΩ·cm), then 10, 1000, 6.015 (circular mils per foot) and 4/π (square for circular mils). The finding names the slip that would put the value right.",
		Trigger:     record("name: X\nfamily: resistance alloys\nresistivity: 0.43 µΩ·cm\nreference_temperature: 20 °C\nsource: standard\n"),
		Mend:        "look at the unit in the source again",
	},
	Record: func(p *Pass, r *material.Record) {
		family, known := familyResistivity[r.Family]
		if !known {
			family = span{1.4e-8, 200e-8}
		}
		for _, s := range r.Sets {
			q := s.Resistivity
			if q == nil || !q.HasValue() || s.Reference < 250 || s.Reference > 350 || family.has(q.Value) {
				continue
			}
			p.findAt(r, s.Node.Get(s.WrittenAs), fmt.Sprintf("the resistivity %s is outside %s to %s µΩ·cm, which %s have",
				quote(q.Text), quantity.Number(family.lo*1e8, 3), quantity.Number(family.hi*1e8, 3), familyName(r.Family)), likelySlip(q.Value, family))
		}
	},
}

func familyName(f material.Family) string {
	if f == "" {
		return "metals and alloys"
	}
	return string(f)
}

// likelySlip names the first factor that brings the value into the family.
func likelySlip(x float64, family span) string {
	for _, s := range slips {
		if family.has(x * s.factor) {
			return s.text + " Look at the unit in the source again"
		}
	}
	return "look at the unit in the source again"
}

var coefficientTooLarge = Rule{
	Kind: place.Kind{
		Code: "coefficient-too-large", Severity: place.Error, Title: "α is larger than any metal has",
		Explanation: "Above 0.01 /K the unit is wrong: ppm/K or %/K written as /K.",
		Trigger:     record("name: X\nresistivity: 1.7241 µΩ·cm\nalpha: 0.393 /K\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 100 °C\nsource: standard\n"),
		Mend:        "was it %/K (0.393 %/K is copper's) or ppm/K?",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			if s.Alpha != nil && math.Abs(s.Alpha.Value) > 0.01 {
				p.findAt(r, s.Node.Get("alpha"), "α = "+quote(s.Alpha.Text)+" is larger than any metal has", p.rule.Kind.Mend)
			}
		}
	},
}

var coefficientUnlikely = Rule{
	Kind: place.Kind{
		Code: "coefficient-unlikely", Severity: place.Warning, Title: "α does not fit its family",
		Explanation: "Pure metals have 0.003 to 0.007 /K near 20 °C; low-TCR resistance alloys stay below 0.001 /K. 0.00218 is copper per °F.",
		Trigger:     record("name: X\nfamily: pure metals\nresistivity: 1.7 µΩ·cm\nalpha: 0.00218 /K\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 100 °C\nsource: standard\n"),
		Mend:        "look at the unit: per °F is 1/1.8 of per K; ppm/K is a millionth of /K",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			if s.Alpha == nil || !s.Alpha.HasValue() || math.Abs(s.Alpha.Value) > 0.01 {
				continue
			}
			if want, ok := alphaSpan(r.Family); ok && !want.has(s.Alpha.Value) {
				p.findAt(r, s.Node.Get("alpha"), fmt.Sprintf("α = %s is outside %s to %s /K, which %s have", quote(s.Alpha.Text),
					quantity.Number(want.lo, 3), quantity.Number(want.hi, 3), r.Family), alphaSlip(s.Alpha.Value, want))
			}
		}
	},
}

// alphaSpan is the α near 20 °C that members of a family have, in 1/K.
func alphaSpan(f material.Family) (span, bool) {
	switch f {
	case material.PureMetals, material.StandardConductors, material.ThermometerMetals:
		return span{0.003, 0.007}, true
	case material.ResistanceAlloys:
		return span{-0.0005, 0.0015}, true
	case material.HeaterAlloys:
		return span{-0.0005, 0.001}, true
	}
	return span{}, false
}

func alphaSlip(x float64, want span) string {
	if want.has(x * 1.8) {
		return "×1.8 would fit: was it per °F?"
	}
	return "look at the unit: per °F is 1/1.8 of per K; ppm/K is a millionth of /K"
}

// propertyRule makes a rule that holds one property against a span in SI.
func propertyRule(kind place.Kind, property string, want span, unit string, toUnit float64) Rule {
	return Rule{Kind: kind, Record: func(p *Pass, r *material.Record) {
		q := r.Property(property)
		if q == nil || !q.Value.HasValue() || want.has(q.Value.Value) {
			return
		}
		p.findAt(r, q.Node, fmt.Sprintf("%s %s is outside %s to %s %s, which metals have", kind.Title, quote(q.Value.Text),
			quantity.Number(want.lo*toUnit, 3), quantity.Number(want.hi*toUnit, 3), unit), kind.Mend)
	}}
}

var densityUnlikely = propertyRule(place.Kind{
	Code: "density-unlikely", Severity: place.Warning, Title: "the density",
	Explanation: "Metallic conductors lie between magnesium (1.74) and osmium (22.59 g/cm³); outside that the unit is wrong.",
	Trigger:     copper("properties:\n  density: {value: 889 g/cm³, source: standard}\n"),
	Mend:        "look at the unit: 8.9 g/cm³ is 8900 kg/m³",
}, "density", span{1700, 22700}, "g/cm³", 1e-3)

var expansionUnlikely = propertyRule(place.Kind{
	Code: "expansion-unlikely", Severity: place.Warning, Title: "the linear expansion",
	Explanation: "Metals expand by 0.5 to 30 ppm/K. A volume expansion is three times the linear one; per °F is 1/1.8.",
	Trigger:     copper("properties:\n  expansion: {value: 51e-6 /K, source: standard}\n"),
	Mend:        "is it the volume expansion, or per °F?",
}, "expansion", span{0.2e-6, 35e-6}, "ppm/K", 1e6)

var emfUnlikely = propertyRule(place.Kind{
	Code: "emf-unlikely", Severity: place.Warning, Title: "the thermal EMF to copper",
	Explanation: "Resistance alloys have less than 50 µV/K against copper; alloy minus copper, so copper-nickel is negative.",
	Trigger:     copper("properties:\n  emf_to_copper: {value: -4 mV/K, source: standard}\n"),
	Mend:        "look at the unit (µV/K) and at the sign: alloy minus copper",
}, "emf_to_copper", span{-60e-6, 60e-6}, "µV/K", 1e6)

// lorenz is the span of kρ/T near 293 K in W·Ω/K² by family: theory 2.443e-8;
// in alloys lattice conduction adds, so hardly ever below 2.2e-8.
func lorenz(f material.Family) span {
	switch f {
	case material.PureMetals, material.StandardConductors:
		return span{1.9e-8, 2.9e-8}
	case material.ThermometerMetals, material.ConductorAlloys:
		return span{1.9e-8, 3.6e-8}
	}
	return span{1.9e-8, 6.5e-8}
}

var thermalConductivityUnlikely = Rule{
	Kind: place.Kind{
		Code: "thermal-conductivity-unlikely", Severity: place.Warning, Title: "Thermal conductivity and resistivity do not fit each other",
		Explanation: "By Wiedemann and Franz k·ρ/T is near 2.44e-8 W·Ω/K² for pure metals and somewhat above for alloys. Far outside, one of the two is wrong or belongs to another material.",
		Trigger:     copper("properties:\n  thermal_conductivity: {value: 39.4 W/(m·K), source: standard}\n"),
		Mend:        "look at both values and their units again",
	},
	Record: func(p *Pass, r *material.Record) {
		k := r.Property("thermal_conductivity")
		if k == nil || !k.Value.HasValue() || r.Adopted == nil {
			return
		}
		t := quantity.ZeroCelsius + 20
		rho, ok := material.Reading{Told: r.Adopted.Rho}.At(t)
		if !ok {
			return
		}
		if l := k.Value.Value * rho / t; !lorenz(r.Family).has(l) {
			p.findAt(r, k.Node, fmt.Sprintf("k·ρ/T = %s W·Ω/K² is outside %s to %s", quantity.Number(l, 3),
				quantity.Number(lorenz(r.Family).lo, 3), quantity.Number(lorenz(r.Family).hi, 3)), p.rule.Kind.Mend)
		}
	},
}

var factorUnlikely = Rule{
	Kind: place.Kind{
		Code: "factor-unlikely", Severity: place.Warning, Title: "A heater alloy's factor is outside what such alloys have",
		Explanation: "Published factors R_T/R_20 of nickel-chromium and iron-chromium-aluminium alloys lie between 0.96 and 1.25 up to 1300 °C.",
		Trigger:     record("name: X\nfamily: heater alloys\nbasis: resistance\nreference_temperature: 20 °C\nresistivity: 109 µΩ·cm\ntable: {temperature: °C, resistance_ratio: 1, rows: [[20, 1], [100, 1.6]]}\nsource: standard\n"),
		Mend:        "look for a misprinted row",
	},
	Record: func(p *Pass, r *material.Record) {
		if r.Family != material.HeaterAlloys {
			return
		}
		for _, s := range r.Sets {
			if s.Table == nil || !s.Table.Ratio {
				continue
			}
			for i, y := range s.Table.Y {
				if y < 0.96 || y > 1.25 {
					p.findAt(r, rowNode(s, i), "the factor "+quantity.Number(y, 5)+" at "+quantity.CelsiusText(s.Table.T[i])+" is outside 0.96 to 1.25", p.rule.Kind.Mend)
				}
			}
		}
	},
}
