package judge

import (
	"fmt"
	"maps"
	"math"
	"slices"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
)

// outcome is one settled obligation, or one period of a recurring one.
type outcome struct {
	status  finding.Status
	key     string
	due     calendar.Date
	done    calendar.Date
	refs    []string // records it rests on
	params  []used   // parameters that decided
	facts   map[string]any
	message string
	cite    string // where it is not the duty's own
}

// used is a parameter's value in force on a day.
type used struct {
	name  string
	value *bundle.Value
	unit  string
}

// settler settles the obligations of one dossier.
type settler struct {
	bundle *bundle.Bundle
	duty   *bundle.Duty // whose obligations are settled; nil if it is not known
	file   *dossier.File
	asOf   calendar.Date
	brief  func(*outcome) bool // whether an outcome is only counted, so that it needs no words; nil for never
}

// settle decides an obligation by date and clock. It gives no outcome for an obligation that has ended
// with its spell or with the time for which it lasts, and several for a recurring one.
func (s *settler) settle(o *obligation) []outcome {
	switch o.shape {
	case once:
		return s.once(o)
	case recurring:
		return s.recurring(o)
	case limit:
		return []outcome{s.limit(o)}
	case condition:
		return s.condition(o)
	case opinion:
		return []outcome{s.opinion(o)}
	}
	return []outcome{{status: finding.Lifted, key: o.keyOr(o.on), refs: o.because, message: sentence(o.reason), cite: o.cite}}
}

func (o *obligation) keyOr(day calendar.Date) string {
	if o.key != "" {
		return o.key
	}
	return day.String()
}

// unproven is the outcome of an obligation that the records cannot decide.
func unproven(o *obligation, key string, missing ...string) outcome {
	return outcome{status: finding.Unproven, key: key, refs: o.because, message: joinSentences(o.note, cannotDecide(append(slices.Clone(o.missing), missing...)))}
}

// parameter gives the value of a parameter in force on a day.
func (s *settler) parameter(name string, day calendar.Date) (used, bool) {
	p, ok := s.bundle.Parameters[name]
	if !ok {
		return used{name: name}, false
	}
	v, ok := p.At(day)
	return used{name, v, p.Unit}, ok
}

// deadline gives the last day of an interval that starts on a day.
func (s *settler) deadline(name string, start calendar.Date) (calendar.Date, used, string) {
	u, ok := s.parameter(name, start)
	if !ok {
		return 0, u, fmt.Sprintf("a value of %s in force on %s", words(name), start)
	}
	interval, ok := u.value.Interval()
	if !ok {
		return 0, u, fmt.Sprintf("an interval as the value of %s", words(name))
	}
	day, err := interval.After(start, s.bundle.Week)
	if err != nil {
		return 0, u, err.Error()
	}
	return day, u, ""
}

func (s *settler) once(o *obligation) []outcome {
	if o.backwards {
		return s.beforehand(o)
	}
	key := o.keyOr(o.after)
	done := o.by
	if o.series != nil {
		done = s.first(o.series, o.after)
	}
	if !o.after.Known() {
		return []outcome{unproven(o, key, orElse(o.missing, "the day on which the time begins")...)}
	}
	out := outcome{key: key, refs: o.because}
	if done != nil {
		out.done, out.refs = done.Date, append(slices.Clone(o.because), done.Ref)
	}
	if o.within == "" {
		out.status = finding.Gap
		if done != nil {
			out.status = finding.Met
		}
		out.message = s.clockMessage(o, &out)
		return []outcome{out}
	}
	due, u, problem := s.deadline(o.within, o.after)
	if problem != "" {
		return []outcome{unproven(o, key, problem)}
	}
	if o.noLater.Known() && o.noLater < due {
		due = max(o.noLater, o.after)
	}
	out.due, out.params = due, []used{u}
	if done == nil { // what is done is measured by the law's own time
		out.due = max(due, o.noSooner)
	}
	switch {
	case done != nil && done.Date <= out.due:
		out.status = finding.Met
	case o.during != nil && o.during.To.Known() && out.due >= o.during.To:
		return nil // the obligation has ended with its spell
	case done != nil:
		out.status = finding.Late
	case s.asOf <= out.due:
		out.status = finding.Due
	default:
		out.status = finding.Gap
	}
	if !s.isBrief(&out) {
		out.facts = map[string]any{"counted_from": o.after.String()}
		if out.due > due {
			out.facts["not_due_before"] = o.noSooner.String()
		}
	}
	out.message = s.clockMessage(o, &out)
	return []outcome{out}
}

// orElse gives extra words only where the rule itself gives none.
func orElse(given []string, word string) []string {
	if len(given) > 0 {
		return nil
	}
	return []string{word}
}

// first gives the earliest record of several series since a day; of a lasting series, also from before it.
func (s *settler) first(series []string, since calendar.Date) *dossier.Link {
	var found *dossier.Link
	for _, name := range series {
		for i := range s.file.Series[name] {
			l := &s.file.Series[name][i]
			if (l.Date >= since || slices.Contains(dossier.Lasting, name)) && (found == nil || l.Date < found.Date) {
				found = l
			}
		}
	}
	return found
}

// next gives the earliest record of several series after a day and before the end of a spell.
func (s *settler) next(series []string, after calendar.Date, during *calendar.Spell) *dossier.Link {
	var found *dossier.Link
	for _, name := range series {
		for i := range s.file.Series[name] {
			l := &s.file.Series[name][i]
			if l.Date > after && during.Contains(l.Date) && (found == nil || l.Date < found.Date) {
				found = l
			}
		}
	}
	return found
}

// recurring settles an obligation period by period. The clock starts with the spell and starts again with
// each fulfilment.
func (s *settler) recurring(o *obligation) []outcome {
	var out []outcome
	start, interval := o.during.From, o.every
	if o.first != "" {
		interval = o.first
	}
	var last string
	change, problem := s.changes(o)
	if problem != "" {
		return append(out, unproven(o, o.keyOr(start), problem))
	}
	for {
		if change.Known() && start >= change && (o.first == "" || last != "") {
			interval = o.then
		}
		key := start.String()
		if o.key != "" {
			key = o.key + "/" + key
		}
		due, u, problem := s.deadline(interval, start)
		if problem != "" {
			return append(out, unproven(o, key, problem))
		}
		now := outcome{key: key, due: due, refs: slices.Clone(o.because), params: []used{u}}
		if last != "" {
			now.refs = append(now.refs, last)
		}
		done := s.next(o.series, start, o.during)
		if done != nil {
			now.done, now.refs = done.Date, append(now.refs, done.Ref)
		}
		switch {
		case done != nil && done.Date <= due:
			now.status = finding.Met
		case done != nil:
			now.status = finding.Late
		case o.during.To.Known() && due >= o.during.To:
			return out // the obligation has ended with its spell
		case s.asOf <= due:
			now.status = finding.Due
		default:
			now.status = finding.Gap
		}
		if !s.isBrief(&now) {
			now.facts = map[string]any{"counted_from": start.String()}
		}
		s.touch(o, &now)
		now.message = s.clockMessage(o, &now)
		out = append(out, now)
		if done == nil {
			return out
		}
		start, interval, last = done.Date, o.every, done.Ref
	}
}

// touch counts the uses after a missed deadline and before the fulfilment.
func (s *settler) touch(o *obligation, out *outcome) {
	if o.touches == "" || out.status != finding.Late && out.status != finding.Gap {
		return
	}
	tests, days := 0, 0
	for _, u := range s.file.Uses {
		if u.Date > out.due && (!out.done.Known() || u.Date < out.done) {
			tests += u.Tests
			days++
		}
	}
	if out.facts == nil {
		out.facts = map[string]any{}
	}
	out.facts["tests_touched"], out.facts["days_touched"] = tests, days
}

// tolerance absorbs the rounding of binary arithmetic in values that were worked out, in their own unit.
const tolerance = 1e-9

func (s *settler) limit(o *obligation) outcome {
	day := o.on
	if !day.Known() {
		day = s.asOf
	}
	key := o.keyOr(o.on)
	u, ok := s.parameter(o.parameter, day)
	if !ok {
		return unproven(o, key, fmt.Sprintf("a value of %s in force on %s", words(o.parameter), day))
	}
	bound, ok := u.value.Number()
	if !ok {
		return unproven(o, key, fmt.Sprintf("a number as the value of %s", words(o.parameter)))
	}
	if !o.valued || math.IsNaN(o.value) {
		out := unproven(o, key, orElse(o.missing, "the value to be compared with "+words(o.parameter))...)
		out.params = []used{u}
		return out
	}
	out := outcome{status: finding.Gap, key: key, refs: o.because, params: []used{u}}
	if within(o.value, o.compare, bound) {
		out.status = finding.Met
	}
	if s.isBrief(&out) {
		return out
	}
	out.facts = map[string]any{"value": o.value}
	out.message = sentence(s.limitWords(o, u, bound))
	if o.note != "" {
		out.message = sentence(o.note + ": " + s.limitWords(o, u, bound))
	}
	return out
}

// within says whether a value keeps a limit.
func within(value float64, compare string, bound float64) bool {
	switch compare {
	case "at_most":
		return value <= bound+tolerance
	case "below":
		return value < bound-tolerance
	case "at_least":
		return value >= bound-tolerance
	}
	return value > bound+tolerance
}

func (s *settler) condition(o *obligation) []outcome {
	key := o.keyOr(o.on)
	out := outcome{key: key, refs: o.because}
	if o.lasts != "" && o.on.Known() {
		end, u, problem := s.deadline(o.lasts, o.on)
		if problem != "" {
			return []outcome{unproven(o, key, problem)}
		}
		if s.asOf > end {
			return nil // the time for which it lasts is over
		}
		out.params = []used{u}
	}
	if o.holds == nil {
		u := unproven(o, key)
		u.params = out.params
		return []outcome{u}
	}
	out.status = finding.Gap
	if *o.holds {
		out.status = finding.Met
	}
	if s.isBrief(&out) {
		return []outcome{out}
	}
	if out.message = joinSentences(o.note); out.message == "" {
		out.message = map[bool]string{true: "Fulfilled.", false: "Not fulfilled."}[*o.holds]
	}
	return []outcome{out}
}

func (s *settler) opinion(o *obligation) outcome {
	out := outcome{status: finding.Opinion, key: o.keyOr(o.on), refs: o.because}
	if o.by != nil {
		out.status, out.done, out.refs = finding.Met, o.by.Date, append(slices.Clone(o.because), o.by.Ref)
		out.message = joinSentences(o.note, fmt.Sprintf("Answered on %s", o.by.Date))
		return out
	}
	out.message = joinSentences(o.note, fmt.Sprintf("Needs a professional's judgement (%s): %s", o.of, o.ask))
	return out
}

// parameterFacts writes the parameters that decided an outcome, each with its citation and mark.
func (out *outcome) parameterFacts(facts map[string]any) {
	for _, u := range out.params {
		if u.value != nil {
			facts[u.name] = u.value.Fact()
		}
	}
	maps.Copy(facts, out.facts)
}

func (s *settler) isBrief(out *outcome) bool { return s.brief != nil && s.brief(out) }
