package catalogue

import (
	"hearduty/internal/accept"
	"hearduty/internal/finding"
	"hearduty/internal/schema"
)

// acceptedFile is the schema of the accepted gaps.
func acceptedFile() Entry {
	return Entry{"accepted", schema.Of([]accept.FileEntry{}, schema.Options{
		Title:       "Accepted gaps",
		Description: "The gaps that the employer has accepted for a time: which, why, who approved it, and until when. They stay gaps and are shown apart.",
		Style:       schema.ForFile,
		Fields: map[string]map[string]any{
			"FileEntry.id":           {"type": "string", "pattern": "^f-[0-9a-f]{8,16}$"},
			"FileEntry.approved_by":  {"type": []string{"string", "null"}},
			"FileEntry.since":        {"type": "string", "format": "date"},
			"FileEntry.until":        {"type": "string", "format": "date"},
			"FileMatch.topic":        {"enum": finding.Topics},
			"FileMatch.subject_kind": {"enum": schema.Subjects()},
			"FileMatch.status":       {"enum": accept.Statuses},
		},
	})}
}
