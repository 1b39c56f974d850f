package output

import (
	"errors"
	"io/fs"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
)

// smallSite is a site of a few pages at an age: pages change, one comes and one
// goes, and the style has a new name each time.
func smallSite(age int) []Output {
	a := strconv.Itoa(age)
	style := "style." + strings.Repeat(a, 8)[:8] + ".css"
	list := []Output{textOutput(style, "style "+a), textOutput("index.html", style+" a/1.html b/"+a+".html"), textOutput("list.html", style+" a/1.html"),
		textOutput("a/1.html", style+" list.html b/"+a+".html "+a), textOutput("a/2.html", "same "+style), textOutput("b/"+a+".html", style+" index.html")}
	return list
}

// whole fails when a page of the folder names a file that is not there: the
// words of these pages are paths.
func whole(t *testing.T, dir, when string) {
	t.Helper()
	filepath.WalkDir(dir, func(name string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() || !strings.HasSuffix(name, ".html") {
			return nil
		}
		text, err := os.ReadFile(name)
		if err != nil {
			t.Errorf("%s: %v", when, err)
		}
		for _, word := range strings.Fields(string(text)) {
			if strings.Contains(word, ".") {
				if _, err := os.Stat(filepath.Join(dir, filepath.FromSlash(word))); err != nil {
					t.Errorf("%s: %s leads to %s, which is not there", when, name, word)
				}
			}
		}
		return nil
	})
}

// failing fails the n-th thing that is asked of the disk, leaving half of a
// file as a full disk does.
func failing(n int) (*disk, *int) {
	real := Options{}.onDisk()
	count := 0
	full := errors.New("no space left on device")
	return &disk{
		write: func(name string, text []byte) error {
			if count++; count == n {
				os.WriteFile(name, text[:len(text)/2], 0o644)
				return full
			}
			return real.write(name, text)
		},
		rename: func(from, to string) error {
			if count++; count == n {
				return full
			}
			return real.rename(from, to)
		},
	}, &count
}

// TestEveryWriteFails: whichever write or rename fails, in the first publication
// or in a later one, every link resolves, no half of a file stays, and the next
// run makes the site what it should be.
func TestEveryWriteFails(t *testing.T) {
	for first := range 2 {
		for n := 1; ; n++ {
			dir := filepath.Join(t.TempDir(), "public")
			if first == 1 {
				if _, err := Publish(dir, smallSite(1), Options{}); err != nil {
					t.Fatal(err)
				}
			}
			d, count := failing(n)
			_, err := Publish(dir, smallSite(2), Options{Parallel: 1, disk: d})
			if *count < n {
				if err != nil || n < 12 {
					t.Errorf("%d writes in all, %v", *count, err)
				}
				break
			}
			if err == nil {
				t.Errorf("write %d failed and nobody said so", n)
			}
			when := "write " + strconv.Itoa(n)
			if first == 1 {
				whole(t, dir, when)
			}
			filepath.WalkDir(dir, func(name string, d fs.DirEntry, err error) error {
				if strings.HasSuffix(name, tempSuffix) {
					t.Errorf("%s: %s is left", when, name)
				}
				return nil
			})
			if _, err := Publish(dir, smallSite(2), Options{}); err != nil {
				t.Errorf("%s: the next run: %v", when, err)
			}
			for _, o := range smallSite(2) {
				if _, err := os.Stat(filepath.Join(dir, filepath.FromSlash(o.Path))); err != nil {
					t.Errorf("%s: after the next run %s is not there", when, o.Path)
				}
			}
			whole(t, dir, when+", next run")
		}
	}
}

// TestOldStyleStays one publication longer, and not two.
func TestOldStyleStays(t *testing.T) {
	dir := t.TempDir()
	there := func(age int) bool {
		_, err := os.Stat(filepath.Join(dir, smallSite(age)[0].Path))
		return err == nil
	}
	for age := 1; age <= 4; age++ {
		if _, err := Publish(dir, smallSite(age), Options{}); err != nil {
			t.Fatal(err)
		}
		if !there(age) || age > 1 && !there(age-1) || age > 2 && there(age-2) {
			t.Errorf("publication %d: styles of it %v", age, there(age))
		}
	}
}

// TestLinksResolveAtEveryStep stops an incremental publication after each of
// its renames and looks at every link.
func TestLinksResolveAtEveryStep(t *testing.T) {
	dir := t.TempDir()
	if _, err := Publish(dir, smallSite(1), Options{}); err != nil {
		t.Fatal(err)
	}
	real := Options{}.onDisk()
	steps := 0
	d := &disk{write: real.write, rename: func(from, to string) error {
		err := real.rename(from, to)
		steps++
		whole(t, dir, "step "+strconv.Itoa(steps))
		return err
	}}
	if _, err := Publish(dir, smallSite(2), Options{Parallel: 1, disk: d}); err != nil || steps < 6 {
		t.Fatal(steps, err)
	}
}
