package site

import (
	"bytes"
	"encoding/json"

	"ohmfolio/generator/changes"
	"ohmfolio/generator/copycheck"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
)

// copies is what the check page knows of every material.
type copies struct {
	Materials map[string]stateNow `json:"materials"`
	Formerly  map[string]string   `json:"formerly"`
}

type stateNow struct {
	Name        string      `json:"name"`
	Revision    int         `json:"revision"`
	Fingerprint string      `json:"fingerprint"`
	Status      string      `json:"status"`
	Replaced    string      `json:"replaced,omitempty"`
	Reason      string      `json:"reason,omitempty"`
	Past        []statePast `json:"past"` // newest first
}

// statePast is a statement of an edition and what followed it changed.
type statePast struct {
	Revision    int      `json:"revision"`
	Fingerprint string   `json:"fingerprint"`
	Changed     []string `json:"changed"`
}

// checkScript is the data of the check page as a script.
func (s *site) checkScript() []byte {
	c := copies{Materials: map[string]stateNow{}, Formerly: map[string]string{}}
	for _, r := range s.in.Library.Materials {
		c.Materials[r.ID] = s.stateOf(r)
		for _, f := range r.Formerly {
			c.Formerly[f] = r.ID
		}
	}
	text, err := json.Marshal(c) // sorted keys; escapes <, > and &
	if err != nil {
		panic(err) // texts and whole numbers
	}
	var b bytes.Buffer
	b.WriteString("\"use strict\";\nvar copies = ")
	b.Write(text)
	b.WriteString(";\n")
	return b.Bytes()
}

func (s *site) stateOf(r *material.Record) stateNow {
	n := stateNow{Name: r.Name, Revision: r.Revision, Fingerprint: r.Fingerprint, Status: or(string(r.Status), string(material.Draft)),
		Replaced: r.ReplacedBy, Reason: r.WithdrawnReason, Past: []statePast{}}
	if s.in.History == nil || !s.in.HasEditions {
		return n
	}
	entries := s.in.History(r.ID)
	for i := 1; i < len(entries); i++ {
		n.Past = append(n.Past, statePast{entries[i].Revision, entries[i].Fingerprint, changedTexts(entries[i-1].Change)})
	}
	return n
}

// changedTexts says in a few lines what a change did to what a sheet states.
func changedTexts(c *changes.Change) []string {
	list := []string{}
	if c == nil {
		return list
	}
	list = append(list, c.Effects()...)
	for _, l := range stated(c) {
		text := l.Path + ": " + l.Old + " → " + l.New
		if l.Relative != "" {
			text += " (" + l.Relative + ")"
		}
		list = append(list, text)
	}
	return list
}

func (s *site) check() output.Output {
	return s.page("check.html", "check-page", func() any {
		return struct{ frame }{s.frame("Is this copy current?", "check", "", "", "check-data.js", "check.js")}
	})
}

// copyMark is what a printed sheet carries to be checked by.
type copyMark struct {
	Characters string
	Path       string // of the QR code; "" when the site's address is not known
	Size       int    // modules, quiet zone included
}

func (s *site) copyMark(r *material.Record) copyMark {
	m := copyMark{Characters: copycheck.Characters(r.ID, r.Revision, r.Fingerprint)}
	if address := copycheck.Address(s.in.Library.Settings.Address, m.Characters); address != "" {
		if code, err := copycheck.New(address); err == nil {
			m.Path, m.Size = code.Path(), code.Size+2*copycheck.Quiet
		}
	}
	return m
}
