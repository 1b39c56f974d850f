package figure

import (
	"bytes"
	"io"
	"strconv"

	"github.com/golang/freetype/truetype"
	"github.com/wcharczuk/go-chart/v2"
	"github.com/wcharczuk/go-chart/v2/drawing"
)

// svgRenderer is a chart.Renderer that writes SVG with class names: whole
// units of a tenth of a px, relative steps, escaped text. Colours, widths and
// fonts are the style sheet's.
type svgRenderer struct {
	b             *bytes.Buffer
	f             *Figure
	width, height int
	scale         string // of both axes, for the browser's crosshair
	class         string
	path          []byte
	x, y          int // where the path stands
	open          bool
}

// begin opens the svg element with its title and description.
func (r *svgRenderer) begin() {
	if r.open {
		return
	}
	r.open = true
	w := r.b
	w.WriteString(`<svg class="figure" role="img" aria-labelledby="`)
	escape(w, r.f.ID)
	w.WriteString(`-title `)
	escape(w, r.f.ID)
	w.WriteString(`-desc" viewBox="0 0 `)
	w.WriteString(strconv.Itoa(r.width) + " " + strconv.Itoa(r.height))
	w.WriteString(`" data-scale="` + r.scale)
	w.WriteString(`"><title id="`)
	escape(w, r.f.ID)
	w.WriteString(`-title">`)
	escape(w, r.f.Title)
	w.WriteString(`</title><desc id="`)
	escape(w, r.f.ID)
	w.WriteString(`-desc">`)
	escape(w, r.f.Description)
	w.WriteString("</desc>\n")
}

// Save closes the svg element; go-chart calls it last.
func (r *svgRenderer) Save(io.Writer) error {
	r.begin()
	r.b.WriteString("</svg>\n")
	return nil
}

// MoveTo begins a piece of path at absolute units.
func (r *svgRenderer) MoveTo(x, y int) {
	r.path = append(r.path, 'M')
	r.path = strconv.AppendInt(r.path, int64(x), 10)
	r.path = append(r.path, ' ')
	r.path = strconv.AppendInt(r.path, int64(y), 10)
	r.x, r.y = x, y
}

// LineTo goes on by a relative step, which is shorter to write.
func (r *svgRenderer) LineTo(x, y int) {
	dx, dy := x-r.x, y-r.y
	switch {
	case dy == 0:
		r.path = append(r.path, 'h')
		r.path = strconv.AppendInt(r.path, int64(dx), 10)
	case dx == 0:
		r.path = append(r.path, 'v')
		r.path = strconv.AppendInt(r.path, int64(dy), 10)
	default:
		r.path = append(r.path, 'l')
		r.path = strconv.AppendInt(r.path, int64(dx), 10)
		if dy > 0 {
			r.path = append(r.path, ' ')
		}
		r.path = strconv.AppendInt(r.path, int64(dy), 10)
	}
	r.x, r.y = x, y
}

// Close closes the path.
func (r *svgRenderer) Close() { r.path = append(r.path, 'z') }

// Stroke writes the path; the class says how it looks. What has no class is
// go-chart's own background, which is left out.
func (r *svgRenderer) Stroke() {
	if r.class == "" {
		r.path = r.path[:0]
	}
	if len(r.path) == 0 {
		return
	}
	r.begin()
	r.b.WriteString(`<path class="` + r.class + `" d="`)
	r.b.Write(r.path)
	r.b.WriteString("\"/>\n")
	r.path = r.path[:0]
}

// Fill and FillStroke write the path like Stroke.
func (r *svgRenderer) Fill()       { r.Stroke() }
func (r *svgRenderer) FillStroke() { r.Stroke() }

// SetClassName sets the class of what is drawn next.
func (r *svgRenderer) SetClassName(c string) { r.class = c }

// Text writes escaped text at x, y; the class says how it is anchored.
func (r *svgRenderer) Text(body string, x, y int) {
	r.begin()
	w := r.b
	w.WriteString(`<text class="` + r.class + `" x="`)
	w.WriteString(strconv.Itoa(x))
	w.WriteString(`" y="`)
	w.WriteString(strconv.Itoa(y))
	w.WriteString(`">`)
	escape(w, body)
	w.WriteString("</text>\n")
}

// escape writes text so that XML shows it; characters that XML forbids fall
// away.
func escape(w *bytes.Buffer, s string) {
	for _, c := range s {
		switch {
		case c == '&':
			w.WriteString("&amp;")
		case c == '<':
			w.WriteString("&lt;")
		case c == '>':
			w.WriteString("&gt;")
		case c == '"':
			w.WriteString("&#34;")
		case c < ' ' && c != '\t' && c != '\n', c == 0xfffe, c == 0xffff:
		default:
			w.WriteRune(c)
		}
	}
}

// The rest of chart.Renderer: go-chart calls some of it for parts that are
// hidden here; looks are the style sheet's.
func (*svgRenderer) ResetStyle()                        {}
func (*svgRenderer) GetDPI() float64                    { return chart.DefaultDPI }
func (*svgRenderer) SetDPI(float64)                     {}
func (*svgRenderer) SetStrokeColor(drawing.Color)       {}
func (*svgRenderer) SetFillColor(drawing.Color)         {}
func (*svgRenderer) SetStrokeWidth(float64)             {}
func (*svgRenderer) SetStrokeDashArray([]float64)       {}
func (*svgRenderer) QuadCurveTo(_, _, _, _ int)         {}
func (*svgRenderer) ArcTo(_, _ int, _, _, _, _ float64) {}
func (*svgRenderer) Circle(float64, int, int)           {}
func (*svgRenderer) SetFont(*truetype.Font)             {}
func (*svgRenderer) SetFontColor(drawing.Color)         {}
func (*svgRenderer) SetFontSize(float64)                {}
func (*svgRenderer) MeasureText(string) chart.Box       { return chart.Box{} }
func (*svgRenderer) SetTextRotation(float64)            {}
func (*svgRenderer) ClearTextRotation()                 {}
