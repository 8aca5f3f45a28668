package grid

import (
	"archive/zip"
	"bytes"
	"errors"
	"fmt"
	"io"
	"strings"

	"github.com/stretchr/testify/require"
)

const transitional = "http://schemas.openxmlformats.org/spreadsheetml/2006/main"

// xmlBook is a workbook written as XML, for what no library writes. The sheets are called Sheet1, Sheet2 and so on.
type xmlBook struct {
	sheets    []string // what is in each worksheet; sheetData is put around what begins with a row
	states    []string // of the sheets; empty for visible
	formats   []string // number formats; those of digits are built in; style n is the nth, style 0 is General
	texts     string   // what is in the shared texts; empty for no such part
	prefix    string   // of the elements of sheets, such as "x:"
	workbook  string   // more in the workbook, before the sheets
	calculate string   // attributes of calcPr
	parts     map[string]string
	leaveOut  string
}

func (b xmlBook) bytes() []byte {
	const office = "http://schemas.openxmlformats.org/officeDocument/2006/relationships/"
	const packed = `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">`
	files := [][2]string{{"[Content_Types].xml", `<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"/>`}}
	add := func(name, xml string) { files = append(files, [2]string{name, xml}) }
	add("_rels/.rels", packed+`<Relationship Id="a" Type="`+office+`officeDocument" Target="xl/workbook.xml"/></Relationships>`)

	rels := packed + `<Relationship Id="st" Type="` + office + `styles" Target="styles.xml"/>`
	if b.texts != "" {
		rels += `<Relationship Id="ss" Type="` + office + `sharedStrings" Target="/xl/sharedStrings.xml"/>`
		add("xl/sharedStrings.xml", `<sst xmlns="`+transitional+`">`+b.texts+`</sst>`)
	}
	list := ""
	for i, s := range b.sheets {
		state := ""
		if i < len(b.states) && b.states[i] != "" {
			state = ` state="` + b.states[i] + `"`
		}
		list += fmt.Sprintf(`<sheet name="Sheet%d" sheetId="%d"%s r:id="r%d"/>`, i+1, i+1, state, i+1)
		rels += fmt.Sprintf(`<Relationship Id="r%d" Type="%sworksheet" Target="worksheets/sheet%d.xml"/>`, i+1, office, i+1)
		if strings.HasPrefix(s, "<row") || s == "" {
			s = "<sheetData>" + s + "</sheetData>"
		}
		if b.prefix != "" {
			s = strings.NewReplacer("</", "</"+b.prefix, "<", "<"+b.prefix).Replace(s)
		}
		add(fmt.Sprintf("xl/worksheets/sheet%d.xml", i+1), fmt.Sprintf(`<?xml version="1.0" encoding="UTF-8"?><%sworksheet xmlns="%s" xmlns:x="%[2]s">%s</%[1]sworksheet>`, b.prefix, transitional, s))
	}
	add("xl/_rels/workbook.xml.rels", rels+`</Relationships>`)
	add("xl/workbook.xml", `<workbook xmlns="`+transitional+`" xmlns:r="http://schemas.openxmlformats.org/officeDocument/2006/relationships">`+b.workbook+`<sheets>`+list+`</sheets><calcPr `+b.calculate+`/></workbook>`)
	add("xl/styles.xml", b.styles())

	var out bytes.Buffer
	z := zip.NewWriter(&out)
	for _, f := range files {
		if xml, ok := b.parts[f[0]]; ok {
			f[1] = xml
		}
		if f[0] != b.leaveOut {
			w, _ := z.Create(f[0])
			_, _ = io.WriteString(w, f[1])
		}
	}
	_ = z.Close()
	return out.Bytes()
}

func (b xmlBook) styles() string {
	own, cells := "", `<xf numFmtId="0"/>`
	for i, f := range b.formats {
		id := 164 + i
		if strings.Trim(f, "123456789") == "" || f == "30" || f == "50" || f == "20" {
			_, _ = fmt.Sscan(f, &id)
		} else {
			own += fmt.Sprintf(`<numFmt numFmtId="%d" formatCode="%s"/>`, id, strings.NewReplacer(`"`, "&quot;", "&", "&amp;", "<", "&lt;").Replace(f))
		}
		cells += fmt.Sprintf(`<xf numFmtId="%d" applyNumberFormat="1"/>`, id)
	}
	return `<styleSheet xmlns="` + transitional + `"><numFmts>` + own + `</numFmts><cellStyleXfs><xf numFmtId="14"/></cellStyleXfs><cellXfs>` + cells +
		`</cellXfs><dxfs><dxf><numFmt numFmtId="0" formatCode="dd/mm/yyyy"/></dxf></dxfs></styleSheet>`
}

// with is a book of one sheet with these rows.
func with(rows string) xmlBook { return xmlBook{sheets: []string{rows}} }

var small = limits{sheet: 1 << 20, texts: 1 << 20, other: 1 << 16}

// readBookRows reads all rows: the number of the row, and each cell with the first letter of its kind before it.
func readBookRows(t require.TestingT, book []byte, o Options) ([]string, About, *Fault) {
	return readWithin(t, book, o, small)
}

func readWithin(t require.TestingT, book []byte, o Options, l limits) ([]string, About, *Fault) {
	rows, err := newWorkbook(bytes.NewReader(book), int64(len(book)), o, l)
	if err != nil {
		return nil, About{}, problem(t, err)
	}
	defer func() { require.NoError(t, rows.Close()) }()
	var out []string
	var r Row
	for {
		err := rows.Next(&r)
		if err != nil {
			require.Equal(t, err, rows.Next(&r), "the end stays the end")
			if err == io.EOF {
				return out, rows.About(), nil
			}
			var f *Fault
			require.True(t, errors.As(err, &f), "%v", err)
			return out, rows.About(), problem(t, f)
		}
		require.Equal(t, r.Line, r.Last)
		out = append(out, describeRow(&r))
	}
}

func describeRow(r *Row) string {
	line := fmt.Sprint(r.Line)
	if r.Hidden {
		line += " hidden"
	}
	if r.Fault != nil {
		return fmt.Sprintf("%s: fault %d %s", line, r.Fault.Column, r.Fault.Problem)
	}
	line += ":"
	for _, c := range r.Cells {
		if c == (Cell{}) {
			line += " -"
		} else {
			line += fmt.Sprintf(" %c:%s", "tndcbeu"[c.Kind], c.Text)
		}
	}
	return line
}

// read reads a sound book of one visible sheet.
func read(t require.TestingT, b xmlBook) []string {
	out, _, fault := readBookRows(t, b.bytes(), Options{})
	require.Nil(t, fault)
	return out
}
