package mapping

import (
	"slices"
	"strings"

	"hearduty/internal/grid"
)

// Why rows are no data.
const (
	isHeader   = "header"
	isBlank    = "blank"
	isComment  = "comment"
	isFooter   = "footer"
	isSkipped  = "skipped"
	isHidden   = "hidden"
	isAbove    = "above the header"
	isBehind   = "after the footer"
	isLeftOut  = "left out by the map"
	isNoRecord = "without a record"
)

// selection tells rows that are data from others.
type selection struct {
	head             *header
	skip             []int
	comments, footer []string
	only             []condition
	skipHidden       bool
	ended            bool
}

func newSelection(p *plan, h *header) *selection {
	s := &selection{head: h, only: p.only}
	if r := p.file.Rows; r != nil {
		s.skip, s.comments, s.footer, s.skipHidden = r.Skip, r.Comment, r.Footer, r.Hidden == "skip"
	}
	return s
}

// notData says why a row is no data, or gives an empty text. Rows must be given in order.
func (s *selection) notData(row *grid.Row) string {
	line := row.Line
	switch {
	case row.NotData != "":
		return row.NotData
	case s.head.has(line):
		return isHeader
	case s.ended:
		return isBehind
	case s.skip != nil && slices.Contains(s.skip, line):
		return isSkipped
	case row.Fault != nil && line > s.head.last:
		return ""
	case row.Blank() && row.Fault == nil:
		return isBlank
	case begins(row, s.comments):
		return isComment
	case line < s.head.first:
		return isAbove
	case begins(row, s.footer):
		s.ended = true
		return isFooter
	case s.head.repeated(row):
		return isHeader
	case row.Hidden && s.skipHidden:
		return isHidden
	case s.only != nil && !met(s.only, row):
		return isLeftOut
	}
	return ""
}

// candidate says whether a row may be a header.
func (s *selection) candidate(row *grid.Row) bool {
	return row.Fault == nil && row.NotData == "" && !row.Blank() && !begins(row, s.comments) && !slices.Contains(s.skip, row.Line)
}

// begins says whether the first filled cell begins with one of the texts. Case does not matter.
func begins(row *grid.Row, texts []string) bool {
	if texts == nil {
		return false
	}
	first := ""
	for _, c := range row.Cells {
		if first = strings.TrimSpace(c.Text); first != "" {
			break
		}
	}
	for _, t := range texts {
		t = strings.TrimSpace(t)
		if len(first) >= len(t) && strings.EqualFold(first[:len(t)], t) {
			return true
		}
	}
	return false
}
