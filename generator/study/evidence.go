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
	return evidenceFrom(lib, r, r.Adopted)
}

// evidenceFrom names the data set that was used.
func evidenceFrom(lib *library.Library, r *material.Record, set *material.DataSet) Evidence {
	e := Evidence{Record: r.ID, Revision: r.Revision, Fingerprint: r.Fingerprint, Status: string(r.Status), Checked: "not stated"}
	if set != nil {
		e.Data = set.Name
		if c := lib.CheckedOf(set.Source); c != "" {
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
