package grid

import (
	"bytes"
	"fmt"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

func TestRowsOfSheet(t *testing.T) {
	cell := func(ref string) string { return `<c r="` + ref + `"><v>1</v></c>` }
	for name, c := range map[string]struct {
		rows string
		want []string
	}{
		"no rows":                      {"", nil},
		"blank rows between":           {`<row r="2">` + cell("A2") + `</row><row r="4"/><row r="5">` + cell("A5") + `</row>`, []string{"1:", "2: n:1", "3:", "4:", "5: n:1"}},
		"blank rows at the end":        {`<row r="1">` + cell("A1") + `</row><row r="2"><c r="A2" s="0"/></row><row r="1048576" ht="9"/>`, []string{"1: n:1"}},
		"blank rows only":              {`<row r="3"/><row r="1048576"><c r="A1048576" t="str"><v></v></c></row>`, nil},
		"without numbers":              {`<row><c><v>1</v></c></row><row/><row><c><v>3</v></c></row>`, []string{"1: n:1", "2:", "3: n:3"}},
		"a formula is not blank":       {`<row r="2"><c r="A2"><f>B2</f></c></row>`, []string{"1:", "2: u:"}},
		"row 0":                        {`<row r="0">` + cell("A0") + `</row><row r="1">` + cell("A1") + `</row>`, []string{`1: fault 0 the row has the number "0", which no sheet has`, `1: fault 0 the row stands behind row 1`}},
		"a row beyond the last":        {`<row r="1048577">` + cell("A1048577") + `</row><row r="3">` + cell("A3") + `</row>`, []string{`1: fault 0 the row has the number "1048577", which no sheet has`, "2:", "3: n:1"}},
		"a row with a negative number": {`<row r="-1"/>`, []string{`1: fault 0 the row has the number "-1", which no sheet has`}},
		"a row of 99 digits":           {`<row r="` + strings.Repeat("9", 99) + `"/>`, []string{`1: fault 0 the row has the number "99999999999999999999", which no sheet has`}},
		"out of order":                 {`<row r="3">` + cell("A3") + `</row><row r="2">` + cell("A2") + `</row><row r="4">` + cell("A4") + `</row>`, []string{"1:", "2:", "3: n:1", "2: fault 0 the row stands behind row 3", "4: n:1"}},
		"twice":                        {`<row r="1">` + cell("A1") + `</row><row r="1">` + cell("A1") + `</row>`, []string{"1: n:1", "1: fault 0 the row stands behind row 1"}},
		"cells in strange elements":    {`<row r="1"><x:ext>` + cell("A1") + `</x:ext>` + cell("B1") + `</row><odd>` + cell("A2") + `</odd>`, []string{"1: - n:1"}},
	} {
		t.Run(name, func(t *testing.T) { require.Equal(t, c.want, read(t, with(c.rows))) })
	}
}

// A gap of a million rows costs no memory and little time.
func TestLongGap(t *testing.T) {
	book := with(`<row r="1"><c r="A1"><v>1</v></c></row><row r="1048576"><c r="A1048576"><v>2</v></c></row><row><c><v>3</v></c></row>`).bytes()
	rows, err := newWorkbook(bytes.NewReader(book), int64(len(book)), Options{}, small)
	require.NoError(t, err)
	var r Row
	n := 0
	require.Less(t, testing.AllocsPerRun(1, func() {
		for r.Line < maxSheetRows && err == nil {
			err = rows.Next(&r)
			n++
		}
	}), 100.0)
	require.NoError(t, err)
	require.Equal(t, maxSheetRows, n)
	require.Equal(t, "2", r.Cells[0].Text)
	require.NoError(t, rows.Next(&r))
	require.Equal(t, "the row stands behind the last row that a sheet can have", r.Fault.Problem)
	require.Equal(t, io.EOF, rows.Next(&r))
}

// Rows before the damage are read, and the damage is told with its place.
func TestDamagedSheets(t *testing.T) {
	const first = `<sheetData><row r="1"><c r="A1"><v>1</v></c></row>`
	for name, c := range map[string]struct{ xml, want string }{
		"cut off in a row":      {first + `<row r="2"><c r="A2"><v>2`, `beyond row 2: it closes "worksheet", which is not open`},
		"closed wrongly":        {first + `<row r="2"><c r="A2"><v>2</c></row></sheetData>`, `beyond row 2: it closes "c", which is not open`},
		"an unknown reference":  {first + `<row r="2"><c r="A2" t="str"><v>&nbsp;</v></c></row></sheetData>`, `beyond row 2: it has the reference "&nbsp;", which XML does not have`},
		"a lonely &":            {first + `<row r="2"><c r="A2" t="str"><v>a & b</v></c></row></sheetData>`, `beyond row 2: it has an & that begins no reference`},
		"a character reference": {first + `<row r="2"><c r="A2" t="str"><v>&#0;</v></c></row></sheetData>`, `beyond row 2: it has the reference "&#0;", which XML does not have`},
		"no quotes":             {first + `<row r=2></row></sheetData>`, "beyond row 2: it has an attribute without quotes"},
		"no value":              {first + `<row r></row></sheetData>`, "beyond row 2: it has an attribute without a value"},
		"a tag in a tag":        {first + `<row <c></row></sheetData>`, "beyond row 1: it has a tag within a tag"},
		"a nameless tag":        {first + `< row></row></sheetData>`, "beyond row 1: it has a tag without a name"},
		"a document type":       {first + `<!DOCTYPE a [<!ENTITY b "c">]></sheetData>`, "beyond row 1: it has a document type or the like, which no workbook may have"},
		"deep elements":         {first + strings.Repeat("<a>", 500) + strings.Repeat("</a>", 500) + `</sheetData>`, "beyond row 1: it has more than 200 elements within one another"},
		"behind the rows":       {first + `</sheetData><mergeCells><mergeCell ref="A1:B1"></mergeCells>`, `the part "xl/worksheets/sheet1.xml" of the workbook cannot be read: it closes "mergeCells", which is not open`},
	} {
		t.Run(name, func(t *testing.T) {
			out, _, fault := readBookRows(t, with(c.xml).bytes(), Options{})
			require.NotNil(t, fault)
			require.Equal(t, []string{"1: n:1"}, out)
			require.True(t, strings.HasSuffix(fault.Problem, c.want), fault.Problem)
			require.Equal(t, saveAnew, fault.Remedy)
		})
	}
}

func TestManyMerged(t *testing.T) {
	var b strings.Builder
	for i := range maxMerged + 1 {
		fmt.Fprintf(&b, `<mergeCell ref="A%d:B%[1]d"/>`, i+1)
	}
	book := with(`<sheetData><row r="1"><c r="A1"><v>1</v></c></row></sheetData><mergeCells>` + b.String() + `</mergeCells>`).bytes()
	large := small
	large.sheet = 1 << 24
	out, _, fault := readWithin(t, book, Options{}, large)
	require.Len(t, out, 1)
	require.Equal(t, "the sheet has more than 100000 merged cells", fault.Problem)
}
