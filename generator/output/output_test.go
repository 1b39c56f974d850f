package output

import (
	"bytes"
	"errors"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
)

func text(path, content string) Output {
	return Output{Path: path, Write: func(w *bytes.Buffer) error { w.WriteString(content); return nil }}
}

func publish(t *testing.T, dir string, list ...Output) Result {
	t.Helper()
	r, err := Publish(dir, list, Options{Parallel: 2})
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func content(t *testing.T, dir, path string) string {
	t.Helper()
	b, err := os.ReadFile(filepath.Join(dir, path))
	if err != nil {
		return "missing"
	}
	return string(b)
}

func TestPublishWritesChangesAndRemoves(t *testing.T) {
	dir := t.TempDir()
	os.WriteFile(filepath.Join(dir, ".gitignore"), []byte("*\n"), 0o644)
	if r := publish(t, dir, text("index.html", "a"), text("x/one.html", "b"), text("y/two.html", "c")); r.Written != 3 || r.Bytes != 3 {
		t.Errorf("first: %+v", r)
	}
	if r := publish(t, dir, text("index.html", "a"), text("x/one.html", "b"), text("y/two.html", "c")); r.Written != 0 || r.Removed != 0 {
		t.Errorf("again: %+v", r)
	}
	os.WriteFile(filepath.Join(dir, "foreign.txt"), []byte("keep"), 0o644)
	if r := publish(t, dir, text("index.html", "A"), text("x/one.html", "b")); r.Written != 1 || r.Removed != 1 {
		t.Errorf("changed: %+v", r)
	}
	if content(t, dir, "index.html") != "A" || content(t, dir, "y/two.html") != "missing" || content(t, dir, "foreign.txt") != "keep" || content(t, dir, ".gitignore") != "*\n" {
		t.Error("the folder is not as it should be")
	}
	if _, err := os.Stat(filepath.Join(dir, "y")); err == nil {
		t.Error("an empty folder stays")
	}
}

func TestPublishRepairsWhatOthersChanged(t *testing.T) {
	dir := t.TempDir()
	publish(t, dir, text("a.html", "aaa"))
	os.Remove(filepath.Join(dir, "a.html"))
	if r := publish(t, dir, text("a.html", "aaa")); r.Written != 1 {
		t.Errorf("a missing file was not written again: %+v", r)
	}
	os.WriteFile(filepath.Join(dir, Marker), []byte("{damaged"), 0o644)
	publish(t, dir, text("a.html", "aaa"))
	if content(t, dir, "a.html") != "aaa" {
		t.Error("a damaged marker lost the file")
	}
}

func TestFailureLeavesTheOldSite(t *testing.T) {
	dir := t.TempDir()
	publish(t, dir, text("a.html", "old"), text("b.html", "old"))
	for n := range 2 {
		list := []Output{text("a.html", "new"), text("b.html", "new"), text("c.html", "new")}
		list[n].Write = func(*bytes.Buffer) error { return errors.New("broken template") }
		if _, err := Publish(dir, list, Options{Parallel: 1}); err == nil || !strings.Contains(err.Error(), list[n].Path) {
			t.Fatalf("error %v", err)
		}
		entries, _ := os.ReadDir(dir)
		if content(t, dir, "a.html") != "old" || content(t, dir, "b.html") != "old" || len(entries) != 3 {
			t.Errorf("failure at %d: the old site is touched: %v", n, entries)
		}
	}
}

func TestRefusesFoldersOfOthers(t *testing.T) {
	dir := t.TempDir()
	os.WriteFile(filepath.Join(dir, "thesis.doc"), []byte("x"), 0o644)
	var notOurs NotOursError
	if _, err := Publish(dir, []Output{text("a", "b")}, Options{}); !errors.As(err, &notOurs) || notOurs.Found != "thesis.doc" {
		t.Errorf("error %v", err)
	}
	file := filepath.Join(t.TempDir(), "file")
	os.WriteFile(file, nil, 0o644)
	if _, err := Publish(file, nil, Options{}); err == nil {
		t.Error("a file passed as a folder")
	}
}

func TestRefusesPaths(t *testing.T) {
	for _, path := range []string{"", "/a", "../a", "a/../b", "a\\b", "c:a", "a/"} {
		if _, err := Publish(t.TempDir(), []Output{text(path, "x")}, Options{}); err == nil {
			t.Errorf("%q is accepted", path)
		}
	}
	if _, err := Publish(t.TempDir(), []Output{text("A", "x"), text("a", "y")}, Options{}); err == nil {
		t.Error("two names that differ in case only are accepted")
	}
}

func TestSecondPublicationIsTold(t *testing.T) {
	dir := t.TempDir()
	os.WriteFile(filepath.Join(dir, lockName), []byte(strconv.Itoa(os.Getpid())), 0o644)
	if _, err := Publish(dir, []Output{text("a", "x")}, Options{}); err == nil || !strings.Contains(err.Error(), strconv.Itoa(os.Getpid())) {
		t.Errorf("error %v", err)
	}
	os.WriteFile(filepath.Join(dir, lockName), []byte("999999999"), 0o644)
	publish(t, dir, text("a", "x")) // the holder was killed
}

func TestMarkerCannotRemoveOutside(t *testing.T) {
	root := t.TempDir()
	dir := filepath.Join(root, "site")
	victim := filepath.Join(root, "victim")
	os.WriteFile(victim, []byte("x"), 0o644)
	publish(t, dir, text("a", "x"))
	os.WriteFile(filepath.Join(dir, Marker), []byte(`{"files":{"../victim":"","a":""}}`), 0o644)
	publish(t, dir, text("b", "x"))
	if _, err := os.Stat(victim); err != nil {
		t.Error("a file outside the folder was removed")
	}
}
