package draft

import (
	"fmt"
	"strings"
	"unicode"

	"hearduty/internal/grid"
)

// groupsOver says whether the row above names ears, or baseline and current test, for the frequencies below. Below may
// stand nothing else than frequencies, each once in a group, names that are known, and fewer plain words: a row of data
// is no header.
func groupsOver(above, below *grid.Row) bool {
	groups, tones, words, kilo := 0, 0, 0, map[int]bool{}
	seen := map[string]bool{}
	for i := range max(len(above.Cells), len(below.Cells)) {
		if isGroup(cell(above, i).Text) {
			groups++
			clear(seen)
		}
		name := strings.TrimSpace(cell(below, i).Text)
		t, isTone := parseTone(name)
		switch {
		case name == "":
		case isTone:
			key := fmt.Sprint(t.ear, t.part, t.hz, t.reading)
			if groups > 0 && seen[key] {
				return false
			}
			seen[key] = true
			tones++
			if t.kilo {
				kilo[t.hz] = true
			}
		case telling(name) && known.knows(name):
		case !plainWords(name):
			return false
		default:
			words++
		}
	}
	return groups > 0 && tones >= 3 && words < tones && (len(kilo) == 0 || kilo[2000] && kilo[3000] && kilo[4000])
}

// plainWords says whether a text is a few words without a digit, as names of columns are and ids and dates are not.
func plainWords(text string) bool {
	return hasLetter(text) && !strings.ContainsFunc(text, unicode.IsDigit) && len([]rune(text)) <= 40
}

// isGroup says whether a text is a word for an ear or for one of several tests, and nothing else.
func isGroup(text string) bool {
	var t tone
	list := tokens(text)
	ok := len(list) > 0 && len(list) < 8
	for _, w := range list {
		ok = ok && !w.number && t.words(w.text)
	}
	return ok && (t.ear != "" || t.part != "")
}
