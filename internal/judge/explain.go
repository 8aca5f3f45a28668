package judge

import (
	"context"
	"encoding/json"
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/record"
)

// Explanation is one finding with everything that it came from.
type Explanation struct {
	Finding     finding.Finding
	Duty        *bundle.Duty
	Bundle      *bundle.Bundle
	Parameters  []UsedParameter // in order of use
	Records     []ShownRecord   // in the order of the evidence
	Obligation  string          // what the rule returned, as JSON; without audiometric figures unless asked for
	Withheld    bool            // whether audiometric figures were left out
	AsOf        calendar.Date
	ProgramName string
}

// UsedParameter is a parameter that decided a finding.
type UsedParameter struct {
	Name, About, Unit, Value, Cite, Seen, From string
}

// ShownRecord is a record as it stands in the input. Thresholds and birth dates are left out unless
// audiometric figures were asked for.
type ShownRecord struct {
	Evidence finding.Evidence
	Fields   [][2]string // name and text of the fields that are present
}

// explained is a finding that fits the id asked for.
type explained struct {
	finding     finding.Finding
	explanation *Explanation
}

// Explain judges the program again and shows how one finding came about. The id may be shortened to its
// beginning, as long as one finding alone has it. It returns ErrNoFinding if none has.
func Explain(ctx context.Context, o Options, id string) (*Explanation, error) {
	o.All, o.keepRecords = true, true
	c, err := newCheck(ctx, o)
	if err != nil {
		return nil, err
	}
	defer c.store.Close()
	c.wanted = id
	if err := c.judgeAll(ctx); err != nil {
		return nil, err
	}
	c.explainAccepted()
	switch len(c.found) {
	case 0:
		return nil, fmt.Errorf("%s: %w", id, ErrNoFinding)
	case 1:
		return c.found[0].explanation, nil
	}
	var ids []string
	for _, f := range c.found {
		ids = append(ids, f.finding.ID)
	}
	slices.Sort(ids)
	return nil, fmt.Errorf("%d findings begin with %s: %s; write more of the id", len(ids), id, strings.Join(ids[:min(5, len(ids))], ", "))
}

// explain keeps an outcome with what it came from, if its finding has the id asked for.
func (k *keeper) explain(d *bundle.Duty, x outcome, o *obligation, key string) {
	f := k.finding(d, x, o, key)
	if !strings.HasPrefix(f.ID, k.check.wanted) {
		return
	}
	e := &Explanation{Finding: f, Duty: d, Bundle: k.bench.bundle, AsOf: k.check.AsOf, ProgramName: k.check.Program.Title}
	for _, u := range x.params {
		if u.value != nil {
			e.Parameters = append(e.Parameters, usedParameter(k.bench.bundle, u))
		}
	}
	for _, ev := range f.Evidence {
		shown := ShownRecord{Evidence: ev}
		if rec, ok := k.record(ev.Record); ok {
			shown.Fields = fieldsOf(rec, k.check.HealthDetail)
		}
		e.Records = append(e.Records, shown)
	}
	if o != nil && o.returned != nil {
		e.Obligation = obligationText(o, k.check.HealthDetail)
		e.Withheld = o.health != nil && !k.check.HealthDetail
	}
	k.check.foundMu.Lock()
	defer k.check.foundMu.Unlock()
	k.check.found = append(k.check.found, explained{f, e})
}

// private says whether a field holds what only those may see who asked for audiometric figures.
func private(f *record.Field) bool {
	return f.Type == record.Hearing || f.Name == "birth_date" || strings.HasSuffix(f.Name, ".stated_shift")
}

// fieldsOf lists the fields of a record that are present.
func fieldsOf(rec record.Record, health bool) [][2]string {
	t, _ := record.TableOf(rec.Kind())
	var out [][2]string
	for i, f := range t.Fields {
		if private(&f) && !health {
			continue
		}
		if text := t.Text(rec, i); text != "" {
			out = append(out, [2]string{f.Name, text})
		}
	}
	return out
}

func obligationText(o *obligation, health bool) string {
	m := plain(o.returned)
	if !health {
		delete(m, "health")
	}
	text, err := json.MarshalIndent(m, "", "  ")
	if err != nil {
		return ""
	}
	return string(text)
}
