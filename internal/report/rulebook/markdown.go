package rulebook

import (
	"bufio"
	"io"
	"regexp"
	"strings"

	"hearduty/internal/report/phrase"
)

// Markdown writes the book in Markdown as most programs show it, tables among it.
func (b *Book) Markdown(w io.Writer) error {
	out := &markdown{w: bufio.NewWriter(w)}
	out.line("# " + escape(b.Title))
	out.rows(b.Head)
	for i := range b.Sections {
		out.section(&b.Sections[i], 2)
	}
	return out.w.Flush()
}

type markdown struct{ w *bufio.Writer }

func (m *markdown) line(s string) {
	m.w.WriteString(s)
	m.w.WriteByte('\n')
}

func (m *markdown) blank() { m.w.WriteByte('\n') }

func (m *markdown) section(s *Section, level int) {
	m.blank()
	m.line(strings.Repeat("#", level) + " " + escape(s.Title))
	for _, note := range s.Notes {
		m.blank()
		m.line(escape(note))
	}
	m.rows(s.Rows)
	m.items(s.Items)
	for i := range s.Entries {
		e := &s.Entries[i]
		m.blank()
		m.line(strings.Repeat("#", level+1) + " " + escape(e.Title))
		m.rows(e.Rows)
	}
	m.table(&s.Table)
	for i := range s.Parts {
		m.section(&s.Parts[i], level+1)
	}
}

func (m *markdown) rows(rows []Row) {
	if len(rows) > 0 {
		m.blank()
	}
	for _, r := range rows {
		if len(r.Texts) == 1 {
			m.line("- **" + escape(r.Label) + ":** " + escape(r.Texts[0]))
			continue
		}
		m.line("- **" + escape(r.Label) + ":**")
		for _, text := range r.Texts {
			m.line("  - " + escape(text))
		}
	}
}

func (m *markdown) items(items []string) {
	if len(items) > 0 {
		m.blank()
	}
	for _, item := range items {
		m.line("- " + escape(item))
	}
}

func (m *markdown) table(t *Table) {
	if len(t.Rows) == 0 {
		return
	}
	m.blank()
	cells := make([]string, len(t.Columns))
	for i, c := range t.Columns {
		cells[i] = c.Title
	}
	m.cells(cells)
	m.line("|" + strings.Repeat(" --- |", len(cells)))
	for _, row := range t.Rows {
		m.cells(row)
	}
}

func (m *markdown) cells(cells []string) {
	m.w.WriteByte('|')
	for _, c := range cells {
		m.w.WriteString(" " + strings.TrimSpace(strings.ReplaceAll(escape(c), "|", `\|`)) + " |")
	}
	m.blank()
}

var (
	marks      = regexp.MustCompile("[\\\\`*\\[\\]~]")
	underscore = regexp.MustCompile(`(^|[^\pL\pN])_+|_+([^\pL\pN]|$)`)
	entity     = regexp.MustCompile(`&(#?\w+;)`)
	leading    = regexp.MustCompile(`^([0-9]+)([.)](?: |$))|^([#+=-])`)
)

// escape writes a text so that Markdown shows it as it is, on one line. An underscore within a word needs nothing.
func escape(s string) string {
	s = strings.Join(strings.Fields(phrase.Clean(s)), " ")
	s = marks.ReplaceAllString(s, `\$0`)
	s = underscore.ReplaceAllStringFunc(s, func(found string) string { return strings.ReplaceAll(found, "_", `\_`) })
	s = entity.ReplaceAllString(s, `&amp;$1`)
	s = strings.NewReplacer("<", "&lt;", ">", "&gt;").Replace(s)
	return leading.ReplaceAllString(s, `$1\$2$3`)
}
