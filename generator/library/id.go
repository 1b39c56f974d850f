package library

import (
	"strings"

	"ohmfolio/generator/place"
)

const idMend = "use small letters, digits and hyphens, beginning with a letter or digit: cumn12ni.yaml"

// PlainID tells whether s is a plain ID: [a-z0-9][a-z0-9-]*, no word that the
// reference or Windows needs. Plain IDs cannot differ in case only.
func PlainID(s string) bool {
	if s == "" || s[0] == '-' || len(s) > 100 {
		return false
	}
	for _, c := range s {
		if (c < 'a' || c > 'z') && (c < '0' || c > '9') && c != '-' {
			return false
		}
	}
	return !reserved[s]
}

// reserved are the names of the reference's own files, and the device names
// of Windows, which no file there can have.
var reserved = func() map[string]bool {
	m := map[string]bool{"reference": true, "sources": true, "con": true, "prn": true, "aux": true, "nul": true}
	for _, d := range []string{"com", "lpt"} {
		for _, n := range "0123456789" {
			m[d+string(n)] = true
		}
	}
	return m
}()

func (l *loader) goodID(name string) bool {
	id := stem(name)
	if PlainID(id) {
		return true
	}
	message := "the file's name is not a plain ID"
	if reserved[strings.ToLower(id)] {
		message = "the name " + id + " is kept for other things"
	}
	l.add("id-not-plain", place.Error, name, message, idMend)
	return false
}
