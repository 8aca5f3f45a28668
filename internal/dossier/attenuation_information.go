package dossier

import (
	"fmt"
	"strings"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// information gives what other methods say of the level under the protector. None of it decides anything: a law
// that mentions no derating is judged without one.
func (b *Builder) information(p *Protection, n noise, held []*record.ProtectorIssue, test *record.FitTest) []Estimate {
	model := b.modelOf(p.Protector)
	out := []Estimate{}
	if b.Measures.Protection.Rating == "nrr" {
		out = append(out, ratingEstimates(b.Measures.Protection, model, n)...)
		out = append(out, dualEstimates(b.Measures.Protection, model, b.counterpart(model, held), n)...)
	}
	out = append(out, fitEstimates(test, n, b.Measures.Protection.percent())...)
	out = append(out, wearEstimates(p, n)...)
	out = append(out, peakEstimates(model, n)...)
	return append(out, classEstimates(b.Measures.Protection.Rating, model, n)...)
}

// estimate writes a result, to 0.1 dB.
func estimate(method, mark string, r acoustics.Protected, before ...string) Estimate {
	level := acoustics.RoundTenth(r.Level)
	steps := append(before, r.Working()...)
	return Estimate{Method: method, Level: record.Num(level), Mark: mark, Working: strings.Join(append(steps, rounding(r.Level, level)...), "; ")}
}

// ratingEstimates give what is left under half the attenuation (CPL 02-02-035, for weighing engineering controls
// only), under the deratings that the measures do not use, and with the C-weighted level by difference where that
// is no method of the law.
func ratingEstimates(m ProtectionMeasures, p *record.Protector, n noise) []Estimate {
	level, w, how, ok := n.forNRR()
	if !ok || !p.NRR.Known {
		return nil
	}
	var before []string
	if how != "" {
		before = []string{how}
	}
	out := []Estimate{estimate("half the attenuation", "", acoustics.UnderHalvedNRR(level, w, p.NRR.Value), before...)}
	for _, by := range []string{"niosh", "csa"} {
		if by != m.Derating && kindOf(p) != "" {
			under, method, mark := derated(by, level, w, p)
			out = append(out, estimate(method, mark, under, before...))
		}
	}
	if w == acoustics.A && n.difference.Known && n.difference.Value >= leastDifference {
		c, how := n.byDifference()
		out = append(out, estimate("noise reduction rating taken off the C-weighted level by difference", fromMemory, acoustics.UnderNRR(c, acoustics.C, p.NRR.Value), how))
	}
	return out
}

// counterpart gives the muff to a plug, or the plug to a muff, among the protectors at hand: the latest handed
// over with a noise reduction rating. It is nil if there is none.
func (b *Builder) counterpart(p *record.Protector, held []*record.ProtectorIssue) *record.Protector {
	kind := kindOf(p)
	if kind == "" {
		return nil
	}
	for i := len(held) - 1; i >= 0; i-- {
		other := b.modelOf(held[i].ProtectorID)
		if k := kindOf(other); other.NRR.Known && k != "" && (k == acoustics.Muff) != (kind == acoustics.Muff) {
			return other
		}
	}
	return nil
}

// dualEstimates give what is left under a plug and a muff worn together: the higher rating and 5 dB (from
// memory: OSHA Technical Manual), or the rule of the derating that the measures use.
func dualEstimates(m ProtectionMeasures, p, other *record.Protector, n noise) []Estimate {
	level, w, how, ok := n.forNRR()
	if !ok || !p.NRR.Known || other == nil {
		return nil
	}
	var before []string
	if how != "" {
		before = []string{how}
	}
	method := fmt.Sprintf("%s and %s worn together", p.ProtectorID, other.ProtectorID)
	switch m.Derating {
	case "":
		return []Estimate{estimate(method, fromMemory, acoustics.UnderDualNRR(level, w, p.NRR.Value, other.NRR.Value), before...)}
	case "csa":
		return []Estimate{estimate(method+" (CSA Z94.2)", fromMemory, acoustics.UnderCSADual(level, w, p.NRR.Value, other.NRR.Value), before...)}
	}
	return nil // NIOSH names no rule for two protectors
}

// wearEstimates give the level if the protector is worn for a part of the time only, with the noise the same
// in all of it (from memory).
func wearEstimates(p *Protection, n noise) []Estimate {
	if !n.known || !p.Under.Known || p.Under.Value >= n.level {
		return nil
	}
	var out []Estimate
	for _, percent := range []float64{90, 50} {
		worn, _ := acoustics.Protected{Level: p.Under.Value, Attenuation: n.level - p.Under.Value}.WornFor(percent / 100)
		level := acoustics.RoundTenth(worn.Level)
		out = append(out, Estimate{
			Method: fmt.Sprintf("worn for %s %% of the time", number(percent)), Level: record.Num(level), Mark: fromMemory,
			Working: fmt.Sprintf("10 · lg(%s · 10^(%s/10) + %s · 10^(%s/10)) = %s dBA", number(percent/100), number(p.Under.Value),
				number((100-percent)/100), number(n.level), number(level)),
		})
	}
	return out
}
