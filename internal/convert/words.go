package convert

import (
	"sort"
	"strings"

	"hearduty/internal/grid"
)

// Words finds what a cell means in a table of values. Case, accents, widths and the length of blanks do not
// matter, but signs do: M? is not M, and -1 is not 1.
type Words struct {
	exact map[string]string
	loose map[string]string
}

// NewWords makes the table. Keys that are the same apart from case, accents and blanks but mean different things
// are a problem.
func NewWords(values map[string]string) (*Words, *Problem) {
	w := &Words{exact: values, loose: make(map[string]string, len(values))}
	keys := make([]string, 0, len(values))
	for key := range values {
		keys = append(keys, key)
	}
	sort.Strings(keys)
	first := map[string]string{}
	for _, key := range keys {
		k := wordKey(key)
		if known, ok := first[k]; ok && values[known] != values[key] {
			return nil, problem("the words "+known+" and "+key+" are the same apart from case, accents or blanks, but mean different things",
				"Keep one of them, or give both the same meaning")
		}
		first[k], w.loose[k] = key, values[key]
	}
	return w, nil
}

// Find gives the meaning of a cell. It returns false if the table does not have it.
func (w *Words) Find(c grid.Cell) (string, bool) {
	if unusable(c) != nil {
		return "", false
	}
	if v, ok := w.exact[c.Text]; ok {
		return v, true
	}
	v, ok := w.loose[wordKey(c.Text)]
	return v, ok
}

// wordKey gives the form in which words of a table are compared.
func wordKey(s string) string {
	return strings.Join(strings.Fields(lower(plain(s))), " ")
}
