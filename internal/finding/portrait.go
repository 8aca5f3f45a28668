package finding

import "hearduty/internal/calendar"

// Portrait is what can be drawn of one subject: stretches of days, events, and figures. A report has one for
// each subject with a listed finding, if the format draws them.
type Portrait struct {
	Site     string    `json:"site" doc:"id of the site"`
	Subject  Subject   `json:"subject"`
	Facts    []Fact    `json:"facts" doc:"what is to be known of the subject, such as the group; never a name"`
	Spells   []Spell   `json:"spells" doc:"stretches of days, by lane and day"`
	Events   []Event   `json:"events" doc:"what happened, by day"`
	Tests    []Test    `json:"tests,omitempty" doc:"hearing tests with thresholds; only on request"`
	Exposure *Exposure `json:"exposure,omitempty" doc:"noise of a group and what protectors leave of it"`
}

// Fact is a word and what it stands for.
type Fact struct {
	Name  string `json:"name"`
	Value string `json:"value"`
}

// Spell is a stretch of days in which something is true.
type Spell struct {
	Lane  string        `json:"lane" doc:"employment, group, exposure, program or protector"`
	From  calendar.Date `json:"from" doc:"first day"`
	To    calendar.Date `json:"to" doc:"day after the last; null while it goes on"`
	Label string        `json:"label" doc:"what is true, in a few words with units"`
	Grade string        `json:"grade" enum:"plain|action|limit|unknown" doc:"how much it matters: at the action level, over the limit, or not known"`
}

// Event is something that happened on a day.
type Event struct {
	Date   calendar.Date `json:"date"`
	Lane   string        `json:"lane" doc:"test, training, protector, notice, follow-up, fit-test, wear-check, measurement, change, control, document, or calibration"`
	Label  string        `json:"label" doc:"what happened, in a few words"`
	State  string        `json:"state" enum:"plain|good|bad" doc:"whether it shows something in or out of order"`
	Record string        `json:"record" doc:"reference of the record"`
	File   string        `json:"file" doc:"file that holds it"`
	Sheet  string        `json:"sheet,omitempty" doc:"sheet of a workbook"`
	Row    int           `json:"row" doc:"line of the file, row of the sheet, or place in the list"`
}

// Test is a hearing test with its thresholds.
type Test struct {
	Record  string        `json:"record" doc:"reference of the record"`
	Date    calendar.Date `json:"date"`
	Purpose string        `json:"purpose"`
	Left    []Level       `json:"left"`
	Right   []Level       `json:"right"`
	// The baselines are references of the tests with which the ears were compared.
	LeftBaseline  string `json:"left_baseline" doc:"reference of the test that was the left ear's baseline; empty if none"`
	RightBaseline string `json:"right_baseline" doc:"reference of the test that was the right ear's baseline; empty if none"`
	LeftShift     *Shift `json:"left_shift,omitempty" doc:"the left ear's shift"`
	RightShift    *Shift `json:"right_shift,omitempty" doc:"the right ear's shift"`
}

// Level is the hearing threshold level at one frequency.
type Level struct {
	Hz    int     `json:"hz" doc:"frequency, Hz"`
	DB    float64 `json:"db" doc:"hearing threshold level, or the highest level presented without response, dB HL"`
	State string  `json:"state" enum:"measured|no_response|not_tested" doc:"how to read it"`
}

// Shift is how far an ear has moved from its baseline.
type Shift struct {
	DB          float64 `json:"db" doc:"average shift over the law's frequencies, dB"`
	Significant bool    `json:"significant" doc:"whether the law calls it a significant threshold shift"`
	Hz          []int   `json:"hz" doc:"frequencies over which it is taken"`
	AgeDB       float64 `json:"age_db" doc:"age correction within it, dB; 0 for none"`
}

// Exposure is the noise of a group over time.
type Exposure struct {
	Unit    string   `json:"unit" doc:"what the levels are, such as dBA TWA"`
	Results []Result `json:"results" doc:"results by day"`
	Lines   []Line   `json:"lines" doc:"action and limit levels"`
	Ears    []Ear    `json:"ears" doc:"level at the ear under each protector in use"`
}

// Result is one measured or worked-out level.
type Result struct {
	Date    calendar.Date `json:"date"`
	DB      float64       `json:"db" doc:"level, dBA; where it is not known exactly, the bound that is known"`
	Known   string        `json:"known" enum:"exact|between|at_least|at_most" doc:"whether the level is exact, lies between low and high, or is only a bound"`
	Low     float64       `json:"low" doc:"lower bound, dBA, of a level between two"`
	High    float64       `json:"high" doc:"upper bound, dBA, of a level between two"`
	Record  string        `json:"record"`
	Current bool          `json:"current" doc:"whether it decides the exposure now"`
}

// Line is a level of the law.
type Line struct {
	Name  string  `json:"name"`
	DB    float64 `json:"db"`
	Cite  string  `json:"cite"`
	Grade string  `json:"grade" enum:"action|limit"`
}

// Ear is the level at the ear under a protector.
type Ear struct {
	Protector string  `json:"protector" doc:"id of the protector model"`
	DB        float64 `json:"db" doc:"level at the ear, dBA"`
	Method    string  `json:"method" doc:"how attenuation was estimated"`
	Workers   int     `json:"workers" doc:"members of the group who have it"`
	Band      string  `json:"band" enum:"too_little|good|much|too_much|" doc:"how it stands to the target; empty if the law names none"`
}
