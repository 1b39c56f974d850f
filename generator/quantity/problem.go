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
	codeComma      = "comma-decimal"
	codeInverted   = "limits-inverted"
	codeNotFinite  = "number-not-finite"
	codeNotNumber  = "number-not-read"
	codeRange      = "range-not-read"
	codeOnZero     = "relative-on-zero"
	codeBelowZero  = "temperature-below-zero-kelvin"
	codeDifference = "temperature-difference-expected"
	codeTolerance  = "tolerance-not-read"
	codeNoUnit     = "unit-missing"
	codeOtherKind  = "unit-of-another-kind"
	codeUnit       = "unit-unknown"
)

// record is the smallest reference around the lines of one wrong record.
func record(lines string) string {
	return "-- materials/sources.yaml --\nstandard: {kind: standard, title: A standard, number: X 1, checked: original}\n" +
		"-- materials/x.yaml --\nname: X\nsource: standard\n" + lines
}

// FindingKinds documents the problems a quantity can have, sorted by code.
var FindingKinds = []place.Kind{
	{Code: codeComma, Severity: place.Error, Title: "A comma stands in a number",
		Explanation: "Numbers take a decimal point. 8,4 would be read as two values by one program and as 84 by another.",
		Trigger:     record("reference_temperature: 20 °C\nresistivity: 1,7241 µΩ·cm\n"), Mend: "write a decimal point: 1.7241"},
	{Code: codeInverted, Severity: place.Error, Title: "Limits begin above their end",
		Explanation: "Nothing lies between an upper limit and a lower one above it. Often a minus is missing.",
		Trigger:     record("reference_temperature: 20 °C\nresistivity: 43 µΩ·cm\nalpha: 8 to -4 ppm/K\n"), Mend: "write the lower limit first: -4 to 8 ppm/K"},
	{Code: codeNotFinite, Severity: place.Error, Title: "A number is not finite",
		Explanation: "Infinity and not-a-number are no values of a material.",
		Trigger:     record("reference_temperature: 20 °C\nresistivity: 1e999 µΩ·cm\n"), Mend: "write the number that the source prints"},
	{Code: codeNotNumber, Severity: place.Error, Title: "No number is found where one is needed",
		Explanation: "A quantity is a number and a unit, with an optional ±, a range or a one-sided bound.",
		Trigger:     record("reference_temperature: 20 °C\nresistivity: about forty µΩ·cm\n"), Mend: "write for example 43 µΩ·cm ± 5 %"},
	{Code: codeRange, Severity: place.Error, Title: "A range is not understood",
		Explanation: "A range is two values and a unit: 0 °C to 100 °C, or -40 to 85 °C.",
		Trigger:     record("reference_temperature: 20 °C\nresistivity: 43 µΩ·cm\nvalid_range: 20 °C\n"), Mend: "write two temperatures joined by the word to"},
	{Code: codeOnZero, Severity: place.Error, Title: "A relative ± on a zero value",
		Explanation: "Five per cent of nothing is nothing; the band would be empty.",
		Trigger:     record("reference_temperature: 20 °C\nresistivity: 43 µΩ·cm\nalpha: 0 ppm/K ± 5 %\n"), Mend: "write the ± in the unit of the value: ± 10 ppm/K"},
	{Code: codeBelowZero, Severity: place.Error, Title: "A temperature lies below zero kelvin",
		Explanation: "Nothing is colder than 0 K, which is −273.15 °C. Often the unit is wrong.",
		Trigger:     record("reference_temperature: 20 °C\nresistivity: 43 µΩ·cm\nvalid_range: -300 °C to 20 °C\n"), Mend: "look at the unit: kelvin or °C?"},
	{Code: codeDifference, Severity: place.Error, Title: "A temperature difference is expected",
		Explanation: "20 °C is a point of a scale, 20 K is a step on it. A ± on a temperature, a rise and a width are steps; per cent of a temperature would depend on where its scale begins.",
		Trigger:     record("reference_temperature: 20 °C ± 5 %\nresistivity: 43 µΩ·cm\n"), Mend: "write the difference in K, or in Δ°F: 20 °C ± 2 K"},
	{Code: codeTolerance, Severity: place.Error, Title: "A ± is not understood",
		Explanation: "After the value: ± x unit, ± x %, +a/-b unit, each with (k=2) when it is an uncertainty.",
		Trigger:     record("reference_temperature: 20 °C\nresistivity: 43 µΩ·cm ± some\n"), Mend: "write ± 5 %, or ± 0.4 % (k=2), or +8/-4 µΩ·cm"},
	{Code: codeNoUnit, Severity: place.Error, Title: "A number has no unit",
		Explanation: "A number without its unit is the commonest source of factors of a hundred.",
		Trigger:     record("reference_temperature: 20 °C\nresistivity: 1.7241\n"), Mend: "write the unit that the source prints"},
	{Code: codeOtherKind, Severity: place.Error, Title: "A unit of another kind",
		Explanation: "The unit is known, but measures something else: Ω/m is a resistance per length and no resistivity.",
		Trigger:     record("reference_temperature: 20 °C\nresistivity: 3.4 Ω/m\n"), Mend: "write the value in a unit of the kind that is asked for"},
	{Code: codeUnit, Severity: place.Error, Title: "A unit is not known",
		Explanation: "Units are spelled as the trade writes them, or in ASCII: uohm cm, ohm mm2/m, ppm/K, degC.",
		Trigger:     record("reference_temperature: 20 °C\nresistivity: 1.7241 µΩ·cn\n"), Mend: "look for a typo in the unit"},
}
