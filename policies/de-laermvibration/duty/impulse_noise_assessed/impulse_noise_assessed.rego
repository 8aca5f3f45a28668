# METADATA
# title: Peak levels assessed
# description: >-
#   The assessment covers the kind, extent and duration of the exposure and the action values, of which each has a
#   C-weighted peak level beside the daily level.
# custom:
#   cite: LärmVibrationsArbSchV § 3(2) no 1 (a)-(b), § 6
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [measurement, group]
#   remedy: Measure the C-weighted peak level, or record that the group's noise holds no impulses.
package duty.impulse_noise_assessed

import data.common
import rego.v2

obligations contains {
	"holds": answer,
	"note": said,
	"missing": [words | answer == null; words := "whether impulse or impact noise occurs in the group, or a C-weighted peak level"],
	"because": common.refs(with_peak),
	"facts": {"highest_peak_dbc": highest},
} if {
	input.impulsive != false
	not no_noise_expected
}

not_owed contains "the group's noise holds no impulses" if input.impulsive == false

not_owed contains "nothing suggests that the group works in noise, and it was not measured" if no_noise_expected

no_noise_expected if {
	input.suspected_noisy == false
	input.impulsive == null
	count(input.measurements) == 0
}

# A peak of before a change counts until the group was measured again.
with_peak := [measurement |
	some measurement in input.measurements
	measurement.current == true
	measurement.peak_dbc != null
]

highest := max([measurement.peak_dbc | some measurement in with_peak]) if count(with_peak) > 0

else := null

answer if {
	count(with_peak) > 0
} else := false if {
	input.impulsive == true
} else := null

said := null if {
	answer == true
} else := "the noise holds impulses, and no C-weighted peak level of the group as it is is on record" if {
	answer == false
} else := "no C-weighted peak level of the group as it is is on record, and the record of the group does not say that it needs none"
