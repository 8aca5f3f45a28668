// Package ndjson writes a report as newline-delimited JSON, for programs that read findings one by one.
//
// Each line is an object with one key that says what it holds:
//
//	report       the report without its findings and observations; always the first line
//	finding      a listed finding, an object as in the form json
//	observation  a listed observation, an object as in the form json
//	end          how many findings and observations there are; always the last line
//
// A file without the last line was cut off.
package ndjson

import (
	"bufio"
	"bytes"
	"encoding/json"
	"fmt"
	"io"

	"hearduty/internal/finding"
	whole "hearduty/internal/report/json"
)

// Format writes newline-delimited JSON.
type Format struct{}

// Name gives the name of the form.
func (Format) Name() string { return "ndjson" }

// line is one line of the file; one of its keys is set.
type line struct {
	Report      json.RawMessage      `json:"report,omitempty"`
	Finding     *finding.Finding     `json:"finding,omitempty"`
	Observation *finding.Observation `json:"observation,omitempty"`
	End         *end                 `json:"end,omitempty"`
}

type end struct {
	Findings     int `json:"findings"`
	Observations int `json:"observations"`
}

// Write writes the report.
func (Format) Write(w io.Writer, r *finding.Report) error {
	head, err := headOf(r)
	if err != nil {
		return err
	}
	out := bufio.NewWriter(w)
	e := json.NewEncoder(out)
	e.SetEscapeHTML(false)
	if err := e.Encode(line{Report: head}); err != nil {
		return err
	}
	for _, f := range r.Findings {
		if f.Facts == nil {
			f.Facts = map[string]any{}
		}
		if f.Evidence == nil {
			f.Evidence = []finding.Evidence{}
		}
		if err := e.Encode(line{Finding: &f}); err != nil {
			return err
		}
	}
	for i := range r.Observations {
		if err := e.Encode(line{Observation: &r.Observations[i]}); err != nil {
			return err
		}
	}
	if err := e.Encode(line{End: &end{len(r.Findings), len(r.Observations)}}); err != nil {
		return err
	}
	return out.Flush()
}

// headOf gives the report as the form json writes it, on one line and without the lists that follow.
func headOf(r *finding.Report) (json.RawMessage, error) {
	head := *r
	head.Findings, head.Observations = nil, nil
	var indented, compact bytes.Buffer
	if err := (whole.Format{}).Write(&indented, &head); err != nil {
		return nil, err
	}
	if err := json.Compact(&compact, indented.Bytes()); err != nil {
		return nil, err
	}
	const last = `,"observations":[],"findings":[]}`
	start, ok := bytes.CutSuffix(compact.Bytes(), []byte(last))
	if !ok {
		return nil, fmt.Errorf("the observations and findings are not the last keys of a report")
	}
	return append(start, '}'), nil
}
