package figure

import (
	"io"
	"strings"

	"github.com/golang/freetype/truetype"
	"github.com/wcharczuk/go-chart/v2"
	"github.com/wcharczuk/go-chart/v2/drawing"
)

// A Pen draws a figure on other paper than SVG. Coordinates are whole units of
// a tenth of a px from the upper left corner of Size; the class says what it
// is, as in the SVG: "curve ink-1 dash-2", "area ink-1", "tick-x". Text is
// anchored as its class asks (see Anchor).
type Pen interface {
	Path(class string, points []PathPoint, closed bool)
	Text(class, body string, x, y int)
}

// PathPoint is one corner of a path; Move begins a new piece.
type PathPoint struct {
	X, Y int
	Move bool
}

// Anchor is where text of a class is held: -1 at its beginning, 0 in the
// middle, 1 at its end.
func Anchor(class string) int {
	switch class, _, _ := strings.Cut(class, " "); class {
	case "tick-y", "title-x":
		return 1
	case "tick-x":
		return 0
	}
	return -1
}

// Size is the figure's own size in the units of a Pen.
func (f *Figure) Size() (width, height int) {
	l := f.layout()
	return l.width, l.height
}

// Draw draws the figure with a pen: the same drawing as the SVG. It refuses
// what SVG refuses.
func (f *Figure) Draw(p Pen) error {
	if err := f.check(); err != nil {
		return err
	}
	l := f.layout()
	return f.through(l, &penRenderer{pen: p}, io.Discard)
}

// penRenderer hands what go-chart draws to a Pen.
type penRenderer struct {
	svgRenderer // for what go-chart asks and nobody needs
	pen         Pen
	points      []PathPoint
	closed      bool
}

func (r *penRenderer) Save(io.Writer) error  { return nil }
func (r *penRenderer) SetClassName(c string) { r.class = c }
func (r *penRenderer) MoveTo(x, y int)       { r.points = append(r.points, PathPoint{x, y, true}) }
func (r *penRenderer) LineTo(x, y int)       { r.points = append(r.points, PathPoint{x, y, false}) }
func (r *penRenderer) Close()                { r.closed = true }
func (r *penRenderer) Fill()                 { r.Stroke() }
func (r *penRenderer) FillStroke()           { r.Stroke() }

func (r *penRenderer) Stroke() {
	if r.class != "" && len(r.points) > 0 {
		r.pen.Path(r.class, r.points, r.closed)
	}
	r.points, r.closed = r.points[:0], false
}

func (r *penRenderer) Text(body string, x, y int) { r.pen.Text(r.class, body, x, y) }

// These keep go-chart's own looks away from the embedded renderer.
func (*penRenderer) SetFont(*truetype.Font)       {}
func (*penRenderer) SetStrokeColor(drawing.Color) {}
func (*penRenderer) MeasureText(string) chart.Box { return chart.Box{} }
