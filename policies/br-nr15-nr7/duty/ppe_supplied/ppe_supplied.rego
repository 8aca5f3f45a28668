# METADATA
# title: Protectors supplied and recorded
# description: >-
#   Where collective measures do not bring the exposure within the tolerance limit, the organization supplies
#   hearing protectors (EPI) free of charge before the exposure begins, and records the supply in a book, form or
#   electronic system, biometric ones included. What is not recorded was not supplied.
# custom:
#   cite: NR-6 6.5.1 a and d, 6.5.2 (secondary source)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector_issue, measurement]
#   remedy: >-
#     Supply the worker with a protector and record the issue.
package duty.ppe_supplied

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"on": input.protection.date,
	"note": "a protector is at hand",
	"because": [input.protection.ref],
	"facts": {"protector": input.protection.protector},
} if {
	above_limit
	input.protection != null
}

obligations contains {
	"holds": false,
	"note": "the worker is above the tolerance limit and no protector is on record as supplied",
	"facts": {"above_the_limit_since": common.current_since(input.exposed.limit)},
} if {
	above_limit
	input.protection == null
}

obligations contains {
	"holds": null,
	"note": sprintf("it is not known whether the worker is above the tolerance limit: %s", [concat("; ", not_known)]),
	"missing": ["a dose that can be held against the tolerance limit"],
} if {
	not above_limit
	count(not_known) > 0
	input.protection == null
}

obligations contains {
	"holds": true,
	"on": input.protection.date,
	"note": "a protector is at hand, whether or not the worker is above the tolerance limit",
	"because": [input.protection.ref],
} if {
	not above_limit
	count(not_known) > 0
	input.protection != null
}

not_owed contains "the worker is not known to be above the tolerance limit" if {
	not above_limit
	count(not_known) == 0
}

above_limit if common.any_current(input.exposed.limit)

# Of a worker who is not known to be above the action level, enrolment tells.
not_known := sort({stretch.reason |
	common.any_current(input.enrolled)
	some stretch in input.exposure_unknown.limit
	common.covers(stretch, input.as_of)
})
