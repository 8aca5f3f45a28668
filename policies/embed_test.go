package policies

import (
	"io/fs"
	"os"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// TestOnlyTheBooksAreLeftOut holds what is embedded to the files in the folders.
func TestOnlyTheBooksAreLeftOut(t *testing.T) {
	paths := func(fsys fs.FS) (out []string) {
		require.NoError(t, fs.WalkDir(fsys, ".", func(p string, entry fs.DirEntry, err error) error {
			if err == nil && !entry.IsDir() && entry.Name() != "BOOK.md" {
				out = append(out, p)
			}
			return err
		}))
		return out
	}
	var want []string
	folders, err := os.ReadDir(".")
	require.NoError(t, err)
	for _, f := range folders {
		if f.IsDir() {
			within, err := fs.Sub(os.DirFS("."), f.Name())
			require.NoError(t, err)
			for _, p := range paths(within) {
				want = append(want, f.Name()+"/"+p)
			}
		}
	}
	assert.Equal(t, want, paths(FS))
	books, err := fs.Glob(FS, "*/BOOK.md")
	require.NoError(t, err)
	assert.Empty(t, books)
}
