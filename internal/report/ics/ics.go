// Package ics writes what falls due as an iCalendar object (RFC 5545), to be imported into a calendar.
//
// Each listed finding that is due has an event of its own, all day long on the last day on which the duty is
// in time. Nothing else is in the calendar: a gap has no day to come, and belongs in a report that says so.
// What the employer has accepted is in it, and its event says so. Events take up no time and ring no alarm.
//
// The identifier of an event is the id of its finding, which stays the same from run to run, and its time
// stamp is the as-of day. So a later import takes the place of an earlier one instead of standing beside it.
// A calendar keeps what a later file no longer holds: import into a calendar of its own, and empty that
// before the next import, to be rid of what has been done since. The object names no METHOD: PUBLISH asks
// every event for an ORGANIZER (RFC 5546, section 3.2.1), and a report has none.
package ics

import (
	"bufio"
	"io"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// Format writes iCalendar.
type Format struct{}

// Name gives the name of the form.
func (Format) Name() string { return "ics" }

// Write writes the report.
func (Format) Write(w io.Writer, r *finding.Report) error {
	out := &lines{bufio.NewWriter(w)}
	out.line("BEGIN", "VCALENDAR")
	out.line("VERSION", "2.0")
	out.line("PRODID", text("-//hearduty//"+r.Tool.Name+" "+r.Tool.Version+"//EN"))
	out.line("CALSCALE", "GREGORIAN")
	name := text("Due: " + r.Program)
	out.line("NAME", name)
	out.line("X-WR-CALNAME", name) // what most calendars read instead of NAME
	about := []string{"Judged as of " + r.AsOf.String() + "."}
	for _, c := range r.Cautions {
		about = append(about, phrase.Sentence(c))
	}
	out.line("DESCRIPTION", paragraphs(about))
	titles := phrase.TitlesOf(r)
	for i := range r.Findings {
		if f := &r.Findings[i]; f.Status == finding.Due && f.Due.Known() {
			out.event(r, f, titles.Of(f))
		}
	}
	out.line("END", "VCALENDAR")
	return out.w.Flush()
}

// event writes the event of one finding.
func (out *lines) event(r *finding.Report, f *finding.Finding, title string) {
	out.line("BEGIN", "VEVENT")
	out.line("UID", text(f.ID+"@hearduty"))
	out.line("DTSTAMP", date(r.AsOf)+"T000000Z")
	out.line("SEQUENCE", "0")
	out.line("DTSTART;VALUE=DATE", date(f.Due))
	out.line("DTEND;VALUE=DATE", date(f.Due.AddDays(1)))
	out.line("SUMMARY", text(title+" due: "+phrase.Subject(f.Subject)+" ("+f.Site+")"))
	out.line("DESCRIPTION", paragraphs(described(r, f)))
	out.line("CATEGORIES", text(f.Topic))
	out.line("CLASS", "PRIVATE")
	out.line("TRANSP", "TRANSPARENT")
	out.line("END", "VEVENT")
}

// described tells of a finding what is to be done, by which law, and where its records stand.
func described(r *finding.Report, f *finding.Finding) []string {
	parts := []string{phrase.Sentence(f.Message)}
	if f.Accepted != nil {
		parts = append(parts, phrase.Accepted(f.Accepted))
	}
	if f.Remedy != "" {
		parts = append(parts, "What to do: "+phrase.Sentence(f.Remedy))
	}
	parts = append(parts, phrase.Clean(f.Cite)+" ("+phrase.Clean(f.Bundle)+")")
	for _, e := range f.Evidence {
		parts = append(parts, "Record: "+phrase.Record(e))
	}
	parts = append(parts, "As of "+r.AsOf.String()+"; finding "+f.ID+".")
	if len(r.Cautions) > 0 {
		parts = append(parts, phrase.Sentence(r.Cautions[0]))
	}
	return parts
}

// date writes a day as iCalendar does.
func date(d calendar.Date) string { return strings.ReplaceAll(d.String(), "-", "") }
