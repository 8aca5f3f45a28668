# METADATA
# title: Second test
# description: >-
#   The worker is tested again not more than 12 months after the initial baseline test. A record that the test was
#   done is enough. After a baseline from before the law the 12 months begin with its first day.
# custom:
#   cite: OHS Code, s. 223(1)(b)
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram, examination]
#   remedy: Have the worker tested now by an audiometric technician, and record that it was done.
package duty.test_second

import data.common
import rego.v2

obligations contains {
	"key": done[0][0],
	"after": max([done[0][0], data.parameters.second_test_time.values[0].from]),
	"within": "second_test_time",
	"no_sooner_than": stretches[0].from,
	"by": link,
	"during": {"from": stretches[0].from, "to": stretches[0].to},
	"note": sprintf("the initial baseline test was on %s", [done[0][0]]),
	"because": [done[0][1]],
} if {
	count(done) > 0
	count(stretches) > 0
}

not_owed contains "there is no initial baseline test, or no excess noise since" if count(stretches) == 0

# The stretches in excess noise that are not over with the first test.
stretches := [stretch |
	some stretch in input.enrolled
	not common.over(stretch, done[0][0])
	count(done) > 0
]

link := {"date": second[0][0], "ref": second[0][1]} if {
	count(second) > 0
} else := null

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
