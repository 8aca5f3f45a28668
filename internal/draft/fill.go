package draft

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// addAbove makes a column of each key above the header, as if every row had it.
func (a *analysis) addAbove() {
	for _, p := range a.h.above {
		c := &column{name: p.key, rest: p.key, p: newProfile()}
		c.p.add(p.cell, p.line)
		c.dates.Add(grid.Cell{Text: strings.TrimSpace(p.cell.Text), Kind: p.cell.Kind}, p.line)
		a.columns = append(a.columns, c)
	}
}

// fillIn proposes what comes from no column, and asks for what is required and missing.
func (a *analysis) fillIn() {
	a.made = map[string][]string{}
	if a.table == nil {
		return
	}
	for i := range a.table.Fields {
		f := &a.table.Fields[i]
		if !f.Required || a.proposed(f.Name) {
			continue
		}
		switch {
		case f.Name == "audiogram_id" && a.proposed("worker_id"):
			a.made[f.Name] = []string{f.Name + ": {make: [worker_id, date]} # likely: no column has one; two tests of one worker on one day would need another"}
		case f.Name == "measurement_id" && a.maker() != "":
			a.made[f.Name] = []string{f.Name + ": {make: [" + a.maker() + ", date]} # likely: no column has one; rows of several dose channels share it"}
		case a.kind == "measurement" && f.Name == "kind" && a.proposed("worker_id"):
			a.made[f.Name] = []string{"kind: {constant: personal} # likely: a worker wore the instrument"}
		default:
			a.askFor(f)
		}
	}
	a.askForSettings()
}

// maker gives the field that tells measurements of one day apart.
func (a *analysis) maker() string {
	for _, name := range []string{"worker_id", "group", "area", "instrument_id"} {
		if a.proposed(name) {
			return name
		}
	}
	return ""
}

// proposed says whether a column is proposed for the field, be it as a comment.
func (a *analysis) proposed(field string) bool {
	return slices.ContainsFunc(a.columns, func(c *column) bool { return c.field == field })
}

func (a *analysis) askFor(f *record.Field) {
	n := a.ask("Where does the field %s come from (%s)? No column is known for it, and it is required", f.Name, f.Doc)
	line := fmt.Sprintf("# %s: ASK # question %d: a column, or {constant: …}", f.Name, n)
	if f.One != nil {
		line += ": " + strings.Join(f.One, ", ")
	}
	a.made[f.Name] = []string{line}
}

// askForSettings asks for the settings of a dose that no column tells.
func (a *analysis) askForSettings() {
	if a.kind != "measurement" || !a.proposed("dose_pct") && !a.proposed("twa_dba") {
		return
	}
	for _, name := range []string{"criterion_db", "exchange_db", "threshold_db"} {
		if a.proposed(name) {
			continue
		}
		f := a.table.Fields[a.table.Index(name)]
		n := a.ask("What is %s of the doses (%s)? No column tells, and a dose without its settings proves nothing", name, f.Doc)
		a.made[name] = []string{fmt.Sprintf("# %s: {constant: ASK} # question %d", name, n)}
	}
}

// explain adds to each proposal what must be known to read its cells.
func (a *analysis) explain() {
	for _, c := range a.columns {
		if c.field == "" || a.table == nil {
			continue
		}
		a.explainBlank(c)
		if a.table.Index(c.field) < 0 || c.tone != nil {
			continue
		}
		a.explainValues(c)
		a.explainUnit(c)
		a.explainID(c)
	}
}

// fieldLines writes the fields of the common part, or of one of several tests of a row, in the order of the table.
func (a *analysis) fieldLines(part string) []string {
	if a.table == nil {
		return nil
	}
	var lines []string
	for _, f := range append(a.table.Names(), a.earFields()...) {
		for _, c := range a.columns {
			if c.field == f && c.part == part && (f != "masked" || a.frequency == nil) {
				lines = append(lines, c.lines()...)
			}
		}
		if part == "" {
			lines = append(lines, a.made[f]...)
		}
	}
	return lines
}

// earFields are the fields of thresholds where a column tells the ear.
func (a *analysis) earFields() []string {
	var out []string
	for _, c := range a.columns {
		if strings.HasPrefix(c.field, "ear.") && !slices.Contains(out, c.field) {
			out = append(out, c.field)
		}
	}
	return out
}

// partLines writes the tests of a row.
func (a *analysis) partLines() []string {
	var lines []string
	for _, part := range a.parts {
		inner := a.fieldLines(part)
		switch {
		case slices.ContainsFunc(a.columns, func(c *column) bool { return c.part == part && c.field == "purpose" }):
		case part == "baseline":
			inner = append(inner, "purpose: {constant: baseline} # likely: the names of its columns say so")
		default:
			n := a.ask("What was the purpose of the %s tests: periodic, retest, exit or other? It is not stated", part)
			inner = append(inner, fmt.Sprintf("# purpose: {constant: periodic} # question %d: or another", n))
		}
		if !slices.ContainsFunc(a.columns, func(c *column) bool { return c.part == part && c.field == "date" }) {
			n := a.ask("Which column is the date of the %s test? None is known for it", part)
			inner = append(inner, fmt.Sprintf("# date: ASK # question %d", n))
		}
		lines = append(lines, "- # "+part+" test", "  fields:")
		lines = append(lines, indent(inner, "    ")...)
	}
	return lines
}
