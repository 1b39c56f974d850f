// Package figure draws plain figures: curves, bands, points and labels given
// as floats and strings. It knows nothing of materials. Layout is ours;
// drawing goes through go-chart and a renderer of our own, so that another
// renderer can bring the same figure to another kind of paper.
//
// The SVG has no inline styles. Its classes, styled in themes/figure.css:
// figure, grid, axis, tick, tick-x, tick-y, title-x, title-y; curve with
// ink-1…ink-4, dash-1…dash-4 and thin; area with ink-1…ink-4; point; label
// with ink-1…ink-4; mark. Ink and dash together keep curves apart in grey.
package figure

import (
	"bytes"
	"errors"
	"fmt"
	"math"
)

// Line is one curve.
type Line struct {
	Label string // drawn at its right end; "" for none
	X, Y  []float64
	Ink   int // 1…4
	Dash  int // 1…4; 1 is solid
	Thin  bool
}

// Area is a band between two curves.
type Area struct {
	Label           string
	X, Lower, Upper []float64
	Ink             int
}

// Points are measured points with error bars of the given half lengths.
type Points struct {
	Label string
	List  []Point
	Ink   int
}

// Point is one measured point.
type Point struct{ X, Y, ErrX, ErrY float64 }

// Mark is a vertical line at X.
type Mark struct {
	X     float64
	Label string
}

// Figure is one drawing. Width and Height are px of its own grid; 640 × 360
// when they are zero.
type Figure struct {
	ID                 string // prefix of the ids inside, unique in a page
	Title, Description string // for screen readers
	XTitle, YTitle     string // quantity and unit
	Lines              []Line
	Areas              []Area
	Points             []Points
	Marks              []Mark
	Width, Height      int
}

// errEmpty is returned for a figure without a curve.
var errEmpty = errors.New("figure: nothing to draw")

// SVG writes the figure as an svg element. It refuses data that are empty,
// not finite, or of different lengths.
func (f *Figure) SVG(b *bytes.Buffer) error {
	if err := f.check(); err != nil {
		return err
	}
	l := f.layout()
	return f.render(b, l)
}

func (f *Figure) check() error {
	if len(f.Lines)+len(f.Areas)+len(f.Points) == 0 {
		return errEmpty
	}
	for _, l := range f.Lines {
		if err := checkPair(l.Label, l.X, l.Y); err != nil {
			return err
		}
	}
	for _, a := range f.Areas {
		if err := checkPair(a.Label, a.X, a.Lower); err != nil {
			return err
		}
		if err := checkPair(a.Label, a.X, a.Upper); err != nil {
			return err
		}
	}
	for _, p := range f.Points {
		for _, q := range p.List {
			if bad(q.X) || bad(q.Y) || bad(q.ErrX) || bad(q.ErrY) {
				return fmt.Errorf("figure: a point of %q is not finite", p.Label)
			}
		}
	}
	return nil
}

func checkPair(label string, x, y []float64) error {
	if len(x) != len(y) || len(x) == 0 {
		return fmt.Errorf("figure: %q has %d x and %d y", label, len(x), len(y))
	}
	for i := range x {
		if bad(x[i]) || bad(y[i]) {
			return fmt.Errorf("figure: %q is not finite at point %d", label, i)
		}
	}
	return nil
}

func bad(x float64) bool { return math.IsNaN(x) || math.IsInf(x, 0) }
