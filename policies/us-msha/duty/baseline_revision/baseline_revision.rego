# METADATA
# title: Baseline revised
# description: >-
#   An annual audiogram must be deemed to be a revised baseline when, in the judgement of the physician or audiologist,
#   the standard threshold shift that it reveals is permanent, or its thresholds indicate significant improvement over
#   the baseline. Only the ear that was so judged is revised, and the reason is recorded, since a reportable hearing loss
#   is counted from a revision for improvement only.
# custom:
#   cite: 30 CFR 62.170(c)(1)-(2)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, audiogram, tester]
#   remedy: >-
#     Have a physician or audiologist judge whether the shift is permanent or hearing has improved; if so, revise the
#     baseline of that ear, and record who judged it and why.
package duty.baseline_revision

import data.common
import rego.v2

# A baseline was moved.
obligations contains object.union(verdict(revision), {
	"key": sprintf("revision/%s/%s", [revision.date, concat("+", revision.ears)]),
	"on": revision.date,
	"facts": {"ears": revision.ears, "decided_by": revision.by, "reason": revision.result},
	"health": revision.hearing,
	"because": [ref | some ref in [revision.ref, revision.audiogram]; ref != null],
}) if {
	some revision in revisions
}

# The next test shows a shift again: whether it is permanent is a professional's judgement.
obligations contains {
	"key": sprintf("permanence/%s/%s", [again.date, again.ears]),
	"ask": "Is the shift permanent, so that the later audiogram is deemed the revised baseline of that ear?",
	"of": "physician or audiologist",
	"by": again.opinion,
	"on": again.date,
	"note": "the next test shows the shift again",
	"facts": {"ears": again.ears},
	"health": again.hearing,
	"because": common.refs([again.shift, again, again.opinion]),
} if {
	some again in input.persistent
}

# It was so judged: the revision is compulsory.
obligations contains {
	"key": sprintf("judged/%s", [judged.date]),
	"after": judged.date,
	"by": revision_since(judged.date),
	"note": sprintf("the shift or the improvement was judged on %s", [judged.date]),
	"because": [judged.ref],
} if {
	some judged in judgements
}

# It was so judged, and by whom is not known. Where the next test shows the shift again, that question is put instead.
obligations contains {
	"key": sprintf("judged/%s", [judged.date]),
	"holds": null,
	"note": sprintf("the shift was judged permanent, or hearing improved, on %s, and it is not known by whom", [judged.date]),
	"missing": ["the profession of who judged it"],
	"because": [judged.ref],
} if {
	some judged in of_unknown
}

# A new baseline after a long absence is the matter of baseline-kept.
revisions := [revision | some revision in input.revisions; not set_anew(revision)]

set_anew(revision) if revision.result == "new_baseline"

judged_by_anybody := {judged |
	some test in input.audiograms
	some judged in test.follow_ups
	judged.kind in {"persistence_opinion", "medical_opinion"}
	judged.result in {"persistent", "improved"}
}

judgements := {judged | some judged in judged_by_anybody; judged.by_is in data.measures.hearing.professionals}

of_unknown := {judged |
	some judged in judged_by_anybody
	judged.by_is == null
	count(input.persistent) == 0
	revision_since(judged.date) == null
}

revision_since(day) := later[0] if {
	later := [{"date": revision.date, "ref": revision.ref} | some revision in revisions; revision.date >= day]
	count(later) > 0
} else := null

verdict(revision) := {
	"holds": false,
	"note": sprintf("who moved the baseline is no physician or audiologist: %s", [replace(revision.by, "_", " ")]),
} if {
	revision.by != null
	not revision.by in data.measures.hearing.professionals
} else := {
	"holds": false,
	"note": sprintf("the baseline was moved for an ear without shift or improvement: %s", [concat(" and ", revision.unfounded)]),
} if {
	count(revision.unfounded) > 0
} else := {
	"holds": null,
	"missing": unknown(revision),
	"note": "a baseline was moved, and the records do not show whether that was right",
} if {
	count(unknown(revision)) > 0
} else := {
	"holds": true,
	"note": "a professional moved the baseline of an ear with a shift or an improvement",
}

unknown(revision) := array.concat(
	[gap.lack |
		some gap in [
			{"of": revision.by, "lack": "profession of who decided"},
			{"of": revision.audiogram, "lack": "the audiogram that became the baseline"},
			{"of": reason(revision), "lack": "the reason, persistent or improved"},
		]
		gap.of == null
	],
	[sprintf("thresholds of the %s ear", [ear]) | some ear in revision.undecided],
)

reason(revision) := revision.result if {
	revision.result in {"persistent", "improved"}
} else := null

not_owed contains "no baseline was moved, and nothing raises the question" if {
	count(revisions) == 0
	count(input.persistent) == 0
	count(judgements) == 0
	count(of_unknown) == 0
}
