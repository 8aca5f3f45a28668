# METADATA
# title: Protectors and tests at no cost
# description: >-
#   Hearing protectors and their necessary replacements, and all audiometric tests and examinations under Part 62, are
#   at no cost to the miner. The written program says so.
# custom:
#   cite: 30 CFR 62.160(a)(4), 62.170, 62.173(a)
#   subject: site
#   topic: protectors
#   severity: minor
#   evidence: [document]
#   remedy: >-
#     Say in the written program that protectors, replacements, tests and examinations cost the miner nothing.
package duty.free_of_charge

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"because": common.refs(papers),
	"facts": {"covered": sort(covered), "asked_for": asked_for},
}) if {
	affected
}

verdict := {"holds": false, "note": "no hearing conservation program is on record that says who pays"} if {
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

papers := [paper | some paper in input.documents; paper.kind == "hearing_conservation_programme"]

covered := common.covered(papers)

asked_for := ["free_protectors", "free_tests"]

left_out := [item | some item in asked_for; not item in covered]
