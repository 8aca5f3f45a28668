package intake

import (
	"context"
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/grid"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

const workersCSV = "worker_id,site,hired_on\n007,kiln-hill,2020-01-06\nW-2,kiln-hill,2021-03-01\n"

// programOf writes the files to a folder and loads a program that names them in order of files.
func programOf(t testing.TB, files ...string) *program.Program {
	t.Helper()
	dir := t.TempDir()
	var b strings.Builder
	b.WriteString("program: Test\nsites:\n  - {id: kiln-hill, bundles: [x]}\n  - {id: gerbera, bundles: [x]}\nrecords:\n")
	for i := 0; i < len(files); i += 2 {
		require.NoError(t, os.WriteFile(filepath.Join(dir, files[i]), []byte(files[i+1]), 0o600))
		b.WriteString("  - " + files[i] + "\n")
	}
	require.NoError(t, os.WriteFile(filepath.Join(dir, program.FileName), []byte(b.String()), 0o600))
	p, diags := program.Load(dir)
	require.Empty(t, diags)
	return p
}

func TestRead(t *testing.T) {
	p := programOf(t,
		"audiograms.csv", "audiogram_id,worker_id,date,left.500,right.2000\nA-1,007,2025-03-04,10,NR>100\nA-2,7,2025-03-04,NT,\n",
		"workers.csv", workersCSV,
		"trainings.ndjson", `{"worker_id":"007","date":"2025-01-02","topics":["noise_effects","protectors"]}`+"\n",
		"fit_tests.json", `[{"worker_id":"W-2","protector_id":"P","date":"2025-01-02","par_db":21.5,"left":{"par_db":20},"passed":true}]`,
	)
	records, l, err := readAll(t, p)
	require.NoError(t, err)
	require.Len(t, records, 5)
	require.Equal(t, record.Kind("worker"), records[0].Kind(), "workers come first")
	require.Equal(t, record.Origin{Source: 1, Row: 2}, records[0].At())
	require.Equal(t, "audiograms.csv", l.Inputs[0].File, "inputs keep the order of the program file")
	require.Len(t, l.Rejects, 1)
	require.Equal(t, Reject{File: "audiograms.csv", Row: 3, Column: 2, Field: "worker_id", Read: "7", Why: `no worker has the id "7", but the id "007" differs in leading zeros only`,
		Remedy: `If they are one person, write pad: 3 for worker_id in a map, or name the person in the same_person file: {id: "007", also: ["7"]}`}, l.Rejects[0])
	a := records[2].(*record.Audiogram)
	require.Equal(t, "NR>100", a.Right.At(2000).String())
	f := records[4].(*record.FitTest)
	require.Equal(t, record.Num(20), f.LeftPARDB)
	require.Equal(t, record.Yes, f.Passed)
}

func TestOrphans(t *testing.T) {
	const training = "worker_id,date\n007,2025-01-02\nW-2,2025-01-02\n"
	t.Run("no file of workers", func(t *testing.T) {
		_, l, err := readAll(t, programOf(t, "trainings.csv", training))
		require.NoError(t, err)
		require.Len(t, l.Rejects, 2)
		require.Contains(t, l.Rejects[0].Remedy, "Add a file workers.csv")
	})
	t.Run("rejected worker", func(t *testing.T) {
		_, l, err := readAll(t, programOf(t, "trainings.csv", training, "workers.csv", "worker_id,site,hired_on\n007,nowhere,2020-01-06\nW-2,kiln-hill,2021-03-01\n"))
		require.NoError(t, err)
		require.Len(t, l.Rejects, 2)
		require.Contains(t, l.Rejects[0].Why, `the row of worker "007" (workers.csv, row 2) was rejected`)
	})
	t.Run("refused file of workers", func(t *testing.T) {
		records, l, err := readAll(t, programOf(t, "trainings.csv", training, "workers.csv", "worker_id,site,hired_on,shoe_size\n"))
		require.ErrorContains(t, err, `workers.csv:1:4: worker records have no field "shoe_size"`)
		require.Len(t, records, 2, "one cause, one message: the rows of the workers are not rejected as well")
		require.Equal(t, 0, l.Inputs[0].Rejected)
	})
}

func TestDuplicatesAcrossFiles(t *testing.T) {
	p := programOf(t, "workers.csv", workersCSV,
		"audiograms.csv", "audiogram_id,worker_id,date\nA-1,007,2025-03-04\n",
		"audiograms.ndjson", `{"audiogram_id":"A-1","worker_id":"W-2","date":"2025-03-04"}`)
	_, l, err := readAll(t, p)
	require.NoError(t, err)
	require.Len(t, l.Rejects, 1)
	require.Equal(t, "audiograms.ndjson", l.Rejects[0].File)
	require.Contains(t, l.Rejects[0].Why, "audiograms.csv, row 2")
}

// A reject repeats the offending cell and no other: names, birth dates and thresholds stay out.
func TestRejectsKeepHealthDataOut(t *testing.T) {
	p := programOf(t,
		"workers.csv", "worker_id,site,birth_date,hired_on,job_title\n1,kiln-hill,1961-05-02,bad,Anna Smith\n2,kiln-hill,1961-05-02,2000-01-01,\n2,kiln-hill,1962-07-08,2000-01-01,\n",
		"audiograms.csv", "audiogram_id,worker_id,date,left.500,left.1000\nA-1,2,bad,47,48\nA-2,9,2025-01-01,47,48\nA-3,2,2025-01-01,47\nA-4,2,2025-01-01,\"47,48\n")
	_, l, err := readAll(t, p)
	require.NoError(t, err)
	require.Len(t, l.Rejects, 6)
	text, err := json.Marshal(l.Rejects)
	require.NoError(t, err)
	for _, secret := range []string{"Anna", "1961", "1962", "47", "48"} {
		require.NotContains(t, string(text), secret)
	}
}

func TestRefusedFilesDoNotStopTheOthers(t *testing.T) {
	p := programOf(t, "changes.csv", "nonsense\n", "workers.csv", workersCSV, "tasks.json", "{}", "groups.csv", "group,site\nG,kiln-hill\n", "notices.csv", "")
	require.NoError(t, os.Remove(p.Sources[4].Path))
	require.NoError(t, os.Mkdir(p.Sources[4].Path, 0o700))
	p.Sources = append(p.Sources, program.Source{Path: filepath.Join(p.Dir, "gone.csv"), Shown: "gone.csv", Kind: "task"})
	records, l, err := readAll(t, p)
	require.Len(t, records, 3)
	require.Len(t, l.Unreadable, 4)
	require.ErrorContains(t, err, "gone.csv: the file does not exist")
	require.ErrorContains(t, err, "notices.csv: this is a folder")
	require.Len(t, l.Inputs[0].SHA256, 64, "a refused file has a digest too")
	require.Empty(t, l.Inputs[5].SHA256)
}

func TestReadStops(t *testing.T) {
	p := programOf(t, "workers.csv", workersCSV)
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	_, err := Read(ctx, p, func(record.Record) error { return nil })
	require.ErrorIs(t, err, context.Canceled)
	l, err := Read(context.Background(), p, func(record.Record) error { return os.ErrClosed })
	require.ErrorIs(t, err, os.ErrClosed)
	require.Equal(t, 1, l.Inputs[0].Rows-l.Inputs[0].NotData)
}

func TestLongRows(t *testing.T) {
	long := strings.Repeat("x", 3*grid.MaxRow)
	for name, text := range map[string]string{
		"workers.csv":    "worker_id,site,hired_on\n1," + long + ",2020-01-01\n2,kiln-hill,2020-01-01\n",
		"workers.ndjson": `{"worker_id":"` + long + "\"}\n" + `{"worker_id":"2","site":"kiln-hill","hired_on":"2020-01-01"}`,
		"workers.json":   `[{"worker_id":"` + long + `"},{"worker_id":"2","site":"kiln-hill","hired_on":"2020-01-01"}]`,
	} {
		records, l, err := readAll(t, programOf(t, name, text))
		require.NoError(t, err)
		require.Len(t, records, 1, name)
		require.Equal(t, 1, l.Inputs[0].Rejected)
		require.Contains(t, l.Rejects[0].Why, "longer than 1024 KiB")
	}
}

// A character may be cut by the end of the buffer that is surveyed, and rows by the end of the scanner's.
func TestBufferEnds(t *testing.T) {
	var b strings.Builder
	b.WriteString("worker_id,site,hired_on,job_title\n")
	rows := 0
	for b.Len() < 3*grid.MaxRow {
		rows++
		fmt.Fprintf(&b, "%d,kiln-hill,2020-01-01,\"é€𝄞 %s\nx\"\"\"\r\n", rows, strings.Repeat("é", rows%97))
	}
	records, l, err := readAll(t, programOf(t, "workers.csv", b.String()))
	require.NoError(t, err)
	require.Empty(t, l.Rejects)
	require.Len(t, records, rows)
	require.Equal(t, int32(2*rows), records[rows-1].At().Row)
}

func TestDigest(t *testing.T) {
	_, l, err := readAll(t, programOf(t, "workers.csv", workersCSV))
	require.NoError(t, err)
	sum := sha256.Sum256([]byte(workersCSV))
	require.Equal(t, hex.EncodeToString(sum[:]), l.Inputs[0].SHA256)
}
