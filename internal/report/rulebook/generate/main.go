// Command generate writes the book of each bundle into its folder. It is started by go generate in the folder policies.
package main

import (
	"bytes"
	"errors"
	"fmt"
	"os"
	"path/filepath"

	"hearduty/internal/bundle"
	"hearduty/internal/report/rulebook"
)

func main() {
	if err := books(); err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
}

// books writes the books of all bundles of the folder. One that cannot be written does not keep back the others.
func books() error {
	ids, err := bundle.Folders(os.DirFS("."))
	if err != nil {
		return err
	}
	for _, id := range ids {
		err = errors.Join(err, book(id))
	}
	return err
}

func book(id string) error {
	b, problems := bundle.Load(os.DirFS("."), id)
	if err := problems.Err(); err != nil {
		return err
	}
	made, err := rulebook.Kept(b)
	if err != nil {
		return fmt.Errorf("%s: checked_on: %w", id, err)
	}
	var text bytes.Buffer
	if err := made.Markdown(&text); err != nil {
		return err
	}
	return os.WriteFile(filepath.Join(id, rulebook.FileName), text.Bytes(), 0o644)
}
