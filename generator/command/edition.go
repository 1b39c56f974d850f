package command

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"sync"

	"ohmfolio/generator/changes"
	"ohmfolio/generator/examine"
	"ohmfolio/generator/library"
	"ohmfolio/generator/output"
	"ohmfolio/generator/site"
)

// editionFile is where the edition called name is kept.
func (s *session) editionFile(name string) string {
	return filepath.Join(s.folder, "materials", "editions", name+".json")
}

// mayFreeze refuses a name that is no plain one, or is taken: an edition is
// never written twice.
func (s *session) mayFreeze(name string) error {
	switch {
	case name == "":
		return nil
	case !changes.PlainName(name):
		return fmt.Errorf("--edition takes small letters, digits and hyphens, in an order that sorts as time goes, such as 2026-06; not %q", name)
	}
	if _, err := os.Lstat(s.editionFile(name)); !errors.Is(err, fs.ErrNotExist) {
		return wrong("the edition %s is there already and stays as it is: choose another name; nothing is written", name)
	}
	return nil
}

// addEdition freezes what the reference states and puts it among its
// editions, so that the site to be written carries it.
func addEdition(lib *library.Library, outcomes []examine.Judged, name string) ([]byte, error) {
	if name == "" {
		return nil, nil
	}
	var text bytes.Buffer
	if err := changes.Freeze(lib, byDocument(outcomes), name).Write(&text); err != nil {
		return nil, err
	}
	lib.AddEdition(name, text.Bytes())
	return text.Bytes(), nil
}

// keepEdition writes the file whole, beside its place first.
func (s *session) keepEdition(name string, text []byte) error {
	file := s.editionFile(name)
	if err := os.MkdirAll(filepath.Dir(file), 0o755); err != nil {
		return err
	}
	if err := s.mayFreeze(name); err != nil { // somebody else may have been quicker
		return err
	}
	temp := file + ".new"
	if err := os.WriteFile(temp, text, 0o644); err != nil {
		return err
	}
	if err := os.Rename(temp, file); err != nil {
		os.Remove(temp)
		return err
	}
	fmt.Fprintf(s.err, "edition %s: %s; commit it\n", name, filepath.ToSlash(file))
	return nil
}

// statementFiles are the present state and all editions, as the site carries
// them.
func statementFiles(lib *library.Library, now func() *changes.Statement) []output.Output {
	list := []output.Output{{Path: "data/reference.json", Write: func(w *bytes.Buffer) error { return now().Write(w) }}}
	for _, e := range lib.Editions {
		list = append(list, output.Output{Path: "data/editions/" + e.Name + ".json", Write: func(w *bytes.Buffer) error { _, err := w.Write(e.Text); return err }})
	}
	return list
}

// addHistory lets the pages tell what the editions said.
func addHistory(in *site.Input, lib *library.Library, now func() *changes.Statement) {
	editions, _ := changes.Editions(lib) // what is wrong in them has been told
	all := sync.OnceValue(func() []*changes.Statement { return append(append([]*changes.Statement{}, editions...), now()) })
	in.HasEditions = len(editions) > 0
	in.Editions = func() []changes.Row { return changes.Rows(editions) }
	in.History = func(id string) []changes.Entry { return changes.History(all(), id) }
	in.Changes = func() *changes.Report {
		if len(editions) == 0 {
			return nil
		}
		last := editions[len(editions)-1]
		return changes.Compare(last, now(), "edition "+last.Edition, "this site")
	}
}
