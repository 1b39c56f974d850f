package study

import "ohmfolio/generator/place"

// heatFindings documents what reading a heater, a winding or a series may find.
var heatFindings = []place.Kind{
	{
		Code: "parameter-missing", Severity: place.Error, Title: "A study lacks what it cannot do without",
		Explanation: "Some parameters can stand for each other; one of them must be there. A heater is sized by a surface load, a length or a size; its temperature is assumed or computed.",
		Trigger:     triggerFence("study: heater", "materials: [copper]\nvoltage: 24 V\npower: 60 W\nelement_temperature: 90 °C"),
		Mend:        "add one of the parameters that the message names",
	},
	{
		Code: "parameter-out-of-bounds", Severity: place.Error, Title: "A parameter has a value that cannot be",
		Explanation: "An emissivity lies between 0 and 1, a count is at least 1, an element is hotter than what it heats.",
		Trigger:     triggerFence("study: heater", "materials: [copper]\nvoltage: 24 V\npower: 60 W\nelement_temperature: 90 °C\nradiation: {efficiency: 0.6, emissivity: 1.2, charge: 20 °C}"),
		Mend:        "write a value within the bounds that the message names",
	},
	{
		Code: "parameters-contradict", Severity: place.Error, Title: "Two parameters contradict each other",
		Explanation: "A parameter that has no meaning beside another one would be left out in silence.",
		Trigger:     triggerFence("study: heater", "materials: [copper]\nvoltage: 24 V\npower: 60 W\nelement_temperature: 90 °C\ndiameter: 0.5 mm\nwidth: 5 mm"),
		Mend:        "take one of them out",
	},
	{
		Code: "readings-unusable", Severity: place.Error, Title: "Readings of a cooling winding do not tell the value at switch-off",
		Explanation: "The extrapolation needs a few readings in order of time, counted from switch-off, whose resistance falls.",
		Trigger:     triggerFence("study: winding", "materials: [copper]\ncold_resistance: 3 Ω\ncold_temperature: 20 °C\nreadings: [{time: 30 s, resistance: 4 Ω}]"),
		Mend:        "write the readings in order of time, or hot_resistance for one at switch-off",
	},
}
