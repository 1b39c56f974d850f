package output

import (
	"archive/zip"
	"bytes"
	"compress/flate"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"hash/crc32"
	"io"
	"os"
	"path/filepath"
	"sort"
	"strings"
)

// Names of the files that an archive has beside the list: the first one says
// what to do, the other has the sums of all.
const (
	ArchiveFirst = "00-unpack-first.txt"
	ArchiveSums  = "sha256-sums.txt"
)

const unpackFirst = `Unpack this archive into a folder first, then open index.html there.
Pages opened inside an archive lack their style, figures and data.

To check that nothing was damaged, in that folder: sha256sum -c sha256-sums.txt
`

// Archive writes the list as one zip file, whole or not at all: sorted, without
// times, with a first text and SHA-256 sums, so that the same list gives the
// same bytes.
func Archive(file string, list []Output, o Options) error {
	temp, err := os.CreateTemp(filepath.Dir(file), ".archive-*")
	if err != nil {
		return err
	}
	defer os.Remove(temp.Name()) // gone already when all went well
	if err := archive(temp, list, max(1, o.Parallel)); err != nil {
		temp.Close()
		return err
	}
	if err := temp.Sync(); err != nil {
		temp.Close()
		return err
	}
	if err := temp.Close(); err != nil {
		return err
	}
	if err := os.Chmod(temp.Name(), 0o644); err != nil {
		return err
	}
	return os.Rename(temp.Name(), file)
}

// packed is one file, compressed.
type packed struct {
	path string
	data []byte
	crc  uint32
	size uint64
	sum  [sha256.Size]byte
	err  error
}

func archive(w io.Writer, list []Output, parallel int) error {
	sorted := append([]Output{{Path: ArchiveFirst, Write: func(b *bytes.Buffer) error { b.WriteString(unpackFirst); return nil }}}, list...)
	sort.Slice(sorted, func(i, j int) bool { return sorted[i].Path < sorted[j].Path })
	z := zip.NewWriter(w)
	var sums strings.Builder
	for p := range packAll(sorted, parallel) {
		if p.err != nil {
			return fmt.Errorf("%s: %w", p.path, p.err)
		}
		fmt.Fprintf(&sums, "%s  %s\n", hex.EncodeToString(p.sum[:]), p.path)
		if err := p.into(z); err != nil {
			return err
		}
	}
	last := newPacker().pack(Output{Path: ArchiveSums, Write: func(b *bytes.Buffer) error { b.WriteString(sums.String()); return nil }})
	if err := last.into(z); err != nil {
		return err
	}
	return z.Close()
}

func (p *packed) into(z *zip.Writer) error {
	h := &zip.FileHeader{Name: p.path, Method: zip.Deflate, CRC32: p.crc, CompressedSize64: uint64(len(p.data)), UncompressedSize64: p.size}
	h.SetMode(0o644)
	f, err := z.CreateRaw(h)
	if err == nil {
		_, err = f.Write(p.data)
	}
	return err
}

// packAll renders and compresses several at a time and hands them out in
// order; a reader that stops early must drain nothing: the rest is given up.
func packAll(list []Output, parallel int) func(yield func(*packed) bool) {
	return func(yield func(*packed) bool) {
		stop := make(chan struct{})
		defer close(stop)
		slots := make(chan chan *packed, 2*parallel)
		work := make(chan func(*packer))
		for range parallel {
			go func() {
				packer := newPacker()
				for f := range work {
					f(packer)
				}
			}()
		}
		go func() {
			defer close(work)
			defer close(slots)
			for _, o := range list {
				slot := make(chan *packed, 1)
				select {
				case slots <- slot:
				case <-stop:
					return
				}
				select {
				case work <- func(p *packer) { slot <- p.pack(o) }:
				case <-stop:
					return
				}
			}
		}()
		for slot := range slots {
			if !yield(<-slot) {
				return
			}
		}
	}
}

// packer has what one worker uses again for every file: a compressor is dear
// to make.
type packer struct {
	text, small bytes.Buffer
	flate       *flate.Writer
}

func newPacker() *packer {
	w, err := flate.NewWriter(nil, flate.DefaultCompression)
	if err != nil {
		panic(err) // only for a level that does not exist
	}
	return &packer{flate: w}
}

func (k *packer) pack(o Output) *packed {
	p := &packed{path: o.Path}
	k.text.Reset()
	k.small.Reset()
	if p.err = o.Write(&k.text); p.err != nil {
		return p
	}
	text := k.text.Bytes()
	p.crc, p.size, p.sum = crc32.ChecksumIEEE(text), uint64(len(text)), sha256.Sum256(text)
	k.flate.Reset(&k.small)
	if _, p.err = k.flate.Write(text); p.err == nil {
		p.err = k.flate.Close()
	}
	p.data = bytes.Clone(k.small.Bytes())
	return p
}
