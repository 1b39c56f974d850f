package site

import (
	"ohmfolio/generator/figure"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
	"ohmfolio/generator/statement"
	"ohmfolio/generator/study"
)

// materialPage is what material-page.tmpl and sheet-page.tmpl print.
type materialPage struct {
	frame
	S           *statement.Statement
	StateClass  string
	Replacement *link
	Contents    []contentsItem
	BandWords   string
	Cautions    cautionList
}

func (s *site) material(st *statement.Statement) output.Output {
	id := st.Record.ID
	return s.page("material/"+id+".html", "material-page", func() any {
		p := s.materialPage(st, "material", "../material/")
		p.frame = s.frame(st.Record.Name, "material", "../", "materials.html")
		p.Contents = materialContents(st)
		return p
	})
}

func (s *site) sheet(st *statement.Statement) output.Output {
	id := st.Record.ID
	return s.page("sheet/"+id+".html", "sheet-page", func() any {
		p := s.materialPage(st, "sheet", "../material/")
		p.frame = s.frame("Sheet "+st.DocumentNumber+", "+st.Record.Name, "sheet-page", "../", "")
		p.Cautions = cautionList{"cautions", study.SheetCautions()}
		return p
	})
}

// materialPage copies the statement: pages and sheets print figures with ids
// of their own, and the documents that use the material are known here.
func (s *site) materialPage(st *statement.Statement, prefix, to string) *materialPage {
	own := *st
	own.UsedBy = s.used[st.Record.ID]
	own.RhoFigure, own.RatioFigure = withID(st.RhoFigure, prefix+"-rho"), withID(st.RatioFigure, prefix+"-ratio")
	p := &materialPage{S: &own, StateClass: stateClass(st.Record)}
	if r := st.Record.ReplacedBy; r != "" {
		l := s.materialLink(r, "")
		l.Path = to + r + ".html"
		p.Replacement = &l
	}
	if own.Set != nil && own.Set.Rho != nil && own.Set.Rho.Limits != nil {
		p.BandWords = ", with the band of the stated limits"
	}
	return p
}

func withID(f *figure.Figure, id string) *figure.Figure {
	if f == nil {
		return nil
	}
	c := *f
	c.ID = id
	return &c
}

func stateClass(r *material.Record) string {
	switch r.Status {
	case material.Released:
		return "released"
	case material.Withdrawn:
		return "withdrawn"
	}
	return "not-for-use"
}

func materialContents(st *statement.Statement) []contentsItem {
	list := []contentsItem{{"facts", "In short"}}
	add := func(there bool, id, text string) {
		if there {
			list = append(list, contentsItem{id, text})
		}
	}
	add(st.RhoFigure != nil || st.RatioFigure != nil, "curves", "Curves")
	add(len(st.Values.Rows) > 0, "values", "Values")
	add(len(st.Constants.Rows) > 0, "constants", "Constants")
	add(st.Windows.Caption != "", "tcr", "Temperature coefficient")
	add(len(st.Properties) > 0, "properties", "Properties")
	add(true, "sets", "Data sets")
	add(len(st.PerMetre.Rows) > 0, "metre", "Per metre")
	add(true, "missing", "Not stated")
	add(true, "used", "Where used")
	add(true, "sources", "Sources")
	return list
}
