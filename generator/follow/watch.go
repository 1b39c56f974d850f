package follow

import (
	"context"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"time"

	"github.com/fsnotify/fsnotify"
)

// watchedFolders hold what a reference is made of.
var watchedFolders = []string{"content", "materials", "themes"}

const (
	// settle is how long nothing more must happen before a save counts as done:
	// editors write a second file and rename it.
	settle = 12 * time.Millisecond
	// lookAgain is how often folders are looked for that were not there, such as
	// one that was deleted and made again.
	lookAgain = time.Second
)

// watch rebuilds after every change below the folder until the context ends.
func (s *Server) watch(ctx context.Context) error {
	w, err := fsnotify.NewWatcher()
	if err != nil {
		return err
	}
	defer w.Close()
	watched := map[string]bool{}
	s.addFolders(w, watched)
	changed, all := map[string]bool{}, false // all: something was lost or made anew, read everything
	quiet := time.NewTimer(time.Hour)
	quiet.Stop()
	again := time.NewTicker(lookAgain)
	defer again.Stop()
	for {
		select {
		case <-ctx.Done():
			return nil
		case e := <-w.Events:
			if name, of := s.relevant(e); of {
				changed[name] = true
				quiet.Reset(settle)
			}
		case err := <-w.Errors:
			s.log("the watch lost something (" + err.Error() + "); everything is read again")
			all = true
			quiet.Reset(settle)
		case <-again.C:
			if s.addFolders(w, watched) {
				all = true
				quiet.Reset(settle)
			}
		case <-quiet.C:
			all = s.addFolders(w, watched) || all
			if all {
				changed = nil
			}
			s.rebuild(changed)
			changed, all = map[string]bool{}, false
		}
	}
}

func (s *Server) log(text string) {
	if s.o.Log != nil {
		s.o.Log(text)
	}
}

// relevant gives the changed file below the folder with forward slashes.
// Backups, swap files and attributes are nobody's edit.
func (s *Server) relevant(e fsnotify.Event) (string, bool) {
	if e.Op == fsnotify.Chmod {
		return "", false
	}
	name, err := filepath.Rel(s.o.Folder, e.Name)
	if err != nil {
		return "", false
	}
	base := filepath.Base(name)
	if strings.HasPrefix(base, ".") || strings.HasSuffix(base, "~") || strings.HasSuffix(base, ".swp") || strings.HasSuffix(base, ".tmp") {
		return "", false
	}
	return filepath.ToSlash(name), true
}

// addFolders watches every folder that is there; true when one is new.
func (s *Server) addFolders(w *fsnotify.Watcher, watched map[string]bool) bool {
	found := map[string]bool{}
	for _, top := range watchedFolders {
		filepath.WalkDir(filepath.Join(s.o.Folder, top), func(path string, d fs.DirEntry, err error) error {
			if err != nil {
				return fs.SkipDir
			}
			if !d.IsDir() {
				return nil
			}
			found[path] = true
			return nil
		})
	}
	fresh := false
	for path := range found {
		if !watched[path] && w.Add(path) == nil {
			watched[path], fresh = true, true
		}
	}
	for path := range watched {
		if _, err := os.Stat(path); err != nil {
			delete(watched, path)
			w.Remove(path) // gone already; said for the watcher's own list
		}
	}
	return fresh
}
