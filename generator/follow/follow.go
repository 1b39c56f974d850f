// Package follow shows a reference while it is edited: it serves the same list
// of outputs from memory, on this machine alone, and shows each saved edit in
// the open page with the findings at its foot. It knows nothing of materials.
//
// Published pages carry no trace of it: script, style and the permission to
// ask the server are put into pages as they are served.
package follow

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"net"
	"net/http"
	"strconv"
	"sync"
	"time"

	"ohmfolio/generator/output"
)

// A View is the reference as it stands: every output by its path, and what was
// found, as text.
type View struct {
	Outputs  map[string]output.Output
	Findings []Finding
	// Judge tells the findings; it may take longer than building, and readers
	// see the page before. Views are judged one after another.
	Judge func() []Finding
}

// Finding is one finding for the strip at the foot.
type Finding struct {
	Severity string `json:"severity"`
	Place    string `json:"place"`
	Message  string `json:"message"`
	Mend     string `json:"mend"`
}

// Options of a live view.
type Options struct {
	Folder string
	Port   int // 0 takes our own
	// Build reads the reference again; changed are the files that changed below
	// Folder, nil for the first time and when nobody knows.
	Build func(changed map[string]bool) (*View, error)
	// Log gets one line for each thing worth saying.
	Log func(text string)
}

// ownPort is where the view is served, and portsTried how many above it are
// tried when it is taken.
const (
	ownPort    = 6411
	portsTried = 20
)

// Server is a running live view.
type Server struct {
	o        Options
	listener net.Listener
	http     *http.Server
	hosts    map[string]bool // Host headers that are ours

	judging sync.WaitGroup
	turn    sync.Mutex // of judging

	mu      sync.Mutex
	view    *View
	good    map[string]output.Output // outputs that were there once, for pages that an error took away
	version int
	failure string
	changed chan struct{} // closed when version grows
}

// Start listens and builds the first view.
func Start(o Options) (*Server, error) {
	s := &Server{o: o, good: map[string]output.Output{}, changed: make(chan struct{})}
	if err := s.listen(); err != nil {
		return nil, err
	}
	s.rebuild(nil)
	s.http = &http.Server{Handler: s.guard(s.routes()), ReadHeaderTimeout: 10 * time.Second}
	return s, nil
}

// listen takes our port, or the next free one.
func (s *Server) listen() error {
	first, tried := s.o.Port, 1
	if first == 0 {
		first, tried = ownPort, portsTried
	}
	var err error
	for port := first; port < first+tried; port++ {
		if s.listener, err = net.Listen("tcp4", "127.0.0.1:"+strconv.Itoa(port)); err == nil {
			s.hosts = map[string]bool{}
			for _, name := range []string{"127.0.0.1", "localhost"} {
				s.hosts[net.JoinHostPort(name, strconv.Itoa(s.port()))] = true
			}
			return nil
		}
	}
	return fmt.Errorf("no port from %d to %d is free on this machine: %w", first, first+tried-1, err)
}

func (s *Server) port() int { return s.listener.Addr().(*net.TCPAddr).Port }

// Address is where the view is.
func (s *Server) Address() string { return "http://127.0.0.1:" + strconv.Itoa(s.port()) + "/" }

// Serve serves and follows until the context ends; it leaves nothing behind.
func (s *Server) Serve(ctx context.Context) error {
	ctx, cancel := context.WithCancel(ctx)
	defer cancel()
	watched := make(chan error, 1)
	go func() { watched <- s.watch(ctx) }()
	served := make(chan error, 1)
	go func() { served <- s.http.Serve(s.listener) }()
	select {
	case <-ctx.Done():
	case err := <-served:
		return err
	case err := <-watched:
		if err != nil {
			s.http.Close()
			return err
		}
	}
	s.bump() // lets pages that wait go
	s.judging.Wait()
	stop, done := context.WithTimeout(context.Background(), 2*time.Second)
	defer done()
	if err := s.http.Shutdown(stop); err != nil {
		s.http.Close()
	}
	return nil
}

// rebuild builds the view again. A reference that cannot be read at all leaves
// the last view standing, and says why.
func (s *Server) rebuild(changed map[string]bool) {
	v, err := s.o.Build(changed)
	s.mu.Lock()
	if err != nil {
		s.failure = err.Error()
		if s.view == nil {
			s.view = &View{Outputs: map[string]output.Output{}}
		}
		s.view.Findings = []Finding{{Severity: "error", Message: s.failure}}
	} else {
		s.failure = ""
		if s.view != nil {
			v.Findings = s.view.Findings // until they have been judged again
		}
		s.view = v
		for path, o := range v.Outputs {
			s.good[path] = o
		}
	}
	s.mu.Unlock()
	s.bump()
	switch {
	case err != nil || v.Judge == nil:
		s.say()
	default:
		s.judging.Add(1)
		go s.judge(v)
	}
}

// judge fills in the findings of a view, unless a newer one stands already.
func (s *Server) judge(v *View) {
	defer s.judging.Done()
	s.turn.Lock()
	defer s.turn.Unlock()
	s.mu.Lock()
	old := s.view != v
	s.mu.Unlock()
	if old {
		return
	}
	findings := v.Judge()
	s.mu.Lock()
	if old = s.view != v || s.failure != ""; !old {
		v.Findings = findings
	}
	s.mu.Unlock()
	if !old {
		s.bump()
		s.say()
	}
}

func (s *Server) say() {
	if s.o.Log == nil {
		return
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.failure != "" {
		s.o.Log("error: " + s.failure)
		return
	}
	s.o.Log(countText(s.view.Findings))
}

func countText(list []Finding) string {
	n := map[string]int{}
	for _, f := range list {
		n[f.Severity]++
	}
	return fmt.Sprintf("%d errors, %d warnings, %d notes", n["error"], n["warning"], n["note"])
}

// bump tells every page that waits.
func (s *Server) bump() {
	s.mu.Lock()
	defer s.mu.Unlock()
	s.version++
	close(s.changed)
	s.changed = make(chan struct{})
}

// find gives the output of a path; an output that an error took away comes as
// it was last.
func (s *Server) find(path string) (output.Output, bool) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if o, ok := s.view.Outputs[path]; ok {
		return o, true
	}
	o, ok := s.good[path]
	return o, ok
}

// render writes one output when it is asked for.
func render(o output.Output) (text []byte, err error) {
	defer func() {
		if p := recover(); p != nil {
			err = errors.New(fmt.Sprint(p))
		}
	}()
	var b bytes.Buffer
	err = o.Write(&b)
	return b.Bytes(), err
}
