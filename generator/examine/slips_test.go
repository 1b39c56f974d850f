package examine

import (
	"fmt"
	"strings"
	"testing"
)

// TestPublishedSlips: published unit errors, as negative tests. Each names the
// slip that would put the value right. Sources are ids of the bad examples and
// the unit tables that the project was given: textbook companions, a merchant
// page, standards with misprints.
func TestPublishedSlips(t *testing.T) {
	for _, c := range []struct {
		from, family, key, value string
		code, says               string
	}{
		{"0.43 µΩ·m read as µΩ·cm", "resistance alloys", "resistivity", "0.43 µΩ·cm", "resistivity-unlikely", "×100: µΩ·m read as µΩ·cm?"},
		{"BX06: 4.80e-05 printed as Ω·m, inputs in cm", "resistance alloys", "resistivity", "4.80e-05 Ω·m", "resistivity-unlikely", "×0.01"},
		{"258.66 Ω·cmil/ft read as µΩ·cm", "resistance alloys", "resistivity", "258.66 µΩ·cm", "resistivity-unlikely", "read as"},
		{"µ printed as m", "resistance alloys", "resistivity", "0.49 mΩ·m", "resistivity-unlikely", "×0.001"},
		{"copper per °F", "pure metals", "alpha", "0.00218 /K", "coefficient-unlikely", "per °F?"},
		{"BX12: 0.00015 is ten times the limit, told as unlikely only above 0.0015", "resistance alloys", "alpha", "0.0039 /K", "coefficient-unlikely", "resistance alloys"},
		{"%/K written as /K", "pure metals", "alpha", "0.393 /K", "coefficient-too-large", "%/K"},
		{"ppm/K written as /K", "resistance alloys", "alpha", "20 /K", "coefficient-too-large", "ppm/K"},
	} {
		rho, alpha := "1.7 µΩ·cm", "0.004 /K"
		if c.family == "resistance alloys" {
			rho, alpha = "43 µΩ·cm", "10 ppm/K"
		}
		if c.key == "alpha" {
			alpha = c.value
		} else {
			rho = c.value
		}
		text := record(fmt.Sprintf("name: X\nfamily: %s\nresistivity: %s\nalpha: %s\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nsource: standard\n", c.family, rho, alpha))
		found := false
		for _, f := range examined(text, "") {
			if f.Code == c.code {
				found = true
				if !strings.Contains(f.Mend+f.Message, c.says) {
					t.Errorf("%s: %q, %q do not say %q", c.from, f.Message, f.Mend, c.says)
				}
			}
		}
		if !found {
			t.Errorf("%s: %s is not found", c.from, c.code)
		}
	}
}

// TestPlausibleRangesHold: typical published values of each family pass.
func TestPlausibleRangesHold(t *testing.T) {
	for _, c := range []struct{ family, rho, alpha string }{
		{"pure metals", "1.587 µΩ·cm", "0.0038 /K"},           // silver, CRC wire tables
		{"standard conductors", "1.7241 µΩ·cm", "0.00393 /K"}, // IEC 60028
		{"standard conductors", "2.8264 µΩ·cm", "0.00403 /K"}, // IEC 60889
		{"resistance alloys", "0.43 Ω·mm²/m", "-3 ppm/K"},     // CuMn12Ni
		{"resistance alloys", "1.33 Ω·mm²/m", "20 ppm/K"},     // JB/T 5328
		{"heater alloys", "1.42 Ω·mm²/m", "30 ppm/K"},         // JIS C 2520
	} {
		text := record(fmt.Sprintf("name: X\nfamily: %s\nresistivity: %s\nalpha: %s\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nclass: textbook\ncondition: annealed\nsource: standard\n", c.family, c.rho, c.alpha))
		for _, f := range examined(text, "") {
			if f.Code == "resistivity-unlikely" || f.Code == "coefficient-unlikely" || f.Code == "alpha-conductivity-mismatch" {
				t.Errorf("%v: %s", c, f.Message)
			}
		}
	}
}
