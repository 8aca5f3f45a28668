package demo

import (
	"slices"

	"hearduty/internal/record"
)

// noiseFaults are faults of noise monitoring, of what follows from it, and of noise control.
var noiseFaults = []fault{
	{"enrolment", "gap", "K0131", "A moulder at 88 dBA is missing from the employer's roll.",
		set(func(b *book) []*record.Worker { return b.workers }, func(w *record.Worker) bool { return w.WorkerID == "K0131" },
			func(w *record.Worker) { w.InProgram = record.No })},
	{"monitoring-started", "gap", "kh-yard", "The yard is suspected of noise, but nobody ever measured there; so it is also unproven whether the yard hands belong in the program.",
		unmeasured("kh-yard")},
	{"monitoring-started", "unproven", "kh-lab", "Nobody measured in the laboratory or noted whether noise is suspected there.",
		both(unmeasured("kh-lab"), onGroup("kh-lab", func(g *record.Group) { g.SuspectedNoisy = record.Unanswered }))},
	{"personal-sampling", "gap", "kh-melt", "The melters move about, but only their area was measured.", areaOnly("kh-melt")},
	{"personal-sampling", "lifted", "kh-sand", "The sand plant was measured by area too, but a study shows that this is equivalent.",
		both(areaOnly("kh-sand"), add(&record.Document{Type: "area_sampling_equivalent", Group: "kh-sand", Date: day("2020-08-17")}))},
	{"measurement-range", "gap", "kh-moulding", "The dosimeter of one sample integrated up to 115 dBA only.",
		onSamples("kh-moulding", "2025-05-14", 1, func(m *record.Measurement) { m.UpperDB = record.Num(115) })},
	{"noise-instrument-calibrated", "gap", "D-4", "The knock-out was measured with a dosimeter that nobody had calibrated or checked.",
		both(drop(allCalibrations, func(c *record.Calibration) bool { return c.InstrumentID == "D-4" }),
			onSamples("kh-knock-out", "2024-09-11", 0, unchecked), onSamples("kh-knock-out", "2024-09-11", 1, unchecked))},
	{"monitoring-repeated", "gap", "kh-melt", "A second furnace made the melt deck louder, and it was not measured again; so the protectors of the melters cannot be judged.",
		withoutSurvey("kh-melt", "2025-02-11")},
	{"monitoring-repeated", "unproven", "kh-sand", "A new screen deck may have made the sand plant louder; nobody knows, and nobody measured.",
		withoutSurvey("kh-sand", "2025-10-02")},
	{"exposure-notice", "gap", "K0132", "A moulder was not told of the results of 2023.",
		drop(allNotices, func(n *record.Notice) bool {
			return n.WorkerID == "K0132" && n.About == "exposure" && n.Date.Year() == 2023
		})},
	{"monitoring-observed", "gap", "kh-grinding", "The grinders were not invited to watch the measurement of 2024.",
		onSamples("kh-grinding", "2024-09-10", 0, func(m *record.Measurement) { m.ObserversInvited = record.No })},
	{"monitoring-observed", "unproven", "kh-core", "The record of one sample does not say whether anybody could watch.",
		onSamples("kh-core", "2024-09-17", 1, func(m *record.Measurement) { m.ObserversInvited = record.Unanswered })},
	{"feasible-controls", "gap", "kh-grinding", "The enclosed saw was found feasible but was never installed.",
		onControl("kh-grinding", "2024-01-22", func(c *record.Control) { c.InstalledOn = 0 })},
	{"feasible-controls", "opinion", "kh-melt", "The study of controls on the melt deck was never finished.",
		onControl("kh-melt", "2023-02-06", func(c *record.Control) { c.Feasible = "studied" })},
	{"continuous-ceiling", "gap", "kh-knock-out", "The shake-out grid reached 117.2 dBA.",
		onSamples("kh-knock-out", "2022-09-14", 0, func(m *record.Measurement) { m.MaxDBA = record.Num(117.2) })},
	{"continuous-ceiling", "unproven", "kh-core", "One sample does not tell the highest level.",
		onSamples("kh-core", "2020-07-02", 1, func(m *record.Measurement) { m.MaxDBA = record.Number{} })},
	{"impulse-ceiling", "gap", "kh-knock-out", "Castings dropped onto the grid gave a peak of 142.6 dB.",
		onSamples("kh-knock-out", "2024-09-11", 0, func(m *record.Measurement) { m.PeakDB = record.Num(142.6) })},
	{"attenuation-reevaluated", "gap", "kh-melt", "Nobody checked whether the melters' protectors suffice since the second furnace came.",
		drop(func(b *book) *[]*record.Document { return &b.documents }, func(d *record.Document) bool {
			return d.Group == "kh-melt" && d.Date == day("2025-02-24")
		})},
}

func onGroup(id string, change func(*record.Group)) func(*book) {
	return set(func(b *book) []*record.Group { return b.groups }, func(g *record.Group) bool { return g.Group == id }, change)
}

func onControl(group, date string, change func(*record.Control)) func(*book) {
	return set(func(b *book) []*record.Control { return b.controls },
		func(c *record.Control) bool { return c.Group == group && c.Date == day(date) }, change)
}

// onSamples changes both dose channels of one sample of a survey; sample 0 is the louder one.
func onSamples(group, date string, sample int, change func(*record.Measurement)) func(*book) {
	return func(b *book) {
		left := sample
		for i, m := range b.measurements {
			if m.Group == group && m.Date == day(date) && i > 0 && b.measurements[i-1].MeasurementID == m.MeasurementID {
				if left == 0 {
					change(b.measurements[i-1])
					change(m)
					return
				}
				left--
			}
		}
		panic("demo: no such sample")
	}
}

func unchecked(m *record.Measurement) {
	m.CheckBeforeDB, m.CheckAfterDB = record.Number{}, record.Number{}
}

// unmeasured removes all measurements of a group.
func unmeasured(group string) func(*book) {
	return drop(func(b *book) *[]*record.Measurement { return &b.measurements }, func(m *record.Measurement) bool { return m.Group == group })
}

// withoutSurvey removes one round of measurements of a group, and the notices about it.
func withoutSurvey(group, date string) func(*book) {
	return func(b *book) {
		gone := map[string]bool{}
		for _, m := range b.measurements {
			if m.Group == group && m.Date == day(date) {
				gone[m.MeasurementID] = true
			}
		}
		b.measurements = slices.DeleteFunc(b.measurements, func(m *record.Measurement) bool { return gone[m.MeasurementID] })
		b.notices = slices.DeleteFunc(b.notices, func(n *record.Notice) bool { return gone[n.MeasurementID] })
	}
}

// areaOnly turns all measurements of a group into area measurements.
func areaOnly(group string) func(*book) {
	return func(b *book) {
		var area string
		for _, g := range b.groups {
			if g.Group == group {
				area = g.Area
			}
		}
		set(measurements, func(m *record.Measurement) bool { return m.Group == group },
			func(m *record.Measurement) { m.Type, m.Area = "area", area })(b)
	}
}
