package html

import (
	"slices"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// worded draws events each with its words.
func (d *drawing) worded(lane string, list []finding.Event) {
	items := make([]item, 0, len(list))
	for _, e := range list {
		label := e.Label
		if what, rest, ok := strings.Cut(label, ": "); ok && strings.HasPrefix(what, "change") {
			label = rest
		}
		items = append(items, d.item(e.Date, label))
	}
	if len(items) == 0 {
		d.events(lane, nil, 0)
		return
	}
	rows := pack(items)
	top := d.lane(laneName(lane), len(list), 15*float64(rows)+2)
	for i, it := range items {
		y := top + 8.5 + 15*float64(it.row)
		state := worstState(list[i : i+1])
		d.seen[state] = true
		d.add("e "+state, eventShapes[state](it.x, y))
		d.Texts = append(d.Texts, it.text(y+4))
	}
}

// item is a mark with a word beside it, on the side where there is room.
type item struct {
	x          float64
	word       string
	left       bool // the word stands left of the mark
	begin, end float64
	row        int
}

func (d *drawing) item(day calendar.Date, word string) item {
	x := d.scale.x(day)
	it := item{x: x, left: x > d.Width/2}
	room := d.Width - x - 8
	if it.left {
		room = x - 8
	}
	it.word = cut(word, int(room/wide("x")))
	w := wide(it.word)
	it.begin, it.end = x-6, x+8+w
	if it.left {
		it.begin, it.end = x-8-w, x+6
	}
	return it
}

func (it *item) text(y float64) text {
	if it.left {
		return text{X: it.x - 7, Y: y, Class: "end", Text: it.word}
	}
	return text{X: it.x + 7, Y: y, Text: it.word}
}

// pack puts items into the first row that has room for them and gives the number of rows.
func pack(items []item) int {
	var rows [][]item
next:
	for i := range items {
		for r, row := range rows {
			if !slices.ContainsFunc(row, func(o item) bool { return items[i].begin < o.end && o.begin < items[i].end }) {
				items[i].row = r
				rows[r] = append(row, items[i])
				continue next
			}
		}
		items[i].row = len(rows)
		rows = append(rows, []item{items[i]})
	}
	return len(rows)
}
