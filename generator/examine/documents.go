package examine

import (
	"path"
	"strings"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/statement"
	"ohmfolio/generator/study"
)

var linkDangling = Rule{
	Kind: place.Kind{
		Code: "link-dangling", Severity: place.Error, Title: "A page links to something that is not there",
		Explanation: "Links between pages name the Markdown file, links to materials the record; both must exist.",
		Trigger:     copper("") + "-- content/guides/x.md --\n# X\n\nSee [the other page](y.md).\n",
		Mend:        "correct the link, or write the page",
	},
	Whole: func(p *Pass) {
		for _, d := range p.Library.Documents {
			for _, l := range d.Page.Links {
				if target, ok := insideTarget(d, l.Target); ok && !linkExists(p.Library, target) {
					p.Find(d.Source, l.Position, "the link "+quote(l.Target)+" leads nowhere", p.rule.Kind.Mend)
				}
			}
			for _, n := range d.Page.Numbers {
				if target, ok := insideTarget(d, n.Target); ok && !linkExists(p.Library, target) {
					p.Find(d.Source, n.Position, "the live number points to "+quote(n.Target)+", which is no record", p.rule.Kind.Mend)
				}
			}
		}
	},
}

// insideTarget gives the path of a relative link below the reference's
// folder; false for links to elsewhere and within the page.
func insideTarget(d *library.Document, target string) (string, bool) {
	target, _, _ = strings.Cut(target, "#")
	if target == "" || strings.Contains(target, ":") || strings.HasPrefix(target, "//") {
		return "", false
	}
	return path.Join("content", d.Room, target), true
}

func linkExists(lib *library.Library, target string) bool {
	if id, ok := strings.CutPrefix(target, "materials/"); ok {
		return lib.Material(strings.TrimSuffix(id, ".yaml")) != nil || id == "sources.yaml"
	}
	for _, d := range lib.Documents {
		if target == path.Join("content", d.Room, d.Stem+".md") {
			return true
		}
	}
	return false
}

var numberStale = Rule{
	Kind: place.Kind{
		Code: "live-number-stale", Severity: place.Warning, Title: "A number in prose is no longer the value",
		Explanation: "The page shows the current value; the Markdown still says the old one, and whoever reads the file is misled.",
		Trigger:     copper("") + "-- content/guides/x.md --\n# X\n\nCopper has [1.68 µΩ·cm](../../materials/x.yaml \"resistivity at 20 °C\").\n",
		Mend:        "write the new value, or […] to let the program fill it in",
	},
	Whole: func(p *Pass) {
		for _, d := range p.Library.Documents {
			for _, n := range d.Page.Numbers {
				p.liveNumber(d, n.Position, n.Target, n.Question, n.Written)
			}
		}
	},
}

func (p *Pass) liveNumber(d *library.Document, at place.Position, target, question, written string) {
	r := p.Library.Material(statement.TargetID(target))
	if r == nil {
		return // told by link-dangling
	}
	a, err := statement.AskInWords(p.Library, r, question, written)
	switch {
	case err != nil:
		p.FindAs(place.Error, d.Source, at, "the question "+quote(question)+" has no answer: "+err.Error(),
			"ask for: resistivity at T, conductivity at T, resistance-ratio at T from T, greatest change from T to T")
	case !a.Matches:
		p.Find(d.Source, at, "the page says "+quote(written)+"; the value is now "+quote(a.Text), p.rule.Kind.Mend)
	}
}

var readingOrderUnknown = Rule{
	Kind: place.Kind{
		Code: "reading-order-unknown", Severity: place.Error, Title: "The reading order names a page that is not there",
		Explanation: "reading_order in content/reference.yaml lists guides and reports by the stem of their file.",
		Trigger:     copper("") + "-- content/reference.yaml --\ntitle: X\nreading_order: {guides: [first]}\n",
		Mend:        "correct the stem, or write content/guides/ or content/reports/ with that name",
	},
	Whole: func(p *Pass) {
		check := func(room string, stems []string) {
			for _, stem := range stems {
				if !linkExists(p.Library, path.Join("content", room, stem+".md")) {
					p.Find(nil, place.Position{File: "content/reference.yaml"}, "the reading order of "+room+" names "+quote(stem)+", which is not there", p.rule.Kind.Mend)
				}
			}
		}
		check("guides", p.Library.Settings.Guides)
		check("reports", p.Library.Settings.Reports)
	},
}

var bindingStudyFails = Rule{
	Kind: place.Kind{
		Code: "binding-study-fails", Severity: place.Warning, Title: "A binding study does not hold",
		Explanation: "The site is written with the verdict, and the command exits with 1: whoever relies on the decision must know.",
		Trigger:     copper("") + "-- content/reports/x.md --\n# X\n\n```study: compare\nmaterials: [x]\nwindow: 0 °C to 100 °C\nbinding: yes\nrequire: {greatest_change: 0.1 %}\n```\n",
		Mend:        "look at the reasons; change the design or the requirement",
	},
	Whole: func(p *Pass) {
		for _, j := range p.Outcomes {
			for _, m := range j.Outcome.Broken() {
				p.Find(j.Document.Source, j.Outcome.Position, quote(j.Outcome.Title)+": "+m.Label()+" "+string(m.Verdict)+" ("+strings.Join(m.Reasons, "; ")+")", p.rule.Kind.Mend)
			}
		}
	},
}

var bindingOnDraft = Rule{
	Kind: place.Kind{
		Code: "binding-on-draft", Severity: place.Error, Title: "A binding study rests on a record that is not released",
		Explanation: "A draft may change without anyone being told; a withdrawn record is no evidence at all.",
		Trigger:     copper("") + "-- content/reports/x.md --\n# X\n\n```study: compare\nmaterials: [x]\nwindow: 0 °C to 100 °C\nbinding: yes\nrequire: {greatest_change: 50 %}\n```\n",
		Mend:        "release the record, or make the study not binding",
	},
	Whole: func(p *Pass) {
		for _, j := range p.Outcomes {
			for _, m := range j.Outcome.Chosen() {
				for _, r := range restsOn(p.Library, m) {
					if j.Outcome.Binding && r.Status != material.Released {
						p.Find(j.Document.Source, j.Outcome.Position, quote(j.Outcome.Title)+" is binding and rests on "+r.ID+", which is "+orDraft(r.Status), p.rule.Kind.Mend)
					}
				}
			}
		}
	},
}

var withdrawnInUse = Rule{
	Kind: place.Kind{
		Code: "withdrawn-in-use", Severity: place.Warning, Title: "A study uses a withdrawn record",
		Explanation: "The record was replaced or found wrong; what rests on it must be looked at again.",
		Trigger:     copper("status: withdrawn\nwithdrawn_reason: replaced\n") + "-- content/reports/x.md --\n# X\n\n```study: compare\nmaterials: [x]\nwindow: 0 °C to 100 °C\n```\n",
		Mend:        "use the record that replaces it, which its page names",
	},
	Whole: func(p *Pass) {
		for _, j := range p.Outcomes {
			for _, m := range j.Outcome.Chosen() {
				for _, r := range restsOn(p.Library, m) {
					if r.Status == material.Withdrawn {
						p.Find(j.Document.Source, j.Outcome.Position, quote(j.Outcome.Title)+" uses "+r.ID+", which is withdrawn: "+r.WithdrawnReason, p.rule.Kind.Mend)
					}
				}
			}
		}
	},
}

// restsOn are the records that one answer of a study rests on.
func restsOn(lib *library.Library, m study.MaterialOutcome) []*material.Record {
	var list []*material.Record
	for _, e := range m.Evidence {
		if r := lib.Material(e.Record); r != nil {
			list = append(list, r)
		}
	}
	return list
}

func orDraft(s material.Status) string {
	if s == "" {
		return string(material.Draft)
	}
	return string(s)
}

var offerUnusable = Rule{
	Kind: place.Kind{
		Code: "offer-unusable", Severity: place.Warning, Title: "An offer cannot be ranked",
		Explanation: "An undated offer, or one without a currency, is listed and not ranked: metal-linked prices may hold for a day.",
		Trigger:     copper("") + "-- materials/offers.csv --\nmaterial,supplier,form,size,price,currency,per,quantity,date,valid_until,metal_base,certificate,resistivity_tolerance,note\nx,A supplier,wire,1 mm,12.50,EUR,kg,10 kg,,,,,,invented\n",
		Mend:        "write date and currency as the offer states them, or ask again",
	},
	Whole: func(p *Pass) {
		for _, o := range p.Library.Offers {
			what := ""
			switch {
			case p.Library.Material(o.Material) == nil:
				what = "is for " + quote(o.Material) + ", which is no record"
			case o.Date == "":
				what = "has no date"
			case o.Currency == "":
				what = "has no currency"
			}
			if what != "" {
				p.Find(nil, o.Position, "the offer of "+quote(o.Supplier)+" "+what, p.rule.Kind.Mend)
			}
		}
	},
}
