package mapping_test

import (
	"archive/zip"
	"bytes"
	"io"
	"os"
	"path/filepath"
	"testing"
	"time"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"hearduty/internal/grid"
)

// workbookFile writes a workbook of one sheet, of which the cells are given by name and value in turn, and lets change it.
func workbookFile(t *testing.T, change func(*excelize.File), cells ...any) string {
	t.Helper()
	x := excelize.NewFile()
	for i := 0; i < len(cells); i += 2 {
		require.NoError(t, x.SetCellValue("Sheet1", cells[i].(string), cells[i+1]))
	}
	if change != nil {
		change(x)
	}
	path := filepath.Join(t.TempDir(), "b.xlsx")
	require.NoError(t, x.SaveAs(path))
	require.NoError(t, x.Close())
	return path
}

func workbook(t *testing.T, change func(*excelize.File), cells ...any) *grid.File {
	t.Helper()
	return opened(t, workbookFile(t, change, cells...))
}

// TestWorkbookHeads reads two header rows of which the upper one has merged cells, across and down.
func TestWorkbookHeads(t *testing.T) {
	m := good(t, `
map: Merged heads
kind: audiogram
head: {rows: 2}
fields: {audiogram_id: No, worker_id: Emp, date: Date, left.500: Left 500, left.1000: Left 1000, right.500: Right 500, tester_id: Tech}
`)
	f := workbook(t, func(x *excelize.File) {
		for _, r := range [][2]string{{"A1", "A2"}, {"D1", "E1"}, {"F1", "F1"}} {
			require.NoError(t, x.MergeCell("Sheet1", r[0], r[1]))
		}
	}, "A1", "No", "B2", "Emp", "C2", "Date", "D1", "Left", "D2", 500, "E2", 1000, "F1", "Right", "F2", 500, "G2", "Tech",
		"A3", "T1", "B3", "007", "C3", "2025-03-04", "D3", 10, "E3", 15, "F3", 20, "G3", "x")
	require.Equal(t, "1 header\n2 header\n3 audiogram_id=T1 worker_id=007 date=2025-03-04 left.500=10 left.1000=15 right.500=20 tester_id=x\n", read(t, m, f))
}

// TestWorkbookCells reads cells that are more than text: dates, times, answers, errors, and formulas without a value.
func TestWorkbookCells(t *testing.T) {
	m := good(t, `
map: Cells
kind: measurement
blank: ["#N/A"]
fields: {measurement_id: No, date: Date, kind: {constant: area}, area: Area, run_minutes: {column: Run, unit: clock}, full_shift: Full, laeq_dba: Leq}
`)
	day := time.Date(2025, 3, 4, 0, 0, 0, 0, time.UTC)
	f := workbook(t, func(x *excelize.File) {
		style, err := x.NewStyle(&excelize.Style{NumFmt: 20}) // h:mm
		require.NoError(t, err)
		require.NoError(t, x.SetCellStyle("Sheet1", "D2", "D2", style))
		require.NoError(t, x.SetCellFormula("Sheet1", "F3", "1+1"))
		require.NoError(t, x.SetRowVisible("Sheet1", 4, false))
	}, "A1", "No", "B1", "Date", "C1", "Area", "D1", "Run", "E1", "Full", "F1", "Leq",
		"A2", 12, "B2", day, "C2", "press", "D2", 7.75/24, "E2", true, "F2", 85.3,
		"A3", 13, "B3", day, "C3", "press",
		"A4", 14, "B4", "2025-03-05", "C4", "press", "D4", "0:30",
		"A5", 1.5, "B5", day, "C5", day)
	require.Equal(t, `1 header
2 measurement_id=12 date=2025-03-04 area=press kind=area run_minutes=465 full_shift=yes laeq_dba=85.3
3 FAULT col 6 "Leq" for "laeq_dba" read "": the cell is a formula whose value the workbook does not hold. Open the workbook in a spreadsheet program, let it calculate, save it, and read it again.
4 measurement_id=14 date=2025-03-05 area=press kind=area run_minutes=30 (a hidden row was read like any other)
5 FAULT col 1 "No" for "measurement_id" read "1.5": the id is a number in scientific notation or with a fraction, so digits of it may be lost. Take the id from where the export came from, with its column formatted as text. Also area.
`, read(t, m, f))
}

func TestWorkbookHiddenRows(t *testing.T) {
	const text = "map: x\nkind: training\nrows: {hidden: skip}\nfields: {worker_id: ID, date: Date}\n"
	hide := func(x *excelize.File) { require.NoError(t, x.SetRowVisible("Sheet1", 2, false)) }
	f := workbook(t, hide, "A1", "ID", "B1", "Date", "A2", "1", "B2", "2025-03-04", "A4", "2", "B4", "2025-03-04")
	require.Equal(t, "1 header\n2 hidden\n3 blank\n4 worker_id=2 date=2025-03-04\n", read(t, good(t, text), f))
}

func TestWorkbookErrors(t *testing.T) {
	for words, want := range map[string]string{
		"":                  "1 header\n2 FAULT col 2 \"Date\" for \"date\" read \"#N/A\": the cell shows an error of the workbook. Correct the formula in the workbook, or name the error under blank in the map if nothing is known.\n",
		"blank: [\"#n/a\"]": "1 header\n2 worker_id=1\n",
	} {
		f := withError(t, workbookFile(t, nil, "A1", "ID", "B1", "Date", "A2", "1", "B2", errorMark))
		require.Equal(t, want, read(t, good(t, "map: x\nkind: training\n"+words+"\nfields: {worker_id: ID, date: Date}\n"), f))
	}
}

// errorMark is a number that withError replaces by an error value.
const errorMark = 424242

// withError copies a workbook, with an error value in place of each mark.
func withError(t *testing.T, path string) *grid.File {
	t.Helper()
	in, err := zip.OpenReader(path)
	require.NoError(t, err)
	defer in.Close()
	path = filepath.Join(t.TempDir(), "e.xlsx")
	out, err := os.Create(path)
	require.NoError(t, err)
	z := zip.NewWriter(out)
	for _, member := range in.File {
		r, err := member.Open()
		require.NoError(t, err)
		content, err := io.ReadAll(r)
		require.NoError(t, err)
		w, err := z.Create(member.Name)
		require.NoError(t, err)
		_, err = w.Write(bytes.ReplaceAll(content, []byte("><v>424242</v>"), []byte(` t="e"><v>#N/A</v>`)))
		require.NoError(t, err)
	}
	require.NoError(t, z.Close())
	require.NoError(t, out.Close())
	return opened(t, path)
}
