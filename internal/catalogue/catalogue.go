// Package catalogue lists the schemas that hearduty publishes, made from the Go types.
package catalogue

import (
	"strings"

	"hearduty/internal/bundle"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/program"
	"hearduty/internal/record"
	"hearduty/internal/schema"
)

// Entry is one published schema.
type Entry struct {
	Name string // the file name without its ending
	Text []byte
}

// All makes all schemas: one a record kind, one a dossier, the program file and those beside it, the report,
// and the data files of a bundle.
func All() []Entry {
	var out []Entry
	for _, kind := range record.Kinds() {
		out = append(out, Entry{"record-" + strings.ReplaceAll(string(kind), "_", "-"), schema.Record(kind)})
	}
	for _, kind := range schema.Subjects() {
		out = append(out, Entry{"dossier-" + kind, schema.DossierText(kind)})
	}
	out = append(out, Entry{"program", schema.Of(program.File{}, programOptions())})
	out = append(out, acceptedFile(), mapFile())
	out = append(out, Entry{"report", schema.Of(finding.Report{}, reportOptions())})
	out = append(out, intakeFiles()...)
	out = append(out, comparisonFile(), switchFile())
	return append(out, bundleFiles()...)
}

type object = map[string]any

func programOptions() schema.Options {
	return schema.Options{
		Title:       "Program file",
		Description: "The sites of a hearing-conservation program, the bundles that judge them, and the files with their records.",
		Style:       schema.ForFile,
		Fields: map[string]map[string]any{
			"File.sites":       {"type": "array", "minItems": 1, "items": object{"$ref": "#/$defs/FileSite"}},
			"File.records":     {"type": "array", "minItems": 1, "items": object{"anyOf": []any{object{"type": "string", "minLength": 1}, object{"$ref": "#/$defs/RecordFile"}}}},
			"RecordFile.kind":  {"enum": record.Kinds()},
			"File.as_of":       {"type": "string", "format": "date"},
			"FileSite.bundles": {"type": "array", "minItems": 1, "items": object{"type": "string", "minLength": 1}},
		},
	}
}

func reportOptions() schema.Options {
	return schema.Options{
		Title:       "Report of a check",
		Description: "The result of hearduty check --format json.",
		Style:       schema.ForReport,
		Types:       map[string]map[string]any{"Status": {"enum": finding.Statuses}},
		Fields: map[string]map[string]any{
			"Finding.topic":    {"enum": finding.Topics},
			"Rate.part":        {"type": []string{"integer", "null"}},
			"Rate.of":          {"type": []string{"integer", "null"}},
			"Rate.percent":     {"type": []string{"number", "null"}},
			"Finding.severity": {"enum": []string{"major", "minor"}},
			"Subject.kind":     {"enum": schema.Subjects()},
		},
	}
}

// bundleFiles are the schemas of a bundle's data files, under the names of their folders.
func bundleFiles() []Entry {
	value := "a number, an interval such as {days: 21}, or a list of words"
	options := schema.Options{
		Style: schema.ForFile,
		Fields: map[string]map[string]any{
			"Value.value": {"description": value, "anyOf": []any{
				object{"type": "number"}, schema.Interval(), object{"type": "array", "minItems": 1, "items": object{"type": "string", "minLength": 1}},
			}},
			"Parameter.values": {"type": "array", "minItems": 1, "items": object{"$ref": "#/$defs/Value"}},
			"Choice.values":    {"type": "array", "minItems": 1, "items": object{"type": []string{"boolean", "string"}}},
			"Choice.default":   {"type": []string{"boolean", "string"}},
		},
	}
	entry := func(name, title, description string, v any) Entry {
		o := options
		o.Title, o.Description = title, description
		return Entry{name, schema.Of(v, o)}
	}
	return []Entry{
		entry("about", "About a bundle", "What a bundle is, whose law it reads, and what its readers must know.", bundle.About{}),
		entry("parameters", "Parameters of a bundle", "Every number of the law, with the days on which it is in force and its paragraph, by name.", map[string]bundle.Parameter{}),
		entry("choices", "Choices of a bundle", "What the law leaves to the employer, by name.", map[string]bundle.Choice{}),
		entry("paragraphs", "Paragraphs of a bundle", "Every paragraph of the instrument and how it is accounted for, by its number.", map[string]bundle.Paragraph{}),
		entry("measures", "Measures of a bundle", "How facts are derived from records.", dossier.Measures{}),
	}
}
