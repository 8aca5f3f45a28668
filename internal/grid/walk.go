package grid

import (
	"encoding/json"
	"strings"
)

// Walker walks over one JSON value.
type Walker struct {
	s  string
	at int
}

// Walk gives a walker at the beginning of the value, which must be valid.
func Walk(valid string) Walker { return Walker{s: valid} }

// Peek passes over blanks and gives the character that follows.
func (w *Walker) Peek() byte {
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

// Text reads a string.
func (w *Walker) Text() string {
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

// Bare reads a number, true, false or null.
func (w *Walker) Bare() string {
	start := w.at
	for w.at < len(w.s) && strings.IndexByte(" \t\n\r,]}", w.s[w.at]) < 0 {
		w.at++
	}
	return w.s[start:w.at]
}

// Skip passes over a value.
func (w *Walker) Skip() {
	for depth := 0; ; {
		switch w.Peek() {
		case '{', '[':
			depth++
			w.at++
		case '}', ']':
			depth--
			w.at++
		case '"':
			w.Text()
		case ',', ':':
			w.at++
			continue
		case 0:
			return
		default:
			w.Bare()
		}
		if depth == 0 {
			return
		}
	}
}

// WalkMembers calls member for each member of an object, with the walker at the member's value, which it
// must read. It ends early if member returns a fault.
func WalkMembers[Fault any](w *Walker, member func(key string) *Fault) *Fault {
	for w.at++; w.Peek() != '}'; {
		if w.Peek() == ',' {
			w.at++
			w.Peek()
		}
		key := w.Text()
		w.Peek()
		w.at++ // the colon
		w.Peek()
		if f := member(key); f != nil {
			return f
		}
	}
	w.at++
	return nil
}

// WalkItems calls item for each item of an array, as WalkMembers does.
func WalkItems[Fault any](w *Walker, item func() *Fault) *Fault {
	for w.at++; w.Peek() != ']'; {
		if w.Peek() == ',' {
			w.at++
			w.Peek()
		}
		if f := item(); f != nil {
			return f
		}
	}
	w.at++
	return nil
}
