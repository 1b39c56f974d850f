package library

import (
	"ohmfolio/generator/form"
	"ohmfolio/generator/place"
)

// Units are the house units by name, as reference.yaml gives them.
type Units struct{ Resistivity, Temperature, Coefficient, Conductivity string }

func defaultSettings() Settings {
	return Settings{Title: "Material reference", Paper: []string{"A4", "Letter"}, DocumentPrefix: "MR",
		Units: Units{Resistivity: "µΩ·cm", Temperature: "°C", Coefficient: "ppm/K", Conductivity: "MS/m"}}
}

var unitsShape = &form.Shape{Name: "units", Doc: "House units of pages and sheets.", Fields: []form.Field{
	{Key: "resistivity", Is: form.OneOf("µΩ·cm", "µΩ·m", "nΩ·m", "Ω·mm²/m", "Ω·m"), Doc: "Unit of resistivity.", Example: "µΩ·cm"},
	{Key: "temperature", Is: form.OneOf("°C", "K", "°F"), Doc: "Unit of temperature.", Example: "°C"},
	{Key: "coefficient", Is: form.OneOf("ppm/K", "/K", "%/K"), Doc: "Unit of temperature coefficients.", Example: "ppm/K"},
	{Key: "conductivity", Is: form.OneOf("MS/m", "S/m"), Doc: "Unit of conductivity.", Example: "MS/m"},
}}

var settingsShape = &form.Shape{Name: "reference.yaml", Doc: "What the whole reference is called and how it is shown.", Fields: []form.Field{
	{Key: "title", Required: true, Is: form.Text, Doc: "Title of the reference.", Example: "Material reference"},
	{Key: "organisation", Is: form.Text, Doc: "Who keeps it.", Example: "Harbour Works"},
	{Key: "contact", Is: form.Text, Doc: "Whom to ask: a role's address.", Example: "materials.desk@example.org"},
	{Key: "address", Is: form.Text, Doc: "Where the site stands, for printed copies.", Example: "https://reference.example.org/"},
	{Key: "paper", Is: form.List(form.OneOf("A4", "Letter")), Doc: "Paper of the sheets.", Example: "[A4, Letter]"},
	{Key: "units", Is: form.Mapping(unitsShape), Doc: "House units."},
	{Key: "document_prefix", Is: form.Text, Doc: "First part of document numbers.", Example: "MR"},
	{Key: "reading_order", Is: form.Mapping(&form.Shape{Name: "reading_order", Doc: "Order of pages by the stems of their files.", Fields: []form.Field{
		{Key: "guides", Is: form.List(form.Text), Doc: "Guides in order.", Example: "[how-to-read-a-sheet]"},
		{Key: "reports", Is: form.List(form.Text), Doc: "Reports in order.", Example: "[conductor-metals]"},
	}}), Doc: "Reading order."},
	{Key: "pdf", Is: form.YesNo, Doc: "Whether sheets are written as PDF too.", Example: "no"},
	{Key: "exchange_rates", Is: form.List(form.Mapping(rateShape)), Doc: "Exchange rates with date and source."},
}}

var rateShape = &form.Shape{Name: "exchange_rates", Doc: "One dated rate.", Fields: []form.Field{
	{Key: "from", Required: true, Is: form.Text, Doc: "Currency.", Example: "USD"},
	{Key: "to", Required: true, Is: form.Text, Doc: "Currency.", Example: "EUR"},
	{Key: "rate", Required: true, Is: form.Number, Doc: "One unit of from in units of to.", Example: "0.9"},
	{Key: "date", Required: true, Is: form.Date, Doc: "Day of the rate.", Example: "2026-10-01"},
	{Key: "source", Required: true, Is: form.Text, Doc: "Where the rate stands.", Example: "central bank"},
}}

// settings reads content/reference.yaml; without it the defaults hold.
func (l *loader) settings() {
	src := l.readIfThere("content/reference.yaml")
	if src == nil {
		return
	}
	n, findings := form.Read(src, settingsShape)
	l.findings = append(l.findings, findings...)
	if n == nil || place.Count(findings, place.Error) > 0 {
		return
	}
	s := &l.lib.Settings
	for key, into := range map[string]*string{"title": &s.Title, "organisation": &s.Organisation, "contact": &s.Contact, "address": &s.Address, "document_prefix": &s.DocumentPrefix} {
		if n.Has(key) {
			*into = n.Get(key).Text()
		}
	}
	u := n.Get("units")
	for key, into := range map[string]*string{"resistivity": &s.Units.Resistivity, "temperature": &s.Units.Temperature, "coefficient": &s.Units.Coefficient, "conductivity": &s.Units.Conductivity} {
		if u.Has(key) {
			*into = u.Get(key).Text()
		}
	}
	if n.Has("paper") {
		s.Paper = texts(n.Get("paper"))
	}
	s.Guides, s.Reports = texts(n.Get("reading_order").Get("guides")), texts(n.Get("reading_order").Get("reports"))
	s.PDF = n.Get("pdf").Yes()
	for _, r := range n.Get("exchange_rates").List() {
		rate, _ := r.Get("rate").Number()
		s.Rates = append(s.Rates, Rate{From: r.Get("from").Text(), To: r.Get("to").Text(), Date: r.Get("date").Text(), Source: r.Get("source").Text(), Rate: rate})
	}
}

func texts(n *form.Node) []string {
	var list []string
	for _, e := range n.List() {
		list = append(list, e.Text())
	}
	return list
}
