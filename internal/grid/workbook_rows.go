package grid

import (
	"errors"
	"io"
	"strconv"
)

const maxRowText = 8 << 20 // bytes of the texts of one row that are not shared

var errLongText = errors.New("the text of a cell is longer than 1024 KiB")

// piece is a text of a cell that stands in the sheet itself.
type piece struct{ col, from, to int }

// readRow reads on to the next row that is not blank and puts it ahead. At the end of the rows it returns
// io.EOF, or what is wrong behind them.
func (s *sheet) readRow() error {
	for {
		t, err := s.next()
		switch {
		case err == io.EOF, err == nil && t == endTag && s.depth() == 1 && string(s.name) == "sheetData":
			if s.layout.fault != nil {
				return s.layout.fault
			}
			return io.EOF
		case err != nil:
			return s.damage(err)
		case t != startTag:
		case s.depth() == 2 && string(s.name) != "sheetData":
			err = s.skip()
		case s.depth() == 3 && string(s.name) == "row":
			err = s.readCells()
		}
		if err != nil {
			return s.damage(err)
		}
		if s.ahead.Line > 0 {
			return nil
		}
	}
}

// readCells reads the row that has just started and puts it ahead unless it is blank.
func (s *sheet) readCells() error {
	row := &s.ahead
	row.Cells, row.Hidden, row.Fault = row.Cells[:0], false, nil
	s.own, s.pieces = s.own[:0], s.pieces[:0]
	line := s.startRow()
	col := 0
	for s.depth() >= 3 {
		t, err := s.next()
		if err != nil {
			return err
		}
		if t != startTag || s.depth() != 4 || string(s.name) != "c" {
			continue
		}
		c := s.startCell(col)
		if err := s.readValue(&c); err != nil {
			return err
		}
		if col = c.col; row.Fault == nil {
			row.Fault = s.put(&c)
		}
	}
	if row.Fault != nil {
		row.Cells = row.Cells[:0]
	} else if len(row.Cells) == 0 {
		return nil
	}
	all := string(s.own)
	for _, p := range s.pieces {
		if row.Fault == nil {
			row.Cells[p.col-1].Text = all[p.from:p.to]
		}
	}
	row.Line, row.Last = line, line
	return nil
}

// startRow reads the attributes of a row and gives its number. A row whose number is out of order, or no number
// of a sheet, gets a fault; the latter is given the number after the row before.
func (s *sheet) startRow() int {
	line := s.read + 1
	for {
		name, value, ok := s.attr()
		if !ok {
			break
		}
		switch string(name) {
		case "hidden":
			s.ahead.Hidden = isTrue(value)
		case "r":
			n := whole(value, maxSheetRows)
			switch {
			case n == 0:
				s.ahead.Fault = faultf(saveAnew, "the row has the number %.20q, which no sheet has", value)
			case n <= s.read:
				s.ahead.Fault = faultf(saveAnew, "the row stands behind row %d", s.read)
				return n
			default:
				line = n
			}
		}
	}
	if line > maxSheetRows {
		line = maxSheetRows
		s.ahead.Fault = faultf(saveAnew, "the row stands behind the last row that a sheet can have")
	}
	s.read = line
	return line
}

// put puts a cell into the row ahead, or tells why it cannot be read.
func (s *sheet) put(c *cell) *Fault {
	f := c.fault
	if f == nil {
		f = s.fill(c)
	}
	if f != nil && f.Column == 0 {
		f.Line, f.Column = s.read, min(c.col, maxSheetColumns)
	}
	return f
}

// fill puts the value of a cell into the row ahead.
func (s *sheet) fill(c *cell) *Fault {
	v, f := s.convert(c)
	if f != nil || v.blank() {
		return f
	}
	if s.filled[c.col] == s.read {
		return faultf(saveAnew, "the row has two cells for the column %s", columnName(c.col))
	}
	s.filled[c.col] = s.read
	cells := s.ahead.Cells
	for len(cells) < c.col {
		cells = append(cells, Cell{})
	}
	cells[c.col-1] = Cell{Text: v.shared, Kind: v.kind}
	s.ahead.Cells = cells
	if v.from < v.to {
		if s.pieces = append(s.pieces, piece{c.col, v.from, v.to}); len(s.own) > maxRowText {
			return faultf("Check whether the file holds a table", "the texts of the row are longer than %d KiB", maxRowText>>10)
		}
	}
	return nil
}

// columnName gives the letters of a column.
func columnName(col int) string {
	if col <= 0 {
		return strconv.Itoa(col)
	}
	var out []byte
	for ; col > 0; col = (col - 1) / 26 {
		out = append([]byte{byte('A' + (col-1)%26)}, out...)
	}
	return string(out)
}
