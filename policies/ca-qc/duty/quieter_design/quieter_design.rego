# METADATA
# title: Quieter design and purchase
# description: >-
#   When premises are designed or laid out, a process or equipment is changed, or a machine is bought or replaced,
#   reasonable means are taken to eliminate the noise or reduce it at its source, or at least to reduce the exposure,
#   and the machine is chosen that makes the least noise. Whether the means were reasonable is a judgement; a purchase
#   file that names the change answers it.
# custom:
#   cite: r. 13, s. 132
#   subject: group
#   topic: controls
#   severity: minor
#   evidence: [change, document]
#   remedy: Have a competent person look at the noise of the change or purchase, and keep a dated purchase file that names it.
package duty.quieter_design

import data.common
import rego.v2

obligations contains {
	"key": change.id,
	"ask": "Were reasonable means taken to reduce the noise at its source, and was the machine chosen that makes the least noise?",
	"of": "competent person (engineering)",
	"by": file_of(change),
	"note": sprintf("the change of %s may bring more noise", [change.date]),
	"because": [change.ref],
	"facts": {"what": change.what},
} if {
	some change in concerned
}

not_owed contains "no change under this section is on record that may raise exposure" if count(concerned) == 0

# The section holds since the day on which the limit came into force.
concerned := [change |
	some change in input.changes
	change.raises_exposure != "no"
	common.at(data.parameters.sections_in_force, change.date) != null
]

file_of(change) := {"date": files[0][0], "ref": files[0][1]} if {
	files := sort([[paper.date, paper.ref] |
		some paper in input.documents
		paper.kind == "purchase_file"
		change.id in paper.covers
	])
	count(files) > 0
} else := null
