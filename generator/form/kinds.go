package form

import "ohmfolio/generator/place"

const head = "-- materials/sources.yaml --\nstandard: {kind: standard, title: A standard, number: X 1, checked: original}\n-- materials/x.yaml --\n"

// Kinds documents what reading strict YAML may find.
var Kinds = []place.Kind{
	kind("control-character", "A character that no text file should have",
		"Control characters, lone carriage returns, foreign line separators and bytes that are not UTF-8 look like nothing and change what is read.",
		head+"name: X\u0085y\n", "save the file as UTF-8 with plain line ends"),
	kind("date-not-read", "A date is not understood", "Dates are ISO 8601 calendar dates.",
		head+"name: X\nsource: standard\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\nsign_off: {author: a, reviewer: b, date: 4.5.2026}\n", "write year-month-day: 2026-05-04"),
	kind("file-empty", "A file is empty", "A record states at least a name, a resistivity or a curve, and a source.",
		head, "write the smallest record; the README shows it"),
	kind("file-too-large", "A file is too large", "A YAML or Markdown file has at most 4 MiB: more is a slip, or somebody's data in the wrong place.",
		"", "split it, or keep measured points in a CSV beside the record"),
	kind("key-missing", "A key that is needed is missing", "The message names it.",
		head+"resistivity: 43 µΩ·cm\nreference_temperature: 20 °C\nsource: standard\n", "add the key"),
	kind("key-repeated", "A key stands twice", "YAML would let the second win in silence.",
		head+"name: X\nname: Y\nsource: standard\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n", "keep one of the two"),
	kind("key-unknown", "A key is not known", "Usually a typo: an unknown key would be left out in silence, and its value with it.",
		head+"name: X\nresistvity: 43 µΩ·cm\nsource: standard\nreference_temperature: 20 °C\n", "write the key as the guide does"),
	kind("type-wrong", "A value of the wrong type", "A list where a text is needed, or the like.",
		head+"name: [X, Y]\nsource: standard\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n", "write what the message names"),
	kind("value-missing", "A key without a value", "An empty value says nothing; unknown things are left out and told as not stated.",
		head+"name: X\nfamily:\nsource: standard\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n", "write the value, or take the key out"),
	kind("word-unknown", "A word is not one of those known here", "Some keys take one of a few words.",
		head+"name: X\nstatus: final\nsource: standard\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n", "write one of the words that the message lists"),
	kind("yaml-alias", "An anchor, alias or merge key", "What is written must be what is read: each value stands where it belongs.",
		head+"name: &a X\nnotes: *a\nsource: standard\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n", "write the values out"),
	kind("yaml-second-document", "A second document in one file", "YAML programs drop it in silence.",
		head+"name: X\nsource: standard\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n---\nname: Y\n", "take out the line ---"),
	kind("yaml-syntax", "The text is no YAML", "Quotes, brackets or indentation do not fit together; or a value begins with % and needs quotes.",
		head+"name: X\nconductivity: %IACS\n", "look at the line that is named and the one before"),
	kind("yaml-tag", "An explicit tag", "The key says what a value is; a tag could say otherwise.",
		head+"name: !!str X\nsource: standard\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n", "take it out"),
}

func kind(code, title, explanation, trigger, mend string) place.Kind {
	return place.Kind{Code: code, Severity: place.Error, Title: title, Explanation: explanation, Trigger: trigger, Mend: mend}
}
