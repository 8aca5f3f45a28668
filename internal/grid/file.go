package grid

import "errors"

// File is one file that can be read as a table, also several times: a file of a folder, or a member of a ZIP archive.
type File struct {
	Name   string // for its ending
	Format Format // by its first bytes, else by its ending
	SHA256 string // in hex
}

// Open opens the file at path, or a member of the ZIP archive there, takes its digest and tells its
// format. The error is a *Fault where a sentence can say what to do.
func Open(path, member string) (*File, error) { return nil, errors.New("not yet") }

// Rows reads the file as a table from its beginning. Several Rows of one File must not be read at a time.
func (f *File) Rows(o Options) (Rows, error) { return nil, errors.New("not yet") }

// Close closes the file and removes what was unpacked.
func (f *File) Close() error { return nil }

// Members lists the files of the ZIP archive at path by their names with slashes, sorted, without folders.
func Members(path string) ([]string, error) { return nil, errors.New("not yet") }
