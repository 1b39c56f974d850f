package words

import "ohmfolio/generator/place"

const head = "-- materials/sources.yaml --\nstandard: {kind: standard, title: A standard, number: X 1, checked: original}\n-- materials/x.yaml --\nname: X\nsource: standard\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n-- content/guides/x.md --\n"

// Kinds documents what reading Markdown may find.
var Kinds = []place.Kind{
	{Code: "image-refused", Severity: place.Error, Title: "An image stands in a page",
		Explanation: "Pages load nothing but their own style and scripts, so that a copied folder is complete; figures are drawn from data.",
		Trigger:     head + "# X\n\n![a picture](picture.png)\n", Mend: "take it out, or describe it in words"},
	{Code: "link-scheme", Severity: place.Error, Title: "A link has a scheme that could run something",
		Explanation: "Pages link with http, https and mailto, and to files of the reference.",
		Trigger:     head + "# X\n\n[here](javascript:alert)\n", Mend: "write an ordinary link"},
	{Code: "title-missing", Severity: place.Error, Title: "A page has no title",
		Explanation: "The first heading of the first level is the page's title everywhere.",
		Trigger:     head + "Some words.\n", Mend: "begin the page with a line such as # How to read a sheet"},
}
