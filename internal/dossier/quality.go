package dossier

import (
	"maps"
	"math"
	"slices"
	"strconv"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// notRecorded is the subject under which uses without an id are judged.
const notRecorded = "(not recorded)"

func shownID(id string) string {
	if id == "" {
		return notRecorded
	}
	return id
}

// Instruments makes the dossiers of the audiometers and noise instruments used or held at the site.
func (b *Builder) Instruments(u *Usage) []*File {
	noise := b.noiseUses(u)
	ids := map[string]bool{}
	for id := range u.audiometers {
		ids[id] = true
	}
	for id := range noise {
		ids[id] = true
	}
	for id, i := range b.Registers.Instruments {
		if i.Site == b.Place.ID {
			ids[id] = true
		}
	}
	var out []*File
	siteAlike := oneDay(u.audiometers)
	for _, id := range slices.Sorted(maps.Keys(ids)) {
		file := b.instrument(id, u.audiometers[id], noise[id])
		b.observeInstrument(file, id, u, siteAlike)
		out = append(out, file)
	}
	return out
}

// noiseUses gives the rows of the noise measurements of the site by instrument, oldest first.
func (b *Builder) noiseUses(u *Usage) map[string][]*record.Measurement {
	out := map[string][]*record.Measurement{}
	seen := map[*record.Measurement]bool{}
	for _, id := range b.groupIDs(u) {
		for _, m := range b.measurementsOf(u, id) {
			if !seen[m] {
				seen[m] = true
				out[m.InstrumentID] = append(out[m.InstrumentID], m)
			}
		}
	}
	for id := range out {
		slices.SortStableFunc(out[id], compareMeasurements)
	}
	return out
}

func (b *Builder) instrument(id string, tests *used, noise []*record.Measurement) *File {
	refs := NewRefs()
	reg := b.Registers.Instruments[id]
	d := &Instrument{Common: b.common(shownID(id)), Known: reg != nil, Years: []UseYear{}, Deviations: []Drift{}, NoiseUse: []Use{}}
	if reg != nil {
		d.Type, d.Standard, d.Class = reg.Type, reg.Standard, reg.Class
		refs.Of(reg)
	}
	checks := until(b.Registers.calibrations[id], b.AsOf, func(c *record.Calibration) Date { return c.Date })
	file := &File{Kind: KindInstrument, ID: d.ID, Site: b.Place.ID, Input: d, Series: calibrationSeries(checks, refs), Refs: refs}
	for _, c := range checks {
		if c.Type != "functional" {
			d.Calibration = link(refs, c, c.Date)
		}
	}
	var first, last Date
	if tests != nil {
		if d.Type == "" && len(noise) == 0 {
			d.Type = "audiometer" // it tests hearing
		}
		d.Tests, d.Workers, d.Years, file.Uses = tests.tests, tests.workers, useYears(tests, checks, refs), tests.tallies()
		for _, day := range tests.sortedDays() {
			file.Series["test.use"] = append(file.Series["test.use"], tests.link(refs, day))
		}
		first, last = file.Uses[0].Date, file.Uses[len(file.Uses)-1].Date
	}
	d.InUse = b.inUse(reg, first, last)
	for _, c := range checks {
		if drift, ok := driftOf(c, checks, file.Series["test.use"], refs); ok {
			d.Deviations = append(d.Deviations, drift)
		}
	}
	for len(noise) > 0 {
		n := sameMeasurement(noise)
		d.NoiseUse = append(d.NoiseUse, useOf(noise[:n], checks, refs))
		noise = noise[n:]
	}
	return file
}

// inUse gives the stretch in which an audiometer is in use at the site: from its first day in service or
// its first test to its last day in service or, if it is used after that, its last test. One that was never
// used, and whose first day in service is not recorded, is not in use.
func (b *Builder) inUse(reg *record.Instrument, firstTest, lastTest Date) *Spell {
	s := calendar.Spell{From: firstTest}
	if reg != nil {
		if reg.InServiceFrom.Known() && (!firstTest.Known() || reg.InServiceFrom < firstTest) {
			s.From = reg.InServiceFrom
		}
		if reg.InServiceTo.Known() {
			s.To = max(reg.InServiceTo, lastTest) + 1
		}
	}
	if !s.From.Known() || s.From > b.AsOf {
		return nil
	}
	out := b.spell(s)
	return &out
}

func calibrationSeries(checks []*record.Calibration, refs Refs) map[string][]Link {
	series := map[string][]Link{}
	for _, c := range checks {
		l := *link(refs, c, c.Date)
		switch c.Type {
		case "acoustic":
			series["calibration.acoustic"] = append(series["calibration.acoustic"], l)
		case "exhaustive":
			series["calibration.acoustic"] = append(series["calibration.acoustic"], l)
			series["calibration.exhaustive"] = append(series["calibration.exhaustive"], l)
		case "functional":
			series["calibration.functional"] = append(series["calibration.functional"], l)
		}
	}
	return series
}

// useYears counts, year by year, the days of use and those without a functional check.
func useYears(tests *used, checks []*record.Calibration, refs Refs) []UseYear {
	checked := map[Date]bool{}
	for _, c := range checks {
		if c.Type == "functional" {
			checked[c.Date] = true
		}
	}
	out := []UseYear{}
	for _, day := range tests.sortedDays() {
		year := strconv.Itoa(day.Year())
		if n := len(out); n == 0 || out[n-1].Year != year {
			out = append(out, UseYear{Year: year})
		}
		y := &out[len(out)-1]
		y.Last = day
		y.Days++
		if checked[day] {
			continue
		}
		if y.Unchecked == 0 {
			y.FirstUnchecked, y.Ref = day, tests.link(refs, day).Ref
		}
		y.Unchecked++
		y.Tests += tests.days[day].tests
		y.Workers += tests.days[day].workers
	}
	return out
}

// driftOf takes a check that found a deviation, or failed without a figure, with what came after it.
func driftOf(c *record.Calibration, checks []*record.Calibration, uses []Link, refs Refs) (Drift, bool) {
	largest := -1.0
	if c.Deviation != nil {
		for _, n := range c.Deviation {
			if n.Known {
				largest = math.Max(largest, math.Abs(n.Value))
			}
		}
	}
	failed := largest <= 0 && c.Result == "fail" // no figure says why
	if largest <= 0 && !failed || c.Type != "functional" && c.Type != "acoustic" && c.Type != "exhaustive" {
		return Drift{}, false
	}
	d := Drift{Link: *link(refs, c, c.Date), Type: c.Type, Largest: record.Number{Value: largest, Known: !failed}}
	for _, later := range checks {
		if later.Date < c.Date || later == c {
			continue
		}
		if d.Acoustic == nil && (later.Type == "acoustic" || later.Type == "exhaustive") {
			d.Acoustic = link(refs, later, later.Date)
		}
		if d.Exhaustive == nil && later.Type == "exhaustive" {
			d.Exhaustive = link(refs, later, later.Date)
		}
	}
	d.UsedBeforeAcoustic = usedBefore(c, d.Acoustic, uses)
	d.UsedBeforeExhaustive = usedBefore(c, d.Exhaustive, uses)
	return d, true
}

// usedBefore gives the first day of use after a check and before what the check calls for. A functional
// check is made before the day's use, so that use on the same day counts.
func usedBefore(c *record.Calibration, remedy *Link, uses []Link) *Link {
	for _, u := range uses {
		after := u.Date > c.Date || u.Date == c.Date && c.Type == "functional"
		if after && (remedy == nil || u.Date < remedy.Date) {
			return &u
		}
	}
	return nil
}

// useOf takes a noise measurement; any of its rows may hold the checks before and after.
func useOf(rows []*record.Measurement, checks []*record.Calibration, refs Refs) Use {
	m := rows[0]
	u := Use{Link: *link(refs, m, m.Date), ID: m.MeasurementID}
	for _, row := range rows {
		if !u.CheckBefore.Known {
			u.CheckBefore = row.CheckBeforeDB
		}
		if !u.CheckAfter.Known {
			u.CheckAfter = row.CheckAfterDB
		}
	}
	for _, c := range checks {
		if c.Date <= m.Date {
			u.Calibrated, u.Failed = link(refs, c, c.Date), c.Result == "fail"
		}
	}
	return u
}

// Rooms makes the dossiers of the test rooms used at the site.
func (b *Builder) Rooms(u *Usage) []*File {
	var out []*File
	for _, id := range slices.Sorted(maps.Keys(u.rooms)) {
		refs := NewRefs()
		use := u.rooms[id]
		days := use.sortedDays()
		first := use.link(refs, days[0])
		d := &Room{Common: b.common(shownID(id)), Tests: use.tests, Workers: use.workers, First: &first, Surveys: []Survey{}}
		file := &File{Kind: KindRoom, ID: d.ID, Site: b.Place.ID, Input: d, Series: map[string][]Link{}, Uses: use.tallies(), Refs: refs}
		for _, s := range b.Registers.Rooms {
			if s.RoomID != id || id == "" || s.Date > b.AsOf {
				continue
			}
			survey := Survey{Link: *link(refs, s, s.Date), Earphones: s.Earphones, Band: map[string]record.Number{}}
			for i, hz := range record.OctaveBands {
				survey.Band[strconv.Itoa(hz)] = s.Band[i]
			}
			d.Surveys = append(d.Surveys, survey)
			file.Series["survey.any"] = append(file.Series["survey.any"], survey.Link)
		}
		if n := len(d.Surveys); n > 0 {
			d.Latest = &d.Surveys[n-1]
		}
		for _, day := range days {
			file.Series["test.use"] = append(file.Series["test.use"], use.link(refs, day))
		}
		out = append(out, file)
	}
	return out
}

// Testers makes the dossiers of the people who made hearing tests at the site.
func (b *Builder) Testers(u *Usage) []*File {
	var out []*File
	siteAlike := oneDay(u.audiometers)
	for _, id := range slices.Sorted(maps.Keys(u.testers)) {
		refs := NewRefs()
		use := u.testers[id]
		days := use.sortedDays()
		first, last := use.link(refs, days[0]), use.link(refs, days[len(days)-1])
		reg := b.Registers.Testers[id]
		d := &Tester{Common: b.common(shownID(id)), Known: reg != nil, Tests: use.tests, Workers: use.workers, First: &first, Last: &last}
		file := &File{Kind: KindTester, ID: d.ID, Site: b.Place.ID, Input: d, Series: map[string][]Link{}, Uses: use.tallies(), Refs: refs}
		for _, day := range days {
			l := use.link(refs, day)
			file.Series["test.use"] = append(file.Series["test.use"], l)
			if reg != nil && (reg.ValidFrom.Known() && day < reg.ValidFrom || reg.ValidTo.Known() && day > reg.ValidTo) {
				if d.Outside == 0 {
					d.FirstOutside = &l
				}
				d.Outside += use.days[day].tests
			}
		}
		if reg != nil {
			d.Qualification, d.Certificate, d.CompetenceShown = reg.Qualification, reg.Certificate, reg.CompetenceShown
			d.Supervisor, d.SupervisorIs = reg.Supervisor, b.Registers.professionOf(reg.Supervisor)
			refs.Of(reg)
		}
		if !siteAlike {
			use.observeDays(file, id)
		}
		out = append(out, file)
	}
	return out
}
