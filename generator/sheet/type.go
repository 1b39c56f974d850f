package sheet

import (
	"strings"
	"sync"

	"github.com/signintech/gopdf"
	"golang.org/x/image/font/gofont/gobold"
	"golang.org/x/image/font/gofont/goregular"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
)

// A face is one of the two fonts, the Go fonts (BSD-3): regular and bold.
type face int

const (
	regular face = iota
	bold
)

var faceNames = [...]string{"sheet-regular", "sheet-bold"}

// typeface holds what is parsed once for all sheets.
type typeface struct {
	container *gopdf.FontContainer
	widths    [2]map[rune]float64 // of 1 pt
}

// theTypeface parses the fonts and measures every sign they have.
var theTypeface = sync.OnceValues(func() (*typeface, error) {
	t := &typeface{container: &gopdf.FontContainer{}}
	for i, data := range [][]byte{goregular.TTF, gobold.TTF} {
		if err := t.container.AddTTFFontData(faceNames[i], data); err != nil {
			return nil, err
		}
		f, err := sfnt.Parse(data)
		if err != nil {
			return nil, err
		}
		t.widths[i] = widthsOf(f)
	}
	return t, nil
})

// widthsOf measures the signs of the Basic Multilingual Plane below the
// private area, which is where all the signs of the trade are.
func widthsOf(f *sfnt.Font) map[rune]float64 {
	var b sfnt.Buffer
	widths := map[rune]float64{}
	const size = 1000
	for r := rune(0x20); r < 0x2c00; r++ {
		glyph, err := f.GlyphIndex(&b, r)
		if err != nil || glyph == 0 {
			continue
		}
		if w, err := f.GlyphAdvance(&b, glyph, fixed.I(size), 0); err == nil {
			widths[r] = float64(w) / 64 / size
		}
	}
	return widths
}

// thinSpace is how wide U+2009 and U+202F are, which the fonts do not have:
// what is behind them is shifted.
const thinSpace = 0.2

func thin(r rune) bool { return r == '\u2009' || r == '\u202f' }

// otherwise are signs that the fonts do not have, in signs that they have.
var otherwise = strings.NewReplacer("\u2011", "-", "\u2003", " ", "□", "square", "✓", "yes", "\u00ad", "")

// plain replaces what the fonts cannot show; a sign from elsewhere becomes a
// question mark, and control characters fall away.
func (t *typeface) plain(s string) string {
	s = otherwise.Replace(s)
	return strings.Map(func(r rune) rune {
		switch {
		case thin(r):
			return '\u202f'
		case r == '\n' || r == '\t' || r == '\r':
			return ' '
		case r < ' ' || r == 0x7f:
			return -1
		}
		if _, ok := t.widths[regular][r]; !ok {
			return '?'
		}
		return r
	}, s)
}

// width of a text in points.
func (t *typeface) width(f face, size float64, s string) float64 {
	sum := 0.0
	for _, r := range s {
		if thin(r) {
			sum += thinSpace
			continue
		}
		sum += t.widths[f][r]
	}
	return sum * size
}

// wrap breaks a text into lines no wider than room. A word that is wider than
// that by itself is broken where it must.
func (t *typeface) wrap(f face, size float64, s string, room float64) []string {
	if t.width(f, size, s) <= room {
		return []string{s}
	}
	var lines []string
	line := ""
	space := t.width(f, size, " ")
	used := 0.0
	for _, word := range strings.Fields(s) {
		w := t.width(f, size, word)
		if line != "" && used+space+w <= room {
			line, used = line+" "+word, used+space+w
			continue
		}
		if line != "" {
			lines = append(lines, line)
		}
		for w > room {
			n := t.fitting(f, size, word, room)
			lines, word = append(lines, word[:n]), word[n:]
			w = t.width(f, size, word)
		}
		line, used = word, w
	}
	return append(lines, line)
}

// fitting is how many bytes of a word fit, one sign at least.
func (t *typeface) fitting(f face, size float64, word string, room float64) int {
	sum := 0.0
	for i, r := range word {
		sum += t.widths[f][r] * size
		if sum > room && i > 0 {
			return i
		}
	}
	return len(word)
}
