package judge

import (
	"context"
	"fmt"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/bundle"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/record"
)

// judgeFile judges one dossier and keeps its findings. It gives the number of those that are listed.
func (c *check) judgeFile(ctx context.Context, b *bench, f *dossier.File) (listed int, err error) {
	answers, err := b.engine.Evaluate(ctx, f.Kind, Input(f.Input))
	if err != nil {
		return 0, err
	}
	kept := &keeper{check: c, bench: b, file: f, keys: map[string]bool{}}
	s := &settler{bundle: b.bundle, file: f, asOf: c.AsOf, brief: c.brief}
	for _, a := range answers {
		clear(kept.keys)
		for _, x := range settleAnswer(s, a) {
			kept.keep(a.Duty, x.outcome, x.obligation)
		}
	}
	kept.done()
	return len(kept.findings) + len(kept.taken), nil
}

// settled is an outcome with the obligation that it comes from, if any.
type settled struct {
	outcome
	obligation *obligation
}

// settleAnswer settles what one duty returned. Silence is never taken for compliance: a rule that failed,
// returned nothing, or returned what cannot be read gives an unproven outcome.
func settleAnswer(s *settler, a Answer) []settled {
	s.duty = a.Duty
	if a.Err != nil {
		return []settled{{outcome: outcome{status: finding.Unproven, message: sentence(fmt.Sprintf("The rule of this duty failed: %v", a.Err))}}}
	}
	if len(a.Obligations) == 0 && len(a.NotOwed) == 0 {
		return []settled{{outcome: outcome{status: finding.Unproven,
			message: "The rule of this duty returned neither an obligation nor a reason why nothing is owed."}}}
	}
	var out []settled
	for _, t := range a.Obligations {
		o, err := readObligation(t)
		if err != nil {
			out = append(out, settled{outcome: outcome{status: finding.Unproven, key: o.keyIfRead(),
				message: sentence(fmt.Sprintf("The rule of this duty returned an obligation that cannot be read: %v", err))}})
			continue
		}
		for _, x := range s.settle(o) {
			out = append(out, settled{x, o})
		}
	}
	return out
}

func (o *obligation) keyIfRead() string {
	if o == nil {
		return ""
	}
	return o.key
}

// keeper gathers the findings of one dossier.
type keeper struct {
	check    *check
	bench    *bench
	file     *dossier.File
	keys     map[string]bool // keys seen of the duty at hand
	findings []finding.Finding
	taken    []taken
	counts   []countKey
	tallies  []tally
}

// keep counts an outcome and, if it is to be listed, writes it as a finding.
func (k *keeper) keep(d *bundle.Duty, x outcome, o *obligation) {
	if k.file.Kind == dossier.KindWorker {
		if t, ok := rateOf(d, &x, o, k.check.AsOf); ok {
			k.tallies = append(k.tallies, t)
		}
	}
	key := x.key
	for n := 2; k.keys[key]; n++ {
		key = fmt.Sprintf("%s-%d", x.key, n)
	}
	k.keys[key] = true
	accepted := k.take(d, x, o, key)
	if k.check.wanted != "" {
		k.explain(d, x, o, key)
		return
	}
	if accepted {
		return
	}
	k.counts = append(k.counts, countKey{d.Topic, x.status})
	if k.check.listed(&x) {
		k.findings = append(k.findings, k.finding(d, x, o, key))
	}
}

// listed says whether an outcome is to be listed, or only counted.
func (c *check) listed(x *outcome) bool {
	switch {
	case c.All || c.beside != "":
		return true
	case x.status == finding.Due:
		return int(x.due-c.AsOf) <= c.AheadDays
	}
	return x.status != finding.Met && x.status != finding.Lifted
}

// brief says whether an outcome is only to be counted.
func (c *check) brief(x *outcome) bool {
	return !c.listed(x) || c.beside != "" && (x.status == finding.Met || x.status == finding.Lifted)
}

func (k *keeper) finding(d *bundle.Duty, x outcome, o *obligation, key string) finding.Finding {
	subject := finding.Subject{Kind: k.file.Kind, ID: k.file.ID}
	f := finding.Finding{
		ID:   finding.Fingerprint(k.bench.site.ID, k.bench.bundle.ID, d.ID, subject, key),
		Site: k.bench.site.ID, Bundle: k.bench.bundle.ID, Duty: d.ID, Topic: d.Topic, Subject: subject, Key: key,
		Status: x.status, Severity: d.Severity, Due: x.due, Done: x.done, Message: x.message, Missing: missingOf(&x, o), Cite: d.Cite, Remedy: d.Remedy,
		Facts: map[string]any{}, Evidence: []finding.Evidence{},
	}
	if x.cite != "" {
		f.Cite = x.cite
	}
	switch {
	case x.status == finding.Late:
		f.DaysOver = int(x.done - x.due)
	case x.status == finding.Gap && x.due.Known():
		f.DaysOver = int(k.check.AsOf - x.due)
	}
	f.Undone = x.status == finding.Gap && o != nil && (o.shape == once || o.shape == recurring) && !x.done.Known()
	if o != nil && k.check.beside == "" {
		maps.Copy(f.Facts, plain(o.facts))
		if k.check.HealthDetail {
			f.Health = plain(o.health)
		}
	}
	x.parameterFacts(f.Facts)
	if k.check.beside == "" { // a switch shows no single finding
		f.Evidence = k.evidence(x.refs)
	}
	return f
}

// evidence finds where the records of references were read. A reference to no record is kept as it is.
func (k *keeper) evidence(refs []string) []finding.Evidence {
	out := []finding.Evidence{}
	for i, ref := range refs {
		if ref == "" || slices.Contains(refs[:i], ref) {
			continue
		}
		e := finding.Evidence{Record: ref}
		if rec, ok := k.record(ref); ok {
			e = k.check.origin(ref, rec)
		}
		out = append(out, e)
	}
	return out
}

// record finds the record of a reference: one of the dossier's, or one of the registers that all subjects share.
func (k *keeper) record(ref string) (record.Record, bool) {
	if rec, ok := k.file.Refs.Record(ref); ok {
		return rec, true
	}
	kind, id, _ := strings.Cut(ref, "/")
	if kind == "protector" {
		if p := k.bench.builder.Registers.Protectors[id]; p != nil {
			return p, true
		}
	}
	return nil, false
}

func (c *check) origin(ref string, rec record.Record) finding.Evidence {
	at := rec.At()
	in := c.ledger.Inputs[at.Source]
	return finding.Evidence{Record: ref, File: in.File, Sheet: in.Sheet, Row: int(at.Row)}
}

// done hands the findings of the dossier over.
func (k *keeper) done() {
	k.bench.rates.take(k.tallies)
	k.bench.mu.Lock()
	defer k.bench.mu.Unlock()
	if k.check.beside != "" { // a switch keeps how subjects stand, and no finding
		k.bench.tally.Add(k.findings)
	} else {
		k.bench.findings = append(k.bench.findings, k.findings...)
	}
	k.bench.taken = append(k.bench.taken, k.taken...)
	for _, key := range k.counts {
		k.bench.counts[key]++
	}
}

// report puts the result together: findings sorted, counts added up.
func (c *check) report() *finding.Report {
	r := &finding.Report{
		Tool: finding.Tool{Name: "hearduty", Version: c.Version}, Program: c.Program.Title, AsOf: c.AsOf, Cautions: c.cautions(),
		Sites: []finding.Site{}, Bundles: []finding.Bundle{}, Inputs: c.ledger.Inputs, Rejects: c.rejects(), Remarks: []string{},
		Totals: map[finding.Status]int{}, AcceptedTotals: map[finding.Status]int{}, Counts: []finding.Count{}, Listed: c.listedWords(), Findings: []finding.Finding{},
		Observations: []finding.Observation{}, ObservationCounts: []finding.ObservationCount{},
	}
	for _, d := range c.ledger.Remarks {
		r.Remarks = append(r.Remarks, d.String())
	}
	if counts := c.ledger.ObservationCounts(); counts != nil {
		r.Remarks = append(r.Remarks, "hearduty intake lists rows that contradict each other or themselves: "+strings.Join(counts, ", "))
	}
	if text := c.later.remark(c.AsOf, c.ledger); text != "" {
		r.Remarks = append(r.Remarks, text)
	}
	for _, b := range c.used {
		for _, d := range b.Warnings {
			r.Remarks = append(r.Remarks, d.String())
		}
		r.Bundles = append(r.Bundles, finding.Bundle{
			ID: b.ID, Title: b.About.Title, Revision: b.Revision, SHA256: b.SHA256, Signature: b.Signature, Kind: b.About.Kind,
			CheckedOn: b.About.CheckedOn, Cautions: b.About.Cautions,
		})
	}
	own := c.settleAccepted(r.AcceptedTotals)
	for _, s := range c.sites {
		site := finding.Site{ID: s.ID, Name: s.Name, Bundles: c.bundlesOf(s), Choices: map[string]any{}}
		for _, b := range c.benches[s.ID] {
			site.Workers = b.usage.Workers
			maps.Copy(site.Choices, b.builder.Choices)
			r.Findings = append(r.Findings, b.findings...)
			b.findings = nil
			r.Counts = append(r.Counts, b.sortedCounts(r.Totals)...)
		}
		own.add(r, s.ID)
		r.Sites = append(r.Sites, site)
	}
	r.Remarks = append(r.Remarks, c.unplaced()...)
	c.seen.report(c, r)
	slices.SortFunc(r.Findings, func(x, y finding.Finding) int { return finding.Compare(&x, &y) })
	c.lawOf(r)
	r.Rates = c.ratesOf()
	r.Portraits = c.gallery.sorted()
	return r
}

// sortedCounts gives the bench's counts by topic and status and adds them to the totals.
func (b *bench) sortedCounts(totals map[finding.Status]int) []finding.Count {
	var out []finding.Count
	for _, topic := range finding.Topics {
		for _, status := range finding.Statuses {
			if n := b.counts[countKey{topic, status}]; n > 0 {
				out = append(out, finding.Count{Site: b.site.ID, Bundle: b.bundle.ID, Topic: topic, Status: status, Number: n})
				totals[status] += n
			}
		}
	}
	return out
}

// rejects gives the rejected rows. What stands in a cell of a threshold or a birth date is medical or personal and is left
// out unless audiometric figures were asked for; file, row and column tell where to look.
func (c *check) rejects() []finding.Reject {
	if c.HealthDetail {
		return c.ledger.Rejects
	}
	return c.ledger.Shown()
}

func (c *check) listedWords() string {
	if c.All {
		return "all findings and observations"
	}
	return fmt.Sprintf("all findings but those that are met or lifted, and those due in more than %s", days(c.AheadDays))
}

// unplaced says which records appear in no dossier of the sites judged. Where only some sites are judged it
// cannot be told.
func (c *check) unplaced() []string {
	if len(c.sites) < len(c.Program.Sites) {
		return nil
	}
	return c.registers.Unplaced(func(group string) bool {
		for _, benches := range c.benches {
			if slices.ContainsFunc(benches, func(b *bench) bool { return b.usage.HasMembers(group) }) {
				return true
			}
		}
		return false
	})
}
