package quantity

import "ohmfolio/generator/place"

// Problem says why a text is no quantity, where in it, and what to do.
// Offset and Length count code points.
type Problem struct {
	Code, Message, Mend string
	Offset, Length      int
}

// Error makes a Problem an error.
func (p *Problem) Error() string {
	if p.Mend == "" {
		return p.Message
	}
	return p.Message + "; " + p.Mend
}

// The codes of problems.
const (
	codeComma     = "comma-decimal"
	codeNotNumber = "number-not-read"
	codeNotFinite = "number-not-finite"
	codeNoUnit    = "unit-missing"
	codeUnit      = "unit-unknown"
	codeOtherKind = "unit-of-another-kind"
	codeBelowZero = "temperature-below-absolute-zero"
	codeRange     = "range-not-read"
	codeTolerance = "tolerance-not-read"
	codeOnZero    = "tolerance-relative-to-zero"
	codeIACSNeeds = "iacs-not-at-20"
)

const triggerHead = "-- materials/sources.yaml --\nstandard: {kind: standard, title: A standard, number: X 1, checked: original}\n-- materials/x.yaml --\nname: X\nsource: standard\nreference_temperature: 20 °C\n"

// FindingKinds documents the problems a quantity can have.
var FindingKinds = []place.Kind{
	{Code: codeComma, Severity: place.Error, Title: "A comma stands in a number",
		Explanation: "Numbers take a decimal point. 8,4 would be read as two values by one program and as 84 by another.",
		Trigger:     triggerHead + "resistivity: 1,7241 µΩ·cm\n", Mend: "write a decimal point: 1.7241"},
	{Code: codeNotFinite, Severity: place.Error, Title: "A number is not finite",
		Explanation: "Infinity and not-a-number are no values of a material.",
		Trigger:     triggerHead + "resistivity: 1e999 µΩ·cm\n", Mend: "write the number that the source prints"},
	{Code: codeNotNumber, Severity: place.Error, Title: "No number is found where one is needed",
		Explanation: "A quantity is a number and a unit, with an optional ±, a range or a one-sided bound.",
		Trigger:     triggerHead + "resistivity: about forty µΩ·cm\n", Mend: "write for example 43 µΩ·cm ± 5 %"},
	{Code: codeRange, Severity: place.Error, Title: "A range is not understood",
		Explanation: "A range is two values and a unit: 0 °C to 100 °C, or -40 to 85 °C.",
		Trigger:     triggerHead + "resistivity: 43 µΩ·cm\nvalid_range: 20 °C\n", Mend: "write two temperatures joined by the word to"},
	{Code: codeBelowZero, Severity: place.Error, Title: "A temperature lies below absolute zero",
		Explanation: "Nothing is colder than 0 K, which is −273.15 °C. Often the unit is wrong.",
		Trigger:     triggerHead + "resistivity: 43 µΩ·cm\nvalid_range: -300 °C to 20 °C\n", Mend: "look at the unit: kelvin or °C?"},
	{Code: codeTolerance, Severity: place.Error, Title: "A ± is not understood",
		Explanation: "After the value: ± x unit, ± x %, +a/-b unit, each with (k=2) when it is an uncertainty.",
		Trigger:     triggerHead + "resistivity: 43 µΩ·cm ± some\n", Mend: "write ± 5 %, or ± 0.4 % (k=2), or +8/-4 µΩ·cm"},
	{Code: codeOnZero, Severity: place.Error, Title: "A relative ± on a zero value",
		Explanation: "Five per cent of nothing is nothing; the band would be empty.",
		Trigger:     triggerHead + "resistivity: 43 µΩ·cm\nalpha: 0 ppm/K ± 5 %\nbasis: resistance\nvalid_range: 0 °C to 60 °C\n", Mend: "write the ± in the unit of the value: ± 10 ppm/K"},
	{Code: codeNoUnit, Severity: place.Error, Title: "A number has no unit",
		Explanation: "A number without its unit is the commonest source of factors of a hundred.",
		Trigger:     triggerHead + "resistivity: 1.7241\n", Mend: "write the unit that the source prints"},
	{Code: codeOtherKind, Severity: place.Error, Title: "A unit of another kind",
		Explanation: "The unit is known, but measures something else: Ω/m is a resistance per length and no resistivity, °C is a temperature and no difference.",
		Trigger:     triggerHead + "resistivity: 3.4 Ω/m\n", Mend: "write the value in a unit of the kind that is asked for"},
	{Code: codeUnit, Severity: place.Error, Title: "A unit is not known",
		Explanation: "Units are spelled as the trade writes them, or in ASCII: uohm cm, ohm mm2/m, ppm/K, degC.",
		Trigger:     triggerHead + "resistivity: 1.7241 µΩ·cn\n", Mend: "look for a typo in the unit"},
}
