# METADATA
# title: Peak level measured
# description: >-
#   In a workplace situation with impulse or impact noise the C-weighted peak level is measured, since 140 dBC may
#   never be exceeded, whatever the duration. Where nobody has said whether there are impulses, this remains open.
# custom:
#   cite: r. 13, s. 131(2)
#   subject: group
#   topic: monitoring
#   severity: major
#   evidence: [group, measurement]
#   remedy: Measure the C-weighted peak of the situation, or record that its noise holds no impulses.
package duty.peak_measured

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"on": latest.date,
	"because": [latest.ref],
} if {
	concerned
	count(peaks) > 0
}

obligations contains {
	"holds": false,
	"note": "the noise holds impulses, and no C-weighted peak of the situation as it is is on record",
	"because": common.refs([input.first_survey]),
	"facts": {"workers": input.workers},
} if {
	concerned
	count(peaks) == 0
	input.impulsive == true
}

obligations contains {
	"holds": null,
	"note": "no C-weighted peak is on record, and nobody has said whether the noise holds impulses",
	"missing": ["the C-weighted peak, or that there are no impulses"],
	"because": common.refs([input.first_survey]),
} if {
	concerned
	count(peaks) == 0
	input.impulsive == null
}

not_owed contains "the noise holds no impulses, or the situation was never measured" if not concerned

concerned if {
	measured
	input.impulsive != false
}

measured if input.first_survey != null

measured if count(input.measurements) > 0

peaks := [m | some m in input.measurements; m.current; m.peak_dbc != null]

latest := peaks[count(peaks) - 1]
