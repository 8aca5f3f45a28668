package intake

import (
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/program"
	"hearduty/internal/record"
)

var update = flag.Bool("update", false, "rewrite the golden files")

const hostile = "../../testdata/hostile"

// Each file KIND.what-is-wrong.EXTENSION is read together with workers.csv; what became of it is in the
// golden file beside it.
func TestHostileFiles(t *testing.T) {
	entries, err := os.ReadDir(hostile)
	require.NoError(t, err)
	for _, e := range entries {
		kind, _, ok := strings.Cut(e.Name(), ".")
		if filepath.Ext(e.Name()) == ".golden" || !ok || kind == "workers" {
			continue
		}
		t.Run(e.Name(), func(t *testing.T) {
			p := &program.Program{
				Sites:   []program.Site{{ID: "kiln-hill"}, {ID: "gerbera"}},
				Sources: []program.Source{{Path: filepath.Join(hostile, e.Name()), Shown: e.Name(), Kind: record.Kind(kind)}},
			}
			if kind != "worker" {
				p.Sources = append(p.Sources, program.Source{Path: filepath.Join(hostile, "workers.csv"), Shown: "workers.csv", Kind: "worker"})
			}
			records, l, err := readAll(t, p)
			require.Equal(t, len(l.Unreadable) > 0, err != nil)
			golden(t, filepath.Join(hostile, e.Name()+".golden"), describe(records, l))
		})
	}
}

// describe tells what became of the first input.
func describe(records []record.Record, l *Ledger) string {
	var b strings.Builder
	in := l.Inputs[0]
	fmt.Fprintf(&b, "rows %d, accepted %d, rejected %d, not data %d", in.Rows, in.Accepted, in.Rejected, in.NotData)
	if in.Declared != nil {
		fmt.Fprintf(&b, " (%s)", Declared(in.Declared))
	}
	b.WriteString("\n")
	for _, d := range l.Unreadable {
		fmt.Fprintf(&b, "refused  %s\n", d)
	}
	for _, r := range l.Rejects {
		fmt.Fprintf(&b, "reject   row %d column %d %s", r.Row, r.Column, r.Field)
		if r.Read != "" {
			fmt.Fprintf(&b, " read %q", r.Read)
		}
		fmt.Fprintf(&b, ": %s. %s.", r.Why, r.Remedy)
		if r.Also != nil {
			fmt.Fprintf(&b, " Also: %s.", strings.Join(r.Also, ", "))
		}
		b.WriteString("\n")
	}
	for _, d := range l.Remarks {
		fmt.Fprintf(&b, "remark   %s\n", d)
	}
	for _, r := range records {
		if r.At().Source == 0 {
			fmt.Fprintf(&b, "accepted %s\n", record.AppendJSON(nil, r, in.File, ""))
		}
	}
	return b.String()
}

func golden(t *testing.T, file, got string) {
	t.Helper()
	if *update {
		require.NoError(t, os.WriteFile(file, []byte(got), 0o600))
	}
	want, err := os.ReadFile(file)
	require.NoError(t, err, "run the test with -update once")
	require.Equal(t, string(want), got)
}
