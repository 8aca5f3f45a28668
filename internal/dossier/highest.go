package dossier

import (
	"fmt"

	"hearduty/internal/record"
)

// figureOf gives a figure of a row of a measurement, by its name. The note says why a value on it does not count.
func figureOf(name string, m *record.Measurement) (value record.Number, note string) {
	switch name {
	case PeakDBC, PeakDBZ:
		want := map[string]string{PeakDBC: "C", PeakDBZ: "Z"}[name]
		switch {
		case !m.PeakDB.Known || m.PeakWeighting == want:
			return m.PeakDB, ""
		case m.PeakWeighting == "":
			return record.Number{}, "the weighting of the peak level is not recorded"
		}
		return record.Number{}, fmt.Sprintf("the peak level was taken with weighting %s, not %s", m.PeakWeighting, want)
	case MaxDBA:
		return m.MaxDBA, ""
	case MaxDBCFast:
		return m.MaxDBCFast, ""
	case ImpulseDBZ:
		return m.ImpulseDBZ, ""
	}
	return record.Number{}, ""
}

// higherFigure gives the higher of a value and a figure of a row.
func higherFigure(so record.Number, name string, row *record.Measurement) record.Number {
	if v, _ := figureOf(name, row); v.Known && (!so.Known || v.Value > so.Value) {
		return v
	}
	return so
}

// takeHighest takes a figure of a row on a channel of the highest value. Of several the highest counts.
func (r *reading) takeHighest(name string, m *record.Measurement) {
	value, note := figureOf(name, m)
	switch {
	case note != "":
		r.notes = append(r.notes, note)
	case value.Known && (!r.estimate.Known || value.Value > r.estimate.Value):
		r.bounds, r.estimate = bounds{value.Value, value.Value}, value
		r.working = []string{figureWords[name] + " " + number(value.Value) + " " + figureUnits[name] + " measured"}
	}
}

var (
	figureWords = map[string]string{
		PeakDBC: "peak level", PeakDBZ: "peak level", MaxDBA: "highest level", MaxDBCFast: "highest level of impact noise, fast,",
		ImpulseDBZ: "highest level of impact noise by impulse detector",
	}
	figureUnits = map[string]string{PeakDBC: "dB(C)", PeakDBZ: "dB unweighted", MaxDBA: "dBA", MaxDBCFast: "dBC", ImpulseDBZ: "dB unweighted"}
)

// needs marks a highest value that nobody knows as needed where the group's noise holds impulses.
func (h *history) needs(channel int, k known) known {
	if h.c.isHighest(channel) && k.src == nil && h.at.impulsive == record.Yes {
		k.needed = true
		k.reason = "the noise holds impulses, but no " + figureWords[h.c.channels[channel].Of] + " in " + figureUnits[h.c.channels[channel].Of] + " is on record"
	}
	return k
}
