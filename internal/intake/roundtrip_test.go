package intake

import (
	"bytes"
	"context"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/program"
	"hearduty/internal/record"
)

const sample = "../../testdata/intake"

// The sample program holds every kind of record; what is read of it is in the golden file.
func TestSampleProgram(t *testing.T) {
	p, diags := program.Load(sample)
	require.Empty(t, diags)
	require.Len(t, p.Sources, len(record.Kinds()))
	records, l, err := readAll(t, p)
	require.NoError(t, err)
	require.Empty(t, l.Rejects)
	require.Empty(t, l.Remarks)
	var b bytes.Buffer
	w := NewNDJSONWriter(&b, l.Inputs)
	for _, r := range records {
		require.NoError(t, w.Write(r))
	}
	golden(t, filepath.Join(sample, "records.ndjson.golden"), b.String())
}

// Written in any of the formats and read again, the records of the sample program are the same.
func TestFormatsAgree(t *testing.T) {
	p, _ := program.Load(sample)
	want, _, err := readAll(t, p)
	require.NoError(t, err)
	for _, extension := range []string{".csv", ".ndjson", ".json"} {
		q := *p
		q.Sources = append([]program.Source(nil), p.Sources...)
		dir := t.TempDir()
		for i := range q.Sources {
			s := &q.Sources[i]
			s.Shown = filepath.Base(s.Path) + extension
			s.Path = filepath.Join(dir, s.Shown)
			require.NoError(t, os.WriteFile(s.Path, write(t, extension, ofKind(want, s.Kind), s.Kind), 0o600))
		}
		got, l, err := readAll(t, &q)
		require.NoError(t, err)
		require.Empty(t, l.Rejects)
		require.Len(t, got, len(want))
		for i := range want {
			if extension == ".json" {
				got[i].SetAt(want[i].At()) // rows count from the first object
			}
			if extension == ".ndjson" {
				got[i].SetAt(record.Origin{Source: want[i].At().Source, Row: got[i].At().Row + 1})
			}
			require.Equal(t, want[i], got[i])
		}
	}
}

func ofKind(records []record.Record, k record.Kind) []record.Record {
	var out []record.Record
	for _, r := range records {
		if r.Kind() == k {
			out = append(out, r)
		}
	}
	return out
}

func write(t testing.TB, extension string, records []record.Record, k record.Kind) []byte {
	t.Helper()
	var b bytes.Buffer
	table, _ := record.TableOf(k)
	if extension == ".csv" {
		w := NewCSVWriter(&b, table, UsedColumns(table, records))
		for _, r := range records {
			require.NoError(t, w.Write(r))
		}
		require.NoError(t, w.Flush())
		return b.Bytes()
	}
	w := NewNDJSONWriter(&b, nil)
	for _, r := range records {
		require.NoError(t, w.Write(r))
	}
	if extension == ".json" {
		return append(append([]byte{'['}, bytes.ReplaceAll(bytes.TrimSpace(b.Bytes()), []byte{'\n'}, []byte(",\n"))...), ']')
	}
	return b.Bytes()
}

// Any text that a cell can hold is written and read back the same, formulas and quotes too.
func TestTextSurvivesCSV(t *testing.T) {
	table, _ := record.TableOf("worker")
	dir := t.TempDir()
	rapid.Check(t, func(t *rapid.T) {
		draw := func(name string) string {
			r, i := table.New(), table.Index("job_title")
			table.Set(r, i, rapid.OneOf(rapid.String(), rapid.StringMatching(`['=+@"\-,;\n\ta0]{0,6}`)).Draw(t, name))
			return table.Text(r, i)
		}
		w := &record.Worker{WorkerID: "1" + draw("id"), Site: "s", HiredOn: 730000, JobTitle: draw("title")}
		var b bytes.Buffer
		c := NewCSVWriter(&b, table, nil)
		require.NoError(t, c.Write(w))
		require.NoError(t, c.Flush())
		file := filepath.Join(dir, "workers.csv")
		require.NoError(t, os.WriteFile(file, b.Bytes(), 0o600))
		p := &program.Program{Sites: []program.Site{{ID: "s"}}, Sources: []program.Source{{Path: file, Shown: "workers.csv", Kind: "worker"}}}
		var got []record.Record
		l, err := Read(context.Background(), p, func(r record.Record) error { got = append(got, r); return nil })
		require.NoError(t, err)
		require.Empty(t, l.Rejects, b.String())
		w.SetAt(record.Origin{Source: 0, Row: 2})
		require.Equal(t, []record.Record{w}, got)
	})
}

func TestCSVWriter(t *testing.T) {
	table, _ := record.TableOf("measurement")
	var b bytes.Buffer
	w := NewCSVWriter(&b, table, []string{"measurement_id", "octave.500", "twa_dba"})
	require.NoError(t, w.Write(&record.Measurement{MeasurementID: "@M", TWADBA: record.Num(-5), Octave: &record.Octaves{3: record.Num(-1.5)}}))
	require.Error(t, w.Write(&record.Worker{}), "a record of another kind")
	require.NoError(t, w.Flush())
	require.Equal(t, "measurement_id,octave.500,twa_dba\n'@M,-1.5,-5\n", b.String())
	b.Reset()
	require.NoError(t, NewCSVWriter(&b, table, []string{"date"}).Flush())
	require.Equal(t, "date\n", b.String())
	require.Panics(t, func() { NewCSVWriter(&b, table, []string{"dat"}) })
}
