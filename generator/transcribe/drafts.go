package transcribe

import (
	"regexp"
	"strings"

	"ohmfolio/generator/quantity"
)

// line is one key of a draft, live or kept as a comment.
type line struct {
	target *target
	key    string
	value  string // YAML
	cell   cell   // where it stands in the table
	doubt  string // why it is a comment, "" for a live key
	mend   string
	told   bool // the doubt is among the findings
}

// draft is one row on its way to a record.
type draft struct {
	id, head string
	source   string
	lines    []line
	rest     []line // cells of columns that are not understood
}

// written is the text of a draft and what stands on each of its lines.
type written struct {
	text  []byte
	lines map[int]*line
}

// write writes the draft as YAML.
func (d *draft) write() written {
	w := written{lines: map[int]*line{}}
	var b strings.Builder
	n := 1
	put := func(text string, l *line) {
		b.WriteString(text + "\n")
		if l != nil {
			w.lines[n] = l
		}
		n++
	}
	put(d.head, nil)
	for _, group := range []string{"", "designations", "properties"} {
		opened := group == ""
		for i := range d.lines {
			l := &d.lines[i]
			if l.target.group != group {
				continue
			}
			if !opened && l.doubt == "" {
				put(group+":", nil)
				opened = true
			}
			put(l.yaml(d.source), l)
		}
	}
	for i := range d.rest {
		put(d.rest[i].yaml(""), nil)
	}
	w.text = []byte(b.String())
	return w
}

// yaml is the line as it is written.
func (l *line) yaml(source string) string {
	switch {
	case l.doubt != "":
		return "# " + l.key + ": " + l.cell.text + "   (" + l.doubt + ")"
	case l.target == nil:
		return "# " + l.key + ": " + l.cell.text
	case l.target.group == "properties":
		return "  " + l.key + ": {value: " + yamlText(l.value) + ", source: " + yamlText(source) + "}"
	case l.target.group != "":
		return "  " + l.key + ": " + yamlText(l.value)
	case l.key == "source":
		return "source: " + l.value
	}
	return l.key + ": " + yamlText(l.value)
}

// suspect makes comments of what the check found in error: of the line itself,
// else of the coefficients, then of every number of the data set, then of
// everything but the name. It tells whether anything was left to do.
func (d *draft) suspect(l *line, doubt, mend string) bool {
	if l != nil && l.loose() {
		l.doubt, l.mend = doubt, mend
		return true
	}
	for _, wide := range []func(*line) bool{
		func(l *line) bool { return l.key == "alpha" || l.key == "beta" || l.key == "gamma" },
		func(l *line) bool { return l.target.numeric() && l.target.group == "" },
		func(*line) bool { return true },
	} {
		done := false
		for i := range d.lines {
			if l := &d.lines[i]; l.loose() && wide(l) {
				l.doubt, l.mend, done = doubt, mend, true
			}
		}
		if done {
			return true
		}
	}
	return false
}

// loose tells whether the draft may do without a live line.
func (l *line) loose() bool { return l.doubt == "" && l.key != "name" && l.key != "source" }

// one keeps a single resistivity or conductivity.
func (d *draft) one() {
	var resistivity *line
	for i := range d.lines {
		l := &d.lines[i]
		if l.doubt == "" && (l.key == "resistivity" || l.key == "conductivity") {
			if resistivity != nil && resistivity.key == l.key {
				l.doubt, l.mend = "the row tells it twice", "keep one"
			} else if resistivity != nil {
				l.doubt, l.mend = bothTold(resistivity.value, l.value), "keep the one that the source prints"
			} else {
				resistivity = l
			}
		}
	}
}

// numberKey is the key of a number: a column of resistivities may hold a
// conductivity and the other way round.
func numberKey(t *target, k quantity.Kind) string {
	switch {
	case t.key == "resistivity" && k == quantity.Conductivity:
		return "conductivity"
	case t.key == "conductivity" && k == quantity.Resistivity:
		return "resistivity"
	}
	return t.key
}

// plainText is what YAML reads as text without quotes, in flow style too.
var plainText = regexp.MustCompile(`^[A-Za-zÀ-ÖØ-öø-ÿ0-9+-][A-Za-zÀ-ÖØ-öø-ÿ0-9 ./%()°µΩ·²³⁻¹±+-]*$`)

// readOtherwise are words that YAML or its readers take for something else.
var readOtherwise = regexp.MustCompile(`^([-+.0-9_xob:eEt]+|[0-9-]+|(?i:yes|no|on|off|true|false|null|y|n|nan|inf)|[-+] .*|-)$`)

// yamlText quotes a text for YAML where it must be.
func yamlText(s string) string {
	if plainText.MatchString(s) && !readOtherwise.MatchString(s) && !strings.HasSuffix(s, " ") && !strings.HasPrefix(s, "- ") && !strings.HasPrefix(s, "---") {
		return s
	}
	return `"` + strings.NewReplacer(`\`, `\\`, `"`, `\"`).Replace(s) + `"`
}
