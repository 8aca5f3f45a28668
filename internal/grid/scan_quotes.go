package grid

import "bytes"

const (
	noEnd    = "a quote is opened and never closed, or the cell is longer than 64 KiB"
	wrongEnd = "text follows the closing quote of a cell"
	lostEnd  = "a quote is opened and not closed in its line, or closed in the wrong place"
	within   = "a quote stands within a cell that does not begin with one"
)

// quoted cuts a row in which quotes stand. firstLine is the length of the line in which it begins.
func (s *Scanner) quoted(window []byte, firstLine int, last bool) (used int, row Scanned, err error) {
	s.plain, s.ends = s.plain[:0], s.ends[:0]
	at := 0
	for more := true; more; {
		next, why, incomplete := s.cell(window, at, last)
		if incomplete {
			return 0, row, errMore
		}
		if why == wrongEnd && next > firstLine {
			why = lostEnd
		}
		if why != "" {
			return firstLine, Scanned{Fault: s.quoteFault(why)}, nil
		}
		s.ends = append(s.ends, len(s.plain))
		at, more = s.after(window, next)
	}
	text, start := string(s.plain), 0
	s.cells = s.cells[:0]
	for _, end := range s.ends {
		s.cells = append(s.cells, text[start:end])
		start = end
	}
	if fault := s.unfit(s.plain); fault != nil {
		return firstLine, Scanned{Fault: fault}, nil // what follows the first line may be rows of their own
	}
	return at, Scanned{Cells: s.cells}, nil
}

// cell appends the text of the cell that begins at. It gives the place behind the cell and what is wrong
// with its quotes, or says that the window ends too early.
func (s *Scanner) cell(window []byte, at int, last bool) (next int, why string, incomplete bool) {
	quote := at
	for s.lenient && s.delimiter != ' ' && quote < len(window) && window[quote] == ' ' {
		quote++ // blanks before a quoted cell
	}
	if quote >= len(window) || window[quote] != '"' {
		return s.bareCell(window, at, last)
	}
	start := len(s.plain)
	next, why = s.quotedCell(window, quote+1)
	switch {
	case why == "" && !last && (next >= len(window) || window[next] == '\r' && next+1 == len(window)):
		return next, why, true
	case why == noEnd && !last && len(window) < MaxRow && len(s.plain) <= MaxCell:
		return next, why, true
	case why != "" && quote > at:
		s.plain = s.plain[:start]
		return s.bareCell(window, at, last)
	}
	return next, why, false
}

// bareCell appends the text of a cell without quotes around it.
func (s *Scanner) bareCell(window []byte, at int, last bool) (next int, why string, incomplete bool) {
	length := bytes.IndexByte(window[at:], s.newline)
	if length < 0 {
		if !last {
			return at, "", true
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
	if !s.lenient && bytes.IndexByte(text, '"') >= 0 {
		return at, within, false
	}
	s.plain = append(s.plain, text...)
	return at, "", false
}

// after steps over what ends a cell and says whether another cell follows.
func (s *Scanner) after(window []byte, at int) (next int, more bool) {
	if at < len(window) && window[at] == s.delimiter {
		return at + 1, true
	}
	if at < len(window) && window[at] == '\r' && s.newline == '\n' {
		at++
	}
	return min(at+1, len(window)), false
}

// quotedCell appends the text of the cell whose opening quote stands before at, and gives the place
// behind its closing quote.
func (s *Scanner) quotedCell(window []byte, at int) (next int, why string) {
	start := len(s.plain)
	for {
		length := bytes.IndexByte(window[at:], '"')
		if length < 0 || len(s.plain)-start+length > MaxCell {
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

func (s *Scanner) quoteFault(why string) *Fault {
	return &Fault{Column: len(s.ends) + 1, Problem: why, Remedy: `Put the cell in quotes and double each quote within it, like "6"" tube"`}
}
