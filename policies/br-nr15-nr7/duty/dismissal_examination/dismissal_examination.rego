# METADATA
# title: Clinical examination at dismissal
# description: >-
#   At dismissal a clinical examination is made within 10 days of the end of the contract. It is waived if the
#   latest occupational clinical examination is less than 135 days old (risk degree 1 or 2) or less than 90 days
#   old (risk degree 3 or 4). This is not the rule of 120 days for the audiometric exam. It is asked for of those
#   who worked above the action level.
# custom:
#   cite: NR-7 7.5.11
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [examination, worker]
#   remedy: >-
#     Have the clinical examination made within 10 days of the end of the contract.
package duty.dismissal_examination

import data.common
import rego.v2

obligations contains {
	"key": departure.last,
	"lifted": sprintf("the latest clinical examination is %v days old on the last day of the contract", [departure.appointment_age_days]),
	"cite": "NR-7 7.5.11",
	"facts": {"must_be_less_than_days": oldest(departure), "risk_degree": input.choices.risk_degree},
} if {
	some departure in departures
	waived(departure)
}

obligations contains {
	"key": departure.last,
	"after": departure.last,
	"within": "exit_clinical_time",
	"by": departure.appointment_after,
	"facts": {
		"age_of_the_latest_examination_days": departure.appointment_age_days,
		"waived_if_less_than_days": oldest(departure),
	},
} if {
	some departure in departures
	not waived(departure)
}

departures := [departure |
	some departure in input.departures
	oldest(departure) != null
	some stretch in input.enrolled
	stretch.from <= departure.last
	not common.over(stretch, departure.from)
]

limit_of := {"1-2": "exit_clinical_age_low", "3-4": "exit_clinical_age_high"}

oldest(departure) := common.at(data.parameters[limit_of[input.choices.risk_degree]], departure.last)

waived(departure) if {
	departure.appointment_age_days != null
	departure.appointment_age_days < oldest(departure)
}

not_owed contains "no contract of a worker above the action level ends" if count(departures) == 0
