# METADATA
# title: Exhaustive calibration of the audiometer
# description: >-
#   An exhaustive calibration by ANSI S3.6-1969 is made at least every two years; test frequencies below 500 Hz and above
#   6000 Hz may be left out. A deviation of 15 dB or more in an acoustic calibration requires an exhaustive one, so the
#   audiometer is not used for tests until then.
# custom:
#   cite: 29 CFR 1910.95(h)(5)(ii)-(iii), Appendix E
#   subject: instrument
#   topic: test-quality
#   severity: major
#   evidence: [calibration, audiogram, instrument]
#   remedy: Send the audiometer for an exhaustive calibration before it is used again, and have a professional look at the tests made meanwhile.
package duty.exhaustive_calibration

import data.common
import rego.v2

obligations contains {
	"every": "exhaustive_interval",
	"during": input.in_use,
	"by": "calibration.exhaustive",
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
	"note": sprintf("the audiometer was not used between %s and an exhaustive calibration", [found_in(check)]),
	"because": common.refs([check, check.exhaustive]),
	"facts": {"largest_deviation_db": check.largest_db},
} if {
	some check in calibrations_that_may_require_more
	check.used_before_exhaustive == null
}

obligations contains {
	"key": sprintf("deviation/%s", [check.date]),
	"holds": false,
	"on": check.date,
	"note": sprintf("the audiometer was used on %s, after %s and before an exhaustive calibration", [check.used_before_exhaustive.date, found_in(check)]),
	"because": common.refs([check, check.used_before_exhaustive, check.exhaustive]),
	"facts": {"largest_deviation_db": check.largest_db, "used_on": check.used_before_exhaustive.date},
} if {
	some check in calibrations_that_may_require_more
	check.largest_db != null
	check.used_before_exhaustive != null
}

obligations contains {
	"key": sprintf("deviation/%s", [check.date]),
	"holds": null,
	"on": check.date,
	"note": sprintf("the audiometer was used on %s, after %s", [check.used_before_exhaustive.date, found_in(check)]),
	"missing": ["the deviation found in the acoustic calibration"],
	"because": common.refs([check, check.used_before_exhaustive, check.exhaustive]),
	"facts": {"used_on": check.used_before_exhaustive.date},
} if {
	some check in calibrations_that_may_require_more
	check.largest_db == null
	check.used_before_exhaustive != null
}

not_owed contains "no audiometer in use" if {
	not audiometer_in_use
	count(calibrations_that_may_require_more) == 0
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

calibrations_that_may_require_more := [check |
	some check in input.deviations
	check.kind == "acoustic"
	may_require_more(check)
]

may_require_more(check) if check.largest_db == null

found_in(check) := sprintf("a deviation of %v dB in the acoustic calibration of %s", [check.largest_db, check.date]) if {
	check.largest_db != null
} else := sprintf("the acoustic calibration of %s, which was not passed", [check.date])

may_require_more(check) if {
	tolerated := common.at(data.parameters.acoustic_deviation, check.date)
	tolerated != null
	check.largest_db >= tolerated
}
