package study

import (
	"math"
	"strings"
	"testing"

	"ohmfolio/generator/library"
)

func inspected(t *testing.T, block string) *Outcome {
	t.Helper()
	lib := library.FromFiles(map[string][]byte{
		"materials/sources.yaml": []byte("s: {kind: standard, title: T, number: N, checked: original}\n"),
		"materials/cu.yaml":      []byte("name: Copper\nsource: s\nbasis: resistance\nresistivity: 1.7241 µΩ·cm ± 2 %\nreference_temperature: 20 °C\nalpha: 3.93e-3 /K\nvalid_range: 0 °C to 100 °C\nstatus: released\n"),
		"content/reports/r.md":   []byte("# R\n\n```study: acceptance\n" + block + "\n```\n"),
	})
	o, findings := Run(lib, lib.Documents[0].Page.Studies[0])
	if o == nil {
		t.Fatal(findings)
	}
	return o
}

func put(t *testing.T, m MaterialOutcome, name string, want float64) {
	t.Helper()
	if n, ok := m.Numbers[name]; !ok || n.Value == nil || math.Abs(*n.Value-want) > 1e-9*math.Abs(want) {
		t.Errorf("%s: %+v, want %v (%v)", name, n, want, m.Reasons)
	}
}

const ohmCard = "material: cu\nlimits: 100 Ω ± 5 %\nuncertainty: 0.6 %\nrule: guarded\n"

// TestGuard: limits ± 5 % and U 0.6 % accept within ± 4.4 % (job, check numbers).
func TestGuard(t *testing.T) {
	m := inspected(t, ohmCard).Materials[0]
	for name, want := range map[string]float64{"lower_at_20": 95, "upper_at_20": 105, "lower_accept": 95.6, "upper_accept": 104.4} {
		put(t, m, name, want)
	}
	m = inspected(t, strings.Replace(ohmCard, "guarded", "simple", 1)).Materials[0]
	put(t, m, "upper_accept", 105)
}

// TestBench: copper read at 25 °C against a limit of 20 °C is off by 1.97 %
// (job, check numbers: 1.01965); printed limits are rounded inward.
func TestBench(t *testing.T) {
	o := inspected(t, ohmCard)
	rows := o.Tables[0].Rows
	if len(rows) != 16 || rows[0][0] != "15" || rows[15][0] != "30" {
		t.Fatalf("the bench has %d rows", len(rows))
	}
	// 95·1.01965 = 96.86675 up, 105·1.01965 = 107.06325 down; two decimals
	if r := rows[10]; r[0] != "25" || r[1] != "96.87" || r[4] != "107.06" {
		t.Errorf("limits at 25 °C: %v", rows[10])
	}
	if r := rows[5]; r[1] != "95.00" || r[2] != "95.60" || r[3] != "104.40" || r[4] != "105.00" {
		t.Errorf("limits at 20 °C: %v", rows[5])
	}
}

// TestZones at both sides of each limit, of readings at 20 °C.
func TestZones(t *testing.T) {
	for _, c := range []struct {
		rule, reading, zone string
		verdict             Verdict
	}{
		{"simple", "105 Ω", "accept", Holds}, {"simple", "105.01 Ω", "reject", Fails},
		{"guarded", "104.4 Ω", "accept", Holds}, {"guarded", "104.41 Ω", "within the limits, not by its uncertainty: not accepted", CannotBeTold}, {"guarded", "105.01 Ω", "reject", Fails},
		{"conditional", "95.6 Ω", "pass", Holds}, {"conditional", "95.59 Ω", "conditional pass", CannotBeTold},
		{"conditional", "94.99 Ω", "conditional fail", CannotBeTold}, {"conditional", "94.39 Ω", "fail", Fails},
	} {
		o := inspected(t, strings.Replace(ohmCard, "guarded", c.rule, 1)+"readings: [{lot: A, forward: "+c.reading+", reverse: "+c.reading+", temperature: 20 °C}]\n")
		m := o.Materials[0]
		if m.Numbers["zone"].Kind != c.zone || m.Verdict != c.verdict {
			t.Errorf("%s, %s: %q %q, want %q %q", c.rule, c.reading, m.Numbers["zone"].Kind, m.Verdict, c.zone, c.verdict)
		}
	}
}

// TestReadingIsCorrected: R_20 = R_t/[1 + α(t − 20)], the mean of both
// polarities; half of what lies at a limit is good (JCGM 106: probability 0.5).
func TestReadingIsCorrected(t *testing.T) {
	o := inspected(t, ohmCard+"temperature_uncertainty: 1 K\nreadings:\n  - {lot: A, forward: 107.2 Ω, reverse: 107.0 Ω, temperature: 25 °C, supplier: 104 Ω, supplier_uncertainty: 0.5 %}\n  - {lot: B, forward: 105 Ω, temperature: 20 °C}\n")
	a, b := o.Materials[0], o.Materials[1]
	put(t, a, "corrected", 107.1/1.01965)
	u := math.Hypot(0.006, 0.00393) * 107.1 / 1.01965 // copper, 1 K: 0.39 %
	if en := *a.Numbers["en"].Value; math.Abs(en-math.Abs(107.1/1.01965-104)/math.Hypot(u, 0.52)) > 1e-9 {
		t.Errorf("E_n %v", en)
	}
	if p := *b.Numbers["probability"].Value; math.Abs(p-50) > 1e-6 {
		t.Errorf("probability at the limit %v %%", p)
	}
	if !strings.Contains(strings.Join(b.Warnings, ";"), "one polarity") {
		t.Errorf("warnings %v", b.Warnings)
	}
}

// TestRefusals: no rule, an uncertainty above a third of the tolerance, one that
// eats it.
func TestRefusals(t *testing.T) {
	for uncertainty, want := range map[string]string{"1.66 %": "", "1.67 %": "more than a third", "5 %": "eats the whole", "6 %": "eats the whole"} {
		m := inspected(t, strings.Replace(ohmCard, "0.6 %", uncertainty, 1)).Materials[0]
		if got := strings.Join(m.Reasons, ";"); (want == "") != (got == "") || !strings.Contains(got, want) {
			t.Errorf("U %s: %q", uncertainty, got)
		}
	}
	_, findings := bench(t, "acceptance", "material: cumnni\nlimits: 1 Ω ± 5 %\n")
	if len(findings) != 1 || findings[0].Code != "decision-rule-missing" {
		t.Errorf("no rule: %v", findings)
	}
	_, findings = bench(t, "acceptance", "material: cumnni\nlimits: 1 Ω ± 5 %\nrule: simple\nreadings: [{lot: A, forward: 1 Ω/m, temperature: 20 °C}]\n")
	if len(findings) != 1 || findings[0].Code != "reading-of-another-kind" || findings[0].Position.Line != 7 {
		t.Errorf("a reading of another kind: %v", findings)
	}
}

// TestLimitsFromDimensions: Ω/m = ρ/A, worst case of ρ ± 10 % and d ± 2 %.
func TestLimitsFromDimensions(t *testing.T) {
	o := benched(t, "acceptance", "material: cumnni\ndiameter: 0.40 mm ± 0.008 mm\nrule: simple\n")
	a := math.Pi / 4 * 0.16e-6
	m := o.Materials[0]
	put(t, m, "lower_at_20", 0.43e-6*0.9/(a*1.02*1.02))
	put(t, m, "upper_at_20", 0.43e-6*1.1/(a*0.98*0.98))
	o = benched(t, "acceptance", "material: cumnni\nwidth: 10 mm ± 0.05 mm\nthickness: 1 mm ± 0.02 mm\nlength: 1 m ± 1 mm\nrule: simple\n")
	put(t, o.Materials[0], "upper_at_20", 1e3*0.43e-6*1.1*1.001/(9.95e-3*0.98e-3))
	if m := benched(t, "acceptance", "material: cuni\ndiameter: 0.40 mm ± 0.008 mm\nrule: simple\n").Materials[0]; m.Verdict != CannotBeTold {
		t.Errorf("no limits of ρ, and the verdict is %q", m.Verdict)
	}
}
