package words

import (
	"bytes"
	"html"

	"github.com/yuin/goldmark"
	"github.com/yuin/goldmark/ast"
	"github.com/yuin/goldmark/extension"
	"github.com/yuin/goldmark/renderer"
	ghtml "github.com/yuin/goldmark/renderer/html"
	"github.com/yuin/goldmark/util"
)

// Fill gives what a page cannot know: the results of its studies, the current
// values of its live numbers, where its links lead.
type Fill struct {
	Study  func(i int, w *bytes.Buffer) // writes HTML
	Number func(i int) string           // HTML
	Link   func(i int, target string) string
}

// HTML writes the page without its title, which the frame prints.
func (p *Page) HTML(w *bytes.Buffer, fill Fill) error {
	f := &filler{page: p, fill: fill}
	md := goldmark.New(
		goldmark.WithExtensions(extension.Table, extension.Footnote),
		goldmark.WithRendererOptions(ghtml.WithXHTML(), renderer.WithNodeRenderers(util.Prioritized(f, 100))),
	)
	return md.Renderer().Render(w, p.source, p.doc)
}

// filler renders the nodes that need more than goldmark knows, and raw HTML
// as text.
type filler struct {
	page *Page
	fill Fill
}

// RegisterFuncs implements goldmark's renderer.NodeRenderer.
func (f *filler) RegisterFuncs(r renderer.NodeRendererFuncRegisterer) {
	r.Register(ast.KindRawHTML, f.rawHTML)
	r.Register(ast.KindHTMLBlock, f.htmlBlock)
	r.Register(ast.KindFencedCodeBlock, f.fence)
	r.Register(ast.KindLink, f.link)
	r.Register(ast.KindImage, f.image)
	r.Register(ast.KindHeading, f.heading)
}

func (f *filler) heading(w util.BufWriter, source []byte, n ast.Node, entering bool) (ast.WalkStatus, error) {
	h := n.(*ast.Heading)
	id, ok := h.AttributeString("id")
	if !ok { // the title
		return ast.WalkSkipChildren, nil
	}
	level := min(6, max(2, h.Level))
	if entering {
		w.WriteString("<h" + string(rune('0'+level)) + ` id="` + html.EscapeString(string(id.([]byte))) + `">`)
	} else {
		w.WriteString("</h" + string(rune('0'+level)) + ">\n")
	}
	return ast.WalkContinue, nil
}

func (f *filler) rawHTML(w util.BufWriter, source []byte, n ast.Node, entering bool) (ast.WalkStatus, error) {
	if entering {
		segments := n.(*ast.RawHTML).Segments
		for i := 0; i < segments.Len(); i++ {
			s := segments.At(i)
			w.WriteString(html.EscapeString(string(s.Value(source))))
		}
	}
	return ast.WalkSkipChildren, nil
}

func (f *filler) htmlBlock(w util.BufWriter, source []byte, n ast.Node, entering bool) (ast.WalkStatus, error) {
	if !entering {
		return ast.WalkContinue, nil
	}
	b := n.(*ast.HTMLBlock)
	w.WriteString("<p>")
	for i := 0; i < b.Lines().Len(); i++ {
		s := b.Lines().At(i)
		w.WriteString(html.EscapeString(string(s.Value(source))))
	}
	if b.HasClosure() {
		w.WriteString(html.EscapeString(string(b.ClosureLine.Value(source))))
	}
	w.WriteString("</p>\n")
	return ast.WalkContinue, nil
}

func (f *filler) fence(w util.BufWriter, source []byte, n ast.Node, entering bool) (ast.WalkStatus, error) {
	if !entering {
		return ast.WalkContinue, nil
	}
	if i, ok := n.AttributeString("study"); ok && f.fill.Study != nil {
		var b bytes.Buffer
		f.fill.Study(i.(int), &b)
		w.Write(b.Bytes())
		return ast.WalkSkipChildren, nil
	}
	w.WriteString(`<pre tabindex="0"><code>`)
	for i := 0; i < n.Lines().Len(); i++ {
		s := n.Lines().At(i)
		w.WriteString(html.EscapeString(string(s.Value(source))))
	}
	w.WriteString("</code></pre>\n")
	return ast.WalkSkipChildren, nil
}

func (f *filler) link(w util.BufWriter, source []byte, n ast.Node, entering bool) (ast.WalkStatus, error) {
	l := n.(*ast.Link)
	if i, ok := n.AttributeString("number"); ok && f.fill.Number != nil {
		if entering {
			w.WriteString(f.fill.Number(i.(int)))
		}
		return ast.WalkSkipChildren, nil
	}
	if !entering {
		w.WriteString("</a>")
		return ast.WalkContinue, nil
	}
	target := string(l.Destination)
	if i, ok := n.AttributeString("link"); ok && f.fill.Link != nil {
		target = f.fill.Link(i.(int), target)
	}
	w.WriteString(`<a href="` + html.EscapeString(target) + `">`)
	return ast.WalkContinue, nil
}

func (f *filler) image(w util.BufWriter, source []byte, n ast.Node, entering bool) (ast.WalkStatus, error) {
	if entering {
		w.WriteString(html.EscapeString(plainText(n, source)))
	}
	return ast.WalkSkipChildren, nil
}
