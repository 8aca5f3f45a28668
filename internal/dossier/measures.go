package dossier

import (
	"fmt"
	"slices"
	"strings"
	"time"

	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
)

// Measures say how a bundle's facts are derived from records: which dose channel counts, which
// frequencies make a shift, whose opinion the law accepts. They are the bundle's measures/data.yaml.
type Measures struct {
	Exposure   ExposureMeasures   `json:"exposure" doc:"how noise exposure is taken"`
	Hearing    HearingMeasures    `json:"hearing" doc:"how hearing tests are compared"`
	Protection ProtectionMeasures `json:"protection" doc:"how the attenuation of protectors is estimated"`
	Training   TrainingMeasures   `json:"training" doc:"how training sessions are taken together"`

	Documents DocumentMeasures `json:"documents,omitzero" doc:"how long evaluations hold and reports are posted, for a law that sets such times"`

	WorkingDays *WorkingDays `json:"working_days,omitempty" doc:"which days are working days, for a law that counts in them"`
}

// WorkingDays say which days are working days, as far as that is known.
type WorkingDays struct {
	Rest       []string  `json:"rest" doc:"days of the week without work, such as saturday"`
	Holidays   []Holiday `json:"holidays" doc:"days of rest beside them"`
	KnownUntil string    `json:"known_until" format:"date" doc:"last day for which the holidays are listed; beyond it nothing is counted"`
	Cite       string    `json:"cite" doc:"paragraph"`
}

// Holiday is a day of rest.
type Holiday struct {
	Date string `json:"date" format:"date" doc:"the day"`
	Name string `json:"name" doc:"its name"`
}

// Week gives the calendar of working days. It fails for a day of the week or a date that is none.
func (w *WorkingDays) Week() (*calendar.WorkingWeek, error) {
	out := &calendar.WorkingWeek{Holidays: map[calendar.Date]bool{}}
	for _, name := range w.Rest {
		i := slices.IndexFunc(weekdays, func(d time.Weekday) bool { return strings.EqualFold(d.String(), name) })
		if i < 0 {
			return nil, fmt.Errorf("there is no day of the week %q", name)
		}
		out.Weekend[i] = true
	}
	for _, h := range w.Holidays {
		day, err := calendar.Parse(h.Date)
		if err != nil {
			return nil, err
		}
		out.Holidays[day] = true
	}
	var err error
	out.KnownUntil, err = calendar.Parse(w.KnownUntil)
	return out, err
}

var weekdays = []time.Weekday{time.Sunday, time.Monday, time.Tuesday, time.Wednesday, time.Thursday, time.Friday, time.Saturday}

// ExposureMeasures say how noise exposure is taken.
type ExposureMeasures struct {
	Channels map[string]Channel   `json:"channels" doc:"dose settings, by name"`
	Levels   map[string]Threshold `json:"levels" doc:"exposure levels of the law, by name"`
	Margins  map[string]string    `json:"margins,omitempty" doc:"parameter by accuracy class of the determination (1, 2 or 3): dB to be added to a level, for a law that counts in such classes"`
	Enrols   string               `json:"enrols" doc:"name of the level that puts a worker into the program"`
	Several  string               `json:"several" enum:"highest|sampled" doc:"what counts where a group has several results since its latest change: the highest, or the mean with its uncertainty by sampling (levels only)"`
	Strategy string               `json:"strategy,omitempty" enum:"job|full_day" doc:"how samples were taken, where several is sampled (ISO 9612): over jobs or over full days"`
	Decision string               `json:"decision,omitempty" enum:"best|upper|zones" doc:"what of an uncertain level is compared: the best estimate, its upper limit, or three zones, of which the middle one decides nothing; the best estimate if left out"`
	Note     string               `json:"note,omitempty" doc:"reading of the law behind these choices"`

	NoticeLasts string `json:"notice_lasts,omitempty" doc:"parameter: time for which a written notice of an exposure spares another one of an exposure at the same levels"`
}

// The kinds of channels.
const (
	DoseChannel    = "dose"
	LevelChannel   = "level"
	HighestChannel = "highest"
)

// The figures of a measurement that a channel of the highest value can take.
const (
	PeakDBC    = "peak_dbc"
	PeakDBZ    = "peak_dbz"
	MaxDBA     = "max_dba"
	MaxDBCFast = "max_dbc_fast"
	ImpulseDBZ = "impulse_dbz"
)

// HighestFigures lists those figures.
var HighestFigures = []string{PeakDBC, PeakDBZ, MaxDBA, MaxDBCFast, ImpulseDBZ}

// Channel is one way in which exposure is expressed: the dose of a dosimeter setting, the level L_EX,8h by
// equal energy, or the highest value of a figure, such as the C-weighted peak.
type Channel struct {
	Kind        string  `json:"kind,omitempty" enum:"dose|level|highest" doc:"a noise dose in percent, the level L_EX,8h in dBA, or the highest value of a figure in dB; a dose if left out"`
	Of          string  `json:"of,omitempty" enum:"peak_dbc|peak_dbz|max_dba|max_dbc_fast|impulse_dbz" doc:"figure of which the highest value counts: peak level with C-weighting or unweighted, highest continuous level dBA slow, or impact noise dBC fast or by an unweighted impulse detector"`
	Durations   []Limit `json:"durations,omitempty" doc:"printed table of the permitted time by level, by which the dose of a day described by tasks is summed; a level between two rows takes the higher"`
	CriterionDB float64 `json:"criterion_db,omitempty" doc:"criterion level of a dose for 8 h, dBA"`
	ExchangeDB  float64 `json:"exchange_db,omitempty" doc:"exchange rate of a dose, dB"`
	ThresholdDB float64 `json:"threshold_db,omitempty" doc:"integration threshold of a dose, dBA; levels at it count"`
	UpperDB     float64 `json:"upper_db,omitempty" doc:"upper end of the range to be integrated into a dose, dBA"`
	Weekly      bool    `json:"weekly,omitempty" doc:"whether a level is averaged over the week of five 8-hour days, by the days worked"`
	Cite        string  `json:"cite" doc:"paragraph"`
}

// Limit is a row of a printed table of permitted times.
type Limit struct {
	DBA     float64 `json:"dba" doc:"level, dBA"`
	Minutes float64 `json:"minutes" doc:"permitted time in a day, minutes"`
}

// Threshold is an exposure level of the law: a channel whose value reaches, or exceeds, a parameter; or any of
// several such levels.
type Threshold struct {
	Channel string   `json:"channel,omitempty" doc:"name of the channel"`
	AtLeast string   `json:"at_least,omitempty" doc:"parameter that the value, percent, dBA or dB, reaches"`
	Above   string   `json:"above,omitempty" doc:"parameter that the value, percent, dBA or dB, exceeds"`
	Instead *Instead `json:"instead,omitempty" doc:"another channel, where the site has elected it"`
	Any     []string `json:"any,omitempty" doc:"in place of a channel: names of other levels, of which one is enough; one whose parameter has no value on the day is left out, so that a law can change its scale. A channel of the highest value that was not measured leaves it to the others, unless the group's noise holds impulses"`
}

// Instead is a channel that stands in for another one.
type Instead struct {
	Choice  string `json:"choice" doc:"choice of the site that elects it"`
	Channel string `json:"channel" doc:"name of the channel"`
}

// HearingMeasures say how hearing tests are compared.
type HearingMeasures struct {
	Required      []int               `json:"required" doc:"frequencies that each test of each ear must hold, Hz"`
	Shift         ShiftMeasure        `json:"shift,omitzero" doc:"the threshold shift of the law; left out where the law knows none"`
	Others        []audiometry.Scheme `json:"others,omitempty" doc:"further schemes by which each test is judged, such as an early warning; each has a name of its own"`
	Recordable    *RecordMeasure      `json:"recordable,omitempty" doc:"the hearing level of the recording rule"`
	AgeCorrection *AgeMeasure         `json:"age_correction,omitempty" doc:"the age correction that the law allows"`
	Professionals []string            `json:"professionals" doc:"professions that may review tests and revise baselines"`
	Physicians    []string            `json:"physicians" doc:"professions whose finding lifts the follow-up of a shift"`
	Licensed      []string            `json:"licensed" doc:"professions whose finding lifts the entry in the log"`
	Afterwards    bool                `json:"afterwards,omitempty" doc:"whether each test comes with all that was done or told after it"`

	// Sums says whether audiometric figures come with their sums, which take time to write. It is set where they are shown.
	Sums bool `json:"-"`
}

// ShiftMeasure is the threshold shift of the law, and the time within which a retest may stand in for the
// test that shows it.
type ShiftMeasure struct {
	audiometry.Scheme
	Retest     string `json:"retest" doc:"parameter: time within which a retest may stand in for the test"`
	RetestFrom string `json:"retest_from,omitempty" enum:"test|received" doc:"day on which that time begins: the test, or the day on which the employer received its result; the test if left out"`
	RetestOnce bool   `json:"retest_once,omitempty" doc:"whether only the first retest may stand in for the test"`
}

// RecordMeasure is the hearing level of the recording rule, over the frequencies of the shift.
type RecordMeasure struct {
	AtLeast string `json:"at_least" doc:"parameter that the average hearing level reaches, dB HL"`
}

// AgeMeasure is an age correction by table and the choice that turns it on.
type AgeMeasure struct {
	Choice string `json:"choice" doc:"name of the choice that turns it on"`
	Cite   string `json:"cite,omitempty" doc:"paragraph"`
	audiometry.AgeTable
}

// ProtectionMeasures say how the attenuation of protectors is estimated.
type ProtectionMeasures struct {
	Rating    string  `json:"rating,omitempty" enum:"nrr|snr|hml|octave|slc80" doc:"rating of the label, or laboratory data, that is used"`
	Channel   string  `json:"channel" doc:"channel whose 8-hour level is reduced"`
	Derating  string  `json:"derating,omitempty" enum:"niosh|csa" doc:"reduction of a noise reduction rating by type of protector"`
	Percent   float64 `json:"percent,omitempty" doc:"percentage of wearers for whom octave band values are assumed; 84 if left out"`
	RealWorld string  `json:"real_world,omitempty" doc:"parameter: dB added to the level at the ear for use outside the laboratory"`
	// RealWorldByType stands before RealWorld for the types that it names.
	RealWorldByType map[string]string `json:"real_world_by_type,omitempty" doc:"parameter by type of protector, in place of one for all: dB added to the level at the ear for use outside the laboratory"`

	Bands string `json:"bands,omitempty" doc:"parameter: action level, dBA, against which the level at the ear is graded from too little to too much protection"`
}

// TrainingMeasures say how training sessions are taken together.
type TrainingMeasures struct {
	TopicsOver calendar.Interval `json:"topics_over" doc:"time before the latest session over which topics add up"`
}

// Law answers what a parameter of the bundle is on a day.
type Law interface {
	// Number gives the value in force on the day; false if there is none.
	Number(name string, day calendar.Date) (float64, bool)
	// Interval gives the interval in force on the day; false if there is none.
	Interval(name string, day calendar.Date) (calendar.Interval, bool)
	// Days gives the days on which the value changes.
	Days(name string) []calendar.Date
}
