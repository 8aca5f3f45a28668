package dossier

import "hearduty/internal/record"

// Group is the dossier of one similar-exposure group.
type Group struct {
	Common
	Known          bool               `json:"registered" doc:"whether the group is in the group records"`
	Area           string             `json:"area" doc:"area where it works"`
	SuspectedNoisy record.Answer      `json:"suspected_noisy" doc:"whether information suggests that exposure may reach the action level"`
	Varied         record.Answer      `json:"varied" doc:"whether area sampling is generally unsuitable: mobility, varying levels or impulses"`
	Impulsive      record.Answer      `json:"impulsive" doc:"whether impulse or impact noise occurs"`
	DaysVary       record.Answer      `json:"days_vary" doc:"whether the daily exposure varies markedly from day to day"`
	Workers        int                `json:"workers" doc:"number of workers in the group on the as-of day"`
	Holders        int                `json:"protector_holders" doc:"number of them with a hearing protector at hand"`
	Measurements   []Measurement      `json:"measurements" doc:"noise measurements that stand for the group, oldest first"`
	TaskDay        *Link              `json:"task_day" doc:"tasks with levels and minutes that describe the day"`
	FirstSurvey    *Link              `json:"first_survey" doc:"the first result that gives the group's exposure"`
	Exposures      []Exposure         `json:"exposures" doc:"noise exposure, stretch by stretch"`
	Now            *Exposure          `json:"now" doc:"exposure on the as-of day"`
	Statistics     *Statistics        `json:"statistics" doc:"spread of the results that count now, for information; null if there are none"`
	Exposed        map[string][]Spell `json:"exposed" doc:"stretches at or above each exposure level of the bundle"`
	Unknown        map[string][]Open  `json:"exposure_unknown" doc:"stretches in which it is not known whether the level is reached, with the reason"`
	Changes        []Change           `json:"changes" doc:"changes of production, process, equipment or controls, oldest first"`
	Controls       []Control          `json:"controls" doc:"noise controls and studies of them, oldest first"`
	Evaluations    []Evaluation       `json:"evaluations" doc:"documents of the kind that the bundle's measures call periodic, with the period of each, oldest first"`
	Documents      []Document         `json:"documents" doc:"documents of the group, of its area, and of the whole site"`
}

// Measurement is one noise measurement; its dose channels are taken together.
type Measurement struct {
	Link
	ID               string        `json:"id" doc:"id of the measurement"`
	Type             string        `json:"kind" doc:"personal, area or task"`
	FullShift        record.Answer `json:"full_shift" doc:"whether the sample stands for the full shift"`
	Instrument       string        `json:"instrument" doc:"id of the instrument"`
	Dosed            bool          `json:"dosed" doc:"whether a dose was taken with the criterion level and exchange rate of the bundle's enrolling channel"`
	Threshold        record.Number `json:"threshold_db" doc:"integration threshold of that dose, dBA"`
	Upper            record.Number `json:"upper_db" doc:"upper end of the range of that dose, dBA"`
	Doses            []DoseRange   `json:"doses" doc:"range of each dose with these settings, in the order of the records"`
	Method           string        `json:"method" doc:"slow, fast or integrating"`
	MaxDBA           record.Number `json:"max_dba" doc:"highest continuous level, dBA slow"`
	PeakDB           record.Number `json:"peak_db" doc:"peak sound pressure level, dB"`
	PeakWeighting    string        `json:"peak_weighting" doc:"C, or Z for unweighted"`
	PeakDBC          record.Number `json:"peak_dbc" doc:"C-weighted peak sound pressure level, dB"`
	PeakDBZ          record.Number `json:"peak_dbz" doc:"unweighted peak sound pressure level, dB"`
	MaxDBCFast       record.Number `json:"max_dbc_fast" doc:"highest level of impact noise, C-weighted, fast, dB"`
	ImpulseDBZ       record.Number `json:"impulse_dbz" doc:"highest level of impact noise by an impulse detector, unweighted, dB"`
	Levelled         bool          `json:"levelled" doc:"whether an A-weighted equivalent level was taken"`
	AccuracyClass    string        `json:"accuracy_class" doc:"accuracy class of the determination"`
	ObserversInvited record.Answer `json:"observers_invited" doc:"whether workers or their representatives could observe"`
	Reaches          record.Answer `json:"reaches_enrolling" doc:"whether it reaches the level that enrols"`
	Doubts           []string      `json:"doubts" doc:"figures on it that cannot all be right"`
	Current          bool          `json:"current" doc:"whether it describes the group as it is: the group was not measured again since a later change or control"`
	Repeated         bool          `json:"repeated" doc:"whether a later measurement gives the dose on the enrolling channel exactly"`
}

// DoseRange is the range of levels that a dose holds.
type DoseRange struct {
	Threshold record.Number `json:"threshold_db" doc:"integration threshold, dBA"`
	Upper     record.Number `json:"upper_db" doc:"upper end of the range, dBA"`
}

// Change is a change that may alter exposure.
type Change struct {
	Link
	ID          string        `json:"id" doc:"id of the change"`
	What        string        `json:"what" doc:"what was changed"`
	Raises      string        `json:"raises_exposure" doc:"yes, no or unknown; null if not recorded"`
	Identified  Date          `json:"identified_on" doc:"day on which it was entered in the register"`
	Measured    *Link         `json:"measured" doc:"the first measurement since the change"`
	Evaluated   *Link         `json:"evaluated" doc:"the first evaluation of protector attenuation since the change"`
	PeriodEnds  Date          `json:"period_ends" doc:"end of the period of the latest evaluation on or before that day: the day by which the next one is due or, if it was made earlier, its day"`
	PeriodShort record.Answer `json:"period_short" doc:"whether that period ends sooner than the time that the bundle's measures name after the change"`
	Enrolling   bool          `json:"enrolling" doc:"whether the group was at or above the level that enrols on that day, or has been found so since"`
}

// Control is a noise control or the study of one.
type Control struct {
	Link
	Type      string `json:"kind" doc:"engineering or administrative"`
	What      string `json:"what" doc:"the control"`
	Feasible  string `json:"feasible" doc:"yes, no or studied; null if not recorded"`
	Started   Date   `json:"started_on" doc:"day on which the work on it began"`
	Installed Date   `json:"installed_on" doc:"day on which it was put in place"`
}

// Document is a paper or file that attests a duty.
type Document struct {
	Link
	Type       string   `json:"kind" doc:"what it attests"`
	Covers     []string `json:"covers" doc:"what it covers"`
	ReviewedOn Date     `json:"reviewed_on" doc:"day of the latest review"`
	PostedOn   Date     `json:"posted_on" doc:"day from which it was posted or otherwise made known"`
	PostedTo   Date     `json:"posted_to" doc:"last day on which it was posted; null while it is"`
	PostUntil  Date     `json:"post_until" doc:"last day of the time for which it is to stay posted, by the parameter that the bundle's measures name; null where they name none"`
}

// Site is the dossier of one site.
type Site struct {
	Common
	Workers             int        `json:"workers" doc:"number of workers employed on the as-of day"`
	EnrolledNow         int        `json:"enrolled_now" doc:"number of workers enrolled on the as-of day"`
	EnrolledEver        int        `json:"enrolled_ever" doc:"number of workers ever enrolled"`
	LevelsNow           []string   `json:"levels_now" doc:"names of the exposure levels of the bundle at or above which a worker is on the as-of day"`
	Measurements        int        `json:"measurements" doc:"number of noise measurements of the site"`
	LatestMeasurement   *Link      `json:"latest_measurement" doc:"the latest of them"`
	MissingMeasurements []Dangling `json:"missing_measurements" doc:"measurements that other records refer to but that are not in the records"`
	Documents           []Document `json:"documents" doc:"documents of the site"`
	LogYears            []LogYear  `json:"log_years" doc:"years in which hearing losses were entered in the injury log"`
}

// LogYear is a year with hearing-loss entries in the injury log.
type LogYear struct {
	Year    string `json:"year" doc:"calendar year"`
	Latest  Link   `json:"latest" doc:"the latest entry of the year"`
	Entries int    `json:"entries" doc:"number of entries"`
	Kept    *Link  `json:"kept" doc:"document showing that the log of the year is kept"`
}

// Instrument is the dossier of an audiometer or of an instrument for noise.
type Instrument struct {
	Common
	Known       bool      `json:"registered" doc:"whether the instrument is in the instrument records"`
	Type        string    `json:"kind" doc:"audiometer, dosimeter, sound_level_meter or calibrator; null if not known"`
	Standard    string    `json:"standard" doc:"standard that it meets"`
	Class       string    `json:"class" doc:"accuracy class or type"`
	InUse       *Spell    `json:"in_use" doc:"from its first day in service or first use, to its last day in service or, if later, its last use"`
	Tests       int       `json:"tests" doc:"hearing tests made with it"`
	Workers     int       `json:"workers" doc:"workers tested with it"`
	Years       []UseYear `json:"years" doc:"years in which hearing tests were made with it"`
	Deviations  []Drift   `json:"deviations" doc:"checks of an audiometer that found a deviation"`
	NoiseUse    []Use     `json:"noise_measurements" doc:"noise measurements made with it, oldest first"`
	Calibration *Link     `json:"latest_calibration" doc:"the latest acoustic, exhaustive, laboratory or field calibration"`
}

// UseYear is a calendar year of an audiometer's use.
type UseYear struct {
	Year           string `json:"year" doc:"calendar year"`
	Last           Date   `json:"last" doc:"the last day of use in it"`
	Days           int    `json:"days" doc:"days of use"`
	Unchecked      int    `json:"unchecked_days" doc:"days of use without a functional check"`
	FirstUnchecked Date   `json:"first_unchecked" doc:"the first of them"`
	Tests          int    `json:"tests_unchecked" doc:"tests on those days"`
	Workers        int    `json:"workers_unchecked" doc:"workers tested on those days"`
	Ref            string `json:"ref" doc:"a test on the first unchecked day"`
}

// Drift is a check of an audiometer that found a deviation.
type Drift struct {
	Link
	Type                 string        `json:"kind" doc:"functional, acoustic or exhaustive"`
	Largest              record.Number `json:"largest_db" doc:"largest deviation without its sign, dB; null where the check failed and no figure is on record"`
	Acoustic             *Link         `json:"acoustic" doc:"the first acoustic or exhaustive calibration on or after that day"`
	Exhaustive           *Link         `json:"exhaustive" doc:"the first exhaustive calibration on or after that day"`
	UsedBeforeAcoustic   *Link         `json:"used_before_acoustic" doc:"the first test after the check and before the acoustic calibration"`
	UsedBeforeExhaustive *Link         `json:"used_before_exhaustive" doc:"the first test after the check and before the exhaustive calibration"`
}

// Use is a noise measurement made with an instrument.
type Use struct {
	Link
	ID          string        `json:"id" doc:"id of the measurement"`
	CheckBefore record.Number `json:"check_before_db" doc:"calibrator check before, dB"`
	CheckAfter  record.Number `json:"check_after_db" doc:"calibrator check after, dB"`
	Calibrated  *Link         `json:"calibrated" doc:"the latest calibration on or before that day"`
	Failed      bool          `json:"calibration_failed" doc:"whether that calibration failed"`
}

// Room is the dossier of an audiometric test room.
type Room struct {
	Common
	Tests   int      `json:"tests" doc:"hearing tests made in it"`
	Workers int      `json:"workers" doc:"workers tested in it"`
	First   *Link    `json:"first_use" doc:"the first test in it"`
	Surveys []Survey `json:"surveys" doc:"surveys of its background noise, oldest first"`
	Latest  *Survey  `json:"latest_survey" doc:"the latest survey"`
}

// Survey is one survey of background noise.
type Survey struct {
	Link
	Earphones string                   `json:"earphones" doc:"earphones used in the room"`
	Band      map[string]record.Number `json:"band" doc:"octave band level, dB, by centre frequency in Hz"`
}

// Tester is the dossier of a person who makes hearing tests.
type Tester struct {
	Common
	Known           bool          `json:"registered" doc:"whether the person is in the tester records"`
	Qualification   string        `json:"qualification" doc:"profession"`
	Certificate     string        `json:"certificate" doc:"certificate or licence"`
	CompetenceShown record.Answer `json:"competence_shown" doc:"whether competence without certificate was shown"`
	Supervisor      string        `json:"supervisor" doc:"id of the supervisor"`
	SupervisorIs    string        `json:"supervisor_is" doc:"profession of the supervisor; null if not known"`
	Tests           int           `json:"tests" doc:"hearing tests made"`
	Workers         int           `json:"workers" doc:"workers tested"`
	First           *Link         `json:"first_test" doc:"the first test made"`
	Last            *Link         `json:"last_test" doc:"the latest test made"`
	Outside         int           `json:"tests_outside_validity" doc:"tests on days outside the certificate's validity"`
	FirstOutside    *Link         `json:"first_outside" doc:"the first of them"`
}
