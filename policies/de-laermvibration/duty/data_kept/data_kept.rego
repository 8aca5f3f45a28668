# METADATA
# title: Results of measurements kept for 30 years
# description: >-
#   The documentation of the results of measurements is kept for at least 30 years, in a form in which it can be
#   consulted later.
# custom:
#   cite: LärmVibrationsArbSchV § 4(1) sentence 4
#   subject: site
#   topic: records
#   severity: major
#   evidence: [measurement, notice, document]
#   remedy: Find the record of the measurement, and record how results are kept for 30 years.
package duty.data_kept

import data.common
import rego.v2

obligations contains {
	"key": lost.id,
	"holds": false,
	"on": lost.date,
	"for": "measurement_retention",
	"note": sprintf("another record refers to the measurement %s, which is not in the records", [lost.id]),
	"because": [lost.ref],
	"facts": {"measurement": lost.id},
} if {
	some lost in input.missing_measurements
}

# Records of thirty years reach further back than most programs: how they are kept is shown by a document.
obligations contains {
	"key": "arrangement",
	"holds": count(papers) > 0,
	"note": said,
	"because": common.refs(papers),
	"facts": {"measurements": input.measurements},
} if {
	input.measurements > 0
}

not_owed contains "nothing was measured, and no record refers to a measurement" if {
	input.measurements == 0
	count(input.missing_measurements) == 0
}

papers := [paper | some paper in input.documents; paper.kind in {"records_kept", "noise_records"}]

said := "no record shows how results of measurements are kept for the time that the law asks for" if count(papers) == 0

else := null
