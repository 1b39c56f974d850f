package quantity

import "strings"

// blanks are the spaces that people and programs put into a quantity.
const blanks = " \t\u00a0\u202f\u2009"

// unit reads the unit that stands here; has is false when none does.
func (p *parser) unit() (u Unit, has bool, problem *Problem) {
	start := p.at
	end := p.unitEnd()
	spelled := strings.TrimRight(p.text[start:end], blanks)
	if spelled == "" {
		return Unit{}, false, nil
	}
	u, ok := FindUnit(p.kind, spelled)
	if !ok {
		return Unit{}, false, p.wrongUnit(spelled, start)
	}
	p.at = end
	return u, true, nil
}

// unitEnd finds where a unit that begins here ends: before a ±, a plus, the
// word to, a comma or a bracket with k.
func (p *parser) unitEnd() int {
	for i := p.at; i < len(p.text); i++ {
		if p.endsUnit(i) {
			return i
		}
	}
	return len(p.text)
}

func (p *parser) endsUnit(i int) bool {
	rest := p.text[i:]
	switch rest[0] {
	case '+':
		return true
	case ',':
		return len(rest) > 1 && strings.IndexByte(blanks[:2], rest[1]) >= 0
	case ' ':
		return strings.HasPrefix(rest, " to ") || isCoverage(rest[1:])
	case 't':
		return i == p.at && strings.HasPrefix(rest, "to ")
	case '.':
		return strings.HasPrefix(rest, "...")
	case '(':
		return isCoverage(rest)
	}
	return strings.HasPrefix(rest, "±") || strings.HasPrefix(rest, "…")
}

func (p *parser) needUnit() (Unit, *Problem) {
	u, has, problem := p.unit()
	if problem != nil || has {
		return u, problem
	}
	return p.bare()
}

// bare is the unit of a number without one: right for a ratio only.
func (p *parser) bare() (Unit, *Problem) {
	if p.kind == Ratio {
		u, _ := FindUnit(Ratio, "1")
		return u, nil
	}
	return Unit{}, p.problem(codeNoUnit, quote(p.text)+" has no unit; "+article(p.kind)+" is asked for",
		"write the unit that the source prints, for example "+usual(p.kind), 0, len(p.text))
}

func (p *parser) wrongUnit(spelled string, start int) *Problem {
	end := start + len(spelled)
	if kinds := KindsOf(spelled); len(kinds) > 0 {
		return p.otherKind(spelled, kinds[0], start, end)
	}
	if strings.ContainsRune(spelled, ',') {
		return p.problem(codeComma, "a comma stands in "+quote(p.text), "write a decimal point, and one value only", start, end)
	}
	mend := "write it in " + usual(p.kind)
	if near := NearUnit(p.kind, spelled); near != "" {
		mend = "did you mean " + near + "?"
	}
	return p.problem(codeUnit, quote(spelled)+" is no unit of "+string(p.kind)+" that is known", mend, start, end)
}

func (p *parser) otherKind(spelled string, found Kind, start, end int) *Problem {
	if p.kind == TemperatureDifference && found == Temperature {
		return p.problem(codeDifference, quote(spelled)+" is a unit of temperature; a temperature difference is asked for",
			"write the difference in K, or in Δ°F", start, end)
	}
	mend, ok := otherKindMend[[2]Kind{p.kind, found}]
	if !ok {
		mend = "write it in " + usual(p.kind)
	}
	return p.problem(codeOtherKind, quote(spelled)+" is a unit of "+string(found)+"; "+article(p.kind)+" is asked for", mend, start, end)
}

// otherKindMend says, for the mix-ups of the trade, what to do: {asked, found}.
var otherKindMend = map[[2]Kind]string{
	{Resistivity, ResistancePerLength}:   "Ω/m tells one size of wire: multiply by its cross-section, and write the resistivity in Ω·mm²/m; a wire's own resistance belongs to stock",
	{Resistivity, SheetResistance}:       "Ω per square needs a thickness: write sheet_resistance and thickness",
	{Resistivity, Conductivity}:          "write conductivity instead of resistivity",
	{Resistivity, MassResistivity}:       "write mass_resistivity, and the density under properties",
	{Conductivity, Resistivity}:          "write resistivity instead of conductivity",
	{Coefficient1, Coefficient2}:         "this is the unit of beta, the quadratic coefficient",
	{Coefficient2, Coefficient1}:         "this is the unit of alpha; beta is per kelvin squared: /K², ppm/K²",
	{Temperature, TemperatureDifference}: "write a temperature in °C, K or °F",
}

// article names a kind after "a" or "an".
func article(k Kind) string {
	if strings.ContainsRune("aeiou", rune(k[0])) {
		return "an " + string(k)
	}
	return "a " + string(k)
}
