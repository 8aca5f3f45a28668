package judge

import (
	"fmt"
	"math"
	"strings"

	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/record"
)

// portraitOfWorker draws a worker: employment, groups, exposure, program and protectors as stretches, and what
// was done as events.
func (c *check) portraitOfWorker(b *bench, f *dossier.File, w *dossier.WorkerRecords) finding.Portrait {
	a := c.paint(b, f)
	d := f.Input.(*dossier.Worker)
	a.fact("Job", d.JobTitle)
	for _, e := range d.Employed {
		a.spell("employment", "employed", plainState, e.From, e.To)
	}
	for _, e := range d.Exposures {
		a.exposureSpell(d, e)
	}
	for _, e := range d.Enrolled {
		a.spell("program", "in the program", plainState, e.From, e.To)
	}
	a.protectors(w)
	a.workerEvents(d, w)
	if c.HealthDetail {
		a.tests(d, w)
	}
	return a.done()
}

func (a *painter) exposureSpell(d *dossier.Worker, e dossier.Exposure) {
	measures := a.bench.builder.Measures.Exposure
	channel := measures.MainChannel(measures.Enrols)
	label, grade := levelWords(e.Channels[channel], measures.Channels[channel].Kind == dossier.LevelChannel), plainState
	on := func(spells []dossier.Spell) bool {
		for _, s := range spells {
			if e.From >= s.From && (!s.To.Known() || e.From < s.To) {
				return true
			}
		}
		return false
	}
	switch {
	case on(d.Exposed["limit"]):
		grade = "limit"
	case on(d.Exposed[measures.Enrols]):
		grade = "action"
	default:
		for _, u := range d.ExposureUnknown[measures.Enrols] {
			if e.From >= u.From && (!u.To.Known() || e.From < u.To) {
				grade = "unknown"
			}
		}
	}
	if label == "" {
		label = "exposure not known"
	}
	if e.Group != "" {
		label = e.Group + ": " + label
	}
	a.spell("exposure", label, grade, e.From, e.To)
}

// levelWords says an exposure in a few words. Its bounds are levels on a channel of levels, and doses elsewhere.
func levelWords(l dossier.Level, isLevel bool) string {
	bound := func(words string, v float64) string {
		if isLevel {
			return words + decimal(v) + " dBA"
		}
		return "dose " + words + decimal(v) + " %"
	}
	switch {
	case l.TWADBA.Known:
		return fmt.Sprintf("TWA %.1f dBA, dose %s %%", l.TWADBA.Value, decimal(l.DosePct.Value))
	case l.LevelDBA.Known:
		return fmt.Sprintf("L_EX,8h %.1f dBA", l.LevelDBA.Value)
	case l.DosePct.Known:
		return "dose " + decimal(l.DosePct.Value) + " %"
	case l.AtLeast.Known && l.AtLeast.Value > 0:
		return bound("at least ", l.AtLeast.Value)
	case l.AtMost.Known && !math.IsInf(l.AtMost.Value, 0):
		return bound("at most ", l.AtMost.Value)
	}
	return ""
}

// decimal writes a number with one decimal at most.
func decimal(v float64) string {
	return strings.TrimSuffix(fmt.Sprintf("%.1f", v), ".0")
}

func (a *painter) protectors(w *dossier.WorkerRecords) {
	for _, i := range w.Issues {
		if i.Date > a.check.AsOf {
			continue
		}
		to := calendar.Date(0)
		if i.ReturnedOn.Known() {
			to = i.ReturnedOn
		}
		a.spell("protector", i.ProtectorID, plainState, i.Date, to)
	}
}

func (a *painter) workerEvents(d *dossier.Worker, w *dossier.WorkerRecords) {
	shifts := map[string]bool{}
	for _, s := range d.Shifts {
		shifts[s.Ref] = true
	}
	for _, t := range w.Audiograms {
		label, s := "hearing test", plainState
		if t.Purpose != "" {
			label = t.Purpose + " hearing test"
		}
		if shifts[a.file.Refs.Of(t)] {
			label, s = label+", threshold shift", badState
		}
		a.event(t.Date, "test", label, s, t)
	}
	for _, t := range w.Trainings {
		a.event(t.Date, "training", phrase("training", strings.Join(t.Topics, ", ")), plainState, t)
	}
	for _, i := range w.Issues {
		a.event(i.Date, "protector", "protector "+i.ProtectorID+" handed over", plainState, i)
	}
	for _, n := range w.Notices {
		a.event(n.Date, "notice", phrase("told of", n.About), plainState, n)
	}
	for _, f := range w.FollowUps {
		a.event(f.Date, "follow-up", phrase(f.Type, f.Result), plainState, f)
	}
	for _, t := range w.FitTests {
		a.event(t.Date, "fit-test", "fit test of "+t.ProtectorID, state(t.Passed), t)
	}
	for _, e := range w.Examinations {
		switch {
		case e.AttendedOn.Known():
			a.event(e.AttendedOn, "test", words(e.Type), plainState, e)
		case e.OfferedOn.Known():
			a.event(e.OfferedOn, "test", words(e.Type)+" offered", plainState, e)
		}
	}
	for _, c := range w.WearChecks {
		a.event(c.Date, "wear-check", "look at whether protectors are worn", state(c.Worn), c)
	}
}

// phrase joins what was done and how it ended, without the underscores of the vocabulary.
func phrase(what, more string) string {
	if more != "" {
		what += ": " + more
	}
	return words(what)
}

// tests gives the hearing tests with their thresholds and what each ear was compared with.
func (a *painter) tests(d *dossier.Worker, w *dossier.WorkerRecords) {
	significant := map[string]string{}
	for _, s := range d.Shifts {
		significant[s.Ref] = s.Ears
	}
	facts := map[string]*dossier.Hearing{}
	for i := range d.Audiograms {
		facts[d.Audiograms[i].Ref] = d.Audiograms[i].Hearing
	}
	for _, t := range w.Audiograms {
		if t.Date > a.check.AsOf {
			continue
		}
		ref := a.file.Refs.Of(t)
		test := finding.Test{Record: ref, Date: t.Date, Purpose: t.Purpose, Left: levels(&t.Left), Right: levels(&t.Right)}
		if h := facts[ref]; h != nil {
			test.LeftBaseline, test.RightBaseline = baselineOf(d, w, a.file.Refs, "left", t.Date), baselineOf(d, w, a.file.Refs, "right", t.Date)
			left, right := h.LeftCorrected, h.RightCorrected
			if !a.ageCorrected() {
				left, right = record.Number{}, record.Number{}
			}
			hz := a.bench.builder.Measures.Hearing.Shift.Frequencies
			test.LeftShift = shiftOf(h.Left, left, hz, significant[ref], audiometry.LeftEar)
			test.RightShift = shiftOf(h.Right, right, hz, significant[ref], audiometry.RightEar)
		}
		a.p.Tests = append(a.p.Tests, test)
	}
}

// ageCorrected says whether the site has chosen that shifts are corrected for age.
func (a *painter) ageCorrected() bool {
	age := a.bench.builder.Measures.Hearing.AgeCorrection
	return age != nil && a.bench.builder.Choices[age.Choice] == true
}

// baselineOf gives the test that is the ear's baseline for a test of that day: the first baseline, or the last
// one before that day which a revision put in its place.
func baselineOf(d *dossier.Worker, w *dossier.WorkerRecords, refs dossier.Refs, ear string, day calendar.Date) string {
	if d.Baseline == nil || d.Baseline.Date >= day {
		return ""
	}
	best := d.Baseline.Ref
	days := map[string]calendar.Date{}
	for _, t := range w.Audiograms {
		days[refs.Of(t)] = t.Date
	}
	for _, r := range d.Revisions {
		for _, moved := range r.Ears {
			if (moved == ear || moved == audiometry.BothEars) && days[r.Audiogram].Known() && days[r.Audiogram] < day {
				best = r.Audiogram
			}
		}
	}
	return best
}

func shiftOf(plain, corrected record.Number, hz []int, ears, ear string) *finding.Shift {
	if !plain.Known && !corrected.Known {
		return nil
	}
	s := &finding.Shift{DB: plain.Value, Significant: ears == ear || ears == audiometry.BothEars, Hz: hz}
	if corrected.Known {
		s.AgeDB, s.DB = plain.Value-corrected.Value, corrected.Value
	}
	s.DB, s.AgeDB = math.Round(s.DB*10)/10, math.Round(s.AgeDB*10)/10
	return s
}

func levels(ear *audiometry.Ear) []finding.Level {
	out := []finding.Level{}
	for i, hz := range audiometry.Frequencies {
		t := ear[i]
		state := map[audiometry.State]string{audiometry.Measured: "measured", audiometry.NoResponse: "no_response", audiometry.NotTested: "not_tested"}[t.State]
		if state != "" {
			out = append(out, finding.Level{Hz: hz, DB: float64(t.Tenths) / 10, State: state})
		}
	}
	return out
}
