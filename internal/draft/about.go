package draft

import (
	"fmt"
	"strings"

	"hearduty/internal/grid"
)

// fileLines writes format, code page, delimiter and sheet.
func (a *analysis) fileLines() []string {
	about := a.s.about
	lines := []string{"format: " + string(about.Format)}
	switch {
	case a.guessed:
		n := a.ask("Is the text in the code page %s? It is no UTF-8; read so, its letters look best. Look at names with accents", a.open.Encoding)
		lines = append(lines, fmt.Sprintf("encoding: %s # likely, question %d", a.open.Encoding, n))
	case a.o.Encoding != "" && about.Format != grid.Workbook:
		lines = append(lines, "encoding: "+quote(a.o.Encoding)+" # as stated")
	case about.Encoding != "" && about.Format == grid.Delimited:
		lines = append(lines, "# encoding: "+clean(about.Encoding)+" is recognized")
	}
	if about.Replaced > 0 {
		a.ask("In which code page is the text? %d bytes do not fit, the first in line %d", about.Replaced, about.FirstReplace)
	}
	if about.Format == grid.Delimited {
		names := map[byte]string{',': `","`, ';': `";"`, '\t': "tab", '|': "pipe"}
		if name := names[about.Delimiter]; name != "" {
			lines = append(lines, "delimiter: "+name)
		}
	}
	if about.Format == grid.Workbook && (len(about.Sheets) > 1 || about.HiddenSheet) {
		lines = append(lines, "sheet: "+quote(about.Sheet)+" # of "+several(len(about.Sheets), "sheet"))
	}
	if len(about.HiddenCols) > 0 {
		lines = append(lines, "# hidden on the sheet: "+several(len(about.HiddenCols), "column")+"; they are read like the others")
	}
	return lines
}

// headLines writes where the header stands.
func (a *analysis) headLines() []string {
	h := a.h
	switch {
	case isObjects(a.s.about.Format):
		return nil
	case h.transposed:
		return []string{"transposed: true # likely: names stand in the first column"}
	case h.rows == 0 && h.doubtful:
		n := a.ask("Is row %d the header? None of its cells is a known name, so the draft names columns by their place and repeats no cell of it", h.line)
		return []string{fmt.Sprintf("row: %d # unsure, question %d: or none: true", h.line, n)}
	case h.rows == 0:
		return []string{"none: true # likely: no row of known names was found; columns are named by their place"}
	}
	lines := []string{fmt.Sprintf("row: %d", h.line)}
	if h.rows == 2 {
		lines = append(lines, "rows: 2 # certain: the upper row has ears or tests, the lower one frequencies")
	}
	if len(h.above) > 0 {
		lines = append(lines, "above: key_value")
	}
	unused := ""
	for _, c := range a.columns {
		if c.index == 0 && c.field == "" {
			unused = join(unused, c.shown())
		}
	}
	if unused != "" {
		lines = append(lines, "# keys above it that no field is taken from: "+clean(unused))
	}
	if len(h.titles) > 0 {
		lines = append(lines, "# "+rowList(h.titles)+" above it: titles or keys that are not known")
	}
	return lines
}

// rowLines writes which rows are no data.
func (a *analysis) rowLines() []string {
	o := &a.odd
	var lines, comments []string
	for _, sign := range []string{"#", "//"} {
		if n := o.comments[sign]; n > 0 {
			comments = append(comments, quote(sign))
		}
	}
	for _, w := range o.sortedWords(true) {
		comments = append(comments, quote(w))
		lines = append(lines, fmt.Sprintf("# %q begins %s, with data behind", clean(w), rowList(o.words[w])))
	}
	if len(comments) > 0 {
		lines = append(lines, "comment: ["+strings.Join(comments, ", ")+"] # likely")
	}
	var footers []string
	for _, w := range o.sortedWords(false) {
		footers = append(footers, quote(w))
	}
	if len(footers) > 0 {
		lines = append(lines, "footer: ["+strings.Join(footers, ", ")+"] # likely: no data stand behind")
	}
	if len(o.repeats) > 0 {
		lines = append(lines, "# the header stands again in "+rowList(o.repeats)+"; repeated headers are no data")
	}
	if len(o.few) > 0 {
		n := a.ask("Are the %s data? They have one or two cells only", rowList(o.few))
		lines = append(lines, fmt.Sprintf("# question %d: %s; skip, comment or footer can pass over them", n, rowList(o.few)))
	}
	if o.hidden > 0 {
		n := a.ask("Are hidden rows of the workbook data? It has %s; they are read unless the map skips them", several(o.hidden, "hidden row"))
		lines = append(lines, fmt.Sprintf("# hidden: skip # question %d", n))
	}
	if len(a.s.bad) > 0 {
		a.ask("Some rows cannot be read (%s); look at them in the file", rowList(a.s.bad))
	}
	return lines
}
