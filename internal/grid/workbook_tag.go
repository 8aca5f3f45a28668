package grid

import (
	"bytes"
	"errors"
	"fmt"
)

// tag takes a start or end tag.
func (m *markup) tag() (token, error) {
	n, quote := 1, byte(0)
	for done := false; !done; n++ {
		if m.r+n == m.w {
			if err := m.more(); err != nil {
				return 0, cut(err)
			}
		}
		switch c := m.buf[m.r+n]; {
		case quote != 0:
			if c == quote {
				quote = 0
			}
		case c == '>':
			done = true
		case c == '"' || c == '\'':
			quote = c
		case c == '<':
			return 0, errors.New("it has a tag within a tag")
		}
	}
	raw := m.buf[m.r+1 : m.r+n-1]
	m.r += n
	if len(raw) > 0 && raw[0] == '/' {
		return endTag, m.end(trimRight(raw[1:]))
	}
	m.closing = len(raw) > 0 && raw[len(raw)-1] == '/'
	if m.closing {
		raw = raw[:len(raw)-1]
	}
	full := raw
	for i, c := range raw {
		if isBlank(c) {
			full = raw[:i]
			break
		}
	}
	m.attrs = raw[len(full):]
	switch {
	case len(full) == 0:
		return 0, errors.New("it has a tag without a name")
	case m.depth() == 0 && m.rooted:
		return 0, errors.New("it has a second root element")
	case m.depth() == maxElements:
		return 0, fmt.Errorf("it has more than %d elements within one another", maxElements)
	}
	m.rooted = true
	m.starts = append(m.starts, len(m.open))
	m.open = append(m.open, full...)
	m.name = local(full)
	return startTag, nil
}

// end closes the last open element.
func (m *markup) end(full []byte) error {
	if m.depth() == 0 || !bytes.Equal(full, m.open[m.starts[m.depth()-1]:]) {
		return fmt.Errorf("it closes %.20q, which is not open", full)
	}
	m.pop()
	return nil
}

func (m *markup) pop() {
	last := m.starts[m.depth()-1]
	m.name = local(m.open[last:])
	m.open = m.open[:last]
	m.starts = m.starts[:len(m.starts)-1]
}

func local(name []byte) []byte { return name[bytes.IndexByte(name, ':')+1:] }

func isBlank(c byte) bool { return c == ' ' || c == '\t' || c == '\r' || c == '\n' }

func trimLeft(b []byte) []byte {
	for len(b) > 0 && isBlank(b[0]) {
		b = b[1:]
	}
	return b
}

func trimRight(b []byte) []byte {
	for len(b) > 0 && isBlank(b[len(b)-1]) {
		b = b[:len(b)-1]
	}
	return b
}

// skip reads up to the end of the element that has just started.
func (m *markup) skip() error {
	for depth := m.depth(); m.depth() >= depth; {
		if _, err := m.next(); err != nil {
			return err
		}
	}
	return nil
}

// attr gives the next attribute of the element that has just started, with the prefix of its name. The value
// is valid until the next call.
func (m *markup) attr() (name, value []byte, ok bool) {
	rest := trimLeft(m.attrs)
	if len(rest) == 0 || m.bad != nil {
		return nil, nil, false
	}
	i := bytes.IndexByte(rest, '=')
	if i <= 0 {
		m.bad = errors.New("it has an attribute without a value")
		return nil, nil, false
	}
	name, rest = trimRight(rest[:i]), trimLeft(rest[i+1:])
	if len(rest) > 0 && (rest[0] == '"' || rest[0] == '\'') {
		if i = bytes.IndexByte(rest[1:], rest[0]); i >= 0 {
			value, m.attrs = rest[1:1+i], rest[i+2:]
			value, m.bad = m.resolve(value)
			return name, value, m.bad == nil
		}
	}
	m.bad = errors.New("it has an attribute without quotes")
	return nil, nil, false
}
