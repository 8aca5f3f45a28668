package mapping

import (
	"slices"
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// plan is a map made ready for the records of one kind.
type plan struct {
	file       *File
	table      *record.Table
	references []*reference
	only       []condition
	recipes    []*recipe // one a record of a row
	ear        *earColumn
	frequency  *frequencyColumns
}

// recipe says how the fields of one record are read.
type recipe struct {
	rules  []*rule // those made of others stand behind them
	only   []condition
	part   bool // one of several records of a row
	masked int  // index of the field that signs of masking set; -1 if it is mapped, or there is none
}

// rule says how one field is read.
type rule struct {
	name   string
	field  int        // index in the table; for a field of one ear, that of the left one
	right  int        // index of the right ear's field; -1 if the field is not that of the row's ear
	from   *reference // nil if it comes from no column
	above  string     // key of a line above the header
	fixed  *Value     // what does not depend on the row
	make   []int      // indexes of the rules that it is made of
	reader *reader
	own    bool // of one of several records of a row, not common to all
}

// condition is a Condition with its column found.
type condition struct {
	from      *reference
	is, isNot wordSet
	filled    *bool
}

type earColumn struct {
	from  *reference
	words *convert.Words
}

type frequencyColumns struct {
	frequency, threshold, masked *reference
	readFrequency, readMasked    *reader
	readThreshold                map[int]*reader // by frequency in Hz
	left, right                  int             // indexes of the fields of the first frequency
}

// newPlan makes a map ready. The map must have been checked for the kind.
func newPlan(f *File, table *record.Table) *plan {
	p := &plan{file: f, table: table}
	if f.Rows != nil {
		p.only = p.conditions(f.Rows.Only, "rows.only")
	}
	if f.Ear != nil {
		words, _ := convert.NewWords(f.Ear.words()) // the check of the map refuses what contradicts itself
		p.ear = &earColumn{p.reference(f.Ear.Column, f.Ear.Position, "ear", true), words}
	}
	if f.Frequency != nil {
		p.frequency = p.frequencies(f.Frequency)
	}
	if f.Records == nil {
		p.recipes = []*recipe{p.recipe(f.Fields, nil)}
	}
	for i := range f.Records {
		part := &f.Records[i]
		r := p.recipe(merged(f.Fields, part.Fields), part.Fields)
		r.part, r.only = true, p.conditions(part.Only, "records.only")
		p.recipes = append(p.recipes, r)
	}
	return p
}

func (p *plan) reference(names []string, position int, what string, needed bool) *reference {
	for _, r := range p.references {
		if r.position == position && slices.Equal(r.names, names) {
			r.needed = r.needed || needed
			return r
		}
	}
	r := newReference(names, position, what, needed)
	p.references = append(p.references, r)
	return r
}

func (p *plan) conditions(list []Condition, what string) []condition {
	var out []condition
	for _, c := range list {
		out = append(out, condition{p.reference(names(c.Column), c.Position, what, true), newWordSet(c.Is), newWordSet(c.IsNot), c.Filled})
	}
	return out
}

// met says whether the row meets all conditions.
func met(list []condition, row *grid.Row) bool {
	for i := range list {
		c := &list[i]
		text := c.from.of(row).Text
		switch {
		case c.is.words != nil && !c.is.has(text), c.isNot.has(text):
			return false
		case c.filled != nil && *c.filled != (strings.TrimSpace(text) != ""):
			return false
		}
	}
	return true
}

// recipe makes the rules of one record, in the order of the table. Own fields are those of one of several records.
func (p *plan) recipe(fields, own map[string]Column) *recipe {
	out := &recipe{masked: -1}
	mapped := map[string]bool{}
	for _, name := range p.ordered(fields) {
		col := fields[name]
		indexes := fieldsNamed(p.table, name)
		field := &p.table.Fields[indexes[0]]
		r := &rule{name: name, field: indexes[0], right: -1}
		if len(indexes) == 2 {
			r.right = indexes[1]
		}
		mapped[name] = true
		switch {
		case col.Constant != "":
			r.fixed = &Value{Field: r.field, Text: col.Constant}
		case len(col.Make) > 0:
			for _, other := range col.Make {
				r.make = append(r.make, slices.IndexFunc(out.rules, func(r *rule) bool { return r.name == other }))
			}
		default:
			r.reader = newReader(p.file, &col, field)
			if r.above = col.Above; r.above == "" {
				r.from = p.reference(col.Column, col.Position, name, field.Required)
			}
		}
		_, r.own = own[name]
		out.rules = append(out.rules, r)
	}
	if at := p.table.Index("masked"); at >= 0 && !mapped["masked"] {
		out.masked = at
	}
	return out
}

// ordered lists the fields in the order of the table, those made of others behind them.
func (p *plan) ordered(fields map[string]Column) []string {
	left := sortedKeys(fields)
	slices.SortStableFunc(left, func(a, b string) int {
		return fieldsNamed(p.table, a)[0] - fieldsNamed(p.table, b)[0]
	})
	var out []string
	for len(left) > 0 {
		rest := left[:0:0]
		for _, name := range left {
			if slices.ContainsFunc(fields[name].Make, func(other string) bool { return !slices.Contains(out, other) }) {
				rest = append(rest, name)
			} else {
				out = append(out, name)
			}
		}
		if len(rest) == len(left) {
			break
		}
		left = rest
	}
	return out
}
