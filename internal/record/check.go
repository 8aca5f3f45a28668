package record

import (
	"reflect"

	"hearduty/internal/diag"
)

// Check looks at a record as a whole: required fields, and fields that contradict each other.
func (t *Table) Check(r Record) []*Problem {
	var c check
	v := reflect.ValueOf(r).Elem()
	for _, i := range t.needed {
		if empty(v, t.Fields[i].slot) {
			c.reject(t.Fields[i].Name, "", "Fill it in", "the field is empty, but every "+string(t.Kind)+" needs it")
		}
	}
	c.across(r)
	return c.problems
}

// empty says whether a required field is absent. Fields of several columns are never required.
func empty(r reflect.Value, slot int) bool {
	switch p := pointer(r, slot).(type) {
	case *string:
		return *p == ""
	case *Date:
		return !p.Known()
	case *Number:
		return !p.Known
	case *Answer:
		return *p == Unanswered
	case *List:
		return len(*p) == 0
	}
	return false
}

type check struct{ problems []*Problem }

func (c *check) reject(field, read, remedy, why string) {
	c.problems = append(c.problems, &Problem{diag.Error, field, Shorten(read), why, remedy})
}

func (c *check) warn(field, read, remedy, why string) {
	c.problems = append(c.problems, &Problem{diag.Warning, field, Shorten(read), why, remedy})
}

// order rejects a stretch of days whose last day lies before its first.
func (c *check) order(firstName string, first Date, lastName string, last Date) {
	if first.Known() && last.Known() && last < first {
		c.reject(lastName, last.String(), "Correct one of the two dates", lastName+" lies before "+firstName)
	}
}

// notBefore warns of a later step that is dated before the earlier one.
func (c *check) notBefore(firstName string, first Date, lastName string, last Date) {
	if first.Known() && last.Known() && last < first {
		c.warn(lastName, last.String(), "Correct one of the two dates", lastName+" lies before "+firstName)
	}
}

func (c *check) across(r Record) {
	switch r := r.(type) {
	case *Worker:
		c.order("hired_on", r.HiredOn, "left_on", r.LeftOn)
		if r.BirthDate.Known() && r.HiredOn.Known() && r.BirthDate >= r.HiredOn {
			c.reject("birth_date", r.BirthDate.String(), "Correct one of the two dates", "birth_date does not lie before hired_on")
		}
	case *Assignment:
		c.order("from", r.From, "to", r.To)
	case *Measurement:
		if r.Group == "" && r.WorkerID == "" && r.Area == "" {
			c.reject("group", "", "Fill in group, worker_id or area", "the measurement names no group, no worker and no area, so it stands for nobody")
		}
	case *Task:
		if r.MinutesLow.Known && r.MinutesHigh.Known && r.MinutesHigh.Value < r.MinutesLow.Value {
			c.reject("minutes_high", r.MinutesHigh.String(), "Exchange or correct the two durations", "minutes_high is less than minutes_low")
		}
	case *Change:
		if r.Group == "" && r.Area == "" {
			c.reject("group", "", "Fill in group or area", "the change names neither group nor area, so it touches nobody")
		}
	case *Control:
		if r.Group == "" && r.Area == "" {
			c.reject("group", "", "Fill in group or area", "the control names neither group nor area, so it protects nobody")
		}
	case *Audiogram:
		c.notBefore("date", r.Date, "determined_on", r.DeterminedOn)
		c.notBefore("date", r.Date, "reviewed_on", r.ReviewedOn)
		c.notBefore("date", r.Date, "received_on", r.ReceivedOn)
	case *Examination:
		if !r.OfferedOn.Known() && !r.AttendedOn.Known() {
			c.reject("offered_on", "", "Fill in offered_on, attended_on or both", "the examination was neither offered nor held on any day")
		}
		c.notBefore("offered_on", r.OfferedOn, "attended_on", r.AttendedOn)
		c.notBefore("attended_on", r.AttendedOn, "results_on", r.ResultsOn)
		c.notBefore("attended_on", r.AttendedOn, "certificate_on", r.CertificateOn)
	case *ProtectorIssue:
		c.order("date", r.Date, "returned_on", r.ReturnedOn)
	case *WearCheck:
		if r.WorkerID == "" && r.Area == "" {
			c.reject("worker_id", "", "Fill in worker_id or area", "the wear check names neither worker nor area")
		}
		if r.Wearing.Known && r.Observed.Known && r.Wearing.Value > r.Observed.Value {
			c.reject("wearing", r.Wearing.String(), "Correct one of the two numbers", "more workers wear protectors than were looked at")
		}
	case *Instrument:
		c.order("in_service_from", r.InServiceFrom, "in_service_to", r.InServiceTo)
	case *Tester:
		c.order("valid_from", r.ValidFrom, "valid_to", r.ValidTo)
	case *Document:
		c.notBefore("date", r.Date, "reviewed_on", r.ReviewedOn)
		c.order("posted_on", r.PostedOn, "posted_to", r.PostedTo)
	}
}
