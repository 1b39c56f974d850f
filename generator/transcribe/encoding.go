package transcribe

import (
	"bytes"
	"fmt"
	"strings"
	"unicode/utf8"

	"ohmfolio/generator/form"
	"ohmfolio/generator/place"
)

const utf8Mend = "open it in the spreadsheet and save as CSV UTF-8"

// beginnings are files that are no CSV in UTF-8, told by their first bytes.
var beginnings = []struct{ bytes, what string }{
	{"PK\x03\x04", "a workbook, not a CSV"},
	{"\xd0\xcf\x11\xe0", "an old workbook, not a CSV"},
	{"\xff\xfe", "UTF-16, not UTF-8"},
	{"\xfe\xff", "UTF-16, not UTF-8"},
	{"%PDF", "a PDF, not a CSV"},
}

// garbled are the letters that µ, °, Ω and ² become when UTF-8 is read as the
// encoding of a Western desktop and saved again.
var garbled = []struct{ seen, meant string }{
	{"Âµ", "µ"}, {"Î¼", "μ"}, {"Â°", "°"}, {"Î©", "Ω"}, {"â„¦", "Ω"}, {"Â²", "²"}, {"Â³", "³"}, {"Â·", "·"}, {"Â±", "±"}, {"âˆ’", "−"},
}

// readable tells whether src is text in UTF-8 as it was meant; otherwise a
// finding says what it is.
func readable(list *place.List, src *place.Source) bool {
	for _, b := range beginnings {
		if bytes.HasPrefix(src.Text, []byte(b.bytes)) {
			list.Add("table-encoding", place.Error, place.Position{File: src.File}, "the file is "+b.what, utf8Mend)
			return false
		}
	}
	if i := firstBad(src.Text); i >= 0 {
		line, column := lineAndColumn(src.Text, i)
		list.Add("table-encoding", place.Error, src.At(line, column, 1), fmt.Sprintf("the byte %02X is not UTF-8", src.Text[i]), utf8Mend)
		return false
	}
	for _, bad := range []string{"\ufffe", "\uffff", "\ufffd"} {
		if i := bytes.Index(src.Text, []byte(bad)); i >= 0 {
			line, column := lineAndColumn(src.Text, i)
			list.Add("table-encoding", place.Error, src.At(line, column, 1), "a letter was lost here when the file was saved", utf8Mend)
			return false
		}
	}
	for _, g := range garbled {
		if i := bytes.Index(src.Text, []byte(g.seen)); i >= 0 {
			line, column := lineAndColumn(src.Text, i)
			list.Add("table-encoding", place.Error, src.At(line, column, utf8.RuneCountInString(g.seen)),
				"“"+g.seen+"” stands where “"+g.meant+"” was: the file was read in another encoding and saved again", utf8Mend)
			return false
		}
	}
	return form.CheckText(list, src)
}

// firstBad is the offset of the first byte that is not UTF-8, or -1.
func firstBad(text []byte) int {
	for i := 0; i < len(text); {
		r, n := utf8.DecodeRune(text[i:])
		if r == utf8.RuneError && n == 1 {
			return i
		}
		i += n
	}
	return -1
}

func lineAndColumn(text []byte, offset int) (line, column int) {
	before := string(text[:offset])
	start := strings.LastIndexByte(before, '\n') + 1
	return strings.Count(before, "\n") + 1, utf8.RuneCountInString(strings.TrimPrefix(before[start:], "\ufeff")) + 1
}
