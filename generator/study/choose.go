package study

import (
	"math"
	"strconv"
	"strings"

	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// chooseKind makes a shortlist from requirements.
var chooseKind = Kind{
	Name:  "choose",
	Title: "Shortlist",
	Doc: "Makes a shortlist from requirements over all records, or over those named: what holds, ranked by margin; what is known over part of the window only, with that part; " +
		"what is rejected, each with its reasons.",
	Fields: []form.Field{
		field("materials", form.List(form.Text), "IDs of the records to choose from; all of the reference when it is missing.", "[cumn12ni, cuni44]"),
		field("families", form.List(form.Text), "Families to choose from.", "[resistance alloys]"),
		windowField,
		field("calibrated_at", form.Quantity(quantity.Temperature), "Temperature that changes are counted from; 20 °C when it is missing (common practice).", "23 °C"),
		field("form", form.OneOf("strip", "sheet", "foil", "wire", "bar"), "Form of stock that must be recorded.", "strip"),
		field("thickness", form.Quantity(quantity.Length), "Thickness of stock, a value or limits.", "0.5 mm to 1 mm"),
		field("diameter", form.Quantity(quantity.Length), "Diameter of stock, a value or limits.", "0.4 mm"),
		field("declared", form.List(form.Text), "Restricted substances that a declaration of the record must hold within their limit.", "[lead, cadmium]"),
		field("status", form.OneOf("released", "any"), "Whether only released records may be chosen; released when it is missing.", "released"),
	},
	Numbers: withChange(
		NumberDoc{"resistivity", quantity.Resistivity, "µΩ·cm", 4, "ρ", "Resistivity at the calibration temperature."},
		NumberDoc{"emf_to_copper", quantity.EMF, "µV/K", 3, "EMF to copper", "Thermal EMF against copper."},
		NumberDoc{"service_temperature", quantity.Temperature, "°C", 4, "service to", "Highest continuous service temperature that is recorded."},
		NumberDoc{"margin", quantity.Ratio, "%", 3, "margin", "Least margin of all requirements, (limit − worst)/limit."},
	),
	Run: runChoose,
}

// choice is one run of choose.
type choice struct {
	*work
	lo, hi, reference float64
}

func runChoose(w *work) {
	w.out.Cautions, w.out.Choice = comparisonCautions, true
	c := &choice{work: w}
	c.lo, c.hi = w.window("window")
	c.reference = w.kelvin("calibrated_at", quantity.ZeroCelsius+20, "common practice")
	records := c.candidates()
	if w.failed {
		return
	}
	if len(w.block.Get("require").Keys()) == 0 {
		w.note("Nothing is required, so nothing is rejected: add require: with bounds on the numbers.")
	}
	answers := w.each(records, func(r *material.Record) []*answer { return []*answer{c.judge(r)} })
	w.finish(answers)
	c.show(answers)
}

// candidates are the records named, or all of the families named, or all.
func (c *choice) candidates() []*material.Record {
	list := c.lib.Materials
	if c.has("materials") {
		list = c.records("materials")
	}
	families := c.block.Get("families").List()
	if len(families) == 0 {
		return list
	}
	known := map[string]bool{}
	for _, r := range c.lib.Materials {
		known[string(r.Family)] = true
	}
	wanted := map[string]bool{}
	for _, f := range families {
		wanted[f.Text()] = true
		if !known[f.Text()] {
			c.fail("family-unknown", f, "no record is of the family "+quote(f.Text()), nearFamily(f.Text(), known))
		}
	}
	var kept []*material.Record
	for _, r := range list {
		if wanted[string(r.Family)] {
			kept = append(kept, r)
		}
	}
	return kept
}

func nearFamily(text string, known map[string]bool) string {
	list := sortedKeys(known)
	if near := place.Near(text, list); near != "" {
		return "did you mean " + near + "?"
	}
	return "the families here are: " + strings.Join(list, ", ")
}

// judge tells the numbers of one record, holds them against what is required,
// and what the stock and the state must be.
func (c *choice) judge(r *material.Record) *answer {
	a := c.about(r)
	if r.Adopted != nil {
		a.tell("resistivity", rhoAt(r.Adopted, c.reference))
	}
	a.tellSwing(swingOf(r.Adopted, c.reference, c.lo, c.hi))
	if s, ok := a.property("emf_to_copper"); ok {
		a.tell("emf_to_copper", s)
	}
	if p := r.Property("service_temperature"); p != nil {
		if p.Continuous != nil {
			a.tell("service_temperature", exactly(p.Continuous.Value))
		} else if p.Accuracy != nil {
			a.tell("service_temperature", exactly(p.Accuracy.Value))
		}
	}
	a.judge()
	c.state(a)
	c.stock(a)
	c.declared(a)
	margin := math.Inf(1)
	for _, q := range a.Requirements {
		switch {
		case q.Margin != nil:
			margin = math.Min(margin, *q.Margin)
		case q.Verdict == Fails || q.Verdict == CannotBeTold:
			margin = math.Inf(-1)
		}
	}
	if !math.IsInf(margin, 0) {
		a.tell("margin", nominal(margin))
	}
	if a.Verdict == Holds || a.Verdict == HoldsNominally || a.Verdict == NotAsked {
		a.rank = -margin
	}
	return a
}

func (c *choice) state(a *answer) {
	if c.text("status", "released") != "released" {
		return
	}
	verdict := Holds
	if a.Record.Status != material.Released {
		verdict = Fails
	}
	a.condition("status", "released", verdict, "status: not released")
}

// stock looks for a recorded form and size.
func (c *choice) stock(a *answer) {
	form := c.text("form", "")
	thickness, byThickness := c.block.Get("thickness").Quantity()
	diameter, byDiameter := c.block.Get("diameter").Quantity()
	if form == "" && !byThickness && !byDiameter {
		return
	}
	wanted := strings.TrimSpace(form + " " + thickness.Text + diameter.Text)
	verdict := Fails
	for _, s := range a.Record.Stock {
		if (form == "" || s.Form == form) && (!byThickness || sizeFits(s.Thickness, thickness)) && (!byDiameter || sizeFits(s.Diameter, diameter)) {
			verdict = Holds
		}
	}
	why := "stock: no " + wanted + " is recorded"
	if len(a.Record.Stock) == 0 {
		verdict, why = CannotBeTold, "stock: none is recorded"
	}
	a.condition("stock", wanted, verdict, why)
}

// declared looks for a declaration of every substance that is asked for; one
// above its limit fails, a missing one cannot be told.
func (c *choice) declared(a *answer) {
	for _, n := range c.block.Get("declared").List() {
		verdict, why := CannotBeTold, "no declaration of "+n.Text()
		for _, d := range a.Record.Declarations {
			switch {
			case !strings.EqualFold(d.Substance, n.Text()):
			case d.AboveLimit():
				verdict, why = Fails, n.Text()+" is declared above its limit"
			case verdict != Fails:
				verdict = Holds
			}
		}
		a.condition("declaration", n.Text(), verdict, why)
	}
}

func sizeFits(have *quantity.Quantity, want quantity.Quantity) bool {
	if have == nil || !have.HasValue() {
		return false
	}
	if want.Limits != nil {
		return have.Value >= want.Limits.Lower-1e-9 && have.Value <= want.Limits.Upper+1e-9
	}
	return math.Abs(have.Value-want.Value) < 1e-6
}

// show makes the three lists.
func (c *choice) show(answers []*answer) {
	var short, part, out []*answer
	for _, a := range answers {
		switch {
		case a.Partly != "" && a.Verdict != Fails:
			part = append(part, a)
		case a.Verdict == Fails || a.Verdict == CannotBeTold || a.Partly != "":
			out = append(out, a)
		default:
			short = append(short, a)
		}
	}
	names := []string{"resistivity", "greatest_change", "at_temperature", "change_cold", "change_hot", "turning_point", "emf_to_copper", "service_temperature", "margin"}
	counted := func(n int) string { return strconv.Itoa(n) + " of " + strconv.Itoa(len(answers)) }
	c.out.Tables = append(c.out.Tables, c.numbersTables("Shortlist: "+counted(len(short))+", by margin", short, names...)...)
	if len(part) > 0 {
		t := c.numbersTable("Told over part of the window only: "+counted(len(part)), part, partNames(names)...)
		t.Heads = append(t.Heads, "judged over")
		for i, a := range part {
			t.Rows[i] = append(t.Rows[i], a.Partly)
		}
		c.out.Tables = append(c.out.Tables, t)
	}
	if len(out) > 0 {
		c.out.Tables = append(c.out.Tables, rejected("Rejected: "+counted(len(out)), out))
	}
	if len(short) == 0 {
		c.note("No record holds every requirement over the whole window. " + nearest(answers))
		for _, text := range contradictions(answers) {
			c.note(text)
		}
	}
	c.out.Listed = true
	c.figure(short)
}

// contradictions names requirements that nothing meets, and pairs of which
// each is met by some record and both by none.
func contradictions(answers []*answer) []string {
	met := map[string][]bool{} // by requirement, in the order of answers
	var names []string
	for i, a := range answers {
		for _, r := range a.Requirements {
			if met[r.Name] == nil {
				met[r.Name] = make([]bool, len(answers))
				names = append(names, r.Name)
			}
			met[r.Name][i] = r.Verdict == Holds || r.Verdict == HoldsNominally
		}
	}
	var list []string
	count := func(a, b string) (n int) {
		for i := range answers {
			if met[a][i] && met[b][i] {
				n++
			}
		}
		return n
	}
	for i, a := range names {
		if count(a, a) == 0 {
			list = append(list, "Nothing on record meets “"+inWords(a)+"” alone.")
			continue
		}
		for _, b := range names[i+1:] {
			if count(b, b) > 0 && count(a, b) == 0 {
				list = append(list, "“"+inWords(a)+"” and “"+inWords(b)+"” contradict each other here: each is met by some record, both by none.")
			}
		}
	}
	return list
}

// rejected tells each material with its reasons.
func rejected(caption string, answers []*answer) Table {
	t := Table{Caption: caption, Heads: []string{"Material", "verdict", "reasons"}}
	for _, a := range answers {
		t.Rows, t.Links = append(t.Rows, []string{a.Label(), a.Verdict.Shown(), strings.Join(a.Reasons, "; ")}), append(t.Links, a.Material)
	}
	return t
}

// nearest names the answer that misses least, and by what.
func nearest(answers []*answer) string {
	best, margin, name := (*answer)(nil), math.Inf(-1), ""
	for _, a := range answers {
		worst, which := math.Inf(1), ""
		for _, r := range a.Requirements {
			switch {
			case r.Margin == nil && r.Verdict != Holds:
				worst = math.Inf(-1)
			case r.Margin != nil && *r.Margin < worst:
				worst, which = *r.Margin, r.Name
			}
		}
		if worst > margin && !math.IsInf(worst, 1) {
			best, margin, name = a, worst, which
		}
	}
	if best == nil {
		return "None comes near: each lacks what one of the requirements needs."
	}
	return "Nearest is " + best.Label() + ": " + inWords(name) + " " + best.told(name) + ", margin " + quantity.Fixed(margin*100, 0) + quantity.NarrowSpace + "%."
}

// figure draws the shortlist's changes, the first eight at most.
func (c *choice) figure(short []*answer) {
	const most = 8
	chart := Chart{Title: c.out.Title, XTitle: "temperature in °C", YTitle: "change of R from " + quantity.CelsiusText(c.reference) + " in " + changeUnit(short),
		Description: "Change of R of the shortlist over " + windowText(c.lo, c.hi) + "."}
	if len(short) > most {
		chart.Description = "Change of R of the first " + strconv.Itoa(most) + " of the shortlist over " + windowText(c.lo, c.hi) + "."
	}
	for i, a := range short {
		if i == most || a.Record.Adopted == nil {
			break
		}
		read := material.Reading{Told: a.Record.Adopted.Ratio, Ratio: true, Reference: c.reference}
		if s, ok := seriesOf(a.Record.ShortName(), a.Record.Adopted, read, c.lo, c.hi, perUnit(changeUnit(short))); ok {
			chart.Series = append(chart.Series, s)
		}
	}
	if len(chart.Series) > 0 {
		c.out.Charts = append(c.out.Charts, chart)
	}
}
