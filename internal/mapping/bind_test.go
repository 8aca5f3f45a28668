package mapping_test

import (
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/grid"
	"hearduty/internal/mapping"
)

const training = "map: x\nkind: training\nfields: {worker_id: ID, date: Date}\n"

// TestBindRefuses holds why a file and a map do not fit.
func TestBindRefuses(t *testing.T) {
	for _, c := range []struct{ name, mapText, file, text, want string }{
		{"empty", training, "t.csv", "", "refused: the file is empty. Export it again, or remove it from the program file.\n"},
		{"blank lines", training, "t.csv", "\n\n", "refused: no row of the file holds the columns that the map names. Check whether this is the file that the map is for; if it has no header, write none: true under head and name columns by position.\n"},
		{"other file", training, "t.csv", "a,b\n1,2\n", "refused: no row of the file holds the columns that the map names. Check whether this is the file that the map is for; if it has no header, write none: true under head and name columns by position.\n"},
		{"header too late", training, "t.csv", strings.Repeat("x,y\n", 50) + "ID,Date\n", "refused: none of the first 50 rows holds the columns that the map names. Check whether this is the file that the map is for; if it has no header, write none: true under head and name columns by position.\n"},
		{"wrong row", training + "head: {row: 2}\n", "t.csv", "ID,Date\n1,2025-03-04\n", "refused 2:0: the header in row 2 lacks the columns \"ID\", \"Date\", which the map names. Correct them in the map, or remove the fields if the export has no such column.\n"},
		{"no such row", training + "head: {row: 9}\n", "t.csv", "ID,Date\n1,2025-03-04\n", "refused: the file has no header in row 9. Correct row under head in the map; rows count from 1, and line breaks within cells count as well.\n"},
		{"only one of two rows", training + "head: {row: 2, rows: 2}\n", "t.csv", "x\nID,Date\n", "refused: the file has no header in row 2. Correct row under head in the map; rows count from 1, and line breaks within cells count as well.\n"},
		{"position", "map: x\nkind: training\nfields: {worker_id: ID, date: {position: 3}}\n", "t.csv", "ID,Date\n1,2025-03-04\n", "refused 1:3: the map takes date from column 3, but the header ends with column 2. Correct position in the map.\n"},
		{"format", training + "format: workbook\n", "t.csv", "ID,Date\n", "refused: the map is for the format workbook, but the file is delimited by its content. Correct format in the map, or export the file again.\n"},
		{"needed key", training, "t.json", `[{"id":"1"}]`, "refused: the header lacks the column \"Date\", which the map names. Correct it in the map, or remove the fields if the export has no such column.\n"},
		{"no key above", "map: x\nkind: training\nhead: {above: key_value}\nfields: {worker_id: ID, date: {above: Session day}}\n", "t.csv", "Sesion day;2025-03-04\nID\n", "refused: no line above the header has the key \"Session day\", from which the map takes date. Write \"Sesion day\" if that is meant.\n"},
		{"two keys above", "map: x\nkind: training\nhead: {above: key_value}\nfields: {worker_id: ID, date: {above: Day}}\n", "t.csv", "Day: 2025-03-04\nDay: 2025-03-05\nID\n", "refused 2:1: the key \"Day\" stands above the header twice, with different values: first in row 1. Export the tables of the two into files of their own, or take the value as constant.\n"},
		{"bad value above", "map: x\nkind: training\nhead: {above: key_value}\nfields: {worker_id: ID, date: {above: Day}}\n", "t.csv", "Day: 04/03/2025\nID\n", "refused 1:1: the value above the header for date cannot be read: the date can be read in several orders, and none is stated. State order under dates in the map, or write proven there if other dates of the file settle it.\n"},
		{"unsettled above", "map: x\nkind: training\nhead: {above: key_value}\ndates: {order: proven}\nfields: {worker_id: ID, date: {above: Day}}\n", "t.csv", "Day: 04/03/2025\nID\n", "refused 1:1: the order of the date above the header for date is not settled: all dates of the column can be read as day, month, year and as month, day, year. State order for this field in the map.\n"},
	} {
		t.Run(c.name, func(t *testing.T) {
			require.Equal(t, c.want, read(t, good(t, c.mapText), export(t, c.file, c.text)))
		})
	}
}

// TestBindKind checks a map that leaves the kind to the program file once the kind is known.
func TestBindKind(t *testing.T) {
	m := good(t, "map: x\nfields: {worker_id: ID, date: Date, topics: T}\n")
	f := export(t, "t.csv", "ID,Date,T\n1,2025-03-04,noise_effects\n")
	_, _, err := m.Bind(f, "training")
	require.NoError(t, err)
	_, _, err = m.Bind(f, "audiogram")
	require.EqualError(t, err, `the map does not fit audiogram records: m.yaml:2:9: every audiogram needs audiogram_id, but the map does not say where it comes from`)
	_, _, err = m.Bind(f, "")
	require.EqualError(t, err, `"" is no kind of record`)
}

// TestBindTwice binds one map to several files, and with another sheet and encoding, as intake does.
func TestBindTwice(t *testing.T) {
	m := good(t, training+"encoding: windows-1252\ndates: {order: proven}\n")
	for range 2 {
		f := export(t, "t.csv", "ID;Date\nM\xfcl;25/03/2025\n")
		require.Equal(t, "t.csv:2: the order day_month_year of the dates in the column \"Date\" is settled by row 2. State order: day_month_year in the map, so that the next export is read alike.\n1 header\n2 worker_id=Mül date=2025-03-25\n", read(t, m, f))
	}
	other := *m
	other.File.Encoding = "cp850"
	f := export(t, "t.csv", "ID;Date\nM\x81l;03/25/2025\n")
	require.Contains(t, read(t, &other, f), "worker_id=Mül date=2025-03-25\n")
	require.Equal(t, grid.Options{Encoding: "windows-1252", Lenient: true}, m.Options())
	m.File.Delimiter = "pipe"
	require.Equal(t, byte('|'), m.Options().Delimiter)
}

func TestHeaderAndAbout(t *testing.T) {
	f := export(t, "t.csv", "ID;Date\n1;2025-03-04\n")
	s, _, err := good(t, training).Bind(f, "training")
	require.NoError(t, err)
	named := s.(interface{ Header(int) string })
	require.Equal(t, []string{"", "ID", "Date", ""}, []string{named.Header(0), named.Header(1), named.Header(2), named.Header(3)})
	columns := s.(interface{ Column(int) int })
	require.Equal(t, []int{0, 1, 2, 0}, []int{columns.Column(-1), columns.Column(0), columns.Column(1), columns.Column(2)})
	require.Equal(t, byte(';'), s.(interface{ About() grid.About }).About().Delimiter)
}

// TestFaultyRows keeps what the file's reader says of a row.
func TestFaultyRows(t *testing.T) {
	f := export(t, "t.csv", "ID,Date\n1,2025-\x0003-04\n\"2\n2,2025-03-04\n")
	got := read(t, good(t, training), f)
	require.Contains(t, got, `2 FAULT col 2 "Date" for "date" read "": the cell holds a NUL byte.`)
	require.Contains(t, got, "3 FAULT")
	require.Contains(t, got, "4 worker_id=2 date=2025-03-04\n")
}

// TestEveryRow checks on rows of all sorts that each ends in one Out, or in one record of several.
func TestEveryRow(t *testing.T) {
	paths, err := filepath.Glob(filepath.Join("testdata", "*.txtar"))
	require.NoError(t, err)
	for _, mapText := range []string{training, training + "head: {row: 3}\n", "map: x\nkind: training\nhead: {none: true}\nfields: {worker_id: {position: 1}, date: {position: 2}}\n"} {
		for _, path := range paths {
			text, err := os.ReadFile(path)
			require.NoError(t, err)
			m := good(t, mapText+"delimiter: \",\"\n")
			s, _, err := m.Bind(export(t, "t.csv", "x\n\nID,Date\n"+string(text)), "training")
			require.NoError(t, err)
			lines := map[int]int{}
			var o mapping.Out
			for err = s.Next(&o); err == nil; err = s.Next(&o) {
				for _, line := range append([]int{o.Line}, o.Lines...) {
					lines[line]++
				}
			}
			require.Equal(t, io.EOF, err)
			for line := range strings.Count(string(text), "\n") + 3 {
				require.LessOrEqual(t, lines[line+1], 1, "row %d", line+1)
			}
			require.Contains(t, lines, strings.Count(string(text), "\n")+3, "the last row of %s", path)
		}
	}
}

// TestManyRowsOfOneRecord refuses rows without an end, and keeps what came before.
func TestManyRowsOfOneRecord(t *testing.T) {
	var b strings.Builder
	b.WriteString("Emp,Date,Ear,Hz,dB\n")
	for range 300 {
		b.WriteString("1,2025-03-04,L,500,\n")
	}
	m := good(t, "map: x\nkind: audiogram\nfields: {audiogram_id: {make: [worker_id, date]}, worker_id: Emp, date: Date}\near: {column: Ear, left: [L], right: [R]}\nfrequency: {frequency: Hz, threshold: dB}\n")
	got := read(t, m, export(t, "t.csv", b.String()))
	require.Equal(t, 100, strings.Count(got, "more than 200 rows belong to the record"))
	require.Contains(t, got, "\n2,3,4,")
}

// TestManyRecords gathers records whose rows stand far apart, in more memory than one piece.
func TestManyRecords(t *testing.T) {
	const n = 20_000
	var b strings.Builder
	b.WriteString("Emp,Date,Ear,500,Device\n")
	for _, ear := range "LR" {
		for i := range n {
			fmt.Fprintf(&b, "W%d,2025-03-04,%c,%d,audiometer with a long name %d\n", i, ear, i%20*5, i%7)
		}
	}
	m := good(t, "map: x\nkind: audiogram\nfields: {audiogram_id: {make: [worker_id, date]}, worker_id: Emp, date: Date, ear.500: \"500\", audiometer_id: Device}\near: {column: Ear, left: [L], right: [R]}\n")
	s, _, err := m.Bind(export(t, "t.csv", b.String()), "audiogram")
	require.NoError(t, err)
	var o mapping.Out
	require.NoError(t, s.Next(&o))
	for i := range n {
		require.NoError(t, s.Next(&o))
		require.Equal(t, []int{i + 2 + n}, o.Lines)
		require.Equal(t, i+2, o.Line)
		require.Len(t, o.Records[0].Values, 6)
		require.Equal(t, fmt.Sprintf("audiometer with a long name %d", i%7), o.Records[0].Values[3].Text)
	}
	require.Equal(t, io.EOF, s.Next(&o))
}
