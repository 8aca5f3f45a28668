# METADATA
# title: Fit of the protector tested
# description: >-
#   Since 31 March 2023 each worker who wears hearing protectors is tested for their fit, by a qualitative or
#   quantitative method. From secondary sources; no interval and no time is known.
# custom:
#   cite: OHS Code, s. 222
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [fit_test, protector_issue]
#   remedy: Test the fit of the protector on the worker, and record the outcome.
package duty.fit_tested

import data.common
import rego.v2

obligations contains {
	"key": sprintf("%s/%s", [input.protection.protector, input.protection.date]),
	"holds": holds,
	"note": said[holds],
	"because": common.refs([input.protection, input.protection.fit_test]),
	"facts": {"protector": input.protection.protector, "par_db": input.protection.par_db},
} if {
	concerned
}

not_owed contains "the worker does not wear protectors above their level now, or fit tests were not required yet" if not concerned

concerned if {
	common.at(data.parameters.fit_test_methods, input.as_of) != null
	input.protection != null
	common.any_current(input.exposed.protectors)
}

default holds := false

holds if {
	input.protection.fit_test != null
	input.protection.fit_failed == null
}

said := {
	true: null,
	false: "no fit test of this protector that was passed is on record for the worker",
}
