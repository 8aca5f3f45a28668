package judge

import (
	"fmt"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/bundle"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
)

// figures say what a channel of the highest value takes.
var figures = map[string]string{
	dossier.PeakDBC:    "the highest C-weighted peak",
	dossier.PeakDBZ:    "the highest unweighted peak",
	dossier.MaxDBA:     "the highest continuous level, A-weighted, slow",
	dossier.MaxDBCFast: "the highest level of impact noise, C-weighted, fast",
	dossier.ImpulseDBZ: "the highest level of impact noise by an unweighted impulse detector",
}

// takenBy says how exposure is taken on a channel.
func takenBy(ch dossier.Channel) string {
	switch ch.Kind {
	case dossier.HighestChannel:
		return figures[ch.Of]
	case dossier.LevelChannel:
		span := "day"
		if ch.Weekly {
			span = "week"
		}
		return "the level of the " + span + " by equal energy (3 dB exchange rate), A-weighted"
	}
	text := fmt.Sprintf("a dose with criterion level %s dBA, %s dB exchange rate", short(ch.CriterionDB), short(ch.ExchangeDB))
	if ch.ThresholdDB > 0 {
		text += fmt.Sprintf(", from %s dBA on", short(ch.ThresholdDB))
	}
	if ch.UpperDB > 0 {
		text += fmt.Sprintf(", up to %s dBA", short(ch.UpperDB))
	}
	if len(ch.Durations) > 0 {
		text += ", of tasks by the printed table of permitted times"
	}
	return text
}

// partsOf gives the levels of which a level consists: itself, or those of which one is enough.
func partsOf(m *dossier.ExposureMeasures, level string) []string {
	if any := m.Levels[level].Any; len(any) > 0 {
		return any
	}
	return []string{level}
}

// channelsOf gives the channels on which a level is taken, by name and in words.
func (b *bench) channelsOf(level string) (channels, words string) {
	m := &b.bundle.Measures.Exposure
	var names, texts []string
	for _, part := range partsOf(m, level) {
		t := m.Levels[part]
		name := t.Channel
		if t.Instead != nil && b.builder.Choices[t.Instead.Choice] == true {
			name = t.Instead.Channel
		}
		if !slices.Contains(names, name) {
			names, texts = append(names, name), append(texts, takenBy(m.Channels[name]))
		}
	}
	return strings.Join(names, "+"), strings.Join(texts, "; or ")
}

// wholeLevels lists the levels that are no mere part of another, the one that enrols first.
func wholeLevels(m *dossier.ExposureMeasures) []string {
	parts := map[string]bool{}
	for _, t := range m.Levels {
		for _, part := range t.Any {
			parts[part] = true
		}
	}
	names := []string{m.Enrols}
	for _, name := range slices.Sorted(maps.Keys(m.Levels)) {
		if name != m.Enrols && !parts[name] {
			names = append(names, name)
		}
	}
	return names
}

// levels lists the exposure levels of all bundles.
func (c *check) levels() []finding.SwitchLevel {
	var out []finding.SwitchLevel
	for _, b := range c.used {
		m := &b.Measures.Exposure
		for _, name := range wholeLevels(m) {
			l := finding.SwitchLevel{Bundle: b.ID, Name: name, Enrols: name == m.Enrols, Parts: []finding.SwitchPart{}}
			for _, part := range partsOf(m, name) {
				l.Parts = append(l.Parts, c.part(b, part))
			}
			out = append(out, l)
		}
	}
	return out
}

// part writes one part of a level.
func (c *check) part(b *bundle.Bundle, name string) finding.SwitchPart {
	m := &b.Measures.Exposure
	t := m.Levels[name]
	p := finding.SwitchPart{Parameter: t.AtLeast + t.Above, Taken: takenBy(m.Channels[t.Channel])}
	if v, ok := b.Parameters[p.Parameter].At(c.AsOf); ok {
		relation := "at least"
		if t.Above != "" {
			relation = "more than"
		}
		p.Value, p.Cite, p.Seen = strings.TrimSpace(relation+" "+finding.Words(v.Plain())+" "+b.Parameters[p.Parameter].Unit), v.Cite, v.Seen
	}
	if t.Instead != nil {
		p.Taken += fmt.Sprintf(", or where the site has elected %s, %s", strings.ReplaceAll(t.Instead.Choice, "_", " "), takenBy(m.Channels[t.Instead.Channel]))
	}
	return p
}
