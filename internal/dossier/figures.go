package dossier

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// figures gives a comparison's audiometric figures. The sums are written only if the measures ask for them;
// more of them may follow those of the comparison.
func (h *hearing) figures(c *comparison, more ...string) Hearing {
	s, freqs := c.test.standing().rec, h.b.Measures.Hearing.Shift.Frequencies
	out := Hearing{
		Left: average(c.change[0].Average()), Right: average(c.change[1].Average()),
		LeftCorrected: average(c.corrected[0].Average()), RightCorrected: average(c.corrected[1].Average()),
		LeftLevel: average(s.Left.Sum(freqs).Average()), RightLevel: average(s.Right.Sum(freqs).Average()),
		LeftAt: c.outcome[0].Shown, RightAt: c.outcome[1].Shown,
	}
	if h.b.Measures.Hearing.Sums {
		for i := range c.base {
			out.Working = append(out.Working, h.changeWorking(c, i)...)
		}
		out.Working = append(append(out.Working, more...), h.otherWorking(c)...)
		out.Working = append(out.Working, h.information(c)...)
	}
	return out
}

func average(v float64, ok bool) record.Number { return record.Number{Value: v, Known: ok} }

// changeWorking writes how the verdict on one ear's shift comes about: the change, the change less the part
// that age explains, and the test that shows it first where the law asks for a second one.
func (h *hearing) changeWorking(c *comparison, i int) []string {
	scheme := &h.b.Measures.Hearing.Shift.Scheme
	base, s := c.base[i], c.test.standing()
	amount, ok := h.b.Law.Number(scheme.Parameter(), s.rec.Date)
	if !ok {
		return []string{fmt.Sprintf("%s ear: the law has no figure for a shift on %s", earNames[i], s.rec.Date)}
	}
	out := []string{fmt.Sprintf("%s ear against the baseline of %s: %s", earNames[i], base.rec.Date, scheme.Working(base.ear(i), s.ear(i), nil, amount))}
	aging, why := h.aging(scheme.Frequencies, base.rec.Date, s.rec.Date)
	switch {
	case aging != nil:
		decides := "for information only, since the site has not elected it"
		if h.ageCorrection() {
			decides = "which decides"
		}
		from, _ := audiometry.AgeOn(h.birth, base.rec.Date)
		to, _ := audiometry.AgeOn(h.birth, s.rec.Date)
		out = append(out, fmt.Sprintf("%s ear with age correction from %d to %d years, %s: %s", earNames[i], from, to, decides,
			scheme.Working(base.ear(i), s.ear(i), aging, amount)))
	case why != "":
		out = append(out, earNames[i]+" ear: "+why)
	}
	if first := c.first[i]; first != nil {
		out = append(out, fmt.Sprintf("%s ear, shown first on %s: %s", earNames[i], first.rec.Date,
			scheme.Working(base.ear(i), first.ear(i), h.deciding(scheme, base, first), amount)))
	}
	return out
}

// levelWorking writes the hearing level of the recording rule for the ears that meet it.
func (h *hearing) levelWorking(s *test, ears [2]bool) []string {
	m := &h.b.Measures.Hearing
	amount, ok := h.b.Law.Number(m.Recordable.AtLeast, s.rec.Date)
	if !m.Sums || !ok {
		return nil
	}
	level := audiometry.Scheme{Of: audiometry.OfLevel, Rule: audiometry.Mean, Frequencies: m.Shift.Frequencies, AtLeast: m.Recordable.AtLeast}
	var out []string
	for i := range ears {
		if ears[i] {
			out = append(out, fmt.Sprintf("%s ear, hearing level without age correction: %s", earNames[i], level.Working(nil, s.ear(i), nil, amount)))
		}
	}
	return out
}

// otherWorking writes what the other schemes of the bundle say.
func (h *hearing) otherWorking(c *comparison) []string {
	var out []string
	others, t := h.b.Measures.Hearing.Others, c.test.standing()
	for n := range others {
		s := &others[n]
		amount, ok := h.b.Law.Number(s.Parameter(), t.rec.Date)
		if !ok {
			continue
		}
		if s.Of == audiometry.OfEars {
			out = append(out, s.Name+", right less left: "+s.WorkingEars(&t.rec.Left, &t.rec.Right, amount))
			continue
		}
		base := h.baselines(s.Baseline, c.test)
		for i, ear := range earNames {
			out = append(out, fmt.Sprintf("%s, %s ear: %s", s.Name, ear, s.Working(base[i].ear(i), t.ear(i), h.deciding(s, base[i], t), amount)))
		}
	}
	return out
}

// information writes what decides nothing: the pure-tone average of each ear, and how much the median of
// people of the same sex and age with healthy ears rises in the time of the comparison (ISO 7029:2017).
func (h *hearing) information(c *comparison) []string {
	var out []string
	s := c.test.standing()
	for i, ear := range earNames {
		if text := pureTone(s.ear(i)); text != "" {
			out = append(out, fmt.Sprintf("for information only: pure-tone average of the %s ear, %s", ear, text))
		}
	}
	for i := range c.base {
		if i == 1 && c.base[0] == c.base[1] {
			break
		}
		if text := h.medianRise(c.base[i].rec.Date, s.rec.Date); text != "" {
			out = append(out, "for information only, it judges no single person: "+text)
		}
	}
	return out
}

// pureTone writes the average over 500, 1000, 2000 and 4000 Hz, and nothing if a threshold is missing.
func pureTone(e *audiometry.Ear) string {
	sum := e.Sum(audiometry.PTA4[:])
	value, ok := sum.Average()
	if !ok {
		return ""
	}
	terms := make([]string, len(audiometry.PTA4))
	for i, hz := range audiometry.PTA4 {
		terms[i] = fmt.Sprintf("%d Hz %s", hz, e.At(hz))
	}
	bound := ""
	if sum.AtLeast {
		bound = "at least "
	}
	return fmt.Sprintf("%s: %s%s dB HL", strings.Join(terms, ", "), bound, strconv.FormatFloat(math.Round(value*100)/100, 'f', -1, 64))
}

// medianRise writes the rise of the median between two days at the frequencies of the shift, as far as the
// standard covers sex, ages and frequencies.
func (h *hearing) medianRise(from, to Date) string {
	before, ok1 := audiometry.AgeOn(h.birth, from)
	after, ok2 := audiometry.AgeOn(h.birth, to)
	if !ok1 || !ok2 {
		return ""
	}
	var terms []string
	for _, hz := range h.b.Measures.Hearing.Shift.Frequencies {
		low, err1 := audiometry.AgeMedian(audiometry.ISO7029Of2017, h.sex, before, hz)
		high, err2 := audiometry.AgeMedian(audiometry.ISO7029Of2017, h.sex, after, hz)
		if err1 == nil && err2 == nil {
			terms = append(terms, fmt.Sprintf("%.1f dB at %d Hz", high-low, hz))
		}
	}
	if terms == nil {
		return ""
	}
	return fmt.Sprintf("between %d and %d years of age the median of people of this sex with healthy ears rises by %s (ISO 7029:2017)",
		before, after, strings.Join(terms, ", "))
}
