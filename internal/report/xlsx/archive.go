package xlsx

import (
	"archive/zip"
	"bytes"
	"compress/flate"
	"errors"
	"hash"
	"hash/crc32"
	"io"
	"io/fs"
	"maps"
	"slices"
)

// archive is a ZIP writer that puts its parts in order of name, since the order in which the library hands
// over the sheets is left to chance. It holds the compressed parts until it is closed.
type archive struct {
	to    io.Writer
	parts map[string]*part
	last  *part
}

// part is one file of the archive.
type part struct {
	packed  bytes.Buffer
	packing *flate.Writer
	sum     hash.Hash32
	size    uint64
}

func newArchive(w io.Writer) *archive { return &archive{to: w, parts: map[string]*part{}} }

// Create begins a file and ends the one before.
func (a *archive) Create(name string) (io.Writer, error) {
	if err := a.end(); err != nil {
		return nil, err
	}
	p := &part{sum: crc32.NewIEEE()}
	var err error
	if p.packing, err = flate.NewWriter(&p.packed, flate.DefaultCompression); err != nil {
		return nil, err
	}
	a.parts[name], a.last = p, p
	return p, nil
}

// Write adds to the file.
func (p *part) Write(b []byte) (int, error) {
	n, err := p.packing.Write(b)
	p.sum.Write(b[:n])
	p.size += uint64(n)
	return n, err
}

// end ends the file that was begun last.
func (a *archive) end() error {
	if a.last == nil {
		return nil
	}
	err := a.last.packing.Close()
	a.last.packing, a.last = nil, nil
	return err
}

// AddFS is refused: a report holds nothing of the file system.
func (a *archive) AddFS(fs.FS) error { return errors.New("a workbook takes no files from outside") }

// Close writes all files in order of name. They carry no time.
func (a *archive) Close() error {
	if err := a.end(); err != nil {
		return err
	}
	out := zip.NewWriter(a.to)
	for _, name := range slices.Sorted(maps.Keys(a.parts)) {
		p := a.parts[name]
		w, err := out.CreateRaw(&zip.FileHeader{Name: name, Method: zip.Deflate, CRC32: p.sum.Sum32(),
			CompressedSize64: uint64(p.packed.Len()), UncompressedSize64: p.size})
		if err != nil {
			return err
		}
		if _, err := p.packed.WriteTo(w); err != nil {
			return err
		}
	}
	return out.Close()
}
