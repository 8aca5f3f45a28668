package intake

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/program"
	"hearduty/internal/record"
)

const oneSite = "program: P\nsites: [{id: kiln-hill, bundles: [x]}]\n"

// loaded is folder for a program file that is right.
func loaded(t testing.TB, records string, files ...string) *program.Program {
	t.Helper()
	p, problems := folder(t, append(files, program.FileName, oneSite+"records: "+records+"\n")...)
	require.NoError(t, problems.Err())
	return p
}

func TestKindOfAnExport(t *testing.T) {
	const fields = "fields: {worker_id: Emp, date: Day}\n"
	for _, c := range []struct {
		name, record, head string
		want               record.Kind
	}{
		{"of the map", "{file: x.csv, map: m.yaml}", "map: M\nkind: training\n", "training"},
		{"the program file comes before the map", "{file: x.csv, map: m.yaml, kind: training}", "map: M\nkind: audiogram\n", "training"},
		{"of the name, if nobody says", "{file: trainings.csv, map: m.yaml}", "map: M\n", "training"},
		{"nobody says", "{file: x.csv, map: m.yaml}", "map: M\n", ""},
	} {
		t.Run(c.name, func(t *testing.T) {
			export := "Emp,Day\n000123,2025-03-04\n"
			p := loaded(t, "[workers.csv, "+c.record+"]", "workers.csv", "worker_id,site,hired_on\n000123,kiln-hill,2020-01-01\n",
				"m.yaml", c.head+fields, "x.csv", export, "trainings.csv", export)
			records, l, err := readAll(t, p)
			assert.Equal(t, c.want, l.Inputs[1].Kind)
			if c.want == "" {
				require.ErrorContains(t, err, "program.yaml:3:24: neither the program file nor the map m.yaml says which kind of records x.csv holds")
				require.Len(t, l.Rejects, 1, "the file is not lost from the books")
				return
			}
			if c.want == "training" && !strings.Contains(c.head, "audiogram") {
				require.NoError(t, err)
				require.Len(t, records, 2)
			}
		})
	}
}

// A map with mistakes is told once, with its places, and keeps nothing else from being read.
func TestFaultyMap(t *testing.T) {
	p := loaded(t, "[workers.csv, {file: x.csv, map: m.yaml}, {file: y.csv, map: m.yaml}, trainings.csv]",
		"m.yaml", "map: M\nkind: worker\nfeilds: {}\n", "x.csv", "a\n1\n", "y.csv", "a\n1\n",
		"workers.csv", "worker_id,site,hired_on\n000123,kiln-hill,2020-01-01\n", "trainings.csv", "worker_id,date\n000123,2025-01-01\n999,2025-01-01\n")
	records, l, err := readAll(t, p)
	require.ErrorContains(t, err, "m.yaml:3:1")
	require.Equal(t, 1, strings.Count(err.Error(), "feilds"))
	require.Len(t, records, 3, "a worker that may stand in the file with the faulty map is not turned away")
	require.Len(t, l.Rejects, 2)
	assert.Equal(t, "its map m.yaml cannot be used", l.Rejects[0].Why)
	assert.Equal(t, []int{0, 0}, []int{l.Inputs[1].Rows, l.Inputs[2].Rows})
}

// What the program file says of sheet and encoding comes before the map.
func TestEncodingOfTheProgramFile(t *testing.T) {
	p := loaded(t, "[workers.csv, {file: x.csv, map: m.yaml, encoding: windows-1252}]",
		"m.yaml", "map: M\nkind: training\nencoding: cp850\nfields: {worker_id: Emp, date: Day, by: Trainer}\n",
		"x.csv", "Emp,Day,Trainer\n000123,2025-03-04,T-\xe9\n", "workers.csv", "worker_id,site,hired_on\n000123,kiln-hill,2020-01-01\n")
	records, _, err := readAll(t, p)
	require.NoError(t, err)
	require.Len(t, records, 2)
	assert.Equal(t, "T-é", records[1].(*record.Training).By)
}

func TestSheetOfNoWorkbook(t *testing.T) {
	_, l, err := readAll(t, loaded(t, "[{file: workers.csv, sheet: T}]", "workers.csv", workersCSV))
	require.ErrorContains(t, err, "workers.csv T: the file is no workbook, so it has no sheets")
	require.Len(t, l.Inputs[0].SHA256, 64)
}

// Of garbage read by a map no row is lost, and nothing panics.
func TestNoMappedRowOfGarbageIsLost(t *testing.T) {
	p := loaded(t, "[workers.csv, {file: x.csv, map: m.yaml}, {file: y.csv, map: long.yaml}]",
		"workers.csv", "worker_id,site,hired_on\n1,kiln-hill,2020-01-01\n", "x.csv", "", "y.csv", "",
		"m.yaml", "map: M\nkind: audiogram\nrows: {footer: [end], comment: ['#']}\nnumbers: {decimal: ','}\nthresholds: {not_tested: [x]}\nfields: {audiogram_id: {make: [worker_id, date]}, worker_id: Emp, date: Day, left.500: L, right.500: R}\n",
		"long.yaml", "map: M\nkind: audiogram\near: {column: Ear, left: [l], right: [r]}\nfrequency: {frequency: Hz, threshold: dB}\nfields: {audiogram_id: {make: [worker_id, date]}, worker_id: Emp, date: Day}\n")
	words := []string{"1", "2", "2025-03-04", "2025-03-05", "l", "r", "500", "10", "x", "end", "#", ",", ",", ",", ",", "\n", "\n", "\"", "\r\n", "\x00", "é", "200", "=1"}
	rapid.Check(t, func(rt *rapid.T) {
		body := func(name string) string {
			return strings.Join(rapid.SliceOfN(rapid.SampledFrom(words), 0, 80).Draw(rt, name), "")
		}
		require.NoError(t, os.WriteFile(filepath.Join(p.Dir, "x.csv"), []byte("Emp,Day,L,R\n"+body("x")), 0o600))
		require.NoError(t, os.WriteFile(filepath.Join(p.Dir, "y.csv"), []byte("Emp,Day,Ear,Hz,dB\n"+body("y")), 0o600))
		_, _, _ = readAll(t, p)
	})
}
