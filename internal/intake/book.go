package intake

import (
	"encoding/json"
	"io"

	"hearduty/internal/diag"
)

// Book is the form of the ledger as JSON. Its JSON Schema is generated from here.
type Book struct {
	Program      string        `json:"program" doc:"title of the program"`
	Inputs       []Input       `json:"inputs" doc:"the tables read and what became of their rows"`
	Unreadable   []Remark      `json:"unreadable" doc:"files that were refused as a whole or from some place on"`
	Rejects      []Reject      `json:"rejects" doc:"rows that could not become records"`
	Remarks      []Remark      `json:"remarks" doc:"what somebody should look at; the rows were read nevertheless"`
	Observations []Observation `json:"observations" doc:"accepted rows that contradict each other or themselves"`
}

// Remark is something to say about a place.
type Remark struct {
	File    string `json:"file,omitempty" doc:"path as the program file has it"`
	Sheet   string `json:"sheet,omitempty" doc:"sheet of a workbook"`
	Line    int    `json:"line,omitempty" doc:"line of the file, or row of the sheet"`
	Column  int    `json:"column,omitempty" doc:"column in characters, from 1"`
	Field   string `json:"field,omitempty" doc:"name of the field or key"`
	Problem string `json:"problem" doc:"what is wrong or odd, in one sentence"`
	Remedy  string `json:"remedy,omitempty" doc:"what to do about it, in one sentence"`
}

// WriteBook writes the ledger as JSON, for the program of that title. Thresholds and birth dates are left out.
func (l *Ledger) WriteBook(w io.Writer, title string) error {
	out := json.NewEncoder(w)
	out.SetEscapeHTML(false)
	out.SetIndent("", "  ")
	return out.Encode(Book{
		Program: title, Inputs: some(l.Inputs), Rejects: some(l.Shown()), Observations: some(l.Observations),
		Unreadable: remarksOf(l.Unreadable), Remarks: remarksOf(l.Remarks),
	})
}

func remarksOf(list diag.List) []Remark {
	out := make([]Remark, 0, len(list))
	for _, d := range list {
		at := d.Position
		out = append(out, Remark{at.File, at.Sheet, at.Line, at.Column, at.Field, d.Problem, d.Remedy})
	}
	return out
}

// some gives a list that is not null.
func some[T any](list []T) []T {
	if list == nil {
		return []T{}
	}
	return list
}
