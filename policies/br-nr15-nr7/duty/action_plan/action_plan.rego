# METADATA
# title: Preventive control above the action level
# description: >-
#   Where the dose is above the action level (nível de ação), preventive and systematic control is owed: periodic
#   monitoring of the exposure, information of the workers and medical control. It stands in the action plan of
#   the risk management programme (PGR).
# custom:
#   cite: NR-9 9.6.1 c (from memory)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [document, measurement]
#   remedy: >-
#     Put monitoring, information and medical control of this group into the action plan of the PGR; keep it as a
#     document of kind control_programme that names in covers what it holds.
package duty.action_plan

import data.common
import rego.v2

obligations contains {
	"holds": false,
	"note": "the group is above the action level and no action plan covers it",
	"facts": {"workers": input.workers},
} if {
	above
	count(plans) == 0
}

obligations contains {
	"holds": null,
	"note": "an action plan covers the group, but the record does not say what it holds",
	"missing": ["what the action plan holds"],
	"because": common.refs(plans),
} if {
	above
	count(plans) > 0
	count(held) == 0
}

obligations contains {
	"holds": count(lacking) == 0,
	"note": said,
	"because": common.refs(plans),
	"facts": {"holds": sort(held), "lacks": sort(lacking)},
} if {
	above
	count(held) > 0
}

not_owed contains "the group is not known to be above the action level" if not above

above if common.any_current(input.exposed.action)

plans := [document | some document in input.documents; document.kind == "control_programme"]

held := common.covered(plans)

lacking := {word | some word in common.at(data.parameters.action_measures, input.as_of)} - held

said := "the action plan holds all measures" if {
	count(lacking) == 0
} else := sprintf("the action plan lacks: %s", [common.in_words(sort(lacking))])
