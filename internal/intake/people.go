package intake

import (
	"fmt"

	"hearduty/internal/calendar"
	"hearduty/internal/diag"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

// people says which worker ids stand for which person. Nobody is ever recognized by a name.
type people struct {
	aliases map[string][]*alias // by the id that stands in the records
	order   []*alias            // as in the file
	now     int                 // rows of the current input that were translated
	table   *record.Table       // of the current record
	id, day int                 // fields of the table
}

type alias struct {
	program.Alias
	used bool
}

func newPeople(list []program.Alias) *people {
	p := &people{aliases: map[string][]*alias{}}
	for _, a := range list {
		known := &alias{Alias: a}
		p.order = append(p.order, known)
		p.aliases[a.Other] = append(p.aliases[a.Other], known)
	}
	return p
}

// dayFields name the field that dates a record, where it is not date.
var dayFields = map[record.Kind]string{"worker": "hired_on", "assignment": "from", "examination": "offered_on"}

// translate puts the id of the person in place of another id in a record.
func (p *people) translate(r record.Record) {
	if len(p.aliases) == 0 {
		return
	}
	if p.table == nil || p.table.Kind != r.Kind() {
		p.begin(r.Kind())
	}
	if p.id < 0 {
		return
	}
	for _, a := range p.aliases[p.table.Text(r, p.id)] {
		if a.Days == (calendar.Spell{}) || p.day >= 0 && a.Days.Contains(dayIn(p.table, p.day, r)) {
			a.used = true
			p.now++
			p.table.Set(r, p.id, a.ID)
			return
		}
	}
}

func (p *people) begin(k record.Kind) {
	p.table, _ = record.TableOf(k)
	p.id, p.day = p.table.Index("worker_id"), dayField(p.table)
}

// dayField gives the field that dates a record, or -1.
func dayField(t *record.Table) int {
	if name := dayFields[t.Kind]; name != "" {
		return t.Index(name)
	}
	return t.Index("date")
}

// dayIn gives the day of a record by the field that dates it; of an examination without an offer, the day on which it
// was held.
func dayIn(t *record.Table, field int, r record.Record) record.Date {
	if e, ok := r.(*record.Examination); ok && !e.OfferedOn.Known() {
		return e.AttendedOn
	}
	return dayOf(t.Text(r, field))
}

// dayOf gives the day of a date that was read; it is not known if the field is empty.
func dayOf(text string) record.Date {
	day, err := calendar.Parse(text)
	if err != nil {
		return 0
	}
	return day
}

// input tells how many rows of an input were translated.
func (p *people) input(m *remarks, in *Input) {
	if p.now > 0 {
		at := diag.Position{File: in.File, Sheet: in.Sheet, Field: "worker_id"}
		word := "1 row has another id of its worker, which was"
		if p.now > 1 {
			word = fmt.Sprintf("%d rows have another id of their worker, which was", p.now)
		}
		m.list.Warnf(at, "Nothing needs to be done if the same_person file is right", "%s replaced as the same_person file says", word)
	}
	p.now = 0
}

// done names the entries that no row needed.
func (p *people) done(m *remarks) {
	for _, a := range p.order {
		if a.used {
			continue
		}
		of := ""
		if a.Days != (calendar.Spell{}) {
			of = " of these days"
		}
		m.list.Warnf(a.At, "Remove the entry, or correct the id if it is misspelt (leading zeros count)", "no row%s has the id %q", of, record.Shorten(a.Other))
	}
}
