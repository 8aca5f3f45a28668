package dossier

import (
	"fmt"
	"strings"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// How a formula was seen, where it was not read in an official text.
const (
	fromMemory      = "from memory"
	secondarySource = "secondary source"
)

// usualPercent is the percentage of wearers for whom attenuations are assumed where the measures name none:
// mean less one standard deviation (ISO 4869-2:2018, secondary source).
const usualPercent = 84

// route is an estimate of the level under a protector by one method, or what the method lacks.
type route struct {
	exposure record.Number       // the level that the attenuation is taken off, dBA or dBC
	under    acoustics.Protected // dBA under the protector
	method   string
	steps    []string // the sum, with its numbers
	mark     string
	wholes   bool // whether the method prints whole decibels; they are shown beside the level to 0.1 dB, which counts
	missing  []string
}

// lack notes what is missing, if it is.
func (r *route) lack(known bool, what string, args ...any) {
	if !known {
		r.missing = append(r.missing, fmt.Sprintf(what, args...))
	}
}

// attenuate estimates the level under the protector by the bundle's rating, with the allowance for use outside
// the laboratory, and grades it.
func (b *Builder) attenuate(p *Protection, n noise) {
	measures := b.Measures.Protection
	model := b.modelOf(p.Protector)
	if n.known {
		p.Exposure = record.Num(n.level)
	}
	r := byRating(measures, model, n)
	allowance := b.allowance(model, &r)
	if r.exposure.Known {
		p.Exposure = r.exposure
	}
	if p.Missing = append(p.Missing, r.missing...); len(p.Missing) > 0 {
		return
	}
	if allowance > 0 {
		// A result of its own, so that its working holds the allowance alone.
		worn := acoustics.Protected{Level: r.under.Level, Attenuation: r.under.Attenuation}.RealWorld(allowance)
		worn.Clamped = worn.Clamped || r.under.Clamped
		r.under, r.steps = worn, append(r.steps, worn.Working()...)
	}
	level := acoustics.RoundTenth(r.under.Level)
	p.Under, p.Method, p.Mark = record.Num(level), r.method, r.mark
	r.steps = append(r.steps, rounding(r.under.Level, level)...)
	if r.wholes {
		r.steps = append(r.steps, fmt.Sprintf("in whole decibels, as ISO 4869-2 prints it, %s dBA", number(acoustics.RoundWhole(r.under.Level))))
	}
	p.Working = strings.Join(r.steps, "; ")
	if measures.Rating == "nrr" {
		exposure, w, _, _ := n.forNRR()
		p.Halved = record.Num(acoustics.RoundTenth(acoustics.UnderHalvedNRR(exposure, w, model.NRR.Value).Level))
	}
	if n.known && level > n.level {
		p.Working += fmt.Sprintf("; that is more than the %s dBA without the protector, so the rating shows no benefit", number(n.level))
	}
	p.Band = b.bandOf(level)
}

// allowance gives the dB that the measures take off for use outside the laboratory: those of the type of protector,
// else those for all. Where the measures go by type and say nothing of this one, it is missing.
func (b *Builder) allowance(model *record.Protector, r *route) float64 {
	measures := b.Measures.Protection
	name := measures.RealWorld
	if by, ok := measures.RealWorldByType[model.Type]; ok {
		name = by
	}
	switch {
	case name != "":
		db, ok := b.Law.Number(name, b.AsOf)
		r.lack(ok, "value of %s on %s in the bundle", name, b.AsOf)
		return db
	case len(measures.RealWorldByType) > 0 && model.Type == "":
		r.lack(false, "type of the protector %s, by which the allowance for use is taken", model.ProtectorID)
	case len(measures.RealWorldByType) > 0:
		r.lack(false, "allowance for use of a protector of the type %s in the bundle", model.Type)
	}
	return 0
}

// byRating estimates the level under a protector by the rating of the measures.
func byRating(m ProtectionMeasures, model *record.Protector, n noise) route {
	switch m.Rating {
	case "snr":
		return bySNR(model, n)
	case "hml":
		return byHML(model, n)
	case "octave":
		return byOctave(model, n, m.percent())
	case "slc80":
		return bySLC80(model, n)
	}
	return byNRR(model, n, m.Derating)
}

// percent gives the percentage of wearers for whom attenuations are assumed.
func (m ProtectionMeasures) percent() float64 {
	if m.Percent == 0 {
		return usualPercent
	}
	return m.Percent
}

// rounding says to what a level was rounded, if that changed it.
func rounding(exact, rounded float64) []string {
	if d := exact - rounded; d < tolerance && d > -tolerance {
		return nil
	}
	return []string{"rounded to " + number(rounded) + " dB"}
}

// modelOf gives a protector model; one that is not on record has nothing but its id.
func (b *Builder) modelOf(id string) *record.Protector {
	if model := b.Registers.Protectors[id]; model != nil {
		return model
	}
	return &record.Protector{ProtectorID: id}
}

// bandOf grades a level under the protector in dBA against the action level of the measures (EN 458, from
// memory). It is empty where the measures name none, or the bundle has no value of it on the day.
func (b *Builder) bandOf(level float64) string {
	if b.Measures.Protection.Bands == "" {
		return ""
	}
	action, ok := b.Law.Number(b.Measures.Protection.Bands, b.AsOf)
	if !ok {
		return ""
	}
	band, _ := acoustics.EN458Bands(action).Judge(level)
	return string(band)
}

// kindOf gives the kind of a protector as deratings tell them apart; a custom-made plug counts as formable. A
// plug and a muff in one model have none.
func kindOf(p *record.Protector) acoustics.ProtectorKind {
	switch p.Type {
	case "formable", "custom":
		return acoustics.FormablePlug
	case "premolded":
		return acoustics.OtherPlug
	case "earmuff", "helmet_muff":
		return acoustics.Muff
	}
	return ""
}
