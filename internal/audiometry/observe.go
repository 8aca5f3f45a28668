package audiometry

// Ears are both ears of one hearing test.
type Ears struct{ Left, Right *Ear }

// Tested is one hearing test as Observe looks at it. Zero values say that nothing is known.
type Tested struct {
	Ears
	Required  []int        // frequencies in Hz that each ear must hold
	Repeat    [2]Threshold // repeated threshold at 1000 Hz, left and right
	Insert    bool         // insert earphones were used
	Masked    bool         // the record says that the other ear was masked
	FineSteps bool         // the audiometer works in steps finer than 5 dB, as self-recording ones do
	Earlier   []Ears       // earlier tests of the same person, oldest first
}

// Observation is something about a hearing test that a professional may want to look at. It is never a
// verdict: every one of them has harmless causes. The text gives no threshold and no number, since
// audiograms are medical records.
type Observation struct {
	Kind        string `json:"kind" doc:"what was observed, in one word"`
	Text        string `json:"text" doc:"the observation in a sentence, without figures"`
	Frequencies []int  `json:"frequencies,omitempty" doc:"frequencies concerned, Hz"`
	Ear         string `json:"ear,omitempty" enum:"left|right|both" doc:"ear concerned"`
}

// ObservationKind is a kind of observation and where its check comes from.
type ObservationKind struct {
	Kind   string `json:"kind" doc:"what is observed, in one word"`
	Source string `json:"source" doc:"where the check comes from; ours if it is our own"`
}

// check looks for one kind of observation.
type check struct {
	ObservationKind
	text  string
	ear   func(t *Tested, side int) []int       // frequencies of one ear that show it
	both  func(t *Tested) (found bool, f []int) // or of the test as a whole
	whole bool                                  // the ear check names no frequencies
}

// checks are in the order in which Observe reports.
var checks = []check{
	{kind("missing_frequency", "29 CFR 1910.95(h)(1), and what other laws require"),
		"A frequency that the law requires has no threshold.", missingRequired, nil, false},
	{kind("out_of_range", "range seen in a national survey, 1999 to 2018"),
		"A threshold lies outside the range of audiometers; a digit may have slipped.", outOfRange, nil, false},
	{kind("off_steps", "ISO 8253-1, secondary source"),
		"A threshold lies off the steps in which audiometers are turned.", offSteps, nil, false},
	{kind("at_limit", "ours"),
		"The threshold is at or beyond the highest level presented, so that averages are lower bounds.", atLimit, nil, false},
	{kind("all_zero", "ours"),
		"All thresholds of the ear are zero; the values may stand for a test that was not made.", allZero, nil, true},
	{kind("flat", "ours"),
		"All thresholds of the ear are the same.", flat, nil, true},
	{kind("identical_ears", "ours"),
		"Both ears have the same thresholds at every frequency; one may be a copy of the other.", nil, identicalEars, true},
	{kind("identical_earlier", "ours"),
		"All thresholds are the same as in an earlier test; the values may have been copied.", nil, identicalEarlier, true},
	{kind("improbable_improvement", "ours"),
		"Hearing is far better than in the test before at several frequencies; one of the tests may be wrong.", improbableImprovement, nil, false},
	{kind("repeat_difference", "ISO 8253-1, secondary source"),
		"The repeated threshold differs from the first by more than the usual spread.", repeatDifference, nil, false},
	{kind("asymmetry", "professional referral guidance; that two neighbours are needed is from memory"),
		"This ear hears clearly worse than the other at neighbouring frequencies.", asymmetry, nil, false},
	{kind("cross_hearing", "a professional society's masking rule, from memory"),
		"The other ear may have heard the tones of this one, and no masking is recorded.", crossHearing, nil, false},
	{kind("notch", "from memory"),
		"The ear has a notch at high frequencies. This is information only; noise is one of several causes.", notch, nil, false},
	{kind("room_noise", "ours"),
		"Low tones are raised in both ears, as background noise in the test room would raise them.", nil, roomNoise, false},
}

func kind(name, source string) ObservationKind { return ObservationKind{name, source} }

// ObservationKinds lists the kinds that Observe knows, in its order.
func ObservationKinds() []ObservationKind {
	kinds := make([]ObservationKind, len(checks))
	for i, c := range checks {
		kinds[i] = c.ObservationKind
	}
	return kinds
}

// Observe looks at a test in the ways that the record allows: a check that lacks what it needs stays silent.
// The observations come in the order of ObservationKinds, the left ear before the right.
func Observe(t *Tested) []Observation {
	var out []Observation
	for _, c := range checks {
		if c.both != nil {
			if found, freqs := c.both(t); found {
				out = append(out, Observation{c.Kind, c.text, freqs, BothEars})
			}
			continue
		}
		for side, name := range [2]string{LeftEar, RightEar} {
			freqs := c.ear(t, side)
			if len(freqs) == 0 {
				continue
			}
			if c.whole {
				freqs = nil
			}
			out = append(out, Observation{c.Kind, c.text, freqs, name})
		}
	}
	return out
}

// side gives one ear, 0 left and 1 right.
func (e Ears) side(i int) *Ear {
	if i == 0 {
		return e.Left
	}
	return e.Right
}
