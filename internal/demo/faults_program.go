package demo

import (
	"slices"

	"hearduty/internal/record"
)

func deleteIf[T any](list []T, gone func(T) bool) []T { return slices.DeleteFunc(list, gone) }

// qualityFaults are faults of testers, test rooms and audiometers.
var qualityFaults = []fault{
	{"tester-qualified", "gap", "T-06", "A technician who answers to nobody stood in on one day.",
		both(add(&record.Tester{TesterID: "T-06", Qualification: "technician", Certificate: "OHC 21-450", ValidFrom: day("2021-03-01"), ValidTo: day("2026-02-28")}),
			onTestDay("2022-08-02", func(a *record.Audiogram) { a.TesterID = "T-06" }))},
	{"tester-qualified", "unproven", "T-07", "The tester of one day is not in the tester records.",
		onTestDay("2023-05-16", func(a *record.Audiogram) { a.TesterID = "T-07" })},
	{"test-room-background", "gap", vanRoom, "The test van was parked beside the compressor house: 43 dB at 500 Hz.",
		set(func(b *book) []*record.RoomSurvey { return b.roomSurveys }, func(s *record.RoomSurvey) bool { return s.RoomID == vanRoom },
			func(s *record.RoomSurvey) { s.Band[3] = record.Num(43) })},
	{"test-room-background", "unproven", "R-3", "While the booth was moved, tests were made in an office without a survey.",
		onTestDay("2023-06-20", func(a *record.Audiogram) { a.RoomID = "R-3" })},
	{"functional-check", "gap", "AM-1", "The audiometer was not checked on a test day in 2023.",
		drop(allCalibrations, func(c *record.Calibration) bool {
			return c.InstrumentID == "AM-1" && c.Type == "functional" && c.Date == day("2023-08-15")
		})},
	{"acoustic-calibration", "gap", "AM-1", "The check of a test day in 2024 was 12 dB off at 4000 Hz, and the tests went on.",
		set(func(b *book) []*record.Calibration { return b.calibrations }, func(c *record.Calibration) bool {
			return c.InstrumentID == "AM-1" && c.Type == "functional" && c.Date == day("2024-07-16")
		}, func(c *record.Calibration) {
			c.Deviation[frequencyIndex(4000)] = record.Num(12)
			c.Result = "fail"
		})},
	{"acoustic-calibration", "late", "AM-1", "The acoustic calibration of 2023 was left out.", drop(allCalibrations, calibrated("AM-1", "2023-06-02"))},
	{"acoustic-calibration", "gap", vanAudiometer, "The audiometer of the van was last calibrated in 2024.", drop(allCalibrations, calibrated(vanAudiometer, "2025-09-17"))},
	{"exhaustive-calibration", "gap", "AM-1", "In 2026 the audiometer got an acoustic calibration where an exhaustive one was due.",
		set(func(b *book) []*record.Calibration { return b.calibrations }, calibrated("AM-1", "2026-05-06"), func(c *record.Calibration) { c.Type = "acoustic" })},
}

func calibrated(instrument, date string) func(*record.Calibration) bool {
	return func(c *record.Calibration) bool { return c.InstrumentID == instrument && c.Date == day(date) }
}

// onTestDay changes all tests made on a day at Kiln Hill.
func onTestDay(date string, change func(*record.Audiogram)) func(*book) {
	return set(audiograms, func(a *record.Audiogram) bool { return a.AudiometerID == "AM-1" && a.Date == day(date) }, change)
}

// protectorFaults are faults of hearing protectors.
var protectorFaults = []fault{
	{"protectors-offered", "gap", "K0137", "A core maker has never been given a protector.",
		both(drop(allIssues, func(i *record.ProtectorIssue) bool { return i.WorkerID == "K0137" }), withoutFitTests("K0137"))},
	{"protectors-worn", "gap", "K0120", "The latest look at the worker found no protector worn.",
		add(&record.WearCheck{WorkerID: "K0120", Date: day("2026-06-10"), Worn: record.No})},
	{"protectors-worn", "unproven", "K0118", "Nobody has looked whether the worker wears a protector.",
		drop(func(b *book) *[]*record.WearCheck { return &b.wearChecks }, func(c *record.WearCheck) bool { return c.WorkerID == "K0118" })},
	{"protector-choice", "gap", "K0138", "The core maker had one model to choose from.", lastIssue("K0138", func(i *record.ProtectorIssue) { i.ChoicesOffered = record.Num(1) })},
	{"protector-choice", "unproven", "K0139", "The record does not tell how many models were offered.",
		lastIssue("K0139", func(i *record.ProtectorIssue) { i.ChoicesOffered = record.Number{} })},
	{"protector-training", "gap", "K0140", "No session of the core maker ever covered protectors; so the content of the training falls short too.",
		onSessions("K0140", takeover, func(t *record.Training) { t.Topics = record.List{"noise_effects", "audiometry"} })},
	{"protector-fitting", "gap", "K0101", "The latest fit test was not passed.", failedFit("K0101")},
	{"protector-fitting", "unproven", "K0136", "Nobody is on record who fitted the protector.",
		both(lastIssue("K0136", func(i *record.ProtectorIssue) { i.FittedBy = "" }), withoutFitTests("K0136"))},
	{"attenuation-adequate", "gap", "K0106", "A plug rated 11 dB leaves 93 dBA at the grinder's ear.", lastIssue("K0106", func(i *record.ProtectorIssue) { i.ProtectorID = "P-9" })},
}

// withoutFitTests removes the fit tests of a worker, if there are any.
func withoutFitTests(worker string) func(*book) {
	return func(b *book) {
		b.fitTests = deleteIf(b.fitTests, func(t *record.FitTest) bool { return t.WorkerID == worker })
	}
}

// failedFit adds a fit test that was not passed, of the protector that the worker has now.
func failedFit(worker string) func(*book) {
	return func(b *book) {
		lastIssue(worker, func(i *record.ProtectorIssue) {
			b.put(&record.FitTest{WorkerID: worker, ProtectorID: i.ProtectorID, Date: min(i.Date+30, asOf), PARDB: record.Num(4),
				LeftPARDB: record.Num(12), RightPARDB: record.Num(3), Percent: record.Num(50), UncertaintyDB: record.Num(4), Passed: record.No})
		})(b)
	}
}

// onSessions changes the training sessions of a worker from a day on.
func onSessions(worker string, from Date, change func(*record.Training)) func(*book) {
	return set(func(b *book) []*record.Training { return b.trainings },
		func(t *record.Training) bool { return t.WorkerID == worker && t.Date >= from }, change)
}

// paperFaults are faults of training, information and records.
var paperFaults = []fault{
	{"annual-training", "gap", "K0128", "The moulder's last training was in 2024.", withoutSessions("K0128", "2025-01-01", "2027-01-01")},
	{"annual-training", "late", "K0127", "The moulder was not trained in 2023.", withoutSessions("K0127", "2023-01-01", "2024-01-01")},
	{"training-content", "gap", "K0129", "The sessions of the last two years left out hearing tests.",
		onSessions("K0129", day("2024-07-01"), func(t *record.Training) { t.Topics = record.List{"noise_effects", "protectors"} })},
	{"training-content", "unproven", "K0125", "The records of the last two years do not tell what the sessions covered.",
		onSessions("K0125", day("2024-07-01"), func(t *record.Training) { t.Topics = nil })},
	{"standard-posted", "gap", "kiln-hill", "No record shows that the standard is posted.",
		drop(func(b *book) *[]*record.Document { return &b.documents }, func(d *record.Document) bool { return d.Site == "kiln-hill" && d.Type == "standard_posted" })},
	{"noise-records-kept", "gap", "kiln-hill", "A moulder was told of a measurement of 2025 that is not in the records.",
		add(&record.Notice{WorkerID: "K0129", Date: day("2025-11-12"), About: "exposure", MeasurementID: "N-0999", Written: record.Yes})},
	{"audiogram-records-kept", "gap", "K0125", "A referral speaks of an audiogram that is not in the records.",
		add(&record.FollowUp{WorkerID: "K0125", AudiogramID: "A-09999", Ear: "right", Date: day("2022-03-21"), Type: "referral", By: audiologist})},
	{"log-retention", "gap", "kiln-hill", "The injury log of 2022, with a hearing loss in it, is not on file.",
		drop(func(b *book) *[]*record.Document { return &b.documents }, func(d *record.Document) bool {
			return d.Site == "kiln-hill" && d.Type == "injury_log" && d.Covers.Has("2022")
		})},
}

// withoutSessions removes the training sessions of a worker from one day up to another.
func withoutSessions(worker, from, to string) func(*book) {
	return drop(func(b *book) *[]*record.Training { return &b.trainings }, func(t *record.Training) bool {
		return t.WorkerID == worker && t.Date >= day(from) && t.Date < day(to)
	})
}
