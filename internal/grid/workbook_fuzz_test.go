package grid

import (
	"bytes"
	"errors"
	"flag"
	"io"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
	"time"
	"unicode/utf8"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
)

var updateBooks = flag.Bool("update-workbooks", false, "write the workbooks in testdata/workbook anew")

// seedBooks are small workbooks of several kinds.
func seedBooks(t testing.TB) map[string][]byte {
	bare := with(`<row r="1"><c r="A1" t="inlineStr"><is><t>Emp No</t></is></c><c r="B1" t="inlineStr"><is><t>R500</t></is></c></row><row r="3"><c t="inlineStr"><is><t>0042</t></is></c><c><f>B9</f></c></row>`)
	bare.leaveOut = "xl/styles.xml"
	bare.parts = map[string]string{"xl/_rels/workbook.xml.rels": `<Relationships><Relationship Id="r1" Type="x/worksheet" Target="worksheets/sheet1.xml"/></Relationships>`}

	odd := with(`<x:cols><col min="2" max="2" hidden="1"/></x:cols><sheetData><row r="1" hidden="1"><c r="A1" t="s"><v>1</v></c><c r="B1" s="1"><v>44258.5</v></c></row><row r="2"><c r="B2" t="e"><v>#N/A</v></c><c r="A2" s="2"><v>42</v></c><c r="C2" s="3"><v>0.25</v></c></row><row r="2"/></sheetData><mergeCells><mergeCell ref="A1:B1"/></mergeCells>`)
	odd.texts, odd.formats, odd.workbook = `<si><t>a</t></si><si><r><t>R </t></r><r><t>_x000D_500</t></r><rPh sb="0" eb="1"><t>x</t></rPh></si>`, []string{"14", "000000", "[h]:mm"}, `<workbookPr date1904="1"/>`

	f := excelize.NewFile()
	day, err := f.NewStyle(&excelize.Style{NumFmt: 14})
	require.NoError(t, err)
	for r, row := range [][]any{{"Emp No", "Date", "Right", nil, "Left"}, {nil, nil, 500, 1000, 500}, {"000123", 45720, -5, 10, "NR"}, {"000124", 45721, 37.5, true, nil}} {
		require.NoError(t, f.SetSheetRow("Sheet1", "A"+strconv.Itoa(r+1), &row))
	}
	require.NoError(t, f.MergeCell("Sheet1", "C1", "D1"))
	require.NoError(t, f.SetCellStyle("Sheet1", "B3", "B4", day))
	require.NoError(t, f.SetCellFormula("Sheet1", "E4", "C4*2"))
	require.NoError(t, f.SetRowVisible("Sheet1", 4, false))
	_, err = f.NewSheet("Notes")
	require.NoError(t, err)
	require.NoError(t, f.SetSheetVisible("Notes", false))
	audiograms, err := f.WriteToBuffer()
	require.NoError(t, err)
	return map[string][]byte{"bare.xlsx": bare.bytes(), "odd.xlsx": odd.bytes(), "audiograms.xlsx": audiograms.Bytes()}
}

// The committed workbooks are read through Open, as any file.
func TestSeedBooks(t *testing.T) {
	for name, book := range seedBooks(t) {
		path := filepath.Join("testdata", "workbook", name)
		if *updateBooks {
			require.NoError(t, os.WriteFile(path, book, 0o600))
		}
		f, err := Open(path, "")
		require.NoError(t, err)
		require.Equal(t, Workbook, f.Format)
		rows, err := f.Rows(Options{})
		require.NoError(t, err)
		var got strings.Builder
		for {
			var r Row
			if err := rows.Next(&r); err == io.EOF {
				break
			}
			got.WriteString(describeRow(&r) + "\n")
		}
		require.NoError(t, rows.Close())
		require.NoError(t, f.Close())
		if *updateBooks {
			require.NoError(t, os.WriteFile(path+".golden", []byte(got.String()), 0o600))
		}
		want, err := os.ReadFile(path + ".golden")
		require.NoError(t, err)
		require.Equal(t, string(want), got.String(), name)
	}
}

func FuzzWorkbook(f *testing.F) {
	paths, err := filepath.Glob("testdata/workbook/*.xlsx")
	require.NoError(f, err)
	require.NotEmpty(f, paths)
	for _, p := range paths {
		book, err := os.ReadFile(p)
		require.NoError(f, err)
		f.Add(book)
	}
	f.Fuzz(checkBook)
}

// What is in the parts is reached without having to keep the archive whole.
func FuzzWorkbookParts(f *testing.F) {
	f.Add(`<sheetData><row r="1" hidden="1"><c r="A1" t="s"><v>1</v></c><c r="B1" s="1"><v>45720.5</v></c></row><row r="900000"><c t="str"><f>A1</f><v>_x0041_&amp;</v></c></row></sheetData>`,
		`<numFmts><numFmt numFmtId="170" formatCode="[h]:mm"/></numFmts><cellXfs><xf numFmtId="0"/><xf numFmtId="170"/><xf numFmtId="14"/></cellXfs>`, `<si><t>a</t></si><si><r><t>b</t></r><rPh><t>c</t></rPh></si>`)
	f.Add(`<cols><col min="1" max="9" hidden="1"/></cols><sheetData><row><c t="d"><v>2025-03-04T10:00</v></c><c t="b"><v>1</v></c><c t="e"><v>#N/A</v></c></row></sheetData><mergeCells><mergeCell ref="A1:B2"/></mergeCells>`,
		`<cellXfs/>`, `<![CDATA[x]]>`)
	f.Fuzz(func(t *testing.T, sheet, styles, texts string) {
		b := xmlBook{sheets: []string{""}, texts: texts, parts: map[string]string{
			"xl/worksheets/sheet1.xml": "<worksheet>" + sheet + "</worksheet>",
			"xl/styles.xml":            "<styleSheet>" + styles + "</styleSheet>",
		}}
		checkBook(t, b.bytes())
	})
}

// checkBook reads a book and checks what must hold of every one.
func checkBook(t *testing.T, book []byte) {
	rows, err := newWorkbook(bytes.NewReader(book), int64(len(book)), Options{}, limits{sheet: 1 << 18, texts: 1 << 18, other: 1 << 16})
	if err != nil {
		problem(t, err)
		return
	}
	defer func() { require.NoError(t, rows.Close()) }()
	last := 0
	var r Row
	for {
		if err := rows.Next(&r); err != nil {
			if !errors.Is(err, io.EOF) {
				problem(t, err)
			}
			break
		}
		if r.Line < 1 || r.Line > maxSheetRows || len(r.Cells) > maxSheetColumns || r.Fault == nil && r.Line <= last {
			t.Fatalf("row %d with %d cells behind row %d", r.Line, len(r.Cells), last)
		}
		last = max(last, r.Line)
		for _, c := range r.Cells {
			checkCell(t, c)
		}
		if r.Fault != nil {
			problem(t, r.Fault)
			require.Empty(t, r.Cells)
		}
	}
	rows.About()
}

func checkCell(t *testing.T, c Cell) {
	var err error
	switch c.Kind {
	case Number, Clock:
		_, err = strconv.ParseFloat(c.Text, 64)
		require.NotContains(t, c.Text, "e")
	case Day:
		day, clock, is := strings.Cut(c.Text, "T")
		_, err = time.Parse(time.DateOnly, day)
		if is && err == nil {
			_, err = time.Parse(time.TimeOnly, clock)
		}
	case Bool:
		_, err = strconv.ParseBool(c.Text)
	case Uncomputed:
		require.Empty(t, c.Text)
	}
	require.NoError(t, err)
	require.True(t, utf8.ValidString(c.Text) && !strings.Contains(c.Text, "\x00"), "%q", c.Text)
}
