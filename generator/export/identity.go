package export

import (
	"bytes"
	"strconv"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
	"ohmfolio/generator/study"
)

// fact is one line of what a file is about.
type fact struct{ name, text string }

// identity says what the numbers of a file are and whether they may be used:
// it stands at the head of every file that leaves for another program.
func identity(lib *library.Library, r *material.Record, set *material.DataSet) []fact {
	list := []fact{
		{"material", r.ID + ", " + r.Name},
		{"condition", notStated(set.Condition)},
		{"state", stateText(r)},
		{"revision", strconv.Itoa(r.Revision)},
		{"fingerprint", r.Fingerprint},
		{"data set", set.Name},
		{"reference temperature", degrees(set.RatioReference)},
		{"valid range", degrees(set.Valid.Lo) + " to " + degrees(set.Valid.Hi)},
		{"class", notStated(string(set.Class))},
		{"basis", notStated(string(set.Basis))},
		{"source", set.Source.ID + ", checked against: " + notStated(string(lib.CheckedOf(set.Source)))},
		{"tolerance", toleranceText(set)},
	}
	if r.NotFor != "" {
		list = append(list, fact{"not for", r.NotFor})
	}
	for _, c := range set.Caveats {
		list = append(list, fact{"note", c})
	}
	for _, c := range study.SheetCautions() {
		list = append(list, fact{"caution", c})
	}
	return list
}

// toleranceText: these files carry the nominal curve alone.
func toleranceText(set *material.DataSet) string {
	switch {
	case set.Ratio != nil && set.Ratio.Limits != nil:
		return "nominal curve only; its limits stand on the material's sheet"
	case set.Ratio != nil && set.Ratio.Uncertainty != nil:
		return "nominal curve only; its uncertainty stands on the material's sheet"
	}
	return "nominal curve only; neither limits nor an uncertainty of the curve are stated"
}

func stateText(r *material.Record) string {
	text := string(r.Status)
	switch r.Status {
	case material.Draft, "":
		text = "draft, not for use"
	case material.InReview:
		text = "in review, not for use"
	case material.Withdrawn:
		text = "withdrawn, not for use"
		if r.ReplacedBy != "" {
			text += "; replaced by " + r.ReplacedBy
		}
	}
	if r.Invented {
		text += "; invented data of an example, not for use"
	}
	return text
}

// degrees prints a temperature in kelvin as "-40 degC", to a thousandth.
func degrees(kelvin float64) string { return plain(quantity.CelsiusText(kelvin)) }

// writeComments writes facts as lines of comment.
func writeComments(w *bytes.Buffer, prefix string, facts []fact, clean func(string) string) {
	for _, f := range facts {
		w.WriteString(prefix)
		w.WriteString(f.name)
		w.WriteString(": ")
		w.WriteString(clean(f.text))
		w.WriteByte('\n')
	}
}
