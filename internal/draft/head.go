package draft

import (
	"strings"
	"unicode/utf8"

	"hearduty/internal/grid"
)

// head says where the header of an export stands and how its columns are named.
type head struct {
	at         int // index of the first header row in the sample
	rows       int // number of header rows: 0, 1 or 2
	line       int // row of the first, from 1
	transposed bool
	doubtful   bool       // a row stands where a header should, but none of its cells is known
	names      []string   // by column; empty where the name may not be shown
	texts      [][]string // of each header row
	above      []pair
	titles     []int // rows above the header that say nothing that is known
}

// pair is a line above the header with a key and a value.
type pair struct {
	key  string
	cell grid.Cell
	line int
}

const (
	headSearch = 60  // rows among which the header is looked for
	maxColumns = 300 // records of a transposed table
)

// findHead looks for the header.
func findHead(s *sample) head {
	if isObjects(s.about.Format) && len(s.rows) > 0 {
		if !enough(headScore(&s.rows[0]), &s.rows[0]) { // keys may be ids or names of people
			return head{rows: 1, doubtful: true, names: make([]string, len(s.rows[0].Cells))}
		}
		return head{rows: 1, names: namesOf(&s.rows[0])}
	}
	best, bestScore := -1, 0
	for i := range s.rows[:min(len(s.rows), headSearch)] {
		if score := headScore(&s.rows[i]); score > bestScore {
			best, bestScore = i, score
		}
	}
	if best >= 0 && !enough(bestScore, &s.rows[best]) {
		best = -1
	}
	h := head{at: best, rows: 1}
	switch {
	case isTransposed(s, bestScore):
		return transposedHead(s)
	case best < 0:
		return noHead(s)
	case best > 0 && groupsOver(&s.rows[best-1], &s.rows[best]):
		h.at, h.rows = best-1, 2
	case best+1 < len(s.rows) && groupsOver(&s.rows[best], &s.rows[best+1]):
		h.rows = 2
	}
	h.line = s.rows[h.at].Line
	h.names = namesOf(&s.rows[h.at])
	for i := range h.rows {
		h.texts = append(h.texts, namesOf(&s.rows[h.at+i]))
	}
	if h.rows == 2 {
		h.names = joinNames(h.names, namesOf(&s.rows[h.at+1]), merges(s.about.Merged, h.line))
	}
	h.look(s.rows[:h.at])
	return h
}

func isObjects(f grid.Format) bool { return f == grid.JSON || f == grid.Lines || f == grid.YAML }

func namesOf(r *grid.Row) []string {
	names := make([]string, len(r.Cells))
	for i, c := range r.Cells {
		names[i] = strings.TrimSpace(c.Text)
	}
	return names
}

// headScore counts the cells of a row that are names of columns, less those that can be none.
func headScore(r *grid.Row) int {
	score, frequencies := 0, map[int]bool{}
	for _, c := range r.Cells {
		name := strings.TrimSpace(c.Text)
		if name == "" || utf8.RuneCountInString(name) > 80 {
			continue
		}
		t, isTone := parseTone(name)
		_, isNumber := readNumber(c)
		shape, _, _ := shapeOf(c)
		switch {
		case isTone && t.ear != "":
			score++
		case isTone && !t.kilo:
			frequencies[t.hz] = true
		case shape != noDate && shape != serialDay, isNumber:
			score--
		case telling(name) && known.knows(name):
			score++
		}
	}
	if len(frequencies) >= 3 {
		score += len(frequencies)
	}
	return score
}

// telling says whether a name is long enough not to be a code that happens to be known.
func telling(name string) bool {
	key := compact(name)
	return len(key) >= 3
}

// enough says whether a row with this score is a header and no data.
func enough(score int, r *grid.Row) bool {
	n := filled(r)
	return score >= 2 || score == 1 && n == 1
}

// look tells keys with values from titles among the rows above the header.
func (h *head) look(rows []grid.Row) {
	for i := range rows {
		r := &rows[i]
		if filled(r) == 0 {
			continue
		}
		pairs := readPairs(r)
		h.above = append(h.above, pairs...)
		if len(pairs) == 0 {
			h.titles = append(h.titles, r.Line)
		}
	}
}

// readPairs reads a row as keys and values that take turns, or as a key and a value with a colon between them. Only
// keys that are known count.
func readPairs(r *grid.Row) []pair {
	var cells []grid.Cell
	for _, c := range r.Cells {
		if !blank(c) {
			cells = append(cells, c)
		}
	}
	var out []pair
	add := func(key string, c grid.Cell) {
		key = strings.TrimSpace(strings.TrimSuffix(strings.TrimSpace(key), ":"))
		if telling(key) && known.knows(key) {
			out = append(out, pair{key, c, r.Line})
		}
	}
	if key, value, ok := strings.Cut(cells[0].Text, ":"); ok && strings.TrimSpace(value) != "" {
		add(key, grid.Cell{Text: strings.TrimSpace(value)})
		return out
	}
	for ; len(cells) >= 2; cells = cells[2:] {
		add(cells[0].Text, cells[1])
	}
	return out
}

// noHead is the head of an export in which no header was found. If the first row holds words only, it may be one.
func noHead(s *sample) head {
	h := head{}
	for i := range s.rows {
		r := &s.rows[i]
		n := filled(r)
		if n == 0 {
			continue
		}
		h.at, h.line = i, r.Line
		wordsOnly := true
		for _, c := range r.Cells {
			wordsOnly = wordsOnly && (blank(c) || hasLetter(c.Text))
		}
		h.doubtful = wordsOnly && n > 1
		break
	}
	return h
}
