package examine

import (
	"fmt"
	"math"

	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
	"ohmfolio/generator/statement"
)

var dataSetsDisagree = Rule{
	Kind: place.Kind{
		Code: "data-sets-disagree", Severity: place.Warning, Title: "Two data sets disagree beyond their stated limits",
		Explanation: "The limits of the adopted set and of another one do not meet at some temperature that both cover. They may be of different conditions; then the record should say so.",
		Trigger: record("name: X\nadopt: a\ndata_sets:\n  a: {source: standard, basis: resistance, resistivity: 43 µΩ·cm ± 2 %, alpha: 10 ppm/K, reference_temperature: 20 °C, valid_range: 0 °C to 100 °C}\n" +
			"  b: {source: standard, basis: resistance, resistivity: 47 µΩ·cm ± 2 %, alpha: 10 ppm/K, reference_temperature: 20 °C, valid_range: 0 °C to 100 °C}\n"),
		Mend: "say in condition what tells them apart, or split the record",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			if s != r.Adopted && r.Adopted != nil {
				compareLimits(p, r, r.Adopted, s)
			}
		}
	},
}

func compareLimits(p *Pass, r *material.Record, a, s *material.DataSet) {
	if a.Condition != "" && s.Condition != "" && a.Condition != s.Condition {
		return
	}
	lo, hi := math.Max(a.Valid.Lo, s.Valid.Lo), math.Min(a.Valid.Hi, s.Valid.Hi)
	for i := 0; i <= 4 && lo <= hi; i++ {
		t := lo + float64((hi-lo)*float64(i)/4)
		x, okA := material.Reading{Told: a.Rho}.Limits(t)
		y, okS := material.Reading{Told: s.Rho}.Limits(t)
		if okA && okS && (x.Upper < y.Lower || y.Upper < x.Lower) {
			p.findAt(r, s.Node, fmt.Sprintf("at %s data set %s lies between %s and %s µΩ·cm, the adopted %s between %s and %s", quantity.CelsiusText(t),
				s.Name, micro(y.Lower), micro(y.Upper), a.Name, micro(x.Lower), micro(x.Upper)), p.rule.Kind.Mend)
			return
		}
	}
}

func micro(rho float64) string { return quantity.Number(rho*1e8, 4) }

var classFigureBroken = Rule{
	Kind: place.Kind{
		Code: "class-figure-broken", Severity: place.Warning, Title: "The curve breaks its own class figure",
		Explanation: "The adopted curve, by the same measure over the same window, lies outside the limit that the record quotes.",
		Trigger:     record("name: X\nfamily: resistance alloys\nresistivity: 43 µΩ·cm\nalpha: 40 ppm/K\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nsource: standard\ntcr_limits: [{measure: box, window: 20 °C to 60 °C, from: -20 ppm/K, to: 20 ppm/K, source: standard}]\n"),
		Mend:        "look at the coefficient, or at the class that the material is said to have",
	},
	Record: func(p *Pass, r *material.Record) {
		if r.Adopted == nil || !r.Adopted.Ratio.HasNominal() {
			return
		}
		for _, l := range r.TCRLimits {
			values, err := statement.ClassMeasure(r.Adopted, l)
			if err != nil {
				continue
			}
			for _, v := range values {
				if v < l.From.Value-1e-12 || v > l.To.Value+1e-12 {
					p.findAt(r, l.Node, fmt.Sprintf("the curve's %s is %s ppm/K, outside %s to %s", l.Measure, quantity.PPMText(v),
						quantity.PPMText(l.From.Value), quantity.PPMText(l.To.Value)), p.rule.Kind.Mend)
					break
				}
			}
		}
	},
}
