package judge

import (
	"fmt"

	"hearduty/internal/accept"
	"hearduty/internal/bundle"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
)

// acceptDuty is what a list of accepted gaps owes by itself, whatever the law.
type acceptDuty struct{ id, title, description, remedy string }

const (
	acceptExpired    = "accepted-gap-expired"
	acceptUnapproved = "accepted-gap-unapproved"
	acceptUnused     = "accepted-gap-unused"

	acceptTopic    = "records"
	acceptSeverity = "minor"
)

var acceptDuties = []acceptDuty{
	{acceptExpired, "Accepted gap that expired", "Whoever accepts a gap does so until a day, and decides again after it.",
		"Close the gap and remove the entry, or have it approved again with a later day"},
	{acceptUnapproved, "Accepted gap that nobody approved", "Somebody answers for each accepted gap.",
		"Have the entry approved and add approved_by, or remove it"},
	{acceptUnused, "Accepted gap that fits no finding", "The list of accepted gaps holds only gaps that there are.",
		"Remove the entry if what it was about is closed; else correct its id or its keys"},
}

func acceptDutyOf(id string) *acceptDuty {
	for i := range acceptDuties {
		if acceptDuties[i].id == id {
			return &acceptDuties[i]
		}
	}
	return &acceptDuty{id: id, title: id}
}

// shown is the duty as the report has it.
func (d *acceptDuty) shown(file string) finding.Duty {
	return finding.Duty{Bundle: finding.OfProgram, ID: d.id, Title: d.title, Description: d.description, Cite: file, Topic: acceptTopic,
		Subject: dossier.KindSite, Severity: acceptSeverity, Evidence: []string{}, Remedy: d.remedy}
}

// rule is the duty as an explanation has it. No text of a rule stands behind it.
func (d *acceptDuty) rule(file string) *bundle.Duty {
	return &bundle.Duty{ID: d.id, Title: d.title, Description: d.description, Cite: file, Topic: acceptTopic, Subject: dossier.KindSite,
		Severity: acceptSeverity, Remedy: d.remedy}
}

// ownFindings are the findings about the list of accepted gaps itself.
type ownFindings struct{ bySite map[string][]finding.Finding }

// judge holds an entry to what it owes, given the number of findings that it is about and of those among them that
// no entry accepts. At most one thing is said of an entry.
func (o *ownFindings) judge(c *check, i, fits, open int) {
	e := &c.Accepted.Entries[i]
	state := e.On(c.AsOf)
	where := fmt.Sprintf("the entry in line %d of %s", e.Line, c.Accepted.File)
	switch {
	case state == accept.Expired:
		if !c.renewed(e) && (fits == 0 || open > 0) {
			o.find(c, e, acceptExpired, fmt.Sprintf("%s ended on %s, %s ago; %s", where, e.Until, days(int(c.AsOf-e.Until)), again(open)))
		}
	case state == accept.Unapproved:
		o.find(c, e, acceptUnapproved, fmt.Sprintf("%s names nobody who approved it, so it accepts nothing; %s", where, again(open)))
	case e.ID != "" && fits > 1:
		o.find(c, e, acceptUnused, fmt.Sprintf("%s accepts nothing, since the ids of %d findings begin with %s", where, fits, c.beginning(e)))
	case fits == 0 && state == accept.InForce && c.whole():
		o.find(c, e, acceptUnused, where+" fits no finding that could be accepted")
	}
}

// again says how many findings an entry would accept, if it did.
func again(n int) string {
	switch n {
	case 0:
		return "no open finding needs it"
	case 1:
		return "1 finding that it is about counts like any other"
	}
	return fmt.Sprintf("%d findings that it is about count like any other", n)
}

// renewed says whether another entry takes the place of one that has expired.
func (c *check) renewed(e *accept.Entry) bool {
	for i := range c.Accepted.Entries {
		other := &c.Accepted.Entries[i]
		if state := other.On(c.AsOf); other.Selector() == e.Selector() && (state == accept.InForce || state == accept.Waiting) {
			return true
		}
	}
	return false
}

// whole says whether the whole program is judged, by its own bundles. Else it cannot be told what fits no finding.
func (c *check) whole() bool { return c.Bundle == "" && len(c.sites) == len(c.Program.Sites) }

// home is the site to which an entry belongs: the one it names, else the first of the program.
func (c *check) home(e *accept.Entry) string {
	if _, ok := c.Program.Site(e.Match.Site); ok {
		return e.Match.Site
	}
	return c.Program.Sites[0].ID
}

// find adds a finding about an entry, if its site is judged.
func (o *ownFindings) find(c *check, e *accept.Entry, duty, message string) {
	home, d := c.home(e), acceptDutyOf(duty)
	f := finding.Finding{Site: home, Bundle: finding.OfProgram, Duty: duty, Topic: acceptTopic, Subject: finding.Subject{Kind: dossier.KindSite, ID: home},
		Key: c.entryKey(e), Status: finding.Gap, Severity: acceptSeverity, Message: sentence(message), Cite: c.Accepted.File, Remedy: d.remedy,
		Facts: map[string]any{}, Evidence: []finding.Evidence{{Record: "accepted/" + c.selector(e), File: c.Accepted.File, Row: e.Line}}}
	f.ID = finding.Fingerprint(f.Site, f.Bundle, f.Duty, f.Subject, f.Key)
	if duty == acceptExpired {
		f.Due, f.DaysOver = e.Until, int(c.AsOf-e.Until)
	}
	o.bySite[home] = append(o.bySite[home], f)
}

// add puts the findings of a site into the report and counts them.
func (o *ownFindings) add(r *finding.Report, site string) {
	list := o.bySite[site]
	if len(list) == 0 {
		return
	}
	r.Findings = append(r.Findings, list...)
	r.Counts = append(r.Counts, finding.Count{Site: site, Bundle: finding.OfProgram, Topic: acceptTopic, Status: finding.Gap, Number: len(list)})
	r.Totals[finding.Gap] += len(list)
}
