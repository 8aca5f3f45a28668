package bundle

import (
	"errors"
	"fmt"
	"maps"
	"path"
	"slices"

	"hearduty/internal/calendar"
	"hearduty/internal/diag"
	"hearduty/internal/dossier"
)

// checkData checks what a schema cannot: that periods of parameters follow each other, and that names
// used in the measures exist.
func (b *Bundle) checkData(dir string, problems *diag.List) {
	file := path.Join(dir, "parameters", "data.yaml")
	for _, name := range slices.Sorted(maps.Keys(b.Parameters)) {
		p := b.Parameters[name]
		for i := range p.Values {
			if err := p.Values[i].prepare(p.Unit); err != nil {
				problems.Errorf(diag.Position{File: file, Field: name}, "Correct the value", "the parameter %s: %v", name, err)
			}
		}
		for i := 1; i < len(p.Values); i++ {
			before, v := &p.Values[i-1], &p.Values[i]
			if v.from <= before.from || before.to > v.from {
				problems.Errorf(diag.Position{File: file, Field: name}, "List the values by date, each ending before the next begins",
					"the parameter %s has two values on %s", name, v.from)
			}
			if !before.to.Known() {
				before.to = v.from
			}
		}
	}
	b.checkMeasures(path.Join(dir, "measures", "data.yaml"), problems)
	for name, c := range b.Choices {
		if !slices.Contains(c.Values, c.Default) {
			problems.Errorf(diag.Position{File: path.Join(dir, "choices", "data.yaml"), Field: name}, "Take the default from the values",
				"the default of the choice %s is not among its values", name)
		}
	}
}

func (b *Bundle) checkMeasures(file string, problems *diag.List) {
	at := diag.Position{File: file}
	needParameter := func(name, where string) {
		if _, ok := b.Parameters[name]; name != "" && !ok {
			problems.Errorf(at, nearRemedy(name, slices.Collect(maps.Keys(b.Parameters))), "%s names the parameter %q, which the bundle does not have", where, name)
		}
	}
	m := b.Measures
	if m.WorkingDays != nil {
		week, err := m.WorkingDays.Week()
		if err != nil {
			problems.Errorf(at, "Write such as saturday, and days as YYYY-MM-DD", "working_days: %v", err)
		}
		b.Week = week
	}
	for _, name := range slices.Sorted(maps.Keys(m.Exposure.Levels)) {
		level := m.Exposure.Levels[name]
		if len(level.Any) > 0 {
			b.checkAny(name, level, at, problems)
			continue
		}
		if i := level.Instead; i != nil {
			if _, ok := m.Exposure.Channels[i.Channel]; !ok {
				problems.Errorf(at, "Name one of the channels", "the level %s names the channel %q, which the measures do not have", name, i.Channel)
			}
			if _, ok := b.Choices[i.Choice]; !ok {
				problems.Errorf(at, "Name one of the choices", "the level %s names the choice %q, which the bundle does not have", name, i.Choice)
			}
		}
		if _, ok := m.Exposure.Channels[level.Channel]; !ok {
			problems.Errorf(at, "Name one of the channels", "the level %s names the channel %q, which the measures do not have", name, level.Channel)
		}
		if (level.AtLeast == "") == (level.Above == "") {
			problems.Errorf(at, "Give exactly one of the two", "the level %s needs either at_least or above", name)
		}
		needParameter(level.AtLeast, "the level "+name)
		needParameter(level.Above, "the level "+name)
	}
	if _, ok := m.Exposure.Levels[m.Exposure.Enrols]; !ok {
		problems.Errorf(at, "Name one of the levels", "enrols names the level %q, which the measures do not have", m.Exposure.Enrols)
	}
	for _, name := range slices.Sorted(maps.Keys(m.Exposure.Channels)) {
		if err := checkChannel(m.Exposure.Channels[name]); err != nil {
			problems.Errorf(at, "Correct the channel", "the channel %s %v", name, err)
		}
	}
	if m.Exposure.Several == "sampled" && m.Exposure.Strategy == "" {
		problems.Errorf(at, "Give exposure.strategy: job or full_day", "exposure takes several results by sampling and names no strategy")
	}
	for _, class := range slices.Sorted(maps.Keys(m.Exposure.Margins)) {
		needParameter(m.Exposure.Margins[class], "margins."+class)
	}
	for _, p := range checkSchemes(&m.Hearing) {
		problems.Errorf(at, "Correct hearing in the measures", "%s", p)
	}
	for _, s := range m.Hearing.Others {
		needParameter(s.Parameter(), "hearing.others."+s.Name)
	}
	for _, name := range []string{m.Documents.PostedFor, m.Documents.Every, m.Documents.Short} {
		needParameter(name, "documents")
	}
	if kind := m.Documents.Periodic; kind != "" && !slices.Contains(dossier.DocumentKinds(), kind) {
		problems.Errorf(at, nearRemedy(kind, dossier.DocumentKinds()), "documents.periodic names %q, which is no kind of document", kind)
	}
	needParameter(m.Protection.RealWorld, "protection")
	needParameter(m.Protection.Bands, "protection")
	for _, kind := range slices.Sorted(maps.Keys(m.Protection.RealWorldByType)) {
		needParameter(m.Protection.RealWorldByType[kind], "protection.real_world_by_type."+kind)
	}
	if _, ok := m.Exposure.Channels[m.Protection.Channel]; !ok && (m.Protection.Channel != "" || m.Protection.Rating != "") {
		problems.Errorf(at, "Name one of the channels", "protection names the channel %q, which the measures do not have", m.Protection.Channel)
	}
	needParameter(m.Hearing.Shift.Parameter(), "hearing.shift")
	needParameter(m.Hearing.Shift.Retest, "hearing.shift")
	if r := m.Hearing.Recordable; r != nil {
		needParameter(r.AtLeast, "hearing.recordable")
	}
	if a := m.Hearing.AgeCorrection; a != nil {
		if _, ok := b.Choices[a.Choice]; !ok {
			problems.Errorf(at, "Name one of the choices", "age_correction names the choice %q, which the bundle does not have", a.Choice)
		}
	}
}

// checkAny checks a level of several parts: each is a level without parts, the first on a channel of doses or levels.
func (b *Bundle) checkAny(name string, level dossier.Threshold, at diag.Position, problems *diag.List) {
	levels := b.Measures.Exposure.Levels
	if level.Channel != "" || level.AtLeast != "" || level.Above != "" || level.Instead != nil {
		problems.Errorf(at, "Keep any alone", "the level %s has any and names a channel or parameter as well", name)
	}
	for i, part := range level.Any {
		p, ok := levels[part]
		switch {
		case !ok:
			problems.Errorf(at, nearRemedy(part, slices.Collect(maps.Keys(levels))), "the level %s names the level %q, which the measures do not have", name, part)
		case len(p.Any) > 0:
			problems.Errorf(at, "Name its parts", "the level %s names %s, which has parts itself", name, part)
		case i == 0 && b.Measures.Exposure.Channels[p.Channel].Kind == dossier.HighestChannel:
			problems.Errorf(at, "Name a level on a channel of doses or levels first", "the level %s begins with %s, which is on a channel of the highest value", name, part)
		}
	}
}

// checkChannel checks that a channel has what its kind needs, and nothing of the other kind.
func checkChannel(c dossier.Channel) error {
	if (c.Kind == dossier.HighestChannel) != (c.Of != "") {
		return errors.New("has a figure in of, or is of the highest value, but not both")
	}
	if c.Kind == dossier.HighestChannel {
		if c.CriterionDB != 0 || c.ExchangeDB != 0 || c.ThresholdDB != 0 || c.UpperDB != 0 || c.Weekly {
			return errors.New("takes the highest value of a figure and has no criterion_db, exchange_db, threshold_db, upper_db or weekly")
		}
		return nil
	}
	if c.Kind == dossier.LevelChannel {
		if c.CriterionDB != 0 || c.ExchangeDB != 0 || c.ThresholdDB != 0 || c.UpperDB != 0 {
			return errors.New("is a level and has no criterion_db, exchange_db, threshold_db or upper_db")
		}
		return nil
	}
	if c.CriterionDB <= 0 || c.ExchangeDB <= 0 {
		return errors.New("is a dose and needs criterion_db and exchange_db")
	}
	if c.Weekly {
		return errors.New("is a dose and has no weekly")
	}
	return nil
}

// checkParagraphs checks that every duty answers a paragraph and every paragraph is accounted for once.
func (b *Bundle) checkParagraphs(dir string, problems *diag.List) {
	at := diag.Position{File: path.Join(dir, "paragraphs", "data.yaml")}
	checked := map[string]bool{}
	for _, name := range slices.Sorted(maps.Keys(b.Paragraphs)) {
		p := b.Paragraphs[name]
		ways := 0
		for _, given := range []bool{len(p.Checked) > 0, p.Attested != "", p.Outside != ""} {
			if given {
				ways++
			}
		}
		if ways == 0 {
			problems.Errorf(at, "Say by which duty it is checked, by which document attested, or why it is outside", "the paragraph %s is not accounted for", name)
		}
		for _, id := range p.Checked {
			checked[id] = true
			if _, ok := b.Duty(id); !ok {
				problems.Errorf(at, nearRemedy(id, b.dutyIDs()), "the paragraph %s is checked by %q, which is no duty of the bundle", name, id)
			}
		}
	}
	for _, d := range b.Duties {
		if !checked[d.ID] {
			problems.Errorf(at, "Name the duty under its paragraph", "no paragraph says that it is checked by the duty %s", d.ID)
		}
	}
}

func (b *Bundle) dutyIDs() []string {
	ids := make([]string, len(b.Duties))
	for i, d := range b.Duties {
		ids[i] = d.ID
	}
	return ids
}

func nearRemedy(name string, known []string) string {
	slices.Sort(known)
	if near := diag.Near(name, known); near != "" {
		return fmt.Sprintf("Did you mean %q?", near)
	}
	return "Correct the name, or add it to the bundle"
}

// prepare reads the dates and the value once.
func (v *Value) prepare(unit string) (err error) {
	if v.from, err = calendar.Parse(v.From); err != nil {
		return err
	}
	if v.To != "" {
		if v.to, err = calendar.Parse(v.To); err != nil {
			return err
		}
		if v.to <= v.from {
			return fmt.Errorf("a value ends on %s, before it begins", v.To)
		}
	}
	switch value := v.Value.(type) {
	case float64:
		v.number, v.kind = value, numberValue
	case map[string]any:
		if err := remarshal(value, &v.interval); err != nil {
			return err
		}
		v.kind = intervalValue
	case []any:
		v.kind = wordsValue
	default:
		return fmt.Errorf("%v is neither a number, an interval nor a list", value)
	}
	v.fact = map[string]any{"value": v.Plain(), "cite": v.Cite, "seen": v.Seen, "from": v.From}
	if unit != "" {
		v.fact["unit"] = unit
	}
	return nil
}
