package export

import (
	"fmt"
	"strings"
)

// spellings are what stands for the letters and signs that a simulator's or a
// compiler's code page may spoil.
var spellings = map[rune]string{
	'°': "deg", '\u00b5': "u", '\u03bc': "u", 'Ω': "ohm", '\u2126': "ohm", '±': "+/-", '×': "x", '·': " ", '−': "-", '–': "-", '—': "-", '≤': "<=", '≥': ">=",
	'²': "2", '³': "3", '⁴': "4", '⁻': "-", '¹': "1", '…': "...", '\u00a0': " ", '\u202f': " ", '\u2009': " ",
	'α': "alpha", 'β': "beta", 'γ': "gamma", 'ρ': "rho", 'ε': "epsilon", 'Θ': "Theta", 'ä': "ae", 'ö': "oe", 'ü': "ue", 'Ä': "Ae", 'Ö': "Oe", 'Ü': "Ue",
	'ß': "ss", 'å': "a", 'Å': "A", 'é': "e", 'è': "e", 'ç': "c", 'ø': "o", 'Ø': "O", 'ñ': "n", '“': "\"", '”': "\"", '‘': "'", '’': "'",
}

// plain makes one line of printable ASCII of a text. Line ends and control
// characters become spaces: the rest of a name must not become a line of its
// own. A character without a spelling is named by its code point.
func plain(s string) string {
	if isPlain(s) {
		return s
	}
	var b strings.Builder
	for _, c := range s {
		switch {
		case c >= 0x20 && c < 0x7f:
			b.WriteRune(c)
		case spellings[c] != "":
			b.WriteString(spellings[c])
		case c < 0xa0 || c == '\u2028' || c == '\u2029':
			b.WriteByte(' ')
		default:
			fmt.Fprintf(&b, "<U+%04X>", c)
		}
	}
	return strings.Join(strings.Fields(b.String()), " ")
}

// isPlain tells whether s is as plain would leave it; most texts are.
func isPlain(s string) bool {
	last := byte(' ')
	for i := range len(s) {
		if s[i] < 0x20 || s[i] >= 0x7f || (s[i] == ' ' && last == ' ') {
			return false
		}
		last = s[i]
	}
	return s == "" || last != ' '
}

// inComment is plain text that cannot end a comment of C nor begin another.
func inComment(s string) string {
	return strings.ReplaceAll(strings.ReplaceAll(plain(s), "*/", "* /"), "/*", "/ *")
}

// inQuotes is plain text between quotes of C. Question marks are escaped, too:
// two of them and a third sign are something else to old compilers.
func inQuotes(s string) string { return `"` + quoting.Replace(plain(s)) + `"` }

var quoting = strings.NewReplacer(`\`, `\\`, `"`, `\"`, "?", `\?`)

// cell is a text as a cell of a CSV file. Spreadsheets run a cell that begins
// with one of these signs as a formula; an apostrophe in front makes it text
// (common practice).
func cell(s string) string {
	s = plain(s)
	if s != "" && strings.ContainsRune("=+-@|%", rune(s[0])) {
		return "'" + s
	}
	return s
}

// word is the ID of a material as a name in programs: letters, digits and
// underscores, beginning with a letter. IDs have no underscores, so that no two
// become one.
func word(id string) string { return "r_" + strings.ReplaceAll(id, "-", "_") }
