package grid

import (
	"strconv"
	"strings"
)

type look uint8

// What the number format of a cell makes of its number.
const (
	asNumber look = iota
	asDay
	asClock
	asEither // a day from 1 on, a time below: the built-in formats that differ with the language
)

// style is the number format of a cell, as far as it matters for what the number means.
type style struct {
	look  look
	zeros uint8 // the format is made of so many zeros only, such as 000000; 0 or at least 2
}

// readStyles gives the style of each index that cells use.
func readStyles(b *book) ([]style, error) {
	if b.styles == "" {
		return []style{{}}, nil
	}
	own := map[int]style{}
	var out []style
	inCells := false
	err := b.parts.each(b.styles, b.limits.other, func(x *part, name string) error {
		switch {
		case x.depth() == 2:
			inCells = name == "cellXfs"
		case x.depth() == 3 && name == "numFmt":
			id, code := x.format()
			own[id] = parseFormat(code)
		case x.depth() == 3 && name == "xf" && inCells:
			id, _ := x.format()
			s, ok := own[id]
			if !ok {
				s.look = builtIn(id)
			}
			out = append(out, s)
		}
		return nil
	})
	if len(out) == 0 {
		out = []style{{}}
	}
	return out, err
}

func (m *markup) format() (id int, code string) {
	for {
		name, value, ok := m.attr()
		if !ok {
			return id, code
		}
		switch string(name) {
		case "numFmtId":
			id, _ = strconv.Atoi(string(value))
		case "formatCode":
			code = string(value)
		}
	}
}

// builtIn gives the meaning of the formats that have a number only: ECMA-376-1:2016, 18.8.30. Those for Thai
// are in the table there; 34, 35, 55 and 56 are days in Japanese and Korean and times in Chinese.
func builtIn(id int) look {
	switch {
	case id == 34, id == 35, id == 55, id == 56:
		return asEither
	case id >= 18 && id <= 21, id == 32, id == 33, id >= 45 && id <= 47, id >= 75 && id <= 80 && id != 77:
		return asClock
	case id >= 14 && id <= 22, id >= 27 && id <= 36, id >= 50 && id <= 58, id >= 71 && id <= 81:
		return asDay
	}
	return asNumber
}

// parseFormat tells what a format code makes of a number: a day if a part of it shows a day, month or year, a
// time if it shows hours, minutes or seconds only. Letters in quotes, behind a backslash or in brackets do not
// count, but [h], [m] and [s] show a duration. A code with places for digits outside seconds, such as 0 dB
// written without quotes, shows a number.
func parseFormat(code string) style {
	if n := len(code); n >= 2 && n < 100 && strings.Trim(code, "0") == "" {
		return style{zeros: uint8(n)}
	}
	if strings.EqualFold(code, "general") || strings.EqualFold(code, "standard") {
		return style{}
	}
	for section := range strings.SplitSeq(plainFormat(code), ";") {
		if l := lookOf(section); l != asNumber {
			return style{look: l}
		}
	}
	return style{}
}

// lookOf classifies one section of a format code without its literals.
func lookOf(section string) look {
	seconds := strings.IndexByte(section, 's')
	if i := strings.IndexAny(section, "0#?"); i >= 0 && (seconds < 0 || i < seconds) {
		return asNumber
	}
	switch {
	case strings.Contains(section, "["):
		return asClock
	case strings.ContainsAny(section, "dy"), strings.Contains(section, "mmm"):
		return asDay
	case strings.ContainsAny(section, "hs"):
		return asClock
	case strings.Contains(section, "m"):
		return asDay
	}
	return asNumber
}

// plainFormat takes literals, colours, conditions and languages out of a format code and makes it lower case.
// What stays in brackets is [h], [m] or [s].
func plainFormat(code string) string {
	var b strings.Builder
	for i := 0; i < len(code); i++ {
		switch c := code[i]; c {
		case '\\', '_', '*':
			i++
		case '"':
			end := strings.IndexByte(code[i+1:], '"')
			if end < 0 {
				return b.String()
			}
			i += end + 1
		case '[':
			end := strings.IndexByte(code[i:], ']')
			if end < 0 {
				return b.String()
			}
			if in := strings.ToLower(code[i+1 : i+end]); in != "" && strings.Trim(in, in[:1]) == "" && strings.Contains("hms", in[:1]) {
				b.WriteString("[" + in + "]")
			}
			i += end
		default:
			b.WriteString(strings.ToLower(string(c)))
		}
	}
	return strings.ReplaceAll(strings.ReplaceAll(b.String(), "am/pm", "h"), "a/p", "h")
}
