# METADATA
# title: Annual audiogram (recommended)
# description: >-
#   After the baseline, every worker at or above the REL has a monitoring audiogram every year, made during or after the
#   shift. Annually is read as within twelve months of the audiogram before. Whether it was made during the shift is not
#   in the records.
# custom:
#   cite: NIOSH 98-126, 1.6.3 (from memory)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [audiogram]
#   remedy: >-
#     Test the worker now, during the shift, and compare the result with the baseline.
package duty.annual_audiogram

import rego.v2

obligations contains {"every": "audiogram_interval", "during": stretch, "by": "audiogram.valid"} if some stretch in after_baseline

# The parts of the worker's time in the program that come after the baseline.
after_baseline := [stretch.tested | some stretch in input.enrolled; stretch.tested != null]

not_owed contains "no stretch at or above the REL is known" if count(input.enrolled) == 0

not_owed contains "there is no baseline yet" if {
	count(input.enrolled) > 0
	count(after_baseline) == 0
}
