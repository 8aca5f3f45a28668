# METADATA
# title: Baseline revised
# description: >-
#   An annual audiogram may be substituted for the baseline audiogram when, in the judgement of the audiologist,
#   otolaryngologist or physician who is evaluating it, the standard threshold shift it reveals is persistent, or the
#   thresholds shown in it indicate significant improvement over the baseline. Each ear has its own baseline: only the
#   ear with the shift or the improvement may be revised.
# custom:
#   cite: 29 CFR 1910.95(g)(9)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, audiogram, tester]
#   remedy: >-
#     Have an audiologist, otolaryngologist or physician decide for each ear whether the baseline is revised, and keep
#     the old baseline for an ear that shows neither a shift nor an improvement.
package duty.baseline_revision

import data.common
import rego.v2

# A baseline was moved.
obligations contains object.union(verdict(revision), {
	"key": sprintf("revision/%s/%s", [revision.date, concat("+", revision.ears)]),
	"on": revision.date,
	"facts": {"ears": revision.ears, "decided_by": revision.by},
	"health": revision.hearing,
	"because": [ref | some ref in [revision.ref, revision.audiogram]; ref != null],
}) if {
	some revision in input.revisions
}

# The next test shows a shift again: whether it is persistent is a professional's judgement.
obligations contains {
	"key": sprintf("persistence/%s/%s", [again.date, again.ears]),
	"ask": "Is the shift persistent, so that the later audiogram becomes the baseline of that ear?",
	"of": "physician, otolaryngologist or audiologist",
	"by": again.opinion,
	"on": again.date,
	"note": "the next test shows the shift again",
	"facts": {"ears": again.ears},
	"health": again.hearing,
	"because": common.refs([again.shift, again, again.opinion]),
} if {
	some again in input.persistent
}

# A later test carries the mark "baseline", but nobody decided so.
obligations contains {
	"key": sprintf("marked/%s", [marked.date]),
	"ask": "Was the baseline revised by this audiogram, for which ear, and why?",
	"of": "physician, otolaryngologist or audiologist",
	"on": marked.date,
	"note": "a later audiogram is marked as baseline without a decision to revise",
	"because": [marked.ref],
} if {
	some marked in input.marked_later
}

verdict(revision) := {
	"holds": false,
	"note": sprintf("who moved the baseline is no audiologist, otolaryngologist or physician: %s", [replace(revision.by, "_", " ")]),
} if {
	revision.by != null
	not revision.by in data.measures.hearing.professionals
} else := {
	"holds": false,
	"note": sprintf(
		"the baseline was moved for an ear without shift or improvement: %s",
		[concat(" and ", revision.unfounded)],
	),
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

unknown(revision) := [lack |
	some lack in array.concat(
		[gap.lack |
			some gap in [
				{"of": revision.by, "lack": "profession of who decided"},
				{"of": revision.audiogram, "lack": "the audiogram that became the baseline"},
			]
			gap.of == null
		],
		[sprintf("thresholds of the %s ear", [ear]) | some ear in revision.undecided],
	)
]

not_owed contains "no baseline was moved, and nothing raises the question" if {
	count(input.revisions) == 0
	count(input.persistent) == 0
	count(input.marked_later) == 0
}
