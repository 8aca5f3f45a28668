package dossier

import (
	"math"
	"slices"
	"strings"

	"hearduty/internal/record"
)

// MeasuredLevel is one result of a group as a level, dBA. Where it is known only within bounds, they differ.
type MeasuredLevel struct {
	Day       Date
	Rec       record.Record
	Low, High float64 // dBA; High is infinite if nothing bounds it
	DB        float64 // dBA, the best estimate: the level if exact, else the bound that is known
	Current   bool    // whether no later change or control stands against it
}

// LevelLine is a level of the law on the scale of MeasuredLevel.
type LevelLine struct {
	Name, Parameter string
	DB              float64
	Limit           bool // a level whose name begins with limit; else it is one that enrols or the like
}

// LevelUnit says what the levels of the enrolling channel are.
func (b *Builder) LevelUnit() string {
	switch ch := b.channels.channels[b.channels.enrols]; {
	case !b.channels.isLevel(b.channels.enrols):
		return "TWA, dBA"
	case ch.Weekly:
		return "L_EX,w, dBA"
	}
	return "L_EX,8h, dBA"
}

// LevelsOf gives the results of a group on the enrolling channel up to the as-of day, oldest first.
func (b *Builder) LevelsOf(group string) []MeasuredLevel {
	h := b.histories[group]
	if h == nil {
		return nil
	}
	since, i := h.lastEvent(b.AsOf).day, b.channels.enrols
	var out []MeasuredLevel
	for _, r := range h.results {
		on := &r.on[i]
		if r.day > b.AsOf || !on.known() {
			continue
		}
		m := MeasuredLevel{Day: r.day, Rec: r.rec, Current: r.day >= since, Low: b.asLevel(on.low), High: b.asLevel(on.high)}
		switch {
		case on.estimate.Known:
			m.DB = on.estimate.Value
			if on.expanded.Known && m.Low == m.High {
				m.Low, m.High = m.DB-on.expanded.Value, m.DB+on.expanded.Value
			}
		case math.IsInf(m.High, 1):
			m.DB = m.Low
		default:
			m.DB = m.High
		}
		out = append(out, m)
	}
	return out
}

// asLevel gives a value on the enrolling channel as a level, dBA.
func (b *Builder) asLevel(v float64) float64 {
	i := b.channels.enrols
	if b.channels.isLevel(i) || math.IsInf(v, 1) {
		return v
	}
	twa, ok := b.channels.scales[i].TWA(v)
	if !ok {
		return 0
	}
	return twa
}

// LevelLines gives the exposure levels of the law on the as-of day. A dose of another channel is drawn by the
// scale of its own.
func (b *Builder) LevelLines() []LevelLine {
	var out []LevelLine
	for _, name := range b.levels {
		t := b.Measures.Exposure.Levels[name]
		if len(t.Any) > 0 || b.channels.isHighest(b.channels.index(t.Channel)) {
			continue // its parts are drawn, and peaks on no scale of averages
		}
		parameter := t.AtLeast + t.Above
		v, ok := b.Law.Number(parameter, b.AsOf)
		if !ok {
			continue
		}
		i := b.channels.index(t.Channel)
		if !b.channels.isLevel(i) {
			if v, ok = b.channels.scales[i].TWA(v); !ok {
				continue
			}
		}
		line := LevelLine{Name: name, Parameter: parameter, DB: v, Limit: strings.HasPrefix(name, "limit")}
		if i := slices.IndexFunc(out, func(l LevelLine) bool { return l.DB == v }); i >= 0 { // one line a level
			if line.Limit && !out[i].Limit {
				out[i] = line
			}
			continue
		}
		out = append(out, line)
	}
	return out
}

// CalibrationsOf gives the checks and calibrations of an instrument, oldest first.
func (r *Registers) CalibrationsOf(instrument string) []*record.Calibration {
	return r.calibrations[instrument]
}
