package finding

import "hearduty/internal/calendar"

// Duty is a duty of a bundle of the report, so that findings can be read without the bundle.
type Duty struct {
	Bundle      string   `json:"bundle"`
	ID          string   `json:"id"`
	Title       string   `json:"title"`
	Description string   `json:"description" doc:"what the duty asks, in a sentence"`
	Cite        string   `json:"cite"`
	Topic       string   `json:"topic"`
	Subject     string   `json:"subject" doc:"kind of subject that it falls on"`
	Severity    string   `json:"severity"`
	Evidence    []string `json:"evidence" doc:"kinds of record that prove it"`
	Remedy      string   `json:"remedy"`
}

// Parameter is one dated value of a bundle.
type Parameter struct {
	Bundle  string `json:"bundle"`
	Name    string `json:"name"`
	About   string `json:"about" doc:"what it is"`
	Value   string `json:"value" doc:"value in words, with unit"`
	From    string `json:"from" doc:"first day in force"`
	To      string `json:"to" doc:"day after the last; empty while in force"`
	Cite    string `json:"cite"`
	Seen    string `json:"seen" enum:"text|secondary|memory" doc:"what it was checked against"`
	InForce bool   `json:"in_force" doc:"whether it is in force on the as-of day"`
}

// Acceptance says that the employer has accepted a gap for a time. It changes no status.
type Acceptance struct {
	Reason     string        `json:"reason"`
	ApprovedBy string        `json:"approved_by" doc:"who approved it, by role or id"`
	Until      calendar.Date `json:"until" doc:"last day on which it counts"`
	File       string        `json:"file"`
	Row        int           `json:"row" doc:"line of the file"`
}

// Rate is a measure for a manager: a share with its denominator.
type Rate struct {
	Site       string   `json:"site" doc:"id of the site; empty for all sites under the bundle"`
	Bundle     string   `json:"bundle" doc:"bundle by which it is counted"`
	Year       int      `json:"year" doc:"calendar year; 0 for the as-of day"`
	Name       string   `json:"name" enum:"tested_in_time|shifts|shifts_confirmed|protected_below_target|trained_in_time" doc:"what is measured"`
	Part       *int     `json:"part" doc:"number of cases; null if suppressed"`
	Of         *int     `json:"of" doc:"number of which they are a part; null if suppressed"`
	Percent    *float64 `json:"percent" doc:"share in percent, one decimal; null if suppressed or if there is none"`
	Suppressed bool     `json:"suppressed" doc:"the numbers are so small that persons could be told from them"`
	About      string   `json:"about" doc:"what is counted, in a sentence"`
}
