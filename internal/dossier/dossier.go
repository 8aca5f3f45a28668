// Package dossier gathers all that is known of one subject and derives from it the facts that the law
// asks about: what a worker is exposed to and since when, which test is the baseline, where hearing has
// shifted. A dossier holds facts, never verdicts: limits and deadlines come from the bundle.
//
// Every dossier is the Rego input of the duties of its subject kind. A fact that is not known is null in
// the input, never left out, so that a rule cannot overlook it. The JSON Schemas of the dossiers are
// generated from these types and the rules are checked against them.
package dossier

import (
	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// Date is short for calendar.Date.
type Date = calendar.Date

// Subject kinds.
const (
	KindWorker     = "worker"
	KindGroup      = "group"
	KindArea       = "area"
	KindSite       = "site"
	KindInstrument = "instrument"
	KindRoom       = "room"
	KindTester     = "tester"
)

// Link points to a record: the day on which it counts, and the reference under which findings cite it.
type Link struct {
	Date Date   `json:"date" doc:"day on which the record counts"`
	Ref  string `json:"ref" doc:"reference of the record"`
}

// Spell is a stretch of days from From up to, but without, To; an open stretch has no To.
type Spell struct {
	From    Date `json:"from" doc:"first day"`
	To      Date `json:"to" doc:"day after the last day; null while open"`
	Current bool `json:"current" doc:"whether the as-of day lies in it"`
}

// Absence is a stretch of days between two employments at the site.
type Absence struct {
	From   Date          `json:"from" doc:"first day away"`
	To     Date          `json:"to" doc:"first day back"`
	Months record.Number `json:"months" doc:"its length in months: whole months, and each further day as 1/31 of one"`
}

// Place is the site at which the subject is judged.
type Place struct {
	ID      string `json:"id" doc:"id of the site"`
	Country string `json:"country" doc:"country code"`
	Region  string `json:"region" doc:"state, province or region"`
}

// Common is what every dossier holds.
type Common struct {
	ID      string         `json:"id" doc:"id of the subject"`
	Site    Place          `json:"site" doc:"the site"`
	AsOf    Date           `json:"as_of" doc:"the day on which the program is judged"`
	Choices map[string]any `json:"choices" doc:"what the employer has elected at this site, with the bundle's defaults"`
}

// Worker is the dossier of one worker at one site.
type Worker struct {
	Common
	JobTitle        string        `json:"job_title" doc:"job classification"`
	Employed        []Spell       `json:"employed" doc:"stretches of employment at this site"`
	Absences        []Absence     `json:"absences" doc:"stretches between two employments at this site, oldest first"`
	Departures      []Departure   `json:"departures" doc:"ends of employment at this site"`
	OnRoll          record.Answer `json:"on_roll" doc:"whether the employer's own roll has the worker in the program"`
	Exposures       []Exposure    `json:"exposures" doc:"noise exposure, stretch by stretch"`
	ExposureWorking []string      `json:"exposure_working" doc:"how the exposure on the channel that enrols came about, stretch by stretch: the days, what decides, and the sums with their numbers"`
	// Exposed and ExposureUnknown have one entry for each level of the bundle's measures.
	Exposed         map[string][]Spell `json:"exposed" doc:"stretches at or above each exposure level of the bundle"`
	ExposureUnknown map[string][]Open  `json:"exposure_unknown" doc:"stretches in which it is not known whether the level is reached, with the reason"`
	Enrolled        []Enrolled         `json:"enrolled" doc:"stretches in which the worker belongs in the program"`
	Results         []Result           `json:"results" doc:"monitoring results that put the worker into the program"`

	Baseline    *Baseline     `json:"baseline" doc:"the first valid baseline audiogram"`
	Audiograms  []Audiogram   `json:"audiograms" doc:"all hearing tests up to the as-of day, oldest first"`
	Shifts      []Shift       `json:"shifts" doc:"tests, while enrolled, that show a threshold shift; a retest in time stands in for the first test"`
	Unconfirmed []Unconfirmed `json:"unconfirmed" doc:"tests, while enrolled, that show a shift which no second test has confirmed or refuted yet, for a law that asks for one"`
	AfterShift  []Spell       `json:"after_shift" doc:"stretches, while enrolled, after a shift that has not lapsed"`
	Lapsed      []Lapsed      `json:"lapsed" doc:"later tests that no longer show an earlier shift"`
	Persistent  []Persisted   `json:"persistent" doc:"shifts that the next test shows again"`
	Recordables []Recorded    `json:"recordables" doc:"tests that meet the numbers of the recording rule"`
	Revisions   []Revision    `json:"revisions" doc:"decisions to put a later test in the baseline's place"`
	MarkedLater []Link        `json:"marked_later" doc:"tests marked baseline after the first one, without a decision to revise"`
	Dangling    []Dangling    `json:"missing_audiograms" doc:"audiograms that other records refer to but that are not in the records"`

	Examinations []Examination `json:"examinations" doc:"offers of hearing tests and health appointments and what came of them, oldest first"`
	Told         []Told        `json:"told_of_exposure" doc:"notices of exposure and of corrective action, oldest first"`

	Protection *Protection `json:"protection" doc:"the hearing protector at hand on the as-of day"`
	Wear       *Wear       `json:"wear" doc:"the latest check of whether protectors are worn"`

	Training          *Training `json:"training" doc:"the latest training session"`
	ProtectorTraining *Link     `json:"protector_training" doc:"the latest session that covered protectors"`
}

// Exposure is a stretch of days with one known or unknown exposure.
type Exposure struct {
	From       Date             `json:"from" doc:"first day"`
	To         Date             `json:"to" doc:"day after the last day; null while open"`
	Group      string           `json:"group" doc:"the worker's group"`
	Ref        string           `json:"ref" doc:"measurement that decides"`
	MeasuredOn Date             `json:"measured_on" doc:"day of that measurement"`
	Others     []string         `json:"other_refs" doc:"further samples or tasks that the value rests on, where it rests on several"`
	Own        bool             `json:"own" doc:"whether it is the worker's own measurement"`
	Channels   map[string]Level `json:"channels" doc:"exposure on each channel of the bundle's measures"`
	Note       string           `json:"note" doc:"how the value was taken, or why there is none"`
}

// Level is an exposure on one channel, a dose or a level; it may be known only as at least or at most a value.
type Level struct {
	DosePct  record.Number `json:"dose_pct" doc:"noise dose, percent; null where not exactly known, and on a channel of levels"`
	TWADBA   record.Number `json:"twa_dba" doc:"8-hour time-weighted average of that dose, dBA, to 0.1 dB"`
	LevelDBA record.Number `json:"level_dba" doc:"noise exposure level of the day, L_EX,8h, or on a weekly channel of the week, L_EX,w, dBA, not rounded; null where known only within bounds that are not those of its uncertainty, and on a channel of doses"`
	UDB      record.Number `json:"u_db" doc:"expanded uncertainty U of that level, one-sided 95 %, dB; null where it has none on record"`
	AtLeast  record.Number `json:"at_least" doc:"what is compared with the law is at least this: percent of dose, or dBA on a channel of levels"`
	AtMost   record.Number `json:"at_most" doc:"what is compared with the law is at most this: percent of dose, or dBA on a channel of levels"`
	Working  []string      `json:"working" doc:"the sums, with their numbers, one a line"`
}

// Open is a stretch of days in which something is not known.
type Open struct {
	From   Date   `json:"from" doc:"first day"`
	To     Date   `json:"to" doc:"day after the last day; null while open"`
	Reason string `json:"reason" doc:"why it is not known"`
}

// Enrolled is a stretch in which the worker is exposed at or above the level that enrols.
type Enrolled struct {
	Spell
	Baseline *Link         `json:"baseline" doc:"the baseline audiogram, if there is one by the end of the stretch"`
	Mobile   record.Answer `json:"baseline_mobile" doc:"whether the baseline was made in a mobile test van"`
	Tested   *Spell        `json:"tested" doc:"the part of the stretch after the baseline"`
	Issue    *Link         `json:"protector" doc:"the first protector at hand in the stretch"`
}

// Result is a monitoring result that puts the worker into the program.
type Result struct {
	Ref      string        `json:"ref" doc:"the measurement"`
	ID       string        `json:"id" doc:"its id"`
	Date     Date          `json:"date" doc:"day of the measurement"`
	Since    Date          `json:"since" doc:"day from which it concerns the worker: the measurement, or the later start in the group"`
	Dose     record.Number `json:"dose_pct" doc:"dose, percent"`
	LevelDBA record.Number `json:"level_dba" doc:"level, dBA, where the channel is one of levels"`
	Notice   *Link         `json:"notice" doc:"the worker was told of it"`
	Written  record.Answer `json:"written" doc:"whether that notice was given in writing"`
	Levels   []string      `json:"levels" doc:"names of the exposure levels of the bundle that it reaches"`
	Before   *Link         `json:"told_before" doc:"a written notice of an earlier result at the same levels that spares another one on the day since which it concerns the worker; null where the bundle knows no such rule"`
}

// Protection is the hearing protector at hand and what it leaves of the noise.
type Protection struct {
	Link
	Protector      string        `json:"protector" doc:"id of the protector model"`
	Count          int           `json:"count" doc:"number of protectors at hand"`
	ChoicesOffered record.Number `json:"choices_offered" doc:"number of suitable models to choose from"`
	Fitted         *Link         `json:"fitted" doc:"initial fitting: recorded with the issue, as a follow-up, or by a fit test that was passed"`
	FitTest        *Link         `json:"fit_test" doc:"the latest fit test of this model since it was handed over"`
	FitFailed      *Link         `json:"fit_failed" doc:"the latest fit test of this model, if it was not passed"`
	Types          []string      `json:"types" doc:"types of all protectors at hand, such as formable and earmuff; null for a model without type"`
	PlugsOffered   record.Number `json:"plugs_offered" doc:"number of types of earplug to choose from"`
	MuffsOffered   record.Number `json:"muffs_offered" doc:"number of types of earmuff to choose from"`
	Class          string        `json:"class" doc:"class or grade of the label"`
	Certificate    string        `json:"certificate" doc:"number of the certificate of approval"`
	CertifiedTo    Date          `json:"certified_to" doc:"last day of validity of that certificate; null where it is not limited or not recorded"`
	UnderPAR       record.Number `json:"under_par_db" doc:"8-hour level less the personal attenuation rating of the latest fit test, dBA"`
	Peak           record.Number `json:"peak_dbc" doc:"C-weighted peak without the protector, dB"`
	PeakUnder      record.Number `json:"peak_under_dbc" doc:"highest estimate of that peak under the protector over the kinds of impulse (EN 458, from memory), dB"`
	Required       record.Answer `json:"required" doc:"whether the employer requires it to be worn"`
	Rating         string        `json:"rating" enum:"nrr|snr|hml|octave|slc80" doc:"rating that the estimate uses"`
	Exposure       record.Number `json:"exposure_dba" doc:"exposure without the protector, dBA or, where the method says so, dBC"`
	Under          record.Number `json:"under_db" doc:"estimated A-weighted 8-hour average under the protector, dBA, to 0.1 dB"`
	Halved         record.Number `json:"halved_db" doc:"the same with half the attenuation of the noise reduction rating, for information, dBA"`
	PAR            record.Number `json:"par_db" doc:"personal attenuation rating of the latest fit test of this model, dB"`
	Band           string        `json:"band" enum:"too little|enough, but little|good|enough, but much|too much" doc:"how the level under the protector fits the action level of the measures; null where they name none"`
	Method         string        `json:"method" doc:"method of estimation"`
	Missing        []string      `json:"missing" doc:"what the estimate lacks"`
	Working        string        `json:"working" doc:"the sum, with its numbers"`
	Mark           string        `json:"mark" enum:"from memory|secondary source" doc:"how the formula was seen; null where it was read in the law"`
	Information    []Estimate    `json:"information" doc:"estimates by other methods, which decide nothing; given where the law may ask how much the protector leaves"`
}

// Estimate is a figure beside the one that decides.
type Estimate struct {
	Method  string        `json:"method" doc:"what is estimated, and how"`
	Level   record.Number `json:"level_db" doc:"level under the protector, dBA, or of a peak dBC; null where the method gives no level"`
	Working string        `json:"working" doc:"the sum, with its numbers"`
	Mark    string        `json:"mark" enum:"from memory|secondary source" doc:"how the formula was seen; null where it was read in an official text"`
}

// Wear is a check of whether protectors are worn.
type Wear struct {
	Link
	Worn record.Answer `json:"worn" doc:"whether the worker wore protectors"`
	Own  bool          `json:"own" doc:"whether this worker was looked at, or all in the area"`
}

// Training is the latest training session.
type Training struct {
	Link
	Topics []string `json:"topics" doc:"topics of that session and of the sessions in the year before it"`
	Silent bool     `json:"topics_unrecorded" doc:"whether none of these sessions names its topics"`

	Certified record.Answer `json:"certified" doc:"whether the employer certified date and type of the latest session"`
}
