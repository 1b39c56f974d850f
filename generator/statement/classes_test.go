package statement

import (
	"math"
	"testing"

	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/published"
)

// TestToleranceClasses holds the classes of the demo's platinum thermometer
// against the printed table (IEC 60751, older edition, as transcribed: ±°C and
// ±Ω of a sensor of 100 Ω, to 0.01 Ω) and against the formulas of the current
// edition at every temperature of that table.
func TestToleranceClasses(t *testing.T) {
	lib := demo(t)
	set := lib.Material("platinum-thermometer").Adopted
	class := map[string]material.ToleranceClass{}
	for _, c := range set.Classes {
		class[c.Name] = c
	}
	compared := 0
	for _, row := range published.Rows(t, "iec60751_tolerance.csv") {
		at := published.Number(t, row["t_C"]) + 273.15
		for column, name := range map[string]string{"AA_C_calc_0.1+0.0017|t|": "AA", "A_C_calc_0.15+0.002|t|": "A", "B_C_calc_0.3+0.005|t|": "B", "C_C_calc_0.6+0.01|t|": "C"} {
			kelvin, _, ok := ClassTolerance(set, class[name], at)
			if want := published.Number(t, row[column]); !ok || math.Abs(kelvin-want) > 5e-5 {
				t.Errorf("class %s at %s °C: %v K, want %v", name, row["t_C"], kelvin, want)
			}
		}
		for _, c := range []struct {
			name, degrees, ohms string
		}{{"A", "A_C_printed_S20", "A_ohm_printed_S20"}, {"B", "B_C_printed_S20", "B_ohm_printed_S20"}} {
			degrees, printed := published.Optional(row[c.degrees])
			if !printed {
				continue
			}
			compared++
			kelvin, ratio, _ := ClassTolerance(set, class[c.name], at)
			if math.Abs(kelvin-degrees) > 0.05+1e-9 {
				t.Errorf("class %s at %s °C: %v K, printed %v", c.name, row["t_C"], kelvin, degrees)
			}
			if ohms := published.Number(t, row[c.ohms]); math.Abs(ratio*100-ohms) > 0.011 {
				t.Errorf("class %s at %s °C: ±%.4f Ω, printed %v", c.name, row["t_C"], ratio*100, ohms)
			}
		}
	}
	if compared < 14 {
		t.Errorf("only %d printed cells were compared", compared)
	}
}

// TestClassRange: outside its stated range a class tells nothing.
func TestClassRange(t *testing.T) {
	r, findings := material.Read("x", place.NewSource("materials/x.yaml", []byte("name: X\nsource: s\nbasis: resistance\n"+
		"callendar_van_dusen: {A: 3.9083e-3 /°C, B: -5.775e-7 /°C²}\nvalid_range: 0 °C to 850 °C\n"+
		"tolerance_classes: [{name: B, at_zero: 0.3 K, per_degree: 0.005, window: 0 °C to 500 °C}]\n")), nil)
	if place.Count(findings, place.Error) > 0 {
		t.Fatal(findings)
	}
	if _, _, ok := ClassTolerance(r.Adopted, r.Adopted.Classes[0], 773.15); !ok {
		t.Error("nothing at the edge of the class")
	}
	if k, _, ok := ClassTolerance(r.Adopted, r.Adopted.Classes[0], 773.16); ok {
		t.Errorf("%v K beyond the range of the class", k)
	}
}
