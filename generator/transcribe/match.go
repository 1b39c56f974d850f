package transcribe

import (
	"regexp"
	"strings"
	"unicode"

	"ohmfolio/generator/columns"
)

// column is what one column holds.
type column struct {
	head      string
	target    *target // nil when it is not understood
	unit      string  // as the head or the keeper writes it
	reference string  // a temperature that the head names: "Resistivity at 20 °C"
	left      bool    // the keeper leaves it out
}

// temperatureIn finds "at 20 °C" in a head.
var temperatureIn = regexp.MustCompile(`\(?(?:at |bei |@ ?)?([-−]?\d+(?:\.\d+)?) ?(°C|degC|℃|°F|degF|K)\b?\)?`)

// match finds what a head names, by its words and its unit.
func match(head string) column {
	c := column{head: head}
	bare := strings.Join(strings.Fields(temperatureIn.ReplaceAllString(head, " ")), " ")
	name, unit := bare, ""
	if cell := columns.Split(bare); cell.Unit != "" {
		if t := named(cell.Name); t != nil && (t.takes(cell.Unit) || !t.numeric()) {
			name, unit = cell.Name, cell.Unit
		}
	}
	if unit == "" {
		name, unit = trailingUnit(bare)
	}
	c.target, c.unit = named(name), unit
	if t := c.target; t != nil && t.key == "alpha" && targetOf("beta").takes(unitOf(bare)) {
		c.target, c.unit = targetOf("beta"), unitOf(bare)
	}
	if c.target != nil && !c.target.fitsUnit(bare) {
		c.target = nil
	}
	if c.target == nil || !c.target.takes(c.unit) {
		c.unit = "" // "Name [1]" is a name, and has no unit
	}
	if c.target != nil && c.target.numeric() && c.target.group == "" {
		if m := temperatureIn.FindStringSubmatch(head); m != nil {
			c.reference = m[1] + " " + m[2]
		}
	}
	return c
}

// fitsUnit refuses a head with a unit in brackets that the target cannot have.
func (t *target) fitsUnit(head string) bool {
	unit := columns.Split(head).Unit
	return unit == "" || !t.numeric() || t.takes(unit)
}

// unitOf is what stands in brackets, or behind the first word.
func unitOf(head string) string {
	if c := columns.Split(head); c.Unit != "" {
		return c.Unit
	}
	_, rest, _ := strings.Cut(head, " ")
	return rest
}

// trailingUnit splits "TCR ppm/°C" and "Density, g/cm³" where the first words
// name a target that takes the rest as its unit.
func trailingUnit(head string) (name, unit string) {
	words := strings.Fields(head)
	for i := 1; i < len(words); i++ {
		name, rest := strings.Join(words[:i], " "), strings.Trim(strings.Join(words[i:], " "), "()[]")
		rest = strings.TrimPrefix(rest, "in ")
		if t := named(name); t != nil && t.takes(rest) {
			return name, rest
		}
	}
	return head, ""
}

// other are words that make of "resistivity tolerance" no resistivity.
var other = map[string]bool{"tolerance": true, "min": true, "max": true, "minimum": true, "maximum": true, "limit": true, "limits": true,
	"uncertainty": true, "deviation": true, "error": true, "lower": true, "upper": true, "ratio": true, "type": true, "supplier": true}

// named finds the target whose words stand in the name; the longest wins.
func named(name string) *target {
	words := fold(name)
	for _, w := range strings.Fields(words) {
		if other[w] {
			return nil
		}
	}
	var best *target
	length := 0
	for i := range targets {
		for _, h := range targets[i].heads {
			if len(h) > length && strings.Contains(" "+words+" ", " "+h+" ") {
				best, length = &targets[i], len(h)
			}
		}
	}
	return best
}

// fold gives the words of a head in small letters.
func fold(s string) string {
	return strings.Join(strings.FieldsFunc(strings.ToLower(s), func(r rune) bool { return !unicode.IsLetter(r) && !unicode.IsDigit(r) }), " ")
}
