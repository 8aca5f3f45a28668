# METADATA
# title: Assessment by a qualified person (recommended)
# description: >-
#   Exposure is assessed by an industrial hygienist, an audiologist or another professional with suitable training. A
#   paper of kind competence shows who made the assessments and how they are trained.
# custom:
#   cite: NIOSH 98-126, 1.3.1
#   subject: site
#   topic: monitoring
#   severity: minor
#   evidence: [document, measurement]
#   remedy: >-
#     Keep a paper that names who assesses the noise and their training, as a document of kind competence.
package duty.assessor_qualified

import data.common
import rego.v2

obligations contains {"holds": true, "on": papers[0].date, "because": common.refs(papers)} if {
	measured
	count(papers) > 0
}

obligations contains {
	"holds": false,
	"note": "no paper shows that who assessed the noise is qualified",
	"because": common.refs([input.latest_measurement]),
} if {
	measured
	count(papers) == 0
}

not_owed contains "no noise measurement is on record" if not measured

measured if input.measurements > 0

papers := [paper | some paper in input.documents; paper.kind == "competence"]
