package grid

import (
	"bytes"
	"fmt"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
)

// audiograms writes a workbook like an export of hearing tests, with 25 columns.
func audiograms(tb testing.TB, rows int) []byte {
	f := excelize.NewFile()
	w, err := f.NewStreamWriter("Sheet1")
	require.NoError(tb, err)
	day, err := f.NewStyle(&excelize.Style{NumFmt: 14})
	require.NoError(tb, err)
	for r := 1; r <= rows; r++ {
		cells := []any{fmt.Sprintf("%06d", r), fmt.Sprintf("KH-%d", r%977), excelize.Cell{StyleID: day, Value: 45000 + r%900}, "annual", "kiln-hill"}
		for c := range 20 {
			cells = append(cells, (r*7+c*5)%18*5-10)
		}
		require.NoError(tb, w.SetRow(fmt.Sprintf("A%d", r), cells))
	}
	require.NoError(tb, w.Flush())
	b, err := f.WriteToBuffer()
	require.NoError(tb, err)
	return b.Bytes()
}

// sharedAudiograms writes the same as most spreadsheet programs do: with texts shared.
func sharedAudiograms(rows int) []byte {
	var sheet, texts strings.Builder
	texts.WriteString("<si><t>annual</t></si><si><t>kiln-hill</t></si>")
	for r := 1; r <= rows; r++ {
		fmt.Fprintf(&texts, "<si><t>%06d</t></si><si><t>KH-%d</t></si>", r, r)
		fmt.Fprintf(&sheet, `<row r="%d" spans="1:25"><c r="A%[1]d" t="s"><v>%d</v></c><c r="B%[1]d" t="s"><v>%d</v></c><c r="C%[1]d" s="1"><v>%d</v></c><c r="D%[1]d" t="s"><v>0</v></c><c r="E%[1]d" t="s"><v>1</v></c>`, r, 2*r, 2*r+1, 45000+r%900)
		for c := range 20 {
			fmt.Fprintf(&sheet, `<c r="%s%d"><v>%d</v></c>`, columnName(c+6), r, (r*7+c*5)%18*5-10)
		}
		sheet.WriteString("</row>")
	}
	b := with(sheet.String())
	b.texts, b.formats = texts.String(), []string{"14"}
	return b.bytes()
}

func BenchmarkWorkbook(b *testing.B) {
	const rows = 100_000
	for _, c := range []struct {
		name string
		book []byte
	}{{"inline", audiograms(b, rows)}, {"shared", sharedAudiograms(rows)}} {
		b.Run(c.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				r, err := newWorkbook(bytes.NewReader(c.book), int64(len(c.book)), Options{}, workbookLimits)
				require.NoError(b, err)
				var row Row
				n := 0
				for ; err == nil; n++ {
					err = r.Next(&row)
				}
				require.Equal(b, io.EOF, err)
				require.Equal(b, rows, n-1)
			}
			b.ReportMetric(float64(rows*b.N)/b.Elapsed().Seconds(), "rows/s")
		})
	}
}
