package study

import (
	"math"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// interval grows to hold every value added.
type interval struct{ lo, hi, sure float64 }

func newInterval() *interval { return &interval{lo: math.Inf(1), hi: math.Inf(-1)} }

func (i *interval) add(x float64) { i.lo, i.hi = math.Min(i.lo, x), math.Max(i.hi, x) }

// into writes the interval beside the number called name as worst case of
// the stated limits.
// Without a nominal value the text tells the interval.
func (i *interval) into(numbers map[string]Number, name, unit, text string) {
	n, there := numbers[name]
	if !there {
		n = Number{Unit: unit, Text: text}
	}
	n.Lower, n.Upper, n.Kind, n.sure = number(i.lo), number(i.hi), "limits", i.sure
	numbers[name] = n
}

// number is x to 12 significant digits, nil when it is not finite.
func number(x float64) *float64 {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	x = quantity.Round12(x)
	return &x
}

func windowText(lo, hi float64) string {
	return quantity.CelsiusText(lo) + " to " + quantity.CelsiusText(hi)
}

func evidenceOf(lib *library.Library, r *material.Record) Evidence {
	e := Evidence{Record: r.ID, Revision: r.Revision, Fingerprint: r.Fingerprint, Status: string(r.Status), Checked: "not stated"}
	if r.Adopted != nil {
		e.Data = r.Adopted.Name
		if c := lib.CheckedOf(r.Adopted.Source); c != "" {
			e.Checked = string(c)
		}
	}
	return e
}

// warnState adds a warning for records that must not be built on.
func warnState(m *MaterialOutcome, r *material.Record) {
	switch {
	case r.Status == material.Withdrawn:
		m.Warnings = append(m.Warnings, "withdrawn, not for use")
	case r.Status != material.Released:
		m.Warnings = append(m.Warnings, string(r.Status)+", not for use")
	}
	if r.Invented {
		m.Warnings = append(m.Warnings, "invented data")
	}
}
