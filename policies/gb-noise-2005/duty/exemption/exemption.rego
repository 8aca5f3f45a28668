# METADATA
# title: Conditions of an exemption
# description: >-
#   HSE may exempt from regulations 6(4), 7(1) and 7(2) by a certificate where wearing protectors raises the overall
#   risk to health and safety. It needs consultation, the lowest risk that is reasonably practicable, and increased
#   health surveillance. Certificates for emergency services and defence are shown by their record.
# custom:
#   cite: Control of Noise at Work Regulations regs 11 to 13
#   subject: site
#   topic: controls
#   severity: major
#   evidence: [document]
#   remedy: Keep the certificate on file, with a record of consultation, of how the risk is kept lowest and of the increased health surveillance; without a certificate choose no exemption.
package duty.exemption

import data.common
import rego.v2

obligations contains verdict if claimed

not_owed contains "the site claims no exemption" if not claimed

claimed if input.choices.exemption != "none"

papers := [paper | some paper in input.documents; paper.kind == "exemption"]

latest := papers[count(papers) - 1]

verdict := {"holds": false, "note": "the site claims an exemption, and no certificate is on record"} if {
	count(papers) == 0
} else := {
	"holds": true,
	"note": "the certificate is on record",
	"because": [latest.ref],
} if {
	input.choices.exemption != "overall_risk"
} else := {
	"holds": null,
	"note": "no conditions of the exemption are in force on the day of the certificate",
	"missing": ["the conditions in force on that day"],
	"because": [latest.ref],
} if {
	conditions == null
} else := {
	"holds": null,
	"note": "the record of the certificate does not say which conditions are met",
	"missing": ["what the record covers"],
	"because": [latest.ref],
} if {
	count(latest.covers) == 0
} else := {
	"holds": false,
	"note": sprintf("not shown: %s", [common.in_words(lacking)]),
	"because": [latest.ref],
} if {
	count(lacking) > 0
} else := {
	"holds": true,
	"note": "the certificate and its three conditions are on record",
	"because": [latest.ref],
}

conditions := common.at(data.parameters.exemption_conditions, latest.date)

lacking := [word | some word in conditions; not word in latest.covers]
