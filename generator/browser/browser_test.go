// Package browser holds the checks that need a real browser, an HTML
// validator and a PDF reader. It has no code of its own.
package browser

import (
	"bytes"
	"context"
	"net/http"
	"net/http/httptest"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/cdproto/runtime"
	"github.com/chromedp/chromedp"

	"ohmfolio/generator/command"
)

// pages is one page of every kind.
var pages = []string{"index.html", "materials.html", "material/cumn12ni.html", "material/copper-annealed.html", "material/zinc.html", "material/manganin-textbook.html",
	"material/platinum-thermometer.html", "sheet/cumn12ni-strip-lot.html", "side-by-side.html", "first-shunt.html", "decisions.html", "sources.html", "review.html", "editions.html", "changes.html", "check.html", "material/busbar-copper-lot.html", "words.html"}

// need skips on a developer's machine and fails in CI when a program is missing.
func need(t *testing.T, program string) {
	t.Helper()
	if _, err := exec.LookPath(program); err != nil {
		missing(t, program)
	}
}

func missing(t *testing.T, what string) {
	t.Helper()
	if os.Getenv("CI") == "true" {
		t.Fatalf("%s is missing; go run ./generator/verify installs it", what)
	}
	t.Skipf("%s is missing; go run ./generator/verify installs it", what)
}

var site struct {
	once sync.Once
	dir  string
	err  string
}

// published writes the demo reference once and returns its folder.
func published(t *testing.T) string {
	t.Helper()
	site.once.Do(func() {
		dir, err := os.MkdirTemp("", "ohmfolio-site-")
		if err != nil {
			site.err = err.Error()
			return
		}
		site.dir = dir
		var out, errs bytes.Buffer
		if code := command.Run([]string{"publish", "--folder", "../..", "--into", dir}, &out, &errs); code != 0 {
			site.err = errs.String()
		}
	})
	if site.err != "" {
		t.Fatal(site.err)
	}
	return site.dir
}

func TestMain(m *testing.M) {
	code := m.Run()
	if site.dir != "" {
		os.RemoveAll(site.dir)
	}
	os.Exit(code)
}

// kinds adds the first report and guide of the demo to the page kinds.
func kinds(t *testing.T) []string {
	dir := published(t)
	list := append([]string{}, pages...)
	for _, room := range []string{"report", "guide"} {
		found, _ := filepath.Glob(filepath.Join(dir, room, "*.html"))
		if len(found) == 0 {
			t.Errorf("the demo has no %s", room)
		}
		for _, f := range found {
			rel, _ := filepath.Rel(dir, f)
			list = append(list, filepath.ToSlash(rel))
		}
	}
	return list
}

// chrome starts a browser; console errors and exceptions fail the test.
func chrome(t *testing.T) context.Context {
	t.Helper()
	need(t, "chromium")
	options := append(chromedp.DefaultExecAllocatorOptions[:], chromedp.ExecPath("chromium"), chromedp.NoSandbox, chromedp.DisableGPU,
		chromedp.Flag("disable-background-networking", true), chromedp.Flag("disable-component-update", true), chromedp.Flag("allow-file-access-from-files", false))
	alloc, cancel := chromedp.NewExecAllocator(context.Background(), options...)
	t.Cleanup(cancel)
	ctx, cancel2 := chromedp.NewContext(alloc)
	t.Cleanup(cancel2)
	ctx, cancel3 := context.WithTimeout(ctx, 6*time.Minute)
	t.Cleanup(cancel3)
	chromedp.ListenTarget(ctx, func(ev any) {
		switch ev := ev.(type) {
		case *runtime.EventExceptionThrown:
			t.Errorf("a script failed: %s", ev.ExceptionDetails)
		case *runtime.EventConsoleAPICalled:
			if ev.Type == runtime.APITypeError {
				t.Errorf("the console says: %v", ev.Args)
			}
		}
	})
	if err := chromedp.Run(ctx, emulation.SetFocusEmulationEnabled(true)); err != nil { // or nothing is ever focused
		t.Fatal(err)
	}
	return ctx
}

// places are the two ways in which readers open a site.
func places(t *testing.T) map[string]string {
	dir := published(t)
	server := httptest.NewServer(http.FileServer(http.Dir(dir)))
	t.Cleanup(server.Close)
	return map[string]string{"file": "file://" + filepath.ToSlash(dir) + "/", "http": server.URL + "/"}
}

// TestHTML passes every page of the site through the validator of the W3C's
// HTML checker (npm vnu-jar).
func TestHTML(t *testing.T) {
	need(t, "java")
	jar := filepath.Join("node_modules", "vnu-jar", "build", "dist", "vnu.jar")
	if _, err := os.Stat(jar); err != nil {
		missing(t, "vnu-jar")
	}
	out, err := exec.Command("java", "-Xss1m", "-jar", jar, "--skip-non-html", "--format", "gnu", published(t)).CombinedOutput()
	if err != nil {
		lines := strings.Split(string(out), "\n")
		t.Fatalf("%v: %d messages, the first:\n%s", err, len(lines), strings.Join(lines[:min(20, len(lines))], "\n"))
	}
}

// TestAccessible runs axe-core on every page as a file, and on one of every
// kind over HTTP.
func TestAccessible(t *testing.T) {
	axe, err := os.ReadFile(filepath.Join("node_modules", "axe-core", "axe.min.js"))
	if err != nil {
		missing(t, "axe-core")
	}
	ctx := chrome(t)
	for how, base := range places(t) {
		list := kinds(t)
		if how == "http" {
			list = pages
		}
		for _, page := range list {
			var result []string
			err := chromedp.Run(ctx,
				chromedp.Navigate(base+page), inUse(),
				chromedp.Evaluate(string(axe), nil),
				chromedp.Evaluate(`axe.run({ resultTypes: ["violations"] }).then(r => r.violations.map(v => v.id + ": " + v.help + " " + v.nodes.slice(0, 2).map(n => n.html.slice(0, 120)).join(" | ")))`, &result,
					func(p *runtime.EvaluateParams) *runtime.EvaluateParams { return p.WithAwaitPromise(true) }))
			if err != nil {
				t.Fatalf("%s %s: %v", how, page, err)
			}
			for _, v := range result {
				t.Errorf("%s %s: %s", how, page, v)
			}
		}
	}
}

// inUse opens what a reader can open on a page and types into what finds.
func inUse() chromedp.Action {
	return chromedp.Evaluate(`new Promise(function (done) {
		var f = document.getElementById("find-text");
		if (f) { f.value = "copper"; f.focus(); }
		if (document.getElementById("ask-at")) document.getElementById("ask-at").focus();
		if (document.getElementById("read-in")) document.getElementById("read-in").dispatchEvent(new Event("pointerover"));
		document.querySelectorAll("main details").forEach(d => { d.open = true; });
		setTimeout(done, 200);
	})`, nil, awaiting)
}

// TestNothingFromOutside: pages ask for nothing but their own folder, and
// nothing that they ask for is missing.
func TestNothingFromOutside(t *testing.T) {
	ctx := chrome(t)
	for how, base := range places(t) {
		for _, page := range kinds(t) {
			var asked []string
			var styled bool
			if err := chromedp.Run(ctx, chromedp.Navigate(base+page), inUse(),
				chromedp.Evaluate(`performance.getEntriesByType("resource").map(r => r.name)`, &asked),
				chromedp.Evaluate(`getComputedStyle(document.querySelector(".incomplete")).display === "none"`, &styled)); err != nil {
				t.Fatal(err)
			}
			if !styled {
				t.Errorf("%s %s: the style is not applied", how, page)
			}
			for _, a := range asked {
				if !strings.HasPrefix(a, base) {
					t.Errorf("%s %s asks for %s", how, page, a)
				}
			}
		}
	}
}
