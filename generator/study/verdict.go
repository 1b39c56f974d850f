package study

import (
	"math"

	"ohmfolio/generator/quantity"
)

// bound is what is required of one number: its magnitude must not exceed
// Limit (in the number's own unit).
type bound struct {
	name  string
	limit float64
}

// requireBounds reads the bounds of a comparison in the units of its numbers.
func (c *comparison) bounds() []bound {
	var list []bound
	node := c.in.Block.Get("require")
	for _, name := range []string{rankChange, rankBox} {
		if q, ok := node.Get(name).Quantity(); ok {
			list = append(list, bound{name, quantity.Round12(q.Value * 1e6)})
		}
	}
	return list
}

// require judges one material (definitions: verdicts). Without limits on the
// coefficients a bound can only hold on nominal values.
func (c *comparison) require(m *MaterialOutcome) {
	bounds := c.bounds()
	if len(bounds) == 0 {
		return
	}
	m.Verdict = Holds
	for _, b := range bounds {
		r := judgeMagnitude(b, m.Numbers[b.name])
		if m.Partly != "" && r.Verdict != Fails {
			r.Verdict = CannotBeTold
		}
		if at, ok := m.Numbers["greatest_at"]; ok && b.name == rankChange {
			r.AtC = at.Value
		}
		m.Requirements = append(m.Requirements, r)
		m.Verdict = worse(m.Verdict, r.Verdict)
		if r.Verdict != Holds {
			m.Reasons = append(m.Reasons, inWords(b.name)+" "+string(r.Verdict)+": "+m.Numbers[b.name].Text+" against "+quantity.Number(b.limit, 4)+" "+m.Numbers[b.name].Unit)
		}
	}
}

// judgeMagnitude holds |n| against a bound. margin = (limit − worst)/limit.
// A number fails for certain when even the best case is beyond the bound.
func judgeMagnitude(b bound, n Number) Requirement {
	r := Requirement{Name: b.name, Limit: b.limit, Verdict: CannotBeTold}
	worst, best, ok := magnitudes(n)
	if !ok {
		return r
	}
	r.Worst, r.Margin = number(worst), number((b.limit-worst)/b.limit)
	switch {
	case best > b.limit:
		r.Verdict = Fails
	case worst > b.limit:
	case n.Kind == "nominal":
		r.Verdict = HoldsNominally
	default:
		r.Verdict = Holds
	}
	return r
}

// magnitudes are the largest |n| that the limits allow, and the one that no
// curve within the limits stays under.
func magnitudes(n Number) (worst, best float64, ok bool) {
	if n.Value != nil {
		worst, best, ok = math.Abs(*n.Value), math.Abs(*n.Value), true
	}
	if n.Lower != nil && n.Upper != nil {
		worst, ok = math.Max(math.Abs(*n.Lower), math.Abs(*n.Upper)), true
		best = n.sure
	}
	return worst, best, ok
}

// severity orders verdicts from best to worst.
var severity = map[Verdict]int{Holds: 0, HoldsNominally: 1, CannotBeTold: 2, Fails: 3}

func worse(a, b Verdict) Verdict {
	if severity[b] > severity[a] {
		return b
	}
	return a
}
