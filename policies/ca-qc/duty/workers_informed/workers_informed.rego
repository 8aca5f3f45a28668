# METADATA
# title: Workers informed of the risk and the means
# description: >-
#   The workers are told that their workplace situation is at risk of exceeding a limit, and of the means. From a
#   secondary source; the section number is from memory. A notice on or after 16 June 2023 is asked for, since the worker
#   came into the situation and since it is known to be above a limit.
# custom:
#   cite: r. 13, Division XV, section number not known
#   subject: worker
#   topic: information
#   severity: minor
#   evidence: [notice, measurement, assignment]
#   remedy: Tell the worker of the situation and of the means now, and keep a dated notice.
package duty.workers_informed

import data.common
import rego.v2

obligations contains {
	"key": "now",
	"after": since,
	"by": first_told,
	"note": "the worker is in a situation above a limit",
	"facts": {"since": since},
} if {
	concerned
}

not_owed contains "the worker is not known to be above a limit now, or the section is not in force" if not concerned

concerned if {
	input.as_of >= commencement
	count(above) > 0
}

above := [spell | some spell in input.exposed.limit; spell.current]

commencement := min([period.from | some period in data.parameters.sections_in_force.values])

now := [exposure | some exposure in input.exposures; common.covers(exposure, input.as_of)]

# The first day of the situation of now: in the group without a break, and above a limit.
since := max(array.concat([commencement], array.concat(
	[spell.from | some spell in above],
	[exposure.from |
		some exposure in input.exposures
		exposure.from <= input.as_of
		exposure.group == now[0].group
		not continued(exposure)
	],
)))

continued(exposure) if {
	some earlier in input.exposures
	earlier.to == exposure.from
	earlier.group == exposure.group
}

first_told := {"date": told[0][0], "ref": told[0][1]} if {
	told := sort([[notice.date, notice.ref] |
		some notice in input.told_of_exposure
		notice.date >= since
	])
	count(told) > 0
} else := null
