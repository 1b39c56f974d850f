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
type lock struct {
	path string
	left bool // an earlier run was killed here
}

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
		case ".gitignore", lockName, Marker + tempSuffix: // the last from a run that was killed
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
	left := false
	for range 2 {
		f, err := os.OpenFile(name, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o644)
		if err == nil {
			_, err = f.WriteString(strconv.Itoa(os.Getpid()) + "\n")
			return lock{name, left}, errors.Join(err, f.Close())
		}
		if !errors.Is(err, fs.ErrExist) {
			return lock{}, err
		}
		pid := holder(name)
		if alive(pid) {
			return lock{}, fmt.Errorf("%s is being written by process %d; wait for it to end", dir, pid)
		}
		os.Remove(name) // left by a run that was killed
		left = true
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
	// Retired are those that no page asks for any more; they go next time.
	Retired []string `json:"retired,omitempty"`
}

const markerNote = "Written by ohmfolio. The files listed here are replaced and removed by the next publication; others are never touched."

func readMarker(dir string) (files map[string]string, retired map[string]bool, err error) {
	text, err := os.ReadFile(filepath.Join(dir, Marker))
	if errors.Is(err, fs.ErrNotExist) {
		return nil, nil, nil
	}
	if err != nil {
		return nil, nil, err
	}
	var m marker
	if json.Unmarshal(text, &m) != nil || m.Files == nil {
		return map[string]string{}, nil, nil // damaged: write everything again, remove nothing
	}
	for p := range m.Files { // never trust a path outside the folder
		if path.Clean(p) != p || path.IsAbs(p) || strings.HasPrefix(p, "..") {
			delete(m.Files, p)
		}
	}
	retired = map[string]bool{}
	for _, p := range m.Retired {
		retired[p] = true
	}
	return m.Files, retired, nil
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
	if !before {
		for _, path := range p.resting {
			m.Files[path] = p.old[path]
		}
		m.Retired = p.resting
	}
	return p.keepMarker(m)
}

func (p *publication) keepMarker(m marker) error {
	text, err := json.MarshalIndent(m, "", " ")
	if err != nil {
		return err
	}
	name := filepath.Join(p.dir, Marker)
	err = p.disk.write(name+tempSuffix, append(text, '\n'))
	if err == nil {
		err = p.disk.rename(name+tempSuffix, name)
	}
	if err != nil {
		os.Remove(name + tempSuffix)
	}
	return err
}

// Written lists the files that the marker of dir names, sorted.
func Written(dir string) ([]string, error) {
	files, _, err := readMarker(dir)
	var list []string
	for p := range files {
		list = append(list, p)
	}
	sort.Strings(list)
	return list, err
}
