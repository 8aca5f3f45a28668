# METADATA
# title: Certificate of the appointment (Vorsorgebescheinigung)
# description: >-
#   The physician gives worker and employer a certificate that says that, when and on what occasion the appointment
#   took place, and when the next one is due.
# custom:
#   cite: ArbMedVV § 6(3) no 3
#   subject: worker
#   topic: records
#   severity: minor
#   evidence: [examination]
#   remedy: Ask the physician for the certificate, and record its day and the next date.
package duty.appointment_certificate

import data.common
import rego.v2

# The law sets no time.
obligations contains {
	"key": appointment.ref,
	"after": appointment.attended_on,
	"by": given(appointment),
	"because": [appointment.ref],
} if {
	some appointment in appointments
}

obligations contains {
	"key": sprintf("next date of %s", [appointment.ref]),
	"holds": says_when(appointment),
	"missing": ["the day by which the certificate wants the next appointment"],
	"because": [appointment.ref],
} if {
	some appointment in appointments
	appointment.certificate_on != null
}

not_owed contains "not employed now, or no appointment that was attended is on record" if count(appointments) == 0

# Of somebody who has left, nothing of it may be left.
appointments := [examination |
	common.any_current(input.employed)
	some examination in input.examinations
	examination.kind == "health_appointment"
	examination.attended_on != null
]

given(appointment) := null if {
	appointment.certificate_on == null
} else := {"date": appointment.certificate_on, "ref": appointment.ref}

says_when(appointment) := null if {
	appointment.next_due == null
} else := true
