package demo

import (
	"fmt"
	"maps"
	"slices"
	"time"

	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// site is one works with its equipment for hearing tests and its choice of protectors.
type site struct {
	id     string
	clinic *clinic
	van    *clinic  // a test van, if one was used
	models []string // protector models handed out
	strong string   // model handed out after a threshold shift
}

// clinic is where and by whom the hearing tests of a site are made.
type clinic struct {
	audiometer, room string
	first, second    string // technicians, one after the other
	secondFrom       Date
	everyTuesday     bool // tests on every Tuesday, otherwise on the first and third of the month
	trainer          string
	mobile           record.Answer
	used             map[Date]bool // days on which tests were made
}

// isTestDay says whether hearing tests are made on the day.
func (c *clinic) isTestDay(d Date) bool {
	if d.Weekday() != time.Tuesday {
		return false
	}
	_, _, dom := d.Civil()
	return c.everyTuesday || dom <= 7 || dom >= 15 && dom <= 21
}

// testDayBefore gives the last test day up to d.
func (c *clinic) testDayBefore(d Date) Date {
	for !c.isTestDay(d) {
		d--
	}
	return d
}

// testDayAfter gives the first test day from d on.
func (c *clinic) testDayAfter(d Date) Date {
	for !c.isTestDay(d) {
		d++
	}
	return d
}

// tester gives the technician who makes the tests of a day.
func (c *clinic) tester(d Date) string {
	if d >= c.secondFrom {
		return c.second
	}
	return c.first
}

// audiometer is an audiometer with the days of its calibrations, exhaustive and acoustic by turns. The
// first lies before its first day in service.
type audiometer struct {
	id, site, serial, from string
	calibrated             []string
}

var audiometers = []audiometer{
	{"AM-1", "kiln-hill", "41-0207", "2020-07-01", []string{"2020-06-24", "2021-06-17", "2022-06-10", "2023-06-02", "2024-05-24", "2025-05-15", "2026-05-06"}},
	{"AM-2", "larch-street", "41-0311", "2020-07-01", []string{"2020-06-25", "2021-06-18", "2022-06-09", "2023-06-01", "2024-05-23", "2025-05-16", "2026-05-07"}},
	{vanAudiometer, "kiln-hill", "38-1190", "2021-11-01", []string{"2021-10-20", "2022-10-12", "2023-10-04", "2024-09-25", "2025-09-17"}},
}

const (
	vanAudiometer = "AM-3"
	vanRoom       = "RV-1"
	vanTester     = "T-05"
)

// writeAudiometers writes the audiometers and their yearly calibrations.
func writeAudiometers(put func(record.Record)) {
	for _, a := range audiometers {
		put(&record.Instrument{InstrumentID: a.id, Type: "audiometer", Site: a.site, Serial: a.serial, Class: "type 4", Standard: "ANSI S3.6", InServiceFrom: day(a.from)})
		for i, d := range a.calibrated {
			kind := []string{"exhaustive", "acoustic"}[i%2]
			put(&record.Calibration{InstrumentID: a.id, Date: day(d), Type: kind, Deviation: deviation(float64(i%3) - 1), Result: "pass", By: "LAB-1"})
		}
	}
}

// deviation gives the same deviation at all frequencies from 500 to 6000 Hz.
func deviation(db float64) *record.Deviation {
	var d record.Deviation
	for i, hz := range audiometry.Frequencies {
		if hz >= 500 && hz <= 6000 && hz != 750 && hz != 1500 {
			d[i] = record.Num(db)
		}
	}
	return &d
}

// writeFunctionalChecks writes the check of the audiometer before the first test of each test day.
func (c *clinic) writeFunctionalChecks(put func(record.Record)) {
	for _, d := range slices.Sorted(maps.Keys(c.used)) {
		put(&record.Calibration{InstrumentID: c.audiometer, Date: d, Type: "functional", Deviation: heard(c.audiometer, d), Result: "pass", By: c.tester(d)})
	}
}

// heard gives the deviations that a person with known hearing finds on a day: a step of 5 dB now and then.
func heard(audiometer string, d Date) *record.Deviation {
	found := deviation(0)
	rng := dice(audiometer, d.String())
	for i := range found {
		if found[i].Known {
			found[i].Value = []float64{-5, 0, 0, 0, 0, 5}[rng.IntN(6)]
		}
	}
	return found
}

// writeRoom writes a survey of a test room in each June from one year to another, all within Table D-1.
func writeRoom(room string, from, to int, earphones string, put func(record.Record)) {
	for year := from; year <= to; year++ {
		s := &record.RoomSurvey{RoomID: room, Date: day(fmt.Sprintf("%d-06-08", year)), Earphones: earphones, By: "LAB-1"}
		for i, db := range [...]float64{31, 27, 25, 23, 22, 19, 18, 16} {
			s.Band[i] = record.Num(db + float64((year+i)%3))
		}
		put(s)
	}
}

// writeTesters writes the technicians who make hearing tests, and the professionals who judge them.
func writeTesters(put func(record.Record)) {
	technician := func(id, certificate, from, to string) {
		put(&record.Tester{TesterID: id, Qualification: "technician", Certificate: certificate, ValidFrom: day(from), ValidTo: day(to), Supervisor: audiologist})
	}
	technician("T-01", "OHC 20-118", "2020-02-01", "2025-01-31")
	technician("T-02", "OHC 24-306", "2024-09-01", "2029-08-31")
	technician("T-03", "OHC 20-141", "2020-04-01", "2025-03-31")
	technician("T-04", "OHC 25-012", "2025-01-15", "2030-01-14")
	technician(vanTester, "OHC 19-077", "2019-06-01", "2024-05-31")
	writeProfessionals(put)
}

// writeProfessionals writes the audiologist and the physician.
func writeProfessionals(put func(record.Record)) {
	put(&record.Tester{TesterID: audiologist, Qualification: "audiologist", Certificate: "A-2231", ValidFrom: day("2014-01-01"), ValidTo: day("2027-12-31")})
	put(&record.Tester{TesterID: physician, Qualification: "physician", Certificate: "MD-7754", ValidFrom: day("2012-01-01"), ValidTo: day("2028-12-31")})
}

const (
	audiologist = "P-01"
	physician   = "P-02"
)
