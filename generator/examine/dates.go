package examine

import (
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
)

// These rules know no today of their own: they look at dates only when
// --today gives one.

var declarationExpired = Rule{
	Kind: place.Kind{
		Code: "declaration-expired", Severity: place.Warning, Title: "A declaration or its exemption has expired",
		Explanation: "Asked for with a date (--today). A statement on a restricted substance holds until its day; after that nobody has declared anything.",
		Trigger:     copper("declarations: [{substance: lead, limit: 0.1 %, greatest: 0.02 %, basis: per homogeneous material, exemption: 6(c), expires: 2027-07-21, document: declaration 12, date: 2026-03-02}]\n"),
		Mend:        "ask for a new declaration, and write its document and dates",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, d := range r.Declarations {
			if p.Today != "" && d.Expires != "" && d.Expires < p.Today && r.Status != material.Withdrawn {
				p.findAt(r, d.Node.Get("expires"), "the declaration on "+quote(d.Substance)+" expired on "+d.Expires, p.rule.Kind.Mend)
			}
		}
	},
}

var offerExpired = Rule{
	Kind: place.Kind{
		Code: "offer-expired", Severity: place.Warning, Title: "An offer has expired",
		Explanation: "Asked for with a date (--today). Metal-linked prices may hold for a day; an expired offer is listed and not ranked.",
		Trigger:     copper("") + "-- materials/offers.csv --\nmaterial,supplier,form,size,price,currency,per,quantity,date,valid_until,metal_base,certificate,resistivity_tolerance,note\nx,A supplier,wire,1 mm,12.50,EUR,kg,10 kg,2026-05-01,2026-06-01,,,,invented\n",
		Mend:        "ask again, or take the offer out",
	},
	Whole: func(p *Pass) {
		for _, o := range p.Library.Offers {
			if p.Today != "" && o.ValidUntil != "" && o.ValidUntil < p.Today {
				p.Find(nil, o.Position, "the offer of "+quote(o.Supplier)+" for "+o.Material+" expired on "+o.ValidUntil, p.rule.Kind.Mend)
			}
		}
	},
}

var declarationAboveLimit = Rule{
	Kind: place.Kind{
		Code: "declaration-above-limit", Severity: place.Warning, Title: "A declared content lies above its limit without an exemption",
		Explanation: "The greatest content that the document declares, or the upper end of it, is above the limit that stands beside it.",
		Trigger:     copper("declarations: [{substance: lead, limit: 0.1 %, greatest: 0.3 %, basis: per homogeneous material, document: declaration 12, date: 2026-03-02}]\n"),
		Mend:        "look at the document; name the exemption that is made use of, or say in not_for what the material must not be used for",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, d := range r.Declarations {
			if d.AboveLimit() && d.Exemption == "" {
				p.findAt(r, d.Node.Get("greatest"), quote(d.Substance)+" may reach "+d.Greatest.Text+", above the limit "+d.Limit.Text, p.rule.Kind.Mend)
			}
		}
	},
}

var equivalentUnknown = Rule{
	Kind: place.Kind{
		Code: "equivalent-unknown", Severity: place.Error, Title: "An equivalent names a record that is not there",
		Explanation: "The differences between two records can only be computed when both are here.",
		Trigger:     copper("equivalents: [{designation: C11000, system: UNS, record: coper, verdict: near, use: bus bars}]\n"),
		Mend:        "write the ID of a record, or take record: out",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, e := range r.Equivalents {
			if e.Record == "" || p.Library.Material(e.Record) != nil {
				continue
			}
			mend := p.rule.Kind.Mend
			if near := place.Near(e.Record, p.Library.IDs()); near != "" {
				mend = "did you mean " + near + "? Otherwise " + mend
			}
			p.findAt(r, e.Node.Get("record"), "the equivalent "+quote(e.Designation)+" names "+quote(e.Record)+", which is no record", mend)
		}
	},
}

var equivalentUnsigned = Rule{
	Kind: place.Kind{
		Code: "equivalent-unsigned", Severity: place.Warning, Title: "Nobody answers for a verdict on an equivalent",
		Explanation: "A replacement that somebody once called the same is bought for years. Its verdict needs a date, an author and another reviewer, like any other statement of a released record.",
		Trigger:     copper(signed + "equivalents: [{designation: C11000, system: UNS, verdict: same, use: bus bars}]\n"),
		Mend:        "add sign_off: {author, reviewer, date} to the equivalent",
	},
	Record: func(p *Pass, r *material.Record) {
		if r.Status != material.Released {
			return
		}
		for _, e := range r.Equivalents {
			s := e.SignOff
			switch {
			case s == nil || s.Author == "" || s.Reviewer == "" || (s.Date == "" && e.Date == ""):
				p.findAt(r, e.Node, "the verdict "+quote(string(e.Verdict))+" on "+quote(e.Designation)+" has no author, reviewer or date", p.rule.Kind.Mend)
			case s.Author == s.Reviewer:
				p.findAt(r, s.Node.Get("reviewer"), "author and reviewer of the verdict on "+quote(e.Designation)+" are both "+quote(s.Author), p.rule.Kind.Mend)
			}
		}
	},
}
