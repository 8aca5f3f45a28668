package intake

import (
	"io"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
	"golang.org/x/text/encoding/charmap"

	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// sheet gives these rows, from line 1.
type sheet struct {
	rows []grid.Row
	at   int
}

func (s *sheet) Next(r *grid.Row) error {
	if s.at == len(s.rows) {
		return io.EOF
	}
	*r = s.rows[s.at]
	s.at++
	r.Line = s.at
	return nil
}

func (s *sheet) About() grid.About { return grid.About{Format: grid.Workbook} }

func (s *sheet) Close() error { return nil }

func cells(texts ...string) grid.Row {
	r := grid.Row{}
	for _, text := range texts {
		r.Cells = append(r.Cells, grid.Cell{Text: text})
	}
	return r
}

func TestCellsOfWorkbooks(t *testing.T) {
	kinds := func(c ...grid.Cell) grid.Row { return grid.Row{Cells: c} }
	id, day := grid.Cell{Text: "007"}, grid.Cell{Text: "2025-03-04", Kind: grid.Day}
	for _, c := range []struct {
		name   string
		row    grid.Row
		cells  []string
		not    string
		fault  string
		column int
		field  string
	}{
		{"text, day and numbers", kinds(id, day, grid.Cell{Text: "12.5", Kind: grid.Number}, grid.Cell{Text: "yes"}), []string{"007", "2025-03-04", "12.5", "yes"}, "", "", 0, ""},
		{"true", kinds(id, day, grid.Cell{}, grid.Cell{Text: "true", Kind: grid.Bool}), []string{"007", "2025-03-04", "yes"}, "", "", 0, ""},
		{"blank cells at the end missing", kinds(id, day), []string{"007", "2025-03-04"}, "", "", 0, ""},
		{"blank", cells("", " "), nil, blank, "", 0, ""},
		{"no row", grid.Row{}, nil, blank, "", 0, ""},
		{"time", kinds(id, grid.Cell{Text: "0.5", Kind: grid.Clock}), nil, "", "the cell holds a time of day or a duration", 2, "date"},
		{"error value", kinds(id, grid.Cell{Text: "#N/A", Kind: grid.Broken}), nil, "", "the cell holds the error value #N/A", 2, "date"},
		{"formula without value", kinds(id, day, grid.Cell{Kind: grid.Uncomputed}), nil, "", "the cell holds a formula whose value was never stored", 3, "par_db"},
		{"true for a number", kinds(id, day, grid.Cell{Text: "true", Kind: grid.Bool}), nil, "", "the value is true or false", 3, "par_db"},
		{"cell beyond the header", cells("007", "2025-03-04", "1", "yes", "P", "note"), nil, "", "a cell stands in column 6, but the header ends with column 5", 6, ""},
		{"blank cell beyond the header", cells("007", "2025-03-04", "1", "yes", "P", " "), []string{"007", "2025-03-04", "1", "yes", "P"}, "", "", 0, ""},
		{"fault of the reader", grid.Row{Fault: &grid.Fault{Column: 2, Problem: "bad", Remedy: "Mend it"}}, nil, "", "bad", 2, "date"},
	} {
		t.Run(c.name, func(t *testing.T) {
			table, _ := record.TableOf("fit_test")
			rows := &sheet{rows: []grid.Row{{}, cells(" worker_id", "Date", "par_db", "passed", "protector_id", " ", ""), c.row}}
			reader := &tableReader{head: newHead(table), rows: rows, format: grid.Workbook}
			require.NoError(t, reader.header())
			var r row
			for _, want := range []string{blank, "header"} {
				require.NoError(t, reader.next(&r))
				require.Equal(t, want, r.notData)
			}
			require.NoError(t, reader.next(&r))
			var got []string
			for _, cell := range r.cells {
				got = append(got, cell.text)
			}
			require.Equal(t, c.cells, got)
			require.Equal(t, c.not, r.notData)
			if c.fault == "" {
				require.Nil(t, r.fault)
				return
			}
			require.Equal(t, c.fault, r.fault.why)
			require.Equal(t, c.column, r.fault.column)
			require.Equal(t, c.field, r.fault.field)
			require.NotEmpty(t, r.fault.remedy)
		})
	}
}

func TestWorkbookWithCanonicalHeader(t *testing.T) {
	book := excelize.NewFile()
	style, err := book.NewStyle(&excelize.Style{NumFmt: 14})
	require.NoError(t, err)
	for _, c := range []struct {
		at    string
		value any
	}{
		{"A1", "worker_id"}, {"B1", "date"}, {"C1", "topics"},
		{"A2", "007"}, {"B2", 45720}, {"C2", "noise_effects;protectors"},
		{"A4", "W-2"}, {"B4", 45720},
		{"A5", "W-2"}, {"B5", "2025-03-05"}, {"C5", true},
	} {
		require.NoError(t, book.SetCellValue("Sheet1", c.at, c.value))
	}
	require.NoError(t, book.SetCellStyle("Sheet1", "B2", "B2", style))
	p := programOf(t, "workers.csv", workersCSV, "trainings.csv", "")
	require.NoError(t, book.SaveAs(filepath.Join(t.TempDir(), "x.xlsx")))
	b, err := book.WriteToBuffer()
	require.NoError(t, err)
	require.NoError(t, os.WriteFile(p.Sources[1].Path, b.Bytes(), 0o600), "a workbook, whatever its name says")
	records, l, err := readAll(t, p)
	require.NoError(t, err)
	require.Len(t, records, 3)
	require.Equal(t, "2025-03-04", records[2].(*record.Training).Date.String())
	in := l.Inputs[1]
	require.Equal(t, map[string]int{"header": 1, blank: 1}, in.Declared)
	require.Equal(t, []int{5, 1, 2}, []int{in.Rows, in.Accepted, in.Rejected})
	require.Contains(t, l.Rejects[0].Why, `"45720" is not a date`, "a number is no date unless it is formatted as one")
	require.Equal(t, 3, l.Rejects[1].Column)
}

func TestStatedEncoding(t *testing.T) {
	old := func(text string) string {
		out, err := charmap.CodePage850.NewEncoder().String(text)
		require.NoError(t, err)
		return out
	}
	p := programOf(t, "workers.csv", old("worker_id,site,hired_on,job_title\r\n1,kiln-hill,2020-01-06,Prüfer\r\n\x1a"),
		"trainings.ndjson", old(`{"worker_id":"1","date":"2025-01-02","by":"Größe"}`))
	_, _, err := readAll(t, p)
	require.ErrorContains(t, err, "workers.csv:2: the line holds a byte that is not UTF-8 text. State encoding:")
	p.Sources[0].Encoding, p.Sources[1].Encoding = "cp850", "cp850"
	records, _, err := readAll(t, p)
	require.NoError(t, err)
	require.Equal(t, "Prüfer", records[0].(*record.Worker).JobTitle)
	require.Equal(t, "Größe", records[1].(*record.Training).By)
}

func TestByteThatTheEncodingDoesNotKnow(t *testing.T) {
	for _, c := range []struct {
		file, text  string
		row, column int
	}{
		{"workers.csv", "worker_id,site,hired_on,job_title\n1,kiln-hill,2020-01-06,x\x81\n2,kiln-hill,2020-01-06,Pr\xfcfer\n", 2, 4},
		{"workers.ndjson", "{\"worker_id\":\"2\",\"site\":\"kiln-hill\",\"hired_on\":\"2020-01-06\",\"job_title\":\"\xfc\"}\n{\"worker_id\":\"1\",\"site\":\"kiln-hill\",\"hired_on\":\"2020-01-06\",\"job_title\":\"\x81\"}", 2, 0},
		{"workers.json", "[{\"worker_id\":\"2\",\"site\":\"kiln-hill\",\"hired_on\":\"2020-01-06\",\"job_title\":\"\xfc\"},{\"worker_id\":\"1\",\"site\":\"kiln-hill\",\"hired_on\":\"2020-01-06\",\"job_title\":\"\x81\"}]", 2, 0},
		{"workers.yaml", "- {worker_id: 2, site: kiln-hill, hired_on: 2020-01-06, job_title: \xfc}\n- {worker_id: 1, site: kiln-hill, hired_on: 2020-01-06, job_title: x\x81}\n", 2, 0},
	} {
		t.Run(c.file, func(t *testing.T) {
			p := programOf(t, c.file, c.text)
			p.Sources[0].Encoding = "windows-1252"
			records, l, err := readAll(t, p)
			require.NoError(t, err)
			require.Len(t, records, 1)
			require.Len(t, l.Rejects, 1)
			require.Equal(t, "the cell holds a byte that windows-1252 does not know", l.Rejects[0].Why)
			require.Equal(t, c.row, l.Rejects[0].Row)
			require.Equal(t, c.column, l.Rejects[0].Column)
			require.Equal(t, "job_title", l.Rejects[0].Field)
		})
	}
}
