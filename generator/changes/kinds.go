package changes

import (
	"errors"

	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
)

// Kinds documents what reading the editions of a reference may find.
var Kinds = []place.Kind{
	{Code: "edition-unreadable", Severity: place.Error, Title: "An edition cannot be read",
		Explanation: "An edition is a frozen statement: it is written once and never edited. One that is damaged, or of a newer format, could tell a wrong history.",
		Trigger:     "-- materials/editions/2026-06.json --\n{\"format\":1,\"edition\":\"2026-06\"}\n",
		Mend:        "take the file from version control again, or use the newer program that wrote it"},
	{Code: "edition-misnamed", Severity: place.Error, Title: "An edition's file has another name than the edition",
		Explanation: "The name of the file is the name of the edition, small letters, digits and hyphens; it is how people cite it.",
		Trigger:     "-- materials/editions/Mid 2026.json --\n{\"format\":1,\"edition\":\"2026-06\"}\n",
		Mend:        "give the file its old name again"},
	unraisedKind,
}

// Examine finds what is wrong with the editions of a reference, and with its
// records when they are held against the newest one.
func Examine(lib *library.Library) []place.Finding {
	editions, findings := Editions(lib)
	if n := len(editions); n > 0 {
		findings = append(findings, Unraised(lib, editions[n-1])...)
	}
	return findings
}

// Editions opens the editions of a reference in the order of their names.
func Editions(lib *library.Library) ([]*Statement, []place.Finding) {
	var list []*Statement
	var findings []place.Finding
	for _, f := range lib.Editions {
		s, err := edition(f)
		if err == nil {
			list = append(list, s)
			continue
		}
		code, mend := "edition-unreadable", Kinds[0].Mend
		if errors.Is(err, errMisnamed) {
			code, mend = "edition-misnamed", Kinds[1].Mend
		}
		findings = append(findings, place.Finding{Code: code, Severity: place.Error, Position: place.Position{File: f.File}, Message: err.Error(), Mend: mend})
	}
	return list, findings
}

var errMisnamed = errors.New("the file has another name than the edition in it")

func edition(f library.EditionFile) (*Statement, error) {
	if !PlainName(f.Name) {
		return nil, errMisnamed
	}
	s, err := Open(f.Text)
	if err == nil && s.Edition != f.Name {
		err = errMisnamed
	}
	return s, err
}
