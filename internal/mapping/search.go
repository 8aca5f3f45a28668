package mapping

import (
	"fmt"

	"hearduty/internal/grid"
)

// findHeader finds the header among the first rows: that of the row stated, or else the first that holds all
// columns named.
func (p *plan) findHeader(f *feed, s *selection) (*header, error) {
	h := p.file.Head
	if h == nil {
		h = &Head{}
	}
	count := max(h.Rows, 1)
	about := f.rows.About()
	switch {
	case h.None:
		return &header{}, nil
	case h.Transposed, isObjects(about.Format):
		rows := f.look(1, 0)
		if len(rows) == 0 {
			return nil, f.empty()
		}
		return newHeader(rows[:1], nil), nil
	case h.Row > 0:
		return f.stated(h.Row, count)
	}
	rows := f.look(searched+1, 0)
	var best *header
	most := 0
	for i := range rows[:min(len(rows), searched)] {
		if !s.candidate(&rows[i]) || i+count > len(rows) {
			continue
		}
		head := newHeader(rows[i:i+count], about.Merged)
		missing := p.missing(head)
		if len(missing) == 0 {
			return head, nil
		}
		named := p.named()
		score := 2 * (len(named) - len(missing))
		for _, r := range missing {
			if near(r.names, head.names()) != "" {
				score++
			}
		}
		if score > most {
			best, most = head, score
		}
	}
	if best == nil {
		if f.end != nil && len(rows) == 0 {
			return nil, f.empty()
		}
		where := "no row of the file"
		if len(rows) > searched {
			where = fmt.Sprintf("none of the first %d rows", searched)
		}
		return nil, &grid.Fault{Problem: where + " holds the columns that the map names", Remedy: "Check whether this is the file that the map is for; if it has no header, write none: true under head and name columns by position"}
	}
	return best, nil
}

func isObjects(f grid.Format) bool { return f == grid.JSON || f == grid.Lines || f == grid.YAML }

// empty says why there is no row at all.
func (f *feed) empty() error {
	if fault, ok := f.end.(*grid.Fault); ok {
		return fault
	}
	return &grid.Fault{Problem: "the file is empty", Remedy: "Export it again, or remove it from the program file"}
}

// stated gives the header that begins in the row stated.
func (f *feed) stated(line, count int) (*header, error) {
	rows := f.look(1, line)
	if count > 1 {
		rows = f.look(len(rows)+1, line)
	}
	for i := range rows {
		if rows[i].Line != line {
			continue
		}
		if i+count > len(rows) {
			break
		}
		for j := range count {
			if fault := rows[i+j].Fault; fault != nil {
				return nil, &grid.Fault{Line: line + j, Column: fault.Column, Problem: "the header cannot be read: " + fault.Problem, Remedy: fault.Remedy}
			}
		}
		return newHeader(rows[i:i+count], f.rows.About().Merged), nil
	}
	return nil, &grid.Fault{Problem: fmt.Sprintf("the file has no header in row %d", line), Remedy: "Correct row under head in the map; rows count from 1, and line breaks within cells count as well"}
}

// named lists the columns that are used by name.
func (p *plan) named() []*reference {
	var out []*reference
	for _, r := range p.references {
		if len(r.names) > 0 {
			out = append(out, r)
		}
	}
	return out
}

// missing lists the columns that a header lacks.
func (p *plan) missing(h *header) []*reference {
	var out []*reference
	for _, r := range p.named() {
		found := false
		for _, name := range r.names {
			found = found || len(h.find(name)) > 0
		}
		if !found {
			out = append(out, r)
		}
	}
	return out
}
