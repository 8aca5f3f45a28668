package grid

import (
	"bufio"
	"bytes"
	"io"
)

// LineReader gives the lines of a text.
type LineReader struct {
	text *Decoded
	r    *bufio.Reader
	line int
}

// Lines reads the file line by line. The error is a *Fault if the encoding does not fit.
func (f *File) Lines(encoding string) (*LineReader, error) {
	text, err := f.Text(encoding)
	if err != nil {
		return nil, err
	}
	return &LineReader{text: text, r: bufio.NewReaderSize(text, MaxRow)}, nil
}

// Next gives the next line without the blanks around it, or nil if it is longer than MaxRow. It is valid until
// the following call. At the end the error is io.EOF.
func (l *LineReader) Next() ([]byte, error) {
	text, err := l.r.ReadSlice('\n')
	switch {
	case err == bufio.ErrBufferFull:
		l.line++
		return nil, discardLine(l.r, '\n')
	case err != nil && err != io.EOF:
		return nil, cannotRead(err)
	case len(text) == 0:
		return nil, io.EOF
	}
	l.line++
	if text = bytes.TrimSpace(text); text == nil {
		text = []byte{}
	}
	return text, nil
}

// Line gives the number of the line that was read last, from 1.
func (l *LineReader) Line() int { return l.line }

// About tells the encoding.
func (l *LineReader) About() About { return l.text.About() }

// jsonLines gives the objects of NDJSON.
type jsonLines struct{ lines *LineReader }

func newLines(f *File, encoding string) (objectSource, error) {
	lines, err := f.Lines(encoding)
	return &jsonLines{lines}, err
}

func (l *jsonLines) next(o *object) error {
	text, err := l.lines.Next()
	if err != nil {
		return err
	}
	o.reset(l.lines.Line())
	switch {
	case text == nil:
		o.fail(TooLong())
	case len(text) > 0:
		o.readJSON(text)
	}
	return nil
}

func (l *jsonLines) about() About {
	a := l.lines.About()
	a.Format = Lines
	return a
}
