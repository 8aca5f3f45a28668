package demo

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
)

// parts are what a program's folder may hold, the program file last.
var parts = []string{"records", "abroad", "exports", "maps", "exports.yaml", "accepted.yaml", "program.yaml"}

// optional are the parts that programs for measuring speed do not have.
var optional = []string{"abroad", "exports", "maps", "exports.yaml", "accepted.yaml"}

// publish lets fill write into a temporary folder within dir and moves the result into place only when
// all of it is written, program.yaml last. Whatever fails, nothing half-written stays behind.
func publish(dir string, fill func(temporary string) error) (err error) {
	made, err := prepare(dir)
	if err != nil {
		return err
	}
	temporary, err := os.MkdirTemp(dir, ".writing-")
	if err != nil {
		return fmt.Errorf("cannot write into %s: %w", dir, cause(err))
	}
	defer func() {
		os.RemoveAll(temporary)
		if err != nil {
			for _, name := range parts {
				os.RemoveAll(filepath.Join(dir, name))
			}
			if made {
				os.Remove(dir)
			}
		}
	}()
	if err := fill(temporary); err != nil {
		return fmt.Errorf("cannot write the program into %s: %w", dir, cause(err))
	}
	for _, name := range parts {
		if _, err := os.Stat(filepath.Join(temporary, name)); errors.Is(err, fs.ErrNotExist) && slices.Contains(optional, name) {
			continue
		}
		if err := os.Rename(filepath.Join(temporary, name), filepath.Join(dir, name)); err != nil {
			return fmt.Errorf("cannot write the program into %s: %w", dir, cause(err))
		}
	}
	return nil
}

// prepare makes dir if there is none, and refuses one that is not empty. It says whether it made dir.
func prepare(dir string) (made bool, err error) {
	entries, err := os.ReadDir(dir)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		if err := os.MkdirAll(dir, 0o755); err != nil {
			return false, fmt.Errorf("cannot make the folder %s: %w", dir, cause(err))
		}
		return true, nil
	case err != nil:
		return false, fmt.Errorf("cannot write into %s: %w", dir, cause(err))
	case len(entries) > 0:
		return false, fmt.Errorf("the folder %s is not empty; name a new folder or an empty one", dir)
	}
	return false, nil
}

// cause gives the reason of a file error without the path of a temporary file.
func cause(err error) error {
	if e, ok := errors.AsType[*fs.PathError](err); ok {
		return e.Err
	}
	if e, ok := errors.AsType[*os.LinkError](err); ok {
		return e.Err
	}
	return err
}
