package record

import (
	"fmt"
	"reflect"
	"strconv"
	"strings"
	"unicode/utf8"

	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
	"hearduty/internal/diag"
)

// Problem says what is wrong with one field of a record. With severity error the row cannot be used;
// with severity warning it is used, and somebody should look.
type Problem struct {
	Severity diag.Severity
	Field    string // column name
	Read     string // what stands in the cell, shortened
	Why      string // one sentence without its full stop
	Remedy   string // what to do, one sentence without its full stop
}

// Error writes "field: why. Remedy."
func (p *Problem) Error() string {
	s := p.Field + ": " + p.Why + "."
	if p.Remedy != "" {
		s += " " + p.Remedy + "."
	}
	return s
}

// The years that a date in a record can have.
const (
	firstYear = 1900
	lastYear  = 2100
)

// Set reads text into the field at index i of r, which must be of the table's kind. Blanks around the
// text, no-break spaces too, do not count; an empty text clears the field. A Problem of severity warning
// means that the field was set nevertheless.
func (t *Table) Set(r Record, i int, text string) *Problem {
	s := t.Setter(r)
	return s.Set(i, text)
}

// Setter sets fields of one record. Setting many is faster than by Table.Set.
type Setter struct {
	table  *Table
	record reflect.Value
	slot   int // of the field set last
	at     any // pointer to it
}

// Setter gives a setter for the fields of r, which must be of the table's kind.
func (t *Table) Setter(r Record) Setter {
	return Setter{table: t, record: reflect.ValueOf(r).Elem(), slot: -1}
}

// Set reads text into the field at index i, as Table.Set does.
func (s *Setter) Set(i int, text string) *Problem {
	f := &s.table.Fields[i]
	text = strings.TrimSpace(text)
	if f.slot != s.slot {
		s.at, s.slot = pointer(s.record, f.slot), f.slot
	}
	switch p := s.at.(type) {
	case *string:
		return f.setText(p, text)
	case *Date:
		return f.setDay(p, text)
	case *Number:
		return f.setNumber(p, text)
	case *Answer:
		return f.setAnswer(p, text)
	case *List:
		return f.setList(p, text)
	case *audiometry.Ear:
		return f.setThreshold(&p[f.element], text)
	case *Threshold:
		return f.setThreshold(p, text)
	case *Octaves:
		return f.setNumber(&p[f.element], text)
	case **Octaves:
		var n Number
		problem := f.setNumber(&n, text)
		if n.Known && *p == nil {
			*p = new(Octaves)
		}
		if *p != nil {
			(*p)[f.element] = n
		}
		return problem
	case **Deviation:
		var n Number
		problem := f.setNumber(&n, text)
		if n.Known && *p == nil {
			*p = new(Deviation)
		}
		if *p != nil {
			(*p)[f.element] = n
		}
		return problem
	}
	return nil
}

func (f *Field) setText(p *string, text string) *Problem {
	*p = ""
	if at := strings.IndexFunc(text, isControl); at >= 0 {
		return f.problem(text, "Write the text without it", "the cell holds the control character %U", text[at])
	}
	if text == "" || f.One == nil {
		*p = text
		return f.unusual(text)
	}
	for _, word := range f.One {
		if strings.EqualFold(word, text) {
			*p = word
			return nil
		}
	}
	if near := diag.Near(text, f.One); near != "" {
		return f.problem(text, "Write "+near+" if that is meant; the words allowed are "+strings.Join(f.One, ", "), "%q is not one of the words allowed here", Shorten(text))
	}
	return f.problem(text, "Write one of "+strings.Join(f.One, ", "), "%q is not one of the words allowed here", Shorten(text))
}

// isControl finds the control characters that no text of a table needs.
func isControl(c rune) bool {
	return c < ' ' && c != '\t' && c != '\n' && c != '\r' || c == 0x7f
}

// unusual warns of a word that is almost one of the vocabulary.
func (f *Field) unusual(word string) *Problem {
	if f.Like == nil || word == "" {
		return nil
	}
	for _, w := range f.Like {
		if w == word {
			return nil
		}
	}
	near := diag.Near(word, f.Like)
	if near == "" {
		return nil
	}
	p := f.problem(word, "Write "+near+" if that is meant; otherwise nothing needs to be done", "%q is not a word that the bundles look for, but %s is", Shorten(word), near)
	p.Severity = diag.Warning
	return p
}

func (f *Field) setDay(p *Date, text string) *Problem {
	*p = 0
	if text == "" {
		return nil
	}
	d, err := calendar.Parse(text)
	if err != nil {
		remedy := "State it as YYYY-MM-DD; the order of day and month is never guessed"
		if len(text) == 10 && text[4] == '-' {
			remedy = "Look up the right date and write it as YYYY-MM-DD"
		}
		return f.problem(text, remedy, "%s", strings.Replace(err.Error(), strconv.Quote(text), strconv.Quote(Shorten(text)), 1))
	}
	if y := d.Year(); y < firstYear || y > lastYear {
		return f.problem(text, "Write the right date, and leave the cell empty if the day is not known or has not come", "the year of %q is outside %d to %d", text, firstYear, lastYear)
	}
	*p = d
	if d.Year() == firstYear {
		problem := f.problem(text, "Leave the cell empty, or name it under blank in the map, if the day is not known", "the day lies in %d, as systems write it where no day is known", firstYear)
		problem.Severity = diag.Warning
		return problem
	}
	return nil
}

func (f *Field) setAnswer(p *Answer, text string) *Problem {
	*p = Unanswered
	switch {
	case text == "":
	case strings.EqualFold(text, "yes"):
		*p = Yes
	case strings.EqualFold(text, "no"):
		*p = No
	default:
		return f.problem(text, "Write yes or no, and leave the cell empty if it is not known", "%q is neither yes nor no", Shorten(text))
	}
	return nil
}

func (f *Field) setList(p *List, text string) *Problem {
	*p = nil
	var warning *Problem
	for text != "" {
		var word string
		word, text, _ = strings.Cut(text, ";")
		word = strings.TrimSpace(word)
		if word == "" {
			continue
		}
		if at := strings.IndexFunc(word, isControl); at >= 0 {
			*p = nil
			return f.problem(word, "Write the text without it", "the cell holds the control character %U", word[at])
		}
		*p = append(*p, word)
		if warning == nil {
			warning = f.unusual(word)
		}
	}
	return warning
}

func (f *Field) setThreshold(p *audiometry.Threshold, text string) *Problem {
	parsed, err := audiometry.ParseThreshold(text)
	*p = parsed
	if err == nil {
		return nil
	}
	why := strings.Replace(err.Error(), strconv.Quote(text), strconv.Quote(Shorten(text)), 1)
	return f.problem(text, "Correct the cell from the original record, or leave it empty if that is lost", "%s", why)
}

func (f *Field) problem(read, remedy, format string, args ...any) *Problem {
	return &Problem{diag.Error, f.Name, Shorten(read), fmt.Sprintf(format, args...), remedy}
}

// shown is the number of characters of a cell that a message repeats.
const shown = 60

// Shorten cuts a text to a length that a message can repeat.
func Shorten(text string) string {
	if utf8.RuneCountInString(text) <= shown {
		return text
	}
	return string([]rune(text)[:shown]) + "…"
}
