package draft

import (
	"strings"

	"hearduty/internal/convert"
)

// units are the words behind the name of a column that tell its unit.
var units = map[string]string{
	"min": "minutes", "mins": "minutes", "minute": "minutes", "minutes": "minutes", "minuten": "minutes", "minutos": "minutes", "minuti": "minutes", "minuty": "minutes", "minuter": "minutes", "分": "minutes",
	"h": "hours", "hr": "hours", "hrs": "hours", "hour": "hours", "hours": "hours", "std": "hours", "stunden": "hours", "heures": "hours", "horas": "hours", "ore": "hours", "uren": "hours", "uur": "hours", "godz": "hours", "timer": "hours", "timmar": "hours", "時間": "hours",
	"hhmm": "clock", "hmm": "clock", "hhmmss": "clock", "hms": "clock",
	"percent": "percent", "pct": "percent", "prozent": "percent", "pourcent": "percent", "procent": "percent",
	"hz": "hz", "khz": "khz",
	"db": "", "dba": "", "dbc": "", "dbz": "", "dbhl": "", "hl": "", "yyyymmdd": "", "ddmmyyyy": "", "mmddyyyy": "", "yn": "", "id": "",
}

// unitOf gives the unit that a column name states, or an empty text.
func unitOf(name string) string {
	if strings.Contains(name, "%") {
		return "percent"
	}
	words := strings.Fields(convert.Fold(name))
	if len(words) == 0 {
		return ""
	}
	if u := units[words[len(words)-1]]; u != "" {
		return u
	}
	if len(words) > 1 && words[len(words)-2] == "h" && strings.HasPrefix(words[len(words)-1], "mm") {
		return "clock"
	}
	if strings.Contains(compact(name), "minutes") {
		return "minutes"
	}
	if strings.Contains(compact(name), "hours") {
		return "hours"
	}
	return ""
}

// withoutUnit leaves out what stands in brackets, and units at the end.
func withoutUnit(name string) string {
	if open := strings.IndexAny(name, "([（"); open > 0 {
		name = name[:open]
	}
	words := strings.Fields(convert.Fold(name))
	for len(words) > 1 {
		if _, is := units[words[len(words)-1]]; !is {
			break
		}
		words = words[:len(words)-1]
	}
	return strings.Join(words, " ")
}
