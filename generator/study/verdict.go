package study

import (
	"math"

	"ohmfolio/generator/quantity"
)

// judge holds the numbers against what is required (definitions: verdicts).
func (a *answer) judge() {
	if a.judged {
		return
	}
	a.judged = true
	require := a.w.block.Get("require")
	for i, name := range require.Keys() {
		bound, ok := require.List()[i].Quantity()
		if !ok {
			continue
		}
		r := a.requirement(name, bound)
		if a.Verdict == NotAsked {
			a.Verdict = Holds
		}
		a.Requirements = append(a.Requirements, r)
		a.Verdict = worse(a.Verdict, r.Verdict)
		if r.Verdict == Fails || r.Verdict == CannotBeTold || r.Verdict == HoldsNominally && a.w.out.Binding {
			a.reason(inWords(name) + " " + string(r.Verdict) + ": " + a.told(name) + " against " + bound.Text)
		}
	}
}

// condition adds a requirement that is no number: a status, a stock.
func (a *answer) condition(name, bound string, verdict Verdict, why string) {
	if a.Verdict == NotAsked {
		a.Verdict = Holds
	}
	a.Requirements = append(a.Requirements, Requirement{Name: name, Bound: bound, Verdict: verdict})
	a.Verdict = worse(a.Verdict, verdict)
	if verdict != Holds {
		a.reason(why)
	}
}

func (a *answer) told(name string) string {
	text := a.text(name)
	if text == "" {
		return "no value"
	}
	doc := a.w.kind.number(name)
	if doc.Unit == "" || doc.Unit == "ppm" {
		return text
	}
	return text + quantity.NarrowSpace + a.w.unit(doc).Symbol
}

func (a *answer) requirement(name string, bound quantity.Quantity) Requirement {
	doc := a.w.kind.number(name)
	s, known := a.spans[name]
	r := judged(doc, bound, s, known)
	if a.Partly != "" && r.Verdict != Fails {
		r.Verdict = CannotBeTold
	}
	if at, ok := a.at[name]; ok && known {
		r.AtC = number(at - quantity.ZeroCelsius)
	}
	return r
}

// judged holds one number against one bound. A plain value bounds the
// magnitude; limits bound the value itself. Of two bounds the tighter one is
// told. It fails for certain when even the best case is beyond the bound.
func judged(doc *NumberDoc, bound quantity.Quantity, s span, known bool) Requirement {
	lower, upper := math.Inf(-1), math.Inf(1)
	if bound.Limits != nil {
		lower, upper = bound.Limits.Lower, bound.Limits.Upper
	} else {
		upper = math.Abs(bound.Value)
		s = s.magnitude()
	}
	u := doc.unit()
	in := func(si float64) float64 { return quantity.Round12(u.FromSI(si)) }
	r := Requirement{Name: doc.Name, Unit: u.Symbol, Bound: bound.Text, Verdict: CannotBeTold, Limit: in(upper)}
	if math.IsInf(upper, 1) {
		r.Limit = in(lower)
	}
	if !known {
		return r
	}
	margin := math.Inf(1)
	verdict := Holds
	take := func(limit, worst, m float64, beyond, sureBeyond bool) {
		if m < margin {
			margin, r.Limit, r.Worst, r.Margin = m, limit, number(worst), number(m)
		}
		switch {
		case sureBeyond:
			verdict = worse(verdict, Fails)
		case beyond:
			verdict = worse(verdict, CannotBeTold)
		case !s.banded:
			verdict = worse(verdict, HoldsNominally)
		}
	}
	if !math.IsInf(upper, 1) {
		limit, worst, best := in(upper), in(s.hi), in(s.lo)
		take(limit, worst, (limit-worst)/math.Abs(limit), worst > limit, best > limit)
	}
	if !math.IsInf(lower, -1) {
		limit, worst, best := in(lower), in(s.lo), in(s.hi)
		take(limit, worst, (worst-limit)/math.Abs(limit), worst < limit, best < limit)
	}
	r.Verdict = verdict
	return r
}

// severity orders verdicts from best to worst.
var severity = map[Verdict]int{Holds: 0, HoldsNominally: 1, CannotBeTold: 2, Fails: 3}

func worse(a, b Verdict) Verdict {
	if severity[b] > severity[a] {
		return b
	}
	return a
}
