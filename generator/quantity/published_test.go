package quantity

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"ohmfolio/generator/published"
)

func within(got, want, relative float64) bool {
	return math.Abs(got-want) <= relative*math.Abs(want)
}

func mustFind(t *testing.T, k Kind, spelled string) Unit {
	t.Helper()
	u, ok := FindUnit(k, spelled)
	if !ok {
		t.Fatalf("%s has no unit %q", k, spelled)
	}
	return u
}

// kindOf finds the kind that has both units.
func kindOf(t *testing.T, from, to string) Kind {
	t.Helper()
	for _, k := range Kinds() {
		_, a := FindUnit(k, from)
		_, b := FindUnit(k, to)
		if a && b {
			return k
		}
	}
	t.Fatalf("no kind has both %q and %q", from, to)
	return ""
}

// lastDigit is one unit in the last place of a number as printed.
func lastDigit(t *testing.T, s string) float64 {
	t.Helper()
	sc := scanner{text: s}
	w, ok, p := sc.number()
	if !ok || p != nil {
		t.Fatalf("%q is no number", s)
	}
	return w.step
}

// TestPublishedFactors: T. R. Kuphaldt, Lessons in Electric Circuits, and a
// maker's page of conversion factors (testdata/README.md). The exact factor is
// met to half a unit of its last digit, the printed one to a whole unit: 601.54
// is printed for 601.53.
func TestPublishedFactors(t *testing.T) {
	for _, r := range published.Rows(t, "unit_conversions.csv") {
		factor, reciprocal := strings.CutSuffix(r["multiply_by"], "/x")
		want := published.Number(t, factor)
		got := 0.0
		if reciprocal { // %IACS, the only one: 172.41/x
			one, p := Parse(Conductivity, "1 "+r["from"])
			if p != nil {
				t.Fatal(p)
			}
			got = mustFind(t, Resistivity, r["to"]).FromSI(ResistivityFromConductivity(one).Value)
		} else {
			to := r["to"]
			k := kindOf(t, r["from"], to)
			got = mustFind(t, k, to).FromSI(mustFind(t, k, r["from"]).ToSI(1))
		}
		if math.Abs(got-want) > 0.501*lastDigit(t, factor) {
			t.Errorf("%s: one %s is %v %s, want %v", r["id"], r["from"], got, r["to"], want)
		}
		printed := strings.TrimSuffix(r["published_as"], "/x")
		if printed != "" && math.Abs(got-published.Number(t, printed)) > lastDigit(t, printed) {
			t.Errorf("%s: one %s is %v %s, printed %s", r["id"], r["from"], got, r["to"], printed)
		}
	}
}

// TestUnitCodes: codes of UCUM and the factors of QUDT and UNECE.
func TestUnitCodes(t *testing.T) {
	left := map[string]bool{ // no unit of the trade's tables
		"kiloohm metre": true, "ohm kilometre": true, "ohm foot": true,
	}
	for _, r := range published.Rows(t, "resistivity_unit_codes.csv") {
		if left[r["name"]] {
			continue
		}
		u, ok := FindUnit(Resistivity, r["ucum"])
		if !ok {
			t.Errorf("%s: the code %s is not read", r["name"], r["ucum"])
			continue
		}
		if want := published.Number(t, r["factor_to_ohm_metre"]); !within(u.ToSI(1), want, 1e-14) {
			t.Errorf("%s: %v Ω·m, want %v", r["name"], u.ToSI(1), want)
		}
		if u.UCUM != r["ucum"] && r["ucum"] != "Ohm.m2/m" { // Ω·m²/m is another way to write Ω·m
			t.Errorf("%s has the code %q, want %q", r["name"], u.UCUM, r["ucum"])
		}
	}
	kinds := map[string]Kind{"Ohm": Resistance, "Ohm/m": ResistancePerLength, "S/m": Conductivity, "K": Temperature, "K-1": Coefficient1, "m2": Area, "m": Length}
	for _, r := range published.Rows(t, "related_unit_codes.csv") {
		k := kinds[r["si_base"]]
		if r["ucum"] == "[degF]-1" {
			continue // no valid code: special units stand alone (UCUM, section 22)
		}
		u, ok := FindUnit(k, r["ucum"])
		if !ok || u.UCUM != r["ucum"] {
			t.Errorf("%s: the code %s is read as %q", r["name"], r["ucum"], u.UCUM)
			continue
		}
		if want, err := strconv.ParseFloat(r["factor"], 64); err == nil && !within(u.ToSI(1), want, 1e-14) {
			t.Errorf("%s: %v, want %v", r["name"], u.ToSI(1), want)
		}
	}
}

// TestKuphaldtTable: two printed columns of one table, Ω·cmil/ft and µΩ·cm,
// agree within 0.05 %, the rounding of the shorter one.
func TestKuphaldtTable(t *testing.T) {
	for _, r := range published.Rows(t, "kuphaldt_specific_resistance_20C.csv") {
		q, p := Parse(Resistivity, r["ohm_cmil_per_ft"]+" ohm cmil/ft")
		if p != nil {
			t.Fatal(p)
		}
		got, want := mustFind(t, Resistivity, "uohm cm").FromSI(q.Value), published.Number(t, r["micro_ohm_cm"])
		if !within(got, want, 5e-4) {
			t.Errorf("%s: %v µΩ·cm, printed %v", r["material"], got, want)
		}
	}
}

// TestAWG: exact ends (ASTM B258: 0.4600 in for 0000, 0.0050 in for 36), and
// printed diameters within 0.02 mil: the table gives five decimals of an inch,
// of which the last is not exact (0.32485 for 0.324861).
func TestAWG(t *testing.T) {
	if !near(AWG(-3), 0.46*inch) || !near(AWG(36), 0.005*inch) {
		t.Errorf("ends: %v and %v", AWG(-3)/inch, AWG(36)/inch)
	}
	mil := mustFind(t, Area, "cmil")
	for _, r := range published.Rows(t, "awg_diameters.csv") {
		n, ok := ParseAWG("AWG " + r["AWG"])
		if !ok {
			t.Fatalf("AWG %s is not read", r["AWG"])
		}
		d := AWG(n)
		if want := published.Number(t, r["diameter_in_printed_S12"]) * inch; math.Abs(d-want) > 2e-5*inch {
			t.Errorf("AWG %s: %v in, printed %v", r["AWG"], d/inch, want/inch)
		}
		if area, want := mil.FromSI(math.Pi/4*d*d), published.Number(t, r["area_cmil_printed_S7"]); !within(area, want, 2e-3) {
			t.Errorf("AWG %s: %v cmil, printed %v", r["AWG"], area, want)
		}
	}
	for text, want := range map[string]int{"24 AWG": 24, "4/0 AWG": -3, "AWG 0": 0, "AWG 1/0": 0, "awg 00": -1} {
		if n, ok := ParseAWG(text); !ok || n != want {
			t.Errorf("%q is gauge %d (%v), want %d", text, n, ok, want)
		}
	}
	for _, text := range []string{"24", "AWG 57", "AWG 2.5", "AWG 5/0", "AWG -4", "AWG 24 mm", ""} {
		if n, ok := ParseAWG(text); ok {
			t.Errorf("%q passed as gauge %d", text, n)
		}
	}
}

// TestTradeRow: one resistivity in the units of the trade, and per square of a
// sheet (common practice; computed by hand from the definitions).
func TestTradeRow(t *testing.T) {
	q, p := Parse(Resistivity, "0.43 µΩ·m")
	if p != nil {
		t.Fatal(p)
	}
	for unit, want := range map[string]string{"µΩ·cm": "43.00", "Ω·mm²/m": "0.4300", "Ω·cmil/ft": "258.66", "Ω·mil²/ft": "203.15", "nΩ·m": "430.0"} {
		digits := len(strings.ReplaceAll(strings.TrimPrefix(want, "0."), ".", ""))
		if got := Number(mustFind(t, Resistivity, unit).FromSI(q.Value), digits); got != want {
			t.Errorf("0.43 µΩ·m is %s %s, want %s", got, unit, want)
		}
	}
	if got := Number(mustFind(t, Conductivity, "%IACS").FromSI(1/q.Value), 3); got != "4.01" {
		t.Errorf("0.43 µΩ·m is %s %%IACS, want 4.01", got)
	}
	sheet, p := Parse(SheetResistance, "0.86 mohm per square")
	if p != nil {
		t.Fatal(p)
	}
	if r := ResistivityFromSheet(sheet, 0.5e-3); !near(r.Value, 0.43e-6) || r.Kind != Resistivity {
		t.Errorf("0.86 mΩ per square of 0.5 mm is %v Ω·m", r.Value)
	}
}
