package site

import (
	"strings"
	"testing"
)

// TestDemoTellsItsHistory: the example's edition shows on its pages.
func TestDemoTellsItsHistory(t *testing.T) {
	pages := render(t, inputOf(demo(t)))
	for page, wants := range map[string][]string{
		"editions.html":                      {"2026-10", `href="data/editions/2026-10.json"`},
		"changes.html":                       {`href="material/cumn12ni-strip-lot.html"`, `href="report/low-tcr-shunt-alloys.html"`, "adopted data set: data → points"},
		"material/cumn12ni-strip-lot.html":   {"<strong>Revision 2</strong>, released", "Reason: measured again after the anneal", "data_sets.points.alpha"},
		"material/silver.html":               {"edition 2026-10"},
		"material/busbar-copper-lot.html":    {"not acceptable", `href="aluminium-conductor.html"`, "works declaration 0233", `<time datetime="2027-08-03">`},
		"review.html":                        {"declaration on lead", "offer of "},
		"sources.html":                       {`id="to-check"`, "Compared with the original", "incoming inspection", "superseded by"},
		"material/platinum-thermometer.html": {"tolerance classes told at temperatures"},
	} {
		for _, want := range wants {
			if !strings.Contains(pages[page], want) {
				t.Errorf("%s does not say %q", page, want)
			}
		}
	}
	if strings.Contains(pages["material/silver.html"], "not in an edition yet") {
		t.Error("what has not changed since an edition counts as new")
	}
}
