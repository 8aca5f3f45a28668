package xlsx

import (
	"strings"

	"github.com/xuri/excelize/v2"

	"hearduty/internal/finding"
)

// The colours are those of the page that the form html writes, on light paper.
const (
	ink, soft, rule, faint, paper = "1c2426", "566063", "d8d5cc", "efede6", "fbfaf7"
)

// colours are the ink and the ground of each status. They only repeat what the word in the cell says.
var colours = map[finding.Status]struct{ ink, ground string }{
	finding.Gap:      {"a8321a", "fbe9e4"},
	finding.Unproven: {"8a5a00", "fbf1dc"},
	finding.Opinion:  {"6b3f8f", "f2eaf7"},
	finding.Due:      {"0b5c94", "e5f0f8"},
	finding.Late:     {"7a4a32", "f4ebe6"},
	finding.Lifted:   {"566063", "efede6"},
	finding.Met:      {"1e6b4f", "e7f3ee"},
}

// styles are the numbers that the file has given to the looks of its cells.
type styles struct {
	title, heading, head, headRight, text, long, plain, note, number, percent, day, fill, fillDay int
	status                                                                                        map[finding.Status]int
}

// titleSize is the size of the letters of the title, in points; all others but headings have 10.
const titleSize = 16

const (
	isoDay = "yyyy-mm-dd" // number format of days
	whole  = 1            // number format of whole numbers, of those that every workbook has
	asText = 49           // number format of texts, of those that every workbook has
)

func newStyles(f *excelize.File) (styles, error) {
	s := styles{status: map[finding.Status]int{}}
	var failed error
	add := func(look excelize.Style) int {
		id, err := f.NewStyle(&look)
		if err != nil && failed == nil {
			failed = err
		}
		return id
	}
	tenth, iso := "0.0", isoDay
	s.title = add(excelize.Style{Font: font(ink, titleSize, true), Alignment: top("left", true)})
	s.heading = add(excelize.Style{Font: font(ink, 12, true), Alignment: top("left", false)})
	s.plain = add(excelize.Style{Font: font(ink, 10, false), Alignment: top("left", true)})
	s.note = add(excelize.Style{Font: font(soft, 10, false), Alignment: top("left", false)})
	s.head = add(excelize.Style{Font: font(ink, 10, true), Alignment: top("left", true), Border: lines, Fill: ground(faint)})
	s.headRight = add(excelize.Style{Font: font(ink, 10, true), Alignment: top("right", true), Border: lines, Fill: ground(faint)})
	s.text = add(excelize.Style{Font: font(ink, 10, false), Alignment: top("left", true), Border: lines, NumFmt: asText})
	s.long = add(excelize.Style{Font: font(ink, 10, false), Alignment: top("left", true), Border: lines})
	s.number = add(excelize.Style{Font: font(ink, 10, false), Alignment: top("right", false), Border: lines, NumFmt: whole})
	s.percent = add(excelize.Style{Font: font(ink, 10, false), Alignment: top("right", false), Border: lines, CustomNumFmt: &tenth})
	s.day = add(excelize.Style{Font: font(ink, 10, false), Alignment: top("left", false), Border: lines, CustomNumFmt: &iso})
	s.fill = add(excelize.Style{Font: font(ink, 10, false), Alignment: top("left", true), Border: lines, NumFmt: asText, Fill: ground(paper)})
	s.fillDay = add(excelize.Style{Font: font(ink, 10, false), Alignment: top("left", false), Border: lines, Fill: ground(paper), CustomNumFmt: &iso})
	for _, status := range finding.Statuses {
		c := colours[status]
		s.status[status] = add(excelize.Style{Font: font(c.ink, 10, true), Alignment: top("left", false), Border: lines, Fill: ground(c.ground)})
	}
	return s, failed
}

func font(colour string, size float64, bold bool) *excelize.Font {
	return &excelize.Font{Family: "Arial", Color: strings.ToUpper(colour), Size: size, Bold: bold}
}

func top(side string, wrap bool) *excelize.Alignment {
	a := excelize.Alignment{Horizontal: side, Vertical: "top", WrapText: wrap}
	if side == "right" {
		a.Indent = 1
	}
	return &a
}

func ground(colour string) excelize.Fill {
	return excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{strings.ToUpper(colour)}}
}

// lines are thin lines around a cell.
var lines = []excelize.Border{
	{Type: "left", Color: strings.ToUpper(rule), Style: 1}, {Type: "right", Color: strings.ToUpper(rule), Style: 1},
	{Type: "top", Color: strings.ToUpper(rule), Style: 1}, {Type: "bottom", Color: strings.ToUpper(rule), Style: 1},
}
