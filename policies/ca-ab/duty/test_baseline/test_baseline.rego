# METADATA
# title: Initial baseline test
# description: >-
#   A worker exposed to excess noise is given an initial baseline hearing test at the employer's expense as soon as
#   practicable, and not later than 6 months after employment, or after the exposure begins through a change of duties
#   or process. A record that the test was done is enough; no threshold is asked for.
# custom:
#   cite: OHS Code, s. 223(1)(a)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram, examination, measurement, assignment]
#   remedy: Have the worker tested now by an audiometric technician, and record that it was done.
package duty.test_baseline

import rego.v2

obligations contains {
	"key": stretch.from,
	"after": stretch.from,
	"within": "baseline_time",
	"by": first,
	"during": {"from": stretch.from, "to": stretch.to},
	"note": sprintf("exposure to excess noise began on %s", [stretch.from]),
	"because": [exposure.ref | some exposure in input.exposures; exposure.from == stretch.from; exposure.ref != null],
} if {
	some stretch in input.enrolled
}

not_owed contains "no exposure to excess noise is known" if count(input.enrolled) == 0

first := {"date": done[0][0], "ref": done[0][1]} if {
	count(done) > 0
} else := null

# Every hearing test that was done, with thresholds or with an outcome only, oldest first. A retest repeats another test.
done := sort({[a.date, a.ref] |
	some a in input.audiograms
	not a.invalidated
	a.ears_with_result > 1
	a.purpose != "retest"
} | {[e.attended_on, e.ref] |
	some e in input.examinations
	e.kind == "hearing_test"
	e.attended_on != null
	e.purpose != "retest"
})
