package grid

import (
	"errors"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
)

// File is one file that can be read as a table, also several times: a file of a folder, or a member of a ZIP archive.
type File struct {
	Name   string // for its ending
	Format Format // by its first bytes, else by its ending
	SHA256 string // in hex

	r       source
	survey  survey
	closers []func() error
}

// source is what a File is read from: the file itself, or the unpacked member.
type source interface {
	io.ReadSeeker
	io.ReaderAt
}

// Open opens the file at path, or a member of the ZIP archive there, takes its digest and tells its
// format. The error is a *Fault where a sentence can say what to do.
func Open(path, member string) (*File, error) {
	file, err := openRegular(path)
	if err != nil {
		return nil, err
	}
	f := &File{Name: filepath.Base(path), r: file, closers: []func() error{file.Close}}
	if member != "" {
		if f, err = unpack(file, member); err != nil {
			file.Close()
			return nil, err
		}
	}
	if err := f.tell(); err != nil {
		f.Close()
		return nil, err
	}
	return f, nil
}

// openRegular opens a file and refuses what is none.
func openRegular(path string) (*os.File, error) {
	if strings.HasPrefix(filepath.Base(path), "~$") {
		return nil, faultf("Close the workbook, and name it instead: "+strings.TrimPrefix(filepath.Base(path), "~$"), "this is no workbook but the mark that one is being edited")
	}
	info, err := os.Stat(path)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return nil, faultf("Correct the path, or put the file there", "the file does not exist")
	case err == nil && info.IsDir():
		return nil, faultf("Name the files in it one by one", "this is a folder, not a file")
	case err == nil && !info.Mode().IsRegular():
		return nil, faultf("Save the records as a file and name that", "this is no regular file")
	}
	file, err := os.Open(path)
	if err != nil {
		return nil, cannotRead(err)
	}
	return file, nil
}

func cannotRead(err error) *Fault {
	var e *fs.PathError
	if errors.As(err, &e) {
		err = e.Err
	}
	return faultf("Check the file and its permissions", "the file cannot be read: %v", err)
}

// tell takes the survey of the file and tells its format.
func (f *File) tell() error {
	s, err := takeSurvey(f.r)
	if err != nil {
		return cannotRead(err)
	}
	f.survey, f.SHA256 = s, s.digest
	f.Format, err = f.recognize()
	return err
}

// Raw gives the bytes of the file from its beginning.
func (f *File) Raw() (io.ReadSeeker, error) {
	if _, err := f.r.Seek(0, io.SeekStart); err != nil {
		return nil, cannotRead(err)
	}
	return f.r, nil
}

// Rows reads the file as a table from its beginning. Several Rows of one File must not be read at a time.
func (f *File) Rows(o Options) (Rows, error) {
	switch f.Format {
	case Workbook:
		return openWorkbook(f, o)
	case JSON, Lines, YAML:
		return newObjects(f, o)
	}
	return newDelimited(f, o)
}

// Close closes the file and removes what was unpacked.
func (f *File) Close() error {
	var all []error
	for _, c := range f.closers {
		all = append(all, c())
	}
	f.closers = nil
	return errors.Join(all...)
}
