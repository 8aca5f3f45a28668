# METADATA
# title: Protectors with a valid certificate of approval (CA)
# description: >-
#   Only protectors with a valid certificate of approval (CA, certificado de aprovação) are supplied. The
#   certificate is judged on the day on which the protector was handed over, and the day from which it is no
#   longer valid is told.
# custom:
#   cite: NR-6 6.5.1 a (secondary source)
#   subject: worker
#   topic: protectors
#   severity: major
#   evidence: [protector, protector_issue]
#   remedy: >-
#     Supply a protector with a valid CA, and record number and validity with the model.
package duty.ppe_certificate

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"because": common.refs([input.protection]),
	"facts": {
		"protector": input.protection.protector,
		"certificate": input.protection.certificate,
		"valid_until": input.protection.certified_to,
	},
}) if {
	input.protection != null
}

# The first of these that fits.
verdict := {
	"holds": null,
	"note": "the number of the certificate of approval of the protector is not on record",
	"missing": ["the certificate of approval of the protector"],
} if {
	input.protection.certificate == null
} else := {
	"holds": null,
	"note": "the record does not say until when the certificate of approval is valid",
	"missing": ["the last day of validity of the certificate of approval"],
} if {
	input.protection.certified_to == null
} else := {
	"holds": false,
	"on": input.protection.date,
	"note": sprintf("the certificate of approval was valid until %s, before the protector was handed over", [input.protection.certified_to]),
} if {
	input.protection.certified_to < input.protection.date
} else := {"holds": true, "on": input.protection.date, "note": "the certificate of approval was valid when the protector was handed over"}

not_owed contains "no protector is at hand" if input.protection == null
