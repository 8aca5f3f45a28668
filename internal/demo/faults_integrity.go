package demo

import (
	"fmt"
	"math/rand/v2"

	"hearduty/internal/record"
)

// oddity is something at Kiln Hill that breaks no duty of a worker in the program but that an auditor would
// ask about: the program without oddities gives none of these observations.
type oddity struct {
	kind  string // of the observation
	about string // the subject: a worker, instrument, tester or site
	why   string // what is odd
	plant func(*book)
}

// oddities are planted after the faults, in their order. Most are about clerks, who do not belong in the program,
// and the second-hand audiometer AM-4, with which they were tested.
var oddities = []oddity{
	{"one_day_of_month", "AM-4", "The clerks were tested, always on the 12th, whatever day of the week it was.", clerksTested},
	{"calibration_after_tests", "AM-4", "The second-hand audiometer was calibrated only after the tests.",
		add(&record.Calibration{InstrumentID: "AM-4", Date: day("2025-01-20"), Type: "exhaustive", Deviation: deviation(1), Result: "pass", By: "LAB-1"})},
	{"no_functional_check", "K0157", "The second-hand audiometer was not checked in May.",
		drop(allCalibrations, func(c *record.Calibration) bool { return c.InstrumentID == "AM-4" && c.Date == day("2024-05-12") })},
	{"results_identical_across_workers", "T-01", "Three clerks have the same thresholds.", onTests("A-08001", "A-08002", "A-08003")},
	{"identical_earlier", "K0151", "A clerk has the thresholds of half a year before.", onTests("A-08001", "A-08007")},
	{"stated_shift_differs", "K0156", "The sheet of a clerk says that the left ear has shifted, and it has not.",
		set(audiograms, func(a *record.Audiogram) bool { return a.AudiogramID == "A-08010" }, func(a *record.Audiogram) {
			a.LeftStatedShift, a.RightStatedShift = record.Yes, record.No
		})},
	{"after_leaving", "K0152", "A clerk was tested who had left the year before.", nil},
	{"before_hire", "K0182", "A clerk was tested who was hired a year later.", nil},
	{"training_outside_employment", "K0182", "The clerk was trained a week before the first day.",
		add(&record.Training{WorkerID: "K0182", Date: day("2025-09-01"), Topics: topics, Language: "en", By: "S-11"})},
	{"protector_issued_outside_employment", "K0155", "A clerk was given plugs after leaving.",
		add(&record.ProtectorIssue{WorkerID: "K0155", ProtectorID: "P-1", Date: day("2025-09-15"), ChoicesOffered: record.Num(3), FittedBy: "S-11", Required: record.No})},
	{"checks_all_same_result", "AM-1", "All checks of the audiometer up to 2023 found the same, as if one had been copied.",
		set(func(b *book) []*record.Calibration { return b.calibrations }, func(c *record.Calibration) bool {
			return c.InstrumentID == "AM-1" && c.Type == "functional" && c.Date.Year() < 2024
		}, func(c *record.Calibration) { c.Deviation = deviation(0) })},
}

// clerks are the workers tested month by month from December 2023 to December 2024. The test in November lies
// before the hire of one, the test in December after another left.
var clerks = [...]string{"K0156", "K0151", "K0153", "K0154", "K0155", "K0157", "K0158", "K0151", "K0153", "K0154", "K0156", "K0182", "K0152"}

// clerksTested writes the audiometer AM-4 and the tests made with it, one a month.
func clerksTested(b *book) {
	b.put(&record.Instrument{InstrumentID: "AM-4", Type: "audiometer", Site: "kiln-hill", Serial: "22-0903", Class: "type 4", Standard: "ANSI S3.6", InServiceFrom: day("2023-12-04")})
	for i, worker := range clerks {
		d := day("2023-12-12").AddMonths(i)
		b.put(clerkTest(fmt.Sprintf("A-%05d", 8000+i), worker, d))
		b.put(&record.Calibration{InstrumentID: "AM-4", Date: d, Type: "functional", Deviation: heard("AM-4", d), Result: "pass", By: "T-01"})
	}
}

// clerkTest is a test of a clerk, with thresholds of no pattern.
func clerkTest(id, worker string, d Date) *record.Audiogram {
	a := &record.Audiogram{AudiogramID: id, WorkerID: worker, Date: d, Purpose: "other", AudiometerID: "AM-4", RoomID: "R-1", TesterID: "T-01", Mobile: record.No}
	for side, ear := range [2]string{"left", "right"} {
		rng := dice(worker, ear)
		again := dice(id, ear)
		var level [len(tested)]int
		for i := range level {
			level[i] = 5 * (rng.IntN(3) + i/2 + jitter(again))
		}
		if side == 0 {
			a.Left = toEar(level)
		} else {
			a.Right = toEar(level)
		}
	}
	return a
}

// jitter is mostly nothing, and else a step.
func jitter(rng *rand.Rand) int { return []int{0, 0, 0, 1}[rng.IntN(4)] }

// onTests gives a plant that copies the thresholds of a test into others.
func onTests(from string, to ...string) func(*book) {
	return func(b *book) {
		var source *record.Audiogram
		set(audiograms, func(a *record.Audiogram) bool { return a.AudiogramID == from }, func(a *record.Audiogram) { source = a })(b)
		for _, id := range to {
			set(audiograms, func(a *record.Audiogram) bool { return a.AudiogramID == id }, func(a *record.Audiogram) { a.Left, a.Right = source.Left, source.Right })(b)
		}
	}
}
