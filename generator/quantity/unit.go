package quantity

import (
	"strings"

	"ohmfolio/generator/place"
)

// Unit is one unit of a kind: SI = (x + offset)·factor.
type Unit struct {
	Symbol string // typographic, "µΩ·cm"; "" for a plain ratio
	ASCII  string // "uohm cm"
	UCUM   string // code of the Unified Code for Units of Measure, "" when it has none
	Kind   Kind

	factor float64
	offset float64
}

// ToSI converts a number in u to SI.
func (u Unit) ToSI(x float64) float64 { return (x + u.offset) * u.factor }

// FromSI converts an SI number to u.
func (u Unit) FromSI(x float64) float64 { return x/u.factor - u.offset }

// difference converts a difference in u to SI: the offset falls away.
func (u Unit) difference(x float64) float64 { return x * u.factor }

// FindUnit finds a unit of kind k by any spelling that people use: both code
// points of µ and of Ω, ASCII, · * . or a space as product.
func FindUnit(k Kind, spelled string) (Unit, bool) {
	u, ok := bySpelling[k][spelled]
	if !ok {
		u, ok = bySpelling[k][normalise(spelled)]
	}
	return u, ok
}

// Units returns the units of kind k in the order of the table, usual first.
func Units(k Kind) []Unit {
	for _, g := range table {
		if g.kind == k {
			list := make([]Unit, len(g.rows))
			for i, r := range g.rows {
				list[i] = r.unit(g.kind)
			}
			return list
		}
	}
	return nil
}

// KindsOf lists the kinds that a spelling is a unit of, for messages that say
// "Ω/m is a resistance per length".
func KindsOf(spelled string) []Kind {
	var list []Kind
	for _, g := range table {
		if _, ok := FindUnit(g.kind, spelled); ok {
			list = append(list, g.kind)
		}
	}
	return list
}

// NearUnit tells what a spelling that is no unit of k was probably meant for:
// the near unit of k for a typo, or the name of the kind that it is a unit of;
// "" when neither is found. For a unit that is missing, "", it gives the usual
// units of k.
func NearUnit(k Kind, spelled string) string {
	if spelled == "" {
		return usual(k)
	}
	if _, ok := FindUnit(k, spelled); ok {
		return spelled
	}
	if kinds := KindsOf(spelled); len(kinds) > 0 {
		return string(kinds[0])
	}
	symbols := map[string]string{}
	var known []string
	for _, u := range Units(k) {
		for _, s := range []string{u.Symbol, u.ASCII} {
			folded := normalise(s)
			known, symbols[folded] = append(known, folded), u.Symbol
		}
	}
	return symbols[place.Near(normalise(spelled), known)]
}

// usual gives the first units of a kind, for messages.
func usual(k Kind) string {
	var list []string
	for _, u := range Units(k) {
		if len(list) < 3 && u.Symbol != "" {
			list = append(list, u.Symbol)
		}
	}
	return strings.Join(list, ", ")
}

// bySpelling holds every normalised spelling of every unit.
var bySpelling = buildSpellings()

func buildSpellings() map[Kind]map[string]Unit {
	all := map[Kind]map[string]Unit{}
	for _, g := range table {
		m := map[string]Unit{}
		for _, r := range g.rows {
			u := r.unit(g.kind)
			for _, s := range r.spellings(g.kind) {
				if s != "" || r.symbol == "" {
					m[s], m[normalise(s)] = u, u
				}
			}
		}
		all[g.kind] = m
	}
	return all
}

// spellings are all the ways to write a row. The code of Ω per square is that
// of Ω alone, which is no sheet resistance to a reader.
func (r row) spellings(k Kind) []string {
	list := append([]string{r.symbol, r.ascii}, strings.Split(r.also, "|")...)
	if k == SheetResistance || r.ucum == "" {
		return list
	}
	return append(list, r.ucum)
}

// replacer folds the spellings of one thing into one.
var replacer = strings.NewReplacer(folds...)

// folds are the pairs of replacer; the browser's reader gets them too.
var folds = []string{
	"\u00b5", "u", "\u03bc", "u", "\u03a9", "ohm", "\u2126", "ohm", // µ and Ω, two code points each
	"\u00b0", "deg", "\u00ba", "deg", "\u02da", "deg", "℃", "degC", "℉", "degF", // °, º and ˚
	"□", "sq", "◻", "sq", "\u0394", "delta", "\u2206", "delta", // Δ, two code points
	"·", "*", "⋅", "*", "×", "*", ".", "*", "²", "^2", "³", "^3", "⁴", "^4", "⁻¹", "^-1", "⁻²", "^-2", "⁻³", "^-3", "⁻⁴", "^-4", "⁻⁸", "^-8", "⁻⁶", "^-6",
	" ", "", "\t", "", "\u00a0", "", "\u202f", "", "\u2009", "", "**", "^", "−", "-", "ohms", "ohm", "Ohm", "ohm", "OHM", "ohm",
}

// normalise folds a spelling: ASCII letters, * as product, ^ as power, no
// blanks; a product sign between letters is dropped, so that "uohm cm",
// "uohm*cm" and "µΩ·cm" are one.
func normalise(s string) string {
	s = replacer.Replace(s)
	s = strings.ReplaceAll(s, "*", "")
	for _, p := range lastFolds {
		s = strings.ReplaceAll(s, p[0], p[1])
	}
	return s
}

// lastFolds are made one after the other, after folds.
var lastFolds = [][2]string{{"^2", "2"}, {"^3", "3"}, {"^4", "4"}, {"deltadeg", "delta"}, {"degK", "K"}}
