package export

import (
	"bytes"
	"encoding/json"

	"ohmfolio/generator/output"
	"ohmfolio/generator/study"
)

// DecisionsPath is where the verdicts of all studies are written.
const DecisionsPath = "data/decisions.json"

// Decision is one answer of one study with what it rests on.
type Decision struct {
	Document     string              `json:"document"` // "reports/x.md" in content/
	Study        string              `json:"study"`
	Title        string              `json:"title"`
	Binding      bool                `json:"binding"`
	Material     string              `json:"material"`
	Size         string              `json:"size,omitempty"`
	Verdict      study.Verdict       `json:"verdict"`
	Requirements []study.Requirement `json:"requirements"`
	Evidence     []study.Evidence    `json:"evidence"`
}

// DecisionsOf lists the answers of one document's study that were judged.
func DecisionsOf(document string, o *study.Outcome) []Decision {
	var list []Decision
	for _, m := range o.Materials {
		if m.Verdict != study.NotAsked {
			list = append(list, Decision{document, o.Study, o.Title, o.Binding, m.Material, m.Size, m.Verdict, m.Requirements, m.Evidence})
		}
	}
	return list
}

// Decisions writes them: the next publication reads what held before.
func Decisions(list []Decision) output.Output {
	if list == nil {
		list = []Decision{}
	}
	return output.Output{Path: DecisionsPath, Write: func(w *bytes.Buffer) error { return writeJSON(w, map[string]any{"decisions": list}) }}
}

// ReadDecisions reads what Decisions wrote; nil when it is none.
func ReadDecisions(text []byte) []Decision {
	var file struct{ Decisions []Decision }
	if json.Unmarshal(text, &file) != nil {
		return nil
	}
	return file.Decisions
}

// WhatChanged names the records by which an answer differs from the one
// before: those whose fingerprint is another. "" when there was none before,
// or it did not hold then either.
func WhatChanged(before []Decision, now Decision) []string {
	for _, d := range before {
		if d.Document != now.Document || d.Title != now.Title || d.Material != now.Material || d.Size != now.Size || d.Verdict != study.Holds {
			continue
		}
		var list []string
		for _, e := range now.Evidence {
			if old, ok := evidenceOn(d.Evidence, e.Record); !ok || old.Fingerprint != e.Fingerprint {
				list = append(list, e.Record)
			}
		}
		return list
	}
	return nil
}

func evidenceOn(list []study.Evidence, record string) (study.Evidence, bool) {
	for _, e := range list {
		if e.Record == record {
			return e, true
		}
	}
	return study.Evidence{}, false
}
