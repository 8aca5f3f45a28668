package grid

import (
	"bytes"
	"errors"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

// write writes a file to a folder of its own and gives its path.
func write(t testing.TB, name, content string) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), name)
	require.NoError(t, os.WriteFile(path, []byte(content), 0o600))
	return path
}

// open opens a file with this content.
func open(t testing.TB, name, content string) *File {
	t.Helper()
	f, err := Open(write(t, name, content), "")
	require.NoError(t, err)
	t.Cleanup(func() { require.NoError(t, f.Close()) })
	return f
}

// inMemory makes a File without a file.
func inMemory(name string, content []byte) (*File, error) {
	f := &File{Name: name, r: bytes.NewReader(content)}
	return f, f.tell()
}

// table reads all rows: cells with a bar between them, and what is wrong with a row after an exclamation mark.
func table(t require.TestingT, f *File, o Options) ([]string, About) {
	rows, err := f.Rows(o)
	require.NoError(t, err)
	defer func() { require.NoError(t, rows.Close()) }()
	var out []string
	var r Row
	for {
		err := rows.Next(&r)
		var fault *Fault
		switch {
		case err == io.EOF:
			return out, rows.About()
		case errors.As(err, &fault):
			return append(out, "!! "+fault.Problem), rows.About()
		}
		require.NoError(t, err)
		require.GreaterOrEqual(t, r.Last, r.Line)
		cells := make([]string, len(r.Cells))
		for i, c := range r.Cells {
			cells[i] = c.Text
		}
		line := strings.Join(cells, "|")
		if r.Fault != nil {
			line += "! " + r.Fault.Problem
		}
		if r.NotData != "" {
			line += " (" + r.NotData + ")"
		}
		out = append(out, line)
	}
}

// problem gives the fault of an error.
func problem(t require.TestingT, err error) *Fault {
	var f *Fault
	require.ErrorAs(t, err, &f)
	for _, s := range []string{f.Problem, f.Remedy} {
		require.NotEmpty(t, s)
		require.False(t, strings.HasSuffix(s, "."), s)
	}
	return f
}
