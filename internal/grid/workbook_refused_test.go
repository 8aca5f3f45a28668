package grid

import (
	"archive/zip"
	"bytes"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

const anyRow = `<row r="1"><c r="A1" t="s"><v>0</v></c></row>`

func TestRefusedBooks(t *testing.T) {
	sound := with(anyRow)
	sound.texts = "<si><t>a</t></si>"
	change := func(do func(*xmlBook)) []byte {
		b := sound
		do(&b)
		return b.bytes()
	}
	without := func(part string) []byte { return change(func(b *xmlBook) { b.leaveOut = part }) }
	replace := func(part, xml string) []byte {
		return change(func(b *xmlBook) { b.parts = map[string]string{part: xml} })
	}
	whole := sound.bytes()
	for name, c := range map[string]struct {
		book []byte
		want string
	}{
		"nothing":               {nil, "the workbook is damaged or incomplete: it is no whole ZIP archive"},
		"cut off":               {whole[:len(whole)-40], "the workbook is damaged or incomplete: it is no whole ZIP archive"},
		"no parts":              {pack("a.csv", "a"), "the file is a ZIP archive, but no workbook"},
		"a binary book":         {pack("[Content_Types].xml", "<Types/>", "xl/workbook.bin", "x"), "the file is a binary workbook (.xlsb), which is not read"},
		"no relations":          {without("_rels/.rels"), `the workbook has no part "_rels/.rels", which it needs`},
		"another document":      {replace("_rels/.rels", `<Relationships><Relationship Type="x/officeDocument" Target="word/document.xml"/></Relationships>`), `the workbook has no part "word/_rels/document.xml.rels", which it needs`},
		"no document":           {replace("_rels/.rels", `<Relationships/>`), "the file is no workbook, whatever its name says"},
		"a text document":       {replace("xl/workbook.xml", `<document/>`), "the file is no workbook, whatever its name says"},
		"no workbook part":      {without("xl/workbook.xml"), `the workbook has no part "xl/workbook.xml", which it needs`},
		"no list of sheets":     {without("xl/_rels/workbook.xml.rels"), `the workbook has no part "xl/_rels/workbook.xml.rels", which it needs`},
		"no sheets":             {replace("xl/workbook.xml", `<workbook/>`), "the workbook has no sheet with cells"},
		"no sheet part":         {without("xl/worksheets/sheet1.xml"), `the workbook has no part "xl/worksheets/sheet1.xml", which it needs`},
		"no shared texts":       {without("xl/sharedStrings.xml"), `the workbook has no part "xl/sharedStrings.xml", which it needs`},
		"no styles":             {without("xl/styles.xml"), `the workbook has no part "xl/styles.xml", which it needs`},
		"a chart":               {replace("xl/worksheets/sheet1.xml", `<chartsheet/>`), `the sheet has no table: it is a "chartsheet"`},
		"an empty part":         {replace("xl/styles.xml", ``), `the part "xl/styles.xml" of the workbook cannot be read: it breaks off in the middle`},
		"a cut part":            {replace("xl/sharedStrings.xml", `<sst><si><t>a`), `the part "xl/sharedStrings.xml" of the workbook cannot be read: it breaks off in the middle`},
		"a part in a code page": {replace("xl/workbook.xml", `<?xml version="1.0" encoding="ISO-8859-1"?><workbook/>`), `the part "xl/workbook.xml" of the workbook cannot be read: it is written in the encoding "iso-8859-1", which no workbook may have`},
		"entities": {replace("xl/sharedStrings.xml", `<!DOCTYPE sst [<!ENTITY a "aaaa"><!ENTITY b "&a;&a;">]><sst><si><t>&b;</t></si></sst>`),
			`the part "xl/sharedStrings.xml" of the workbook cannot be read: it has a document type or the like, which no workbook may have`},
		"two roots":            {replace("xl/styles.xml", `<a/><b/>`), `the part "xl/styles.xml" of the workbook cannot be read: it has a second root element`},
		"styles too big":       {replace("xl/styles.xml", `<a>`+strings.Repeat(" <b/>", 1<<14)+`</a>`), `the part "xl/styles.xml" of the workbook cannot be read: it is longer than 64 KiB once unpacked`},
		"texts too big":        {replace("xl/sharedStrings.xml", `<a>`+strings.Repeat(" <b/>", 1<<18)+`</a>`), `the part "xl/sharedStrings.xml" of the workbook cannot be read: it is longer than 1 MiB once unpacked`},
		"a sheet without part": {replace("xl/workbook.xml", `<workbook xmlns:r="r"><sheets><sheet name="A" r:id="r9"/></sheets></workbook>`), `the workbook has no part "r9", which it needs`},
		"a part twice":         {pack("[Content_Types].xml", "<Types/>", "XL\\a.xml", "x", "xl/A.xml", "y"), `the workbook has two parts with the name "xl/A.xml"`},
	} {
		t.Run(name, func(t *testing.T) {
			_, _, fault := readBookRows(t, c.book, Options{})
			require.NotNil(t, fault)
			require.Equal(t, c.want, fault.Problem)
		})
	}
	out, _, fault := readBookRows(t, whole, Options{})
	require.Nil(t, fault)
	require.Equal(t, []string{"1: t:a"}, out)
}

func TestEncryptedPart(t *testing.T) {
	book := pack("[Content_Types].xml", "<Types/>")
	book[bytes.Index(book, []byte("PK\x01\x02"))+8] |= 1
	_, _, fault := readBookRows(t, book, Options{})
	require.Equal(t, "the workbook is encrypted", fault.Problem)
}

// What the archive says of a part is looked at.
func TestDamagedArchive(t *testing.T) {
	whole := rezip(t, with(`<row r="1"><c r="A1"><v>12345</v></c></row>`).bytes(), func(name, xml string) (string, string) { return name, xml })
	for name, c := range map[string]struct {
		change  func(h *zip.FileHeader, packed []byte) []byte
		rows    []string
		problem string
	}{
		"checksum": {func(h *zip.FileHeader, packed []byte) []byte { h.CRC32++; return packed }, []string{"1: n:12345"}, `the part "xl/worksheets/sheet1.xml" of the workbook cannot be read: its checksum is wrong`},
		"method":   {func(h *zip.FileHeader, packed []byte) []byte { h.Method = 99; return packed }, nil, `the part "xl/worksheets/sheet1.xml" of the workbook cannot be read: it is packed in a way that no workbook may use`},
		"bytes":    {func(h *zip.FileHeader, packed []byte) []byte { packed[0] |= 6; return packed }, nil, "the sheet cannot be read: what is packed is damaged"},
		"length": {func(h *zip.FileHeader, packed []byte) []byte {
			h.CompressedSize64 = uint64(len(packed) / 2)
			return packed[:len(packed)/2]
		}, nil, "the sheet cannot be read: it breaks off in the middle"},
	} {
		t.Run(name, func(t *testing.T) {
			in, err := zip.NewReader(bytes.NewReader(whole), int64(len(whole)))
			require.NoError(t, err)
			var out bytes.Buffer
			z := zip.NewWriter(&out)
			for _, f := range in.File {
				r, err := f.OpenRaw()
				require.NoError(t, err)
				packed, err := io.ReadAll(r)
				require.NoError(t, err)
				h := f.FileHeader
				if strings.HasPrefix(f.Name, "xl/worksheets/") {
					packed = c.change(&h, packed)
				}
				w, err := z.CreateRaw(&h)
				require.NoError(t, err)
				_, err = w.Write(packed)
				require.NoError(t, err)
			}
			require.NoError(t, z.Close())
			rows, _, fault := readBookRows(t, out.Bytes(), Options{})
			require.NotNil(t, fault)
			require.Equal(t, c.rows, rows)
			require.Equal(t, c.problem, fault.Problem)
		})
	}
}

// A small file that unpacks to much is given up at its limit.
func TestBomb(t *testing.T) {
	b := with(`<row r="1"><c r="A1"><v>1</v></c></row>` + strings.Repeat(" <row/>", 1<<22))
	book := b.bytes()
	require.Less(t, len(book), 1<<17)
	out, _, fault := readWithin(t, book, Options{}, limits{sheet: 1 << 22, texts: 1 << 20, other: 1 << 16})
	require.Equal(t, []string{"1: n:1"}, out)
	require.Contains(t, fault.Problem, "it is longer than 4 MiB once unpacked")
}

func pack(pairs ...string) []byte {
	var out bytes.Buffer
	z := zip.NewWriter(&out)
	for i := 0; i < len(pairs); i += 2 {
		w, _ := z.Create(pairs[i])
		_, _ = io.WriteString(w, pairs[i+1])
	}
	_ = z.Close()
	return out.Bytes()
}
