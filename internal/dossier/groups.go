package dossier

import (
	"maps"
	"slices"
	"strconv"
	"strings"

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
		d.Area, d.SuspectedNoisy, d.Varied, d.Impulsive, d.DaysVary = reg.Area, reg.SuspectedNoisy, reg.Varied, reg.Impulsive, reg.DaysVary
		refs.Of(reg)
	}
	file := &File{Kind: KindGroup, ID: d.ID, Site: b.Place.ID, Input: d, Series: map[string][]Link{}, Refs: refs}
	d.Measurements = b.measurements(id, b.measurementsOf(u, id), refs)
	for _, m := range d.Measurements {
		file.Series["measurement.any"] = append(file.Series["measurement.any"], m.Link)
	}
	h := b.histories[id]
	if h == nil {
		h = b.channels.historyOf(nil, nil, workplace{})
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
	d.Evaluations = b.evaluations(d, refs)
	b.changes(d, refs)
	d.Controls = []Control{}
	for _, c := range b.Registers.controlsOf(id, d.Area, b.AsOf) {
		d.Controls = append(d.Controls, b.control(c, refs))
	}
	d.Documents = b.documents(file, func(doc *record.Document) bool { return b.covers(doc, d) })
	return file
}

func (b *Builder) control(c *record.Control, refs Refs) Control {
	return Control{
		Link: *link(refs, c, c.Date), Type: c.Type, What: c.What, Feasible: c.Feasible,
		Started: b.past(c.StartedOn), Installed: b.past(c.InstalledOn),
	}
}

// past forgets a day that lies after the as-of day.
func (b *Builder) past(d Date) Date {
	if d > b.AsOf {
		return 0
	}
	return d
}

// documents writes the documents that fit, oldest first, and adds their series: by kind, the days of each document
// and of its reviews.
func (b *Builder) documents(file *File, fits func(*record.Document) bool) []Document {
	out := []Document{}
	for _, doc := range until(b.Registers.Documents, b.AsOf, func(d *record.Document) Date { return d.Date }) {
		if !fits(doc) {
			continue
		}
		d := Document{
			Link: *link(file.Refs, doc, doc.Date), Type: doc.Type, Covers: emptyNotNil([]string(doc.Covers)),
			ReviewedOn: b.past(doc.ReviewedOn), PostedOn: b.past(doc.PostedOn), PostedTo: doc.PostedTo, PostUntil: b.postUntil(doc),
		}
		out = append(out, d)
		name := documentSeries + doc.Type
		file.Series[name] = append(file.Series[name], d.Link)
		if d.ReviewedOn.Known() && d.ReviewedOn != d.Date {
			file.Series[name] = append(file.Series[name], Link{d.ReviewedOn, d.Ref})
		}
	}
	for name, list := range file.Series {
		if strings.HasPrefix(name, documentSeries) {
			slices.SortStableFunc(list, func(a, b Link) int { return int(a.Date) - int(b.Date) })
		}
	}
	return out
}

// measurements writes the measurements of a group, the dose channels of each taken together.
func (b *Builder) measurements(id string, rows []*record.Measurement, refs Refs) []Measurement {
	out := []Measurement{}
	i, at := b.channels.enrols, workplaceOf(id, b.Registers.Groups[id])
	for len(rows) > 0 {
		n := sameMeasurement(rows)
		first := rows[0]
		m := Measurement{
			Link: *link(refs, first, first.Date), ID: first.MeasurementID, Type: first.Type, FullShift: first.FullShift,
			Instrument: first.InstrumentID, Doses: []DoseRange{}, ObserversInvited: first.ObserversInvited,
		}
		for _, row := range rows[:n] {
			b.takeRow(&m, row, i)
		}
		m.Reaches, m.Doubts = b.reachesEnrolling(rows[:n], at), doubts(rows[:n])
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
		m.Dosed, m.Doses = true, append(m.Doses, DoseRange{row.ThresholdDB, row.UpperDB})
	}
	if row.MaxDBA.Known && (!m.MaxDBA.Known || row.MaxDBA.Value > m.MaxDBA.Value) {
		m.MaxDBA = row.MaxDBA
	}
	if row.PeakDB.Known && (!m.PeakDB.Known || row.PeakDB.Value > m.PeakDB.Value) {
		m.PeakDB, m.PeakWeighting = row.PeakDB, row.PeakWeighting
	}
	m.PeakDBC, m.PeakDBZ = higherFigure(m.PeakDBC, PeakDBC, row), higherFigure(m.PeakDBZ, PeakDBZ, row)
	m.MaxDBCFast, m.ImpulseDBZ = higherFigure(m.MaxDBCFast, MaxDBCFast, row), higherFigure(m.ImpulseDBZ, ImpulseDBZ, row)
	if row.AccuracyClass != "" {
		m.AccuracyClass = row.AccuracyClass
	}
	if row.LAeqDBA.Known {
		m.Levelled = true
	}
	if row.Method != "" {
		m.Method = row.Method
	}
	if row.ObserversInvited != record.Unanswered {
		m.ObserversInvited = row.ObserversInvited
	}
}

// reachesEnrolling says whether one measurement reaches the level that enrols.
func (b *Builder) reachesEnrolling(rows []*record.Measurement, at workplace) record.Answer {
	if rows[0].Type == "task" {
		return record.Unanswered
	}
	r := b.channels.ofMeasurement(rows, at)
	on := make([]known, len(r.on))
	for i := range on {
		on[i].bounds = r.on[i].bounds
	}
	return b.reaches(b.Measures.Exposure.Enrols, on, rows[0].Date).verdict
}

// changes writes the changes of a group with the first measurement and the first evaluation of protectors
// since each.
func (b *Builder) changes(d *Group, refs Refs) {
	d.Changes = []Change{}
	for _, c := range b.Registers.changesOf(d.ID, d.Area, b.AsOf) {
		change := Change{Link: *link(refs, c, c.Date), ID: c.ChangeID, What: c.What, Raises: c.RaisesExposure, Identified: b.past(c.IdentifiedOn)}
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
		change.PeriodEnds, change.PeriodShort = b.periodOf(d.Evaluations, c.Date)
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
		Common: b.common(b.Place.ID), Workers: u.Workers, EnrolledNow: u.EnrolledNow, EnrolledEver: u.Enrolled, LevelsNow: slices.AppendSeq([]string{}, maps.Keys(u.levelsNow)),
		MissingMeasurements: []Dangling{}, Documents: []Document{}, LogYears: []LogYear{},
	}
	slices.Sort(d.LevelsNow)
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
	file := &File{Kind: KindSite, ID: d.ID, Site: d.ID, Input: d, Series: map[string][]Link{}, Refs: refs}
	d.Documents = b.documents(file, func(doc *record.Document) bool {
		return doc.Site == b.Place.ID || doc.Site == "" && b.belongs(doc)
	})
	for _, year := range slices.Sorted(maps.Keys(u.logs)) {
		d.LogYears = append(d.LogYears, b.logYear(year, u.logs[year], d.Documents, refs))
	}
	u.observeSite(file)
	return file
}

// belongs says whether a document that names no site belongs to this one: its group or area is of the site, or it names
// neither.
func (b *Builder) belongs(doc *record.Document) bool {
	if doc.Group != "" {
		g := b.Registers.Groups[doc.Group]
		return g != nil && g.Site == b.Place.ID
	}
	return doc.Area == "" || slices.Contains(b.areaIDs(), doc.Area)
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
