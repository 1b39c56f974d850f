// Package examine holds the rules that a reference is held against: one rule
// a file, one sorted list. Rules see the loaded library and the outcomes of
// its studies; they open no file and print nothing.
package examine

import (
	"sync"

	"ohmfolio/generator/form"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/study"
)

// A Rule is one check: what it finds, and the function that looks. Exactly
// one of Record and Whole is set.
type Rule struct {
	Kind   place.Kind
	Record func(p *Pass, r *material.Record) // looks at one record
	Whole  func(p *Pass)                     // looks at the whole reference
}

// A Pass is what a rule works with. It is used by one goroutine.
type Pass struct {
	Library  *library.Library
	Outcomes []Judged
	Today    string // ISO date, "" when the reader gave none

	rule     *Rule
	findings []place.Finding
}

// Judged is a study's outcome with the document it stands in.
type Judged struct {
	Document *library.Document
	Outcome  *study.Outcome
}

// Find reports a finding of the rule's own kind and severity.
func (p *Pass) Find(src *place.Source, at place.Position, message, mend string) {
	p.FindAs(p.rule.Kind.Severity, src, at, message, mend)
}

// FindAs reports with another severity; the rule's Kind says when.
func (p *Pass) FindAs(s place.Severity, src *place.Source, at place.Position, message, mend string) {
	l := place.List{Source: src}
	l.Add(p.rule.Kind.Code, s, at, message, mend)
	p.findings = append(p.findings, l.Findings...)
}

// findAt reports at a node of a record, at the record's first line when the
// node is missing.
func (p *Pass) findAt(r *material.Record, n *form.Node, message, mend string) {
	p.findAtAs(p.rule.Kind.Severity, r, n, message, mend)
}

func (p *Pass) findAtAs(s place.Severity, r *material.Record, n *form.Node, message, mend string) {
	at := n.Position()
	if at.Line == 0 {
		at = place.Position{File: r.Source.File, Line: 1, Column: 1, Length: 1}
	}
	p.FindAs(s, r.Source, at, message, mend)
}

// releasedElse softens a rule: the given severity for a released record, the
// second one otherwise (definitions: what a released record must have is an
// error when missing, in a draft a warning).
func releasedElse(r *material.Record, released, otherwise place.Severity) place.Severity {
	if r.Status == material.Released {
		return released
	}
	return otherwise
}

// Run holds the library against every rule, records in parallel, and returns
// the findings of reading and of the rules, sorted. A rule is skipped for
// records other than those named in only, when only is not empty.
func Run(lib *library.Library, outcomes []Judged, opts Options) []place.Finding {
	findings := append([]place.Finding{}, lib.Findings...)
	findings = append(findings, opts.More...)
	passes := splitRecords(lib, outcomes, opts)
	var wait sync.WaitGroup
	for _, p := range passes {
		wait.Add(1)
		go func() { defer wait.Done(); p.run() }()
	}
	wait.Wait()
	for _, p := range passes {
		findings = append(findings, p.findings...)
	}
	findings = append(findings, whole(lib, outcomes, opts)...)
	place.Sort(findings)
	return findings
}

// Options of a run.
type Options struct {
	Today    string          // ISO date
	Parallel int             // at least 1
	More     []place.Finding // what reading the studies found
}

// share is one goroutine's part of the records.
type share struct {
	Pass
	records []*material.Record
}

func splitRecords(lib *library.Library, outcomes []Judged, opts Options) []*share {
	n := max(1, opts.Parallel)
	shares := make([]*share, n)
	for i := range shares {
		shares[i] = &share{Pass: Pass{Library: lib, Outcomes: outcomes, Today: opts.Today}}
	}
	for i, r := range lib.Materials {
		s := shares[i%n]
		s.records = append(s.records, r)
	}
	return shares
}

func (s *share) run() {
	for _, r := range s.records {
		for i := range rules {
			if rules[i].Record != nil {
				s.rule = &rules[i]
				rules[i].Record(&s.Pass, r)
			}
		}
	}
}

func whole(lib *library.Library, outcomes []Judged, opts Options) []place.Finding {
	p := Pass{Library: lib, Outcomes: outcomes, Today: opts.Today}
	for i := range rules {
		if rules[i].Whole != nil {
			p.rule = &rules[i]
			rules[i].Whole(&p)
		}
	}
	return p.findings
}
