package judge

import (
	"strings"

	"hearduty/internal/accept"
	"hearduty/internal/bundle"
	"hearduty/internal/finding"
)

// taken is a finding that entries of the accepted gaps are about. Whether one of them accepts it is known only
// when all subjects are judged.
type taken struct {
	finding finding.Finding
	entries []int
}

// take keeps a finding that entries of the accepted gaps are about, and says whether there are any.
func (k *keeper) take(d *bundle.Duty, x outcome, o *obligation, key string) bool {
	list := k.check.Accepted
	if list == nil || !accept.Covers(x.status) {
		return false
	}
	f := k.check.real(finding.Finding{Site: k.bench.site.ID, Bundle: k.bench.bundle.ID, Duty: d.ID, Topic: d.Topic, Status: x.status,
		Subject: finding.Subject{Kind: k.file.Kind, ID: k.file.ID}}, key)
	entries := list.For(&f)
	if len(entries) > 0 {
		k.taken = append(k.taken, taken{k.finding(d, x, o, key), entries})
	}
	return len(entries) > 0
}

// settleAccepted decides which findings are accepted, puts all of them among the findings of their benches, and
// counts those that are not accepted with the others. It gives the findings about the list itself.
func (c *check) settleAccepted(totals map[finding.Status]int) *ownFindings {
	own := &ownFindings{bySite: map[string][]finding.Finding{}}
	if c.Accepted == nil {
		return own
	}
	fits := make([]int, len(c.Accepted.Entries)) // findings that an entry is about
	open := make([]int, len(fits))               // of them, those that no entry accepts
	c.eachTaken(func(_ *bench, t *taken) {
		for _, i := range t.entries {
			fits[i]++
		}
	})
	c.eachTaken(func(b *bench, t *taken) {
		if i, ok := c.acceptedBy(t.entries, fits); ok {
			t.finding.Accepted = c.acceptance(i)
			totals[t.finding.Status]++
		} else {
			b.counts[countKey{t.finding.Topic, t.finding.Status}]++
			for _, i := range t.entries {
				open[i]++
			}
		}
		b.findings = append(b.findings, t.finding)
	})
	for i := range fits {
		own.judge(c, i, fits[i], open[i])
	}
	return own
}

func (c *check) eachTaken(do func(*bench, *taken)) {
	for _, s := range c.sites {
		for _, b := range c.benches[s.ID] {
			for i := range b.taken {
				do(b, &b.taken[i])
			}
		}
	}
}

// acceptedBy gives the first of the entries that is in force. The beginning of an id that several findings have
// accepts none of them.
func (c *check) acceptedBy(entries, fits []int) (int, bool) {
	for _, i := range entries {
		e := &c.Accepted.Entries[i]
		if e.On(c.AsOf) == accept.InForce && (e.ID == "" || fits[i] == 1) {
			return i, true
		}
	}
	return 0, false
}

// explainAccepted settles the accepted gaps where one finding is to be explained: whether it is accepted, or
// whether it is about the list itself.
func (c *check) explainAccepted() {
	own := c.settleAccepted(map[finding.Status]int{})
	accepted := map[string]*finding.Acceptance{}
	c.eachTaken(func(_ *bench, t *taken) { accepted[t.finding.ID] = t.finding.Accepted })
	for i := range c.found {
		c.found[i].explanation.Finding.Accepted = accepted[c.found[i].finding.ID]
	}
	for _, s := range c.sites {
		for _, f := range own.bySite[s.ID] {
			if strings.HasPrefix(f.ID, c.wanted) {
				e := &Explanation{Finding: f, Duty: acceptDutyOf(f.Duty).rule(f.Cite), AsOf: c.AsOf, ProgramName: c.Program.Title}
				for _, ev := range f.Evidence {
					e.Records = append(e.Records, ShownRecord{Evidence: ev})
				}
				c.found = append(c.found, explained{f, e})
			}
		}
	}
}
