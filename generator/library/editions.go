package library

import (
	"io/fs"
	"sort"

	"ohmfolio/generator/place"
)

const (
	editionsFolder = "materials/editions"
	// MaxStatement is the most that the file of a statement may have.
	MaxStatement = 256 << 20
)

// editions reads the texts of the frozen statements; who compares them says
// what is wrong in them.
func (l *loader) editions() {
	for _, name := range l.list(editionsFolder, ".json") {
		info, err := fs.Stat(l.fsys, name)
		if err == nil && info.Size() > MaxStatement {
			l.add("file-too-large", place.Error, name, "the edition is larger than 256 MiB", "no edition is: take it from version control again")
			continue
		}
		var text []byte
		if err == nil {
			text, err = fs.ReadFile(l.fsys, name)
		}
		if err != nil {
			l.add("file-unreadable", place.Error, name, "the edition cannot be read: "+plainError(err), "look at its permissions; a link must stay inside the folder")
			continue
		}
		l.lib.Editions = append(l.lib.Editions, EditionFile{Name: stem(name), File: name, Text: text})
	}
}

// AddEdition puts a statement that is being frozen among the editions, before
// the library is passed on.
func (l *Library) AddEdition(name string, text []byte) {
	l.Editions = append(l.Editions, EditionFile{Name: name, File: editionsFolder + "/" + name + ".json", Text: text})
	sort.Slice(l.Editions, func(i, j int) bool { return l.Editions[i].Name < l.Editions[j].Name })
}

// EditionBytes is how much memory the texts of the editions take.
func (l *Library) EditionBytes() int64 {
	var n int64
	for _, e := range l.Editions {
		n += int64(len(e.Text))
	}
	return n
}
