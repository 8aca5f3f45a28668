package intake

import (
	"bufio"
	"bytes"
	"errors"
	"fmt"
	"io"
	"strconv"
	"strings"
)

// Bounds of a CSV row.
const (
	maxCell = 64 << 10 // bytes of one cell
	maxRow  = 1 << 20  // bytes of one row
)

// scanner cuts CSV text into rows of cells as RFC 4180 describes them, also with tabs or semicolons. A
// row with a fault costs that row and no other: where a quote is never closed, or closed at the wrong
// place, only the line in which the row begins is given up, and the next line begins a new row.
type scanner struct {
	r         *bufio.Reader
	delimiter byte
	newline   byte   // \n, or \r in a file that has no other
	line      int    // line of the next row
	want      int    // number of cells that a row must have, or 0
	plain     []byte // cells of a row with quotes, without them
	ends      []int  // where the cells end in plain
	cells     []string
}

// scanned is one row: its line, and its cells or its fault.
type scanned struct {
	line  int
	cells []string
	fault *fault
}

func newScanner(r io.Reader) *scanner {
	s := &scanner{r: bufio.NewReaderSize(r, maxRow), delimiter: ',', newline: '\n', line: 1}
	skipMark(s.r)
	head, _ := s.r.Peek(maxCell)
	if bytes.IndexByte(head, '\n') < 0 && bytes.IndexByte(head, '\r') >= 0 {
		s.newline = '\r'
	}
	for len(head) > 0 {
		var line []byte
		line, head, _ = bytes.Cut(head, []byte{s.newline})
		if len(bytes.TrimSpace(line)) == 0 {
			continue
		}
		for _, c := range []byte{',', '\t', ';'} {
			if bytes.IndexByte(line, c) >= 0 {
				s.delimiter = c
				break
			}
		}
		break
	}
	return s
}

// next gives the next row that is not blank, or io.EOF. The cells are valid until the following call.
func (s *scanner) next() (scanned, error) {
	for {
		row, err := s.one()
		if err != nil || row.fault != nil || !blank(row.cells) {
			return row, err
		}
	}
}

func blank(cells []string) bool {
	for _, c := range cells {
		if strings.TrimSpace(c) != "" {
			return false
		}
	}
	return true
}

var errMore = errors.New("the row goes on")

func (s *scanner) one() (scanned, error) {
	window, _ := s.r.Peek(s.r.Buffered())
	used, row, err := s.cut(window, false)
	if err == errMore {
		var readErr error
		window, readErr = s.r.Peek(maxRow)
		if readErr != nil && readErr != io.EOF {
			return row, readErr
		}
		if len(window) == 0 {
			return row, io.EOF
		}
		used, row, err = s.cut(window, readErr == io.EOF)
	}
	row.line = s.line
	if err == errMore {
		return row, s.tooLong(&row)
	}
	s.line += bytes.Count(window[:used], []byte{s.newline})
	_, err = s.r.Discard(used)
	return row, err
}

// tooLong gives up a line that does not fit into the buffer.
func (s *scanner) tooLong(row *scanned) error {
	row.fault = &fault{why: fmt.Sprintf("the row is longer than %d KiB", maxRow>>10), remedy: "Check whether line ends are missing in the file"}
	s.line++
	for {
		_, err := s.r.ReadSlice(s.newline)
		switch err {
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
func (s *scanner) cut(window []byte, last bool) (used int, row scanned, err error) {
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
	row.cells = s.cells
	row.fault = s.unfit(line)
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
func (s *scanner) unfit(line []byte) *fault {
	if n := len(s.cells); s.want > 0 && n != s.want && !blank(s.cells) {
		return &fault{column: min(n, s.want) + 1, why: fmt.Sprintf("the row has %s, but the header has %s", count(n), count(s.want)), remedy: "Look for a missing or surplus separator, and put a cell that contains one in quotes"}
	}
	if len(line) <= maxCell && bytes.IndexByte(line, 0) < 0 {
		return nil
	}
	for i, c := range s.cells {
		if len(c) > maxCell {
			return &fault{column: i + 1, why: fmt.Sprintf("the cell is longer than %d KiB", maxCell>>10), remedy: "Shorten the cell, or check whether a quote is missing"}
		}
		if strings.IndexByte(c, 0) >= 0 {
			return &fault{column: i + 1, why: "the cell holds a NUL byte", remedy: "Export the file again; it may be damaged"}
		}
	}
	return nil
}

// quoted cuts a row in which quotes stand. firstLine is the length of the line in which it begins.
func (s *scanner) quoted(window []byte, firstLine int, last bool) (used int, row scanned, err error) {
	s.plain, s.ends = s.plain[:0], s.ends[:0]
	at := 0
	for {
		var more bool
		if at < len(window) && window[at] == '"' {
			var why string
			at, why = s.quotedCell(window, at+1)
			if why == "" && !last && (at >= len(window) || window[at] == '\r' && at+1 == len(window)) {
				return 0, row, errMore
			}
			if why == noEnd && !last && len(window) < maxRow && len(s.plain) <= maxCell {
				return 0, row, errMore
			}
			if why == wrongEnd && at > firstLine {
				why = lostEnd
			}
			if why != "" {
				return firstLine, scanned{fault: s.quoteFault(why)}, nil
			}
		} else {
			length := bytes.IndexByte(window[at:], s.newline)
			if length < 0 {
				if !last {
					return 0, row, errMore
				}
				length = len(window) - at
			}
			if i := bytes.IndexByte(window[at:at+length], s.delimiter); i >= 0 {
				length = i
			}
			text := window[at : at+length]
			at += length
			if at >= len(window) || window[at] == s.newline {
				text = trimReturn(text)
			}
			if bytes.IndexByte(text, '"') >= 0 {
				return firstLine, scanned{fault: s.quoteFault("a quote stands within a cell that does not begin with one")}, nil
			}
			s.plain = append(s.plain, text...)
		}
		s.ends = append(s.ends, len(s.plain))
		at, more = s.after(window, at)
		if !more {
			break
		}
	}
	text, start := string(s.plain), 0
	s.cells = s.cells[:0]
	for _, end := range s.ends {
		s.cells = append(s.cells, text[start:end])
		start = end
	}
	row = scanned{cells: s.cells, fault: s.unfit(s.plain)}
	if row.fault != nil {
		at = firstLine // what follows the first line may be rows of their own
	}
	return at, row, nil
}

// after steps over what ends a cell and says whether another cell follows.
func (s *scanner) after(window []byte, at int) (next int, more bool) {
	if at < len(window) && window[at] == s.delimiter {
		return at + 1, true
	}
	if at < len(window) && window[at] == '\r' && s.newline == '\n' {
		at++
	}
	return min(at+1, len(window)), false
}

const (
	noEnd    = "a quote is opened and never closed, or the cell is longer than 64 KiB"
	wrongEnd = "text follows the closing quote of a cell"
	lostEnd  = "a quote is opened and not closed in its line, or closed in the wrong place"
)

// quotedCell appends the text of the cell whose opening quote stands before at, and gives the place
// behind its closing quote.
func (s *scanner) quotedCell(window []byte, at int) (next int, why string) {
	start := len(s.plain)
	for {
		length := bytes.IndexByte(window[at:], '"')
		if length < 0 || len(s.plain)-start+length > maxCell {
			return at, noEnd
		}
		s.plain = append(s.plain, window[at:at+length]...)
		at += length + 1
		if at >= len(window) {
			return at, ""
		}
		switch rest := window[at:]; {
		case rest[0] == '"':
			s.plain = append(s.plain, '"')
			at++
		case rest[0] == s.delimiter, rest[0] == s.newline, rest[0] == '\r' && (len(rest) == 1 || rest[1] == s.newline):
			return at, ""
		default:
			return at, wrongEnd
		}
	}
}

func (s *scanner) quoteFault(why string) *fault {
	return &fault{column: len(s.ends) + 1, why: why, remedy: `Put the cell in quotes and double each quote within it, like "6"" tube"`}
}
