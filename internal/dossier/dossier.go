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
	JobTitle  string        `json:"job_title" doc:"job classification"`
	Employed  []Spell       `json:"employed" doc:"stretches of employment at this site"`
	OnRoll    record.Answer `json:"on_roll" doc:"whether the employer's own roll has the worker in the program"`
	Exposures []Exposure    `json:"exposures" doc:"noise exposure, stretch by stretch"`
	// Exposed and ExposureUnknown have one entry for each level of the bundle's measures.
	Exposed         map[string][]Spell `json:"exposed" doc:"stretches at or above each exposure level of the bundle"`
	ExposureUnknown map[string][]Open  `json:"exposure_unknown" doc:"stretches in which it is not known whether the level is reached, with the reason"`
	Enrolled        []Enrolled         `json:"enrolled" doc:"stretches in which the worker belongs in the program"`
	Results         []Result           `json:"results" doc:"monitoring results that put the worker into the program"`

	Baseline    *Baseline   `json:"baseline" doc:"the first valid baseline audiogram"`
	Audiograms  []Audiogram `json:"audiograms" doc:"all hearing tests up to the as-of day, oldest first"`
	Shifts      []Shift     `json:"shifts" doc:"tests, while enrolled, that show a threshold shift; a retest in time stands in for the first test"`
	AfterShift  []Spell     `json:"after_shift" doc:"stretches, while enrolled, after a shift that has not lapsed"`
	Lapsed      []Lapsed    `json:"lapsed" doc:"later tests that no longer show an earlier shift"`
	Persistent  []Persisted `json:"persistent" doc:"shifts that the next test shows again"`
	Recordables []Recorded  `json:"recordables" doc:"tests that meet the numbers of the recording rule"`
	Revisions   []Revision  `json:"revisions" doc:"decisions to put a later test in the baseline's place"`
	MarkedLater []Link      `json:"marked_later" doc:"tests marked baseline after the first one, without a decision to revise"`
	Dangling    []Dangling  `json:"missing_audiograms" doc:"audiograms that other records refer to but that are not in the records"`

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
	Own        bool             `json:"own" doc:"whether it is the worker's own measurement"`
	Channels   map[string]Level `json:"channels" doc:"exposure on each channel of the bundle's measures"`
	Note       string           `json:"note" doc:"how the value was taken, or why there is none"`
}

// Level is an exposure on one channel; it may be known only as at least or at most a value.
type Level struct {
	DosePct record.Number `json:"dose_pct" doc:"noise dose, percent; null where not exactly known"`
	TWADBA  record.Number `json:"twa_dba" doc:"8-hour time-weighted average of that dose, dBA, to 0.1 dB"`
	AtLeast record.Number `json:"at_least_pct" doc:"the dose is at least this, percent"`
	AtMost  record.Number `json:"at_most_pct" doc:"the dose is at most this, percent"`
	Working string        `json:"working" doc:"the sum, with its numbers"`
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
	Ref    string        `json:"ref" doc:"the measurement"`
	ID     string        `json:"id" doc:"its id"`
	Date   Date          `json:"date" doc:"day of the measurement"`
	Since  Date          `json:"since" doc:"day from which it concerns the worker: the measurement, or the later start in the group"`
	Dose   record.Number `json:"dose_pct" doc:"dose, percent"`
	Notice *Link         `json:"notice" doc:"the worker was told of it"`
}

// Baseline is the first valid baseline audiogram.
type Baseline struct {
	Link
	ID                string        `json:"id" doc:"id of the audiogram"`
	Marked            bool          `json:"marked" doc:"whether the record is marked as baseline; else it is the first valid test"`
	Mobile            record.Answer `json:"mobile" doc:"made in a mobile test van"`
	QuietHours        record.Number `json:"quiet_hours" doc:"hours without workplace noise before the test"`
	QuietByProtectors record.Answer `json:"quiet_by_protectors" doc:"protectors were worn in place of the quiet period"`
	QuietNotice       *Link         `json:"quiet_notice" doc:"the worker was told before the test to avoid loud noise"`
	LateQuietNotice   *Link         `json:"late_quiet_notice" doc:"the worker was told only after the test"`
	InProgram         bool          `json:"in_program" doc:"whether the worker has been enrolled at any time"`
}

// Audiogram is one hearing test.
type Audiogram struct {
	Link
	ID             string        `json:"id" doc:"id of the audiogram"`
	Purpose        string        `json:"purpose" doc:"why it was made"`
	Enrolled       bool          `json:"enrolled" doc:"whether the worker was enrolled on that day"`
	InProgram      bool          `json:"in_program" doc:"whether it was made under the program: while enrolled, or as the baseline of a worker who was ever enrolled; and not found invalid"`
	Invalidated    bool          `json:"invalidated" doc:"whether a professional has found it invalid"`
	RetestOf       string        `json:"retest_of" doc:"reference of the test that this retest repeats in time"`
	ReplacedBy     string        `json:"replaced_by" doc:"reference of the retest in time that stands in for this test"`
	ToCompare      bool          `json:"to_compare" doc:"whether it is to be compared with the baseline: a later test, while enrolled, not invalidated and no exit test"`
	ComparedOn     Date          `json:"compared_on" doc:"day of the comparison with the baseline"`
	CannotCompare  []string      `json:"cannot_compare" doc:"thresholds that the comparison needs and the record lacks, such as left 3000 Hz"`
	NotTested      []string      `json:"not_tested" doc:"required thresholds that were not tested"`
	NotRecorded    []string      `json:"not_recorded" doc:"required thresholds on which the record says nothing"`
	Problem        string        `json:"problem" doc:"why a professional should look at it: a shift, or thresholds that no average can be made of; null if nothing stands out"`
	ReviewedOn     Date          `json:"reviewed_on" doc:"day of the professional review"`
	ReviewerIs     string        `json:"reviewer_is" doc:"profession of the reviewer; null if not known"`
	ReviewerKnown  bool          `json:"reviewer_named" doc:"whether a reviewer is named"`
	RecordLacks    []string      `json:"record_lacks" doc:"contents of an audiometric record that this one lacks"`
	Mobile         record.Answer `json:"mobile" doc:"made in a mobile test van"`
	EarsWithResult int           `json:"ears_with_result" doc:"number of ears with any result"`
}

// Hearing holds audiometric figures. They are medical and are shown only on request.
type Hearing struct {
	Left           record.Number `json:"left_db" doc:"average change, left ear, dB"`
	Right          record.Number `json:"right_db" doc:"average change, right ear, dB"`
	LeftCorrected  record.Number `json:"left_corrected_db" doc:"average change after age correction, left ear, dB"`
	RightCorrected record.Number `json:"right_corrected_db" doc:"average change after age correction, right ear, dB"`
	LeftLevel      record.Number `json:"left_level_db" doc:"average hearing level without age correction, left ear, dB HL"`
	RightLevel     record.Number `json:"right_level_db" doc:"average hearing level without age correction, right ear, dB HL"`
	Working        []string      `json:"working" doc:"the sums, with their numbers"`
}

// Shift is a test that shows a threshold shift.
type Shift struct {
	Link
	ID              string        `json:"id" doc:"id of the audiogram that shows it"`
	FirstTest       Link          `json:"first_test" doc:"the test itself, or the first test where a retest stands in for it"`
	Ears            string        `json:"ears" doc:"left, right or both"`
	AtLeast         bool          `json:"at_least" doc:"whether the shift is known only as at least the figure, for lack of a response"`
	AgeCorrected    bool          `json:"age_corrected" doc:"whether age correction was applied in deciding"`
	DeterminedOn    Date          `json:"determined_on" doc:"day on which the shift was determined"`
	Notice          *Link         `json:"notice" doc:"the worker was told in writing"`
	OralNotice      *Link         `json:"oral_notice" doc:"a notice on record that was not given in writing"`
	UnclearNotice   *Link         `json:"unclear_notice" doc:"a notice on record that does not say whether it was in writing"`
	HadProtector    bool          `json:"had_protector" doc:"whether a protector was at hand on the day of the test"`
	Fitting         *Link         `json:"fitting" doc:"fitting or refitting since the test"`
	Retraining      *Link         `json:"retraining" doc:"training in use and care of protectors since the test"`
	NotWorkRelated  *Link         `json:"not_work_related" doc:"a physician found that noise at work neither caused nor aggravated it"`
	OtherOpinion    *Link         `json:"other_opinion" doc:"the same finding by somebody who is not known to be a physician"`
	Decision        *Link         `json:"referral_decision" doc:"a professional decided whether to refer"`
	DecisionBy      string        `json:"referral_decision_by" doc:"profession of who decided; null if not known"`
	ReferralNeeded  record.Answer `json:"referral_needed" doc:"the decision"`
	Referral        *Link         `json:"referral" doc:"the referral"`
	Hearing         Hearing       `json:"hearing" doc:"the audiometric figures"`
	CurrentEnrolled bool          `json:"still_enrolled" doc:"whether the worker is enrolled on the as-of day"`
}

// Lapsed is a later test that no longer shows an earlier shift.
type Lapsed struct {
	Link
	ID         string        `json:"id" doc:"id of the later audiogram"`
	Shift      Link          `json:"shift" doc:"the audiogram that showed the shift"`
	Ears       string        `json:"ears" doc:"left, right or both"`
	BelowLimit record.Answer `json:"below_limit" doc:"whether exposure is within the limit level on the day of the later test"`
	Notice     *Link         `json:"notice" doc:"the worker was told"`
}

// Persisted is a shift that the next test shows again.
type Persisted struct {
	Link
	Shift   Link   `json:"shift" doc:"the audiogram that first showed it"`
	Ears    string `json:"ears" doc:"left, right or both"`
	Opinion *Link  `json:"opinion" doc:"a professional's judgement on persistence, or a decision to revise the baseline"`
}

// Recorded is a test that meets the numbers of the recording rule.
type Recorded struct {
	Link
	ID             string  `json:"id" doc:"id of the audiogram"`
	Ears           string  `json:"ears" doc:"left, right or both"`
	KnownOn        Date    `json:"known_on" doc:"day from which the entry is owed: the determination, or the confirming retest"`
	RetestUntil    Date    `json:"retest_until" doc:"last day for a retest, while none was made; null after a retest"`
	Retest         *Link   `json:"retest" doc:"the retest that confirmed it"`
	Entry          *Link   `json:"entry" doc:"the entry in the log"`
	Removal        *Link   `json:"removal" doc:"the entry was lined out"`
	WorkRelated    *Link   `json:"work_related" doc:"a professional found it work-related"`
	NotWorkRelated *Link   `json:"not_work_related" doc:"a physician or other licensed professional found it not work-related"`
	OtherOpinion   *Link   `json:"other_opinion" doc:"the same finding by somebody whose licence is not known"`
	Since          string  `json:"compared_with" doc:"reference of the audiogram that it is compared with"`
	Hearing        Hearing `json:"hearing" doc:"the audiometric figures"`
}

// Revision is a decision to put a later test in the baseline's place.
type Revision struct {
	Link
	Audiogram  string   `json:"audiogram" doc:"reference of the new baseline; null if the records lack it"`
	Ears       []string `json:"ears" doc:"ears whose baseline was moved"`
	Unfounded  []string `json:"unfounded" doc:"ears moved that show neither a shift nor an improvement"`
	Undecided  []string `json:"undecided" doc:"ears moved whose thresholds allow no comparison"`
	By         string   `json:"by" doc:"profession of who decided; null if not known"`
	ByRecorded bool     `json:"by_recorded" doc:"whether the record names who decided"`
	Hearing    Hearing  `json:"hearing" doc:"the audiometric figures"`
}

// Dangling is a record's reference to something that is not in the records.
type Dangling struct {
	Link
	ID string `json:"id" doc:"the id referred to"`
}

// Protection is the hearing protector at hand and what it leaves of the noise.
type Protection struct {
	Link
	Protector      string        `json:"protector" doc:"id of the protector model"`
	Count          int           `json:"count" doc:"number of protectors at hand"`
	ChoicesOffered record.Number `json:"choices_offered" doc:"number of suitable models to choose from"`
	Fitted         *Link         `json:"fitted" doc:"initial fitting: recorded with the issue, as a follow-up, or by a fit test that was passed"`
	FitFailed      *Link         `json:"fit_failed" doc:"the latest fit test of this model, if it was not passed"`
	Required       record.Answer `json:"required" doc:"whether the employer requires it to be worn"`
	Exposure       record.Number `json:"exposure_dba" doc:"exposure without the protector, dBA or, with C-weighting, dBC"`
	Under          record.Number `json:"under_db" doc:"estimated A-weighted 8-hour average under the protector, dBA"`
	Halved         record.Number `json:"halved_db" doc:"the same with half the attenuation, for information, dBA"`
	PAR            record.Number `json:"par_db" doc:"personal attenuation rating of the latest fit test of this model, dB"`
	Method         string        `json:"method" doc:"method of estimation"`
	Missing        []string      `json:"missing" doc:"what the estimate lacks"`
	Working        string        `json:"working" doc:"the sum, with its numbers"`
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
}
