package mapping

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/grid"
)

// wide makes the records of a row that holds all of them. Where one of several cannot be read, the others are given
// beside its fault.
func (s *source) wide(o *Out) {
	n := 0
	for _, recipe := range s.recipes {
		if recipe.part && !recipe.present(&s.row) {
			continue
		}
		e := &s.entries[n]
		var fault *Fault
		if e.Values, fault = s.fill(e.Values[:0], recipe, false, nil); fault == nil {
			n++
		} else {
			fault.Worker = s.workerOf(e.Values)
			o.Fault = o.Fault.and(fault)
		}
	}
	o.Records = s.entries[:n]
	if n == 0 && o.Fault == nil {
		o.NotData = isNoRecord
	}
}

// workerOf gives the id of the worker among the values, or nothing.
func (s *source) workerOf(values []Value) string {
	field := s.table.Index("worker_id")
	for _, v := range values {
		if v.Field == field {
			return v.Text
		}
	}
	return ""
}

// and joins the faults of two records of a row: the first is told, and of the second the fields.
func (f *Fault) and(other *Fault) *Fault {
	if f == nil {
		return other
	}
	for _, field := range append([]string{other.Field}, other.Also...) {
		if !f.names(field) {
			f.Also = append(f.Also, field)
		}
	}
	return f
}

// present says whether a row has one of its several records.
func (r *recipe) present(row *grid.Row) bool {
	if r.only != nil {
		return met(r.only, row)
	}
	own := false
	for _, rule := range r.rules {
		if !rule.own || rule.from == nil {
			continue
		}
		own = true
		if c := rule.from.of(row); !rule.reader.nothing(c) {
			return true
		}
	}
	return !own
}

// fill reads the fields of one record of the row. Fields of the row's ear are those of the right one, if it is that.
func (s *source) fill(values []Value, recipe *recipe, right bool, fault *Fault) ([]Value, *Fault) {
	masked := -1
	for _, r := range recipe.rules {
		field := r.field
		if right && r.right >= 0 {
			field = r.right
		}
		switch {
		case r.fixed != nil:
			if r.fixed.Text != "" {
				values = append(values, Value{Field: field, Text: r.fixed.Text})
			}
		case r.make != nil:
			var v Value
			if v, fault = s.made(r, recipe, values, fault); v.Text != "" {
				values = append(values, v)
			}
		default:
			c := r.from.of(&s.row)
			if c.Text == "" && c.Kind != grid.Uncomputed {
				continue
			}
			got := r.reader.read(c)
			if got.wrong != nil {
				fault = s.fault(fault, s.table.Fields[field].Name, r.from, &s.row, got.wrong.Why, got.wrong.Remedy)
				continue
			}
			if got.text == "" {
				continue
			}
			if got.masked && masked < 0 {
				masked = r.from.at
			}
			values = append(values, Value{Field: field, Text: got.text, Read: unlike(c.Text, got.text), Column: r.from.at + 1})
		}
	}
	if masked >= 0 && recipe.masked >= 0 {
		values = append(values, Value{Field: recipe.masked, Text: "yes", Read: s.row.Cells[masked].Text, Column: masked + 1})
	}
	return values, fault
}

// unlike gives what stands in a cell, if that is not its canonical text.
func unlike(read, text string) string {
	if read == text {
		return ""
	}
	return read
}

// made joins fields of the record by hyphens. If the record cannot do without the field, neither can it do without those.
func (s *source) made(r *rule, recipe *recipe, values []Value, fault *Fault) (Value, *Fault) {
	var b strings.Builder
	for i, at := range r.make {
		other := recipe.rules[at]
		text := ""
		for _, v := range values {
			if v.Field == other.field {
				text = v.Text
			}
		}
		if text == "" {
			if s.table.Fields[r.field].Required && !fault.names(other.name) {
				fault = s.fault(fault, other.name, other.from, &s.row, fmt.Sprintf("the field is empty, but %s is made of it", r.name), "Fill it in")
			}
			return Value{}, fault
		}
		if i > 0 {
			b.WriteByte('-')
		}
		b.WriteString(text)
	}
	return Value{Field: r.field, Text: b.String()}, fault
}

// names says whether the fault names the field already.
func (f *Fault) names(field string) bool {
	return f != nil && (f.Field == field || slices.Contains(f.Also, field))
}
