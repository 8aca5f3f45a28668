package draft

import (
	"fmt"
	"strings"

	"hearduty/internal/record"
)

// ignoreLines lists the columns that are not wanted, and as comments those that somebody must decide about.
func (a *analysis) ignoreLines() []string {
	var lines, open []string
	names := ""
	for _, c := range a.columns {
		switch {
		case c == a.ear || c == a.frequency || c == a.level || c.field != "" || c.index == 0:
		case c.ignore != "" && c.name != "" && !c.double:
			lines = append(lines, fmt.Sprintf("- %s # %s", quote(c.name), clean(c.ignore)))
		case c.ignore != "" && c.name == "" && c.p.filled == 0:
		case c.ignore != "":
			lines = append(lines, fmt.Sprintf("# %s: %s", c.shown(), clean(c.ignore)))
		default:
			names = join(names, c.shown())
			open = append(open, a.openColumn(c)...)
		}
	}
	if names != "" {
		n := a.ask("What are the columns for which nothing is proposed: %s? Each becomes a field, or stands under ignore", names)
		lines = append(lines, fmt.Sprintf("# unsure, question %d:", n))
		lines = append(lines, open...)
	}
	return lines
}

// openColumn describes a column for which nothing is proposed. Its cells are not shown.
func (a *analysis) openColumn(c *column) []string {
	what := c.describe()
	if c.why != "" && c.why != "nothing is known of it" {
		what += "; " + c.why
	}
	if list := a.candidates(c); list != "" {
		what += "; it may be " + list
	}
	if c.name == "" || c.double {
		return []string{fmt.Sprintf("# column %d: %s", c.index, clean(what))}
	}
	return []string{fmt.Sprintf("# - %s # %s", quote(c.name), clean(what))}
}

// describe says what the cells of a column are like, without showing any.
func (c *column) describe() string {
	p := c.p
	switch {
	case p.filled == 0 && p.broken+p.uncomputed > 0:
		return several(p.broken+p.uncomputed, "cell") + " with an error or a formula without its value"
	case p.filled == 0:
		return "no cell filled"
	case p.dates() == p.filled:
		return several(p.filled, "date")
	case p.numbers == p.filled:
		return several(p.filled, "number")
	case p.clocks+p.fixed == p.filled:
		return several(p.filled, "time")
	case !p.many:
		return fmt.Sprintf("%s, %d different", several(p.filled, "text"), p.distinct())
	}
	return fmt.Sprintf("%s, more than %d different", several(p.filled, "text"), maxDistinct)
}

// candidates lists fields that hold what the column holds and have no column yet.
func (a *analysis) candidates(c *column) string {
	if a.table == nil || c.p.filled == 0 {
		return ""
	}
	want := record.Text
	switch {
	case c.p.dates() == c.p.filled:
		want = record.Day
	case c.p.numbers == c.p.filled && c.p.zeros == 0:
		want = record.Decimal
	case c.p.dates()+c.p.numbers > 0:
		return ""
	}
	var out []string
	for _, f := range a.table.Fields {
		if f.Type == want && !strings.Contains(f.Name, ".") && !a.proposed(f.Name) {
			out = append(out, f.Name)
		}
	}
	return strings.Join(out, ", ")
}
