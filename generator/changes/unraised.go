package changes

import (
	"strings"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
)

// Unraised finds released records that state something else than the newest
// edition under the same revision number: two printed sheets could carry one
// number and different values.
func Unraised(lib *library.Library, newest *Statement) []place.Finding {
	var findings []place.Finding
	for _, r := range lib.Materials {
		was := newest.find(r.ID)
		if was == nil || was.Status != string(material.Released) || r.Status != material.Released || was.Revision != r.Revision {
			continue
		}
		now := freezeMaterial(lib, r)
		c := between(was, now)
		if c.MeansTheSame() {
			continue
		}
		list := place.List{Source: r.Source}
		at := r.Node.Get("revision").Position()
		list.Add(unraisedKind.Code, unraisedKind.Severity, at, "the record states something else than in edition "+newest.Edition+
			" under the same revision: "+strings.Join(firstPaths(c), ", "), unraisedKind.Mend)
		findings = append(findings, list.Findings...)
	}
	return findings
}

// firstPaths names what differs, at most three.
func firstPaths(c *Change) []string {
	var list []string
	for _, l := range c.Lines() {
		if l.Aside {
			continue
		}
		if len(list) == 3 {
			return append(list, "…")
		}
		list = append(list, l.Path)
	}
	return list
}

var unraisedKind = place.Kind{Code: "revision-not-raised", Severity: place.Warning, Title: "A released record changed under the same revision",
	Explanation: "The newest edition states something else under the same revision number. Whoever holds a sheet of that revision cannot tell that it is out of date.",
	Trigger: "-- materials/sources.yaml --\nstandard: {kind: standard, title: A standard, number: X 1, checked: original}\n-- materials/x.yaml --\nname: X\nstatus: released\nrevision: 1\n" +
		"source: standard\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\n-- materials/editions/2026-06.json --\n" +
		seal("{\"format\":1,\n\"edition\":\"2026-06\",\n\"materials\":[\n{\"id\":\"x\",\"status\":\"released\",\"revision\":1,\"stated\":[]}\n],\n\"studies\":[],\n") + "\n",
	Mend: "raise the revision and sign it off with its reason, or take the change back"}

// seal puts the sum behind the beginning of a statement.
func seal(text string) string {
	return text + string(sumKey) + sumOf([]byte(text)) + `"}`
}
