// Package output writes a list of outputs into a folder, each file whole: a
// reader sees the old file or the new one, never half of one. It knows
// nothing of materials.
//
// The folder is ours when it is empty, holds only .gitignore, or holds our
// marker, .written-files.json. Files that we did not write are never touched.
package output

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
	"sort"
	"strings"
	"sync"
)

// Output is one file: its path below the folder, with forward slashes, and
// the function that writes its content.
type Output struct {
	Path  string
	Write func(w *bytes.Buffer) error
}

// Options of a publication.
type Options struct {
	Parallel int                   // renderers at once, at least 1
	Progress func(done, total int) // nil for none; called by several goroutines

	disk *disk // nil for the real one
}

// Result counts what was done.
type Result struct {
	Files   int   // in the list
	Written int   // new or changed
	Removed int   // no longer in the list
	Bytes   int64 // of all files in the list
}

// Publish writes the list into dir. When anything fails before the first
// replacement the old site stands as it was; a failure later leaves whole
// files, old or new, and the next run repairs the rest.
func Publish(dir string, list []Output, o Options) (Result, error) {
	if err := checkPaths(list); err != nil {
		return Result{}, err
	}
	held, err := claim(dir)
	if err != nil {
		return Result{}, err
	}
	defer held.release()
	old, retired, err := readMarker(dir)
	if err != nil {
		return Result{}, err
	}
	p := &publication{dir: dir, list: list, old: old, retired: retired, disk: o.onDisk(), sums: make([]string, len(list)), sizes: make([]int64, len(list)), temps: make([]string, len(list)), o: o}
	if old == nil { // the folder is ours from here on, whatever happens to this run
		if err := p.keepMarker(marker{Note: markerNote, Files: map[string]string{}}); err != nil {
			return Result{}, err
		}
	}
	if held.left {
		p.sweep()
	}
	if err := p.makeFolders(); err != nil {
		return Result{}, err
	}
	if err := p.renderAll(); err != nil {
		p.discard()
		return Result{}, err
	}
	return p.finish()
}

// publication is one run.
type publication struct {
	dir   string
	list  []Output
	old   map[string]string // path → SHA-256 of the last run
	sums  []string
	sizes []int64
	temps []string // name of the temporary file, "" when nothing is to be replaced
	o     Options
	disk  disk

	retired map[string]bool // kept one publication longer by the last run
	resting []string        // kept one publication longer by this one

	mu   sync.Mutex
	done int
}

func (p *publication) makeFolders() error {
	seen := map[string]bool{}
	for _, out := range p.list {
		folder := filepath.Dir(filepath.FromSlash(out.Path))
		if seen[folder] {
			continue
		}
		seen[folder] = true
		if err := os.MkdirAll(filepath.Join(p.dir, folder), 0o755); err != nil {
			return err
		}
	}
	return nil
}

// renderAll renders every output and writes the changed ones to temporary
// files beside their targets.
func (p *publication) renderAll() error {
	next := make(chan int)
	errs := make(chan error, max(1, p.o.Parallel))
	stop := make(chan struct{})
	var once sync.Once
	var wait sync.WaitGroup
	for range max(1, p.o.Parallel) {
		wait.Add(1)
		go func() {
			defer wait.Done()
			var buf bytes.Buffer
			for i := range next {
				if err := p.renderOne(i, &buf); err != nil {
					errs <- fmt.Errorf("%s: %w", p.list[i].Path, err)
					once.Do(func() { close(stop) })
					return
				}
			}
		}()
	}
feed:
	for i := range p.list {
		select {
		case next <- i:
		case <-stop:
			break feed
		}
	}
	close(next)
	wait.Wait()
	select {
	case err := <-errs:
		return err
	default:
		return nil
	}
}

func (p *publication) renderOne(i int, buf *bytes.Buffer) error {
	buf.Reset()
	out := p.list[i]
	if err := out.Write(buf); err != nil {
		return err
	}
	sum := sha256.Sum256(buf.Bytes())
	p.sums[i], p.sizes[i] = hex.EncodeToString(sum[:]), int64(buf.Len())
	target := filepath.Join(p.dir, filepath.FromSlash(out.Path))
	if p.old[out.Path] == p.sums[i] && sameSize(target, p.sizes[i]) {
		p.step()
		return nil
	}
	temp := target + tempSuffix
	p.temps[i] = temp // known before it is there: a disk may fill up in the middle of it
	if err := p.disk.write(temp, buf.Bytes()); err != nil {
		return err
	}
	p.step()
	return nil
}

const tempSuffix = ".ohmfolio-new"

func sameSize(path string, size int64) bool {
	info, err := os.Lstat(path)
	return err == nil && info.Mode().IsRegular() && info.Size() == size
}

func (p *publication) step() {
	if p.o.Progress == nil {
		return
	}
	p.mu.Lock()
	p.done++
	done := p.done
	p.mu.Unlock()
	p.o.Progress(done, len(p.list))
}

// discard removes the temporary files of a run that failed.
func (p *publication) discard() {
	for _, t := range p.temps {
		if t != "" {
			os.Remove(t)
		}
	}
}

// sweep removes the temporary files of a run that was killed; their ending is
// ours alone.
func (p *publication) sweep() {
	filepath.WalkDir(p.dir, func(name string, d fs.DirEntry, err error) error {
		if err == nil && !d.IsDir() && strings.HasSuffix(name, tempSuffix) {
			os.Remove(name)
		}
		return nil
	})
}

// finish puts the files in place: all new ones first, so that no link leads
// nowhere, then replaced ones, then pages at the top, which list the others,
// the index last, then removals, then the marker.
func (p *publication) finish() (Result, error) {
	r := Result{Files: len(p.list)}
	order := make([]int, 0, len(p.list))
	for i := range p.list {
		r.Bytes += p.sizes[i]
		if p.temps[i] != "" {
			order = append(order, i)
		}
	}
	sort.SliceStable(order, func(a, b int) bool { return p.rank(order[a]) < p.rank(order[b]) })
	if err := p.writeMarker(true); err != nil { // a kill from here on is repaired by the next run
		p.discard()
		return r, err
	}
	for _, i := range order {
		if err := p.disk.rename(p.temps[i], strings.TrimSuffix(p.temps[i], tempSuffix)); err != nil {
			p.discard()
			return r, err
		}
		p.temps[i] = ""
		r.Written++
	}
	removed, err := p.removeStale()
	r.Removed = removed
	if err != nil {
		return r, err
	}
	if err := p.writeMarker(false); err != nil {
		return r, err
	}
	syncFolder(p.dir)
	return r, nil
}

// rank is the place of an output in the order of writing: what nobody links to
// yet, first what pages need, then pages; then what readers see already.
func (p *publication) rank(i int) int {
	path := p.list[i].Path
	_, existed := p.old[path]
	page, top := strings.HasSuffix(path, ".html"), !strings.Contains(path, "/")
	switch {
	case path == "index.html":
		return 6
	case !existed && !page:
		return 0
	case !existed && !top:
		return 1
	case !existed:
		return 2
	case !page:
		return 3
	case !top:
		return 4
	}
	return 5
}

// hashed is a name that carries the hash of its content: pages of the last
// publication, still open somewhere, ask for it by that name.
var hashed = regexp.MustCompile(`\.[0-9a-f]{8}\.(css|js|svg)$`)

// removeStale removes what an earlier run wrote and this one did not, and the
// folders that are empty then. Style and scripts stay one publication longer.
func (p *publication) removeStale() (int, error) {
	now := map[string]bool{}
	for _, out := range p.list {
		now[out.Path] = true
	}
	var stale []string
	for path := range p.old {
		switch {
		case now[path]:
		case hashed.MatchString(path) && !p.retired[path]:
			p.resting = append(p.resting, path)
		default:
			stale = append(stale, path)
		}
	}
	sort.Strings(stale)
	sort.Strings(p.resting)
	for n, path := range stale {
		full := filepath.Join(p.dir, filepath.FromSlash(path))
		if err := os.Remove(full); err != nil && !os.IsNotExist(err) {
			return n, err
		}
		for folder := filepath.Dir(full); folder != p.dir && os.Remove(folder) == nil; { // only when it is empty
			folder = filepath.Dir(folder)
		}
	}
	return len(stale), nil
}
