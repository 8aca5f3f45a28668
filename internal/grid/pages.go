package grid

import (
	"strings"
	"unicode/utf8"

	"golang.org/x/text/encoding"
	"golang.org/x/text/encoding/charmap"
	"golang.org/x/text/encoding/htmlindex"
	"golang.org/x/text/encoding/unicode"
	"golang.org/x/text/transform"

	"hearduty/internal/diag"
)

const utf8Name = "utf-8"

// page is a code page. That of UTF-8 has no decoder.
type page struct {
	name    string
	decoder func() transform.Transformer
	single  bool // one byte is one character
}

// dosPages are pages that the list of the web does not have.
var dosPages = map[string]*charmap.Charmap{
	"cp437": charmap.CodePage437, "cp850": charmap.CodePage850, "cp852": charmap.CodePage852, "cp855": charmap.CodePage855,
	"cp858": charmap.CodePage858, "cp860": charmap.CodePage860, "cp862": charmap.CodePage862, "cp863": charmap.CodePage863,
	"cp865": charmap.CodePage865, "cp866": charmap.CodePage866,
}

// usualPages are named where a name is not known.
var usualPages = []string{
	utf8Name, "utf-16le", "utf-16be", "windows-1250", "windows-1251", "windows-1252", "windows-1253", "windows-1254", "windows-1257",
	"cp437", "cp850", "cp852", "cp858", "cp866", "iso-8859-1", "iso-8859-2", "iso-8859-15", "macintosh", "shift_jis", "euc-jp", "gb18030", "big5", "euc-kr",
}

// findPage finds a code page by its name. No name is UTF-8.
func findPage(name string) (page, error) {
	key := strings.ToLower(strings.TrimSpace(name))
	if key == "" {
		return page{name: utf8Name}, nil
	}
	for _, prefix := range []string{"ibm", "ibm-", "cp-", "dos-", "oem"} {
		if number, ok := strings.CutPrefix(key, prefix); ok && dosPages["cp"+number] != nil {
			key = "cp" + number
		}
	}
	if number, ok := strings.CutPrefix(key, "cp125"); ok {
		key = "windows-125" + number
	}
	if dos := dosPages[key]; dos != nil {
		return singlePage(key, dos), nil
	}
	found, err := htmlindex.Get(key)
	if err != nil || found == encoding.Replacement || found == charmap.XUserDefined {
		remedy := "Write the name of a code page, such as windows-1252 for an export from Windows or cp850 for one from DOS"
		if near := diag.Near(key, usualPages); near != "" {
			remedy = "Write " + near + " if that is meant, or the name of another code page"
		}
		return page{}, faultf(remedy, "%q is no encoding that is known", shorten(name))
	}
	if canonical, err := htmlindex.Name(found); err == nil {
		key = canonical
	}
	if found == unicode.UTF8 {
		return page{name: utf8Name}, nil
	}
	if c, ok := found.(*charmap.Charmap); ok {
		return singlePage(key, c), nil
	}
	return page{name: key, decoder: func() transform.Transformer { return found.NewDecoder() }}, nil
}

// singlePage makes a page of single bytes. Control characters from U+0080 on stand in no text: the standard
// of the web gives them to bytes that the page does not know.
func singlePage(name string, c *charmap.Charmap) page {
	var table [256]rune
	for b := range table {
		r := c.DecodeByte(byte(b))
		if r >= 0x80 && r < 0xa0 {
			r = utf8.RuneError
		}
		table[b] = r
	}
	return page{name: name, single: true, decoder: func() transform.Transformer { return &singleDecoder{table: &table} }}
}

// singleDecoder decodes a page of single bytes.
type singleDecoder struct {
	transform.NopResetter
	table *[256]rune
}

// Transform decodes as many bytes of src as fit into dst.
func (d *singleDecoder) Transform(dst, src []byte, atEOF bool) (nDst, nSrc int, err error) {
	for _, b := range src {
		if nDst+utf8.UTFMax > len(dst) {
			return nDst, nSrc, transform.ErrShortDst
		}
		nDst += utf8.EncodeRune(dst[nDst:], d.table[b])
		nSrc++
	}
	return nDst, nSrc, nil
}

// shorten bounds a text that a message repeats.
func shorten(s string) string {
	if r := []rune(s); len(r) > 40 {
		return string(r[:40]) + "…"
	}
	return s
}
