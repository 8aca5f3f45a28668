# METADATA
# title: Procedure of hearing tests
# description: >-
#   Audiometric tests follow scientifically validated procedures, and the operator keeps evidence that they were so
#   conducted. Part 62 names no edition of a standard, no room level and no interval of calibration.
# custom:
#   cite: 30 CFR 62.171(a), (b)(3)
#   subject: site
#   topic: test-quality
#   severity: major
#   evidence: [document]
#   remedy: >-
#     Get from the clinic or testing firm the written procedure that it follows, with its source, and keep it.
package duty.test_procedure

import data.common
import rego.v2

obligations contains {"holds": true, "on": papers[0].date, "because": common.refs(papers)} if {
	affected
	count(papers) > 0
}

obligations contains {"holds": false, "note": "no evidence is on record that tests follow a scientifically validated procedure"} if {
	affected
	count(papers) == 0
}

not_owed contains "nobody has been at or above the action level" if not affected

affected if input.enrolled_ever > 0

papers := [paper | some paper in input.documents; paper.kind == "test_procedure"]
