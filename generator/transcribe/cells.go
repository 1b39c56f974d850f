package transcribe

import (
	"fmt"
	"regexp"
	"strings"

	"ohmfolio/generator/quantity"
)

// empty are the ways to write that nothing is known.
var empty = map[string]bool{"": true, "-": true, "–": true, "—": true, "n/a": true, "na": true, "n.a.": true, "none": true, "k.a.": true}

func isEmpty(text string) bool { return empty[strings.ToLower(text)] }

var (
	commaNumber  = regexp.MustCompile(`\d,\d`)
	thousands    = regexp.MustCompile(`\d,\d+,\d|\d,\d+\.\d|\d\.\d+,\d|\d\.\d+\.\d`)
	pointNumber  = regexp.MustCompile(`\d\.\d`)
	decimalComma = regexp.MustCompile(`(\d),(\d)`)
	dashRange    = regexp.MustCompile(`(\d)( ?°?[CFK])? ?[–-] ?(\d)`)
	onlyLimits   = regexp.MustCompile(`^(±|\+/-|\+-)`)
)

// number is what a cell of a column of quantities gave.
type number struct {
	text  string // as a record may have it
	kind  quantity.Kind
	doubt string // why it is none, "" when it is one
	mend  string
	comma bool // a comma stands in it that nobody allowed
}

// read reads a cell of a column; comma allows decimal commas.
func (c column) read(text string, comma bool) number {
	switch {
	case thousands.MatchString(text):
		return number{doubt: "“" + text + "” has two kinds of separator", mend: "take the separator of thousands out"}
	case commaNumber.MatchString(text) && !comma:
		return number{comma: true}
	case pointNumber.MatchString(text) && comma:
		return number{doubt: "“" + text + "” has a point in a table of decimal commas", mend: "write the number with a comma, or take the separator of thousands out"}
	case onlyLimits.MatchString(text):
		return number{doubt: "“" + text + "” is a ± without a value", mend: "a class figure belongs to tcr_limits with its measure and window; other limits are written from … to …"}
	}
	if comma {
		text = decimalComma.ReplaceAllString(text, "$1.$2")
	}
	if c.target.isRange || c.target.key == "melting_temperature" {
		text = dashRange.ReplaceAllString(text, "$1$2 to $3")
	}
	return c.quantity(text)
}

// quantity reads the first candidate that is a quantity of the column.
func (c column) quantity(text string) number {
	var first *quantity.Problem
	for _, candidate := range c.candidates(text) {
		for _, k := range c.target.kinds {
			problem := c.parse(k, candidate)
			if problem == nil {
				return number{text: candidate, kind: k}
			}
			if first == nil {
				first = problem
			}
		}
	}
	if c.unit == "" && first.Code == "unit-missing" {
		return number{doubt: "“" + text + "” has no unit, and neither has the head", mend: "write the unit into the head, or name it in a file for --columns"}
	}
	return number{doubt: first.Message, mend: first.Mend}
}

func (c column) parse(k quantity.Kind, text string) *quantity.Problem {
	if c.target.isRange {
		_, _, p := quantity.ParseRange(k, text)
		return p
	}
	_, p := quantity.Parse(k, text)
	return p
}

// candidates are the ways to read a cell: with the unit of the head, with that
// unit before a ±, or as it stands.
func (c column) candidates(text string) []string {
	if c.unit == "" {
		return []string{text}
	}
	list := []string{text + " " + c.unit}
	for _, sign := range []string{"±", "+/-"} {
		if before, after, ok := strings.Cut(text, sign); ok && strings.TrimSpace(before) != "" {
			list = append(list, strings.TrimSpace(before)+" "+c.unit+" "+sign+after)
		}
	}
	return append(list, text)
}

// bothTold compares a conductivity with the resistivity of the same row.
func bothTold(resistivity, conductivity string) string {
	r, p := quantity.Parse(quantity.Resistivity, resistivity)
	q, problem := quantity.Parse(quantity.Conductivity, conductivity)
	if p != nil || problem != nil || !r.HasValue() || !q.HasValue() || r.Value == 0 || q.Value == 0 {
		return "the row tells a resistivity too"
	}
	other := quantity.ResistivityFromConductivity(q)
	return fmt.Sprintf("the row tells a resistivity too; they differ by %s %%", quantity.Number(100*(other.Value/r.Value-1), 2))
}
