package pull

import (
	"fmt"
	"io"
	"math/big"

	"hearduty/internal/sample"
)

// Result is what an auditor found in a sample.
type Result struct {
	Population, Drawn, Faulty int
	NotFound                  int // of the faulty ones, those whose file could not be found
	Goal                      sample.Goal
	Parts                     []Part // by site and exposure, where the sheet tells them
}

// Part is the files of one site and band of exposure.
type Part struct {
	Words         string
	Drawn, Faulty int
}

// Check says why the numbers cannot be those of a sample.
func (r *Result) Check() error {
	switch {
	case r.Population < 1:
		return fmt.Errorf("a population of %d files cannot be; write the number from which the files were drawn", r.Population)
	case r.Drawn < 1 || r.Drawn > r.Population:
		return fmt.Errorf("%d files cannot be drawn from %d; correct one of the two numbers", r.Drawn, r.Population)
	case r.Faulty < 0 || r.Faulty > r.Drawn:
		return fmt.Errorf("%d faulty files cannot be among %d; correct one of the two numbers", r.Faulty, r.Drawn)
	}
	return nil
}

// AtMost is the number of faulty files among all that there are at most, with the confidence.
func (r *Result) AtMost() int {
	return sample.AtMost(r.Population, r.Drawn, r.Faulty, r.Goal.Confidence)
}

// Write writes what the sample has shown.
func (r *Result) Write(w io.Writer, width int) error {
	l := newLines(w, width)
	found := of(r.Faulty, r.Drawn)
	l.put("", fmt.Sprintf("Faulty: %s files of the sample, which was drawn from %d.", found, r.Population))
	if r.NotFound > 0 {
		l.put("", fmt.Sprintf("Among them are %d that could not be found.", r.NotFound))
	}
	most, confidence := r.AtMost(), plainPercent(r.Goal.Confidence)
	if r.Drawn == r.Population {
		l.put("", fmt.Sprintf("Every file was looked at, so that nothing is left to chance: %s are faulty.", of(r.Faulty, r.Population)))
	} else {
		l.put("", fmt.Sprintf("With %s confidence at most %s files are faulty: if it were one more, a sample like this would hold so few of them in %s of all draws.",
			confidence, of(most, r.Population), percent(sample.Chance(r.Population, most+1, r.Drawn, r.Faulty), 2)))
		l.put("", fmt.Sprintf("At least %d are, since they were found.", r.Faulty))
	}
	tolerated := r.Goal.TooMany(r.Population) - 1
	share := plainPercent(r.Goal.Tolerable)
	switch {
	case most <= tolerated:
		l.put("", fmt.Sprintf("That is no more than the %s (%s) that are tolerated.", files(tolerated), share))
	case r.Faulty > tolerated:
		l.put("", fmt.Sprintf("That is more than the %s (%s) that are tolerated, by the faulty files found alone.", files(tolerated), share))
	default:
		l.put("", fmt.Sprintf("So it is not shown that no more than the %s (%s) are faulty that are tolerated. It is not shown either that more are.", files(tolerated), share))
	}
	if len(r.Parts) > 0 {
		l.heading("Found by site and exposure; the parts are too small for statements of their own")
		for _, p := range r.Parts {
			l.put("  - ", fmt.Sprintf("%s: %d of %d", p.Words, p.Faulty, p.Drawn))
		}
	}
	l.heading("What this does not say")
	l.put("  - ", "It holds for the files that the sample was drawn from, if all of it was looked at and chance alone chose it. It is no finding of law and does not make a site compliant.")
	l.put("  - ", "Each faulty file that was found is a matter of its own, whatever the bound says.")
	return l.Flush()
}

// Percent reads a share in percent, such as 95 or 97.5.
func Percent(text string) (*big.Rat, bool) {
	if !percentForm.MatchString(text) {
		return nil, false
	}
	share, ok := new(big.Rat).SetString(text)
	if !ok {
		return nil, false
	}
	return share.Quo(share, big.NewRat(100, 1)), true
}
