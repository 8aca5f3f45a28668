package mapping

import (
	"fmt"
)

// join finds what is new in the row, or what contradicts the rows before it.
func (g *gathering) join(s *source, group *group) *Fault {
	g.known, g.fresh = g.known[:0], g.fresh[:0]
	g.arena.each(group.first, func(int) {}, func(v stored) { g.known = append(g.known, v) })
	for _, v := range g.values {
		old := g.last(v.Field)
		if old != nil && g.perEar[v.Field] {
			if again := g.again(v.Field); again >= 0 && g.last(again) == nil {
				v.Field, old = again, nil
			}
		}
		switch {
		case old == nil:
			g.fresh = append(g.fresh, v)
		case g.perEar[v.Field]:
			return &Fault{Column: v.Column, Field: g.table.Fields[v.Field].Name, Header: s.Header(v.Column),
				Why:    fmt.Sprintf("%s of this record was already read in row %d", g.table.Fields[v.Field].Name, old.line),
				Remedy: "Keep the row that counts" + g.apart()}
		case string(old.text) == v.Text:
		case v.Field == g.masked:
			if v.Text == "yes" {
				g.fresh = append(g.fresh, v)
			}
		default:
			read := v.Read
			if read == "" {
				read = v.Text
			}
			return &Fault{Column: v.Column, Field: g.table.Fields[v.Field].Name, Header: s.Header(v.Column), Read: read,
				Why:    fmt.Sprintf("the cell contradicts row %d, which belongs to the same record", old.line),
				Remedy: "Correct one of the two" + g.apart()}
		}
	}
	return nil
}

// last gives the value that the record has of a field, or nil.
func (g *gathering) last(field int) *stored {
	for i := len(g.known) - 1; i >= 0; i-- {
		if g.known[i].field == field {
			return &g.known[i]
		}
	}
	return nil
}

// again gives the field of a repeated test at 1000 Hz, or -1.
func (g *gathering) again(field int) int {
	switch field {
	case g.left:
		return g.leftAgain
	case g.right:
		return g.rightAgain
	}
	return -1
}

// give gives the next record. It returns false after the last.
func (g *gathering) give(o *Out) bool {
	if g.given == len(g.groups) {
		return false
	}
	group := &g.groups[g.given]
	g.given++
	*o = Out{Lines: o.Lines[:0], Remarks: o.Remarks[:0]}
	g.entry.Values = g.entry.Values[:0]
	g.arena.each(group.first, func(line int) {
		if o.Line == 0 {
			o.Line = line
		} else {
			o.Lines = append(o.Lines, line)
		}
	}, func(v stored) {
		value := Value{Field: v.field, Text: string(v.text), Read: string(v.read), Column: v.column}
		if v.field == g.masked {
			for i := range g.entry.Values {
				if g.entry.Values[i].Field == v.field {
					g.entry.Values[i] = value
					return
				}
			}
		}
		g.entry.Values = append(g.entry.Values, value)
	})
	o.Records = append(o.Records[:0], g.entry)
	if group.hidden {
		o.Remarks = append(o.Remarks, hiddenRead())
	}
	return true
}

// apart says what to do if rows of two records look like one.
func (g *gathering) apart() string {
	if g.table.Kind != "audiogram" {
		return ""
	}
	return "; if these are two tests of one day, map what tells them apart, such as audiogram_id or purpose"
}
