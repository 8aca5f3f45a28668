package text

import (
	"fmt"
	"strings"

	"hearduty/internal/finding"
)

// observedAs says of each kind of observation in words what there is so many of.
var observedAs = map[string]string{
	"missing_frequency":      "without a required frequency",
	"out_of_range":           "outside the range of audiometers",
	"off_steps":              "off the steps of audiometers",
	"at_limit":               "at or beyond the highest level presented",
	"all_zero":               "all zero",
	"flat":                   "the same at all frequencies",
	"identical_ears":         "the same in both ears",
	"identical_earlier":      "the same as in an earlier test",
	"improbable_improvement": "far better than in the test before",
	"repeat_difference":      "other when repeated",
	"asymmetry":              "clearly worse in one ear",
	"cross_hearing":          "perhaps heard by the other ear",
	"notch":                  "with a notch at high frequencies",
	"room_noise":             "perhaps raised by noise in the test room",
	"before_birth":           "dated before the birth",
	"before_hire":            "made before the hire",
	"after_leaving":          "made after the worker left",
	"same_day":               "made on the day of another test, not as a retest",
	"no_functional_check":    "made on a day without a functional check of the audiometer",
	"stated_shift_differs":   "stated to shift or not to shift otherwise than the thresholds show",

	"training_outside_employment":         "of training outside employment",
	"protector_issued_outside_employment": "of protectors handed over outside employment",
	"calibration_after_tests":             "of calibrations dated after the tests that they should cover",
	"checks_all_same_result":              "of functional checks that all found the same",
	"one_day_of_month":                    "of tests all dated on one day of the month",
	"results_identical_across_workers":    "of thresholds that several workers share",
}

// observations writes what somebody may want to look at: the numbers by kind, and each one if they are listed.
func observations(p *page, r *finding.Report) {
	if len(r.ObservationCounts) == 0 {
		return
	}
	total := 0
	for _, c := range r.ObservationCounts {
		total += c.Number
	}
	p.heading(bold, fmt.Sprintf("Observations (%d, never verdicts)", total))
	more := ""
	if len(r.Observations) == 0 {
		more = " --all lists each of them."
	}
	p.para(0, 0, "Hearing tests, single ears of them, and other records that a professional or an auditor may want to look at. Each has harmless causes, and none changes a finding."+more)
	for i, c := range r.ObservationCounts {
		if i > 0 && r.ObservationCounts[i-1].Site == c.Site {
			continue
		}
		var parts []string
		for _, same := range r.ObservationCounts[i:] {
			if same.Site == c.Site {
				parts = append(parts, fmt.Sprintf("%d %s", same.Number, observedWords(same.Kind)))
			}
		}
		p.item(0, "- ", c.Site+": "+strings.Join(parts, "; ")+".")
	}
	if len(r.Observations) > 0 {
		p.blank()
	}
	for _, o := range r.Observations {
		ear := ""
		if o.Ear != "" {
			ear = earWords[o.Ear] + ": "
		}
		p.item(2, "- ", fmt.Sprintf("%s: %s %s: %s%s %s", o.Site, o.Subject.Kind, o.Subject.ID, ear, sentence(o.Text), places(&o)))
	}
}

// fewPlaces is the number of further records whose places are written.
const fewPlaces = 5

// places says where the records of an observation stand: the first, some more, and how many there are beside.
func places(o *finding.Observation) string {
	list := []string{place(finding.Evidence{Record: o.Record, File: o.File, Sheet: o.Sheet, Row: o.Row})}
	for i, e := range o.More {
		if i == fewPlaces {
			list = append(list, fmt.Sprintf("and %d more", len(o.More)-i))
			break
		}
		list = append(list, place(e))
	}
	return strings.Join(list, ", ")
}

var earWords = map[string]string{"left": "left ear", "right": "right ear", "both": "both ears"}

func observedWords(kind string) string {
	if words, ok := observedAs[kind]; ok {
		return words
	}
	return strings.ReplaceAll(kind, "_", " ")
}
