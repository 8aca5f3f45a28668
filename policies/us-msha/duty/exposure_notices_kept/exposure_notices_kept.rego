# METADATA
# title: Exposure notices kept
# description: >-
#   The operator keeps a copy of every notice of an exposure determination, or a list with its relevant information, for
#   as long as the miner is exposed at or above the action level and at least 6 months after that.
# custom:
#   cite: 30 CFR 62.110(e)
#   subject: site
#   topic: records
#   severity: minor
#   evidence: [document]
#   remedy: >-
#     Keep copies of the notices, or a list of them, and record where (document records_kept, covers exposure_notices).
package duty.exposure_notices_kept

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"because": common.refs(papers),
	"facts": {"covered": sort(covered), "asked_for": asked_for},
}) if {
	affected
}

verdict := {"holds": false, "note": "no record shows that the notices of exposure are kept"} if {
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

papers := [paper | some paper in input.documents; paper.kind == "records_kept"]

covered := common.covered(papers)

asked_for := ["exposure_notices"]

left_out := [item | some item in asked_for; not item in covered]
