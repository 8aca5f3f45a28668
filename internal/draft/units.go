package draft

import (
	"fmt"
	"strings"

	"hearduty/internal/record"
)

// explainUnit writes the unit of times and shares, or asks for it.
func (a *analysis) explainUnit(c *column) {
	f := a.table.Fields[a.table.Index(c.field)]
	if f.Type != record.Decimal || c.p.filled == 0 {
		return
	}
	switch {
	case strings.Contains(c.field, "minutes") || strings.HasSuffix(c.field, "_hours"):
		a.unitOfTime(c)
	case c.field == "dose_pct" || c.field == "percent":
		a.unitOfShare(c)
	}
}

func (a *analysis) unitOfTime(c *column) {
	p, named := c.p, unitOf(c.name)
	unit, why := "", ""
	switch {
	case p.clocks == p.filled:
		unit, why = "clock", "all are written like 7:45"
	case p.fixed == p.filled:
		unit, why = "clock", "the workbook formats all as times"
	case p.clocks > 0 || p.fixed > 0:
	case named != "" && (named == "minutes" || named == "hours"):
		unit, why = named, "its name says so"
	case p.max > 24 && c.field != "quiet_hours":
		unit, why = "minutes", "some are above 24"
	case p.fine == p.filled:
		n := a.ask("Are the times in %s fractions of a day, as spreadsheets keep them, or hours? All are below 1", c.shown())
		c.extras = append(c.extras, fmt.Sprintf("# unit: day_fraction # question %d: or hours", n))
		return
	}
	if unit != "" {
		c.extras = append(c.extras, fmt.Sprintf("unit: %s # %s", unit, why))
		return
	}
	n := a.ask("Are the times in %s minutes or hours? Their values do not tell", c.shown())
	c.extras = append(c.extras, fmt.Sprintf("# unit: minutes # question %d: or hours", n))
	c.off = true
	c.notes = append(c.notes, fmt.Sprintf("question %d", n))
}

func (a *analysis) unitOfShare(c *column) {
	p := c.p
	switch {
	case unitOf(c.name) == "percent" || strings.HasSuffix(compact(c.name), "pct"):
		c.extras = append(c.extras, "unit: percent # its name says so")
	case p.percent == p.filled:
		c.extras = append(c.extras, "unit: percent # all have a percent sign")
	case p.percent == 0 && p.max > 20:
		c.extras = append(c.extras, "unit: percent # some are above 20")
	default:
		n := a.ask("Are the values of %s percent or fractions (0.5 for 50 percent)? Nothing tells", c.shown())
		c.extras = append(c.extras, fmt.Sprintf("# unit: percent # question %d: or fraction", n))
		c.off = true
		c.notes = append(c.notes, fmt.Sprintf("question %d", n))
	}
}

// unitOfFrequency gives the unit of a column of frequencies.
func unitOfFrequency(p *profile) string {
	switch {
	case p.min >= 100:
		return "hz"
	case p.max <= 20:
		return "khz"
	}
	return ""
}

// explainID asks about zeros that ids may have lost.
func (a *analysis) explainID(c *column) {
	f := a.table.Fields[a.table.Index(c.field)]
	if f.Type != record.Text || c.p.filled == 0 || !f.ID && !strings.HasSuffix(c.field, "_id") {
		return
	}
	p := c.p
	if p.science > 0 {
		n := a.ask("Export %s as text: %d ids are numbers in scientific notation, which have lost digits", c.shown(), p.science)
		c.notes = append(c.notes, fmt.Sprintf("question %d", n))
	}
	if p.zeros == 0 || p.shorter == p.longer || p.digits == 0 {
		return
	}
	n := a.ask("Have ids in %s lost leading zeros? Some have %d digits with zeros before, some only %d; pad fills them up", c.shown(), p.longer, p.shorter)
	c.extras = append(c.extras, fmt.Sprintf("# pad: %d # question %d", p.longer, n))
}

// explainBlank lists the cells of a column that say that nothing is known.
func (a *analysis) explainBlank(c *column) {
	var list []string
	rows := 0
	for _, v := range sorted(c.p.nothing) {
		if c.tone != nil && !hasLetter(v.text) {
			continue // among thresholds, signs say that nothing was tested
		}
		list, rows = append(list, quote(v.text)), rows+v.rows
	}
	for _, v := range sorted(c.p.sentinel) {
		if a.isDay(c) {
			list, rows = append(list, quote(v.text)), rows+v.rows
		}
	}
	if len(list) > 0 {
		c.extras = append(c.extras, fmt.Sprintf("blank: [%s] # likely, %s", strings.Join(list, ", "), rowCount(rows)))
	}
}
