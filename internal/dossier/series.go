package dossier

import (
	"slices"
	"strings"

	"hearduty/internal/record"
)

// Kinds lists the subject kinds.
var Kinds = []string{KindWorker, KindGroup, KindArea, KindSite, KindInstrument, KindRoom, KindTester}

// SeriesOf lists, by subject kind, the series of records by which an obligation may be fulfilled.
//
//	audiogram.valid      tests with a result, not invalidated; a retest in time is merged into its test
//	audiogram.baseline   the baseline audiogram
//	training.any         training sessions
//	training.protectors  sessions that covered protectors
//	protector.issue      protectors handed over; one still at hand when a stretch in the program begins counts from that day
//	protector.worn       checks that found protectors worn
//	measurement.any      noise measurements
//	test.offered         offers of a hearing test, and hearing tests made, also invalid ones; but no retests that stand in for a test
//	test.done            hearing tests made, with thresholds or with an outcome only
//	appointment.offered  offers of a health appointment, and appointments without one on record
//	appointment.attended health appointments that were attended
//	document.KIND        documents of the kind by date, and the days on which they were reviewed
//	calibration.*        checks of the kind; an exhaustive calibration is also an acoustic one
//	test.use             hearing tests made with the instrument, in the room, by the tester
//	survey.any           surveys of a test room
var SeriesOf = map[string][]string{
	KindWorker:     {"audiogram.valid", "audiogram.baseline", "training.any", "training.protectors", "protector.issue", "protector.worn", testOffered, testDone, appointmentOffered, appointmentAttended},
	KindGroup:      {"measurement.any"},
	KindArea:       {"measurement.any"},
	KindSite:       {},
	KindInstrument: {"calibration.acoustic", "calibration.exhaustive", "calibration.functional", "test.use"},
	KindRoom:       {"survey.any", "test.use"},
	KindTester:     {"test.use"},
}

// documentSeries is what the name of a series of documents begins with.
const documentSeries = "document."

// HasSeries says whether a subject kind has a series of records of that name. Groups, areas and sites have one for
// every kind of document.
func HasSeries(kind, name string) bool {
	if slices.Contains(SeriesOf[kind], name) {
		return true
	}
	document, ok := strings.CutPrefix(name, documentSeries)
	return ok && (kind == KindGroup || kind == KindArea || kind == KindSite) && slices.Contains(DocumentKinds(), document)
}

// DocumentKinds lists the kinds of documents that rules may name.
func DocumentKinds() []string {
	table, _ := record.TableOf("document")
	for _, f := range table.Fields {
		if f.Name == "kind" {
			return f.Like
		}
	}
	return nil
}

// Lasting are the series of which a record from before the time begins fulfils an obligation, too: a
// baseline once obtained stays.
var Lasting = []string{"audiogram.baseline"}

// File is a dossier as the judge takes it: the Rego input, the series by name, and where each record
// that it refers to was read.
type File struct {
	Kind   string
	ID     string
	Site   string
	Input  any               // *Worker, *Group, *Area, *Site, *Instrument, *Room or *Tester
	Series map[string][]Link // none after the as-of day
	Uses   []Tally           // days of use, oldest first: the series test.use with its counts
	Refs   Refs

	Observations []Observation // what somebody may want to look at; no verdicts
	Agreed       []Observation // what another bundle may observe of a shift stated by the source, but this one finds stated rightly
}
