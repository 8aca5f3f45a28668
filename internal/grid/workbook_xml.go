package grid

import (
	"bufio"
	"bytes"
	"errors"
	"fmt"
	"io"

	"golang.org/x/text/encoding/unicode"
)

const (
	maxElements = 200     // elements within one another
	maxMarkup   = 1 << 20 // bytes of one tag or one stretch of text
)

type token uint8

const (
	startTag token = iota
	endTag
	characters
)

// markup reads the XML of a workbook's part as a stream of tokens and checks that its elements close as they opened. It has
// no document types and so no entities beyond the five of XML itself. What it gives is valid until the next call.
type markup struct {
	in      io.Reader
	buf     []byte
	r, w    int // what is read but not yet used is buf[r:w]
	name    []byte
	attrs   []byte // attributes of a start tag that attr has not given yet
	text    []byte
	plain   []byte // text with its references resolved
	open    []byte // full names of the open elements, one behind the other
	starts  []int  // where each begins in open
	closing bool   // the element closed itself: its end is next
	rooted  bool   // the root element has begun
	bad     error  // fault in the attributes
}

func newMarkup(in io.Reader) *markup {
	b := bufio.NewReaderSize(in, 4096)
	if head, _ := b.Peek(2); string(head) == "\xff\xfe" || string(head) == "\xfe\xff" {
		return &markup{in: unicode.UTF16(unicode.BigEndian, unicode.ExpectBOM).NewDecoder().Reader(b), buf: make([]byte, 1<<16)}
	}
	if head, _ := b.Peek(3); string(head) == "\xef\xbb\xbf" {
		_, _ = b.Discard(3)
	}
	return &markup{in: b, buf: make([]byte, 1<<16)}
}

// depth is the number of open elements, the one that has just started included.
func (m *markup) depth() int { return len(m.starts) }

// next reads the next token: name is the local name of a tag, text the characters. After the root element
// it returns io.EOF.
func (m *markup) next() (token, error) {
	if m.closing {
		m.closing = false
		m.pop()
		return endTag, nil
	}
	for m.bad == nil {
		if m.r == m.w {
			if err := m.more(); err == io.EOF && m.rooted && m.depth() == 0 {
				return 0, io.EOF
			} else if err != nil {
				return 0, cut(err)
			}
		}
		if m.buf[m.r] != '<' {
			if err := m.characters(); err != nil {
				return 0, err
			}
			return characters, nil
		}
		for m.w-m.r < 2 {
			if err := m.more(); err != nil {
				return 0, cut(err)
			}
		}
		switch m.buf[m.r+1] {
		case '?':
			raw, err := m.through(2, "?>")
			if err != nil {
				return 0, err
			}
			if err := checkEncoding(raw); err != nil {
				return 0, err
			}
		case '!':
			if is, err := m.special(); err != nil || is {
				return characters, err
			}
		default:
			return m.tag()
		}
	}
	return 0, m.bad
}

// special reads a comment, which it skips, or a CDATA section, for which it returns true.
func (m *markup) special() (bool, error) {
	const comment, section = "<!--", "<![CDATA["
	for m.w-m.r < len(section) {
		if err := m.more(); err == io.EOF {
			break
		} else if err != nil {
			return false, err
		}
	}
	switch head := m.buf[m.r:m.w]; {
	case bytes.HasPrefix(head, []byte(comment)):
		_, err := m.through(len(comment), "-->")
		return false, err
	case bytes.HasPrefix(head, []byte(section)):
		raw, err := m.through(len(section), "]]>")
		m.text = bytes.TrimSuffix(bytes.TrimPrefix(raw, []byte(section)), []byte("]]>"))
		return true, err
	}
	return false, errors.New("it has a document type or the like, which no workbook may have")
}

// through takes everything up to and with the mark, which is sought from byte n on.
func (m *markup) through(n int, mark string) ([]byte, error) {
	for {
		if i := bytes.Index(m.buf[m.r+n:m.w], []byte(mark)); i >= 0 {
			raw := m.buf[m.r : m.r+n+i+len(mark)]
			m.r += len(raw)
			return raw, nil
		}
		n = max(n, m.w-m.r-len(mark)+1)
		if err := m.more(); err != nil {
			return nil, cut(err)
		}
	}
}

// characters takes the text up to the next tag.
func (m *markup) characters() error {
	n := 0
	for {
		i := bytes.IndexByte(m.buf[m.r+n:m.w], '<')
		if i >= 0 {
			n += i
			break
		}
		n = m.w - m.r
		if err := m.more(); err == io.EOF {
			break
		} else if err != nil {
			return err
		}
	}
	raw := m.buf[m.r : m.r+n]
	m.r += n
	var err error
	m.text, err = m.resolve(raw)
	return err
}

// more reads more of the part behind what is not used yet.
func (m *markup) more() error {
	if m.r > 0 {
		m.w = copy(m.buf, m.buf[m.r:m.w])
		m.r = 0
	}
	if m.w == len(m.buf) {
		if m.w >= maxMarkup {
			return fmt.Errorf("it has a text or tag longer than %d KiB", maxMarkup>>10)
		}
		m.buf = append(m.buf, make([]byte, len(m.buf))...)
	}
	for range 100 {
		n, err := m.in.Read(m.buf[m.w:])
		m.w += n
		if n > 0 {
			return nil
		}
		if err != nil {
			return err
		}
	}
	return io.ErrNoProgress
}

func cut(err error) error {
	if err == io.EOF || err == io.ErrUnexpectedEOF {
		return errors.New("it breaks off in the middle")
	}
	return err
}
