package xlsx

import (
	"strings"
	"unicode/utf16"

	"github.com/xuri/excelize/v2"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// A cell holds one of: string, list, int, float64, calendar.Date, finding.Status, blank, blankDay, or nil.
type (
	list     []string // lines of one cell
	blank    struct{} // to be filled in by hand
	blankDay struct{} // to be filled in by hand with a day
)

// cell gives the value its type and look. No value becomes a formula.
func (s *styles) cell(value any) excelize.Cell {
	switch v := value.(type) {
	case string:
		return s.textCell(clean(v))
	case list:
		return s.textCell(clean(v...))
	case int:
		return excelize.Cell{StyleID: s.number, Value: v}
	case float64:
		return excelize.Cell{StyleID: s.percent, Value: v}
	case calendar.Date:
		return s.dayCell(v)
	case finding.Status:
		if id, ok := s.status[v]; ok {
			return excelize.Cell{StyleID: id, Value: string(v)}
		}
		return s.textCell(clean(string(v)))
	case blank:
		return excelize.Cell{StyleID: s.fill}
	case blankDay:
		return excelize.Cell{StyleID: s.fillDay}
	}
	return excelize.Cell{StyleID: s.text}
}

// mostShort is the length of texts that every spreadsheet program shows in a cell formatted as text.
const mostShort = 255

// textCell gives a cell that holds a text. A short one is formatted as text, so that it stays one when somebody
// edits the cell: an id with its zeros, and whatever begins as a formula does.
func (s *styles) textCell(text string) excelize.Cell {
	switch {
	case text == "":
		return excelize.Cell{StyleID: s.text}
	case len(text) > mostShort:
		return excelize.Cell{StyleID: s.long, Value: text}
	}
	return excelize.Cell{StyleID: s.text, Value: text}
}

// serialZero is the day with serial number 0. The count is the same in all spreadsheet programs from firstSerial
// on; before it some have a 29 February 1900.
var (
	serialZero  = calendar.MustParse("1899-12-30")
	firstSerial = calendar.MustParse("1900-03-01")
)

// dayCell gives a cell that holds a day: a day before March 1900 as text, since programs count it differently.
func (s *styles) dayCell(d calendar.Date) excelize.Cell {
	switch {
	case !d.Known():
		return excelize.Cell{StyleID: s.day}
	case d < firstSerial:
		return excelize.Cell{StyleID: s.day, Value: d.String()}
	}
	return excelize.Cell{StyleID: s.day, Value: int(d - serialZero)}
}

// dayOf gives the day that a text holds, or the text.
func dayOf(text string) any {
	if d, err := calendar.Parse(text); err == nil {
		return d
	}
	return text
}

const (
	mostUnits = excelize.TotalCellChars // that a cell can hold, in units of UTF-16
	mostLines = 250                     // of a cell; spreadsheet programs hold 253 line breaks
	cutNote   = "… (cut here: a cell holds no more; the form json has all of it)"
)

// clean makes the text of a cell: what XML cannot hold is replaced, and what a cell cannot hold is cut off
// with a note.
func clean(lines ...string) string {
	var b strings.Builder
	for i, line := range lines {
		switch {
		case i == 0:
		case i < mostLines:
			b.WriteByte('\n')
		default:
			b.WriteString("; ")
		}
		b.WriteString(phrase.Clean(line))
	}
	return cut(b.String(), mostUnits)
}

// cut shortens a text to so many units of UTF-16, with a note at its end.
func cut(text string, most int) string {
	if len(text) <= most {
		return text
	}
	units, keep, fits := 0, 0, most-len(utf16.Encode([]rune(cutNote)))
	for i, c := range text {
		if units <= fits {
			keep = i
		}
		units += utf16.RuneLen(c)
	}
	if units <= most {
		return text
	}
	return text[:keep] + cutNote
}
