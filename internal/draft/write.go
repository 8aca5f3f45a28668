package draft

import (
	"fmt"
	"path"
	"strings"

	"hearduty/internal/record"
)

// write gives the text of the map.
func (a *analysis) write() string {
	body := a.body()
	var b strings.Builder
	for _, line := range a.preface() {
		b.WriteString(strings.TrimRight("# "+clean(line), " ") + "\n")
	}
	for _, line := range body {
		b.WriteString(line + "\n")
	}
	return b.String()
}

// preface is the comment on top. It is written last, since all questions must be known.
func (a *analysis) preface() []string {
	looked := rowCount(a.total) + " of data"
	if a.s.cut {
		looked += fmt.Sprintf("; for the dates at all of them, for everything else at the first %d", len(a.data))
	}
	taken := "not known: " + a.kindWhy
	if a.table != nil {
		taken = fmt.Sprintf("%s, %s: %s", a.kind, a.kindSure, a.kindWhy)
	}
	lines := []string{
		"Draft of a map. It is a proposal: nothing is read by it until somebody has corrected it, answered",
		"the questions and named it in the program file.",
		"",
		"File:      " + a.shown,
		"Looked at: " + looked,
		"Taken for: " + taken,
		"",
		"certain: the names or the values say so. likely: look at it. unsure: written as a comment, decide.",
		"",
	}
	if a.isCanonical() {
		lines = append(lines, "The columns are named as in canonical files: if their cells are canonical too, no map is needed for a file named "+a.table.FileName()+".csv.", "")
	}
	if len(a.questions) == 0 {
		return append(lines, "No question is open.")
	}
	lines = append(lines, "Open questions:")
	for i, q := range a.questions {
		lines = append(lines, fmt.Sprintf("%3d. %s", i+1, q))
	}
	return lines
}

// body gives the lines of the map.
func (a *analysis) body() []string {
	lines := []string{"map: " + quote("Draft for "+clean(path.Base(a.shown)))}
	switch {
	case a.table == nil:
		n := a.ask("Which kind of record is a row? No kind fits the columns. The kinds are %s", kindList())
		lines = append(lines, fmt.Sprintf("# kind: ASK # question %d", n))
	case a.kindSure == unsure:
		n := a.ask("Is a row really a record of kind %s? %s", a.kind, sentence(a.kindWhy))
		lines = append(lines, fmt.Sprintf("kind: %s # unsure, question %d", a.kind, n))
	default:
		lines = append(lines, fmt.Sprintf("kind: %s # %s: %s", a.kind, a.kindSure, a.kindWhy))
	}
	lines = append(lines, a.fileLines()...)
	lines = append(lines, section("head:", a.headLines())...)
	lines = append(lines, section("rows:", a.rowLines())...)
	lines = append(lines, section("numbers:", a.decimalSign())...)
	lines = append(lines, section("dates:", a.explainDates())...)
	lines = append(lines, section("fields:", a.fieldLines(""))...)
	lines = append(lines, section("records:", a.partLines())...)
	lines = append(lines, a.rowsOfEars()...)
	lines = append(lines, section("thresholds:", a.explainCodes(a.readCodes()))...)
	lines = append(lines, section("ignore:", a.ignoreLines())...)
	return lines
}

// isCanonical says whether all columns have the names of fields.
func (a *analysis) isCanonical() bool {
	if a.table == nil || a.h.rows != 1 {
		return false
	}
	for _, c := range a.columns {
		if c.index == 0 || a.table.Index(c.name) < 0 {
			return false
		}
	}
	return true
}

func kindList() string {
	var names []string
	for _, k := range record.Kinds() {
		names = append(names, string(k))
	}
	return strings.Join(names, ", ")
}

// sentence gives a text with a capital letter at its beginning.
func sentence(s string) string {
	if s == "" {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}

func quoteAll(list []string) string {
	out := make([]string, len(list))
	for i, s := range list {
		out[i] = quote(s)
	}
	return strings.Join(out, ", ")
}
