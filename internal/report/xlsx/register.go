package xlsx

import (
	"maps"
	"slices"
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// registerPrinted are the columns that whoever works through the register has on paper. Those behind them are
// for the screen.
var registerPrinted = []column{
	{"Status", 10}, {"Accepted", 9}, {"Severity", 8.5}, {"Site", 10}, {"Subject kind", 9}, {"Subject", 11}, {"Duty", 18}, {"Due", 10.5}, {"Fulfilled on", 10.5}, {"Days over", 7},
	{"Finding", 36}, {"Paragraph", 15}, {"What to do", 28}, {"Assigned to", 12}, {"Done on", 10.5}, {"Remark", 16},
}

var registerScreen = []column{
	{"Bundle", 24}, {"Topic", 13}, {"Facts", 40}, {"Parameters", 50}, {"Evidence", 55},
	{"Accepted until", 11}, {"Accepted by", 18}, {"Reason of acceptance", 36}, {"Id", 22},
}

// register lists the findings, a row each; those that the employer has accepted stand behind all others.
func register(r *finding.Report) table {
	order, titles, health := byAcceptance(r.Findings), phrase.TitlesOf(r), hasHealth(r.Findings)
	columns := slices.Concat(registerPrinted, registerScreen)
	if health {
		columns = append(columns, column{"Hearing figures", 50})
	}
	return table{name: "Register", about: "the listed findings, a row each, with columns to fill in; accepted ones stand at the end. On paper come the columns to Remark.",
		columns: columns, printed: len(registerPrinted), rows: len(order), none: "No finding is listed. That does not mean that all is well.",
		row: func(i int) []any {
			f := order[i]
			facts, parameters := factsOf(f.Facts)
			cells := []any{f.Status, yesNo(f.Accepted != nil), f.Severity, f.Site, f.Subject.Kind, f.Subject.ID, titles.Of(f), f.Due, f.Done, overOf(f),
				phrase.Sentence(f.Message), f.Cite, phrase.Sentence(f.Remedy), blank{}, blankDay{}, blank{},
				f.Bundle, f.Topic, facts, parameters, evidenceOf(f.Evidence)}
			cells = append(append(cells, acceptance(f.Accepted)...), f.ID)
			if health {
				cells = append(cells, pairs(f.Health))
			}
			return cells
		}}
}

// byAcceptance gives the findings in their order, first those that are not accepted.
func byAcceptance(findings []finding.Finding) []*finding.Finding {
	list := make([]*finding.Finding, 0, len(findings))
	for _, accepted := range []bool{false, true} {
		for i := range findings {
			if f := &findings[i]; (f.Accepted != nil) == accepted {
				list = append(list, f)
			}
		}
	}
	return list
}

func hasHealth(findings []finding.Finding) bool {
	return slices.ContainsFunc(findings, func(f finding.Finding) bool { return len(f.Health) > 0 })
}

func yesNo(is bool) string {
	if is {
		return "yes"
	}
	return "no"
}

// overOf gives the days over, and nothing where no day was to be kept.
func overOf(f *finding.Finding) any {
	if !f.Due.Known() {
		return nil
	}
	return f.DaysOver
}

func acceptance(a *finding.Acceptance) []any {
	if a == nil {
		return []any{nil, nil, nil}
	}
	return []any{a.Until, a.ApprovedBy, phrase.Sentence(a.Reason)}
}

// factsOf writes facts in words, a line each, apart from the parameters of the law with their paragraph and
// what they were checked against.
func factsOf(m map[string]any) (facts, parameters list) {
	for _, key := range slices.Sorted(maps.Keys(m)) {
		p, ok := finding.AsParameter(m[key])
		if !ok {
			name, value := finding.Named(key, m[key])
			facts = append(facts, name+": "+value)
			continue
		}
		line := spaced(key) + ": " + p.String()
		if p.Cite != "" {
			line += ", " + p.Cite
		}
		parameters = append(parameters, line+" ("+seenWords(p.Seen)+")")
	}
	return facts, parameters
}

// pairs writes named values, a line each.
func pairs(m map[string]any) list {
	var lines list
	for _, key := range slices.Sorted(maps.Keys(m)) {
		name, value := finding.Named(key, m[key])
		lines = append(lines, name+": "+value)
	}
	return lines
}

// evidenceOf lists records with their places, a line each.
func evidenceOf(records []finding.Evidence) list {
	lines := make(list, len(records))
	for i, e := range records {
		lines[i] = phrase.Record(e)
	}
	return lines
}

func spaced(name string) string { return strings.ReplaceAll(name, "_", " ") }

// seenWords says in words what a value was checked against.
func seenWords(seen string) string {
	switch seen {
	case "text":
		return "read in the official text"
	case "secondary":
		return "read in a secondary source, not in the official text"
	case "memory":
		return "not checked against the official text"
	}
	return seen
}
