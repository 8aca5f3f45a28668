package draft

import (
	"fmt"
	"regexp"
	"strconv"
	"strings"
	"unicode"
)

var bare = regexp.MustCompile(`^[A-Za-z][A-Za-z0-9_]*([ ./-][A-Za-z0-9_]+)*$`)

// reserved are the plain words that YAML may read as something else than text.
var reserved = words("y n yes no true false on off null nan inf")

// quote writes a text as YAML reads it back, without quotes where none are needed.
func quote(s string) string {
	if bare.MatchString(s) && !reserved[strings.ToLower(s)] {
		return s
	}
	var b strings.Builder
	b.WriteByte('"')
	for _, r := range s {
		switch {
		case r == '"' || r == '\\':
			b.WriteByte('\\')
			b.WriteRune(r)
		case r == '\n':
			b.WriteString(`\n`)
		case r == '\t':
			b.WriteString(`\t`)
		case unicode.IsPrint(r) && r != 0xfeff && r != unicode.ReplacementChar:
			b.WriteRune(r)
		case r <= 0xffff:
			fmt.Fprintf(&b, `\u%04x`, r)
		default:
			fmt.Fprintf(&b, `\U%08x`, r)
		}
	}
	b.WriteByte('"')
	return b.String()
}

// clean gives a text that can stand in a comment.
func clean(s string) string {
	return strings.Map(func(r rune) rune {
		if !unicode.IsPrint(r) {
			return ' '
		}
		return r
	}, s)
}

// isComment says whether a line of a map is a comment.
func isComment(line string) bool { return strings.HasPrefix(strings.TrimSpace(line), "#") }

// allComments says whether none of the lines is read.
func allComments(lines []string) bool {
	for _, l := range lines {
		if !isComment(l) {
			return false
		}
	}
	return true
}

// sectionOf writes lines under a key. If all of them are comments, so is the key.
func sectionOf(key string, lines []string) []string {
	if len(lines) == 0 {
		return nil
	}
	if allComments(lines) {
		key = "# " + key
	}
	return append([]string{key}, lines...)
}

// section writes a top section with its lines set in.
func section(key string, lines []string) []string {
	return sectionOf(key, indent(lines, "  "))
}

func indent(lines []string, by string) []string {
	out := make([]string, len(lines))
	for i, l := range lines {
		out[i] = by + l
	}
	return out
}

// asComments makes comments of lines, so that taking the signs away gives lines that can be read.
func asComments(lines []string) []string {
	return indent(lines, "# ")
}

// source gives how a map names the column: by its name, or by its place where the name does not do.
func (c *column) source() string {
	if c.index == 0 {
		return "above: " + quote(c.name)
	}
	if c.name == "" || c.double {
		return fmt.Sprintf("position: %d", c.index)
	}
	return "column: " + quote(c.name)
}

// remark is what stands behind a proposal.
func (c *column) remark() string {
	parts := []string{c.sure.String() + ": " + c.why}
	if c.double {
		parts = append(parts, "several columns are named "+strconv.Quote(clean(c.name)))
	}
	return clean(strings.Join(append(parts, c.notes...), "; "))
}

// lines writes the field of a column.
func (c *column) lines() []string {
	var out []string
	source := c.source()
	if name, ok := strings.CutPrefix(source, "column: "); ok && len(c.extras) == 0 {
		out = []string{c.field + ": " + name + " # " + c.remark()}
	} else {
		out = append([]string{c.field + ": # " + c.remark(), "  " + source}, indent(c.extras, "  ")...)
	}
	if c.off {
		return asComments(out)
	}
	return out
}

// rowList names rows.
func rowList(rows []int) string {
	var names []string
	for i, r := range rows {
		if i == maxNamed {
			names = append(names, "and more")
			break
		}
		names = append(names, strconv.Itoa(r))
	}
	word := "rows "
	if len(rows) == 1 {
		word = "row "
	}
	return word + strings.Join(names, ", ")
}
