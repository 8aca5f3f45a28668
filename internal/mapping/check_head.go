package mapping

import (
	"slices"
	"strconv"

	"hearduty/internal/convert"
)

// head looks at where the header is said to be.
func (c *checker) head() {
	h := c.f.Head
	if h == nil {
		return
	}
	const one = "Remove one of the two"
	switch f := c.f.Format; {
	case f == "json" || f == "lines" || f == "yaml":
		c.sayKey("/head", "Remove the key; columns are named as the keys of the objects", "a list of objects has no header")
	case h.None && (h.Row > 0 || h.Rows > 0):
		c.sayKey("/head/none", one, "the map says that there is no header, and where it stands")
	case h.None && h.Above != "":
		c.sayKey("/head/above", one, "without a header, no lines stand above it")
	case h.Transposed && (h.Row > 0 || h.Rows > 0 || h.None || h.Above != ""):
		c.sayKey("/head/transposed", "Remove the other keys under head", "in a transposed table the names stand in the first column, so that no other header can be described")
	}
}

// rows looks at which rows are said to be data.
func (c *checker) rows() {
	r := c.f.Rows
	if r == nil {
		return
	}
	c.conditions("/rows/only", r.Only)
	if h := c.f.Head; h != nil && h.Row > 0 && slices.Contains(r.Skip, h.Row) {
		c.say("/rows/skip", "Take it out of skip, or correct head.row", "row %d is said to be the header and to be passed over", h.Row)
	}
	if r.Hidden != "" && c.f.Format != "" && c.f.Format != "workbook" {
		c.sayKey("/rows/hidden", "Remove the key, or correct the format", "only a workbook has hidden rows")
	}
}

// conditions looks at the conditions in the list at a pointer.
func (c *checker) conditions(pointer string, list []Condition) {
	for i, w := range list {
		at := pointer + "/" + strconv.Itoa(i)
		c.place(at, names(w.Column), w.Position)
		if w.Is == nil && w.IsNot == nil && w.Filled == nil {
			c.say(at, "Write is, is_not or filled", "the condition does not say what the cell must be")
		}
	}
}

// names makes a list of a name that may be missing.
func names(name string) []string {
	if name == "" {
		return nil
	}
	return []string{name}
}

// place looks at a column that is named or numbered.
func (c *checker) place(pointer string, names []string, position int) {
	for _, name := range names {
		c.used[convert.Fold(name)] = true
	}
	switch named := len(names) > 0; {
	case named == (position > 0):
		c.say(pointer, "Write either column with a name, or position with a number", "exactly one of column and position is needed")
	case named && c.f.Head != nil && c.f.Head.None:
		c.say(pointer, "Write position with the number of the column", "a column is named, but the map says that there is no header")
	}
}
