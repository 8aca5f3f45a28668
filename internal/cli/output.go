package cli

import (
	"bufio"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"

	"github.com/urfave/cli/v2"

	"hearduty/internal/diag"
)

// output gives what write writes to standard output or, with --out, to a file. The file is written
// beside its final place first, so that there is never half of one.
func (r *run) output(c *cli.Context, write func(io.Writer) error) error {
	path := c.String("out")
	if path == "" {
		w := bufio.NewWriter(r.stdout)
		err := write(w)
		var refused diag.List
		if err == nil || errors.As(err, &refused) { // what was read beside a refused file is not lost
			err = errors.Join(err, w.Flush())
		}
		return err
	}
	if err := writeFile(path, write); err != nil {
		return fmt.Errorf("%s cannot be written: %w", path, err)
	}
	return nil
}

// writeFile replaces a file. A new one can be read by its owner only, since it is about people.
func writeFile(path string, write func(io.Writer) error) (err error) {
	mode := os.FileMode(0o600)
	if info, err := os.Stat(path); err == nil {
		switch {
		case info.IsDir():
			return errors.New("it is a folder; name a file")
		case !info.Mode().IsRegular():
			return writeThrough(path, write)
		}
		mode = info.Mode().Perm()
	}
	f, err := os.CreateTemp(filepath.Dir(path), ".hearduty-*")
	if err != nil {
		var at *fs.PathError
		if errors.As(err, &at) { // the user did not name the file that could not be made
			err = fmt.Errorf("in the folder %s: %w", filepath.Dir(path), at.Err)
		}
		return err
	}
	defer func() {
		if err != nil {
			f.Close()
			os.Remove(f.Name())
		}
	}()
	w := bufio.NewWriter(f)
	if err := write(w); err != nil {
		return err
	}
	if err := w.Flush(); err != nil {
		return err
	}
	if err := f.Chmod(mode); err != nil {
		return err
	}
	if err := f.Close(); err != nil {
		return err
	}
	return os.Rename(f.Name(), path)
}

// writeThrough writes to something that is no regular file, such as a pipe with a name.
func writeThrough(path string, write func(io.Writer) error) error {
	f, err := os.OpenFile(path, os.O_WRONLY, 0)
	if err != nil {
		return err
	}
	if err := write(f); err != nil {
		f.Close()
		return err
	}
	return f.Close()
}
