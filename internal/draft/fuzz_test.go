package draft

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"gopkg.in/yaml.v3"
)

// FuzzDraft holds the draft to valid YAML, to the same bytes for the same file, and to a map that loads if no
// question is open.
func FuzzDraft(f *testing.F) {
	all, _ := filepath.Glob("testdata/*.*")
	for _, p := range all {
		if content, err := os.ReadFile(p); err == nil && !strings.HasSuffix(p, ".draft.yaml") {
			f.Add(filepath.Ext(p), content)
		}
	}
	f.Add(".csv", []byte("left.500: 20\nEmp,R500,R1000,R2000\n\"a\x00\",#,:,\u2028\n"))
	dir := f.TempDir()
	f.Fuzz(func(t *testing.T, ending string, content []byte) {
		switch ending {
		case ".csv", ".tsv", ".txt", ".json", ".ndjson", ".yaml":
		default:
			ending = ".csv"
		}
		path := filepath.Join(dir, "export"+ending)
		if err := os.WriteFile(path, content, 0o600); err != nil {
			t.Fatal(err)
		}
		var first, second bytes.Buffer
		if Write(&first, path, "export", Options{}) != nil {
			return
		}
		var form map[string]any
		if err := yaml.Unmarshal(first.Bytes(), &form); err != nil {
			t.Fatalf("%v\n%s", err, first.String())
		}
		if strings.Contains(first.String(), "# No question is open.") {
			if _, l := load(t, first.String()); l.Failed() {
				t.Fatalf("%v\n%s", l, first.String())
			}
		}
		if err := Write(&second, path, "export", Options{}); err != nil || !bytes.Equal(first.Bytes(), second.Bytes()) {
			t.Fatalf("the second draft differs: %v", err)
		}
	})
}
