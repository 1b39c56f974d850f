package material

import (
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"ohmfolio/generator/place"
	"ohmfolio/generator/published"
)

// demoRecord reads one record of the demo reference.
func demoRecord(t *testing.T, id string) *Record {
	t.Helper()
	text, err := os.ReadFile(filepath.Join("..", "..", "materials", id+".yaml"))
	if err != nil {
		t.Fatal(err)
	}
	r, findings := Read(id, place.NewSource("materials/"+id+".yaml", text), nil)
	if place.Count(findings, place.Error) > 0 {
		t.Fatalf("%s: %v", id, findings)
	}
	return r
}

// TestPublishedResistivity: every row that was read in a published table is
// reproduced by some data set of the demo record that cites it, to the last
// bit of the conversion.
func TestPublishedResistivity(t *testing.T) {
	for _, c := range []struct {
		file, id, temperature, value, state string
		least                               int // rows that must be compared
	}{
		{"matula1979_copper.csv", "copper-pure", "T_K", "rho_total_1e-8_ohm_m", "provenance_total", 10},
		{"matula1979_gold.csv", "gold", "T_K", "rho_total_1e-8_ohm_m", "provenance", 12},
		{"matula1979_silver.csv", "silver", "T_K", "rho_total_1e-8_ohm_m", "provenance", 12},
		{"tungsten_300_3600K.csv", "tungsten", "T_K", "rho_1e-8_ohm_m", "provenance_rho", 15},
		{"desai1984_aluminium.csv", "aluminium-pure", "T_K", "rho_CRC_1e-8_ohm_m", "provenance_CRC", 5},
	} {
		r, compared := demoRecord(t, c.id), 0
		for _, row := range published.Rows(t, c.file) {
			at, okT := published.Optional(row[c.temperature])
			want, okV := published.Optional(row[c.value])
			if !okT || !okV || !strings.HasPrefix(row[c.state], "SEEN") {
				continue
			}
			found, nearest := reproduced(r, at, want*1e-8)
			if !found {
				t.Errorf("%s at %g K: published %g, the nearest data set gives %g", c.id, at, want, nearest*1e8)
			}
			compared++
		}
		if compared < c.least {
			t.Errorf("%s: only %d rows were compared", c.file, compared)
		}
	}
}

// reproduced looks for a data set that gives want at a temperature.
func reproduced(r *Record, at, want float64) (found bool, nearest float64) {
	nearest = math.Inf(1)
	for _, s := range r.Sets {
		for _, t := range []float64{at, at + 0.15} { // a 273 K row is 273.15 K (trap of the CRC table)
			v, ok := Reading{Told: s.Rho}.At(t)
			if ok && math.Abs(v-want) < math.Abs(nearest-want) {
				nearest = v
			}
		}
	}
	return math.Abs(nearest/want-1) < 1e-9, nearest
}

// TestWireTables: the CRC wire tables at 0, 20, 25 and 100 °C.
func TestWireTables(t *testing.T) {
	ids := map[string]string{"Al": "aluminium-pure", "Pt": "platinum", "W": "tungsten", "Cu": "copper-pure", "Ag": "silver", "Au": "gold"}
	compared := 0
	for _, row := range published.Rows(t, "crc_wire_table_0_20_25_100C.csv") {
		id, ok := ids[row["metal"]]
		if !ok {
			continue
		}
		r := demoRecord(t, id)
		for _, c := range []float64{0, 20, 25, 100} {
			want, _ := published.Optional(row["rho_"+strconv.Itoa(int(c))+"C_1e-8_ohm_m"])
			if found, got := reproduced(r, 273.15+c, want*1e-8); !found {
				t.Errorf("%s at %g °C: published %g, the nearest %g", id, c, want, got*1e8)
			}
			compared++
		}
	}
	if compared < 12 {
		t.Errorf("only %d values were compared", compared)
	}
}

// TestHeaterFactors: GB/T 1234, every printed factor.
func TestHeaterFactors(t *testing.T) {
	ids := map[string]string{"Cr20Ni80 (NiCr8020)": "nicr8020", "Cr15Ni60 (NiCr6015)": "nicr6015", "0Cr25Al5": "fecral-25-5", "0Cr21Al4": "fecral-21-4", "Cr20Ni30": "nicr3020", "CuNi44": "cuni44"}
	compared := 0
	for _, row := range published.Rows(t, "ct_factors.csv") {
		id, ok := ids[row["grade"]]
		if !ok {
			continue
		}
		set := demoRecord(t, id).Adopted
		for column, text := range row {
			c, isFactor := strings.CutPrefix(column, "Ct_")
			want, there := published.Optional(text)
			if !isFactor || !there {
				continue
			}
			celsius, _ := published.Optional(c)
			got, ok := Reading{Told: set.Ratio, Ratio: true, Reference: 293.15}.At(273.15 + celsius)
			if !ok || math.Abs(got-want) > 1e-12 {
				t.Errorf("%s at %s °C: published %g, computed %g", id, c, want, got)
			}
			compared++
		}
	}
	if compared < 60 {
		t.Errorf("only %d factors were compared", compared)
	}
}

// TestThermometer: IEC 60751, every row, to half a unit of the fourth decimal.
func TestThermometer(t *testing.T) {
	set := demoRecord(t, "platinum-thermometer").Adopted
	for _, row := range published.Rows(t, "iec60751_pt100.csv") {
		c, _ := published.Optional(row["t_C"])
		want, _ := published.Optional(row["R_ohm_calc_4_decimals"])
		got, ok := Reading{Told: set.Ratio}.At(273.15 + c)
		if !ok || math.Abs(100*got-want) > 0.5001e-4 {
			t.Errorf("at %g °C: %g Ω, computed %g", c, want, 100*got)
		}
	}
	if set.Rho != nil {
		t.Error("thermometer wire answers ratios only, and tells a resistivity")
	}
}

// TestCopperAtOtherTemperatures: α of standard copper about 0, 15, 25, 30 and
// 50 °C (NBS Handbook 100, row of 100 % IACS), through the record.
func TestCopperAtOtherTemperatures(t *testing.T) {
	p, ok := demoRecord(t, "copper-annealed").Adopted.Polynomial()
	if !ok {
		t.Fatal("copper-annealed is no polynomial")
	}
	compared := 0
	for _, row := range published.Rows(t, "nbs_copper_alpha_vs_conductivity.csv") {
		if row["percent_IACS"] != "100" {
			continue
		}
		for _, c := range []int{0, 15, 20, 25, 30, 50} {
			name := "alpha_" + strconv.Itoa(c) + "C"
			calc, _ := published.Optional(row[name+"_calc"])
			printed, _ := published.Optional(row[name+"_printed_memory"])
			got := p.Rereference(273.15 + float64(c)).Alpha
			if math.Abs(got-calc) > 5e-8 || math.Abs(got-printed) > 0.5001e-5 {
				t.Errorf("α at %d °C: %g, recomputed %g, printed %g", c, got, calc, printed)
			}
			compared++
		}
	}
	if compared != 6 {
		t.Errorf("%d values were compared", compared)
	}
}

// TestBasisMatters: taking the resistance coefficient of CuMn12Ni for one of
// resistivity moves R at 105 °C by about 1,500 ppm (18 ppm/K over 85 K).
func TestBasisMatters(t *testing.T) {
	text := func(basis string) string {
		return "name: X\nsource: s\nbasis: " + basis + "\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nbeta: -0.5 ppm/K²\nreference_temperature: 20 °C\nvalid_range: -40 °C to 125 °C\nproperties:\n  expansion: {value: 18e-6 /K, source: s}\n"
	}
	ratio := func(basis string) float64 {
		r, findings := Read("x", place.NewSource("materials/x.yaml", []byte(text(basis))), nil)
		if place.Count(findings, place.Error) > 0 {
			t.Fatal(findings)
		}
		v, _ := Reading{Told: r.Adopted.Ratio, Ratio: true, Reference: 293.15}.At(273.15 + 105)
		return v
	}
	if d := (ratio("resistance") - ratio("resistivity")) * 1e6; math.Abs(d-1527) > 5 {
		t.Errorf("the bases differ by %g ppm; 18 ppm/K × 85 K is 1530, less what the quotient takes", d)
	}
	// 1 − 2762.5 ppm by hand (10 × 85 − 0.5 × 85²).
	if v := ratio("resistance"); math.Abs(v-(1-2762.5e-6)) > 1e-12 {
		t.Errorf("R/R at 105 °C is %.9f", v)
	}
}
