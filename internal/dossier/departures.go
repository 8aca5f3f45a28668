package dossier

import (
	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// Departure is the end of a stretch of employment.
type Departure struct {
	From           Date          `json:"from" doc:"first day of the employment"`
	Last           Date          `json:"last" doc:"last day of the employment"`
	TestAge        record.Number `json:"test_age_days" doc:"days from the latest hearing test up to that day until that day; null if there is none"`
	AppointmentAge record.Number `json:"appointment_age_days" doc:"the same of the latest health appointment attended"`
	TestAfter      *Link         `json:"test_after" doc:"the first hearing test after that day"`
	Appointment    *Link         `json:"appointment_after" doc:"the first health appointment attended after that day"`
}

// departures lists the ends of employments, also those known beforehand, with the examinations around each.
func (b *Builder) departures(employed []calendar.Spell, series map[string][]Link) []Departure {
	out := []Departure{}
	for _, e := range employed {
		if !e.To.Known() {
			continue
		}
		d := Departure{From: e.From, Last: e.To - 1}
		d.TestAge, d.TestAfter = eitherSide(series[testDone], d.Last)
		d.AppointmentAge, d.Appointment = eitherSide(series[appointmentAttended], d.Last)
		out = append(out, d)
	}
	return out
}

// eitherSide gives the age in days on a day of the latest of several records up to it, and the first one after it.
func eitherSide(list []Link, day Date) (age record.Number, after *Link) {
	for i := range list {
		if list[i].Date > day {
			return age, &list[i]
		}
		age = record.Num(float64(day - list[i].Date))
	}
	return age, nil
}
