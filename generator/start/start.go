// Package start writes a new reference with a small example that explains
// itself. The example is embedded; the demo of the project is not.
package start

import (
	"embed"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
)

//go:embed example
var example embed.FS

// Files is the example, named as in the folder of a reference.
func Files() fs.FS {
	files, err := fs.Sub(example, "example")
	if err != nil {
		panic(err) // the name is fixed above
	}
	return files
}

// NotEmptyError tells that the folder is somebody's already.
type NotEmptyError struct{ Dir, Holds string }

// Error implements error.
func (e NotEmptyError) Error() string {
	return fmt.Sprintf("%s is not empty (it holds %s); a new reference needs a new or an empty folder", filepath.ToSlash(e.Dir), e.Holds)
}

// Write writes the example into dir, which must be new or empty, and returns
// how many files it has.
func Write(dir string) (int, error) {
	entries, err := os.ReadDir(dir)
	if err != nil && !errors.Is(err, fs.ErrNotExist) {
		return 0, err
	}
	if len(entries) > 0 {
		return 0, NotEmptyError{dir, entries[0].Name()}
	}
	n, files := 0, Files()
	err = fs.WalkDir(files, ".", func(name string, d fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		file := filepath.Join(dir, filepath.FromSlash(name))
		if d.IsDir() {
			return os.MkdirAll(file, 0o755)
		}
		n++
		return write(files, name, file)
	})
	return n, err
}

// write writes one file that does not exist.
func write(files fs.FS, name, file string) error {
	text, err := fs.ReadFile(files, name)
	if err != nil {
		return err
	}
	f, err := os.OpenFile(file, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o644)
	if err != nil {
		return err
	}
	_, err = f.Write(text)
	return errors.Join(err, f.Close())
}
