package intake

import (
	"fmt"
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// blank is why a row without anything in it is no data.
const blank = "blank"

// head is the header of a canonical table, and what stands above it.
type head struct {
	table   *record.Table
	fields  []int // field of each column
	columns []int // number of each field's column, from 1; 0 for none
	before  []noData
}

// noData is a row that is no data, which is still to be reported.
type noData struct {
	line int
	why  string
}

func newHead(t *record.Table) head { return head{table: t, columns: make([]int, len(t.Fields))} }

// earlier gives the rows up to the header, one after the other.
func (h *head) earlier(r *row) bool {
	if len(h.before) == 0 {
		return false
	}
	r.reset(h.before[0].line)
	r.columns, r.notData = h.columns, h.before[0].why
	h.before = h.before[1:]
	return true
}

func (h *head) empty() error {
	return &refusal{problem: "the file is empty", remedy: "Give it a header with the columns " + strings.Join(needed(h.table), ", ")}
}

func headFault(line int, f *grid.Fault) error {
	return &refusal{line: line, column: f.Column, problem: "the header cannot be read: " + f.Problem, remedy: f.Remedy}
}

// name gives the field of a column, from 1, or nothing.
func (h *head) name(column int) string {
	if column < 1 || column > len(h.fields) || h.fields[column-1] < 0 {
		return ""
	}
	return h.table.Fields[h.fields[column-1]].Name
}

// fault makes the fault of a row of what the file's reader says.
func (h *head) fault(f *grid.Fault) *fault {
	return &fault{column: f.Column, field: h.name(f.Column), why: f.Problem, remedy: f.Remedy}
}

// read finds the field of each column.
func (h *head) read(line int, cells []string) error {
	for i, text := range cells {
		name := strings.ToLower(strings.TrimSpace(text))
		refuse := func(remedy, format string, args ...any) error {
			return &refusal{line, i + 1, name, fmt.Sprintf(format, args...), remedy}
		}
		if name == "" {
			return refuse("Give the column the name of a field, or remove it", "column %d has no name", i+1)
		}
		field := h.table.Index(name)
		if field < 0 {
			return refuse(unknownName(name, h.table, "Remove or rename the column"), "%s records have no field %q (column %d)", h.table.Kind, record.Shorten(name), i+1)
		}
		if first := h.columns[field]; first > 0 {
			return refuse("Remove or rename one of the two", "the columns %d and %d are both named %s", first, i+1, name)
		}
		h.columns[field] = i + 1
		h.fields = append(h.fields, field)
	}
	for _, name := range needed(h.table) {
		if h.columns[h.table.Index(name)] == 0 {
			return &refusal{line: line, field: name, problem: fmt.Sprintf("the column %s is missing, but every %s needs it", name, h.table.Kind), remedy: "Add the column; needed are " + strings.Join(needed(h.table), ", ")}
		}
	}
	h.before = append(h.before, noData{line, "header"})
	return nil
}

// unknownName says what to do about a name that no field has.
func unknownName(name string, t *record.Table, remedy string) string {
	if near := diag.Near(name, t.Names()); near != "" {
		return remedy + "; the nearest field is " + near
	}
	return remedy + "; the fields are " + fieldNames(t)
}

// fieldNames lists the fields, with one name for those of several frequencies.
func fieldNames(t *record.Table) string {
	var out []string
	for _, name := range t.Names() {
		outer, inner, nested := strings.Cut(name, ".")
		if nested && inner[0] >= '0' && inner[0] <= '9' {
			name = outer + ".<Hz>"
		}
		if len(out) == 0 || out[len(out)-1] != name {
			out = append(out, name)
		}
	}
	return strings.Join(out, ", ")
}

// needed lists the fields that every record of the kind has.
func needed(t *record.Table) []string {
	var out []string
	for i := range t.Fields {
		if t.Fields[i].Required {
			out = append(out, t.Fields[i].Name)
		}
	}
	return out
}
