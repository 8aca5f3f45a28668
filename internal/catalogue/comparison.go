package catalogue

import (
	"hearduty/internal/finding"
	"hearduty/internal/schema"
)

// comparisonFile is the schema of a comparison.
func comparisonFile() Entry {
	return Entry{"comparison", schema.Of(finding.Comparison{}, schema.Options{
		Title:       "Comparison of two reports",
		Description: "The result of hearduty compare --format json.",
		Style:       schema.ForReport,
		Types:       map[string]map[string]any{"Status": {"enum": finding.Statuses}, "ChangeKind": {"enum": finding.ChangeKinds}},
		Fields: map[string]map[string]any{
			"Change.topic":    {"enum": finding.Topics},
			"Change.severity": {"enum": []string{"major", "minor"}},
			"Subject.kind":    {"enum": schema.Subjects()},
		},
	})}
}
