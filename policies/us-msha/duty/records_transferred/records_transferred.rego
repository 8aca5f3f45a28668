# METADATA
# title: Records transferred to the successor
# description: >-
#   Whoever operated the mine before transfers all records that Part 62 requires, or copies of them, to the successor
#   operator, who keeps them for the rest of the time and uses the baseline, or revised baseline, that was established
#   before.
# custom:
#   cite: 30 CFR 62.190(c)
#   subject: site
#   topic: records
#   severity: minor
#   evidence: [document]
#   remedy: >-
#     Get the records and the baselines of all miners from the operator before, and keep the list of what was
#     transferred.
package duty.records_transferred

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"because": common.refs(papers),
	"facts": {"covered": sort(covered), "asked_for": asked_for},
}) if {
	affected
}

verdict := {"holds": false, "note": "no record shows that the records of the operator before were transferred"} if {
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

not_owed contains "the site has not said that its operator took over the mine from another one" if not affected

affected if input.choices.successor_operator == true

papers := [paper | some paper in input.documents; paper.kind == "transfer"]

covered := common.covered(papers)

asked_for := ["records", "baselines"]

left_out := [item | some item in asked_for; not item in covered]
