# METADATA
# title: Register of noise
# description: >-
#   The employer keeps up to date, in the prevention program or else in a register, the situations at risk with the
#   day on which each was identified, the reasonable means with the days on which each was begun and completed, and
#   the reports of measurements.
# custom:
#   cite: r. 13, s. 141.5
#   subject: site
#   topic: records
#   severity: major
#   evidence: [document, measurement]
#   remedy: Enter situations, means and measurement reports in the register, and record what it covers.
package duty.noise_register

import data.common
import rego.v2

obligations contains {
	"holds": false,
	"note": "no register, and no part of the prevention program that holds its entries, is on record",
	"because": common.refs([input.latest_measurement]),
} if {
	something_to_enter
	count(registers) == 0
}

obligations contains {
	"key": content,
	"holds": held(content),
	"note": note(content),
	"missing": common.missing(held(content), "what the register covers"),
	"because": common.refs(registers),
} if {
	something_to_enter
	count(registers) > 0
	some content in common.at(data.parameters.register_contents, input.as_of)
}

not_owed contains "nothing was measured and nobody is known to be above a limit, or the section is not in force" if not something_to_enter

something_to_enter if {
	common.at(data.parameters.register_contents, input.as_of) != null
	input.measurements + input.enrolled_ever > 0
}

registers := [paper | some paper in input.documents; paper.kind == "noise_register"]

covered := common.covered(registers)

held(content) if content in covered

held(content) := false if {
	count(covered) > 0
	not content in covered
}

held(_) := null if count(covered) == 0

note(content) := sprintf("the register holds no %s", [replace(content, "_", " ")]) if {
	held(content) == false
} else := null
