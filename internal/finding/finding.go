// Package finding holds the result of judging: findings, their order, and the report that all output
// formats are written from.
package finding

import (
	"crypto/sha256"
	"encoding/hex"
	"slices"
	"strings"

	"hearduty/internal/calendar"
)

// Status says how a duty stands.
type Status string

// The statuses.
const (
	Gap      Status = "gap"      // not fulfilled and its time is over, or its condition fails
	Unproven Status = "unproven" // the records needed to decide are missing or unusable
	Opinion  Status = "opinion"  // the law wants a professional's judgement and none is on record
	Due      Status = "due"      // not yet fulfilled, its time is still running
	Late     Status = "late"     // fulfilled, but after its time
	Lifted   Status = "lifted"   // an exception of the law removes it
	Met      Status = "met"      // fulfilled in time
)

// Statuses lists all statuses in order of urgency.
var Statuses = []Status{Gap, Unproven, Opinion, Due, Late, Lifted, Met}

// Urgency gives the place of the status in Statuses.
func (s Status) Urgency() int { return slices.Index(Statuses, s) }

// Topics lists the jurisdiction-free headings under which duties stand, in the order of a program's year.
var Topics = []string{"monitoring", "notice", "controls", "enrolment", "audiometry", "follow-up", "test-quality",
	"protectors", "training", "information", "records", "reporting"}

// Subject says whom or what a finding is about.
type Subject struct {
	Kind string `json:"kind" doc:"worker, group, site, instrument, room or tester"`
	ID   string `json:"id" doc:"id of the subject, never a name"`
}

// Evidence is a record that a finding rests on.
type Evidence struct {
	Record string `json:"record" doc:"kind and id of the record"`
	File   string `json:"file,omitempty" doc:"input file"`
	Sheet  string `json:"sheet,omitempty" doc:"sheet of a workbook"`
	Row    int    `json:"row,omitempty" doc:"line of the file or row of the sheet"`
}

// Finding is a settled obligation.
type Finding struct {
	ID       string         `json:"id" doc:"fingerprint of site, bundle, duty, subject and key; stable from run to run"`
	Site     string         `json:"site" doc:"id of the site"`
	Bundle   string         `json:"bundle" doc:"id of the bundle judged by"`
	Duty     string         `json:"duty" doc:"id of the duty"`
	Topic    string         `json:"topic" doc:"heading of the duty"`
	Subject  Subject        `json:"subject"`
	Key      string         `json:"key" doc:"tells findings of one duty and subject apart"`
	Status   Status         `json:"status"`
	Severity string         `json:"severity" doc:"major or minor"`
	Due      calendar.Date  `json:"due" doc:"last day on which it is in time"`
	Done     calendar.Date  `json:"done" doc:"day on which it was fulfilled"`
	DaysOver int            `json:"days_over" doc:"days after the due day, of the fulfilment or else of the as-of day"`
	Message  string         `json:"message" doc:"what was found, in words"`
	Missing  []string       `json:"missing,omitempty" doc:"what the records lack to decide it, of an unproven finding"`
	Cite     string         `json:"cite" doc:"paragraph of the law"`
	Remedy   string         `json:"remedy" doc:"what to do"`
	Facts    map[string]any `json:"facts" doc:"numbers and words that decide, and the parameters used"`
	Health   map[string]any `json:"health,omitempty" doc:"audiometric figures; only on request"`
	Evidence []Evidence     `json:"evidence" doc:"records it rests on"`
	Undone   bool           `json:"-"` // a gap because no record says that it was done
	Accepted *Acceptance    `json:"accepted,omitempty" doc:"the employer has accepted it for a time; it is shown apart and never counted as met"`
}

// Fingerprint gives the id of a finding: "f-" and 16 hexadecimal digits of the SHA-256 of its parts.
func Fingerprint(site, bundle, duty string, subject Subject, key string) string {
	sum := sha256.Sum256([]byte(strings.Join([]string{site, bundle, duty, subject.Kind, subject.ID, key}, "\x00")))
	return "f-" + hex.EncodeToString(sum[:8])
}

// Compare orders findings: by site, urgency, due day, topic, duty, subject and key.
func Compare(a, b *Finding) int {
	for _, c := range []int{
		strings.Compare(a.Site, b.Site),
		a.Status.Urgency() - b.Status.Urgency(),
		compareDue(a.Due, b.Due),
		slices.Index(Topics, a.Topic) - slices.Index(Topics, b.Topic),
		strings.Compare(a.Bundle, b.Bundle),
		strings.Compare(a.Duty, b.Duty),
		strings.Compare(a.Subject.Kind, b.Subject.Kind),
		strings.Compare(a.Subject.ID, b.Subject.ID),
		strings.Compare(a.Key, b.Key),
	} {
		if c != 0 {
			return c
		}
	}
	return strings.Compare(a.ID, b.ID)
}

// compareDue puts findings without a due day after those with one.
func compareDue(a, b calendar.Date) int {
	switch {
	case a == b:
		return 0
	case !a.Known():
		return 1
	case !b.Known():
		return -1
	}
	return int(a) - int(b)
}
