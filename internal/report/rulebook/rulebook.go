// Package rulebook makes of a bundle a book that a reader who does not program can follow: what is asked, of whom, when
// and by which paragraph, with the numbers in force on a day. The book is one neutral value; it is written as text
// (package text) and as Markdown (here), so that both say the same.
package rulebook

import (
	"slices"

	"gopkg.in/yaml.v3"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
)

// FileName is the name of the Markdown form in a bundle's folder.
const FileName = "BOOK.md"

// Forms lists the names of the forms, the default first.
var Forms = []string{"text", "markdown"}

// Book is a bundle in words.
type Book struct {
	Title    string
	Head     []Row
	Sections []Section
}

// Section is a part of the book under a heading. What it holds stands in this order.
type Section struct {
	Title   string
	Doubt   bool // whether it tells what was not checked
	Notes   []string
	Rows    []Row
	Items   []string
	Entries []Entry
	Table   Table
	Parts   []Section
}

// Entry is one thing with a title and rows that say something of it.
type Entry struct {
	Title string
	Rows  []Row
}

// Row is a label with one or several texts.
type Row struct {
	Label string
	Texts []string
}

// Table holds rows of equal length. A table of figures has short cells only, which stand below each other in text, too.
type Table struct {
	Figures bool
	Columns []Column
	Rows    [][]string
}

// pruned leaves out the columns of which every cell is empty.
func (t Table) pruned() Table {
	out := Table{Figures: t.Figures, Rows: make([][]string, len(t.Rows))}
	for i, c := range t.Columns {
		if !slices.ContainsFunc(t.Rows, func(cells []string) bool { return cells[i] != "" }) {
			continue
		}
		out.Columns = append(out.Columns, c)
		for j, cells := range t.Rows {
			out.Rows[j] = append(out.Rows[j], cells[i])
		}
	}
	return out
}

// Column is a column of a table. Where the table is written as running text, each cell becomes a sentence behind the
// lead.
type Column struct{ Title, Lead string }

// maker holds what all parts of the book are made from.
type maker struct {
	*bundle.Bundle
	day   calendar.Date
	rules map[string]*rule                // of the duties, by id
	names map[string]map[string]yaml.Node // what the data files of the bundle and of those that it extends hold, by path
}

// Of makes the book of a bundle with the numbers in force on a day.
func Of(b *bundle.Bundle, day calendar.Date) *Book {
	return compose(b, day, rows(row("Signature", otherwise(signatures, b.Signature)), row("SHA-256", b.SHA256))...)
}

// Kept makes the book that is kept in the bundle's folder. It has the numbers in force on the day on which the bundle was
// last checked, so that it is the same on every day, and no digest, which every remark in a rule would change.
func Kept(b *bundle.Bundle) (*Book, error) {
	day, err := calendar.Parse(b.About.CheckedOn)
	if err != nil {
		return nil, err
	}
	return compose(b, day), nil
}

func compose(b *bundle.Bundle, day calendar.Date, more ...Row) *Book {
	m := &maker{b, day, map[string]*rule{}, map[string]map[string]yaml.Node{}}
	for _, d := range b.Duties {
		m.rules[d.ID] = readRule(d)
	}
	book := &Book{Title: b.About.Title, Head: append(m.head(), more...)}
	for _, s := range []Section{
		m.texts(), m.cautions(), m.looser(), m.duties(), m.choices(), m.parameters(), m.exposure(), m.hearing(), m.protection(),
		m.otherMeasures(), m.paragraphs(), m.readings(), m.doubts(),
	} {
		if !s.empty() {
			book.Sections = append(book.Sections, s)
		}
	}
	return book
}

func (s *Section) empty() bool {
	return len(s.Notes)+len(s.Rows)+len(s.Items)+len(s.Entries)+len(s.Table.Rows)+len(s.Parts) == 0
}

// rows keeps those that say something.
func rows(list ...Row) []Row {
	out := []Row{}
	for _, r := range list {
		texts := []string{}
		for _, t := range r.Texts {
			if t != "" {
				texts = append(texts, t)
			}
		}
		if len(texts) > 0 {
			out = append(out, Row{r.Label, texts})
		}
	}
	return out
}

func row(label string, texts ...string) Row { return Row{label, texts} }
