# METADATA
# title: Abnormal result forwarded
# description: >-
#   Where a test shows an abnormal audiogram or an abnormal shift the technician asks the worker for the relevant
#   medical history and forwards the results, the history and the baseline to the physician or audiologist whom the
#   employer has named. The wording of 2009 was read; it sets no time.
# custom:
#   cite: OHS Code, s. 223(3)(b), (c)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [audiogram, examination, follow_up]
#   remedy: Have results, history and baseline forwarded now, and record the day.
package duty.abnormal_forwarded

import data.common
import rego.v2

obligations contains {
	"key": test.id,
	"after": test.date,
	"by": first(test),
	"note": sprintf("the test of %s is abnormal", [test.date]),
	"because": [test.ref],
	"health": {"definitions_met": test.definitions},
} if {
	some test in abnormal
}

not_owed contains "no test under the program is known to be abnormal" if count(abnormal) == 0

first(test) := {"date": list[0][0], "ref": list[0][1]} if {
	list := sort([[done.date, done.ref] | some done in test.done; done.kind in ["referral", "history_forwarded"]])
	count(list) > 0
} else := null

# Tests that are abnormal: by the former definitions, by what was done or told after them, or by the outcome that the
# clinic gave.
abnormal := array.concat(
	[{"id": a.id, "date": a.date, "ref": a.ref, "definitions": met, "done": a.follow_ups, "told": told_of(a)} |
		some a in input.audiograms
		a.in_program
		a.date >= first_day
		met := shown(a.schemes)
		count(met) + count(marks(a.follow_ups, a.notices)) > 0
	],
	[{"id": e.id, "date": e.attended_on, "ref": e.ref, "definitions": [], "done": e.follow_ups, "told": results_of(e)} |
		some e in input.examinations
		e.kind == "hearing_test"
		e.attended_on != null
		not e.attended_on in with_thresholds
		found_abnormal(e)
		in_noise(e.attended_on)
	],
)

# Tests from before the law are not asked about.
first_day := data.parameters.baseline_time.values[0].from

with_thresholds := {a.date | some a in input.audiograms}

in_noise(day) if {
	some spell in input.enrolled
	common.covers(spell, day)
}

found_abnormal(e) if e.damage == true

found_abnormal(e) if e.result in ["early_signs", "concern", "worse", "referred"]

marks(follow_ups, notices) := array.concat(
	[done.ref | some done in follow_ups; done.kind in ["referral", "history_forwarded", "medical_opinion"]],
	[notice.ref | some notice in notices; notice.about in ["abnormal_result", "shift"]],
)

told_of(audiogram) := array.concat(
	[[notice.date, notice.ref] | some notice in audiogram.notices; notice.about in ["abnormal_result", "shift"]],
	[[done.date, done.ref] | some done in audiogram.follow_ups; done.kind == "worker_informed"],
)

results_of(e) := array.concat(
	[[e.results_on, e.ref] | e.results_on != null],
	[[done.date, done.ref] | some done in e.follow_ups; done.kind == "worker_informed"],
)

# The definitions of the former section 1 that a test meets, in either ear.
shown(schemes) := sort({name |
	some name in ["abnormal_low", "abnormal_high", "one_sided", "abnormal_shift"]
	schemes[name][_] == true
})
