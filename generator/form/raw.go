package form

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"regexp"
	"strconv"
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"ohmfolio/generator/place"
)

// MaxBytes is the most that a YAML or Markdown file may have.
const MaxBytes = 4 << 20

// reader reads one source.
type reader struct {
	src  *place.Source
	list place.List
}

func (r *reader) add(code string, at place.Position, message, mend string) *place.Finding {
	return r.list.Add(code, place.Error, at, message, mend)
}

// parse reads the text into one YAML node, nil after a finding.
func (r *reader) parse() *yaml.Node {
	if !CheckText(&r.list, r.src) {
		return nil
	}
	d := yaml.NewDecoder(bytes.NewReader(r.src.Text))
	var doc yaml.Node
	if err := d.Decode(&doc); err != nil {
		if errors.Is(err, io.EOF) {
			r.add("file-empty", r.src.At(r.src.First, 1, 1), "nothing is written here", "write at least the keys that are needed")
			return nil
		}
		r.syntax(err)
		return nil
	}
	var second yaml.Node
	if err := d.Decode(&second); err == nil {
		r.add("yaml-second-document", r.at(&second), "a second document begins here", "keep one document a file: take out the line ---")
		return nil
	}
	if doc.Kind != yaml.DocumentNode || len(doc.Content) != 1 {
		r.add("file-empty", r.src.At(r.src.First, 1, 1), "nothing is written here", "write at least the keys that are needed")
		return nil
	}
	return doc.Content[0]
}

// CheckText finds what must not be in any text file that is read: too many
// bytes, invalid UTF-8, control characters, lone carriage returns, NEL. It
// tells whether the text may be read on.
func CheckText(list *place.List, src *place.Source) bool {
	if len(src.Text) > MaxBytes {
		list.Add("file-too-large", place.Error, place.Position{File: src.File}, fmt.Sprintf("the file has %d bytes; %d are the most", len(src.Text), MaxBytes), "split it")
		return false
	}
	line, column := src.First, 1
	for i := 0; i < len(src.Text); {
		c := src.Text[i]
		if c < utf8.RuneSelf {
			if bad := controlCharacter(src.Text, i); bad != "" {
				list.Add("control-character", place.Error, src.At(line, column+src.Shift, 1), bad+" stands in the text", "take it out; end lines with LF or CRLF")
				return false
			}
			i++
			column++
			if c == '\n' {
				line, column = line+1, 1
			}
			continue
		}
		n := wideCharacter(list, src, i, line, column)
		if n == 0 {
			return false
		}
		i += n
		column++
	}
	return true
}

func controlCharacter(text []byte, i int) string {
	switch c := text[i]; {
	case c == '\r' && (i+1 == len(text) || text[i+1] != '\n'):
		return "a carriage return without a line feed"
	case c < ' ' && c != '\n' && c != '\t' && c != '\r', c == 0x7f:
		return fmt.Sprintf("the control character U+%04X", c)
	}
	return ""
}

// wideCharacter returns the bytes of the character at i, 0 after a finding.
func wideCharacter(list *place.List, src *place.Source, i, line, column int) int {
	c, n := utf8.DecodeRune(src.Text[i:])
	what := ""
	switch {
	case c == utf8.RuneError && n == 1:
		what = "a byte that is not UTF-8"
	case c == 0x85 || c == 0x2028 || c == 0x2029:
		what = fmt.Sprintf("the line separator U+%04X", c)
	case c >= 0x80 && c < 0xa0:
		what = fmt.Sprintf("the control character U+%04X", c)
	case c == 0xfeff && i > 0:
		what = "a byte-order mark inside the file"
	}
	if what == "" {
		return n
	}
	list.Add("control-character", place.Error, src.At(line, column+src.Shift, 1), what+" stands in the text", "save the file as UTF-8 with plain line ends")
	return 0
}

var lineInError = regexp.MustCompile(`line (\d+)`)

// syntax reports YAML's own message at the best line to be had.
func (r *reader) syntax(err error) {
	line := 1
	if m := lineInError.FindStringSubmatch(err.Error()); m != nil {
		line, _ = strconv.Atoi(m[1])
	}
	message := strings.TrimPrefix(err.Error(), "yaml: ")
	message = lineInError.ReplaceAllString(message, "")
	message = strings.TrimLeft(message, ": ")
	at := r.src.At(line+r.src.First-1, 0, 1)
	mend := "look at quotes, brackets and indentation near this line"
	if percent := r.percentLine(line); percent > 0 {
		at = r.src.At(percent+r.src.First-1, 0, 1)
		mend = `a value that begins with % needs quotes: "%IACS"`
	}
	r.add("yaml-syntax", at, "this is no YAML: "+message, mend)
}

var startsWithPercent = regexp.MustCompile(`[:\[{,]\s*%`)

// percentLine finds a value that begins with an unquoted %, which YAML
// forbids, at or before the line of an error.
func (r *reader) percentLine(line int) int {
	for n := line; n >= 1 && n > line-3; n-- {
		if startsWithPercent.MatchString(r.src.Line(n + r.src.First - 1)) {
			return n
		}
	}
	return 0
}

// at is the place of a YAML node in the file.
func (r *reader) at(n *yaml.Node) place.Position {
	length := utf8.RuneCountInString(n.Value)
	if n.Style&(yaml.DoubleQuotedStyle|yaml.SingleQuotedStyle) != 0 {
		length += 2
	}
	return place.Position{File: r.src.File, Line: n.Line + r.src.First - 1, Column: n.Column + r.src.Shift, Length: max(1, length)}
}

// spot is r.at without the file.
func (r *reader) spot(n *yaml.Node) spot {
	p := r.at(n)
	return spot{int32(p.Line), int32(p.Column), int32(p.Length)}
}

func (r *reader) node(y *yaml.Node, w what) *Node {
	return &Node{src: r.src, at: r.spot(y), has: w}
}
