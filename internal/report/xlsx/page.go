package xlsx

import (
	"fmt"

	"github.com/xuri/excelize/v2"

	"hearduty/internal/calendar"
)

// page gathers the rows of a sheet that is no table.
type page struct {
	*styles
	widths []float64
	rows   []pageRow
}

// pageRow is a row; the cells from column wide on are merged into one, unless wide is 0.
type pageRow struct {
	cells []any
	wide  int
}

func (p *page) blank() { p.rows = append(p.rows, pageRow{}) }

// across writes a text over the whole width.
func (p *page) across(style int, text string) {
	p.rows = append(p.rows, pageRow{cells: []any{excelize.Cell{StyleID: style, Value: clean(text)}}, wide: 1})
}

func (p *page) heading(text string) {
	p.blank()
	p.across(p.styles.heading, text)
}

// head writes the head of a small table.
func (p *page) head(names ...any) { p.rows = append(p.rows, pageRow{cells: p.heads(names)}) }

// wideHead writes the head of a small table whose last column takes the rest of the width.
func (p *page) wideHead(names ...any) {
	p.rows = append(p.rows, pageRow{cells: p.heads(names), wide: len(names)})
}

// figures is the head of a column of numbers.
type figures string

func (p *page) heads(names []any) []any {
	cells := make([]any, len(names))
	for i, name := range names {
		cells[i] = excelize.Cell{StyleID: p.styles.head, Value: name}
		if text, ok := name.(figures); ok {
			cells[i] = excelize.Cell{StyleID: p.headRight, Value: string(text)}
		}
	}
	return cells
}

// row writes a row of a small table. A text or day at its end takes the rest of the width.
func (p *page) row(values ...any) {
	cells, wide := make([]any, len(values)), 0
	for i, v := range values {
		cells[i] = p.cell(v)
	}
	switch values[len(values)-1].(type) {
	case string, calendar.Date:
		if len(values) < len(p.widths) {
			wide = len(values)
		}
	}
	p.rows = append(p.rows, pageRow{cells, wide})
}

// write writes the rows into a sheet.
func (p *page) write(s *sheet) error {
	for i, row := range p.rows {
		cells := row.cells
		if row.wide > 0 {
			style := cells[row.wide-1].(excelize.Cell).StyleID
			for len(cells) < len(p.widths) {
				cells = append(cells, excelize.Cell{StyleID: style})
			}
			from, err := excelize.CoordinatesToCellName(row.wide, i+1)
			if err != nil {
				return err
			}
			to, err := excelize.CoordinatesToCellName(len(p.widths), i+1)
			if err != nil {
				return err
			}
			if err := s.out.MergeCell(from, to); err != nil {
				return err
			}
		}
		if err := s.put(p.height(row), cells...); err != nil {
			return fmt.Errorf("row %d: %w", i+1, err)
		}
	}
	return nil
}

// height gives the height of a row with its merged cells.
func (p *page) height(row pageRow) float64 {
	lines, line := 1, float64(lineHeight)
	for i, c := range row.cells {
		cell := c.(excelize.Cell)
		width := p.widths[i]
		if i == row.wide-1 {
			for _, w := range p.widths[i+1:] {
				width += w
			}
		}
		switch cell.StyleID {
		case p.title:
			line, width = 22, width*10/titleSize
		case p.styles.heading:
			line = 18
		}
		if text, ok := cell.Value.(string); ok {
			lines = max(lines, linesOf(text, width))
		}
	}
	return min(float64(lines)*line+2, excelize.MaxRowHeight)
}
