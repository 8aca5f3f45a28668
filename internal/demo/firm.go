package demo

import (
	"fmt"
	"math"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// Harrow & Slate took over both works on this day; the noise surveys were made in the week before.
var takeover = day("2020-07-06")

// group is a similar-exposure group with its noise surveys.
type group struct {
	id, area, about, job string
	suspected, varied    record.Answer
	surveys              []survey
	changes              []change
	measured             []measured // filled in when the surveys are written
}

// survey is one round of noise measurements of a group: two samples, the second 0.8 dB lower.
type survey struct {
	on         string
	twa        float64 // dBA, of the louder sample
	instrument string
}

// change is a change that concerns the group; a survey follows it.
type change struct{ on, what, raises string }

// measured is a measurement that was made.
type measured struct {
	id   string
	on   Date
	dose float64 // percent, 80 dBA threshold
}

// enrolDose is the dose, in percent, from which the program is owed.
const enrolDose = 50

// noisy says whether the group belongs in the program. No group of these firms crosses that line.
func (g *group) noisy() bool { return g.surveys[0].twa >= 85.8 }

var kilnHillGroups = []*group{
	{id: "kh-grinding", area: "fettling", about: "castings are ground and cut", job: "fettler", suspected: record.Yes, varied: record.Yes,
		surveys: []survey{{"2020-07-01", 97.1, "D-1"}, {"2022-09-13", 96.8, "D-1"}, {"2024-09-10", 97.0, "D-2"}}},
	{id: "kh-knock-out", area: "knock-out", about: "castings are shaken out of their moulds", job: "knock-out operator", suspected: record.Yes, varied: record.Yes,
		surveys: []survey{{"2020-07-01", 94.3, "D-2"}, {"2022-09-14", 94.0, "D-2"}, {"2024-09-11", 94.5, "D-4"}}},
	{id: "kh-moulding", area: "moulding", about: "moulds are rammed and closed", job: "moulder", suspected: record.Yes, varied: record.Yes,
		surveys: []survey{{"2020-07-02", 92.2, "D-1"}, {"2022-09-15", 92.0, "D-1"}, {"2023-05-10", 88.4, "D-1"}, {"2025-05-14", 88.1, "D-2"}},
		changes: []change{{"2023-05-08", "jolt squeezer enclosed", "no"}}},
	{id: "kh-core", area: "core shop", about: "cores are blown and assembled", job: "core maker", suspected: record.Yes, varied: record.No,
		surveys: []survey{{"2020-07-02", 86.6, "D-2"}, {"2022-09-20", 86.4, "D-2"}, {"2024-09-17", 86.5, "D-1"}}},
	{id: "kh-pattern", area: "pattern shop", about: "patterns are made and mended", job: "pattern maker", suspected: record.Yes, varied: record.Yes,
		surveys: []survey{{"2020-07-03", 81.2, "D-1"}, {"2023-09-12", 80.9, "D-1"}}},
	{id: "kh-office", area: "front office", about: "office work", job: "clerk", suspected: record.No, varied: record.No,
		surveys: []survey{{"2020-07-03", 66.0, "D-2"}}},
	{id: "kh-melt", area: "melt deck", about: "iron is melted and poured", job: "melter", suspected: record.Yes, varied: record.Yes,
		surveys: []survey{{"2020-07-02", 92.9, "D-1"}, {"2022-09-21", 92.6, "D-1"}, {"2025-02-11", 93.8, "D-2"}},
		changes: []change{{"2025-02-03", "second furnace", "yes"}}},
	{id: "kh-sand", area: "sand plant", about: "sand is reclaimed and mixed", job: "sand plant operator", suspected: record.Yes, varied: record.Yes,
		surveys: []survey{{"2020-07-03", 87.5, "D-1"}, {"2025-10-02", 87.2, "D-1"}},
		changes: []change{{"2025-09-29", "new screen deck", "unknown"}}},
	{id: "kh-yard", area: "yard", about: "scrap is sorted and loaded", job: "yard hand", suspected: record.Yes, varied: record.Yes,
		surveys: []survey{{"2020-07-03", 79.5, "D-2"}}},
	{id: "kh-lab", area: "laboratory", about: "sand and iron are tested", job: "laboratory worker", suspected: record.No, varied: record.No,
		surveys: []survey{{"2020-07-03", 70.5, "D-2"}}},
}

var larchStreetGroups = []*group{
	{id: "ls-planer", area: "planer hall", about: "timber is planed and moulded on the line", job: "machinist", suspected: record.Yes, varied: record.Yes,
		surveys: []survey{{"2020-07-01", 91.6, "D-3"}, {"2023-03-07", 92.4, "D-3"}, {"2025-03-11", 92.3, "D-3"}},
		changes: []change{{"2023-03-06", "four-side moulder added to the line", "yes"}}},
	{id: "ls-spray", area: "spray room", about: "frames are sprayed", job: "sprayer", suspected: record.Yes, varied: record.No,
		surveys: []survey{{"2020-07-02", 87.0, "D-3"}, {"2023-03-08", 86.8, "D-3"}, {"2025-03-12", 86.9, "D-3"}}},
	{id: "ls-assembly", area: "assembly hall", about: "frames are joined and glazed", job: "joiner", suspected: record.Yes, varied: record.No,
		surveys: []survey{{"2020-07-02", 81.8, "D-3"}, {"2023-03-09", 81.5, "D-3"}}},
	{id: "ls-office", area: "drawing office", about: "office work", job: "clerk", suspected: record.No, varied: record.No,
		surveys: []survey{{"2020-07-03", 64.0, "D-3"}}},
}

// writeGroup writes the group, its changes and its measurements.
func writeGroup(g *group, site string, n *numbers, put func(record.Record)) {
	put(&record.Group{Group: g.id, Site: site, Area: g.area, Description: g.about, SuspectedNoisy: g.suspected, Varied: g.varied,
		ShiftMinutes: record.Num(480), DaysPerWeek: record.Num(5)})
	for _, c := range g.changes {
		put(&record.Change{ChangeID: n.change(), Date: day(c.on), Group: g.id, Area: g.area, What: c.what, RaisesExposure: c.raises})
	}
	for _, s := range g.surveys {
		for _, twa := range []float64{s.twa, s.twa - 0.8} {
			g.measured = append(g.measured, writeMeasurement(g, s, twa, n.measurement(), put))
		}
	}
}

// writeMeasurement writes one full-shift dosimetry with its two dose channels.
func writeMeasurement(g *group, s survey, twa float64, id string, put func(record.Record)) measured {
	common := record.Measurement{
		MeasurementID: id, Date: day(s.on), Group: g.id, Type: "personal", InstrumentID: s.instrument,
		RunMinutes: record.Num(480), ShiftMinutes: record.Num(480), FullShift: record.Yes, Method: "slow",
		CriterionDB: record.Num(90), ExchangeDB: record.Num(5), UpperDB: record.Num(130),
		LAeqDBA: record.Num(tenth(twa + 1.1)), LCeqDBC: record.Num(tenth(twa + 2.6)), MaxDBA: record.Num(tenth(min(twa+13.5, 111.5))),
		PeakDB: record.Num(tenth(min(twa+37, 133.8))), PeakWeighting: "C",
		CheckBeforeDB: record.Num(114), CheckAfterDB: record.Num(113.9), ObserversInvited: record.Yes,
	}
	low, high := common, common
	dose := tenth(scale.DoseOfTWA(twa))
	setDose(&low, 80, dose)
	setDose(&high, 90, tenth(dose*loudShare(twa)))
	put(&low)
	put(&high)
	return measured{id, low.Date, dose}
}

var scale = acoustics.Scale{Criterion: 90, Exchange: 5}

func setDose(m *record.Measurement, threshold, dose float64) {
	m.ThresholdDB, m.DosePct = record.Num(threshold), record.Num(dose)
	if twa, ok := scale.TWAReported(dose); ok {
		m.TWADBA = record.Num(twa)
	}
}

// loudShare is the part of the dose that stems from levels of 90 dBA and above.
func loudShare(twa float64) float64 {
	switch {
	case twa >= 90:
		return 0.94
	case twa >= 87.5:
		return 0.6
	case twa >= 85:
		return 0.35
	}
	return 0.05
}

// tenth rounds to one decimal.
func tenth(x float64) float64 { return math.Round(x*10) / 10 }

// numbers counts the ids that are given.
type numbers struct{ measurements, changes, audiograms int }

func (n *numbers) measurement() string {
	n.measurements++
	return fmt.Sprintf("N-%04d", n.measurements)
}

func (n *numbers) change() string {
	n.changes++
	return fmt.Sprintf("C-%02d", n.changes)
}

func (n *numbers) audiogram() string {
	n.audiograms++
	return fmt.Sprintf("A-%05d", n.audiograms)
}
