package bundle

import (
	"archive/tar"
	"compress/gzip"
	"errors"
	"io"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"strings"
	"testing/fstest"
)

// Bounds of what is read from a source. The largest embedded bundle has a thousandth of the bytes.
const (
	maxFiles     = 5_000
	maxFileBytes = 4 << 20
	maxBytes     = 64 << 20 // of all files together
	maxPacked    = 32 << 20 // of an archive
)

// take adds a file, unless there are too many or it is too large.
func (s *Source) take(name, shown string, size int64, r io.Reader) error {
	if size > maxFileBytes {
		return refuse(shown, "Leave it out; a bundle holds rules and data, no large files", "the file is larger than %d MB", maxFileBytes>>20)
	}
	text, err := io.ReadAll(io.LimitReader(r, maxFileBytes+1))
	if err != nil {
		return refuse(shown, "Copy or pack it again", "it cannot be read: %v", err)
	}
	s.bytes += int64(len(text))
	switch {
	case len(text) > maxFileBytes:
		return refuse(shown, "Leave it out; a bundle holds rules and data, no large files", "the file is larger than %d MB", maxFileBytes>>20)
	case len(s.files) >= maxFiles:
		return refuse(s.Path, "Name a folder that holds bundles only", "it holds more than %d files", maxFiles)
	case s.bytes > maxBytes:
		return refuse(s.Path, "Name a folder that holds bundles only", "its files are larger than %d MB together", maxBytes>>20)
	case s.files[name] != nil:
		return refuse(shown, "Pack it again", "the file stands twice in the archive")
	}
	s.files[name] = &fstest.MapFile{Data: text, Mode: 0o444}
	return nil
}

// mount reads the folder of a bundle. Links are refused: they could lead anywhere.
func (s *Source) mount(id, dir string) error {
	root, err := os.OpenRoot(dir)
	if err != nil {
		return refuse(dir, "", "the folder cannot be read: %v", err)
	}
	defer root.Close()
	s.places[id] = filepath.ToSlash(dir)
	return fs.WalkDir(root.FS(), ".", func(p string, entry fs.DirEntry, err error) error {
		shown := filepath.Join(dir, filepath.FromSlash(p))
		switch {
		case err != nil:
			return refuse(shown, "", "it cannot be read: %v", err)
		case entry.IsDir() && entry.Name() == ".git":
			return fs.SkipDir
		case entry.IsDir():
			return nil
		case !entry.Type().IsRegular():
			return refuse(shown, "Put a copy in its place", "it is a link or a device, and a bundle holds plain files only")
		}
		f, err := root.Open(filepath.FromSlash(p))
		if err != nil {
			return refuse(shown, "", "it cannot be read: %v", err)
		}
		defer f.Close()
		info, err := f.Stat()
		if err != nil {
			return refuse(shown, "", "it cannot be read: %v", err)
		}
		return s.take(path.Join(id, p), shown, info.Size(), f)
	})
}

// readArchive reads a .tar.gz: one bundle, as OPA packs it, or folders of bundles.
func (s *Source) readArchive() error {
	f, err := os.Open(s.Path)
	if err != nil {
		return refuse(s.Path, "", "it cannot be read: %v", err)
	}
	defer f.Close()
	if info, err := f.Stat(); err != nil || !info.Mode().IsRegular() || info.Size() > maxPacked {
		return refuse(s.Path, "Pack the bundle alone", "the archive is larger than %d MB or no plain file", maxPacked>>20)
	}
	z, err := gzip.NewReader(f)
	if err != nil {
		return refuse(s.Path, "Pack it with: tar czf FILE FOLDER", "it is no archive packed by gzip")
	}
	// Headers count, too: an archive of a million empty folders is refused as well.
	if err := s.readTar(tar.NewReader(io.LimitReader(z, maxBytes+maxFiles*4096))); err != nil {
		return err
	}
	return s.unpacked()
}

func (s *Source) readTar(t *tar.Reader) error {
	for n := 0; ; n++ {
		h, err := t.Next()
		if errors.Is(err, io.EOF) {
			return nil
		}
		if err != nil {
			return refuse(s.Path, "Copy or pack it again", "the archive is damaged, cut off or too large: %v", err)
		}
		if n > 2*maxFiles {
			return refuse(s.Path, "Pack the bundle alone", "it holds more than %d files", maxFiles)
		}
		name := path.Clean(strings.TrimLeft(h.Name, "/")) // OPA writes a slash first
		shown := s.Path + "/" + strings.TrimLeft(h.Name, "/")
		switch h.Typeflag {
		case tar.TypeDir, tar.TypeXGlobalHeader:
			continue
		case tar.TypeReg:
		default:
			return refuse(shown, "Pack a copy in its place", "it is a link or a device, and a bundle holds plain files only")
		}
		if !fs.ValidPath(name) || name == "." || strings.ContainsAny(name, "\\:\x00") {
			return refuse(s.Path, "Do not use an archive that you do not trust", "the name %q leads out of the archive, or is no name of a file", h.Name)
		}
		if err := s.take(name, shown, h.Size, t); err != nil {
			return err
		}
	}
}

// unpacked finds the bundles in the files of an archive. One bundle alone gets the folder that its id names.
func (s *Source) unpacked() error {
	if s.files[manifest] != nil {
		if s.files["data.json"] != nil {
			return refuse(s.Path, "Pack the folder as it is, with: tar czf FILE -C FOLDER .", "the archive holds all data in one data.json, as `opa build` writes it, in which nothing has a place any more")
		}
		inner := fstest.MapFS{}
		for name, f := range s.files {
			inner["x/"+name] = f
		}
		id, ok := (&Source{files: inner}).about("x", "id").(string)
		if !ok || !plainName(id) {
			return refuse(s.Path+"/about/data.yaml", "Write id: and the id of the bundle", "the bundle does not say its id")
		}
		s.files = fstest.MapFS{}
		for name, f := range inner {
			s.files[id+name[1:]] = f
		}
		s.IDs, s.places[id] = []string{id}, s.Path
		return nil
	}
	for name := range s.files {
		if dir, file := path.Split(name); file == manifest && strings.Count(dir, "/") == 1 {
			id := strings.TrimSuffix(dir, "/")
			s.places[id] = s.Path + "/" + id
			if id != commonDir {
				s.IDs = append(s.IDs, id)
			}
		}
	}
	return nil
}
