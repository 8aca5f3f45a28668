# METADATA
# title: Protectors selected by a standard
# description: >-
#   Protectors meet and are selected by the listed clauses of CSA Z94.2-2014, or by NF EN 352 with NF EN 458. Read for
#   construction sites; for establishments the section is from memory. No measurement is compulsory where a
#   single-number rating is used.
# custom:
#   cite: r. 13, s. 138
#   subject: group
#   topic: protectors
#   severity: minor
#   evidence: [document, protector_issue]
#   remedy: File a selection sheet that names the standard by which the protectors were chosen.
package duty.protector_selected

import data.common
import rego.v2

obligations contains {
	"holds": holds,
	"note": said[holds],
	"missing": common.missing(holds, "the standard of the selection"),
	"because": common.refs(sheets),
	"facts": {"with_protectors": input.protector_holders},
} if {
	concerned
}

not_owed contains "the situation is not above a limit now, or nobody in it has protectors" if not concerned

concerned if {
	input.protector_holders > 0
	common.any_current(input.exposed.limit)
}

sheets := [paper | some paper in input.documents; paper.kind == "protector_selection"]

named := common.covered(sheets)

accepted := {word | some word in common.at(data.parameters.protector_standards, input.as_of)}

holds if {
	count(named & accepted) > 0
} else := null if {
	count(sheets) > 0
	count(named) == 0
} else := false

said := {
	true: null,
	false: "no selection sheet on record names one of the two standards",
	null: "the selection sheet does not say by which standard",
}
