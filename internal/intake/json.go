package intake

import (
	"encoding/json"
	"fmt"
	"strings"

	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// objectReader turns one JSON object into the cells of a row. Nested objects give dotted names. The
// members "record" and "origin", which the intake command writes, are understood.
type objectReader struct {
	table  *record.Table
	fields map[member]int  // the fields by the two parts of their names
	outer  map[string]bool // first parts of dotted names
	seen   []bool          // fields that the current object has named
	row    *row
	walker grid.Walker
}

// member is the name of a member and of the object that holds it, if that is nested.
type member struct{ outer, key string }

func (m member) String() string {
	if m.outer == "" {
		return m.key
	}
	return m.outer + "." + m.key
}

func newObjectReader(t *record.Table) *objectReader {
	o := &objectReader{table: t, fields: map[member]int{}, outer: map[string]bool{}, seen: make([]bool, len(t.Fields))}
	for i := range t.Fields {
		name := t.Fields[i].Name
		o.fields[member{"", name}] = i
		if outer, key, nested := strings.Cut(name, "."); nested {
			o.fields[member{outer, key}] = i
			o.outer[outer] = true
		}
	}
	return o
}

// read reads the one object in raw. What is wrong with it becomes the row's fault.
func (o *objectReader) read(raw []byte, r *row) {
	clear(o.seen)
	o.row = r
	f := o.whole(raw)
	if f != nil {
		r.cells, r.fault = r.cells[:0], f
	}
}

func (o *objectReader) whole(raw []byte) *fault {
	if !json.Valid(raw) {
		var any json.RawMessage
		return &fault{why: grid.BrokenJSON(json.Unmarshal(raw, &any)), remedy: "Write one complete JSON object a line, without commas between them"}
	}
	o.walker = grid.Walk(string(raw))
	if o.walker.Peek() != '{' {
		return &fault{why: "this is no JSON object", remedy: "Write an object with the fields as keys"}
	}
	return grid.WalkMembers(&o.walker, func(key string) *fault { return o.member(member{"", key}) })
}

func (o *objectReader) member(m member) *fault {
	w := &o.walker
	if field, ok := o.fields[m]; ok {
		if o.seen[field] {
			return &fault{field: m.String(), why: "the key stands twice", remedy: "Keep one of the two"}
		}
		o.seen[field] = true
		return o.value(field)
	}
	switch name := record.Shorten(m.String()); {
	case name == "record":
		if w.Peek() == '"' && w.Text() == string(o.table.Kind) {
			return nil
		}
		return &fault{field: name, why: "the object is not a record of kind " + string(o.table.Kind), remedy: "Put records of each kind into a file of their own"}
	case name == "origin":
		w.Skip()
		return nil
	case !o.outer[name]:
		return &fault{field: name, why: fmt.Sprintf("%s records have no field %q", o.table.Kind, name), remedy: unknownName(name, o.table, "Remove or rename the key")}
	case w.Peek() == 'n':
		w.Bare()
		return nil
	case w.Peek() != '{':
		return &fault{field: name, why: name + " is not an object", remedy: "Write an object, such as " + o.example(name)}
	default:
		return grid.WalkMembers(w, func(key string) *fault { return o.member(member{name, key}) })
	}
}

func (o *objectReader) example(outer string) string {
	for i := range o.table.Fields {
		if rest, ok := strings.CutPrefix(o.table.Fields[i].Name, outer+"."); ok {
			return fmt.Sprintf("{%q: …}", rest)
		}
	}
	return "{…}"
}

// value turns the JSON value of a field into the text of a cell.
func (o *objectReader) value(field int) *fault {
	f := &o.table.Fields[field]
	wrong := func(read, is string) *fault {
		return &fault{field: f.Name, read: read, why: "the value is " + is, remedy: "Write " + valueOf(f)}
	}
	text := ""
	switch w := &o.walker; w.Peek() {
	case '"':
		text = w.Text()
	case 'n':
		w.Bare()
	case 't', 'f':
		word := w.Bare()
		if f.Type != record.YesNo && !hasWord(f.One, "yes") {
			return wrong(word, "true or false")
		}
		text = map[string]string{"true": "yes", "false": "no"}[word]
	case '[':
		if f.Type != record.Words {
			return wrong("", "a list")
		}
		return o.list(field)
	case '{':
		return wrong("", "an object")
	default:
		text = w.Bare()
		if f.Type != record.Decimal && f.Type != record.Hearing {
			return wrong(text, "a number")
		}
	}
	if text != "" {
		o.row.cells = append(o.row.cells, cell{field: field, text: text})
	}
	return nil
}

// list joins the items of a list as a table cell holds them.
func (o *objectReader) list(field int) *fault {
	f := &o.table.Fields[field]
	var words []string
	bad := grid.WalkItems(&o.walker, func() *fault {
		word, ok := "", true
		switch c := o.walker.Peek(); {
		case c == '"':
			word = o.walker.Text()
		case f.Name == "samples" && (c == '-' || c >= '0' && c <= '9'):
			word = o.walker.Bare() // levels
		default:
			ok = false
		}
		if !ok || strings.Contains(word, ";") {
			return &fault{field: f.Name, why: "an item of the list is not a text, or holds a semicolon", remedy: `Write texts in quotes, such as ["noise_effects", "protectors"]`}
		}
		words = append(words, word)
		return nil
	})
	if len(words) > 0 {
		o.row.cells = append(o.row.cells, cell{field: field, text: strings.Join(words, ";")})
	}
	return bad
}

func hasWord(words []string, word string) bool {
	for _, w := range words {
		if w == word {
			return true
		}
	}
	return false
}

// valueOf says what a field holds in JSON.
func valueOf(f *record.Field) string {
	switch f.Type {
	case record.Day:
		return `a date in quotes, such as "2025-03-04"`
	case record.Decimal:
		return "a number, such as 85.3"
	case record.YesNo:
		return `"yes" or "no"`
	case record.Words:
		return "a list of texts in quotes"
	case record.Hearing:
		return `a number in dB HL, "NR>100" or "NT"`
	}
	return "a text in quotes; leading zeros of an id are lost in numbers"
}
