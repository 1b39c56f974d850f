package command

import (
	"fmt"
	"io"
	"math/rand/v2"
	"net/url"
	"os"
	"os/exec"
	"path"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
	"time"
)

// TestPublishChild is the program that TestKilled kills; by itself it does
// nothing.
func TestPublishChild(t *testing.T) {
	dir := os.Getenv("PUBLISH_CHILD")
	if dir == "" {
		t.Skip("run by TestKilled")
	}
	os.Exit(Run([]string{"publish", "--folder", dir}, io.Discard, os.Stderr))
}

var anyLink = regexp.MustCompile(`(?:href|src)="([^"#]+)[^"]*"`)

// crawl reads every page of a site and fails for a link that leads nowhere.
func crawl(t *testing.T, dir, when string) int {
	t.Helper()
	links := 0
	filepath.WalkDir(dir, func(name string, d os.DirEntry, err error) error {
		if err != nil || d.IsDir() || !strings.HasSuffix(name, ".html") {
			return nil
		}
		text, err := os.ReadFile(name)
		if err != nil {
			return nil // removed while we walk
		}
		if !strings.HasSuffix(strings.TrimSpace(string(text)), "</html>") {
			t.Errorf("%s: %s is not whole", when, name)
		}
		from, _ := filepath.Rel(dir, name)
		for _, m := range anyLink.FindAllStringSubmatch(string(text), -1) {
			target, err := url.PathUnescape(m[1])
			if err != nil || strings.Contains(target, ":") {
				continue
			}
			links++
			to := path.Join(path.Dir(filepath.ToSlash(from)), target)
			if _, err := os.Stat(filepath.Join(dir, filepath.FromSlash(to))); err != nil {
				t.Errorf("%s: %s leads to %s, which is not there", when, from, to)
			}
		}
		return nil
	})
	return links
}

// TestKilled kills publications at random moments (30, or 300 with LONG=1):
// every link of what is left resolves, every page is whole, and the next run
// makes the site the same as one published from nothing.
func TestKilled(t *testing.T) {
	kills := 30
	if os.Getenv("LONG") != "" {
		kills = 300
	}
	dir := yard(t)
	site := filepath.Join(dir, "public")
	if code, _, errs := run("publish", "--folder", dir); code != 0 {
		t.Fatal(errs)
	}
	random := rand.New(rand.NewPCG(30, 1))
	killed, links := 0, 0
	for i := range kills {
		edited := strings.Replace(copper, "name: Copper", fmt.Sprintf("name: Copper %d", i), 1)
		save(t, filepath.Join(dir, "materials", "copper.yaml"), edited)
		report := filepath.Join(dir, "content", "reports", fmt.Sprintf("r%d.md", i%3))
		os.MkdirAll(filepath.Dir(report), 0o755)
		if i%2 == 0 {
			save(t, report, fmt.Sprintf("# Report %d\n\nWords.\n", i))
		} else {
			os.Remove(filepath.Join(dir, "content", "reports", fmt.Sprintf("r%d.md", (i+1)%3)))
		}
		c := exec.Command(os.Args[0], "-test.run", "^TestPublishChild$")
		c.Env = append(os.Environ(), "PUBLISH_CHILD="+dir)
		if err := c.Start(); err != nil {
			t.Fatal(err)
		}
		time.Sleep(time.Duration(random.Int64N(int64(90 * time.Millisecond))))
		c.Process.Kill()
		if err := c.Wait(); err != nil {
			killed++
		}
		links += crawl(t, site, fmt.Sprintf("kill %d", i))
		if t.Failed() {
			return
		}
	}
	if killed < kills/4 || links == 0 {
		t.Errorf("only %d of %d were killed, %d links", killed, kills, links)
	}
	for range 2 { // the second takes away what stays one publication longer
		if code, _, errs := run("publish", "--folder", dir); code != 0 {
			t.Fatal(errs)
		}
	}
	fresh := filepath.Join(dir, "fresh")
	if code, _, errs := run("publish", "--folder", dir, "--into", fresh); code != 0 {
		t.Fatal(errs)
	}
	repaired, wanted := snapshot(t, site), snapshot(t, fresh)
	for name, text := range wanted {
		rel, _ := filepath.Rel(fresh, name)
		if rel != ".written-files.json" && repaired[filepath.Join(site, rel)] != text {
			t.Errorf("%s is not what a publication from nothing gives", rel)
		}
	}
	for name := range repaired {
		if rel, _ := filepath.Rel(site, name); wanted[filepath.Join(fresh, rel)] == "" && rel != ".written-files.json" {
			t.Errorf("%s is left over", rel)
		}
	}
}
