# METADATA
# title: Designated professional
# description: >-
#   The employer designates a physician, audiologist or occupational health nurse with whom the technician works and
#   to whom abnormal results go. A document of the designation is asked for.
# custom:
#   cite: OHS Code, s. 223(2)(a), (3)
#   subject: site
#   topic: audiometry
#   severity: minor
#   evidence: [document]
#   remedy: Designate the professional in writing, and file the designation.
package duty.professional_designated

import data.common
import rego.v2

obligations contains {
	"holds": count(papers) > 0,
	"note": note,
	"because": common.refs(papers),
	"facts": {"workers_in_noise": input.enrolled_now},
} if {
	owed
}

not_owed contains "nobody is known to be exposed to excess noise now" if not owed

owed if input.enrolled_now > 0

papers := [paper | some paper in input.documents; paper.kind == "designation"]

note := "no designation of a physician, audiologist or occupational health nurse is on record" if {
	count(papers) == 0
} else := null
