package audiometry

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// Working writes how Judge comes to its verdict, such as
//
//	2000 Hz 20 − 10, 3000 Hz 25 − 15 − 2 for age; average change 9.0 dB; at least 10 dB: no
//
// Its arguments are those of Judge. The text holds hearing thresholds, which are medical records: show it
// only to readers who asked for them.
func (s Scheme) Working(baseline, current *Ear, aging []int, amountDB float64) string {
	o := s.Judge(baseline, current, aging, amountDB)
	if s.Of == OfLevel {
		baseline, aging = nil, nil
	}
	return s.terms(baseline, current, aging) + s.result(o, amountDB)
}

// WorkingEars writes how JudgeEars comes to its verdict, right less left, in the manner of Working.
func (s Scheme) WorkingEars(left, right *Ear, amountDB float64) string {
	o, worse := s.JudgeEars(left, right, amountDB)
	text := s.terms(left, right, nil) + s.result(o, amountDB)
	if worse != "" {
		text += "; worse: " + worse
	}
	return text
}

// terms writes the levels; without a baseline, those of the current test alone.
func (s Scheme) terms(baseline, current *Ear, aging []int) string {
	terms := make([]string, len(s.Frequencies))
	for i, hz := range s.Frequencies {
		terms[i] = fmt.Sprintf("%d Hz %s", hz, shownLevel(current.At(hz)))
		if baseline != nil {
			terms[i] += " − " + shownLevel(baseline.At(hz))
		}
		if aging != nil {
			terms[i] += fmt.Sprintf(" − %d for age", aging[i])
		}
	}
	return strings.Join(terms, ", ")
}

func shownLevel(t Threshold) string {
	if t.State == NotRecorded {
		return "(not recorded)"
	}
	return t.String()
}

func (s Scheme) result(o Outcome, amountDB float64) string {
	what := map[string]string{"": OfChange, OfChange: OfChange, OfLevel: OfLevel, OfEars: "difference"}[s.Of]
	figure := map[string]string{
		Mean: "average " + what, Total: "sum", Any: "largest " + what, Adjacent: "largest " + what + " of two neighbours", Peak: "largest " + what,
	}[s.Rule]
	limit := "at least "
	if s.Above != "" {
		limit = "above "
	}
	text := fmt.Sprintf("; %s %s; %s%s dB: %s", figure, o.enclosed(), limit, strconv.FormatFloat(amountDB, 'f', -1, 64), o.Verdict)
	if len(o.Shown) > 0 && s.Rule != Mean && s.Rule != Total {
		text += " at " + hertz(o.Shown)
	}
	if len(o.Missing) > 0 {
		text += "; no level at " + hertz(o.Missing)
	}
	return text
}

// enclosed writes the figure, or the bounds that enclose it.
func (o Outcome) enclosed() string {
	belowKnown, aboveKnown := !math.IsInf(o.Low, -1), !math.IsInf(o.High, 1)
	switch {
	case belowKnown && aboveKnown && o.Low != o.High:
		return fmt.Sprintf("from %.1f to %.1f dB", o.Low, o.High)
	case belowKnown && aboveKnown:
		return fmt.Sprintf("%.1f dB", o.Low)
	case belowKnown:
		return fmt.Sprintf("at least %.1f dB", o.Low)
	case aboveKnown:
		return fmt.Sprintf("at most %.1f dB", o.High)
	}
	return "not known"
}

// hertz writes a list of frequencies.
func hertz(list []int) string {
	words := make([]string, len(list))
	for i, hz := range list {
		words[i] = strconv.Itoa(hz)
	}
	return strings.Join(words, ", ") + " Hz"
}
