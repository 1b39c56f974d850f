package changes

import (
	"fmt"
	"sort"
	"strings"

	"ohmfolio/generator/export"
	"ohmfolio/generator/quantity"
)

// keeping compares who answers for the record and in which state it is.
func (c *Change) keeping() {
	c.text("status", c.old.Status, c.new.Status, true)
	if o, n := c.old.Revision, c.new.Revision; o != n {
		c.Fields = append(c.Fields, Field{Path: "revision", Old: o, New: n, OldText: fmt.Sprint(o), NewText: fmt.Sprint(n), Aside: true, base: "revision"})
	}
	c.text("formerly", strings.Join(c.old.Formerly, ", "), strings.Join(c.new.Formerly, ", "), true)
	c.text("replaced_by", c.old.ReplacedBy, c.new.ReplacedBy, true)
	c.text("withdrawn_reason", c.old.WithdrawnReason, c.new.WithdrawnReason, true)
	var o, n SignOff
	if c.old.SignOff != nil {
		o = *c.old.SignOff
	}
	if c.new.SignOff != nil {
		n = *c.new.SignOff
	}
	c.text("sign_off.author", o.Author, n.Author, true)
	c.text("sign_off.reviewer", o.Reviewer, n.Reviewer, true)
	c.text("sign_off.date", o.Date, n.Date, true)
	c.text("sign_off.reason", o.Reason, n.Reason, true)
	c.text("sign_off.due", o.Due, n.Due, true)
}

func (c *Change) text(path, old, now string, aside bool) {
	if old != now {
		c.Fields = append(c.Fields, Field{Path: path, Old: orNull(old), New: orNull(now), OldText: old, NewText: now, Aside: aside, base: path})
	}
}

func orNull(s string) any {
	if s == "" {
		return nil
	}
	return s
}

// stated compares every stated value. Where another data set is adopted than
// before, the two are compared with each other, too: that is what a reader of
// the sheet meets.
func (c *Change) stated() {
	before, after := c.old.Adopted, c.new.Adopted
	old := c.old.Stated
	if before != after {
		c.text("adopt", before, after, false)
		if !c.new.hasSet(before) {
			old = moved(old, "data_sets."+before+".", "data_sets."+after+".")
		} else {
			c.merge(under(old, "data_sets."+before+"."), under(c.new.Stated, "data_sets."+after+"."), "adopted.")
		}
	}
	c.merge(old, c.new.Stated, "")
	c.checked()
}

func (m *Material) hasSet(name string) bool {
	for i := range m.DataSets {
		if m.DataSets[i].Name == name {
			return true
		}
	}
	return false
}

// moved gives the list with the paths below one name put below another.
func moved(list []Stated, from, to string) []Stated {
	out := append([]Stated{}, list...)
	for i := range out {
		if rest, ok := strings.CutPrefix(out[i].Path, from); ok {
			out[i].Path = to + rest
		}
	}
	sort.SliceStable(out, func(i, j int) bool { return out[i].Path < out[j].Path })
	return out
}

func under(list []Stated, prefix string) []Stated {
	var out []Stated
	for _, s := range list {
		if rest, ok := strings.CutPrefix(s.Path, prefix); ok {
			s.Path = rest
			out = append(out, s)
		}
	}
	return out
}

// checked compares the checked states that come from sources.yaml and so
// stand in no stated value of the record.
func (c *Change) checked() {
	for _, n := range c.new.DataSets {
		for _, o := range c.old.DataSets {
			if o.Name == n.Name && o.Source == n.Source && o.Checked != n.Checked && !c.has("data_sets."+n.Name+".source.checked") {
				c.text("data_sets."+n.Name+".source.checked", o.Checked, n.Checked, false)
			}
		}
	}
}

func (c *Change) has(path string) bool {
	for i := range c.Fields {
		if c.Fields[i].Path == path {
			return true
		}
	}
	return false
}

// merge walks two lists that are sorted by path.
func (c *Change) merge(old, now []Stated, prefix string) {
	for i, j := 0, 0; i < len(old) || j < len(now); {
		switch {
		case j == len(now) || i < len(old) && old[i].Path < now[j].Path:
			c.differ(prefix, old[i].Path, &old[i], nil)
			i++
		case i == len(old) || now[j].Path < old[i].Path:
			c.differ(prefix, now[j].Path, nil, &now[j])
			j++
		default:
			c.differ(prefix, now[j].Path, &old[i], &now[j])
			i++
			j++
		}
	}
}

// differ adds the fields by which one stated value differs.
func (c *Change) differ(prefix, path string, old, now *Stated) {
	f := Field{Path: prefix + path, base: prefix + path, Aside: keepingPath(path)}
	if old != nil {
		f.OldText = old.Text
	}
	if now != nil {
		f.NewText = now.Text
	}
	unit, ok := commonUnit(old, now)
	if !ok {
		f.Old, f.New = plainValue(old), plainValue(now)
		if f.Old != f.New {
			f.Relative = relative(numberOf(f.Old), numberOf(f.New))
			c.Fields = append(c.Fields, f)
		}
		return
	}
	before := len(c.Fields)
	isTemperature := unit.Kind == quantity.Temperature
	add := func(suffix string, o, n *float64, convert func(float64) float64, symbol string) {
		if equal(o, n) {
			return
		}
		g := f
		g.Path, g.Unit = f.Path+suffix, symbol
		if g.Old, g.New = shown(o, convert), shown(n, convert); !isTemperature {
			g.Relative = relative(o, n)
		}
		c.Fields = append(c.Fields, g)
	}
	o, n := orEmpty(old), orEmpty(now)
	width := func(x float64) float64 { return unit.FromSI(x) - unit.FromSI(0) }
	same := func(x float64) float64 { return x }
	add("", o.SI, n.SI, unit.FromSI, unit.Symbol)
	add(".lower", o.Lower, n.Lower, unit.FromSI, unit.Symbol)
	add(".upper", o.Upper, n.Upper, unit.FromSI, unit.Symbol)
	add(".minus", o.Minus, n.Minus, width, unit.Symbol)
	add(".plus", o.Plus, n.Plus, width, unit.Symbol)
	add(".k", o.K, n.K, same, "")
	if len(c.Fields) == before && o.Digits != n.Digits { // 3.93e-3 is not 3.930e-3
		g := f
		g.Path, g.Old, g.New = f.Path+".digits", o.Digits, n.Digits
		c.Fields = append(c.Fields, g)
	}
}

// keepingPath tells whether a stated value is one of record keeping: dates and
// names of checks.
func keepingPath(path string) bool {
	switch path[strings.LastIndexByte(path, '.')+1:] {
	case "date", "by", "expires":
		return true
	}
	return strings.Contains(path, ".sign_off.")
}

// commonUnit is the unit of the new value, else of the old one; false for
// texts, plain numbers, and values of different kinds.
func commonUnit(old, now *Stated) (quantity.Unit, bool) {
	if old != nil && now != nil && old.Kind != now.Kind {
		return quantity.Unit{}, false
	}
	for _, s := range []*Stated{now, old} {
		if s != nil && s.Kind != "" {
			return quantity.FindUnit(quantity.Kind(s.Kind), s.Unit)
		}
	}
	return quantity.Unit{}, false
}

func plainValue(s *Stated) any {
	switch {
	case s == nil:
		return nil
	case s.Number != nil:
		return *s.Number
	}
	return s.Text
}

func numberOf(v any) *float64 {
	if x, ok := v.(float64); ok {
		return &x
	}
	return nil
}

func orEmpty(s *Stated) Stated {
	if s == nil {
		return Stated{}
	}
	return *s
}

func equal(a, b *float64) bool {
	if a == nil || b == nil {
		return a == b
	}
	return *a == *b
}

func shown(x *float64, convert func(float64) float64) any {
	if x == nil {
		return nil
	}
	return quantity.Round12(convert(*x))
}

func relative(old, now *float64) *float64 {
	if old == nil || now == nil || *old == 0 {
		return nil
	}
	return finite((*now - *old) / *old)
}

// meaning says in words what of the adopted data means something else now,
// even where the curve agrees.
func (c *Change) meaning() {
	o, n := c.old.set(), c.new.set()
	if o == nil || n == nil {
		return
	}
	word := func(what, old, now string) {
		if old != now {
			c.Meaning = append(c.Meaning, what+": "+old+" → "+now)
		}
	}
	word("adopted data set", o.Name, n.Name)
	word("model", o.Model, n.Model)
	word("basis", o.Basis, n.Basis)
	word("class", o.Class, n.Class)
	word("condition", o.Condition, n.Condition)
	word("reference temperature", celsius(o.ReferenceC), celsius(n.ReferenceC))
	word("valid range", celsius(&o.ValidRangeC[0])+" to "+celsius(&o.ValidRangeC[1]), celsius(&n.ValidRangeC[0])+" to "+celsius(&n.ValidRangeC[1]))
	if !sameLimits(o.Limits, n.Limits) {
		c.Meaning = append(c.Meaning, "limits")
	}
}

func celsius(t *float64) string {
	if t == nil {
		return "none"
	}
	return quantity.CelsiusText(*t + quantity.ZeroCelsius)
}

func sameLimits(a, b *export.LimitsJSON) bool {
	var x, y export.LimitsJSON
	if a != nil {
		x = *a
	}
	if b != nil {
		y = *b
	}
	return samePair(x.Resistivity, y.Resistivity) && samePair(x.Alpha, y.Alpha) && samePair(x.Beta, y.Beta) && samePair(x.Gamma, y.Gamma)
}

func samePair(a, b *[2]*float64) bool {
	if a == nil || b == nil {
		return a == b
	}
	return equal(a[0], b[0]) && equal(a[1], b[1])
}
