package mapping_test

import (
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/rogpeppe/go-internal/txtar"
	"github.com/stretchr/testify/require"
)

var update = flag.Bool("update", false, "write what is found into the cases under testdata")

// TestCases reads each case under testdata: a map, an export, and what became of the rows. With -update the last part
// is written; somebody must then read it.
func TestCases(t *testing.T) {
	paths, err := filepath.Glob(filepath.Join("testdata", "*.txtar"))
	require.NoError(t, err)
	require.NotEmpty(t, paths)
	for _, path := range paths {
		t.Run(strings.TrimSuffix(filepath.Base(path), ".txtar"), func(t *testing.T) {
			a, err := txtar.ParseFile(path)
			require.NoError(t, err)
			require.Len(t, a.Files, 3, "a map, an export, and want")
			require.Equal(t, "want", a.Files[2].Name)
			m, problems := load(t, string(a.Files[0].Data))
			got := ""
			for _, d := range problems {
				got += d.String() + "\n"
			}
			if m != nil {
				got += read(t, m, export(t, a.Files[1].Name, string(a.Files[1].Data)))
			}
			if *update {
				a.Files[2].Data = []byte(got)
				require.NoError(t, os.WriteFile(path, txtar.Format(a), 0o600))
			}
			require.Equal(t, string(a.Files[2].Data), got)
		})
	}
}
