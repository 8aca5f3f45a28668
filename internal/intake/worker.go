package intake

import (
	"slices"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// person is what is known of one worker from the accepted rows.
type person struct {
	at         record.Origin // first row
	sex        string
	birth      record.Date
	employment []employment
	doubts     []employment // stretches of rows that give the id to somebody else
}

// employment is one stretch of a worker's employment.
type employment struct {
	days calendar.Spell
	at   record.Origin
}

// admitWorker lets a worker have several rows, one a stretch of employment.
func (g *register) admitWorker(w *record.Worker) *record.Problem {
	this := employment{days: calendar.Spell{From: w.HiredOn}, at: w.At()}
	if w.LeftOn.Known() {
		this.days.To = w.LeftOn.AddDays(1)
	}
	known := g.workers[w.WorkerID]
	if known == nil {
		known = &person{at: w.At()}
	}
	otherBirth := known.birth.Known() && w.BirthDate.Known() && known.birth != w.BirthDate
	otherSex := known.sex != "" && w.Sex != "" && known.sex != w.Sex
	if otherBirth || otherSex {
		known.doubts = append(known.doubts, this)
	}
	for _, other := range known.employment {
		if overlap(this.days, other.days) {
			return refuse("hired_on", w.HiredOn.String(), "Give the earlier stretch its left_on, one row a stretch and site; if they are two people, give each an id of its own",
				"the employment of worker %q overlaps with the one in %s", record.Shorten(w.WorkerID), g.place(other.at))
		}
	}
	const remedy = "Correct the wrong one; if they are two people, give each an id of its own"
	switch {
	case otherBirth:
		return refuse("birth_date", w.BirthDate.String(), remedy, "the birth date of worker %q is not the one in %s", record.Shorten(w.WorkerID), g.place(known.at))
	case otherSex:
		return refuse("sex", w.Sex, remedy, "the sex of worker %q is not the one in %s", record.Shorten(w.WorkerID), g.place(known.at))
	}
	if known.sex == "" {
		known.sex = w.Sex
	}
	if !known.birth.Known() {
		known.birth = w.BirthDate
	}
	if len(known.employment) == 0 {
		g.workers[strings.Clone(w.WorkerID)] = known // the id shares memory with its whole row
	}
	known.employment = append(known.employment, this)
	return nil
}

// doubted refuses a record of an id that rows of workers give to two people, unless only the one whose row was accepted
// was employed on its day.
func (g *register) doubted(p *person, worker string, r record.Record) *record.Problem {
	if g.column.day >= 0 {
		day := dayIn(g.table, g.column.day, r)
		if day.Known() && employed(p.employment, day) && !employed(p.doubts, day) {
			return nil
		}
	}
	return refuse("worker_id", worker, "Correct the rows of the worker, or say in the same_person file whose the id was on which days",
		"the rows of worker %q (%s, and %s) contradict each other and may be two people, so whose this row is cannot be told", record.Shorten(worker), g.place(p.at), g.place(p.doubts[0].at))
}

func employed(stretches []employment, day record.Date) bool {
	return slices.ContainsFunc(stretches, func(e employment) bool { return e.days.Contains(day) })
}

// overlap says whether two stretches of employment share more than the day on which one ends and the other
// begins, as it does when somebody moves to another site.
func overlap(a, b calendar.Spell) bool {
	shared := a.Intersect(b)
	if shared.Empty() {
		return false
	}
	handover := shared.To == shared.From+1 && a.From != b.From && (a.To == shared.To && b.From == shared.From || b.To == shared.To && a.From == shared.From)
	return !handover
}
