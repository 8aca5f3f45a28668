# METADATA
# title: Access to records
# description: >-
#   Within 15 calendar days of a written request the operator gives access to records: to the miner, or with written
#   consent the miner's designee, all of the miner's own; to the miners' representative, training certificates and
#   exposure notices; to a former miner, the own exposure. The first copy is free. The procedure is asked for, since
#   single requests are not in the records.
# custom:
#   cite: 30 CFR 62.190(a)-(b)
#   subject: site
#   topic: records
#   severity: minor
#   evidence: [document]
#   remedy: >-
#     Write down who gets which records within 15 calendar days and that the first copy is free, and keep the paper.
package duty.access_to_records

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"because": common.refs(papers),
	"facts": {"covered": sort(covered), "asked_for": asked_for},
}) if {
	affected
}

verdict := {"holds": false, "note": "no procedure of access to records is on record"} if {
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

papers := [paper | some paper in input.documents; paper.kind == "access_to_records"]

covered := common.covered(papers)

asked_for := ["miners", "representatives", "former_miners", "first_copy_free"]

left_out := [item | some item in asked_for; not item in covered]
