package draft

import (
	"fmt"

	"hearduty/internal/record"
)

// decimalSign looks which decimal sign the numbers of all proposed columns have.
func (a *analysis) decimalSign() []string {
	commas, points, open := 0, 0, 0
	groups := map[byte]int{}
	for _, c := range a.columns {
		if !a.isNumeric(c) {
			continue
		}
		commas, points, open = commas+c.p.comma, points+c.p.point, open+c.p.open
		for g, n := range c.p.groups {
			groups[g] += n
		}
	}
	var lines []string
	switch {
	case commas > 0 && points > 0:
		n := a.ask("Which decimal sign do the numbers have? %d have a comma and %d a point", commas, points)
		lines = append(lines, fmt.Sprintf("# decimal: \",\" # question %d: or a point", n))
	case commas > 0:
		lines = append(lines, fmt.Sprintf("decimal: \",\" # certain: %d numbers have one, none a point", commas))
	case points == 0 && open > 0:
		n := a.ask("Is the sign in %d numbers such as 1,234 or 1.234 the decimal sign, or does it part thousands? Nothing tells", open)
		lines = append(lines, fmt.Sprintf("# decimal: \",\" # question %d: or a point, and thousands below", n))
	}
	switch {
	case groups['.'] > 0 && commas > 0 && points == 0:
		lines = append(lines, fmt.Sprintf("thousands: \".\" # certain: in %d numbers", groups['.']))
	case groups[','] > 0 && points > 0 && commas == 0:
		lines = append(lines, fmt.Sprintf("thousands: \",\" # certain: in %d numbers", groups[',']))
	}
	for sign, name := range map[byte]string{' ': "space", '\'': `"'"`} {
		if groups[sign] > 0 && groups['.']+groups[',']+groups[' ']+groups['\''] == groups[sign] {
			lines = append(lines, fmt.Sprintf("thousands: %s # certain: in %d numbers", name, groups[sign]))
		}
	}
	return lines
}

func (a *analysis) isNumeric(c *column) bool {
	if c == a.level || c.tone != nil {
		return true
	}
	if c.field == "" || a.table.Index(c.field) < 0 {
		return false
	}
	return a.table.Fields[a.table.Index(c.field)].Type == record.Decimal
}
