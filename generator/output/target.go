package output

import (
	"encoding/json"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"sort"
	"strconv"
	"strings"
)

// Marker is the bookkeeping file that makes a folder ours.
const Marker = ".written-files.json"

// lockName stands in the folder while a publication writes into it.
const lockName = ".being-written"

// NotOursError refuses a folder that holds other people's files.
type NotOursError struct{ Dir, Found string }

func (e NotOursError) Error() string {
	return fmt.Sprintf("%s holds %s and was not written by ohmfolio; give an empty folder with --into, or empty this one", e.Dir, e.Found)
}

// checkPaths refuses paths that leave the folder or meet each other.
func checkPaths(list []Output) error {
	seen := map[string]string{}
	for _, o := range list {
		if o.Path == "" || path.Clean(o.Path) != o.Path || path.IsAbs(o.Path) || strings.HasPrefix(o.Path, "..") || strings.ContainsAny(o.Path, "\\:") {
			return fmt.Errorf("output: the path %q is not plain", o.Path)
		}
		folded := strings.ToLower(o.Path)
		if other, ok := seen[folded]; ok {
			return fmt.Errorf("output: %q and %q are one file where case does not count", other, o.Path)
		}
		seen[folded] = o.Path
	}
	return nil
}

// lock is a held folder.
type lock struct{ path string }

func (l lock) release() { os.Remove(l.path) }

// claim makes the folder when it is missing, refuses one that is not ours,
// and holds it against a second publication.
func claim(dir string) (lock, error) {
	info, err := os.Stat(dir)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		if err := os.MkdirAll(dir, 0o755); err != nil {
			return lock{}, err
		}
	case err != nil:
		return lock{}, err
	case !info.IsDir():
		return lock{}, fmt.Errorf("%s is a file, not a folder; give a folder with --into", dir)
	}
	if err := ours(dir); err != nil {
		return lock{}, err
	}
	return hold(filepath.Join(dir, lockName), dir)
}

func ours(dir string) error {
	entries, err := os.ReadDir(dir)
	if err != nil {
		return err
	}
	other := ""
	for _, e := range entries {
		switch e.Name() {
		case Marker:
			return nil
		case ".gitignore", lockName:
		default:
			other = e.Name()
		}
	}
	if other != "" {
		return NotOursError{dir, other}
	}
	return nil
}

func hold(name, dir string) (lock, error) {
	for range 2 {
		f, err := os.OpenFile(name, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o644)
		if err == nil {
			_, err = f.WriteString(strconv.Itoa(os.Getpid()) + "\n")
			return lock{name}, errors.Join(err, f.Close())
		}
		if !errors.Is(err, fs.ErrExist) {
			return lock{}, err
		}
		pid := holder(name)
		if alive(pid) {
			return lock{}, fmt.Errorf("%s is being written by process %d; wait for it to end", dir, pid)
		}
		os.Remove(name) // left by a run that was killed
	}
	return lock{}, fmt.Errorf("%s is being written by another process; wait for it to end", dir)
}

func holder(name string) int {
	text, err := os.ReadFile(name)
	if err != nil {
		return 0
	}
	pid, _ := strconv.Atoi(strings.TrimSpace(string(text)))
	return pid
}

// marker is the bookkeeping file.
type marker struct {
	Note  string            `json:"note"`
	Files map[string]string `json:"files"` // path → SHA-256
}

const markerNote = "Written by ohmfolio. The files listed here are replaced and removed by the next publication; others are never touched."

func readMarker(dir string) (map[string]string, error) {
	text, err := os.ReadFile(filepath.Join(dir, Marker))
	if errors.Is(err, fs.ErrNotExist) {
		return nil, nil
	}
	if err != nil {
		return nil, err
	}
	var m marker
	if json.Unmarshal(text, &m) != nil {
		return map[string]string{}, nil // damaged: write everything again, remove nothing
	}
	for p := range m.Files { // never trust a path outside the folder
		if path.Clean(p) != p || path.IsAbs(p) || strings.HasPrefix(p, "..") {
			delete(m.Files, p)
		}
	}
	return m.Files, nil
}

// writeMarker writes the bookkeeping. Before the files are put in place it
// lists old and new ones together, so that a killed run leaves nothing that
// the next one would not know; sums of files in doubt are left out.
func (p *publication) writeMarker(before bool) error {
	m := marker{Note: markerNote, Files: map[string]string{}}
	if before {
		for path, sum := range p.old {
			m.Files[path] = sum
		}
	}
	for i, o := range p.list {
		m.Files[o.Path] = p.sums[i]
		if before && p.temps[i] != "" {
			m.Files[o.Path] = ""
		}
	}
	text, err := json.MarshalIndent(m, "", " ")
	if err != nil {
		return err
	}
	name := filepath.Join(p.dir, Marker)
	if err := os.WriteFile(name+tempSuffix, append(text, '\n'), 0o644); err != nil {
		os.Remove(name + tempSuffix)
		return err
	}
	return os.Rename(name+tempSuffix, name)
}

// Written lists the files that the marker of dir names, sorted.
func Written(dir string) ([]string, error) {
	files, err := readMarker(dir)
	var list []string
	for p := range files {
		list = append(list, p)
	}
	sort.Strings(list)
	return list, err
}
