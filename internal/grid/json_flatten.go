package grid

import (
	"encoding/json"
	"strings"
)

// array gives the objects of a JSON file.
type array struct{ elements *Elements }

func newArray(f *File, encoding string) (objectSource, error) {
	e, err := f.Elements(encoding, true)
	return &array{e}, err
}

func (a *array) next(o *object) error {
	raw, err := a.elements.Next()
	if err != nil {
		return err
	}
	o.reset(a.elements.Count())
	o.readJSON(raw)
	return nil
}

func (a *array) about() About {
	about := a.elements.About()
	about.Format = JSON
	return about
}

// nested stands for a value that no cell can hold, such as a list of objects.
var nested = Cell{Text: "[…]", Kind: Broken}

// readJSON makes raw the members of the object. What is wrong with it becomes the object's fault.
func (o *object) readJSON(raw []byte) {
	if len(raw) > MaxRow {
		o.fail(TooLong())
		return
	}
	if !json.Valid(raw) {
		var any json.RawMessage
		o.fail(faultf("Write one complete JSON object", "%s", BrokenJSON(json.Unmarshal(raw, &any))))
		return
	}
	w := Walk(string(raw))
	if w.Peek() != '{' {
		o.fail(faultf("Write an object with the fields as keys", "this is no JSON object"))
		return
	}
	o.fail(o.flatten(&w, "", 0))
}

// BrokenJSON says what is wrong with JSON that cannot be read.
func BrokenJSON(err error) string {
	if text := err.Error(); !strings.Contains(text, "unexpected end") && !strings.HasSuffix(text, "EOF") {
		return "the JSON is broken: " + strings.TrimPrefix(text, "json: ")
	}
	return "the JSON ends too early"
}

// flatten adds the members of the object at which the walker stands.
func (o *object) flatten(w *Walker, outer string, depth int) *Fault {
	if depth == maxDepth {
		return faultf("Write each record as one object with its fields as keys", "objects stand within objects %d times", maxDepth)
	}
	return WalkMembers(w, func(key string) *Fault {
		key = outer + key
		switch w.Peek() {
		case '{':
			return o.flatten(w, key+".", depth+1)
		case '[':
			return o.add(key, listCell(w))
		}
		return o.add(key, scalarCell(w))
	})
}

// scalarCell reads a single value. A number stays as it is written.
func scalarCell(w *Walker) Cell {
	switch w.Peek() {
	case '"':
		return Cell{Text: w.Text()}
	case 't', 'f':
		return Cell{Text: w.Bare(), Kind: Bool}
	case 'n':
		w.Bare()
		return Cell{}
	}
	return Cell{Text: w.Bare(), Kind: Number}
}

// listCell joins a list of single values.
func listCell(w *Walker) Cell {
	var items []Cell
	whole := true
	WalkItems(w, func() *Fault {
		switch w.Peek() {
		case '{', '[':
			w.Skip()
			whole = false
		default:
			items = append(items, scalarCell(w))
		}
		return nil
	})
	return joined(items, whole)
}

// joined gives one cell for a list, unless an item is blank or no single value, or holds what would part it.
func joined(items []Cell, whole bool) Cell {
	texts := make([]string, len(items))
	for i, c := range items {
		texts[i] = c.Text
		if c.Kind == Broken || c.Text == "" || strings.Contains(c.Text, ";") {
			whole = false
		}
	}
	switch {
	case !whole:
		return nested
	case len(items) == 1:
		return items[0]
	}
	return Cell{Text: strings.Join(texts, ";")}
}
