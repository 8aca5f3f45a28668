package finding

import "hearduty/internal/calendar"

// Switch says what changes where other bundles judge the same records: topic by topic, and what the new law needs that
// the records lack.
type Switch struct {
	Tool     Tool          `json:"tool"`
	Program  string        `json:"program" doc:"title of the program"`
	AsOf     calendar.Date `json:"as_of" doc:"the day on which the program is judged"`
	Cautions []string      `json:"cautions" doc:"what every reader must know"`
	Notes    []string      `json:"notes" doc:"what limits the comparison"`
	Bundles  []Bundle      `json:"bundles" doc:"the bundles of both sides"`
	Levels   []SwitchLevel `json:"levels" doc:"the exposure levels of those bundles"`
	Sites    []SwitchSite  `json:"sites"`
}

// SwitchLevel is an exposure level of a bundle, and how exposure is taken to be held against it.
type SwitchLevel struct {
	Bundle string       `json:"bundle"`
	Name   string       `json:"name"`
	Enrols bool         `json:"enrols" doc:"whether it puts a worker into the program"`
	Parts  []SwitchPart `json:"parts" doc:"its parts, of which one is enough"`
}

// SwitchPart is a value on a channel of exposure.
type SwitchPart struct {
	Parameter string `json:"parameter" doc:"name of the parameter that is reached or exceeded"`
	Value     string `json:"value" doc:"value in force on the day, in words; empty if there is none"`
	Taken     string `json:"taken" doc:"how exposure is taken: settings of a dose, a level, or a highest value"`
	Cite      string `json:"cite" doc:"paragraph of the value; empty if there is none"`
	Seen      string `json:"seen" doc:"what the value was checked against: text, secondary or memory; empty if there is none"`
}

// SwitchSite is what changes at one site.
type SwitchSite struct {
	ID       string           `json:"id"`
	Name     string           `json:"name"`
	Workers  int              `json:"workers" doc:"number of workers judged"`
	From     []string         `json:"from" doc:"bundles of the old side"`
	To       []string         `json:"to" doc:"bundles of the new side"`
	Totals   SwitchNumbers    `json:"totals" doc:"findings of each side by status"`
	Topics   []SwitchTopic    `json:"topics" doc:"the topics under which either side has a finding"`
	Exposure []SwitchExposure `json:"exposure" doc:"groups whose exposure the new law cannot take from the records, once each"`
	Acts     []SwitchAct      `json:"acts" doc:"what the new law asks to be done in a time that is over, and no record says that it was done"`
	Needs    []SwitchNeed     `json:"needs" doc:"what else the records lack for the new law to be decided"`
}

// SwitchNumbers are numbers of findings by status of both sides.
type SwitchNumbers struct {
	From map[Status]int `json:"from"`
	To   map[Status]int `json:"to"`
}

// SwitchTopic is what changes under one topic.
type SwitchTopic struct {
	Topic      string        `json:"topic"`
	Numbers    SwitchNumbers `json:"numbers" doc:"findings of each side by status"`
	FromDuties []SwitchDuty  `json:"from_duties" doc:"duties of the old side with findings here"`
	ToDuties   []SwitchDuty  `json:"to_duties" doc:"duties of the new side with findings here"`
	FromHas    int           `json:"from_has" doc:"number of duties that the old side has under this topic"`
	ToHas      int           `json:"to_has" doc:"number of duties that the new side has under this topic"`
	Same       int           `json:"same" doc:"subjects that stand the same on both sides"`
	Moves      []SwitchMove  `json:"moves" doc:"subjects that stand otherwise on the new side"`
	Values     []SwitchValue `json:"values" doc:"parameters that decide findings here, as in force on the day"`
}

// SwitchDuty is a duty with its findings.
type SwitchDuty struct {
	Bundle   string         `json:"bundle"`
	Duty     string         `json:"duty"`
	Title    string         `json:"title"`
	Cite     string         `json:"cite"`
	Evidence []string       `json:"evidence" doc:"kinds of record that prove it"`
	Numbers  map[Status]int `json:"numbers" doc:"findings by status"`
}

// Standings beside the statuses: how a subject stands under a topic where a side has no finding about it.
const (
	NotOwed  = "not_owed"  // nothing is owed
	NotKnown = "not_known" // nothing is owed as far as the records show, and the exposure is not known
)

// Standings lists how a subject can stand under a topic, the most urgent first.
var Standings = []string{string(Gap), string(Unproven), NotKnown, string(Opinion), string(Due), string(Late), string(Lifted), string(Met), NotOwed}

// The ways in which a subject can change sides.
const (
	Appears  = "appears"  // the old side owed nothing
	Vanishes = "vanishes" // the new side owes nothing
	Changes  = "changes"  // both sides have findings, of which the most urgent differ
)

// SwitchMove is the subjects of one kind that stand in one way on the old side and in one other way on the new side. A
// subject stands as its most urgent finding under the topic.
type SwitchMove struct {
	Change     string             `json:"change" enum:"appears|vanishes|changes"`
	Kind       string             `json:"kind" doc:"kind of the subjects"`
	Before     string             `json:"before" doc:"how they stand on the old side"`
	After      string             `json:"after" doc:"how they stand on the new side"`
	Number     int                `json:"number" doc:"number of subjects"`
	Subjects   []string           `json:"subjects" doc:"their ids, without the workers that are told by group"`
	Groups     []SwitchGroup      `json:"groups" doc:"workers whose exposure the new law cannot take from the records, by group"`
	FromDuties []SwitchDutyNumber `json:"from_duties" doc:"duties by which they stand so on the old side"`
	ToDuties   []SwitchDutyNumber `json:"to_duties" doc:"duties by which they stand so on the new side"`
}

// SwitchDutyNumber is a duty with a number of subjects.
type SwitchDutyNumber struct {
	Bundle string `json:"bundle"`
	Duty   string `json:"duty"`
	Cite   string `json:"cite"`
	Number int    `json:"number" doc:"number of subjects"`
}

// SwitchGroup is a number of workers of a group.
type SwitchGroup struct {
	Group   string `json:"group" doc:"id of the group; empty for workers in no group"`
	Workers int    `json:"workers"`
}

// SwitchValue is a parameter of either side, or of both under one name.
type SwitchValue struct {
	Name string      `json:"name"`
	From []Parameter `json:"from" doc:"its values on the old side"`
	To   []Parameter `json:"to" doc:"its values on the new side"`
}

// Differs says whether the two sides have the parameter with different values, or only one has it.
func (v *SwitchValue) Differs() bool {
	if len(v.From) != len(v.To) {
		return true
	}
	for i := range v.From {
		if v.From[i].Value != v.To[i].Value {
			return true
		}
	}
	return false
}

// SwitchExposure is a group whose exposure the records do not tell as the new law takes it.
type SwitchExposure struct {
	Bundle  string          `json:"bundle"`
	Group   string          `json:"group" doc:"id of the group; empty for workers in no group"`
	Enrols  bool            `json:"enrols" doc:"whether it is not known whether the level that enrols is reached"`
	Workers int             `json:"workers" doc:"number of workers concerned, on whatever days"`
	Now     int             `json:"now" doc:"number of them concerned on the as-of day"`
	Before  int             `json:"before" doc:"number of them whose exposure the old law cannot tell either"`
	Wanted  []SwitchMeasure `json:"wanted" doc:"what has to be measured"`
	Reasons []string        `json:"reasons" doc:"why it is not known"`
}

// SwitchMeasure is a channel of exposure, with the levels that are held against it.
type SwitchMeasure struct {
	Channel string   `json:"channel" doc:"its name; several where any of them can reach the level"`
	Taken   string   `json:"taken" doc:"how exposure is taken, in words"`
	Levels  []string `json:"levels" doc:"levels of which it is not known whether they are reached"`
}

// New says whether the old law knows the exposure of any of the workers.
func (e *SwitchExposure) New() bool { return e.Before < e.Workers }

// SwitchAct is a duty that no record shows to be done.
type SwitchAct struct {
	Bundle   string           `json:"bundle"`
	Duty     string           `json:"duty"`
	Title    string           `json:"title"`
	Cite     string           `json:"cite"`
	Evidence []string         `json:"evidence" doc:"kinds of record that prove it"`
	Unread   []string         `json:"unread" doc:"those of these kinds of which no record was read at all"`
	Subjects []SwitchSubjects `json:"subjects" doc:"the subjects for whom it is not done, by kind"`
	Before   int              `json:"before" doc:"number of them for whom a duty of the same name of the old side is not done either"`
}

// SwitchNeed is a thing that the records lack for the new law to be decided.
type SwitchNeed struct {
	Bundle   string           `json:"bundle"`
	Lacks    string           `json:"lacks" doc:"what is lacking, in words; empty if the rule does not say"`
	Duties   []string         `json:"duties" doc:"duties that stay unproven without it"`
	Subjects []SwitchSubjects `json:"subjects" doc:"the subjects for whom it is lacking, by kind"`
	Before   int              `json:"before" doc:"number of them for whom a finding of the old side lacks the same, in the same words"`
}

// SwitchSubjects are subjects of one kind. Workers are counted by group and not named.
type SwitchSubjects struct {
	Kind   string        `json:"kind"`
	Number int           `json:"number"`
	IDs    []string      `json:"ids" doc:"ids of subjects that are no workers"`
	Groups []SwitchGroup `json:"groups" doc:"workers by the group that they are in on the as-of day"`
}
