# METADATA
# title: Fit test of each protector
# description: Within 60 days after a protector is handed over, its attenuation is measured on the worker.
# custom:
#   cite: CS-4 3.3
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [protector_issue, fit_test]
#   remedy: Measure the attenuation of the protector on the worker, and record the personal attenuation rating.
package duty.fit_tested

import data.common
import rego.v2

obligations contains {
	"after": input.protection.date,
	"within": "fit_test_time",
	"by": input.protection.fit_test,
	"because": common.refs([input.protection]),
	"facts": {"protector": input.protection.protector, "par_db": input.protection.par_db},
} if {
	in_program_now
	input.protection != null
}

not_owed contains "the records do not show exposure at or above the action level now" if not in_program_now

not_owed contains "no protector at hand, which is a finding of its own" if {
	in_program_now
	input.protection == null
}

in_program_now if common.any_current(input.enrolled)
