package record

import (
	"math"
	"reflect"
	"strconv"
	"strings"
	"unicode/utf8"

	"hearduty/internal/audiometry"
)

// AppendJSON appends r to b as one JSON object: "record" with the kind, the fields that are present, in
// the order of the columns, with dotted names nested, and "origin" with file, sheet (if it has a name)
// and row. Numbers and thresholds are JSON numbers, NR>100 and NT texts, lists arrays, yes and no texts.
func AppendJSON(b []byte, r Record, file, sheet string) []byte {
	t := tableOf[r.Kind()]
	b = append(b, `{"record":`...)
	b = appendJSONText(b, string(t.Kind))
	b = t.appendFields(b, reflect.ValueOf(r).Elem())
	b = append(b, `,"origin":{"file":`...)
	b = appendJSONText(b, file)
	if sheet != "" {
		b = append(b, `,"sheet":`...)
		b = appendJSONText(b, sheet)
	}
	b = append(b, `,"row":`...)
	b = strconv.AppendInt(b, int64(r.At().Row), 10)
	return append(b, '}', '}')
}

// jsonLead is what stands before the value of a field: first before the first field of a nested object, next
// before any other.
type jsonLead struct{ outer, first, next string }

func jsonLeadOf(name string) jsonLead {
	outer, inner, nested := strings.Cut(name, ".")
	if !nested {
		lead := string(append(appendJSONText([]byte{','}, name), ':'))
		return jsonLead{"", lead, lead}
	}
	inner = string(append(appendJSONText(nil, inner), ':'))
	return jsonLead{outer, string(appendJSONText([]byte{','}, outer)) + ":{" + inner, "," + inner}
}

// appendFields appends ,"name":value for each field that is present. Fields with the same first part of
// a dotted name stand next to each other in a table.
func (t *Table) appendFields(b []byte, r reflect.Value) []byte {
	open, slot := "", -1
	var at any
	for i := range t.Fields {
		f, lead := &t.Fields[i], &t.leads[i]
		if f.slot != slot {
			at, slot = pointer(r, f.slot), f.slot
		}
		mark := len(b)
		if open != "" && open != lead.outer {
			b = append(b, '}')
		}
		if open == lead.outer {
			b = append(b, lead.next...)
		} else {
			b = append(b, lead.first...)
		}
		before := len(b)
		b = f.appendJSONValue(b, at)
		if len(b) == before {
			b = b[:mark]
			continue
		}
		open = lead.outer
	}
	if open != "" {
		b = append(b, '}')
	}
	return b
}

// appendJSONValue appends the value of the field, and nothing if it is absent.
func (f *Field) appendJSONValue(b []byte, pointer any) []byte {
	switch p := pointer.(type) {
	case *string:
		return appendPresent(b, *p)
	case *Date:
		return appendPresent(b, p.String())
	case *Number:
		return appendJSONNumber(b, *p)
	case *Answer:
		return appendPresent(b, p.String())
	case *List:
		if len(*p) == 0 {
			return b
		}
		for i, word := range *p {
			b = appendJSONText(append(b, "[,"[min(i, 1)]), word)
		}
		return append(b, ']')
	case *audiometry.Ear:
		return appendThreshold(b, p[f.element])
	case *Threshold:
		return appendThreshold(b, *p)
	case *Octaves:
		return appendJSONNumber(b, p[f.element])
	case **Octaves:
		if *p != nil {
			return appendJSONNumber(b, (*p)[f.element])
		}
	case **Deviation:
		if *p != nil {
			return appendJSONNumber(b, (*p)[f.element])
		}
	}
	return b
}

func appendThreshold(b []byte, t Threshold) []byte {
	switch {
	case t.State == audiometry.Measured && t.Tenths%10 == 0:
		return strconv.AppendInt(b, int64(t.Tenths/10), 10)
	case t.State == audiometry.Measured:
		return append(b, t.String()...)
	}
	return appendPresent(b, t.String())
}

func appendPresent(b []byte, s string) []byte {
	if s == "" {
		return b
	}
	return appendJSONText(b, s)
}

func appendJSONNumber(b []byte, n Number) []byte {
	if !n.Known || math.IsNaN(n.Value) || math.IsInf(n.Value, 0) {
		return b
	}
	return strconv.AppendFloat(b, n.Value, 'f', -1, 64)
}

// appendJSONText appends a JSON string. It leaves <, > and & as they are, so that NR>100 stays legible.
func appendJSONText(b []byte, s string) []byte {
	const hex = "0123456789abcdef"
	b = append(b, '"')
	for _, c := range s { // invalid bytes come as U+FFFD
		switch {
		case c == '"' || c == '\\':
			b = append(b, '\\', byte(c))
		case c == '\n':
			b = append(b, `\n`...)
		case c < ' ' || c == 0x7f:
			b = append(b, '\\', 'u', '0', '0', hex[c>>4], hex[c&15])
		default:
			b = utf8.AppendRune(b, c)
		}
	}
	return append(b, '"')
}
