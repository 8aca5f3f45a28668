package bundle

import (
	"errors"
	"fmt"
	"io/fs"
	"maps"
	"os"
	"path"
	"path/filepath"
	"slices"
	"strings"
	"testing/fstest"

	"hearduty/internal/diag"
	"hearduty/internal/schema"
	"hearduty/policies"
)

// Source holds bundles that are not embedded, read from a folder or an archive. All of it is in memory; nothing of it
// was checked but its size and its names.
type Source struct {
	Path string   // as it was named
	IDs  []string // the bundles in it that were named, in order

	files  fstest.MapFS      // by folder of the bundle
	bytes  int64             // of all files
	places map[string]string // where a folder was read, by its name
	signed map[string]string // what is known of its signature
}

// manifest is the file that makes a folder a bundle.
const manifest = ".manifest"

// OpenSource reads a folder or a .tar.gz that is one bundle or holds several, each in a folder of its own. Of a folder
// that is one bundle, the bundles that it extends and the shared rules are taken from beside it, if they are there. With
// a key, whatever is read must be signed by it.
func OpenSource(name string, key *Key) (*Source, error) {
	info, err := os.Stat(name)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return nil, refuse(name, "Name a folder or a .tar.gz that holds a bundle", "there is no such folder or file")
	case err != nil:
		return nil, refuse(name, "", "it cannot be read: %v", err)
	}
	s := &Source{Path: name, files: fstest.MapFS{}, places: map[string]string{}, signed: map[string]string{}}
	switch {
	case info.IsDir():
		err = s.readFolder()
	case IsArchive(name):
		err = s.readArchive()
	default:
		return nil, refuse(name, "Name a folder or a .tar.gz", "it is neither a folder nor an archive")
	}
	if err != nil {
		return nil, err
	}
	if len(s.IDs) == 0 {
		return nil, refuse(name, "Name the folder of a bundle, which holds a "+manifest+", or the folder above it", "it holds no bundle")
	}
	if slices.Contains(s.IDs, commonDir) {
		return nil, refuse(name, "Name a bundle that uses them", "it holds the rules that bundles share, and is no bundle")
	}
	slices.Sort(s.IDs)
	for _, dir := range slices.Sorted(maps.Keys(s.places)) {
		if s.signed[dir], err = s.signature(dir, key); err != nil {
			return nil, err
		}
	}
	return s, nil
}

// IsArchive says whether a name is that of an archive of bundles.
func IsArchive(name string) bool {
	return strings.HasSuffix(name, ".tar.gz") || strings.HasSuffix(name, ".tgz")
}

func refuse(file, remedy, format string, args ...any) error {
	var problems diag.List
	problems.Errorf(diag.Position{File: file}, remedy, format, args...)
	return problems
}

// place gives where a bundle was read.
func (s *Source) place(id string) string { return s.places[id] }

// has says whether a folder of the source is a bundle, or holds the shared rules.
func (s *Source) has(dir string) bool { return s.files[path.Join(dir, manifest)] != nil }

func (s *Source) readFolder() error {
	if _, err := os.Stat(filepath.Join(s.Path, manifest)); err != nil {
		entries, err := os.ReadDir(s.Path)
		if err != nil {
			return refuse(s.Path, "", "it cannot be read: %v", err)
		}
		for _, e := range entries {
			dir := filepath.Join(s.Path, e.Name())
			if there, err := isBundle(dir); err != nil {
				return err
			} else if !there {
				continue
			}
			if err := s.mount(e.Name(), dir); err != nil {
				return err
			}
			if e.Name() != commonDir {
				s.IDs = append(s.IDs, e.Name())
			}
		}
		return nil
	}
	whole, err := filepath.Abs(s.Path)
	if err != nil {
		return err
	}
	id := filepath.Base(whole)
	s.IDs = []string{id}
	if err := s.mount(id, s.Path); err != nil {
		return err
	}
	return s.neighbours(id, s.Path, filepath.Dir(whole))
}

// isBundle says whether there is a folder that holds a manifest. A link to one is refused.
func isBundle(dir string) (bool, error) {
	if _, err := os.Stat(filepath.Join(dir, manifest)); err != nil {
		return false, nil
	}
	if info, err := os.Lstat(dir); err != nil || !info.IsDir() {
		return false, refuse(dir, "Put a copy in its place, or name the folder that it leads to", "it is a link to a bundle, and links could lead anywhere")
	}
	return true, nil
}

// neighbours reads what lies beside a bundle and belongs to it: the shared rules, and the bundles that it extends.
func (s *Source) neighbours(id, shown, parent string) error {
	for _, name := range append(s.extends(id), commonDir) {
		if s.has(name) || !plainName(name) {
			continue
		}
		if there, err := isBundle(filepath.Join(parent, name)); err != nil {
			return err
		} else if !there {
			continue
		}
		beside := filepath.Join(shown, "..", name)
		if err := s.mount(name, beside); err != nil {
			return err
		}
		if err := s.neighbours(name, beside, parent); err != nil {
			return err
		}
	}
	return nil
}

// plainName says whether a text can be the name of a folder, and of no other than one right here.
func plainName(name string) bool {
	return fs.ValidPath(name) && name != "." && !strings.ContainsAny(name, `/\:`)
}

// about reads a value from what a bundle says of itself. What cannot be read is complained of when the bundle is loaded.
func (s *Source) about(id, key string) any {
	file := path.Join(id, "about", "data.yaml")
	if s.files[file] == nil {
		return nil
	}
	value, _, _ := schema.YAMLPlaces("", file, s.files[file].Data)
	return entries(value)[key]
}

func (s *Source) extends(id string) (out []string) {
	list, _ := s.about(id, "extends").([]any)
	for _, x := range list {
		if name, ok := x.(string); ok {
			out = append(out, name)
		}
	}
	return out
}

// overlay is a file system whose folders come from several others: those of a source lie over the embedded ones.
type overlay struct {
	tops   map[string]fs.FS
	places map[string]string
}

// overEmbedded lays the bundles of other sources, and then all of one source, over the embedded ones.
func overEmbedded(others []*Source, own *Source) overlay {
	o := overlay{map[string]fs.FS{}, map[string]string{}}
	entries, _ := fs.ReadDir(policies.FS, ".")
	for _, e := range entries {
		if e.IsDir() {
			o.tops[e.Name()] = policies.FS
		}
	}
	for _, s := range others {
		for _, id := range s.IDs {
			o.tops[id], o.places[id] = s.files, s.places[id]
		}
	}
	if own != nil {
		for dir, place := range own.places {
			o.tops[dir], o.places[dir] = own.files, place
		}
	}
	return o
}

// Open implements fs.FS.
func (o overlay) Open(name string) (fs.File, error) {
	top, _, _ := strings.Cut(name, "/")
	if fsys := o.tops[top]; fsys != nil {
		return fsys.Open(name)
	}
	return nil, &fs.PathError{Op: "open", Path: name, Err: fs.ErrNotExist}
}

// ReadDir implements fs.ReadDirFS.
func (o overlay) ReadDir(name string) ([]fs.DirEntry, error) {
	if name != "." {
		top, _, _ := strings.Cut(name, "/")
		if fsys := o.tops[top]; fsys != nil {
			return fs.ReadDir(fsys, name)
		}
		return nil, &fs.PathError{Op: "read", Path: name, Err: fs.ErrNotExist}
	}
	var out []fs.DirEntry
	for _, top := range slices.Sorted(maps.Keys(o.tops)) {
		info, err := fs.Stat(o.tops[top], top)
		if err != nil {
			return nil, fmt.Errorf("the folder %s cannot be read: %w", top, err)
		}
		out = append(out, fs.FileInfoToDirEntry(info))
	}
	return out, nil
}

// locate gives diagnostics with the paths as they were named.
func (o overlay) locate(problems diag.List) diag.List {
	out := slices.Clone(problems)
	for i := range out {
		out[i].Position.File = located(o.places, out[i].Position.File)
	}
	return out
}
