package grid

import (
	"bytes"
	"fmt"
	"io"
	"strconv"
	"strings"
	"testing"
	"time"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
)

// 45720 is 4 March 2025; 0.25 is six o'clock.
func TestNumberFormats(t *testing.T) {
	for _, c := range []struct{ format, v, want string }{
		{"14", "45720", "d:2025-03-04"},
		{"14", "45720.25", "d:2025-03-04T06:00:00"}, // nothing is lost though the format hides it
		{"17", "45720", "d:2025-03-04"},
		{"18", "0.25", "c:0.25"},
		{"20", "0.32291666666666669", "c:0.3229166666666667"},
		{"21", "0.25", "c:0.25"},
		{"22", "45720.25", "d:2025-03-04T06:00:00"},
		{"23", "45720", "n:45720"},
		{"27", "45720", "d:2025-03-04"},
		{"32", "0.25", "c:0.25"},
		{"34", "0.25", "c:0.25"},
		{"34", "45720", "d:2025-03-04"},
		{"36", "45720", "d:2025-03-04"},
		{"37", "45720", "n:45720"},
		{"45", "0.25", "c:0.25"},
		{"46", "1.5", "c:1.5"},
		{"47", "0.25", "c:0.25"},
		{"48", "45720", "n:45720"},
		{"49", "45720", "n:45720"},
		{"50", "45720", "d:2025-03-04"},
		{"58", "45720", "d:2025-03-04"},
		{"59", "45720", "n:45720"},
		{"71", "45720", "d:2025-03-04"},
		{"75", "0.25", "c:0.25"},

		{"dd/mm/yyyy", "45720", "d:2025-03-04"},
		{"dd/mm/yyyy;@", "45720", "d:2025-03-04"},
		{"[$-409]d-mmm-yy;@", "45720", "d:2025-03-04"},
		{`yyyy"年"m"月"d"日"`, "45720", "d:2025-03-04"},
		{`[$-F800]dddd, mmmm dd, yyyy`, "45720", "d:2025-03-04"},
		{"YYYY-MM-DD HH:MM", "45720.25", "d:2025-03-04T06:00:00"},
		{"mmm", "45720", "d:2025-03-04"},
		{"mm", "45720", "d:2025-03-04"},
		{"mmmm h", "45720", "d:2025-03-04"},
		{"[=0]&quot;&quot;;dd/mm/yyyy", "45720", "d:2025-03-04"},
		{"h:mm", "0.25", "c:0.25"},
		{"h:mm AM/PM", "0.25", "c:0.25"},
		{"mm:ss.0", "0.25", "c:0.25"},
		{"[h]:mm", "1.5", "c:1.5"},
		{"[mm]:ss", "0.25", "c:0.25"},
		{"[hh]:mm:ss;@", "-0.25", "c:-0.25"},
		{"d [h]:mm", "1.5", "c:1.5"},

		{"General", "45720", "n:45720"},
		{"Standard", "45720", "n:45720"},
		{"@", "45720", "n:45720"},
		{";;;", "45720", "n:45720"},
		{`0.0 "dB day"`, "37.5", "n:37.5"},
		{`0\d`, "37.5", "n:37.5"},
		{"0 dB", "37.5", "n:37.5"},
		{"#,##0.00", "45720", "n:45720"},
		{"[Red]0", "45720", "n:45720"},
		{"[>100]0", "45720", "n:45720"},
		{`_d0_y`, "45720", "n:45720"},
		{`*d0`, "45720", "n:45720"},
		{"0.00E+00", "45720", "n:45720"},
		{`"d`, "45720", "n:45720"},
		{`[h`, "45720", "n:45720"},
		{`\`, "45720", "n:45720"},
		{"0%", "0.625", "n:0.625"},

		{"000000", "123", "t:000123"},
		{"000000", "1.23E2", "t:000123"},
		{"000000", "1234567", "t:1234567"},
		{"000000", "0", "t:000000"},
		{"000000", "12.5", "n:12.5"},
		{"000000", "-5", "n:-5"},
		{"000000", "1E20", "n:100000000000000000000"},
		{"0", "123", "n:123"},
		{`"KH-"0000`, "123", "n:123"},
	} {
		t.Run(c.format+" "+c.v, func(t *testing.T) {
			b := with(`<row r="1"><c r="A1" s="1"><v>` + c.v + `</v></c></row>`)
			b.formats = []string{strings.ReplaceAll(c.format, "&quot;", `"`)}
			require.Equal(t, []string{"1: " + c.want}, read(t, b))
		})
	}
}

func TestSerialDays(t *testing.T) {
	for _, c := range []struct {
		n          float64
		d1900, old string // old in the 1904 system
	}{
		{-1, "e:-1", "e:-1"},
		{0, "e:1900-01-00", "d:1904-01-01"},
		{0.25, "e:1900-01-00T06:00:00", "d:1904-01-01T06:00:00"},
		{1, "d:1900-01-01", "d:1904-01-02"},
		{59, "d:1900-02-28", "d:1904-02-29"},
		{59.9999999, "e:1900-02-29", "d:1904-03-01"},
		{60, "e:1900-02-29", "d:1904-03-01"},
		{60.5, "e:1900-02-29T12:00:00", "d:1904-03-01T12:00:00"},
		{61, "d:1900-03-01", "d:1904-03-02"},
		{44258, "d:2021-03-03", "d:2025-03-04"},
		{45720, "d:2025-03-04", "d:2029-03-05"},
		{45720.99999999, "d:2025-03-05", "d:2029-03-06"},
		{45720.322916666664, "d:2025-03-04T07:45:00", "d:2029-03-05T07:45:00"},
		{2957003, "d:9995-12-30", "d:9999-12-31"},
		{2957004, "d:9995-12-31", "e:2957004"},
		{2958465, "d:9999-12-31", "e:2958465"},
		{2958465.9999999, "e:2958465.9999999", "e:2958465.9999999"},
		{2958466, "e:2958466", "e:2958466"},
		{1e300, "e:1" + strings.Repeat("0", 300), "e:1" + strings.Repeat("0", 300)},
	} {
		out, kind := appendDay(nil, c.n, false)
		require.Equal(t, c.d1900, "tndcbeu"[kind:kind+1]+":"+string(out), "%v in 1900", c.n)
		out, kind = appendDay(nil, c.n, true)
		require.Equal(t, c.old, "tndcbeu"[kind:kind+1]+":"+string(out), "%v in 1904", c.n)
	}
	b := with(`<row r="1"><c r="A1" s="1"><v>44258</v></c></row>`)
	b.formats = []string{"14"}
	for _, flag := range []string{"1", "true"} {
		b.workbook = `<workbookPr date1904="` + flag + `"/>`
		require.Equal(t, []string{"1: d:2025-03-04"}, read(t, b))
	}
	b.workbook = `<workbookPr date1904="0"/>`
	require.Equal(t, []string{"1: d:2021-03-03"}, read(t, b))
}

// The library that writes the fixtures converts days, too. It takes 60 for 28 February 1900.
func TestDaysAgainstLibrary(t *testing.T) {
	for _, from1904 := range []bool{false, true} {
		for n := 61; n < 120_000; n += 37 {
			want, err := excelize.ExcelDateToTime(float64(n), from1904)
			require.NoError(t, err)
			got, kind := appendDay(nil, float64(n), from1904)
			require.Equal(t, Day, kind)
			require.Equal(t, want.Format(time.DateOnly), string(got), "%d %v", n, from1904)
		}
	}
}

// A book by the library, read by both.
func TestAgainstLibrary(t *testing.T) {
	for _, from1904 := range []bool{false, true} {
		f := excelize.NewFile()
		require.NoError(t, f.SetWorkbookProps(&excelize.WorkbookPropsOptions{Date1904: &from1904}))
		day, err := f.NewStyle(&excelize.Style{NumFmt: 14})
		require.NoError(t, err)
		for r := 1; r <= 40; r++ {
			row := []any{fmt.Sprintf("%06d", r), r * 5, float64(r) / 7, "a<b> & \"c\"\n_x0041_", r%2 == 0, nil, "é右", 44000 + r}
			require.NoError(t, f.SetSheetRow("Sheet1", "B"+strconv.Itoa(r*2), &row))
		}
		require.NoError(t, f.SetCellStyle("Sheet1", "I1", "I90", day))
		require.NoError(t, f.SetCellRichText("Sheet1", "B4", []excelize.RichTextRun{{Text: "00"}, {Text: "42", Font: &excelize.Font{Bold: true}}}))
		book, err := f.WriteToBuffer()
		require.NoError(t, err)

		raw, err := f.GetRows("Sheet1", excelize.Options{RawCellValue: true})
		require.NoError(t, err)
		rows, err := newWorkbook(bytes.NewReader(book.Bytes()), int64(book.Len()), Options{}, workbookLimits)
		require.NoError(t, err)
		var row Row
		n := 0
		for ; ; n++ {
			if err := rows.Next(&row); err == io.EOF {
				break
			}
			require.NoError(t, err)
			require.Equal(t, n+1, row.Line)
			for i, c := range row.Cells {
				want := raw[n][i]
				switch c.Kind {
				case Bool:
					want = map[string]string{"1": "true", "0": "false", "TRUE": "true", "FALSE": "false"}[want]
				case Day:
					serial, err := strconv.ParseFloat(want, 64)
					require.NoError(t, err)
					at, err := excelize.ExcelDateToTime(serial, from1904)
					require.NoError(t, err)
					want = at.Format(time.DateOnly)
					require.Equal(t, 8, i)
				case Number:
					number, err := strconv.ParseFloat(want, 64)
					require.NoError(t, err)
					want = strconv.FormatFloat(number, 'f', -1, 64)
				}
				require.Equal(t, want, c.Text, "row %d cell %d", n+1, i+1)
			}
		}
		require.Equal(t, len(raw), n)
		require.Equal(t, 80, n)
	}
}
