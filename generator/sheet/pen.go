package sheet

import (
	"strings"

	"ohmfolio/generator/figure"
)

// figures sets figures beside each other, two at most.
func (d *doc) figures(list ...*figure.Figure) error {
	var kept []*figure.Figure
	for _, f := range list {
		if f != nil {
			kept = append(kept, f)
		}
	}
	if len(kept) == 0 {
		return nil
	}
	width := (d.paper.width - 2*margin - 14) / 2
	if w, _ := kept[0].Size(); len(kept) == 1 && w > 6000 {
		width = (d.paper.width - 2*margin) * 0.68 // drawn to stand alone
	}
	tallest := 0.0
	for _, f := range kept {
		w, h := f.Size()
		tallest = max(tallest, width*float64(h)/float64(w))
	}
	d.need(tallest + 6)
	for i, f := range kept {
		w, _ := f.Size()
		p := &pen{d: d, x: margin + float64(i)*(width+14), y: d.y + 4, scale: width / float64(w)}
		if err := f.Draw(p); err != nil {
			return err
		}
	}
	d.y += tallest + 8
	return nil
}

// pen draws a figure on a page, in black and greys; ink and dash of the SVG
// become dashes alone.
type pen struct {
	d           *doc
	x, y, scale float64
}

// dashes of the four dash classes and of marks, in the figure's units.
var dashes = map[string][]float64{"dash-2": {110, 45}, "dash-3": {30, 40}, "dash-4": {120, 40, 25, 40}}

// Path implements figure.Pen.
func (p *pen) Path(class string, points []figure.PathPoint, closed bool) {
	s := stroke{what: aPath, x: p.x, y: p.y, scale: p.scale, points: append([]figure.PathPoint(nil), points...), closed: closed}
	kind, more, _ := strings.Cut(class, " ")
	switch kind {
	case "grid":
		s.w, s.grey = 6, 0.75
	case "axis":
		s.w, s.grey = 9, 0.3
	case "mark":
		s.w, s.grey, s.dash = 9, 0.3, []float64{30, 30}
	case "area":
		s.grey = 0.87
	case "point":
		s.w = 11
	default:
		s.w = 19
		if strings.Contains(more, "thin") {
			s.w = 12
		}
		for _, word := range strings.Fields(more) {
			if d, ok := dashes[word]; ok {
				s.dash = d
			}
		}
	}
	p.d.add(s)
}

// Text implements figure.Pen.
func (p *pen) Text(class, body string, x, y int) {
	body = p.d.t.plain(body)
	size := 122 * p.scale
	f := regular
	if strings.HasPrefix(class, "label") {
		f = bold
	}
	at := p.x + float64(x)*p.scale
	w := p.d.t.width(f, size, body)
	switch figure.Anchor(class) {
	case 1:
		at -= w
	case 0:
		at -= w / 2
	}
	p.d.textAt(f, size, at, p.y+float64(y)*p.scale, 0, body)
}
