package examine

import (
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
)

var basisMissing = Rule{
	Kind: place.Kind{
		Code: "basis-missing", Severity: place.Warning, Title: "The basis of the coefficient is not stated",
		Explanation: "A coefficient of resistance and one of resistivity differ by the linear expansion: for a low-TCR alloy that is more than its whole specification. Without the basis nothing is converted. In a released record of a resistance alloy or a standard conductor it is an error.",
		Trigger:     record("name: X\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nsource: standard\n"),
		Mend:        "add basis: resistance, resistivity, or resistivity, uncorrected, as the source measured it",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			if s.Basis != "" || s.Model == material.Point {
				continue
			}
			severity := place.Warning
			if r.Status == material.Released && (r.Family == material.ResistanceAlloys || r.Family == material.StandardConductors) {
				severity = place.Error
			}
			p.findAtAs(severity, r, s.Node, s.Label()+" does not state its basis: "+
				"ratios may differ by up to 30 ppm/K × (T − T_ref)", p.rule.Kind.Mend)
		}
	},
}

var conditionMissing = Rule{
	Kind: place.Kind{
		Code: "condition-missing", Severity: place.Warning, Title: "The condition (temper, form) is not stated",
		Explanation: "Cold work, annealing and cooling move resistivity and coefficient. A value whose condition is unknown fits no part for certain. In a released record it is an error; \"not stated\" may be written where the source itself is silent.",
		Trigger:     record("name: X\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nsource: standard\n"),
		Mend:        "add condition: for example annealed, hard drawn, or not stated by the source",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			if s.Condition == "" {
				p.findAtAs(releasedElse(r, place.Error, place.Warning), r, s.Node, s.Label()+" does not state its condition", p.rule.Kind.Mend)
			}
		}
	},
}

var classMissing = Rule{
	Kind: place.Kind{
		Code: "class-missing", Severity: place.Warning, Title: "The class of the values is not stated",
		Explanation: "Specified, typical, measured, calculated or textbook: a typical value never forms limits, a measured one carries an uncertainty. A reader must know which it is.",
		Trigger:     record("name: X\nresistivity: 43 µΩ·cm\nalpha: 10 ppm/K\nbasis: resistance\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nsource: standard\n"),
		Mend:        "add class: specified, typical, measured, calculated or textbook",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			if s.Class == "" {
				p.findAt(r, s.Node, s.Label()+" does not state the class of its values", p.rule.Kind.Mend)
			}
		}
	},
}

var limitsMissing = Rule{
	Kind: place.Kind{
		Code: "limits-missing", Severity: place.Note, Title: "The resistivity has neither limits nor an uncertainty",
		Explanation: "A missing ± is unknown, never zero: no band can be drawn and no verdict can hold on more than nominal values.",
		Trigger:     record("name: X\nresistivity: 43 µΩ·cm\nsource: standard\nreference_temperature: 20 °C\nbasis: resistance\n"),
		Mend:        "add the ± of the source, or leave it and accept verdicts on nominal values",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			if q := s.Resistivity; q != nil && q.Limits == nil && q.Uncertainty == nil {
				p.findAt(r, s.Node.Get(s.WrittenAs), "the resistivity "+q.Text+" has neither limits nor an uncertainty", p.rule.Kind.Mend)
			}
		}
	},
}

var signOffMissing = Rule{
	Kind: place.Kind{
		Code: "sign-off-missing", Severity: place.Error, Title: "A released record lacks a part of its sign-off",
		Explanation: "Release needs an author, another reviewer, a date, the reason of the revision and the date on which a review is due, and a revision number.",
		Trigger:     copper("status: released\nrevision: 1\n"),
		Mend:        "add sign_off: {author, reviewer, date, reason, due}",
	},
	Record: func(p *Pass, r *material.Record) {
		if r.Status != material.Released {
			return
		}
		for _, part := range missingSignOff(r) {
			p.findAt(r, r.Node.Get("status"), "the record is released without "+part, p.rule.Kind.Mend)
		}
	},
}

func missingSignOff(r *material.Record) []string {
	if r.SignOff == nil {
		return []string{"a sign_off"}
	}
	var list []string
	for _, part := range []struct{ name, text string }{{"an author", r.SignOff.Author}, {"a reviewer", r.SignOff.Reviewer},
		{"a date of sign-off", r.SignOff.Date}, {"the reason of the revision", r.SignOff.Reason}, {"a review-due date", r.SignOff.Due}} {
		if part.text == "" {
			list = append(list, part.name)
		}
	}
	if r.Revision < 1 {
		list = append(list, "a revision number")
	}
	return list
}

var authorIsReviewer = Rule{
	Kind: place.Kind{
		Code: "author-is-reviewer", Severity: place.Error, Title: "Author and reviewer are the same",
		Explanation: "A value that only its author has seen has not been reviewed.",
		Trigger:     copper("status: released\nrevision: 1\nsign_off: {author: materials desk, reviewer: materials desk, date: 2026-05-04, reason: first issue, due: 2028-05-04}\n"),
		Mend:        "have someone else review it, and write their role",
	},
	Record: func(p *Pass, r *material.Record) {
		if r.SignOff != nil && r.SignOff.Author != "" && r.SignOff.Author == r.SignOff.Reviewer {
			p.findAt(r, r.SignOff.Node.Get("reviewer"), "author and reviewer are both "+quote(r.SignOff.Author), p.rule.Kind.Mend)
		}
	},
}

var reviewDue = Rule{
	Kind: place.Kind{
		Code: "review-overdue", Severity: place.Warning, Title: "The review of a record is overdue",
		Explanation: "Asked for with a date (--today). A record past its review date may cite a superseded edition or an old lot.",
		Trigger:     copper(signed),
		Mend:        "review the record, and set the next due date with the new revision",
	},
	Record: func(p *Pass, r *material.Record) {
		if p.Today != "" && r.SignOff != nil && r.SignOff.Due != "" && r.SignOff.Due < p.Today && r.Status != material.Withdrawn {
			p.findAt(r, r.SignOff.Node.Get("due"), "the review was due on "+r.SignOff.Due, p.rule.Kind.Mend)
		}
	},
}

var uncertaintyWithoutK = Rule{
	Kind: place.Kind{
		Code: "uncertainty-without-k", Severity: place.Warning, Title: "A measured value has a ± without its coverage factor",
		Explanation: "A ± on a measured value is an uncertainty and means nothing without k; without it the ± is read as a limit.",
		Trigger:     record("name: X\nresistivity: 43.1 µΩ·cm ± 0.4 %\nclass: measured\ncondition: annealed\nbasis: resistance\nalpha: 10 ppm/K\nreference_temperature: 20 °C\nvalid_range: 0 °C to 60 °C\nsource: standard\n"),
		Mend:        "write ± 0.4 % (k=2), with the factor that the certificate states",
	},
	Record: func(p *Pass, r *material.Record) {
		for _, s := range r.Sets {
			if s.Class != material.Measured {
				continue
			}
			for _, key := range []string{s.WrittenAs, "alpha", "beta", "gamma"} {
				q, ok := s.Node.Get(key).Quantity()
				if ok && q.HasValue() && q.Limits != nil && q.Uncertainty == nil {
					p.findAt(r, s.Node.Get(key), "the measured "+key+" "+quote(q.Text)+" has a ± without k", p.rule.Kind.Mend)
				}
			}
		}
	},
}

func quote(s string) string { return "“" + s + "”" }
