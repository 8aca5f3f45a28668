# METADATA
# title: Triggering or worsening looked at by the physician
# description: >-
#   A sequential exam is compared with the reference exam, each ear for itself and without age correction. It is
#   suggestive of triggering (desencadeamento) of PAINPSE if the reference exam is within acceptable limits and
#   the mean at 3000, 4000 and 6000 Hz is worse by 10 dB or more, or one of these frequencies by 15 dB or more;
#   whether the sequential exam stays within 25 dB HL makes no difference. It is suggestive of worsening
#   (agravamento) if the reference exam is suggestive of PAINPSE and the mean at 500, 1000 and 2000 Hz or that at
#   3000, 4000 and 6000 Hz is worse by 10 dB or more, or any single frequency by 15 dB or more. In either case the
#   physician in charge of the PCMSO defines fitness. Suggestive is no diagnosis.
# custom:
#   cite: NR-7 Annex II items 5 and 9 (secondary source)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [audiogram, follow_up]
#   remedy: >-
#     Ask the occupational physician whether the change is by noise at work and whether the worker is fit for the
#     job, and enter the opinion (medical_opinion) with its result and the exam it is about.
package duty.change_assessed

import rego.v2

obligations contains {
	"key": case.id,
	"ask": "Is this a loss by noise at work, and is the worker fit for the job?",
	"of": "occupational physician",
	"by": opinion(case),
	"on": case.date,
	"note": sprintf("exam of %s: %s", [case.date, case.words]),
	"because": [case.ref],
} if {
	some case in cases
}

obligations contains {
	"key": test.id,
	"holds": true,
	"on": test.date,
	"note": "the exam shows neither triggering nor worsening that is not already on record",
	"because": [test.ref],
} if {
	some test in later_tests
	count(shown(test)) == 0
	not undecided(test)
	not hidden(test)
}

obligations contains {
	"key": test.id,
	"holds": null,
	"on": test.date,
	"note": "an earlier exam shows triggering or worsening and has not become the reference exam, so whether this one shows a further change cannot be told",
	"missing": ["a reference exam that holds the earlier change"],
	"because": [test.ref],
} if {
	some test in later_tests
	count(shown(test)) == 0
	not undecided(test)
	hidden(test)
}

obligations contains {
	"key": test.id,
	"holds": null,
	"on": test.date,
	"note": "whether the exam shows triggering or worsening cannot be told",
	"missing": ["thresholds of this exam and of the reference exam at all seven frequencies"],
	"because": [test.ref],
} if {
	some test in later_tests
	count(shown(test)) == 0
	undecided(test)
}

not_owed contains "no sequential exam was made while above the action level" if count(later_tests) == 0

# The exams that show triggering or worsening in an ear for the first time against a reference exam. Other duties read
# these, too.
cases := [{"id": test.id, "date": test.date, "ref": test.ref, "ears": ears, "words": words, "follow_ups": test.follow_ups, "notices": test.notices} |
	some test in later_tests
	ears := [ear | some [ear, _] in shown(test)]
	count(ears) > 0
	words := concat("; ", [sprintf("%s ear suggestive of %s", [ear, kind]) | some [ear, kind] in shown(test)])
]

later_tests := [test | some test in input.audiograms; test.enrolled; test.baseline_left != null; not test.invalidated]

shown(test) := [[ear, kind] |
	some ear in ["left", "right"]
	kind := kinds(test, ear)[0]
	not seen_before(test, ear)
]

kinds(test, ear) := array.concat(
	["triggering" | triggering(test, ear) == true],
	["worsening" | worsening(test, ear) == true],
)

# An earlier exam against the same reference exam shows it already.
seen_before(test, ear) if {
	some earlier in later_tests
	earlier.date < test.date
	reference(earlier, ear) == reference(test, ear)
	count(kinds(earlier, ear)) > 0
}

# The latest exam, where it is still compared with a reference exam against which an earlier exam has shown a change.
hidden(test) if {
	test.id == later_tests[count(later_tests) - 1].id
	some ear in ["left", "right"]
	count(kinds(test, ear)) > 0
	seen_before(test, ear)
}

undecided(test) if {
	some ear in {"left", "right"}
	triggering(test, ear) == null
}

undecided(test) if {
	some ear in {"left", "right"}
	worsening(test, ear) == null
}

triggering(test, ear) := all_of([
	opposite(in_reference(test, ear, "above_acceptable")),
	one_of([test.schemes.high_mean[ear], test.schemes.high_single[ear]]),
])

worsening(test, ear) := all_of([
	in_reference(test, ear, "noise_pattern"),
	one_of([test.schemes.low_mean[ear], test.schemes.high_mean[ear], test.schemes.any_single[ear]]),
])

reference(test, ear) := {"left": test.baseline_left, "right": test.baseline_right}[ear]

in_reference(test, ear, scheme) := answer if {
	some exam in input.audiograms
	exam.ref == reference(test, ear)
	answer := exam.schemes[scheme][ear]
} else := null

# Yes, no and not known, taken together.
all_of(answers) := false if {
	false in answers
} else := null if {
	null in answers
} else := true

one_of(answers) if {
	true in answers
} else := null if {
	null in answers
} else := false

opposite(answer) := {true: false, false: true, null: null}[answer]

opinion(case) := {"date": given[0].date, "ref": given[0].ref} if {
	given := [done |
		some done in case.follow_ups
		done.kind == "medical_opinion"
		done.by_is in data.measures.hearing.physicians
	]
	count(given) > 0
} else := null
