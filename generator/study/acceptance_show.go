package study

import (
	"math"
	"strings"

	"ohmfolio/generator/quantity"
)

// show makes the table of limits over the bench temperatures, the table of
// readings, and the blanks of the card.
func (c *card) show(answers []*answer) {
	c.ruleInWords()
	if c.cannotSay == "" || c.unit.Symbol != "" {
		c.out.Tables = append(c.out.Tables, c.benchTable())
	}
	if c.has("readings") {
		c.out.Tables = append(c.out.Tables, c.readingTable(answers))
		c.note(disposition(answers))
	}
	c.out.Tables = append(c.out.Tables, blanks())
	c.note("Limits are moved to the bench by the adopted curve of a fixed body, and by its own limits where it has any; never correct a reading as well.")
	c.note("Measure with four terminals and both polarities, and briefly; wait until the piece has the temperature of the thermometer.")
}

func (c *card) ruleInWords() {
	switch c.rule {
	case ruleSimple:
		c.note("Rule chosen beforehand: simple acceptance. A piece at the limit may be bad as likely as good.")
	case ruleGuarded:
		c.note("Rule chosen beforehand: guarded by U (k = 2). At most 2.5 % of what is accepted at one limit is bad (JCGM 106, clause 8.3).")
	case ruleConditional:
		c.note("Rule chosen beforehand: four zones, with U (k = 2) on each side of a limit. Conditional results go to the two parties named in the order.")
	}
}

// maxBench bounds the rows of a card.
const maxBench = 60

// benchTable has the limits at every kelvin of the bench, rounded inward. The
// piece must conform whatever the coefficient within its limits, so the lower
// limit moves with the greatest factor and the upper with the smallest.
func (c *card) benchTable() Table {
	t := Table{Caption: "Limits at the temperature of the piece, in " + c.unit.Symbol, Heads: []string{"°C", "lower limit", "accept from", "accept to", "upper limit"}}
	for k, n := math.Ceil(c.lo-quantity.ZeroCelsius-1e-9), 0; k <= c.hi-quantity.ZeroCelsius+1e-9 && n < maxBench; k, n = k+1, n+1 {
		f := c.factor(k + quantity.ZeroCelsius)
		row := []string{quantity.Fixed(k, 0)}
		if !f.known() {
			t.Rows = append(t.Rows, append(row, "no curve", "", "", ""))
			continue
		}
		lower, upper := c.inward(c.limits.lo*f.hi, c.limits.hi*f.lo)
		from, to := "no rule", ""
		if c.cannotSay == "" {
			from, to = c.inward(c.acceptable.lo*f.hi, c.acceptable.hi*f.lo)
		}
		t.Rows = append(t.Rows, append(row, lower, from, to, upper))
	}
	return t
}

// inward rounds a pair of limits inward, to a half per cent of the tolerance or
// finer.
func (c *card) inward(lo, hi float64) (string, string) {
	lo, hi = c.unit.FromSI(lo), c.unit.FromSI(hi)
	decimals := 4
	if width := c.unit.FromSI(c.limits.hi) - c.unit.FromSI(c.limits.lo); width > 0 {
		decimals = max(0, int(math.Ceil(-math.Log10(width/200))))
	}
	lo, hi = quantity.RoundInward(lo, hi, decimals)
	return quantity.Fixed(lo, decimals), quantity.Fixed(hi, decimals)
}

func (c *card) readingTable(answers []*answer) Table {
	t := Table{Caption: "Readings, corrected to " + quantity.CelsiusText(c.ordered) + ", in " + c.unit.Symbol,
		Heads: []string{"Lot", "at, °C", "corrected", "zone", "probability within limits, %", "E_n"}}
	list := c.block.Get("readings").List()
	for i, a := range answers {
		text := func(name string, otherwise string) string {
			if s := a.text(name); s != "" {
				return s
			}
			return otherwise
		}
		at, _ := list[i].Get("temperature").Quantity()
		corrected := string(CannotBeTold)
		if n, ok := a.Numbers["corrected"]; ok && n.Value != nil {
			corrected = quantity.Number(*n.Value, 5)
		}
		zone := string(CannotBeTold)
		if n, ok := a.Numbers["zone"]; ok {
			zone = n.Kind
		}
		t.Rows = append(t.Rows, []string{strings.TrimPrefix(a.Size, "lot "), quantity.DegreesText(at.Value), corrected, zone, text("probability", "no uncertainty"), text("en", "no supplier's value")})
	}
	return t
}

// disposition says what follows for the lots.
func disposition(answers []*answer) string {
	var held, open, failed []string
	for _, a := range answers {
		switch a.Verdict {
		case Holds:
			held = append(held, a.Size)
		case Fails:
			failed = append(failed, a.Size)
		default:
			open = append(open, a.Size)
		}
	}
	var parts []string
	for _, p := range []struct {
		what string
		list []string
	}{{"accept", held}, {"hold, and decide by the rule or measure better", open}, {"reject", failed}} {
		if len(p.list) > 0 {
			parts = append(parts, p.what+": "+strings.Join(p.list, ", "))
		}
	}
	return "Disposition by the rule. " + strings.Join(parts, "; ") + "."
}

// blanks are what is written by hand on the card.
func blanks() Table {
	t := Table{Caption: "To be filled in at the bench", Heads: []string{"What", "entry"}}
	room := strings.Repeat("\u2003", 16) // to write in
	for _, what := range []string{"lot and heat number on coil, label and certificate", "date and time", "temperature of the piece", "reading, forward and reverse",
		"instrument and its calibration", "operator", "verdict and signature"} {
		t.Rows = append(t.Rows, []string{what, room})
	}
	return t
}
