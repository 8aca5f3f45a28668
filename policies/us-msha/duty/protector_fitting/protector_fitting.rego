# METADATA
# title: Fitting of protectors
# description: >-
#   The operator ensures that the hearing protector is in good condition and is fitted and maintained by the
#   manufacturer's instructions. No measured fit test is asked for; one that was made and not passed shows that the fit
#   is not right.
# custom:
#   cite: 30 CFR 62.160(a)(3)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector_issue, follow_up, fit_test]
#   remedy: Fit the protectors on the miner by the manufacturer's instructions, change the model if it does not fit, and record who fitted them.
package duty.protector_fitting

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"on": input.protection.fitted.date,
	"because": common.refs([input.protection, input.protection.fitted]),
	"facts": {"protector": input.protection.protector},
} if {
	has_protector
	input.protection.fit_failed == null
	input.protection.fitted != null
}

obligations contains {
	"holds": false,
	"on": input.protection.fit_failed.date,
	"note": "the latest fit test of the protector was not passed",
	"because": common.refs([input.protection, input.protection.fit_failed]),
	"facts": {"protector": input.protection.protector},
} if {
	has_protector
	input.protection.fit_failed != null
}

obligations contains {
	"holds": null,
	"note": "the records do not say whether the protector was fitted on the miner",
	"missing": ["the initial fitting"],
	"because": common.refs([input.protection]),
	"facts": {"protector": input.protection.protector},
} if {
	has_protector
	input.protection.fit_failed == null
	input.protection.fitted == null
}

not_owed contains "the records do not show exposure at or above the action level now" if not in_program_now

not_owed contains "no protector at hand, which is a finding of its own" if {
	in_program_now
	not has_protector
}

in_program_now if common.any_current(input.enrolled)

has_protector if {
	in_program_now
	input.protection != null
}
