package draft

import (
	"strings"

	"hearduty/internal/grid"
)

// isTransposed says whether names of columns stand in the first column: more of them than in any row, which has
// the score, and all rows are about equally long.
func isTransposed(s *sample, score int) bool {
	hits, rows, least, most := map[string]bool{}, 0, sampleCells, 0
	for i := range s.rows {
		name := strings.TrimSpace(cell(&s.rows[i], 0).Text)
		n := filled(&s.rows[i])
		if n == 0 {
			continue
		}
		rows, least, most = rows+1, min(least, n), max(most, n)
		t, isTone := parseTone(name)
		if isTone && t.ear != "" || !isTone && telling(name) && known.knows(name) {
			hits[compact(name)] = true
		}
	}
	return !s.cut && len(hits) >= 3 && len(hits) > score && 2*len(hits) >= rows && most >= 2 && 2*least >= most
}

// transposedHead turns the sample around, so that each further column becomes a row.
func transposedHead(s *sample) head {
	h := head{transposed: true, rows: 1, line: 0}
	width := 0
	for i := range s.rows {
		width = max(width, min(len(s.rows[i].Cells), maxColumns))
	}
	turned := make([]grid.Row, max(width, 1))
	for i := range turned {
		turned[i] = grid.Row{Line: i + 1, Last: i + 1}
		for j := range s.rows {
			turned[i].Cells = append(turned[i].Cells, cell(&s.rows[j], i))
		}
	}
	s.rows = turned
	h.names = namesOf(&s.rows[0])
	return h
}
