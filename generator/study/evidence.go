package study

import (
	"math"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

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
