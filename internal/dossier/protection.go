package dossier

import (
	"fmt"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// atHand gives the protectors that a worker has on a day, in the order in which they were handed over.
func atHand(issues []*record.ProtectorIssue, day Date) []*record.ProtectorIssue {
	var out []*record.ProtectorIssue
	for _, i := range issues {
		if i.Date <= day && (!i.ReturnedOn.Known() || day < i.ReturnedOn) {
			out = append(out, i)
		}
	}
	return out
}

// protection gives the protector at hand on the as-of day, the latest one handed over, and what it leaves
// of the noise.
func (b *Builder) protection(w *WorkerRecords, now *stretch, h *hearing, refs Refs) *Protection {
	held := atHand(w.Issues, b.AsOf)
	if len(held) == 0 {
		return nil
	}
	issue := held[len(held)-1]
	p := &Protection{
		Link: *link(refs, issue, issue.Date), Protector: issue.ProtectorID, Count: len(held),
		ChoicesOffered: issue.ChoicesOffered, Required: issue.Required, Missing: []string{},
	}
	b.fit(p, w, issue, h, refs)
	b.attenuate(p, now)
	return p
}

// fit finds the initial fitting and the latest fit test of the model.
func (b *Builder) fit(p *Protection, w *WorkerRecords, issue *record.ProtectorIssue, h *hearing, refs Refs) {
	if issue.FittedBy != "" {
		p.Fitted = &p.Link
	}
	for _, f := range h.follow {
		if (f.Type == "fitting" || f.Type == "refitting") && f.Date >= issue.Date && p.Fitted == nil {
			p.Fitted = link(refs, f, f.Date)
		}
	}
	for _, t := range w.FitTests {
		if t.ProtectorID != issue.ProtectorID || t.Date < issue.Date {
			continue
		}
		p.PAR, p.FitFailed = t.PARDB, nil
		switch t.Passed {
		case record.Yes:
			if p.Fitted == nil {
				p.Fitted = link(refs, t, t.Date)
			}
		case record.No:
			p.FitFailed = link(refs, t, t.Date)
		}
	}
}

// attenuate estimates the level under the protector from its noise reduction rating: the C-weighted average
// less the rating, or the A-weighted average less the rating reduced by 7 dB (29 CFR 1910.95 App. B).
func (b *Builder) attenuate(p *Protection, now *stretch) {
	model := b.Registers.Protectors[p.Protector]
	if model == nil || !model.NRR.Known {
		p.Missing = append(p.Missing, "noise reduction rating of the protector "+p.Protector)
	}
	exposure, weighting, ok := b.unprotected(now)
	if !ok {
		p.Missing = append(p.Missing, "exposure without the protector")
	} else {
		p.Exposure = record.Num(exposure)
	}
	if len(p.Missing) > 0 {
		return
	}
	nrr := model.NRR.Value
	under, halved := acoustics.UnderNRR(exposure, weighting, nrr), acoustics.UnderHalvedNRR(exposure, weighting, nrr)
	p.Under, p.Halved = record.Num(acoustics.RoundTenth(under.Level)), record.Num(acoustics.RoundTenth(halved.Level))
	if weighting == acoustics.C {
		p.Method = "C-weighted average less the noise reduction rating"
		p.Working = fmt.Sprintf("%s dBC − %s dB = %s dBA", number(exposure), number(nrr), number(p.Under.Value))
		return
	}
	p.Method = "A-weighted average less the noise reduction rating reduced by 7 dB"
	p.Working = fmt.Sprintf("%s dBA − (%s − 7) dB = %s dBA", number(exposure), number(nrr), number(p.Under.Value))
	if under.Clamped {
		p.Working = fmt.Sprintf("%s dBA; a rating of %s dB less 7 dB credits nothing", number(exposure), number(nrr))
	}
}

// unprotected gives the 8-hour average without protector: C-weighted where it was measured so, else the
// A-weighted average of the dose to 0.1 dB, as tables of the law print it. Where the dose is known only as
// at most a value, that value is taken.
func (b *Builder) unprotected(now *stretch) (float64, acoustics.Weighting, bool) {
	if now == nil {
		return 0, "", false
	}
	i := b.channels.index(b.Measures.Protection.Channel)
	k := now.on[i]
	if k.src != nil && k.exact() {
		for _, m := range k.src.rows {
			if m.TWADBC.Known {
				return m.TWADBC.Value, acoustics.C, true
			}
		}
	}
	twa, ok := b.channels.scales[i].TWAReported(k.high)
	if !ok {
		return 0, "", false
	}
	return twa, acoustics.A, true
}

// wear gives the latest check of whether the worker wore protectors: one of the worker's own, or one of the
// area in which all wore them while the worker was in a group of that area.
func (b *Builder) wear(w *WorkerRecords, now *stretch, refs Refs) *Wear {
	var out *Wear
	for _, c := range w.WearChecks {
		out = &Wear{Link: *link(refs, c, c.Date), Worn: c.Worn, Own: true}
	}
	if now == nil {
		return out
	}
	for _, m := range w.memberships() {
		group := b.Registers.Groups[m.group]
		if group == nil || group.Area == "" || !m.Contains(b.AsOf) {
			continue
		}
		for _, c := range until(b.Registers.wearOf[group.Area], b.AsOf, func(c *record.WearCheck) Date { return c.Date }) {
			if !m.Contains(c.Date) || out != nil && c.Date <= out.Date {
				continue
			}
			all := c.Observed.Known && c.Wearing.Known && c.Observed.Value > 0 && c.Observed.Value == c.Wearing.Value
			if all { // a check in which some wore none says nothing of this worker
				out = &Wear{Link: *link(refs, c, c.Date), Worn: record.Yes}
			}
		}
	}
	return out
}
