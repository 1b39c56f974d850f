package material

import (
	"ohmfolio/generator/form"
	"ohmfolio/generator/quantity"
)

// An Equivalent says what a designation of another system, or another record
// of this reference, is worth as a replacement, and for which use.
type Equivalent struct {
	Designation string
	System      string // "EN", "UNS", "works standard"
	Record      string // ID of a record here, "" when there is none
	Verdict     EquivalentVerdict
	Use         string // what the verdict holds for
	Reason      string
	Date        string // ISO date
	Source      *Citation
	SignOff     *SignOff
	Node        *form.Node
}

// EquivalentVerdict says whether one may stand for the other.
type EquivalentVerdict string

// The verdicts on equivalents.
const (
	Same          EquivalentVerdict = "same"
	Near          EquivalentVerdict = "near"
	NotAcceptable EquivalentVerdict = "not acceptable"
)

// A Declaration states how much of a restricted substance the material holds.
type Declaration struct {
	Substance string
	Number    string // registry number of the substance
	Limit     *quantity.Quantity
	Greatest  *quantity.Quantity // greatest content
	Basis     string             // per homogeneous material, or per article
	Exemption string
	Expires   string // ISO date on which exemption or statement ends
	Document  string
	Date      string // ISO date of the document
	Note      string
	Node      *form.Node
}

var equivalentShape = &form.Shape{Name: "equivalents", Doc: "What another designation is worth as a replacement, and for which use.", Fields: []form.Field{
	{Key: "designation", Required: true, Is: form.Text, Doc: "The other designation. Numbers need quotes.", Example: "CW352H"},
	{Key: "system", Is: form.Text, Doc: "System that the designation belongs to.", Example: "EN"},
	{Key: "record", Is: form.Text, Doc: "ID of the record here that describes it; the differences are computed then.", Example: "cuni10"},
	{Key: "verdict", Required: true, Is: form.OneOf(string(Same), string(Near), string(NotAcceptable)), Doc: "Whether it may stand for this material.", Example: "near"},
	{Key: "use", Required: true, Is: form.Text, Doc: "The use that the verdict holds for.", Example: "bus bars up to 90 °C"},
	{Key: "reason", Is: form.Text, Doc: "Why, in one sentence.", Example: "same composition, wider tolerance of the resistivity"},
	{Key: "source", Is: citationType, Doc: "Source of the comparison.", Example: "alloy-standard"},
	{Key: "date", Is: form.Date, Doc: "Day of the verdict.", Example: "2026-05-04"},
	{Key: "sign_off", Is: form.Mapping(signOffShape), Doc: "Who answers for the verdict."},
}}

var declarationShape = &form.Shape{Name: "declarations", Doc: "A statement on a restricted substance.", Fields: []form.Field{
	{Key: "substance", Required: true, Is: form.Text, Doc: "The substance.", Example: "lead"},
	{Key: "number", Is: form.Text, Doc: "Registry number of the substance, in quotes.", Example: "7439-92-1"},
	{Key: "limit", Is: form.Quantity(quantity.Ratio), Doc: "Limit by mass.", Example: "0.1 %"},
	{Key: "greatest", Is: form.Quantity(quantity.Ratio), Doc: "Greatest content by mass that is declared.", Example: "0.02 %"},
	{Key: "basis", Required: true, Is: form.OneOf("per homogeneous material", "per article"), Doc: "What the content is counted on.", Example: "per homogeneous material"},
	{Key: "exemption", Is: form.Text, Doc: "Exemption that is made use of.", Example: "6(c)"},
	{Key: "expires", Is: form.Date, Doc: "Last day of the exemption or of the statement.", Example: "2027-07-21"},
	{Key: "document", Required: true, Is: form.Text, Doc: "The document that states it.", Example: "supplier's declaration 2026-114"},
	{Key: "date", Required: true, Is: form.Date, Doc: "Date of the document.", Example: "2026-03-02"},
	{Key: "note", Is: form.Text, Doc: "A remark that is printed.", Example: "alloyed on purpose"},
}}

func readSignOff(s *form.Node) *SignOff {
	if s == nil {
		return nil
	}
	return &SignOff{Author: s.Get("author").Text(), Reviewer: s.Get("reviewer").Text(), Date: s.Get("date").Text(),
		Reason: s.Get("reason").Text(), Due: s.Get("due").Text(), Node: s}
}

func readEquivalent(n *form.Node) Equivalent {
	e := Equivalent{Designation: n.Get("designation").Text(), System: n.Get("system").Text(), Record: n.Get("record").Text(),
		Verdict: EquivalentVerdict(n.Get("verdict").Text()), Use: n.Get("use").Text(), Reason: n.Get("reason").Text(),
		Date: n.Get("date").Text(), SignOff: readSignOff(n.Get("sign_off")), Node: n}
	if n.Has("source") {
		c := ReadCitation(n.Get("source"))
		e.Source = &c
	}
	return e
}

func readDeclaration(n *form.Node) Declaration {
	return Declaration{Substance: n.Get("substance").Text(), Number: n.Get("number").Text(), Limit: pointer(n.Get("limit")), Greatest: pointer(n.Get("greatest")),
		Basis: n.Get("basis").Text(), Exemption: n.Get("exemption").Text(), Expires: n.Get("expires").Text(), Document: n.Get("document").Text(),
		Date: n.Get("date").Text(), Note: n.Get("note").Text(), Node: n}
}

// AboveLimit tells whether the greatest content may lie above the limit.
func (d Declaration) AboveLimit() bool {
	if d.Limit == nil || d.Greatest == nil {
		return false
	}
	return upperOf(*d.Greatest) > upperOf(*d.Limit)
}

func upperOf(q quantity.Quantity) float64 {
	if q.Limits != nil {
		return q.Limits.Upper
	}
	return q.Value
}
