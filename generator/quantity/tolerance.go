package quantity

import (
	"math"
	"strings"
)

// tolerance is a ± as written: plus and minus magnitudes, relative when in %
// of the value, with a coverage factor when it is an uncertainty.
type tolerance struct {
	plus, minus       float64
	relPlus, relMinus bool
	unit              Unit // of the magnitudes
	has               bool // whether a unit is written
	step              float64
	k                 float64
	start, end        int
}

// tolerance reads "± x [unit|%] [(k=2)]" or "+a/-b [unit|%] [(k=2)]"; nil
// when none stands here.
func (p *parser) tolerance() (*tolerance, *Problem) {
	p.skipBlank()
	start := p.at
	var read func(*tolerance) *Problem
	switch {
	case p.plusMinus():
		read = p.symmetric
	case strings.HasPrefix(p.rest(), "+"):
		read = p.asymmetric
	default:
		return nil, nil
	}
	t := &tolerance{start: start, step: math.Inf(1)}
	if problem := read(t); problem != nil {
		return nil, problem
	}
	t.end = p.at
	p.skipBlank()
	var problem *Problem
	t.k, _, problem = p.coverage()
	return t, problem
}

// plusMinus takes a ±.
func (p *parser) plusMinus() bool { return p.take("±", "+/-", "+-", "+/−", "+−") }

func (p *parser) symmetric(t *tolerance) *Problem {
	x, rel, problem := p.magnitude(t)
	t.plus, t.minus, t.relPlus, t.relMinus = x, x, rel, rel
	return problem
}

func (p *parser) asymmetric(t *tolerance) *Problem {
	p.take("+")
	x, rel, problem := p.magnitude(t)
	if problem != nil {
		return problem
	}
	t.plus, t.relPlus = x, rel
	hadUnit := t.has
	p.skipBlank()
	if !p.take("/") {
		return p.badTolerance(t.start)
	}
	p.skipBlank()
	if !p.take("-", "−") {
		return p.badTolerance(t.start)
	}
	y, relY, problem := p.magnitude(t)
	if problem != nil {
		return problem
	}
	t.minus, t.relMinus = y, relY
	if relY && !rel && !hadUnit {
		t.plus, t.relPlus = t.plus/100, true // "+1/-2 %": the unit stands once
	}
	return nil
}

func (p *parser) badTolerance(start int) *Problem {
	return p.problem(codeTolerance, "the ± in "+quote(p.text)+" is not understood",
		"write ± 5 %, or ± 0.4 % (k=2), or +8/-4 with the unit", start, len(p.text))
}

// magnitude reads a number without a sign, with % or a unit. Two magnitudes of
// one tolerance have one unit.
func (p *parser) magnitude(t *tolerance) (x float64, relative bool, problem *Problem) {
	p.skipBlank()
	w, ok, problem := p.number()
	if problem != nil {
		return 0, false, problem
	}
	if !ok || math.Signbit(w.value) {
		return 0, false, p.badTolerance(t.start)
	}
	t.step = math.Min(t.step, w.step)
	p.skipBlank()
	if p.kind != Ratio && p.percent() {
		return w.value / 100, true, nil
	}
	start, end := p.at, p.magnitudeEnd()
	spelled := strings.TrimRight(p.text[start:end], blanks)
	if spelled == "" {
		return w.value, false, nil
	}
	u, problem := p.differenceUnit(spelled, start)
	if problem != nil {
		return 0, false, problem
	}
	if t.has && t.unit != u {
		return 0, false, p.badTolerance(t.start)
	}
	p.at, t.unit, t.has = end, u, true
	return w.value, false, nil
}

// differenceUnit finds the unit of a ±. A ± on a temperature is a difference
// and nothing else, so that 2 °C and 2 K say the same here.
func (p *parser) differenceUnit(spelled string, start int) (Unit, *Problem) {
	if p.kind == Temperature {
		if u, ok := FindUnit(TemperatureDifference, spelled); ok {
			return u, nil
		}
	}
	if u, ok := FindUnit(p.kind, spelled); ok {
		return u, nil
	}
	return Unit{}, p.wrongUnit(spelled, start)
}

// percent takes a % that stands alone (not %/K or %IACS).
func (p *parser) percent() bool {
	if !strings.HasPrefix(p.rest(), "%") {
		return false
	}
	after := strings.TrimLeft(p.rest()[1:], blanks)
	if strings.HasPrefix(after, "/") {
		minus := strings.TrimLeft(after[1:], blanks)
		if !strings.HasPrefix(minus, "-") && !strings.HasPrefix(minus, "−") {
			return false
		}
	}
	if strings.HasPrefix(after, "IACS") {
		return false
	}
	p.at++
	return true
}

func (p *parser) magnitudeEnd() int {
	text := p.text
	for i := p.at; i < len(text); i++ {
		switch rest := text[i:]; {
		case rest[0] == ')', rest[0] == '+', strings.HasPrefix(rest, "±"), isCoverage(rest):
			return i
		case strings.HasPrefix(rest, "/-"), strings.HasPrefix(rest, "/−"), strings.HasPrefix(rest, "/ -"), strings.HasPrefix(rest, "/ −"):
			return i
		}
		if text[i] == '(' { // a bracket of the unit: W/(m·K)
			if closed := strings.IndexByte(text[i:], ')'); closed > 0 {
				i += closed
			}
		}
	}
	return len(text)
}

// isCoverage tells whether "(k=" begins here, and not a bracket of a unit such
// as J/(kg·K).
func isCoverage(s string) bool {
	return strings.HasPrefix(s, "(k=") || strings.HasPrefix(s, "(k =")
}

// coverage reads "(k=2)"; k is 0 when it does not stand here.
func (p *parser) coverage() (k float64, ok bool, problem *Problem) {
	start := p.at
	if !isCoverage(p.rest()) {
		return 0, false, nil
	}
	p.take("(k=", "(k =")
	p.skipBlank()
	w, found, problem := p.number()
	if problem != nil {
		return 0, false, problem
	}
	if !found || w.value <= 0 || !p.take(")") {
		return 0, false, p.badTolerance(start)
	}
	return w.value, true, nil
}

// tolerances applies a first tolerance and reads a second one: a limit and an
// uncertainty may both stand on one value, but not two of a kind.
func (p *parser) tolerances(t *tolerance, w written) *Problem {
	for t != nil {
		if (t.k > 0 && p.q.Uncertainty != nil) || (t.k == 0 && p.q.Limits != nil) {
			return p.problem(codeTolerance, quote(p.text)+" has two ± of one kind", "give one limit, and one uncertainty with (k=2)", t.start, t.end)
		}
		problem := p.apply(t, w)
		if problem == nil {
			t, problem = p.tolerance()
		}
		if problem != nil {
			return problem
		}
	}
	if p.skipBlank(); p.q.Limits == nil && !p.inner && p.take(",") {
		return p.statedLimits()
	}
	return p.end()
}

// apply turns the tolerance into limits or, with k, into an uncertainty.
func (p *parser) apply(t *tolerance, w written) *Problem {
	relative := t.relPlus || t.relMinus
	if relative && p.kind == Temperature {
		return p.problem(codeDifference, "a ± in % of a temperature depends on its zero: "+quote(p.text), "write the ± as a difference: 20 °C ± 2 K", t.start, t.end)
	}
	if relative && w.value == 0 {
		return p.problem(codeOnZero, "a ± in % of zero says nothing: "+quote(p.text), "write the ± in the unit of the value", t.start, t.end)
	}
	plus, minus := p.inSI(t.plus, t.relPlus, t), p.inSI(t.minus, t.relMinus, t)
	if !relative {
		p.q.fine = math.Min(p.q.fine, p.inSI(t.step, false, t))
	}
	if t.k > 0 {
		p.q.Uncertainty = &Uncertainty{Minus: minus, Plus: plus, K: t.k}
		return nil
	}
	p.q.Limits = &Limits{p.q.Value - minus, p.q.Value + plus}
	if !relative {
		p.q.limitStep = p.inSI(t.step, false, t)
	}
	return nil
}

func (p *parser) inSI(x float64, relative bool, t *tolerance) float64 {
	switch {
	case relative:
		return math.Abs(float64(p.q.Value * x))
	case t.has:
		return t.unit.difference(x)
	}
	return p.q.Unit.difference(x)
}

// standsPlusMinus tells whether the text begins with a ± or "+a/-b" and so has
// no nominal value.
func (p *parser) standsPlusMinus() bool {
	mark := p.at
	defer func() { p.at = mark }()
	if p.plusMinus() {
		return true
	}
	if !p.take("+") {
		return false
	}
	_, ok, problem := p.number()
	p.skipBlank()
	return ok && problem == nil && p.take("/-", "/−", "/ -", "/ −")
}

// aroundNothing reads limits around zero, "± 20 ppm/K" or "+4/-8 ppm/K"; they
// make sense only for what may be negative.
func (p *parser) aroundNothing() *Problem {
	t, problem := p.tolerance()
	if problem != nil {
		return problem
	}
	switch p.kind {
	case Coefficient1, Coefficient2, Coefficient3, Coefficient4, EMF, Ratio, TemperatureDifference, Voltage:
	default:
		return p.problem(codeNotNumber, quote(p.text)+" has a ± and no value", "write the value first: "+example(p.kind)+" ± 5 %", 0, len(p.text))
	}
	if t.relPlus || t.relMinus || t.k > 0 {
		return p.problem(codeOnZero, quote(p.text)+" has a ± and no value", "write the value first, or the limits in a unit", t.start, t.end)
	}
	if !t.has {
		if t.unit, problem = p.bare(); problem != nil {
			return problem
		}
	}
	widest := math.Max(t.plus, t.minus)
	p.written(written{digits: digitsAt(widest, t.step), step: t.step}, t.unit)
	p.q.Limits = &Limits{-t.unit.difference(t.minus), t.unit.difference(t.plus)}
	return p.end()
}

// statedLimits reads the limits of "43 µΩ·cm, 41 to 45 µΩ·cm" after the comma,
// the form in which limits are printed.
func (p *parser) statedLimits() *Problem {
	p.skipBlank()
	start := p.at
	in := parser{scanner: scanner{text: p.rest()}, kind: p.kind, q: none(p.kind, p.rest()), inner: true}
	if problem := in.whole(); problem != nil || in.q.HasValue() || in.q.Limits == nil {
		return p.problem(codeTolerance, "after the comma stand no limits in "+quote(p.text), "write them as 41 to 45 with the unit, or as ± 5 %", start, len(p.text))
	}
	p.q.Limits, p.q.limitStep = in.q.Limits, in.q.step
	return nil
}
