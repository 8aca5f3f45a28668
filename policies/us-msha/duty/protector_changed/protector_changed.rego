# METADATA
# title: Another protector after a pathology of the ear
# description: >-
#   If a pathology of the ear later prevents the miner from wearing the hearing protector that was chosen, the miner is
#   allowed to choose a different one from those offered. A protector handed over since that was found shows it.
# custom:
#   cite: 30 CFR 62.160(a)(5)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [follow_up, protector_issue]
#   remedy: Let the miner choose a different type of protector, and record the issue.
package duty.protector_changed

import rego.v2

obligations contains {
	"key": found.date,
	"after": found.date,
	"by": "protector.issue",
	"note": sprintf("it was found on %s that the miner cannot wear the protector that was chosen", [found.date]),
	"because": [found.ref],
} if {
	some found in unsuitable
}

not_owed contains "nothing on record prevents the miner from wearing the protector" if count(unsuitable) == 0

unsuitable := {found |
	some test in array.concat(input.audiograms, input.examinations)
	some found in test.follow_ups
	found.kind == "protector_unsuitable"
}
