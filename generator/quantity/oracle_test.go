package quantity

import (
	"os/exec"
	"regexp"
	"strings"
	"testing"

	"ohmfolio/generator/published"
)

// gnuWords are the words of GNU units for those of our ASCII spellings that it
// does not know.
var gnuWords = map[string]string{
	"uohm": "microohm", "nohm": "nanoohm", "mohm": "milliohm", "kohm": "kiloohm", "Mohm": "megaohm", "MS": "megasiemens", "kS": "kilosiemens",
	"cmil": "circularmil", "cmil2": "circularmil2", "degC": "degC", "t": "tonne", "h": "hour", "in": "inch", "in2": "inch2", "in3": "inch3", "permil": "0.001",
	"delta": "", "sq": "1", "um": "micrometer",
}

// gnuSI is the SI unit of each kind in the words of GNU units.
var gnuSI = map[Kind]string{
	Resistivity: "ohm m", Conductivity: "siemens/m", MassResistivity: "ohm kg/m^2", SheetResistance: "ohm", ResistancePerLength: "ohm/m", Resistance: "ohm",
	Coefficient1: "1/K", Coefficient2: "1/K^2", Coefficient3: "1/K^3", Coefficient4: "1/K^4", TemperatureDifference: "K", Density: "kg/m^3", EMF: "V/K",
	ThermalConductivity: "W/m K", SpecificHeat: "J/kg K", SurfaceLoad: "W/m^2", FilmCoefficient: "W/m^2 K", ThermalResistance: "K/W", CurrentDensity: "A/m^2", Stress: "Pa", Length: "m", Area: "m^2", Mass: "kg",
	Current: "A", Voltage: "V", Power: "W", Time: "s", Ratio: "1",
}

var gnuWord = regexp.MustCompile(`[A-Za-z]+[0-9]?`)

// TestAgainstGNUUnits holds every factor against GNU units (Debian package
// units), but for prices, temperatures (below) and %IACS, which is a
// definition (58 MS/m, IEC publication 28).
func TestAgainstGNUUnits(t *testing.T) {
	published.Need(t, "units", "units")
	for _, k := range Kinds() {
		for _, u := range Units(k) {
			if k == Price || k == Temperature || u.Symbol == "%IACS" {
				continue
			}
			from := gnuWord.ReplaceAllStringFunc(u.ASCII, func(w string) string {
				if g, ok := gnuWords[w]; ok {
					return g
				}
				return w
			})
			if strings.HasPrefix(from, "/") {
				from = "1" + from
			}
			from = strings.Replace(from, "%", "0.01", 1)
			if want := published.Number(t, gnu(t, from, gnuSI[k])); !within(u.ToSI(1), want, 2e-14) {
				t.Errorf("%s: one %s is %v, GNU units says %v for %q", k, u.ASCII, u.ToSI(1), want, from)
			}
		}
	}
}

// TestTemperaturesAgainstGNUUnits: temperatures have their own functions
// there; degC alone would be a difference.
func TestTemperaturesAgainstGNUUnits(t *testing.T) {
	published.Need(t, "units", "units")
	for _, x := range []string{"-40", "0", "20", "68", "212", "1000.5"} {
		for spelled, function := range map[string]string{"°C": "tempC(" + x + ")", "°F": "tempF(" + x + ")", "K": "tempK(" + x + ")"} {
			if x == "-40" && spelled == "K" {
				continue
			}
			q, p := Parse(Temperature, x+" "+spelled)
			if p != nil {
				t.Fatal(p)
			}
			if want := published.Number(t, gnu(t, function, "K")); !within(q.Value, want, 1e-14) {
				t.Errorf("%s %s is %v K, GNU units says %v", x, spelled, q.Value, want)
			}
		}
	}
}

func gnu(t *testing.T, from, to string) string {
	t.Helper()
	out, err := exec.Command("units", "-o", "%.16g", "-t", from, to).CombinedOutput()
	if err != nil {
		t.Fatalf("units %q %q: %v\n%s", from, to, err, out)
	}
	return strings.TrimSpace(string(out))
}
