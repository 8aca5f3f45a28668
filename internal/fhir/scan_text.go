package fhir

import (
	"strconv"
	"unicode/utf16"
	"unicode/utf8"
)

// text reads a text whose opening quote was read. Of a long one it keeps the beginning.
func (s *scanner) text() (t string, cut bool, err error) {
	s.buf = s.buf[:0]
	for {
		if s.plain() {
			cut = true
		}
		c, err := s.next()
		if err != nil {
			return "", false, err
		}
		r := rune(c)
		switch {
		case c == '"':
			s.keep(len(s.buf))
			if s.over {
				return "", true, nil
			}
			return string(s.buf), cut, nil
		case c < ' ':
			if c == '\n' && s.oneLine {
				s.back(c)
				return "", false, s.unexpected(c, "a quote")
			}
			return "", false, s.broken("the JSON is broken: a text holds the control character %U", c)
		case c == '\\':
			if r, err = s.escape(); err != nil {
				return "", false, err
			}
		case c >= utf8.RuneSelf:
			_ = s.r.UnreadByte()
			size := 0
			if r, size, err = s.r.ReadRune(); err != nil {
				return "", false, err
			}
			if r == utf8.RuneError && size == 1 {
				return "", false, s.broken("the file holds a byte that is not UTF-8 text")
			}
		}
		if len(s.buf)+utf8.UTFMax > maxText {
			cut = true
			continue
		}
		s.buf = utf8.AppendRune(s.buf, r)
	}
}

// plain reads what is in the buffer of letters that stand for themselves. It returns true if not all were kept.
func (s *scanner) plain() (cut bool) {
	ahead, _ := s.r.Peek(s.r.Buffered())
	n := 0
	for n < len(ahead) && ahead[n] >= ' ' && ahead[n] < utf8.RuneSelf && ahead[n] != '"' && ahead[n] != '\\' {
		n++
	}
	room := min(n, maxText-len(s.buf))
	s.buf = append(s.buf, ahead[:room]...)
	_, _ = s.r.Discard(n)
	return room < n
}

func (s *scanner) keep(bytes int) {
	if s.kept += bytes; s.kept > maxKept {
		s.over = true
	}
}

// escape reads what follows a backslash.
func (s *scanner) escape() (rune, error) {
	c, err := s.next()
	if err != nil {
		return 0, err
	}
	switch c {
	case '"', '\\', '/':
		return rune(c), nil
	case 'b':
		return '\b', nil
	case 'f':
		return '\f', nil
	case 'n':
		return '\n', nil
	case 'r':
		return '\r', nil
	case 't':
		return '\t', nil
	case 'u':
		r, err := s.hex()
		if err != nil || !utf16.IsSurrogate(r) {
			return r, err
		}
		if ahead, _ := s.r.Peek(6); len(ahead) == 6 && string(ahead[:2]) == `\u` {
			low, err := strconv.ParseUint(string(ahead[2:]), 16, 16)
			if pair := utf16.DecodeRune(r, rune(low)); err == nil && pair != utf8.RuneError {
				_, _ = s.r.Discard(6)
				return pair, nil
			}
		}
		return utf8.RuneError, nil
	}
	s.back(c)
	return 0, s.broken("the JSON is broken: a backslash stands before a sign that needs none")
}

func (s *scanner) hex() (rune, error) {
	r := rune(0)
	for range 4 {
		c, err := s.next()
		if err != nil {
			return 0, err
		}
		switch {
		case c >= '0' && c <= '9':
			c -= '0'
		case c >= 'a' && c <= 'f':
			c -= 'a' - 10
		case c >= 'A' && c <= 'F':
			c -= 'A' - 10
		default:
			s.back(c)
			return 0, s.broken(`the JSON is broken: \u is not followed by four hexadecimal digits`)
		}
		r = r<<4 | rune(c)
	}
	return r, nil
}
