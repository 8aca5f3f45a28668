# METADATA
# title: Evaluators instructed on privacy
# description: >-
#   The operator instructs the physician, audiologist or technician not to reveal, without the miner's written consent,
#   any finding or diagnosis unrelated to hearing loss from occupational noise or to the wearing of protectors; and to
#   tell a miner with a suspected pathology unrelated to either that an otological examination is needed.
# custom:
#   cite: 30 CFR 62.172(a)(3), 62.173(b)-(c)
#   subject: site
#   topic: audiometry
#   severity: minor
#   evidence: [document]
#   remedy: >-
#     Instruct the evaluator in writing, and keep the letter (document instruction, covers privacy;
#     otological_examination).
package duty.evaluator_instructed

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"because": common.refs(papers),
	"facts": {"covered": sort(covered), "asked_for": asked_for},
}) if {
	affected
}

verdict := {"holds": false, "note": "no record shows that the evaluators were instructed"} if {
	count(papers) == 0
} else := {
	"holds": null,
	"note": "the document on record does not say what it covers",
	"missing": ["what the document covers"],
} if {
	count(covered) == 0
} else := {
	"holds": false,
	"note": sprintf("the document leaves out: %s", [common.in_words(left_out)]),
} if {
	count(left_out) > 0
} else := {"holds": true}

not_owed contains "nobody has been at or above the action level" if not affected

affected if input.enrolled_ever > 0

papers := [paper | some paper in input.documents; paper.kind == "instruction"]

covered := common.covered(papers)

asked_for := ["privacy", "otological_examination"]

left_out := [item | some item in asked_for; not item in covered]
