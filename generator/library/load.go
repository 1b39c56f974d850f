package library

import (
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"runtime"
	"sort"
	"strings"
	"sync"
	"testing/fstest"

	"ohmfolio/generator/columns"
	"ohmfolio/generator/form"
	"ohmfolio/generator/material"
	"ohmfolio/generator/place"
	"ohmfolio/generator/words"
)

// Options of loading.
type Options struct {
	Parallel int  // readers at once; 0 takes as many as there are processors
	Editions bool // read the texts of materials/editions, too

	// Keep lets the library be the Before of the next one: the live view reads
	// again only what changed. A publication always reads everything.
	Keep    bool
	Before  *Library
	Changed map[string]bool // files below the folder, with forward slashes
}

// kept is one record as it was read.
type kept struct {
	record   *material.Record
	findings []place.Finding
	beside   []string // CSV files that it names
}

// stands tells whether nothing that it was read from has changed.
func (k kept) stands(name string, changed map[string]bool) bool {
	for _, b := range k.beside {
		if changed[b] {
			return false
		}
	}
	return !changed[name]
}

// Load reads the reference in folder. What is wrong in its files are findings
// in the library; an error means that the folder itself cannot be read.
func Load(folder string, o Options) (*Library, error) {
	if _, err := os.Stat(filepath.Join(folder, "materials")); err != nil {
		return nil, MissingError{folder}
	}
	root, err := os.OpenRoot(folder) // links that leave the folder are refused
	if err != nil {
		return nil, err
	}
	defer root.Close()
	return load(root.FS(), folder, o), nil
}

// MissingError says that a folder holds no reference.
type MissingError struct{ Folder string }

func (e MissingError) Error() string {
	return "there is no folder materials in " + e.Folder + "; stand in a reference's folder, name it with --folder, or make materials/ with a first record"
}

// FromFiles loads a reference from memory, by paths below its folder.
func FromFiles(files map[string][]byte) *Library {
	m := fstest.MapFS{}
	for name, text := range files {
		m[name] = &fstest.MapFile{Data: text}
	}
	return load(m, ".", Options{Parallel: 1, Editions: true})
}

// loader gathers one library.
type loader struct {
	fsys     fs.FS
	lib      *Library
	findings []place.Finding
}

func load(fsys fs.FS, folder string, o Options) *Library {
	l := &loader{fsys: fsys, lib: &Library{Folder: folder, Settings: defaultSettings(), Sources: map[string]*Source{}, byID: map[string]*material.Record{}}}
	l.settings()
	l.sources()
	l.records(o)
	l.documents()
	l.offers()
	if o.Editions {
		l.editions()
	}
	place.Sort(l.findings)
	l.lib.Findings = l.findings
	return l.lib
}

func (l *loader) add(code string, s place.Severity, file, message, mend string) {
	l.findings = append(l.findings, place.Finding{Code: code, Severity: s, Position: place.Position{File: file}, Message: message, Mend: mend})
}

// read gives the text of a file, nil after a finding. Files that are too
// large are not read at all.
func (l *loader) read(name string) *place.Source {
	info, err := fs.Stat(l.fsys, name)
	if err == nil && info.Size() > form.MaxBytes {
		l.add("file-too-large", place.Error, name, "the file is larger than 4 MiB", "split it")
		return nil
	}
	var text []byte
	if err == nil {
		text, err = fs.ReadFile(l.fsys, name)
	}
	if err != nil {
		l.add("file-unreadable", place.Error, name, "the file cannot be read: "+plainError(err), "look at its permissions; a link must stay inside the folder")
		return nil
	}
	return place.NewSource(name, text)
}

// plainError is an error without the paths of this machine.
func plainError(err error) string {
	for {
		e, ok := err.(*fs.PathError)
		if !ok {
			return err.Error()
		}
		err = e.Err
	}
}

// list names the files of a folder with an ending, sorted.
func (l *loader) list(folder, ending string) []string {
	entries, err := fs.ReadDir(l.fsys, folder)
	if err != nil {
		return nil
	}
	var names []string
	for _, e := range entries {
		if !e.IsDir() && strings.HasSuffix(e.Name(), ending) && !strings.HasPrefix(e.Name(), ".") {
			names = append(names, path.Join(folder, e.Name()))
		}
	}
	sort.Strings(names)
	return names
}

// records reads all records in parallel.
func (l *loader) records(o Options) {
	var names []string
	for _, name := range l.list("materials", ".yaml") {
		if name != sourcesFile && l.goodID(name) {
			names = append(names, name)
		}
	}
	if len(names) == 0 {
		l.add("no-records", place.Error, "materials", "there is no record", "write materials/ID.yaml; the README shows the smallest one")
	}
	all := make([]kept, len(names))
	n := o.Parallel
	if n <= 0 {
		n = runtime.GOMAXPROCS(0)
	}
	records := make([]*material.Record, len(names))
	shares := make([]loader, n)
	var wait sync.WaitGroup
	for i := range shares {
		shares[i] = loader{fsys: l.fsys}
		wait.Add(1)
		go func() {
			defer wait.Done()
			for j := i; j < len(names); j += n {
				all[j] = shares[i].again(names[j], o)
				records[j] = all[j].record
			}
		}()
	}
	wait.Wait()
	for i := range shares {
		l.findings = append(l.findings, shares[i].findings...)
	}
	if o.Keep {
		l.lib.kept = make(map[string]kept, len(names))
		for j, name := range names {
			l.lib.kept[name] = all[j]
		}
	}
	l.index(records)
}

// again takes a record from the library before when nothing of it changed,
// and reads it otherwise.
func (l *loader) again(name string, o Options) kept {
	if o.Before != nil {
		if k, ok := o.Before.kept[name]; ok && k.stands(name, o.Changed) {
			l.findings = append(l.findings, k.findings...)
			return k
		}
	}
	from := len(l.findings)
	k := kept{record: l.record(name)}
	if !o.Keep {
		return k
	}
	k.findings = append([]place.Finding(nil), l.findings[from:]...)
	if k.record == nil {
		return k
	}
	if n := k.record.Node.Get("lots"); n != nil {
		k.beside = append(k.beside, path.Join("materials", n.Text()))
	}
	for _, s := range k.record.Sets {
		if s.PointsFile != "" {
			k.beside = append(k.beside, path.Join("materials", s.PointsFile))
		}
	}
	return k
}

func (l *loader) record(name string) *material.Record {
	src := l.read(name)
	if src == nil {
		return nil
	}
	r, findings := material.Read(stem(name), src, l.readBeside)
	l.findings = append(l.findings, findings...)
	if r != nil {
		l.beside(r)
	}
	if place.Count(findings, place.Error) > 0 {
		return nil
	}
	return r
}

// readBeside reads a CSV file beside a record; what is wrong with its name is
// told by beside.
func (l *loader) readBeside(name string) *place.Source {
	full := path.Join("materials", name)
	info, err := fs.Stat(l.fsys, full)
	if err != nil || path.Base(name) != name || info.Size() > columns.MaxBytes {
		return nil
	}
	text, err := fs.ReadFile(l.fsys, full)
	if err != nil {
		return nil
	}
	return place.NewSource(full, text)
}

// beside checks that the CSV files of a record stand beside it.
func (l *loader) beside(r *material.Record) {
	check := func(n *form.Node) {
		if n == nil {
			return
		}
		list := place.List{Source: r.Source}
		name := n.Text()
		info, err := fs.Stat(l.fsys, path.Join("materials", name))
		switch {
		case path.Base(name) != name || !strings.HasSuffix(name, ".csv"):
			list.Add("file-beside-missing", place.Error, n.Position(), "“"+name+"” is no CSV file beside the record", "write the name of a .csv file in materials/")
		case err != nil:
			list.Add("file-beside-missing", place.Error, n.Position(), "the file "+name+" is not there", "put it into materials/, beside the record")
		case info.Size() > columns.MaxBytes:
			list.Add("file-too-large", place.Error, n.Position(), "the file "+name+" is larger than 64 MiB", "split it, or average the readings")
		}
		l.findings = append(l.findings, list.Findings...)
	}
	check(r.Node.Get("lots"))
	for _, s := range r.Sets {
		check(s.Node.Get("points"))
	}
}

// stem is a file's name without folder and ending.
func stem(name string) string {
	return strings.TrimSuffix(path.Base(name), path.Ext(name))
}

func (l *loader) index(records []*material.Record) {
	for _, r := range records {
		if r != nil {
			l.lib.Materials = append(l.lib.Materials, r)
			l.lib.byID[r.ID] = r
		}
	}
	for _, r := range l.lib.Materials {
		for _, old := range r.Formerly {
			if other := l.lib.byID[old]; other != nil && other != r {
				f := r.Node.Get("formerly")
				list := place.List{Source: r.Source}
				list.Add("earlier-id-taken", place.Error, f.Position(), "the earlier ID "+old+" belongs to "+other.ID, "each earlier ID leads to one record")
				l.findings = append(l.findings, list.Findings...)
				continue
			}
			l.lib.byID[old] = r
		}
	}
}

// documents reads the pages of content/ in reading order.
func (l *loader) documents() {
	if src := l.readIfThere("content/home.md"); src != nil {
		l.document("", src)
	}
	for _, room := range []struct {
		name  string
		order []string
	}{{"guides", l.lib.Settings.Guides}, {"reports", l.lib.Settings.Reports}} {
		names := l.list("content/"+room.name, ".md")
		sortByReading(names, room.order)
		for _, name := range names {
			if src := l.read(name); src != nil {
				l.document(room.name, src)
			}
		}
	}
}

func (l *loader) readIfThere(name string) *place.Source {
	if _, err := fs.Stat(l.fsys, name); err != nil {
		return nil
	}
	return l.read(name)
}

func (l *loader) document(room string, src *place.Source) {
	if room != "" && !PlainID(stem(src.File)) {
		l.add("id-not-plain", place.Error, src.File, "the name of the page is not plain", idMend)
		return
	}
	page, findings := words.Read(src)
	l.findings = append(l.findings, findings...)
	if page != nil {
		l.lib.Documents = append(l.lib.Documents, &Document{Room: room, Stem: stem(src.File), Source: src, Page: page})
	}
}

// sortByReading puts the pages named in order first, the rest by name.
func sortByReading(names, order []string) {
	rank := map[string]int{}
	for i, s := range order {
		rank[s] = i - len(order)
	}
	sort.SliceStable(names, func(i, j int) bool { return rank[stem(names[i])] < rank[stem(names[j])] })
}
