package site

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"html/template"
	"io/fs"
	"path"
	"strings"

	"ohmfolio/generator/figure"
	"ohmfolio/generator/output"
)

// look is the theme, ready to use: templates compiled once, style and scripts
// under names that carry their hash.
type look struct {
	templates *template.Template
	style     string
	mark      string
	scripts   map[string]string // "tables.js" → "tables.1f2e….js"
	files     []output.Output
}

var templateNames = []string{"frame", "home-page", "materials-page", "material-page", "sheet-page", "report-page", "guide-page",
	"sources-page", "words-page", "decisions-page", "review-page", "side-by-side-page", "editions-page", "changes-page", "study-part", "study-page", "check-page"}

func loadLook(theme fs.FS, list, copies []byte) (*look, error) {
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
	mark, err := fs.ReadFile(theme, "mark.svg")
	if err != nil {
		return nil, err
	}
	l.mark = l.add("mark.svg", mark)
	for _, name := range []string{"tables.js", "evaluate.js", "materials.js", "review.js", "beside.js", "check.js"} {
		text, err := fs.ReadFile(theme, name)
		if err != nil {
			return nil, err
		}
		l.scripts[name] = l.add(name, text)
	}
	l.scripts["list.js"] = l.add("data/list.js", list)
	l.scripts["check-data.js"] = l.add("data/check.js", copies)
	return l, nil
}

func joined(theme fs.FS, names ...string) ([]byte, error) {
	var b bytes.Buffer
	for _, name := range names {
		text, err := fs.ReadFile(theme, name)
		if err != nil {
			return nil, err
		}
		b.Write(text)
	}
	return b.Bytes(), nil
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
