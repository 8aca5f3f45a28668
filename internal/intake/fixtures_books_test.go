package intake

import (
	"archive/zip"
	"bytes"
	"io"
	"regexp"
	"testing"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
)

// books makes the workbooks of the cases.
func books(t *testing.T) map[string][]byte {
	no := func(err error) { require.NoError(t, err) }
	head := []any{"Emp", "Date", "Course"}
	sessions := book(t, cellTable{head, {"000123", "2024-02-01", "protectors"}, {"000124", "2024-02-01", "audiometry"}}, nil)
	day := func(v float64) styled { return styled{value: v, number: 14} } // shown as 03-04-25
	return map[string][]byte{
		"01_lost_zeros_padded/sessions.xlsx": book(t, cellTable{{"Emp", "Date"}, {123, "2024-02-05"}, {"000124", "2024-02-05"}, {125.5, "2024-02-05"}, {1.23e16, "2024-02-05"}}, nil),
		"07_serial_1904/book.xlsx": book(t, cellTable{{"Emp", "Date"}, {"000124", day(44258)}, {"000124", 44259}, {"000124", "06/03/2025"}, {"000124", styled{value: 44261, format: `d\-mmm\-yy`}}, {"000124", "44262"}},
			func(x *excelize.File) {
				yes := true
				no(x.SetWorkbookProps(&excelize.WorkbookPropsOptions{Date1904: &yes}))
			}),
		"24_book_in_disguise/sessions.csv": sessions,
		"25_lock_file/sessions.xlsx":       sessions,
		"24_sheets/book.xlsx": book(t, nil, func(x *excelize.File) {
			no(x.SetSheetName("Sheet1", "2023"))
			put(t, x, "2023", cellTable{head, {"000123", "2023-02-01", "protectors"}})
			year := map[string]string{"2024": "2024", "archive": "2019"}
			for _, name := range []string{"2024", "archive"} {
				_, err := x.NewSheet(name)
				no(err)
				put(t, x, name, cellTable{{"Sessions of " + name}, nil, head, {"000124", year[name] + "-02-01", "audiometry"}})
			}
			no(x.SetSheetVisible("archive", false))
		}),
		"24_hidden_rows/filtered.xlsx": book(t, cellTable{head, {"000123", "2024-02-01", "exposure"}, {"000124", "2024-02-01", "shift"}, {"000125", "2024-02-01", "exposure"}, {"000125", "2024-02-02", "shift"}}, func(x *excelize.File) {
			no(x.AutoFilter("Sheet1", "A1:C5", []excelize.AutoFilterOptions{{Column: "C", Expression: "x == exposure"}}))
			no(x.SetRowVisible("Sheet1", 3, false))
			no(x.SetRowVisible("Sheet1", 5, false))
			no(x.SetColVisible("Sheet1", "C", false))
		}),
		"24_merged_head/tests.xlsx": book(t, cellTable{{nil, nil, "Right", nil, "Left", nil, nil}, {"Emp", "Date", 500, 2000, 500, 2000, "Tester"}, {"000123", day(45720), 5, 10, 15, 20, "T-1"}, {"000124", day(45721), 0, 5, 10, 15, "T-1"}}, func(x *excelize.File) {
			no(x.MergeCell("Sheet1", "C1", "D1"))
			no(x.MergeCell("Sheet1", "E1", "F1"))
		}),
		"24_cells/runs.xlsx": spoil(t, book(t, cellTable{
			{"Run", "Emp", "Date", "Run time", "Leq"},
			{"R01", 123, day(45720), styled{value: 0.322916666666667, number: 20}, 85.3},
			{"R02", "000123", "05/03/2025", "7:45", "85.3"},
			{"R03", "000123", styled{value: 45722, format: `dd\.mm\.yy`}, "7:45", formulaOnly("AVERAGE(F1:F9)")},
			{"R04", "000123", day(45723), "7:45", errorValue("#N/A")},
			{"R05", "000123", day(45724), "7:45", errorValue("#DIV/0!")},
			{"R06", day(45725), day(45725), "7:45", 85.3},
			{"R07", "000123", 45726, styled{value: 1.25, format: "[h]:mm"}, 85.3},
			{"R08", "000123", day(45727), 7.75, 85.3},
			{"R09", "000123", styled{value: 45728.75, number: 22}, "7:45", 85.299999999999997},
			{"R10", "000123", true, "7:45", 85.3},
			{"R11", "000123", styled{value: 0.5, number: 14}, "7:45", 85.3},
			{"R12", "000123", styled{value: 0, number: 14}, "7:45", 85.3},
		}, nil)),
	}
}

var shared = regexp.MustCompile(`(<c r="[A-Z]+\d+")( s="\d+")? t="s"><v>(\d+)</v>`)

// spoil makes errors of the texts of a book that are written like errors, as no library writes them.
func spoil(t *testing.T, content []byte) []byte {
	t.Helper()
	in, err := zip.NewReader(bytes.NewReader(content), int64(len(content)))
	require.NoError(t, err)
	files := map[string]string{}
	for _, f := range in.File {
		r, err := f.Open()
		require.NoError(t, err)
		text, err := io.ReadAll(r)
		require.NoError(t, err)
		files[f.Name] = string(text)
	}
	texts := regexp.MustCompile(`<si><t[^>]*>([^<]*)</t></si>`).FindAllStringSubmatch(files["xl/sharedStrings.xml"], -1)
	const name = "xl/worksheets/sheet1.xml"
	files[name] = shared.ReplaceAllStringFunc(files[name], func(cell string) string {
		m := shared.FindStringSubmatch(cell)
		n := 0
		for _, digit := range m[3] {
			n = n*10 + int(digit-'0')
		}
		if text := texts[n][1]; text[0] == '#' {
			return m[1] + m[2] + ` t="e"><v>` + text + `</v>`
		}
		return cell
	})
	var out bytes.Buffer
	z := zip.NewWriter(&out)
	for _, f := range in.File {
		w, err := z.Create(f.Name)
		require.NoError(t, err)
		_, err = io.WriteString(w, files[f.Name])
		require.NoError(t, err)
	}
	require.NoError(t, z.Close())
	return out.Bytes()
}
