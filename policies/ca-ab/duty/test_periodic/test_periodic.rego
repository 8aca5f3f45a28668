# METADATA
# title: Test every second year
# description: >-
#   After the second test the worker is tested at least every second year as long as the exposure to excess noise
#   lasts. A record that the test was done is enough.
# custom:
#   cite: OHS Code, s. 223(1)(c)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram, examination]
#   remedy: Have the worker tested now by an audiometric technician, and record that it was done.
package duty.test_periodic

import data.common
import rego.v2

obligations contains {
	"every": "periodic_interval",
	"during": {"from": max([second[0][0], stretch.from]), "to": stretch.to},
	"by": "test.done",
	"because": [second[0][1]],
} if {
	count(second) > 0
	some stretch in stretches
}

not_owed contains "there is no second test, or no excess noise since" if count(stretches) == 0

stretches := [stretch |
	count(second) > 0
	some stretch in input.enrolled
	not common.over(stretch, second[0][0])
]

second := [test | some test in done; test[0] > done[0][0]]

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
