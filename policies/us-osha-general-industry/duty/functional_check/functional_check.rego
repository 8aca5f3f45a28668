# METADATA
# title: Functional check of the audiometer
# description: >-
#   Before each day's use the working of the audiometer is checked by testing a person with known, stable hearing, and by
#   listening to its output for distorted or unwanted sounds.
# custom:
#   cite: 29 CFR 1910.95(h)(5)(i)
#   subject: instrument
#   topic: test-quality
#   severity: major
#   evidence: [calibration, audiogram]
#   remedy: Check the audiometer before the first test of each day and keep the log; have a professional look at the tests of the days without a check.
package duty.functional_check

import rego.v2

obligations contains {
	"key": year.year,
	"holds": checked_on_every_day(year),
	"on": year.last,
	"note": said(year),
	"missing": ["which audiometer was used, and its functional checks" | checked_on_every_day(year) == null],
	"because": [year.ref],
	"facts": {
		"days_of_use": year.days,
		"days_without_check": year.unchecked_days,
		"first_day_without_check": year.first_unchecked,
		"tests_on_those_days": year.tests_unchecked,
		"workers_tested_on_those_days": year.workers_unchecked,
	},
} if {
	some year in input.years
}

not_owed contains "no hearing test was made with it" if count(input.years) == 0

checked_on_every_day(year) if {
	year.unchecked_days == 0
} else := null if {
	input.registered == false
} else := false

said(year) := null if {
	year.unchecked_days == 0
} else := sprintf("no functional check is on record for %d of %d days of use in %s", [year.unchecked_days, year.days, year.year])
