package grid

// layout is what a sheet says of itself before and behind its rows.
type layout struct {
	hidden []int // hidden columns, in order
	merged []Range
	fault  error // what is wrong behind the rows
}

// maxMerged is the most merged ranges that are kept; a table has a few.
const maxMerged = 100_000

// readLayout looks through the whole sheet, since merged cells stand behind the rows but matter to the header.
// What is damaged within the rows is left to their reader, which tells the place.
func readLayout(b *book, name string) layout {
	var l layout
	var hidden [maxSheetColumns + 1]bool
	cols := 0
	l.fault = b.parts.each(name, b.limits.sheet, func(x *part, name string) error {
		switch {
		case x.depth() == 1 && name != "worksheet":
			return faultf(saveAnew, "the sheet has no table: it is a %.40q", name)
		case x.depth() == 2 && name == "sheetData":
			return x.skip()
		case x.depth() == 3 && name == "col" && cols < maxSheetColumns:
			cols++
			x.hide(&hidden)
		case x.depth() == 3 && name == "mergeCell":
			if r, ok := x.merge(); ok && len(l.merged) == maxMerged {
				return faultf("Take merged cells apart where they are not needed", "the sheet has more than %d merged cells", maxMerged)
			} else if ok {
				l.merged = append(l.merged, r)
			}
		}
		return nil
	})
	for i, is := range hidden {
		if is {
			l.hidden = append(l.hidden, i)
		}
	}
	return l
}

// hide takes the columns of a col element.
func (m *markup) hide(hidden *[maxSheetColumns + 1]bool) {
	first, last, is := 0, 0, false
	for {
		name, value, ok := m.attr()
		if !ok {
			break
		}
		switch string(name) {
		case "min":
			first = whole(value, maxSheetColumns)
		case "max":
			last = whole(value, maxSheetColumns)
		case "hidden":
			is = isTrue(value)
		}
	}
	for i := first; is && 0 < i && i <= last; i++ {
		hidden[i] = true
	}
}

// merge takes the range of a mergeCell element. It returns false if it is a single cell or no range.
func (m *markup) merge() (r Range, ok bool) {
	for {
		name, value, more := m.attr()
		if !more {
			return r, ok
		}
		if string(name) == "ref" {
			r, ok = parseRange(value)
		}
	}
}

// parseRange reads a range such as B2:D5. It returns false for a single cell, or if it is no range.
func parseRange(ref []byte) (Range, bool) {
	col, row, rest := parseRef(ref)
	if row == 0 || len(rest) == 0 || rest[0] != ':' {
		return Range{}, false
	}
	lastCol, lastRow, rest := parseRef(rest[1:])
	ok := lastRow >= row && lastCol >= col && len(rest) == 0
	return Range{FirstRow: row, FirstCol: col, LastRow: lastRow, LastCol: lastCol}, ok
}

// parseRef reads the reference of a cell such as B12 and gives what stands behind it. Without a reference to
// a cell of a sheet, column and row are 0.
func parseRef(ref []byte) (col, row int, rest []byte) {
	i := 0
	for ; i < len(ref) && i < 3 && 'A' <= ref[i] && ref[i] <= 'Z'; i++ {
		col = col*26 + int(ref[i]-'A') + 1
	}
	n := i
	for ; n < len(ref) && n < i+8 && '0' <= ref[n] && ref[n] <= '9'; n++ {
	}
	row = whole(ref[i:n], maxSheetRows)
	if row == 0 || col == 0 || col > maxSheetColumns || ref[i] == '0' {
		return 0, 0, ref
	}
	return col, row, ref[n:]
}

// whole reads a whole number from 1 to most. Anything else gives 0.
func whole(digits []byte, most int) int {
	n := 0
	for _, d := range digits {
		if n = n*10 + int(d-'0'); d < '0' || d > '9' || n > most {
			return 0
		}
	}
	return n
}
