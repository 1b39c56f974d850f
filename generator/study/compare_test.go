package study

import (
	"math"
	"strings"
	"testing"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
)

// yard has the check alloy (α = +10 ppm/K, β = −0.5 ppm/K² about 20 °C), one
// with limits, one with limits alone, one whose data end early, one without a
// coefficient.
func yard(block string) *library.Library {
	record := func(more string) []byte {
		return []byte("name: X\nsource: s\nbasis: resistance\nresistivity: 43 µΩ·cm ± 5 %\nreference_temperature: 20 °C\n" + more)
	}
	return library.FromFiles(map[string][]byte{
		"materials/sources.yaml":      []byte("s: {kind: standard, title: T, number: N, checked: original}\n"),
		"materials/check.yaml":        record("alpha: 10 ppm/K\nbeta: -0.5 ppm/K²\nvalid_range: -55 °C to 125 °C\n"),
		"materials/limited.yaml":      record("alpha: 10 ppm/K ± 10 ppm/K\nvalid_range: -55 °C to 125 °C\n"),
		"materials/limits-alone.yaml": record("alpha: -4 to 8 ppm/K\nvalid_range: -55 °C to 125 °C\n"),
		"materials/early.yaml":        record("alpha: 1 ppm/K\nvalid_range: 0 °C to 60 °C\n"),
		"materials/point.yaml":        record(""),
		"content/reports/r.md":        []byte("# R\n\n```study: compare\n" + block + "\n```\n"),
	})
}

func compared(t *testing.T, block string) (*Outcome, []place.Finding) {
	t.Helper()
	lib := yard(block)
	if place.Count(lib.Findings, place.Error) > 0 {
		t.Fatal(lib.Findings)
	}
	return Run(lib, lib.Documents[0].Page.Studies[0])
}

func of(o *Outcome, id string) MaterialOutcome {
	for _, m := range o.Materials {
		if m.Material == id {
			return m
		}
	}
	return MaterialOutcome{}
}

func TestNumbers(t *testing.T) {
	o, findings := compared(t, "materials: [check, early, point, limits-alone]\nwindow: -40 °C to 105 °C")
	if o == nil {
		t.Fatal(findings)
	}
	m := of(o, "check")
	for name, want := range map[string]float64{"greatest_change": -2762.5, "change_most": 50, "at_temperature": 105, "slope": 10, "resistivity": 43} {
		if got := m.Numbers[name]; got.Value == nil || math.Abs(*got.Value-want) > 1e-6 {
			t.Errorf("%s: %v, want %g", name, got.Value, want)
		}
	}
	if r := m.Numbers["resistivity"]; *r.Lower != 40.85 || *r.Upper != 45.15 {
		t.Errorf("limits of the resistivity %v %v", *r.Lower, *r.Upper)
	}
	if e := of(o, "early"); e.Partly == "" || len(o.Tables) != 2 || len(o.Tables[1].Rows) != 1 {
		t.Errorf("early is not told apart: %+v", e)
	}
	if strings.Join(o.Ranking, ",") != "check" {
		t.Errorf("ranking %v: parts and limits alone are not ranked", o.Ranking)
	}
	if p := of(o, "point"); len(p.Reasons) == 0 || !strings.Contains(p.Reasons[0], "no coefficient") {
		t.Errorf("point: %v", p.Reasons)
	}
	// worst case of −4 to 8 ppm/K from 20 °C: −340 ppm to 680 ppm at 105 °C, 240 to −480 at −40 °C
	if g := of(o, "limits-alone").Numbers["greatest_change"]; g.Value != nil || math.Abs(*g.Lower+480) > 1e-6 || math.Abs(*g.Upper-680) > 1e-6 {
		t.Errorf("limits alone: %+v", g)
	}
	if len(o.Cautions) < 4 || len(m.Evidence) != 1 || m.Evidence[0].Checked != "original" {
		t.Errorf("cautions %v, evidence %v", o.Cautions, m.Evidence)
	}
}

// TestVerdicts at both sides of every threshold.
func TestVerdicts(t *testing.T) {
	for _, c := range []struct {
		id, require string
		want        Verdict
	}{
		{"check", "2762.5 ppm", HoldsNominally},
		{"check", "2762.4 ppm", Fails},
		{"limited", "1700 ppm", Holds},        // 20 ppm/K over 85 K
		{"limited", "1699 ppm", CannotBeTold}, // the nominal holds, the worst case does not
		{"limits-alone", "680 ppm", Holds},
		{"limits-alone", "679 ppm", CannotBeTold},
		{"early", "1 %", CannotBeTold},
		{"point", "1 %", CannotBeTold},
	} {
		o, findings := compared(t, "materials: ["+c.id+"]\nwindow: -40 °C to 105 °C\nrequire: {greatest_change: "+c.require+"}")
		if o == nil {
			t.Fatal(findings)
		}
		m := o.Materials[0]
		if m.Verdict != c.want {
			t.Errorf("%s within %s: %q, want %q (%+v)", c.id, c.require, m.Verdict, c.want, m.Requirements)
		}
		if r := m.Requirements[0]; r.Worst != nil && (*r.Margin < 0) != (*r.Worst > r.Limit) {
			t.Errorf("%s: margin %v of worst %v against %v", c.id, *r.Margin, *r.Worst, r.Limit)
		}
	}
}

// TestCertainFailure: where even the best curve within the limits is beyond
// the bound at an end, the verdict is certain.
func TestCertainFailure(t *testing.T) {
	lib := library.FromFiles(map[string][]byte{
		"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: N}\n"),
		"materials/x.yaml":       []byte("name: X\nsource: s\nbasis: resistance\nreference_temperature: 20 °C\nalpha: 100 ppm/K ± 10 ppm/K\nvalid_range: 20 °C to 60 °C\n"),
		"content/reports/r.md":   []byte("# R\n\n```study: compare\nmaterials: [x]\nwindow: 20 °C to 60 °C\nrequire: {greatest_change: 3599 ppm}\n```\n"),
	})
	o, findings := Run(lib, lib.Documents[0].Page.Studies[0])
	if o == nil || o.Materials[0].Verdict != Fails {
		t.Errorf("%v %v", o, findings)
	}
}

func TestBadBlocks(t *testing.T) {
	for block, code := range map[string]string{
		"materials: [chek]\nwindow: 0 °C to 60 °C":                       "study-material-unknown",
		"materials: [check]\nwindow: 60 °C to 0 °C":                      "window-inverted",
		"materials: [check]\nwindow: 0 to 60":                            "unit-missing",
		"materials: [check]":                                             "key-missing",
		"materials: [check]\nwindow: 0 °C to 60 °C\nwindw: 1":            "key-unknown",
		"materials: [check]\nwindow: 0 °C to 60 °C\nshow: R":             "word-unknown",
		"materials: [check]\nwindow: 0 °C to 60 °C\nrequire: {box: 1 %}": "unit-of-another-kind",
		"materials: check\nwindow: 0 °C to 60 °C":                        "type-wrong",
	} {
		o, findings := compared(t, block)
		if o != nil || len(findings) == 0 || findings[0].Code != code || findings[0].Position.File != "content/reports/r.md" || findings[0].Position.Line < 4 {
			t.Errorf("%q: %+v", block, findings)
		}
	}
}

func BenchmarkCompare(b *testing.B) {
	lib := yard("materials: [check, limited, limits-alone, early, point]\nwindow: -40 °C to 105 °C")
	for b.Loop() {
		Run(lib, lib.Documents[0].Page.Studies[0])
	}
}
