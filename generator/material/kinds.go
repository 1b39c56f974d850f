package material

import "ohmfolio/generator/place"

const (
	sourcesHead = "-- materials/sources.yaml --\nstandard: {kind: standard, title: A standard, number: X 1, checked: original}\n-- materials/x.yaml --\n"
	smallest    = "name: X\nsource: standard\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\n"
)

// Kinds documents what reading a record may find beyond its YAML.
var Kinds = []place.Kind{
	kind("adopt-missing", "Several data sets and none adopted",
		"The reference has one house value a material; the others are shown beside it with their deviation.",
		"name: X\ndata_sets:\n  a: {source: standard, resistivity: 43 µΩ·cm, reference_temperature: 20 °C}\n  b: {source: standard, resistivity: 44 µΩ·cm, reference_temperature: 20 °C}\n", "add adopt: with the name of one data set"),
	kind("adopt-unknown", "The adopted data set is not there", "adopt names one of data_sets.",
		"name: X\nadopt: c\ndata_sets:\n  a: {source: standard, resistivity: 43 µΩ·cm, reference_temperature: 20 °C}\n", "write the name of a data set"),
	kind("alpha-missing", "β or γ without α", "The straight part of a curve is never left out in silence.",
		smallest+"resistivity: 43 µΩ·cm\nbeta: -0.5 ppm/K²\n", "add alpha:, 0 ppm/K where the source says so"),
	kind("callendar-reference", "Callendar-Van Dusen about another temperature", "The coefficients are defined about 0 °C.",
		"name: X\nsource: standard\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 100 °C\ncallendar_van_dusen: {A: 3.9083e-3 /°C, B: -5.775e-7 /°C²}\n", "write reference_temperature: 0 °C, or leave it out"),
	kind("curve-not-told", "A curve cannot be computed", "The numbers are well formed but give no curve over the valid range.",
		"name: X\nsource: standard\nbasis: resistivity\nvalid_range: 0 K to 300 K\nbloch_gruneisen: {residual: 0.002 µΩ·cm, debye_temperature: 0 K, amplitude: 7.81 µΩ·cm, exponent: 5}\n", "look at the coefficients and the valid range"),
	kind("curve-twice", "Two descriptions of a curve in one data set", "A data set comes from one source and has one model; two of them would have to be averaged or chosen from.",
		smallest+"resistivity: 43 µΩ·cm\nalpha: 10 ppm/K\ntable: {temperature: °C, resistance_ratio: 1, rows: [[0, 1], [60, 1]]}\n", "give each its own data set"),
	kind("data-missing", "A data set states nothing", "It has neither a resistivity nor a coefficient nor a table.",
		smallest, "add resistivity:, alpha: or table:"),
	kind("density-missing", "A mass resistivity without a density", "ρ = mass resistivity / density.",
		smallest+"mass_resistivity: 0.15328 Ω·g/m²\n", "add properties: density"),
	kind("exponent-unknown", "The exponent is not 2, 3 or 5", "The Bloch-Grüneisen function is used with these exponents.",
		"name: X\nsource: standard\nbasis: resistivity\nvalid_range: 4 K to 300 K\nbloch_gruneisen: {residual: 0.002 µΩ·cm, debye_temperature: 328 K, amplitude: 7.81 µΩ·cm, exponent: 4}\n", "write the exponent that the source fits with"),
	kind("factor-not-one", "A factor table is not 1 at its reference temperature", "R/R_ref is 1 at the reference temperature by definition.",
		smallest+"resistivity: 109 µΩ·cm\ntable: {temperature: °C, resistance_ratio: 1, rows: [[0, 0.99], [20, 1.02], [60, 1.03]]}\n", "look at the reference temperature, or at the row"),
	kind("fit-missing", "Points without a fit, or a degree that is not fitted", "Measured points need the temperature of their coefficients and a degree of 1, 2 or 3.",
		"name: X\nsource: standard\nbasis: resistance\npoints: x.csv\n-- materials/x.csv --\ntemperature / °C,resistance / Ω\n20,1\n30,1.1\n", "add fit: {reference_temperature: 25 °C, degree: 2}"),
	warning("fit-doubtful", "A fit says less than it seems to", "As many coefficients as points, a degree that the data do not support, points further off than chance allows, or repeated readings that the curve misses.",
		"name: X\nsource: standard\nbasis: resistance\npoints: x.csv\nfit: {reference_temperature: 20 °C, degree: 1}\n-- materials/x.csv --\ntemperature / °C,resistance / Ω\n20,1\n30,1.1\n", "look at the residuals on the page"),
	kind("gauge-unknown", "A wire gauge is not understood", "American wire gauge from 4/0 to 56.",
		smallest+"resistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nstock: [{form: wire, gauge: AWG 99}]\n", "write AWG 24"),
	kind("iacs-not-at-20", "%IACS away from 20 °C", "%IACS compares with standard copper at 20 °C and means nothing at another temperature.",
		"name: X\nsource: standard\nreference_temperature: 25 °C\nconductivity: \"61 %IACS\"\n", "write MS/m at that temperature"),
	kind("layouts-mixed", "Values at the top beside data sets", "A record has one data set at its top, or several under data_sets.",
		"name: X\nresistivity: 43 µΩ·cm\nadopt: a\ndata_sets:\n  a: {source: standard, resistivity: 43 µΩ·cm, reference_temperature: 20 °C}\n", "move the key into a data set"),
	warning("lots-not-compared", "Received lots that nothing can be compared with", "The deviation of a lot is told from the house value; the adopted data set has no resistivity.",
		"name: X\nsource: standard\nbasis: resistance\nalpha: 10 ppm/K\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nlots: x.csv\n-- materials/x.csv --\ndate,lot,resistivity / µΩ·cm,temperature / °C\n2026-01-01,1,43,23\n", "adopt a data set with a resistivity"),
	kind("piece-unknown", "A piece is no data set", "Pieces are data sets of the same record with a curve of ρ.",
		"name: X\nadopt: a\ndata_sets:\n  a: {source: standard, pieces: [b, c]}\n", "name data sets of this record"),
	kind("pieces-do-not-join", "Pieces do not meet", "Their valid ranges must adjoin and their values meet within their stated limits, else within 0.1 %.",
		"name: X\nadopt: j\ndata_sets:\n  a: {source: standard, basis: resistivity, table: {temperature: K, resistivity: µΩ·cm, rows: [[100, 1], [200, 2]]}}\n  b: {source: standard, basis: resistivity, table: {temperature: K, resistivity: µΩ·cm, rows: [[200, 3], [300, 4]]}}\n  j: {source: standard, pieces: [a, b]}\n", "look at the values at the shared edge"),
	kind("points-not-fitted", "Points that determine no curve", "Fewer points than coefficients, or all at one temperature.",
		"name: X\nsource: standard\nbasis: resistance\npoints: x.csv\nfit: {reference_temperature: 20 °C, degree: 2}\n-- materials/x.csv --\ntemperature / °C,resistance / Ω\n20,1\n30,1.1\n", "lower the degree, or measure at more temperatures"),
	warning("range-beyond-points", "The valid range reaches beyond the measured points", "A fit says nothing beyond the temperatures that were measured.",
		"name: X\nsource: standard\nbasis: resistance\npoints: x.csv\nfit: {reference_temperature: 20 °C, degree: 1}\nvalid_range: 0 °C to 100 °C\n-- materials/x.csv --\ntemperature / °C,resistance / Ω\n20,1\n30,1.1\n40,1.2\n", "narrow the range, or measure further"),
	kind("range-beyond-table", "The valid range reaches beyond the table", "No value is given outside what the source covers.",
		"name: X\nsource: standard\nbasis: resistivity\nvalid_range: 50 K to 400 K\ntable: {temperature: K, resistivity: µΩ·cm, rows: [[100, 1], [300, 3]]}\n", "narrow the range"),
	kind("range-inverted", "A range does not rise", "Ranges are written from the lower to the upper temperature.",
		"name: X\nsource: standard\nbasis: resistance\nreference_temperature: 20 °C\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nvalid_range: 60 °C to 0 °C\n", "write the lower temperature first"),
	kind("reference-temperature-missing", "No reference temperature", "α, β and ρ mean nothing without the temperature that they are told about: copper's α at 20 °C is not its α at 0 °C.",
		"name: X\nsource: standard\nresistivity: 43 µΩ·cm\n", "add reference_temperature: as the source states it"),
	kind("resistivity-not-positive", "A resistivity that is not above zero", "Look at sign and unit.",
		smallest+"resistivity: -43 µΩ·cm\nalpha: 10 ppm/K\n", "look at the source again"),
	kind("resistivity-twice", "The resistivity is given twice", "One way of writing it is kept as the source prints it; the others are computed.",
		smallest+"resistivity: 1.7241 µΩ·cm\nconductivity: 58 MS/m\nalpha: 3.93e-3 /K\n", "keep the one that the source prints"),
	kind("row-not-positive", "A row is not above zero", "Resistivities and ratios of metals are positive.",
		"name: X\nsource: standard\nbasis: resistivity\ntable: {temperature: K, resistivity: µΩ·cm, rows: [[100, 0], [300, 3]]}\n", "look for a misprint"),
	kind("row-tolerance", "A ± of rows that cannot be read", "each_row holds for every row of a table of resistivity or conductivity, in per cent.",
		"name: X\nsource: standard\nbasis: resistivity\ntable: {temperature: K, resistivity: µΩ·cm, each_row: 5 to 6, rows: [[100, 1], [300, 3]]}\n", "write ± 0.5 % or ± 0.5 % (k=2)"),
	kind("row-width", "A row has not two numbers", "Rows are [temperature, value].",
		"name: X\nsource: standard\nbasis: resistivity\ntable: {temperature: K, resistivity: µΩ·cm, rows: [[100, 1, 2], [300, 3]]}\n", "write [temperature, value]"),
	kind("rows-not-rising", "The temperatures of a table do not rise", "Sorted rows show gaps and misprints; each temperature stands once.",
		"name: X\nsource: standard\nbasis: resistivity\ntable: {temperature: K, resistivity: µΩ·cm, rows: [[300, 3], [100, 1]]}\n", "sort the rows"),
	kind("rows-too-few", "A table with fewer than two rows", "One row is a point: write it as resistivity: with its reference temperature.",
		"name: X\nsource: standard\nbasis: resistivity\ntable: {temperature: K, resistivity: µΩ·cm, rows: [[300, 3]]}\n", "add rows"),
	kind("source-missing", "Values without a source", "A number that cannot be traced cannot be trusted.",
		"name: X\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n", "add source: with an ID of materials/sources.yaml"),
	warning("specimen-incomplete", "ρ cannot be told from measured points", "Points give R; ρ needs the length between the taps and the section.",
		"name: X\nsource: standard\nbasis: resistance\npoints: x.csv\nfit: {reference_temperature: 20 °C, degree: 1}\nspecimen: {between_taps: 200 mm, width: 10 mm}\n-- materials/x.csv --\ntemperature / °C,resistance / Ω\n20,1\n30,1.1\n40,1.2\n", "add what is missing, or leave specimen out and tell ratios only"),
	kind("table-unit", "A table does not say what its numbers are", "Units of temperature and value stand in the table, as in its printed head.",
		"name: X\nsource: standard\nbasis: resistivity\ntable: {temperature: K, rows: [[100, 1], [300, 3]]}\n", "add resistivity: µΩ·cm, conductivity: MS/m or resistance_ratio: 1"),
	kind("thickness-missing", "A sheet resistance without a thickness", "ρ = R per square × thickness.",
		smallest+"sheet_resistance: 0.86 mΩ/□\nalpha: 10 ppm/K\n", "add thickness:"),
	kind("tolerance-class-not-positive", "A tolerance class that is not above zero", "A class is ±(at_zero + per_degree·|t|).",
		"name: X\nsource: standard\nbasis: resistance\ncallendar_van_dusen: {A: 3.9083e-3 /°C, B: -5.775e-7 /°C²}\nvalid_range: 0 °C to 850 °C\ntolerance_classes: [{name: B, at_zero: 0.3 K, per_degree: -0.005}]\n", "look at the source again"),
	kind("valid-range-missing", "A curve without a valid range", "A coefficient holds over the temperatures that it was fitted on; nobody else can know how far.",
		"name: X\nsource: standard\nbasis: resistance\nreference_temperature: 20 °C\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\n", "add valid_range: as far as the source's own data go"),
}

func kind(code, title, explanation, record, mend string) place.Kind {
	return place.Kind{Code: code, Severity: place.Error, Title: title, Explanation: explanation, Trigger: sourcesHead + record, Mend: mend}
}

func warning(code, title, explanation, record, mend string) place.Kind {
	k := kind(code, title, explanation, record, mend)
	k.Severity = place.Warning
	return k
}
