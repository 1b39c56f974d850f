package library

import "ohmfolio/generator/place"

const head = "-- materials/sources.yaml --\nstandard: {kind: standard, title: A standard, number: X 1, checked: original}\n"

const good = "name: X\nsource: standard\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n"

// Kinds documents what loading a reference may find.
var Kinds = []place.Kind{
	{Code: "earlier-id-taken", Severity: place.Error, Title: "An earlier ID belongs to another record",
		Explanation: "Old links must lead to one record.",
		Trigger:     head + "-- materials/x.yaml --\n" + good + "formerly: [y]\n-- materials/y.yaml --\n" + good, Mend: "take the ID out of formerly"},
	{Code: "file-beside-missing", Severity: place.Error, Title: "A CSV file of a record is not beside it",
		Explanation: "Measured points and received lots stand in materials/, beside the record that uses them.",
		Trigger:     head + "-- materials/x.yaml --\n" + good + "lots: x-lots.csv\n", Mend: "put the file into materials/, and write its name alone"},
	{Code: "file-unreadable", Severity: place.Error, Title: "A file cannot be read",
		Explanation: "Permissions, a broken link, or a link that leaves the reference's folder.", Mend: "look at its permissions; a link must stay inside the folder"},
	{Code: "id-not-plain", Severity: place.Error, Title: "A file's name is no plain ID",
		Explanation: "The name of a record's file is its ID, part of addresses and file names on every system: small letters, digits and hyphens.",
		Trigger:     head + "-- materials/Copper 1.yaml --\n" + good + "-- materials/x.yaml --\n" + good, Mend: idMend},
	{Code: "no-records", Severity: place.Error, Title: "There is no record",
		Explanation: "A reference has one material at least.", Trigger: head, Mend: "write materials/ID.yaml; the README shows the smallest one"},
	{Code: "offers-unreadable", Severity: place.Error, Title: "offers.csv cannot be read",
		Explanation: "The first row names the columns; every row has all of them.",
		Trigger:     head + "-- materials/x.yaml --\n" + good + "-- materials/offers.csv --\nmaterial;price\nx;12,5\n", Mend: "save it as CSV with commas and decimal points, with the head that the guide shows"},
	{Code: "source-not-citable", Severity: place.Error, Title: "A source cannot be found by a reader",
		Explanation: "A source needs a number, an author or a publisher beside its title.",
		Trigger:     "-- materials/sources.yaml --\nstandard: {kind: standard, title: A standard}\n-- materials/x.yaml --\n" + good, Mend: "add number, author or publisher"},
	{Code: "sources-missing", Severity: place.Warning, Title: "There is no sources.yaml",
		Explanation: "Records cite entries of materials/sources.yaml.", Trigger: "-- materials/x.yaml --\n" + good, Mend: "write materials/sources.yaml"},
}
