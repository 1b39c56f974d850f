package quantity

import (
	"math"
	"strings"
)

// Parse reads one quantity of kind k: a value with its unit and an optional
// ±, two values joined by the word to, or a one-sided bound. The unit as
// written is kept; the value is in SI.
func Parse(k Kind, text string) (Quantity, *Problem) {
	q, p := read(k, text)
	if p == nil && q.Limits != nil && q.Limits.Lower > q.Limits.Upper {
		s := scanner{text: text}
		p = s.problem(codeInverted, "the limits "+quote(text)+" begin above their end", "write the lower one first", 0, len(text))
	}
	if p != nil {
		return none(k, text), p
	}
	return q, nil
}

// ParseOneOf reads text as the first of the kinds that has its unit. When none
// has, the problem is that of the first kind, unless a later one knows more
// than that the unit is of another kind.
func ParseOneOf(text string, kinds ...Kind) (Quantity, *Problem) {
	var first *Problem
	for _, k := range kinds {
		q, p := Parse(k, text)
		if p == nil {
			return q, nil
		}
		if first == nil || (first.Code == codeOtherKind && p.Code != codeOtherKind) {
			first = p
		}
	}
	return Quantity{Text: text, Value: math.NaN()}, first
}

// ParseRange reads two values joined by the word to; a missing first unit is
// that of the second. Whether the first lies below the second is left to the
// rules about ranges, which know what the range is for.
func ParseRange(k Kind, text string) (lo, hi Quantity, p *Problem) {
	q, p := read(k, text)
	if p != nil {
		return none(k, text), none(k, text), p
	}
	if q.Limits == nil || q.HasValue() || math.IsInf(q.Limits.Lower, 0) || math.IsInf(q.Limits.Upper, 0) {
		s := scanner{text: text}
		return none(k, text), none(k, text), s.problem(codeRange, quote(text)+" is no range",
			"write two values joined by the word to: 0 °C to 100 °C", 0, len(text))
	}
	lo, hi = q, q
	lo.Value, hi.Value = q.Limits.Lower, q.Limits.Upper
	lo.Limits, hi.Limits = nil, nil
	return lo, hi, nil
}

func none(k Kind, text string) Quantity {
	return Quantity{Text: text, Kind: k, Value: math.NaN()}
}

func read(k Kind, text string) (Quantity, *Problem) {
	p := parser{scanner: scanner{text: text}, kind: k, q: none(k, text)}
	p.skipBlank()
	if problem := p.whole(); problem != nil {
		return p.q, problem
	}
	return p.q, p.physical()
}

type parser struct {
	scanner
	kind  Kind
	q     Quantity
	inner bool // reads what stands behind a comma
}

// whole reads the whole text in one of its forms.
func (p *parser) whole() *Problem {
	if sided, upper := p.bound(); sided {
		return p.oneSided(upper)
	}
	if p.standsPlusMinus() {
		return p.aroundNothing()
	}
	open := p.take("(")
	p.skipBlank()
	first, ok, problem := p.number()
	if problem != nil {
		return problem
	}
	if !ok {
		return p.noNumber()
	}
	p.skipBlank()
	if open {
		return p.bracketed(first)
	}
	unit, has, problem := p.unit()
	if problem != nil {
		return problem
	}
	p.skipBlank()
	if p.joined() {
		return p.rangeTo(first, unit, has)
	}
	return p.valued(first, unit, has)
}

func (p *parser) noNumber() *Problem {
	return p.problem(codeNotNumber, quote(p.text)+" does not begin with a number", "write for example "+example(p.kind), 0, len(p.text))
}

func example(k Kind) string {
	if us := Units(k); len(us) > 0 {
		return strings.TrimSpace("43 " + us[0].Symbol)
	}
	return "43"
}

// bound reads <=, ≤, <, at most, >=, ≥, >, at least, and tells whether the
// bound is an upper one.
func (p *parser) bound() (sided, upper bool) {
	switch {
	case p.take("<=", "≤", "<", "at most "):
		return true, true
	case p.take(">=", "≥", ">", "at least "):
		return true, false
	}
	return false, false
}

func (p *parser) oneSided(upper bool) *Problem {
	p.skipBlank()
	w, ok, problem := p.number()
	if problem != nil {
		return problem
	}
	if !ok {
		return p.noNumber()
	}
	p.skipBlank()
	unit, problem := p.needUnit()
	if problem != nil {
		return problem
	}
	p.written(w, unit)
	if upper {
		p.q.Limits = &Limits{math.Inf(-1), unit.ToSI(w.value)}
	} else {
		p.q.Limits = &Limits{unit.ToSI(w.value), math.Inf(1)}
	}
	return p.end()
}

// written keeps how a number was written.
func (p *parser) written(w written, unit Unit) {
	p.q.Unit, p.q.Digits, p.q.step = unit, w.digits, unit.difference(w.step)
	p.q.fine = p.q.step
}

func (p *parser) end() *Problem {
	p.skipBlank()
	if p.at < len(p.text) {
		return p.problem(codeTolerance, "after the value stands "+quote(p.rest())+", which is not understood",
			"write ± 5 %, ± 0.4 % (k=2), +8/-4 with the unit, or nothing", p.at, len(p.text))
	}
	return nil
}

// valued finishes a value: unit, then a tolerance or limits, with the unit
// possibly standing behind the tolerance ("5 ± 0.2 µΩ·cm").
func (p *parser) valued(w written, unit Unit, has bool) *Problem {
	t, problem := p.tolerance()
	if problem != nil {
		return problem
	}
	if !has && t != nil && t.has {
		if unit, has = FindUnit(p.kind, t.unit.Symbol); !has {
			return p.problem(codeNoUnit, quote(p.text)+" has no unit before its ±", "write both: 68 °F ± 4 Δ°F", 0, len(p.text))
		}
	}
	if !has {
		if unit, problem = p.bare(); problem != nil {
			return problem
		}
	}
	p.written(w, unit)
	p.q.Value = unit.ToSI(w.value)
	return p.tolerances(t, w)
}

// bracketed reads "(5 ± 0.2) µΩ·cm" after its first number.
func (p *parser) bracketed(w written) *Problem {
	t, problem := p.tolerance()
	if problem != nil {
		return problem
	}
	p.skipBlank()
	if t == nil || !p.take(")") {
		return p.problem(codeTolerance, quote(p.text)+" has a bracket that holds no ±", "write (5 ± 0.2) µΩ·cm", 0, len(p.text))
	}
	p.skipBlank()
	unit, problem := p.needUnit()
	if problem != nil {
		return problem
	}
	p.written(w, unit)
	p.q.Value = unit.ToSI(w.value)
	p.skipBlank()
	if k, ok, problem := p.coverage(); problem != nil {
		return problem
	} else if ok {
		t.k = k
	}
	return p.tolerances(t, w)
}

// joined takes what joins the ends of a range.
func (p *parser) joined() bool { return p.take("to ", "to\u00a0", "to\u202f", "…", "...") }

func (p *parser) rangeTo(first written, unit Unit, has bool) *Problem {
	p.skipBlank()
	second, ok, problem := p.number()
	if problem != nil {
		return problem
	}
	if !ok {
		return p.problem(codeRange, "after to no number stands in "+quote(p.text), "write two values and a unit: -40 to 85 °C", p.at, len(p.text))
	}
	p.skipBlank()
	last, hasLast, problem := p.unit()
	switch {
	case problem != nil:
		return problem
	case !hasLast && !has:
		if last, problem = p.bare(); problem != nil {
			return problem
		}
		unit = last
	case !hasLast:
		last = unit
	case !has:
		unit = last
	}
	p.written(second, last)
	p.q.Digits, p.q.step = max(first.digits, second.digits), math.Min(p.q.step, unit.difference(first.step))
	p.q.Limits = &Limits{unit.ToSI(first.value), last.ToSI(second.value)}
	return p.end()
}

// physical refuses what no unit allows.
func (p *parser) physical() *Problem {
	low := p.q.Value
	if l := p.q.Limits; l != nil {
		low = math.Min(l.Lower, l.Upper)
		if math.IsInf(l.Lower, 1) || math.IsInf(l.Upper, -1) || (math.IsInf(l.Lower, 0) && math.IsInf(l.Upper, 0)) {
			return p.tooLarge()
		}
	}
	if u := p.q.Uncertainty; u != nil && (math.IsInf(u.Plus, 0) || math.IsInf(u.Minus, 0)) || math.IsInf(p.q.Value, 0) {
		return p.tooLarge()
	}
	if p.kind == Temperature && low < -1e-9 && !math.IsInf(low, 0) {
		return p.problem(codeBelowZero, quote(p.text)+" lies below absolute zero", "look at the unit: kelvin or °C?", 0, len(p.text))
	}
	return nil
}

func (p *parser) tooLarge() *Problem {
	return p.problem(codeNotFinite, quote(p.text)+" is too large to be a value", "write the number that the source prints", 0, len(p.text))
}
