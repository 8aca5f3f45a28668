# METADATA
# title: Acoustic calibration of the audiometer
# description: >-
#   The acoustic calibration of the audiometer is checked at least annually by Appendix E; an exhaustive calibration
#   includes it. A deviation of 10 dB or more in a functional check requires an acoustic calibration, so the audiometer is
#   not used for tests until then.
# custom:
#   cite: 29 CFR 1910.95(h)(5)(i)-(ii), Appendix E
#   subject: instrument
#   topic: test-quality
#   severity: major
#   evidence: [calibration, audiogram, instrument]
#   remedy: Take the audiometer out of use until its acoustic calibration is checked, and have a professional look at the tests made meanwhile.
package duty.acoustic_calibration

import data.common
import rego.v2

obligations contains {
	"every": "acoustic_interval",
	"during": input.in_use,
	"by": "calibration.acoustic",
	"touches": "test.use",
} if {
	audiometer_in_use
	not unknown_audiometer
}

obligations contains {
	"holds": null,
	"note": "hearing tests were made with an audiometer of which there is neither a record nor a calibration",
	"missing": ["which audiometer was used, and its calibrations"],
	"facts": {"tests": input.tests, "workers_tested": input.workers},
} if {
	audiometer_in_use
	unknown_audiometer
}

obligations contains {
	"key": sprintf("deviation/%s", [check.date]),
	"holds": true,
	"on": check.date,
	"note": sprintf("the audiometer was not used between %s and an acoustic calibration", [found_in(check)]),
	"because": common.refs([check, check.acoustic]),
	"facts": {"largest_deviation_db": check.largest_db},
} if {
	some check in checks_that_may_require_calibration
	check.used_before_acoustic == null
}

obligations contains {
	"key": sprintf("deviation/%s", [check.date]),
	"holds": false,
	"on": check.date,
	"note": sprintf("the audiometer was used on %s, after %s and before an acoustic calibration", [check.used_before_acoustic.date, found_in(check)]),
	"because": common.refs([check, check.used_before_acoustic, check.acoustic]),
	"facts": {"largest_deviation_db": check.largest_db, "used_on": check.used_before_acoustic.date},
} if {
	some check in checks_that_may_require_calibration
	check.largest_db != null
	check.used_before_acoustic != null
}

obligations contains {
	"key": sprintf("deviation/%s", [check.date]),
	"holds": null,
	"on": check.date,
	"note": sprintf("the audiometer was used on %s, after %s", [check.used_before_acoustic.date, found_in(check)]),
	"missing": ["the deviation found in the functional check"],
	"because": common.refs([check, check.used_before_acoustic, check.acoustic]),
	"facts": {"used_on": check.used_before_acoustic.date},
} if {
	some check in checks_that_may_require_calibration
	check.largest_db == null
	check.used_before_acoustic != null
}

not_owed contains "no audiometer in use" if {
	not audiometer_in_use
	count(checks_that_may_require_calibration) == 0
}

audiometer_in_use if {
	is_audiometer
	input.in_use != null
}

unknown_audiometer if {
	input.registered == false
	input.latest_calibration == null
}

is_audiometer if input.kind == "audiometer"

is_audiometer if {
	input.kind == null
	input.tests > 0
}

checks_that_may_require_calibration := [check |
	some check in input.deviations
	check.kind == "functional"
	may_require_calibration(check)
]

may_require_calibration(check) if check.largest_db == null

found_in(check) := sprintf("a deviation of %v dB in the functional check of %s", [check.largest_db, check.date]) if {
	check.largest_db != null
} else := sprintf("the functional check of %s, which was not passed", [check.date])

may_require_calibration(check) if {
	tolerated := common.at(data.parameters.functional_deviation, check.date)
	tolerated != null
	check.largest_db >= tolerated
}
