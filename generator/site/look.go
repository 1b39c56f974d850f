package site

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"html/template"
	"io/fs"
	"maps"
	"path"
	"regexp"
	"slices"
	"strings"

	"ohmfolio/generator/figure"
	"ohmfolio/generator/output"
	"ohmfolio/generator/quantity"
)

// look is the theme, ready to use: templates compiled once, style and scripts
// under names that carry their hash.
type look struct {
	templates *template.Template
	style     string
	pages     string // style of what material pages do not need
	mark      string
	scripts   map[string]string // "tables.js" → "tables.1f2e….js"
	files     []output.Output
}

var templateNames = []string{"frame", "home-page", "materials-page", "material-page", "sheet-page", "report-page", "guide-page",
	"sources-page", "words-page", "decisions-page", "review-page", "side-by-side-page", "first-shunt-page", "editions-page", "changes-page", "study-part", "study-page", "check-page"}

// scripts are the files of the look that pages load. Several sources in one
// file are loaded together; the name of a file that the program writes stands
// among them by its own name, "unit-table".
var scripts = []struct {
	name    string
	sources []string
}{
	{"begin.js", []string{"begin.js"}},
	{"tables.js", []string{"tables.js"}},
	{"evaluate.js", []string{"evaluate.js"}},
	{"materials.js", []string{"materials.js"}},
	{"review.js", []string{"review.js"}},
	{"check.js", []string{"check.js"}},
	{"reading.js", []string{unitTable, "quantity.js", "numbers.js", "preference.js", "parts.js"}},
	{"prefer.js", []string{"prefer.js"}},
	{"find.js", []string{"find.js"}},
	{"ask.js", []string{"evaluate.js", "value.js", "piece.js", "delivery.js", "crosshair.js"}},
	{"beside.js", []string{"evaluate.js", "drawing.js", "shortening.js", "measures.js", "supplier.js", "address.js", "copies.js", "beside.js"}},
	{"first-shunt.js", []string{"evaluate.js", "first-shunt.js"}},
}

// unitTable is the script that the program writes from its own units.
const unitTable = "unit-table"

// loadLook takes the theme and the data scripts by name.
func loadLook(theme fs.FS, data map[string]func() []byte, live bool) (*look, error) {
	l := &look{scripts: map[string]string{}, templates: template.New("").Funcs(helpers)}
	for _, name := range templateNames {
		text, err := fs.ReadFile(theme, name+".tmpl")
		if err != nil {
			return nil, fmt.Errorf("the theme has no %s.tmpl: %w", name, err)
		}
		if _, err := l.templates.New(name).Parse(string(text)); err != nil {
			return nil, fmt.Errorf("themes/%s.tmpl: %w", name, err)
		}
	}
	style, err := joined(theme, "style.css", "figure.css")
	if err != nil {
		return nil, err
	}
	l.style = l.add("style.css", style)
	pages, err := joined(theme, "pages.css")
	if err != nil {
		return nil, err
	}
	l.pages = l.add("pages.css", pages)
	mark, err := fs.ReadFile(theme, "mark.svg")
	if err != nil {
		return nil, err
	}
	l.mark = l.add("mark.svg", mark)
	units, err := quantity.Script()
	if err != nil {
		return nil, err
	}
	for _, file := range scripts {
		text, err := assembled(theme, file.sources, units)
		if err != nil {
			return nil, err
		}
		l.scripts[file.name] = l.add(file.name, text)
	}
	for _, name := range slices.Sorted(maps.Keys(data)) {
		if live {
			l.scripts[name] = l.later("data/"+name, data[name])
			continue
		}
		l.scripts[name] = l.add("data/"+name, data[name]())
	}
	return l, nil
}

// assembled joins the sources of one script.
func assembled(theme fs.FS, sources []string, units []byte) ([]byte, error) {
	var b bytes.Buffer
	for _, name := range sources {
		if name == unitTable {
			b.WriteString("\"use strict\";\nvar unitTable = ")
			b.Write(units)
			b.WriteString(";\n")
			continue
		}
		text, err := fs.ReadFile(theme, name)
		if err != nil {
			return nil, err
		}
		b.Write(slim(text))
	}
	return b.Bytes(), nil
}

// slim leaves out what only a reader of the source needs: lines that are
// nothing but a comment, and indentation. No source of a theme may begin a
// line of a text with two slashes.
func slim(text []byte) []byte {
	var b bytes.Buffer
	for line := range bytes.Lines(text) {
		line = bytes.TrimLeft(line, " \t")
		if !bytes.HasPrefix(line, []byte("//")) && len(bytes.TrimSpace(line)) > 0 {
			b.Write(line)
		}
	}
	return b.Bytes()
}

func joined(theme fs.FS, names ...string) ([]byte, error) {
	var b bytes.Buffer
	for _, name := range names {
		text, err := fs.ReadFile(theme, name)
		if err != nil {
			return nil, err
		}
		b.Write(squeezed(text))
	}
	return b.Bytes(), nil
}

var (
	styleComment = regexp.MustCompile(`(?s)/\*.*?\*/`)
	styleColon   = regexp.MustCompile(`([{;][a-z0-9-]+): `)
	styleBlank   = regexp.MustCompile(`\s*([{};,]|\n)\s*`)
)

// squeezed leaves out of a style sheet what only a reader of the source needs:
// comments, and blanks beside braces, semicolons, commas and colons. No text in a
// style sheet of a theme may hold one of these.
func squeezed(text []byte) []byte {
	text = styleComment.ReplaceAll(text, nil)
	text = styleBlank.ReplaceAll(text, []byte("$1"))
	return append(bytes.TrimSpace(styleColon.ReplaceAll(text, []byte("$1:"))), '\n')
}

// add keeps a file under a name with the hash of its content, so that a page
// never meets a style or script of another publication.
func (l *look) add(name string, text []byte) string {
	sum := sha256.Sum256(text)
	ending := path.Ext(name)
	hashed := strings.TrimSuffix(name, ending) + "." + hex.EncodeToString(sum[:4]) + ending
	l.files = append(l.files, output.Output{Path: hashed, Write: func(w *bytes.Buffer) error { w.Write(text); return nil }})
	return hashed
}

// later keeps a file under its plain name and makes it when somebody asks: the
// live view shows one page, and need not list the whole reference for it.
func (l *look) later(name string, text func() []byte) string {
	l.files = append(l.files, output.Output{Path: name, Write: func(w *bytes.Buffer) error { w.Write(text()); return nil }})
	return name
}

func (l *look) outputs() []output.Output { return l.files }

// helpers are the functions that templates may call.
var helpers = template.FuncMap{
	"grid":       gridHTML,
	"properties": propertiesHTML,
	"sets":       setsHTML,
	"figure":     figureHTML,
	"labelled":   func(label string, rows any) labelled { return labelled{label, rows} },
	"join":       func(list []string) string { return strings.Join(list, ", ") },
}

// labelled hands rows with their caption to a part of a template.
type labelled struct {
	Label string
	Rows  any
}

func figureHTML(f *figure.Figure) (template.HTML, error) {
	var b bytes.Buffer
	if err := f.SVG(&b); err != nil {
		return "", err
	}
	return template.HTML(b.String()), nil // every text in it is escaped by the renderer
}
