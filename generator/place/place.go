// Package place says where something stands in a text file and what was
// found there: positions, sources with their lines, findings, and the kinds
// of finding that the program knows. It knows nothing of materials.
package place

import (
	"bytes"
	"fmt"
	"sort"
	"strings"
	"unicode/utf8"
)

// A Position is a place in a text file. Line and Column count from 1, columns
// in code points; 0 means unknown, and the printed form leaves it out.
type Position struct {
	File   string // relative to the reference's folder, forward slashes
	Line   int
	Column int
	Length int // code points that the caret marks, at least one is drawn
}

// String gives "file:line:column", leaving out what is unknown.
func (p Position) String() string {
	s := p.File
	if p.Line > 0 {
		s += fmt.Sprintf(":%d", p.Line)
		if p.Column > 0 {
			s += fmt.Sprintf(":%d", p.Column)
		}
	}
	return s
}

// A Source is the text of one file, kept so that findings can show its lines.
type Source struct {
	File  string // relative to the reference's folder, forward slashes
	Text  []byte
	First int // line number of the first line of Text: 1, or more for a block inside a file
	Shift int // columns to add on every line of Text, for an indented block

	starts []int
}

// NewSource keeps text under the name file; the first line is line 1.
func NewSource(file string, text []byte) *Source {
	return &Source{File: file, Text: text, First: 1}
}

// Line returns line n (as numbered by First) without its line end, "" when
// there is no such line. It is not safe for use by several goroutines.
func (s *Source) Line(n int) string {
	if s.starts == nil {
		s.starts = lineStarts(s.Text)
	}
	i := n - s.First
	if i < 0 || i >= len(s.starts) {
		return ""
	}
	line := s.Text[s.starts[i]:]
	if end := bytes.IndexByte(line, '\n'); end >= 0 {
		line = line[:end]
	}
	return strings.TrimPrefix(strings.TrimSuffix(string(line), "\r"), "\ufeff")
}

func lineStarts(text []byte) []int {
	starts := []int{0}
	for i, b := range text {
		if b == '\n' {
			starts = append(starts, i+1)
		}
	}
	return starts
}

// At returns the position of line and column in s with a caret of length
// code points.
func (s *Source) At(line, column, length int) Position {
	return Position{File: s.File, Line: line, Column: column, Length: length}
}

// Severity orders findings by what they stop.
type Severity string

// The three severities: an Error stops a publication, a Warning does not, a
// Note is for information.
const (
	Error   Severity = "error"
	Warning Severity = "warning"
	Note    Severity = "note"
)

// A Finding is something a reader of the file should know, with its place.
type Finding struct {
	Code     string // stable, in words: "reference-temperature-missing"
	Severity Severity
	Position Position
	Message  string // names the thing, the value found, what was expected
	Mend     string // the next step; "" when the message says it all
	Line     string // the source line at Position, "" when there is none
	Also     *Also  // the other place, if there are two
}

// Also names a second place that belongs to a finding.
type Also struct {
	Position Position
	Message  string
}

// A Kind documents one code of finding.
type Kind struct {
	Code        string
	Severity    Severity // the usual one; a rule may soften it for drafts and says so
	Title       string   // a short sentence
	Explanation string   // what it means and why it matters, two or three sentences
	Trigger     string   // the smallest input: a txtar archive of a reference's files
	Mend        string   // what to do
}

// Sort orders findings by file, line, column, code and message.
func Sort(findings []Finding) {
	sort.SliceStable(findings, func(i, j int) bool {
		a, b := findings[i], findings[j]
		switch {
		case a.Position.File != b.Position.File:
			return a.Position.File < b.Position.File
		case a.Position.Line != b.Position.Line:
			return a.Position.Line < b.Position.Line
		case a.Position.Column != b.Position.Column:
			return a.Position.Column < b.Position.Column
		case a.Code != b.Code:
			return a.Code < b.Code
		}
		return a.Message < b.Message
	})
}

// Count returns how many findings have the severity s.
func Count(findings []Finding, s Severity) int {
	n := 0
	for _, f := range findings {
		if f.Severity == s {
			n++
		}
	}
	return n
}

// A List collects findings about one source; nil is usable nowhere, the zero
// value with a Source everywhere.
type List struct {
	Source   *Source
	Findings []Finding
}

// Add appends a finding at p and fills in the source line.
func (l *List) Add(code string, s Severity, p Position, message, mend string) *Finding {
	f := Finding{Code: code, Severity: s, Position: p, Message: message, Mend: mend}
	if l.Source != nil && p.Line > 0 {
		f.Line = l.Source.Line(p.Line)
	}
	l.Findings = append(l.Findings, f)
	return &l.Findings[len(l.Findings)-1]
}

// caretLine draws the caret line under the source line of p: tabs are kept so
// that the caret stands under its character.
func caretLine(line string, p Position) string {
	var b strings.Builder
	column := 1
	for _, r := range line {
		if column >= p.Column {
			break
		}
		if r == '\t' {
			b.WriteByte('\t')
		} else {
			b.WriteByte(' ')
		}
		column++
	}
	length := max(1, min(p.Length, utf8.RuneCountInString(line)-p.Column+1))
	b.WriteString(strings.Repeat("^", length))
	return b.String()
}
