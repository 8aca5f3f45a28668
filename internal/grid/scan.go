package grid

import (
	"bufio"
	"bytes"
	"errors"
	"fmt"
	"io"
	"strconv"
	"strings"
)

// Bounds of a row of text.
const (
	MaxCell = 64 << 10 // bytes of one cell
	MaxRow  = 1 << 20  // bytes of one row
)

// ScanOptions say how delimited text is cut.
type ScanOptions struct {
	Delimiter byte // what stands between cells; 0 to find it
	ByHeader  bool // find it in the first filled line alone, which is a header whose names hold no delimiter
	Lenient   bool // take a quote within a cell that does not begin with one as text
}

// Scanner cuts text in UTF-8 into rows of cells as RFC 4180 describes them, with any delimiter. A row with
// a fault costs that row and no other: where a quote is never closed, or closed at the wrong place, only
// the line in which the row begins is given up, and the next line begins a new row.
type Scanner struct {
	r         *bufio.Reader
	delimiter byte
	newline   byte // \n, or \r in a file that has no other
	lenient   bool
	separator bool   // the next row is a line such as sep=;
	line      int    // line of the next row
	want      int    // number of cells that a row must have, or 0
	plain     []byte // cells of a row with quotes, without them
	ends      []int  // where the cells end in plain
	cells     []string
}

// Scanned is one row.
type Scanned struct {
	Line    int // first line of the row, from 1
	Last    int // its last line
	Cells   []string
	NotData string // why the row is no data, whatever the table: "separator line"
	Fault   *Fault // why the row cannot be read; Cells is then empty
}

// NewScanner gives a scanner of the text, which must have no byte order mark.
func NewScanner(r io.Reader, o ScanOptions) *Scanner {
	s := &Scanner{r: bufio.NewReaderSize(r, MaxRow), delimiter: o.Delimiter, newline: '\n', lenient: o.Lenient, line: 1}
	head, err := s.r.Peek(MaxCell)
	if bytes.IndexByte(head, '\n') < 0 && bytes.IndexByte(head, '\r') >= 0 {
		s.newline = '\r'
	}
	if d, ok := separatorLine(head, s.newline); ok {
		s.delimiter, s.separator = d, true
	}
	if s.delimiter == 0 {
		s.delimiter = sniff(head, s.newline, err != nil, o.ByHeader)
	}
	return s
}

// Delimiter gives what stands between cells.
func (s *Scanner) Delimiter() byte { return s.delimiter }

// Want makes rows with another number of cells faulty, except blank ones.
func (s *Scanner) Want(cells int) { s.want = cells }

// endMark ends the files of old systems and counts as nothing.
const endMark = "\x1a"

// Blank says whether no cell holds anything.
func Blank(cells []string) bool {
	for _, c := range cells {
		if c != "" && strings.TrimSpace(strings.Trim(c, endMark)) != "" {
			return false
		}
	}
	return true
}

var errMore = errors.New("the row goes on")

// Next gives the next row, also a blank one, or io.EOF. The cells are valid until the following call.
func (s *Scanner) Next() (Scanned, error) {
	window, _ := s.r.Peek(s.r.Buffered())
	used, row, err := s.cut(window, false)
	if err == errMore {
		var readErr error
		window, readErr = s.r.Peek(MaxRow)
		if readErr != nil && readErr != io.EOF {
			return row, readErr
		}
		if len(window) == 0 {
			return row, io.EOF
		}
		used, row, err = s.cut(window, readErr == io.EOF)
	}
	row.Line = s.line
	if err == errMore {
		row.Last = s.line
		return row, s.tooLong(&row)
	}
	lines := bytes.Count(window[:used], []byte{s.newline})
	s.line += lines
	row.Last = row.Line + max(lines, 1) - 1
	if s.separator {
		s.separator, row.NotData, row.Fault = false, SeparatorLine, nil
	}
	if row.Fault != nil {
		row.Fault.Line = row.Line
	}
	_, err = s.r.Discard(used)
	return row, err
}

// tooLong gives up a line that does not fit into the buffer.
func (s *Scanner) tooLong(row *Scanned) error {
	row.Fault = TooLong()
	row.Fault.Line = s.line
	s.line++
	return discardLine(s.r, s.newline)
}

// TooLong is the fault of a row that is longer than MaxRow.
func TooLong() *Fault {
	return faultf("Check whether line ends are missing in the file", "the row is longer than %d KiB", MaxRow>>10)
}

// discardLine passes over the rest of a line.
func discardLine(r *bufio.Reader, newline byte) error {
	for {
		switch _, err := r.ReadSlice(newline); err {
		case nil, io.EOF:
			return nil
		case bufio.ErrBufferFull:
		default:
			return err
		}
	}
}

// cut cuts the first row from the window. It returns errMore if the row's end is not in the window and
// more may follow.
func (s *Scanner) cut(window []byte, last bool) (used int, row Scanned, err error) {
	end := bytes.IndexByte(window, s.newline)
	used = end + 1
	if end < 0 {
		if !last {
			return 0, row, errMore
		}
		end, used = len(window), len(window)
	}
	line := trimReturn(window[:end])
	if bytes.IndexByte(line, '"') >= 0 {
		return s.quoted(window, used, last)
	}
	text := string(line)
	s.cells = s.cells[:0]
	for {
		i := strings.IndexByte(text, s.delimiter)
		if i < 0 {
			break
		}
		s.cells = append(s.cells, text[:i])
		text = text[i+1:]
	}
	s.cells = append(s.cells, text)
	if row.Fault = s.unfit(line); row.Fault == nil {
		row.Cells = s.cells
	}
	return used, row, nil
}

func count(cells int) string {
	if cells == 1 {
		return "1 cell"
	}
	return strconv.Itoa(cells) + " cells"
}

func trimReturn(line []byte) []byte {
	if n := len(line); n > 0 && line[n-1] == '\r' {
		return line[:n-1]
	}
	return line
}

// unfit finds a wrong number of cells, cells that are too long, and NUL bytes. The cells of the row are in s.cells.
func (s *Scanner) unfit(line []byte) *Fault {
	if n := len(s.cells); s.want > 0 && n != s.want && !Blank(s.cells) {
		return &Fault{Column: min(n, s.want) + 1, Problem: fmt.Sprintf("the row has %s, but the header has %s", count(n), count(s.want)), Remedy: "Look for a missing or surplus separator, and put a cell that contains one in quotes"}
	}
	if len(line) <= MaxCell && bytes.IndexByte(line, 0) < 0 {
		return nil
	}
	for i, c := range s.cells {
		if len(c) > MaxCell {
			return &Fault{Column: i + 1, Problem: fmt.Sprintf("the cell is longer than %d KiB", MaxCell>>10), Remedy: "Shorten the cell, or check whether a quote is missing"}
		}
		if strings.IndexByte(c, 0) >= 0 {
			return &Fault{Column: i + 1, Problem: "the cell holds a NUL byte", Remedy: "Export the file again; it may be damaged"}
		}
	}
	return nil
}
