package sheet

import (
	"math"
	"strings"
)

const (
	cellGap  = 7 // between columns
	rowSpace = 3.2
)

// table sets a table: its caption and head come again on every page that it
// reaches, and no row is split.
func (d *doc) table(caption string, heads []string, rows [][]string, notes []string) {
	if len(rows) == 0 {
		return
	}
	t := &grid{d: d, heads: d.plainAll(heads), caption: d.t.plain(caption)}
	for _, row := range rows {
		t.rows = append(t.rows, d.plainAll(row))
	}
	t.align()
	t.columns()
	t.fold()
	t.begin(t.height(0), false)
	for i := range t.rows {
		if h := t.height(i); d.y+h > d.bottom() {
			d.newPage()
			t.begin(h, true)
		}
		t.row(i)
	}
	d.y += 4
	for _, n := range notes {
		d.paragraph(regular, tableSize, n)
	}
	d.y += 4
}

func (d *doc) plainAll(list []string) []string {
	out := make([]string, len(list))
	for i, s := range list {
		out[i] = d.t.plain(s)
	}
	return out
}

// grid is one table being set.
type grid struct {
	d       *doc
	caption string
	heads   []string
	rows    [][]string
	widths  []float64
	right   []bool // numbers stand at the right
}

func (g *grid) cell(row, column int) string {
	if column < len(g.rows[row]) {
		return g.rows[row][column]
	}
	return ""
}

// columns gives each column its natural width where there is room, and shrinks
// the widest ones, never below their longest word, where there is not.
func (g *grid) columns() {
	n := len(g.heads)
	natural, least := make([]float64, n), make([]float64, n)
	measure := func(c int, f face, s string) {
		natural[c] = math.Max(natural[c], g.d.t.width(f, tableSize, s))
		for _, word := range strings.Fields(s) {
			least[c] = math.Max(least[c], math.Min(g.d.t.width(f, tableSize, word), 110))
		}
	}
	for c, h := range g.heads {
		natural[c] = math.Min(g.d.t.width(bold, tableSize, h), 64) // a short head stays on one line
		for _, word := range strings.Fields(h) {
			w := g.d.t.width(bold, tableSize, word)
			natural[c], least[c] = math.Max(natural[c], w), math.Max(least[c], math.Min(w, 110))
		}
		for r := range g.rows {
			measure(c, regular, g.cell(r, c))
		}
	}
	room := g.d.paper.width - 2*margin - float64(n-1)*cellGap
	g.widths = shrink(natural, least, room)
}

// foldFrom is how many rows make a narrow table stand in two columns.
const foldFrom = 14

// fold sets a long narrow table as two halves beside each other.
func (g *grid) fold() {
	room := g.d.paper.width - 2*margin
	if len(g.rows) < foldFrom || 2*g.whole()+3*cellGap > room {
		return
	}
	half := (len(g.rows) + 1) / 2
	n := len(g.heads)
	rows := make([][]string, half)
	for i := range rows {
		row := make([]string, 0, 2*n+1)
		for c := range n {
			row = append(row, g.cell(i, c))
		}
		row = append(row, "")
		if i+half < len(g.rows) {
			for c := range n {
				row = append(row, g.cell(i+half, c))
			}
		}
		rows[i] = row
	}
	twice := func(middle float64, list []float64) []float64 {
		return append(append(append([]float64{}, list...), middle), list...)
	}
	g.heads = append(append(append([]string{}, g.heads...), ""), g.heads...)
	g.right = append(append(append([]bool{}, g.right...), false), g.right...)
	g.rows, g.widths = rows, twice(cellGap, g.widths)
}

// shrink takes what is too much from the widest columns first.
func shrink(natural, least []float64, room float64) []float64 {
	widths := append([]float64{}, natural...)
	sum := func() (s float64) {
		for _, w := range widths {
			s += w
		}
		return s
	}
	for range 200 {
		over := sum() - room
		if over <= 0.01 {
			return widths
		}
		widest := -1
		for c := range widths {
			if widths[c] > least[c]+0.01 && (widest < 0 || widths[c] > widths[widest]) {
				widest = c
			}
		}
		if widest < 0 {
			break
		}
		widths[widest] = math.Max(least[widest], widths[widest]-math.Max(2, over/8))
	}
	if over := sum() / room; over > 1 {
		for c := range widths {
			widths[c] /= over
		}
	}
	return widths
}

// align puts columns of numbers to the right.
func (g *grid) align() {
	g.right = make([]bool, len(g.heads))
	for c := range g.heads {
		numbers, texts := 0, 0
		for r := range g.rows {
			switch s := g.cell(r, c); {
			case s == "" || s == "—":
			case strings.ContainsAny(s[:1], "0123456789") || strings.HasPrefix(s, "−") || strings.HasPrefix(s, "±"):
				numbers++
			default:
				texts++
			}
		}
		g.right[c] = numbers > texts && (c > 0 || texts == 0)
	}
}

func (g *grid) height(row int) float64 {
	most := 1
	for c := range g.heads {
		most = max(most, len(g.d.t.wrap(g.faceOf(c), tableSize, g.cell(row, c), g.widths[c])))
	}
	return float64(most)*tableSize*lead + rowSpace
}

func (g *grid) faceOf(int) face { return regular }

// begin sets caption and head; a page that a table goes on says so.
func (g *grid) begin(first float64, again bool) {
	d := g.d
	head := 1
	for c, h := range g.heads {
		head = max(head, len(d.t.wrap(bold, tableSize, h, g.widths[c])))
	}
	step := tableSize * lead
	if !again {
		d.need(step*(1.5+float64(head)) + first + rowSpace*2)
	}
	caption := g.caption
	if again && caption != "" {
		caption += ", continued"
	}
	if caption != "" {
		for _, line := range d.t.wrap(regular, tableSize, caption, d.paper.width-2*margin) {
			d.y += step
			d.textAt(regular, tableSize, margin, d.y-tableSize*0.3, 0.25, line)
		}
		d.y += 1.5
	}
	top := d.y
	for c, h := range g.heads {
		lines := d.t.wrap(bold, tableSize, h, g.widths[c])
		for i, line := range lines {
			g.text(bold, c, top+float64(head-len(lines)+i+1)*step, line)
		}
	}
	d.y = top + float64(head)*step + 2
	d.rule(margin, d.y, g.whole(), 0.7, 0)
}

func (g *grid) whole() float64 {
	sum := float64(len(g.widths)-1) * cellGap
	for _, w := range g.widths {
		sum += w
	}
	return sum
}

func (g *grid) x(column int) float64 {
	x := margin
	for c := range column {
		x += g.widths[c] + cellGap
	}
	return x
}

func (g *grid) text(f face, column int, y float64, s string) {
	x := g.x(column)
	if g.right[column] {
		x += g.widths[column] - g.d.t.width(f, tableSize, s)
	}
	g.d.textAt(f, tableSize, x, y-tableSize*0.3, 0, s)
}

func (g *grid) row(row int) {
	top := g.d.y + rowSpace/2
	for c := range g.heads {
		for i, line := range g.d.t.wrap(g.faceOf(c), tableSize, g.cell(row, c), g.widths[c]) {
			g.text(g.faceOf(c), c, top+float64(i+1)*tableSize*lead, line)
		}
	}
	g.d.y += g.height(row)
	g.d.rule(margin, g.d.y, g.whole(), 0.3, 0.6)
}
