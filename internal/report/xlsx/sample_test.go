package xlsx

import (
	"archive/zip"
	"bytes"
	"fmt"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest"
)

// sample is the odd report with rates, parameters of every kind and the program's own papers.
func sample() *finding.Report {
	r := reporttest.Odd()
	part, of, percent := 45, 48, 93.8
	r.Rates = []finding.Rate{
		{Site: "kiln-hill", Bundle: "us-osha-general-industry", Year: 2025, Name: "trained_in_time", Part: &part, Of: &of, Percent: &percent, About: "workers trained in time"},
		{Bundle: "us-osha-general-industry", Name: "protected_below_target", Suppressed: true, About: "workers whose protector lowers noise to the target"},
		{Site: "larch-street", Bundle: "us-osha-general-industry", Year: 2025, Name: "a_new_one", Part: new(int), Of: new(int), About: "nobody"},
	}
	r.Parameters = []finding.Parameter{
		{Bundle: "us-osha-general-industry", Name: "audiogram_interval", About: "time between two tests", Value: "12 months", From: "1983-04-07", Cite: "29 CFR 1910.95(g)(6)", Seen: "text", InForce: true},
		{Bundle: "us-osha-general-industry", Name: "protector_variety", About: "=suitable models", Value: "2 models", From: "1899-05-01", To: "1983-04-07", Cite: "+29 CFR", Seen: "memory"},
	}
	r.Counts = append(r.Counts, finding.Count{Site: "kiln-hill", Bundle: finding.OfProgram, Topic: "records", Status: finding.Gap, Number: 1})
	return r
}

// opened opens a workbook.
func opened(t require.TestingT, file []byte) *excelize.File {
	f, err := excelize.OpenReader(bytes.NewReader(file))
	require.NoError(t, err)
	return f
}

// read reads a table back, a map of cells a row, raw or as they are shown.
func read(t require.TestingT, f *excelize.File, sheet string, raw bool) (head []string, rows []map[string]string) {
	all, err := f.GetRows(sheet, excelize.Options{RawCellValue: raw})
	require.NoError(t, err)
	for _, cells := range all[1:] {
		row := map[string]string{}
		for i, cell := range cells {
			row[all[0][i]] = cell
		}
		rows = append(rows, row)
	}
	return all[0], rows
}

// dumped writes what stands in the cells of a workbook, each with its type: a text, a number, or a day.
func dumped(t require.TestingT, file []byte) []byte {
	f := opened(t, file)
	var b bytes.Buffer
	for _, sheet := range f.GetSheetList() {
		fmt.Fprintf(&b, "== %s\n", sheet)
		rows, err := f.GetRows(sheet)
		require.NoError(t, err)
		for y, row := range rows {
			for x, shown := range row {
				if shown == "" {
					continue
				}
				name, err := excelize.CoordinatesToCellName(x+1, y+1)
				require.NoError(t, err)
				fmt.Fprintf(&b, "%s %s %s\n", name, kindOf(t, f, sheet, name), strings.ReplaceAll(shown, "\n", " ⏎ "))
			}
		}
	}
	return b.Bytes()
}

// kindOf says what a cell holds.
func kindOf(t require.TestingT, f *excelize.File, sheet, name string) string {
	kind, err := f.GetCellType(sheet, name)
	require.NoError(t, err)
	if kind == excelize.CellTypeInlineString {
		return "text"
	}
	require.Equal(t, excelize.CellTypeUnset, kind, "%s!%s", sheet, name)
	id, err := f.GetCellStyle(sheet, name)
	require.NoError(t, err)
	style, err := f.GetStyle(id)
	require.NoError(t, err)
	if style.CustomNumFmt != nil && *style.CustomNumFmt == isoDay {
		return "day"
	}
	return "number"
}

// unzipped gives the parts of a workbook.
func unzipped(t require.TestingT, file []byte) map[string]string {
	z, err := zip.NewReader(bytes.NewReader(file), int64(len(file)))
	require.NoError(t, err)
	parts := map[string]string{}
	for _, entry := range z.File {
		r, err := entry.Open()
		require.NoError(t, err)
		text, err := io.ReadAll(r)
		require.NoError(t, err)
		parts[entry.Name] = string(text)
	}
	return parts
}

// bare is the form with its cells and parts as plain text, for a search in them.
type bare struct {
	Format
	t *testing.T
}

// Write writes the cells as they are shown, and the parts of the file.
func (b bare) Write(w io.Writer, r *finding.Report) error {
	var file bytes.Buffer
	if err := b.Format.Write(&file, r); err != nil {
		return err
	}
	var text strings.Builder
	f := opened(b.t, file.Bytes())
	for _, sheet := range f.GetSheetList() {
		rows, err := f.GetRows(sheet)
		require.NoError(b.t, err)
		for _, row := range rows {
			text.WriteString(strings.Join(row, "\n"))
		}
	}
	parts := unzipped(b.t, file.Bytes())
	for _, name := range sorted(parts) {
		text.WriteString(parts[name])
	}
	_, err := io.WriteString(w, text.String())
	return err
}
