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
var kinds = []Kind{acceptanceKind.whole(), chooseKind.whole(), compareKind.whole(), costKind.whole(), heaterKind.whole(), orderKind.whole(), seriesKind.whole(), shuntKind.whole(), substituteKind.whole(), windingKind.whole()}

// Kinds returns the studies in order of their names.
func Kinds() []Kind { return append([]Kind{}, kinds...) }

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
