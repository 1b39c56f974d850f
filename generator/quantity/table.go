package quantity

import (
	"fmt"
	"math"
	"strings"
)

// row is one unit: symbol, ASCII spelling, UCUM code, factor to SI, offset,
// and other spellings separated by |.
type row struct {
	symbol, ascii, ucum string
	factor, offset      float64
	also                string
}

func (r row) unit(k Kind) Unit {
	return Unit{Symbol: r.symbol, ASCII: r.ascii, UCUM: r.ucum, Kind: k, factor: r.factor, offset: r.offset}
}

// Exact factors: inch and foot (international, 1959) and the circular mil.
const (
	inch        = 0.0254
	foot        = 0.3048
	circularMil = math.Pi / 4 * 25.4e-6 * 25.4e-6
	squareMil   = 25.4e-6 * 25.4e-6
	pound       = 0.45359237
	psi         = pound * 9.80665 / (inch * inch) // pound-force per square inch, standard gravity (CGPM 1901)
	// iacs is the conductivity of the International Annealed Copper Standard
	// at 20 °C: 58 MS/m exactly (IEC publication 28, 1925).
	iacs = 58e6
)

// table is every unit of the trade. The first of a kind is the usual one.
var table = []struct {
	kind Kind
	rows []row
}{
	{Resistivity, []row{
		{"µΩ·cm", "uohm cm", "uOhm.cm", 1e-8, 0, "microohm cm|uohm-cm|microhm cm|microhm-cm|micro-ohm cm|micro-ohm-cm|microohm-cm"},
		{"Ω·mm²/m", "ohm mm2/m", "Ohm.mm2/m", 1e-6, 0, "ohm sqmm/m|ohm mm^2/m"},
		{"µΩ·m", "uohm m", "uOhm.m", 1e-6, 0, "microohm m|uohm-m|microhm m|micro-ohm m"},
		{"nΩ·m", "nohm m", "nOhm.m", 1e-9, 0, "nanoohm m"},
		{"mΩ·m", "mohm m", "mOhm.m", 1e-3, 0, ""},
		{"mΩ·cm", "mohm cm", "mOhm.cm", 1e-5, 0, ""},
		{"Ω·m", "ohm m", "Ohm.m", 1, 0, "ohm-m|ohm m2/m"},
		{"Ω·cm", "ohm cm", "Ohm.cm", 1e-2, 0, "ohm-cm"},
		{"µΩ·in", "uohm in", "uOhm.[in_i]", 1e-6 * inch, 0, "microohm in|uohm inch|microhm in|microhm inch"},
		{"10⁻⁸ Ω·m", "1e-8 ohm m", "10*-8.Ohm.m", 1e-8, 0, "10^-8 ohm m|x10^-8 ohm m|×10⁻⁸ Ω·m"},
		{"Ω·cmil/ft", "ohm cmil/ft", "Ohm.[cml_i]/[ft_i]", circularMil / foot, 0, "ohm circularmil/ft|ohm cmil per ft|Ω·CM/ft"},
		{"Ω·mil²/ft", "ohm mil2/ft", "Ohm.[mil_i]2/[ft_i]", squareMil / foot, 0, "ohm sqmil/ft|Ω·sq mil/ft|ohm sq mil/ft"},
	}},
	{Conductivity, []row{
		{"MS/m", "MS/m", "MS/m", 1e6, 0, "m/(Ω·mm²)|m/(ohm mm2)|m/ohm mm2|MS m^-1"},
		{"S/m", "S/m", "S/m", 1, 0, "1/(Ω·m)|1/(ohm m)"},
		{"kS/cm", "kS/cm", "kS/cm", 1e5, 0, ""},
		{"S/cm", "S/cm", "S/cm", 100, 0, ""},
		{"%IACS", "%IACS", "", iacs / 100, 0, "% IACS|percent IACS"},
	}},
	{MassResistivity, []row{
		{"Ω·g/m²", "ohm g/m2", "Ohm.g/m2", 1e-3, 0, "ohm gram/m2|Ω(metre,gram)"},
		{"Ω·kg/m²", "ohm kg/m2", "Ohm.kg/m2", 1, 0, ""},
		{"Ω·lb/mile²", "ohm lb/mile2", "Ohm.[lb_av]/[mi_i]2", pound / (1609.344 * 1609.344), 0, "ohm lb/mi2"},
	}},
	{SheetResistance, []row{
		{"Ω/□", "ohm/sq", "Ohm", 1, 0, "ohm per square|ohm/square|Ω per square"},
		{"mΩ/□", "mohm/sq", "mOhm", 1e-3, 0, "mohm per square|mohm/square|mΩ per square"},
		{"µΩ/□", "uohm/sq", "uOhm", 1e-6, 0, "uohm per square|uohm/square|µΩ per square"},
	}},
	{ResistancePerLength, []row{
		{"Ω/m", "ohm/m", "Ohm/m", 1, 0, "ohm per m"},
		{"mΩ/m", "mohm/m", "mOhm/m", 1e-3, 0, ""},
		{"µΩ/m", "uohm/m", "uOhm/m", 1e-6, 0, ""},
		{"Ω/cm", "ohm/cm", "Ohm/cm", 100, 0, ""},
		{"Ω/km", "ohm/km", "Ohm/km", 1e-3, 0, "ohm per km"},
		{"Ω/ft", "ohm/ft", "Ohm/[ft_i]", 1 / foot, 0, ""},
		{"Ω/1000 ft", "ohm/1000 ft", "", 1e-3 / foot, 0, "ohm/1000ft|ohm/kft|ohm per 1000 ft"},
	}},
	{Resistance, []row{
		{"Ω", "ohm", "Ohm", 1, 0, ""}, {"mΩ", "mohm", "mOhm", 1e-3, 0, "milliohm"}, {"µΩ", "uohm", "uOhm", 1e-6, 0, "microohm"},
		{"nΩ", "nohm", "nOhm", 1e-9, 0, ""}, {"kΩ", "kohm", "kOhm", 1e3, 0, ""}, {"MΩ", "Mohm", "MOhm", 1e6, 0, ""},
	}},
	{Coefficient1, coefficients(1)},
	{Coefficient2, coefficients(2)},
	{Coefficient3, coefficients(3)},
	{Coefficient4, coefficients(4)},
	{Temperature, []row{
		{"°C", "degC", "Cel", 1, 273.15, "C|deg C"}, {"K", "K", "K", 1, 0, "kelvin"},
		{"°F", "degF", "[degF]", 5.0 / 9, 459.67, "F|deg F"},
	}},
	{TemperatureDifference, []row{
		{"K", "K", "K", 1, 0, "Δ°C|delta degC|deltaC|ΔK|kelvin"}, {"mK", "mK", "mK", 1e-3, 0, ""},
		{"Δ°F", "delta degF", "[degF]", 5.0 / 9, 0, "deltaF"},
	}},
	{Density, []row{
		{"g/cm³", "g/cm3", "g/cm3", 1e3, 0, "kg/dm³|kg/l|g/ml|t/m³|Mg/m³"}, {"kg/m³", "kg/m3", "kg/m3", 1, 0, ""},
		{"lb/in³", "lb/in3", "[lb_av]/[in_i]3", pound / (inch * inch * inch), 0, ""},
	}},
	{EMF, []row{
		{"µV/K", "uV/K", "uV/K", 1e-6, 0, "µV/°C|uV/degC"}, {"mV/K", "mV/K", "mV/K", 1e-3, 0, "mV/°C|mV/degC"}, {"V/K", "V/K", "V/K", 1, 0, "V/°C"},
	}},
	{ThermalConductivity, []row{
		{"W/(m·K)", "W/(m K)", "W/(m.K)", 1, 0, "W/mK|W/(m*K)|W/m/K|W·m⁻¹·K⁻¹|W/(m·°C)|W/(m degC)"},
		{"W/(cm·K)", "W/(cm K)", "W/(cm.K)", 100, 0, "W/cmK|W/(cm·°C)"},
	}},
	{SpecificHeat, []row{
		{"J/(kg·K)", "J/(kg K)", "J/(kg.K)", 1, 0, "J/kgK|J/kg/K|J·kg⁻¹·K⁻¹|J/(kg·°C)"}, {"J/(g·K)", "J/(g K)", "J/(g.K)", 1e3, 0, "J/gK|kJ/(kg·K)|J/(g·°C)"},
	}},
	{SurfaceLoad, []row{
		{"W/cm²", "W/cm2", "W/cm2", 1e4, 0, ""}, {"W/m²", "W/m2", "W/m2", 1, 0, ""}, {"W/in²", "W/in2", "W/[in_i]2", 1 / (inch * inch), 0, "W/sqin|W/sq in"},
	}},
	{FilmCoefficient, []row{{"W/(m²·K)", "W/(m2 K)", "W/(m2.K)", 1, 0, "W/m²K|W/m2K|W/m²/K|W·m⁻²·K⁻¹|W/(m²·°C)"}}},
	{ThermalResistance, []row{{"K/W", "K/W", "K/W", 1, 0, "°C/W|degC/W"}}},
	{CurrentDensity, []row{{"A/mm²", "A/mm2", "A/mm2", 1e6, 0, ""}, {"A/m²", "A/m2", "A/m2", 1, 0, ""}, {"A/cm²", "A/cm2", "A/cm2", 1e4, 0, ""}}},
	{Stress, []row{{"MPa", "MPa", "MPa", 1e6, 0, "N/mm²|N/mm2"}, {"GPa", "GPa", "GPa", 1e9, 0, ""}, {"Pa", "Pa", "Pa", 1, 0, ""}, {"ksi", "ksi", "k[psi]", 1e3 * psi, 0, ""}, {"psi", "psi", "[psi]", psi, 0, ""}}},
	{Length, []row{
		{"mm", "mm", "mm", 1e-3, 0, ""}, {"m", "m", "m", 1, 0, ""}, {"cm", "cm", "cm", 1e-2, 0, ""}, {"µm", "um", "um", 1e-6, 0, "micron"},
		{"km", "km", "km", 1e3, 0, ""}, {"in", "in", "[in_i]", inch, 0, "inch|\""}, {"mil", "mil", "[mil_i]", inch / 1000, 0, "thou"}, {"ft", "ft", "[ft_i]", foot, 0, "foot|feet"},
	}},
	{Area, []row{
		{"mm²", "mm2", "mm2", 1e-6, 0, "sqmm"}, {"m²", "m2", "m2", 1, 0, ""}, {"cm²", "cm2", "cm2", 1e-4, 0, ""},
		{"cmil", "cmil", "[cml_i]", circularMil, 0, "circularmil"}, {"mil²", "mil2", "[mil_i]2", squareMil, 0, "sqmil"}, {"in²", "in2", "[in_i]2", inch * inch, 0, "sqin"},
	}},
	{Mass, []row{{"kg", "kg", "kg", 1, 0, ""}, {"g", "g", "g", 1e-3, 0, ""}, {"t", "t", "t", 1e3, 0, ""}, {"lb", "lb", "[lb_av]", pound, 0, ""}}},
	{Current, []row{{"A", "A", "A", 1, 0, ""}, {"mA", "mA", "mA", 1e-3, 0, ""}, {"kA", "kA", "kA", 1e3, 0, ""}}},
	{Voltage, []row{{"V", "V", "V", 1, 0, ""}, {"mV", "mV", "mV", 1e-3, 0, ""}, {"µV", "uV", "uV", 1e-6, 0, ""}, {"kV", "kV", "kV", 1e3, 0, ""}}},
	{Power, []row{{"W", "W", "W", 1, 0, ""}, {"mW", "mW", "mW", 1e-3, 0, ""}, {"kW", "kW", "kW", 1e3, 0, ""}}},
	{Time, []row{{"s", "s", "s", 1, 0, ""}, {"ms", "ms", "ms", 1e-3, 0, ""}, {"min", "min", "min", 60, 0, ""}, {"h", "h", "h", 3600, 0, ""}}},
	{Ratio, []row{{"", "1", "1", 1, 0, ""}, {"%", "%", "%", 1e-2, 0, "percent"}, {"ppm", "ppm", "[ppm]", 1e-6, 0, ""}, {"‰", "permil", "[ppth]", 1e-3, 0, ""}}},
	{Price, prices()},
}

// coefficients makes the units of the power n of 1/K.
func coefficients(n int) []row {
	power := [...]string{"", "", "²", "³", "⁴"}[n]
	ascii := [...]string{"", "", "2", "3", "4"}[n]
	minus := [...]string{"", "⁻¹", "⁻²", "⁻³", "⁻⁴"}[n]
	caret := fmt.Sprintf("^-%d", n)
	ucum := fmt.Sprintf("K-%d", n)
	fahrenheit := math.Pow(1.8, float64(n))
	per := func(s string) string {
		return strings.Join([]string{s + "/°C" + power, s + "/C" + ascii, s + "·K" + minus, s + "*K" + caret, s + "·°C" + minus, s + "*degC" + caret}, "|")
	}
	perF := func(s string) string { return s + "/F" + ascii + "|" + s + "·°F" + minus + "|" + s + "*degF" + caret }
	parts := per("ppm") + "|" + per("10⁻⁶") + "|" + per("10^-6") + "|" + per("1e-6") + "|10⁻⁶/K" + power + "|10^-6/K" + power + "|1e-6/K" + power
	if n == 1 {
		parts += "|µm/(m·K)|µm/m/K|µm/m·K|µm/(m·°C)|µm/m/°C|µm/m·°C" // as expansions are printed
	}
	return []row{
		{"ppm/K" + power, "ppm/K" + ascii, "[ppm]." + ucum, 1e-6, 0, parts},
		{"/K" + power, "/K" + ascii, ucum, 1, 0, per("") + "|" + per("1") + "|1/K" + ascii + "|K" + minus + "|K" + caret + "|°C" + minus + "|degC" + caret},
		{"%/K" + power, "%/K" + ascii, "%." + ucum, 1e-2, 0, per("%")},
		{"10⁻³/K" + power, "1e-3/K" + ascii, "10*-3." + ucum, 1e-3, 0, per("10⁻³") + "|" + per("10^-3") + "|10^-3/K" + power},
		{"/°F" + power, "/degF" + ascii, "", fahrenheit, 0, perF("") + "|" + perF("1") + "|1/°F" + power + "|°F" + minus},
		{"ppm/°F" + power, "ppm/degF" + ascii, "", 1e-6 * fahrenheit, 0, perF("ppm")},
		{"%/°F" + power, "%/degF" + ascii, "", 1e-2 * fahrenheit, 0, perF("%")},
	}
}

// prices are currency per kilogram, metre, piece or sheet; currencies are
// never converted here.
func prices() []row {
	var list []row
	for _, c := range []string{"EUR", "USD", "GBP", "CHF", "SEK", "NOK", "DKK", "JPY", "PLN", "CZK", "CAD", "AUD", "CNY", "INR", "KRW", "SGD"} {
		for _, per := range []string{"kg", "m", "piece", "sheet"} {
			list = append(list, row{c + "/" + per, c + "/" + per, "", 1, 0, ""})
		}
	}
	return list
}
