package study

import (
	"slices"

	"ohmfolio/generator/place"
)

// FindingKinds documents what reading a study block may find.
var FindingKinds = slices.Concat(commonFindings, acceptanceFindings, heatFindings, orderFindings, shuntFindings, tradeFindings)

// commonFindings are those of several studies.
var commonFindings = []place.Kind{
	{
		Code: "family-unknown", Severity: place.Error, Title: "A family of which there is no record",
		Explanation: "A shortlist over a family needs its name as the records write it.",
		Trigger:     triggerFence("study: choose", "families: [shunt alloys]\nwindow: 0 °C to 100 °C"),
		Mend:        "write a family as the records do",
	},
	{
		Code: "baseline-missing", Severity: place.Error, Title: "A deviation from nothing",
		Explanation: "A comparison that shows deviation tells how far each material lies from one of them.",
		Trigger:     trigger("materials: [copper]\nwindow: 0 °C to 100 °C\nshow: deviation"),
		Mend:        "add baseline: with the ID of a material",
	},
	{
		Code: "study-material-unknown", Severity: place.Error, Title: "A study names a material that is not there",
		Explanation: "A comparison can only tell about records of this reference. Earlier IDs lead to the record that replaced them.",
		Trigger:     trigger("materials: [coper]\nwindow: 0 °C to 100 °C"),
		Mend:        "write the ID of a record, which is its file name without .yaml",
	},
	{
		Code: "study-unknown", Severity: place.Error, Title: "A block asks for a study that does not exist",
		Explanation: "The word after `study:` names the study to run.",
		Trigger:     triggerFence("study: comparison", "materials: [copper]\nwindow: 0 °C to 100 °C"),
		Mend:        "use one of the studies that the guide lists",
	},
	{
		Code: "window-inverted", Severity: place.Error, Title: "A window's lower edge is not below its upper edge",
		Explanation: "A window needs two different temperatures, the lower one first.",
		Trigger:     trigger("materials: [copper]\nwindow: 100 °C to 0 °C"),
		Mend:        "write the lower temperature first",
	},
}

// triggerRecord is the smallest record that a study can work on.
const triggerRecord = `-- materials/sources.yaml --
standard: {kind: standard, title: Standard, number: X 1, checked: original}
-- materials/copper.yaml --
name: Copper, annealed
resistivity: 1.7241 µΩ·cm
alpha: 3.93e-3 /K
basis: resistance
reference_temperature: 20 °C
valid_range: 0 °C to 100 °C
source: standard
`

func trigger(body string) string { return triggerFence("study: compare", body) }

func triggerFence(info, body string) string {
	return triggerRecord + "-- content/reports/x.md --\n# X\n\n```" + info + "\n" + body + "\n```\n"
}
