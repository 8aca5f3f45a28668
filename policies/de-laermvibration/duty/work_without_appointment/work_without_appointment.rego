# METADATA
# title: No work without the mandatory appointment
# description: >-
#   The employer may let work at or above the upper action values be done only if the worker has taken part in the
#   mandatory appointment. A refusal stops the work.
# custom:
#   cite: ArbMedVV § 4(2)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [examination, measurement]
#   remedy: Take the worker out of that work until they have taken part.
package duty.work_without_appointment

import data.common
import rego.v2

obligations contains {
	"key": "now",
	"holds": false,
	"note": "the worker declined the mandatory appointment, and works at or above the upper action values",
	"because": refused,
} if {
	reached_now
	count(refused) > 0
}

obligations contains {
	"key": "now",
	"holds": true,
	"because": [appointment.ref | some appointment in appointments; appointment.attended_on != null],
} if {
	reached_now
	count(refused) == 0
	took_part
}

not_owed contains "the records do not show exposure at or above the upper action values now" if not reached_now

not_owed contains "no refusal and no appointment is on record; that none was arranged is a finding of its own" if {
	reached_now
	count(refused) == 0
	not took_part
}

reached_now if common.any_current(input.exposed.upper_reached)

appointments := [examination | some examination in input.examinations; examination.kind == "health_appointment"]

took_part if {
	some appointment in appointments
	appointment.attended_on != null
}

# A refusal stands until the worker has taken part in an appointment since.
refused := [appointment.ref |
	some appointment in appointments
	appointment.answer == "declined"
	appointment.attended_on == null
	appointment.offered_on != null
	not since(appointment.offered_on)
	not only_offered(appointment.offered_on)
]

# Between the lower and the upper values the appointment was one that a worker may refuse.
only_offered(day) if {
	some stretch in input.exposed.lower_exceeded
	common.covers(stretch, day)
	every loud in input.exposed.upper_reached {
		not common.covers(loud, day)
	}
}

since(day) if {
	some appointment in appointments
	appointment.attended_on >= day
}
