# METADATA
# title: Appointment held by a physician
# description: >-
#   Appointments are held by a physician entitled to the title Arbeitsmedizin or Betriebsmedizin who has no function
#   of the employer. The records show the profession, not the title.
# custom:
#   cite: ArbMedVV § 3(2), § 7(1)
#   subject: worker
#   topic: test-quality
#   severity: major
#   evidence: [examination, tester]
#   remedy: Let a physician with that title hold the appointments, and record who held them.
package duty.appointment_physician

import data.common
import rego.v2

obligations contains {
	"key": appointment.ref,
	"holds": by_physician(appointment),
	"note": said(appointment),
	"missing": [words | appointment.by_is == null; words := "the profession of whoever held the appointment"],
	"because": [appointment.ref],
} if {
	some appointment in appointments
}

not_owed contains "not employed now, or no appointment that was attended is on record" if count(appointments) == 0

# Of somebody who has left, nothing of it may be left.
appointments := [examination |
	common.any_current(input.employed)
	some examination in input.examinations
	examination.kind == "health_appointment"
	examination.attended_on != null
]

by_physician(appointment) := null if {
	appointment.by_is == null
} else := appointment.by_is == "physician"

said(appointment) := sprintf("the appointment was held by: %s", [appointment.by_is]) if {
	by_physician(appointment) == false
} else := null
