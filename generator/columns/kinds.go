package columns

import "ohmfolio/generator/place"

const head = "-- materials/sources.yaml --\nstandard: {kind: standard, title: A standard, number: X 1, checked: original}\n-- materials/x.yaml --\nname: X\nsource: standard\nbasis: resistance\npoints: x.csv\nfit: {reference_temperature: 20 °C, degree: 1}\n-- materials/x.csv --\n"

// Kinds documents what reading a points file may find beyond the faults of
// single numbers.
var Kinds = []place.Kind{
	{Code: "points-columns", Severity: place.Error, Title: "The columns of a points file are not understood",
		Explanation: "The head names temperature and resistance (or resistivity, or resistance_ratio), each once and with its unit.",
		Trigger:     head + "temprature / °C,resistance / Ω\n20,1\n30,1.1\n", Mend: "write temperature / °C,resistance / Ω"},
	{Code: "points-semicolons", Severity: place.Error, Title: "A points file has semicolons between its columns",
		Explanation: "Spreadsheets of some countries separate with semicolons and write comma decimals; both are refused rather than guessed.",
		Trigger:     head + "temperature / °C;resistance / Ω\n20;1\n", Mend: "save the file with commas between columns and decimal points"},
	{Code: "points-unreadable", Severity: place.Error, Title: "A row of a points file cannot be read",
		Explanation: "Every row has the cells that the head names.",
		Trigger:     head + "temperature / °C,resistance / Ω\n20,1,5\n", Mend: "look at commas and quotes in this row"},
}
