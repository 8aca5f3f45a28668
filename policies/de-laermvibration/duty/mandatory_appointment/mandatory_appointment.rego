# METADATA
# title: Mandatory appointment (Pflichtvorsorge)
# description: >-
#   Where exposure reaches or exceeds the upper action values, protectors left aside, the employer arranges an
#   appointment with the occupational physician before the work begins and then regularly. By AMR 2.1 the first one
#   lies within three months before the start, the second one no later than twelve months after it, and each later one
#   no more than 36 months after the one before; the certificate may ask for an earlier one.
# custom:
#   cite: ArbMedVV § 4(1), Annex Part 3 (1) no 3; AMR 2.1 no 3
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [examination, measurement]
#   remedy: Arrange the appointment now.
package duty.mandatory_appointment

import data.common
import rego.v2

# The first one, within the time before the start.
obligations contains {
	"key": sprintf("first, before %s", [start]),
	"before": start,
	"within": "first_appointment",
	"by": "appointment.attended",
	"note": sprintf("exposure at or above the upper action values began on %s", [start]),
	"because": deciding,
} if {
	timed
}

# Whoever began before the ordinance set times needs one nevertheless.
obligations contains {
	"key": sprintf("first, since %s", [start]),
	"after": start,
	"by": "appointment.attended",
	"note": "exposure at or above the upper action values began before the ordinance",
	"because": deciding,
} if {
	start != null
	not timed
}

# The second one, counted from the start; earlier if the certificate of the first says so.
obligations contains {
	"key": sprintf("second, after %s", [start]),
	"after": start,
	"within": "second_appointment",
	"no_later_than": chain[0].next_due,
	"by": link(1),
	"note": sprintf("the second appointment, counted from the start on %s", [start]),
	"because": [chain[0].ref],
} if {
	timed
	count(chain) > 0
}

# Each later one, counted from the one before; earlier if its certificate says so, never later.
obligations contains {
	"key": sprintf("after %s", [chain[i].ref]),
	"after": chain[i].date,
	"within": "later_appointment",
	"no_later_than": chain[i].next_due,
	"by": link(i + 1),
	"note": sprintf("the next appointment after that of %s", [chain[i].date]),
	"because": [chain[i].ref],
} if {
	some i in later
}

not_owed contains "the records do not show exposure at or above the upper action values now" if start == null

start := common.current_since(input.exposed.upper_reached)

timed if {
	start != null
	common.at(data.parameters.first_appointment, start) != null
}

deciding := [exposure.ref | some exposure in input.exposures; exposure.from == start; exposure.ref != null]

# By day, whenever they were offered.
attended := sort([{"date": examination.attended_on, "ref": examination.ref, "next_due": examination.next_due} |
	some examination in input.examinations
	examination.kind == "health_appointment"
	examination.attended_on != null
])

earlier := [appointment | some appointment in attended; appointment.date < start]

# The last one before the start, and all since.
chain := array.concat(
	array.slice(earlier, count(earlier) - 1, count(earlier)),
	[appointment | some appointment in attended; appointment.date >= start],
)

# With a start in the time of the ordinance the second one has a time of its own.
later := {i | start != null; some i, _ in chain; i > 0} | {i | start != null; some i, _ in chain; not timed}

link(i) := {"date": chain[i].date, "ref": chain[i].ref} if {
	i < count(chain)
} else := null
