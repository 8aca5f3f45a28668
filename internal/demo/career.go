package demo

import (
	"math/rand/v2"
	"time"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// career writes all records of one worker, as a program without a fault has them.
type career struct {
	*person
	asOf   Date
	n      *numbers
	put    func(record.Record)
	spells []spell
	refits []Date // days on which a stronger protector is handed out after a shift
}

// spell is a stretch of days at one site in groups that belong in the program.
type spell struct {
	site     *site
	stays    []stay
	from, to Date // first and last day; no last day while open
}

// last gives the last day of the spell that records can tell of.
func (c *career) last(s spell) Date {
	if s.to.Known() {
		return min(s.to, c.asOf)
	}
	return c.asOf
}

// writeCareer writes the records of a worker up to the as-of day.
func writeCareer(p *person, asOf Date, n *numbers, put func(record.Record)) {
	c := &career{person: p, asOf: asOf, n: n, put: put, spells: spellsOf(p.stays)}
	c.employment()
	c.exposureNotices()
	c.hearingTests()
	for _, s := range c.spells {
		c.training(s)
		c.protection(s)
		c.wearChecks(s)
	}
}

// spellsOf joins the stays in noisy groups that follow each other at one site.
func spellsOf(stays []stay) []spell {
	var out []spell
	for _, s := range stays {
		if !s.group.noisy() {
			continue
		}
		if i := len(out) - 1; i >= 0 && out[i].site == s.site && out[i].to+1 == s.from {
			out[i].to = s.to
			out[i].stays = append(out[i].stays, s)
			continue
		}
		out = append(out, spell{s.site, []stay{s}, s.from, s.to})
	}
	return out
}

// employment writes one worker record for each stretch of employment, and one assignment for each stay.
func (c *career) employment() {
	var stretches []*record.Worker
	for i, s := range c.stays {
		if i == 0 || s.site != c.stays[i-1].site || c.stays[i-1].to+1 != s.from {
			stretches = append(stretches, &record.Worker{WorkerID: c.id, Site: s.site.id, Sex: c.sex, BirthDate: c.birth, HiredOn: s.from})
		}
		w := stretches[len(stretches)-1]
		w.LeftOn, w.JobTitle, w.InProgram = s.to, s.group.job, record.No
		if s.group.noisy() {
			w.InProgram = record.Yes
		}
		c.put(&record.Assignment{WorkerID: c.id, Group: s.group.id, From: s.from, To: s.to})
	}
	for _, w := range stretches {
		c.put(w)
	}
}

// exposureNotices tells the worker of every measurement of the group: of those made before, on arrival.
func (c *career) exposureNotices() {
	rng := dice(c.id, "notices")
	for _, s := range c.spells {
		for _, stay := range s.stays {
			for _, m := range stay.group.measured {
				told := m.on.AddDays(7 + rng.IntN(14))
				if m.on < stay.from {
					told = stay.from.AddDays(rng.IntN(3))
				}
				if m.dose < enrolDose || m.on > stay.end() {
					continue
				}
				told = min(workday(told), stay.end(), c.asOf)
				c.put(&record.Notice{WorkerID: c.id, Date: told, About: "exposure", MeasurementID: m.id, Written: record.Yes})
			}
		}
	}
}

// topics are what a training must cover.
var topics = record.List{"noise_effects", "protectors", "audiometry"}

// training writes a session in the first week and then one a year, always before the year is over.
func (c *career) training(s spell) {
	rng := dice(c.id, "training"+s.from.String())
	language := "en"
	if dice(c.id, "language").IntN(6) == 0 {
		language = "es"
	}
	for d := min(workday(s.from.AddDays(rng.IntN(4))), c.last(s)); d <= c.last(s); d = yearLater(d, rng) {
		c.put(&record.Training{WorkerID: c.id, Date: d, Topics: topics, Language: language, By: s.site.clinic.trainer})
	}
}

// yearLater gives a day at most 28 days before the year after d is over.
func yearLater(d Date, rng *rand.Rand) Date {
	return workday(d.AddMonths(12).AddDays(-3 - rng.IntN(25)))
}

// workday moves a day at the weekend to the Monday after it.
func workday(d Date) Date {
	switch d.Weekday() {
	case time.Saturday:
		return d + 2
	case time.Sunday:
		return d + 1
	}
	return d
}

// protection writes a protector handed over on the first day, a fresh one every year, and a stronger one
// after a shift. Each is fitted, and every third worker's fit is measured every other time.
func (c *career) protection(s spell) {
	rng := dice(c.id, "protection"+s.from.String())
	model := s.site.models[rng.IntN(len(s.site.models))]
	measuresFit := rng.IntN(3) == 0
	for d, times := s.from, 0; d <= c.last(s); times++ {
		next, refit := yearLater(d, rng), false
		for _, r := range c.refits {
			if r > d && r <= next && r <= c.last(s) {
				next, refit = r, true
				break
			}
		}
		returned := next
		if next > c.last(s) {
			returned = s.to // given back on the last day, or still in use
			if s.to > c.asOf {
				returned = 0
			}
		}
		c.put(&record.ProtectorIssue{WorkerID: c.id, ProtectorID: model, Date: d, ReturnedOn: returned,
			ChoicesOffered: record.Num(float64(3 + rng.IntN(2))), FittedBy: s.site.clinic.trainer, Required: record.Yes})
		if measuresFit && times%2 == 0 && d+9 <= min(c.last(s), next) {
			par := float64(18 + rng.IntN(9))
			c.put(&record.FitTest{WorkerID: c.id, ProtectorID: model, Date: d + 9, PARDB: record.Num(par),
				LeftPARDB: record.Num(par + 1), RightPARDB: record.Num(par), Percent: record.Num(50), UncertaintyDB: record.Num(4), Passed: record.Yes})
		}
		if refit {
			model = s.site.strong
		}
		d = next
	}
}

// wearChecks writes a look at the worker soon after the start and every spring.
func (c *career) wearChecks(s spell) {
	rng := dice(c.id, "wear"+s.from.String())
	look := func(d Date) {
		c.put(&record.WearCheck{WorkerID: c.id, Date: d, Worn: record.Yes})
	}
	if d := workday(s.from.AddDays(20)); d <= c.last(s) {
		look(d)
	}
	for year := s.from.Year(); year <= c.asOf.Year(); year++ {
		april, _ := calendar.NewDate(year, time.April, 3)
		d := workday(april.AddDays(rng.IntN(56)))
		if d > s.from.AddDays(60) && d <= c.last(s) {
			look(d)
		}
	}
}
