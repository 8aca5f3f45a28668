package dossier

import (
	"fmt"
	"math"
	"strings"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// byNRR takes a noise reduction rating off: the C-weighted average less the rating, or the A-weighted average
// less the rating reduced by 7 dB (29 CFR 1910.95 App. B). A derating cuts the rating before that by the type
// of protector (NIOSH, CSA; see internal/acoustics for their sources).
func byNRR(p *record.Protector, n noise, derating string) route {
	level, w, how, ok := n.forNRR()
	var r route
	r.lack(p.NRR.Known, "noise reduction rating of the protector %s", p.ProtectorID)
	r.lack(derating == "" || kindOf(p) != "", "type of the protector %s, as a plug or a muff", p.ProtectorID)
	r.lack(ok, "exposure without the protector")
	if ok {
		r.exposure = record.Num(level)
	}
	if len(r.missing) > 0 {
		return r
	}
	nrr := p.NRR.Value
	r.method = "A-weighted average less the noise reduction rating reduced by 7 dB"
	if w == acoustics.C {
		r.method = "C-weighted average less the noise reduction rating"
	}
	if how != "" {
		r.steps = []string{how}
	}
	if derating != "" {
		var by string
		r.under, by, r.mark = derated(derating, level, w, p)
		r.method = string(w) + "-weighted average less the " + by
		r.steps = append(r.steps, r.under.Working()...)
		return r
	}
	r.under = acoustics.UnderNRR(level, w, nrr)
	under := number(acoustics.RoundTenth(r.under.Level))
	sum := fmt.Sprintf("%s dBA − (%s − 7) dB = %s dBA", number(level), number(nrr), under)
	switch {
	case w == acoustics.C:
		sum = fmt.Sprintf("%s dBC − %s dB = %s dBA", number(level), number(nrr), under)
	case r.under.Clamped:
		sum = fmt.Sprintf("%s dBA; a rating of %s dB less 7 dB credits nothing", number(level), number(nrr))
	}
	r.steps = append(r.steps, sum)
	return r
}

// derated takes off a noise reduction rating cut for real use. The type of the protector must be known.
func derated(by string, level float64, w acoustics.Weighting, p *record.Protector) (under acoustics.Protected, method, mark string) {
	if by == "csa" {
		under, _ = acoustics.UnderCSA(level, w, p.NRR.Value, kindOf(p))
		return under, "noise reduction rating cut for the type of protector (CSA Z94.2)", fromMemory
	}
	under, _ = acoustics.UnderNIOSH(level, w, p.NRR.Value, kindOf(p))
	if w == acoustics.C {
		return under, "noise reduction rating cut for the type of protector (NIOSH)", secondarySource
	}
	return under, "noise reduction rating cut for the type of protector (NIOSH)", fromMemory
}

// bySNR takes a single number rating off the C-weighted level (ISO 4869-2:2018, secondary source).
func bySNR(p *record.Protector, n noise) route {
	return byOneNumber(n, p.SNR, fmt.Sprintf("single number rating of the protector %s", p.ProtectorID),
		"C-weighted level less the single number rating (ISO 4869-2)", secondarySource, acoustics.UnderSNR)
}

// bySLC80 takes a sound level conversion off the C-weighted level (AS/NZS 1270, from memory).
func bySLC80(p *record.Protector, n noise) route {
	return byOneNumber(n, p.SLC80, fmt.Sprintf("SLC80 of the protector %s", p.ProtectorID),
		"C-weighted level less the SLC80 (AS/NZS 1270)", fromMemory, acoustics.UnderSLC80)
}

// byOneNumber takes a rating off the C-weighted level.
func byOneNumber(n noise, rating record.Number, name, method, mark string, under func(lc, rating float64) acoustics.Protected) route {
	r := route{method: method, mark: mark, wholes: mark == secondarySource}
	r.lack(rating.Known, "%s", name)
	level, how, missing := n.cWeighted()
	r.lack(missing == "", "%s", missing)
	if missing == "" {
		r.exposure = record.Num(level)
	}
	if len(r.missing) == 0 {
		r.under = under(level, rating.Value)
		r.steps = append([]string{how}, r.under.Working()...)
	}
	return r
}

// byHML takes the attenuation off the A-weighted level that the ratings H, M and L give for the difference
// between the C- and the A-weighted level (ISO 4869-2:2018, secondary source).
func byHML(p *record.Protector, n noise) route {
	r := route{method: "A-weighted level less the attenuation by H, M and L (ISO 4869-2)", mark: secondarySource, wholes: true}
	r.lack(p.H.Known && p.M.Known && p.L.Known, "%s of the protector %s", lettersMissing(p), p.ProtectorID)
	lc, how, missing := n.cWeighted()
	if missing == "" && !n.known {
		missing = "exposure without the protector"
	}
	r.lack(missing == "", "%s", missing)
	if len(r.missing) > 0 {
		return r
	}
	under, err := acoustics.UnderHML(n.level, lc, acoustics.HML{High: p.H.Value, Medium: p.M.Value, Low: p.L.Value})
	if err != nil {
		r.missing = []string{fmt.Sprintf("H, M and L of the protector %s that can be right: %v", p.ProtectorID, err)}
		return r
	}
	r.under, r.steps = under, append([]string{how}, under.Working()...)
	return r
}

// lettersMissing names which of H, M and L are not recorded.
func lettersMissing(p *record.Protector) string {
	var out []string
	for i, x := range []record.Number{p.H, p.M, p.L} {
		if !x.Known {
			out = append(out, "HML"[i:i+1])
		}
	}
	return enumerate(out)
}

// byOctave takes the attenuation off the 8-hour level that the assumed protection values give in the octave
// bands of the measurement: mean less α standard deviations, where α belongs to a percentage of wearers
// (ISO 4869-2:2018, secondary source).
func byOctave(p *record.Protector, n noise, percent float64) route {
	r := route{method: fmt.Sprintf("octave bands, attenuation for %s %% of wearers (ISO 4869-2)", number(percent)), mark: secondarySource, wholes: true}
	bandsMissing(&r, p.Mean, "mean attenuation in octave bands of the protector "+p.ProtectorID)
	bandsMissing(&r, p.SD, "standard deviation of the attenuation in octave bands of the protector "+p.ProtectorID)
	alpha, _, ok := acoustics.Alpha(percent)
	r.lack(ok, "a percentage of wearers between 0 and 100 in the measures")
	if !n.known {
		r.lack(false, "exposure without the protector")
	} else {
		bandsMissing(&r, &n.bands, "octave band levels of the measurement")
	}
	if len(r.missing) > 0 {
		return r
	}
	apv, ok := acoustics.AssumedProtection(bandsOf(p.Mean), bandsOf(p.SD), alpha)
	octave, err := acoustics.UnderOctave(bandsOf(&n.bands), apv)
	if r.lack(ok && err == nil, "attenuation in octave bands of the protector %s that can be right", p.ProtectorID); len(r.missing) > 0 {
		return r
	}
	r.under = acoustics.Protected{Level: n.level - octave.Attenuation, Attenuation: octave.Attenuation, Clamped: octave.Clamped}
	r.steps = append([]string{fmt.Sprintf("APV = mean − %s · standard deviation", number(alpha))}, octave.Working()...)
	r.steps = append(r.steps, fmt.Sprintf("8-hour level %s dBA − %s dB = %s dBA", number(n.level), twoDecimals(octave.Attenuation), twoDecimals(r.under.Level)))
	return r
}

// bandsMissing notes which octave bands from 125 Hz on are not recorded; that of 63 Hz may be missing.
func bandsMissing(r *route, o *record.Octaves, what string) {
	if o == nil || !o.Known() {
		r.lack(false, "%s", what)
		return
	}
	var out []string
	for _, f := range acoustics.OctaveFrequencies[1:] {
		if !o.At(f).Known {
			out = append(out, fmt.Sprint(f))
		}
	}
	r.lack(len(out) == 0, "%s at %s Hz", what, enumerate(out))
}

// twoDecimals writes a number with two decimals at most.
func twoDecimals(x float64) string { return number(math.Round(x*100)/100 + 0) }

// enumerate writes words with commas and an and.
func enumerate(list []string) string {
	if len(list) < 2 {
		return strings.Join(list, "")
	}
	return strings.Join(list[:len(list)-1], ", ") + " and " + list[len(list)-1]
}
