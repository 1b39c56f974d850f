// Package site makes the pages of a reference from statements, outcomes and
// documents. Pages compute nothing: they print what stands in their input.
package site

import (
	"bytes"
	"fmt"
	"io/fs"
	"strings"

	"ohmfolio/generator/changes"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
	"ohmfolio/generator/place"
	"ohmfolio/generator/statement"
	"ohmfolio/generator/study"
	"ohmfolio/generator/topics"
)

// Input is all that the pages are made of.
type Input struct {
	Library   *library.Library
	Statement func(r *material.Record) *statement.Statement // computed when asked for, and forgotten
	Outcomes  map[string][]*study.Outcome                   // by document, "reports/x", in order of blocks
	Findings  []place.Finding
	Files     func(r *material.Record) []File // for other programs; nil: none
	Theme     fs.FS                           // templates, styles and scripts
	Topics    []topics.Topic                  // of the guide, made from the program's lists
	// Answer gives the current value of a live number: text, note, and
	// whether there is one.
	Answer func(question, written, materialID string) (text, note string, ok bool)
	// Editions, Changes and History tell what former statements said; nil
	// where nobody asks.
	HasEditions bool
	Live        bool // rendered when asked for, and never published: data scripts have plain names
	Editions    func() []changes.Row
	Changes     func() *changes.Report // from the newest edition to now, nil when there is none
	History     func(materialID string) []changes.Entry
}

// A File is a file of one material for other programs, or why there is none;
// For is empty where there is none at all.
type File struct{ For, Path, Refused string }

// Outputs lists every page, style and script. The error names the template
// that cannot be used.
func Outputs(in *Input) ([]output.Output, error) {
	s := &site{in: in, units: statement.UnitsOf(in.Library)}
	var err error
	data := map[string]func() []byte{"list.js": s.listScript, "find-index.js": s.findScript, "check-data.js": s.checkScript}
	if s.look, err = loadLook(in.Theme, data, in.Live); err != nil {
		return nil, err
	}
	s.used = usedBy(in)
	list := s.look.outputs()
	list = append(list, s.home(), s.materials(), s.sideBySide(), s.firstShunt(), s.sources(), s.words(), s.decisions(), s.review(), s.editions(), s.changes(), s.check())
	for _, t := range s.topics() {
		list = append(list, s.topic(t))
	}
	for _, r := range in.Library.Materials {
		page, sheet := s.materialPair(r)
		list = append(list, page, sheet, s.heldScript(r))
	}
	for _, d := range in.Library.Documents {
		if d.Room != "" {
			list = append(list, s.document(d))
			list = append(list, s.studySheets(d)...)
		}
	}
	return list, nil
}

// site is one run.
type site struct {
	in    *Input
	look  *look
	units statement.Units
	used  map[string][]statement.Use
}

// frame is what every page's frame prints; page structs embed it.
type frame struct {
	Title     string
	Kind      string // class of the body
	Root      string // "" or "../"
	Styles    []string
	Mark      string
	Begin     string // the script that runs before anything is drawn
	Scripts   []string
	Find      string // scripts of the field in the header, with spaces between
	ReadIn    string // scripts of the reader's units
	HouseUnit string
	Menu      []menuItem
	Reference library.Settings
}

type menuItem struct {
	Name, Path string
	Here       bool
}

// link is a name with where it leads.
type link struct{ Name, Path string }

// contentsItem is one entry of the line of contents.
type contentsItem struct{ ID, Text string }

// cautionList is the cautions of one page.
type cautionList struct {
	ID   string
	List []string
}

func (s *site) frame(title, kind, root, here string, scripts ...string) frame {
	f := frame{Title: title, Kind: kind, Root: root, Styles: []string{s.look.style}, Mark: s.look.mark, Begin: s.look.scripts["begin.js"], Reference: s.in.Library.Settings}
	if kind != "material" {
		f.Styles = append(f.Styles, s.look.pages)
	}
	for _, name := range append([]string{"tables.js"}, scripts...) {
		f.Scripts = append(f.Scripts, s.look.scripts[name])
	}
	f.Find, f.ReadIn, f.HouseUnit = s.scripts(root, "find-index.js", "find.js"), s.scripts(root, "reading.js", "prefer.js"), s.unit()
	for _, m := range []menuItem{{"Materials", "materials.html", false}, {"Side by side", "side-by-side.html", false},
		{"Decisions", "decisions.html", false}, {"Sources", "sources.html", false}, {"How to read", s.howToRead(), false}} {
		m.Here = m.Path == here
		f.Menu = append(f.Menu, m)
	}
	return f
}

// scripts names scripts that a part loads when it is touched.
func (s *site) scripts(root string, names ...string) string {
	paths := make([]string, len(names))
	for i, name := range names {
		paths[i] = root + s.look.scripts[name]
	}
	return strings.Join(paths, " ")
}

// howToRead is the first guide, or the words page where there is none.
func (s *site) howToRead() string {
	for _, d := range s.in.Library.Documents {
		if d.Room == "guides" {
			return pagePath(d)
		}
	}
	return "words.html"
}

// page makes the output of one template.
func (s *site) page(path, template string, data func() any) output.Output {
	return output.Output{Path: path, Write: func(w *bytes.Buffer) error {
		if err := s.look.templates.ExecuteTemplate(w, template, data()); err != nil {
			return fmt.Errorf("template %s: %w", template, err)
		}
		return nil
	}}
}

// pagePath is where a document is written.
func pagePath(d *library.Document) string {
	switch d.Room {
	case "guides":
		return "guide/" + d.Stem + ".html"
	case "reports":
		return "report/" + d.Stem + ".html"
	}
	return "index.html"
}

// pages lists the documents of a room as links from the root.
func (s *site) pages(room string) []link {
	var list []link
	for _, d := range s.in.Library.Documents {
		if d.Room == room {
			list = append(list, link{d.Page.Title, pagePath(d)})
		}
	}
	return list
}

func (s *site) materialLink(id, root string) link {
	if r := s.in.Library.Material(id); r != nil {
		return link{r.Name, root + "material/" + r.ID + ".html"}
	}
	return link{id, ""}
}
