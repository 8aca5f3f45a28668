package record

import (
	"fmt"
	"reflect"
	"strconv"
	"strings"

	"hearduty/internal/audiometry"
)

var (
	tables  = compileAll()
	tableOf = byKind(tables)
)

// maxSlots is the number of Go fields that the presence bits of the compact form can hold.
const maxSlots = 32

func compileAll() []*Table {
	out := make([]*Table, len(prototypes))
	for i, r := range prototypes {
		out[i] = compile(r)
		out[i].number = byte(i)
	}
	return out
}

func byKind(list []*Table) map[Kind]*Table {
	m := make(map[Kind]*Table, len(list))
	for _, t := range list {
		m[t.Kind] = t
	}
	return m
}

// compile reads the struct tags of a record type. A faulty tag is a mistake in this package and panics.
func compile(r Record) *Table {
	t := &Table{Kind: r.Kind(), goType: reflect.TypeOf(r).Elem(), index: map[string]int{}}
	for slot := range t.goType.NumField() {
		goField := t.goType.Field(slot)
		tag, ok := goField.Tag.Lookup("field")
		if !ok {
			continue // Meta
		}
		f, err := parseTag(tag)
		if err != nil {
			panic(fmt.Sprintf("record: %s.%s: %v", t.goType.Name(), goField.Name, err))
		}
		f.slot, f.Doc = slot, goField.Tag.Get("doc")
		t.slots = append(t.slots, slot)
		t.Fields = append(t.Fields, expand(f, goField.Type)...)
	}
	if len(t.slots) > maxSlots {
		panic(fmt.Sprintf("record: %s has more than %d fields", t.goType.Name(), maxSlots))
	}
	for i, f := range t.Fields {
		if _, double := t.index[f.Name]; double {
			panic(fmt.Sprintf("record: %s has two fields %s", t.goType.Name(), f.Name))
		}
		t.index[f.Name] = i
		t.leads = append(t.leads, jsonLeadOf(f.Name))
		if f.Required {
			t.needed = append(t.needed, i)
		}
	}
	return t
}

func parseTag(tag string) (Field, error) {
	parts := strings.Split(tag, ",")
	f := Field{Name: parts[0]}
	for _, part := range parts[1:] {
		key, value, _ := strings.Cut(part, "=")
		var err error
		switch key {
		case "required":
			f.Required = true
		case "id":
			f.ID = true
		case "one":
			f.One = strings.Split(value, "|")
		case "like":
			f.Like = strings.Split(value, "|")
		case "min":
			f.HasMin = true
			f.Min, err = strconv.ParseFloat(value, 64)
		case "max":
			f.HasMax = true
			f.Max, err = strconv.ParseFloat(value, 64)
		default:
			err = fmt.Errorf("the field tag has no option %q", key)
		}
		if err != nil {
			return f, err
		}
	}
	return f, nil
}

// expand gives the columns of a Go field: one, or one a frequency.
func expand(f Field, goType reflect.Type) []Field {
	switch reflect.Zero(goType).Interface().(type) {
	case string:
		f.Type = Text
	case Date:
		f.Type = Day
	case Number:
		f.Type = Decimal
	case Answer:
		f.Type = YesNo
	case List:
		f.Type = Words
	case audiometry.Ear:
		f.Type = Hearing
		return atEach(f, audiometry.Frequencies[:])
	case Threshold:
		f.Type = Hearing
	case Octaves, *Octaves:
		f.Type = Decimal
		return atEach(f, OctaveBands[:])
	case *Deviation:
		f.Type = Decimal
		return atEach(f, audiometry.Frequencies[:])
	default:
		panic(fmt.Sprintf("record: %s has the unknown type %s", f.Name, goType))
	}
	return []Field{f}
}

func atEach(f Field, frequencies []int) []Field {
	out := make([]Field, len(frequencies))
	for i, hz := range frequencies {
		out[i] = f
		out[i].Name = f.Name + "." + strconv.Itoa(hz)
		out[i].Doc = f.Doc + ", at " + strconv.Itoa(hz) + " Hz"
		out[i].element = i
	}
	return out
}
