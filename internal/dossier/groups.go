package dossier

import (
	"maps"
	"slices"
	"strconv"

	"hearduty/internal/acoustics"
	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// groupIDs lists the groups of the site: those in its group records, those in which its workers are or
// were measured, and the areas that were measured without a group.
func (b *Builder) groupIDs(u *Usage) []string {
	ids := map[string]bool{}
	for id, g := range b.Registers.Groups {
		if g.Site == b.Place.ID {
			ids[id] = true
		}
	}
	for id := range u.members {
		if b.Registers.Groups[id] == nil {
			ids[id] = true
		}
	}
	for id := range u.loose {
		if g := b.Registers.Groups[id]; g == nil || g.Site == b.Place.ID {
			ids[id] = true
		}
	}
	return slices.Sorted(maps.Keys(ids))
}

// measurementsOf gives the measurements that stand for a group, with those that its workers wore
// themselves, oldest first.
func (b *Builder) measurementsOf(u *Usage, id string) []*record.Measurement {
	all := until(b.Registers.measurementsOf(b.Registers.Groups[id], id), b.AsOf, func(m *record.Measurement) Date { return m.Date })
	if len(u.loose[id]) > 0 {
		all = slices.Concat(all, u.loose[id])
		slices.SortStableFunc(all, compareMeasurements)
	}
	return all
}

// Groups makes the dossiers of the site's groups.
func (b *Builder) Groups(u *Usage) []*File {
	var out []*File
	for _, id := range b.groupIDs(u) {
		out = append(out, b.group(id, u))
	}
	return out
}

func (b *Builder) group(id string, u *Usage) *File {
	refs := NewRefs()
	reg := b.Registers.Groups[id]
	d := &Group{Common: b.common(shownID(id)), Known: reg != nil, Workers: u.members[id], Holders: u.holders[id]}
	if reg != nil {
		d.Area, d.SuspectedNoisy, d.Varied = reg.Area, reg.SuspectedNoisy, reg.Varied
		refs.Of(reg)
	}
	file := &File{Kind: KindGroup, ID: d.ID, Site: b.Place.ID, Input: d, Series: map[string][]Link{}, Refs: refs}
	d.Measurements = b.measurements(id, b.measurementsOf(u, id), refs)
	for _, m := range d.Measurements {
		file.Series["measurement.any"] = append(file.Series["measurement.any"], m.Link)
	}
	h := b.histories[id]
	if h == nil {
		h = b.channels.historyOf(nil, nil)
	}
	b.markCurrent(d.Measurements, h)
	pieces := h.during(calendar.Spell{From: 1}, id)
	d.Exposures = b.exposures(pieces, refs)
	d.Exposed, d.Unknown, _ = b.levelSpells(pieces)
	if n := len(d.Exposures); n > 0 {
		d.Now = &d.Exposures[n-1]
	}
	enrolling := b.channels.enrols
	d.Statistics = b.channels.statistics(h, d.Workers)
	if r := h.first(enrolling); r != nil {
		d.FirstSurvey = link(refs, r.rec, r.day)
	}
	if len(u.loose[id]) > 0 && d.FirstSurvey == nil {
		d.FirstSurvey = &d.Measurements[0].Link
	}
	if tasks := until(b.Registers.tasksOf[id], b.AsOf, func(t *record.Task) Date { return t.Date }); len(tasks) > 0 {
		d.TaskDay = link(refs, tasks[0], tasks[0].Date)
	}
	b.changes(d, refs)
	d.Controls = []Control{}
	for _, c := range b.Registers.controlsOf(id, d.Area, b.AsOf) {
		installed := c.InstalledOn
		if installed > b.AsOf {
			installed = 0
		}
		d.Controls = append(d.Controls, Control{Link: *link(refs, c, c.Date), Type: c.Type, What: c.What, Feasible: c.Feasible, Installed: installed})
	}
	d.Documents = []Document{}
	for _, doc := range until(b.Registers.Documents, b.AsOf, func(d *record.Document) Date { return d.Date }) {
		if b.covers(doc, d) {
			d.Documents = append(d.Documents, document(doc, refs))
		}
	}
	return file
}

func document(doc *record.Document, refs Refs) Document {
	return Document{Link: *link(refs, doc, doc.Date), Type: doc.Type, Covers: emptyNotNil([]string(doc.Covers))}
}

// measurements writes the measurements of a group, the dose channels of each taken together.
func (b *Builder) measurements(id string, rows []*record.Measurement, refs Refs) []Measurement {
	out := []Measurement{}
	level := b.Measures.Exposure.Levels[b.Measures.Exposure.Enrols]
	i, at := b.channels.index(level.Channel), workplaceOf(id, b.Registers.Groups[id])
	for len(rows) > 0 {
		n := sameMeasurement(rows)
		first := rows[0]
		m := Measurement{
			Link: *link(refs, first, first.Date), ID: first.MeasurementID, Type: first.Type, FullShift: first.FullShift,
			Instrument: first.InstrumentID, ObserversInvited: first.ObserversInvited,
		}
		for _, row := range rows[:n] {
			b.takeRow(&m, row, i)
		}
		m.Reaches, m.Doubts = b.reachesEnrolling(i, rows[:n], at), doubts(rows[:n])
		out = append(out, m)
		rows = rows[n:]
	}
	return out
}

// takeRow takes one dose channel into a measurement. Of several doses with the law's criterion level and
// exchange rate, or for a level, taken by equal energy, the one with the lowest threshold is shown.
func (b *Builder) takeRow(m *Measurement, row *record.Measurement, channel int) {
	asked := b.channels.scales[channel]
	if b.channels.isLevel(channel) {
		asked = acoustics.Scale{Criterion: row.CriterionDB.Value, Exchange: equalEnergy}
	}
	dosed := row.DosePct.Known || row.TWADBA.Known
	if dosed && row.CriterionDB == record.Num(asked.Criterion) && row.ExchangeDB == record.Num(asked.Exchange) {
		if !m.Dosed || row.ThresholdDB.Known && (!m.Threshold.Known || row.ThresholdDB.Value < m.Threshold.Value) {
			m.Threshold, m.Upper = row.ThresholdDB, row.UpperDB
		}
		m.Dosed = true
	}
	if row.MaxDBA.Known && (!m.MaxDBA.Known || row.MaxDBA.Value > m.MaxDBA.Value) {
		m.MaxDBA = row.MaxDBA
	}
	if row.PeakDB.Known && (!m.PeakDB.Known || row.PeakDB.Value > m.PeakDB.Value) {
		m.PeakDB, m.PeakWeighting = row.PeakDB, row.PeakWeighting
	}
	if row.ObserversInvited != record.Unanswered {
		m.ObserversInvited = row.ObserversInvited
	}
}

// reachesEnrolling says whether one measurement reaches the level that enrols.
func (b *Builder) reachesEnrolling(channel int, rows []*record.Measurement, at workplace) record.Answer {
	if rows[0].Type == "task" {
		return record.Unanswered
	}
	answer, _ := b.reaches(b.Measures.Exposure.Enrols, b.channels.ofMeasurement(rows, at).on[channel].bounds, rows[0].Date)
	return answer
}

// changes writes the changes of a group with the first measurement and the first evaluation of protectors
// since each.
func (b *Builder) changes(d *Group, refs Refs) {
	d.Changes = []Change{}
	for _, c := range b.Registers.changesOf(d.ID, d.Area, b.AsOf) {
		change := Change{Link: *link(refs, c, c.Date), ID: c.ChangeID, What: c.What, Raises: c.RaisesExposure}
		for _, m := range d.Measurements {
			if m.Date >= c.Date {
				change.Measured = &Link{m.Date, m.Ref}
				break
			}
		}
		for _, doc := range b.Registers.Documents {
			if doc.Type == "attenuation_evaluation" && doc.Date >= c.Date && doc.Date <= b.AsOf && b.covers(doc, d) {
				change.Evaluated = link(refs, doc, doc.Date)
				break
			}
		}
		for _, s := range d.Exposed[b.Measures.Exposure.Enrols] {
			if !s.To.Known() || s.To > c.Date {
				change.Enrolling = true
			}
		}
		d.Changes = append(d.Changes, change)
	}
}

// covers says whether a document covers a group: it names the group, its area, or its site and no narrower
// place.
func (b *Builder) covers(doc *record.Document, d *Group) bool {
	switch {
	case doc.Group != "":
		return doc.Group == d.ID
	case doc.Area != "":
		return doc.Area == d.Area
	}
	return doc.Site == b.Place.ID
}

// SiteDossier makes the dossier of the site itself.
func (b *Builder) SiteDossier(u *Usage) *File {
	refs := NewRefs()
	d := &Site{
		Common: b.common(b.Place.ID), Workers: u.Workers, EnrolledNow: u.EnrolledNow, EnrolledEver: u.Enrolled,
		MissingMeasurements: []Dangling{}, Documents: []Document{}, LogYears: []LogYear{},
	}
	seen := map[string]bool{}
	for _, id := range b.groupIDs(u) {
		for _, m := range b.measurementsOf(u, id) {
			if seen[m.MeasurementID] {
				continue
			}
			seen[m.MeasurementID] = true
			d.Measurements++
			if d.LatestMeasurement == nil || m.Date > d.LatestMeasurement.Date {
				d.LatestMeasurement = link(refs, m, m.Date)
			}
		}
	}
	for _, id := range slices.Sorted(maps.Keys(u.missing)) {
		if seen[id] { // another worker wore it
			continue
		}
		x := u.missing[id]
		x.Ref = refs.Of(u.missingRec[id])
		d.MissingMeasurements = append(d.MissingMeasurements, x)
	}
	for _, doc := range until(b.Registers.Documents, b.AsOf, func(d *record.Document) Date { return d.Date }) {
		if doc.Site == b.Place.ID || doc.Site == "" && doc.Group == "" && doc.Area == "" {
			d.Documents = append(d.Documents, document(doc, refs))
		}
	}
	for _, year := range slices.Sorted(maps.Keys(u.logs)) {
		d.LogYears = append(d.LogYears, b.logYear(year, u.logs[year], d.Documents, refs))
	}
	file := &File{Kind: KindSite, ID: d.ID, Site: d.ID, Input: d, Series: map[string][]Link{}, Refs: refs}
	u.observeSite(file)
	return file
}

func (b *Builder) logYear(year int, y *logYear, documents []Document, refs Refs) LogYear {
	out := LogYear{Year: strconv.Itoa(year), Latest: *link(refs, y.latest, y.latest.Date), Entries: y.entries}
	for _, doc := range documents {
		if doc.Type == "injury_log" && slices.Contains(doc.Covers, out.Year) {
			out.Kept = &Link{doc.Date, doc.Ref}
		}
	}
	return out
}

// markCurrent says which measurements describe the group as it is, and which were repeated since.
func (b *Builder) markCurrent(list []Measurement, h *history) {
	var since Date
	for _, e := range h.events {
		for _, m := range list {
			if m.Date >= e.day {
				since = max(since, e.day)
			}
		}
	}
	channel := b.channels.enrols
	for i := range list {
		list[i].Current = list[i].Date >= since
		list[i].Repeated = slices.ContainsFunc(h.results, func(r *result) bool {
			return r.day > list[i].Date && r.settles(channel)
		})
	}
}
