package study

import (
	"math"
	"sort"

	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// answer is what a study says of one material, as it grows.
type answer struct {
	MaterialOutcome
	w     *work
	spans map[string]span
	at    map[string]float64 // K: where the worst case of a number lies
	rank  float64            // what it is ordered by; NaN is last

	judged bool
	terms  []term // of an error budget
}

// about begins the answer of one material.
func (w *work) about(r *material.Record) *answer {
	a := &answer{w: w, spans: make(map[string]span, len(w.kind.Numbers)), at: map[string]float64{}, rank: math.NaN()}
	a.MaterialOutcome = MaterialOutcome{Material: r.ID, Record: r, Name: r.Name, Reasons: []string{}, Requirements: []Requirement{},
		Numbers: make(map[string]Number, len(w.kind.Numbers)), Tables: []Table{}, Warnings: []string{}, Evidence: []Evidence{evidenceOf(w.lib, r)}}
	warnState(&a.MaterialOutcome, r)
	return a
}

// reason says why something cannot be told or does not hold, each once.
func (a *answer) reason(text string) {
	for _, r := range a.Reasons {
		if r == text {
			return
		}
	}
	a.Reasons = append(a.Reasons, text)
}

// cannot tells that what it names is missing: "no thermal conductivity".
func (a *answer) cannot(why string) { a.reason("cannot be told: " + why) }

func (a *answer) warn(text string) { a.Warnings = append(a.Warnings, text) }

// tell adds a named number; one that is not known is left out.
func (a *answer) tell(name string, s span) {
	doc := a.w.kind.number(name)
	if !s.known() {
		return
	}
	u := a.w.unit(doc)
	n := Number{Unit: u.Symbol, Kind: "nominal"}
	if !math.IsNaN(s.v) {
		n.Value = number(u.FromSI(s.v))
	}
	switch {
	case s.wide():
		n.Lower, n.Upper, n.Kind = number(u.FromSI(s.lo)), number(u.FromSI(s.hi)), "limits"
		if !s.banded {
			n.Kind = "partial limits"
		}
	case s.banded:
		n.Kind = "exact"
	}
	a.Numbers[name], a.spans[name] = n, s
}

// tellAt adds a number with the temperature where it lies.
func (a *answer) tellAt(name string, s span, kelvin float64) {
	a.tell(name, s)
	a.at[name] = kelvin
}

// property is a property of the material with its limits; false when the
// record has none.
func (a *answer) property(name string) (span, bool) {
	p := a.Record.Property(name)
	if p == nil {
		return unknown(), false
	}
	q := p.Value
	switch {
	case q.Limits != nil && p.Class != material.Typical && math.IsInf(q.Limits.Lower, -1):
		// "at most 1 µV/K" bounds the magnitude.
		return span{v: math.NaN(), lo: -q.Limits.Upper, hi: q.Limits.Upper, banded: true, sure: math.NaN()}, true
	case q.Limits != nil && p.Class != material.Typical && !math.IsInf(q.Limits.Upper, 1):
		s := given(q)
		s.v = q.Value // none when the source gives limits alone
		return s, true
	case q.HasValue():
		return nominal(q.Value), true
	}
	return unknown(), false
}

// unit is the one that a number is told in: the house unit of resistivity.
func (w *work) unit(doc *NumberDoc) quantity.Unit {
	if doc.Kind == quantity.Resistivity {
		return w.houseResistivity()
	}
	if u, ok := w.units[doc.Name]; ok {
		return u
	}
	return w.kind.index[doc.Name].unit
}

// text prints a number without its unit where the head of a column has one;
// "" when it is not told.
func (a *answer) text(name string) string {
	s, ok := a.spans[name]
	if !ok {
		return ""
	}
	doc := a.w.kind.number(name)
	u := a.w.unit(doc)
	show := func(si float64) string { return oneText(doc, u, si) }
	if !s.wide() {
		if math.IsNaN(s.v) {
			return show(s.lo)
		}
		return show(s.v)
	}
	lo, hi := show(s.lo), show(s.hi)
	switch {
	case math.IsNaN(s.v):
		return lo + " to " + hi
	case lo != hi:
		return show(s.v) + " (" + lo + " to " + hi + ")"
	}
	return show(s.v)
}

func oneText(doc *NumberDoc, u quantity.Unit, si float64) string {
	switch {
	case math.IsInf(si, 1):
		return "without limit"
	case doc.Kind == quantity.Ratio && doc.Unit == "ppm":
		return quantity.ChangeText(si)
	case doc.Kind == quantity.Coefficient1:
		return quantity.PPMText(si)
	case doc.Kind == quantity.Temperature:
		return quantity.Fixed(u.FromSI(si), 1)
	}
	return quantity.Number(u.FromSI(si), max(3, doc.Digits))
}

// head of the column of a number: its words and its unit, which changes print
// for themselves.
func (w *work) head(name string) string {
	doc := w.kind.number(name)
	head := doc.Head
	if head == "" {
		head = inWords(name)
	}
	switch {
	case doc.Unit == "" || doc.Kind == quantity.Ratio && doc.Unit == "ppm":
		return head
	}
	return head + ", " + w.unit(doc).Symbol
}

// numbersTable has one row a material and one column a number; a column that
// nobody can fill is left out.
func (w *work) numbersTable(caption string, answers []*answer, names ...string) Table {
	t := Table{Caption: caption, Heads: []string{"Material"}}
	var kept []string
	for _, name := range names {
		for _, a := range answers {
			if _, ok := a.Numbers[name]; ok {
				kept = append(kept, name)
				t.Heads = append(t.Heads, w.head(name))
				break
			}
		}
	}
	verdicts := w.has("require")
	if verdicts {
		t.Heads = append(t.Heads, "verdict")
	}
	t.Rows, t.Links = make([][]string, len(answers)), make([]string, len(answers))
	inParallel(len(answers), func(i int) {
		a := answers[i]
		row := make([]string, 1, len(kept)+2)
		row[0] = a.Label()
		for _, name := range kept {
			row = append(row, a.cell(name))
		}
		if verdicts {
			row = append(row, a.Verdict.Shown())
		}
		t.Rows[i], t.Links[i] = row, a.Material
	})
	return t
}

// What fits across a sheet of paper: numbers as columns, or answers.
const (
	mostColumns = 7
	mostAnswers = 5
)

// numbersTables lays out many numbers so that they fit on paper: a few answers
// as columns with the numbers as rows; otherwise several tables of some columns
// each.
func (w *work) numbersTables(caption string, answers []*answer, names ...string) []Table {
	if len(answers) > 0 && len(answers) <= mostAnswers && len(names) > mostColumns {
		return []Table{transposed(w.numbersTable(caption, answers, names...))}
	}
	var list []Table
	for len(names) > 0 {
		n := min(mostColumns, len(names))
		t := w.numbersTable(caption, answers, names[:n]...)
		if len(t.Heads) > 2 || len(list) == 0 {
			list = append(list, t)
		}
		names, caption = names[n:], caption+", continued"
	}
	return list
}

// transposed turns columns into rows; the answers' names become the heads.
func transposed(t Table) Table {
	out := Table{Caption: t.Caption, Heads: []string{"Number"}}
	for _, row := range t.Rows {
		out.Heads = append(out.Heads, row[0])
	}
	for i := 1; i < len(t.Heads); i++ {
		line := []string{t.Heads[i]}
		for _, row := range t.Rows {
			line = append(line, row[i])
		}
		out.Rows = append(out.Rows, line)
	}
	return out
}

// requirementsTable holds every answer against what was asked: one column a
// requirement, with verdict and margin. Nil rows when nothing was.
func (w *work) requirementsTable(answers []*answer) (Table, bool) {
	require := w.block.Get("require").Keys()
	if len(require) == 0 {
		return Table{}, false
	}
	t := Table{Caption: "Held against what was asked, with the margin that is left", Heads: []string{"Material"}}
	for i, name := range require {
		t.Heads = append(t.Heads, inWords(name)+", "+w.block.Get("require").List()[i].Text())
	}
	for _, a := range answers {
		row := []string{a.Label()}
		for _, name := range require {
			row = append(row, a.held(name))
		}
		t.Rows, t.Links = append(t.Rows, row), append(t.Links, a.Material)
	}
	return t, true
}

func (a *answer) held(name string) string {
	for _, r := range a.Requirements {
		if r.Name != name {
			continue
		}
		if r.Margin == nil {
			return r.Verdict.Shown()
		}
		return r.Verdict.Shown() + ", " + quantity.Fixed(*r.Margin*100, 0) + quantity.NarrowSpace + "%"
	}
	return ""
}

func (a *answer) cell(name string) string {
	if text := a.text(name); text != "" {
		return text
	}
	return string(CannotBeTold)
}

// finish judges every answer, orders them, and puts them into the outcome.
// Better verdicts do not come first: the order is by rank alone, whole windows
// before parts.
func (w *work) finish(answers []*answer) {
	w.order(answers)
	for _, a := range answers {
		w.out.Materials = append(w.out.Materials, a.MaterialOutcome)
		if a.Partly == "" && !math.IsNaN(a.rank) && !containsText(w.out.Ranking, a.Ranked()) {
			w.out.Ranking = append(w.out.Ranking, a.Ranked())
		}
	}
}

// order judges every answer and sorts them.
func (w *work) order(answers []*answer) {
	for _, a := range answers {
		a.judge()
	}
	sort.SliceStable(answers, func(i, j int) bool {
		a, b := answers[i], answers[j]
		switch {
		case (a.Partly == "") != (b.Partly == ""):
			return a.Partly == ""
		case math.IsNaN(a.rank) != math.IsNaN(b.rank):
			return !math.IsNaN(a.rank)
		case a.rank != b.rank && !math.IsNaN(a.rank):
			return a.rank < b.rank
		case a.Material != b.Material:
			return a.Material < b.Material
		}
		return false
	})
}

func containsText(list []string, s string) bool {
	for _, x := range list {
		if x == s {
			return true
		}
	}
	return false
}
