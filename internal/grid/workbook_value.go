package grid

import (
	"bytes"
	"math"
	"strconv"
	"strings"
	"unicode/utf8"
)

// value is what a cell says. Its text is shared, or stands in the texts of the row.
type value struct {
	kind     CellKind
	shared   string
	from, to int
}

func (v value) blank() bool {
	return v.shared == "" && v.from == v.to && (v.kind == Text || v.kind == Number)
}

// convert tells what a cell says, or why it cannot be read.
func (s *sheet) convert(c *cell) (value, *Fault) {
	raw := bytes.TrimSpace(s.value)
	if c.formula && (!c.stored || s.book.stale || len(raw) == 0 && c.kind != 't') {
		if c.fills {
			return value{}, faultf(saveAnew, "a formula fills several cells, but their values were never stored")
		}
		return value{kind: Uncomputed}, nil
	}
	switch {
	case c.kind == 't':
		return s.ownText(Text, unescape(s.value))
	case len(raw) == 0:
		return value{}, nil
	case c.kind == 'n':
		return s.number(c, raw)
	case c.kind == 's':
		i, err := strconv.Atoi(string(raw))
		text, ok := s.texts.at(i)
		if err != nil || !ok {
			return value{}, faultf(saveAnew, "a cell has the text number %.20q, which the workbook does not have", raw)
		}
		return s.sharedText(text)
	case c.kind == 'd':
		kind, text := isoDay(string(raw))
		return s.ownText(kind, []byte(text))
	case c.kind == 'e':
		return s.ownText(Broken, raw)
	}
	switch string(raw) {
	case "1", "true":
		return s.stored(Bool, append(s.own, "true"...)), nil
	case "0", "false":
		return s.stored(Bool, append(s.own, "false"...)), nil
	}
	return value{}, faultf(saveAnew, "a cell is neither true nor false, as its type says, but %.20q", raw)
}

// stored takes own as the new texts of the row and gives what was appended to them.
func (s *sheet) stored(kind CellKind, own []byte) value {
	v := value{kind: kind, from: len(s.own), to: len(own)}
	s.own = own
	return v
}

// ownText gives a text of the sheet itself.
func (s *sheet) ownText(kind CellKind, b []byte) (value, *Fault) {
	if !utf8.Valid(b) || bytes.IndexByte(b, 0) >= 0 {
		v, f := s.sharedText(string(b))
		v.kind = kind
		return v, f
	}
	return s.stored(kind, append(s.own, b...)), nil
}

// sharedText gives a text of which each byte that is no UTF-8 is replaced and counted.
func (s *sheet) sharedText(text string) (value, *Fault) {
	if strings.IndexByte(text, 0) >= 0 {
		return value{}, faultf("Export the file again; it may be damaged", "the cell holds a NUL byte")
	}
	if utf8.ValidString(text) {
		return value{shared: text}, nil
	}
	var b strings.Builder
	for i, r := range text {
		if _, n := utf8.DecodeRuneInString(text[i:]); r == utf8.RuneError && n == 1 {
			if s.about.Replaced++; s.about.FirstReplace == 0 {
				s.about.FirstReplace = s.read
			}
		}
		b.WriteRune(r)
	}
	return value{shared: b.String()}, nil
}

// number gives a number as its style has it. What is no number stays text.
func (s *sheet) number(c *cell, raw []byte) (value, *Fault) {
	if c.style >= len(s.styles) {
		return value{}, faultf(saveAnew, "a cell has the style %d, which the workbook does not have", c.style)
	}
	st := s.styles[c.style]
	if st == (style{}) && isPlainInteger(raw) {
		return s.stored(Number, append(s.own, raw...)), nil
	}
	n, ok := parseNumber(raw)
	switch {
	case !ok:
		return s.ownText(Text, raw)
	case st.zeros > 0 && n >= 0 && n < 1e15 && n == math.Trunc(n):
		digits := strconv.FormatInt(int64(n), 10)
		pad := strings.Repeat("0", max(0, int(st.zeros)-len(digits)))
		return s.stored(Text, append(append(s.own, pad...), digits...)), nil
	case st.look == asDay, st.look == asEither && n >= 1:
		out, kind := appendDay(s.own, n, s.book.date1904)
		return s.stored(kind, out), nil
	case st.look == asNumber:
		return s.stored(Number, appendNumber(s.own, n)), nil
	}
	return s.stored(Clock, appendNumber(s.own, n)), nil
}

// isPlainInteger tells whether a text is an integer in its shortest form.
func isPlainInteger(b []byte) bool {
	if len(b) > 1 && b[0] == '-' && b[1] != '0' {
		b = b[1:]
	}
	for _, d := range b {
		if d < '0' || d > '9' {
			return false
		}
	}
	return len(b) == 1 || len(b) > 1 && b[0] != '0'
}

// parseNumber reads a decimal number, perhaps with an exponent.
func parseNumber(b []byte) (float64, bool) {
	if len(bytes.Trim(b, "0123456789+-.eE")) > 0 {
		return 0, false
	}
	n, err := strconv.ParseFloat(string(b), 64)
	return n, err == nil
}

// appendNumber writes a number with as few decimals as its value needs, without an exponent.
func appendNumber(out []byte, n float64) []byte {
	if n == 0 {
		return append(out, '0')
	}
	return strconv.AppendFloat(out, n, 'f', -1, 64)
}
