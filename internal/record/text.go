package record

import (
	"reflect"

	"hearduty/internal/audiometry"
)

// Text writes the field at index i of r, which must be of the table's kind, in the form that Set reads.
// An absent field is an empty text.
func (t *Table) Text(r Record, i int) string {
	f := &t.Fields[i]
	switch p := pointer(reflect.ValueOf(r).Elem(), f.slot).(type) {
	case *string:
		return *p
	case *Date:
		return p.String()
	case *Number:
		return p.String()
	case *Answer:
		return p.String()
	case *List:
		return p.String()
	case *audiometry.Ear:
		return p[f.element].String()
	case *Threshold:
		return p.String()
	case *Octaves:
		return p[f.element].String()
	case **Octaves:
		if *p != nil {
			return (*p)[f.element].String()
		}
	case **Deviation:
		if *p != nil {
			return (*p)[f.element].String()
		}
	}
	return ""
}
