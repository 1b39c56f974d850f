package examine

import (
	"sort"

	"ohmfolio/generator/changes"
	"ohmfolio/generator/columns"
	"ohmfolio/generator/form"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
	"ohmfolio/generator/study"
	"ohmfolio/generator/words"
)

// Catalogue joins the kinds of finding of every package, sorted by code.
func Catalogue() []place.Kind {
	var list []place.Kind
	for _, kinds := range [][]place.Kind{quantity.FindingKinds, form.Kinds, words.Kinds, columns.Kinds, material.Kinds, library.Kinds, study.FindingKinds, changes.Kinds} {
		list = append(list, kinds...)
	}
	for _, r := range rules {
		list = append(list, r.Kind)
	}
	sort.SliceStable(list, func(i, j int) bool { return list[i].Code < list[j].Code })
	return list
}

// FindingJSON is one finding; the names are a contract.
type FindingJSON struct {
	Code     string `json:"code"`
	Severity string `json:"severity"`
	File     string `json:"file"`
	Line     int    `json:"line"`
	Column   int    `json:"column"`
	Message  string `json:"message"`
	Mend     string `json:"mend"`
}

// ReportJSON is the result of the examine command in JSON.
type ReportJSON struct {
	Findings []FindingJSON  `json:"findings"`
	Counts   map[string]int `json:"counts"`
}

// JSON turns findings into their contract form.
func JSON(findings []place.Finding) ReportJSON {
	r := ReportJSON{Findings: []FindingJSON{}, Counts: Counts(findings)}
	for _, f := range findings {
		r.Findings = append(r.Findings, FindingJSON{f.Code, string(f.Severity), f.Position.File, f.Position.Line, f.Position.Column, f.Message, f.Mend})
	}
	return r
}

// Counts counts findings by severity; every severity is there.
func Counts(findings []place.Finding) map[string]int {
	return map[string]int{
		string(place.Error):   place.Count(findings, place.Error),
		string(place.Warning): place.Count(findings, place.Warning),
		string(place.Note):    place.Count(findings, place.Note),
	}
}
