package mapping

import (
	"fmt"
	"strings"

	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// maxGathered is the number of rows that one record can be made of: more than twice as many as both ears have
// frequencies, twice.
const maxGathered = 200

// keyFields tell which rows belong to one record, if the map has them.
var keyFields = []string{"worker_id", "protector_id", "date", "audiogram_id", "purpose"}

// gathering makes records of rows of one ear or one frequency. Rows of one record need not stand together, so
// records are given at the end, in the order of their first rows.
type gathering struct {
	table       *record.Table
	keys        []int  // fields of the key
	perEar      []bool // by field: what can be there only once
	masked      int    // field that is yes if any row says so; -1 if there is none
	left, right int    // fields of 1000 Hz; -1 if there are none
	leftAgain   int    // fields of 1000 Hz when repeated
	rightAgain  int

	index  map[string]int32
	groups []group
	arena  arena
	given  int

	key    []byte
	values []Value
	fresh  []Value
	known  []stored // values of the record that the row belongs to
	entry  Entry
}

// group is a record that is being gathered.
type group struct {
	first, last spot
	rows        int32
	hidden      bool
}

func newGathering(p *plan) *gathering {
	g := &gathering{
		table: p.table, masked: p.recipes[0].masked, index: map[string]int32{}, perEar: make([]bool, len(p.table.Fields)),
		left: p.table.Index("left.1000"), right: p.table.Index("right.1000"), leftAgain: p.table.Index("left.repeat_1000"), rightAgain: p.table.Index("right.repeat_1000"),
	}
	for _, name := range keyFields {
		for _, r := range p.recipes[0].rules {
			if r.name == name && r.make == nil {
				g.keys = append(g.keys, r.field)
			}
		}
	}
	for i := range p.table.Fields {
		f := &p.table.Fields[i]
		ofEar := strings.HasPrefix(f.Name, "left.") || strings.HasPrefix(f.Name, "right.")
		g.perEar[i] = ofEar && (p.frequency == nil || f.Type == record.Hearing)
	}
	return g
}

// take puts a row to the others of its record, or says why that cannot be.
func (g *gathering) take(s *source, row *grid.Row) *Fault {
	right, fault := s.earOf(row)
	if fault != nil {
		return fault
	}
	g.values, fault = s.fill(g.values[:0], s.recipes[0], right, nil)
	if s.frequency != nil {
		g.values, fault = s.tone(g.values, row, right, fault)
	}
	if fault != nil {
		return fault
	}
	if fault := g.makeKey(s, row); fault != nil {
		return fault
	}
	at, found := g.index[string(g.key)]
	if !found {
		at = int32(len(g.groups))
		g.index[string(g.key)] = at
		spot := g.arena.add(row.Line, g.values, spot{}, false)
		g.groups = append(g.groups, group{first: spot, last: spot, rows: 1, hidden: row.Hidden})
		return nil
	}
	group := &g.groups[at]
	if group.rows == maxGathered {
		return &Fault{Why: fmt.Sprintf("more than %d rows belong to the record of this row", maxGathered), Remedy: "Check the export for rows that stand in it many times" + g.apart()}
	}
	if fault := g.join(s, group); fault != nil {
		return fault
	}
	group.last = g.arena.add(row.Line, g.fresh, group.last, true)
	group.rows++
	group.hidden = group.hidden || row.Hidden
	return nil
}

// makeKey makes the key of the row. A record cannot be found without its needed fields.
func (g *gathering) makeKey(s *source, row *grid.Row) *Fault {
	g.key = g.key[:0]
	for _, field := range g.keys {
		text := ""
		for _, v := range g.values {
			if v.Field == field {
				text = v.Text
			}
		}
		if f := &g.table.Fields[field]; text == "" && f.Required {
			return s.fault(nil, f.Name, s.columnOf(field), row, "the field is empty, but it tells which rows belong to one record", "Fill it in")
		}
		g.key = appendText(g.key, text)
	}
	return nil
}

// columnOf gives the column of a field, or nil if it comes from none.
func (p *plan) columnOf(field int) *reference {
	for _, r := range p.recipes[0].rules {
		if r.field == field {
			return r.from
		}
	}
	return nil
}
