package site

import (
	"ohmfolio/generator/changes"
	"ohmfolio/generator/output"
)

// historyRow is one entry of a material's history.
type historyRow struct {
	changes.Entry
	Where   string // the edition, or the words for the present state
	Head    string
	Effects []string
	Lines   []changes.Line // what a sheet states; record keeping is in the entry itself
}

func (s *site) history(id string) []historyRow {
	if s.in.History == nil {
		return nil
	}
	var rows []historyRow
	for _, e := range s.in.History(id) {
		row := historyRow{Entry: e, Where: "edition " + e.Statement}
		if e.Statement == "" {
			row.Where = "not in an edition yet"
		}
		if e.Change != nil {
			row.Head, row.Effects, row.Lines = e.Change.Head(), e.Change.Effects(), stated(e.Change)
		}
		rows = append(rows, row)
	}
	return rows
}

// stated leaves out record keeping, which the entry tells itself.
func stated(c *changes.Change) []changes.Line {
	var list []changes.Line
	for _, l := range c.Lines() {
		if !l.Aside {
			list = append(list, l)
		}
	}
	return list
}

// editionRow is one edition in the list.
type editionRow struct {
	changes.Row
	Counts    string
	Verdicts  []flipRow
	Documents []affectedRow
}

func (s *site) editions() output.Output {
	return s.page("editions.html", "editions-page", func() any {
		var rows []editionRow
		if s.in.Editions != nil {
			for _, e := range s.in.Editions() {
				row := editionRow{Row: e, Counts: "the first edition"}
				if e.Report != nil {
					row.Counts, row.Verdicts, row.Documents = e.Report.Counts(), s.flips(e.Report.Verdicts), s.affected(e.Report.Documents)
				}
				rows = append(rows, row)
			}
		}
		return struct {
			frame
			Rows []editionRow
		}{s.frame("Editions", "editions", "", "", "review.js"), rows}
	})
}

// changeRow is one material on the page of changes.
type changeRow struct {
	ID, Name, Head string
	Path           string // "" for a removed one
	Effects        []string
	Lines          []changes.Line
}

type flipRow struct {
	Title, Path, Name, Material, Old, New, MarginOld, MarginNew, Note string
}

// changesPage is what changes-page.tmpl prints.
type changesPage struct {
	frame
	Report           *changes.Report
	Counts           string
	Rows             []changeRow
	Verdicts, Margin []flipRow
	Documents        []affectedRow
	Sources          []changeRow
}

// affectedRow is a document that rests on what changed.
type affectedRow struct {
	Title, Path string // no path when the document is gone
	On          []link
}

func (s *site) changes() output.Output {
	return s.page("changes.html", "changes-page", func() any {
		p := changesPage{frame: s.frame("Changes since the newest edition", "changes", "", "")}
		if s.in.Changes == nil {
			return p
		}
		if p.Report = s.in.Changes(); p.Report == nil {
			return p
		}
		p.Counts = p.Report.Counts()
		for i := range p.Report.Materials {
			if c := &p.Report.Materials[i]; c.Change != changes.Unchanged {
				p.Rows = append(p.Rows, s.changeRow(c))
			}
		}
		p.Documents = s.affected(p.Report.Documents)
		for i := range p.Report.Sources {
			row := s.changeRow(&p.Report.Sources[i])
			row.Path = "" // it leads to the list of sources, which the page names
			p.Sources = append(p.Sources, row)
		}
		p.Verdicts, p.Margin = s.flips(p.Report.Verdicts), s.flips(p.Report.Margins)
		return p
	})
}

func (s *site) changeRow(c *changes.Change) changeRow {
	row := changeRow{ID: c.ID, Name: c.Name, Head: c.Head(), Effects: c.Effects(), Lines: c.Lines()}
	if c.Change != changes.Removed {
		row.Path = "material/" + c.ID + ".html"
	}
	return row
}

func (s *site) affected(list []changes.Affected) []affectedRow {
	there := map[string]bool{}
	for _, d := range s.in.Library.Documents {
		there[pagePath(d)] = true
	}
	var rows []affectedRow
	for _, d := range list {
		row := affectedRow{Title: d.Title}
		if there[d.Path] {
			row.Path = d.Path
		}
		for _, id := range d.Materials {
			l := s.materialLink(id, "")
			l.Name = s.short(id)
			row.On = append(row.On, l)
		}
		rows = append(rows, row)
	}
	return rows
}

func (s *site) flips(list []changes.Flip) []flipRow {
	var rows []flipRow
	for _, f := range list {
		row := flipRow{Title: f.Title, Path: f.Document, Name: s.short(f.Material), Old: changes.Shown(f.Old), New: changes.Shown(f.New),
			MarginOld: changes.MarginText(f.MarginOld), MarginNew: changes.MarginText(f.MarginNew)}
		if s.in.Library.Material(f.Material) != nil {
			row.Material = "material/" + f.Material + ".html"
		}
		if f.Size != "" {
			row.Name += ", " + f.Size
		}
		if f.Parameters {
			row.Note = "the question itself has changed"
		}
		if f.Binding {
			row.Title += " (binding)"
		}
		rows = append(rows, row)
	}
	return rows
}
