package finding

import (
	"strings"

	"hearduty/internal/calendar"
)

// ChangeKind says what became of a finding from one report to a later one. A finding is open while it is a gap,
// unproven, or waits for an opinion, and is not accepted.
type ChangeKind string

// The kinds of change.
const (
	Opened           ChangeKind = "opened"             // open now, and not before
	Worsened         ChangeKind = "worsened"           // of a more urgent status than before
	NoLongerAccepted ChangeKind = "no_longer_accepted" // accepted before, and counted again now
	Unclear          ChangeKind = "unclear"            // listed in one report, and perhaps only left out of the other
	NewlyLate        ChangeKind = "newly_late"         // fulfilled meanwhile, but after its time
	NewlyDue         ChangeKind = "newly_due"          // has come near enough to be listed as due
	NewlyAccepted    ChangeKind = "newly_accepted"     // the employer has accepted it meanwhile
	Eased            ChangeKind = "eased"              // of a less urgent status than before
	Closed           ChangeKind = "closed"             // open before, and not now
	StillAccepted    ChangeKind = "still_accepted"     // accepted before and now
	StillOpen        ChangeKind = "still_open"         // open before and now, with the same status
)

// ChangeKinds lists all kinds in the order in which they are told.
var ChangeKinds = []ChangeKind{Opened, Worsened, NoLongerAccepted, Unclear, NewlyLate, NewlyDue, NewlyAccepted, Eased, Closed, StillAccepted, StillOpen}

// Words writes the kind as words.
func (k ChangeKind) Words() string { return strings.ReplaceAll(string(k), "_", " ") }

// Meaning says in words what the kind stands for.
func (k ChangeKind) Meaning() string { return changeMeanings[k] }

var changeMeanings = map[ChangeKind]string{
	Opened:           "open now, and not before",
	Worsened:         "more urgent than before",
	NoLongerAccepted: "accepted before, and counted again now",
	Unclear:          "listed in one report, and perhaps only left out of the other",
	NewlyLate:        "fulfilled meanwhile, but after its time",
	NewlyDue:         "its time still runs, and has come near",
	NewlyAccepted:    "accepted by the employer meanwhile, and not met",
	Eased:            "less urgent than before",
	Closed:           "open before, and not now",
	StillAccepted:    "accepted before and now, and not met",
	StillOpen:        "open before and now",
}

// Comparison is what changed between two reports. It says nothing that the two reports do not prove.
type Comparison struct {
	Tool     Tool               `json:"tool"`
	Old      Side               `json:"old"`
	New      Side               `json:"new"`
	Cautions []string           `json:"cautions" doc:"what every reader must know"`
	Notes    []string           `json:"notes" doc:"what differs between the reports as a whole, and limits the comparison"`
	Apart    []Apart            `json:"apart" doc:"what only one of the reports judged; it is not compared"`
	Numbers  map[ChangeKind]int `json:"numbers" doc:"number of changes of each kind"`
	Changes  []Change           `json:"changes" doc:"the changes by kind, and by site, urgency, day and duty"`
}

// Side is one of the two reports.
type Side struct {
	Program string         `json:"program" doc:"title of the program"`
	AsOf    calendar.Date  `json:"as_of" doc:"the day on which it was judged"`
	Version string         `json:"version" doc:"version of hearduty that wrote it"`
	Listed  string         `json:"listed" doc:"which findings it lists"`
	Totals  map[Status]int `json:"totals" doc:"number of findings by status, also of those not listed"`

	AcceptedTotals map[Status]int `json:"accepted_totals" doc:"number of accepted findings by status; the totals do not hold them"`
}

// Apart is a site under a bundle that only one of the reports judged.
type Apart struct {
	Site   string `json:"site"`
	Bundle string `json:"bundle"`
	In     string `json:"in" enum:"old|new" doc:"the report that judged it"`
	Open   int    `json:"open" doc:"its open findings there"`
}

// Change is what became of one finding.
type Change struct {
	Kind     ChangeKind `json:"change"`
	ID       string     `json:"id" doc:"id of the finding"`
	Site     string     `json:"site"`
	Bundle   string     `json:"bundle"`
	Duty     string     `json:"duty"`
	Topic    string     `json:"topic"`
	Subject  Subject    `json:"subject"`
	Key      string     `json:"key"`
	Severity string     `json:"severity"`
	Cite     string     `json:"cite"`
	Remedy   string     `json:"remedy"`
	Before   *Standing  `json:"before,omitempty" doc:"how it stood in the old report, if it is listed there"`
	After    *Standing  `json:"after,omitempty" doc:"how it stands in the new report, if it is listed there"`
	Why      []Cause    `json:"why" doc:"what the two reports show of the reasons"`
}

// Standing is how a finding stands in one report.
type Standing struct {
	Status   Status        `json:"status"`
	Due      calendar.Date `json:"due" doc:"last day on which it is in time"`
	Done     calendar.Date `json:"done" doc:"day on which it was fulfilled"`
	DaysOver int           `json:"days_over"`
	Message  string        `json:"message" doc:"what was found, in words"`
	Accepted *Acceptance   `json:"accepted,omitempty"`
}

// Cause is a reason for a change.
type Cause struct {
	Kind   string `json:"kind" enum:"record_arrived|record_gone|file_changed|date_passed|date_near|day_moved|later_day|parameter_changed|bundle_changed|duty_new|duty_gone|choice_changed|acceptance|facts_changed|not_listed|not_told" doc:"what sort of reason"`
	Text   string `json:"text" doc:"the reason in a sentence"`
	Record string `json:"record,omitempty" doc:"the record concerned"`
	File   string `json:"file,omitempty"`
	Sheet  string `json:"sheet,omitempty"`
	Row    int    `json:"row,omitempty"`
}

// Worse says whether anything opened or worsened, or counts again.
func (c *Comparison) Worse() bool {
	if c.Numbers[Opened]+c.Numbers[Worsened] > 0 {
		return true
	}
	for i := range c.Changes {
		if x := &c.Changes[i]; x.Kind == NoLongerAccepted && x.After != nil && opens(x.After.Status) {
			return true
		}
	}
	return false
}
