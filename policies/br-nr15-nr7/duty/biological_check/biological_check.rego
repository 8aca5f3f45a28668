# METADATA
# title: Biological check before the exams
# description: >-
#   The audiometer has a biological check (aferição biológica) before the exams are made. In the records it is the
#   functional check of the day.
# custom:
#   cite: NR-7 Annex II item 3.2 III
#   subject: instrument
#   topic: test-quality
#   severity: major
#   evidence: [calibration, audiogram]
#   remedy: >-
#     Check the audiometer before the first exam of each day and keep the log; have a professional look at the
#     exams of the days without a check.
package duty.biological_check

import rego.v2

obligations contains {
	"key": year.year,
	"holds": checked_on_every_day(year),
	"on": year.last,
	"note": said(year),
	"missing": ["which audiometer was used, and its checks" | checked_on_every_day(year) == null],
	"because": [year.ref],
	"facts": {
		"days_of_use": year.days,
		"days_without_check": year.unchecked_days,
		"first_day_without_check": year.first_unchecked,
		"exams_on_those_days": year.tests_unchecked,
		"workers_tested_on_those_days": year.workers_unchecked,
	},
} if {
	some year in input.years
}

not_owed contains "no exam was made with it" if count(input.years) == 0

checked_on_every_day(year) if {
	year.unchecked_days == 0
} else := null if {
	input.registered == false
} else := false

said(year) := null if {
	year.unchecked_days == 0
} else := sprintf("no biological check is on record for %d of %d days of use in %s", [year.unchecked_days, year.days, year.year])
