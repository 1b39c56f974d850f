package figure

import (
	"fmt"
	"math"
	"sort"
	"strconv"
	"strings"
	"unicode/utf8"
)

// unit is how many drawing units one px has: whole units then place curves to
// a tenth of a px.
const unit = 10

// Sizes in px. The text sizes are those of themes/figure.css.
const (
	textHeight  = 15
	tickWidth   = 7.2 // of a digit
	labelWidth  = 8.3 // of an average letter
	marginTop   = 30
	marginRight = 16
	marginFoot  = 42
)

// axis is one axis: its range in data, its ticks, and its ends in units.
type axis struct {
	lo, hi   float64
	from, to int
	ticks    []float64
	decimals int
}

// at places a data value in units.
func (a axis) at(v float64) int {
	t := (v - a.lo) / (a.hi - a.lo)
	return a.from + int(math.Round(float64(t*float64(a.to-a.from))))
}

// scale tells the browser where data lie: lowest and highest value and their
// places in units, of the x axis and then of the y axis.
func (l layout) scale() string {
	return fmt.Sprintf("%.9g %.9g %d %d %.9g %.9g %d %d", l.x.lo, l.x.hi, l.x.from, l.x.to, l.y.lo, l.y.hi, l.y.from, l.y.to)
}

// layout is everything the drawing needs to know of its places.
type layout struct {
	width, height int // units
	x, y          axis
	labels        []label
}

// label is a direct label at the right end of a curve.
type label struct {
	text string
	ink  int
	x, y int // units
	end  int // y of the curve's end
}

func (f *Figure) layout() layout {
	w, h := f.Width, f.Height
	if w == 0 {
		w = 640
	}
	if h == 0 {
		h = 360
	}
	l := layout{width: w * unit, height: h * unit}
	xlo, xhi, ylo, yhi := f.extent()
	l.y = newAxis(ylo, yhi, 5, true)
	left := 12 + int(math.Ceil(float64(l.y.widest())*tickWidth))
	l.x = newAxis(xlo, xhi, 7, false)
	l.x.from, l.x.to = max(44, left)*unit, (w-marginRight-f.labelRoom())*unit
	l.y.from, l.y.to = (h-marginFoot)*unit, marginTop*unit
	l.labels = f.placeLabels(l)
	return l
}

// extent is the smallest box that holds all data.
func (f *Figure) extent() (xlo, xhi, ylo, yhi float64) {
	xlo, ylo = math.Inf(1), math.Inf(1)
	xhi, yhi = math.Inf(-1), math.Inf(-1)
	add := func(x, y float64) {
		xlo, xhi = math.Min(xlo, x), math.Max(xhi, x)
		ylo, yhi = math.Min(ylo, y), math.Max(yhi, y)
	}
	for _, l := range f.Lines {
		for i := range l.X {
			add(l.X[i], l.Y[i])
		}
	}
	for _, a := range f.Areas {
		for i := range a.X {
			add(a.X[i], a.Lower[i])
			add(a.X[i], a.Upper[i])
		}
	}
	for _, p := range f.Points {
		for _, q := range p.List {
			add(q.X-q.ErrX, q.Y-q.ErrY)
			add(q.X+q.ErrX, q.Y+q.ErrY)
		}
	}
	return xlo, xhi, ylo, yhi
}

// newAxis chooses ticks; a value axis ends on ticks, the other where the data
// end, so that a curve is seen to stop.
func newAxis(lo, hi float64, about int, grow bool) axis {
	if hi-lo <= 1e-12*math.Max(math.Abs(lo), math.Abs(hi)) {
		d := math.Max(math.Abs(lo)*0.05, 1e-9)
		lo, hi = lo-d, hi+d
	}
	step := roundStep((hi - lo) / float64(about))
	if grow {
		lo, hi = math.Floor(lo/step+1e-9)*step, math.Ceil(hi/step-1e-9)*step
	}
	return axis{lo: lo, hi: hi, ticks: Ticks(lo, hi, about), decimals: decimalsOf(step)}
}

// Ticks gives round values from lo to hi, about as many as asked for.
func Ticks(lo, hi float64, about int) []float64 {
	if !(hi > lo) || about < 1 {
		return nil
	}
	step := roundStep((hi - lo) / float64(about))
	var list []float64
	for i := math.Ceil(lo/step - 1e-9); float64(i*step) <= hi+float64(step*1e-9) && len(list) < 50; i++ {
		list = append(list, float64(i*step))
	}
	return list
}

// roundStep is the one of 1, 2, 5 times a power of ten that is nearest to the
// wanted step by ratio.
func roundStep(wanted float64) float64 {
	p := math.Pow(10, math.Floor(math.Log10(wanted)))
	switch m := wanted / p; {
	case m < math.Sqrt2:
		return p
	case m < math.Sqrt(10):
		return float64(2 * p)
	case m < math.Sqrt(50):
		return float64(5 * p)
	}
	return float64(10 * p)
}

func decimalsOf(step float64) int {
	return max(0, int(-math.Floor(math.Log10(step)+1e-9)))
}

// text prints a tick with a true minus; very small or large ones as powers.
func (a axis) text(v float64) string {
	if a.decimals > 6 {
		return strings.Replace(strconv.FormatFloat(v, 'g', 4, 64), "-", "−", 1)
	}
	s := strconv.FormatFloat(v, 'f', a.decimals, 64)
	if strings.Trim(s, "-0.") == "" {
		s = strings.TrimPrefix(s, "-")
	}
	return strings.Replace(s, "-", "−", 1)
}

func (a axis) widest() int {
	n := 0
	for _, t := range a.ticks {
		n = max(n, utf8.RuneCountInString(a.text(t)))
	}
	return n
}

// labelRoom is the px that direct labels need at the right, at most a third.
func (f *Figure) labelRoom() int {
	n := 0
	for _, l := range f.Lines {
		n = max(n, utf8.RuneCountInString(l.Label))
	}
	for _, a := range f.Areas {
		n = max(n, utf8.RuneCountInString(a.Label))
	}
	return min(200, int(float64(n)*labelWidth))
}

// placeLabels puts a label at the end of each curve and band, and spreads
// those that end at the same place and would touch, keeping their order.
func (f *Figure) placeLabels(l layout) []label {
	var list []label
	add := func(text string, ink int, x, y float64) {
		if text != "" {
			at := l.y.at(y)
			list = append(list, label{text: text, ink: ink, x: l.x.at(x) + 6*unit, y: at, end: at})
		}
	}
	for _, line := range f.Lines {
		n := len(line.X) - 1
		add(line.Label, line.Ink, line.X[n], line.Y[n])
	}
	for _, a := range f.Areas {
		n := len(a.X) - 1
		add(a.Label, a.Ink, a.X[n], (a.Upper[n]+a.Lower[n])/2)
	}
	sort.SliceStable(list, func(i, j int) bool {
		if list[i].x != list[j].x {
			return list[i].x < list[j].x
		}
		return list[i].y < list[j].y
	})
	for from := 0; from < len(list); {
		to := from + 1
		for to < len(list) && list[to].x == list[from].x {
			to++
		}
		spread(list[from:to], l.y.to, l.y.from)
		from = to
	}
	return list
}

// spread moves labels apart to one text height, first downwards, then back up
// from the foot when they leave the canvas.
func spread(list []label, top, foot int) {
	const gap = textHeight * unit
	for i := range list {
		list[i].y = max(list[i].y, top)
		if i > 0 {
			list[i].y = max(list[i].y, list[i-1].y+gap)
		}
	}
	for i := len(list) - 1; i >= 0; i-- {
		limit := foot
		if i < len(list)-1 {
			limit = list[i+1].y - gap
		}
		list[i].y = min(list[i].y, limit)
	}
}
