# METADATA
# title: Nobody in the zone without protectors
# description: >-
#   So far as is reasonably practicable, no employee enters a Hearing Protection Zone without wearing hearing
#   protectors. The latest look into the area counts.
# custom:
#   cite: Control of Noise at Work Regulations reg 7(3)
#   subject: area
#   topic: protectors
#   severity: major
#   evidence: [wear_check, measurement, group]
#   remedy: See to it that nobody enters the zone without protectors, and record a check of the area.
package duty.zone_entry

import data.common
import rego.v2

obligations contains object.union(verdict, {"facts": {"workers": input.workers}}) if {
	not exempted
	zone
}

obligations contains {
	"lifted": "a certificate exempts the site from hearing protection zones",
	"cite": exemption_cite[input.choices.exemption],
	"on": input.as_of,
} if {
	exempted
	zone
}

# Looks into the area since it is a zone.
checks := [check |
	some check in input.wear_checks
	some spell in input.exposed.upper
	spell.current == true
	check.date >= spell.from
]

latest := checks[count(checks) - 1]

verdict := {
	"holds": null,
	"note": "nobody has checked whether all in the zone wear protectors",
	"missing": ["a check of the area"],
} if {
	count(checks) == 0
} else := {
	"holds": null,
	"on": latest.date,
	"note": sprintf("the check of %s does not say how many were seen and how many wore protectors", [latest.date]),
	"missing": ["the numbers of the check"],
	"because": [latest.ref],
} if {
	some number in [latest.observed, latest.wearing]
	number == null
} else := {
	"holds": latest.wearing == latest.observed,
	"on": latest.date,
	"note": sprintf("on %s %v of %v in the zone wore protectors", [latest.date, latest.wearing, latest.observed]),
	"because": [latest.ref],
}

not_owed contains "nobody is known to be at or above an upper exposure action value in the area" if not zone

zone if common.any_current(input.exposed.upper)

exempted if input.choices.exemption in object.keys(exemption_cite)

exemption_cite := {
	"emergency_services": "Control of Noise at Work Regulations reg 12",
	"defence": "Control of Noise at Work Regulations reg 13",
}
