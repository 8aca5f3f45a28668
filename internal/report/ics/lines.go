package ics

import (
	"bufio"
	"strings"
	"unicode/utf8"

	"hearduty/internal/report/phrase"
)

// lines writes content lines. Errors of writing are kept and told by Flush.
type lines struct{ w *bufio.Writer }

// longest is the number of octets that a line should have at most, without its end (RFC 5545, section 3.1).
const longest = 75

// line writes a property, folded where it is long. No fold cuts a character in two.
func (out *lines) line(name, value string) {
	rest := name + ":" + value
	for room := longest; len(rest) > room; room = longest - 1 {
		cut := room
		for cut > 1 && !utf8.RuneStart(rest[cut]) {
			cut--
		}
		out.w.WriteString(rest[:cut] + "\r\n ")
		rest = rest[cut:]
	}
	out.w.WriteString(rest + "\r\n")
}

var escapes = strings.NewReplacer(`\`, `\\`, ";", `\;`, ",", `\,`)

// text writes a text as a value (RFC 5545, section 3.3.11): on one line, escaped, without control characters.
func text(s string) string { return escapes.Replace(phrase.Clean(s)) }

// paragraphs writes several texts as one value, a line each.
func paragraphs(list []string) string {
	parts := make([]string, len(list))
	for i, s := range list {
		parts[i] = text(s)
	}
	return strings.Join(parts, `\n`)
}
