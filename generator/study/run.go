package study

import (
	"sort"
	"strings"

	"ohmfolio/generator/form"
	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
	"ohmfolio/generator/words"
)

// kinds is the one list of studies, sorted by name.
var kinds = []Kind{acceptanceKind.whole(), chooseKind.whole(), compareKind.whole(), heaterKind.whole(), seriesKind.whole(), shuntKind.whole(), windingKind.whole()}

// Kinds returns the studies in order of their names.
func Kinds() []Kind { return append([]Kind{}, kinds...) }

// FindingKinds documents what reading a study block may find.
var FindingKinds = append([]place.Kind{
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
}, append(append(acceptanceFindings, shuntFindings...), heatFindings...)...)

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

// Run reads one study block and runs it. The outcome is nil when the block
// cannot be read; the findings tell why, with places in the Markdown file.
func Run(lib *library.Library, block words.Study) (*Outcome, []place.Finding) {
	report := &place.List{Source: block.Body}
	kind, ok := find(block.Name)
	if !ok {
		mend := "the studies are: " + names()
		if near := place.Near(block.Name, kindNames()); near != "" {
			mend = "did you mean " + near + "? " + mend
		}
		report.Add("study-unknown", place.Error, block.Position, "there is no study "+quote(block.Name), mend)
		return nil, report.Findings
	}
	node, findings := form.Read(block.Body, kind.Shape)
	if node == nil || place.Count(findings, place.Error) > 0 {
		return nil, findings
	}
	report.Findings = findings
	w := &work{lib: lib, block: node, report: report, kind: kind}
	w.out = &Outcome{Study: kind.Name, Title: w.text("title", kind.Title), Binding: node.Get("binding").Yes(), Position: block.Position,
		Materials: []MaterialOutcome{}, Ranking: []string{}, Tables: []Table{}, Notes: []string{}}
	w.parameters()
	kind.Run(w)
	if w.failed {
		return nil, report.Findings
	}
	return w.out, report.Findings
}

func find(name string) (Kind, bool) {
	for _, k := range kinds {
		if k.Name == name {
			return k, true
		}
	}
	return Kind{}, false
}

func kindNames() []string {
	var list []string
	for _, k := range kinds {
		list = append(list, k.Name)
	}
	return list
}

func names() string { return strings.Join(kindNames(), ", ") }

func quote(s string) string { return "“" + s + "”" }

func sortedKeys(set map[string]bool) []string {
	var list []string
	for k := range set {
		list = append(list, k)
	}
	sort.Strings(list)
	return list
}
