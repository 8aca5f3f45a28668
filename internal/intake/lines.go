package intake

import (
	"bufio"
	"bytes"
	"fmt"
	"io"

	"hearduty/internal/record"
)

// linesReader reads NDJSON: one JSON object a line.
type linesReader struct {
	r      *bufio.Reader
	object *objectReader
	line   int
}

func newLinesReader(r io.Reader, t *record.Table) (rowReader, error) {
	l := &linesReader{r: bufio.NewReaderSize(r, maxRow), object: newObjectReader(t)}
	skipMark(l.r)
	return l, nil
}

func (l *linesReader) next(r *row) error {
	for {
		text, err := l.r.ReadSlice('\n')
		if err != nil && err != io.EOF && err != bufio.ErrBufferFull {
			return err
		}
		if len(text) == 0 {
			return io.EOF
		}
		l.line++
		if err == bufio.ErrBufferFull {
			return l.tooLong(r)
		}
		if text = bytes.TrimSpace(text); len(text) == 0 {
			continue
		}
		r.reset(l.line)
		l.object.read(text, r)
		return nil
	}
}

// tooLong gives up a line that does not fit into the buffer.
func (l *linesReader) tooLong(r *row) error {
	r.reset(l.line)
	r.fault = tooLongFault()
	for {
		switch _, err := l.r.ReadSlice('\n'); err {
		case nil, io.EOF:
			return nil
		case bufio.ErrBufferFull:
		default:
			return err
		}
	}
}

func tooLongFault() *fault {
	return &fault{why: fmt.Sprintf("the row is longer than %d KiB", maxRow>>10), remedy: "Check whether line ends are missing in the file"}
}
