package words

import (
	"bytes"
	"strings"
	"unicode/utf8"

	"github.com/yuin/goldmark/ast"
	"github.com/yuin/goldmark/util"

	"ohmfolio/generator/place"
)

const studyInfo = "study:"

// fence notes a study block; other fences stay what they are.
func (c *collector) fence(n *ast.FencedCodeBlock) {
	if n.Info == nil {
		return
	}
	info := string(n.Info.Segment.Value(c.page.source))
	if !strings.HasPrefix(info, studyInfo) {
		return
	}
	at := c.position(n.Info.Segment.Start, utf8.RuneCountInString(info))
	body := c.body(n, at)
	n.SetAttributeString("study", len(c.page.Studies))
	c.page.Studies = append(c.page.Studies, Study{Name: strings.TrimSpace(strings.TrimPrefix(info, studyInfo)), Body: body, Position: at, Level: max(1, c.level)})
}

// body copies the lines of a block. In a list or a quote they stand further
// right in the file; every line then has the same shift, which places take
// into account.
func (c *collector) body(n *ast.FencedCodeBlock, fence place.Position) *place.Source {
	var b bytes.Buffer
	first, shift := fence.Line+1, 0
	for i := 0; i < n.Lines().Len(); i++ {
		line := n.Lines().At(i)
		if i == 0 {
			at := c.position(line.Start, 1)
			first, shift = at.Line, at.Column-1
		}
		b.Write(line.Value(c.page.source))
	}
	return &place.Source{File: c.src.File, Text: b.Bytes(), First: first, Shift: shift}
}

// link notes a link or a live number; a scheme that could run something is
// made harmless.
func (c *collector) link(n *ast.Link) {
	n.Destination = util.ResolveEntityNames(util.ResolveNumericReferences(util.UnescapePunctuations(n.Destination)))
	target := string(n.Destination)
	at := c.linkPlace(n)
	if bad := scheme(target); bad != "" {
		c.refuse(at, bad, target)
		n.Destination = []byte("#")
		return
	}
	if isRecord(target) && len(n.Title) > 0 {
		n.SetAttributeString("number", len(c.page.Numbers))
		c.page.Numbers = append(c.page.Numbers, LiveNumber{Written: strings.TrimSpace(plainText(n, c.page.source)), Question: string(n.Title), Target: target, Position: at})
		return
	}
	n.SetAttributeString("link", len(c.page.Links))
	c.page.Links = append(c.page.Links, Link{target, at})
}

func (c *collector) refuse(at place.Position, bad, target string) {
	c.list.Add("link-scheme", place.Error, at, "the link "+quote(target)+" has the scheme "+bad, "link with http, https or mailto, or to a file of the reference")
}

func (c *collector) image(n *ast.Image) {
	c.list.Add("image-refused", place.Error, c.linkPlace(n), "the image "+quote(string(n.Destination))+" cannot be shown", "a page draws its figures from data; take the image out")
}

func (c *collector) autoLink(n *ast.AutoLink) {
	target := string(n.URL(c.page.source))
	if n.AutoLinkType == ast.AutoLinkURL {
		if bad := scheme(target); bad != "" {
			c.refuse(c.position(0, 1), bad, target)
		}
	}
}

// linkPlace is where the text of a link stands.
func (c *collector) linkPlace(n ast.Node) place.Position {
	for child := n.FirstChild(); child != nil; child = child.FirstChild() {
		if t, ok := child.(*ast.Text); ok {
			return c.position(t.Segment.Start, utf8.RuneCount(t.Segment.Value(c.page.source)))
		}
	}
	for p := n.Parent(); p != nil; p = p.Parent() {
		if p.Type() == ast.TypeBlock && p.Lines() != nil && p.Lines().Len() > 0 {
			return c.position(p.Lines().At(0).Start, 1)
		}
	}
	return c.src.At(c.src.First, 1, 1)
}

func isRecord(target string) bool {
	return strings.HasSuffix(target, ".yaml") && strings.Contains(target, "materials/")
}

// scheme returns the scheme of a target when it is not one that pages may
// link with.
func scheme(target string) string {
	target = strings.Map(func(r rune) rune {
		if r <= ' ' {
			return -1
		}
		return r
	}, target)
	i := strings.IndexAny(target, ":/?#")
	if i < 0 || target[i] != ':' {
		return ""
	}
	switch s := strings.ToLower(target[:i]); s {
	case "http", "https", "mailto":
		return ""
	default:
		return s
	}
}

func quote(s string) string { return "“" + s + "”" }
