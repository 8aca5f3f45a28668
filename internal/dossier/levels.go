package dossier

import (
	"fmt"

	"hearduty/internal/record"
)

// partsOf gives the names of the levels that a level consists of: itself, or those of which one is enough.
func (m *ExposureMeasures) partsOf(level string) []string {
	if any := m.Levels[level].Any; len(any) > 0 {
		return any
	}
	return []string{level}
}

// MainChannel names the channel on which a level is shown: its own, or that of the first of its parts.
func (m *ExposureMeasures) MainChannel(level string) string {
	return m.Levels[m.partsOf(level)[0]].Channel
}

// ParametersOf names the parameters that a level is compared with.
func (m *ExposureMeasures) ParametersOf(level string) []string {
	var out []string
	for _, part := range m.partsOf(level) {
		out = append(out, m.Levels[part].AtLeast+m.Levels[part].Above)
	}
	return out
}

// channelOf gives the channel of a level without parts at the builder's site: its own, or the one that stands
// in for it where the site has elected that.
func (b *Builder) channelOf(t Threshold) int {
	if t.Instead != nil {
		if on, _ := b.Choices[t.Instead.Choice].(bool); on {
			return b.channels.index(t.Instead.Channel)
		}
	}
	return b.channels.index(t.Channel)
}

// mainChannel gives the channel on which a level is shown at the builder's site.
func (b *Builder) mainChannel(level string) int {
	m := &b.Measures.Exposure
	return b.channelOf(m.Levels[m.partsOf(level)[0]])
}

// lawDays gives the days on which the law of a level changes.
func (b *Builder) lawDays(level string) []Date {
	var days []Date
	for _, name := range b.Measures.Exposure.ParametersOf(level) {
		days = append(days, b.Law.Days(name)...)
	}
	return days
}

// standing says how an exposure stands to a level.
type standing struct {
	verdict verdict
	channel int    // the channel that decides
	reason  string // why it is not known
}

// reaches says whether an exposure, one known a channel, reaches a level on a day. A level of several parts is
// reached if one of them is. A part whose parameter has no value on that day is left out; with none left it is
// not known. A highest value that was not measured leaves it to the other parts, unless it is needed.
func (b *Builder) reaches(level string, on []known, day Date) standing {
	m := &b.Measures.Exposure
	parts := m.partsOf(level)
	out := standing{verdict: record.No, channel: b.mainChannel(level)}
	inForce, decided := 0, 0
	for _, part := range parts {
		t := m.Levels[part]
		i := b.channelOf(t)
		limit, ok := b.Law.Number(t.AtLeast+t.Above, day)
		if !ok {
			continue
		}
		if inForce++; inForce == 1 {
			out.channel = i
		}
		k := &on[i]
		switch t.compare(k.bounds, limit) {
		case record.Yes:
			return standing{verdict: record.Yes, channel: i}
		case record.No:
			decided++
		case record.Unanswered:
			if k.quiet && !b.channels.isHighest(i) { // monitoring begins where something suggests noise
				decided++
				continue
			}
			if b.channels.isHighest(i) && !k.needed && len(parts) > 1 {
				continue
			}
			if out.verdict == record.No {
				out.verdict, out.channel, out.reason = record.Unanswered, i, b.openReason(t, i, k, limit)
			}
		}
	}
	switch {
	case inForce == 0:
		t := m.Levels[parts[0]]
		return standing{record.Unanswered, out.channel, fmt.Sprintf("the bundle has no value of %s on %s", t.AtLeast+t.Above, day)}
	case decided == 0 && out.verdict == record.No:
		out.verdict, out.reason = record.Unanswered, "neither the level nor a peak was measured"
	}
	return out
}

// openReason says why it is not known whether a level is reached on a channel.
func (b *Builder) openReason(t Threshold, channel int, k *known, limit float64) string {
	if k.reason != "" {
		return k.reason
	}
	return b.channels.openReason(channel, k, limit, t.AtLeast != "")
}

// compare says whether what is known reaches, or exceeds, a limit.
func (t Threshold) compare(d bounds, limit float64) verdict {
	over := func(v float64) bool {
		if t.Above != "" {
			return v > limit+tolerance
		}
		return v >= limit-tolerance
	}
	switch {
	case over(d.low):
		return record.Yes
	case !over(d.high):
		return record.No
	}
	return record.Unanswered
}
