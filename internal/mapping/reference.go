package mapping

import (
	"strings"
	"unicode/utf8"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
)

// reference is a column that the map uses, by name or number.
type reference struct {
	names    []string
	position int
	needed   bool   // a record cannot do without it
	field    string // what it is used for
	at       int    // index of the column in its row, once it is found; -1 if the file lacks it
}

func newReference(names []string, position int, field string, needed bool) *reference {
	return &reference{names: names, position: position, field: field, needed: needed, at: position - 1}
}

// of gives the cell of a row.
func (r *reference) of(row *grid.Row) grid.Cell {
	if r.at < 0 || r.at >= len(row.Cells) {
		return grid.Cell{}
	}
	return row.Cells[r.at]
}

// wordSet is a set of words that are compared as in a table of values.
type wordSet struct {
	words *convert.Words
	first [256]bool // bytes with which a text must begin to be one of them
}

// newWordSet makes a set of the words of all lists.
func newWordSet(lists ...[]string) wordSet {
	var s wordSet
	table := map[string]string{}
	for _, list := range lists {
		for _, w := range list {
			table[w] = "listed"
			s.begin(w)
		}
	}
	if len(table) > 0 {
		s.words, _ = convert.NewWords(table) // all mean the same, so that none contradicts another
	}
	return s
}

// begin notes the bytes with which the word can begin. Beyond ASCII, and behind blanks and the sign of a
// formula, the words themselves must be compared.
func (s *wordSet) begin(word string) {
	b := byte(' ')
	if word != "" {
		b = word[0]
	}
	plainly := b > ' ' && b < utf8.RuneSelf && b != '='
	for i := range s.first {
		if !plainly || i <= ' ' || i >= utf8.RuneSelf || i == '=' {
			s.first[i] = true
		}
	}
	if plainly {
		s.first[strings.ToLower(word[:1])[0]], s.first[strings.ToUpper(word[:1])[0]] = true, true
	}
}

// has says whether the text is one of the words.
func (s *wordSet) has(text string) bool {
	if s.words == nil || text != "" && !s.first[text[0]] {
		return false
	}
	_, ok := s.words.Find(grid.Cell{Text: text})
	return ok
}
