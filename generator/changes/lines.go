package changes

import (
	"fmt"
	"strings"

	"ohmfolio/generator/quantity"
)

// A Line is one stated value that differs, as people read it: the limits and
// the ± of a value stand on its line.
type Line struct {
	Path, Old, New string // Old and New as they were written, "not stated" where they were not
	Relative       string // "+2.33 %", "" when there is none
	Aside          bool   // record keeping

	whole bool // tells of a whole data set or entry
}

// Lines are the fields of a change, one line a stated value.
func (c *Change) Lines() []Line {
	var list []Line
	for i := range c.Fields {
		f := &c.Fields[i]
		if n := len(list); n > 0 && (list[n-1].Path == f.base || list[n-1].whole && strings.HasPrefix(f.base, list[n-1].Path+".")) {
			continue // a limit or ± of the line before, or a part of the data set that it tells
		}
		if l, ok := c.wholePart(f.base); ok {
			list = append(list, l)
			continue
		}
		l := Line{Path: f.base, Old: or(f.OldText, "not stated"), New: or(f.NewText, "not stated"), Aside: f.Aside}
		if f.Relative != nil && f.Path == f.base {
			l.Relative = signed(*f.Relative)
		}
		list = append(list, l)
	}
	return list
}

// wholePart is one line for a data set, or an entry of a list, that only one
// side has.
func (c *Change) wholePart(path string) (Line, bool) {
	part, isSet := partOf(path)
	if part == "" || c.old == nil || c.new == nil {
		return Line{}, false
	}
	before, after := entries(c.old.Stated, c.inOld(part)), entries(c.new.Stated, part)
	if (len(before) == 0) == (len(after) == 0) {
		return Line{}, false
	}
	l := Line{Path: part, Old: "not stated", New: "not stated", whole: true}
	switch {
	case isSet && len(before) == 0:
		l.New = "added"
	case isSet:
		l.Old, l.New = "stated", "taken out"
	case len(before) == 0:
		l.New = strings.Join(after, "; ")
	default:
		l.Old = strings.Join(before, "; ")
	}
	return l, true
}

// partOf is the path of the data set, or of the innermost entry of a list,
// that a value stands in.
func partOf(path string) (part string, isSet bool) {
	if i := strings.LastIndex(path, "]."); i >= 0 {
		return path[:i+1], false
	}
	rest, ok := strings.CutPrefix(path, "data_sets.")
	if !ok {
		return "", false
	}
	name, _, _ := strings.Cut(rest, ".")
	return "data_sets." + name, true
}

// inOld is where a part stood in the old statement, when its adopted data set
// had another name.
func (c *Change) inOld(part string) string {
	o, n := "data_sets."+c.old.Adopted, "data_sets."+c.new.Adopted
	if o != n && !c.new.hasSet(c.old.Adopted) && (part == n || strings.HasPrefix(part, n+".")) {
		return o + part[len(n):]
	}
	return part
}

// entries are what stands below a path, each with its key; record keeping is
// left out.
func entries(list []Stated, part string) []string {
	var out []string
	for i := range list {
		if key, ok := strings.CutPrefix(list[i].Path, part+"."); ok && !keepingPath(list[i].Path) {
			out = append(out, key+" "+list[i].Text)
		}
	}
	return out
}

func or(s, other string) string {
	if s == "" {
		return other
	}
	return s
}

// signed prints a relative change with its sign.
func signed(x float64) string {
	text := quantity.Fixed(float64(x*100), 2) + quantity.NarrowSpace + "%"
	if x != 0 && (x < 1e-4 && x > -1e-4) {
		text = quantity.PPMText(x) + quantity.NarrowSpace + "ppm"
	}
	if x > 0 {
		return "+" + text
	}
	return text
}

// Words says of a difference of curves how great it is, and where.
func (d *CurveDifference) Words() string {
	what := d.Quantity
	if d.ReferenceC != nil {
		what = "resistance over its value at " + quantity.CelsiusText(*d.ReferenceC+quantity.ZeroCelsius)
	}
	over := quantity.CelsiusText(d.CommonRangeC[0]+quantity.ZeroCelsius) + " to " + quantity.CelsiusText(d.CommonRangeC[1]+quantity.ZeroCelsius)
	if d.PPM == 0 {
		return what + ": the curves agree over " + over
	}
	return what + ": " + ppm(d.PPM) + " at " + quantity.CelsiusText(d.AtC+quantity.ZeroCelsius) + ", the greatest over " + over + ", basis " + d.Basis
}

func ppm(x float64) string {
	digits := 0
	if x < 100 && x > -100 {
		digits = 2
	}
	text := quantity.Fixed(x, digits) + quantity.NarrowSpace + "ppm"
	if x > 0 {
		return "+" + text
	}
	return text
}

// Sentence says of a band how far its edges moved.
func (b *BandDifference) Sentence() string {
	if b.Words != "" {
		return "limits of " + b.Quantity + ": " + b.Words
	}
	return "limits of " + b.Quantity + ": lower edge " + ppm(b.LowerPPM) + " at " + quantity.CelsiusText(b.LowerAtC+quantity.ZeroCelsius) +
		", upper edge " + ppm(b.UpperPPM) + " at " + quantity.CelsiusText(b.UpperAtC+quantity.ZeroCelsius)
}

// Effects are the sentences on meaning, curves and band.
func (c *Change) Effects() []string {
	list := append([]string{}, c.Meaning...)
	for i := range c.Curves {
		if len(c.Fields) > 0 {
			list = append(list, c.Curves[i].Words())
		}
	}
	if c.Band != nil {
		list = append(list, c.Band.Sentence())
	}
	return list
}

// Head says in a few words what happened to the material.
func (c *Change) Head() string {
	head := c.Change
	switch {
	case c.Change == Renamed:
		head = "renamed from " + c.Was
	case c.Change == Changed && c.MeansTheSame():
		head = "record keeping alone; no change of meaning"
	}
	if c.Withdrawn {
		head += ", WITHDRAWN"
		if c.new.ReplacedBy != "" {
			head += ", replaced by " + c.new.ReplacedBy
		}
	}
	return head
}

// Counts says how many materials there are of each kind of change.
func (r *Report) Counts() string {
	n := map[string]int{}
	for i := range r.Materials {
		n[r.Materials[i].Change]++
	}
	var parts []string
	for _, k := range []string{Added, Removed, Renamed, Changed} {
		if n[k] > 0 {
			parts = append(parts, fmt.Sprintf("%d %s", n[k], k))
		}
	}
	return strings.Join(append(parts, fmt.Sprintf("%d unchanged", n[Unchanged])), ", ")
}

// MarginText is a margin as people read it.
func MarginText(m *float64) string {
	if m == nil {
		return "cannot be told"
	}
	return quantity.Fixed(float64(*m*100), 1) + quantity.NarrowSpace + "%"
}

// Shown is a verdict as people read it: one that fails must not be missed.
func Shown(verdict string) string {
	switch verdict {
	case "fails":
		return "FAILS"
	case "":
		return "nothing asked"
	}
	return verdict
}

// Text writes the report for a terminal.
func (r *Report) Text() string {
	var b strings.Builder
	fmt.Fprintf(&b, "%s → %s: %s\n", r.Old, r.New, r.Counts())
	if r.Same {
		b.WriteString("no change of meaning\n")
	}
	r.flipText(&b, "verdicts that differ, by lost margin", r.Verdicts)
	for i := range r.Materials {
		if r.Materials[i].Change != Unchanged {
			b.WriteByte('\n')
			r.Materials[i].write(&b)
		}
	}
	for i := range r.Sources {
		fmt.Fprint(&b, "\nsource ")
		r.Sources[i].write(&b)
	}
	r.flipText(&b, "margins that moved", r.Margins)
	for _, s := range r.Studies {
		fmt.Fprintf(&b, "study %s: %s (%s)\n", s.Change, s.Title, s.Document)
	}
	if len(r.Documents) > 0 {
		b.WriteString("\ndocuments that rest on what changed\n")
	}
	for _, d := range r.Documents {
		fmt.Fprintf(&b, "  %s (%s): %s\n", d.Title, d.Path, strings.Join(d.Materials, ", "))
	}
	return b.String()
}

func (r *Report) flipText(b *strings.Builder, head string, list []Flip) {
	if len(list) > 0 {
		fmt.Fprintf(b, "\n%s\n", head)
	}
	for i := range list {
		f := &list[i]
		note, name := "", f.Material
		if f.Size != "" {
			name += ", " + f.Size
		}
		if f.Parameters {
			note = "; the question itself has changed"
		}
		fmt.Fprintf(b, "  %s, %s: %s → %s, margin %s → %s (%s%s)\n", f.Title, name, Shown(f.Old), Shown(f.New), MarginText(f.MarginOld), MarginText(f.MarginNew), f.Document, note)
	}
}

func (c *Change) write(b *strings.Builder) {
	fmt.Fprintf(b, "%s: %s\n", c.ID, c.Head())
	for _, s := range c.Effects() {
		fmt.Fprintf(b, "  %s\n", s)
	}
	for _, l := range c.Lines() {
		fmt.Fprintf(b, "  %s: %s → %s", l.Path, l.Old, l.New)
		if l.Relative != "" {
			fmt.Fprintf(b, " (%s)", l.Relative)
		}
		b.WriteByte('\n')
	}
}
