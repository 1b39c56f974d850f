package changes

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"sort"
)

// A line is one material as it stands in a file. Most materials of most
// editions are never looked at: they are the same, byte for byte, as in the
// next one.
type line struct {
	id   string
	text []byte
}

var (
	materialsKey = []byte("\n\"materials\":[")
	materialsEnd = []byte("\n],\n\"studies\":")
	idKey        = []byte(`{"id":"`)
)

// Open reads the file of a statement as far as a history needs it: format,
// sum, studies, documents, and where each material stands. The text is kept.
func Open(text []byte) (*Statement, error) {
	if err := readable(text); err != nil {
		return nil, err
	}
	if bytes.Contains(text, []byte("\r\n")) {
		text = bytes.ReplaceAll(text, []byte("\r\n"), []byte("\n"))
	}
	from, to := bytes.Index(text, materialsKey), bytes.LastIndex(text, materialsEnd)
	if from < 0 || to < from+len(materialsKey) {
		return nil, errors.New("the statement is not laid out as this program does it: take the file from version control again")
	}
	var s Statement
	rest := append(append([]byte{}, text[:from]...), text[to+len("\n],"):]...)
	if err := json.Unmarshal(rest, &s); err != nil {
		return nil, fmt.Errorf("the statement cannot be read: %s", jsonReason(rest, err))
	}
	for _, l := range bytes.Split(text[from+len(materialsKey):to], []byte("\n")) {
		l = bytes.TrimSuffix(l, []byte(","))
		if len(l) == 0 {
			continue
		}
		tail, ok := bytes.CutPrefix(l, idKey)
		end := bytes.IndexByte(tail, '"')
		if !ok || end < 1 {
			return nil, errors.New("the statement is not laid out as this program does it: take the file from version control again")
		}
		s.lines = append(s.lines, line{string(tail[:end]), l})
	}
	return &s, s.check()
}

// count is how many materials there are.
func (s *Statement) count() int { return len(s.Materials) + len(s.live) + len(s.lines) }

func (s *Statement) id(i int) string {
	switch {
	case s.live != nil:
		return s.live[i].ID
	case s.lines != nil:
		return s.lines[i].id
	}
	return s.Materials[i].ID
}

// at gives material i: stated now, or read from its line where the statement
// was only opened.
// A line that the right sum vouches for, and that cannot be read all the same,
// states nothing.
func (s *Statement) at(i int) *Material {
	switch {
	case s.live != nil:
		return freezeMaterial(s.lib, s.live[i])
	case s.lines == nil:
		return &s.Materials[i]
	}
	m := &Material{}
	if err := json.Unmarshal(s.lines[i].text, m); err != nil || m.ID != s.lines[i].id || m.check() != nil {
		m = &Material{}
		m.ID = s.lines[i].id
	}
	return m
}

// index is where the material called id stands, −1 when there is none.
func (s *Statement) index(id string) int {
	i := sort.Search(s.count(), func(i int) bool { return s.id(i) >= id })
	if i < s.count() && s.id(i) == id {
		return i
	}
	return -1
}

// find gives the material called id, nil when there is none.
func (s *Statement) find(id string) *Material {
	if i := s.index(id); i >= 0 {
		return s.at(i)
	}
	return nil
}

// sameLine tells whether two opened statements say the same of a material,
// byte for byte.
func sameLine(a, b *Statement, i, j int) bool {
	return a.lines != nil && b.lines != nil && bytes.Equal(a.lines[i].text, b.lines[j].text)
}

// released tells whether material i is released. The status is the first key
// of its name on a line, and no text can hold a quote that is not escaped.
func (s *Statement) released(i int) bool {
	if s.lines == nil {
		return s.at(i).Status == "released"
	}
	_, after, _ := bytes.Cut(s.lines[i].text, []byte(`,"status":"`))
	return bytes.HasPrefix(after, []byte(`released"`))
}
