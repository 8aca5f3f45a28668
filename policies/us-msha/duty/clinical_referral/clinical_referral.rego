# METADATA
# title: Referral after an invalid audiogram
# description: >-
#   If a valid audiogram cannot be obtained because of a suspected medical pathology of the ear, and the physician or
#   audiologist believes that occupational noise or the wearing of hearing protectors caused or aggravated it, the
#   operator refers the miner for a clinical-audiological evaluation or an otological examination, at no cost. Where it
#   is unrelated, the professional tells the miner, and the operator is not told.
# custom:
#   cite: 30 CFR 62.173(a)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [follow_up, audiogram]
#   remedy: Have a physician or audiologist decide on a referral, refer the miner where it is needed, and record both.
package duty.clinical_referral

import data.common
import rego.v2

obligations contains object.union(verdict(test), {"key": test.id}) if some test in invalid

invalid := [test |
	some test in input.audiograms
	test.invalidated
	test.enrolled
	not settled(test)
]

# A valid audiogram was obtained after all, and nobody decided to refer.
settled(test) if {
	count(of_kind(test, {"referral", "referral_decision"})) == 0
	some other in input.audiograms
	other.date > test.date
	not other.invalidated
	other.ears_with_result > 1
}

verdict(test) := {
	"holds": true,
	"on": test.date,
	"because": common.refs(array.concat([test], of_kind(test, {"referral"}))),
} if {
	count(of_kind(test, {"referral"})) > 0
} else := {
	"after": decision.date,
	"by": null,
	"note": sprintf("a professional decided on %s that a referral is needed", [decision.date]),
	"because": common.refs([test, decision]),
} if {
	some decision in decisions(test)
	decision.result == "referral_needed"
} else := {
	"holds": true,
	"on": test.date,
	"note": "a professional decided that no referral is needed",
	"because": common.refs(array.concat([test], decisions(test))),
} if {
	some decision in decisions(test)
	decision.result == "no_referral_needed"
} else := {
	"ask": "Did noise at work or the wearing of protectors cause or aggravate a pathology of the ear that prevents a valid audiogram, so that a referral is needed?",
	"of": "physician or audiologist",
	"by": null,
	"on": test.date,
	"note": sprintf("the audiogram of %s is invalid, none has been obtained since, and no professional's decision on a referral is on record", [test.date]),
	"because": [test.ref],
}

of_kind(test, kinds) := [done | some done in test.follow_ups; done.kind in kinds]

decisions(test) := [done |
	some done in of_kind(test, {"referral_decision"})
	done.by_is in data.measures.hearing.professionals
]

not_owed contains "no audiogram is invalid without a valid one since" if count(invalid) == 0
