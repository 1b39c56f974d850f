package sheet

import (
	"bytes"
	"compress/zlib"
	"fmt"
	"strconv"
	"time"

	"github.com/signintech/gopdf"

	"ohmfolio/generator/figure"
)

// identity is what head and foot of every page, and the file's properties, say.
type identity struct {
	left, state, right, foot string
	title, subject, author   string
	date                     string // ISO; "" when nobody signed
}

// write writes the pages with head and foot.
func (d *doc) write(w *bytes.Buffer, id identity) error {
	pdf := &gopdf.GoPdf{}
	pdf.Start(gopdf.Config{Unit: gopdf.UnitPT, PageSize: gopdf.Rect{W: d.paper.width, H: d.paper.height}})
	pdf.SetCompressLevel(zlib.BestSpeed) // a tenth larger, and twice as quick
	pdf.SetInfo(gopdf.PdfInfo{Title: d.t.plain(id.title), Subject: d.t.plain(id.subject), Author: d.t.plain(id.author), Creator: "ohmfolio", Producer: "ohmfolio", CreationDate: dateOf(id.date)})
	for _, name := range faceNames {
		if err := pdf.AddTTFFontFromFontContainer(name, d.t.container); err != nil {
			return err
		}
	}
	out := &writer{pdf: pdf, t: d.t}
	for i, page := range d.pages {
		pdf.AddPage()
		out.strip(d, id, i+1, len(d.pages))
		for _, s := range page {
			if err := out.stroke(s); err != nil {
				return fmt.Errorf("page %d: %w", i+1, err)
			}
		}
	}
	if out.err != nil {
		return out.err
	}
	_, err := pdf.WriteTo(w)
	return err
}

// dateOf is the day of the sign-off: the file has no other time.
func dateOf(iso string) time.Time {
	t, err := time.Parse("2006-01-02", iso)
	if err != nil {
		return time.Date(2000, 1, 1, 0, 0, 0, 0, time.UTC)
	}
	return t
}

// writer keeps what is set in the file, so that it is not set again.
type writer struct {
	pdf  *gopdf.GoPdf
	t    *typeface
	err  error
	face face
	size float64
	set  bool
	grey float64
}

// strip writes head and foot of one page.
func (w *writer) strip(d *doc, id identity, n, of int) {
	w.set = false // a page begins without a font
	right := d.paper.width - margin
	top, foot := margin+8, d.paper.height-margin
	w.text(bold, stripSize, margin, top, 0, w.t.plain(id.left))
	w.text(regular, stripSize, margin+w.t.width(bold, stripSize, id.left)+6, top, 0, w.t.plain(id.state))
	text := w.t.plain(id.right)
	w.text(regular, stripSize, right-w.t.width(regular, stripSize, text), top, 0, text)
	w.line(margin, top+5, right, top+5, 0.7, 0)
	w.line(margin, foot-11, right, foot-11, 0.5, 0)
	for i, line := range w.t.wrap(regular, stripSize, w.t.plain(id.foot), right-margin-70) {
		w.text(regular, stripSize, margin, foot+float64(i)*stripSize*1.2, 0, line) // the margin has room for more lines
	}
	page := "page " + strconv.Itoa(n) + " of " + strconv.Itoa(of)
	w.text(regular, stripSize, right-w.t.width(regular, stripSize, page), foot, 0, page)
}

func (w *writer) stroke(s stroke) error {
	switch s.what {
	case aText:
		w.text(s.face, s.size, s.x, s.y, s.grey, s.text)
	case aLine:
		w.line(s.x, s.y, s.x+s.w, s.y, s.h, s.grey)
	case aBox:
		w.pdf.SetGrayFill(0)
		w.pdf.RectFromUpperLeftWithStyle(s.x, s.y, s.w, s.h, "F")
	case aPath:
		w.path(s)
	case aBookmark:
		w.pdf.SetXY(margin, s.y)
		w.pdf.AddOutlineWithPosition(s.text)
	}
	return w.err
}

// text sets a text piece by piece: thin spaces are shifts.
func (w *writer) text(f face, size, x, y, grey float64, s string) {
	if w.err != nil || s == "" {
		return
	}
	if !w.set || w.face != f || w.size != size {
		w.err = w.pdf.SetFont(faceNames[f], "", size)
		w.face, w.size, w.set = f, size, true
	}
	g := uint8(grey * 255)
	w.pdf.SetTextColor(g, g, g)
	start := 0
	for i, r := range s + "\u202f" {
		if !thin(r) {
			continue
		}
		if piece := s[start:i]; piece != "" && w.err == nil {
			w.pdf.SetXY(x, y)
			w.err = w.pdf.Text(piece)
			x += w.t.width(f, size, piece)
		}
		x += thinSpace * size
		start = i + len("\u202f")
		if start > len(s) {
			break
		}
	}
}

func (w *writer) line(x1, y1, x2, y2, weight, grey float64) {
	w.pdf.SetLineWidth(weight)
	w.pdf.SetGrayStroke(grey)
	w.pdf.Line(x1, y1, x2, y2)
}

// path writes the pieces of a path: filled when it is an area, otherwise
// stroked with its dash running on.
func (w *writer) path(s stroke) {
	at := func(p figure.PathPoint) (float64, float64) {
		return s.x + float64(p.X)*s.scale, s.y + float64(p.Y)*s.scale
	}
	if s.closed {
		w.pdf.SetGrayFill(s.grey)
		list := make([]gopdf.Point, len(s.points))
		for i, p := range s.points {
			list[i].X, list[i].Y = at(p)
		}
		w.pdf.Polygon(list, "F")
		return
	}
	w.pdf.SetGrayFill(s.grey)
	dash := make([]float64, len(s.dash))
	for i, d := range s.dash {
		dash[i] = d * s.scale
	}
	var line []gopdf.Point
	flush := func() {
		if len(line) > 1 {
			for _, piece := range dashed(simple(line), dash) {
				w.pdf.Polygon(ribbon(piece, s.w*s.scale), "F")
			}
		}
		line = nil
	}
	for _, p := range s.points {
		if p.Move {
			flush()
		}
		x, y := at(p)
		line = append(line, gopdf.Point{X: x, Y: y})
	}
	flush()
}
