package text

import (
	"io"
	"strings"

	"hearduty/internal/report/rulebook"
)

// Book writes the book of a bundle.
func Book(w io.Writer, b *rulebook.Book, o Format) error {
	p := newPage(w, o.Width, o.Colour)
	p.para(0, 2, b.Title)
	p.blank()
	bookRows(p, 0, b.Head)
	for i := range b.Sections {
		bookSection(p, &b.Sections[i], 0)
	}
	return p.flush()
}

// bookSection writes a section. What stands under the heading of a part is set in by as much as the part itself.
func bookSection(p *page, s *rulebook.Section, depth int) {
	colour := bold
	if s.Doubt {
		colour = yellow
	}
	if depth == 0 {
		p.heading(colour, s.Title)
		p.raw(strings.Repeat("-", min(cells(s.Title), p.width)))
	} else {
		p.heading(colour, s.Title)
	}
	for _, note := range s.Notes {
		p.para(0, 0, note)
	}
	bookRows(p, 0, s.Rows)
	for _, item := range s.Items {
		p.item(0, "- ", item)
	}
	for _, e := range s.Entries {
		p.blank()
		p.para(2, 4, e.Title)
		bookRows(p, 4, e.Rows)
	}
	bookTable(p, &s.Table)
	for i := range s.Parts {
		bookSection(p, &s.Parts[i], depth+1)
	}
}

// bookRows writes each row as its label and its text, several texts as items.
func bookRows(p *page, indent int, rows []rulebook.Row) {
	for _, r := range rows {
		if len(r.Texts) == 1 {
			p.para(indent, indent+2, r.Label+": "+r.Texts[0])
			continue
		}
		p.para(indent, indent+2, r.Label+":")
		for _, text := range r.Texts {
			p.item(indent+2, "- ", text)
		}
	}
}

// bookTable writes each row of a table as running text: the first two cells as a title, the others as sentences. Only
// figures stand below each other.
func bookTable(p *page, t *rulebook.Table) {
	if t.Figures {
		bookFigures(p, t)
		return
	}
	for _, cells := range t.Rows {
		p.para(2, 4, cells[0]+": "+cells[1])
		var sentences []string
		for i := 2; i < len(cells); i++ {
			if cells[i] != "" {
				sentences = append(sentences, sentence(upper(t.Columns[i].Lead+cells[i])))
			}
		}
		p.para(4, 4, strings.Join(sentences, " "))
	}
}

func bookFigures(p *page, t *rulebook.Table) {
	line := func(cells []string) {
		s := ""
		for i, cell := range cells {
			s += "  " + padLeft(cell, cellWidth(t, i))
		}
		p.raw(s)
	}
	heads := make([]string, len(t.Columns))
	for i, c := range t.Columns {
		heads[i] = c.Title
	}
	line(heads)
	for _, row := range t.Rows {
		line(row)
	}
}

// cellWidth gives the columns that the widest cell of a table's column takes.
func cellWidth(t *rulebook.Table, column int) int {
	n := cells(t.Columns[column].Title)
	for _, row := range t.Rows {
		n = max(n, cells(row[column]))
	}
	return n
}
