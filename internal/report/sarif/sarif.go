// Package sarif writes a report as a SARIF 2.1.0 log, for programs that collect and show the results of
// checks, such as the code scanning of a repository that holds the records.
//
// A duty is a rule, a finding a result. How a status is told:
//
//	gap       kind fail, level error if the duty is major, warning if it is minor
//	late      kind fail, level note: something was wrong and cannot be mended
//	unproven  kind open: there was not enough to decide
//	opinion   kind review: a person has to decide
//	due       kind informational: nothing is wrong yet, and there is nothing to review
//	lifted    kind notApplicable
//	met       kind pass
//
// All but fail have the level none, as the standard asks. A finding that the employer has accepted keeps its
// kind and level and has an accepted suppression.
package sarif

import (
	"bufio"
	"bytes"
	"encoding/json"
	"fmt"
	"io"

	"hearduty/internal/finding"
)

// Format writes SARIF.
type Format struct{}

// Name gives the name of the form.
func (Format) Name() string { return "sarif" }

// Write writes the report. The results are written one by one, so that a large report needs little memory.
func (Format) Write(w io.Writer, r *finding.Report) error {
	c := newConversion(r)
	out := bufio.NewWriter(w)
	head, err := marshal(log{
		Schema:  "https://docs.oasis-open.org/sarif/sarif/v2.1.0/errata01/os/schemas/sarif-schema-2.1.0.json",
		Version: "2.1.0", Runs: []run{c.run()},
	}, "")
	if err != nil {
		return err
	}
	const last = "[]\n    }\n  ]\n}" // the results are the last key of the only run
	if !bytes.HasSuffix(head, []byte(last)) {
		return fmt.Errorf("the results are not the last key of a run")
	}
	out.Write(head[:len(head)-len(last)])
	before, end := "[\n        ", "[]"
	for i := range r.Findings {
		text, err := marshal(c.result(&r.Findings[i]), "        ")
		if err != nil {
			return err
		}
		out.WriteString(before)
		out.Write(text)
		before, end = ",\n        ", "\n      ]"
	}
	out.WriteString(end + last[len("[]"):] + "\n")
	return out.Flush()
}

func marshal(v any, prefix string) ([]byte, error) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent(prefix, "  ")
	err := e.Encode(v)
	return bytes.TrimSuffix(b.Bytes(), []byte("\n")), err
}
