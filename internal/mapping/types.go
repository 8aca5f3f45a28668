package mapping

import (
	"strings"

	"hearduty/internal/record"
)

// The kinds of numbers whose unit matters.
const (
	minutes = "minutes"
	hours   = "hours"
	percent = "percent"
)

// measureOf tells what a number counts, by the name of its field, if its unit can be stated.
func measureOf(f *record.Field) string {
	switch {
	case f.Type != record.Decimal:
		return ""
	case f.Name == "minutes" || strings.HasPrefix(f.Name, "minutes_") || strings.HasSuffix(f.Name, "_minutes"):
		return minutes
	case strings.HasSuffix(f.Name, "_hours"):
		return hours
	case f.Name == "percent" || strings.HasSuffix(f.Name, "_pct"):
		return percent
	}
	return ""
}

// unitsOf lists the units that the map may state for a field.
func unitsOf(f *record.Field) []string {
	switch measureOf(f) {
	case minutes, hours:
		return []string{"minutes", "hours", "clock", "day_fraction"}
	case percent:
		return []string{"percent", "fraction"}
	}
	return nil
}

// signsOf lists the signs of units that may stand behind a number of a field, whose unit they are.
func signsOf(f *record.Field) []string {
	switch _, band, _ := strings.Cut(f.Name, "."); {
	case strings.HasSuffix(f.Name, "_dba"):
		return []string{"dB", "dBA", "dB(A)", "dB A"}
	case strings.HasSuffix(f.Name, "_dbc"):
		return []string{"dB", "dBC", "dB(C)", "dB C"}
	case strings.HasSuffix(f.Name, "_db"), band != "", strings.HasSuffix(f.Doc, ", dB"):
		return []string{"dB"}
	}
	return nil
}

// isText says whether a field holds a text of any words.
func isText(f *record.Field) bool {
	return f.Type == record.Text && f.One == nil || f.Type == record.Words
}

// isID says whether a field refers to something by its id, so that a cell which a spreadsheet turned into a number
// or date is no longer what was written.
func isID(f *record.Field) bool {
	switch f.Name {
	case "group", "site", "area", "serial", "certificate", "reviewer", "by", "fitted_by", "supervisor":
		return true
	}
	return strings.HasSuffix(f.Name, "_id")
}
