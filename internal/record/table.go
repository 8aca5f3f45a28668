package record

import (
	"path"
	"reflect"
	"slices"
	"strings"
)

// FieldType says what a field holds.
type FieldType uint8

// The types of a field.
const (
	Text    FieldType = iota // a text, such as an id
	Day                      // a date, YYYY-MM-DD
	Decimal                  // a number with a decimal point
	YesNo                    // yes or no
	Words                    // a list of words, separated by semicolons
	Hearing                  // a hearing threshold level, dB HL, or NR>100 or NT
)

// Field is one column of a table.
type Field struct {
	Name           string // column name; dotted if it is one of several of a kind, such as left.500
	Type           FieldType
	Required       bool     // an empty cell rejects the row
	ID             bool     // an identifier of the record, unique within its kind
	One            []string // the only words allowed
	Like           []string // words of this program's vocabulary; others are kept
	Min, Max       float64  // the range of a number, inclusive
	HasMin, HasMax bool
	Doc            string // description with unit

	slot    int // index of the Go field
	element int // index in the Go field if that is an array
}

// Table describes one record kind: its fields in the order of the canonical columns.
type Table struct {
	Kind   Kind
	Fields []Field

	number byte           // place among the kinds, for the compact form
	goType reflect.Type   // the struct
	slots  []int          // indexes of the Go fields that hold values
	index  map[string]int // field name to index in Fields
	needed []int          // indexes of the required fields
	leads  []jsonLead     // what stands before each field in JSON
}

// fileNames are the canonical file names, without extension.
var fileNames = map[string]Kind{
	"workers": "worker", "assignments": "assignment", "groups": "group", "measurements": "measurement", "tasks": "task",
	"changes": "change", "notices": "notice", "audiograms": "audiogram", "follow_ups": "follow_up", "trainings": "training",
	"protectors": "protector", "protector_issues": "protector_issue", "fit_tests": "fit_test", "wear_checks": "wear_check",
	"instruments": "instrument", "calibrations": "calibration", "room_surveys": "room_survey", "testers": "tester",
	"documents": "document", "controls": "control", "examinations": "examination",
}

// Kinds lists the record kinds in the order in which they are shown.
func Kinds() []Kind {
	kinds := make([]Kind, len(tables))
	for i, t := range tables {
		kinds[i] = t.Kind
	}
	return kinds
}

// TableOf gives the table of a kind. It returns false if there is no such kind.
func TableOf(k Kind) (*Table, bool) {
	t, ok := tableOf[k]
	return t, ok
}

// Endings are the endings of the files that records can be read from.
var Endings = []string{".csv", ".tsv", ".txt", ".xlsx", ".xlsm", ".json", ".ndjson", ".yaml", ".yml"}

// KindOfFile tells the kind of a canonical file, such as records/audiograms.csv, from its name. It
// returns false if the name is not canonical or its ending is none of Endings.
func KindOfFile(name string) (Kind, bool) {
	base := strings.ToLower(path.Base(name))
	extension := path.Ext(base)
	if !slices.Contains(Endings, extension) {
		return "", false
	}
	k, ok := fileNames[strings.TrimSuffix(base, extension)]
	return k, ok
}

// FileName gives the canonical file name of the kind without extension, such as audiograms.
func (t *Table) FileName() string {
	for name, k := range fileNames {
		if k == t.Kind {
			return name
		}
	}
	return string(t.Kind)
}

// New gives an empty record of the table's kind.
func (t *Table) New() Record { return reflect.New(t.goType).Interface().(Record) }

// Index gives the place of a field in Fields by its name, or -1.
func (t *Table) Index(name string) int {
	if i, ok := t.index[name]; ok {
		return i
	}
	return -1
}

// Names lists the field names in the order of the canonical columns.
func (t *Table) Names() []string {
	names := make([]string, len(t.Fields))
	for i := range t.Fields {
		names[i] = t.Fields[i].Name
	}
	return names
}

// pointer gives a pointer to a Go field of r, which must be of the table's kind. Its type is one of
// *string, *Date, *Number, *Answer, *List, *audiometry.Ear, *Threshold, *Octaves, **Octaves and **Deviation.
func pointer(r reflect.Value, slot int) any { return r.Field(slot).Addr().Interface() }
