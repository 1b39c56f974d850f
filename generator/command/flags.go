package command

import (
	"fmt"
	"strings"
	"time"

	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// oneOf refuses a word that a flag does not know.
func oneOf(flag, word string, words ...string) error {
	for _, w := range words {
		if w == word {
			return nil
		}
	}
	hint := ""
	if near := place.Near(word, words); near != "" {
		hint = "; did you mean " + near + "?"
	}
	return fmt.Errorf("%s takes %s, not %q%s", flag, strings.Join(words, ", "), word, hint)
}

func isDate(text string) error {
	if text == "" {
		return nil
	}
	if _, err := time.Parse("2006-01-02", text); err != nil {
		return fmt.Errorf("--today takes a date such as 2026-12-01, not %q", text)
	}
	return nil
}

// temperature reads a flag's temperature in kelvin.
func temperature(flag, text string) (float64, error) {
	q, p := quantity.Parse(quantity.Temperature, text)
	if p != nil {
		return 0, fmt.Errorf("%s %q: %s", flag, text, p.Error())
	}
	if !q.HasValue() {
		return 0, fmt.Errorf("%s takes one temperature, not %q", flag, text)
	}
	return q.Value, nil
}

// optionalTemperature is nil for a flag that was not given.
func optionalTemperature(flag, text string) (*float64, error) {
	if text == "" {
		return nil, nil
	}
	t, err := temperature(flag, text)
	return &t, err
}

// windowOf reads a rising pair of temperatures in kelvin.
func windowOf(text string) (lo, hi float64, err error) {
	from, to, p := quantity.ParseRange(quantity.Temperature, text)
	switch {
	case p != nil:
		return 0, 0, fmt.Errorf("--window %q: %s", text, p.Error())
	case from.Value >= to.Value:
		return 0, 0, fmt.Errorf("--window %q does not rise; write the lower temperature first", text)
	}
	return from.Value, to.Value, nil
}
