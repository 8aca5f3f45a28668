package grid

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

func TestWorkbookCells(t *testing.T) {
	for name, c := range map[string]struct{ cell, want string }{
		"an integer":                         {`<c r="A1"><v>123</v></c>`, "n:123"},
		"a negative integer":                 {`<c r="A1"><v>-10</v></c>`, "n:-10"},
		"seventeen digits made short":        {`<c r="A1"><v>0.10000000000000001</v></c>`, "n:0.1"},
		"full precision":                     {`<c r="A1"><v>0.30000000000000004</v></c>`, "n:0.30000000000000004"},
		"an exponent":                        {`<c r="A1"><v>1.23E+05</v></c>`, "n:123000"},
		"a small number":                     {`<c r="A1"><v>1.5E-7</v></c>`, "n:0.00000015"},
		"an integer beyond 2^53":             {`<c r="A1"><v>9007199254740993</v></c>`, "n:9007199254740993"},
		"minus nought":                       {`<c r="A1"><v>-0</v></c>`, "n:0"},
		"blanks around a number":             {"<c r=\"A1\"><v> 37.50\n</v></c>", "n:37.5"},
		"a number too large stays as it is":  {`<c r="A1"><v>1E999</v></c>`, "t:1E999"},
		"no number stays as it is":           {`<c r="A1"><v>0x1F</v></c>`, "t:0x1F"},
		"not even infinity":                  {`<c r="A1"><v>Infinity</v></c>`, "t:Infinity"},
		"shared text keeps its zeros":        {`<c r="A1" t="s"><v>0</v></c>`, "t:000123"},
		"rich text without its phonetic run": {`<c r="A1" t="s"><v>1</v></c>`, "t:右 500"},
		"shared text with blanks":            {`<c r="A1" t="s"><v>2</v></c>`, "t: NR "},
		"an empty shared text":               {`<c r="A1" t="s"><v>3</v></c>`, ""},
		"inline text":                        {`<c r="A1" t="inlineStr"><is><t>0042</t></is></c>`, "t:0042"},
		"rich inline text":                   {`<c r="A1" t="inlineStr"><is><r><rPr><b/></rPr><t>R </t></r><r><t>500</t></r></is></c>`, "t:R 500"},
		"inline text with a value instead":   {`<c r="A1" t="inlineStr"><v>0042</v></c>`, "t:0042"},
		"references":                         {`<c r="A1" t="str"><v>&lt;80 &amp; &#65;&#x42;</v></c>`, "t:<80 & AB"},
		"CDATA and a comment":                {`<c r="A1" t="str"><v>a<!-- no --><![CDATA[<b>]]></v></c>`, "t:a<b>"},
		"escapes of workbooks":               {`<c r="A1" t="str"><v>a_x000D__x000A_b _x005F_x0041_ _xD83D__xDE00_ _xZZ00_</v></c>`, "t:a\r\nb _x0041_ \U0001F600 _xZZ00_"},
		"true":                               {`<c r="A1" t="b"><v>1</v></c>`, "b:true"},
		"false":                              {`<c r="A1" t="b"><v>0</v></c>`, "b:false"},
		"an error":                           {`<c r="A1" t="e"><v>#N/A</v></c>`, "e:#N/A"},
		"a formula with a number":            {`<c r="A1"><f>B1+1</f><v>25</v></c>`, "n:25"},
		"a formula with a text":              {`<c r="A1" t="str"><f>"x"</f><v>x</v></c>`, "t:x"},
		"a formula with an empty text":       {`<c r="A1" t="str"><f>""</f><v></v></c>`, ""},
		"a formula with an error":            {`<c r="A1" t="e"><f>1/0</f><v>#DIV/0!</v></c>`, "e:#DIV/0!"},
		"a formula without value":            {`<c r="A1"><f>B1+1</f></c>`, "u:"},
		"a formula with an empty value":      {`<c r="A1"><f>B1+1</f><v/></c>`, "u:"},
		"a text formula without value":       {`<c r="A1" t="str"><f>B1</f></c>`, "u:"},
		"a shared formula without value":     {`<c r="A1"><f t="shared" si="0"/></c>`, "u:"},
		"a true-or-false formula without":    {`<c r="A1" t="b"><f>B1=1</f></c>`, "u:"},
		"a formula of one cell, an array":    {`<c r="A1"><f t="array" ref="A1">B1</f></c>`, "u:"},
		"an ISO day":                         {`<c r="A1" t="d"><v>2025-03-04</v></c>`, "d:2025-03-04"},
		"an ISO day at midnight":             {`<c r="A1" t="d"><v>2025-03-04T00:00:00</v></c>`, "d:2025-03-04"},
		"an ISO time":                        {`<c r="A1" t="d"><v>2025-03-04T07:45:00.2</v></c>`, "d:2025-03-04T07:45:00"},
		"an ISO time with a zone is text":    {`<c r="A1" t="d"><v>2025-03-04T00:00:00Z</v></c>`, "t:2025-03-04T00:00:00Z"},
		"a day before 1900 is text":          {`<c r="A1" t="str"><v>31.12.1899</v></c>`, "t:31.12.1899"},
		"a value of an extension":            {`<c r="A1"><extLst><ext><v>9</v></ext></extLst><v>5</v></c>`, "n:5"},
		"an unknown attribute":               {`<c r="A1" cm="1" x:y='>"'><v>5</v></c>`, "n:5"},
		"no bytes of text in a day":          {"<c r=\"A1\" t=\"d\"><v>20\x955</v></c>", "t:20\ufffd5"},
		"no bytes of text in an error":       {"<c r=\"A1\" t=\"e\"><v>#\xff</v></c>", "e:#\ufffd"},
		"bytes that are no text":             {"<c r=\"A1\" t=\"str\"><v>a\xffb</v></c>", "t:a\ufffdb"},
	} {
		t.Run(name, func(t *testing.T) {
			b := with(`<row r="1">` + c.cell + `<c r="B1"><v>7</v></c></row>`)
			b.texts = `<si><t>000123</t></si><si><r><t>右</t></r><rPh sb="0" eb="1"><t>ミギ</t></rPh><r><t xml:space="preserve"> 500</t></r><phoneticPr fontId="1"/></si><si><t xml:space="preserve"> NR </t></si><si/>`
			if c.want == "" {
				c.want = "-"
			}
			require.Equal(t, []string{"1: " + c.want + " n:7"}, read(t, b))
		})
	}
}

func TestFaultyCells(t *testing.T) {
	for name, c := range map[string]struct{ cells, want string }{
		"beyond the last column":       {`<c r="XFE1"><v>1</v></c>`, `1 a cell has the place "XFE1", which is not in its row`},
		"behind the last column":       {`<c r="XFD1"><v>1</v></c><c><v>1</v></c>`, "16384 a cell stands behind the last column that a sheet can have"},
		"of another row":               {`<c r="B2"><v>1</v></c>`, `1 a cell has the place "B2", which is not in its row`},
		"of row 0":                     {`<c r="B0"><v>1</v></c>`, `1 a cell has the place "B0", which is not in its row`},
		"without row":                  {`<c r="B"><v>1</v></c>`, `1 a cell has the place "B", which is not in its row`},
		"without column":               {`<c r="1"><v>1</v></c>`, `1 a cell has the place "1", which is not in its row`},
		"a range":                      {`<c r="B1:B2"><v>1</v></c>`, `1 a cell has the place "B1:B2", which is not in its row`},
		"twice":                        {`<c r="A1"><v>1</v></c><c r="A1"><v>2</v></c>`, "1 the row has two cells for the column A"},
		"a shared text that is not":    {`<c r="C1" t="s"><v>5</v></c>`, `3 a cell has the text number "5", which the workbook does not have`},
		"a shared text below 0":        {`<c r="C1" t="s"><v>-1</v></c>`, `3 a cell has the text number "-1", which the workbook does not have`},
		"a style that is not":          {`<c r="C1" s="5"><v>5</v></c>`, `3 a cell has the style 5, which the workbook does not have`},
		"an unknown type":              {`<c r="C1" t="q"><v>5</v></c>`, `3 a cell has the type "q", which no workbook has`},
		"neither true nor false":       {`<c r="C1" t="b"><v>2</v></c>`, `3 a cell is neither true nor false, as its type says, but "2"`},
		"a NUL byte":                   {`<c r="C1" t="str"><v>a_x0000_</v></c>`, `3 the cell holds a NUL byte`},
		"an array of several cells":    {`<c r="C1"><f t="array" ref="C1:C9">A1:A9</f></c>`, "3 a formula fills several cells, but their values were never stored"},
		"the first fault is told only": {`<c r="C1" t="b"><v>2</v></c><c r="D1" s="9"><v>1</v></c>`, `3 a cell is neither true nor false, as its type says, but "2"`},
	} {
		t.Run(name, func(t *testing.T) {
			got := read(t, with(`<row r="1">`+c.cells+`</row><row r="2"><c r="A2"><v>1</v></c></row>`))
			require.Equal(t, []string{"1: fault " + c.want, "2: n:1"}, got, "the rows behind are read")
		})
	}
}

func TestColumnsOfCells(t *testing.T) {
	require.Equal(t, []string{"1: n:1 - n:3"}, read(t, with(`<row><c><v>1</v></c><c s="0"/><c><v>3</v></c><c/></row>`)), "without places")
	require.Equal(t, []string{"1: n:1 n:2 n:3"}, read(t, with(`<row r="1"><c r="C1"><v>3</v></c><c r="A1"><v>1</v></c><c><v>2</v></c></row>`)), "out of order")
	require.Equal(t, []string{"1: - n:2"}, read(t, with(`<row r="1"><c r="A1"/><c r="A1"/><c r="B1"><v>2</v></c></row>`)), "blank cells may stand twice")
	wide := read(t, with(`<row r="1"><c r="XFD1"><v>1</v></c></row>`))
	require.Equal(t, 16384, len(strings.Fields(wide[0]))-1)
	require.Equal(t, "XFD", columnName(maxSheetColumns))
	require.Equal(t, "AA", columnName(27))
}

func TestReplacedInWorkbook(t *testing.T) {
	b := with(`<row r="3"><c t="s"><v>0</v></c><c t="str"><v>` + "\xe4" + `</v></c></row>`)
	b.texts = "<si><t>M\xfcller \ufffd</t></si>"
	out, about, fault := readBookRows(t, b.bytes(), Options{})
	require.Nil(t, fault)
	require.Equal(t, []string{"1:", "2:", "3: t:M\ufffdller \ufffd t:\ufffd"}, out)
	require.Equal(t, 2, about.Replaced)
	require.Equal(t, 3, about.FirstReplace)
}

// What is to be computed when the workbook is opened was never computed by the program that wrote it; some
// write 0 as value of every formula.
func TestStaleFormulas(t *testing.T) {
	b := with(`<row r="1"><c r="A1"><f>B1</f><v>0</v></c><c r="B1"><v>5</v></c></row>`)
	require.Equal(t, []string{"1: n:0 n:5"}, read(t, b))
	b.calculate = `fullCalcOnLoad="1"`
	require.Equal(t, []string{"1: u: n:5"}, read(t, b))
}

func TestLongTexts(t *testing.T) {
	long := strings.Repeat("a", maxCellText)
	for name, sheet := range map[string]string{
		"text":   `<row r="1"><c r="A1"><v>1</v></c></row><row r="2"><c t="str"><v>` + long + `b</v></c></row>`,
		"pieces": `<row r="1"><c r="A1"><v>1</v></c></row><row r="2"><c t="str"><v>` + long[:maxCellText/2] + `<!-- -->` + long[:maxCellText/2] + `b</v></c></row>`,
		"runs":   `<row r="1"><c r="A1"><v>1</v></c></row><row r="2"><c t="inlineStr"><is><r><t>` + long[:maxCellText/2] + `</t></r><r><t>` + long[:maxCellText/2] + `b</t></r></is></c></row>`,
		"tag":    `<row r="1"><c r="A1"><v>1</v></c></row><row r="2" x:a="` + long + `"/>`,
	} {
		t.Run(name, func(t *testing.T) {
			book := with(sheet).bytes()
			large := small
			large.sheet = 1 << 24
			out, _, fault := readWithin(t, book, Options{}, large)
			require.Equal(t, []string{"1: n:1"}, out, "rows before are read")
			require.Contains(t, fault.Problem, "longer than 1024 KiB")
			require.Contains(t, fault.Problem, "cannot be read beyond row")
		})
	}
}
