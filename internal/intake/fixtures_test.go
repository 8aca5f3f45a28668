package intake

import (
	"archive/zip"
	"bytes"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
	"golang.org/x/text/encoding"
	"golang.org/x/text/encoding/charmap"
	"golang.org/x/text/encoding/japanese"
	"golang.org/x/text/encoding/unicode"
)

// TestFixtures holds the files under testdata/intake that no editor writes, workbooks and texts in other encodings,
// to the code that made them. With -update it writes those that differ; run it before TestCases.
func TestFixtures(t *testing.T) {
	for path, content := range fixtures(t) {
		path = filepath.Join(sample, filepath.FromSlash(path))
		known, err := os.ReadFile(path)
		if *update && (err != nil || !bytes.Equal(parts(t, content), parts(t, known))) {
			require.NoError(t, os.WriteFile(path, content, 0o600))
			known = content
		}
		require.Equal(t, string(parts(t, content)), string(parts(t, known)), "%s: run the test with -update once", path)
	}
}

// parts gives what is packed in a book, since packing may differ between versions of the library, or else the content.
func parts(t *testing.T, content []byte) []byte {
	z, err := zip.NewReader(bytes.NewReader(content), int64(len(content)))
	if err != nil {
		return content
	}
	var b bytes.Buffer
	for _, f := range z.File {
		b.WriteString("\n-- " + f.Name + " --\n")
		r, err := f.Open()
		require.NoError(t, err)
		_, err = io.Copy(&b, r)
		require.NoError(t, err)
	}
	return b.Bytes()
}

func fixtures(t *testing.T) map[string][]byte {
	all := map[string][]byte{}
	for _, some := range []map[string][]byte{texts(t), books(t)} {
		for path, content := range some {
			all[path] = content
		}
	}
	return all
}

// encoded gives a text in an encoding.
func encoded(t *testing.T, e encoding.Encoding, text string) []byte {
	t.Helper()
	out, err := e.NewEncoder().Bytes([]byte(text))
	require.NoError(t, err)
	return out
}

func texts(t *testing.T) map[string][]byte {
	western := func(id, month string) string {
		return "Emp;Date;Course\r\n" + id + ";" + month + "-01;Gehörschutz\r\n" + id + ";" + month + "-02;Lärm für Anfänger\r\n"
	}
	const eastern = "社員番号,受講日,講習\n000125,2024-02-01,聴力検査\n"
	out := map[string][]byte{}
	for name, content := range map[string][]byte{
		"utf-8.csv":        []byte(western("000123", "2024-01")),
		"utf-8-bom.csv":    []byte("\ufeff" + western("000123", "2024-02")),
		"utf-16le-bom.csv": encoded(t, unicode.UTF16(unicode.LittleEndian, unicode.UseBOM), western("000123", "2024-03")),
		"utf-16le.csv":     encoded(t, unicode.UTF16(unicode.LittleEndian, unicode.IgnoreBOM), western("000123", "2024-04")),
		"utf-16be-bom.csv": encoded(t, unicode.UTF16(unicode.BigEndian, unicode.UseBOM), western("000123", "2024-05")),
		"cp1252.csv":       encoded(t, charmap.Windows1252, western("000124", "2024-06")),
		"cp850.csv":        encoded(t, charmap.CodePage850, western("000124", "2024-07")),
		"shift-jis.csv":    encoded(t, japanese.ShiftJIS, eastern),
	} {
		out["21_encodings/"+name] = content
	}
	out["21_encoding_unstated/cp1252.csv"] = encoded(t, charmap.Windows1252, western("000124", "2024-08"))
	out["21_encoding_unstated/shift-jis.csv"] = encoded(t, japanese.ShiftJIS, eastern)
	first, second, _ := strings.Cut(western("000123", "2024-09"), "\r\n000123;2024-09-02")
	mixed := append([]byte(first+"\r\n000123;2024-09-02"), encoded(t, charmap.Windows1252, second)...)
	out["21_encoding_mixed/mixed.csv"], out["21_encoding_mixed/mixed-stated.csv"] = mixed, mixed
	out["21_encoding_mixed/unknown-byte.csv"] = []byte("Emp;Date;Course\n000124;2024-02-01;L\x81rm\n") // 81 is nothing in windows-1252

	rows := func(month string) string { return "Emp,Date\n000123," + month + "-01\n000124," + month + "-02\n" }
	out["22_line_ends/cr.csv"] = []byte(strings.ReplaceAll(rows("2024-01"), "\n", "\r"))
	out["22_line_ends/crlf.csv"] = []byte(strings.ReplaceAll(rows("2024-02"), "\n", "\r\n"))
	out["22_line_ends/mixed.csv"] = []byte("Emp,Date\r\n000123,2024-03-01\n000124,2024-03-02\r000125,2024-03-03\n000125,2024-03-04\r\n")
	out["22_line_ends/no-last.csv"] = []byte(strings.TrimSuffix(rows("2024-04"), "\n"))
	out["22_line_ends/end-mark.csv"] = []byte(rows("2024-05") + "\x1a")
	out["22_nul_bytes/nul.csv"] = []byte("Emp,Date\n000123,2024-02-01\n000\x00124,2024-02-02\n000125,2024-02-03\n")

	const ole = "\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1" // from memory: how an OLE file begins
	stub := []byte(ole + strings.Repeat("\x00", 504))
	out["24_old_xls/roster.xls"], out["24_book_in_disguise/old.xlsx"] = stub, stub
	out["24_book_in_disguise/password.xlsx"] = append(bytes.Clone(stub), encoded(t, unicode.UTF16(unicode.LittleEndian, unicode.IgnoreBOM), "EncryptedPackage")...)
	out["25_lock_file/~$sessions.xlsx"] = []byte("\x06EDITOR" + strings.Repeat(" ", 158))
	return out
}

// cellTable is a table of cells, from A1 on.
type cellTable [][]any

// errorValue is an error that a formula gave.
type errorValue string

// formulaOnly is a formula without a stored value.
type formulaOnly string

// styled is a number with a number format: that of a built-in number, or of its own.
type styled struct {
	value  float64
	number int
	format string
}

func book(t *testing.T, rows cellTable, change func(*excelize.File)) []byte {
	t.Helper()
	x := excelize.NewFile()
	put(t, x, "Sheet1", rows)
	if change != nil {
		change(x)
	}
	var b bytes.Buffer
	require.NoError(t, x.Write(&b))
	require.NoError(t, x.Close())
	return b.Bytes()
}

func put(t *testing.T, x *excelize.File, name string, rows cellTable) {
	t.Helper()
	for i, row := range rows {
		for j, v := range row {
			at, err := excelize.CoordinatesToCellName(j+1, i+1)
			require.NoError(t, err)
			switch v := v.(type) {
			case formulaOnly:
				require.NoError(t, x.SetCellFormula(name, at, string(v)))
			case styled:
				style := &excelize.Style{NumFmt: v.number}
				if v.format != "" {
					style.CustomNumFmt = &v.format
				}
				id, err := x.NewStyle(style)
				require.NoError(t, err)
				require.NoError(t, x.SetCellValue(name, at, v.value))
				require.NoError(t, x.SetCellStyle(name, at, at, id))
			case errorValue:
				require.NoError(t, x.SetCellStr(name, at, string(v))) // spoil makes an error of it
			case nil:
			default:
				require.NoError(t, x.SetCellValue(name, at, v))
			}
		}
	}
}
