package grid

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"golang.org/x/text/encoding"
	"golang.org/x/text/encoding/charmap"
	"golang.org/x/text/encoding/japanese"
	"golang.org/x/text/encoding/simplifiedchinese"
	"golang.org/x/text/encoding/unicode"
)

// in writes a text in an encoding.
func in(t testing.TB, e encoding.Encoding, text string) string {
	t.Helper()
	out, err := e.NewEncoder().String(text)
	require.NoError(t, err)
	return out
}

func utf16(order unicode.Endianness, mark unicode.BOMPolicy) encoding.Encoding {
	return unicode.UTF16(order, mark)
}

func TestEncoding(t *testing.T) {
	const german = "Prüfer,Größe\nä,1\n"
	const japanese1 = "番号,右500\nァ1,20\n"
	for _, c := range []struct {
		name, text, stated, encoding, want string
	}{
		{"ASCII", "a,b\n", "", "utf-8", "a|b"},
		{"UTF-8", german, "", "utf-8", "Prüfer|Größe"},
		{"UTF-8 marked", "\xef\xbb\xbf" + german, "", "utf-8", "Prüfer|Größe"},
		{"UTF-8 marked, another stated", "\xef\xbb\xbf" + german, "windows-1252", "utf-8", "Prüfer|Größe"},
		{"UTF-8 throughout, a page of single bytes stated", german, "windows-1252", "utf-8", "Prüfer|Größe"},
		{"UTF-16LE marked", in(t, utf16(unicode.LittleEndian, unicode.UseBOM), german), "", "utf-16le", "Prüfer|Größe"},
		{"UTF-16BE marked", in(t, utf16(unicode.BigEndian, unicode.UseBOM), german), "cp850", "utf-16be", "Prüfer|Größe"},
		{"UTF-16LE", in(t, utf16(unicode.LittleEndian, unicode.IgnoreBOM), german), "", "utf-16le", "Prüfer|Größe"},
		{"UTF-16BE", in(t, utf16(unicode.BigEndian, unicode.IgnoreBOM), german), "", "utf-16be", "Prüfer|Größe"},
		{"UTF-16LE, little ASCII", in(t, utf16(unicode.LittleEndian, unicode.IgnoreBOM), japanese1), "", "utf-16le", "番号|右500"},
		{"Windows", in(t, charmap.Windows1252, german), "windows-1252", "windows-1252", "Prüfer|Größe"},
		{"Windows by another name", in(t, charmap.Windows1252, german), "CP1252", "windows-1252", "Prüfer|Größe"},
		{"DOS", in(t, charmap.CodePage850, german), "cp850", "cp850", "Prüfer|Größe"},
		{"DOS by another name", in(t, charmap.CodePage850, german), "IBM850", "cp850", "Prüfer|Größe"},
		{"Mac", in(t, charmap.Macintosh, german), "macintosh", "macintosh", "Prüfer|Größe"},
		{"Latin 2", in(t, charmap.ISO8859_2, "Łódź,a\n"), "iso-8859-2", "iso-8859-2", "Łódź|a"},
		{"Cyrillic DOS", in(t, charmap.CodePage866, "номер,a\n"), "cp866", "cp866", "номер|a"},
		{"Shift JIS", in(t, japanese.ShiftJIS, japanese1), "shift_jis", "shift_jis", "番号|右500"},
		{"Shift JIS that is UTF-8 by chance", "\xc2\xb1,a\n", "shift_jis", "shift_jis", "ﾂｱ|a"},
		{"GB 18030", in(t, simplifiedchinese.GB18030, "编号,a\n"), "gb18030", "gb18030", "编号|a"},
	} {
		t.Run(c.name, func(t *testing.T) {
			rows, about := table(t, open(t, "x.csv", c.text), Options{Encoding: c.stated})
			require.Equal(t, c.want, rows[0])
			require.Equal(t, c.encoding, about.Encoding)
			require.Zero(t, about.Replaced)
		})
	}
}

func TestEncodingRefused(t *testing.T) {
	head := strings.Repeat("a,b\n", 20_000) // more than the first look takes
	for _, c := range []struct {
		name, text, stated string
		line               int
		problem, remedy    string
	}{
		{"nothing stated", head + "Pr\xfcfer,1\n", "", 20_001, "the line holds a byte that is not UTF-8 text", "windows-1252"},
		{"nothing stated, first line", "\xfc\n", "", 1, "the line holds a byte that is not UTF-8 text", "cp850"},
		{"cut off at the end", "a\nb\xc3", "", 2, "the line holds a byte that is not UTF-8 text", "windows-1252"},
		{"mixed", "a\nü\nb\n\xfc\n", "", 4, "the line holds a byte that is not UTF-8 text, though line 2 holds UTF-8", "Export the file again in one encoding"},
		{"mixed and marked", "\xef\xbb\xbfa\nü\n\xfc\n", "windows-1252", 3, "the file is marked as UTF-8, but the line holds a byte that is not UTF-8 text", "put together"},
		{"UTF-8 stated", "a\n\xfc\n", "utf8", 2, "encoding: utf-8 is stated", "windows-1252"},
		{"unknown name", "a\n", "windows-1522", 0, `"windows-1522" is no encoding that is known`, "Write windows-1252 if that is meant"},
		{"no name at all", "a\n", "x-user-defined", 0, `"x-user-defined" is no encoding`, "code page"},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := open(t, "x.csv", c.text).Rows(Options{Encoding: c.stated})
			f := problem(t, err)
			require.Equal(t, c.line, f.Line)
			require.Contains(t, f.Problem, c.problem)
			require.Contains(t, f.Remedy, c.remedy)
		})
	}
}

func TestReplaced(t *testing.T) {
	text := "a,b\r\n1,2\r\nx\x81y,\x8d\r\n" + strings.Repeat("1,2\r\n", 10_000) + "\x9d,1\r\n"
	rows, about := table(t, open(t, "x.csv", text), Options{Encoding: "windows-1252"})
	require.Equal(t, "x\uFFFDy|\uFFFD", rows[2])
	require.Equal(t, 3, about.Replaced)
	require.Equal(t, 3, about.FirstReplace)

	_, about = table(t, open(t, "x.csv", "\xff\xfea\x00\n\x00\x00\xd8b\x00\n\x00c"), Options{})
	require.Equal(t, 2, about.Replaced, "half a pair, and half a unit at the end")
	require.Equal(t, 2, about.FirstReplace)
}

func TestCheckEncoding(t *testing.T) {
	for _, name := range append([]string{"", "latin1", "UTF8", "ibm437", "oem850", "cp1250", "x-sjis"}, usualPages...) {
		require.Nil(t, CheckEncoding(name), name)
	}
	for _, name := range []string{"dos", "x-user-defined", "replacement", "hz-gb-2312"} {
		require.NotNil(t, CheckEncoding(name), name)
	}
}

// TestMixedEncodings tells of UTF-8 in a file that is read in a page of single bytes.
func TestMixedEncodings(t *testing.T) {
	for _, c := range []struct {
		text, stated string
		line         int
	}{
		{"a,b\nPrüfer,1\nPr\xfcfer,2\n", "windows-1252", 2},
		{"a,b\nPr\xfcfer,1\n", "windows-1252", 0},
		{"\xc2\xb1,a\n\x81\xfc,1\n", "shift_jis", 0},
	} {
		_, about := table(t, open(t, "x.csv", c.text), Options{Encoding: c.stated})
		require.Equal(t, c.line, about.UTF8, c.text)
	}
}
