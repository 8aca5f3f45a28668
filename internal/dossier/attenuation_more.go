package dossier

import (
	"fmt"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// fitEstimates give the level under the protector by the latest fit test: for the percentage of wearings that
// the test stands for, and for the percentage of the measures where the uncertainty is recorded (ANSI/ASA S12.71
// is the framework, in abstracts only; the step from one percentage to another is from memory).
func fitEstimates(t *record.FitTest, n noise, percent float64) []Estimate {
	if t == nil || !n.known {
		return nil
	}
	found, how := ratingOf(t)
	if !found.Known {
		return nil
	}
	method := fmt.Sprintf("personal attenuation rating by the fit test of %s", t.Date)
	if t.Passed == record.No {
		method += ", which was not passed"
	}
	par := acoustics.PAR{Attenuation: found.Value, Percent: t.Percent.Value, Uncertainty: t.UncertaintyDB.Value}
	said := "uncertainty not recorded"
	if t.UncertaintyDB.Known {
		said = "standard uncertainty " + number(t.UncertaintyDB.Value) + " dB"
	}
	under, ok := acoustics.UnderPAR(n.level, par, par.Percent)
	if !ok { // the percentage is not recorded, or is no percentage between 0 and 100
		level := acoustics.RoundTenth(n.level - max(0, found.Value))
		sum := fmt.Sprintf("%s dBA − %s dB = %s dBA", number(n.level), number(found.Value), number(level))
		if found.Value < 0 {
			sum = fmt.Sprintf("%s dBA; a negative rating of %s dB credits nothing", number(n.level), number(found.Value))
		}
		return []Estimate{{Method: method, Level: record.Num(level), Mark: secondarySource,
			Working: how + sum + "; it is not known what percentage of wearings reaches the rating; " + said}}
	}
	own := estimate(method, secondarySource, under)
	own.Working = how + own.Working + "; " + said
	out := []Estimate{own}
	if t.UncertaintyDB.Known && par.Percent != percent {
		if under, ok := acoustics.UnderPAR(n.level, par, percent); ok {
			asked := estimate(fmt.Sprintf("%s, for %s %% of wearings", method, number(percent)), fromMemory, under)
			asked.Working = how + asked.Working
			out = append(out, asked)
		}
	}
	return out
}

// ratingOf gives the personal attenuation rating of a fit test in dB: that of both ears together, or where only
// the ears are recorded that of the ear with less.
func ratingOf(t *record.FitTest) (par record.Number, how string) {
	switch {
	case t.PARDB.Known:
		return t.PARDB, ""
	case t.LeftPARDB.Known && t.RightPARDB.Known:
		lower := min(t.LeftPARDB.Value, t.RightPARDB.Value)
		return record.Num(lower), fmt.Sprintf("lower of left %s dB and right %s dB = %s dB; ", number(t.LeftPARDB.Value), number(t.RightPARDB.Value), number(lower))
	}
	return record.Number{}, ""
}

// peakEstimates give the peak of the deciding measurement under the protector, for each kind of impulse (EN 458,
// informative, from memory). They need a C-weighted peak and H, M and L.
func peakEstimates(p *record.Protector, n noise) []Estimate {
	if !n.peak.Known || !p.H.Known || !p.M.Known || !p.L.Known || p.H.Value < p.M.Value || p.M.Value < p.L.Value {
		return nil
	}
	var out []Estimate
	peak := acoustics.Peak{Level: n.peak.Value, Weighting: acoustics.C}
	for _, kind := range []acoustics.Impulse{acoustics.HighFrequency, acoustics.MediumFrequency, acoustics.LowFrequency} {
		under, err := acoustics.UnderPeak(peak, acoustics.HML{High: p.H.Value, Medium: p.M.Value, Low: p.L.Value}, kind)
		if err != nil {
			continue
		}
		out = append(out, estimate(fmt.Sprintf("peak in dBC, if the impulses are of %s", kind), fromMemory, under))
	}
	return out
}

// classEstimates give the class of protector that a table asks for at the 8-hour level, where the label has a
// class: AS/NZS 1269.3 beside an SLC80, CSA Z94.2 beside a noise reduction rating (both from memory). The tables
// take levels by equal energy.
func classEstimates(rating string, p *record.Protector, n noise) []Estimate {
	if p.Class == "" || !n.known || !n.equalEnergy {
		return nil
	}
	var method, needed string
	switch rating {
	case "slc80":
		method, needed = "class of protector needed (AS/NZS 1269.3)", asnzsNeeded(n.level)
		if class, ok := acoustics.ASNZSClass(p.SLC80.Value); ok && p.SLC80.Known {
			needed += fmt.Sprintf("; SLC80 %s dB is class %d", number(p.SLC80.Value), class)
		}
	case "nrr":
		method, needed = "class of protector needed (CSA Z94.2)", csaNeeded(n.level)
	default:
		return nil
	}
	return []Estimate{{Method: method, Mark: fromMemory, Working: fmt.Sprintf("%s dBA asks for %s; the label says %s", number(n.level), needed, p.Class)}}
}

func asnzsNeeded(level float64) string {
	switch class, _ := acoustics.ASNZSClassNeeded(level); class {
	case 0:
		return "a choice by octave bands, made by a specialist"
	case 5:
		return "class 5"
	default:
		return fmt.Sprintf("class %d or higher", class)
	}
}

func csaNeeded(level float64) string {
	c, _ := acoustics.CSAClassNeeded(level)
	text := fmt.Sprintf("class %s or grade %s", c.Classes, c.Grades)
	if c.MuffClasses != "" {
		text = fmt.Sprintf("a plug of class %s or grade %s under a muff of class %s or grade %s", c.Classes, c.Grades, c.MuffClasses, c.MuffGrades)
	}
	if c.LimitedTime {
		text += ", and a limit of the time"
	}
	return text
}
