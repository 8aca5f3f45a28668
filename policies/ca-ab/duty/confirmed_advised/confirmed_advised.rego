# METADATA
# title: Worker advised of a confirmed result
# description: >-
#   The physician or audiologist who confirms an abnormal result advises the worker within 30 days. The time is from
#   memory.
# custom:
#   cite: OHS Code, s. 223(4)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, notice, examination]
#   remedy: Have the worker advised of the confirmed result now, and record the day.
package duty.confirmed_advised

import data.common
import rego.v2

obligations contains {
	"key": test.id,
	"after": opinion[0],
	"within": "confirmed_notice_time",
	"by": first_since(test, opinion[0]),
	"note": sprintf("the result of the test of %s was confirmed on %s", [test.date, opinion[0]]),
	"because": [test.ref, opinion[1]],
	"health": {"definitions_met": test.definitions},
} if {
	some test in abnormal
	opinion := opinions(test)[0]
}

not_owed contains "no abnormal result was confirmed" if {
	every test in abnormal {
		count(opinions(test)) == 0
	}
}

first_since(test, day) := {"date": list[0][0], "ref": list[0][1]} if {
	list := sort([told | some told in test.told; told[0] >= day])
	count(list) > 0
} else := null

opinions(test) := sort([[done.date, done.ref] |
	some done in test.done
	done.kind == "medical_opinion"
	may_confirm(done.by_is)
])

may_confirm(profession) if profession == null

may_confirm(profession) if profession in ["physician", "otolaryngologist", "audiologist"]

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
