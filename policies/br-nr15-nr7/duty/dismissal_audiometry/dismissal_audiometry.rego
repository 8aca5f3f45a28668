# METADATA
# title: Audiometric exam at dismissal
# description: >-
#   The audiometric exam is made at dismissal (na demissão) of an employee who works above the action level. An
#   exam made up to 120 days before the last day of the contract may serve. One made afterwards is asked for
#   within the time of the clinical examination at dismissal.
# custom:
#   cite: NR-7 Annex II item 4.1 c, 4.1.1
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram, examination, worker]
#   remedy: >-
#     Test the worker before the contract ends, or at the latest together with the clinical examination at
#     dismissal.
package duty.dismissal_audiometry

import data.common
import rego.v2

obligations contains {
	"key": departure.last,
	"holds": true,
	"on": departure.last,
	"note": sprintf("an exam was made %v days before the last day of the contract", [departure.test_age_days]),
	"facts": {"age_of_the_exam_days": departure.test_age_days, "may_be_days": oldest(departure)},
} if {
	some departure in departures
	recent(departure)
}

obligations contains {
	"key": departure.last,
	"after": departure.last,
	"within": "exit_clinical_time",
	"by": departure.test_after,
	"note": said(departure),
} if {
	some departure in departures
	not recent(departure)
}

# Ends of employment of workers above the action level, since the rule of 120 days is in force.
departures := [departure |
	some departure in input.departures
	oldest(departure) != null
	some stretch in input.enrolled
	common.covers(stretch, departure.last)
]

oldest(departure) := common.at(data.parameters.exit_exam_age, departure.last)

recent(departure) if {
	departure.test_age_days != null
	departure.test_age_days <= oldest(departure)
}

said(departure) := "no exam was made before the last day of the contract" if {
	departure.test_age_days == null
} else := sprintf("the latest exam is %v days old on the last day of the contract, which is too old", [departure.test_age_days])

not_owed contains "no contract ends while the worker is above the action level" if count(departures) == 0
