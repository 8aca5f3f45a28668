# METADATA
# title: Ceiling of impulses
# description: >-
#   Exposure to impulsive or impact noise should not exceed 140 dB peak sound pressure level. The wording is advisory and
#   names no weighting.
# custom:
#   cite: 29 CFR 1910.95(b), Table G-16 note 1
#   subject: group
#   topic: controls
#   severity: minor
#   evidence: [measurement, group]
#   remedy: Bring the peak down at its source or keep people away from it, and record the peak level at the next measurement.
package duty.impulse_ceiling

import rego.v2

obligations contains {
	"key": measurement.id,
	"value": measurement.peak_db,
	"at_most": "impulse_ceiling",
	"on": measurement.date,
	"note": sprintf("highest peak measured on %s", [measurement.date]),
	"because": [measurement.ref],
	"facts": {"peak_weighting": measurement.peak_weighting, "workers": input.workers},
} if {
	some measurement in with_peak
}

obligations contains {
	"value": null,
	"at_most": "impulse_ceiling",
	"note": "impulses may matter in this group and no measurement of how it is now has a peak level",
	"missing": ["a peak level"],
	"facts": {"workers": input.workers},
} if {
	peak_wanted
}

not_owed contains "no impulse noise on record" if {
	count(with_peak) == 0
	not peak_wanted
}

# A peak from before a change or control, after which the group was measured again, tells nothing of the group now.
with_peak := [measurement | some measurement in input.measurements; measurement.current; measurement.peak_db != null]

peak_wanted if {
	count(with_peak) == 0
	impulses_may_matter
}

impulses_may_matter if input.varied == true

impulses_may_matter if {
	some measurement in input.measurements
	measurement.peak_db != null
}
