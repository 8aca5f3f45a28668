package grid

import (
	"bytes"
	"io"

	"golang.org/x/text/encoding/unicode"
	"golang.org/x/text/transform"
)

// Decoded is the text of a file in UTF-8, without a byte order mark. It is decoded while it is read.
type Decoded struct {
	r        io.Reader
	encoding string
	decoded  bool
	lines    lines
	mark     int // bytes of U+FFFD seen at the end of what was read
	replaced int
	first    int
	utf8     int
}

// Text gives the text of the file from its beginning. A byte order mark tells the encoding; without one, UTF-16
// and UTF-8 are recognized, and anything else needs the name of its code page. A file that is UTF-8
// throughout is not read in a page of single bytes, even if one is stated. The error is a *Fault if the
// encoding is not known, or names the first line that is not in it.
func (f *File) Text(encoding string) (*Decoded, error) {
	stated, err := findPage(encoding)
	if err != nil {
		return nil, err
	}
	s := &f.survey
	t := &Decoded{lines: lines{n: 1}}
	skip := int64(0)
	var decoder transform.Transformer
	switch {
	case s.wide != "":
		order := unicode.LittleEndian
		if s.wide == "utf-16be" {
			order = unicode.BigEndian
		}
		decoder = unicode.UTF16(order, unicode.IgnoreBOM).NewDecoder()
		t.encoding = s.wide
		if s.marked {
			skip = 2
		}
	case s.marked, stated.decoder == nil, stated.single && s.bad == 0 && s.high > 0:
		t.encoding = utf8Name
		if s.bad > 0 {
			return nil, s.notUTF8(encoding)
		}
		if s.marked {
			skip = 3
		}
	default:
		decoder, t.encoding = stated.decoder(), stated.name
		if stated.single {
			t.utf8 = s.high
		}
	}
	if _, err := f.r.Seek(skip, io.SeekStart); err != nil {
		return nil, cannotRead(err)
	}
	t.r = f.r
	if decoder != nil {
		t.r, t.decoded = transform.NewReader(f.r, decoder), true
	}
	return t, nil
}

// About tells the encoding, and what of it could not be read so far.
func (t *Decoded) About() About {
	return About{Encoding: t.encoding, Replaced: t.replaced, FirstReplace: t.first, UTF8: t.utf8}
}

// Lossy says whether anything could not be read so far.
func (t *Decoded) Lossy() bool { return t.replaced > 0 }

// Read reads the next bytes of the text.
func (t *Decoded) Read(p []byte) (int, error) {
	n, err := t.r.Read(p)
	if t.decoded {
		t.look(p[:n])
	}
	return n, err
}

const replacement = "\uFFFD"

// look counts the characters that stand for what the encoding does not know.
func (t *Decoded) look(b []byte) {
	if t.mark == 0 && !bytes.Contains(b, []byte(replacement[:1])) {
		t.lines.add(b)
		return
	}
	for i, c := range b {
		t.lines.add(b[i : i+1])
		switch {
		case c == replacement[t.mark]:
			t.mark++
		case c == replacement[0]:
			t.mark = 1
		default:
			t.mark = 0
		}
		if t.mark == len(replacement) {
			t.mark = 0
			if t.replaced++; t.first == 0 {
				t.first = t.lines.n
			}
		}
	}
}

// lines counts lines that end in \n, \r\n or \r.
type lines struct {
	n  int
	cr bool
}

func (l *lines) add(b []byte) {
	if len(b) == 0 {
		return
	}
	if l.cr && b[0] == '\n' {
		l.n--
	}
	l.n += bytes.Count(b, []byte{'\n'})
	if returns := bytes.Count(b, []byte{'\r'}); returns > 0 {
		l.n += returns - bytes.Count(b, []byte("\r\n"))
	}
	l.cr = b[len(b)-1] == '\r'
}
