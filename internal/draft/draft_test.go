package draft

import (
	"bytes"
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gopkg.in/yaml.v3"

	"hearduty/internal/grid"
)

var update = flag.Bool("update", false, "write the golden drafts")

// exports are the invented exports of testdata.
func exports(t *testing.T) []string {
	t.Helper()
	var out []string
	all, err := filepath.Glob("testdata/*.*")
	require.NoError(t, err)
	for _, p := range all {
		if !strings.HasSuffix(p, ".draft.yaml") {
			out = append(out, p)
		}
	}
	require.Greater(t, len(out), 12)
	return out
}

func draftOf(t *testing.T, path string, o Options) string {
	t.Helper()
	var b bytes.Buffer
	require.NoError(t, Write(&b, path, filepath.Base(path), o))
	return b.String()
}

// of writes an export and gives its draft.
func of(t *testing.T, name, content string) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), name)
	require.NoError(t, os.WriteFile(path, []byte(content), 0o600))
	return draftOf(t, path, Options{})
}

func TestGoldenDrafts(t *testing.T) {
	for _, path := range exports(t) {
		t.Run(filepath.Base(path), func(t *testing.T) {
			got := draftOf(t, path, Options{})
			assert.Equal(t, got, draftOf(t, path, Options{}), "two drafts of one file")
			golden := path + ".draft.yaml"
			if *update {
				require.NoError(t, os.WriteFile(golden, []byte(got), 0o644))
			}
			want, err := os.ReadFile(golden)
			require.NoError(t, err)
			assert.Equal(t, string(want), got)
			var any map[string]any
			require.NoError(t, yaml.Unmarshal([]byte(got), &any))
		})
	}
}

func TestFaults(t *testing.T) {
	dir := t.TempDir()
	for name, content := range map[string]string{"empty.csv": "", "old.xls": "\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1 rest", "broken.json": "{\"a\":"} {
		path := filepath.Join(dir, name)
		require.NoError(t, os.WriteFile(path, []byte(content), 0o600))
		err := Write(&bytes.Buffer{}, path, name, Options{})
		var fault *grid.Fault
		require.ErrorAs(t, err, &fault, name)
		assert.NotEmpty(t, fault.Remedy, name)
	}
	var fault *grid.Fault
	require.ErrorAs(t, Write(&bytes.Buffer{}, filepath.Join(dir, "none.csv"), "none.csv", Options{}), &fault)
	require.ErrorAs(t, Write(&bytes.Buffer{}, filepath.Join(dir, "none.csv"), "none.csv", Options{Kind: "audio"}), &fault)
	assert.Contains(t, fault.Problem, "audio")
}

// line gives the only line of a draft that holds the text.
func line(t *testing.T, draft, text string) string {
	t.Helper()
	for _, l := range strings.Split(draft, "\n") {
		if strings.Contains(l, text) {
			return l
		}
	}
	t.Fatalf("no line holds %q:\n%s", text, draft)
	return ""
}

// active gives the lines of a draft that are read.
func active(draft string) string {
	var out []string
	for _, l := range strings.Split(draft, "\n") {
		if !isComment(l) {
			l, _, _ = strings.Cut(l, " # ")
			out = append(out, l)
		}
	}
	return strings.Join(out, "\n")
}
