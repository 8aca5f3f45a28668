package catalogue

import (
	"hearduty/internal/finding"
	"hearduty/internal/schema"
)

// switchFile is the schema of a switch to another law.
func switchFile() Entry {
	return Entry{"switch", schema.Of(finding.Switch{}, schema.Options{
		Title:       "Switch to another law",
		Description: "The result of hearduty switch --format json: what changes where other bundles judge the same records.",
		Style:       schema.ForReport,
		Types:       map[string]map[string]any{"Status": {"enum": finding.Statuses}},
		Fields: map[string]map[string]any{
			"SwitchTopic.topic":   {"enum": finding.Topics},
			"SwitchMove.before":   {"enum": finding.Standings},
			"SwitchMove.after":    {"enum": finding.Standings},
			"SwitchMove.kind":     {"enum": schema.Subjects()},
			"SwitchSubjects.kind": {"enum": schema.Subjects()},
		},
	})}
}
