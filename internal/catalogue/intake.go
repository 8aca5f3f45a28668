package catalogue

import (
	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/schema"
)

// intakeFiles are the schemas of what is read and written beside the records.
func intakeFiles() []Entry {
	ledger := schema.Options{
		Title:       "Ledger of an intake",
		Description: "What became of every row that was read, as hearduty intake --ledger writes it.",
		Style:       schema.ForReport,
	}
	people := schema.Options{
		Title:       "People with several ids",
		Description: "The file that same_person of the program file names: which worker ids are one person, and which id was several people's in turn. Nobody is recognized by a name.",
		Style:       schema.ForFile,
		Fields: map[string]map[string]any{
			"FilePerson.also": {"type": "array", "minItems": 1, "items": object{"type": "string", "minLength": 1}},
			"FilePerson.from": {"type": "string", "format": "date"},
			"FilePerson.to":   {"type": "string", "format": "date"},
		},
	}
	return []Entry{
		{"ledger", schema.Of(intake.Book{}, ledger)},
		{"same-person", schema.Of([]program.FilePerson{}, people)},
	}
}
