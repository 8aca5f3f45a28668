package fhir

import (
	"bufio"
	"fmt"
	"io"
	"unicode/utf8"
)

// Limits of what is kept of one resource. FHIR nests a few dozen levels and an audiogram has a few hundred values, so
// a resource beyond them is no audiogram; the limits keep memory small whatever the file holds.
const (
	maxDepth  = 100     // levels of objects and arrays; more is refused
	maxText   = 4 << 10 // bytes kept of one text; reports as base64 and narratives are longer and never needed
	maxKept   = 4 << 20 // bytes kept of all texts of a resource
	maxValues = 50_000  // values kept of a resource
)

// broken says where the JSON of a file is not JSON.
type broken struct {
	line    int
	problem string
}

func (b *broken) Error() string { return b.problem }

// endsEarly says that the file ended within a value.
const endsEarly = "the JSON ends too early"

// scanner reads JSON values one after the other and keeps no more of them than the limits allow. Keys that stand
// twice in an object are noted, since whoever wrote them may have meant either.
type scanner struct {
	r       *bufio.Reader
	line    int  // line of the next byte, from 1
	oneLine bool // the end of a line is no blank: a value does not go on after it
	kept    int  // bytes kept of the value
	values  int  // values kept of the value
	over    bool // the value is larger than the limits
	twice   string
	buf     []byte
}

func newScanner(r io.Reader) *scanner {
	return &scanner{r: bufio.NewReaderSize(r, 64<<10), line: 1}
}

// fresh begins a new value.
func (s *scanner) fresh() { s.kept, s.values, s.over, s.twice = 0, 0, false, "" }

func (s *scanner) broken(format string, args ...any) error {
	return &broken{s.line, fmt.Sprintf(format, args...)}
}

// next reads a byte.
func (s *scanner) next() (byte, error) {
	c, err := s.r.ReadByte()
	if err == io.EOF {
		return 0, s.broken(endsEarly)
	}
	if c == '\n' {
		s.line++
	}
	return c, err
}

// back gives the byte c, which was the last to be read, back.
func (s *scanner) back(c byte) {
	_ = s.r.UnreadByte()
	if c == '\n' {
		s.line--
	}
}

// peek passes over blanks and gives the byte that follows, or 0 at the end of the file.
func (s *scanner) peek() (byte, error) {
	for {
		c, err := s.r.ReadByte()
		switch {
		case err == io.EOF:
			return 0, nil
		case err != nil:
			return 0, err
		case c == '\n' && !s.oneLine:
			s.line++
		case c == 0:
			return 0, s.broken("the file holds a NUL byte, so it is no text or was cut off")
		case c != ' ' && c != '\t' && c != '\r':
			return c, s.r.UnreadByte()
		}
	}
}

// skipLine passes over the rest of a line.
func (s *scanner) skipLine() error {
	for {
		c, err := s.r.ReadByte()
		if err == io.EOF {
			return nil
		}
		if err != nil {
			return err
		}
		if c == '\n' {
			s.line++
			return nil
		}
	}
}

// more says whether an object or array has another member, which it passes on to. It reads the closing sign if not.
func (s *scanner) more(closing byte, first bool) (bool, error) {
	c, err := s.peek()
	switch {
	case err != nil:
		return false, err
	case c == closing:
		_, err = s.next()
		return false, err
	case first:
		return true, nil
	case c != ',':
		return false, s.unexpected(c, "a comma or "+string(closing))
	}
	if _, err = s.next(); err != nil {
		return false, err
	}
	if c, err = s.peek(); err == nil && c == closing {
		err = s.broken("the JSON has a comma before %c", closing)
	}
	return true, err
}

// key reads the name of a member and the colon behind it.
func (s *scanner) key() (string, error) {
	if err := s.expect('"', "a key in quotes"); err != nil {
		return "", err
	}
	key, _, err := s.text()
	if err != nil {
		return "", err
	}
	return key, s.expect(':', "a colon")
}

func (s *scanner) expect(want byte, what string) error {
	c, err := s.peek()
	if err != nil {
		return err
	}
	if c != want {
		return s.unexpected(c, what)
	}
	_, err = s.next()
	return err
}

func (s *scanner) unexpected(c byte, want string) error {
	switch {
	case c == 0:
		return s.broken(endsEarly)
	case c == '\n':
		return s.broken("the line ends within the JSON")
	case c < ' ' || c >= utf8.RuneSelf:
		return s.broken("the JSON is broken: %s is missing", want)
	}
	return s.broken("the JSON is broken: %q stands where %s belongs", c, want)
}
