# METADATA
# title: Fit of custom plugs checked (guidance)
# description: >-
#   Custom plugs (Otoplastiken) are used only if their fit is checked on delivery and then every two years at most.
# custom:
#   cite: TRLV Lärm 3; DGUV Information 212-024 8.3; DGUV Regel 112-194
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [protector_issue, fit_test]
#   remedy: Have the fit of the plugs checked and record it, or give the worker another protector.
package duty.custom_plug_check

import data.common
import rego.v2

obligations contains {
	"key": "on delivery",
	"after": input.protection.date,
	"by": input.protection.fit_test,
	"note": "the worker has custom plugs",
	"because": common.refs([input.protection]),
} if {
	has_custom_plugs
}

# The latest check is on record; the next one is counted from it.
obligations contains {
	"key": sprintf("after %s", [input.protection.fit_test.date]),
	"after": input.protection.fit_test.date,
	"within": "custom_check_interval",
	"by": null,
	"note": "the fit of custom plugs is checked again",
	"because": common.refs([input.protection, input.protection.fit_test]),
} if {
	has_custom_plugs
	input.protection.fit_test != null
}

obligations contains {
	"key": "outcome",
	"holds": false,
	"note": "the latest check of the custom plugs was not passed",
	"because": common.refs([input.protection.fit_failed]),
} if {
	has_custom_plugs
	input.protection.fit_failed != null
}

not_owed contains "the worker has no custom plugs" if not has_custom_plugs

# Types come in the order in which the protectors were handed over; the checks are those of the latest.
has_custom_plugs if {
	input.protection != null
	types := input.protection.types
	types[count(types) - 1] == "custom"
}
