package study

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"strconv"
	"strings"
)

// These put an outcome into the words that pages and sheets share.

// ShortLabel names an answer where room is short: the material's short name,
// with its size.
func (m MaterialOutcome) ShortLabel() string {
	name := m.Name
	if m.Record != nil && m.Material != "" {
		name = m.Record.ShortName()
	}
	if m.Size != "" {
		name += ", " + m.Size
	}
	return name
}

// RankedAs finds the answer that a line of the ranking names.
func (o *Outcome) RankedAs(line string) (MaterialOutcome, bool) {
	for _, m := range o.Materials {
		if m.Ranked() == line {
			return m, true
		}
	}
	return MaterialOutcome{}, false
}

// Asked lists the requirements, each once.
func (o *Outcome) Asked() []string {
	var list []string
	for _, m := range o.Materials {
		for _, r := range m.Requirements {
			list = once(list, r.Text())
		}
	}
	return list
}

// Text is the requirement in words.
func (r Requirement) Text() string {
	name := inWords(r.Name)
	for _, sign := range []string{">", "<", "≥", "≤"} {
		if strings.HasPrefix(r.Bound, sign) {
			return name + " " + r.Bound
		}
	}
	if r.Unit == "" && r.Worst == nil {
		return name + " " + r.Bound
	}
	return name + " within " + r.Bound
}

func once(list []string, text string) []string {
	if containsText(list, text) {
		return list
	}
	return append(list, text)
}

// AnswerText counts the verdicts in words; without requirements there is
// nothing to judge.
func (o *Outcome) AnswerText() string {
	count := map[Verdict]int{}
	for _, m := range o.Materials {
		count[m.Verdict]++
	}
	var parts []string
	for _, v := range []Verdict{Holds, HoldsNominally, CannotBeTold, Fails} {
		if count[v] == 0 {
			continue
		}
		if len(o.Materials) == 1 {
			return v.Shown() + "."
		}
		parts = append(parts, v.Shown()+": "+strconv.Itoa(count[v]))
	}
	if len(parts) == 0 {
		return "Nothing is required; the numbers stand below."
	}
	return strings.Join(parts, "; ") + " of " + strconv.Itoa(len(o.Materials)) + "."
}

// Remark is a reason or a warning with whom it holds for.
type Remark struct {
	Text  string
	names []string
	all   int // answers of the study
}

// Who names them; all of several are just that.
func (r Remark) Who() string {
	if r.all > 1 && len(r.names) == r.all {
		return "all"
	}
	return strings.Join(r.names, "; ")
}

// Remarks are the reasons and warnings, each once with everybody it holds for.
// Reasons that stand in a table already are left out, and so are warnings of
// what was not chosen.
func (o *Outcome) Remarks() []Remark {
	var list []Remark
	add := func(text, name string) {
		for i := range list {
			if list[i].Text == text {
				list[i].names = append(list[i].names, name)
				return
			}
		}
		list = append(list, Remark{text, []string{name}, len(o.Materials)})
	}
	for _, m := range o.Materials {
		if !o.Listed {
			for _, r := range m.Reasons {
				add(r, m.ShortLabel())
			}
		}
		if !o.Listed || m.Verdict == Holds || m.Verdict == HoldsNominally {
			for _, w := range m.Warnings {
				add(w, m.ShortLabel())
			}
		}
	}
	return list
}

// EvidenceTexts name the records that the decision rests on, each once.
func (o *Outcome) EvidenceTexts() []string {
	var list []string
	for _, m := range o.Chosen() {
		for _, e := range m.Evidence {
			list = once(list, fmt.Sprintf("%s, data %s, revision %d, %s, %s, checked against %s", e.Record, e.Data, e.Revision, e.Fingerprint, e.Status, e.Checked))
		}
	}
	return list
}

// Print is a short hash over what the study was given and rests on, so that
// two printed copies of one study can be told apart.
func (o *Outcome) Print() string {
	h := sha256.New()
	fmt.Fprintln(h, o.Study, o.Title, o.Parameters)
	for _, m := range o.Materials {
		fmt.Fprintln(h, m.Material, m.Size, m.Verdict, m.Evidence)
		for _, r := range m.Requirements {
			fmt.Fprintln(h, r.Name, r.Bound)
		}
	}
	text := hex.EncodeToString(h.Sum(nil)[:4])
	return text[:4] + "-" + text[4:]
}

// SheetPath is where the sheet of a document's study is written, without its
// ending; i counts from 0.
func SheetPath(stem string, i int) string { return "study/" + stem + "-" + strconv.Itoa(i+1) }

// SheetNumber is its document number.
func SheetNumber(prefix, stem string, i int) string {
	return prefix + "-" + stem + "-" + strconv.Itoa(i+1)
}
