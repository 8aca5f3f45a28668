package intake

import (
	"fmt"
	"strings"

	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// keys takes the keys of all objects of a YAML file, which grid gives as a row of their own. A key that is no
// field makes those rows faulty that have it.
func (t *tableReader) keys() error {
	if err := t.rows.Next(&t.row); err != nil {
		return err
	}
	for i, c := range t.row.Cells {
		field := t.table.Index(c.Text)
		if field >= 0 {
			t.columns[field] = i + 1
		}
		t.fields = append(t.fields, field)
	}
	t.names = t.row.Texts()
	return nil
}

// unknownKey says what is wrong with a key that is no field. The keys "record" and "origin", which the intake
// command writes, are understood.
func (t *tableReader) unknownKey(i int, c grid.Cell) *fault {
	name := t.names[i]
	shown := record.Shorten(name)
	switch {
	case name == "record" && c.Text == string(t.table.Kind), name == "origin", strings.HasPrefix(name, "origin."):
		return nil
	case name == "record":
		return &fault{field: name, why: "the object is not a record of kind " + string(t.table.Kind), remedy: "Put records of each kind into a file of their own"}
	}
	return &fault{field: shown, why: fmt.Sprintf("%s records have no field %q", t.table.Kind, shown), remedy: unknownName(name, t.table, "Remove or rename the key")}
}
