package judge

import (
	"fmt"

	"hearduty/internal/calendar"
	"hearduty/internal/intake"
	"hearduty/internal/record"
)

// later counts the records of events after the day judged. They count for nothing yet, which must not pass in
// silence: the day of one may be misspelt.
type later struct {
	number int
	first  record.Origin
}

func (l *later) look(r record.Record, asOf calendar.Date) {
	if day := eventDay(r); day > asOf {
		if l.number == 0 {
			l.first = r.At()
		}
		l.number++
	}
}

// eventDay gives the day on which something was done; it is not known for records of what lasts.
func eventDay(r record.Record) calendar.Date {
	switch r := r.(type) {
	case *record.Audiogram:
		return r.Date
	case *record.Measurement:
		return r.Date
	case *record.Training:
		return r.Date
	case *record.Notice:
		return r.Date
	case *record.FollowUp:
		return r.Date
	case *record.ProtectorIssue:
		return r.Date
	case *record.FitTest:
		return r.Date
	case *record.WearCheck:
		return r.Date
	case *record.Calibration:
		return r.Date
	case *record.Examination:
		return r.AttendedOn
	case *record.RoomSurvey:
		return r.Date
	}
	return 0
}

// remark says how many there are and where the first one stands; it is empty if there are none.
func (l *later) remark(asOf calendar.Date, ledger *intake.Ledger) string {
	if l.number == 0 {
		return ""
	}
	in := ledger.Inputs[l.first.Source]
	place := fmt.Sprintf("%s, row %d", in.Name(), l.first.Row)
	if l.number == 1 {
		return fmt.Sprintf("1 record (%s) is dated after %s, the day judged, and counts for nothing yet", place, asOf)
	}
	return fmt.Sprintf("%d records (the first in %s) are dated after %s, the day judged, and count for nothing yet", l.number, place, asOf)
}
