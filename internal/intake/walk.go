package intake

import (
	"encoding/json"
	"strings"
)

// walker walks over one JSON value that is known to be valid.
type walker struct {
	s  string
	at int
}

// peek passes over blanks and gives the character that follows.
func (w *walker) peek() byte {
	for w.at < len(w.s) {
		switch c := w.s[w.at]; c {
		case ' ', '\t', '\n', '\r':
			w.at++
		default:
			return c
		}
	}
	return 0
}

// text reads a string.
func (w *walker) text() string {
	start, escaped := w.at, false
	for w.at++; w.at < len(w.s) && w.s[w.at] != '"'; w.at++ {
		if w.s[w.at] == '\\' {
			escaped = true
			w.at++
		}
	}
	w.at++
	if !escaped {
		return w.s[start+1 : w.at-1]
	}
	var text string
	_ = json.Unmarshal([]byte(w.s[start:w.at]), &text) // the value is valid
	return text
}

// bare reads a number, true, false or null.
func (w *walker) bare() string {
	start := w.at
	for w.at < len(w.s) && strings.IndexByte(" \t\n\r,]}", w.s[w.at]) < 0 {
		w.at++
	}
	return w.s[start:w.at]
}

// skip passes over a value.
func (w *walker) skip() {
	for depth := 0; ; {
		switch w.peek() {
		case '{', '[':
			depth++
			w.at++
		case '}', ']':
			depth--
			w.at++
		case '"':
			w.text()
		case ',', ':':
			w.at++
			continue
		case 0:
			return
		default:
			w.bare()
		}
		if depth == 0 {
			return
		}
	}
}

// members calls member for each member of an object, with the walker at the member's value, which it
// must read. It ends early if member returns a fault.
func (w *walker) members(member func(key string) *fault) *fault {
	for w.at++; w.peek() != '}'; {
		if w.peek() == ',' {
			w.at++
			w.peek()
		}
		key := w.text()
		w.peek()
		w.at++ // the colon
		w.peek()
		if f := member(key); f != nil {
			return f
		}
	}
	w.at++
	return nil
}

// items calls item for each item of an array, as members does.
func (w *walker) items(item func() *fault) *fault {
	for w.at++; w.peek() != ']'; {
		if w.peek() == ',' {
			w.at++
			w.peek()
		}
		if f := item(); f != nil {
			return f
		}
	}
	w.at++
	return nil
}
