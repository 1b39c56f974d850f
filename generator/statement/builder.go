package statement

import (
	"strings"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// builder fills one statement, part by part.
type builder struct {
	lib *library.Library
	r   *material.Record
	set *material.DataSet
	s   *Statement
}

// UnitsOf finds the house units of reference.yaml, which the library has
// checked already.
func UnitsOf(lib *library.Library) Units {
	find := func(k quantity.Kind, name, usual string) quantity.Unit {
		if u, ok := quantity.FindUnit(k, name); ok {
			return u
		}
		u, _ := quantity.FindUnit(k, usual)
		return u
	}
	s := lib.Settings.Units
	return Units{
		Resistivity:  find(quantity.Resistivity, s.Resistivity, "µΩ·cm"),
		Temperature:  find(quantity.Temperature, s.Temperature, "°C"),
		Coefficient:  find(quantity.Coefficient1, s.Coefficient, "ppm/K"),
		Conductivity: find(quantity.Conductivity, s.Conductivity, "MS/m"),
	}
}

// reference is the temperature that ratios of the adopted set are told about.
func (b *builder) reference() float64 { return b.set.RatioReference }

// stateText says a status the way a reader must not miss it.
func stateText(r *material.Record) string {
	switch r.Status {
	case material.Released:
		return "released"
	case material.InReview:
		return "in review, not for use"
	case material.Withdrawn:
		return "withdrawn, not for use"
	}
	return "draft, not for use"
}

func (b *builder) identity() {
	prefix := b.lib.Settings.DocumentPrefix
	if prefix == "" {
		prefix = "MR"
	}
	b.s.DocumentNumber = prefix + "-" + b.r.ID
	b.s.Status = stateText(b.r)
	if b.set != nil {
		b.s.Caveats = b.set.Caveats
	}
	b.s.NotStated = b.notStated()
}

// notStated lists what a reader would look for and not find.
func (b *builder) notStated() []string {
	var list []string
	add := func(missing bool, what string) {
		if missing {
			list = append(list, what)
		}
	}
	add(b.r.Family == "", "family")
	add(b.r.AppliesTo == "", "what the values apply to")
	if b.set != nil {
		add(b.set.Basis == "", "basis of the temperature coefficient")
		add(b.set.Class == "", "class of the values")
		add(b.set.Condition == "", "condition (temper, form)")
		add(b.set.Resistivity == nil && b.set.Table == nil && b.set.Callendar == nil && !b.set.Rho.HasNominal(), "resistivity")
		add(b.set.Resistivity != nil && b.set.Resistivity.Limits == nil && b.set.Resistivity.Uncertainty == nil, "limits of the resistivity")
		add(b.set.Model == material.Point, "temperature coefficient")
		add(b.set.Alpha != nil && b.set.Alpha.Limits == nil && b.set.Alpha.Uncertainty == nil, "limits of α")
	}
	for _, p := range []struct{ key, name string }{{"density", "density"}, {"expansion", "linear expansion"},
		{"emf_to_copper", "thermal EMF to copper"}, {"thermal_conductivity", "thermal conductivity"},
		{"specific_heat", "specific heat"}, {"service_temperature", "service temperature"}} {
		add(b.r.Property(p.key) == nil, p.name)
	}
	return list
}

// headline gives the lines a reader looks for first.
func (b *builder) headline() {
	if b.set == nil {
		return
	}
	set := b.set
	var facts []Fact
	if set.Rho.HasNominal() {
		facts = append(facts, b.answerFact("Resistivity at "+quantity.CelsiusText(b.reference()), AskResistivity))
	} else if set.Resistivity != nil {
		facts = append(facts, Fact{Label: "Resistivity at " + quantity.CelsiusText(set.Reference), Value: set.Resistivity.In(b.s.Units.Resistivity)})
	}
	for _, c := range []struct {
		name string
		q    *quantity.Quantity
	}{{"α", set.Alpha}, {"β", set.Beta}, {"γ", set.Gamma}} {
		if c.q != nil {
			facts = append(facts, Fact{Label: c.name + " about " + quantity.CelsiusText(set.Reference), Value: pretty(*c.q), Remark: asWrittenElse(*c.q)})
		}
	}
	facts = append(facts, b.changeFact())
	facts = append(facts, Fact{Label: "Valid range", Value: rangeText(set.Valid), Remark: "no value is given outside"},
		Fact{Label: "Basis", Value: basisText(set.Basis)},
		Fact{Label: "Condition", Value: orNotStated(set.Condition)},
		Fact{Label: "Class of the values", Value: orNotStated(string(set.Class)), Remark: "checked against " + orNotStated(string(b.lib.CheckedOf(set.Source)))})
	if b.r.AppliesTo != "" {
		facts = append(facts, Fact{Label: "Applies to", Value: b.r.AppliesTo})
	}
	if b.r.NotFor != "" {
		facts = append(facts, Fact{Label: "Not for", Value: b.r.NotFor})
	}
	b.s.Headline = facts
}

func (b *builder) answerFact(label, asked string) Fact {
	a, err := Ask(b.lib, b.r, Question{Quantity: asked, At: b.reference()})
	if err != nil {
		return Fact{Label: label, Value: "cannot be told", Remark: err.Error()}
	}
	band := a.Band
	if band == "" {
		band = "limits not stated"
	}
	return Fact{Label: label, Value: a.Text, Band: band}
}

// changeFact tells the greatest change over −40 °C to 85 °C, or over the
// valid range where that is narrower.
func (b *builder) changeFact() Fact {
	label := "Greatest change of R"
	if !b.set.Ratio.HasNominal() {
		return Fact{Label: label, Value: "cannot be told: no coefficient"}
	}
	w := material.Window{Lo: quantity.ZeroCelsius - 40, Hi: quantity.ZeroCelsius + 85}
	if w.Lo < b.set.Valid.Lo || w.Hi > b.set.Valid.Hi {
		w = b.set.Valid
	}
	m, err := curve.Measure(b.set.Ratio.Nominal, b.reference(), w.Lo, w.Hi)
	if err != nil {
		return Fact{Label: label, Value: "cannot be told: " + err.Error()}
	}
	return Fact{Label: label + ", " + rangeText(w), Value: quantity.ChangeText(m.Change.Greatest),
		Remark: "at " + quantity.CelsiusText(m.Change.GreatestAt) + ", from " + quantity.CelsiusText(b.reference())}
}

func basisText(basis material.Basis) string {
	switch basis {
	case material.Resistance:
		return "resistance of a fixed body"
	case material.Resistivity:
		return "volume resistivity, corrected for expansion"
	case material.Uncorrected:
		return "resistivity on the dimensions of one temperature"
	}
	return "not stated"
}

// pretty is a quantity in the unit its author wrote, typeset.
func pretty(q quantity.Quantity) string { return q.In(q.Unit) }

// asWrittenElse is what the author wrote, "" when the printed form is the same
// but for its typesetting.
func asWrittenElse(q quantity.Quantity) string {
	plain := strings.NewReplacer(quantity.NarrowSpace, " ", "−", "-", "+/-", "±", "  ", " ").Replace
	if plain(pretty(q)) == plain(q.Text) {
		return ""
	}
	return "written " + q.Text
}

func joined(list []string, none string) string {
	if len(list) == 0 {
		return none
	}
	return strings.Join(list, ", ")
}
