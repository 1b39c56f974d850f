package site

import (
	"errors"
	"io/fs"
)

// brokenTheme is a theme without files.
type brokenTheme struct{}

func (brokenTheme) Open(name string) (fs.File, error) {
	return nil, &fs.PathError{Op: "open", Path: name, Err: errors.New("missing")}
}
