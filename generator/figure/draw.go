package figure

import (
	"bytes"
	"io"
	"slices"

	"github.com/golang/freetype/truetype"
	"github.com/wcharczuk/go-chart/v2"
)

// noFont keeps go-chart from loading its own: our renderer needs none.
var noFont = new(truetype.Font)

// render draws the figure through go-chart onto the SVG renderer.
func (f *Figure) render(b *bytes.Buffer, l layout) error {
	return f.through(l, &svgRenderer{b: b, f: f, width: l.width, height: l.height, scale: l.scale()}, b)
}

// through lets go-chart frame the drawing and a renderer write it.
func (f *Figure) through(l layout, r chart.Renderer, w io.Writer) error {
	hidden := chart.Style{Hidden: true}
	c := chart.Chart{
		Width: l.width, Height: l.height, Font: noFont,
		Background: hidden, Canvas: hidden,
		XAxis:          chart.XAxis{Style: hidden, Range: newRange(l.x)},
		YAxis:          chart.YAxis{Style: hidden, Range: newRange(l.y)},
		YAxisSecondary: chart.YAxis{Style: hidden, Range: newRange(l.y)},
		Series:         []chart.Series{layer{l: l, draw: f.draw}},
	}
	return c.Render(func(int, int) (chart.Renderer, error) { return r, nil }, w)
}

// draw draws from back to front.
func (f *Figure) draw(r chart.Renderer, l layout) {
	grid(r, l)
	for _, a := range f.Areas {
		area(r, l, a)
	}
	for _, m := range f.Marks {
		mark(r, l, m)
	}
	for i := len(f.Lines) - 1; i >= 0; i-- { // the first curve on top
		line(r, l, f.Lines[i])
	}
	for _, p := range f.Points {
		points(r, l, p)
	}
	f.words(r, l)
}

func grid(r chart.Renderer, l layout) {
	r.SetClassName("grid")
	for _, t := range l.y.ticks {
		y := l.y.at(t)
		r.MoveTo(l.x.from, y)
		r.LineTo(l.x.to, y)
	}
	r.Stroke()
	r.SetClassName("axis")
	r.MoveTo(l.x.from, l.y.to)
	r.LineTo(l.x.from, l.y.from)
	r.LineTo(l.x.to, l.y.from)
	for _, t := range l.x.ticks {
		r.MoveTo(l.x.at(t), l.y.from)
		r.LineTo(l.x.at(t), l.y.from+5*unit)
	}
	r.Stroke()
}

func area(r chart.Renderer, l layout, a Area) {
	r.SetClassName("area " + ink(a.Ink))
	trace(r, placed(l, a.X, a.Upper), true)
	lower := placed(l, a.X, a.Lower)
	slices.Reverse(lower)
	trace(r, lower, false)
	r.Close()
	r.Fill()
}

func line(r chart.Renderer, l layout, c Line) {
	class := "curve " + ink(c.Ink) + " " + dash(c.Dash)
	if c.Thin {
		class += " thin"
	}
	r.SetClassName(class)
	trace(r, placed(l, c.X, c.Y), true)
	r.Stroke()
}

// spot is a place in units.
type spot struct{ x, y int }

func placed(l layout, x, y []float64) []spot {
	list := make([]spot, len(x))
	for i := range x {
		list[i] = spot{l.x.at(x[i]), l.y.at(y[i])}
	}
	return list
}

// reach is how many points one straight stroke may stand for at most.
const reach = 16

// trace draws through the spots, leaving out those that lie on the stroke from
// one kept spot to the next: nobody sees a tenth of a px, and a smooth curve
// is then a third as long to write. The first and the last are always kept.
func trace(r chart.Renderer, list []spot, begin bool) {
	if begin {
		r.MoveTo(list[0].x, list[0].y)
	} else {
		r.LineTo(list[0].x, list[0].y)
	}
	for i := 0; i < len(list)-1; {
		next := i + 1
		for next+1 < len(list) && next+1-i <= reach && straight(list[i:next+2]) {
			next++
		}
		r.LineTo(list[next].x, list[next].y)
		i = next
	}
}

// straight tells whether all spots lie within one unit of the stroke from the
// first to the last.
func straight(list []spot) bool {
	a, b := list[0], list[len(list)-1]
	dx, dy := b.x-a.x, b.y-a.y
	length := dx*dx + dy*dy
	for _, p := range list[1 : len(list)-1] {
		off := dx*(p.y-a.y) - dy*(p.x-a.x)
		if off*off > length {
			return false
		}
	}
	return true
}

func mark(r chart.Renderer, l layout, m Mark) {
	if m.X < l.x.lo || m.X > l.x.hi {
		return
	}
	r.SetClassName("mark")
	r.MoveTo(l.x.at(m.X), l.y.to)
	r.LineTo(l.x.at(m.X), l.y.from)
	r.Stroke()
}

func points(r chart.Renderer, l layout, p Points) {
	r.SetClassName("point " + ink(p.Ink))
	for _, q := range p.List {
		x, y := l.x.at(q.X), l.y.at(q.Y)
		r.MoveTo(x-3*unit, y)
		r.LineTo(x+3*unit, y)
		r.MoveTo(x, l.y.at(q.Y-q.ErrY)+2*unit)
		r.LineTo(x, l.y.at(q.Y+q.ErrY)-2*unit)
		if q.ErrX > 0 {
			r.MoveTo(l.x.at(q.X-q.ErrX), y)
			r.LineTo(l.x.at(q.X+q.ErrX), y)
		}
	}
	r.Stroke()
}

// words writes ticks, titles and labels.
func (f *Figure) words(r chart.Renderer, l layout) {
	r.SetClassName("tick-y")
	for _, t := range l.y.ticks {
		r.Text(l.y.text(t), l.x.from-7*unit, l.y.at(t)+4*unit)
	}
	r.SetClassName("tick-x")
	for _, t := range l.x.ticks {
		r.Text(l.x.text(t), l.x.at(t), l.y.from+18*unit)
	}
	r.SetClassName("title-y")
	r.Text(f.YTitle, 4*unit, 14*unit)
	r.SetClassName("title-x")
	r.Text(f.XTitle, l.x.to, l.height-6*unit)
	for _, b := range l.labels {
		r.SetClassName("label " + ink(b.ink))
		r.Text(b.text, b.x, b.y+4*unit)
	}
}

func ink(n int) string { return [...]string{"ink-1", "ink-2", "ink-3", "ink-4"}[clamp(n)] }

func dash(n int) string { return [...]string{"dash-1", "dash-2", "dash-3", "dash-4"}[clamp(n)] }

func clamp(n int) int { return max(0, min(3, n-1)) }

// layer is the whole drawing as one series of go-chart's.
type layer struct {
	l    layout
	draw func(r chart.Renderer, l layout)
}

func (layer) GetName() string                                                         { return "" }
func (layer) GetYAxis() chart.YAxisType                                               { return chart.YAxisPrimary }
func (layer) GetStyle() chart.Style                                                   { return chart.Style{} }
func (layer) Validate() error                                                         { return nil }
func (a layer) Render(r chart.Renderer, _ chart.Box, _, _ chart.Range, _ chart.Style) { a.draw(r, a.l) }

// fixedRange is a range that go-chart cannot move: its own would be shrunk to
// explicit ticks and curves would leave the canvas.
type fixedRange struct {
	chart.ContinuousRange
}

func newRange(a axis) *fixedRange {
	return &fixedRange{chart.ContinuousRange{Min: a.lo, Max: a.hi, Domain: 1}}
}

func (*fixedRange) SetMin(float64) {}
func (*fixedRange) SetMax(float64) {}
