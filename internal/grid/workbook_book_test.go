package grid

import (
	"archive/zip"
	"bytes"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

func TestSheets(t *testing.T) {
	one := func(v string) string { return `<row r="1"><c r="A1"><v>` + v + `</v></c></row>` }
	b := xmlBook{sheets: []string{one("1"), one("2"), one("3")}, states: []string{"hidden", "", "veryHidden"}}
	out, about, fault := readBookRows(t, b.bytes(), Options{})
	require.Nil(t, fault)
	require.Equal(t, []string{"1: n:2"}, out, "the only visible sheet")
	require.Equal(t, About{Format: Workbook, Sheet: "Sheet2", Sheets: []string{"Sheet1", "Sheet2", "Sheet3"}, HiddenCols: about.HiddenCols}, about)

	out, about, fault = readBookRows(t, b.bytes(), Options{Sheet: "Sheet3"})
	require.Nil(t, fault)
	require.Equal(t, []string{"1: n:3"}, out)
	require.True(t, about.HiddenSheet)

	for name, c := range map[string]struct {
		states                 []string
		sheet, problem, remedy string
	}{
		"several visible": {[]string{"", "hidden", "visible"}, "", "the workbook has 2 visible sheets", `Name the sheet to be read: "Sheet1", "Sheet3"`},
		"first hidden":    {[]string{"hidden"}, "", "the workbook has 2 visible sheets", `Name the sheet to be read: "Sheet2", "Sheet3"`},
		"all hidden":      {[]string{"hidden", "hidden", "veryHidden"}, "", "all sheets of the workbook are hidden", `Name the sheet to be read: "Sheet1", "Sheet2", "Sheet3"`},
		"other case":      {nil, "SHEET3", `the workbook has no sheet "SHEET3"`, `Write "Sheet3" if that is meant; the sheets are "Sheet1", "Sheet2", "Sheet3"`},
		"near":            {nil, "Shete2", `the workbook has no sheet "Shete2"`, `Write "Sheet2" if that is meant; the sheets are "Sheet1", "Sheet2", "Sheet3"`},
		"far":             {nil, "Roster", `the workbook has no sheet "Roster"`, `Name one of its sheets: "Sheet1", "Sheet2", "Sheet3"`},
	} {
		t.Run(name, func(t *testing.T) {
			b.states = c.states
			_, _, fault := readBookRows(t, b.bytes(), Options{Sheet: c.sheet})
			require.Equal(t, Fault{Problem: c.problem, Remedy: c.remedy}, *fault)
		})
	}
	many := xmlBook{sheets: make([]string, 30)}
	_, _, fault = readBookRows(t, many.bytes(), Options{})
	require.Contains(t, fault.Remedy, `"Sheet20" and 10 more`)
}

func TestHiddenAndMerged(t *testing.T) {
	b := with(`<sheetViews><sheetView/></sheetViews><cols><col min="2" max="3" hidden="1"/><col min="5" max="5" width="9"/><col min="6" max="16384" hidden="true"/><col min="9" max="3" hidden="1"/><col min="0" max="99999" hidden="1"/></cols>` +
		`<sheetData><row r="1"><c r="A1"><v>1</v></c><c r="G1"><v>7</v></c></row><row r="2" hidden="1"><c r="A2"><v>2</v></c></row><row r="3" hidden="0"><c r="A3"><v>3</v></c></row></sheetData>` +
		`<autoFilter ref="A1:G3"/><mergeCells count="4"><mergeCell ref="B1:D1"/><mergeCell ref="A1:A2"/><mergeCell ref="A1"/><mergeCell ref="B9:A1"/></mergeCells>`)
	book := b.bytes()
	out, about, fault := readBookRows(t, book, Options{})
	require.Nil(t, fault)
	require.Equal(t, []string{"1: n:1 - - - - - n:7", "2 hidden: n:2", "3: n:3"}, out)
	require.Equal(t, []int{2, 3, 6, 7}, about.HiddenCols, "up to the widest row")

	rows, err := newWorkbook(bytes.NewReader(book), int64(len(book)), Options{}, small)
	require.NoError(t, err)
	require.Equal(t, []Range{{1, 2, 1, 4}, {1, 1, 2, 1}}, rows.About().Merged, "known before the first row")
}

// Books by other programs: another namespace, prefixes, names in other cases, paths with backslashes, no styles,
// no shared texts, relations with whole paths, UTF-16.
func TestBooksOfOthers(t *testing.T) {
	plain := with(`<row r="1"><c r="A1" t="inlineStr"><is><t>0042</t></is></c><c r="B1"><v>5</v></c></row>`)
	want := []string{"1: t:0042 n:5"}

	prefixed := plain
	prefixed.prefix = "x:"
	require.Equal(t, want, read(t, prefixed), "a prefix")

	strict := strings.NewReplacer(
		transitional, "http://purl.oclc.org/ooxml/spreadsheetml/main",
		"http://schemas.openxmlformats.org/officeDocument/2006/relationships", "http://purl.oclc.org/ooxml/officeDocument/relationships")
	require.Equal(t, want, readBytes(t, rezip(t, plain.bytes(), func(name, xml string) (string, string) { return name, strict.Replace(xml) })), "strict")
	require.Equal(t, want, readBytes(t, rezip(t, plain.bytes(), func(name, xml string) (string, string) { return strings.ReplaceAll(name, "/", `\`), xml })), "backslashes")
	require.Equal(t, want, readBytes(t, rezip(t, plain.bytes(), func(name, xml string) (string, string) { return strings.ToUpper(name), xml })), "capitals")
	require.Equal(t, want, readBytes(t, rezip(t, plain.bytes(), func(name, xml string) (string, string) { return name, "\ufeff" + xml })), "a byte order mark")
	require.Equal(t, want, readBytes(t, rezip(t, plain.bytes(), func(name, xml string) (string, string) {
		wide := []byte{0xff, 0xfe}
		for _, c := range []byte(strings.ReplaceAll(xml, "UTF-8", "UTF-16")) {
			wide = append(wide, c, 0)
		}
		return name, string(wide)
	})), "UTF-16")
	require.Equal(t, want, readBytes(t, rezip(t, plain.bytes(), func(name, xml string) (string, string) {
		return name, strings.NewReplacer(`Target="xl/`, `Target="/xl/`, `Target="worksheets/`, `Target="../xl/./worksheets/`).Replace(xml)
	})), "other paths")
	require.Equal(t, want, readBytes(t, rezip(t, plain.bytes(), func(name, xml string) (string, string) {
		return name, strings.NewReplacer("><", ">\r\n  <", "'", `"`).Replace(xml)
	})), "indented")

	bare := plain
	bare.leaveOut = "xl/styles.xml"
	bare.parts = map[string]string{"xl/_rels/workbook.xml.rels": `<Relationships><Relationship Id="r1" Type="x/worksheet" Target="worksheets/sheet1.xml"/><Relationship Id="e" Type="x/styles" Target="http://gerbera.example/s" TargetMode="External"/></Relationships>`}
	require.Equal(t, want, read(t, bare), "no styles")
}

func readBytes(t *testing.T, book []byte) []string {
	out, _, fault := readBookRows(t, book, Options{})
	require.Nil(t, fault)
	return out
}

// rezip packs a book anew with other names or contents.
func rezip(t *testing.T, book []byte, change func(name, xml string) (string, string)) []byte {
	in, err := zip.NewReader(bytes.NewReader(book), int64(len(book)))
	require.NoError(t, err)
	var out bytes.Buffer
	z := zip.NewWriter(&out)
	for _, f := range in.File {
		r, err := f.Open()
		require.NoError(t, err)
		var xml bytes.Buffer
		_, err = xml.ReadFrom(r)
		require.NoError(t, err)
		name, text := change(f.Name, xml.String())
		w, err := z.CreateHeader(&zip.FileHeader{Name: name, Method: zip.Deflate})
		require.NoError(t, err)
		_, err = w.Write([]byte(text))
		require.NoError(t, err)
	}
	require.NoError(t, z.Close())
	return out.Bytes()
}
