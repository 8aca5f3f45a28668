# METADATA
# title: Retest after an invalid audiogram
# description: >-
#   The operator provides a retest within 30 calendar days of receiving a determination that an audiogram is invalid, if
#   any medical pathology has improved to the point that a valid audiogram may be obtained. The day of the record
#   "invalidated" is taken as the day on which the determination came in.
# custom:
#   cite: 30 CFR 62.172(b)(1)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [follow_up, audiogram]
#   remedy: >-
#     Provide the retest now; where a pathology stands in the way, have the physician or audiologist say whether a valid
#     audiogram may be obtained.
package duty.invalid_audiogram_retest

import data.common
import rego.v2

obligations contains object.union(verdict(test), {"key": test.id}) if some test in invalid

# Found invalid, and made while in the program, or as the test that was to be its baseline.
invalid := [test | some test in input.audiograms; test.invalidated; counts(test)]

counts(test) if test.enrolled

counts(test) if {
	test.purpose == "baseline"
	count(input.enrolled) > 0
}

verdict(test) := {
	"after": possible.date,
	"within": "retest_time",
	"by": retest(test),
	"during": in_program(test.date),
	"note": sprintf("a valid audiogram may be obtained since %s", [possible.date]),
	"because": common.refs([test, possible]),
} if {
	possible := first(test, "medical_opinion", "retest_possible")
	possible != null
} else := {
	"lifted": "a pathology stands in the way of a valid audiogram",
	"cite": "30 CFR 62.172(b)(1)",
	"because": common.refs([test, first(test, "medical_opinion", "retest_not_possible")]),
} if {
	first(test, "medical_opinion", "retest_not_possible") != null
} else := {
	"ask": "Has the pathology improved to the point that a valid audiogram may be obtained?",
	"of": "physician or audiologist",
	"by": retest(test),
	"note": sprintf("the audiogram of %s is invalid, and the miner was to be referred", [test.date]),
	"because": common.refs([test, referral(test)]),
} if {
	referral(test) != null
} else := {
	"after": determination(test).date,
	"within": "retest_time",
	"by": retest(test),
	"during": in_program(test.date),
	"note": sprintf("the audiogram of %s was found invalid", [test.date]),
	"because": common.refs([test, determination(test)]),
}

determination(test) := {"date": found[0].date, "ref": found[0].ref} if {
	found := [done | some done in test.follow_ups; done.kind == "invalidated"]
	count(found) > 0
} else := {"date": null, "ref": test.ref}

first(test, kind, result) := {"date": found[0].date, "ref": found[0].ref} if {
	found := [done | some done in test.follow_ups; done.kind == kind; done.result == result]
	count(found) > 0
} else := null

referral(test) := first(test, "referral_decision", "referral_needed") if {
	first(test, "referral_decision", "referral_needed") != null
} else := {"date": found[0].date, "ref": found[0].ref} if {
	found := [done | some done in test.follow_ups; done.kind == "referral"]
	count(found) > 0
} else := null

# The first valid test after it.
retest(test) := {"date": later[0].date, "ref": later[0].ref} if {
	later := [other |
		some other in input.audiograms
		other.date > test.date
		not other.invalidated
		other.ears_with_result > 1
	]
	count(later) > 0
} else := null

in_program(day) := {"from": stretches[0].from, "to": stretches[0].to} if {
	stretches := [stretch | some stretch in input.enrolled; common.covers(stretch, day)]
	count(stretches) > 0
} else := null

not_owed contains "no audiogram was found invalid" if count(invalid) == 0
