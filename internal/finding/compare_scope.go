package finding

import (
	"fmt"
	"maps"
	"regexp"
	"slices"
	"strconv"
	"strings"
)

// compared is one of the two reports, with what a comparison looks up in it.
type compared struct {
	report *Report
	byID   map[string]*Finding
	judged map[[2]string]bool  // sites and bundles
	hidden map[countOf]int     // findings that are counted and not listed
	duties map[[2]string]*Duty // by bundle and id
	ahead  int                 // days that it looks ahead for what is due; -1 if it does not say
	all    bool                // whether it lists all findings
}

type countOf struct {
	site, bundle, topic string
	status              Status
}

func sideOf(r *Report) *compared {
	s := &compared{report: r, byID: map[string]*Finding{}, judged: map[[2]string]bool{}, hidden: map[countOf]int{}, duties: map[[2]string]*Duty{}}
	for _, site := range r.Sites {
		for _, bundle := range site.Bundles {
			s.judged[[2]string{site.ID, bundle}] = true
		}
		s.judged[[2]string{site.ID, OfProgram}] = true
	}
	for _, x := range r.Counts {
		s.hidden[countOf{x.Site, x.Bundle, x.Topic, x.Status}] += x.Number
	}
	for i := range r.Findings {
		f := &r.Findings[i]
		s.byID[f.ID] = f
		if f.Accepted == nil {
			s.hidden[countOf{f.Site, f.Bundle, f.Topic, f.Status}]--
		}
	}
	for i := range r.Duties {
		s.duties[[2]string{r.Duties[i].Bundle, r.Duties[i].ID}] = &r.Duties[i]
	}
	s.ahead, s.all = scope(r.Listed)
	return s
}

// daysAhead finds in the words of Report.Listed how far a report looks ahead.
var daysAhead = regexp.MustCompile(`due in more than (\d+) days?\b`)

// scope reads the words of Report.Listed.
func scope(listed string) (ahead int, all bool) {
	if m := daysAhead.FindStringSubmatch(listed); m != nil {
		if n, err := strconv.Atoi(m[1]); err == nil {
			return n, false
		}
	}
	return -1, strings.HasPrefix(listed, "all findings and")
}

func (s *compared) side() Side {
	return Side{Program: s.report.Program, AsOf: s.report.AsOf, Version: s.report.Tool.Version, Listed: s.report.Listed,
		Totals: copied(s.report.Totals), AcceptedTotals: copied(s.report.AcceptedTotals)}
}

func copied(m map[Status]int) map[Status]int {
	out := map[Status]int{}
	maps.Copy(out, m)
	return out
}

// topic gives the heading under which the report counts a finding of the other report.
func (s *compared) topic(f *Finding) string {
	if d := s.duties[[2]string{f.Bundle, f.Duty}]; d != nil {
		return d.Topic
	}
	return f.Topic
}

// hides says whether a finding could be among those that the report counts with one of the statuses and does not
// list.
func (s *compared) hides(f *Finding, topic string, statuses ...Status) bool {
	return slices.ContainsFunc(statuses, func(status Status) bool { return s.hidden[countOf{f.Site, f.Bundle, topic, status}] > 0 })
}

func (c *comparer) common(site, bundle string) bool {
	key := [2]string{site, bundle}
	return c.old.judged[key] && c.new.judged[key]
}

func (c *comparer) anyCommon() bool {
	for key := range c.new.judged {
		if key[1] != OfProgram && c.old.judged[key] {
			return true
		}
	}
	return false
}

// apart lists the sites and bundles that only one of the reports judged.
func (c *comparer) apart() []Apart {
	out := []Apart{}
	for _, x := range []struct {
		name        string
		this, other *compared
	}{{"old", c.old, c.new}, {"new", c.new, c.old}} {
		for _, site := range x.this.report.Sites {
			for _, bundle := range site.Bundles {
				if !x.other.judged[[2]string{site.ID, bundle}] {
					out = append(out, Apart{site.ID, bundle, x.name, x.this.openAt(site.ID, bundle)})
				}
			}
		}
	}
	return out
}

func (s *compared) openAt(site, bundle string) int {
	n := 0
	for _, x := range s.report.Counts {
		if x.Site == site && x.Bundle == bundle && opens(x.Status) {
			n += x.Number
		}
	}
	return n
}

// notes says what differs between the reports as a whole.
func (c *comparer) notes(out *Comparison) []string {
	o, n := c.old.report, c.new.report
	var notes []string
	say := func(format string, args ...any) { notes = append(notes, fmt.Sprintf(format, args...)) }
	if o.Program != n.Program {
		say("The reports have different titles: %q and %q.", o.Program, n.Program)
	}
	if n.AsOf < o.AsOf {
		say("The new report is of an earlier day than the old one, %s and %s: are they the wrong way round?", n.AsOf, o.AsOf)
	}
	if o.Tool.Version != n.Tool.Version {
		say("Different versions of hearduty wrote the reports: %s and %s.", o.Tool.Version, n.Tool.Version)
	}
	for _, a := range out.Apart {
		say("Only the %s report judged site %s by %s; its %s there %s not compared.", a.In, a.Site, a.Bundle, oneOrMore(a.Open, "open finding", "open findings"), isAre(a.Open))
	}
	if c.sameFiles() {
		say("Both reports were made from the same files.")
	}
	for _, text := range c.bundles() {
		say("%s", text)
	}
	if o.Listed != n.Listed {
		say("The reports list differently. Old: %s. New: %s.", o.Listed, n.Listed)
	}
	if c.unlisted > 0 {
		say("%s not compared: one of the reports may only leave them out, since it does not look as far ahead.", oneOrMore(c.unlisted, "due finding is", "due findings are"))
	}
	if out.Numbers[Unclear] > 0 {
		say("One of the reports counts more open findings than it lists, so that of %s it cannot be told whether anything changed.", oneOrMore(out.Numbers[Unclear], "finding", "findings"))
	}
	if len(n.Rejects) > len(o.Rejects) {
		say("%s of the new records could not be used, before %d: what such a row proved counts no more, and what it broke is not seen.", oneOrMore(len(n.Rejects), "row", "rows"), len(o.Rejects))
	}
	return notes
}

// bundles says which bundles changed.
func (c *comparer) bundles() []string {
	var out []string
	for _, n := range c.new.report.Bundles {
		for _, o := range c.old.report.Bundles {
			if text := bundleChanged(&o, &n); o.ID == n.ID && text != "" {
				out = append(out, text)
			}
		}
	}
	return out
}

func bundleChanged(o, n *Bundle) string {
	switch {
	case o.Revision != n.Revision:
		return fmt.Sprintf("The bundle %s changed from revision %s to %s.", n.ID, o.Revision, n.Revision)
	case o.SHA256 != n.SHA256:
		return fmt.Sprintf("The files of the bundle %s changed, though the revision is still %s.", n.ID, n.Revision)
	}
	return ""
}

func oneOrMore(n int, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, many)
}

func isAre(n int) string {
	if n == 1 {
		return "is"
	}
	return "are"
}
