package quantity

import (
	"sort"
	"strings"
	"testing"

	"ohmfolio/generator/place"
)

// TestSpellingsAreUnambiguous: within a kind no spelling means two units.
func TestSpellingsAreUnambiguous(t *testing.T) {
	for _, g := range table {
		seen := map[string]string{}
		for _, r := range g.rows {
			for _, s := range r.spellings(g.kind) {
				if s == "" {
					continue
				}
				folded := normalise(s)
				if other, ok := seen[folded]; ok && other != r.symbol {
					t.Errorf("%s: %q means %s and %s", g.kind, s, other, r.symbol)
				}
				seen[folded] = r.symbol
			}
		}
	}
}

// TestSpellings: how people write the units.
func TestSpellings(t *testing.T) {
	for _, c := range []struct {
		kind     Kind
		symbol   string
		spelling []string
	}{
		{Resistivity, "µΩ·cm", []string{"uohm cm", "uohm*cm", "uohm.cm", "uohm-cm", "microhm-cm", "\u00b5\u03a9 cm", "\u03bc\u2126cm", "µΩ\u202f·\u202fcm", "uOhm.cm"}},
		{Resistivity, "Ω·mm²/m", []string{"ohm mm2/m", "ohm mm^2/m", "Ohm.mm2/m", "\u2126·mm²/m", "ohm*mm**2/m"}},
		{Resistivity, "Ω·cmil/ft", []string{"ohm cmil/ft", "ohm*cmil/ft", "ohm circular mil/ft"}},
		{Resistivity, "Ω·mil²/ft", []string{"ohm sq mil/ft", "ohm mil2/ft"}},
		{Resistivity, "Ω·m", []string{"ohm m", "ohm-m", "Ω·m²/m", "ohm m2/m"}},
		{Conductivity, "MS/m", []string{"m/(Ω·mm²)", "m/(ohm mm2)", "MS/m"}},
		{Conductivity, "%IACS", []string{"% IACS", "%IACS"}},
		{SheetResistance, "Ω/□", []string{"ohm/sq", "ohms per square", "Ω/sq"}},
		{ResistancePerLength, "Ω/1000 ft", []string{"ohm/1000ft", "ohms/1000 ft", "ohm/kft"}},
		{Coefficient1, "/K", []string{"1/K", "K^-1", "K⁻¹", "/°C", "1/degC", "/ºC", "°C⁻¹"}},
		{Coefficient1, "ppm/K", []string{"ppm/degC", "ppm/°C", "10^-6/K", "10⁻⁶/K", "µm/(m·K)"}},
		{Coefficient1, "/°F", []string{"1/°F", "/degF", "1/degF"}},
		{Coefficient2, "/K²", []string{"/K^2", "/K2", "1/K²", "K^-2", "/°C²", "/degC^2"}},
		{Coefficient2, "ppm/K²", []string{"ppm/K^2", "ppm/K2", "ppm/°C²"}},
		{Coefficient4, "/K⁴", []string{"/°C⁴", "1/K^4", "K⁻⁴"}},
		{Temperature, "°C", []string{"degC", "deg C", "℃", "ºC"}},
		{Temperature, "°F", []string{"degF", "℉"}},
		{TemperatureDifference, "Δ°F", []string{"delta degF", "Δ°F", "\u2206°F", "delta °F"}},
		{ThermalConductivity, "W/(m·K)", []string{"W/(m K)", "W/(m*K)", "W/mK", "W/m/K", "W/(m·°C)", "W·m⁻¹·K⁻¹"}},
		{SurfaceLoad, "W/in²", []string{"W/in2", "W/in^2", "W/sq in"}},
		{Stress, "MPa", []string{"N/mm²", "N/mm2"}},
		{Length, "µm", []string{"um", "\u03bcm", "micron"}},
	} {
		for _, s := range c.spelling {
			if u, ok := FindUnit(c.kind, s); !ok || u.Symbol != c.symbol {
				t.Errorf("%s: %q is read as %q (%v), want %s", c.kind, s, u.Symbol, ok, c.symbol)
			}
		}
	}
}

func TestNearUnit(t *testing.T) {
	for _, c := range []struct {
		kind          Kind
		spelled, want string
	}{
		{Resistivity, "µΩ·cn", "µΩ·cm"},
		{Resistivity, "ohm cmi/ft", "Ω·cmil/ft"},
		{Resistivity, "Ω/m", string(ResistancePerLength)},
		{Resistivity, "°C", string(Temperature)},
		{Coefficient1, "pm/K", "ppm/K"},
		{Resistivity, "furlongs", ""},
		{Temperature, "", "°C, K, °F"},
	} {
		if got := NearUnit(c.kind, c.spelled); got != c.want {
			t.Errorf("near %q: %q, want %q", c.spelled, got, c.want)
		}
	}
}

// TestFindingKinds: sorted, documented, and the line of the trigger that is
// wrong has the problem it stands for.
func TestFindingKinds(t *testing.T) {
	if !sort.SliceIsSorted(FindingKinds, func(i, j int) bool { return FindingKinds[i].Code < FindingKinds[j].Code }) {
		t.Error("not sorted by code")
	}
	for _, k := range FindingKinds {
		if k.Title == "" || k.Explanation == "" || k.Mend == "" || k.Severity != place.Error {
			t.Errorf("%s is not documented", k.Code)
		}
		if codes := problems(k.Trigger); len(codes) != 1 || codes[0] != k.Code {
			t.Errorf("%s: its trigger gives %v", k.Code, codes)
		}
	}
}

// problems reads the quantities of a trigger as a record would.
func problems(trigger string) (codes []string) {
	_, record, _ := strings.Cut(trigger, "-- materials/x.yaml --\n")
	for line := range strings.Lines(record) {
		key, value, _ := strings.Cut(strings.TrimSpace(line), ": ")
		var p *Problem
		switch key {
		case "resistivity":
			_, p = Parse(Resistivity, value)
		case "alpha":
			_, p = Parse(Coefficient1, value)
		case "reference_temperature":
			_, p = Parse(Temperature, value)
		case "valid_range":
			_, _, p = ParseRange(Temperature, value)
		}
		if p != nil {
			codes = append(codes, p.Code)
		}
	}
	return codes
}
