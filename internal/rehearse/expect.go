package rehearse

import (
	"encoding/json"
	"fmt"
	"maps"
	"reflect"
	"slices"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// expectation says whether a case has the finding that it wants, and otherwise what there is instead.
func (r *Result) expectation(c *lawCase, e *expected, report *finding.Report) (Failure, bool) {
	f := Failure{What: fmt.Sprintf("the case %q does not hold", c.Case), Expected: e.String()}
	if _, known := r.Bundle.Duty(e.Duty); !known {
		f.What, f.Expected, f.Remedy = fmt.Sprintf("there is no duty %q", e.Duty), "", r.nearDuty(e.Duty)
		return f, false
	}
	if !slices.Contains(finding.Statuses, finding.Status(e.Status)) {
		f.What, f.Expected, f.Remedy = fmt.Sprintf("there is no status %q", e.Status), "", fmt.Sprintf("Write one of %v", finding.Statuses)
		return f, false
	}
	var others []string
	found := false
	for i := range report.Findings {
		x := &report.Findings[i]
		switch {
		case x.Duty != e.Duty || e.Subject != "" && x.Subject.ID != e.Subject:
		case e.fits(x):
			found = true
		default:
			others = append(others, describe(x, e.Facts != nil || e.Health != nil))
		}
	}
	f.Actual = strings.Join(others, "\n")
	if len(others) == 0 {
		f.Actual = "no finding"
	}
	if found && e.Only && len(others) > 0 {
		f.Expected, f.Actual = "only "+f.Expected, "besides, "+f.Actual
		return f, false
	}
	return f, found
}

// fits says whether a finding of the duty and subject is the one expected.
func (e *expected) fits(x *finding.Finding) bool {
	return string(x.Status) == e.Status && (e.Key == nil || x.Key == *e.Key) && (e.Due == "" || x.Due.String() == e.Due) && (e.Done == "" || x.Done.String() == e.Done) &&
		holds(x.Facts, e.Facts) && holds(x.Health, e.Health)
}

// String says what is expected.
func (e *expected) String() string {
	parts := []string{e.Duty}
	if e.Subject != "" {
		parts = append(parts, "of "+e.Subject)
	}
	parts = append(parts, e.Status)
	if e.Key != nil {
		parts = append(parts, fmt.Sprintf("key %q", *e.Key))
	}
	for _, p := range [][2]string{{"due", e.Due}, {"done", e.Done}} {
		if p[1] != "" {
			parts = append(parts, p[0]+" "+p[1])
		}
	}
	if e.Facts != nil {
		parts = append(parts, "facts "+asText(e.Facts))
	}
	if e.Health != nil {
		parts = append(parts, "health "+asText(e.Health))
	}
	return strings.Join(parts, " ")
}

// describe says what a finding is.
func describe(f *finding.Finding, detail bool) string {
	text := fmt.Sprintf("%s of %s %s key %q", f.Duty, f.Subject.ID, f.Status, f.Key)
	if f.Due.Known() {
		text += " due " + f.Due.String()
	}
	if f.Done.Known() {
		text += " done " + f.Done.String()
	}
	text += ": " + f.Message
	if detail {
		text += "\n  facts " + asText(f.Facts)
		if len(f.Health) > 0 {
			text += "\n  health " + asText(f.Health)
		}
	}
	return text
}

// asText writes facts in order of their names.
func asText(m map[string]any) string {
	if text, err := json.Marshal(m); err == nil {
		return string(text)
	}
	return fmt.Sprint(m)
}

// holds says whether a value holds all that is wanted: of an object the fields named, of anything else the same. Numbers
// are compared as float64, so that 94 is 94.0.
func holds(got, want any) bool {
	switch want := want.(type) {
	case map[string]any:
		object, ok := got.(map[string]any)
		for name, w := range want {
			v, there := object[name]
			ok = ok && there && holds(v, w)
		}
		return ok
	case []any:
		v := reflect.ValueOf(got)
		if got == nil || v.Kind() != reflect.Slice || v.Len() != len(want) {
			return false
		}
		for i, w := range want {
			if !holds(v.Index(i).Interface(), w) {
				return false
			}
		}
		return true
	}
	a, isNumber := asNumber(got)
	b, wantsNumber := asNumber(want)
	return isNumber && wantsNumber && a == b || reflect.DeepEqual(got, want)
}

func asNumber(v any) (float64, bool) {
	switch v := v.(type) {
	case int:
		return float64(v), true
	case float64:
		return v, true
	}
	return 0, false
}

// held is an expectation that holds, and what it shows of its duty.
type held struct {
	duty                          string
	fires, quiet, boundary, lacks bool
}

// firing are the statuses in which a duty fires.
var firing = []finding.Status{finding.Gap, finding.Unproven, finding.Opinion, finding.Late}

// heldBy tells what an expectation shows of its duty.
func heldBy(e *expected, report *finding.Report, asOf calendar.Date) held {
	status := finding.Status(e.Status)
	h := held{duty: e.Duty, fires: slices.Contains(firing, status), lacks: status == finding.Unproven}
	h.quiet = !h.fires
	for i := range report.Findings {
		x := &report.Findings[i]
		if x.Duty == e.Duty && (e.Subject == "" || x.Subject.ID == e.Subject) && e.fits(x) {
			h.boundary = h.boundary || onBoundary(x, asOf)
		}
	}
	return h
}

// onBoundary says whether a finding lies on the last day of its time or the day after, or has the limit itself as its
// value.
func onBoundary(f *finding.Finding, asOf calendar.Date) bool {
	if f.Due.Known() {
		day := asOf
		if f.Done.Known() {
			day = f.Done
		}
		return day == f.Due || day == f.Due+1
	}
	value, ok := asNumber(f.Facts["value"])
	return ok && slices.ContainsFunc(slices.Collect(maps.Values(f.Facts)), func(fact any) bool {
		m, _ := fact.(map[string]any)
		limit, isNumber := asNumber(m["value"])
		return m["seen"] != nil && isNumber && limit == value
	})
}

// count adds an expectation that holds to the tally of its duty.
func (r *Result) count(h held) {
	for i := range r.Duties {
		d := &r.Duties[i]
		if d.ID != h.duty {
			continue
		}
		for _, c := range []struct {
			shown bool
			tally *int
		}{{h.fires, &d.Fires}, {h.quiet, &d.Quiet}, {h.boundary, &d.Boundary}, {h.lacks, &d.Lacks}} {
			if c.shown {
				*c.tally++
			}
		}
	}
}
