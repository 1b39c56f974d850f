package examine

import (
	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
)

// cited calls f for every citation of a record, with the node it stands at.
func cited(r *material.Record, f func(c material.Citation, n *form.Node, what string)) {
	for _, s := range r.Sets {
		f(s.Source, s.Source.Node, s.Label())
	}
	for _, p := range r.Properties {
		f(p.Source, p.Source.Node, p.Name)
	}
	for _, l := range r.TCRLimits {
		f(l.Source, l.Source.Node, "the "+l.Measure+" limit")
	}
	for _, s := range r.Stock {
		if s.Source != nil {
			f(*s.Source, s.Source.Node, "stock "+s.Form)
		}
	}
	for _, e := range r.Equivalents {
		if e.Source != nil {
			f(*e.Source, e.Source.Node, "the equivalent "+e.Designation)
		}
	}
}

var sourceUnknown = Rule{
	Kind: place.Kind{
		Code: "source-unknown", Severity: place.Error, Title: "A record cites a source that is not in sources.yaml",
		Explanation: "A number without a source that can be found cannot be checked by anyone.",
		Trigger:     record("name: X\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\nsource: standart\n"),
		Mend:        "add the source to materials/sources.yaml, or write the ID of one that is there",
	},
	Record: func(p *Pass, r *material.Record) {
		cited(r, func(c material.Citation, n *form.Node, what string) {
			if c.ID == "" || p.Library.Source(c.ID) != nil {
				return
			}
			mend := p.rule.Kind.Mend
			if near := place.Near(c.ID, p.Library.SourceIDs); near != "" {
				mend = "did you mean " + near + "? Otherwise " + mend
			}
			p.findAt(r, n, what+" cites "+quote(c.ID)+", which materials/sources.yaml does not have", mend)
		})
	},
}

var sourceSuperseded = Rule{
	Kind: place.Kind{
		Code: "source-superseded", Severity: place.Warning, Title: "A record cites a superseded source",
		Explanation: "A newer edition is recorded. Its values may differ; the record should say that it was compared.",
		Trigger:     record("name: X\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\nsource: old-standard\n"),
		Mend:        "compare with the newer edition, then cite it",
	},
	Record: func(p *Pass, r *material.Record) {
		cited(r, func(c material.Citation, n *form.Node, what string) {
			if s := p.Library.Source(c.ID); s != nil && s.SupersededBy != "" {
				p.findAt(r, n, what+" cites "+c.ID+", superseded by "+s.SupersededBy, p.rule.Kind.Mend)
			}
		})
	},
}

var memoryInReleased = Rule{
	Kind: place.Kind{
		Code: "memory-in-released", Severity: place.Error, Title: "A released record rests on a value from memory",
		Explanation: "A value that nobody has looked up again may be right; it must not be released.",
		Trigger:     copper(signed + "properties:\n  density: {value: 8.89 g/cm³, source: recalled}\n"),
		Mend:        "look the value up and set checked: original or transcription, or take it out of the released record",
	},
	Record: func(p *Pass, r *material.Record) {
		if r.Status != material.Released {
			return
		}
		cited(r, func(c material.Citation, n *form.Node, what string) {
			if p.Library.CheckedOf(c) == material.Memory {
				p.findAt(r, n, what+" is quoted from memory ("+c.ID+") in a released record", p.rule.Kind.Mend)
			}
		})
	},
}

var supersederUnknown = Rule{
	Kind: place.Kind{
		Code: "superseder-unknown", Severity: place.Error, Title: "superseded_by names a source that is not there",
		Explanation: "The chain from an old edition to the current one must lead somewhere.",
		Trigger:     "-- materials/sources.yaml --\nold: {kind: standard, title: An old one, number: X 0, checked: original, superseded_by: new}\n-- materials/x.yaml --\nname: X\nresistivity: 43 µΩ·cm\nreference_temperature: 20 °C\nsource: old\n",
		Mend:        "add the newer source, or correct its ID",
	},
	Whole: func(p *Pass) {
		for _, id := range p.Library.SourceIDs {
			s := p.Library.Source(id)
			if s.SupersededBy != "" && p.Library.Source(s.SupersededBy) == nil {
				p.Find(nil, s.Position, "source "+id+" is superseded by "+quote(s.SupersededBy)+", which is not there", p.rule.Kind.Mend)
			}
		}
	},
}

var replacementUnknown = Rule{
	Kind: place.Kind{
		Code: "replacement-unknown", Severity: place.Error, Title: "A withdrawn record does not lead anywhere",
		Explanation: "A withdrawn record stays readable and says what replaced it and why it was withdrawn.",
		Trigger:     copper("status: withdrawn\nreplaced_by: coppr\nwithdrawn_reason: old\n"),
		Mend:        "write replaced_by with the ID of the replacement, and withdrawn_reason",
	},
	Record: func(p *Pass, r *material.Record) {
		if r.ReplacedBy != "" && p.Library.Material(r.ReplacedBy) == nil {
			p.findAt(r, r.Node.Get("replaced_by"), "replaced_by names "+quote(r.ReplacedBy)+", which is no record", p.rule.Kind.Mend)
		}
		if r.Status == material.Withdrawn && r.WithdrawnReason == "" {
			p.findAt(r, r.Node.Get("status"), "the record is withdrawn without a reason", p.rule.Kind.Mend)
		}
	},
}
