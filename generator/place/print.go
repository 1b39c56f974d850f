package place

import (
	"fmt"
	"io"
	"strings"
)

// PrintOptions say how findings are printed.
type PrintOptions struct {
	Color bool // ANSI colour for the severity; the words carry the meaning
	Group bool // findings alike but for their place come once, with a count
}

// shownPlaces is how many further places a group names.
const shownPlaces = 3

// Print writes findings in our form: place, severity, message and code; the
// source line; a caret; how to mend it; the other place if there is one.
func Print(w io.Writer, findings []Finding, o PrintOptions) error {
	p := printer{w: w, color: o.Color}
	for _, g := range groups(findings, o.Group) {
		p.finding(g[0])
		p.rest(g[1:])
	}
	return p.err
}

// groups puts findings with the same code, severity and mend together when
// there are more than shownPlaces of them; order is that of the first.
func groups(findings []Finding, group bool) [][]Finding {
	type key struct {
		code, mend string
		severity   Severity
	}
	count := map[key]int{}
	for _, f := range findings {
		count[key{f.Code, f.Mend, f.Severity}]++
	}
	var list [][]Finding
	at := map[key]int{}
	for _, f := range findings {
		k := key{f.Code, f.Mend, f.Severity}
		if i, ok := at[k]; ok && group && count[k] > shownPlaces {
			list[i] = append(list[i], f)
			continue
		}
		at[k] = len(list)
		list = append(list, []Finding{f})
	}
	return list
}

type printer struct {
	w     io.Writer
	color bool
	err   error
}

func (p *printer) line(format string, args ...any) {
	if p.err == nil {
		_, p.err = fmt.Fprintf(p.w, format+"\n", args...)
	}
}

var colors = map[Severity]string{Error: "\x1b[31m", Warning: "\x1b[33m", Note: "\x1b[36m"}

func (p *printer) finding(f Finding) {
	severity := string(f.Severity)
	if p.color {
		severity = colors[f.Severity] + severity + "\x1b[0m"
	}
	where := ""
	if f.Position.File != "" {
		where = f.Position.String() + ": "
	}
	p.line("%s%s: %s [%s]", where, severity, f.Message, f.Code)
	if strings.TrimSpace(f.Line) != "" {
		p.line("    %s", f.Line)
		if f.Position.Column > 0 {
			p.line("    %s", caretLine(f.Line, f.Position))
		}
	}
	if f.Also != nil {
		p.line("    %s: %s", f.Also.Position, f.Also.Message)
	}
	if f.Mend != "" {
		p.line("    mend: %s", f.Mend)
	}
}

// rest names the places of findings like the one just printed.
func (p *printer) rest(more []Finding) {
	if len(more) == 0 {
		return
	}
	var places []string
	for i, f := range more {
		if i == shownPlaces {
			places = append(places, "…")
			break
		}
		places = append(places, f.Position.String())
	}
	p.line("    and %d more of this kind: %s", len(more), strings.Join(places, ", "))
}
