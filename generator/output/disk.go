package output

import "os"

// disk is what a publication asks of the file system; tests make it fail.
type disk struct {
	write  func(name string, text []byte) error
	rename func(from, to string) error
}

func (o Options) onDisk() disk {
	if o.disk != nil {
		return *o.disk
	}
	return disk{
		write:  func(name string, text []byte) error { return os.WriteFile(name, text, 0o644) },
		rename: os.Rename,
	}
}
