package command

import (
	"context"
	"fmt"
	"os"
	"os/exec"
	"os/signal"
	"path/filepath"
	"runtime"
	"strconv"
	"sync"
	"syscall"

	"github.com/spf13/cobra"

	"ohmfolio/generator/changes"
	"ohmfolio/generator/examine"
	"ohmfolio/generator/follow"
	"ohmfolio/generator/library"
	"ohmfolio/generator/output"
	"ohmfolio/generator/place"
	"ohmfolio/generator/site"
	"ohmfolio/generator/topics"
)

func (s *session) follow() *cobra.Command {
	var port int
	var browser bool
	c := &cobra.Command{
		Use: "follow", Short: "Show the site on this machine while it is edited",
		Long: `Serves the site from memory, on this machine alone, and shows each saved edit
in the open page, with the findings in a strip at its foot. Nothing is written.
It ends with Ctrl-C.`,
		Example: "  ohmfolio follow --browser",
		Args:    cobra.NoArgs,
		RunE:    func(_ *cobra.Command, _ []string) error { return s.runFollow(port, browser) },
	}
	c.Flags().IntVar(&port, "port", 0, "port on this machine; our own or the next free one when not given")
	c.Flags().BoolVar(&browser, "browser", false, "open the first page")
	return c
}

// following is the reference as the live view holds it between two saves.
type following struct {
	*session
	lib    *library.Library
	topics []topics.Topic

	mu       sync.Mutex
	findings []place.Finding // as they were judged last, for the page of review
}

func (s *session) runFollow(port int, browser bool) error {
	if port < 0 || port > 65535 {
		return fmt.Errorf("--port %d is no port: write 1 to 65535", port)
	}
	if _, err := s.load(); err != nil {
		return err
	}
	folder, err := filepath.Abs(s.folder)
	if err != nil {
		return err
	}
	f := &following{session: s, topics: allTopics()}
	v, err := follow.Start(follow.Options{Folder: folder, Port: port, Build: f.build,
		Log: func(text string) { fmt.Fprintln(s.err, text) }})
	if err != nil {
		return err
	}
	fmt.Fprintf(s.out, "following %s at %s; Ctrl-C ends it\n", filepath.ToSlash(s.folder), v.Address())
	if browser {
		open(v.Address())
	}
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	defer stop()
	return v.Serve(ctx)
}

// build reads what changed and lists the outputs anew; they are rendered when
// a page is asked for.
func (f *following) build(changed map[string]bool) (*follow.View, error) {
	o := library.Options{Editions: true, Keep: true}
	if changed != nil {
		o.Before, o.Changed = f.lib, changed
	}
	lib, err := f.loadWith(o)
	if err != nil {
		return nil, err
	}
	f.lib = lib
	outcomes, more := judged(lib)
	f.mu.Lock()
	findings := f.findings
	f.mu.Unlock()
	list, err := outputsOf(&site.Input{Library: lib, Outcomes: byDocument(outcomes), Findings: findings, Theme: themeOf(f.folder), Topics: f.topics, Live: true}, outcomes)
	if err != nil {
		return nil, err
	}
	v := &follow.View{Outputs: make(map[string]output.Output, len(list)), Judge: func() []follow.Finding { return f.judge(lib, outcomes, more) }}
	for _, x := range list {
		v.Outputs[x.Path] = x
	}
	return v, nil
}

// judge holds one reading of the reference against every rule.
func (f *following) judge(lib *library.Library, outcomes []examine.Judged, more []place.Finding) []follow.Finding {
	more = append(append([]place.Finding{}, more...), changes.Examine(lib)...)
	findings := examine.Run(lib, outcomes, examine.Options{Parallel: runtime.GOMAXPROCS(0), More: more})
	f.mu.Lock()
	f.findings = findings
	f.mu.Unlock()
	list := make([]follow.Finding, 0, len(findings))
	for _, x := range findings {
		at := x.Position.File
		if x.Position.Line > 0 {
			at += ":" + strconv.Itoa(x.Position.Line)
		}
		list = append(list, follow.Finding{Severity: string(x.Severity), Place: at, Message: x.Message, Mend: x.Mend})
	}
	return list
}

// open asks the system for its browser; nobody waits for it.
func open(address string) {
	program := map[string][]string{"windows": {"rundll32", "url.dll,FileProtocolHandler"}, "darwin": {"open"}}[runtime.GOOS]
	if program == nil {
		program = []string{"xdg-open"}
	}
	c := exec.Command(program[0], append(program[1:], address)...)
	if c.Start() == nil {
		go c.Wait()
	}
}
