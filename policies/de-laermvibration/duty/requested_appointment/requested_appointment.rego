# METADATA
# title: Appointment on request (Wunschvorsorge)
# description: >-
#   The employer makes an appointment possible where a worker asks for it, unless no harm to health is to be expected.
# custom:
#   cite: ArbMedVV § 5a
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [examination]
#   remedy: Make the appointment possible, or record that the worker has withdrawn the wish.
package duty.requested_appointment

import rego.v2

# The law sets no time. A worker who has withdrawn the wish is owed nothing.
obligations contains {
	"key": request.ref,
	"after": min([day | some day in [request.offered_on, request.attended_on]; day != null]),
	"by": held(request),
	"note": "the worker asked for an appointment",
	"because": [request.ref],
} if {
	some request in requests
	dated(request)
}

obligations contains {
	"key": request.ref,
	"holds": null,
	"note": "the worker asked for an appointment, and neither an offer nor a visit has a day",
	"missing": ["the day of the offer or of the appointment"],
	"because": [request.ref],
} if {
	some request in requests
	not dated(request)
}

not_owed contains "no wish of the worker for an appointment is on record" if count(requests) == 0

requests := [examination |
	some examination in input.examinations
	examination.kind == "health_appointment"
	examination.purpose == "on_request"
	examination.answer != "declined"
]

dated(request) if request.offered_on != null

dated(request) if request.attended_on != null

held(request) := null if {
	request.attended_on == null
} else := {"date": request.attended_on, "ref": request.ref}
