package changes

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"regexp"
	"strconv"

	"ohmfolio/generator/export"
)

// The file begins with its format and ends with a sum over all before, so that
// a later format and a damaged file are told before anything is believed.
// Keys stand in a fixed order, numbers have 12 significant digits, one
// material is one line: the same statement has the same bytes.
var (
	beginning = regexp.MustCompile(`^\{"format":([0-9]{1,9}),`)
	sumKey    = []byte(`"sha256":"`)
)

// Write writes the canonical file of a statement, material by material, so
// that the whole is never held in memory twice.
func (s *Statement) Write(w *bytes.Buffer) error {
	start := w.Len()
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	put := func(key string, v any) error {
		w.WriteString("\n\"" + key + "\":")
		err := e.Encode(v)
		w.Truncate(w.Len() - 1) // the encoder's own line end
		w.WriteByte(',')
		return err
	}
	fmt.Fprintf(w, "{\"format\":%d,", s.Format)
	err := errors.Join(put("edition", s.Edition), put("title", s.Title), put("organisation", s.Organisation))
	w.WriteString("\n\"materials\":[")
	for i := range s.count() {
		if i > 0 {
			w.WriteByte(',')
		}
		w.WriteByte('\n')
		err = errors.Join(err, e.Encode(s.at(i)))
		w.Truncate(w.Len() - 1)
	}
	w.WriteString("\n],")
	err = errors.Join(err, put("studies", s.Studies), put("documents", s.Documents), put("sources", s.Sources))
	w.WriteByte('\n')
	fmt.Fprintf(w, "%s%s\"}\n", sumKey, sumOf(w.Bytes()[start:]))
	return err
}

// sumOf leaves out carriage returns: version control may turn line ends over.
func sumOf(text []byte) string {
	h := sha256.New()
	for len(text) > 0 {
		line, rest, found := bytes.Cut(text, []byte("\r\n"))
		h.Write(line)
		if found {
			h.Write([]byte("\n"))
		}
		text = rest
	}
	return hex.EncodeToString(h.Sum(nil))
}

// Read reads the file of a statement. The error says what to do next.
func Read(text []byte) (*Statement, error) {
	if err := readable(text); err != nil {
		return nil, err
	}
	var s Statement
	if err := json.Unmarshal(text, &s); err != nil {
		return nil, fmt.Errorf("the statement cannot be read: %s", jsonReason(text, err))
	}
	return &s, s.check()
}

// readable looks at format and sum.
func readable(text []byte) error {
	m := beginning.FindSubmatch(text)
	if m == nil {
		return noStatement(text)
	}
	if format, _ := strconv.Atoi(string(m[1])); format < 1 || format > Format {
		return fmt.Errorf("the statement has format %d, and this program reads formats up to %d: use the newer program that wrote it", format, Format)
	}
	at := bytes.LastIndex(text, sumKey)
	if at < 0 {
		return errors.New("the statement has no sum at its end: the file is cut off or damaged; take it from version control again")
	}
	said, _, _ := bytes.Cut(text[at+len(sumKey):], []byte(`"`))
	if string(said) != sumOf(text[:at]) {
		return errors.New("the statement is not as it was written: its sum differs; take the file from version control again, and never edit it")
	}
	return nil
}

// noStatement says what else the text may be.
func noStatement(text []byte) error {
	var any struct {
		Materials []json.RawMessage `json:"materials"`
	}
	switch err := json.Unmarshal(text, &any); {
	case len(bytes.TrimSpace(text)) == 0:
		return errors.New("the file is empty")
	case err != nil:
		return fmt.Errorf("this is no statement of a reference: %s", jsonReason(text, err))
	case len(any.Materials) > 0:
		return errors.New("the statement has no format number: an earlier version of the program wrote it; publish that revision again with this one")
	}
	return errors.New("this is no statement of a reference: it does not begin with its format")
}

// jsonReason says where in the text reading failed.
func jsonReason(text []byte, err error) string {
	var syntax *json.SyntaxError
	var typed *json.UnmarshalTypeError
	offset := int64(-1)
	switch {
	case errors.Is(err, io.ErrUnexpectedEOF):
		return "the file is cut off"
	case errors.As(err, &syntax):
		offset = syntax.Offset
	case errors.As(err, &typed):
		offset = typed.Offset
	}
	if offset < 0 || offset > int64(len(text)) {
		return err.Error()
	}
	return fmt.Sprintf("line %d: %v", 1+bytes.Count(text[:offset], []byte("\n")), err)
}

// check refuses what this program would never write: it could mislead the
// comparison.
func (s *Statement) check() error {
	if s.Edition != "" && !PlainName(s.Edition) {
		return fmt.Errorf("the statement has the name %q, which no edition can have", s.Edition)
	}
	for i := range s.count() {
		if s.id(i) == "" || (i > 0 && s.id(i-1) >= s.id(i)) {
			return fmt.Errorf("the materials of the statement are not sorted by ID at %q", s.id(i))
		}
	}
	for i := range s.Materials { // those of an opened one are looked at when they are read
		if err := s.Materials[i].check(); err != nil {
			return fmt.Errorf("%s: %w", s.Materials[i].ID, err)
		}
	}
	return nil
}

func (m *Material) check() error {
	lists := [][]export.SegmentJSON{m.Segments.Resistivity}
	if m.Segments.Ratio != nil {
		lists = append(lists, m.Segments.Ratio.Pieces)
	}
	if m.Corners != nil {
		lists = append(lists, m.Corners.Curves...)
	}
	for _, list := range lists {
		for i, s := range list {
			if s.FromK > s.ToK || (i > 0 && s.FromK < list[i-1].ToK) {
				return fmt.Errorf("its curve does not rise at %g K", s.FromK)
			}
		}
	}
	return nil
}

var plainName = regexp.MustCompile(`^[a-z0-9][a-z0-9-]{0,39}$`)

// PlainName tells whether an edition may have the name: small letters, digits
// and hyphens, in an order that sorts as time goes: 2026-06.
func PlainName(name string) bool { return plainName.MatchString(name) }
