# METADATA
# title: Exit audiogram (recommended)
# description: >-
#   When a worker leaves the job, or work at or above the REL, an exit audiogram is made before, after at least 12 hours
#   of quiet. A test made for another purpose is not taken for it; a test that is known by its outcome only counts.
#   Where the exposure of the following days is not known, it is not known whether it ended.
# custom:
#   cite: NIOSH 98-126, 1.6.5 (from memory)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [audiogram, examination, worker, assignment]
#   remedy: >-
#     Invite the worker for the exit audiogram even now, and enter it with its purpose and the hours of quiet.
package duty.exit_audiogram

import data.common
import rego.v2

obligations contains {
	"key": stretch.to,
	"before": stretch.to,
	"by": found(stretch),
	"note": sprintf("%s was the first day no longer at or above the REL", [stretch.to]),
} if {
	some stretch in ended
	not left_open(stretch)
}

obligations contains {
	"key": stretch.to,
	"holds": null,
	"note": sprintf("exposure is not known from %s on, so it is not known whether work at or above the REL ended", [stretch.to]),
	"missing": ["the exposure from that day on"],
} if {
	some stretch in ended
	left_open(stretch)
}

obligations contains {
	"key": sprintf("%s/quiet", [stretch.to]),
	"value": test.quiet_hours,
	"at_least": "quiet_period",
	"on": test.date,
	"missing": ["hours without noise before the exit audiogram" | test.quiet_hours == null],
	"note": sprintf("hours of quiet before the exit audiogram of %s", [test.date]),
	"because": [test.ref],
} if {
	some stretch in ended
	some test in input.audiograms
	test.ref == found(stretch).ref
}

ended := [stretch | some stretch in input.enrolled; stretch.to != null]

# Without an exit test nothing says that the stretch ended where the exposure of the following day is not known.
left_open(stretch) if {
	found(stretch) == null
	some open in input.exposure_unknown.rel
	common.covers(open, stretch.to)
}

# The first exit test since the stretch began and before the next one begins.
found(stretch) := tests[0] if {
	tests := sort([test | some test in exit_tests; test.date >= stretch.from; not of_a_later_stretch(test, stretch)])
	count(tests) > 0
} else := null

of_a_later_stretch(test, stretch) if {
	some other in input.enrolled
	other.from > stretch.from
	test.date >= other.from
}

exit_tests := array.concat(
	[{"date": test.date, "ref": test.ref} | some test in input.audiograms; test.purpose == "exit"; not test.invalidated],
	[{"date": e.attended_on, "ref": e.ref} | some e in input.examinations; e.kind == "hearing_test"; e.purpose == "exit"; e.attended_on != null],
)

not_owed contains "the worker has never been in the program" if count(input.enrolled) == 0

not_owed contains "exposure at or above the REL has not ended" if {
	count(input.enrolled) > 0
	count(ended) == 0
}
