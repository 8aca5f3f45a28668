package draft

import (
	"bytes"
	"maps"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"gopkg.in/yaml.v3"
	"pgregory.net/rapid"

	"hearduty/internal/diag"
	"hearduty/internal/mapping"
)

// cells are entries of every sort that exports have.
var someCells = []string{
	"", "000123", "124", "A-7", "04/03/2025", "25/03/2025", "2025-03-04", "4-Mar-25", "31/12/9999", "45720", "n/a", "M", "F", "1", "2", "yes", "N",
	"Right", "L", "500", "0.5", "25", "37,5", "1.234,5", "NR", "666", "999", ">100", "45m", "-", "7:45", "465", "62.5 %", "baseline", "annual", "Total", "#x", "Left",
}

// TestNoColumnIsForgotten makes exports of known and unknown names with cells of every sort. Whatever the draft makes
// of them, each column stands in it, no id and no date does, it is YAML, and it loads if no question is open.
func TestNoColumnIsForgotten(t *testing.T) {
	names := slices.Sorted(maps.Keys(known.names))
	names = append(names, slices.Sorted(maps.Keys(known.unwanted))...)
	for _, ear := range []string{"R", "L", "Right ", "left.", "D", "G"} {
		for _, hz := range []string{"500", "1000", "2k", "3", "8000", "125"} {
			names = append(names, ear+hz, "BL_"+ear+hz, "CUR_"+ear+hz, hz)
		}
	}
	names = append(names, "Flurb", "x y", `a "quoted" name`, "colon: here", "yes", "# sign", "BL_Date", "CUR_Date", "STS_R")
	dir := t.TempDir()
	rapid.Check(t, func(t *rapid.T) {
		header := rapid.SliceOfN(rapid.SampledFrom(names), 2, 14).Draw(t, "header")
		var rows [][]string
		for range rapid.IntRange(1, 6).Draw(t, "rows") {
			rows = append(rows, rapid.SliceOfN(rapid.SampledFrom(someCells), len(header), len(header)).Draw(t, "row"))
		}
		path := filepath.Join(dir, "export.csv")
		if err := os.WriteFile(path, []byte(asCSV(append([][]string{header}, rows...))), 0o600); err != nil {
			t.Fatal(err)
		}
		var b bytes.Buffer
		if err := Write(&b, path, "export.csv", Options{}); err != nil {
			t.Fatalf("%v", err)
		}
		checkDraft(t, b.String(), header)
	})
}

func checkDraft(t *rapid.T, draft string, header []string) {
	var form map[string]any
	if err := yaml.Unmarshal([]byte(draft), &form); err != nil {
		t.Fatalf("%v\n%s", err, draft)
	}
	for _, secret := range []string{"000123", "04/03/2025", "25/03/2025", "1.234,5"} {
		if strings.Contains(draft, secret) {
			t.Fatalf("the draft repeats the cell %q:\n%s", secret, draft)
		}
	}
	if strings.Contains(draft, "  row: 1\n") { // else its cells are not repeated
		for i, name := range header {
			place := strconv.Itoa(i + 1)
			if !strings.Contains(draft, quote(name)) && !strings.Contains(draft, "column "+place) && !strings.Contains(draft, "position: "+place) {
				t.Fatalf("the draft forgets the column %q:\n%s", name, draft)
			}
		}
	}
	if !strings.Contains(draft, "# No question is open.") {
		return
	}
	if l := loadText(t, draft); l.Failed() {
		t.Fatalf("no question is open, but the draft does not load: %v\n%s", l, draft)
	}
}

func loadText(t *rapid.T, draft string) diag.List {
	file, err := os.CreateTemp("", "hearduty-draft-*.yaml")
	if err != nil {
		t.Fatal(err)
	}
	defer os.Remove(file.Name())
	if _, err := file.WriteString(draft); err != nil {
		t.Fatal(err)
	}
	if err := file.Close(); err != nil {
		t.Fatal(err)
	}
	_, l := mapping.Load(file.Name(), "map.yaml")
	return l
}

func asCSV(rows [][]string) string {
	var b strings.Builder
	for _, row := range rows {
		for i, c := range row {
			if i > 0 {
				b.WriteByte(',')
			}
			b.WriteString(`"` + strings.ReplaceAll(c, `"`, `""`) + `"`)
		}
		b.WriteByte('\n')
	}
	return b.String()
}
