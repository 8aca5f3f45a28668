package dossier

import (
	"slices"

	"hearduty/internal/record"
)

// Examination is one offer of a hearing test or health appointment and what came of it.
type Examination struct {
	ID            string        `json:"id" doc:"id of the examination"`
	Ref           string        `json:"ref" doc:"reference of the record"`
	Type          string        `json:"kind" doc:"hearing_test or health_appointment"`
	Purpose       string        `json:"purpose" doc:"why it was offered"`
	OfferedOn     Date          `json:"offered_on" doc:"day on which it was offered"`
	Answer        string        `json:"answer" doc:"accepted, declined or no_answer"`
	AttendedOn    Date          `json:"attended_on" doc:"day on which the worker was examined"`
	Result        string        `json:"result" doc:"the outcome as the clinic words it, without thresholds"`
	Damage        record.Answer `json:"damage" doc:"whether hearing damage that can be identified was found"`
	CertificateOn Date          `json:"certificate_on" doc:"day on which the certificate was given to worker and employer"`
	ResultsOn     Date          `json:"results_on" doc:"day on which the worker was told the results"`
	NextDue       Date          `json:"next_due" doc:"day by which the physician wants the next one"`
	ByIs          string        `json:"by_is" doc:"profession of the examiner; null if not known"`
	Afterwards    []Done        `json:"follow_ups" doc:"what was done or decided after it and before the next one, and names no audiogram, oldest first"`
}

// Series of examinations.
const (
	testOffered         = "test.offered"
	testDone            = "test.done"
	appointmentOffered  = "appointment.offered"
	appointmentAttended = "appointment.attended"
)

// examinations writes the examinations up to the as-of day and adds their series. A hearing test on record counts as
// offered and done on its day, whether it came with thresholds or with an outcome only; one that was found invalid as
// offered only, and a retest that stands in for a test as done only.
func (b *Builder) examinations(w *WorkerRecords, h *hearing, refs Refs, series map[string][]Link) []Examination {
	out := []Examination{}
	add := func(name string, day Date, ref string) {
		if day.Known() && day <= b.AsOf {
			series[name] = append(series[name], Link{day, ref})
		}
	}
	for _, t := range h.tests {
		if t.retestOf == nil {
			add(testOffered, t.rec.Date, t.ref)
		}
		if t.counts() {
			add(testDone, t.rec.Date, t.ref)
		}
	}
	for _, e := range w.Examinations {
		if !b.here(w, firstDay(e)) {
			continue
		}
		ref := refs.Of(e)
		offered, attended := testOffered, testDone
		if e.Type == "health_appointment" {
			offered, attended = appointmentOffered, appointmentAttended
		}
		switch {
		case offered == testOffered && e.Purpose == "retest": // the retest stands in for a test that was offered
		case e.OfferedOn.Known():
			add(offered, e.OfferedOn, ref)
		default:
			add(offered, e.AttendedOn, ref)
		}
		add(attended, e.AttendedOn, ref)
		out = append(out, Examination{
			ID: e.ExaminationID, Ref: ref, Type: e.Type, Purpose: e.Purpose, OfferedOn: h.past(e.OfferedOn), Answer: e.Answer,
			AttendedOn: h.past(e.AttendedOn), Result: e.Result, Damage: e.Damage, CertificateOn: h.past(e.CertificateOn),
			ResultsOn: h.past(e.ResultsOn), NextDue: e.NextDue, ByIs: b.Registers.professionOf(e.By), Afterwards: []Done{},
		})
	}
	for i := range out {
		out[i].Afterwards = h.after(&out[i], out[i+1:])
	}
	for _, name := range []string{testOffered, testDone, appointmentOffered, appointmentAttended} {
		slices.SortStableFunc(series[name], func(a, b Link) int { return int(a.Date) - int(b.Date) })
	}
	return out
}

// after gives what was done after an examination and before the next one that was attended.
func (h *hearing) after(e *Examination, later []Examination) []Done {
	out := []Done{}
	if !e.AttendedOn.Known() {
		return out
	}
	var next Date
	for i := range later {
		if later[i].AttendedOn.Known() {
			next = later[i].AttendedOn
			break
		}
	}
	for _, f := range h.follow {
		if f.AudiogramID == "" && f.Date >= e.AttendedOn && (!next.Known() || f.Date < next) {
			out = append(out, Done{*link(h.refs, f, f.Date), f.Type, f.Result, f.Ear, h.b.Registers.professionOf(f.By)})
		}
	}
	return out
}

// told lists the notices of exposure, oldest first.
func (b *Builder) told(w *WorkerRecords, refs Refs) []Told {
	out := []Told{}
	for _, n := range w.Notices {
		if n.About == "exposure" || n.About == "corrective_action" {
			out = append(out, Told{*link(refs, n, n.Date), n.About, n.Written})
		}
	}
	return out
}
