# METADATA
# title: Letter with the results
# description: >-
#   Within 10 working days of receiving the results of an audiogram, or of a follow-up evaluation under 62.173, the
#   operator notifies the miner in writing of the results and their interpretation, including any standard threshold
#   shift or reportable hearing loss, and of the need and reasons for further testing. The letter is owed for every
#   audiogram, whatever it shows.
# custom:
#   cite: 30 CFR 62.175(a)
#   subject: worker
#   topic: notice
#   severity: major
#   evidence: [notice, audiogram, follow_up]
#   remedy: Write to the miner now, with the results and their interpretation, and keep a dated copy.
package duty.result_letter

import data.common
import rego.v2

obligations contains object.union(letter(test, test.date, test.received_on), {
	"key": test.id,
	"note": said(test, sprintf("the result of the audiogram of %s was received on %s", [test.date, test.received_on])),
	"because": common.refs([test, written(test, test.date)]),
}) if {
	some test in received
}

obligations contains object.union(letter(test, evaluation.date, evaluation.date), {
	"key": sprintf("%s/evaluation", [test.id]),
	"note": sprintf("the result of the follow-up evaluation was received on %s", [evaluation.date]),
	"because": common.refs([test, evaluation, written(test, evaluation.date)]),
}) if {
	some [test, evaluation] in evaluations
}

evaluations := [[test, done] |
	some test in input.audiograms
	some done in test.follow_ups
	done.kind == "evaluation_results"
]

received := [test |
	some test in input.audiograms
	test.received_on != null
	under_program(test)
]

under_program(test) if test.in_program

under_program(test) if {
	test.invalidated
	test.enrolled
}

# A letter may go out with the result on the day of the test, before the result is filed.
letter(test, earliest, after) := {"holds": null, "missing": ["whether the notice was in writing"]} if {
	written(test, earliest) == null
	some told in results_told(test, earliest)
	told.written == null
} else := {"after": after, "within": "result_letter_time", "by": written(test, earliest)}

# Told of the result of this test, on or after a day.
results_told(test, day) := [told |
	some told in test.notices
	told.about in {"result", "abnormal_result", "shift"}
	told.date >= day
]

written(test, day) := {"date": letters[0].date, "ref": letters[0].ref} if {
	letters := [told | some told in results_told(test, day); told.written == true]
	count(letters) > 0
} else := null

said(test, text) := sprintf("%s, of which the miner was told, but not in writing", [text]) if {
	written(test, test.date) == null
	some told in results_told(test, test.date)
	told.written == false
} else := text

not_owed contains "no result was received of a test under the program" if {
	count(received) == 0
	count(evaluations) == 0
}
