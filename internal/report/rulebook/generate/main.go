// Command generate writes the book of each bundle into its folder. It is started by go generate in the folder policies.
package main

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"

	"hearduty/internal/bundle"
	"hearduty/internal/report/rulebook"
)

func main() {
	if err := write(); err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
}

func write() error {
	policies := os.DirFS(".")
	ids, err := bundle.Folders(policies)
	if err != nil {
		return err
	}
	for _, id := range ids {
		b, problems := bundle.Load(policies, id)
		if err := problems.Err(); err != nil {
			return err
		}
		book, err := rulebook.Kept(b)
		if err != nil {
			return err
		}
		var text bytes.Buffer
		if err := book.Markdown(&text); err != nil {
			return err
		}
		if err := os.WriteFile(filepath.Join(id, rulebook.FileName), text.Bytes(), 0o644); err != nil {
			return err
		}
	}
	return nil
}
