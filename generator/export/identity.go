package export

import (
	"strconv"
	"strings"
	"unicode"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// outsideWords stand in every file that another program reads.
const outsideWords = "outside the valid range: no value, do not use"

// identity is what every file for another program begins with: what the
// numbers are of, how they were come by, and how far they hold.
func identity(lib *library.Library, r *material.Record, set *material.DataSet) [][2]string {
	checked := string(lib.CheckedOf(set.Source))
	if checked == "" {
		checked = "not stated"
	}
	status := string(r.Status)
	if r.Status != material.Released {
		status += ", not for use"
	}
	list := [][2]string{
		{"material", r.Name + " (" + r.ID + ")"},
		{"condition", notStated(set.Condition)},
		{"data set", set.Name + ", " + string(set.Model) + ", basis " + notStated(string(set.Basis)) + ", class " + notStated(string(set.Class))},
		{"source", set.Source.ID + ", checked against " + checked},
		{"revision", strconv.Itoa(r.Revision) + ", fingerprint " + r.Fingerprint + ", " + status},
		{"valid range", quantity.CelsiusText(set.Valid.Lo) + " to " + quantity.CelsiusText(set.Valid.Hi) + "; " + outsideWords},
	}
	if r.Invented {
		list = append(list, [2]string{"note", "invented data of the example, not for use"})
	}
	for _, c := range set.Caveats {
		list = append(list, [2]string{"note", c})
	}
	return append(list, [2]string{"caution", "a calculation from recorded values, not an approval; verify by test, and never the only means of a protective function"})
}

// asciiWords are the signs of this trade in the plain characters that
// simulators and compilers read.
var asciiWords = strings.NewReplacer("°C", "degC", "°", "deg", "µ", "u", "μ", "u", "Ω", "ohm", "Ω", "ohm", "·", "*", "²", "2", "³", "3", "⁻¹", "-1", "−", "-", "–", "-", "±", "+/-",
	"α", "alpha", "β", "beta", "γ", "gamma", "ρ", "rho", "×", "x", "\u202f", " ", "\u2009", " ", "\u00a0", " ", "“", "\"", "”", "\"", "’", "'")

// plainASCII keeps a text on one line and in printable ASCII, so that it can
// neither end a comment nor begin a statement.
func plainASCII(s string) string {
	s = asciiWords.Replace(s)
	var b strings.Builder
	for _, c := range s {
		switch {
		case c == '\t' || c == '\n' || c == '\r' || unicode.IsSpace(c):
			b.WriteByte(' ')
		case c < 0x20 || c == 0x7f:
		case c > 0x7e:
			b.WriteByte('?')
		default:
			b.WriteRune(c)
		}
	}
	return strings.ReplaceAll(b.String(), "*/", "* /")
}

// symbol is an ID as a name in other languages.
func symbol(id string) string { return strings.ReplaceAll(id, "-", "_") }

// safeCell keeps a text from being taken for a formula by a spreadsheet.
func safeCell(s string) string {
	if s != "" && strings.ContainsRune("=+-@\t\r", rune(s[0])) {
		return "'" + s
	}
	return s
}

func celsius(k float64) string { return number(k - quantity.ZeroCelsius) }
