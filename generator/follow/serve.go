package follow

import (
	"bytes"
	_ "embed"
	"encoding/json"
	"mime"
	"net/http"
	"path"
	"strconv"
	"strings"
	"time"
)

// What pages ask for under this path is the live view's own.
const own = "/.follow/"

//go:embed follow.js
var script []byte

//go:embed follow.css
var style []byte

// waitAtMost is how long a page waits for news before it asks again.
const waitAtMost = 25 * time.Second

// guard answers only what was asked of this machine by its own name: a page
// from elsewhere that has this address under another name gets nothing.
func (s *Server) guard(next http.Handler) http.Handler {
	return http.HandlerFunc(func(w http.ResponseWriter, r *http.Request) {
		w.Header().Set("Cache-Control", "no-store")
		w.Header().Set("X-Content-Type-Options", "nosniff")
		w.Header().Set("Cross-Origin-Resource-Policy", "same-origin")
		switch {
		case !s.hosts[strings.ToLower(r.Host)]:
			http.Error(w, "this view is for this machine; open "+s.Address(), http.StatusForbidden)
		case r.Method != http.MethodGet && r.Method != http.MethodHead:
			http.Error(w, "this view only shows", http.StatusMethodNotAllowed)
		default:
			next.ServeHTTP(w, r)
		}
	})
}

func (s *Server) routes() http.Handler {
	m := http.NewServeMux()
	m.HandleFunc(own+"follow.js", fixed("text/javascript; charset=utf-8", script))
	m.HandleFunc(own+"follow.css", fixed("text/css; charset=utf-8", style))
	m.HandleFunc(own+"news", s.news)
	m.HandleFunc("/", s.page)
	return m
}

func fixed(kind string, text []byte) http.HandlerFunc {
	return func(w http.ResponseWriter, _ *http.Request) {
		w.Header().Set("Content-Type", kind)
		w.Write(text)
	}
}

// news waits until there is a version after the one that the page has, and
// tells it with the findings.
func (s *Server) news(w http.ResponseWriter, r *http.Request) {
	has, _ := strconv.Atoi(r.URL.Query().Get("has"))
	timer := time.NewTimer(waitAtMost)
	defer timer.Stop()
	for waiting := true; waiting; {
		s.mu.Lock()
		version, changed := s.version, s.changed
		s.mu.Unlock()
		if version != has {
			break
		}
		select {
		case <-changed:
		case <-timer.C:
			waiting = false
		case <-r.Context().Done():
			return
		}
	}
	s.mu.Lock()
	answer := struct {
		Version  int       `json:"version"`
		Counts   string    `json:"counts"`
		Findings []Finding `json:"findings"`
	}{s.version, countText(s.view.Findings), s.view.Findings}
	text, err := json.Marshal(answer)
	s.mu.Unlock()
	if err != nil {
		http.Error(w, err.Error(), http.StatusInternalServerError)
		return
	}
	w.Header().Set("Content-Type", "application/json")
	w.Write(text)
}

// page renders what a path names; nothing is read from a disk here, so no path
// can leave the reference.
func (s *Server) page(w http.ResponseWriter, r *http.Request) {
	name := strings.TrimPrefix(path.Clean("/"+r.URL.Path), "/")
	if name == "" {
		name = "index.html"
	}
	o, ok := s.find(name)
	if !ok {
		w.Header().Set("Content-Type", "text/html; charset=utf-8")
		w.WriteHeader(http.StatusNotFound)
		w.Write(attach([]byte("<!doctype html>\n<html lang=\"en\"><head><meta charset=\"utf-8\"><title>Not there</title></head><body><main><h1>Not there</h1><p>The reference has no such page. It appears here as soon as it is saved.</p><p><a href=\"/\">Home</a></p></main></body></html>\n")))
		return
	}
	text, err := render(o)
	if err != nil {
		http.Error(w, err.Error(), http.StatusInternalServerError)
		return
	}
	kind := mime.TypeByExtension(path.Ext(name))
	if kind == "" {
		kind = "text/plain; charset=utf-8"
	}
	w.Header().Set("Content-Type", kind)
	if path.Ext(name) == ".html" {
		text = attach(text)
	}
	w.Write(text)
}

// attach puts the view's script and style into a page as it is served, and the
// permission to ask this server for news.
func attach(page []byte) []byte {
	page = bytes.Replace(page, []byte("default-src 'none';"), []byte("default-src 'none'; connect-src 'self';"), 1)
	return bytes.Replace(page, []byte("</head>"), []byte(`<link rel="stylesheet" href="`+own+`follow.css">`+"\n"+`<script src="`+own+`follow.js" defer></script>`+"\n</head>"), 1)
}
