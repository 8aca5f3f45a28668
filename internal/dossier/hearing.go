package dossier

import "hearduty/internal/record"

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
	ID                string        `json:"id" doc:"id of the audiogram"`
	Purpose           string        `json:"purpose" doc:"why it was made"`
	Enrolled          bool          `json:"enrolled" doc:"whether the worker was enrolled on that day"`
	InProgram         bool          `json:"in_program" doc:"whether it was made under the program: while enrolled, or as the baseline of a worker who was ever enrolled; and not found invalid"`
	Invalidated       bool          `json:"invalidated" doc:"whether a professional has found it invalid"`
	RetestOf          string        `json:"retest_of" doc:"reference of the test that this retest repeats in time"`
	ReplacedBy        string        `json:"replaced_by" doc:"reference of the retest in time that stands in for this test"`
	ToCompare         bool          `json:"to_compare" doc:"whether it is to be compared with the baseline: a later test, while enrolled, not invalidated and no exit test"`
	ComparedOn        Date          `json:"compared_on" doc:"day of the comparison with the baseline"`
	CannotCompare     []string      `json:"cannot_compare" doc:"thresholds that the comparison needs and the record lacks, such as left 3000 Hz"`
	NotTested         []string      `json:"not_tested" doc:"required thresholds that were not tested"`
	NotRecorded       []string      `json:"not_recorded" doc:"required thresholds on which the record says nothing"`
	Problem           string        `json:"problem" doc:"why a professional should look at it: a shift, or thresholds that no average can be made of; null if nothing stands out"`
	ReviewedOn        Date          `json:"reviewed_on" doc:"day of the professional review"`
	ReviewerIs        string        `json:"reviewer_is" doc:"profession of the reviewer; null if not known"`
	ReviewerKnown     bool          `json:"reviewer_named" doc:"whether a reviewer is named"`
	ReceivedOn        Date          `json:"received_on" doc:"day on which the employer received the result"`
	TesterIs          string        `json:"tester_is" doc:"profession of the examiner; null if not known"`
	QuietHours        record.Number `json:"quiet_hours" doc:"hours without workplace noise before the test"`
	QuietByProtectors record.Answer `json:"quiet_by_protectors" doc:"protectors were worn in place of the quiet period"`
	Determined        bool          `json:"determined" doc:"whether the comparison with the baseline is on record"`
	FollowUps         []Done        `json:"follow_ups" doc:"what was done or decided after it, oldest first; only where the bundle's measures ask for it"`
	Notices           []Told        `json:"notices" doc:"what the worker was told after it, oldest first; only where the bundle's measures ask for it"`
	RecordLacks       []string      `json:"record_lacks" doc:"contents of an audiometric record that this one lacks"`
	Mobile            record.Answer `json:"mobile" doc:"made in a mobile test van"`
	EarsWithResult    int           `json:"ears_with_result" doc:"number of ears with any result"`
	// Schemes has one entry for each of the other schemes of the bundle's measures.
	BaselineLeft  string            `json:"baseline_left" doc:"reference of the audiogram in force as the left ear's baseline when a later test was made; null for others"`
	BaselineRight string            `json:"baseline_right" doc:"the same of the right ear"`
	Schemes       map[string]Judged `json:"schemes" doc:"what the other schemes of the bundle say of the test"`
	Hearing       *Hearing          `json:"hearing" doc:"the audiometric figures of the comparison; null if the test is not to be compared, or figures are not shown"`
}

// Judged says what a scheme finds in the ears of one test.
type Judged struct {
	Left  record.Answer `json:"left" doc:"whether the left ear shows it, and where the scheme asks for a second test, whether the test before or after shows it too; null if the records cannot tell, or not yet"`
	Right record.Answer `json:"right" doc:"the same of the right ear"`
}

// Hearing holds audiometric figures. They are medical and are shown only on request.
type Hearing struct {
	Left           record.Number `json:"left_db" doc:"average change over the frequencies of the shift, left ear, dB"`
	Right          record.Number `json:"right_db" doc:"average change over the frequencies of the shift, right ear, dB"`
	LeftCorrected  record.Number `json:"left_corrected_db" doc:"average change after age correction, left ear, dB"`
	RightCorrected record.Number `json:"right_corrected_db" doc:"average change after age correction, right ear, dB"`
	LeftLevel      record.Number `json:"left_level_db" doc:"average hearing level without age correction, left ear, dB HL"`
	RightLevel     record.Number `json:"right_level_db" doc:"average hearing level without age correction, right ear, dB HL"`
	LeftAt         []int         `json:"left_shown_hz" doc:"frequencies at which the left ear shows it in this test, counted or not, Hz"`
	RightAt        []int         `json:"right_shown_hz" doc:"frequencies at which the right ear shows it in this test, counted or not, Hz"`
	Working        []string      `json:"working" doc:"the sums, with their numbers; empty unless figures are asked for"`
}

// Unconfirmed is a test that shows a shift which the law counts only once a second test shows it, too.
type Unconfirmed struct {
	Link
	ID          string  `json:"id" doc:"id of the audiogram that shows it"`
	Ears        string  `json:"ears" doc:"left, right or both"`
	RetestUntil Date    `json:"retest_until" doc:"last day for a retest"`
	Again       *Link   `json:"tested_again" doc:"the next test, which leaves it open for want of a threshold; null while there is none"`
	Hearing     Hearing `json:"hearing" doc:"the audiometric figures"`
}

// Shift is a test that shows a threshold shift.
type Shift struct {
	Link
	ID              string        `json:"id" doc:"id of the audiogram that shows it"`
	FirstTest       Link          `json:"first_test" doc:"the test itself, or the first test where a retest stands in for it"`
	Confirms        *Link         `json:"confirms" doc:"the earlier test whose shift this one confirms, where the law asks for a second test; null elsewhere"`
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
	Shift   Link    `json:"shift" doc:"the audiogram that first showed it"`
	Ears    string  `json:"ears" doc:"left, right or both"`
	Opinion *Link   `json:"opinion" doc:"a professional's judgement on persistence, or a decision to revise the baseline"`
	Hearing Hearing `json:"hearing" doc:"the audiometric figures"`
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
	Result     string   `json:"result" doc:"why the baseline was moved, such as persistent, improved or new_baseline; null if not recorded"`
	By         string   `json:"by" doc:"profession of who decided; null if not known"`
	ByRecorded bool     `json:"by_recorded" doc:"whether the record names who decided"`
	Hearing    Hearing  `json:"hearing" doc:"the audiometric figures"`
}

// Dangling is a record's reference to something that is not in the records.
type Dangling struct {
	Link
	ID string `json:"id" doc:"the id referred to"`
}
