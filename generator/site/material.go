package site

import (
	"sync"

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
	AskScripts  string // loaded when the reader asks a value
	Cautions    cautionList
	History     []historyRow
	Copy        copyMark // of the sheet
	PDF         bool
	Files       []File
}

// pair is the statement that a page and its sheet share: computed by the one
// that is rendered first, forgotten after the second.
type pair struct {
	mu   sync.Mutex
	st   *statement.Statement
	left int
}

func (p *pair) take(compute func() *statement.Statement) *statement.Statement {
	p.mu.Lock()
	defer p.mu.Unlock()
	st := p.st
	if st == nil {
		st = compute()
		p.st, p.left = st, 2
	}
	if p.left--; p.left == 0 {
		p.st = nil
	}
	return st
}

func (s *site) materialPair(r *material.Record) (page, sheet output.Output) {
	shared := &pair{}
	compute := func() *statement.Statement { return s.in.Statement(r) }
	page = s.page("material/"+r.ID+".html", "material-page", func() any {
		p := s.materialPage(shared.take(compute))
		p.frame = s.frame(r.Name, "material", "../", "materials.html", "review.js")
		p.Contents = materialContents(p.S)
		p.History = s.history(r.ID)
		if s.in.Files != nil {
			p.Files = s.in.Files(r)
		}
		p.AskScripts = s.scripts("../", "reading.js") + " ../data/" + r.ID + ".js " + s.scripts("../", "ask.js")
		return p
	})
	sheet = s.page("sheet/"+r.ID+".html", "sheet-page", func() any {
		p := s.materialPage(shared.take(compute))
		p.frame = s.frame("Sheet "+p.S.DocumentNumber+", "+r.Name, "sheet-page", "../", "")
		p.Cautions = cautionList{"cautions", study.SheetCautions()}
		p.Copy = s.copyMark(p.S.Record)
		return p
	})
	return page, sheet
}

// materialPage copies the statement: the documents that use the material are
// known here and not there.
func (s *site) materialPage(st *statement.Statement) *materialPage {
	own := *st
	own.UsedBy = s.used[st.Record.ID]
	p := &materialPage{PDF: s.in.Library.Settings.PDF, S: &own, StateClass: stateClass(st.Record)}
	if r := st.Record.ReplacedBy; r != "" {
		l := s.materialLink(r, "../")
		p.Replacement = &l
	}
	if own.Set != nil && own.Set.Rho != nil && own.Set.Rho.Limits != nil {
		p.BandWords = ", with the band of the stated limits"
	}
	return p
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
	add(true, "ask", "Ask")
	add(st.RhoFigure != nil || st.RatioFigure != nil, "curves", "Curves")
	add(len(st.Values.Rows) > 0, "values", "Values")
	add(len(st.Constants.Rows) > 0, "constants", "Constants")
	add(st.Windows.Caption != "", "tcr", "Temperature coefficient")
	add(len(st.Properties) > 0, "properties", "Properties")
	add(true, "sets", "Data sets")
	add(len(st.PerMetre.Rows) > 0, "metre", "Per metre")
	add(len(st.Equivalents) > 0, "equivalents", "Equivalents")
	add(len(st.Declarations) > 0, "declarations", "Declarations")
	add(true, "missing", "Not stated")
	add(true, "history", "History")
	add(true, "used", "Where used")
	add(true, "sources", "Sources")
	return list
}
