// Package xlsx writes a report as a workbook, for whoever works through the findings in a spreadsheet program.
//
// Days and numbers are typed cells, every text is a text cell whatever it begins with, and there are no
// formulas, macros or links. Each sheet but the first is one table with its head in row 1.
package xlsx

import (
	"fmt"
	"io"

	"github.com/xuri/excelize/v2"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// Format writes a workbook.
type Format struct{}

// Name gives the name of the form.
func (Format) Name() string { return "xlsx" }

// mostRows is the number of rows that a sheet can hold below its head.
const mostRows = excelize.TotalRows - 1

// Write writes the report.
func (Format) Write(w io.Writer, r *finding.Report) error { return write(w, r, mostRows) }

// write writes the report with so many rows a sheet at most.
func write(w io.Writer, r *finding.Report, rows int) (err error) {
	file := excelize.NewFile()
	defer func() {
		if closing := file.Close(); err == nil {
			err = closing
		}
	}()
	file.SetZipWriter(func(w io.Writer) excelize.ZipWriter { return newArchive(w) })
	b, err := newBook(file, r, rows)
	if err != nil {
		return fmt.Errorf("the workbook cannot be laid out: %w", err)
	}
	if err := b.fill(); err != nil {
		return fmt.Errorf("the workbook cannot be filled; see that the folder for temporary files has room: %w", err)
	}
	return file.Write(w)
}

// fill writes the sheets in their order.
func (b *book) fill() error {
	tables := tablesOf(b.r)
	if err := b.summary(tables); err != nil {
		return err
	}
	for _, t := range tables {
		if err := b.table(t); err != nil {
			return err
		}
	}
	return b.properties()
}

// tablesOf gives the tables that stand behind the summary.
func tablesOf(r *finding.Report) []table {
	tables := []table{register(r), due(r), rejects(r), observationCounts(r)}
	if len(r.Observations) > 0 {
		tables = append(tables, observations(r))
	}
	return append(tables, rates(r), law(r), duties(r), files(r))
}

// properties says what the file is. Its days are the as-of day, so that the same report is the same file.
func (b *book) properties() error {
	day := b.r.AsOf
	if !day.Known() {
		day = calendar.MustParse("2000-01-01")
	}
	tool := phrase.Clean(b.r.Tool.Name)
	if err := b.file.SetAppProps(&excelize.AppProperties{Application: tool}); err != nil {
		return err
	}
	midnight := day.String() + "T00:00:00Z"
	return b.file.SetDocProps(&excelize.DocProperties{Title: phrase.Clean(b.r.Program), Creator: tool, LastModifiedBy: tool,
		Created: midnight, Modified: midnight, Language: "en"})
}
