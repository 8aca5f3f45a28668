# METADATA
# title: Register of appointments (Vorsorgekartei)
# description: >-
#   The employer keeps a register that says that, when and on what occasion appointments took place. It is kept until
#   the employment ends and then deleted, unless another rule says otherwise.
# custom:
#   cite: ArbMedVV § 3(4)
#   subject: worker
#   topic: records
#   severity: minor
#   evidence: [examination, worker]
#   remedy: Record the occasion; after the end of the employment hand the worker a copy and delete the rest.
package duty.appointment_register

import data.common
import rego.v2

# That the register is kept is shown by the appointments themselves; each needs its occasion.
obligations contains {
	"key": appointment.ref,
	"holds": has_occasion(appointment),
	"missing": ["the occasion of the appointment"],
	"because": [appointment.ref],
} if {
	employed_now
	some appointment in appointments
}

# After the end of employment nothing of it may be left, unless another rule says so.
obligations contains {
	"key": "deleted",
	"holds": false,
	"note": "the worker has left, and the register still holds their appointments",
	"because": common.refs(appointments),
	"facts": {"appointments": count(appointments)},
} if {
	not employed_now
	count(appointments) > 0
}

not_owed contains "no appointment is on record" if count(appointments) == 0

employed_now if common.any_current(input.employed)

appointments := [examination | some examination in input.examinations; examination.kind == "health_appointment"]

has_occasion(appointment) := null if {
	appointment.purpose == null
} else := true
