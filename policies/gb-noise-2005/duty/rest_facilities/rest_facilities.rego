# METADATA
# title: Noise in rest facilities
# description: >-
#   Where rest facilities are provided, exposure to noise in them is kept to a level suited to their purpose and the
#   conditions of their use.
# custom:
#   cite: Control of Noise at Work Regulations reg 6(5)
#   subject: site
#   topic: controls
#   severity: minor
#   evidence: [document]
#   remedy: Check the noise in rest rooms and lower it where it does not suit their purpose; record the check, or that no rest facilities are provided.
package duty.rest_facilities

import data.common
import rego.v2

obligations contains {
	"holds": true,
	"note": "a check of the noise in rest facilities, or that there are none, is on record",
	"because": common.refs(papers),
	"facts": {"workers_at_or_above_lower_value": input.enrolled_now},
} if {
	exposed
	count(papers) > 0
}

obligations contains {
	"holds": false,
	"note": "no record shows that the noise in rest facilities suits their purpose, or that none are provided",
	"facts": {"workers_at_or_above_lower_value": input.enrolled_now},
} if {
	exposed
	count(papers) == 0
}

not_owed contains "nobody is known to be at or above a lower exposure action value" if not exposed

exposed if "lower" in input.levels_now

papers := [paper | some paper in input.documents; paper.kind == "rest_facilities"]
