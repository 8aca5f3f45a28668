# METADATA
# title: Elements of the program
# description: >-
#   A hearing conservation program includes a system of monitoring, the provision and use of hearing protectors,
#   audiometric testing, training and record keeping, each by its own section of Part 62.
# custom:
#   cite: 30 CFR 62.150(a)-(e)
#   subject: site
#   topic: enrolment
#   severity: major
#   evidence: [document]
#   remedy: >-
#     Complete the written program, and record what it covers: monitoring, protectors, audiometry, training, records.
package duty.program_elements

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"because": common.refs(papers),
	"facts": {"covered": sort(covered), "asked_for": asked_for},
}) if {
	affected
}

verdict := {"holds": false, "note": "no hearing conservation program is on record"} if {
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

asked_for := common.at(data.parameters.program_elements, input.as_of)

left_out := [item | some item in asked_for; not item in covered]
