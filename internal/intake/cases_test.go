package intake

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/diag"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

// TestCases reads each program testdata/intake/CASE/program.yaml. What becomes of its exports is in the golden files
// beside it: records.ndjson, and ledger.txt with the counts, refusals, rejects, remarks and observations. A
// case is added as a folder with its program file, exports and maps; then the test is run with -update, and
// the golden files are read by somebody.
func TestCases(t *testing.T) {
	programs, err := filepath.Glob(filepath.Join(sample, "*", program.FileName))
	require.NoError(t, err)
	require.NotEmpty(t, programs)
	for _, file := range programs {
		dir := filepath.Dir(file)
		t.Run(filepath.Base(dir), func(t *testing.T) {
			p, problems := program.Load(dir)
			var lines, ledger bytes.Buffer
			tell(&ledger, "program", problems, dir)
			if p != nil {
				records, l, err := readAll(t, p)
				require.Equal(t, l.Unreadable.Failed(), err != nil)
				w := NewNDJSONWriter(&lines, l.Inputs)
				for _, r := range records {
					require.NoError(t, w.Write(r))
				}
				account(&ledger, l, dir)
				roundTrip(t, p, records, l)
			}
			golden(t, filepath.Join(dir, "records.ndjson"), lines.String())
			golden(t, filepath.Join(dir, "ledger.txt"), ledger.String())
		})
	}
}

// roundTrip writes the records as canonical CSV, one file an input, and reads these: no reject, and the same records.
func roundTrip(t *testing.T, p *program.Program, want []record.Record, l *Ledger) {
	t.Helper()
	dir := t.TempDir()
	again := program.Program{Sites: p.Sites}
	for i, in := range l.Inputs {
		var own []record.Record
		for _, r := range want {
			if int(r.At().Source) == i {
				own = append(own, r)
			}
		}
		if in.Kind == "" {
			continue
		}
		table, _ := record.TableOf(in.Kind)
		name := fmt.Sprintf("%d-%s.csv", i, table.FileName())
		source := program.Source{Path: filepath.Join(dir, name), Shown: name, Kind: in.Kind}
		if len(own) > 0 {
			require.NoError(t, os.WriteFile(source.Path, write(t, ".csv", own, in.Kind), 0o600))
		} else if !refused(l, i) {
			continue
		}
		again.Sources = append(again.Sources, source) // a file that is not there is refused, too
	}
	got, l, _ := readAll(t, &again)
	for _, r := range l.Rejects {
		require.Zero(t, r.Row, "%s:%d %s", r.File, r.Row, r.Why)
	}
	require.Len(t, got, len(want))
	for i := range got {
		got[i].SetAt(record.Origin{})
		want[i].SetAt(record.Origin{})
	}
	require.Equal(t, want, got)
}

// refused says whether an input was refused as a whole or from some place on.
func refused(l *Ledger, source int) bool {
	return slices.ContainsFunc(l.Rejects, func(r Reject) bool { return r.Source == source && r.Row == 0 })
}

// account writes the ledger as the golden files hold it.
func account(b *bytes.Buffer, l *Ledger, dir string) {
	for _, in := range l.Inputs {
		fmt.Fprintf(b, "input    %s, %s: %d rows = %d accepted + %d rejected + %d not data", in.Name(), in.Kind, in.Rows, in.Accepted, in.Rejected, in.NotData)
		if in.Declared != nil {
			fmt.Fprintf(b, " (%s)", Declared(in.Declared))
		}
		fmt.Fprintf(b, "; %d records\n", in.Records)
	}
	tell(b, "refused", l.Unreadable, dir)
	for _, r := range l.Rejects {
		place := at(r.File, r.Sheet, r.Row)
		if r.Row == 0 {
			place = l.Inputs[r.Source].Name()
		}
		fmt.Fprintf(b, "reject   %s", place)
		if r.Column > 0 {
			fmt.Fprintf(b, " column %d", r.Column)
		}
		if r.Header != "" {
			fmt.Fprintf(b, " headed %q", r.Header)
		}
		if r.Field != "" {
			fmt.Fprintf(b, " for %s", r.Field)
		}
		if r.Read != "" {
			fmt.Fprintf(b, " read %q", r.Read)
		}
		fmt.Fprintf(b, ": %s. %s.", r.Why, r.Remedy)
		if r.Also != nil {
			fmt.Fprintf(b, " Also: %s.", strings.Join(r.Also, ", "))
		}
		b.WriteString("\n")
	}
	tell(b, "remark", l.Remarks, dir)
	for _, o := range l.Observations {
		fmt.Fprintf(b, "observed %s: %s\n", o.Kind, ObservationSentence(o))
	}
}

// tell writes diagnostics with paths relative to the folder of the case.
func tell(b *bytes.Buffer, what string, list diag.List, dir string) {
	for _, d := range list {
		fmt.Fprintf(b, "%-8s %s\n", what, strings.ReplaceAll(d.String(), filepath.ToSlash(dir)+"/", ""))
	}
}

// readAll reads a program and checks that no row was lost.
func readAll(t testing.TB, p *program.Program) ([]record.Record, *Ledger, error) {
	t.Helper()
	var records []record.Record
	l, err := Read(t.Context(), p, func(r record.Record) error {
		records = append(records, r)
		return nil
	})
	balanced(t, l, len(records))
	return records, l, err
}

// balanced checks that every row that was read became something, and that every reject says what to do.
func balanced(t testing.TB, l *Ledger, emitted int) {
	t.Helper()
	rejected := make([]int, len(l.Inputs))
	for _, r := range l.Rejects {
		require.NotEmpty(t, r.Why)
		require.NotEmpty(t, r.Remedy)
		require.Equal(t, l.Inputs[r.Source].File, r.File)
		if r.Row > 0 {
			rejected[r.Source]++
		}
	}
	for i, in := range l.Inputs {
		require.Equal(t, in.Rows, in.Accepted+in.Rejected+in.NotData, in.File)
		require.Equal(t, rejected[i], in.Rejected, "%s: one reject a rejected row", in.File)
		declared := 0
		for _, n := range in.Declared {
			declared += n
		}
		require.Equal(t, declared, in.NotData, in.File)
	}
	total := l.Total()
	require.Equal(t, total.Rows, total.Accepted+total.Rejected+total.NotData)
	require.Equal(t, emitted, total.Records)
}

// folder writes the files, given as names and texts in turn, and loads the program among them.
func folder(t testing.TB, files ...string) (*program.Program, diag.List) {
	t.Helper()
	dir := t.TempDir()
	for i := 0; i < len(files); i += 2 {
		path := filepath.Join(dir, filepath.FromSlash(files[i]))
		require.NoError(t, os.MkdirAll(filepath.Dir(path), 0o700))
		require.NoError(t, os.WriteFile(path, []byte(files[i+1]), 0o600))
	}
	return program.Load(dir)
}
