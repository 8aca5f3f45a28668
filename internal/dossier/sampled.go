package dossier

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// sample is a level that counts only together with others, by sampling (ISO 9612).
type sample struct {
	level float64 // LAeq, dBA
	shift float64 // minutes
	run   float64 // minutes; 0 where not recorded
	row   *record.Measurement
	at    workplace
}

// pool is several samples on a channel taken together.
type pool struct {
	channel, size int
	result        *result
}

// mostSamples ends the table of what sampling adds to the uncertainty (ISO 9612:2009 Table C.4).
const mostSamples = 30

// strategy gives the sampling strategy of the measures, the least number of samples and what they are called.
func (c *channels) strategy() (s acoustics.Strategy, least int, what string) {
	if c.measures.Strategy == "full_day" {
		return acoustics.FullDay, 3, "full-day samples"
	}
	return acoustics.JobBased, 5, "samples of the job"
}

// takeSample takes the equivalent level of a row as a sample. A full-day sample tells the whole shift; a sample
// of the job may be of any length, unless it is marked as not representative. Of several levels in one
// measurement the highest counts.
func (c *channels) takeSample(r *reading, m *record.Measurement, at workplace) {
	strategy, _, _ := c.strategy()
	_, note := portionOf(m)
	switch {
	case !m.LAeqDBA.Known:
		note = "no equivalent level is recorded"
	case strategy == acoustics.JobBased && m.Representative == record.No:
		note = "the sample is marked as not representative"
	case strategy == acoustics.JobBased:
		note = ""
	}
	shift := shiftOf(m, at)
	if note == "" && !shift.Known {
		note = "the length of the shift is not recorded"
	}
	if note != "" {
		if r.sample == nil {
			r.notes = append(r.notes, note)
		}
		return
	}
	r.notes = nil // another row of the measurement may lack what this one has
	if r.sample == nil || m.LAeqDBA.Value > r.sample.level {
		r.sample = &sample{m.LAeqDBA.Value, shift.Value, m.RunMinutes.Value, m, at}
	}
}

// samplesOf gives the results with a sample on a channel, from one day to another.
func samplesOf(results []*result, channel int, from, to Date) []*result {
	var out []*result
	for _, r := range results {
		if r.day >= from && r.day <= to && r.on[channel].sample != nil {
			out = append(out, r)
		}
	}
	return out
}

// pooled takes the samples of some days together; nil if there are too few. It is made once for the same
// samples.
func (c *channels) pooled(results []*result, channel int, from, to Date) *result {
	list := samplesOf(results, channel, from, to)
	_, least, _ := c.strategy()
	if len(list) < least {
		return nil
	}
	last := list[len(list)-1]
	for _, p := range last.pools {
		if p.channel == channel && p.size == len(list) {
			return p.result
		}
	}
	made := c.pool(list, channel)
	last.pools = append(last.pools, pool{channel, len(list), made})
	return made
}

// pool works out the level of samples taken together, and its uncertainty. The working day is the longest of
// the samples.
func (c *channels) pool(list []*result, channel int) *result {
	last := list[len(list)-1]
	r := c.newResult(last.day, last.rec, last.id)
	for _, other := range list[:len(list)-1] {
		r.more = append(r.more, other.rec)
	}
	var levels []float64
	var instruments []string
	var minutes float64
	for _, one := range list {
		s := one.on[channel].sample
		levels, instruments = append(levels, s.level), append(instruments, s.row.InstrumentID)
		minutes = max(minutes, s.shift)
	}
	on, at := &r.on[channel], last.on[channel].sample.at
	strategy, _, _ := c.strategy()
	instrument, why := c.instrumentOf(instruments)
	lex, err := acoustics.Sampled(strategy, levels, minutes, instrument)
	if err != nil {
		on.notes = append(on.notes, err.Error())
		return r
	}
	on.working = lex.Working()
	if why == "" {
		on.expanded, on.sampling = record.Num(lex.Expanded), &lex
	} else {
		on.working = on.working[:2]
	}
	c.decide(on, lex.LEX, why)
	if on.known() {
		c.week(channel, on, at)
	}
	c.finish(r, record.Num(minutes), at)
	return r
}

// shortOf says how many samples are missing on a channel, or why those of some days give no level; an empty
// text if nothing is to be said.
func (c *channels) shortOf(results []*result, channel int, from, to Date) string {
	if !c.sampled(channel) {
		return ""
	}
	n := len(samplesOf(results, channel, from, to))
	_, least, what := c.strategy()
	switch {
	case n == 0:
		return ""
	case n < least:
		return fmt.Sprintf("%d of at least %d %s recorded; %d more needed", n, least, what, least-n)
	}
	if p := c.pooled(results, channel, from, to); !p.usable(channel) {
		return strings.Join(distinct(p.on[channel].notes), "; ")
	}
	return ""
}

// openReason says why the law's level is neither reached nor not reached: where the level lies on both sides of
// it within its uncertainty, and how many more samples would settle that; else that it lies within bounds.
func (c *channels) openReason(i int, k *known, limit float64, reached bool) string {
	if k.src == nil || k.bounds != k.src.on[i].bounds || !k.src.on[i].expanded.Known || k.exact() {
		if c.isLevel(i) {
			return "the level on this channel is known only within bounds"
		}
		return "the dose on this channel is known only within bounds"
	}
	on := &k.src.on[i]
	text := fmt.Sprintf("the level of %s ± %s dBA lies on both sides of %s dBA", tenth(on.estimate.Value), tenth(on.expanded.Value), number(limit))
	if on.sampling == nil {
		return text
	}
	more, ok := on.sampling.MoreSamples(acoustics.Limit{Level: limit - on.offset, Reached: reached}, mostSamples)
	if !ok {
		return text + fmt.Sprintf("; more samples with the same spread, up to %d, would not settle it", mostSamples)
	}
	return text + fmt.Sprintf("; %d more with the same spread would settle it", more)
}

// distinct leaves out texts that stand before.
func distinct(list []string) []string {
	var out []string
	for _, s := range list {
		if s != "" && !slices.Contains(out, s) {
			out = append(out, s)
		}
	}
	return out
}
