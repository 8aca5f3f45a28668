package dossier

import (
	"slices"

	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// around is the number of days before and after a test within which other functional checks show that the
// audiometer was being checked at that time. Where there are none, the log is missing altogether: that is the
// business of the duty, and not of every single test.
const around = 31

// unchecked says whether an audiometer was checked on other days around a day, but not on the day itself.
func (b *Builder) unchecked(audiometer string, day Date) bool {
	days := b.Registers.functional[audiometer]
	i, found := slices.BinarySearch(days, day)
	if found {
		return false
	}
	before := i > 0 && day-days[i-1] <= around
	after := i < len(days) && days[i]-day <= around && days[i] <= b.AsOf
	return before || after
}

// observeEmployment looks for training and protectors on days on which the worker was not employed. They
// count at the site as tests do.
func (b *Builder) observeEmployment(f *File, w *WorkerRecords) {
	outside := func(kind int, rec record.Record, day Date) {
		if !w.employedOn(day) {
			f.Observations = append(f.Observations, observed(kind, f.Refs.Of(rec), ""))
		}
	}
	for _, t := range w.Trainings {
		outside(trainingOutside, t, t.Date)
	}
	for _, i := range w.Issues {
		outside(issueOutside, i, i.Date)
	}
}

// observeStated holds what the source says of a shift against what the thresholds give under the bundle. What
// agrees is noted, too: where another bundle finds otherwise, the source may have meant this one.
func (h *hearing) observeStated(f *File, t *test) {
	for i, stated := range [2]record.Answer{t.rec.LeftStatedShift, t.rec.RightStatedShift} {
		if stated == record.Unanswered {
			continue
		}
		switch h.shows(i, t) {
		case record.Unanswered:
		case stated:
			f.Agreed = append(f.Agreed, observed(statedShiftDiffers, t.ref, earNames[i]))
		default:
			f.Observations = append(f.Observations, observed(statedShiftDiffers, t.ref, earNames[i]))
		}
	}
}

// shows says whether one ear of a test shows the law's shift, as somebody may state it on the day of the test.
// It is not known of a test that has no baseline or lacks a threshold, where the site has elected age correction
// and the age is not known, and, where the law asks for a second test, of the first test that shows it.
func (h *hearing) shows(i int, t *test) record.Answer {
	if !t.later {
		return record.Unanswered
	}
	scheme := &h.b.Measures.Hearing.Shift.Scheme
	base := h.baselines(scheme.Baseline, t.original())[i]
	if h.ageCorrection() && h.deciding(scheme, base, t) == nil {
		return record.Unanswered
	}
	now := h.judgeEar(scheme, i, base, t)
	if !scheme.Confirm || now.Verdict != audiometry.Yes {
		return answerOf(now.Verdict)
	}
	if before, _ := h.neighbours(t); before != nil && audiometry.Confirmed(h.judgeEar(scheme, i, base, before), now) == audiometry.Yes {
		return record.Yes
	}
	return record.Unanswered
}
