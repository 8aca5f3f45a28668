package dossier

import (
	"slices"

	"hearduty/internal/acoustics"
	"hearduty/internal/calendar"
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
// of the noise. Estimates by other methods are added if inform is set.
func (b *Builder) protection(w *WorkerRecords, now *stretch, h *hearing, inform bool, refs Refs) *Protection {
	held := atHand(w.Issues, b.AsOf)
	if len(held) == 0 {
		return nil
	}
	issue := held[len(held)-1]
	p := &Protection{
		Link: *link(refs, issue, issue.Date), Protector: issue.ProtectorID, Count: len(held),
		ChoicesOffered: issue.ChoicesOffered, Required: issue.Required, Rating: b.Measures.Protection.Rating, Missing: []string{},
	}
	test := b.fit(p, w, issue, h, refs)
	noise := b.noiseOf(now)
	p.PlugsOffered, p.MuffsOffered, p.Class, p.Types = issue.PlugsOffered, issue.MuffsOffered, b.modelOf(issue.ProtectorID).Class, []string{}
	p.Certificate, p.CertifiedTo = b.modelOf(issue.ProtectorID).Certificate, b.modelOf(issue.ProtectorID).CertifiedTo
	for _, i := range held {
		p.Types = append(p.Types, b.modelOf(i.ProtectorID).Type)
	}
	if b.Measures.Protection.Rating != "" {
		b.attenuate(p, noise)
	}
	p.atTheEar(noise, peakEstimates(b.modelOf(issue.ProtectorID), noise))
	p.Information = []Estimate{}
	if inform {
		p.Information = b.information(p, noise, held, test)
	}
	return p
}

// atTheEar notes what a fit test leaves of the 8-hour level, and the highest estimate of the peak.
func (p *Protection) atTheEar(n noise, peaks []Estimate) {
	p.Peak = n.peak
	if p.PAR.Known && n.known {
		p.UnderPAR = record.Num(acoustics.RoundTenth(n.level - max(0, p.PAR.Value)))
	}
	for _, e := range peaks {
		if !p.PeakUnder.Known || e.Level.Value > p.PeakUnder.Value {
			p.PeakUnder = e.Level
		}
	}
}

// attenuationMatters says whether a law may ask how much a protector leaves of the noise: on the as-of day the
// worker is, or may be, at an exposure level beyond the one that enrols, or a shift stands. Where the law has
// but one level, being at that level is enough.
func (b *Builder) attenuationMatters(d *Worker) bool {
	for _, level := range b.levels {
		if level == b.Measures.Exposure.Enrols && len(b.levels) > 1 {
			continue
		}
		for _, s := range d.Exposed[level] {
			if s.Current {
				return true
			}
		}
		for _, o := range d.ExposureUnknown[level] {
			if (calendar.Spell{From: o.From, To: o.To}).Contains(b.AsOf) {
				return true
			}
		}
	}
	return slices.ContainsFunc(d.AfterShift, func(s Spell) bool { return s.Current })
}

// fit finds the initial fitting and the latest fit test of the model since it was handed over.
func (b *Builder) fit(p *Protection, w *WorkerRecords, issue *record.ProtectorIssue, h *hearing, refs Refs) (latest *record.FitTest) {
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
		latest, p.PAR, p.FitFailed = t, t.PARDB, nil
		p.FitTest = link(refs, t, t.Date)
		switch t.Passed {
		case record.Yes:
			if p.Fitted == nil {
				p.Fitted = link(refs, t, t.Date)
			}
		case record.No:
			p.FitFailed = link(refs, t, t.Date)
		}
	}
	return latest
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
