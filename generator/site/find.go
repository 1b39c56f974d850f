package site

import (
	"strconv"
	"strings"

	"ohmfolio/generator/material"
	"ohmfolio/generator/statement"
)

// findEntry is one thing that the field in the header finds:
// [kind, title, path, words, state]; a state is said when it is not usable.
type findEntry [5]string

// findScript is the index of the field in the header, as a script.
func (s *site) findScript() []byte {
	list := []findEntry{}
	for _, r := range s.in.Library.Materials {
		state := ""
		if r.Status != material.Released {
			state = statusText(r)
		}
		list = append(list, findEntry{"material", r.Name, "material/" + r.ID + ".html", findWords(r), state})
	}
	for _, d := range s.in.Library.Documents {
		if d.Room == "" {
			continue
		}
		var heads []string
		for _, h := range d.Page.Headings {
			heads = append(heads, h.Text)
		}
		list = append(list, findEntry{strings.TrimSuffix(d.Room, "s"), d.Page.Title, pagePath(d), strings.Join(heads, " "), ""})
	}
	list = append(list, s.findDecisions()...)
	for _, id := range s.in.Library.SourceIDs {
		list = append(list, findEntry{"source", statement.SourceText(s.in.Library.Source(id)), "sources.html#" + id, id, ""})
	}
	for _, t := range terms {
		list = append(list, findEntry{"word", t.Term, "words.html#" + t.ID, "", ""})
	}
	return script("var indexed", list)
}

// findDecisions has one entry a study that requires something, found by what
// it requires and of which materials.
func (s *site) findDecisions() []findEntry {
	var list []findEntry
	for _, d := range s.in.Library.Documents {
		for _, o := range s.outcomes(d) {
			var words, verdicts []string
			for _, m := range o.Materials {
				for _, r := range m.Requirements {
					words, verdicts = append(words, s.short(m.Material)+" "+r.Text()), append(verdicts, r.Verdict.Shown())
				}
			}
			if len(words) > 0 {
				list = append(list, findEntry{"decision", o.Title, "decisions.html", strings.Join(words, " "), strconv.Itoa(len(verdicts)) + " verdicts"})
			}
		}
	}
	return list
}
