package grid

import (
	"errors"
	"io"
	"slices"
)

// The size of a sheet: ECMA-376 names none; these are the limits of the programs that write workbooks.
const (
	maxSheetRows    = 1 << 20
	maxSheetColumns = 1 << 14
)

// openWorkbook reads one sheet of a file that is a workbook.
func openWorkbook(f *File, o Options) (Rows, error) {
	size, err := f.r.Seek(0, io.SeekEnd)
	if err != nil {
		return nil, err
	}
	return newWorkbook(f.r, size, o, workbookLimits)
}

// newWorkbook reads one sheet of the workbook in r: that of the name in o, or the only visible one.
//
// A cell gives what is stored, not what is shown, but for two things. A number that is formatted as a day or
// time is one. A whole number whose format is made of zeros only, such as 000000, is text with these zeros, since
// ids are kept that way. A number that is formatted as a day but has none (29 February 1900, day 0, before the first
// day or after 31 December 9999) is Broken, with the text that a spreadsheet shows, else its digits.
//
// A formula without a stored value is Uncomputed. So is every formula of a workbook that says that its formulas
// are to be computed when it is opened: the program that wrote it did not compute them.
//
// Blank rows in between are given, never as hidden; blank rows behind the last filled one are not given.
func newWorkbook(r io.ReaderAt, size int64, o Options, l limits) (Rows, error) {
	p, err := openParts(r, size)
	if err != nil {
		return nil, err
	}
	b, err := readBook(p, l)
	if err != nil {
		return nil, err
	}
	chosen, err := b.choose(o.Sheet)
	if err != nil {
		return nil, err
	}
	s := &sheet{book: b, about: About{Format: Workbook, Sheet: chosen.name, HiddenSheet: chosen.hidden}}
	for _, other := range b.sheets {
		s.about.Sheets = append(s.about.Sheets, other.name)
	}
	if s.styles, err = readStyles(b); err != nil {
		return nil, err
	}
	if s.texts, err = readTexts(b); err != nil {
		return nil, err
	}
	s.layout = readLayout(b, chosen.part)
	if s.part, err = p.open(chosen.part, l.sheet); err != nil {
		return nil, err
	}
	s.about.Merged = s.layout.merged
	s.filled = make([]int, maxSheetColumns+1)
	return s, nil
}

// sheet gives the rows of one sheet.
type sheet struct {
	*part
	book   *book
	styles []style
	texts  *texts
	layout layout
	about  About

	read   int    // number of the row element read last
	given  int    // number of the row given last
	ahead  Row    // row that has been read but not given, unless its line is 0
	widest int    // most columns in a row
	failed error  // what Next returns from now on
	value  []byte // of the cell that is being read
	own    []byte // texts of the row's cells, one behind the other
	pieces []piece
	filled []int // row in which each column was filled last
}

// Next gives the next row, with blank ones for rows that the workbook leaves out.
func (s *sheet) Next(row *Row) error {
	if s.ahead.Line == 0 {
		if s.failed == nil {
			s.failed = s.readRow()
		}
		if s.failed != nil {
			return s.failed
		}
	}
	if next := s.given + 1; next < s.ahead.Line {
		s.given = next
		*row = Row{Line: next, Last: next, Cells: row.Cells[:0]}
		return nil
	}
	*row, s.ahead = s.ahead, Row{Cells: row.Cells[:0]}
	s.given = max(s.given, row.Line)
	s.widest = max(s.widest, len(row.Cells))
	return nil
}

// About tells of the sheet. Hidden columns are those up to the widest row read so far.
func (s *sheet) About() About {
	a := s.about
	n, _ := slices.BinarySearch(s.layout.hidden, s.widest+1)
	a.HiddenCols = s.layout.hidden[:n]
	return a
}

// Close closes the part. What is wrong with it, Next has told.
func (s *sheet) Close() error {
	_ = s.file.Close()
	return nil
}

// damage is the fault of a sheet that cannot be read on.
func (s *sheet) damage(err error) error {
	if f, ok := errors.AsType[*Fault](err); ok {
		return f
	}
	if s.read == 0 {
		return faultf(saveAnew, "the sheet cannot be read: %s", reason(err))
	}
	f := faultf(saveAnew, "the sheet cannot be read beyond row %d: %s", s.read, reason(err))
	f.Line = s.read
	return f
}
