# METADATA
# title: Offered appointment (Angebotsvorsorge)
# description: >-
#   Where exposure exceeds the lower action values, protectors left aside, the employer offers an appointment before
#   the work begins and then regularly, at the same times as a mandatory one. A refusal does not end the duty to offer
#   again.
# custom:
#   cite: ArbMedVV § 5(1), Annex Part 3 (2) no 1; AMR 2.1 no 3
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [examination, measurement]
#   remedy: Offer the appointment now, and record the offer.
package duty.offered_appointment

import data.common
import rego.v2

# The first offer, within the time before the start. A refusal ends none of these duties: offers count, not visits.
obligations contains {
	"key": sprintf("first, before %s", [start]),
	"before": start,
	"within": "first_appointment",
	"by": "appointment.offered",
	"note": sprintf("exposure above the lower action values began on %s", [start]),
	"because": deciding,
} if {
	timed
}

# Whoever began before the ordinance set times, or comes from mandatory appointments of which there is no record.
obligations contains {
	"key": sprintf("first, since %s", [start]),
	"after": start,
	"by": "appointment.offered",
	"note": sprintf("exposure has been above the lower action values since %s", [start]),
	"because": deciding,
} if {
	needs_any
}

# The second offer, counted from the start; earlier if the certificate of the first appointment says so.
obligations contains {
	"key": sprintf("second, after %s", [start]),
	"after": start,
	"within": "second_appointment",
	"no_later_than": chain[0].next_due,
	"by": link(1),
	"note": sprintf("the second offer, counted from the start on %s", [start]),
	"because": [chain[0].ref],
} if {
	timed
	count(chain) > 0
}

# Each later offer, counted from the one before; earlier if a certificate says so, never later.
obligations contains {
	"key": sprintf("after %s", [chain[i].ref]),
	"after": chain[i].date,
	"within": "later_appointment",
	"no_later_than": chain[i].next_due,
	"by": link(i + 1),
	"note": sprintf("the next offer after that of %s", [chain[i].date]),
	"because": [chain[i].ref],
} if {
	some i in later
}

not_owed contains "the records do not show exposure above the lower action values now" if start == null

not_owed contains "at or above the upper action values the appointment is mandatory, which is a duty of its own" if {
	start != null
	mandatory_now
}

start := common.current_since(input.exposed.lower_exceeded)

mandatory_now if common.any_current(input.exposed.upper_reached)

owed if {
	start != null
	not mandatory_now
}

# A stretch with mandatory appointments lies within this one: their series goes on.
continued if {
	some stretch in input.exposed.upper_reached
	stretch.to != null
	stretch.to > start
}

needs_any if {
	owed
	not timed
	not continued
}

needs_any if {
	owed
	continued
	count(chain) == 0
}

timed if {
	owed
	not continued
	common.at(data.parameters.first_appointment, start) != null
}

deciding := [exposure.ref | some exposure in input.exposures; exposure.from == start; exposure.ref != null]

offered := sort([{"date": day, "ref": examination.ref, "next_due": examination.next_due} |
	some examination in input.examinations
	examination.kind == "health_appointment"
	day := min([on | some on in [examination.offered_on, examination.attended_on]; on != null])
])

earlier := [offer | some offer in offered; offer.date < start]

# The last offer before the start, and all since.
chain := array.concat(
	array.slice(earlier, count(earlier) - 1, count(earlier)),
	[offer | some offer in offered; offer.date >= start],
)

later := {i | owed; some i, _ in chain; i > 0} | {i | owed; some i, _ in chain; not timed}

link(i) := {"date": chain[i].date, "ref": chain[i].ref} if {
	i < count(chain)
} else := null
