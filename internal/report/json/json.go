// Package json writes a report as one JSON object, for programs. Its schema is report.schema.json.
package json

import (
	"bufio"
	"bytes"
	"encoding/json"
	"fmt"
	"io"

	"hearduty/internal/finding"
)

// Format writes JSON.
type Format struct{}

// Name gives the name of the form.
func (Format) Name() string { return "json" }

// Write writes the report. Empty lists are [], never null, and keys have always the same order. The
// observations and findings are written one by one, so that a large report needs little memory.
func (Format) Write(w io.Writer, r *finding.Report) error {
	out := bufio.NewWriter(w)
	head, err := marshal(withoutFindings(r), "")
	if err != nil {
		return err
	}
	const last = "[],\n  \"findings\": []\n}" // the observations and the findings are the last keys
	if !bytes.HasSuffix(head, []byte(last)) {
		return fmt.Errorf("the observations and findings are not the last keys of a report")
	}
	out.Write(head[:len(head)-len(last)])
	if err := each(out, r.Observations, func(o finding.Observation) any { return o }); err != nil {
		return err
	}
	out.WriteString(",\n  \"findings\": ")
	if err := each(out, r.Findings, func(f finding.Finding) any { return complete(f) }); err != nil {
		return err
	}
	out.WriteString("\n}\n")
	return out.Flush()
}

// each writes a list, an element at a time.
func each[T any](out *bufio.Writer, list []T, shown func(T) any) error {
	for i := range list {
		text, err := marshal(shown(list[i]), "    ")
		if err != nil {
			return err
		}
		out.WriteString([]string{"[\n    ", ",\n    "}[min(i, 1)])
		out.Write(text)
	}
	out.WriteString([]string{"[]", "\n  ]"}[min(len(list), 1)])
	return nil
}

func marshal(v any, prefix string) ([]byte, error) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent(prefix, "  ")
	err := e.Encode(v)
	return bytes.TrimSuffix(b.Bytes(), []byte("\n")), err
}

// withoutFindings copies the report with no list null and no finding.
func withoutFindings(r *finding.Report) *finding.Report {
	c := *r
	c.Findings, c.Observations, c.ObservationCounts = []finding.Finding{}, []finding.Observation{}, list(c.ObservationCounts)
	c.Cautions, c.Remarks = list(c.Cautions), list(c.Remarks)
	c.Inputs, c.Rejects, c.Counts = list(c.Inputs), list(c.Rejects), list(c.Counts)
	if c.Totals == nil {
		c.Totals = map[finding.Status]int{}
	}
	c.Sites, c.Bundles = append([]finding.Site{}, c.Sites...), append([]finding.Bundle{}, c.Bundles...)
	for i := range c.Sites {
		c.Sites[i].Bundles = list(c.Sites[i].Bundles)
		c.Sites[i].Choices = dictionary(c.Sites[i].Choices)
	}
	for i := range c.Bundles {
		c.Bundles[i].Cautions = list(c.Bundles[i].Cautions)
	}
	return &c
}

func complete(f finding.Finding) finding.Finding {
	f.Facts, f.Evidence = dictionary(f.Facts), list(f.Evidence)
	return f
}

func list[T any](l []T) []T {
	if l == nil {
		return []T{}
	}
	return l
}

func dictionary(m map[string]any) map[string]any {
	if m == nil {
		return map[string]any{}
	}
	return m
}
