package draft

import (
	"fmt"

	"hearduty/internal/convert"
	"hearduty/internal/record"
)

// markDates marks the columns whose dates are gathered for evidence.
func (a *analysis) markDates() {
	for _, c := range a.columns {
		c.dated = a.isDay(c)
	}
}

func (a *analysis) isDay(c *column) bool {
	i := -1
	if a.table != nil {
		i = a.table.Index(c.field)
	}
	return i >= 0 && a.table.Fields[i].Type == record.Day
}

// verdict is what all rows say about the order of dates in a column.
type verdict struct {
	c     *column
	order convert.Order // empty if not settled
	line  int           // row that settled it
	why   string        // why not
	dates int           // dates that the order matters for
}

// verdicts lists the columns whose dates need an order.
func (a *analysis) verdicts() []verdict {
	var out []verdict
	for _, c := range a.columns {
		if !c.dated || !c.dates.Needed() {
			continue
		}
		v := verdict{c: c}
		var ok bool
		if v.order, v.line, v.why, ok = c.dates.Settled(); !ok {
			v.order = ""
		}
		_, v.dates = c.dates.Count(convert.DayMonthYear)
		out = append(out, v)
	}
	return out
}

// explainDates writes the section dates, and the order beside those columns that differ. An order is stated only
// where the dates themselves leave no other.
func (a *analysis) explainDates() []string {
	var lines []string
	all := a.verdicts()
	if common := commonOrder(all); common != "" {
		v := all[0]
		lines = append(lines, fmt.Sprintf("order: %s # certain: %s", common, settledBy(v)))
		for _, v := range all[1:] {
			v.c.notes = append(v.c.notes, settledBy(v))
		}
	} else {
		lines = append(lines, a.differentOrders(all)...)
	}
	return append(lines, a.otherDates()...)
}

func settledBy(v verdict) string {
	return fmt.Sprintf("row %d of %s leaves no other order for its %s", v.line, v.c.shown(), several(v.dates, "date"))
}

// commonOrder gives the order that all columns were settled to, or an empty text.
func commonOrder(all []verdict) convert.Order {
	if len(all) == 0 {
		return ""
	}
	for _, v := range all {
		if v.order != all[0].order {
			return ""
		}
	}
	return all[0].order
}

func (a *analysis) differentOrders(all []verdict) []string {
	settled := 0
	for _, v := range all {
		settled += bit(v.order != "")
	}
	for _, v := range all {
		if v.order != "" {
			v.c.extras = append(v.c.extras, fmt.Sprintf("order: %s # certain: %s", v.order, settledBy(v)))
			continue
		}
		n := a.ask("Which order have the dates in %s (%d): day_month_year or month_day_year? In all rows, %s", v.c.shown(), v.dates, v.why)
		v.c.notes = append(v.c.notes, fmt.Sprintf("question %d", n))
		if settled > 0 {
			v.c.extras = append(v.c.extras, fmt.Sprintf("# order: day_month_year # question %d: or month_day_year", n))
		}
	}
	if len(all) == 0 || settled > 0 {
		return nil
	}
	return []string{
		"# order: day_month_year # either this line, or the next: see the questions",
		"# order: month_day_year",
	}
}

// otherDates writes what else must be known to read the dates.
func (a *analysis) otherDates() []string {
	var lines []string
	short, serial, zone, late := "", "", "", ""
	for _, c := range a.columns {
		if !c.dated {
			continue
		}
		if c.p.short > 0 || c.dates.TwoDigits() {
			short = join(short, c.shown())
		}
		if c.p.shapes[serialDay] > 0 {
			serial = join(serial, c.shown())
		}
		if c.p.zone > 0 {
			zone = join(zone, c.shown())
		}
		if c.p.late > 0 {
			late = join(late, c.shown())
		}
	}
	if short != "" {
		n := a.ask("What is the latest year that two digits can mean in %s? With 2026, 26 is 2026 and 27 is 1927", short)
		lines = append(lines, fmt.Sprintf("# latest_two_digit_year: ASK # question %d", n))
	}
	if serial != "" {
		n := a.ask("From which year do the day numbers in %s count, 1900 or 1904? Most spreadsheets count from 1900; the two differ by four years and a day", serial)
		lines = append(lines, fmt.Sprintf("# serial: \"1900\" # question %d: or 1904", n))
	}
	if zone != "" {
		n := a.ask("In which time zone is the day taken of the times with a zone in %s? as_written takes the day as it stands", zone)
		lines = append(lines, fmt.Sprintf("# zone: as_written # question %d: or a zone such as Europe/Berlin", n))
	}
	if late != "" {
		lines = append(lines, fmt.Sprintf("calendar: buddhist # likely: years in %s are past 2400", late))
	}
	return lines
}

func join(list, name string) string {
	if list == "" {
		return name
	}
	return list + ", " + name
}
