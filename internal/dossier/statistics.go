package dossier

import (
	"fmt"
	"math"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// Statistics describe the spread of a group's measured levels since its latest change, taken as normally
// distributed: 8-hour averages of its doses, or daily or weekly exposure levels. They inform and decide nothing.
type Statistics struct {
	Number          int           `json:"n" doc:"number of levels"`
	Mean            record.Number `json:"mean_dba" doc:"arithmetic mean of the levels, dBA"`
	SD              record.Number `json:"sd_db" doc:"standard deviation over n - 1, dB; null for one level"`
	EnergyMean      record.Number `json:"energy_mean_dba" doc:"energy mean of the levels, dBA"`
	MeanLimit       record.Number `json:"mean_limit_dba" doc:"upper one-sided 95 % limit of the arithmetic mean, dBA; null for fewer than 3 levels"`
	ToleranceLimit  record.Number `json:"tolerance_limit_dba" doc:"upper 95/95 tolerance limit: with 95 % confidence, 95 % of the group's levels lie below it, dBA; null for fewer than 3 levels"`
	Limit           record.Number `json:"enrolling_dba" doc:"level that enrols, dBA, with which they are compared"`
	Exceedance      record.Number `json:"exceedance_pct" doc:"estimated share of the group's levels above the level that enrols, percent; null for fewer than 3 levels"`
	ExceedanceLimit record.Number `json:"exceedance_limit_pct" doc:"upper 95 % limit of that share, percent; null for fewer than 3 levels"`
	Working         []string      `json:"working" doc:"the sums, with their numbers, one a line"`
	Warnings        []string      `json:"warnings" doc:"why they may say little"`
}

// confidence of all limits, and the share that a tolerance limit covers.
const (
	confidence = 0.95
	coverage   = 0.95
)

// statistics describes the measured levels on the enrolling channel that count on the as-of day; nil if there
// are none.
func (c *channels) statistics(h *history, workers int) *Statistics {
	i := c.enrols
	levels, silent := c.levelsNow(h, i)
	if len(levels) == 0 {
		return nil
	}
	s := &Statistics{Number: len(levels), Warnings: []string{}}
	limit, name := c.enrollingLevel()
	s.Limit = limit
	energy, _ := acoustics.EnergyMean(levels)
	s.EnergyMean = record.Num(energy)
	s.Working = append(s.Working, fmt.Sprintf("n = %d %s: %s", s.Number, name, listed(levels)))
	g, err := acoustics.Describe(levels)
	if err != nil {
		s.few(levels)
	} else {
		s.describe(g)
	}
	s.Working = append(s.Working, "energy mean = 10 lg of the mean of 10^(L/10) = "+hundredth(energy)+" dBA")
	if silent > 0 {
		s.Warnings = append(s.Warnings, fmt.Sprintf("%d × a dose of 0 %% has no level and is left out", silent))
	}
	if k := h.on(c.asOf).on[i]; k.src != nil && k.src.on[i].sampling != nil {
		var run float64
		for _, r := range samplesOf(h.results, i, h.lastEvent(c.asOf).day, c.asOf) {
			run += r.on[i].sample.run
		}
		for _, fault := range k.src.on[i].sampling.PlanFaults(workers, run) {
			s.Warnings = append(s.Warnings, "ISO 9612 finds wanting: "+fault)
		}
	}
	return s
}

// levelsNow gives the measured levels since the latest change, dBA, and the number of doses of 0 %.
func (c *channels) levelsNow(h *history, i int) (levels []float64, silent int) {
	since := h.lastEvent(c.asOf).day
	for _, r := range h.results {
		on := &r.on[i]
		switch {
		case r.day < since || r.rows == nil:
		case on.sample != nil:
			if lex, ok := acoustics.LEX8h(on.sample.level, on.sample.shift); ok {
				weekly := reading{bounds: bounds{lex, lex}, estimate: record.Num(lex)}
				if c.week(i, &weekly, on.sample.at); weekly.estimate.Known {
					levels = append(levels, weekly.estimate.Value)
				}
			}
		case c.isLevel(i):
			if on.exact() && on.estimate.Known {
				levels = append(levels, on.estimate.Value)
			}
		case on.exact():
			if twa, ok := c.scales[i].TWA(on.low); ok {
				levels = append(levels, twa)
			} else {
				silent++
			}
		}
	}
	return levels, silent
}

// enrollingLevel gives the level that enrols in dBA, and what is compared with it. That of a dose is its
// average, not rounded, as those of the measurements.
func (c *channels) enrollingLevel() (record.Number, string) {
	name := "levels L_EX,8h"
	switch {
	case !c.isLevel(c.enrols):
		name = "8-hour averages"
	case c.channels[c.enrols].Weekly:
		name = "levels L_EX,w"
	}
	limit, _, ok := c.enrolling(c.asOf)
	if ok && !c.isLevel(c.enrols) {
		limit, ok = c.scales[c.enrols].TWA(limit)
	}
	if !ok {
		return record.Number{}, name
	}
	return record.Num(limit), name
}

// few describes one or two levels, which have no limits.
func (s *Statistics) few(levels []float64) {
	mean := (levels[0] + levels[len(levels)-1]) / 2
	s.Mean = record.Num(mean)
	s.Working = append(s.Working, "mean = "+hundredth(mean)+" dBA")
	if len(levels) == 2 {
		s.SD = record.Num(math.Abs(levels[0]-levels[1]) / math.Sqrt2)
		s.Working = append(s.Working, "s = "+hundredth(s.SD.Value)+" dB")
	}
	s.Warnings = append(s.Warnings, "fewer than 3 levels: no limit can be given")
}

// describe gives the limits of three or more levels.
func (s *Statistics) describe(g acoustics.Group) {
	s.Mean, s.SD = record.Num(g.Mean), record.Num(g.SD)
	s.Working = append(s.Working, "mean = "+hundredth(g.Mean)+" dBA, s = "+hundredth(g.SD)+" dB")
	if v, err := g.MeanLimit(confidence); err == nil {
		s.MeanLimit = record.Num(v)
		s.Working = append(s.Working, fmt.Sprintf("upper 95 %% limit of the mean = mean + t · s / √n = %.2f + t · %.2f / √%d = %.2f dBA", g.Mean, g.SD, g.N, v))
	}
	if k, err := toleranceFactor(g.N); err == nil {
		v := g.Mean + k*g.SD
		s.ToleranceLimit = record.Num(v)
		s.Working = append(s.Working, fmt.Sprintf("upper 95/95 tolerance limit = mean + k · s = %.2f + %.3f · %.2f = %.2f dBA", g.Mean, k, g.SD, v))
	}
	if s.Limit.Known {
		s.exceed(g)
	}
	if g.Few {
		s.Warnings = append(s.Warnings, "fewer than 6 levels: every limit is wide")
	}
	if g.Identical {
		s.Warnings = append(s.Warnings, "all levels are the same, which real ones seldom are")
	}
}

func (s *Statistics) exceed(g acoustics.Group) {
	share, err := g.Exceedance(s.Limit.Value)
	if err != nil {
		return
	}
	s.Exceedance = record.Num(100 * share)
	line := fmt.Sprintf("share above %.1f dBA = 1 − Φ((%.1f − %.2f) / %.2f) = %.1f %%", s.Limit.Value, s.Limit.Value, g.Mean, g.SD, 100*share)
	if g.SD == 0 {
		line = fmt.Sprintf("share above %.1f dBA = %.0f %%", s.Limit.Value, 100*share)
	}
	if most, err := g.ExceedanceLimit(s.Limit.Value, confidence); err == nil {
		s.ExceedanceLimit = record.Num(100 * most)
		line += fmt.Sprintf(", with 95 %% confidence at most %.1f %%", 100*most)
	}
	s.Working = append(s.Working, line)
}
