package library

import (
	"sort"

	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
)

const sourcesFile = "materials/sources.yaml"

var sourceShape = &form.Shape{Name: "a source", Doc: "One source that records cite.", Fields: []form.Field{
	{Key: "kind", Required: true, Is: form.OneOf("standard", "paper", "handbook", "data sheet", "certificate", "measurement"), Doc: "What it is.", Example: "standard"},
	{Key: "title", Required: true, Is: form.Text, Doc: "Title.", Example: "International standard of resistance for copper"},
	{Key: "author", Is: form.Text, Doc: "Author or desk.", Example: "R. A. Matula"},
	{Key: "number", Is: form.Text, Doc: "Number of a standard or certificate.", Example: "IEC 60028"},
	{Key: "publisher", Is: form.Text, Doc: "Publisher or journal.", Example: "J. Phys. Chem. Ref. Data 8"},
	{Key: "edition", Is: form.Text, Doc: "Edition.", Example: "2nd"},
	{Key: "year", Is: form.Text, Doc: "Year.", Example: "1925"},
	{Key: "where", Is: form.Text, Doc: "Pages, clause or identifier.", Example: "1147-1298"},
	{Key: "checked", Is: material.CheckedType(), Doc: "Against what its values were compared.", Example: "transcription"},
	{Key: "access", Is: form.Text, Doc: "Where the company's copy is, and who may read it.", Example: "metrology desk, shelf 3"},
	{Key: "superseded_by", Is: form.Text, Doc: "ID of the newer edition.", Example: "iec-60751"},
	{Key: "invented", Is: form.YesNo, Doc: "A source of the demo.", Example: "yes"},
	{Key: "note", Is: form.Text, Doc: "A remark that is printed.", Example: "the standard itself was not opened"},
}}

// sources reads materials/sources.yaml.
func (l *loader) sources() {
	src := l.readIfThere(sourcesFile)
	if src == nil {
		l.add("sources-missing", place.Warning, sourcesFile, "there is no sources.yaml", "write it: each source that records cite, with kind, title and number or author")
		return
	}
	n, findings := form.ReadAs(src, form.Named(form.Mapping(sourceShape)))
	l.findings = append(l.findings, findings...)
	list := place.List{Source: src}
	for i, id := range n.Keys() {
		s := readSource(id, n.List()[i])
		if s.Number == "" && s.Author == "" && s.Publisher == "" {
			list.Add("source-not-citable", place.Error, s.Position, "source "+id+" has neither number nor author nor publisher", "add what a reader needs to find it")
		}
		l.lib.Sources[id] = s
		l.lib.SourceIDs = append(l.lib.SourceIDs, id)
	}
	l.findings = append(l.findings, list.Findings...)
	sort.Strings(l.lib.SourceIDs)
}

func readSource(id string, n *form.Node) *Source {
	s := &Source{ID: id, Kind: n.Get("kind").Text(), Author: n.Get("author").Text(), Title: n.Get("title").Text(), Number: n.Get("number").Text(),
		Publisher: n.Get("publisher").Text(), Edition: n.Get("edition").Text(), Year: n.Get("year").Text(), Where: n.Get("where").Text(),
		SupersededBy: n.Get("superseded_by").Text(), Access: n.Get("access").Text(), Note: n.Get("note").Text(), Invented: n.Get("invented").Yes(), Position: n.KeyPosition()}
	s.Checked, s.CheckedDate, s.CheckedBy = material.ReadChecked(n.Get("checked"))
	return s
}
