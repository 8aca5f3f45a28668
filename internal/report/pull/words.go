package pull

import (
	"fmt"
	"math/big"

	"hearduty/internal/judge"
	"hearduty/internal/sample"
)

// bandWords say the bands in words.
var bandWords = map[judge.Band]string{
	judge.OverLimit: "over the limit level", judge.AtAction: "at or above the action level",
	judge.BelowAction: "below the action level", judge.UnknownBand: "exposure not known",
}

// topic is something to check in a file by hand.
type topic struct{ Column, Word, Ask string }

// topics are what to check in each file.
var topics = []topic{
	{"hearing_tests", "Hearing tests", "the baseline and every test since are there, each with its day, its thresholds, the tester and the audiometer"},
	{"comparison", "Comparison", "each test was compared with the baseline, and what followed from a shift is there"},
	{"notices", "Notices", "what the worker had to be told, of exposure and of shifts, is there with its day"},
	{"training", "Training", "each session that was due is there, with its day and topics"},
	{"protector", "Protector", "which protector was handed over, when, from what choice, and that it was fitted"},
	{"exposure", "Exposure", "the assessment of the worker's noise exposure, the latest one of the group"},
}

// unit stands behind a number of percent; its blank is one at which no line ends.
const unit = "\u00a0%"

// percent writes a share in percent.
func percent(share *big.Rat, decimals int) string {
	return new(big.Rat).Mul(share, big.NewRat(100, 1)).FloatString(decimals) + unit
}

// plainPercent writes a share in percent with as many decimals as it has, four at most.
func plainPercent(share *big.Rat) string {
	for decimals := range 4 {
		if text := percent(share, decimals); exactly(share, decimals) {
			return text
		}
	}
	return percent(share, 4)
}

func exactly(share *big.Rat, decimals int) bool {
	scale := big.NewRat(100, 1)
	for range decimals {
		scale.Mul(scale, big.NewRat(10, 1))
	}
	return new(big.Rat).Mul(share, scale).IsInt()
}

// of writes a number with its share of all files.
func of(n, all int) string {
	return fmt.Sprintf("%d of %d (%s)", n, all, percent(big.NewRat(int64(n), int64(all)), 1))
}

func files(n int) string {
	if n == 1 {
		return "1 file"
	}
	return fmt.Sprintf("%d files", n)
}

func faulty(n int) string {
	switch n {
	case 0:
		return "none of them is faulty"
	case 1:
		return "no more than 1 of them is faulty"
	}
	return fmt.Sprintf("no more than %d of them are faulty", n)
}

// promise says what the sample can show.
func (s *Sheet) promise() string {
	n := len(s.Files)
	if n == s.Population {
		return fmt.Sprintf("All %s are pulled, so nothing is left to chance.", files(n))
	}
	confidence := plainPercent(s.Goal.Confidence)
	text := fmt.Sprintf("If %s, then with %s confidence at most %s files are faulty.", faulty(s.Goal.Expect), confidence, of(s.Shows(), s.Population))
	if s.Size > 0 {
		if more := n - s.Size; more > 0 {
			text += fmt.Sprintf(" The sample has %d more than asked for, so that every part is seen.", more)
		}
		return text
	}
	few := "none of them"
	if s.Goal.Expect > 0 {
		few = fmt.Sprintf("no more than %d of them", s.Goal.Expect)
	}
	return text + fmt.Sprintf(" The size was chosen for that: tolerated are %s, %d files; if one more than that were faulty, the chance to find %s would be %s.",
		plainPercent(s.Goal.Tolerable), s.Tolerated(), few, percent(s.Missed(), 2)) + s.without()
}

// without says how large the sample would be without parts, as tables of sizes have it.
func (s *Sheet) without() string {
	n := sample.SizeFor(s.Population, s.Tolerated()+1, s.Goal.Expect, s.Goal.Confidence)
	if n == len(s.Files) {
		return ""
	}
	return fmt.Sprintf(" A sample without parts by site and exposure would need %d.", n)
}

// population says which files could be drawn.
func (s *Sheet) population() string {
	who := "workers who are employed"
	if s.Enrolled {
		who = "workers in the program who are employed"
	}
	return fmt.Sprintf("%s of %s at the sites on %s.", files(s.Population), who, s.AsOf)
}

// seed says how to draw the same files again.
func (s *Sheet) seed() string {
	return fmt.Sprintf("Seed %d: the same seed, records, day and flags draw the same files again. Whoever wants a draw that nobody can foresee names a seed of their own with --seed.", s.Seed)
}

// cautions are what every reader of the sheet must know.
func (s *Sheet) cautions() []string {
	out := []string{
		"The sample speaks of the files that it was drawn from, as they are when they are pulled, and only of what chance leaves open. It is no finding of law and does not make a site compliant.",
		"A file is faulty if anything that the law asks for is missing in it or wrong. A file that cannot be found counts as faulty. No file may be exchanged for another one.",
		"The parts by site and exposure are drawn in proportion, so that each is seen. They are too small for statements of their own.",
	}
	if s.Goal.Expect > 0 {
		out = append(out, "Where faulty files are expected, the figures are those of a sample without parts. Numbers of files are whole, so that they can differ a little from that.")
	}
	if s.Rejects > 0 {
		out = append(out, fmt.Sprintf("%s of the records could not be used. A worker whose row is among them could not be drawn.", rows(s.Rejects)))
	}
	if s.Veiled {
		out = append(out, "The ids are pseudonyms. Whoever has the records finds each worker by file and row. A draw with pseudonyms is another one than that without.")
	}
	return out
}

func rows(n int) string {
	if n == 1 {
		return "1 row"
	}
	return fmt.Sprintf("%d rows", n)
}
