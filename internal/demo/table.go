package demo

import (
	"bufio"
	"errors"
	"os"
	"path/filepath"

	"hearduty/internal/intake"
	"hearduty/internal/record"
)

// csvName is the canonical file name of a kind.
func csvName(k record.Kind) string {
	t, _ := record.TableOf(k)
	return t.FileName() + ".csv"
}

// tables are the CSV files of a program, one a record kind. Rows go straight to the files.
type tables struct {
	byKind map[record.Kind]*table
	err    error // the first error; later rows are dropped
}

type table struct {
	file   *os.File
	buffer *bufio.Writer
	csv    *intake.CSVWriter
}

// createTables makes the folder records in dir with an empty file of every kind.
func createTables(dir string) (*tables, error) {
	t := &tables{byKind: map[record.Kind]*table{}}
	folder := filepath.Join(dir, "records")
	if err := os.Mkdir(folder, 0o755); err != nil {
		return nil, err
	}
	for _, k := range kinds() {
		columns, _ := record.TableOf(k)
		file, err := os.Create(filepath.Join(folder, csvName(k)))
		if err != nil {
			return nil, errors.Join(err, t.close())
		}
		buffer := bufio.NewWriterSize(file, 1<<16)
		t.byKind[k] = &table{file, buffer, intake.NewCSVWriter(buffer, columns, nil)}
	}
	return t, nil
}

// put writes one row.
func (t *tables) put(r record.Record) {
	if t.err == nil {
		t.err = t.byKind[r.Kind()].csv.Write(r)
	}
}

// close finishes all files, and gives the first error of the whole writing.
func (t *tables) close() error {
	for _, k := range kinds() {
		one := t.byKind[k]
		if one == nil {
			continue
		}
		err := errors.Join(one.csv.Flush(), one.buffer.Flush())
		err = errors.Join(err, one.file.Close())
		if t.err == nil {
			t.err = err
		}
	}
	return t.err
}
