# METADATA
# title: Daily check of the audiometer (guidance)
# description: >-
#   Guidance, not law. Before each day of use somebody listens to the audiometer.
# custom:
#   cite: HSE L108, audiometers (guidance)
#   subject: instrument
#   topic: test-quality
#   severity: minor
#   evidence: [calibration, audiogram]
#   remedy: Listen to the audiometer before the first test of each day, and keep the log.
package duty.listening_check

import rego.v2

obligations contains {
	"key": year.year,
	"holds": checked_on_every_day(year),
	"on": year.last,
	"note": said(year),
	"missing": ["which audiometer was used, and its checks" | checked_on_every_day(year) == null],
	"because": [year.ref],
	"facts": {"days_of_use": year.days, "days_without_check": year.unchecked_days, "first_day_without_check": year.first_unchecked},
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
} else := sprintf("no check is on record for %d of %d days of use in %s", [year.unchecked_days, year.days, year.year])
