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
	unit              *Unit // of the magnitudes, nil when none is written
	k                 float64
	start, end        int
}

// tolerance reads "± x [unit|%] [(k=2)]" or "+a/-b [unit|%] [(k=2)]"; nil
// when none stands here.
func (p *parser) tolerance() (*tolerance, *Problem) {
	p.skipBlank()
	t := &tolerance{start: p.at}
	var problem *Problem
	switch {
	case p.take("±", "+/-", "+-", "+/−"):
		problem = p.symmetric(t)
	case strings.HasPrefix(p.rest(), "+"):
		problem = p.asymmetric(t)
	default:
		return nil, nil
	}
	if problem != nil {
		return nil, problem
	}
	t.end = p.at
	p.skipBlank()
	k, ok, problem := p.coverage()
	if problem != nil {
		return nil, problem
	}
	if ok {
		t.k = k
	}
	return t, nil
}

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
	p.skipBlank()
	if !p.take("/-", "/−", "/ -", "/ −") {
		return p.badTolerance(t.start)
	}
	y, relY, problem := p.magnitude(t)
	if problem != nil {
		return problem
	}
	t.minus, t.relMinus = y, relY
	if relY && !rel && t.unit == nil {
		t.plus, t.relPlus = t.plus/100, true // "+1/-2 %": the unit stands once
	}
	return nil
}

func (p *parser) badTolerance(start int) *Problem {
	return p.problem(codeTolerance, "the ± in "+quote(p.text)+" is not understood",
		"write ± 5 %, or ± 0.4 % (k=2), or +8/-4 with the unit", start, len(p.text))
}

// magnitude reads a positive number with % or a unit.
func (p *parser) magnitude(t *tolerance) (x float64, relative bool, problem *Problem) {
	p.skipBlank()
	w, ok, problem := p.number()
	if problem != nil {
		return 0, false, problem
	}
	if !ok || w.value < 0 {
		return 0, false, p.badTolerance(t.start)
	}
	p.skipBlank()
	if p.kind != Ratio && p.percent() {
		return w.value / 100, true, nil
	}
	start := p.at
	end := p.magnitudeEnd()
	spelled := strings.TrimRight(p.text[start:end], " ")
	if spelled == "" {
		return w.value, false, nil
	}
	u, ok := FindUnit(differenceKind(p.kind), spelled)
	if !ok {
		return 0, false, p.wrongUnit(spelled, start)
	}
	p.at, t.unit = end, &u
	return w.value, false, nil
}

// percent takes a % that stands alone (not %/K or %IACS).
func (p *parser) percent() bool {
	if !strings.HasPrefix(p.rest(), "%") {
		return false
	}
	after := strings.TrimLeft(p.rest()[1:], " ")
	if strings.HasPrefix(after, "IACS") || (strings.HasPrefix(after, "/") && !strings.HasPrefix(after, "/-") && !strings.HasPrefix(after, "/−")) {
		return false
	}
	p.at++
	return true
}

func (p *parser) magnitudeEnd() int {
	text := p.text
	for i := p.at; i < len(text); i++ {
		if text[i] == ')' || isCoverage(text[i:]) || strings.HasPrefix(text[i:], "/-") || strings.HasPrefix(text[i:], "/−") || strings.HasPrefix(text[i:], " /") {
			return i
		}
	}
	return len(text)
}

// differenceKind is the kind of a ±: of a temperature, a difference.
func differenceKind(k Kind) Kind {
	if k == Temperature {
		return TemperatureDifference
	}
	return k
}

// isCoverage tells whether "(k=" begins here, and not a bracket of a unit such
// as J/(kg·K).
func isCoverage(s string) bool {
	return strings.HasPrefix(s, "(k=") || strings.HasPrefix(s, "(k =")
}

// coverage reads "(k=2)".
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

// apply turns the tolerance into limits or, with k, into an uncertainty.
func (p *parser) apply(t *tolerance, w written) *Problem {
	if (t.relPlus || t.relMinus) && w.value == 0 && p.q.Unit.offset == 0 {
		return p.problem(codeOnZero, "a ± in % of zero says nothing: "+quote(p.text), "write the ± in the unit of the value", t.start, t.end)
	}
	plus, minus := p.inSI(t.plus, t.relPlus, t), p.inSI(t.minus, t.relMinus, t)
	if t.k > 0 {
		p.q.Uncertainty = &Uncertainty{Minus: minus, Plus: plus, K: t.k}
		return nil
	}
	p.q.Limits = &Limits{p.q.Value - minus, p.q.Value + plus}
	return nil
}

func (p *parser) inSI(x float64, relative bool, t *tolerance) float64 {
	if relative {
		return math.Abs(float64(p.q.Value * x))
	}
	if t.unit != nil {
		return t.unit.difference(x)
	}
	return p.q.Unit.difference(x)
}
