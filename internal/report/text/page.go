package text

import (
	"bufio"
	"io"
	"strings"
)

const defaultWidth = 80

// page writes lines of a certain width. The first error of the writer stays with the buffer.
type page struct {
	w      *bufio.Writer
	width  int
	colour bool
}

func newPage(w io.Writer, width int, colour bool) *page {
	if width <= 0 {
		width = defaultWidth
	}
	return &page{bufio.NewWriter(w), max(width, 40), colour}
}

func (p *page) flush() error { return p.w.Flush() }

func (p *page) blank() { p.w.WriteByte('\n') }

// raw writes a line as it is, without blanks at its end.
func (p *page) raw(s string) {
	p.w.WriteString(strings.TrimRight(s, " "))
	p.w.WriteByte('\n')
}

// para writes a text, wrapped: the first line after indent blanks, the others after hang.
func (p *page) para(indent, hang int, s string) {
	first := true
	p.eachLine(hang, indent, s, func(line string) {
		n := hang
		if first {
			n, first = indent, false
		}
		p.raw(strings.Repeat(" ", n) + line)
	})
}

// eachLine wraps s so that every line fits beside the larger of both indents.
func (p *page) eachLine(hang, indent int, s string, f func(string)) {
	for _, line := range wrap(s, p.width-max(hang, indent)) {
		f(line)
	}
}

// item writes a text behind a mark such as "- " or "1. ".
func (p *page) item(indent int, mark, s string) {
	first := true
	hang := indent + cells(mark)
	p.eachLine(hang, hang, s, func(line string) {
		if first {
			first = false
			p.raw(strings.Repeat(" ", indent) + mark + line)
			return
		}
		p.raw(strings.Repeat(" ", hang) + line)
	})
}

const (
	bold   = "1"
	red    = "1;31"
	yellow = "1;33"
)

// heading writes a heading after a blank line. Colour only repeats what the words say.
func (p *page) heading(colour, s string) {
	p.blank()
	for _, line := range wrap(s, p.width) {
		if p.colour {
			line = "\x1b[" + colour + "m" + line + "\x1b[0m"
		}
		p.raw(line)
	}
}

// sentence closes a text with a full stop, if it has none.
func sentence(s string) string {
	s = strings.TrimSpace(s)
	if s == "" || strings.ContainsAny(s[len(s)-1:], ".!?") {
		return s
	}
	return s + "."
}

// upper writes the first letter as a capital.
func upper(s string) string {
	for i, c := range s {
		return strings.ToUpper(string(c)) + s[i+len(string(c)):]
	}
	return s
}
