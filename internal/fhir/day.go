package fhir

import (
	"regexp"
	"time"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
	"hearduty/internal/mapping"
)

// dateTime is the form of a date with or without time (https://hl7.org/fhir/R4/datatypes.html#dateTime). The parts
// after the year may be missing.
var dateTime = regexp.MustCompile(`^([0-9]{4})(-[0-9]{2})?(-[0-9]{2})?(T[0-9]{2}:[0-9]{2}(:[0-9]{2}(\.[0-9]+)?)?(Z|[+-][0-9]{2}:[0-9]{2})?)?$`)

// moment is when something was observed.
type moment struct {
	day   string // YYYY-MM-DD
	read  string // the beginning of what was read, where that is no day
	clock int64  // seconds since 1970; 0 if no time with a zone is known
}

// effective reads the day of an observation or report. The moment is empty if none is stated.
func (s *source) effective(n *node, r *reader) (moment, *mapping.Fault) {
	texts := map[string]string{
		"effectiveDateTime": r.text(n, "effectiveDateTime"),
		"effectiveInstant":  r.text(n, "effectiveInstant"),
		"effectivePeriod":   r.text(r.object(n, "effectivePeriod"), "start"),
	}
	if r.fault != nil {
		r.fault.Field = "date"
		return moment{}, r.fault
	}
	found, header := "", ""
	for _, key := range []string{"effectiveDateTime", "effectivePeriod", "effectiveInstant"} {
		t := texts[key]
		if t != "" && found != "" {
			return moment{}, &mapping.Fault{Field: "date", Header: key, Why: "both " + header + " and " + key + " are stated", Remedy: "Keep the one that is right"}
		}
		if t != "" {
			found, header = t, key
		}
	}
	if found == "" {
		return moment{}, nil
	}
	m, p := s.day(found)
	if p != nil {
		return moment{read: found[:min(len(found), len("2006-01-02"))]}, &mapping.Fault{Field: "date", Header: header, Read: found, Why: p.Why, Remedy: p.Remedy}
	}
	return m, nil
}

func (s *source) day(text string) (moment, *convert.Problem) {
	parts := dateTime.FindStringSubmatch(text)
	const whole = "Look up the day of the test and write it as YYYY-MM-DD"
	switch {
	case parts == nil:
		return moment{}, &convert.Problem{Why: "this is no date as FHIR writes it", Remedy: whole}
	case parts[3] == "":
		return moment{}, &convert.Problem{Why: "the date has no day", Remedy: whole}
	case parts[7] == "": // no zone: the day is as it is written
		return moment{day: text[:len("2006-01-02")]}, nil
	case s.dates.Zone == nil && !s.dates.Written:
		return moment{}, &convert.Problem{
			Why:    "the time has a zone, so the day depends on where it is taken",
			Remedy: "Say in the map dates: {zone: …} with the zone of the site, such as Europe/Berlin, or as_written to take the day as it stands there",
		}
	}
	day, p := s.dates.Read(grid.Cell{Text: text})
	if p != nil {
		return moment{}, p
	}
	m := moment{day: day}
	if at, err := time.Parse(time.RFC3339, text); err == nil {
		m.clock = at.Unix()
	}
	return m, nil
}

// readDates makes what the map says of dates ready for use.
func readDates(d *mapping.Dates) (convert.Dates, *grid.Fault) {
	var out convert.Dates
	switch {
	case d == nil || d.Zone == "":
	case d.Zone == "as_written":
		out.Written = true
	default:
		zone, err := time.LoadLocation(d.Zone)
		if err != nil {
			return out, &grid.Fault{Problem: "the map names the time zone " + d.Zone + ", which is not known", Remedy: "Write a zone such as Europe/Berlin, or as_written"}
		}
		out.Zone = zone
	}
	return out, nil
}
