# METADATA
# title: Evaluators informed
# description: >-
#   The operator informs whoever evaluates audiograms of the requirements of Part 62 and gives them a copy of the
#   miner's audiometric test records.
# custom:
#   cite: 30 CFR 62.172(a)(1)
#   subject: site
#   topic: audiometry
#   severity: minor
#   evidence: [document]
#   remedy: >-
#     Send the evaluator Part 62 and the test records, and keep the letter (document instruction, covers part_62;
#     test_records).
package duty.evaluator_informed

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"because": common.refs(papers),
	"facts": {"covered": sort(covered), "asked_for": asked_for},
}) if {
	affected
}

verdict := {"holds": false, "note": "no record shows that the evaluators were informed"} if {
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

asked_for := ["part_62", "test_records"]

left_out := [item | some item in asked_for; not item in covered]
