package catalogue

import (
	"hearduty/internal/mapping"
	"hearduty/internal/record"
	"hearduty/internal/schema"
)

// mapFile is the schema of maps. Words may be written as they stand in the export, so numbers count as texts.
func mapFile() Entry {
	word := object{"type": []string{"string", "number", "boolean"}, "minLength": 1}
	words := object{"type": "array", "minItems": 1, "items": word}
	count := object{"type": "integer", "minimum": 1, "maximum": 1 << 24}
	place := object{"type": "integer", "minimum": 1, "maximum": 1 << 14}
	column := object{
		"description": "the name of a column, or keys such as column: TestDate",
		"anyOf":       []any{word, object{"$ref": "#/$defs/Column"}},
	}
	columns := object{"type": "object", "minProperties": 1, "additionalProperties": column}
	conditions := object{"type": "array", "minItems": 1, "items": object{"$ref": "#/$defs/Condition"}}
	pad := object{"type": "integer", "minimum": 1, "maximum": 40}
	level := object{"type": "number", "minimum": 1, "maximum": 130}
	fields := map[string]map[string]any{
		"File.map": word, "File.sheet": word, "File.kind": {"enum": record.Kinds()}, "File.blank": words, "File.fields": columns, "File.ignore": words,
		"File.records": {"type": "array", "minItems": 1, "items": object{"$ref": "#/$defs/Part"}},
		"Head.row":     {"type": "integer", "minimum": 1, "maximum": 1000}, "Head.rows": {"type": "integer", "minimum": 1, "maximum": 2},
		"Rows.skip": {"type": "array", "minItems": 1, "items": count}, "Rows.comment": words, "Rows.footer": words, "Rows.only": conditions,
		"Condition.column": word, "Condition.position": place, "Condition.is": words, "Condition.is_not": words,
		"Dates.latest_two_digit_year": {"type": "integer", "minimum": 1900, "maximum": 2200},
		"Column.position":             place, "Column.above": word, "Column.constant": word,
		"Column.make":   {"type": "array", "minItems": 1, "items": object{"type": "string", "minLength": 1}},
		"Column.values": {"type": "object", "minProperties": 1, "additionalProperties": word},
		"Column.pad":    pad, "Column.strip": words, "Column.prefix": word, "Column.split": word, "Column.blank": words,
		"Part.fields": columns, "Part.only": conditions,
		"EarRows.position": place, "EarRows.left": words, "EarRows.right": words,
		"FrequencyRows.frequency": column, "FrequencyRows.threshold": column, "FrequencyRows.masked": column,
		"Thresholds.not_tested": words, "Thresholds.masked": words,
		"NoResponse.words": words, "NoResponse.marks": words, "NoResponse.limit": level,
		"NoResponse.limits": {"type": "object", "minProperties": 1, "additionalProperties": level},
		"FHIR.pad":          pad, "FHIR.constants": {"type": "object", "minProperties": 1, "additionalProperties": word}, "Coding.code": word,
	}
	return Entry{"map", schema.Of(mapping.File{}, schema.Options{
		Title:       "Map",
		Description: "How the columns of an export become fields of records.",
		Style:       schema.ForFile,
		Types: map[string]map[string]any{"Names": {
			"description": "the name of a column, or a list of names of which the file has one",
			"anyOf":       []any{word, words},
		}},
		Fields: fields,
	})}
}
