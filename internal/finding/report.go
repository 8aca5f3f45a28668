package finding

import (
	"hearduty/internal/calendar"
	"hearduty/internal/intake"
)

// Report is the neutral result of one check. Every output format is written from it and from nothing else.
type Report struct {
	Tool           Tool           `json:"tool"`
	Program        string         `json:"program" doc:"title of the program"`
	AsOf           calendar.Date  `json:"as_of" doc:"the day on which the program is judged"`
	Cautions       []string       `json:"cautions" doc:"what every reader must know"`
	Sites          []Site         `json:"sites" doc:"the sites judged, with the bundles and choices in force"`
	Bundles        []Bundle       `json:"bundles" doc:"the bundles judged by"`
	Inputs         []Input        `json:"inputs" doc:"the files read, with a ledger of their rows"`
	Rejects        []Reject       `json:"rejects" doc:"rows that could not become records"`
	Remarks        []string       `json:"remarks" doc:"what somebody should look at, such as an expired parameter"`
	Totals         map[Status]int `json:"totals" doc:"number of findings by status, also of those not listed"`
	AcceptedTotals map[Status]int `json:"accepted_totals" doc:"of the findings that the employer has accepted, the number by status; totals and counts do not hold them"`
	Counts         []Count        `json:"counts" doc:"number of findings by site, bundle, topic and status"`
	Listed         string         `json:"listed" doc:"which findings are listed"`

	Duties     []Duty      `json:"duties" doc:"the duties of the bundles judged by"`
	Parameters []Parameter `json:"parameters" doc:"every dated value of those bundles"`
	Rates      []Rate      `json:"rates" doc:"measures with their denominators, by site and year"`
	Portraits  []Portrait  `json:"portraits,omitempty" doc:"the subjects with listed findings, for formats that draw them"`

	ObservationCounts []ObservationCount `json:"observation_counts" doc:"number of observations by site and kind, also of those not listed"`
	Observations      []Observation      `json:"observations" doc:"what somebody may want to look at, listed with --all only; never a verdict"`
	Findings          []Finding          `json:"findings"`
}

// Observation is something about a record that somebody may want to look at. It is no finding and changes
// none, and it gives no threshold and no number.
type Observation struct {
	Site    string  `json:"site"`
	Subject Subject `json:"subject"`
	Kind    string  `json:"kind" doc:"what was observed, in a word"`
	Record  string  `json:"record" doc:"reference of the record"`
	File    string  `json:"file" doc:"file that holds it"`
	Sheet   string  `json:"sheet,omitempty" doc:"sheet of a workbook"`
	Row     int     `json:"row" doc:"line of the file, row of the sheet, or place in the list"`
	Ear     string  `json:"ear,omitempty" enum:"left|right|both" doc:"ear concerned, if it is about one"`
	Text    string  `json:"text" doc:"the observation in a sentence, without figures"`

	More []Evidence `json:"more,omitempty" doc:"further records that it is about"`
}

// ObservationCount is the number of observations of one kind at a site.
type ObservationCount struct {
	Site   string `json:"site"`
	Kind   string `json:"kind"`
	Number int    `json:"number"`
}

// Tool names the program that made the report.
type Tool struct {
	Name    string `json:"name"`
	Version string `json:"version"`
}

// Site is a site of the report.
type Site struct {
	ID      string         `json:"id"`
	Name    string         `json:"name"`
	Bundles []string       `json:"bundles"`
	Choices map[string]any `json:"choices" doc:"what the employer has elected, with defaults"`
	Workers int            `json:"workers" doc:"number of workers judged"`
}

// Bundle is a bundle of the report.
type Bundle struct {
	ID        string   `json:"id"`
	Title     string   `json:"title"`
	Revision  string   `json:"revision"`
	SHA256    string   `json:"sha256" doc:"digest of the bundle's files"`
	Signature string   `json:"signature,omitempty" doc:"whether the bundle is built into the program (embedded), its signature was verified with a key (verified), it has one that no key was given for (not checked), or it has none (unsigned)"`
	Kind      string   `json:"kind" doc:"law, guidance, practice or company"`
	CheckedOn string   `json:"checked_on" doc:"day on which it was last held against the text"`
	Cautions  []string `json:"cautions"`
}

// SignatureWords says of a bundle that is not built into the program what is known of its signature. Of one that is, it
// says nothing.
func SignatureWords(signature string) string {
	return map[string]string{
		"verified": "not embedded, signature verified", "not checked": "not embedded, signature not checked", "unsigned": "not embedded, unsigned",
	}[signature]
}

// SignatureWords says what must be known of where the bundle comes from, if anything.
func (b Bundle) SignatureWords() string { return SignatureWords(b.Signature) }

// Input is one file of the ledger: rows read = accepted + rejected + not data.
type Input = intake.Input

// Reject is a row that could not become a record.
type Reject = intake.Reject

// Count is the number of findings of one status under one topic.
type Count struct {
	Site   string `json:"site"`
	Bundle string `json:"bundle"`
	Topic  string `json:"topic"`
	Status Status `json:"status"`
	Number int    `json:"number"`
}
