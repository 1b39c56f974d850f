// Package words reads Markdown (CommonMark, tables, footnotes) into a tree
// with places: headings, links, study blocks and live numbers. HTML in the
// text is shown as text. It knows no study and no material.
package words

import (
	"bytes"
	"strings"
	"unicode/utf8"

	"github.com/yuin/goldmark"
	"github.com/yuin/goldmark/ast"
	"github.com/yuin/goldmark/extension"
	"github.com/yuin/goldmark/parser"
	"github.com/yuin/goldmark/text"

	"ohmfolio/generator/form"
	"ohmfolio/generator/place"
)

// A Page is one Markdown file, read.
type Page struct {
	Title    string
	Headings []Heading
	Studies  []Study
	Numbers  []LiveNumber
	Links    []Link
	Plain    string // the words alone, for finding

	doc    ast.Node
	source []byte
}

// Heading is one heading under the title.
type Heading struct {
	Level    int
	Text, ID string
}

// Study is a fenced block whose info string is "study: NAME". The positions
// of its body are those of the Markdown file.
type Study struct {
	Name     string
	Body     *place.Source
	Position place.Position
	Level    int // of the heading that it stands under: 1 right under the title
}

// LiveNumber is a link to a record whose title is a question.
type LiveNumber struct {
	Written, Question, Target string
	Position                  place.Position
}

// Link is any other link.
type Link struct {
	Target   string
	Position place.Position
}

// Read reads one page. The page is nil when the text cannot be read.
func Read(src *place.Source) (*Page, []place.Finding) {
	list := &place.List{Source: src}
	if !form.CheckText(list, src) {
		return nil, list.Findings
	}
	src = unixText(src)
	list.Source = src
	p := &Page{source: src.Text}
	p.doc = markdown.Parser().Parse(text.NewReader(src.Text))
	c := collector{page: p, src: src, list: list, ids: map[string]bool{}, lines: lineIndex(src.Text)}
	c.collect()
	if p.Title == "" {
		list.Add("title-missing", place.Error, src.At(src.First, 1, 1), "the page has no title", "begin it with a line such as # How to read a sheet")
	}
	return p, list.Findings
}

// unixText drops a byte-order mark, which Markdown does not know, and carriage
// returns, so that a page is the same on every system. Lines and columns stay.
func unixText(src *place.Source) *place.Source {
	text := bytes.TrimPrefix(src.Text, []byte("\ufeff"))
	if len(text) == len(src.Text) && bytes.IndexByte(text, '\r') < 0 {
		return src
	}
	text = bytes.ReplaceAll(text, []byte("\r\n"), []byte("\n"))
	return &place.Source{File: src.File, Text: text, First: src.First, Shift: src.Shift}
}

// markdown is the one parser; it is safe for use by several goroutines.
var markdown = goldmark.New(
	goldmark.WithExtensions(extension.Table, extension.Footnote),
	goldmark.WithParserOptions(parser.WithAttribute()),
)

// lineIndex gives the byte offset of each line.
func lineIndex(b []byte) []int {
	starts := []int{0}
	for i, c := range b {
		if c == '\n' {
			starts = append(starts, i+1)
		}
	}
	return starts
}

// collector walks the tree once and notes what has a place.
type collector struct {
	page  *Page
	src   *place.Source
	list  *place.List
	ids   map[string]bool
	lines []int
	level int // of the last heading
}

func (c *collector) collect() {
	var plain strings.Builder
	_ = ast.Walk(c.page.doc, func(n ast.Node, entering bool) (ast.WalkStatus, error) {
		if !entering {
			return ast.WalkContinue, nil
		}
		switch n := n.(type) {
		case *ast.Heading:
			c.heading(n)
		case *ast.FencedCodeBlock:
			c.fence(n)
		case *ast.Link:
			c.link(n)
		case *ast.Image:
			c.image(n)
		case *ast.AutoLink:
			c.autoLink(n)
		case *ast.Text:
			plain.Write(n.Segment.Value(c.page.source))
			plain.WriteByte(' ')
		}
		return ast.WalkContinue, nil
	})
	c.page.Plain = plain.String()
}

// position turns a byte offset into a place.
func (c *collector) position(offset, length int) place.Position {
	lo, hi := 0, len(c.lines)
	for hi-lo > 1 {
		if mid := (lo + hi) / 2; c.lines[mid] <= offset {
			lo = mid
		} else {
			hi = mid
		}
	}
	offset = min(offset, len(c.src.Text))
	column := utf8.RuneCount(c.src.Text[c.lines[lo]:offset]) + 1
	return c.src.At(lo+c.src.First, column, length)
}

// plainText is the text below a node.
func plainText(n ast.Node, source []byte) string {
	var b strings.Builder
	_ = ast.Walk(n, func(n ast.Node, entering bool) (ast.WalkStatus, error) {
		if !entering {
			return ast.WalkContinue, nil
		}
		switch n := n.(type) {
		case *ast.Text:
			b.Write(n.Segment.Value(source))
			if n.SoftLineBreak() || n.HardLineBreak() {
				b.WriteByte(' ')
			}
		case *ast.String:
			b.Write(n.Value)
		}
		return ast.WalkContinue, nil
	})
	return b.String()
}

func (c *collector) heading(n *ast.Heading) {
	title := plainText(n, c.page.source)
	c.level = n.Level
	if n.Level == 1 && c.page.Title == "" {
		c.page.Title = title
		return
	}
	id := c.id(title)
	n.SetAttributeString("id", []byte(id))
	c.page.Headings = append(c.page.Headings, Heading{n.Level, title, id})
}

// id makes a heading's id: its words in lower case, joined by hyphens; twice
// the same gets a number.
func (c *collector) id(title string) string {
	var b strings.Builder
	for _, r := range strings.ToLower(title) {
		switch {
		case r >= 'a' && r <= 'z', r >= '0' && r <= '9', r >= 0xc0:
			b.WriteRune(r)
		case b.Len() > 0 && !strings.HasSuffix(b.String(), "-"):
			b.WriteByte('-')
		}
	}
	base := "h-" + strings.Trim(b.String(), "-")
	id := base
	for n := 2; c.ids[id]; n++ {
		id = base + "-" + string(rune('0'+n%10))
		if n > 9 {
			base += "-"
		}
	}
	c.ids[id] = true
	return id
}
