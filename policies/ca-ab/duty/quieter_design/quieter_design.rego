# METADATA
# title: Quieter design
# description: >-
#   A new work site or area, significant alterations, and work processes or significant equipment that are introduced
#   are designed and built so that their continuous noise does not exceed 85 dBA or is as low as reasonably
#   practicable. Whether it is, is a judgement; a purchase or design file that names the change answers it.
# custom:
#   cite: OHS Code, s. 217
#   subject: group
#   topic: controls
#   severity: minor
#   evidence: [change, document]
#   remedy: Have a competent person look at the noise of the new process or equipment, and keep a dated file that names the change.
package duty.quieter_design

import data.common
import rego.v2

obligations contains {
	"key": change.id,
	"ask": "Is the continuous noise of what is new within the limit of design, or as low as reasonably practicable?",
	"of": "competent person (engineering)",
	"by": file_of(change),
	"note": sprintf("the change of %s may bring more noise", [change.date]),
	"because": [change.ref],
	"facts": {"what": change.what, "design_limit_dba": common.at(data.parameters.design_limit, change.date)},
} if {
	some change in concerned
}

not_owed contains "no change is on record that may raise exposure" if count(concerned) == 0

concerned := [change |
	some change in input.changes
	change.raises_exposure != "no"
	common.at(data.parameters.design_limit, change.date) != null
]

file_of(change) := {"date": files[0][0], "ref": files[0][1]} if {
	files := sort([[paper.date, paper.ref] |
		some paper in input.documents
		paper.kind == "purchase_file"
		change.id in paper.covers
	])
	count(files) > 0
} else := null
