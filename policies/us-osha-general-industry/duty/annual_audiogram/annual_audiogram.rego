# METADATA
# title: Annual audiogram
# description: >-
#   At least annually after obtaining the baseline audiogram, the employer obtains a new audiogram for each employee
#   exposed at or above the action level. A retest in time counts as the audiogram of that year. The text does not say
#   whether a year is twelve months or a calendar year; a site may elect the second reading.
# custom:
#   cite: 29 CFR 1910.95(g)(6)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram]
#   remedy: Test the worker now and compare the result with the baseline.
package duty.annual_audiogram

import rego.v2

obligations contains {"every": "audiogram_interval", "during": stretch, "by": "audiogram.valid"} if {
	not once_in_each_calendar_year
	some stretch in after_baseline
}

obligations contains {"every": "audiogram_interval_calendar", "during": stretch, "by": "audiogram.valid"} if {
	once_in_each_calendar_year
	some stretch in after_baseline
}

once_in_each_calendar_year if input.choices.annual == "calendar_year"

# The parts of the worker's time in the program that come after the baseline.
after_baseline := [stretch.tested | some stretch in input.enrolled; stretch.tested != null]

not_owed contains "no stretch at or above the action level is known" if count(input.enrolled) == 0

not_owed contains "there is no baseline yet" if {
	count(input.enrolled) > 0
	count(after_baseline) == 0
}
