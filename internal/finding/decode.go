package finding

import (
	"bufio"
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"
	"unique"
)

// Decode reads a report that hearduty check --format json has written, without its observations and portraits. The
// error is a sentence without the name of the file and without a full stop; version is that of the program that reads.
func Decode(r io.Reader, version string) (*Report, error) {
	in := bufio.NewReaderSize(r, 1<<16)
	if mark, _ := in.Peek(3); string(mark) == "\ufeff" {
		in.Discard(3)
	}
	d := &decoding{Decoder: json.NewDecoder(in), head: map[string]json.RawMessage{}}
	d.DisallowUnknownFields()
	if err := d.all(); err != nil {
		return nil, d.refused(err, version)
	}
	if err := d.report.check(); err != nil {
		return nil, err
	}
	return &d.report, nil
}

var (
	errNoReport = errors.New("it is no report of hearduty as --format json writes it")
	errMore     = errors.New("something follows after the report; it is no report as --format json writes it")
)

// decoding reads a report key by key, and the findings one by one, so that a large one needs little memory.
type decoding struct {
	*json.Decoder
	head   map[string]json.RawMessage // all but the long lists
	report Report
}

func (d *decoding) all() error {
	if start, err := d.Token(); err != nil || start != json.Delim('{') {
		return errNoReport
	}
	for d.More() {
		key, err := d.Token()
		if err != nil {
			return err
		}
		switch name, _ := key.(string); name {
		case "findings":
			err = d.findings()
		case "observations", "portraits":
			var unread json.RawMessage
			err = d.Decode(&unread)
		default:
			var value json.RawMessage
			err = d.Decode(&value)
			d.head[name] = value
		}
		if err != nil {
			return err
		}
	}
	if _, err := d.Token(); err != nil {
		return err
	}
	if _, err := d.Token(); !errors.Is(err, io.EOF) {
		return errMore
	}
	return d.rest()
}

// rest reads what stands beside the findings.
func (d *decoding) rest() error {
	text, err := json.Marshal(d.head)
	if err != nil {
		return err
	}
	findings := d.report.Findings
	strict := json.NewDecoder(bytes.NewReader(text))
	strict.DisallowUnknownFields()
	err = strict.Decode(&d.report)
	d.report.Findings = findings
	return err
}

func (d *decoding) findings() error {
	if start, err := d.Token(); err != nil || start != json.Delim('[') {
		return errNoReport
	}
	known := map[string]map[string]any{}
	for d.More() {
		var f struct {
			Finding
			Facts json.RawMessage `json:"facts"`
		}
		if err := d.Decode(&f); err != nil {
			return err
		}
		facts, ok := known[string(f.Facts)]
		if !ok && len(f.Facts) > 0 {
			if err := json.Unmarshal(f.Facts, &facts); err != nil {
				return err
			}
			known[string(f.Facts)] = facts
		}
		f.Finding.Facts = facts
		f.share()
		d.report.Findings = append(d.report.Findings, f.Finding)
	}
	_, err := d.Token()
	return err
}

// share keeps one copy of the texts that many findings have. Facts are shared as they are read.
func (f *Finding) share() {
	for _, text := range []*string{&f.Site, &f.Bundle, &f.Duty, &f.Topic, &f.Subject.Kind, &f.Subject.ID, &f.Severity, &f.Message, &f.Cite, &f.Remedy} {
		*text = unique.Make(*text).Value()
	}
	for i := range f.Evidence {
		f.Evidence[i].File = unique.Make(f.Evidence[i].File).Value()
	}
}

// refused says why a text is no report of this version.
func (d *decoding) refused(err error, version string) error {
	var tool Tool
	if errors.Is(err, errMore) {
		return err
	}
	var syntax *json.SyntaxError
	if json.Unmarshal(d.head["tool"], &tool) != nil || tool.Name != "hearduty" || errors.As(err, &syntax) || errors.Is(err, io.ErrUnexpectedEOF) || errors.Is(err, io.EOF) {
		return errNoReport
	}
	what := strings.TrimPrefix(err.Error(), "json: ")
	if tool.Version != version {
		return fmt.Errorf("it was written by hearduty %s, and hearduty %s cannot read it (%s); compare with the newer of the two versions", tool.Version, version, what)
	}
	return fmt.Errorf("it does not fit the schema of reports (%s); write it again with --format json", what)
}

// check says what a report lacks for being one.
func (r *Report) check() error {
	switch {
	case r.Tool.Name != "hearduty":
		return errNoReport
	case !r.AsOf.Known() || r.Totals == nil || r.Listed == "":
		return errors.New("it lacks the day, the totals or the words that say what is listed; write it again with --format json")
	}
	seen := make(map[string]bool, len(r.Findings))
	for i := range r.Findings {
		f := &r.Findings[i]
		if f.ID == "" || seen[f.ID] || !slices.Contains(Statuses, f.Status) {
			return fmt.Errorf("finding %d has no id of its own or no status that hearduty knows; write the report again with --format json", i+1)
		}
		seen[f.ID] = true
	}
	return nil
}
