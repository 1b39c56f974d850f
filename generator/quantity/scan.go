package quantity

import (
	"bytes"
	"math"
	"strconv"
	"strings"
	"unicode/utf8"
)

// scanner walks through one text.
type scanner struct {
	text string
	at   int // byte offset
}

func (s *scanner) rest() string { return s.text[s.at:] }

func (s *scanner) skipBlank() {
	for s.at < len(s.text) {
		r, n := utf8.DecodeRuneInString(s.rest())
		if r != ' ' && r != '\t' && r != '\u00a0' && r != '\u202f' && r != '\u2009' {
			return
		}
		s.at += n
	}
}

// take moves past the first of the prefixes that stands here.
func (s *scanner) take(prefixes ...string) bool {
	for _, p := range prefixes {
		if strings.HasPrefix(s.rest(), p) {
			s.at += len(p)
			return true
		}
	}
	return false
}

// written is one number as written.
type written struct {
	value  float64
	digits int     // significant digits
	step   float64 // one unit in the last written place: 0.01 for 8.40
	start  int
	end    int
}

// number reads a number; ok is false when none stands here. A comma within
// digits is a problem of its own.
func (s *scanner) number() (w written, ok bool, p *Problem) {
	w.start = s.at
	var b [64]byte
	buf := b[:0]
	switch {
	case s.take("-", "−"):
		buf = append(buf, '-')
	case s.take("+"):
	}
	from := len(buf)
	buf, p = s.digits(buf)
	if p != nil {
		return w, false, p
	}
	if len(buf) == from {
		s.at = w.start
		return w, false, nil
	}
	w.digits = significant(buf[from:])
	plain := len(buf)
	buf = s.exponent(buf)
	w.end = s.at
	w.step = lastPlace(buf[from:plain], buf[plain:])
	x, err := strconv.ParseFloat(string(buf), 64)
	if err != nil || math.IsInf(x, 0) {
		return w, false, s.problem(codeNotFinite, "the number "+quote(s.text[w.start:w.end])+" is not finite", "write the number that the source prints", w.start, w.end)
	}
	w.value = x
	return w, true, nil
}

func (s *scanner) digits(buf []byte) ([]byte, *Problem) {
	point, start := false, s.at
	for s.at < len(s.text) {
		c := s.text[s.at]
		switch {
		case c >= '0' && c <= '9':
			buf = append(buf, c)
		case c == '.' && !point && s.at > start-1 && s.digitFollows(1):
			buf, point = append(buf, c), true
		case c == ',' && s.at > start && s.digitFollows(1):
			return buf, s.comma(start)
		default:
			return buf, nil
		}
		s.at++
	}
	return buf, nil
}

func (s *scanner) digitFollows(n int) bool {
	return s.at+n < len(s.text) && s.text[s.at+n] >= '0' && s.text[s.at+n] <= '9'
}

func (s *scanner) comma(start int) *Problem {
	end := s.at + 1
	for end < len(s.text) && s.text[end] >= '0' && s.text[end] <= '9' {
		end++
	}
	got := s.text[start:end]
	return s.problem(codeComma, "the number "+quote(got)+" has a comma", "write a decimal point: "+strings.Replace(got, ",", ".", 1), start, end)
}

// exponent reads e-3, ×10⁻³ or x 10^-3.
func (s *scanner) exponent(buf []byte) []byte {
	if s.at < len(s.text) && (s.text[s.at] == 'e' || s.text[s.at] == 'E') {
		mark := s.at
		s.at++
		sign := byte('+')
		if s.take("-", "−") {
			sign = '-'
		} else {
			s.take("+")
		}
		if s.at < len(s.text) && s.text[s.at] >= '0' && s.text[s.at] <= '9' {
			buf = append(buf, 'e', sign)
			for s.at < len(s.text) && s.text[s.at] >= '0' && s.text[s.at] <= '9' {
				buf = append(buf, s.text[s.at])
				s.at++
			}
			return buf
		}
		s.at = mark
		return buf
	}
	return s.timesTen(buf)
}

var superscripts = map[rune]byte{'⁰': '0', '¹': '1', '²': '2', '³': '3', '⁴': '4', '⁵': '5', '⁶': '6', '⁷': '7', '⁸': '8', '⁹': '9', '⁻': '-'}

func (s *scanner) timesTen(buf []byte) []byte {
	mark := s.at
	s.skipBlank()
	if !s.take("×", "x ", "x1", "*") {
		s.at = mark
		return buf
	}
	if s.text[s.at-1] == '1' {
		s.at--
	}
	s.skipBlank()
	if !s.take("10") {
		s.at = mark
		return buf
	}
	out := append(buf, 'e')
	start := len(out)
	caret := s.take("^")
	for s.at < len(s.text) {
		r, n := utf8.DecodeRuneInString(s.rest())
		d, super := superscripts[r]
		if !super {
			if !caret || (r != '-' && (r < '0' || r > '9')) {
				break
			}
			d = byte(r)
		}
		out = append(out, d)
		s.at += n
	}
	if len(out) == start {
		s.at = mark
		return buf
	}
	return out
}

// significant counts the significant digits of a plain number: leading zeros
// do not count, trailing ones do.
func significant(digits []byte) int {
	n, started := 0, false
	for _, c := range digits {
		if c == '.' {
			continue
		}
		started = started || c != '0'
		if started {
			n++
		}
	}
	return max(1, n)
}

// lastPlace is one unit in the last place of a plain number with an exponent
// such as e-3, or none.
func lastPlace(plain, exponent []byte) float64 {
	decimals, power := 0, 0
	if i := bytes.IndexByte(plain, '.'); i >= 0 {
		decimals = len(plain) - i - 1
	}
	if len(exponent) > 1 {
		power, _ = strconv.Atoi(string(exponent[1:]))
	}
	return math.Pow10(power - decimals)
}

// problem places a problem on the bytes from start to end of the text.
func (s *scanner) problem(code, message, mend string, start, end int) *Problem {
	start, end = max(0, min(start, len(s.text))), max(0, min(end, len(s.text)))
	return &Problem{Code: code, Message: message, Mend: mend,
		Offset: utf8.RuneCountInString(s.text[:start]), Length: max(1, utf8.RuneCountInString(s.text[start:max(start, end)]))}
}

func quote(s string) string { return "“" + s + "”" }
