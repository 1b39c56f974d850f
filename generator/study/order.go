package study

import (
	"strings"

	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// What the electrical part of an order may be in.
const (
	byResistivity = "resistivity"
	byLength      = "resistance per length"
)

// orderKind writes the words of an order from the record.
var orderKind = Kind{
	Name:  "order",
	Title: "Words for the order",
	Doc: "Writes, for each size in stock or named, the paragraph to paste into an order: designation and edition, temper, size and tolerance, electrical basis with its temperature and limits, " +
		"coefficient with its window, certificate, test method. What the record does not state stands as a gap to fill.",
	Fields: []form.Field{
		needed("material", form.Text, "ID of the record.", "cumn12ni"),
		field("data", form.Text, "Data set that is ordered by; one of class specified when it is missing.", "jis-class-aa"),
		field("form", form.OneOf("strip", "sheet", "foil", "wire", "bar"), "Only sizes of this form.", "strip"),
		field("by", form.OneOf(byResistivity, byLength), "Which electrical property governs; resistivity when it is missing.", byLength),
		field("certificate", form.Text, "Type of the certificate by EN 10204; 3.1 when it is missing (common practice).", "3.1"),
		field("method", form.Text, "Test method for the electrical property.", "IEC 60468"),
		field("quantity", form.Text, "What is ordered.", "25 kg"),
	},
	Numbers: []NumberDoc{
		{"resistance_per_length", quantity.ResistancePerLength, "Ω/m", 4, "Ω/m", "Resistance of a metre at the reference temperature, over the limits of ρ and the dimensions."},
		{"spread", quantity.Ratio, "%", 3, "spread", "Half the width of that band: a_ρ + a_t + a_w, or a_ρ + 2·a_d, worst case."},
	},
	Run: runOrder,
}

var orderFindings = []place.Kind{
	{
		Code: "data-set-unknown", Severity: place.Error, Title: "A study names a data set that the record has not",
		Explanation: "An order is written by one data set, the one whose standard the supplier is held to.",
		Trigger:     triggerFence("study: order", "material: copper\ndata: class-b"),
		Mend:        "write the name of a data set of that record",
	},
	{
		Code: "part-geometry", Severity: place.Error, Title: "A part whose geometry is not told once",
		Explanation: "A round part has a diameter, a flat one width and thickness; what is free must be one of them.",
		Trigger:     triggerFence("study: substitute", "material: copper\nby: [copper]\nlength: 1 m\nfree: width\ndiameter: 1 mm\nwindow: 0 °C to 60 °C"),
		Mend:        "give diameter, or width and thickness",
	},
	{
		Code: "stock-missing", Severity: place.Error, Title: "An order for a size that is not recorded",
		Explanation: "The words of an order need a size with its tolerance, which the record lists as stock.",
		Trigger:     triggerFence("study: order", "material: copper"),
		Mend:        "add the size to stock: in the record",
	},
}

// order is one run of the study.
type order struct {
	*work
	record *material.Record
	set    *material.DataSet // whose standard is ordered by
}

func runOrder(w *work) {
	w.out.Cautions = []string{CautionNotApproval, CautionCodes}
	o := &order{work: w}
	if o.record = w.record(w.block.Get("material")); w.failed {
		return
	}
	if o.set = specifiedSet(o.record); w.has("data") {
		if o.set = o.record.Set(w.text("data", "")); o.set == nil {
			w.fail("data-set-unknown", w.block.Get("data"), o.record.ID+" has no data set "+quote(w.text("data", "")), "write one of "+strings.Join(setNames(o.record), ", "))
			return
		}
	}
	table := Table{Caption: "Words for the order", Heads: []string{"Size", "text"}}
	var answers []*answer
	for _, s := range o.record.Stock {
		if w.has("form") && s.Form != w.text("form", "") {
			continue
		}
		a := o.size(s)
		answers = append(answers, a)
		table.Rows = append(table.Rows, []string{a.Size, o.words(s, a)})
	}
	if len(answers) == 0 {
		w.fail("stock-missing", w.block.Get("material"), o.record.ID+" has no "+strings.TrimSpace(w.text("form", "")+" stock")+" on record", "add the size to stock: in the record")
		return
	}
	w.finish(answers)
	w.out.Ranking = []string{}
	w.out.Tables = append(w.out.Tables, table)
	if w.text("by", byResistivity) == byLength {
		w.note("Ω/m governs. ρ follows from it and the section as measured; asking for limits of Ω/m, of ρ and of the dimensions at once asks for three that are not independent.")
	} else {
		w.note("ρ governs, and the dimensions by their own limits. Ω/m follows from them with the spread shown; do not order it within less.")
	}
	w.note("EN 10204 names types of document, not tests: what is to be on the paper is listed in the words.")
	w.out.Tables = append(w.out.Tables, w.numbersTable("What the limits leave to Ω/m", answers, "resistance_per_length", "spread"))
}

// specifiedSet is the data set that a supplier can be held to: one of class
// specified, else the adopted one.
func specifiedSet(r *material.Record) *material.DataSet {
	if r.Adopted != nil && r.Adopted.Class == material.Specified {
		return r.Adopted
	}
	for _, s := range r.Sets {
		if s.Class == material.Specified && s.Resistivity != nil {
			return s
		}
	}
	return r.Adopted
}

func setNames(r *material.Record) []string {
	var list []string
	for _, s := range r.Sets {
		list = append(list, s.Name)
	}
	return list
}

// size tells Ω/m of one stock with the limits of ρ and the dimensions.
func (o *order) size(s material.Stock) *answer {
	a := o.about(o.record)
	a.Size = sizeText(s)
	a.Evidence = []Evidence{evidenceFrom(o.lib, o.record, o.set)}
	section := unknown()
	switch {
	case s.Diameter != nil:
		d := given(*s.Diameter)
		section = d.through(func(x float64) float64 { return 0.785398163397448 * x * x })
	case s.Thickness != nil && s.Width != nil:
		section = given(*s.Thickness).times(given(*s.Width))
	}
	if o.set == nil || o.set.Rho == nil {
		a.cannot("no resistivity")
		return a
	}
	perLength := rhoAt(o.set, o.set.Reference).over(section)
	a.tell("resistance_per_length", perLength)
	if perLength.wide() {
		a.tell("spread", exactly((perLength.hi-perLength.lo)/(perLength.hi+perLength.lo)))
	}
	return a
}

func sizeText(s material.Stock) string {
	switch {
	case s.Gauge != "":
		return s.Form + " " + s.Gauge
	case s.Diameter != nil:
		return s.Form + " " + s.Diameter.Text
	case s.Thickness != nil && s.Width != nil:
		return s.Form + " " + s.Thickness.Text + " × " + s.Width.Text
	}
	return s.Form
}

// gap is what a person must fill in before the order goes out.
func gap(what string) string { return "[" + what + ": to be filled in]" }

// words are the paragraph for one size.
func (o *order) words(s material.Stock, a *answer) string {
	parts := []string{o.designation(), o.temper(), a.Size}
	if !strings.Contains(a.Size, "±") && !strings.Contains(a.Size, "+/-") {
		parts = append(parts, gap("tolerance of the dimensions"))
	}
	parts = append(parts, o.electrical(s, a), o.coefficient())
	if o.has("quantity") {
		parts = append(parts, o.text("quantity", ""))
	}
	parts = append(parts, "certificate "+o.text("certificate", "3.1")+" to EN 10204 stating: resistivity or resistance with its temperature and uncertainty, temperature coefficient with its window, dimensions, heat number, temper, quantity")
	if o.has("method") {
		parts = append(parts, "electrical test to "+o.text("method", ""))
	} else {
		parts = append(parts, gap("test method"))
	}
	return strings.Join(parts, "; ") + "."
}

func (o *order) designation() string {
	text := o.record.Name
	for _, d := range o.record.Designations {
		if d.Key != "short" {
			text += ", " + d.Key + " " + d.Text
		}
	}
	src := o.lib.Source(o.set.Source.ID)
	switch {
	case src == nil:
		return text + " " + gap("standard with its edition")
	case src.Kind != "standard":
		return text + " " + gap("standard with its edition; the record rests on "+o.set.Source.ID)
	}
	to := ", to " + strings.TrimSpace(src.Number)
	if src.Edition != "" {
		to += ":" + src.Edition
	} else if src.Year != "" && !strings.Contains(src.Number, src.Year) {
		to += ":" + src.Year
	} else if !strings.Contains(src.Number, ":") && !strings.Contains(src.Number, "-20") && !strings.Contains(src.Number, "-19") {
		to += " " + gap("edition")
	}
	if o.set.Source.Where != "" {
		to += ", " + o.set.Source.Where
	}
	return text + to
}

func (o *order) temper() string {
	if o.set.Condition == "" || o.set.Condition == "not stated" {
		return gap("temper")
	}
	return o.set.Condition
}

func (o *order) electrical(s material.Stock, a *answer) string {
	at := " at " + quantity.CelsiusText(o.set.Reference)
	if o.text("by", byResistivity) == byLength {
		if s.Resistance != nil {
			return "resistance per length" + at + " " + s.Resistance.Text + " (governs)"
		}
		if text := a.text("resistance_per_length"); text != "" {
			return "resistance per length" + at + " " + text + "\u202fΩ/m " + gap("limits agreed")
		}
		return gap("resistance per length with its temperature and limits")
	}
	if o.set.Resistivity == nil {
		return gap("resistivity with its temperature and limits")
	}
	text := "resistivity" + at + " " + o.set.Resistivity.Text + " (governs)"
	if o.set.Resistivity.Limits == nil {
		text += " " + gap("limits")
	}
	return text
}

func (o *order) coefficient() string {
	for _, l := range o.record.TCRLimits {
		return "temperature coefficient, " + l.Measure + ", from " + l.From.Text + " to " + l.To.Text + " over " + l.Window.Text
	}
	if a := o.set.Alpha; a != nil && a.Limits != nil {
		return "temperature coefficient about " + quantity.CelsiusText(o.set.Reference) + " " + a.Text
	}
	return gap("temperature coefficient with its measure, window and limits")
}
