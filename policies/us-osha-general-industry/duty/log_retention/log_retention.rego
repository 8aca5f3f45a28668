# METADATA
# title: Injury log kept
# description: >-
#   The injury and illness log, the privacy case list, the annual summary and the incident reports are kept for five years
#   after the end of the calendar year that they cover. Years with a hearing loss in the log are looked at.
# custom:
#   cite: 29 CFR 1904.33(a)
#   subject: site
#   topic: reporting
#   severity: minor
#   evidence: [follow_up, document]
#   remedy: Find the log of the year and keep it until five years after its end; record where it is kept.
package duty.log_retention

import data.common
import rego.v2

obligations contains {
	"key": year.year,
	"holds": true,
	"on": year.latest.date,
	"for": "log_retention",
	"because": common.refs([year.kept, year.latest]),
	"facts": {"hearing_losses_in_log": year.entries},
} if {
	some year in input.log_years
	year.kept != null
}

obligations contains {
	"key": year.year,
	"holds": false,
	"on": year.latest.date,
	"for": "log_retention",
	"note": sprintf("no record shows that the log of %s is kept", [year.year]),
	"because": common.refs([year.latest]),
	"facts": {"hearing_losses_in_log": year.entries},
} if {
	some year in input.log_years
	year.kept == null
}

not_owed contains "no hearing loss was entered in the log" if count(input.log_years) == 0
