package grid

import (
	"archive/zip"
	"compress/flate"
	"errors"
	"io"
	"io/fs"
	"os"
	"path"
	"slices"
	"strings"
	"unicode/utf8"

	"golang.org/x/text/encoding/charmap"

	"hearduty/internal/diag"
)

// Bounds of a ZIP archive.
const (
	maxMembers  = 10_000
	maxUnpacked = 2 << 30  // bytes of one member
	fairSize    = 64 << 20 // bytes of a member, up to which its ratio does not matter
	maxRatio    = 200      // unpacked to packed; text packs ten- to fortyfold
)

// Members lists the files of the ZIP archive at path by their names with slashes, sorted, without folders. What
// some systems add to archives on their own, such as __MACOSX, is left out. The error is a *Fault where a
// sentence can say what to do.
func Members(path string) ([]string, error) {
	file, err := openRegular(path)
	if err != nil {
		return nil, err
	}
	defer file.Close()
	z, err := archiveOf(file)
	if err != nil {
		return nil, err
	}
	return names(z), nil
}

func archiveOf(file *os.File) (*zip.Reader, error) {
	info, err := file.Stat()
	if err != nil {
		return nil, cannotRead(err)
	}
	return openArchive(file, info.Size())
}

// openArchive reads the directory of an archive, makes its names plain and refuses names that lead out of it.
func openArchive(r io.ReaderAt, size int64) (*zip.Reader, error) {
	z, err := zip.NewReader(r, size)
	switch {
	case errors.Is(err, zip.ErrFormat):
		return nil, faultf("Copy or export the file again", "the file begins as a workbook or ZIP archive does, but is damaged or cut off")
	case err != nil && !errors.Is(err, zip.ErrInsecurePath):
		return nil, cannotRead(err)
	case len(z.File) > maxMembers:
		return nil, faultf("Unpack the archive and name the files", "the archive holds more than %d files", maxMembers)
	}
	for _, m := range z.File {
		m.Name = plainName(m.Name)
		if !safeName(m.Name) {
			return nil, faultf("Do not use the archive, and ask where it comes from", "the archive holds a file whose name leads out of it: %q", shorten(m.Name))
		}
	}
	return z, nil
}

// plainName gives a name in UTF-8 with slashes. Names in no UTF-8 are read in the page that archives have from
// their beginnings.
func plainName(name string) string {
	if !utf8.ValidString(name) {
		name, _ = charmap.CodePage437.NewDecoder().String(name)
	}
	return strings.ReplaceAll(name, `\`, "/")
}

func safeName(name string) bool {
	if name == "" || name[0] == '/' || len(name) > 1 && name[1] == ':' || strings.ContainsFunc(name, func(r rune) bool { return r < ' ' || r == 0x7f }) {
		return false
	}
	return !slices.Contains(strings.Split(name, "/"), "..")
}

func names(z *zip.Reader) []string {
	var out []string
	for _, m := range z.File {
		if !strings.HasSuffix(m.Name, "/") && !strings.HasPrefix(m.Name, "__MACOSX/") && path.Base(m.Name) != ".DS_Store" {
			out = append(out, m.Name)
		}
	}
	slices.Sort(out)
	return out
}

// listed names the first files of an archive for a remedy.
func listed(z *zip.Reader) string {
	all := names(z)
	if len(all) == 0 {
		return ""
	}
	out := ", such as "
	for i, n := range all {
		if i == 3 {
			return out
		}
		if i > 0 {
			out += ", "
		}
		out += shorten(n)
	}
	return out
}

// unpack copies a member of the archive to a temporary file.
func unpack(archive *os.File, name string) (*File, error) {
	z, err := archiveOf(archive)
	if err != nil {
		return nil, err
	}
	m, err := findMember(z, name)
	if err != nil {
		return nil, err
	}
	in, err := m.Open()
	if err != nil {
		return nil, cannotUnpack(name, err)
	}
	defer in.Close()
	temp, err := os.CreateTemp("", "hearduty-*")
	if err != nil {
		return nil, err
	}
	f := &File{Name: path.Base(m.Name), r: temp, closers: []func() error{archive.Close, temp.Close}}
	if os.Remove(temp.Name()) != nil { // some systems do not remove an open file
		f.closers = append(f.closers, func() error { return os.Remove(temp.Name()) })
	}
	if err := copyMember(temp, in, m); err != nil {
		f.Close()
		return nil, err
	}
	if _, err := temp.Seek(0, io.SeekStart); err != nil {
		f.Close()
		return nil, err
	}
	return f, nil
}

// findMember finds a member by its exact name, and refuses those that cannot be read.
func findMember(z *zip.Reader, name string) (*zip.File, error) {
	var found *zip.File
	for _, m := range z.File {
		if m.Name != name || strings.HasSuffix(name, "/") {
			continue
		}
		if found != nil {
			return nil, faultf("Unpack the archive and name the right file", "the archive holds two files named %q", shorten(name))
		}
		found = m
	}
	const unpackIt = "Unpack the archive and name the file"
	switch {
	case found == nil:
		remedy := "Name one of its files" + listed(z)
		if near := diag.Near(name, names(z)); near != "" {
			remedy = "Write " + near + " if that is meant; case counts"
		}
		return nil, faultf(remedy, "the archive holds no file %q", shorten(name))
	case found.Flags&1 != 0:
		return nil, faultf("Pack it again without a password, or unpack it and name the file", "the file %q of the archive has a password", shorten(name))
	case found.Mode()&fs.ModeType != 0:
		return nil, faultf(unpackIt, "%q of the archive is a link or a device, not a file", shorten(name))
	case found.UncompressedSize64 > maxUnpacked:
		return nil, tooBig(name)
	}
	return found, nil
}

func tooBig(name string) *Fault {
	return faultf("Unpack the archive, if you know where it comes from, and name the file", "the file %q of the archive would fill more than %d GiB, or %d times its packed size", shorten(name), maxUnpacked>>30, maxRatio)
}

// copyMember copies within the bounds, whatever the directory of the archive says of sizes.
func copyMember(to io.Writer, from io.Reader, m *zip.File) error {
	limit := int64(maxUnpacked)
	if packed := int64(min(m.CompressedSize64, maxUnpacked)); packed < maxUnpacked/maxRatio {
		limit = max(fairSize, packed*maxRatio)
	}
	n, err := io.Copy(to, io.LimitReader(from, limit+1))
	switch {
	case err != nil:
		return cannotUnpack(m.Name, err)
	case n > limit:
		return tooBig(m.Name)
	}
	return nil
}

func cannotUnpack(name string, err error) *Fault {
	var corrupt flate.CorruptInputError
	switch {
	case errors.Is(err, zip.ErrAlgorithm):
		return faultf("Pack it again as an ordinary ZIP archive, or unpack it and name the file", "the file %q of the archive is packed in a way that cannot be read", shorten(name))
	case errors.Is(err, zip.ErrChecksum), errors.Is(err, zip.ErrFormat), errors.Is(err, io.ErrUnexpectedEOF), errors.As(err, &corrupt):
		return faultf("Copy or export the archive again", "the file %q of the archive is damaged", shorten(name))
	}
	return cannotRead(err)
}
