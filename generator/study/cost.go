package study

import (
	"math"
	"sort"
	"strings"

	"ohmfolio/generator/form"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// What may be held equal, and how the mass goes with density δ and ρ then.
const (
	heldLength  = "length"
	heldSection = "cross-section"
	heldSurface = "surface of round wire"
	heldStrip   = "strip of one thickness"
)

var costKind = Kind{
	Name:  "cost",
	Title: "Cost of equal function",
	Doc: "Compares the cost of equal function, not of equal kilograms: what is held equal decides how the mass goes with density and resistivity. " +
		"Prices come from offers, in one currency at dated rates; an undated or expired offer is listed and not ranked.",
	Fields: []form.Field{
		materialsField,
		needed("baseline", form.Text, "The material that the indices are told against.", "cumn12ni"),
		needed("held", form.OneOf(heldLength, heldSection, heldSurface, heldStrip), "What is held equal, beside the resistance: length (mass goes with δρ), cross-section (δ/ρ), the surface of round wire (δ·∛ρ), or the surface of strip of one thickness (δ).", heldLength),
		field("at", form.Quantity(quantity.Temperature), "Temperature of the resistivity; 20 °C when it is missing (common practice).", "20 °C"),
		field("on", form.Date, "Day on which offers must be valid; without it no offer is known to be expired.", "2026-10-15"),
		field("currency", form.Text, "Currency of the comparison; EUR when it is missing.", "EUR"),
	},
	Numbers: []NumberDoc{
		{"resistivity", quantity.Resistivity, "µΩ·cm", 4, "ρ", "Resistivity at the temperature of the comparison."},
		{"mass_index", quantity.Ratio, "", 3, "mass index", "Mass for equal function, over that of the baseline."},
		{"cost_index", quantity.Ratio, "", 3, "cost index", "Cost of the metal for equal function, over that of the baseline."},
		{"price", quantity.Price, "EUR/kg", 4, "best price", "Lowest usable offer, in the currency of the comparison."},
		{"flip_price", quantity.Price, "EUR/kg", 4, "ranking flips at", "Price at which this material would cost as much as the cheapest of the others."},
		{"area_index", quantity.Ratio, "", 3, "section index", "Cross-section for equal resistance at equal length, over that of the baseline."},
	},
	Run: runCost,
}

// costing is one run of cost.
type costing struct {
	*work
	baseline *material.Record
	held     string
	at       float64
	currency string
	on       string
	offers   map[string][]quoted // by material
}

// quoted is an offer brought to a price per kilogram.
type quoted struct {
	library.Offer
	perKg float64 // NaN when it cannot be ranked
	why   string  // why not
}

func runCost(w *work) {
	w.out.Cautions = comparisonCautions
	c := &costing{work: w, held: w.text("held", heldLength), currency: w.text("currency", "EUR"), on: w.text("on", "")}
	c.baseline = w.record(w.block.Get("baseline"))
	c.at = w.kelvin("at", quantity.ZeroCelsius+20, "common practice")
	unit, ok := quantity.FindUnit(quantity.Price, c.currency+"/kg")
	if !ok {
		w.fail("currency-unknown", w.block.Get("currency"), "the currency "+quote(c.currency)+" is not one that prices are read in", "write its three letters: EUR")
	}
	records := w.records("materials")
	if w.failed {
		return
	}
	w.units = map[string]quantity.Unit{"price": unit, "flip_price": unit}
	if c.on == "" {
		w.note("No day is given (on:), so no offer is known to have expired.")
	}
	c.quote(records)
	var answers []*answer
	for _, r := range records {
		answers = append(answers, c.index(r))
	}
	c.flips(answers)
	w.finish(answers)
	c.show(answers)
}

// index tells mass and cost for equal function over the baseline's.
func (c *costing) index(r *material.Record) *answer {
	a := c.about(r)
	own, ok := c.needs(r, a)
	base, okBase := c.needs(c.baseline, nil)
	if !okBase {
		a.cannot("the baseline " + c.baseline.ID + " has no nominal resistivity or no density")
	}
	if p := c.best(r.ID); !math.IsNaN(p) {
		a.tell("price", exactly(p))
	} else {
		a.cannot("cost: no usable offer")
	}
	if !ok || !okBase {
		return a
	}
	a.tell("mass_index", own.mass(c.held).over(base.mass(c.held)))
	a.tell("area_index", own.rho.over(base.rho))
	if r.ID == c.baseline.ID {
		a.tell("mass_index", exactly(1))
		a.tell("area_index", exactly(1))
	}
	price, basePrice := c.best(r.ID), c.best(c.baseline.ID)
	if !math.IsNaN(price) && !math.IsNaN(basePrice) {
		cost := a.spans["mass_index"].scale(price / basePrice)
		a.tell("cost_index", cost)
		a.rank = cost.v
	}
	return a
}

// dense is what the mass of equal function needs.
type dense struct{ rho, density span }

func (c *costing) needs(r *material.Record, a *answer) (dense, bool) {
	var d dense
	d.rho = unknown()
	if r.Adopted != nil {
		d.rho = rhoAt(r.Adopted, c.at)
	}
	p := r.Property("density")
	if a != nil && d.rho.known() {
		a.tell("resistivity", d.rho)
	}
	if math.IsNaN(d.rho.v) && a != nil {
		a.cannot("no nominal resistivity at " + quantity.CelsiusText(c.at))
	}
	if p == nil || !p.Value.HasValue() {
		if a != nil {
			a.cannot("no density")
		}
		return d, false
	}
	d.density = nominal(p.Value.Value)
	return d, !math.IsNaN(d.rho.v)
}

// mass for equal function, up to a factor that is the same for all.
func (d dense) mass(held string) span {
	switch held {
	case heldSection:
		return d.density.over(d.rho)
	case heldSurface:
		return d.density.times(d.rho.through(math.Cbrt))
	case heldStrip:
		return d.density
	}
	return d.density.times(d.rho)
}

// best is the lowest usable price per kilogram.
func (c *costing) best(id string) float64 {
	best := math.NaN()
	for _, q := range c.offers[id] {
		if !math.IsNaN(q.perKg) && !(q.perKg >= best) {
			best = q.perKg
		}
	}
	return best
}

// flips tells for each material the price at which it would cost as much as
// the cheapest of the others: price₂* = price₁·index₁/index₂.
func (c *costing) flips(answers []*answer) {
	for _, a := range answers {
		mass, ok := a.spans["mass_index"]
		if !ok {
			continue
		}
		cheapest := math.Inf(1)
		for _, b := range answers {
			if cost, ok := b.spans["cost_index"]; ok && b != a {
				cheapest = math.Min(cheapest, cost.v)
			}
		}
		if base := c.best(c.baseline.ID); !math.IsInf(cheapest, 1) && !math.IsNaN(base) {
			a.tell("flip_price", nominal(cheapest*base/mass.v))
		}
	}
}

// quote brings every offer to the currency per kilogram.
func (c *costing) quote(records []*material.Record) {
	c.offers = map[string][]quoted{}
	wanted := map[string]*material.Record{c.baseline.ID: c.baseline}
	for _, r := range records {
		wanted[r.ID] = r
	}
	for _, o := range c.lib.Offers {
		if r := c.lib.Material(o.Material); r != nil && wanted[r.ID] != nil {
			c.offers[r.ID] = append(c.offers[r.ID], c.perKg(o, r))
		}
	}
	for _, list := range c.offers {
		sort.SliceStable(list, func(i, j int) bool {
			if math.IsNaN(list[i].perKg) != math.IsNaN(list[j].perKg) {
				return !math.IsNaN(list[i].perKg)
			}
			return list[i].perKg < list[j].perKg
		})
	}
}

func (c *costing) perKg(o library.Offer, r *material.Record) quoted {
	q := quoted{Offer: o, perKg: math.NaN()}
	price, problem := quantity.Parse(quantity.Price, o.Price+" "+o.Currency+"/"+o.Per)
	rate, ok := c.rate(o.Currency)
	switch {
	case o.Date == "":
		q.why = "undated"
	case c.on != "" && o.Date > c.on:
		q.why = "of a later day"
	case c.on != "" && o.ValidUntil != "" && o.ValidUntil < c.on:
		q.why = "expired on " + o.ValidUntil
	case problem != nil || !(price.Value > 0):
		q.why = "price not read: " + o.Price + " " + o.Currency + "/" + o.Per
	case !ok:
		q.why = "no rate from " + o.Currency + " to " + c.currency
	case o.Per == "kg":
		q.perKg = price.Value * rate
	case o.Per == "m":
		if area, ok := areaOf(o.Size); ok && r.Property("density") != nil && r.Property("density").Value.HasValue() {
			q.perKg = price.Value * rate / (area * r.Property("density").Value.Value)
		} else {
			q.why = "no mass of a metre: size or density missing"
		}
	default:
		q.why = "priced by the " + o.Per + " without its mass"
	}
	return q
}

// rate is what one unit of a currency is worth in that of the comparison.
func (c *costing) rate(from string) (float64, bool) {
	if from == c.currency {
		return 1, true
	}
	for _, r := range c.lib.Settings.Rates {
		switch {
		case c.on != "" && r.Date > c.on:
		case r.From == from && r.To == c.currency:
			return r.Rate, true
		case r.To == from && r.From == c.currency && r.Rate > 0:
			return 1 / r.Rate, true
		}
	}
	return 0, false
}

// areaOf reads the section of a size as offers write it: “0.50 mm”, “AWG 24”,
// “5 mm x 40 mm”.
func areaOf(size string) (float64, bool) {
	if n, ok := quantity.ParseAWG(strings.TrimSpace(size)); ok {
		d := quantity.AWG(n)
		return math.Pi / 4 * d * d, true
	}
	size = strings.NewReplacer("×", "x", "X", "x").Replace(size)
	first, second, flat := strings.Cut(size, "x")
	a, p := quantity.Parse(quantity.Length, strings.TrimSpace(first))
	if p != nil || !(a.Value > 0) {
		return 0, false
	}
	if !flat {
		return math.Pi / 4 * a.Value * a.Value, true
	}
	b, p := quantity.Parse(quantity.Length, strings.TrimSpace(second))
	return a.Value * b.Value, p == nil && b.Value > 0
}

func (c *costing) show(answers []*answer) {
	c.out.Tables = append(c.out.Tables, c.numbersTables("Mass and cost for equal resistance, "+c.held+" held, against "+c.baseline.ShortName(), answers,
		"resistivity", "area_index", "mass_index", "price", "cost_index", "flip_price")...)
	offers := Table{Caption: "Offers, in " + c.currency + " per kilogram", Heads: []string{"Material", "supplier", "form and size", "as offered", "per kg", "date", "valid until", "ranked"}}
	for _, a := range answers {
		for _, q := range c.offers[a.Material] {
			ranked, perKg := "yes", quantity.Fixed(q.perKg, 2)
			if math.IsNaN(q.perKg) {
				ranked, perKg = "no: "+q.why, ""
			}
			offers.Rows = append(offers.Rows, []string{a.Record.ShortName(), q.Supplier, strings.TrimSpace(q.Form + " " + q.Size), q.Price + " " + q.Currency + "/" + q.Per, perKg, or(q.Date, "undated"), or(q.ValidUntil, "not stated"), ranked})
			offers.Links = append(offers.Links, a.Material)
		}
	}
	if len(offers.Rows) > 0 {
		c.out.Tables = append(c.out.Tables, offers)
	} else {
		c.note("There are no offers; masses are compared and costs are not.")
	}
	for _, r := range c.lib.Settings.Rates {
		if r.To == c.currency || r.From == c.currency {
			c.note("Rate: 1 " + r.From + " = " + quantity.Number(r.Rate, 5) + " " + r.To + " of " + r.Date + ", " + r.Source + ".")
		}
	}
	c.note("Cost of the metal alone: no minimum charge, spool, cutting or scrap. Change with temperature, EMF and strength may rule the cheaper metal out; compare them too.")
}

func or(s, otherwise string) string {
	if s == "" {
		return otherwise
	}
	return s
}

var tradeFindings = []place.Kind{
	{
		Code: "currency-unknown", Severity: place.Error, Title: "A currency that prices are not read in",
		Explanation: "Currencies are written by their three letters (ISO 4217).",
		Trigger:     triggerFence("study: cost", "materials: [copper]\nbaseline: copper\nheld: length\ncurrency: crowns"),
		Mend:        "write three letters: EUR",
	},
}
