package quantity

import (
	"math"
	"strings"
)

// Parse reads one quantity of kind k: a value with its unit and an optional
// ±, a range, or a one-sided bound. The unit as written is kept; the value is
// in SI.
func Parse(k Kind, text string) (Quantity, *Problem) {
	p := parser{scanner: scanner{text: text}, kind: k, q: Quantity{Text: text, Kind: k, Value: math.NaN()}}
	p.skipBlank()
	if problem := p.whole(); problem != nil {
		return Quantity{Text: text, Kind: k, Value: math.NaN()}, problem
	}
	if problem := p.physical(); problem != nil {
		return Quantity{Text: text, Kind: k, Value: math.NaN()}, problem
	}
	return p.q, nil
}

// ParseOneOf reads text as the first of the kinds that has its unit.
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
// that of the second.
func ParseRange(k Kind, text string) (lo, hi Quantity, p *Problem) {
	q, p := Parse(k, text)
	if p != nil {
		return lo, hi, p
	}
	if q.Limits == nil || q.HasValue() || math.IsInf(q.Limits.Lower, 0) || math.IsInf(q.Limits.Upper, 0) {
		s := scanner{text: text}
		return lo, hi, s.problem(codeRange, quote(text)+" is no range", "write two values joined by the word to: 0 °C to 100 °C", 0, len(text))
	}
	lo, hi = q, q
	lo.Value, hi.Value = q.Limits.Lower, q.Limits.Upper
	lo.Limits, hi.Limits = nil, nil
	return lo, hi, nil
}

type parser struct {
	scanner
	kind Kind
	q    Quantity
}

// whole reads the whole text in one of its three forms.
func (p *parser) whole() *Problem {
	if sided, upper := p.bound(); sided {
		return p.oneSided(upper)
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
	unit, problem := p.unit()
	if problem != nil {
		return problem
	}
	p.skipBlank()
	if p.take("to ", "to\u00a0", "… ", "…") {
		return p.rangeTo(first, unit)
	}
	return p.valued(first, unit)
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

// bound reads <=, ≤, <, >=, ≥, > and tells whether the bound is an upper one.
func (p *parser) bound() (sided, upper bool) {
	switch {
	case p.take("<=", "≤", "<"):
		return true, true
	case p.take(">=", "≥", ">"):
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
	p.q.Unit, p.q.Digits = unit, w.digits
	if upper {
		p.q.Limits = &Limits{math.Inf(-1), unit.ToSI(w.value)}
	} else {
		p.q.Limits = &Limits{unit.ToSI(w.value), math.Inf(1)}
	}
	return p.end()
}

func (p *parser) end() *Problem {
	p.skipBlank()
	if p.at < len(p.text) {
		return p.problem(codeTolerance, "after the value stands "+quote(p.rest())+", which is not understood",
			"write ± 5 %, ± 0.4 % (k=2), +8/-4 with the unit, or nothing", p.at, len(p.text))
	}
	return nil
}

// unit reads the unit that stands here, nil when none does.
func (p *parser) unit() (*Unit, *Problem) {
	start := p.at
	end := p.unitEnd()
	spelled := strings.TrimRight(p.text[start:end], " \u00a0\u202f\u2009")
	if spelled == "" {
		return nil, nil
	}
	u, ok := FindUnit(p.kind, spelled)
	if !ok {
		return nil, p.wrongUnit(spelled, start)
	}
	p.at = end
	return &u, nil
}

// unitEnd finds where a unit that begins here ends: before a ±, a sign with a
// digit, the word to, or a bracket with k.
func (p *parser) unitEnd() int {
	text := p.text
	for i := p.at; i < len(text); i++ {
		switch c := text[i]; {
		case c == ' ' && (strings.HasPrefix(text[i:], " to ") || isCoverage(text[i+1:])):
			return i
		case i == p.at && strings.HasPrefix(text[i:], "to "):
			return i
		case c == '+' && i+1 < len(text):
			return i
		case isCoverage(text[i:]):
			return i
		case strings.HasPrefix(text[i:], "±"), strings.HasPrefix(text[i:], "…"):
			return i
		}
	}
	return len(text)
}

func (p *parser) needUnit() (Unit, *Problem) {
	u, problem := p.unit()
	if problem != nil {
		return Unit{}, problem
	}
	if u == nil {
		return p.bare()
	}
	return *u, nil
}

// bare is the unit of a number without one: right for a ratio only.
func (p *parser) bare() (Unit, *Problem) {
	if p.kind == Ratio {
		u, _ := FindUnit(Ratio, "1")
		return u, nil
	}
	return Unit{}, p.problem(codeNoUnit, quote(p.text)+" has no unit; a "+string(p.kind)+" is asked for",
		"write the unit that the source prints, for example "+NearUnit(p.kind, ""), 0, len(p.text))
}

func (p *parser) wrongUnit(spelled string, start int) *Problem {
	end := start + len(spelled)
	if kinds := KindsOf(spelled); len(kinds) > 0 {
		return p.problem(codeOtherKind, quote(spelled)+" is a unit of "+string(kinds[0])+"; a "+string(p.kind)+" is asked for",
			"write it in "+NearUnit(p.kind, spelled), start, end)
	}
	if strings.ContainsRune(spelled, ',') {
		return p.problem(codeComma, "a comma stands in "+quote(p.text), "write a decimal point, and one value only", start, end)
	}
	return p.problem(codeUnit, quote(spelled)+" is no unit of "+string(p.kind)+" that is known", "write it in "+NearUnit(p.kind, spelled), start, end)
}

// valued finishes a value: unit, then an optional tolerance, with the unit
// possibly standing behind the tolerance ("5 ± 0.2 µΩ·cm").
func (p *parser) valued(w written, unit *Unit) *Problem {
	t, problem := p.tolerance()
	if problem != nil {
		return problem
	}
	if unit == nil && t != nil && t.unit != nil {
		unit = t.unit
	}
	if unit == nil {
		u, problem := p.bare()
		if problem != nil {
			return problem
		}
		unit = &u
	}
	p.q.Unit, p.q.Digits, p.q.Value = *unit, w.digits, unit.ToSI(w.value)
	if t != nil {
		if problem := p.apply(t, w); problem != nil {
			return problem
		}
	}
	return p.end()
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
	p.q.Unit, p.q.Digits, p.q.Value = unit, w.digits, unit.ToSI(w.value)
	p.skipBlank()
	if k, ok, problem := p.coverage(); problem != nil {
		return problem
	} else if ok {
		t.k = k
	}
	if problem := p.apply(t, w); problem != nil {
		return problem
	}
	return p.end()
}

func (p *parser) rangeTo(first written, unit *Unit) *Problem {
	p.skipBlank()
	second, ok, problem := p.number()
	if problem != nil {
		return problem
	}
	if !ok {
		return p.problem(codeRange, "after to no number stands in "+quote(p.text), "write two values and a unit: -40 to 85 °C", p.at, len(p.text))
	}
	p.skipBlank()
	last, problem := p.unit()
	if problem != nil {
		return problem
	}
	switch {
	case last == nil && unit == nil:
		u, problem := p.bare()
		if problem != nil {
			return problem
		}
		last, unit = &u, &u
	case last == nil:
		last = unit
	case unit == nil:
		unit = last
	}
	p.q.Unit, p.q.Digits = *last, max(first.digits, second.digits)
	p.q.Limits = &Limits{unit.ToSI(first.value), last.ToSI(second.value)}
	return p.end()
}

// physical refuses what no unit allows.
func (p *parser) physical() *Problem {
	if p.kind != Temperature {
		return nil
	}
	low := p.q.Value
	if p.q.Limits != nil {
		low = math.Min(p.q.Limits.Lower, p.q.Limits.Upper)
	}
	if low < -1e-9 && !math.IsInf(low, 0) {
		return p.problem(codeBelowZero, quote(p.text)+" lies below absolute zero", "look at the unit: kelvin or °C?", 0, len(p.text))
	}
	return nil
}
