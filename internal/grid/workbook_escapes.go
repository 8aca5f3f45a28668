package grid

import (
	"bytes"
	"errors"
	"fmt"
	"strconv"
	"strings"
	u16 "unicode/utf16"
	"unicode/utf8"
)

// resolve makes line ends plain and resolves the references in a text.
func (m *markup) resolve(raw []byte) ([]byte, error) {
	if bytes.IndexByte(raw, '&') < 0 && bytes.IndexByte(raw, '\r') < 0 {
		return raw, nil
	}
	m.plain = m.plain[:0]
	for i := 0; i < len(raw); i++ {
		switch c := raw[i]; c {
		case '\r':
			m.plain = append(m.plain, '\n')
			if i+1 < len(raw) && raw[i+1] == '\n' {
				i++
			}
		case '&':
			n := bytes.IndexByte(raw[i:min(len(raw), i+12)], ';')
			if n < 0 {
				return nil, errors.New("it has an & that begins no reference")
			}
			r, ok := reference(string(raw[i+1 : i+n]))
			if !ok {
				return nil, fmt.Errorf("it has the reference %q, which XML does not have", raw[i:i+n+1])
			}
			m.plain = utf8.AppendRune(m.plain, r)
			i += n
		default:
			m.plain = append(m.plain, c)
		}
	}
	return m.plain, nil
}

// reference gives the character that the name between & and ; means.
func reference(name string) (rune, bool) {
	switch name {
	case "amp":
		return '&', true
	case "lt":
		return '<', true
	case "gt":
		return '>', true
	case "quot":
		return '"', true
	case "apos":
		return '\'', true
	}
	if len(name) < 2 || name[0] != '#' {
		return 0, false
	}
	digits, base := name[1:], 10
	if digits[0] == 'x' {
		digits, base = digits[1:], 16
	}
	n, err := strconv.ParseUint(digits, base, 32)
	r := rune(n)
	if err != nil || n > utf8.MaxRune || !utf8.ValidRune(r) || r < ' ' && r != '\t' && r != '\n' && r != '\r' {
		return 0, false
	}
	return r, true
}

// unescape resolves _xHHHH_, in which workbooks write characters that XML cannot hold. It works in place.
func unescape(b []byte) []byte {
	const long = len("_x000D_")
	if !bytes.Contains(b, []byte("_x")) {
		return b
	}
	out := b[:0]
	for i := 0; i < len(b); i++ {
		r, ok := escaped(b[i:])
		if !ok {
			out = append(out, b[i])
			continue
		}
		i += long - 1
		if low, ok := escaped(b[i+1:]); ok && u16.IsSurrogate(r) {
			if pair := u16.DecodeRune(r, low); pair != utf8.RuneError {
				r = pair
				i += long
			}
		}
		out = utf8.AppendRune(out, r)
	}
	return out
}

func escaped(b []byte) (rune, bool) {
	if len(b) < 7 || b[0] != '_' || b[1] != 'x' || b[6] != '_' {
		return 0, false
	}
	n, err := strconv.ParseUint(string(b[2:6]), 16, 16)
	return rune(n), err == nil
}

// checkEncoding looks at an XML declaration.
func checkEncoding(raw []byte) error {
	s := strings.ToLower(string(raw))
	if !strings.HasPrefix(s, "<?xml ") {
		return nil
	}
	_, after, ok := strings.Cut(s, "encoding")
	if !ok {
		return nil
	}
	name := strings.Trim(after, " \t\r\n=?>\"'")
	name, _, _ = strings.Cut(strings.ReplaceAll(name, "'", `"`), `"`)
	switch name {
	case "utf-8", "utf8", "utf-16", "us-ascii":
		return nil
	}
	return fmt.Errorf("it is written in the encoding %.20q, which no workbook may have", name)
}
