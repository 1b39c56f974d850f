package fit

import (
	"math"
	"strings"
	"testing"

	"ohmfolio/generator/columns"
	"ohmfolio/generator/place"
)

func read(text string) ([]Point, Header, []place.Finding) {
	return ReadPoints(place.NewSource("materials/points.csv", []byte(text)))
}

func TestReadPoints(t *testing.T) {
	for _, text := range []string{
		"temperature / °C,resistance / mΩ,uncertainty / %,uncertainty_T / K\n20,1.000,0.1,0.02\n−40,0.998,0.1,0.02\n",
		"\ufefftemperature [degC], resistance [mohm], uncertainty [%], uncertainty_T [K]\r\n20,1.000,0.1,0.02\r\n-40,0.998,0.1,0.02\r\n\r\n",
		"uncertainty (uohm),temperature (K),uncertainty_T (mK),resistance (ohm)\n1,293.15,20,1e-3\n0.998,233.15,20,0.998e-3\n",
	} {
		points, h, findings := read(text)
		if len(findings) > 0 || len(points) != 2 {
			t.Fatalf("%q: %v", text, findings)
		}
		p := points[1]
		if math.Abs(p.T-233.15) > 1e-9 || math.Abs(p.Y-0.998e-3) > 1e-15 || math.Abs(p.U-0.998e-6) > 1e-15 || math.Abs(p.UT-0.02) > 1e-12 || p.Line < 3 || !h.HasUncertainty() {
			t.Errorf("%q: %+v", text, p)
		}
	}
}

func TestReadPointsRefuses(t *testing.T) {
	const head = "temperature / °C,resistance / Ω\n"
	for text, want := range map[string]string{
		"":                                   "points-unreadable 1:1",
		"temperature,resistance / Ω\n20,1\n": "unit-missing 1:1",
		"temperature / °C,resistance / V\n20,1\n":      "unit-unknown 1:18",
		"temperature / °C;resistance / Ω\n20;1\n":      "points-semicolons 1:1",
		"temprature / °C,resistance / Ω\n20,1\n":       "points-columns 1:1",
		"temperature / °C,temperature / K\n20,1\n":     "points-columns 1:18",
		head + "20,1\ntemperature / °C,resistance / Ω": "points-columns 3:1",
		head + "20,\"1,5\"\n":                          "comma-decimal 2:4",
		head + "20,1,5\n":                              "points-unreadable 2:1",
		head + "20,NaN\n":                              "number-not-finite 2:4",
		head + "20,1e999\n":                            "number-not-finite 2:4",
		head + "-300,1\n":                              "temperature-below-absolute-zero 2:1",
		head + "20,-1\n":                               "row-not-positive 2:4",
		head + "20,about one\n":                        "number-not-read 2:4",
		head + "20,\n":                                 "value-missing 2:4",
		head + "20,\"1\n":                              "points-unreadable 2:6",
	} {
		_, _, findings := read(text)
		if len(findings) == 0 {
			t.Errorf("%q is accepted", text)
			continue
		}
		f := findings[0]
		if got := f.Code + " " + strings.TrimPrefix(f.Position.String(), "materials/points.csv:"); got != want {
			t.Errorf("%q: %s, want %s", text, got, want)
		}
	}
}

// TestRubbish: a long file of rubbish is told in a few findings.
func TestRubbish(t *testing.T) {
	_, _, findings := read("temperature / °C,resistance / Ω\n" + strings.Repeat("x,y\n", 100000))
	if len(findings) != columns.Shown+1 || !strings.Contains(findings[len(findings)-1].Message, "99980 more") {
		t.Errorf("%d findings, the last: %+v", len(findings), findings[len(findings)-1])
	}
}

func FuzzReadPoints(f *testing.F) {
	f.Add("temperature / °C,resistance / mΩ,uncertainty / %,uncertainty_T / K\n20,1.000,0.1,0.02\n")
	f.Add("uncertainty (uohm),temperature (K)\n\"1\n")
	f.Fuzz(func(t *testing.T, text string) {
		points, _, findings := read(text)
		for _, p := range points {
			if !finite(p.T) || !finite(p.Y) || p.Y <= 0 || p.T < 0 {
				t.Fatalf("%+v", p)
			}
		}
		for _, x := range findings {
			if x.Code == "" || x.Message == "" || x.Position.File == "" {
				t.Fatalf("%+v", x)
			}
		}
	})
}
