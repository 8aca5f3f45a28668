package dossier

import (
	"fmt"
	"math"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// noise is what is known of the noise of a day without the protector: the level of the bundle's channel, and
// what the deciding measurement holds beside it.
type noise struct {
	level       float64 // 8-hour A-weighted level, dBA, to 0.1 dB; where it is known only as at most a value, that value
	known       bool    // whether there is a level
	equalEnergy bool    // whether the channel averages by equal energy (3 dB exchange rate, or L_EX,8h)

	twaC       record.Number  // 8-hour average measured with C-weighting, dBC
	difference record.Number  // C-weighted less A-weighted level of the measurement, dB
	how        string         // how the difference came about
	bands      record.Octaves // octave band levels, dB
	peak       record.Number  // highest C-weighted peak, dBC
}

// leastDifference is the least L_C − L_A in dB of any noise, as internal/acoustics has it for the HML method.
const leastDifference = -2

// noiseOf gives the noise on a stretch. A C-weighted average counts only where the dose is known exactly; where
// it is known as at most a value, the measurement's difference between the weightings can still be added to that.
func (b *Builder) noiseOf(now *stretch) noise {
	if now == nil {
		return noise{}
	}
	i := b.channels.index(b.Measures.Protection.Channel)
	if i < 0 {
		return noise{}
	}
	channel, k := b.Measures.Exposure.Channels[b.Measures.Protection.Channel], now.on[i]
	n := noise{equalEnergy: channel.Kind == LevelChannel || channel.ExchangeDB == 3}
	n.level, n.known = b.levelOn(i, k)
	if k.src == nil {
		return n
	}
	measurements := k.src.measurements()
	for _, rows := range measurements {
		n.take(rows)
	}
	for i, ch := range b.channels.channels { // the peak that the law judges may be that of another measurement
		if ch.Of == PeakDBC && now.on[i].src != nil && (!n.peak.Known || now.on[i].low > n.peak.Value) {
			n.peak = record.Num(now.on[i].low)
		}
	}
	if len(measurements) > 1 && n.how != "" {
		n.how = fmt.Sprintf("the highest of %d measurements, ", len(measurements)) + n.how
	}
	if len(k.src.rows) > 0 && k.exact() {
		for _, m := range k.src.rows {
			n.twaC = firstKnown(n.twaC, m.TWADBC)
		}
	}
	return n
}

// measurements gives the rows of each measurement that a result rests on: one, or several of samples or tasks.
func (r *result) measurements() [][]*record.Measurement {
	if len(r.rows) > 0 {
		return [][]*record.Measurement{r.rows}
	}
	var out [][]*record.Measurement
	for _, rec := range append([]record.Record{r.rec}, r.more...) {
		if m, ok := rec.(*record.Measurement); ok {
			out = append(out, []*record.Measurement{m})
		}
	}
	return out
}

// take notes what one measurement holds. Of several, the one with the highest difference between the weightings
// counts, since protectors take the least off low frequencies, and the highest peak.
func (n *noise) take(rows []*record.Measurement) {
	var a, c, twaA, twaC record.Number
	var bands *record.Octaves
	for _, m := range rows {
		a, c, twaC = firstKnown(a, m.LAeqDBA), firstKnown(c, m.LCeqDBC), firstKnown(twaC, m.TWADBC)
		if m.TWADBC.Known {
			twaA = firstKnown(twaA, m.TWADBA)
		}
		if bands == nil {
			bands = m.Octave
		}
		if m.PeakWeighting == string(acoustics.C) && m.PeakDB.Known && (!n.peak.Known || m.PeakDB.Value > n.peak.Value) {
			n.peak = m.PeakDB
		}
	}
	difference, how := differenceOf(a, c, twaA, twaC, bands)
	higher := difference.Known && (!n.difference.Known || difference.Value > n.difference.Value)
	if higher {
		n.difference, n.how = difference, how
	}
	if bands != nil && (higher || !n.bands.Known()) {
		n.bands = *bands
	}
}

// differenceOf takes the difference between the weightings from the equivalent levels of a measurement, from its
// 8-hour averages, or from its octave bands, whichever there is first.
func differenceOf(a, c, twaA, twaC record.Number, octaves *record.Octaves) (db record.Number, how string) {
	switch {
	case a.Known && c.Known:
		return record.Num(acoustics.RoundTenth(c.Value - a.Value)), fmt.Sprintf("LCeq %s dBC − LAeq %s dBA", number(c.Value), number(a.Value))
	case twaA.Known && twaC.Known:
		return record.Num(acoustics.RoundTenth(twaC.Value - twaA.Value)), fmt.Sprintf("C-weighted average %s dBC − A-weighted average %s dBA", number(twaC.Value), number(twaA.Value))
	}
	bands := bandsOf(octaves)
	la, okA := bands.Weighted(acoustics.A)
	lc, okC := bands.Weighted(acoustics.C)
	if !okA || !okC {
		return record.Number{}, ""
	}
	la, lc = acoustics.RoundTenth(la), acoustics.RoundTenth(lc)
	return record.Num(acoustics.RoundTenth(lc - la)), fmt.Sprintf("octave bands %s dBC − %s dBA", number(lc), number(la))
}

// levelOn gives the 8-hour A-weighted level of what is known on the channel of the measures, dBA to 0.1 dB, as
// tables of the law print it. Where only bounds are known, the upper one is taken; but an allowance of an accuracy class
// is for comparing with action values and is no part of the noise at the ear.
func (b *Builder) levelOn(channel int, k known) (float64, bool) {
	if b.Measures.Exposure.Channels[b.Measures.Protection.Channel].Kind == LevelChannel {
		if len(b.Measures.Exposure.Margins) > 0 && k.src != nil && !math.IsInf(k.high, 1) && k.src.on[channel].estimate.Known {
			return acoustics.RoundTenth(k.src.on[channel].estimate.Value), true
		}
		return acoustics.RoundTenth(k.high), k.high > 0 && !math.IsInf(k.high, 1)
	}
	return b.channels.scales[channel].TWAReported(k.high)
}

// cWeighted gives the 8-hour C-weighted level in dBC and how it came about, or the words for what is missing.
func (n noise) cWeighted() (level float64, how, missing string) {
	switch {
	case n.twaC.Known:
		level, how = n.twaC.Value, fmt.Sprintf("L_C = %s dBC, 8-hour average measured with C-weighting", number(n.twaC.Value))
	case !n.known:
		return 0, "", "exposure without the protector"
	case n.difference.Known:
		level, how = n.byDifference()
	default:
		return 0, "", "C-weighted level of the measurement"
	}
	if n.known && level-n.level < leastDifference-tolerance {
		return 0, "", fmt.Sprintf("C-weighted level of the measurement that can be right: %s dBC is too far below %s dBA", number(level), number(n.level))
	}
	return level, how, ""
}

// byDifference adds the measurement's difference between the weightings to the 8-hour level.
func (n noise) byDifference() (level float64, how string) {
	level = acoustics.RoundTenth(n.level + n.difference.Value)
	return level, fmt.Sprintf("L_C = 8-hour level %s dBA + (%s = %s dB) = %s dBC", number(n.level), n.how, number(n.difference.Value), number(level))
}

// forNRR gives the level that a noise reduction rating is taken off: the C-weighted 8-hour average where there
// is one, else the A-weighted one. The difference between the weightings gives a C-weighted level only where
// the channel averages by equal energy: with another exchange rate it is no method of 29 CFR 1910.95 App. B.
func (n noise) forNRR() (level float64, w acoustics.Weighting, how string, ok bool) {
	if n.twaC.Known {
		return n.twaC.Value, acoustics.C, "", true
	}
	if n.equalEnergy && n.known && n.difference.Known && n.difference.Value >= leastDifference {
		level, how := n.byDifference()
		return level, acoustics.C, how, true
	}
	return n.level, acoustics.A, "", n.known
}

// firstKnown gives the first of two numbers that is known.
func firstKnown(a, b record.Number) record.Number {
	if a.Known {
		return a
	}
	return b
}

// bandsOf writes octave bands as the acoustics take them; a band that is not recorded is NaN.
func bandsOf(o *record.Octaves) acoustics.Bands {
	var out acoustics.Bands
	for i, f := range acoustics.OctaveFrequencies {
		out[i] = math.NaN()
		if o == nil {
			continue
		}
		if band := o.At(f); band.Known {
			out[i] = band.Value
		}
	}
	return out
}
