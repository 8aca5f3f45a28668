package dossier

import (
	"slices"

	"hearduty/internal/record"
)

// Done is something done or decided after a hearing test.
type Done struct {
	Link
	Type   string `json:"kind" doc:"what was done or decided"`
	Result string `json:"result" doc:"the outcome"`
	Ear    string `json:"ear" doc:"left, right or both"`
	ByIs   string `json:"by_is" doc:"profession of the person who did or decided it; null if not known"`
}

// Told is something that a worker was told.
type Told struct {
	Link
	About   string        `json:"about" doc:"what the worker was told about"`
	Written record.Answer `json:"written" doc:"whether it was given in writing"`
}

// afterwards gives what was done, decided and told after a test: what names it, or names none and lies between
// it and the next one, of which the outcome alone may be on record.
func (h *hearing) afterwards(t *test) ([]Done, []Told) {
	done, told := []Done{}, []Told{}
	for _, f := range h.follow {
		if about(f.AudiogramID, f.Date, t) && (f.AudiogramID != "" || !h.testedBetween(t, f.Date)) {
			done = append(done, Done{*link(h.refs, f, f.Date), f.Type, f.Result, f.Ear, h.b.Registers.professionOf(f.By)})
		}
	}
	for _, n := range h.notices {
		if n.MeasurementID == "" && n.About != "exposure" && about(n.AudiogramID, n.Date, t) && (n.AudiogramID != "" || !h.testedBetween(t, n.Date)) {
			told = append(told, Told{*link(h.refs, n, n.Date), n.About, n.Written})
		}
	}
	return done, told
}

// testedBetween says whether a test of which the outcome alone is on record lies after a test and not after a day.
func (h *hearing) testedBetween(t *test, day Date) bool {
	return slices.ContainsFunc(h.w.Examinations, func(e *record.Examination) bool {
		return e.Type == "hearing_test" && e.AttendedOn > t.rec.Date && e.AttendedOn <= day
	})
}
