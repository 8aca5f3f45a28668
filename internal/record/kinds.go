package record

import "hearduty/internal/audiometry"

// Threshold is one hearing threshold level.
type Threshold = audiometry.Threshold

// The field tag reads: name, then any of
//
//	required   an empty field rejects the row
//	id         an identifier of this record, unique within its kind
//	min=, max= the range of a number, inclusive
//	one=a|b|c  the only words allowed
//	like=a|b|c words of this program's vocabulary; others are kept as they are
//
// The doc tag is the field's description in the JSON Schema, with its unit.

// Worker is one stretch of employment of one person at one site. A person who was hired again has one
// record a stretch, under the same id.
type Worker struct {
	Meta
	WorkerID  string `field:"worker_id,required" doc:"the employer's id of the worker, as text"`
	Site      string `field:"site,required" doc:"id of the site in the program file"`
	Sex       string `field:"sex,one=female|male|unspecified" doc:"sex as the age correction tables use it"`
	BirthDate Date   `field:"birth_date" doc:"date of birth"`
	HiredOn   Date   `field:"hired_on,required" doc:"first day of this stretch of employment"`
	LeftOn    Date   `field:"left_on" doc:"last day of this stretch of employment; empty while employed"`
	JobTitle  string `field:"job_title" doc:"job classification"`
	InProgram Answer `field:"in_program" doc:"whether the employer's own roll has the worker in the hearing-conservation program"`
}

// Assignment puts a worker into a similar-exposure group for a stretch of days.
type Assignment struct {
	Meta
	WorkerID string `field:"worker_id,required" doc:"id of the worker"`
	Group    string `field:"group,required" doc:"id of the similar-exposure group"`
	From     Date   `field:"from,required" doc:"first day in the group"`
	To       Date   `field:"to" doc:"last day in the group; empty while in it"`
}

// Group is a similar-exposure group: workers whose noise exposure is taken to be alike.
type Group struct {
	Meta
	Group          string `field:"group,required,id" doc:"id of the group"`
	Site           string `field:"site,required" doc:"id of the site in the program file"`
	Area           string `field:"area" doc:"id of the area where the group works"`
	Description    string `field:"description" doc:"what the group does"`
	SuspectedNoisy Answer `field:"suspected_noisy" doc:"whether information suggests that exposure may reach the action level"`
	Varied         Answer `field:"varied" doc:"whether the workers move about, levels vary much or impulses matter, so that area sampling is generally unsuitable"`
	ShiftMinutes   Number `field:"shift_minutes,min=1,max=1440" doc:"length of the work shift, minutes"`
	DaysPerWeek    Number `field:"days_per_week,min=0,max=7" doc:"days worked in a week"`
	Impulsive      Answer `field:"impulsive" doc:"whether impulse or impact noise occurs, so that the peak must be known"`
	DaysVary       Answer `field:"days_vary" doc:"whether the daily exposure varies markedly from one working day to the next"`
}

// Measurement is one noise measurement, or one dose channel of it. Channels of one measurement share
// the measurement_id.
type Measurement struct {
	Meta
	MeasurementID    string   `field:"measurement_id,required" doc:"id of the measurement; rows of several dose channels share it"`
	Date             Date     `field:"date,required" doc:"day of the measurement"`
	Group            string   `field:"group" doc:"group that the measurement stands for"`
	WorkerID         string   `field:"worker_id" doc:"worker who wore the instrument"`
	Area             string   `field:"area" doc:"area that was measured"`
	Type             string   `field:"kind,required,one=personal|area|task" doc:"personal sampling, area sampling, or the level of a task"`
	InstrumentID     string   `field:"instrument_id" doc:"instrument used"`
	RunMinutes       Number   `field:"run_minutes,min=0,max=1440" doc:"time sampled, minutes"`
	ShiftMinutes     Number   `field:"shift_minutes,min=1,max=1440" doc:"length of the shift sampled, minutes"`
	FullShift        Answer   `field:"full_shift" doc:"whether the sample stands for the full shift"`
	Representative   Answer   `field:"representative" doc:"whether a sample shorter than the shift is like all of it, so that it may be projected to the length of the shift"`
	Method           string   `field:"method,one=slow|fast|integrating" doc:"time weighting or integrating instrument"`
	CriterionDB      Number   `field:"criterion_db,min=60,max=120" doc:"criterion level of the dose, dBA for 8 h"`
	ExchangeDB       Number   `field:"exchange_db,min=1,max=6" doc:"exchange rate of the dose, dB"`
	ThresholdDB      Number   `field:"threshold_db,min=0,max=110" doc:"integration threshold of the dose, dBA"`
	UpperDB          Number   `field:"upper_db,min=100,max=160" doc:"upper end of the integrated range, dBA"`
	DosePct          Number   `field:"dose_pct,min=0,max=100000" doc:"noise dose as measured, percent"`
	TWADBA           Number   `field:"twa_dba,min=0,max=140" doc:"8-hour time-weighted average shown by the instrument with the settings of this row, dBA"`
	LAeqDBA          Number   `field:"laeq_dba,min=0,max=150" doc:"A-weighted equivalent continuous level over the run time, dB"`
	LCeqDBC          Number   `field:"lceq_dbc,min=0,max=160" doc:"C-weighted equivalent continuous level over the run time, dB"`
	TWADBC           Number   `field:"twa_dbc,min=0,max=150" doc:"8-hour time-weighted average measured with C-weighting, dBC"`
	MaxDBA           Number   `field:"max_dba,min=0,max=160" doc:"highest continuous level, A-weighted, slow, dB"`
	PeakDB           Number   `field:"peak_db,min=0,max=190" doc:"peak sound pressure level, dB"`
	PeakWeighting    string   `field:"peak_weighting,one=C|Z" doc:"weighting of the peak level: C, or Z for unweighted"`
	MaxDBCFast       Number   `field:"max_dbc_fast,min=0,max=180" doc:"highest level of impact noise, C-weighted, fast, dB"`
	ImpulseDBZ       Number   `field:"impulse_dbz,min=0,max=190" doc:"highest level of impact noise by an impulse detector, unweighted, dB"`
	AccuracyClass    string   `field:"accuracy_class,one=1|2|3" doc:"accuracy class of the determination, where the law counts in such classes"`
	Octave           *Octaves `field:"octave,min=-20,max=170" doc:"octave band level, dB"`
	CheckBeforeDB    Number   `field:"check_before_db,min=60,max=130" doc:"calibrator check before the measurement, dB"`
	CheckAfterDB     Number   `field:"check_after_db,min=60,max=130" doc:"calibrator check after the measurement, dB"`
	ObserversInvited Answer   `field:"observers_invited" doc:"whether affected workers or their representatives could observe"`
}

// Task is a part of a group's working day with its duration and levels.
type Task struct {
	Meta
	Group       string `field:"group,required" doc:"group that does the task"`
	Task        string `field:"task,required" doc:"name of the task"`
	Date        Date   `field:"date" doc:"day from which this description of the task holds"`
	Minutes     Number `field:"minutes,required,min=0,max=1440" doc:"duration of the task in a shift, minutes"`
	MinutesLow  Number `field:"minutes_low,min=0,max=1440" doc:"shortest duration, minutes"`
	MinutesHigh Number `field:"minutes_high,min=0,max=1440" doc:"longest duration, minutes"`
	Samples     List   `field:"samples" doc:"ids of the task's measurements, or levels in dBA"`
}

// Change is a change of production, process, equipment, controls or personnel.
type Change struct {
	Meta
	ChangeID       string `field:"change_id,required,id" doc:"id of the change"`
	Date           Date   `field:"date,required" doc:"day of the change"`
	Group          string `field:"group" doc:"group concerned"`
	Area           string `field:"area" doc:"area concerned"`
	What           string `field:"what" doc:"what was changed"`
	RaisesExposure string `field:"raises_exposure,one=yes|no|unknown" doc:"whether the change raises noise exposure"`
	IdentifiedOn   Date   `field:"identified_on" doc:"day on which the change was entered in the register as one that may raise exposure"`
}

// Notice is something that a worker was told.
type Notice struct {
	Meta
	WorkerID      string `field:"worker_id,required" doc:"id of the worker"`
	Date          Date   `field:"date,required" doc:"day on which the worker was told"`
	About         string `field:"about,required,like=exposure|shift|quiet_period|persistent_shift_lifted|result|abnormal_result|corrective_action" doc:"what the worker was told about"`
	MeasurementID string `field:"measurement_id" doc:"measurement that the notice is about"`
	AudiogramID   string `field:"audiogram_id" doc:"audiogram that the notice is about"`
	Written       Answer `field:"written" doc:"whether it was given in writing"`
}

// Audiogram is one pure-tone air-conduction hearing test of both ears.
type Audiogram struct {
	Meta
	AudiogramID       string         `field:"audiogram_id,required,id" doc:"id of the audiogram"`
	WorkerID          string         `field:"worker_id,required" doc:"id of the worker"`
	Date              Date           `field:"date,required" doc:"day of the test"`
	Purpose           string         `field:"purpose,one=baseline|periodic|retest|exit|other" doc:"why the test was made"`
	Left              audiometry.Ear `field:"left" doc:"left ear's hearing threshold level, dB HL; NR>100 for no response up to 100 dB, NT for not tested"`
	LeftRepeat        Threshold      `field:"left.repeat_1000" doc:"left ear's hearing threshold level at 1000 Hz when it was repeated in the same test, dB HL"`
	LeftStatedShift   Answer         `field:"left.stated_shift" doc:"whether the source itself calls the left ear's result a standard threshold shift; never used for a verdict"`
	Right             audiometry.Ear `field:"right" doc:"right ear's hearing threshold level, dB HL; NR>100 for no response up to 100 dB, NT for not tested"`
	RightRepeat       Threshold      `field:"right.repeat_1000" doc:"right ear's hearing threshold level at 1000 Hz when it was repeated in the same test, dB HL"`
	RightStatedShift  Answer         `field:"right.stated_shift" doc:"whether the source itself calls the right ear's result a standard threshold shift; never used for a verdict"`
	Masked            Answer         `field:"masked" doc:"whether the other ear was masked where it might have heard the tone"`
	Earphones         string         `field:"earphones,one=supra_aural|circumaural|insert" doc:"earphones used"`
	FineSteps         Answer         `field:"fine_steps" doc:"whether the audiometer works in steps finer than 5 dB, as self-recording ones do"`
	AudiometerID      string         `field:"audiometer_id" doc:"audiometer used"`
	RoomID            string         `field:"room_id" doc:"test room used"`
	TesterID          string         `field:"tester_id" doc:"person who made the test"`
	QuietHours        Number         `field:"quiet_hours,min=0,max=10000" doc:"hours without workplace noise before the test"`
	QuietByProtectors Answer         `field:"quiet_by_protectors" doc:"whether hearing protectors were worn in place of the quiet period"`
	Mobile            Answer         `field:"mobile" doc:"whether the test was made in a mobile test van"`
	DeterminedOn      Date           `field:"determined_on" doc:"day on which the comparison with the baseline was made"`
	ReceivedOn        Date           `field:"received_on" doc:"day on which the employer received the result and its interpretation"`
	Reviewer          string         `field:"reviewer" doc:"id, or qualification, of the professional who reviewed the audiogram"`
	ReviewedOn        Date           `field:"reviewed_on" doc:"day of the review"`
}

// FollowUp is something done or decided after an audiogram.
type FollowUp struct {
	Meta
	WorkerID    string `field:"worker_id,required" doc:"id of the worker"`
	AudiogramID string `field:"audiogram_id" doc:"audiogram that it follows from"`
	Ear         string `field:"ear,one=left|right|both" doc:"ear concerned"`
	Date        Date   `field:"date,required" doc:"day on which it was done or decided"`
	Type        string `field:"kind,required,like=fitting|refitting|retraining|referral|referral_decision|medical_opinion|persistence_opinion|baseline_revision|invalidated|log_entry|log_removal|authority_report|protector_choice|controls_reviewed|assessment_reviewed|measures_reviewed|alternative_work|group_reviewed|worker_informed|history_forwarded|damage_found|damage_examined|damage_opinion|protector_unsuitable|evaluation_results" doc:"what was done or decided"`
	Result      string `field:"result,like=work_related|not_work_related|persistent|not_persistent|improved|referral_needed|no_referral_needed|new_baseline|retest_possible|retest_not_possible|measures_insufficient" doc:"the outcome"`
	By          string `field:"by" doc:"id, or qualification, of the person who did or decided it"`
}

// Training is one session of training of one worker.
type Training struct {
	Meta
	WorkerID string `field:"worker_id,required" doc:"id of the worker"`
	Date     Date   `field:"date,required" doc:"day of the session"`
	Topics   List   `field:"topics,like=noise_effects|protectors|audiometry|limit_values|assessment_results|damage_reporting|health_surveillance|safe_practices|measures|collective_results|law_in_general|noise_controls|medical_advice|program_roles|non_work_noise" doc:"topics covered, separated by semicolons"`
	Language string `field:"language" doc:"language of the session"`
	By       string `field:"by" doc:"id of the trainer"`

	Certified Answer `field:"certified" doc:"whether the employer certified date and type of the session in writing"`
}

// Protector is a model of hearing protector with its label and laboratory values.
type Protector struct {
	Meta
	ProtectorID string   `field:"protector_id,required,id" doc:"id of the protector model"`
	Model       string   `field:"model" doc:"model name"`
	Type        string   `field:"type,one=formable|premolded|custom|earmuff|helmet_muff|dual" doc:"type of protector"`
	NRR         Number   `field:"nrr,min=0,max=50" doc:"noise reduction rating of the label, dB"`
	SNR         Number   `field:"snr,min=0,max=50" doc:"single number rating, dB"`
	H           Number   `field:"h,min=0,max=50" doc:"high-frequency attenuation value, dB"`
	M           Number   `field:"m,min=0,max=50" doc:"medium-frequency attenuation value, dB"`
	L           Number   `field:"l,min=0,max=50" doc:"low-frequency attenuation value, dB"`
	SLC80       Number   `field:"slc80,min=0,max=50" doc:"sound level conversion for 80 % of wearers, dB"`
	Class       string   `field:"class" doc:"class or grade of the label"`
	Certificate string   `field:"certificate" doc:"number of the certificate of approval, where the law asks for one, such as the CA of Brazil"`
	CertifiedTo Date     `field:"certified_to" doc:"last day of validity of that certificate; empty where it is not limited"`
	Mean        *Octaves `field:"mean,min=-10,max=80" doc:"mean attenuation in the octave band, dB"`
	SD          *Octaves `field:"sd,min=0,max=30" doc:"standard deviation of the attenuation in the octave band, dB"`
}

// ProtectorIssue is one handing-over of a protector to a worker.
type ProtectorIssue struct {
	Meta
	WorkerID       string `field:"worker_id,required" doc:"id of the worker"`
	ProtectorID    string `field:"protector_id,required" doc:"protector model handed over"`
	Date           Date   `field:"date,required" doc:"day on which it was handed over"`
	ReturnedOn     Date   `field:"returned_on" doc:"day on which it was given back or used up"`
	ChoicesOffered Number `field:"choices_offered,min=0,max=1000" doc:"number of suitable models to choose from"`
	PlugsOffered   Number `field:"plugs_offered,min=0,max=1000" doc:"number of types of earplug to choose from"`
	MuffsOffered   Number `field:"muffs_offered,min=0,max=1000" doc:"number of types of earmuff to choose from"`
	FittedBy       string `field:"fitted_by" doc:"id of the person who made the initial fitting"`
	Required       Answer `field:"required" doc:"whether the employer requires it to be worn"`
}

// FitTest is one measured attenuation of a protector on a worker.
type FitTest struct {
	Meta
	WorkerID      string `field:"worker_id,required" doc:"id of the worker"`
	ProtectorID   string `field:"protector_id,required" doc:"protector model tested"`
	Date          Date   `field:"date,required" doc:"day of the fit test"`
	PARDB         Number `field:"par_db,min=-10,max=60" doc:"personal attenuation rating of both ears together, dB"`
	LeftPARDB     Number `field:"left.par_db,min=-10,max=60" doc:"left ear's personal attenuation rating, dB"`
	RightPARDB    Number `field:"right.par_db,min=-10,max=60" doc:"right ear's personal attenuation rating, dB"`
	Percent       Number `field:"percent,min=0,max=100" doc:"percentage of fittings that reach the rating"`
	UncertaintyDB Number `field:"uncertainty_db,min=0,max=30" doc:"standard uncertainty of the rating, dB"`
	Passed        Answer `field:"passed" doc:"whether the fit was found good enough"`
}

// WearCheck is one look at whether protectors are worn.
type WearCheck struct {
	Meta
	WorkerID string `field:"worker_id" doc:"worker looked at"`
	Area     string `field:"area" doc:"area looked at"`
	Date     Date   `field:"date,required" doc:"day of the check"`
	Worn     Answer `field:"worn" doc:"whether the worker wore protectors"`
	Observed Number `field:"observed,min=0,max=100000" doc:"number of workers looked at in the area"`
	Wearing  Number `field:"wearing,min=0,max=100000" doc:"number of them wearing protectors"`
}

// Instrument is a sound level meter, dosimeter, calibrator or audiometer.
type Instrument struct {
	Meta
	InstrumentID  string `field:"instrument_id,required,id" doc:"id of the instrument"`
	Type          string `field:"kind,required,one=sound_level_meter|dosimeter|calibrator|audiometer" doc:"what it is"`
	Site          string `field:"site" doc:"site that holds it; empty where it is shared"`
	Serial        string `field:"serial" doc:"serial number"`
	Class         string `field:"class" doc:"accuracy class or type"`
	Standard      string `field:"standard" doc:"standard that it meets"`
	InServiceFrom Date   `field:"in_service_from" doc:"first day in service"`
	InServiceTo   Date   `field:"in_service_to" doc:"last day in service; empty while in service"`
}

// Calibration is one check or calibration of an instrument.
type Calibration struct {
	Meta
	InstrumentID string     `field:"instrument_id,required" doc:"instrument checked"`
	Date         Date       `field:"date,required" doc:"day of the check"`
	Type         string     `field:"kind,required,one=field|functional|acoustic|exhaustive|laboratory" doc:"field check with a calibrator, daily functional check, acoustic check, exhaustive or laboratory calibration"`
	Deviation    *Deviation `field:"deviation,min=-90,max=90" doc:"deviation found at the frequency, dB"`
	Result       string     `field:"result,one=pass|fail|adjusted" doc:"outcome"`
	By           string     `field:"by" doc:"who did it"`
}

// Deviation holds an audiometer's deviations in dB, in the order of audiometry.Frequencies.
type Deviation [len(audiometry.Frequencies)]Number

// RoomSurvey is one survey of the background noise in an audiometric test room.
type RoomSurvey struct {
	Meta
	RoomID    string  `field:"room_id,required" doc:"id of the test room"`
	Date      Date    `field:"date,required" doc:"day of the survey"`
	Band      Octaves `field:"band,min=-20,max=140" doc:"background sound pressure level in the octave band, dB"`
	Earphones string  `field:"earphones,one=supra_aural|circumaural|insert" doc:"earphones used in the room"`
	By        string  `field:"by" doc:"who made the survey"`
}

// Tester is a person who makes or reviews hearing tests, with one qualification.
type Tester struct {
	Meta
	TesterID        string `field:"tester_id,required,id" doc:"id of the person"`
	Qualification   string `field:"qualification,one=audiologist|otolaryngologist|physician|licensed_professional|technician" doc:"profession"`
	Certificate     string `field:"certificate" doc:"certificate or licence"`
	ValidFrom       Date   `field:"valid_from" doc:"first day of its validity"`
	ValidTo         Date   `field:"valid_to" doc:"last day of its validity"`
	CompetenceShown Answer `field:"competence_shown" doc:"whether a technician without certificate has shown competence"`
	Supervisor      string `field:"supervisor" doc:"id of the professional to whom a technician is responsible"`
}

// Document is a paper or file that attests a duty.
type Document struct {
	Meta
	Type       string `field:"kind,required,like=written_program|standard_posted|risk_assessment|control_programme|zone_signs|access_to_records|health_surveillance|protectors_available|attenuation_evaluation|area_sampling_equivalent|noise_records|injury_log|hearing_conservation_programme|monitoring_system|noise_measurement_report|noise_evaluation|means_register|noise_register|purchase_file|zone_plan|access_restriction|protector_selection|protector_maintenance|consultation|competence|surveillance_arrangement|health_records|records_kept|controls_posted|weekly_permission|exemption|rest_facilities|sensitive_workers|warning_signals|annual_report|analytical_report|calculator|schedule|booth_certificate|logbook|designation|protectors_on_request|limit_exceeded|transfer|confidentiality|instruction|advice|test_procedure" doc:"what it attests"`
	Site       string `field:"site" doc:"site that it covers"`
	Area       string `field:"area" doc:"area that it covers"`
	Group      string `field:"group" doc:"group that it covers"`
	Date       Date   `field:"date,required" doc:"its date"`
	ReviewedOn Date   `field:"reviewed_on" doc:"day of the latest review"`
	PostedOn   Date   `field:"posted_on" doc:"day from which it was posted or otherwise made known to the workers"`
	PostedTo   Date   `field:"posted_to" doc:"last day on which it was posted; empty while it is"`
	Covers     List   `field:"covers" doc:"what it covers, separated by semicolons"`
}

// Control is an engineering or administrative noise control, or the study of one.
type Control struct {
	Meta
	Group       string `field:"group" doc:"group concerned"`
	Area        string `field:"area" doc:"area concerned"`
	Date        Date   `field:"date,required" doc:"day of the study or decision"`
	Type        string `field:"kind,required,one=engineering|administrative" doc:"kind of control"`
	What        string `field:"what" doc:"the control"`
	ReductionDB Number `field:"reduction_db,min=0,max=80" doc:"reduction reached or expected, dB"`
	Feasible    string `field:"feasible,one=yes|no|studied" doc:"whether it was found feasible; studied while the finding is open"`
	StartedOn   Date   `field:"started_on" doc:"day on which the work on it began"`
	InstalledOn Date   `field:"installed_on" doc:"day on which it was put in place"`
}

// Examination is one offer of a hearing test or health appointment and what came of it, as an employer may know it:
// days and outcome, without a threshold.
type Examination struct {
	Meta
	ExaminationID string `field:"examination_id,required,id" doc:"id of the examination"`
	WorkerID      string `field:"worker_id,required" doc:"id of the worker"`
	Type          string `field:"kind,required,one=hearing_test|health_appointment" doc:"a hearing test, or an appointment with an occupational physician"`
	Purpose       string `field:"purpose,one=baseline|periodic|retest|exit|on_request|illness|other" doc:"why it was offered"`
	OfferedOn     Date   `field:"offered_on" doc:"day on which it was offered; empty where no offer is on record"`
	Answer        string `field:"answer,one=accepted|declined|no_answer" doc:"what the worker answered to the offer"`
	AttendedOn    Date   `field:"attended_on" doc:"day on which the worker was examined; empty while not examined"`
	Result        string `field:"result,like=no_concern|early_signs|concern|worse|referred" doc:"the outcome as the clinic words it, without thresholds"`
	Damage        Answer `field:"damage" doc:"whether hearing damage that can be identified was found"`
	CertificateOn Date   `field:"certificate_on" doc:"day on which the certificate or statement of fitness was given to worker and employer"`
	ResultsOn     Date   `field:"results_on" doc:"day on which the worker was told the results"`
	NextDue       Date   `field:"next_due" doc:"day by which the physician wants the next one"`
	AudiogramID   string `field:"audiogram_id" doc:"the audiogram that was made, where the program holds it"`
	By            string `field:"by" doc:"id, or qualification, of the examiner"`
}

// Kind gives the record's kind.
func (*Worker) Kind() Kind         { return "worker" }
func (*Assignment) Kind() Kind     { return "assignment" }
func (*Group) Kind() Kind          { return "group" }
func (*Measurement) Kind() Kind    { return "measurement" }
func (*Task) Kind() Kind           { return "task" }
func (*Change) Kind() Kind         { return "change" }
func (*Notice) Kind() Kind         { return "notice" }
func (*Audiogram) Kind() Kind      { return "audiogram" }
func (*FollowUp) Kind() Kind       { return "follow_up" }
func (*Training) Kind() Kind       { return "training" }
func (*Protector) Kind() Kind      { return "protector" }
func (*ProtectorIssue) Kind() Kind { return "protector_issue" }
func (*FitTest) Kind() Kind        { return "fit_test" }
func (*Examination) Kind() Kind    { return "examination" }
func (*WearCheck) Kind() Kind      { return "wear_check" }
func (*Instrument) Kind() Kind     { return "instrument" }
func (*Calibration) Kind() Kind    { return "calibration" }
func (*RoomSurvey) Kind() Kind     { return "room_survey" }
func (*Tester) Kind() Kind         { return "tester" }
func (*Document) Kind() Kind       { return "document" }
func (*Control) Kind() Kind        { return "control" }

// prototypes lists one empty record of each kind, in the order in which kinds are shown.
var prototypes = []Record{
	&Worker{}, &Assignment{}, &Group{}, &Measurement{}, &Task{}, &Change{}, &Notice{}, &Audiogram{}, &FollowUp{}, &Training{},
	&Protector{}, &ProtectorIssue{}, &FitTest{}, &WearCheck{}, &Instrument{}, &Calibration{}, &RoomSurvey{}, &Tester{}, &Document{}, &Control{},
	&Examination{},
}
