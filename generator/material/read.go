package material

import (
	"ohmfolio/generator/form"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// soleName is the name of the data set of a record that has one at its top.
const soleName = "data"

// Beside gives the text of a file beside the record, nil when it is not there
// (told by whoever reads files).
type Beside func(name string) *place.Source

// reader turns the checked YAML of one record into a Record.
type reader struct {
	r      *Record
	list   place.List
	beside Beside
}

// Read reads one record; beside gives the CSV files that it names. The record
// is nil when it cannot be read; findings that are errors leave it unfit for
// use.
func Read(id string, src *place.Source, beside Beside) (*Record, []place.Finding) {
	node, findings := form.Read(src, recordShape)
	if node == nil {
		return nil, findings
	}
	rd := &reader{r: &Record{ID: id, Source: src, Node: node}, list: place.List{Source: src, Findings: findings}, beside: beside}
	broken := place.Count(findings, place.Error) > 0
	rd.identity()
	rd.properties()
	rd.dataSets()
	if broken || place.Count(rd.list.Findings, place.Error) > 0 {
		return rd.r, rd.list.Findings
	}
	rd.lowerAll()
	rd.readLots()
	rd.r.Fingerprint = fingerprint(node, rd.r.Sets)
	return rd.r, rd.list.Findings
}

func (rd *reader) add(code string, n *form.Node, message, mend string) {
	at := n.Position()
	if at.Line == 0 {
		at = rd.r.Node.Position()
	}
	rd.list.Add(code, place.Error, at, message, mend)
}

func (rd *reader) identity() {
	n, r := rd.r.Node, rd.r
	r.Name, r.Family = n.Get("name").Text(), Family(n.Get("family").Text())
	r.AppliesTo, r.NotFor, r.Notes = n.Get("applies_to").Text(), n.Get("not_for").Text(), n.Get("notes").Text()
	r.Invented = n.Get("invented").Yes()
	for _, f := range n.Get("formerly").List() {
		r.Formerly = append(r.Formerly, f.Text())
	}
	r.Designations, r.Composition = pairs(n.Get("designations")), pairs(n.Get("composition"))
	r.Status = Draft
	if n.Has("status") {
		r.Status = Status(n.Get("status").Text())
	}
	r.Revision, _ = n.Get("revision").Int()
	r.ReplacedBy, r.WithdrawnReason, r.Lots = n.Get("replaced_by").Text(), n.Get("withdrawn_reason").Text(), n.Get("lots").Text()
	r.SignOff = readSignOff(n.Get("sign_off"))
	for _, e := range n.Get("equivalents").List() {
		r.Equivalents = append(r.Equivalents, readEquivalent(e))
	}
	for _, d := range n.Get("declarations").List() {
		r.Declarations = append(r.Declarations, readDeclaration(d))
	}
}

func pairs(n *form.Node) []Pair {
	var list []Pair
	for i, k := range n.Keys() {
		list = append(list, Pair{k, n.List()[i].Text()})
	}
	return list
}

// ReadCitation reads a citation in either of its forms.
func ReadCitation(n *form.Node) Citation {
	c := Citation{Node: n}
	if !n.IsMapping() {
		c.ID = n.Text()
		return c
	}
	c.ID, c.Where = n.Get("id").Text(), n.Get("where").Text()
	c.Checked, c.Date, c.By = ReadChecked(n.Get("checked"))
	return c
}

// ReadChecked reads a checked state in either of its forms.
func ReadChecked(n *form.Node) (state Checked, date, by string) {
	if n.IsMapping() {
		return Checked(n.Get("against").Text()), n.Get("date").Text(), n.Get("by").Text()
	}
	return Checked(n.Text()), "", ""
}

func (rd *reader) properties() {
	n := rd.r.Node.Get("properties")
	for i, name := range n.Keys() {
		rd.r.Properties = append(rd.r.Properties, readProperty(name, n.List()[i]))
	}
	for _, l := range rd.r.Node.Get("tcr_limits").List() {
		rd.limit(l)
	}
	for _, s := range rd.r.Node.Get("stock").List() {
		rd.stock(s)
	}
}

func readProperty(name string, n *form.Node) Property {
	p := Property{Name: name, Node: n, Class: Class(n.Get("class").Text()), Condition: n.Get("condition").Text(),
		Note: n.Get("note").Text(), Source: ReadCitation(n.Get("source"))}
	p.Value, _ = n.Get("value").Quantity()
	p.At, p.Accuracy, p.Continuous = pointer(n.Get("at")), pointer(n.Get("accuracy")), pointer(n.Get("continuous"))
	if lo, hi, ok := n.Get("window").Range(); ok {
		p.Window = &Window{lo.Value, hi.Value, n.Get("window").Text()}
	}
	return p
}

func pointer(n *form.Node) *quantity.Quantity {
	q, ok := n.Quantity()
	if !ok {
		return nil
	}
	return &q
}

func (rd *reader) limit(n *form.Node) {
	l := TCRLimit{Node: n, Measure: n.Get("measure").Text(), ClassName: n.Get("class_name").Text(), Source: ReadCitation(n.Get("source")), Reference: notStated}
	if q, ok := n.Get("reference_temperature").Quantity(); ok {
		l.Reference = q.Value
	}
	lo, hi, _ := n.Get("window").Range()
	l.Window = Window{lo.Value, hi.Value, n.Get("window").Text()}
	l.From, _ = n.Get("from").Quantity()
	l.To, _ = n.Get("to").Quantity()
	rd.rising(n.Get("window"), l.Window)
	rd.r.TCRLimits = append(rd.r.TCRLimits, l)
}

func (rd *reader) stock(n *form.Node) {
	s := Stock{Node: n, Form: n.Get("form").Text(), Gauge: n.Get("gauge").Text(), Note: n.Get("note").Text(),
		Thickness: pointer(n.Get("thickness")), Width: pointer(n.Get("width")), Diameter: pointer(n.Get("diameter")), Resistance: pointer(n.Get("resistance"))}
	if n.Has("source") {
		c := ReadCitation(n.Get("source"))
		s.Source = &c
	}
	if s.Gauge != "" {
		rd.gauge(n.Get("gauge"), &s)
	}
	rd.r.Stock = append(rd.r.Stock, s)
}

// gauge turns an American wire gauge into its exact diameter.
func (rd *reader) gauge(n *form.Node, s *Stock) {
	g, ok := quantity.ParseAWG(s.Gauge)
	if !ok {
		rd.add("gauge-unknown", n, quote(s.Gauge)+" is no American wire gauge", "write AWG 24, between AWG 4/0 and AWG 56")
		return
	}
	mm, _ := quantity.FindUnit(quantity.Length, "mm")
	s.Diameter = &quantity.Quantity{Text: s.Gauge, Kind: quantity.Length, Unit: mm, Value: quantity.AWG(g), Digits: 4}
}

func (rd *reader) rising(n *form.Node, w Window) {
	if n != nil && w.Lo >= w.Hi && (w.Lo != 0 || w.Hi != 0) {
		rd.add("range-inverted", n, quote(n.Text())+" does not rise", "write the lower temperature first")
	}
}

func quote(s string) string { return "“" + s + "”" }
