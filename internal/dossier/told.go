package dossier

import (
	"slices"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// levelsOf names the exposure levels that an exposure reaches on a day, where the bundle asks whether a notice of an
// earlier result at the same levels spares another one.
func (b *Builder) levelsOf(on []known, day Date) []string {
	out := []string{}
	if b.Measures.Exposure.NoticeLasts == "" {
		return out
	}
	for _, level := range b.levels {
		if b.reaches(level, on, day).verdict == record.Yes {
			out = append(out, level)
		}
	}
	return out
}

// toldBefore finds the latest written notice of an earlier result at the same levels that still spares another one on
// the day since which a result concerns the worker.
func (b *Builder) toldBefore(earlier []Result, r *Result) *Link {
	var found *Link
	for i := range earlier {
		e := &earlier[i]
		if e.Notice == nil || e.Written != record.Yes || e.Notice.Date > r.Since || !slices.Equal(e.Levels, r.Levels) {
			continue
		}
		lasts, ok := b.Law.Interval(b.Measures.Exposure.NoticeLasts, e.Notice.Date)
		if !ok {
			continue
		}
		if until, err := lasts.After(e.Notice.Date, nil); err == nil && r.Since <= until && (found == nil || found.Date < e.Notice.Date) {
			found = e.Notice
		}
	}
	return found
}

// absences lists the stretches between two employments.
func absences(employed []calendar.Spell) []Absence {
	out := []Absence{}
	for i := 1; i < len(employed); i++ {
		from, to := employed[i-1].To, employed[i].From
		if from.Known() && from < to {
			out = append(out, Absence{From: from, To: to, Months: record.Num(monthsBetween(from, to))})
		}
	}
	return out
}

// monthsBetween gives the months from one day to another: whole months, and each further day as 1/31 of one, so that a
// day more than a whole number of months is always more.
func monthsBetween(from, to Date) float64 {
	whole := 0
	for from.AddMonths(whole+1) <= to {
		whole++
	}
	return float64(whole) + float64(to-from.AddMonths(whole))/31
}
