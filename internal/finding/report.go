package finding

import (
	"hearduty/internal/calendar"
	"hearduty/internal/intake"
)

// Report is the neutral result of one check. Every output format is written from it and from nothing else.
type Report struct {
	Tool     Tool           `json:"tool"`
	Program  string         `json:"program" doc:"title of the program"`
	AsOf     calendar.Date  `json:"as_of" doc:"the day on which the program is judged"`
	Cautions []string       `json:"cautions" doc:"what every reader must know"`
	Sites    []Site         `json:"sites" doc:"the sites judged, with the bundles and choices in force"`
	Bundles  []Bundle       `json:"bundles" doc:"the bundles judged by"`
	Inputs   []Input        `json:"inputs" doc:"the files read, with a ledger of their rows"`
	Rejects  []Reject       `json:"rejects" doc:"rows that could not become records"`
	Remarks  []string       `json:"remarks" doc:"what somebody should look at, such as an expired parameter"`
	Totals   map[Status]int `json:"totals" doc:"number of findings by status, also of those not listed"`
	Counts   []Count        `json:"counts" doc:"number of findings by site, bundle, topic and status"`
	Listed   string         `json:"listed" doc:"which findings are listed"`
	Findings []Finding      `json:"findings"`
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
	Kind      string   `json:"kind" doc:"law, guidance, practice or company"`
	CheckedOn string   `json:"checked_on" doc:"day on which it was last held against the text"`
	Cautions  []string `json:"cautions"`
}

// Input is one file of the ledger: rows read = accepted + rejected.
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
