package sheet

import "ohmfolio/generator/figure"

// A stroke is one thing on a page: text, a line, a filled box, a path of a
// figure, or a place that a bookmark leads to. Pages are laid out first and
// written afterwards, since each says how many there are.
type stroke struct {
	what       strokeKind
	x, y, w, h float64 // points from the upper left corner; text stands on y
	face       face
	size       float64
	grey       float64 // 0 is black
	text       string
	points     []figure.PathPoint
	scale      float64
	dash       []float64
	closed     bool
}

type strokeKind int

const (
	aText strokeKind = iota
	aLine
	aBox
	aPath
	aBookmark
)

// Sizes in points; the cautions are set like the body.
const (
	margin    = 42.52 // 15 mm
	bodySize  = 8.6
	tableSize = 7.6
	stripSize = 7.4
	titleSize = 15
	headSize  = 10
	lead      = 1.32 // of a line, over its size
	stripRoom = 20   // head and foot of a page
)

// paper is the size of a sheet of paper in points.
type paper struct {
	name          string
	width, height float64
}

var papers = map[string]paper{"A4": {"A4", 595.28, 841.89}, "Letter": {"Letter", 612, 792}}

// doc lays out pages.
type doc struct {
	t     *typeface
	paper paper
	pages [][]stroke
	y     float64
	right float64 // room taken at the right by the code, down to rightTo
	below float64
}

func newDoc(t *typeface, p paper) *doc {
	d := &doc{t: t, paper: p}
	d.newPage()
	return d
}

func (d *doc) newPage() {
	d.pages = append(d.pages, nil)
	d.y = margin + stripRoom
	d.right, d.below = 0, 0
}

func (d *doc) bottom() float64 { return d.paper.height - margin - stripRoom }

// room is how wide a line may be at the present height.
func (d *doc) room() float64 {
	w := d.paper.width - 2*margin
	if d.y < d.below {
		w -= d.right
	}
	return w
}

// need begins a new page when less than h is left.
func (d *doc) need(h float64) {
	if d.y+h > d.bottom() {
		d.newPage()
	}
}

func (d *doc) add(s stroke) {
	i := len(d.pages) - 1
	d.pages[i] = append(d.pages[i], s)
}

func (d *doc) textAt(f face, size, x, y, grey float64, s string) {
	d.add(stroke{what: aText, x: x, y: y, face: f, size: size, grey: grey, text: s})
}

func (d *doc) rule(x, y, w, weight, grey float64) {
	d.add(stroke{what: aLine, x: x, y: y, w: w, h: weight, grey: grey})
}

// paragraph sets a text over the whole width.
func (d *doc) paragraph(f face, size float64, s string) {
	s = d.t.plain(s)
	step := size * lead
	for len(s) > 0 {
		d.need(step)
		lines := d.t.wrap(f, size, s, d.room())
		// The room may change below the code; set one line at a time there.
		n := len(lines)
		if d.y < d.below {
			n = 1
		}
		rest := ""
		for i, line := range lines {
			if i >= n {
				rest += line + " "
				continue
			}
			d.need(step)
			d.y += step
			d.textAt(f, size, margin, d.y-size*0.3, 0, line)
		}
		s = rest
	}
	d.y += size * 0.35
}

// heading sets a head with a bookmark, never last on a page.
func (d *doc) heading(s string) {
	d.need(headSize*lead + 4*bodySize)
	d.y += headSize * 0.5
	d.bookmark(s)
	d.paragraph(bold, headSize, s)
}

func (d *doc) bookmark(s string) {
	d.add(stroke{what: aBookmark, y: d.y, text: d.t.plain(s)})
}
