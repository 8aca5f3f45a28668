package dossier

import (
	"slices"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// Worker makes the dossier of a worker at the builder's site. Tests, notices and so on count at this site
// unless the worker was employed at another site on the day. It returns nil for a worker who was not
// employed at the site by the as-of day. Records of later days are not seen.
func (b *Builder) Worker(w *WorkerRecords) *File {
	w = w.until(b.AsOf)
	employed := employedAt(b.Place.ID, w.Employments)
	if len(employed) == 0 {
		return nil
	}
	refs := NewRefs()
	d := &Worker{Common: b.common(w.ID), Employed: b.spells(employed), Absences: absences(employed)}
	for _, e := range w.Employments {
		if e.Site == b.Place.ID {
			d.JobTitle, d.OnRoll = e.JobTitle, e.InProgram
			refs.Of(e)
		}
	}
	pieces := b.timeline(w, employed)
	d.Exposures = b.exposures(pieces, refs)
	d.ExposureWorking = b.workings(d.Exposures)
	var plain map[string][]calendar.Spell
	d.Exposed, d.ExposureUnknown, plain = b.levelSpells(pieces)
	enrolled := b.perEmployment(plain[b.Measures.Exposure.Enrols], employed)
	_, enrolledNow := calendar.Find(enrolled, b.AsOf)

	h := b.hearing(w, refs, enrolled)
	limit := func(day Date) record.Answer { return b.limitOn(pieces, day) }
	course := h.course(limit)
	d.Baseline = h.baselineFacts(len(enrolled) > 0)
	d.Audiograms = h.audiograms(course.compared, func(t *test) []string { return b.recordLacks(t, h, d.JobTitle, pieces) })
	d.Shifts = h.shifts(course, enrolledNow, func(day Date) bool { return len(atHand(w.Issues, day)) > 0 })
	d.Unconfirmed = h.unconfirmed(course)
	d.AfterShift = b.spells(calendar.Intersect(course.afterShift(), enrolled))
	d.Lapsed, d.Persistent = emptyNotNil(course.lapsed), emptyNotNil(course.persisted)
	d.Recordables, d.Revisions, d.MarkedLater, d.Dangling = h.recordables(course), h.revisions(), h.markedLater(), h.dangling()

	d.Enrolled = b.enrolled(w, h, enrolled, refs)
	d.Results = b.results(w, pieces, refs)
	now := stretchOn(pieces, b.AsOf)
	d.Protection = b.protection(w, now, h, b.attenuationMatters(d), refs)
	d.Wear = b.wear(w, now, refs)
	d.Training, d.ProtectorTraining = b.training(w, refs)
	series := b.workerSeries(w, h, enrolled, refs)
	d.Examinations, d.Told = b.examinations(w, h, refs, series), b.told(w, refs)
	d.Departures = b.departures(employed, series)
	file := &File{Kind: KindWorker, ID: w.ID, Site: b.Place.ID, Input: d, Series: series, Refs: refs}
	h.observe(file)
	b.observeEmployment(file, w)
	return file
}

func emptyNotNil[T any](list []T) []T {
	if list == nil {
		return []T{}
	}
	return list
}

// perEmployment cuts spells at the ends of employments, so that a worker who was hired again begins anew.
func (b *Builder) perEmployment(spells, employed []calendar.Spell) []calendar.Spell {
	var out []calendar.Spell
	for _, e := range employed {
		for _, s := range spells {
			if x := s.Intersect(e); !x.Empty() {
				out = append(out, x)
			}
		}
	}
	return out
}

func stretchOn(pieces []stretch, day Date) *stretch {
	for i := range pieces {
		if pieces[i].Contains(day) {
			return &pieces[i]
		}
	}
	return nil
}

// limitOn says whether the exposure exceeds the law's limit level on a day: the level named limit, or where
// the measures have none, the level that enrols.
func (b *Builder) limitOn(pieces []stretch, day Date) record.Answer {
	level := "limit"
	if _, ok := b.Measures.Exposure.Levels[level]; !ok {
		level = b.Measures.Exposure.Enrols
	}
	p := stretchOn(pieces, day)
	if p == nil {
		return record.Unanswered
	}
	return b.reaches(level, p.on, day).verdict
}

// enrolled writes the stretches in the program.
func (b *Builder) enrolled(w *WorkerRecords, h *hearing, spells []calendar.Spell, refs Refs) []Enrolled {
	out := []Enrolled{}
	for _, s := range spells {
		e := Enrolled{Spell: b.spell(s)}
		if t := h.baseline; t != nil && (!s.To.Known() || t.rec.Date < s.To) {
			e.Baseline, e.Mobile = &Link{t.rec.Date, t.ref}, t.rec.Mobile
			tested := b.spell(calendar.Spell{From: max(s.From, t.rec.Date), To: s.To})
			e.Tested = &tested
		}
		for _, i := range w.Issues {
			if (!i.ReturnedOn.Known() || i.ReturnedOn > s.From) && (!s.To.Known() || i.Date < s.To) {
				e.Issue = link(refs, i, i.Date)
				break
			}
		}
		out = append(out, e)
	}
	return out
}

// results lists the monitoring results that put the worker into the program, with the notice of each.
func (b *Builder) results(w *WorkerRecords, pieces []stretch, refs Refs) []Result {
	out := []Result{}
	seen := map[*result]bool{}
	days := map[Date]bool{}
	for _, p := range pieces {
		if p.From > b.AsOf {
			continue
		}
		found := b.reaches(b.Measures.Exposure.Enrols, p.on, max(p.From, 1))
		channel := found.channel
		k := p.on[channel]
		src := k.src
		if found.verdict != record.Yes || src == nil || seen[src] {
			continue
		}
		seen[src], days[src.day] = true, true
		r := Result{Ref: refs.Of(src.rec), ID: src.id, Date: src.day, Since: max(src.day, p.From)}
		shown := b.channels.level(channel, &k)
		r.Dose, r.LevelDBA, r.Levels = shown.DosePct, shown.LevelDBA, b.levelsOf(p.on, r.Since)
		out = append(out, r)
	}
	if b.Measures.Exposure.Several == "highest" {
		out = b.otherResults(out, w, pieces, days, refs)
	}
	for i := range out {
		out[i].Notice, out[i].Written = b.resultNotice(w, &out[i], refs)
		out[i].Before = b.toldBefore(out[:i], &out[i])
	}
	return out
}

// otherResults adds the results of the worker's groups that reach the enrolling level but decide no stretch,
// since a higher one stands: the worker is to be told of them, too. Of a day's results the highest is taken.
func (b *Builder) otherResults(out []Result, w *WorkerRecords, pieces []stretch, days map[Date]bool, refs Refs) []Result {
	for _, a := range w.Assignments {
		h := b.histories[a.Group]
		if h == nil {
			continue
		}
		for _, r := range h.results {
			if !r.day.Known() || days[r.day] || !inclusive(a.From, a.To).Contains(r.day) || stretchOn(pieces, r.day) == nil {
				continue
			}
			on := make([]known, len(b.channels.names))
			for i := range on {
				on[i].bounds, on[i].src = b.channels.highest(h.results, i, r.day, r.day)
				if on[i].src == nil {
					on[i].bounds = unknown
				}
			}
			found := b.reaches(b.Measures.Exposure.Enrols, on, r.day)
			src := on[found.channel].src
			if found.verdict != record.Yes || src == nil {
				continue
			}
			days[r.day] = true
			shown := b.channels.level(found.channel, &on[found.channel])
			out = append(out, Result{Ref: refs.Of(src.rec), ID: src.id, Date: src.day, Since: src.day, Dose: shown.DosePct, LevelDBA: shown.LevelDBA, Levels: b.levelsOf(on, r.day)})
		}
	}
	slices.SortStableFunc(out, func(x, y Result) int { return int(x.Since) - int(y.Since) })
	return out
}

// resultNotice finds the notice of a result: one that names a measurement of that day, or names none and
// was given since the result concerns the worker.
func (b *Builder) resultNotice(w *WorkerRecords, r *Result, refs Refs) (*Link, record.Answer) {
	ids := []string{r.ID}
	for _, a := range w.Assignments {
		if h := b.histories[a.Group]; h != nil {
			for _, other := range h.results {
				if other.day == r.Date {
					ids = append(ids, other.id)
				}
			}
		}
	}
	for _, n := range w.Notices {
		if n.About != "exposure" || n.Date < r.Date {
			continue
		}
		if n.MeasurementID != "" && slices.Contains(ids, n.MeasurementID) || n.MeasurementID == "" && n.Date >= r.Since {
			return link(refs, n, n.Date), n.Written
		}
	}
	return nil, record.Unanswered
}

// recordLacks lists what the audiometric record of a test lacks of the contents that a law may ask for.
func (b *Builder) recordLacks(t *test, h *hearing, jobTitle string, pieces []stretch) []string {
	out := []string{}
	if !t.enrolled && t != h.baseline {
		return out
	}
	if jobTitle == "" {
		out = append(out, "job classification")
	}
	if t.rec.TesterID == "" {
		out = append(out, "examiner")
	}
	calibrated := slices.ContainsFunc(b.Registers.calibrations[t.rec.AudiometerID], func(c *record.Calibration) bool {
		return c.Date <= t.rec.Date && (c.Type == "acoustic" || c.Type == "exhaustive")
	})
	if t.rec.AudiometerID == "" || !calibrated {
		out = append(out, "date of the last acoustic or exhaustive calibration of the audiometer")
	}
	channel := b.channels.enrols
	if p := stretchOn(pieces, t.rec.Date); t.enrolled && (p == nil || p.on[channel].src == nil) {
		out = append(out, "most recent noise exposure assessment")
	}
	return out
}

// training gives the latest session, with the topics of the time before it, and the latest on protectors.
func (b *Builder) training(w *WorkerRecords, refs Refs) (*Training, *Link) {
	if len(w.Trainings) == 0 {
		return nil, nil
	}
	last := w.Trainings[len(w.Trainings)-1]
	out := &Training{Link: *link(refs, last, last.Date), Topics: []string{}, Silent: true, Certified: last.Certified}
	var protectors *Link
	for _, s := range w.Trainings {
		if s.Topics.Has("protectors") {
			protectors = link(refs, s, s.Date)
		}
		if end, err := b.Measures.Training.TopicsOver.After(s.Date, nil); err != nil || end < last.Date {
			continue
		}
		for _, topic := range s.Topics {
			out.Silent = false
			if !slices.Contains(out.Topics, topic) {
				out.Topics = append(out.Topics, topic)
			}
		}
	}
	return out, protectors
}

func (b *Builder) workerSeries(w *WorkerRecords, h *hearing, enrolled []calendar.Spell, refs Refs) map[string][]Link {
	series := map[string][]Link{"audiogram.valid": h.validSeries()}
	if t := h.baseline; t != nil {
		series["audiogram.baseline"] = []Link{{t.rec.Date, t.ref}}
	}
	for _, t := range w.Trainings {
		l := *link(refs, t, t.Date)
		series["training.any"] = append(series["training.any"], l)
		if t.Topics.Has("protectors") {
			series["training.protectors"] = append(series["training.protectors"], l)
		}
	}
	for _, i := range w.Issues {
		series["protector.issue"] = append(series["protector.issue"], *link(refs, i, i.Date))
		for _, s := range enrolled { // one that is still at hand when a stretch begins counts from that day
			if i.Date < s.From && (!i.ReturnedOn.Known() || i.ReturnedOn > s.From) {
				series["protector.issue"] = append(series["protector.issue"], *link(refs, i, s.From))
			}
		}
	}
	for _, c := range w.WearChecks {
		if c.Worn == record.Yes {
			series["protector.worn"] = append(series["protector.worn"], *link(refs, c, c.Date))
		}
	}
	return series
}
