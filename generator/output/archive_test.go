package output

import (
	"archive/zip"
	"bytes"
	"errors"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"ohmfolio/generator/published"
)

func textOutput(path, text string) Output {
	return Output{Path: path, Write: func(b *bytes.Buffer) error { b.WriteString(text); return nil }}
}

// TestArchive: the same bytes whatever the order and the parallelism, the first
// file says "unpack first", and sha256sum (coreutils) finds every sum right.
func TestArchive(t *testing.T) {
	list := []Output{textOutput("index.html", "home"), textOutput("material/ä b.html", strings.Repeat("page ", 999)), textOutput("data/x.csv", "1,2")}
	for i := range 200 {
		list = append(list, textOutput("many/"+strconv.Itoa(i)+".txt", strings.Repeat(strconv.Itoa(i), i)))
	}
	turned := append([]Output{}, list...)
	for i, j := 0, len(turned)-1; i < j; i, j = i+1, j-1 {
		turned[i], turned[j] = turned[j], turned[i]
	}
	dir := t.TempDir()
	one, two := filepath.Join(dir, "1.zip"), filepath.Join(dir, "2.zip")
	if err := Archive(one, list, Options{Parallel: 1}); err != nil {
		t.Fatal(err)
	}
	if err := Archive(two, turned, Options{Parallel: 7}); err != nil {
		t.Fatal(err)
	}
	a, _ := os.ReadFile(one)
	b, _ := os.ReadFile(two)
	if !bytes.Equal(a, b) {
		t.Error("other bytes in another order")
	}
	z, err := zip.NewReader(bytes.NewReader(a), int64(len(a)))
	if err != nil {
		t.Fatal(err)
	}
	if z.File[0].Name != ArchiveFirst || len(z.File) != len(list)+2 {
		t.Errorf("first %s, %d files", z.File[0].Name, len(z.File))
	}
	out := t.TempDir()
	for _, f := range z.File {
		r, err := f.Open()
		if err != nil {
			t.Fatal(err)
		}
		text, err := io.ReadAll(r) // checks the CRC
		if err != nil {
			t.Fatal(f.Name, err)
		}
		to := filepath.Join(out, filepath.FromSlash(f.Name))
		os.MkdirAll(filepath.Dir(to), 0o755)
		os.WriteFile(to, text, 0o644)
		if f.Name == ArchiveFirst && !strings.Contains(string(text), "Unpack this archive into a folder first") {
			t.Errorf("the first text says %q", text)
		}
	}
	published.Need(t, "sha256sum", "coreutils")
	c := exec.Command("sha256sum", "--check", "--strict", "--quiet", ArchiveSums)
	c.Dir = out
	if text, err := c.CombinedOutput(); err != nil {
		t.Errorf("%v\n%s", err, text)
	}
}

// TestArchiveFails: an output that fails leaves the old archive as it was and
// nothing beside it.
func TestArchiveFails(t *testing.T) {
	dir := t.TempDir()
	file := filepath.Join(dir, "a.zip")
	os.WriteFile(file, []byte("old"), 0o644)
	list := []Output{textOutput("a", "a"), {Path: "b", Write: func(*bytes.Buffer) error { return errors.New("no paper") }}, textOutput("c", "c")}
	if err := Archive(file, list, Options{Parallel: 3}); err == nil || !strings.Contains(err.Error(), "no paper") {
		t.Errorf("%v", err)
	}
	text, _ := os.ReadFile(file)
	entries, _ := os.ReadDir(dir)
	if string(text) != "old" || len(entries) != 1 {
		t.Errorf("%q, %v", text, entries)
	}
	if err := Archive(filepath.Join(dir, "none", "a.zip"), list[:1], Options{}); err == nil {
		t.Error("a folder that is not there")
	}
}
