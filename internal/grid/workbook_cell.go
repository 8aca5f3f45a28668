package grid

// cell is a cell as it stands in the sheet. Its value is in the buffer of the sheet.
type cell struct {
	col     int
	kind    byte // first letters of its type: n, s shared, t text, b, e, d
	style   int
	formula bool
	fills   bool   // the formula fills other cells, too
	stored  bool   // it has a value, perhaps an empty one
	fault   *Fault // why it cannot be read
}

// startCell reads the attributes of a cell. Without a reference it stands behind the cell before.
func (s *sheet) startCell(before int) cell {
	c := cell{col: before + 1, kind: 'n'}
	for {
		name, value, ok := s.attr()
		if !ok {
			break
		}
		switch string(name) {
		case "r":
			col, row, rest := parseRef(value)
			if row != s.read || len(rest) > 0 {
				c.fault = faultf(saveAnew, "a cell has the place %.20q, which is not in its row", value)
				continue
			}
			c.col = col
		case "s":
			c.style = whole(value, 1<<20)
		case "t":
			switch string(value) {
			case "n", "s", "b", "e", "d":
				c.kind = value[0]
			case "str", "inlineStr":
				c.kind = 't'
			default:
				c.fault = faultf(saveAnew, "a cell has the type %.20q, which no workbook has", value)
			}
		}
	}
	if c.col > maxSheetColumns {
		c.fault = faultf(saveAnew, "a cell stands behind the last column that a sheet can have")
	}
	return c
}

// readValue reads up to the end of the cell.
func (s *sheet) readValue(c *cell) error {
	s.value = s.value[:0]
	for take := false; s.depth() >= 4; {
		t, err := s.next()
		switch {
		case err != nil:
			return err
		case t == characters && take:
			if s.value = append(s.value, s.text...); len(s.value) > maxCellText {
				return errLongText
			}
		case t == endTag:
			take = false
		case t != startTag || s.depth() != 5:
		case string(s.name) == "v":
			take, c.stored = true, true
			s.value = s.value[:0]
		case string(s.name) == "f":
			c.formula = true
			c.fills = s.fillsOthers()
		case string(s.name) == "is":
			c.stored = true
			if s.value, err = s.rich(s.value); err != nil {
				return err
			}
		}
	}
	return nil
}

// fillsOthers tells whether the formula that has just started fills several cells.
func (m *markup) fillsOthers() (is bool) {
	array := false
	for {
		name, value, ok := m.attr()
		if !ok {
			return array && is
		}
		switch string(name) {
		case "t":
			array = string(value) == "array" || string(value) == "dataTable"
		case "ref":
			_, is = parseRange(value)
		}
	}
}
