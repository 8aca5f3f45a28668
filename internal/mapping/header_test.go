package mapping

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/grid"
)

// TestFind finds columns whatever the blanks in their names are, except where they part numbers.
func TestFind(t *testing.T) {
	row := grid.Row{Line: 1, Last: 1}
	for _, name := range []string{"TEST DATE", "R 1 500", "R1 kHz", "L 0,5k", "Date", "date"} {
		row.Cells = append(row.Cells, grid.Cell{Text: name})
	}
	h := newHeader([]grid.Row{row}, nil)
	for name, want := range map[string][]int{
		"TestDate": {0}, "R1 500": {1}, "R 1kHz": {2}, "L0.5 k": {3}, "Date": {4}, "DATE": {4, 5},
		"R1500": nil, "R 15 00": nil, "L 5k": nil, "L 05k": nil,
	} {
		assert.Equal(t, want, h.find(name), name)
	}
}
