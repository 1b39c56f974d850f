package site

import (
	"bytes"
	"html"
	"html/template"
	"path"
	"strconv"
	"strings"

	"ohmfolio/generator/library"
	"ohmfolio/generator/output"
	"ohmfolio/generator/statement"
	"ohmfolio/generator/study"
	"ohmfolio/generator/words"
)

// documentPage is what report-page.tmpl and guide-page.tmpl print.
type documentPage struct {
	frame
	Heading  string
	Contents []contentsItem
	Body     template.HTML
	Asked    []liveNote // what the live numbers ask, for paper
	Cautions cautionList
}

// liveNote is one live number as a note under a printed page.
type liveNote struct{ Mark, Text string }

func (s *site) document(d *library.Document) output.Output {
	name := "guide-page"
	if d.Room == "reports" {
		name = "report-page"
	}
	return s.page(pagePath(d), name, func() any {
		here := ""
		if pagePath(d) == s.howToRead() {
			here = pagePath(d)
		}
		p := documentPage{frame: s.frame(d.Page.Title, "document", "../", here), Heading: d.Page.Title, Body: s.body(d, "../"), Asked: s.liveNotes(d)}
		for _, h := range d.Page.Headings {
			if h.Level == 2 {
				p.Contents = append(p.Contents, contentsItem{h.ID, h.Text})
			}
		}
		p.Cautions = cautionList{"cautions", s.cautionsOf(d)}
		return p
	})
}

// cautionsOf joins the cautions of a document's studies, each once.
func (s *site) cautionsOf(d *library.Document) []string {
	var list []string
	seen := map[string]bool{}
	for _, o := range s.outcomes(d) {
		for _, c := range o.Cautions {
			if !seen[c] {
				seen[c] = true
				list = append(list, c)
			}
		}
	}
	return list
}

func (s *site) outcomes(d *library.Document) []*study.Outcome {
	return s.in.Outcomes[strings.TrimPrefix(d.Room+"/"+d.Stem, "/")]
}

// body renders a document's words with the results of its studies, the
// current values of its live numbers, and its links turned into pages.
func (s *site) body(d *library.Document, root string) template.HTML {
	outcomes := s.outcomes(d)
	var b bytes.Buffer
	err := d.Page.HTML(&b, words.Fill{
		Study: func(i int, w *bytes.Buffer) {
			if i < len(outcomes) {
				s.studyPart(w, outcomes[i], d, i, root)
			}
		},
		Number: func(i int) string {
			return s.liveNumber(d.Page.Numbers[i], root) + `<sup class="mark">` + strconv.Itoa(i+1) + "</sup>"
		},
		Link: func(_ int, target string) string { return pageTarget(d, target, root) },
	})
	if err != nil {
		return template.HTML("<p>" + html.EscapeString(err.Error()) + "</p>")
	}
	return template.HTML(b.String()) // words escapes every text
}

// liveNotes tell on paper what a screen shows in the title of a live number:
// the question, the value with its band, and the record.
func (s *site) liveNotes(d *library.Document) []liveNote {
	var list []liveNote
	for i, n := range d.Page.Numbers {
		id := statement.TargetID(n.Target)
		text, note, ok := s.in.Answer(n.Question, n.Written, id)
		if !ok {
			continue
		}
		line := s.short(id) + ", " + n.Question + ": " + text
		if note != "" {
			line += "; " + note
		}
		if r := s.in.Library.Material(id); r != nil {
			line += " (revision " + strconv.Itoa(r.Revision) + ", " + r.Fingerprint + ")"
		}
		list = append(list, liveNote{strconv.Itoa(i + 1), line})
	}
	return list
}

func (s *site) liveNumber(n words.LiveNumber, root string) string {
	id := statement.TargetID(n.Target)
	text, note, ok := s.in.Answer(n.Question, n.Written, id)
	if !ok {
		return html.EscapeString(n.Written)
	}
	title := n.Question
	if note != "" {
		title += "; " + note
	}
	return `<a class="live" href="` + root + "material/" + html.EscapeString(id) + `.html" title="` + html.EscapeString(title) + `">` + html.EscapeString(text) + "</a>"
}

// pageTarget turns a link to a Markdown file or a record into one to its
// page; other links stay as they are.
func pageTarget(d *library.Document, target, root string) string {
	file, anchor, has := strings.Cut(target, "#")
	if has {
		anchor = "#" + anchor
	}
	if file == "" || strings.Contains(file, ":") {
		return target
	}
	full := path.Join("content", d.Room, file)
	stem := strings.TrimSuffix(path.Base(full), path.Ext(full))
	switch {
	case full == "content/home.md":
		return root + "index.html" + anchor
	case full == "materials/sources.yaml":
		return root + "sources.html" + anchor
	case strings.HasPrefix(full, "materials/"):
		return root + "material/" + stem + ".html" + anchor
	case strings.HasPrefix(full, "content/guides/"):
		return root + "guide/" + stem + ".html" + anchor
	case strings.HasPrefix(full, "content/reports/"):
		return root + "report/" + stem + ".html" + anchor
	}
	return target
}

// usedBy finds the documents that rest on each material.
func usedBy(in *Input) map[string][]statement.Use {
	used := map[string][]statement.Use{}
	for _, d := range in.Library.Documents {
		add := func(id, what string) {
			if r := in.Library.Material(id); r != nil {
				id = r.ID
			}
			for _, u := range used[id] {
				if u.Path == pagePath(d) {
					return
				}
			}
			used[id] = append(used[id], statement.Use{Title: d.Page.Title, Path: pagePath(d), What: what})
		}
		for _, o := range in.Outcomes[strings.TrimPrefix(d.Room+"/"+d.Stem, "/")] {
			for _, m := range o.Materials {
				what := "compared"
				if m.Verdict != study.NotAsked {
					what = m.Verdict.Shown()
				}
				if m.Material != "" {
					add(m.Material, what)
					continue
				}
				for _, e := range m.Evidence { // an answer about several
					add(e.Record, what)
				}
			}
		}
		for _, n := range d.Page.Numbers {
			add(statement.TargetID(n.Target), "quoted")
		}
	}
	return used
}
